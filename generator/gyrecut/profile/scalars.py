"""Single values of a profile other than quantities: names, texts, counts and plain ratios."""

from __future__ import annotations

import re
from abc import ABC, abstractmethod
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from difflib import get_close_matches
from math import isfinite
from typing import TYPE_CHECKING, Any, Protocol, runtime_checkable

from pydantic_core import PydanticCustomError, core_schema

from gyrecut.profile.problems import Code

if TYPE_CHECKING:
    from collections.abc import Callable, Iterable

    from pydantic import GetCoreSchemaHandler, GetJsonSchemaHandler

MISTAKE = "mistake"


def mistake(
    code: Code, what: str, *, allowed: str, fix: str, about_key: bool = False
) -> PydanticCustomError:
    """Build the error a validator raises; its context is all a `Problem` needs but the place.

    Parameters
    ----------
    code : Code
        Stable code of the mistake.
    what : str
        What is wrong, as the rest of a sentence that begins with the key path.
    allowed, fix : str
        What may stand there, what to do.
    about_key : bool
        The mistake is the key, not its value.
    """
    return PydanticCustomError(
        MISTAKE,
        "{what}; allowed: {allowed}; do: {fix}",
        {"code": code, "what": what, "allowed": allowed, "fix": fix, "about_key": about_key},
    )


def closest(given: object, names: Iterable[str]) -> str | None:
    """Give the known name that `given` is most likely a slip of, or None."""
    folded = {name.casefold().replace(" ", ""): name for name in names}
    found = get_close_matches(str(given).casefold().replace(" ", ""), folded, n=1, cutoff=0.7)
    return folded[found[0]] if found else None


def or_else(near: str | None, otherwise: str) -> str:
    """Say what to do about an unknown word: perhaps another was meant."""
    return f'did you mean "{near}"? if not, {otherwise}' if near else otherwise


def refuse_other_shapes(given: object, *, allowed: str, example: str) -> None:
    """Refuse nothing, a list or a mapping where one value belongs."""
    fix = f'write one value, such as "{example}"'
    if given is None:
        raise mistake(Code.EMPTY, "is empty", allowed=allowed, fix=fix)
    if isinstance(given, Mapping):
        what = "is a group of keys where one value belongs"
        raise mistake(Code.WRONG_SHAPE, what, allowed=allowed, fix=fix)
    if isinstance(given, Sequence) and not isinstance(given, str):
        what = "is a list where one value belongs"
        raise mistake(Code.WRONG_SHAPE, what, allowed=allowed, fix=fix)


@runtime_checkable
class Described(Protocol):
    """A rule that can say what it allows and show a good value."""

    @property
    def allowed(self) -> str:
        """What may be written."""

    @property
    def example(self) -> str:
        """A good value as it is written in YAML."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Scalar(ABC):
    """One value and its rule, to be put into ``Annotated``.

    Parameters
    ----------
    example : str
        A good value as it is written in YAML.
    """

    example: str

    @property
    @abstractmethod
    def allowed(self) -> str:
        """What may be written, for messages and for the editor."""

    @abstractmethod
    def read(self, given: object) -> Any:  # noqa: ANN401 - what comes out is each subclass's own
        """Give the value the program uses, or raise a `mistake`."""

    @abstractmethod
    def schema(self) -> dict[str, Any]:
        """Describe what `read` accepts as JSON Schema."""

    def __get_pydantic_core_schema__(
        self, _source: object, _handler: GetCoreSchemaHandler
    ) -> core_schema.CoreSchema:
        """Let pydantic read the value with `read` alone."""
        return core_schema.no_info_plain_validator_function(self.checked)

    def __get_pydantic_json_schema__(
        self, _schema: core_schema.CoreSchema, _handler: GetJsonSchemaHandler
    ) -> dict[str, Any]:
        """Let pydantic describe the value with `schema` alone."""
        return self.schema()

    def checked(self, given: object) -> Any:  # noqa: ANN401 - same
        """Give the value like `read`, and refuse lists, mappings and nothing before."""
        refuse_other_shapes(given, allowed=self.allowed, example=self.example)
        return self.read(given)


@dataclass(frozen=True, slots=True, kw_only=True)
class OneOf(Scalar):
    """One of a list of names.

    Parameters
    ----------
    noun : str
        What is named, such as "hose".
    names : callable
        Gives the names; called when a value is read, so that no table is loaded before.
    nearest : callable, optional
        Gives the name a slip was likely meant to be, where letters are a bad guide to that.
    otherwise : str
        What to do if that was not meant.
    """

    noun: str
    names: Callable[[], Iterable[str]]
    nearest: Callable[[object], str | None] | None = None
    otherwise: str = "choose one of the allowed names"

    @property
    def allowed(self) -> str:
        """All names, in the order of their table."""
        return ", ".join(self.names())

    def read(self, given: object) -> str:
        """Give the name back if it is known."""
        names = tuple(self.names())
        if isinstance(given, str) and given in names:
            return given
        near = self.nearest(given) if self.nearest else closest(given, names)
        fix = or_else(near, self.otherwise)
        what = f"is not a known {self.noun}"
        raise mistake(Code.UNKNOWN_NAME, what, allowed=self.allowed, fix=fix)

    def schema(self) -> dict[str, Any]:
        """List the names."""
        return {"enum": list(self.names()), "examples": [self.example]}


@dataclass(frozen=True, slots=True, kw_only=True)
class Slug(Scalar):
    """A name that is safe as a folder name on every system."""

    PATTERN = r"[a-z0-9][a-z0-9-]{0,63}"

    @property
    def allowed(self) -> str:
        """Which characters, and how many."""
        return "1 to 64 small letters, digits and hyphens, not a hyphen first"

    def read(self, given: object) -> str:
        """Give the name back if it fits."""
        if isinstance(given, str) and re.fullmatch(self.PATTERN, given):
            return given
        fix = f'write a name such as "{self.example}"'
        what = "cannot be used as a file name"
        if not isinstance(given, str):
            what, fix = "is not a text", f'put it in quotes: "{given}"'
            raise mistake(Code.NOT_A_TEXT, what, allowed=self.allowed, fix=fix)
        raise mistake(Code.BAD_NAME, what, allowed=self.allowed, fix=fix)

    def schema(self) -> dict[str, Any]:
        """Give the pattern."""
        return {"type": "string", "pattern": f"^{self.PATTERN}$", "examples": [self.example]}


@dataclass(frozen=True, slots=True, kw_only=True)
class Text(Scalar):
    """A free text."""

    longest: int = 500

    @property
    def allowed(self) -> str:
        """How long it may be."""
        return f"a text of up to {self.longest} characters"

    def read(self, given: object) -> str:
        """Give the text back if it is one."""
        if not isinstance(given, str):
            fix = "put it in quotes"
            raise mistake(Code.NOT_A_TEXT, "is not a text", allowed=self.allowed, fix=fix)
        if len(given) > self.longest:
            what = f"has {len(given)} characters"
            raise mistake(Code.OUT_OF_RANGE, what, allowed=self.allowed, fix="shorten it")
        if not given.replace("\n", "").isprintable():
            what, fix = "holds a character that cannot be printed", "delete that character"
            raise mistake(Code.NOT_A_TEXT, what, allowed=self.allowed, fix=fix)
        return given

    def schema(self) -> dict[str, Any]:
        """Give the length."""
        return {"type": "string", "maxLength": self.longest, "examples": [self.example]}


@dataclass(frozen=True, slots=True, kw_only=True)
class WholeNumber(Scalar):
    """A count.

    Parameters
    ----------
    low, high : int
        Smallest and largest count.
    """

    low: int
    high: int

    @property
    def allowed(self) -> str:
        """The range."""
        return f"a whole number, {self.low} to {self.high}"

    def read(self, given: object) -> int:
        """Give the count back if it is one and lies in the range."""
        # bool is an int to Python, and "count: true" is a slip all the same
        if not isinstance(given, int) or isinstance(given, bool):
            fix = f'write a count without a unit, such as "{self.example}"'
            what = "is not a whole number"
            raise mistake(Code.NOT_A_WHOLE_NUMBER, what, allowed=self.allowed, fix=fix)
        if not self.low <= given <= self.high:
            fix = "give a number in that range"
            raise mistake(Code.OUT_OF_RANGE, "is out of range", allowed=self.allowed, fix=fix)
        return given

    def schema(self) -> dict[str, Any]:
        """Give the range."""
        examples = [int(self.example)]
        return {
            "type": "integer",
            "minimum": self.low,
            "maximum": self.high,
            "examples": examples,
        }


@dataclass(frozen=True, slots=True, kw_only=True)
class PlainNumber(Scalar):
    """A ratio, which has no unit.

    Parameters
    ----------
    low, high : float
        Smallest and largest value [-].
    """

    low: float
    high: float

    @property
    def allowed(self) -> str:
        """The range."""
        return f"a number without a unit, {self.low:g} to {self.high:g}"

    def read(self, given: object) -> float:
        """Give the number back as a float if it lies in the range."""
        if not isinstance(given, int | float) or isinstance(given, bool) or not isfinite(given):
            fix = f'write a number with a decimal point and no unit, such as "{self.example}"'
            what = "is not a plain number"
            raise mistake(Code.NOT_A_NUMBER, what, allowed=self.allowed, fix=fix)
        if not self.low <= given <= self.high:
            fix = "give a number in that range"
            raise mistake(Code.OUT_OF_RANGE, "is out of range", allowed=self.allowed, fix=fix)
        return float(given)

    def schema(self) -> dict[str, Any]:
        """Give the range."""
        examples = [float(self.example)]
        return {
            "type": "number",
            "minimum": self.low,
            "maximum": self.high,
            "examples": examples,
        }

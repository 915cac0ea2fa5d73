"""Values that are a list, or that may take one of several forms."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import TYPE_CHECKING, Any

from pydantic import ValidationError
from pydantic_core import InitErrorDetails, PydanticCustomError, core_schema

from gyrecut.profile.group import Group, missing_value
from gyrecut.profile.problems import Code
from gyrecut.profile.scalars import OneOf, mistake

if TYPE_CHECKING:
    from pydantic import GetCoreSchemaHandler, GetJsonSchemaHandler


@dataclass(frozen=True, slots=True, kw_only=True)
class ListOf:
    """A list of a bounded length, to be put into ``Annotated`` with a tuple type.

    Parameters
    ----------
    noun : str
        What is listed, in the plural.
    low, high : int
        Fewest and most items.
    example : str
        A good list as it is written in YAML.
    """

    noun: str
    low: int
    high: int
    example: str

    @property
    def allowed(self) -> str:
        """How many of what."""
        number = str(self.low) if self.low == self.high else f"{self.low} to {self.high}"
        return f"a list of {number} {self.noun}"

    def __get_pydantic_core_schema__(
        self, source: object, handler: GetCoreSchemaHandler
    ) -> core_schema.CoreSchema:
        """Look at the list before its items are read."""
        return core_schema.no_info_before_validator_function(self._checked, handler(source))

    def __get_pydantic_json_schema__(
        self, schema: core_schema.CoreSchema, handler: GetJsonSchemaHandler
    ) -> dict[str, Any]:
        """Add the length to what pydantic says of the items."""
        return {**handler(schema), "minItems": self.low, "maxItems": self.high}

    def _checked(self, given: object) -> list[Any]:
        fix = f"write it as in {self.example}"
        if given is None:
            raise mistake(Code.EMPTY, "is empty", allowed=self.allowed, fix=fix)
        if not isinstance(given, list):
            raise mistake(Code.WRONG_SHAPE, "is not a list", allowed=self.allowed, fix=fix)
        if not self.low <= len(given) <= self.high:
            what = f"has {len(given)} {self.noun}"
            raise mistake(Code.NUMBER_OF_ITEMS, what, allowed=self.allowed, fix=fix)
        return given


@dataclass(frozen=True, slots=True, kw_only=True)
class NameOr:
    """A name from a list, or a group of own values in its place.

    Parameters
    ----------
    name : OneOf
        Rule of the name.
    group : callable
        Gives the class of the group.
    """

    name: OneOf
    group: Callable[[], type[Group]]

    @property
    def allowed(self) -> str:
        """The names, or the keys of the group."""
        return f"{self.name.allowed}; or own values for {', '.join(self.group().fields_by_key())}"

    @property
    def example(self) -> str:
        """A good name."""
        return self.name.example

    def __get_pydantic_core_schema__(
        self, source: object, handler: GetCoreSchemaHandler
    ) -> core_schema.CoreSchema:
        """Choose by what is written; trying both would report each mistake twice."""
        return core_schema.no_info_wrap_validator_function(self._read, handler(source))

    def __get_pydantic_json_schema__(
        self, _schema: core_schema.CoreSchema, handler: GetJsonSchemaHandler
    ) -> dict[str, Any]:
        """Offer both."""
        return {"anyOf": [self.name.schema(), handler(self.group().__pydantic_core_schema__)]}

    def _read(self, given: object, _inner: core_schema.ValidatorFunctionWrapHandler) -> Any:  # noqa: ANN401
        if isinstance(given, Mapping):
            return self.group().model_validate(given)
        fix = f'write a name, such as "{self.example}", or own values below it'
        if given is None:
            raise mistake(Code.EMPTY, "is empty", allowed=self.allowed, fix=fix)
        if not isinstance(given, str):
            what = "is neither a name nor a group of keys"
            raise mistake(Code.WRONG_SHAPE, what, allowed=self.allowed, fix=fix)
        return self.name.read(given)


@dataclass(frozen=True, slots=True, kw_only=True)
class ByKind:
    """A group whose `kind` says which keys it has.

    Parameters
    ----------
    kinds : callable
        Gives kind -> class of the group.
    example : str
        A good group as it is written in YAML.
    """

    kinds: Callable[[], Mapping[str, type[Group]]]
    example: str

    @property
    def allowed(self) -> str:
        """The kinds."""
        return "a group of keys, kind one of " + ", ".join(self.kinds())

    def __get_pydantic_core_schema__(
        self, source: object, handler: GetCoreSchemaHandler
    ) -> core_schema.CoreSchema:
        """Choose by `kind` alone."""
        return core_schema.no_info_wrap_validator_function(self._read, handler(source))

    def _read(self, given: object, _inner: core_schema.ValidatorFunctionWrapHandler) -> Any:  # noqa: ANN401
        fix = f"write it as in {self.example}"
        if given is None:
            raise mistake(Code.EMPTY, "is empty", allowed=self.allowed, fix=fix)
        if not isinstance(given, Mapping):
            what = "is not a group of keys"
            raise mistake(Code.WRONG_SHAPE, what, allowed=self.allowed, fix=fix)
        kinds = self.kinds()
        kind = OneOf(noun="kind", names=lambda: tuple(kinds), example=next(iter(kinds)))
        if "kind" not in given:
            raise _at_kind(missing_value(kind, "kind"))
        try:
            chosen = kind.checked(given["kind"])
        except PydanticCustomError as wrong:
            raise _at_kind(wrong) from wrong
        return kinds[chosen].model_validate(given)


def _at_kind(wrong: PydanticCustomError) -> ValidationError:
    where = InitErrorDetails(type=wrong, loc=("kind",), input=None)
    return ValidationError.from_exception_data("kind", [where])

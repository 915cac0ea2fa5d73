"""What is wrong with a profile, and where: one problem a mistake, all of them in one error."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum
from typing import TYPE_CHECKING

from gyrecut.errors import PROFILE_INVALID, GyrecutError

if TYPE_CHECKING:
    from collections.abc import Iterable


class Code(StrEnum):
    """Stable code of each kind of mistake; a code is never used again for another meaning."""

    UNREADABLE = "P001"
    TOO_LARGE = "P002"
    NOT_TEXT = "P003"
    NOT_UTF8 = "P004"
    TAB = "P005"
    NOT_YAML = "P006"
    NO_CONTENT = "P007"
    NOT_A_MAPPING = "P008"
    SEVERAL_DOCUMENTS = "P009"
    TOO_DEEP = "P010"
    TOO_MANY_VALUES = "P011"
    UNKNOWN_NAME = "P012"
    DUPLICATE_KEY = "P013"
    BAD_KEY = "P014"
    TAG = "P015"
    EXTENDS_NOT_A_PATH = "P016"
    EXTENDS_OUTSIDE = "P017"
    EXTENDS_MISSING = "P018"
    EXTENDS_CYCLE = "P019"
    EXTENDS_TOO_LONG = "P020"
    UNKNOWN_KEY = "P021"
    MISSING = "P022"
    WRONG_SHAPE = "P023"
    EMPTY = "P024"
    NOT_A_QUANTITY = "P025"
    NO_UNIT = "P026"
    WRONG_UNIT = "P027"
    OUT_OF_RANGE = "P028"
    NOT_A_WHOLE_NUMBER = "P029"
    NOT_A_NUMBER = "P030"
    NOT_A_TEXT = "P031"
    BAD_NAME = "P032"
    SEVERAL_SIZINGS = "P033"
    DUST_INCOMPLETE = "P034"
    NOT_FOR_THIS_PRINTER = "P035"
    MATERIAL_NOT_FOR_PRINTER = "P036"
    NUMBER_OF_ITEMS = "P037"
    NOT_TOGETHER = "P038"
    NOT_IN_ORDER = "P039"
    NEEDS_FLOW = "P040"
    UNBUILDABLE = "P090"


@dataclass(frozen=True, slots=True, kw_only=True)
class Source:
    """One file that was read.

    Parameters
    ----------
    name : str
        The file as messages name it.
    lines : tuple of str
        Its text, for the excerpt below a message.
    order : int
        0 for the profile itself, 1 for the one it extends, and so on.
    """

    name: str
    lines: tuple[str, ...]
    order: int = 0


@dataclass(frozen=True, slots=True, kw_only=True)
class Place:
    """Where something stands in a file; line and column count from 1, width in characters."""

    source: Source
    line: int = 1
    column: int = 1
    width: int = 1


@dataclass(frozen=True, slots=True, kw_only=True)
class Problem:
    """One mistake in a profile.

    Parameters
    ----------
    code : Code
        Stable code.
    place : Place
        File, line and column of the mistake.
    path : str
        Key path such as ``air.hose.nominal``, "" for the profile as a whole.
    what : str
        What is wrong, as the rest of a sentence that begins with the path.
    given, allowed, fix : str
        What stands there, what may stand there, what to do.
    """

    code: Code
    place: Place
    path: str
    what: str
    given: str
    allowed: str
    fix: str

    @property
    def file(self) -> str:
        """File as the user named it."""
        return self.place.source.name

    @property
    def line(self) -> int:
        """Line, from 1."""
        return self.place.line

    @property
    def column(self) -> int:
        """Column, from 1."""
        return self.place.column

    def __str__(self) -> str:
        """Give the whole message: where and what, the source line, and three plain lines."""
        what = f"{self.path or 'the profile'} {self.what}"
        rows = [f"{self.file}:{self.line}:{self.column}: {self.code} {what}"]
        rows += self._excerpt()
        rows += [f"  given: {self.given}", f"  allowed: {self.allowed}", f"  do: {self.fix}"]
        # A profile can hold escape sequences; a message must not hand them to the terminal.
        return "\n".join("".join(c if c.isprintable() else "?" for c in row) for row in rows)

    def _excerpt(self) -> list[str]:
        lines = self.place.source.lines
        if self.line > len(lines):
            return []
        # A tab is one column to us and several to a terminal: the caret must still stand below.
        text = lines[self.line - 1].replace("\t", " ")
        if not text.strip():
            return []
        start = max(0, self.column - _BEFORE_THE_CARET)
        shown = text[start : start + _EXCERPT_WIDTH].rstrip()
        gutter = f"{self.line:>4} | "
        pad = self.column - 1 - start
        carets = "^" * max(1, min(self.place.width, len(shown) - pad))
        return [gutter + shown, " " * (len(gutter) - 2) + "| " + " " * pad + carets]


_EXCERPT_WIDTH = 120
_BEFORE_THE_CARET = 80


class ProfileError(GyrecutError, ValueError):
    """A profile that cannot be used, with all that is wrong with it.

    Parameters
    ----------
    problems : iterable of Problem
        At least one; kept in file order, the profile itself before the ones it extends.
    """

    exit_code = PROFILE_INVALID

    def __init__(self, problems: Iterable[Problem]) -> None:
        self.problems = tuple(
            sorted(problems, key=lambda p: (p.place.source.order, p.line, p.column, p.code))
        )
        super().__init__("\n\n".join(map(str, self.problems)))

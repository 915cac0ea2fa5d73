"""What a command gives back, and the one JSON document that says it to a program."""

from __future__ import annotations

import json
import re
from dataclasses import dataclass
from typing import TYPE_CHECKING, Any

from gyrecut import __version__
from gyrecut.errors import FINE

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping
    from typing import TextIO

    from gyrecut.errors import GyrecutError

SCHEMA = 1  # of the document below; raised when a reader of the old one would misread the new one


@dataclass(frozen=True, slots=True, kw_only=True)
class Reply:
    """The result of a command that could answer.

    Parameters
    ----------
    command : str
        Name of the command.
    result : Mapping
        The answer for a program: text, numbers, lists and mappings only.
    show : callable
        Writes the answer for a person to the stream it is given.
    as_json : bool
        Which of the two is wanted.
    exit_code : int
        0, or 1 when a finding says stop.
    """

    command: str
    result: Mapping[str, Any]
    show: Callable[[TextIO], None]
    as_json: bool
    exit_code: int = FINE

    def write(self, stream: TextIO) -> None:
        """Write the answer in the form that was asked for."""
        if self.as_json:
            stream.write(document(self.command, self.exit_code, result=self.result))
        else:
            self.show(stream)


@dataclass(frozen=True, slots=True, kw_only=True)
class Failure:
    """Why a command could not answer.

    Parameters
    ----------
    exit_code : int
        What the command leaves with.
    kind : str
        The class of the failure in one word, for a program.
    message : str
        What a person reads.
    problems : tuple of Mapping
        The single mistakes of a profile, in file order.
    """

    exit_code: int
    kind: str
    message: str
    problems: tuple[Mapping[str, Any], ...] = ()

    def document(self, command: str | None) -> str:
        """Give the JSON document that stands in for the answer to `command`."""
        error = {"kind": self.kind, "message": self.message, "problems": list(self.problems)}
        return document(command, self.exit_code, error=error)


def failure_of(error: GyrecutError) -> Failure:
    """Give the failure that an error of the user's input or machine comes to."""
    words = re.findall(r"[A-Z][a-z]*", type(error).__name__.removesuffix("Error"))
    kind = "-".join(words).lower()
    # A profile has many mistakes at once. Its error class is not imported for this: `--help`
    # would pay for it.
    problems = tuple(_problem(problem) for problem in getattr(error, "problems", ()))
    return Failure(exit_code=error.exit_code, kind=kind, message=str(error), problems=problems)


def document(
    command: str | None,
    exit_code: int,
    *,
    result: Mapping[str, Any] | None = None,
    error: Mapping[str, Any] | None = None,
) -> str:
    """Give the whole text that `--json` puts on stdout.

    Raises
    ------
    ValueError
        A number is not finite: JSON has no word for it.
    """
    content = {
        "schema": SCHEMA,
        "gyrecut": __version__,
        "command": command,
        "exit_code": exit_code,
        "result": result,
        "error": error,
    }
    return json.dumps(content, indent=2, allow_nan=False) + "\n"


def _problem(problem: Any) -> dict[str, Any]:  # noqa: ANN401 - see `failure_of`
    names = ("code", "file", "line", "column", "path", "what", "given", "allowed", "fix")
    return {name: getattr(problem, name) for name in names}

"""Where `new` puts the starter profile, and what it is called."""

from __future__ import annotations

import re
from typing import TYPE_CHECKING

import typer

from gyrecut.errors import BuildError
from gyrecut.profile import ProfileError, starter_text

if TYPE_CHECKING:
    from pathlib import Path

FALLBACK_NAME = "my-separator"
LONGEST_NAME = 64


def name_from(path: Path | None) -> str:
    """Make the name of a design of the name of its file."""
    words = re.findall(r"[a-z0-9]+", path.stem.lower()) if path else []
    return "-".join(words)[:LONGEST_NAME] or FALLBACK_NAME


def write_starter(name: str, path: Path) -> None:
    """Write the starter profile to a file that does not exist yet.

    Raises
    ------
    typer.BadParameter
        `name` cannot name a design, or there is something at `path` already.
    BuildError
        The system refuses to write there.
    """
    try:
        text = starter_text(name)
    except ProfileError as wrong:
        allowed = wrong.problems[0].allowed
        raise typer.BadParameter(f'"{name}"; allowed: {allowed}', param_hint="--name") from wrong
    try:
        with path.open("x", encoding="utf-8") as stream:
            stream.write(text)
    except FileExistsError as wrong:
        taken = f"{path} exists and is left as it is; give another path"
        raise typer.BadParameter(taken, param_hint="PATH") from wrong
    except OSError as wrong:
        raise BuildError(f"{path} could not be written: {wrong.strerror}") from wrong

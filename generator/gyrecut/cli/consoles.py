"""How text is drawn, where that takes more than writing it: tables, colour, wrapping, bars."""

from __future__ import annotations

import os
from typing import TYPE_CHECKING, NoReturn

from rich.console import Console

if TYPE_CHECKING:
    from typing import TextIO

WIDTH_OF_A_FILE = 120  # columns, where no terminal says how many it has


class OurConsole(Console):
    """A console that leaves it to `main` what a closed pipe means."""

    def on_broken_pipe(self) -> NoReturn:
        """Pass the error on: the library would leave with 1, our code for a finding that stops."""
        raise BrokenPipeError


def console(stream: TextIO) -> Console:
    """Give a console that draws on `stream` only what the stream can show."""
    on_terminal = stream.isatty()
    # An empty NO_COLOR does not count: https://no-color.org
    plain = not on_terminal or bool(os.environ.get("NO_COLOR"))
    return OurConsole(
        file=stream,
        force_terminal=on_terminal,
        color_system=None if plain else "auto",
        width=None if on_terminal else WIDTH_OF_A_FILE,
        markup=False,  # a profile's text may hold square brackets
        highlight=False,
        emoji=False,
    )

"""Where text goes: results to stdout, everything else to stderr, and on to nobody if need be."""

from __future__ import annotations

import os
import sys
from io import TextIOWrapper
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from typing import TextIO


def write_line(text: str, stream: TextIO) -> None:
    """Write a text as it is, with no wrapping: a path or a file's content."""
    stream.write(f"{text}\n")


def tell(text: str, *, quiet: bool = False) -> None:
    """Say something to the person at the terminal, beside the results."""
    if quiet:
        return
    try:
        sys.stderr.write(f"{text}\n")
        sys.stderr.flush()
    except OSError:  # nobody listens any more; the work and its exit code are as good as before
        give_up(sys.stderr)


def give_up(stream: TextIO) -> None:
    """Throw away what the stream could not take.

    Python would try to write it once more on exit, and make its own 120 of the exit code.
    """
    nowhere = os.open(os.devnull, os.O_WRONLY)
    os.dup2(nowhere, stream.fileno())
    os.close(nowhere)


def accept_any_text() -> None:
    """Let a stream whose encoding lacks a character write a question mark instead of failing."""
    for stream in (sys.stdout, sys.stderr):
        if isinstance(stream, TextIOWrapper):
            stream.reconfigure(errors="replace")

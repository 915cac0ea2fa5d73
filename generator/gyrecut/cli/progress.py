"""How far a build has come: a bar for each stage, or plain lines where no terminal is."""

from __future__ import annotations

import os
import sys
from contextlib import contextmanager
from typing import TYPE_CHECKING, Protocol

from gyrecut.cli.streams import tell

if TYPE_CHECKING:
    from collections.abc import Iterator

    from rich.progress import Progress, TaskID


class Progressing(Protocol):
    """What a build calls when it has come further: `done` of `total` steps of `stage`."""

    def __call__(self, stage: str, done: int, total: int) -> None:
        """Say how far it is."""


@contextmanager
def progress(*, quiet: bool) -> Iterator[Progressing]:
    """Show on stderr how far a build has come, for as long as the block lasts."""
    if quiet:
        yield _say_nothing
    elif sys.stderr.isatty() and os.environ.get("TERM") != "dumb":
        with _bars() as bars:
            yield Bars(bars)
    else:
        yield Lines()


class Bars:
    """A bar for each stage, on a terminal."""

    def __init__(self, bars: Progress) -> None:
        self._bars = bars
        self._stages: dict[str, TaskID] = {}

    def __call__(self, stage: str, done: int, total: int) -> None:
        """Draw how far it is."""
        if stage not in self._stages:
            self._stages[stage] = self._bars.add_task(stage, total=total)
        self._bars.update(self._stages[stage], completed=done, total=total)


class Lines:
    """A line where a stage begins and one where it ends."""

    def __init__(self) -> None:
        self._begun: set[str] = set()

    def __call__(self, stage: str, done: int, total: int) -> None:
        """Write how far it is, if that is worth a line."""
        if stage not in self._begun or done == total:
            tell(f"{stage}: {done} of {total}")
        self._begun.add(stage)


def _say_nothing(stage: str, done: int, total: int) -> None:
    """Keep quiet."""


def _bars() -> Progress:
    from rich.progress import (  # noqa: PLC0415 - only a build on a terminal draws bars
        BarColumn,
        MofNCompleteColumn,
        Progress,
        TextColumn,
        TimeElapsedColumn,
    )

    from gyrecut.cli.consoles import console  # noqa: PLC0415 - same

    return Progress(
        TextColumn("{task.description:<12}", markup=False),
        BarColumn(),
        MofNCompleteColumn(),
        TimeElapsedColumn(),
        console=console(sys.stderr),
    )

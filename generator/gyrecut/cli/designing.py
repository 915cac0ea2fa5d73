"""From a profile that reads well to its design, or to the line that stands in its way."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut import pipeline
from gyrecut.errors import OutOfRangeError, UnbuildableError
from gyrecut.profile import at_its_line

if TYPE_CHECKING:
    from pathlib import Path

    from gyrecut.pipeline import Design
    from gyrecut.profile import Profile


def designed(path: Path, read: Profile) -> Design:
    """Design the profile read from `path`; what cannot be built is told at its line there."""
    try:
        return pipeline.design(read)
    except (UnbuildableError, OutOfRangeError) as wrong:
        raise at_its_line(path, wrong) from wrong

"""The profile's own limits, held against what the design comes to."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from gyrecut.findings import Finding, Severity

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.profile.models import Limits


@dataclass(frozen=True, slots=True, kw_only=True)
class Totals:
    """What a whole machine comes to.

    Parameters
    ----------
    pressure_drop : float
        Of all stages one after the other [Pa]
    height : float
        From the floor of the bin to the top of the tallest stage [m]
    cut_size : float
        Finest cut size of all stages [m]
    pieces : int
        Printed objects, copies counted.
    """

    pressure_drop: float
    height: float
    cut_size: float
    pieces: int


def limit_findings(limits: Limits, totals: Totals) -> Iterator[Finding]:
    """Give a stop for each limit of the profile that the design exceeds."""
    rows = (
        ("pressure_drop", "pressure drop", totals.pressure_drop, limits.pressure_drop, 1.0, "Pa"),
        ("height", "height", totals.height, limits.height, 1e3, "mm"),
        ("cut_size", "cut size", totals.cut_size, limits.cut_size, 1e6, "um"),
        ("pieces", "number of pieces", float(totals.pieces), limits.pieces, 1.0, ""),
    )
    for key, words, measured, limit, factor, unit in rows:
        if limit is not None and measured > limit:
            yield Finding(
                code=f"over-limit-{key.replace('_', '-')}",
                severity=Severity.STOP,
                part="design",
                what=f"The {words} is above the profile's own limit.",
                measured=measured * factor,
                limit=limit * factor,
                unit=unit,
                where=f"limits.{key}",
                fix="Change the stages, or the limit.",
            )

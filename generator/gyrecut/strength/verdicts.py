"""How a margin becomes a finding, and how the least that would do is found."""

from __future__ import annotations

from math import ceil
from typing import TYPE_CHECKING

from gyrecut.findings import Finding, Severity

if TYPE_CHECKING:
    from collections.abc import Callable

    from gyrecut.airflow.ranges import Range

HELD_SHARE = 0.5  # of a polymer's short-term strength, for loads of hours: from memory
IMPERFECT_SHELL = 0.75  # of the buckling pressure of a perfect one: NASA SP-8007, from memory
SEAMS = 0.8  # visible seams, glued laps, out of round by 1 %: common practice, no source
KPA = 1e3
STEPS = 10  # of a tenth of a millimetre
_HALVINGS = 60
_ROUNDING = 1e-9


def severity_of(margin: float, factor: float) -> Severity:
    """Grade what holds `margin` times its load and should hold `factor` times."""
    if margin < 1:
        return Severity.STOP
    return Severity.WARN if margin < factor else Severity.NOTE


def verdict(
    codes: tuple[str, str],
    margin: float,
    factor: float,
    *,
    part: str,
    what: str,
    where: str,
    fix: Callable[[], str],
    gravest: Severity = Severity.STOP,
) -> Finding:
    """Say whether something holds, and what to do where it does not.

    Parameters
    ----------
    codes : tuple of (str, str)
        Where it holds, and where it does not.
    margin, factor : float
        How many times its load it holds, and should hold.
    part, what, where : str
        As in `Finding`.
    fix : callable
        Asked only where it does not hold, since it may have to search.
    gravest : Severity
        What to say at most.

    Returns
    -------
    Finding
    """
    severity = severity_of(margin, factor)
    holds = severity is Severity.NOTE
    return Finding(
        code=codes[0] if holds else codes[1],
        severity=gravest if severity is Severity.STOP else severity,
        part=part,
        what=what,
        measured=margin,
        limit=factor,
        where=where,
        fix="" if holds else fix(),
    )


def as_thin(thickness: float, across: float, thin: Range) -> float:
    """Give as much of a thickness as thin-wall theory covers: a thicker one only holds more.

    Parameters
    ----------
    thickness, across : float
        Wall or plate, and the diameter or span it is held against [m]
    thin : Range
        Of thickness over that diameter or span.

    Returns
    -------
    float
        Thickness to count [m]
    """
    return min(thickness, thin.high * (1 - _ROUNDING) * across)


def least_mm(holds: Callable[[float], bool], *, low_mm: float, high_mm: float) -> float | None:
    """Give the least thickness that holds, rounded up to a tenth of a millimetre.

    Parameters
    ----------
    holds : callable
        Told a thickness [mm]; once it holds, every greater one has to hold too.
    low_mm, high_mm : float
        Where to look [mm]

    Returns
    -------
    float or None
        Thickness [mm], None where the greatest does not hold.
    """
    if not holds(high_mm):
        return None
    if holds(low_mm):
        return low_mm
    for _ in range(_HALVINGS):
        middle = (low_mm + high_mm) / 2
        low_mm, high_mm = (low_mm, middle) if holds(middle) else (middle, high_mm)
    return ceil(high_mm * STEPS - 1e-6) / STEPS

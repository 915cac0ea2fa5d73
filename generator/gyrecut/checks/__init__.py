"""Is a piece sound, and can it be printed? Checks on its mesh, given as findings."""

from gyrecut.checks.closed import Closedness
from gyrecut.checks.contact import Stance
from gyrecut.checks.limits import PrintLimits, limits_of
from gyrecut.checks.measures import (
    PieceMeasures,
    SolidMeasures,
    check_mesh,
    findings_of,
    measure_mesh,
)
from gyrecut.checks.overhang import Bridge, Overhang
from gyrecut.checks.thickness import Thickness

__all__ = [
    "Bridge",
    "Closedness",
    "Overhang",
    "PieceMeasures",
    "PrintLimits",
    "SolidMeasures",
    "Stance",
    "Thickness",
    "check_mesh",
    "findings_of",
    "limits_of",
    "measure_mesh",
]

"""Is a piece sound, and can it be printed? Checks on its mesh, given as findings."""

from gyrecut.checks.captive import Cup
from gyrecut.checks.closed import Closedness
from gyrecut.checks.contact import Stance
from gyrecut.checks.features import Feature, Features
from gyrecut.checks.inscribed import thickness_map
from gyrecut.checks.limits import PrintLimits, limits_of
from gyrecut.checks.measures import (
    PieceMeasures,
    SolidMeasures,
    check_mesh,
    estimate_for,
    findings_of,
    measure_mesh,
)
from gyrecut.checks.neighbours import Nearness, measure_nearness, nearness_findings
from gyrecut.checks.overhang import Bridge, FacetClass, Overhang
from gyrecut.checks.print_estimate import (
    FilamentSettings,
    PrintEstimate,
    ResinSettings,
    print_estimate,
    settings_of,
)
from gyrecut.checks.thickness import Thickness

__all__ = [
    "Bridge",
    "Closedness",
    "Cup",
    "FacetClass",
    "Feature",
    "Features",
    "FilamentSettings",
    "Nearness",
    "Overhang",
    "PieceMeasures",
    "PrintEstimate",
    "PrintLimits",
    "ResinSettings",
    "SolidMeasures",
    "Stance",
    "Thickness",
    "check_mesh",
    "estimate_for",
    "findings_of",
    "limits_of",
    "measure_mesh",
    "measure_nearness",
    "nearness_findings",
    "print_estimate",
    "settings_of",
    "thickness_map",
]

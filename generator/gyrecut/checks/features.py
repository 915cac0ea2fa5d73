"""Details too small for the process: gaps that close up, holes that fill, pins that snap.

Gaps and holes are walls and pins of air, so the same measure finds both: a ray from one face to
the face opposite, on the one side of the surface or on the other.

* A gap is narrower than a line and wide: a slot, a groove. Where its faces meet at an angle it is
  a corner, and a corner closes on any printer.
* A hole is narrow along two directions and goes on along a third.
* A pin likewise, in material.
* A detail is what stands up thinner than a line and does not go on as a wall: an embossed stroke.
"""

from __future__ import annotations

from dataclasses import dataclass
from math import cos
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.checks.opposed import CHORD_MM, is_narrow_both_ways, look_round
from gyrecut.checks.thickness import EDGE_ANGLE
from gyrecut.findings import Finding, Severity

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.checks.limits import PrintLimits
    from gyrecut.checks.opposed import Opposed
    from gyrecut.checks.rays import RayCaster

KEPT = 4096  # candidates looked at of one kind; more than that is one feature many times over


@dataclass(frozen=True, slots=True, kw_only=True)
class Feature:
    """The narrowest of one kind.

    Parameters
    ----------
    width_mm : float
        Its width [mm].
    place_mm : tuple of 3 float
        Its middle [mm].
    area_mm2 : float
        Surface of all of its kind that are too narrow [mm2].
    """

    width_mm: float
    place_mm: tuple[float, float, float]
    area_mm2: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Features:
    """Details that are too small; None where there is none of a kind.

    Parameters
    ----------
    gap, hole, pin, detail : Feature or None
        See the module.
    """

    gap: Feature | None
    hole: Feature | None
    pin: Feature | None
    detail: Feature | None


def measure_features(
    caster: RayCaster, walls: Opposed, gaps: Opposed, limits: PrintLimits
) -> Features:
    """Find what is too small for the printer.

    Parameters
    ----------
    caster : RayCaster
        Of one closed surface; its rays run in the material.
    walls : Opposed
        Samples with material between them and a face opposite.
    gaps : Opposed
        Samples with air between them and a face opposite.
    limits : PrintLimits
    """
    air = caster.in_the_air()
    least = limits.least_detail_mm
    narrow = _narrower(gaps, least)
    outlook = look_round(air, narrow, least)
    bores = _narrower(gaps, limits.least_hole_mm)
    is_hole = is_narrow_both_ways(air, bores, limits.least_hole_mm, limits.least_hole_mm / 2)

    thin = _narrower(walls, max(limits.least_pin_mm, least))
    stance = look_round(caster, thin, limits.smallest_wall_mm, edge_angle=EDGE_ANGLE)
    # The facets of a round pin are seldom parallel in pairs: only a blunter edge is none of it.
    is_blunt = stance.is_edge & (thin.facing < cos(EDGE_ANGLE))
    is_pin = is_narrow_both_ways(caster, thin, limits.least_pin_mm, limits.smallest_wall_mm)
    is_pin &= ~is_blunt & ~stance.is_wide
    is_lost = ~stance.is_edge & ~stance.is_wide & ~is_pin & (thin.distance < least - CHORD_MM)
    return Features(
        gap=_narrowest(narrow, ~outlook.is_edge & outlook.is_wide),
        hole=_narrowest(bores, is_hole),
        pin=_narrowest(thin, is_pin),
        detail=_narrowest(thin, is_lost),
    )


def _narrower(places: Opposed, limit_mm: float) -> Opposed:
    """Keep what is narrower than a limit; of very many an even choice, which stands for all."""
    which = np.flatnonzero(places.distance < limit_mm - CHORD_MM)
    return places.pick(which[:: max(1, -(-len(which) // KEPT))])


def _narrowest(places: Opposed, chosen: NDArray[np.bool_]) -> Feature | None:
    which = np.flatnonzero(chosen)
    if len(which) == 0:
        return None
    least = which[places.distance[which].argmin()]
    x, y, z = places.middle[least].tolist()
    return Feature(
        width_mm=float(places.distance[least]),
        place_mm=(x, y, z),
        area_mm2=float(places.weight[which].sum()),
    )


def feature_findings(features: Features, piece: str, limits: PrintLimits) -> tuple[Finding, ...]:
    """Say which details will not come out."""
    kinds = (
        (
            "narrow-gap",
            features.gap,
            limits.least_detail_mm,
            "a gap is {:.2f} mm wide; below {:.2f} mm its sides run together",
            "widen it, or close it in the design",
        ),
        (
            "small-hole",
            features.hole,
            limits.least_hole_mm,
            "a hole is {:.2f} mm across; below {:.2f} mm it fills up",
            "widen it, or drill it after printing",
        ),
        (
            "thin-pin",
            features.pin,
            limits.least_pin_mm,
            "a pin is {:.2f} mm thick; below {:.2f} mm it snaps",
            "make it thicker, or put a screw in its place",
        ),
        (
            "lost-detail",
            features.detail,
            limits.least_detail_mm,
            "a detail is {:.2f} mm thick; below {:.2f} mm it is left out",
            "make its strokes wider, or leave it out",
        ),
    )
    findings = []
    for code, feature, limit, what, fix in kinds:
        if feature is None:
            continue
        x, y, z = feature.place_mm
        findings.append(
            Finding(
                code=code,
                severity=Severity.WARN,
                part=piece,
                what=what.format(feature.width_mm, limit),
                measured=feature.width_mm,
                limit=limit,
                unit="mm",
                where=f"({x:.1f}, {y:.1f}, {z:.1f}) mm in print pose",
                fix=fix,
            )
        )
    return tuple(findings)

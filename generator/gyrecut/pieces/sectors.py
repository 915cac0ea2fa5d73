"""Cuts rings and plates into equal sectors that lap over each other.

A ring's wall is lapped half by half: the inner half of one sector reaches over the outer half
of the next. A plate prints lying down, where such a step would hang in the air; its edges are
tongue and groove with flanks at the printable slope instead.
"""

from __future__ import annotations

from math import cos, pi, sin, tan
from typing import TYPE_CHECKING

from cadquery import func
from cadquery.func import Solid, Vector

from gyrecut.solids.shapes import (
    common,
    joined,
    one_solid,
    polar,
    prism,
    revolved,
    sound,
    without,
)

if TYPE_CHECKING:
    from gyrecut.proportions.dimensions import Body, Joint, Point, Ring

FAR = 3000.0  # beyond every machine
BEYOND = 1.0


def ring_sectors(solid: Solid, ring: Ring, body: Body, joint: Joint) -> tuple[Solid, ...]:
    """Cut one ring into its sectors.

    Parameters
    ----------
    solid : Solid
        The whole ring in machine coordinates.
    ring : Ring
        How many sectors, and the angle of the first cut.
    body, joint : Body, Joint
        Wall, lap length and gap.

    Returns
    -------
    tuple of Solid
        In the order of the angles, counter-clockwise seen from above.
    """
    if ring.sectors == 1:
        return (solid,)
    box = solid.BoundingBox()
    low, high = box.zmin - BEYOND, box.zmax + BEYOND
    step = 2 * pi / ring.sectors
    radius = min(body.inside_radius_at(z) for z in (ring.top_mm, ring.bottom_mm))
    half_lap = joint.lap_mm / 2 / radius
    half_gap = joint.clearance_mm / 2 / radius
    sectors = []
    for index in range(ring.sectors):
        start = ring.first_cut + index * step
        end = start + step
        wedge = revolved(
            (0.0, low),
            (FAR, low),
            (FAR, high),
            (0.0, high),
            first=start - half_lap + half_gap,
            last=end + half_lap - half_gap,
        )
        # the inner tongue stays at the far end, the outer one at the near end
        inner = _half_wall(body, low, high, joint.clearance_mm / 2, inside=True)
        outer = _half_wall(body, low, high, -joint.clearance_mm / 2, inside=False)
        take_inner = revolved(
            *inner, first=start - half_lap - half_gap, last=start + half_lap + half_gap
        )
        take_outer = revolved(
            *outer, first=end - half_lap - half_gap, last=end + half_lap + half_gap
        )
        what = f"sector {index + 1} of {ring.sectors}"
        sectors.append(
            sound(what, without(what, common(what, solid, wedge), take_inner, take_outer))
        )
    return tuple(sectors)


def _half_wall(
    body: Body, low: float, high: float, offset: float, *, inside: bool
) -> tuple[Point, ...]:
    """Outline (radius, z) of all that lies inside, or outside, the middle of the wall."""
    heights = sorted({low, high, *(z for z in (-body.barrel_height_mm,) if low < z < high)})
    middle = [
        ((body.inside_radius_at(z) + body.outside_radius_at(z)) / 2 + offset, z) for z in heights
    ]
    rim = 0.0 if inside else FAR
    return (*middle, (rim, high), (rim, low))


def plate_sectors(
    solid: Solid,
    *,
    sectors: int,
    first_cut: float,
    thickness_mm: float,
    gap_mm: float,
    slope: float,
) -> tuple[Solid, ...]:
    """Cut a plate lying on z = 0 into sectors with tongue and groove.

    Parameters
    ----------
    solid : Solid
        The whole plate, from z = 0 to its thickness.
    sectors : int
        How many.
    first_cut : float
        Angle of the first cut [rad].
    thickness_mm, gap_mm : float
        Thickness of the plate, and gap in each seam [mm].
    slope : float
        Lean of the flanks from the vertical [rad].

    Returns
    -------
    tuple of Solid
    """
    if sectors == 1:
        return (solid,)
    step = 2 * pi / sectors
    cut = []
    for index in range(sectors):
        start = first_cut + index * step
        end = start + step
        what = f"lid sector {index + 1} of {sectors}"
        wedge = prism(
            (0.0, 0.0),
            polar(FAR, start),
            (polar(FAR, start + step / 2), polar(FAR, end)),
            bottom=-BEYOND,
            top=thickness_mm + BEYOND,
        )
        # seams are planes shifted by half the gap to either side of the cut
        wedge = wedge.moved(
            x=_bisector_shift(start, step, gap_mm)[0], y=_bisector_shift(start, step, gap_mm)[1]
        )
        tongue = _ridge(end, thickness_mm, slope, -gap_mm / 2)
        groove = _ridge(start, thickness_mm, slope, gap_mm / 2)
        whole = joined(what, common(what, solid, wedge), common(what, solid, tongue))
        cut.append(sound(what, without(what, whole, groove)))
    return tuple(cut)


def _bisector_shift(start: float, step: float, gap: float) -> Point:
    """How far a wedge moves along its middle so that both faces step back by half the gap."""
    return polar(gap / 2 / sin(step / 2), start + step / 2)


def _ridge(angle: float, thickness: float, slope: float, shift: float) -> Solid:
    """Triangular ridge along a cut, `shift` on from it, pointing the way the angle grows."""
    tip = thickness / 2 * tan(slope)
    back = BEYOND
    across = (-sin(angle), cos(angle))

    def place(u: float, z: float) -> Vector:
        return Vector(across[0] * u, across[1] * u, z)

    outline = func.wire(
        func.polyline(
            place(shift - back, 0.0),
            place(shift, 0.0),
            place(shift + tip, thickness / 2),
            place(shift, thickness),
            place(shift - back, thickness),
            place(shift - back, 0.0),
        )
    )
    along = Vector(cos(angle) * FAR, sin(angle) * FAR, 0.0)
    return one_solid(func.extrude(func.face(outline), along), "a ridge")

"""Small prints that tell, in under an hour, how the printer's fits come out, in millimetres.

Each stands round the z axis as it prints: a stepped gauge with the taper of a hose cuff, a piece of
ring joint with its socket, and a bar with insert holes.
"""

from __future__ import annotations

from dataclasses import dataclass
from math import tan
from typing import TYPE_CHECKING

from gyrecut.proportions.dimensions import Body
from gyrecut.solids.shapes import block, joined, revolved, sound, upright_holes, without
from gyrecut.solids.sockets import collar

if TYPE_CHECKING:
    from cadquery.func import Solid

    from gyrecut.proportions.dimensions import Cuff, Joint, Point, Screws

CUFF_STEPS_MM = (0.4, 0.2, 0.0, -0.2, -0.4)  # on the diameter, from the foot up for "over"
HOLE_STEPS_MM = (-0.1, 0.0, 0.1)  # on the diameter
BEYOND = 1.0
FOOT_MM = 2.0  # below the socket's gusset
GRIP_MM = 2.0  # of the spigot above the socket
SPIGOT_RADIUS_MM = 8.0
MORE_THAN_WALL = 2.5  # outside radius of the spigot over its wall, for a bore that stays open


@dataclass(frozen=True, slots=True, kw_only=True)
class Land:
    """One step of a gauge: its mating diameter half way up, and the height of that [mm]."""

    diameter_mm: float
    z_mm: float


def lands(cuff: Cuff, mating_mm: float, land_mm: float) -> tuple[Land, ...]:
    """Give the steps of a gauge from its foot up.

    Parameters
    ----------
    cuff : Cuff
        The hose's cuff: "over" gauges narrow upwards, "inside" ones widen.
    mating_mm : float
        Diameter that the cuff is made for [mm].
    land_mm : float
        Height of one step [mm].
    """
    steps = CUFF_STEPS_MM if cuff.fit == "over" else CUFF_STEPS_MM[::-1]
    return tuple(
        Land(diameter_mm=mating_mm + step, z_mm=(index + 0.5) * land_mm)
        for index, step in enumerate(steps)
    )


def gauge_radius(cuff: Cuff, mating_mm: float, land_mm: float, wall_mm: float) -> float:
    """Radius of the gauge's plain side: the bore for "over", the outside for "inside" [mm]."""
    rise = abs(_taper(cuff)) * land_mm / 2
    if cuff.fit == "over":
        return (mating_mm + min(CUFF_STEPS_MM)) / 2 - rise - wall_mm
    return (mating_mm + max(CUFF_STEPS_MM)) / 2 + rise + wall_mm


def cuff_gauge(cuff: Cuff, mating_mm: float, *, land_mm: float, wall_mm: float) -> Solid:
    """Make a stack of short cuffs, each with the real cuff's taper and 0.2 mm from the next.

    Parameters
    ----------
    cuff : Cuff
        The hose's cuff.
    mating_mm : float
        Diameter that it is made for [mm].
    land_mm : float
        Height of one step [mm].
    wall_mm : float
        Least wall [mm].

    Returns
    -------
    Solid
        Standing on z = 0.
    """
    slope = _taper(cuff)
    stepped: list[Point] = []
    for land in lands(cuff, mating_mm, land_mm):
        radius, half = land.diameter_mm / 2, land_mm / 2
        stepped += [
            (radius - slope * half, land.z_mm - half),
            (radius + slope * half, land.z_mm + half),
        ]
    plain, top = gauge_radius(cuff, mating_mm, land_mm, wall_mm), stepped[-1][1]
    return sound("cuff gauge", revolved(*stepped, (plain, top), (plain, 0.0)))


def _taper(cuff: Cuff) -> float:
    """Radius gained a millimetre up."""
    return (cuff.tip_diameter_mm - cuff.root_diameter_mm) / 2 / cuff.length_mm


def joint_body(wall_mm: float) -> Body:
    """Give the small tube whose joint is tried: barrel all the way through it."""
    outer = max(SPIGOT_RADIUS_MM, MORE_THAN_WALL * wall_mm)
    return Body(
        diameter_mm=2 * (outer - wall_mm),
        barrel_height_mm=1000.0,
        total_height_mm=2000.0,
        dust_outlet_diameter_mm=outer - wall_mm,
        wall_mm=wall_mm,
    )


def socket_coupon(body: Body, joint: Joint, slope: float) -> Solid:
    """Make a ring's upper end: the machine's own socket on a small tube, its seat at z = 0."""
    outer, inner = body.outer_radius_mm, body.radius_mm
    low = -(joint.clearance_mm + joint.collar_mm) / tan(slope) - FOOT_MM
    tube = revolved((inner, low), (outer, low), (outer, 0.0), (inner, 0.0))
    return sound("socket", joined("socket", tube, collar(body, joint, 0.0, gusset=slope)))


def spigot_coupon(body: Body, joint: Joint) -> Solid:
    """Make a ring's plain end, as long as the lap and a grip more."""
    outer, inner, height = body.outer_radius_mm, body.radius_mm, joint.lap_mm + GRIP_MM
    return sound("spigot", revolved((inner, 0.0), (outer, 0.0), (outer, height), (inner, height)))


def insert_places(screws: Screws) -> tuple[Point, ...]:
    """Middles (x, y) of the insert holes, the narrowest first."""
    return tuple((index * screws.boss_mm, 0.0) for index in range(len(HOLE_STEPS_MM)))


def insert_coupon(screws: Screws) -> Solid:
    """Make a bar of bosses with insert holes, through it, each 0.1 mm wider than the one before."""
    half, height = screws.boss_mm / 2, screws.insert_depth_mm
    places = insert_places(screws)
    bar = block((-half, -half, 0.0), (places[-1][0] + half, half, height))
    holes = (
        upright_holes((place,), screws.insert_hole_mm + step, bottom=-BEYOND, top=height + BEYOND)
        for place, step in zip(places, HOLE_STEPS_MM, strict=True)
    )
    return sound("insert bar", without("insert bar", bar, *(hole for (hole,) in holes)))

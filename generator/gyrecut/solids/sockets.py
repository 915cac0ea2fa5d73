"""The socket that takes the spigot above a ring cut: a collar outside the wall, millimetres."""

from __future__ import annotations

from math import cos
from typing import TYPE_CHECKING

from gyrecut.solids.shapes import revolved

if TYPE_CHECKING:
    from cadquery.func import Solid

    from gyrecut.proportions.dimensions import Body, Joint, Point


def collar(body: Body, joint: Joint, seat_mm: float, *, gusset: float | None) -> Solid:
    """Make the collar whose seat, where the upper ring stands, is at z = `seat_mm`.

    Parameters
    ----------
    body, joint : Body, Joint
        The wall it follows, and gap, lap and thickness.
    seat_mm : float
        Height of the cut [mm].
    gusset : float or None
        Lean from the vertical [rad] at which the collar grows out of the wall below its seat;
        None where it stands on a plate.

    Returns
    -------
    Solid
    """
    top = seat_mm + joint.lap_mm
    # gap and collar are square to the wall, so wider across where the wall leans
    heights = [seat_mm, top]
    if seat_mm < body.mitre_z_mm < top:
        heights.insert(1, body.mitre_z_mm)

    def offset(z_mm: float, distance: float) -> Point:
        lean = body.half_angle if z_mm < body.mitre_z_mm else 0.0
        return (body.outside_radius_at(z_mm) + distance / cos(lean), z_mm)

    gap, thick = joint.clearance_mm, joint.clearance_mm + joint.collar_mm
    inside = [offset(z, gap) for z in heights]
    outside = [offset(z, thick) for z in reversed(heights)]
    if gusset is None:
        return revolved(inside[0], *inside[1:], *outside)
    half_wall = body.wall_mm / 2
    foot = body.foot_of(*outside[-1], gusset)
    foot_radius = body.outside_radius_at(foot)
    return revolved(
        inside[0],
        *inside[1:],
        *outside,
        (foot_radius, foot),
        (foot_radius - half_wall, foot),
        (body.outside_radius_at(seat_mm) - half_wall, seat_mm),
    )

"""Cuts the body at the planned heights and gives each lower ring its socket."""

from __future__ import annotations

from typing import TYPE_CHECKING

from cadquery.func import Solid, Vector

from gyrecut.solids.shapes import common, joined, revolved, sound, without
from gyrecut.solids.sockets import collar

if TYPE_CHECKING:
    from gyrecut.proportions.dimensions import Dimensions

FAR = 3000.0


def rings(body: Solid, d: Dimensions) -> tuple[Solid, ...]:
    """Cut the body into its rings, from the top down.

    Parameters
    ----------
    body : Solid
        Barrel and cone as one solid, machine coordinates.
    d : Dimensions

    Returns
    -------
    tuple of Solid
        Every ring but the first carries the socket collar for the ring above.
    """
    heights = d.division.cut_heights_mm
    if not heights:
        return (body,)
    cut = []
    for index, ring in enumerate(d.division.rings):
        name = f"ring {index + 1}"
        low = ring.bottom_mm
        if ring is d.division.rings[-1]:
            low -= 1.0
        high = ring.top_mm if index else 1.0
        slab = Solid.makeCylinder(FAR, high - low, Vector(0, 0, low))
        if index == 0:
            piece = _top_ring(common(name, body, slab), d)
        else:
            below_keel = _without_keel(body, d) if index == 1 else body
            piece = joined(
                name,
                common(name, below_keel, slab),
                collar(d.body, d.joint, ring.top_mm, gusset=d.slope),
            )
        cut.append(sound(name, piece))
    return tuple(cut)


def _top_ring(ring: Solid, d: Dimensions) -> Solid:
    """Cut the groove for the next ring's collar where the keel reaches down to the cut."""
    if not d.keel_is_cut:
        return ring
    return without("keel", ring, _collar_groove(d, d.division.cut_heights_mm[0]))


def _collar_groove(d: Dimensions, seat: float) -> Solid:
    body, joint = d.body, d.joint
    top = seat + joint.lap_mm + joint.clearance_mm
    depth = joint.collar_mm + 2 * joint.clearance_mm
    low, high = body.outside_radius_at(seat), body.outside_radius_at(top)
    return revolved((low, seat), (high, top), (high + depth, top), (low + depth, seat))


def _without_keel(body: Solid, d: Dimensions) -> Solid:
    """Take away what hangs of the keel below the first cut: it carries nothing there."""
    if not d.keel_is_cut:
        return body
    seat = d.division.cut_heights_mm[0]
    floor = d.keel_bottom_mm - 1.0
    shell, far = d.body, d.portal.farthest_radius_mm + 1.0
    heights = [floor, *([shell.mitre_z_mm] if floor < shell.mitre_z_mm < seat else []), seat]
    outside = [(shell.outside_radius_at(z), z) for z in heights]
    return without("keel", body, revolved(*outside, (far, seat), (far, floor)))

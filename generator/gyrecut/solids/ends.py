"""What stands at the ends: bin ring below, hose outlet or bell-mouth above, millimetres."""

from __future__ import annotations

from math import cos, pi, sin
from typing import TYPE_CHECKING

from cadquery import func

from gyrecut.proportions.dimensions import BellMouth
from gyrecut.solids.cuff import cuff_inside, cuff_outside
from gyrecut.solids.grooves import cord_groove
from gyrecut.solids.shapes import drilled, joined, revolved, sound, upright_holes, without
from gyrecut.solids.sockets import collar

if TYPE_CHECKING:
    from cadquery.func import Solid

    from gyrecut.proportions.dimensions import Dimensions, OutletCuff, Point
    from gyrecut.solids.shapes import Arc

BEYOND = 1.0


def bin_ring(d: Dimensions) -> Solid:
    """Make the ring on the bin's lid: a drilled plate with the socket for the end of the cone.

    Parameters
    ----------
    d : Dimensions

    Returns
    -------
    Solid
        In machine coordinates; the end of the cone stands on its plate.
    """
    ring, seat = d.bin_ring, -d.body.total_height_mm
    bore, edge, bottom = ring.bore_mm / 2, ring.outer_radius_mm, seat - ring.thickness_mm
    plate = revolved((bore, bottom), (edge, bottom), (edge, seat), (bore, seat))
    screws = ring.screws
    whole = joined("bin ring", plate, collar(d.body, d.joint, seat, gusset=None))
    holes = upright_holes(
        screws.places_mm, screws.clearance_hole_mm, bottom=bottom - BEYOND, top=seat + BEYOND
    )
    with_holes = drilled("bin ring", whole, holes, depth=ring.thickness_mm)
    return sound("bin ring", without("bin ring", with_holes, *_bin_groove(d, bottom)))


def _bin_groove(d: Dimensions, face: float) -> tuple[Solid, ...]:
    """Groove in the ring's underside for the cord on the bin's lid."""
    if d.seals.bin_ring is None:
        return ()
    bore = func.wire(func.circle(d.bin_ring.bore_mm / 2))
    return (cord_groove(bore, d.seals.bin_ring, face_mm=face, opens_up=False),)


def outlet(d: Dimensions) -> Solid:
    """Make what stands on the finder's stub: a hose outlet over it, or a bell-mouth in it.

    Parameters
    ----------
    d : Dimensions

    Returns
    -------
    Solid
        In machine coordinates.
    """
    if isinstance(d.outlet, BellMouth):
        return sound("bell-mouth", _bell_mouth(d.outlet, d.finder_top_mm, d.slope))
    return sound("outlet", revolved(*_cuff_outline(d.outlet, d, d.finder_top_mm)))


def _cuff_outline(out: OutletCuff, d: Dimensions, seat: float) -> tuple[Point, ...]:
    tube, socket = d.finder, d.finder.outer_radius_mm + d.joint.clearance_mm
    root = seat + out.reducer_length_mm
    low = seat - out.socket_mm
    return (
        (socket, seat),
        (socket, low),
        (out.socket_radius_mm, low),
        (out.socket_radius_mm, seat),
        *cuff_outside(out.cuff, root),
        *cuff_inside(out.cuff, root),
        (tube.bore_mm / 2, seat),
    )


def _bell_mouth(bell: BellMouth, seat: float, slope: float) -> Solid:
    """Plug and rounding below the stub's end, stop and spigot above."""
    throat, rounding = bell.throat_mm / 2, bell.rounding_mm
    spigot, bottom = bell.spigot_radius_mm, seat - bell.plug_length_mm
    stop_top, end = seat + bell.stop_thickness_mm, seat + bell.height_mm(slope)
    gusset_top = stop_top + bell.gusset_mm(slope)
    eighth = pi / 4
    arc: Arc = (
        (throat + rounding - rounding * cos(eighth), bottom + rounding - rounding * sin(eighth)),
        (throat, bottom + rounding),
    )
    return revolved(
        (throat + rounding, bottom),
        arc,
        (throat, end),
        (spigot, end),
        (spigot, gusset_top),
        (bell.stop_radius_mm, stop_top),
        (bell.stop_radius_mm, seat),
        (bell.plug_radius_mm, seat),
        (bell.plug_radius_mm, bottom),
    )

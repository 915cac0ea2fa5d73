"""The lid and the vortex finder that hangs in it, in machine coordinates, millimetres."""

from __future__ import annotations

from math import tan
from typing import TYPE_CHECKING

from cadquery.func import Solid, Vector, clean

from gyrecut.solids.shapes import (
    block,
    drilled,
    joined,
    one_solid,
    revolved,
    sound,
    upright_holes,
    without,
)

if TYPE_CHECKING:
    from gyrecut.proportions.dimensions import Dimensions
    from gyrecut.solids.shapes import Arc

BEYOND = 1.0


def lid(d: Dimensions) -> Solid:
    """Make the lid: a plate over barrel and slot, with the finder's hole and the screw holes.

    Parameters
    ----------
    d : Dimensions

    Returns
    -------
    Solid
        From z = 0 (the roof) to z = its thickness.
    """
    top, screws = d.lid.thickness_mm, d.rim.screws
    disc = Solid.makeCylinder(d.rim.outer_radius_mm, top)
    tab = block(
        (d.portal.face_x_mm, d.portal.frame_low_y_mm, 0.0), (0.0, d.portal.frame_high_y_mm, top)
    )
    plate = one_solid(clean(joined("lid", disc, tab)), "lid")
    hole = Solid.makeCylinder(d.lid.finder_hole_mm / 2, top + 2 * BEYOND, Vector(0, 0, -BEYOND))
    holes = upright_holes(
        screws.places_mm, screws.clearance_hole_mm, bottom=-BEYOND, top=top + BEYOND
    )
    return sound("lid", drilled("lid", without("lid", plate, hole), holes, depth=top))


def finder(d: Dimensions) -> Solid:
    """Make the vortex finder: rounded lip, tube, collar on the lid, and its upper end.

    The upper end is a plain tube: a hose outlet goes over it, a bell-mouth into it.

    Parameters
    ----------
    d : Dimensions

    Returns
    -------
    Solid
        From z = -finder length up.
    """
    tube = d.finder
    bore, outer, lip = tube.bore_mm / 2, tube.outer_radius_mm, tube.wall_mm / 2
    bottom, seat = -tube.length_mm, d.lid.thickness_mm
    collar_top, end = seat + tube.collar_thickness_mm, d.finder_top_mm
    gusset_top = collar_top + (tube.collar_radius_mm - outer) / tan(d.slope)
    lip_arc: Arc = ((bore + lip, bottom), (outer, bottom + lip))
    return sound(
        "vortex finder",
        revolved(
            (bore, bottom + lip),
            lip_arc,
            (outer, seat),
            (tube.collar_radius_mm, seat),
            (tube.collar_radius_mm, collar_top),
            (outer, gusset_top),
            (outer, end),
            (bore, end),
        ),
    )

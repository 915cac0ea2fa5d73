"""The piece between hose and portal, made standing on its flange, millimetres.

Its own frame: w up from the portal's face towards the hose, u and v across; placed in the
machine by `transition_place`: u points to -y, v to +z, w to -x.
"""

from __future__ import annotations

from math import hypot
from typing import TYPE_CHECKING

import numpy as np
from cadquery.func import Location, Plane, Solid

from gyrecut.proportions.inlet import longest_run, mouth_centre
from gyrecut.solids.cuff import cuff_inside, cuff_outside
from gyrecut.solids.grooves import cord_groove
from gyrecut.solids.loft import loft_to_circle
from gyrecut.solids.shapes import (
    block,
    drilled,
    joined,
    outline,
    revolved,
    sound,
    upright_holes,
    without,
)

if TYPE_CHECKING:
    from gyrecut.proportions.dimensions import Dimensions, Point

BEYOND = 1.0


def transition(d: Dimensions) -> Solid:
    """Make the transition: flange, loft from the mouth to the round bore, hose cuff.

    Parameters
    ----------
    d : Dimensions

    Returns
    -------
    Solid
        In its own frame, the flange's face on w = 0.
    """
    t, portal = d.transition, d.portal
    centre = mouth_centre(portal, d.body)
    inner = _local(portal.mouth_outline(d.body.radius_mm), centre)
    bore, widest = t.cuff.bore_mm / 2, t.cuff.widest_radius_mm
    # walls lean: what is laid off across the flow is thicker than the wall by the lean
    lean = longest_run(portal, d.body, bore) / t.length_mm
    outer = _offset(inner, t.wall_mm * hypot(1.0, lean))
    (low_u, high_u), (low_v, high_v) = _flange_span(d)
    flange = block((low_u, low_v, 0.0), (high_u, high_v, t.flange_thickness_mm))
    cuff = revolved(
        (bore, t.length_mm), *cuff_outside(t.cuff, t.length_mm), *cuff_inside(t.cuff, t.length_mm)
    )
    outside = joined("transition", flange, loft_to_circle(outer, widest, t.length_mm), cuff)
    screws = portal.screws
    places = _local(screws.places_mm, centre)
    hollow = without(
        "transition", outside, loft_to_circle(inner, bore, t.length_mm), *_groove(d, inner)
    )
    holes = upright_holes(
        places, screws.clearance_hole_mm, bottom=-BEYOND, top=t.flange_thickness_mm + BEYOND
    )
    return sound("transition", drilled("transition", hollow, holes, depth=t.flange_thickness_mm))


def _groove(d: Dimensions, mouth: tuple[Point, ...]) -> tuple[Solid, ...]:
    """Groove in the flange's face for the cord round the mouth; it prints as a short bridge."""
    if d.seals.transition is None:
        return ()
    return (cord_groove(outline(*mouth, z=0.0), d.seals.transition, face_mm=0.0, opens_up=False),)


def transition_place(d: Dimensions) -> Location:
    """Where the transition's own frame stands in the machine."""
    y, z = mouth_centre(d.portal, d.body)
    return Location(
        Plane(origin=(d.portal.face_x_mm, y, z), xDir=(0.0, -1.0, 0.0), normal=(-1.0, 0.0, 0.0))
    )


def _local(outline: tuple[Point, ...], centre: Point) -> tuple[Point, ...]:
    """Points (y, z) as (u, v), kept counter-clockwise seen from above."""
    return tuple((centre[0] - y, z - centre[1]) for y, z in reversed(outline))


def _flange_span(d: Dimensions) -> tuple[Point, Point]:
    y, z = mouth_centre(d.portal, d.body)
    return (
        (y - d.portal.frame_high_y_mm, y - d.portal.frame_low_y_mm),
        (d.portal.frame_bottom_z_mm - z, -z),
    )


def _offset(outline: tuple[Point, ...], distance: float) -> tuple[Point, ...]:
    """Move every edge of a convex counter-clockwise polygon outwards, corners mitred."""
    corners = np.array(outline)
    edges = np.roll(corners, -1, axis=0) - corners
    normals = np.column_stack((edges[:, 1], -edges[:, 0])) / np.linalg.norm(
        edges, axis=1, keepdims=True
    )
    before = np.roll(normals, 1, axis=0)
    mitre = (normals + before) / (1 + np.sum(normals * before, axis=1, keepdims=True))
    return tuple((float(u), float(v)) for u, v in corners + distance * mitre)

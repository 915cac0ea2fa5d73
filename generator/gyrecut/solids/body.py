"""Barrel and cone, in machine coordinates, millimetres."""

from __future__ import annotations

from math import acos, atan2, hypot, pi, sqrt, tan
from typing import TYPE_CHECKING

from gyrecut.solids.grooves import cord_groove
from gyrecut.solids.shapes import (
    block,
    common,
    drilled,
    holes_along_x,
    joined,
    outline,
    polar,
    prism,
    prism_along_x,
    revolved,
    sound,
    upright_holes,
    without,
)

if TYPE_CHECKING:
    from cadquery.func import Solid

    from gyrecut.proportions.dimensions import Dimensions, Point
    from gyrecut.solids.shapes import Arc

BEYOND = 1.0  # how far a tool sticks out of what it cuts


def barrel(d: Dimensions) -> Solid:
    """Make the barrel: tube, rim for the lid, slot open at the top, portal, keel under both.

    Parameters
    ----------
    d : Dimensions

    Returns
    -------
    Solid
        From z = -barrel height to z = 0 (the keel may hang lower); the roof is the lid.
    """
    radius, outer, height = d.body.radius_mm, d.body.outer_radius_mm, d.body.barrel_height_mm
    tube = revolved((radius, -height), (outer, -height), (outer, 0.0), (radius, 0.0))
    outside = joined("barrel", tube, _rim(d), _inlet(d))
    hollow = without("barrel", outside, *_air_tools(d), *_lid_groove(d))
    rim, portal = d.rim.screws, d.portal.screws
    with_rim = drilled("rim", hollow, _rim_holes(d), depth=rim.insert_depth_mm)
    return sound(
        "barrel", drilled("portal", with_rim, _portal_holes(d), depth=portal.insert_depth_mm)
    )


def cone(d: Dimensions) -> Solid:
    """Make the cone, its wall measured square to the surface, mitred to the barrel's outside."""
    body = d.body
    inside, foot = body.radius_mm, body.dust_outlet_diameter_mm / 2
    top, bottom = -body.barrel_height_mm, -body.total_height_mm
    return sound(
        "cone",
        revolved(
            (inside, top),
            (foot, bottom),
            (body.outside_radius_at(bottom), bottom),
            (body.outer_radius_mm, body.mitre_z_mm),
            (body.outer_radius_mm, top),
        ),
    )


def _rim(d: Dimensions) -> Solid:
    """Flange round the top, on a gusset at the printable slope."""
    outer, middle = d.body.outer_radius_mm, d.body.radius_mm + d.body.wall_mm / 2
    edge, thickness = d.rim.outer_radius_mm, d.rim.thickness_mm
    foot = -thickness - (edge - outer) / tan(d.slope)
    return revolved((middle, foot), (outer, foot), (edge, -thickness), (edge, 0.0), (middle, 0.0))


def _inlet(d: Dimensions) -> Solid:
    """Duct walls, portal frame and side flanges, on a keel that leaves the barrel at the slope.

    All of it stays outside the middle of the barrel's wall: the inside needs no clearing.
    """
    portal, body = d.portal, d.body
    middle = body.radius_mm + body.wall_mm / 2
    low_z = d.keel_bottom_mm - BEYOND
    duct = block(
        (portal.face_x_mm, body.radius_mm - portal.mouth_width_mm - body.wall_mm, low_z),
        (0.0, body.outer_radius_mm, 0.0),
    )
    frame = block(
        (portal.face_x_mm, portal.frame_low_y_mm, low_z),
        (portal.face_x_mm + portal.depth_mm, portal.frame_high_y_mm, 0.0),
    )
    # the frame's inner jamb reaches back to the barrel, or its keel would start in mid-air
    jamb = block(
        (portal.face_x_mm, portal.frame_low_y_mm, low_z),
        (0.0, body.radius_mm - portal.mouth_width_mm, 0.0),
    )
    solids = [frame, jamb, *_side_flanges(d)]
    if d.keel_is_cut:
        solids.append(_keel_foot(d))
    far = portal.farthest_radius_mm
    half_wall = body.wall_mm / 2
    inner: list[Point] = [(middle, 0.0)]
    if d.keel_bottom_mm < -body.barrel_height_mm:
        inner.append((middle, -body.barrel_height_mm))
    foot = (body.outside_radius_at(d.keel_bottom_mm), d.keel_bottom_mm)
    inner.append((foot[0] - half_wall, foot[1]))
    slope_region = revolved(
        *inner,
        foot,
        (far + BEYOND, portal.frame_bottom_z_mm + BEYOND / tan(d.slope)),
        (far + BEYOND, 0.0),
    )
    return common("keel", joined("portal", duct, *solids), slope_region)


def _keel_foot(d: Dimensions) -> Solid:
    """Widen a keel that stands on the bed where the next ring's collar reaches into it.

    The duct's outer wall runs tangent to the barrel: outside the collar's groove it would begin
    as a feather.
    """
    portal, body, seat = d.portal, d.body, d.division.cut_heights_mm[0]
    wall_y, edge_y = body.outer_radius_mm, portal.frame_high_y_mm
    top = seat + d.joint.lap_mm + d.joint.clearance_mm
    return prism_along_x(
        (wall_y - body.wall_mm / 2, d.keel_bottom_mm - BEYOND),
        (edge_y, d.keel_bottom_mm - BEYOND),
        (edge_y, top),
        (wall_y, top + (edge_y - wall_y) / tan(d.slope)),
        (wall_y - body.wall_mm / 2, top + (edge_y - wall_y) / tan(d.slope)),
        start=portal.face_x_mm,
        end=0.0,
    )


def _side_flanges(d: Dimensions) -> tuple[Solid, Solid]:
    """Flanges beside the duct that the lid lies on, each on its gusset."""
    portal, body, thickness = d.portal, d.body, d.rim.thickness_mm

    def flange(wall_y: float, edge_y: float) -> Solid:
        inward = body.wall_mm / 2 if edge_y < wall_y else -body.wall_mm / 2
        foot = -thickness - abs(edge_y - wall_y) / tan(d.slope)
        return prism_along_x(
            (wall_y + inward, 0.0),
            (wall_y + inward, foot),
            (wall_y, foot),
            (edge_y, -thickness),
            (edge_y, 0.0),
            start=portal.face_x_mm,
            end=0.0,
        )

    inner_wall = body.radius_mm - portal.mouth_width_mm - body.wall_mm
    return (
        flange(body.outer_radius_mm, portal.frame_high_y_mm),
        flange(inner_wall, portal.frame_low_y_mm),
    )


def swirl_plan(d: Dimensions) -> tuple[Point, ...]:
    """Plan of barrel and slot channel: five corners, the last two ends of the barrel's arc.

    Where the channel's inner wall meets the bore it would end in a feather; it is cut off square
    where it is as thick as the portal's edge.

    Returns
    -------
    tuple of (float, float)
        Inner and outer corner at the portal, tangent point, and the two corners of the cut edge:
        on the bore, and on the channel's inner wall.
    """
    radius, portal = d.body.radius_mm, d.portal
    channel_x = portal.face_x_mm + portal.depth_mm
    corner = (channel_x, radius - portal.mouth_width_mm)
    slot_x, slot_y = -sqrt(radius**2 - (radius - d.slot.width_mm) ** 2), radius - d.slot.width_mm
    length = hypot(slot_x - corner[0], slot_y - corner[1])
    normal = ((slot_y - corner[1]) / length, -(slot_x - corner[0]) / length)
    depth = portal.edge_mm + normal[0] * slot_x + normal[1] * slot_y
    on_bore = polar(radius, atan2(normal[1], normal[0]) - acos(depth / radius))
    on_wall = (on_bore[0] - portal.edge_mm * normal[0], on_bore[1] - portal.edge_mm * normal[1])
    return corner, (channel_x, radius), (0.0, radius), on_bore, on_wall


def swirl_outline(d: Dimensions) -> tuple[Point, Point, Point, Arc, Point]:
    """Plan of barrel and slot channel, for `prism` and `outline`."""
    corner, start, tangent, on_bore, on_wall = swirl_plan(d)
    # clockwise from the tangent point, the long way round to the slot's inner edge
    end_angle = atan2(on_bore[1], on_bore[0]) % (2 * pi)
    half_way = (pi / 2 + end_angle - 2 * pi) / 2
    return corner, start, tangent, (polar(d.body.radius_mm, half_way), on_bore), on_wall


def _air_tools(d: Dimensions) -> tuple[Solid, ...]:
    """Give what the air takes out of inlet and wall: slot channel with the barrel, and mouth."""
    body, portal, floor = d.body, d.portal, -d.slot.height_mm
    radius = body.radius_mm
    swirl = prism(*swirl_outline(d), bottom=floor, top=BEYOND)
    mouth = prism_along_x(
        *portal.mouth_outline(radius),
        start=portal.face_x_mm - BEYOND,
        end=portal.face_x_mm + portal.depth_mm,
    )
    return swirl, mouth


def _lid_groove(d: Dimensions) -> tuple[Solid, ...]:
    """Groove in the rim for the lid's cord; it runs round barrel and slot, over the lintel."""
    if d.seals.lid is None:
        return ()
    return (
        cord_groove(outline(*swirl_outline(d), z=0.0), d.seals.lid, face_mm=0.0, opens_up=True),
    )


def _rim_holes(d: Dimensions) -> list[Solid]:
    rim = d.rim.screws
    return upright_holes(rim.places_mm, rim.insert_hole_mm, bottom=-rim.insert_depth_mm, top=BEYOND)


def _portal_holes(d: Dimensions) -> list[Solid]:
    portal = d.portal.screws
    return holes_along_x(
        portal.places_mm,
        portal.insert_hole_mm,
        start=d.portal.face_x_mm - BEYOND,
        end=d.portal.face_x_mm + portal.insert_depth_mm,
    )

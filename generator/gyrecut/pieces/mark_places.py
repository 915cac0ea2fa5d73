"""Where marks may stand on each part: outer faces that neither seal nor carry air."""

from __future__ import annotations

from math import cos, hypot, pi, radians, sin, tan
from typing import TYPE_CHECKING

from gyrecut.pieces.places import Flat, Round
from gyrecut.proportions.dimensions import BellMouth
from gyrecut.proportions.inlet import mouth_centre

if TYPE_CHECKING:
    from cadquery.func import Solid

    from gyrecut.pieces.places import Triple
    from gyrecut.proportions.dimensions import Body, Dimensions, Ring

NAME_ANGLES = tuple(radians(a) for a in (-110, -60, -150, -90, 150, 120, 90, 60))
ASIDE = tuple(radians(a) for a in (0, 6, -6, 12, -12, 18, -18))
HEIGHTS = (0.5, 0.35, 0.65, 0.2, 0.8)  # shares of the free height
WASHER = 1.3  # outside of a washer over the screw head's
CLEAR_MM = 1.0
ALONG_DUCT = (0.25, 0.3, 0.2, 0.35)  # of its length, where it is still wide
TRIANGLE = 3


def lid_band(d: Dimensions) -> tuple[float, float]:
    """Radii on the lid's top between which neither collar nor washer lies [mm]."""
    screws = d.rim.screws
    circle = min(hypot(x, y) for x, y in screws.places_mm)
    return (
        d.finder.collar_radius_mm + CLEAR_MM,
        circle - WASHER * screws.head_diameter_mm / 2 - CLEAR_MM,
    )


def on_lid(d: Dimensions, sector: int) -> list[Flat]:
    """Places on the top of the lid, or of one sector of it; up is outwards."""
    low, high = lid_band(d)
    count = d.division.lid_sectors
    step = 2 * pi / count
    middle = d.division.lid_first_cut + (sector + 0.5) * step
    angles = NAME_ANGLES if count == 1 else tuple(middle + aside for aside in ASIDE)
    return [
        on_top(low + share * (high - low), angle, d.lid.thickness_mm)
        for share in HEIGHTS
        for angle in angles
    ]


def on_top(radius_mm: float, angle: float, z_mm: float, *, aside_mm: float = 0.0) -> Flat:
    """Give a place on a level face, up pointing as the ray at `angle`, `aside_mm` left of it."""
    c, s = cos(angle), sin(angle)
    return Flat(
        middle=(radius_mm * c - aside_mm * s, radius_mm * s + aside_mm * c, z_mm),
        right=(s, -c, 0.0),
        up=(c, s, 0.0),
    )


def on_finder(d: Dimensions) -> list[Round]:
    """Places on the edge of the finder's collar."""
    tube = d.finder
    return _round(tube.collar_radius_mm, d.lid.thickness_mm, tube.collar_thickness_mm)


def on_outlet(d: Dimensions) -> list[Round]:
    """Places on the outside of the outlet's socket, or on the edge of a bell-mouth's stop."""
    out, seat = d.outlet, d.finder_top_mm
    if isinstance(out, BellMouth):
        return _round(out.stop_radius_mm, seat, out.stop_thickness_mm)
    return _round(out.socket_radius_mm, seat - out.socket_mm, out.socket_mm)


def _round(radius_mm: float, low_mm: float, height_mm: float) -> list[Round]:
    middle = low_mm + height_mm / 2
    return [Round(radius_mm=radius_mm, z_mm=middle, angle=angle) for angle in NAME_ANGLES]


def on_transition(solid: Solid, d: Dimensions) -> list[Flat]:
    """Places on the duct's flat sides, along the way of the air, the largest side first.

    Parameters
    ----------
    solid : Solid
        The transition where it sits in the machine; its sides are triangles that end at the hose.
    d : Dimensions
    """
    centre_y, centre_z = mouth_centre(d.portal, d.body)
    sides = []
    for face in solid.Faces():
        corners = [corner.toTuple() for corner in face.Vertices()]
        if face.geomType() != "PLANE" or len(corners) != TRIANGLE:
            continue
        normal, middle = face.normalAt().toTuple(), face.Center().toTuple()
        outwards = normal[1] * (middle[1] - centre_y) + normal[2] * (middle[2] - centre_z)
        if outwards > 0:
            sides.append((round(face.Area(), 3), normal, sorted(corners)))
    return [
        _along(normal, corners, share)
        for _, normal, corners in sorted(sides, key=lambda side: side[:2], reverse=True)
        for share in ALONG_DUCT
    ]


def _along(normal: Triple, corners: list[Triple], share: float) -> Flat:
    """Give a place on a triangle whose first corner is the tip, writing the way of the hose."""
    middle = tuple((1 - share) * (b + c) / 2 + share * a for a, b, c in zip(*corners, strict=True))
    # the way to the hose (-x) as it runs in the triangle: upright while the piece prints
    level = hypot(normal[1], normal[2])
    right = (-level, normal[0] * normal[1] / level, normal[0] * normal[2] / level)
    up = (0.0, -normal[2] / level, normal[1] / level)
    return Flat(middle=(middle[0], middle[1], middle[2]), right=right, up=up)


def on_wall(body: Body, z_mm: float, angle: float) -> Round:
    """Give a place on the outside of barrel or cone."""
    return _beside(body, z_mm, angle, 0.0)


def on_collar(d: Dimensions, seat_mm: float, angle: float) -> Round:
    """Give the place half way up the outside of the socket whose seat is at z = `seat_mm`."""
    thick = d.joint.clearance_mm + d.joint.collar_mm
    return _beside(d.body, seat_mm + d.joint.lap_mm / 2, angle, thick)


def _beside(body: Body, z_mm: float, angle: float, distance: float) -> Round:
    lean = body.half_angle if z_mm < body.mitre_z_mm else 0.0
    radius = body.outside_radius_at(z_mm) + distance / cos(lean)
    return Round(radius_mm=radius, z_mm=z_mm, angle=angle, lean=lean)


def on_bin_ring(d: Dimensions) -> list[Round]:
    """Places on the outside of the bin ring's socket."""
    return [on_collar(d, -d.body.total_height_mm, angle) for angle in NAME_ANGLES]


def on_ring(d: Dimensions, ring: Ring, sector: int) -> list[Flat | Round]:
    """Places on the outside of a body ring, or of one sector of it."""
    beside_slot: list[Flat | Round] = []
    low, high = free_heights(d, ring)
    if ring is d.division.rings[0]:
        portal = d.portal
        edge = portal.frame_high_y_mm - d.body.outer_radius_mm
        top = -d.rim.thickness_mm - edge / tan(d.slope)
        beside_slot = [
            Flat(
                middle=(
                    (portal.face_x_mm + portal.depth_mm) / 2,
                    d.body.outer_radius_mm,
                    top + share * (portal.floor_mm - top),
                ),
                right=(-1.0, 0.0, 0.0),
                up=(0.0, 0.0, 1.0),
            )
            for share in HEIGHTS
        ]
    angles = NAME_ANGLES
    if ring.sectors > 1:
        middle = seam_angle(d, ring, sector) + pi / ring.sectors
        angles = tuple(middle + aside for aside in ASIDE)
    return [
        *beside_slot,
        *(
            on_wall(d.body, low + share * (high - low), angle)
            for share in HEIGHTS
            for angle in angles
        ),
    ]


def free_heights(d: Dimensions, ring: Ring) -> tuple[float, float]:
    """Heights between which a ring's outside is bare wall, barrel or cone alone [mm]."""
    low = ring.bottom_mm + d.joint.lap_mm
    if ring is d.division.rings[0]:
        high = -d.rim.thickness_mm - (d.rim.outer_radius_mm - d.body.outer_radius_mm) / tan(d.slope)
    else:
        collar = on_collar(d, ring.top_mm, 0.0)
        half = d.joint.lap_mm / 2
        high = d.body.foot_of(
            collar.radius_mm + half * tan(collar.lean), collar.z_mm + half, d.slope
        )
    mitre = d.body.mitre_z_mm
    if low < mitre < high:
        return max(((low, mitre), (mitre, high)), key=lambda part: part[1] - part[0])
    return low, high


def seam_angle(d: Dimensions, ring: Ring, seam: int) -> float:
    """Angle at which a seam shows on the outside; sector `seam` begins there [rad]."""
    radius = min(d.body.inside_radius_at(z) for z in (ring.top_mm, ring.bottom_mm))
    return ring.first_cut + seam * 2 * pi / ring.sectors - d.joint.lap_mm / 2 / radius

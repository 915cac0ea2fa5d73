"""The air side as one room: its volume is the closed form, and it has three openings, no more.

The room is what is left of a box when the assembled machine, its openings capped, is cut out of
it. Formulas of solid geometry throughout: frustum, circular segment, Pappus, and the hull of a
polygon and a circle by the prismatoid rule with Minkowski's mixed area.
"""

from __future__ import annotations

from math import asin, cos, hypot, pi, sin, sqrt
from typing import TYPE_CHECKING

import numpy as np
import pytest
from cadquery import func
from cadquery.func import Location, Shape, Solid, Vector
from scipy.optimize import brentq

from gyrecut.proportions.dimensions import Dimensions, OutletCuff
from gyrecut.proportions.inlet import mouth_centre

if TYPE_CHECKING:
    from gyrecut.solids import Parts

CAP = 3.0


def assembled(parts: Parts) -> Shape:
    return func.fuse(
        parts.body, parts.lid, parts.finder, parts.transition, parts.bin_ring, parts.outlet
    )


def caps(d: Dimensions) -> dict[str, Solid]:
    y, z = mouth_centre(d.portal, d.body)
    cuff = d.transition.cuff
    hose_x = d.portal.face_x_mm - d.transition.length_mm - cuff.height_mm
    across = max(cuff.tip_diameter_mm, cuff.bore_mm) / 2 + 1.0
    floor = -d.body.total_height_mm - d.bin_ring.thickness_mm
    out = d.outlet
    top = (
        out.cuff.tip_diameter_mm / 2 + 1.0 if isinstance(out, OutletCuff) else out.spigot_radius_mm
    )
    return {
        "hose": Solid.makeCylinder(across, CAP, Vector(hose_x - CAP, y, z), Vector(1, 0, 0)),
        "bin": Solid.makeCylinder(d.bin_ring.bore_mm / 2 + 1.0, CAP, Vector(0, 0, floor - CAP)),
        "outlet": Solid.makeCylinder(top, CAP, Vector(0, 0, d.outlet_top_mm)),
    }


def rooms(machine: Shape, closed_with: list[Solid]) -> list[Shape]:
    """Solids left of a box round everything: the outside first, then what is shut in."""
    whole = func.fuse(machine, *closed_with)
    box = whole.BoundingBox()
    around = Solid.makeBox(
        box.xlen + 20,
        box.ylen + 20,
        box.zlen + 20,
        Vector(box.xmin - 10, box.ymin - 10, box.zmin - 10),
    )
    return sorted(func.cut(around, whole).Solids(), key=lambda room: -room.Volume())


def grooves(d: Dimensions) -> int:
    """Cord grooves between two parts: each is a closed room of its own, apart from the air."""
    return sum(groove is not None for groove in (d.seals.lid, d.seals.transition))


def polygon_area(corners: tuple[tuple[float, float], ...]) -> float:
    return abs(
        sum(
            x * v - u * y
            for (x, y), (u, v) in zip(corners, (*corners[1:], corners[0]), strict=True)
        )
        / 2
    )


def perimeter(corners: tuple[tuple[float, float], ...]) -> float:
    return sum(
        hypot(u - x, v - y)
        for (x, y), (u, v) in zip(corners, (*corners[1:], corners[0]), strict=True)
    )


def frustum(height: float, large: float, small: float) -> float:
    return pi * height / 3 * (large**2 + large * small + small**2)


def air_of_body(d: Dimensions) -> float:
    """Barrel, cone, slot channel and mouth, less the finder that hangs in it."""
    b, p = d.body, d.portal
    radius, a, width = b.radius_mm, d.slot.height_mm, d.slot.width_mm
    reach = sqrt(radius**2 - (radius - width) ** 2)
    straight = -(p.face_x_mm + p.depth_mm) - reach
    # between the tangent and the circle, from the slot's inner edge to the tangent point
    horn = radius * reach - (reach * (radius - width) + radius**2 * asin(reach / radius)) / 2
    channel = (straight * (width + p.mouth_width_mm) / 2 + horn + blunted_edge(d)) * a
    mouth = polygon_area(p.mouth_outline(radius)) * p.depth_mm
    hanging = pi * (d.finder.outer_radius_mm**2 - (d.finder.bore_mm / 2) ** 2) * d.finder.length_mm
    return (
        pi * radius**2 * b.barrel_height_mm
        + frustum(b.cone_height_mm, radius, b.dust_outlet_diameter_mm / 2)
        + channel
        + mouth
        - (hanging - corners_lost_to_lip(d))
    )


def blunted_edge(d: Dimensions) -> float:
    """Plan area of the feather taken off where the channel's inner wall meets the bore.

    A right triangle with the cut as one leg, less the segment of the bore's circle. The third
    corner and the angle are found here by stepping along the wall, not as the solid finds them.
    """
    radius, p = d.body.radius_mm, d.portal
    tip = np.array([-sqrt(radius**2 - (radius - d.slot.width_mm) ** 2), radius - d.slot.width_mm])
    mouth = np.array([p.face_x_mm + p.depth_mm, radius - p.mouth_width_mm])
    along = (mouth - tip) / np.linalg.norm(mouth - tip)
    across = np.array([along[1], -along[0]]) if along[0] > 0 else np.array([-along[1], along[0]])

    def outside_bore(back: float) -> float:
        return float(np.linalg.norm(tip + back * along + p.edge_mm * across)) - radius

    back = float(brentq(outside_bore, 0.0, 10 * p.edge_mm))
    foot = tip + back * along
    chord = float(np.linalg.norm(foot + p.edge_mm * across - tip))
    half = asin(chord / 2 / radius)
    segment = radius**2 * (half - sin(half) * cos(half))
    return back * p.edge_mm / 2 - segment


def corners_lost_to_lip(d: Dimensions) -> float:
    """What the finder's half-round lip lacks of a square end, by Pappus."""
    lip, bore = d.finder.wall_mm / 2, d.finder.bore_mm / 2
    square, quarter = lip**2, pi * lip**2 / 4
    missing = square - quarter
    from_corner = lip - (square * lip / 2 - quarter * 4 * lip / (3 * pi)) / missing
    inner, outer = bore + from_corner, bore + 2 * lip - from_corner
    return 2 * pi * missing * (inner + outer)


def air_of_transition(d: Dimensions) -> float:
    t, outline = d.transition, d.portal.mouth_outline(d.body.radius_mm)
    r = t.cuff.bore_mm / 2
    foot, top = polygon_area(outline), pi * r**2
    middle = (foot + top + r * perimeter(outline)) / 4
    return t.length_mm / 6 * (foot + 4 * middle + top) + pi * r**2 * t.cuff.height_mm


def air_above_the_lid(d: Dimensions) -> float:
    bore = d.finder.bore_mm / 2
    stub = pi * bore**2 * d.finder_top_mm
    out = d.outlet
    if isinstance(out, OutletCuff):
        cuff = out.cuff.bore_mm / 2
        return (
            stub
            + frustum(out.reducer_length_mm, max(bore, cuff), min(bore, cuff))
            + (pi * cuff**2 * out.cuff.height_mm)
        )
    throat, r = out.throat_mm / 2, out.rounding_mm
    straight = pi * throat**2 * (out.plug_length_mm + out.height_mm(d.slope))
    square, quarter = r**2, pi * r**2 / 4
    from_outside = (square * r / 2 - quarter * (r - 4 * r / (3 * pi))) / (square - quarter)
    flare = 2 * pi * (throat + from_outside) * (square - quarter)
    solid_plug = pi * bore**2 * out.plug_length_mm
    gap = pi * (bore**2 - out.plug_radius_mm**2) * out.plug_length_mm
    return stub - solid_plug + gap + straight + flare


def gap_round_finder(d: Dimensions) -> float:
    hole, tube = d.lid.finder_hole_mm / 2, d.finder.outer_radius_mm
    return pi * (hole**2 - tube**2) * d.lid.thickness_mm


def closed_form(d: Dimensions) -> float:
    ring = pi * (d.bin_ring.bore_mm / 2) ** 2 * d.bin_ring.thickness_mm
    return air_of_body(d) + air_of_transition(d) + air_above_the_lid(d) + ring + gap_round_finder(d)


def test_the_air_side_is_one_room_of_the_closed_form(made: tuple[Dimensions, Parts]) -> None:
    d, parts = made
    outside, air, *shut_in = rooms(assembled(parts), list(caps(d).values()))
    assert len(shut_in) == grooves(d)
    assert air.Volume() == pytest.approx(closed_form(d), rel=1e-6)
    assert outside.Volume() > air.Volume()


@pytest.mark.parametrize("opening", ["hose", "bin", "outlet"])
def test_each_opening_is_open_and_there_is_no_other(
    made: tuple[Dimensions, Parts], opening: str
) -> None:
    d, parts = made
    others = [cap for name, cap in caps(d).items() if name != opening]
    assert len(rooms(assembled(parts), others)) == 1 + grooves(d)


def test_a_hole_anywhere_would_be_noticed(made: tuple[Dimensions, Parts]) -> None:
    d, parts = made
    drill = Solid.makeCylinder(1.0, 30.0).moved(
        Location((d.body.radius_mm - 15.0, 0.0, -d.body.barrel_height_mm / 2), (0, 1, 0), 90)
    )
    leaking = func.cut(assembled(parts), drill)
    assert len(rooms(leaking, list(caps(d).values()))) == 1 + grooves(d)


def test_nothing_stands_across_the_flow(made: tuple[Dimensions, Parts]) -> None:
    # the straight line through hose and mouth, and the axis from bin to outlet, meet no wall
    d, parts = made
    machine = assembled(parts)
    y, z = mouth_centre(d.portal, d.body)
    hose_x = d.portal.face_x_mm - d.transition.length_mm - d.transition.cuff.height_mm
    ray = Solid.makeCylinder(0.5, -hose_x, Vector(hose_x, y, z), Vector(1, 0, 0))
    low = -d.body.total_height_mm - d.bin_ring.thickness_mm
    axis = Solid.makeCylinder(0.5, d.outlet_top_mm - low, Vector(0, 0, low))
    assert func.intersect(machine, ray).Volume() == pytest.approx(0.0, abs=1e-9)
    assert func.intersect(machine, axis).Volume() == pytest.approx(0.0, abs=1e-9)

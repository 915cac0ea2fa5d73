"""Names and lines on the pieces: there, shallow, printable, off all that seals or carries air."""

from __future__ import annotations

from dataclasses import replace
from math import atan2, cos, hypot, pi, radians, sin, tan
from typing import TYPE_CHECKING

import numpy as np
import pytest
from cadquery import func

from gyrecut.checks import check_mesh
from gyrecut.errors import BuildError
from gyrecut.pieces.engraving import Mark, engraved
from gyrecut.pieces.glyphs import LETTERS, Figure, bar, figures, text_size
from gyrecut.pieces.marks import DEEPEST_MM, SHALLOWEST_MM, WALL_SHARE
from gyrecut.pieces.meshing import mesh_of
from gyrecut.pieces.places import Flat, Round
from gyrecut.solids.shapes import block, prism, revolved

if TYPE_CHECKING:
    from cadquery.func import Shape
    from numpy.typing import NDArray
    from tests.pieces.conftest import Made

    from gyrecut.pieces import Piece

FRONT = -pi / 2
TINY_MM3 = 1e-6


def flat(depth: float, text: str, **more: object) -> Mark:
    place = Flat(middle=(60.0, 15.0, 10.0), right=(1.0, 0.0, 0.0), up=(0.0, 1.0, 0.0))
    return replace(
        Mark(spot=place, figures=figures(text, 0.9), depth_mm=depth, margin_mm=0.7),
        **more,  # type: ignore[arg-type]
    )


def area_of(figure: Figure) -> float:
    def enclosed(loop: tuple[tuple[float, float], ...]) -> float:
        x, y = np.array(loop).T
        return float(x @ np.roll(y, -1) - y @ np.roll(x, -1)) / 2

    return sum(enclosed(loop) for loop in figure.loops)


# --- the letters


@pytest.mark.parametrize("letter", sorted(LETTERS))
def test_strokes_and_gaps_of_a_letter_are_a_stroke_wide_at_least(letter: str) -> None:
    # drawn again as unit squares: what is filled, and what is not, is made of whole squares
    width, height = text_size(letter, 1.0)
    assert height == 5.0
    squares = sum(area_of(figure) for figure in figures(letter, 1.0))
    assert squares == pytest.approx(round(squares))
    assert 0 < squares <= width * height
    for figure in figures(letter, 1.0):
        for loop in figure.loops:
            for (x, y), (u, v) in zip(loop, (*loop[1:], loop[0]), strict=True):
                assert (x == u) != (y == v)  # along or across, so that arcs and lines hold it
                assert hypot(u - x, v - y) == pytest.approx(round(hypot(u - x, v - y)))


def test_no_two_letters_of_a_kind_look_alike() -> None:
    shapes = {
        letter: frozenset(loop for figure in figures(letter, 1.0) for loop in figure.loops)
        for letter in sorted(LETTERS)
    }
    twins = {frozenset((a, b)) for a in shapes for b in shapes if a < b and shapes[a] == shapes[b]}
    # as on many plates, and never in doubt in a name
    assert twins <= {frozenset("0O"), frozenset("2Z"), frozenset("5S")}


# --- one groove against booleans, which know nothing of how it was made


@pytest.mark.parametrize("text", ["BODY-1", "VORTEX", "8AGM4"])
def test_flat_groove_is_what_a_boolean_cuts(text: str) -> None:
    plate = block((0.0, 0.0, 0.0), (120.0, 30.0, 10.0))
    mark = flat(0.4, text)
    cut: Shape = plate
    for figure in mark.figures:
        moved = [tuple((x + 60.0, y + 15.0) for x, y in loop) for loop in figure.loops]
        tool: Shape = prism(*moved[0], bottom=9.6, top=11.0)
        for island in moved[1:]:
            tool = func.cut(tool, prism(*island, bottom=9.0, top=12.0))
        cut = func.cut(cut, tool)
    made = engraved(plate, [mark], "plate")
    assert plate.Volume() - made.Volume() == pytest.approx(plate.Volume() - cut.Volume(), rel=1e-9)
    assert func.cut(made, cut).Volume() < TINY_MM3
    assert func.cut(cut, made).Volume() < TINY_MM3


@pytest.mark.parametrize("lean", [0.0, 0.15, -0.3])
@pytest.mark.parametrize("rise", [0, 1, -1])
def test_round_groove_is_what_a_boolean_cuts(lean: float, rise: int) -> None:
    # one bar as a turned wedge: its section is drawn here anew
    radius, half_height, half_width, depth, drop = 40.0, 3.0, 2.0, 0.45, 0.6 * abs(rise)
    gain = tan(lean)
    wall = revolved(
        (30.0, -20.0), (radius - 20 * gain, -20.0), (radius + 20 * gain, 20.0), (30.0, 20.0)
    )
    place = Round(radius_mm=radius, z_mm=0.0, angle=FRONT, lean=lean)
    mark = Mark(
        spot=place,
        figures=(bar(2 * half_width, 2 * half_height),),
        depth_mm=depth,
        margin_mm=0.7,
        rise=(0, rise),
        drop_mm=drop,
    )
    made = engraved(wall, [mark], "wall")
    low, high = -half_height * cos(lean), half_height * cos(lean)
    floor_low = low + (drop * cos(lean) if rise < 0 else 0.0)
    floor_high = high - (drop * cos(lean) if rise > 0 else 0.0)
    turn = half_width / radius
    tool = revolved(
        (radius + low * gain, low),
        (radius + floor_low * gain - depth, floor_low),
        (radius + floor_high * gain - depth, floor_high),
        (radius + high * gain, high),
        first=FRONT - turn,
        last=FRONT + turn,
    )
    cut = func.cut(wall, tool)
    assert cut.Volume() < wall.Volume() - 5.0
    assert made.Volume() == pytest.approx(cut.Volume(), rel=1e-9)
    assert func.cut(made, cut).Volume() + func.cut(cut, made).Volume() < 1e-4
    assert mesh_of(made).is_volume


def test_mark_over_a_hole_an_edge_or_the_seam_is_refused() -> None:
    plate = block((0.0, 0.0, 0.0), (120.0, 30.0, 10.0))
    drilled = func.cut(plate, func.cylinder(2.5, 30.0).moved(x=60.0, y=14.0, z=-5.0)).Solids()[0]
    with pytest.raises(BuildError, match="no face to lie on"):
        engraved(drilled, [flat(0.4, "BODY")], "plate")
    narrow = block((0.0, 11.0, 0.0), (120.0, 19.0, 10.0))
    assert flat(0.4, "BODY").ground_in(narrow) is not None
    assert flat(0.4, "BODY", margin_mm=2.0).ground_in(narrow) is None
    tube = revolved((20.0, 0.0), (24.0, 0.0), (24.0, 20.0), (20.0, 20.0))
    at_seam = Mark(
        spot=Round(radius_mm=24.0, z_mm=10.0, angle=0.0),
        figures=(bar(4.0, 4.0),),
        depth_mm=0.4,
        margin_mm=0.5,
    )
    assert at_seam.ground_in(tube) is None
    inside = replace(at_seam, spot=Round(radius_mm=20.0, z_mm=10.0, angle=FRONT))
    assert inside.ground_in(tube) is None  # it looks at the axis


def test_two_marks_over_each_other_do_not_pass() -> None:
    plate = block((0.0, 0.0, 0.0), (120.0, 30.0, 10.0))
    with pytest.raises(BuildError):
        engraved(plate, [flat(0.4, "H"), flat(0.4, "-")], "plate")


# --- the shipped kits


def grooves(bare: Piece, marked: Piece) -> Shape:
    return func.cut(bare.placed, marked.placed)


def test_each_piece_carries_its_name_and_ring_pieces_an_arrow(made: Made) -> None:
    for piece in made.marked:
        sign = "^" if piece.name.startswith("body-") else ""
        assert piece.mark == sign + piece.name


def test_marks_take_away_what_their_letters_and_lines_fill(made: Made) -> None:
    depth = made.style.depth_in(made.dimensions.body.wall_mm)
    assert SHALLOWEST_MM <= depth <= min(DEEPEST_MM, WALL_SHARE * made.dimensions.body.wall_mm)
    for bare, marked in zip(made.pieces, made.marked, strict=True):
        taken = bare.placed.Volume() - marked.placed.Volume()
        text = marked.mark.upper()
        letters = sum(area_of(figure) for figure in figures(text, made.style.stroke_mm))
        cut = grooves(bare, marked)
        assert cut.Volume() == pytest.approx(taken, abs=1e-3), marked.name
        assert marked.placed.isValid()
        assert func.cut(marked.placed, bare.placed).Volume() < TINY_MM3, marked.name
        # a ceiling laid back takes part of a stroke; lines come on top of the letters
        assert 0.5 * letters * depth < taken < letters * depth + 40 * made.style.stroke_mm * depth


def test_no_check_says_more_of_a_marked_piece(made: Made) -> None:
    for bare, marked in zip(made.pieces, made.marked, strict=True):
        before = [f.code for f in check_mesh(bare.mesh, bare.name, made.limits)]
        after = [f.code for f in check_mesh(marked.mesh, marked.name, made.limits)]
        assert after == before, marked.name


def depths(points: NDArray[np.float64], made: Made) -> NDArray[np.float64]:
    """How far points lie outside the air side of barrel and cone [mm], seen from the axis."""
    body = made.dimensions.body
    inside = np.array([body.inside_radius_at(min(z, 0.0)) for z in points[:, 2]])
    outside: NDArray[np.float64] = np.hypot(points[:, 0], points[:, 1]) - inside
    return outside


def test_marks_keep_off_the_air_side_and_off_sealing_faces(made: Made) -> None:
    d = made.dimensions
    for bare, marked in zip(made.pieces, made.marked, strict=True):
        cut = grooves(bare, marked)
        points = np.array([v.toTuple() for v in cut.Vertices()])
        x, _, z = points.T
        name = marked.name
        if name.startswith("body-"):
            assert depths(points, made).min() > 0.4 * d.body.wall_mm, name
            assert z.max() < -d.rim.thickness_mm, name  # the rim under the lid
            assert x.min() > d.portal.face_x_mm + d.portal.depth_mm / 2, name  # the portal's face
            for seat in d.division.cut_heights_mm:  # spigots and the inside of sockets
                ring_above = z[(z > seat) & (z < seat + d.joint.lap_mm)]
                if ring_above.size:
                    r = np.hypot(*points[(z > seat) & (z < seat + d.joint.lap_mm), :2].T)
                    gap = d.body.outside_radius_at(seat) + d.joint.clearance_mm
                    assert r.min() > gap, name
        elif name.startswith("lid"):
            assert z.min() > d.lid.thickness_mm - DEEPEST_MM - 1e-6
            assert np.hypot(x, points[:, 1]).min() > d.finder.collar_radius_mm
        elif name == "vortex-finder":
            assert np.hypot(x, points[:, 1]).min() > d.finder.collar_radius_mm - DEEPEST_MM - 1e-6
            assert z.min() > d.lid.thickness_mm + 0.5
        elif name == "transition":
            assert x.max() < d.portal.face_x_mm - d.transition.flange_thickness_mm
        elif name == "bin-ring":
            seat = -d.body.total_height_mm
            assert z.min() > seat + 0.5
            gap = d.body.outside_radius_at(seat) + d.joint.clearance_mm
            assert np.hypot(x, points[:, 1]).min() > gap


def test_openings_and_faces_that_seal_have_the_area_they_had(made: Made) -> None:
    def largest_level(piece: Piece, z: float) -> float:
        return sum(
            face.Area()
            for face in piece.placed.Faces()
            if face.geomType() == "PLANE"
            and abs(face.Center().z - z) < 1e-6
            and abs(abs(face.normalAt().z) - 1) < 1e-9
        )

    d = made.dimensions
    floor = -d.body.total_height_mm - d.bin_ring.thickness_mm
    for bare, marked in zip(made.pieces, made.marked, strict=True):
        for z in (0.0, floor):  # rim and lid; bin ring on the bin's lid
            assert largest_level(marked, z) == pytest.approx(largest_level(bare, z), rel=1e-9)


def upright_lines(solid: Shape, made: Made) -> list[tuple[float, float]]:
    """Angle and height of the middles of single upright bars among grooves."""
    found = []
    for groove in solid.Solids():
        box = groove.BoundingBox()
        width = hypot(box.xlen, box.ylen)
        if box.zlen > 2.5 * width or (box.zlen > 4.9 and width < 2 * made.style.stroke_mm):
            middle = groove.Center()
            found.append((atan2(middle.y, middle.x), middle.z))
    return found


def test_lines_meet_across_every_ring_joint(made: Made) -> None:
    d = made.dimensions
    lines: list[tuple[float, float]] = []
    for bare, marked in zip(made.pieces, made.marked, strict=True):
        if marked.name.startswith(("body-", "bin-ring")):
            lines += upright_lines(grooves(bare, marked), made)
    lap = d.joint.lap_mm
    for seat in (*d.division.cut_heights_mm, -d.body.total_height_mm):
        on_collar = [a for a, z in lines if seat < z < seat + lap]
        above = [a for a, z in lines if seat + lap < z < seat + lap + 12]
        pairs = [(a, b) for a in on_collar for b in above if abs(a - b) < radians(0.1)]
        assert pairs, f"no line across the joint at {seat}"


def test_lines_across_seams_meet_and_no_two_seams_are_alike(joinery: Made) -> None:
    from gyrecut.pieces.mark_places import seam_angle  # noqa: PLC0415 - only here

    d = joinery.dimensions
    for number, ring in enumerate(d.division.rings, start=1):
        heights = []
        for seam in range(ring.sectors):
            angle = seam_angle(d, ring, seam)
            reach = 14.0 / d.body.outside_radius_at(ring.bottom_mm)
            near = []
            for bare, marked in zip(joinery.pieces, joinery.marked, strict=True):
                if marked.name.startswith(f"body-{number}-"):
                    for groove in grooves(bare, marked).Solids():
                        at = groove.Center()
                        off = (atan2(at.y, at.x) - angle + pi) % (2 * pi) - pi
                        if abs(off) < reach and groove.BoundingBox().zlen < 2.0:
                            near.append((off, at.z))
            assert len(near) == 2, f"ring {number}, seam {seam}"
            (one, z), (other, same_z) = sorted(near)
            assert one < 0 < other
            assert one + other == pytest.approx(0.0, abs=reach / 50)
            assert z == pytest.approx(same_z, abs=1e-3)
            heights.append(round(z, 2))
        assert len(set(heights)) == ring.sectors


def test_marks_are_left_off_where_walls_are_too_thin(made: Made) -> None:
    thick = replace(made.style, least_wall_mm=made.dimensions.body.wall_mm - 0.1)
    assert thick.depth_in(made.dimensions.body.wall_mm) == 0.0
    assert made.style.depth_in(1000.0) == DEEPEST_MM


def test_place_on_the_unit_circle_is_where_it_says() -> None:
    place = Round(radius_mm=10.0, z_mm=5.0, angle=0.3, lean=0.2)
    x, y, z = place.at((10.0 * 0.5, 2.0))
    assert atan2(y, x) == pytest.approx(0.8)
    assert hypot(x, y) == pytest.approx(10.0 + 2.0 * sin(0.2))
    assert z == pytest.approx(5.0 + 2.0 * cos(0.2))

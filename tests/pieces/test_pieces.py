"""Pieces fit the printer, miss each other, and come together to the parts they were cut from."""

from __future__ import annotations

from itertools import combinations
from math import cos, pi
from typing import TYPE_CHECKING

import numpy as np
import pytest
from cadquery import func

from gyrecut.pieces.meshing import CHORD_ERROR_MM

if TYPE_CHECKING:
    from cadquery.func import Shape
    from tests.pieces.conftest import Made

    from gyrecut.proportions.dimensions import Dimensions, Ring

TOUCH_MM3 = 1e-3


def test_every_piece_lies_on_the_bed_and_fits_it(made: Made) -> None:
    for piece in made.pieces:
        low, high = piece.mesh.bounds
        assert low == pytest.approx([0.0, 0.0, 0.0], abs=1e-4), piece.name
        assert high[0] <= made.bed.width_mm, piece.name
        assert high[1] <= made.bed.depth_mm, piece.name
        assert high[2] <= made.bed.height_mm, piece.name


def test_pose_moves_a_piece_and_changes_nothing_of_it(made: Made) -> None:
    for piece in made.pieces:
        assert piece.posed.Volume() == pytest.approx(piece.placed.Volume(), rel=1e-9)
        assert piece.posed.isValid()
        # the mesh is the posed solid's: inside the chord error everywhere
        box = piece.posed.BoundingBox()
        assert piece.mesh.extents == pytest.approx(
            [box.xlen, box.ylen, box.zlen], abs=4 * CHORD_ERROR_MM
        ), piece.name
        assert abs(piece.mesh.volume - piece.posed.Volume()) <= CHORD_ERROR_MM * piece.posed.Area()


def test_no_two_pieces_share_room(made: Made) -> None:
    boxes = [piece.placed.BoundingBox() for piece in made.pieces]
    met = 0
    for (one, box), (other, other_box) in combinations(zip(made.pieces, boxes, strict=True), 2):
        apart = (
            box.xmin > other_box.xmax or other_box.xmin > box.xmax
            or box.ymin > other_box.ymax or other_box.ymin > box.ymax
            or box.zmin > other_box.zmax or other_box.zmin > box.zmax
        )  # fmt: skip
        if apart:
            continue
        met += 1
        shared = func.intersect(one.placed, other.placed).Volume()
        assert shared < TOUCH_MM3, f"{one.name} and {other.name} share {shared} mm3"
    assert met >= len(made.pieces) - 1


def test_names_are_unique_and_every_ring_is_there(made: Made) -> None:
    names = [piece.name for piece in made.pieces]
    assert len(set(names)) == len(names)
    division = made.dimensions.division
    for number, ring in enumerate(division.rings, start=1):
        assert len(made.named(f"body-{number}")) == ring.sectors
    assert len(made.named("lid")) == division.lid_sectors
    assert len(names) == division.piece_count + 4


def test_ring_cuts_stay_below_the_slot(made: Made) -> None:
    d = made.dimensions
    assert d.division.cut_heights_mm
    assert max(d.division.cut_heights_mm) < d.portal.frame_bottom_z_mm < -d.slot.height_mm


def body_of(made: Made) -> list[Shape]:
    return [piece.placed for piece in made.named("body-")]


@pytest.mark.parametrize("name", ["luthier-sander", "casting-bench"])
def test_whole_rings_come_together_to_the_body(name: str) -> None:
    from tests.pieces.conftest import made_from  # noqa: PLC0415 - its cache is wanted

    made = made_from(name)
    d, pieces = made.dimensions, body_of(made)
    assert not d.keel_is_cut
    together = func.fuse(*pieces)
    # no piece of the body is missing, and what is new is the sockets' collars
    assert func.cut(made.parts.body, together).Volume() < TOUCH_MM3
    new = sum(piece.Volume() for piece in pieces) - made.parts.body.Volume()
    assert new == pytest.approx(
        sum(collar_volume(d, z) for z in d.division.cut_heights_mm), rel=1e-4
    )


def collar_volume(d: Dimensions, seat: float) -> float:
    """A socket collar with its gusset, by Pappus; the corners lie on straight walls."""
    body, joint = d.body, d.joint

    def lean(z: float) -> float:
        return cos(body.half_angle) if z < body.mitre_z_mm else 1.0

    def at(z: float, off: float) -> tuple[float, float]:
        return (body.outside_radius_at(z) + off / lean(z), z)

    top, thick = seat + joint.lap_mm, joint.clearance_mm + joint.collar_mm
    bend = [body.mitre_z_mm] if seat < body.mitre_z_mm < top else []
    heights = [seat, *bend, top]
    outer = [at(z, thick) for z in reversed(heights)]
    foot = body.foot_of(*outer[-1], d.slope)
    wall = [body.mitre_z_mm] if foot < body.mitre_z_mm < seat else []
    below = [(body.outside_radius_at(z), z) for z in (foot, *wall, seat)]
    outline = [*(at(z, joint.clearance_mm) for z in heights), *outer, *below]
    first_moment = 0.0
    for (r, z), (s, y) in zip(outline, [*outline[1:], outline[0]], strict=True):
        first_moment += (r * y - s * z) * (r + s) / 6
    return 2 * pi * abs(first_moment)


def seam_volume(d: Dimensions, ring: Ring) -> float:
    """What one lapped seam of a plain barrel ring leaves open, from its radii and angles."""
    inside, outside, gap = d.body.radius_mm, d.body.outer_radius_mm, d.joint.clearance_mm
    middle = (inside + outside) / 2
    half_lap, half_gap = d.joint.lap_mm / 2 / inside, gap / 2 / inside
    inner = ((middle - gap / 2) ** 2 - inside**2) * half_gap
    outer = (outside**2 - (middle + gap / 2) ** 2) * half_gap
    band = ((middle + gap / 2) ** 2 - (middle - gap / 2) ** 2) * (half_lap + half_gap)
    return (inner + outer + band) * ring.height_mm


def test_sectors_and_their_gaps_come_together_to_the_ring(joinery: Made) -> None:
    # the second ring lies in the barrel: a plain tube below its socket
    d, ring = joinery.dimensions, joinery.dimensions.division.rings[1]
    sectors = joinery.named("body-2")
    assert ring.sectors == len(sectors) > 1
    assert ring.bottom_mm > d.body.mitre_z_mm
    collar_foot = d.body.foot_of(
        d.body.outer_radius_mm + d.joint.clearance_mm + d.joint.collar_mm, ring.top_mm, d.slope
    )
    plain = (collar_foot - ring.bottom_mm) / ring.height_mm
    slab = func.box(1000.0, 1000.0, collar_foot - ring.bottom_mm).moved(z=ring.bottom_mm)
    volume = sum(func.intersect(piece.placed, slab).Volume() for piece in sectors)
    tube = pi * (d.body.outer_radius_mm**2 - d.body.radius_mm**2) * ring.height_mm * plain
    gaps = ring.sectors * seam_volume(d, ring) * plain
    assert gaps > 0
    assert volume + gaps == pytest.approx(tube, rel=1e-9)


def test_sectors_of_a_ring_are_equal_where_the_ring_is_round(joinery: Made) -> None:
    for number, ring in enumerate(joinery.dimensions.division.rings[1:], start=2):
        volumes = [piece.placed.Volume() for piece in joinery.named(f"body-{number}")]
        assert volumes == pytest.approx([volumes[0]] * ring.sectors, rel=1e-6)


def test_a_sector_laps_over_the_next(joinery: Made) -> None:
    # turned back by less than the lap it runs into its neighbour, turned on it does not
    first, second = joinery.named("body-2")[:2]
    lap = np.degrees(joinery.dimensions.joint.lap_mm / joinery.dimensions.body.radius_mm)
    gap = np.degrees(joinery.dimensions.joint.clearance_mm / joinery.dimensions.body.radius_mm)
    assert func.intersect(first.placed.moved(rz=3 * gap), second.placed).Volume() > 1.0
    assert func.intersect(first.placed.moved(rz=-gap), second.placed).Volume() < TOUCH_MM3
    # the lap is as long as the profile says: shifted outwards, the tongues catch each other
    caught = func.intersect(first.placed.moved(z=0.0).moved(rz=-lap / 2), second.placed)
    assert caught.Volume() < TOUCH_MM3


def test_lid_sectors_and_gaps_come_together_to_the_lid(joinery: Made) -> None:
    d, sectors = joinery.dimensions, joinery.named("lid")
    missing = joinery.parts.lid.Volume() - sum(piece.placed.Volume() for piece in sectors)
    length = d.rim.outer_radius_mm - d.lid.finder_hole_mm / 2
    # a seam is two flanks at the slope; a gap of one width across makes a parallelogram
    seam = d.joint.clearance_mm * d.lid.thickness_mm * length
    assert missing == pytest.approx(len(sectors) * seam, rel=0.15)
    together = func.fuse(*(piece.placed for piece in sectors))
    assert func.cut(together, joinery.parts.lid).Volume() < TOUCH_MM3

"""Fit on the printer and stance on the bed."""

from __future__ import annotations

from dataclasses import replace
from math import atan2, degrees, pi
from typing import TYPE_CHECKING

import pytest
from cadquery.func import box, cylinder, extrude, face, polygon, revolve

from gyrecut.checks import check_mesh, measure_mesh
from gyrecut.findings import Severity

if TYPE_CHECKING:
    from collections.abc import Callable

    from cadquery import Shape
    from tests.checks.conftest import MeshOf

    from gyrecut.checks import PrintLimits, Stance
    from gyrecut.findings import Finding


def found(shape: Shape, mesh_of: MeshOf, limits: PrintLimits) -> dict[str, Finding]:
    return {finding.code: finding for finding in check_mesh(mesh_of(shape), "part", limits)}


@pytest.mark.parametrize(
    ("size", "fits"),
    [
        ((240, 240, 250), True),
        ((240.5, 100, 50), False),
        ((100, 240.5, 50), False),
        ((100, 100, 250.5), False),
    ],
)
def test_the_margin_counts_on_both_sides_and_not_in_height(
    size: tuple[float, float, float], mesh_of: MeshOf, limits: PrintLimits, *, fits: bool
) -> None:
    codes = found(box(*size), mesh_of, limits)
    assert ("does-not-fit" not in codes) == fits
    if not fits:
        assert codes["does-not-fit"].severity is Severity.STOP


def test_an_oblong_bed_says_to_turn_the_piece(mesh_of: MeshOf, limits: PrintLimits) -> None:
    oblong = replace(limits, build_volume_mm=(300.0, 200.0, 200.0))
    finding = found(box(150, 280, 20), mesh_of, oblong)["does-not-fit"]
    assert finding.where == "along y"
    assert finding.measured == pytest.approx(280)
    assert finding.limit == pytest.approx(190)
    assert finding.fix == "turn it by a quarter on the bed"


def test_bed_contact_is_the_foot_s_area(mesh_of: MeshOf, limits: PrintLimits) -> None:
    solid = measure_mesh(mesh_of(box(30, 20, 10) - box(10, 10, 10)), limits).solid
    assert solid is not None
    assert solid.stance.contact_mm2 == pytest.approx(500)
    assert solid.stance.is_steady


def test_a_ring_foot_holds_a_centre_that_is_over_its_hole(
    mesh_of: MeshOf, limits: PrintLimits
) -> None:
    codes = found(cylinder(60, 20) - cylinder(50, 20), mesh_of, limits)
    assert "falls-over" not in codes


def test_a_leaning_piece_falls_over(mesh_of: MeshOf, limits: PrintLimits) -> None:
    # The centre of mass of the sheared block is 20 mm to the side, its foot ends at 10 mm.
    outline = [(0, 0, 0), (10, 0, 0), (50, 0, 45), (40, 0, 45)]
    finding = found(extrude(face(polygon(*outline)), (0, 20, 0)), mesh_of, limits)["falls-over"]
    assert finding.severity is Severity.STOP


def test_an_edge_and_a_piece_in_the_air_have_no_foot(mesh_of: MeshOf, limits: PrintLimits) -> None:
    raised = mesh_of(box(20, 20, 20))
    raised.apply_translation([0, 0, 3])
    codes = {finding.code for finding in check_mesh(raised, "part", limits)}
    assert "no-bed-contact" in codes
    wedge = extrude(face(polygon((0, 0, 0), (10, 0, 10), (-10, 0, 10))), (0, 20, 0))
    assert found(wedge, mesh_of, limits)["no-bed-contact"].severity is Severity.STOP


def stance_of(shape: Shape, mesh_of: MeshOf, limits: PrintLimits) -> Stance:
    solid = measure_mesh(mesh_of(shape), limits).solid
    assert solid is not None
    return solid.stance


def outline_prism(*corners: tuple[float, float], height: float = 10) -> Shape:
    return extrude(face(polygon(*[(x, y, 0) for x, y in corners])), (0, 0, height))


def two_rails() -> Shape:
    return box(30, 20, 10) - box(26, 20, 5).moved(x=0.5)


def bevelled_tube() -> Shape:
    outline = [(27.6, 0, 0), (29.1, 0, 0), (30, 0, 0.9), (30, 0, 20), (27.6, 0, 20)]
    return revolve(face(polygon(*outline)), (0, 0, 0), (0, 0, 1))


# The solid, and the narrowest strip of its foot in mm; None where no two edges make one.
STRIPS: dict[str, tuple[Callable[[], Shape], float | None]] = {
    "block": (lambda: box(30, 20, 10), 20),
    "turned block": (lambda: box(30, 20, 10).moved(rz=33), 20),
    "disc": (lambda: cylinder(30, 10), 30),
    "ring": (lambda: cylinder(60, 20) - cylinder(57, 20), 1.5),
    "ring with a bore off the middle": (lambda: cylinder(60, 20) - cylinder(50, 20).moved(x=3), 2),
    "plate with a fin": (lambda: box(30, 20, 10) + box(20, 0.6, 10).moved(x=25), 0.6),
    "frame": (lambda: box(40, 30, 5) - box(36, 26, 5).moved(x=1), 1),
    "two rails": (two_rails, 1.5),
    "slot in the foot": (lambda: box(30, 20, 10) - box(2, 20, 3).moved(x=8), 6),
    "bevelled tube": (bevelled_tube, 1.5),
    "three-cornered foot": (lambda: outline_prism((0, 0), (30, 0), (0, 30)), None),
    "keen three-cornered foot": (lambda: outline_prism((0, 0), (30, 0), (0, 20)), None),
}


@pytest.mark.parametrize("name", STRIPS)
def test_the_narrowest_strip_of_the_foot(name: str, mesh_of: MeshOf, limits: PrintLimits) -> None:
    build, width = STRIPS[name]
    stance = stance_of(build(), mesh_of, limits)
    if width is None:
        assert stance.strip_mm == float("inf")
    else:
        # The narrowest of a thousand places: a taper may be a little narrower in between.
        assert stance.strip_mm == pytest.approx(width, rel=0.03, abs=0.06)


@pytest.mark.parametrize(
    ("width", "warns"), [(0.4, True), (0.7, True), (0.8, False), (1.2, False), (3.0, False)]
)
def test_a_strip_of_less_than_two_beads_warns(
    width: float, mesh_of: MeshOf, limits: PrintLimits, *, warns: bool
) -> None:
    findings = found(cylinder(60, 20) - cylinder(60 - 2 * width, 20), mesh_of, limits)
    assert ("narrow-foot" in findings) == warns
    if warns:
        assert findings["narrow-foot"].severity is Severity.WARN
        assert findings["narrow-foot"].measured == pytest.approx(width, abs=0.03)
        assert findings["narrow-foot"].limit == limits.least_strip_mm


def test_the_share_of_the_footprint(mesh_of: MeshOf, limits: PrintLimits) -> None:
    ring = stance_of(cylinder(60, 20) - cylinder(50, 20), mesh_of, limits)
    assert ring.footprint_share == pytest.approx(1 - (50 / 60) ** 2, rel=0.01)
    mushroom = stance_of(cylinder(20, 20) + cylinder(40, 5).moved(z=20), mesh_of, limits)
    assert mushroom.footprint_share == pytest.approx(1 / 4, rel=0.01)


@pytest.mark.parametrize("height", [10, 40, 150])
def test_the_margin_is_the_lean_that_tips_it(
    height: float, mesh_of: MeshOf, limits: PrintLimits
) -> None:
    block = stance_of(box(30, 20, height).moved(rz=20), mesh_of, limits)
    assert block.margin == pytest.approx(atan2(10, height / 2), rel=1e-6)
    assert block.slenderness == pytest.approx(height / 20, rel=1e-6)


def test_a_piece_that_tips_easily_warns(mesh_of: MeshOf, limits: PrintLimits) -> None:
    # A mast with its weight aloft, 10 mm foot: it tips at atan(5 / height of its middle).
    heavy = box(10, 10, 80) + box(30, 30, 10).moved(z=80)
    middle = (8000 * 40 + 9000 * 85) / 17000
    finding = found(heavy, mesh_of, limits)["tips-easily"]
    assert finding.severity is Severity.WARN
    assert finding.measured == pytest.approx(degrees(atan2(5, middle)), rel=1e-3)
    assert "tips-easily" not in found(box(30, 30, 80), mesh_of, limits)


def test_a_slender_piece_warns(mesh_of: MeshOf, limits: PrintLimits) -> None:
    slender = box(18, 18, 190)
    assert found(slender, mesh_of, limits)["slender"].measured == pytest.approx(190 / 18)
    assert "slender" not in found(box(20, 20, 190), mesh_of, limits)


def test_a_leaning_ring_has_the_hull_of_its_foot(mesh_of: MeshOf, limits: PrintLimits) -> None:
    stance = stance_of(cylinder(60, 40) - cylinder(54, 40), mesh_of, limits)
    assert stance.margin == pytest.approx(atan2(30, 20), rel=5e-3)
    assert stance.contact_mm2 == pytest.approx(pi / 4 * (60**2 - 54**2), rel=0.01)

"""Fit on the printer and stance on the bed."""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

import pytest
from cadquery.func import box, cylinder, extrude, face, polygon

from gyrecut.checks import check_mesh, measure_mesh
from gyrecut.findings import Severity

if TYPE_CHECKING:
    from cadquery import Shape
    from tests.checks.conftest import MeshOf

    from gyrecut.checks import PrintLimits
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

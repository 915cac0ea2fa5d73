"""The number the thickness check gives, and its place, on walls of known thickness."""

from __future__ import annotations

from math import radians, tan
from typing import TYPE_CHECKING

import numpy as np
import pytest
import trimesh
from cadquery.func import box, cylinder, extrude, face, polygon

from gyrecut.checks import check_mesh, measure_mesh
from gyrecut.checks.opposed import CHORD_MM
from gyrecut.checks.sampling import spread_samples
from gyrecut.checks.surface import surface_of
from gyrecut.checks.thickness import EDGE_ANGLE
from gyrecut.findings import Severity

if TYPE_CHECKING:
    from numpy.typing import NDArray
    from tests.checks.conftest import MeshOf

    from gyrecut.checks import PrintLimits, Thickness


def thickness_of(mesh: trimesh.Trimesh, limits: PrintLimits) -> Thickness:
    solid = measure_mesh(mesh, limits).solid
    assert solid is not None
    return solid.thickness


def test_pocket_floor_thickness_place_and_share(mesh_of: MeshOf, limits: PrintLimits) -> None:
    plate = box(40, 30, 2) - box(5, 5, 1.5).moved(x=8, y=-4, z=0.5)
    mesh = mesh_of(plate)
    thickness = thickness_of(mesh, limits)
    assert thickness.smallest_mm == pytest.approx(0.5, abs=1e-6)
    x, y, z = thickness.place_mm
    assert abs(x - 8) <= 2.5
    assert abs(y + 4) <= 2.5
    assert z == pytest.approx(0.25, abs=1e-6)
    # The floor and what lies under it: 2 x 25 mm2; sampled, so within a tenth.
    assert thickness.thin_share == pytest.approx(50 / mesh.area, rel=0.1)


@pytest.mark.parametrize("wall", [1.0, 2.4, 6.0])
def test_a_tube_is_as_thick_as_its_wall(wall: float, mesh_of: MeshOf, limits: PrintLimits) -> None:
    tube = cylinder(100, 60) - cylinder(100 - 2 * wall, 60)
    found = thickness_of(mesh_of(tube), limits).smallest_mm
    assert wall - CHORD_MM <= found <= wall + CHORD_MM


@pytest.mark.parametrize(("share", "is_flagged"), [(0.9, True), (1.0, False)])
def test_the_limit_is_the_profile_s_wall(
    share: float, mesh_of: MeshOf, limits: PrintLimits, *, is_flagged: bool
) -> None:
    plate = box(40, share * limits.smallest_wall_mm, 30)
    codes = {finding.code for finding in check_mesh(mesh_of(plate), "plate", limits)}
    assert ("thin-wall" in codes) == is_flagged


@pytest.mark.parametrize(("angle", "is_wall"), [(15, True), (20, True), (30, False), (45, False)])
def test_a_keen_edge_is_a_wall_and_a_blunt_one_is_an_edge(
    angle: float, mesh_of: MeshOf, limits: PrintLimits, *, is_wall: bool
) -> None:
    assert (radians(angle) < EDGE_ANGLE) == is_wall
    outline = [(0, 0, 0), (30, 0, 0), (0, 0, 30 * tan(radians(angle)))]
    wedge = extrude(face(polygon(*outline)), (0, 20, 0))
    thickness = thickness_of(mesh_of(wedge), limits)
    assert (thickness.thin_share > 0) == is_wall
    # Counted from one smallest wall behind the edge on, seen from the middle of the wall.
    least = limits.smallest_wall_mm * tan(radians(angle))
    assert thickness.smallest_mm >= (least if is_wall else limits.smallest_wall_mm)


def test_the_finding_says_what_was_measured(mesh_of: MeshOf, limits: PrintLimits) -> None:
    thin = box(40, 0.5, 30) + box(40, 20, 2)
    (finding,) = (f for f in check_mesh(mesh_of(thin), "fin", limits) if f.code == "thin-wall")
    assert finding.severity is Severity.STOP
    assert finding.part == "fin"
    assert finding.measured == pytest.approx(0.5, abs=1e-6)
    assert finding.limit == limits.smallest_wall_mm
    assert finding.unit == "mm"


def test_samples_cover_the_surface_by_area_and_do_not_change() -> None:
    mesh = trimesh.creation.box((60, 40, 2))
    mesh.apply_translation([0, 0, 1])
    surface = surface_of(mesh)
    samples = spread_samples(surface)
    places = samples.places
    np.testing.assert_array_equal(places, spread_samples(surface).places)
    assert samples.weight.sum() == pytest.approx(mesh.area)
    share = np.bincount(samples.triangle) / len(places)
    np.testing.assert_allclose(share, mesh.area_faces / mesh.area, atol=1e-3)
    # Seen from above, each quarter of the top has its quarter of the places.
    top = places[np.isclose(places[:, 2], 2)]
    for half in (top[:, 0] > 0, top[:, 1] > 0):
        assert half.mean() == pytest.approx(0.5, abs=0.01)


def test_agrees_with_the_inscribed_ball(mesh_of: MeshOf, limits: PrintLimits) -> None:
    """Outside check: trimesh's maximal inscribed balls, on a tube whose bore is off the middle."""
    mesh = mesh_of(cylinder(40, 20) - cylinder(35, 20).moved(x=1))
    # From the middles of facets: near an edge of a faceted wall the ball is kept small by the next.
    on_side = np.flatnonzero(np.abs(mesh.face_normals[:, 2]) < 0.5)
    balls: NDArray[np.float64] = trimesh.proximity.thickness(  # type: ignore[no-untyped-call]
        mesh,
        mesh.triangles_center[on_side],
        normals=mesh.face_normals[on_side],
        method="max_sphere",
    )
    found = thickness_of(mesh, limits).smallest_mm
    assert found == pytest.approx(1.5, abs=CHORD_MM)
    assert found == pytest.approx(float(balls.min()), abs=2 * CHORD_MM)

"""The closed-body check against trimesh's own predicates and planted faults."""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

import numpy as np
import pytest
import trimesh

from gyrecut.checks import check_mesh, measure_mesh
from gyrecut.checks.surface import surface_of
from gyrecut.findings import Severity

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.checks import PrintLimits


def standing_box(size: float = 20, at: tuple[float, float] = (0, 0)) -> trimesh.Trimesh:
    box: trimesh.Trimesh = trimesh.creation.box((size, size, size))
    box.apply_translation([*at, size / 2])
    return box


def joined(*meshes: trimesh.Trimesh) -> trimesh.Trimesh:
    both = trimesh.util.concatenate(list(meshes))
    assert isinstance(both, trimesh.Trimesh)
    return both


def with_faces(mesh: trimesh.Trimesh, faces: NDArray[np.int64]) -> trimesh.Trimesh:
    return trimesh.Trimesh(mesh.vertices, faces, process=False)


def codes_of(mesh: trimesh.Trimesh, limits: PrintLimits) -> dict[str, Severity]:
    return {finding.code: finding.severity for finding in check_mesh(mesh, "part", limits)}


@pytest.mark.parametrize(
    "mesh",
    [
        pytest.param(standing_box(), id="box"),
        pytest.param(trimesh.creation.icosphere(3, 20), id="ball"),
        pytest.param(trimesh.creation.annulus(10, 20, 30), id="tube"),
        pytest.param(trimesh.creation.torus(20, 4), id="ring"),
    ],
)
def test_a_closed_body_agrees_with_trimesh(mesh: trimesh.Trimesh, limits: PrintLimits) -> None:
    assert mesh.is_volume
    measures = measure_mesh(mesh, limits)
    assert measures.closedness.is_one_body
    assert measures.solid is not None
    assert measures.solid.volume_mm3 == pytest.approx(mesh.volume)
    assert measures.solid.area_mm2 == pytest.approx(mesh.area)
    assert measures.solid.size_mm == pytest.approx(tuple(mesh.extents))
    assert measures.solid.stance.centre_mm == pytest.approx(tuple(mesh.center_mass), abs=1e-9)
    np.testing.assert_allclose(surface_of(mesh).normals, mesh.face_normals, atol=1e-12)
    pairs = {tuple(sorted(pair)) for pair in mesh.face_adjacency.tolist()}
    beyond = surface_of(mesh).neighbours
    assert pairs == {
        tuple(sorted((one, two))) for one, row in enumerate(beyond.tolist()) for two in row
    }


def test_a_missing_triangle_stops_and_nothing_else_is_measured(limits: PrintLimits) -> None:
    box = standing_box()
    open_box = with_faces(box, box.faces[1:])
    assert measure_mesh(open_box, limits).solid is None
    found = check_mesh(open_box, "part", limits)
    assert [(f.code, f.severity, f.measured) for f in found] == [
        ("mesh-not-closed", Severity.STOP, 3),
        ("not-checked", Severity.NOTE, None),
    ]


def test_vertices_that_are_not_merged_are_open_edges(limits: PrintLimits) -> None:
    soup = trimesh.Trimesh(
        standing_box().triangles.reshape(-1, 3), np.arange(36).reshape(-1, 3), process=False
    )
    assert measure_mesh(soup, limits).closedness.loose_edges == 36


def test_a_turned_triangle_stops(limits: PrintLimits) -> None:
    box = standing_box()
    faces = box.faces.copy()
    faces[0] = faces[0, ::-1]
    assert codes_of(with_faces(box, faces), limits)["winding-mixed"] is Severity.STOP


def test_an_inside_out_body_stops(limits: PrintLimits) -> None:
    box = standing_box()
    codes = codes_of(with_faces(box, box.faces[:, ::-1]), limits)
    assert codes == {"inside-out": Severity.STOP, "not-checked": Severity.NOTE}


def test_two_bodies_stop(limits: PrintLimits) -> None:
    two = joined(standing_box(), standing_box(at=(40, 0)))
    assert two.body_count == 2
    assert codes_of(two, limits)["more-than-one-body"] is Severity.STOP


def test_two_bodies_that_meet_along_an_edge_are_not_one(limits: PrintLimits) -> None:
    two = joined(standing_box(), standing_box(at=(20, 20)))
    two.merge_vertices()
    assert measure_mesh(two, limits).closedness.crowded_edges > 0
    assert codes_of(two, limits)["mesh-not-closed"] is Severity.STOP


@pytest.mark.parametrize(
    ("process", "severity"), [("filament", Severity.WARN), ("resin", Severity.STOP)]
)
def test_a_cavity_is_a_void_and_not_a_body(
    process: str, severity: Severity, limits: PrintLimits
) -> None:
    inner = standing_box(10)
    inner.apply_translation([0, 0, 5])
    inner.invert()
    hollow = joined(standing_box(), inner)
    codes = codes_of(hollow, replace(limits, process=process))
    assert codes["closed-void"] is severity
    assert "more-than-one-body" not in codes


def test_an_inside_out_body_beside_another_is_no_void(limits: PrintLimits) -> None:
    beside = standing_box(10, at=(40, 0))
    beside.invert()
    both = joined(standing_box(), beside)
    codes = codes_of(both, limits)
    assert codes["more-than-one-body"] is Severity.STOP
    assert "closed-void" not in codes


def test_no_triangles_and_no_numbers_stop(limits: PrintLimits) -> None:
    empty = trimesh.Trimesh(np.zeros((0, 3)), np.zeros((0, 3), dtype=int), process=False)
    assert codes_of(empty, limits)["mesh-not-closed"] is Severity.STOP
    box = standing_box()
    points = box.vertices.copy()
    points[0, 0] = np.nan
    broken = trimesh.Trimesh(points, box.faces, process=False)
    assert codes_of(broken, limits)["mesh-not-closed"] is Severity.STOP


def test_a_triangle_that_merging_shrank_does_not_open_the_mesh(limits: PrintLimits) -> None:
    box = standing_box()
    start, end = box.faces[0, :2]
    shrunk = with_faces(box, np.vstack([box.faces, [start, end, end]]))
    assert measure_mesh(shrunk, limits).closedness.is_one_body


def test_a_sliver_takes_the_normal_of_its_neighbour() -> None:
    points = np.array([[0, 0, 0], [10, 0, 0], [5, -5, 0], [5, 1e-7, 1e-5], [5, 5, 0]], dtype=float)
    faces = np.array([[0, 2, 1], [0, 1, 3], [3, 1, 4], [0, 3, 4]])
    surface = surface_of(trimesh.Trimesh(points, faces, process=False))
    np.testing.assert_allclose(surface.normals[1], surface.normals[0])

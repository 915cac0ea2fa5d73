from __future__ import annotations

from math import cos, pi, sqrt
from typing import TYPE_CHECKING

import numpy as np
import pytest
from cadquery import Location, Shape, Shell, Solid
from cadquery.func import box, compound, cylinder
from OCP.BRep import BRep_Tool
from OCP.TopLoc import TopLoc_Location

from gyrecut.errors import BuildError
from gyrecut.pieces.meshing import mesh_of

if TYPE_CHECKING:
    from trimesh import Trimesh


def tube(outside_mm: float, bore_mm: float, length_mm: float) -> Solid:
    (solid,) = (cylinder(outside_mm, length_mm) - cylinder(bore_mm, length_mm)).Solids()
    return solid


def sides_of(mesh: Trimesh, radius_mm: float) -> int:
    on_base = mesh.vertices[np.abs(mesh.vertices[:, 2]) < 1e-9]
    return int((np.abs(np.hypot(on_base[:, 0], on_base[:, 1]) - radius_mm) < 1e-3).sum())


@pytest.mark.parametrize("chord", [0.2, 0.05, 0.01])
def test_facets_stay_within_the_chord_error(chord: float) -> None:
    mesh = mesh_of(tube(200, 190, 50), chord)
    middles = mesh.vertices[mesh.edges_unique].mean(axis=1)
    radius = np.hypot(middles[:, 0], middles[:, 1])
    depth = np.minimum(np.abs(radius - 100), np.abs(radius - 95))
    on_end = np.isin(np.round(middles[:, 2], 6), (0.0, 50.0))
    # the flat ends have edges that cross the ring; only the walls are bound by the chord
    assert depth[~on_end].max() <= chord + 1e-4


def test_chord_error_is_absolute() -> None:
    chord = 0.05
    sides = {r: sides_of(mesh_of(tube(2 * r, 20, 10), chord), r) for r in (50.0, 150.0)}
    for radius, count in sides.items():
        # sagitta of a chord that spans 2 pi / n, plane geometry
        assert chord / 4 < radius * (1 - cos(pi / count)) <= chord
    # for a small sagitta n goes with the root of r / s: a tolerance taken relative to the size
    # would give both circles the same number of sides
    assert sides[150.0] / sides[50.0] == pytest.approx(sqrt(3), rel=0.02)


def test_volume_is_the_solids_within_the_chord_error() -> None:
    solid = tube(200, 190, 50)
    mesh = mesh_of(solid)
    assert mesh.is_volume
    assert solid.Volume() == pytest.approx(pi / 4 * (200**2 - 190**2) * 50, rel=1e-9)
    assert abs(mesh.volume - solid.Volume()) <= 0.05 * solid.Area()


def test_flat_solid_is_exact() -> None:
    mesh = mesh_of(box(10, 20, 30))
    assert len(mesh.vertices) == 8
    assert len(mesh.faces) == 12
    assert mesh.volume == pytest.approx(6000, rel=1e-12)


def test_moved_solid_is_meshed_where_it_is() -> None:
    solid = box(10, 20, 30).moved(Location((100, 50, 0), (0, 0, 90)))
    mesh = mesh_of(solid)
    expected = [[90, 45, 0], [110, 55, 30]]
    assert np.allclose(mesh.bounds, expected, rtol=0, atol=1e-5)
    assert mesh.volume == pytest.approx(6000, rel=1e-6)


def test_solid_keeps_no_mesh_and_a_second_call_is_not_answered_by_the_first() -> None:
    solid = tube(100, 90, 20)
    coarse = mesh_of(solid, 0.5)
    fine = mesh_of(solid, 0.01)
    assert len(fine.faces) > 2 * len(coarse.faces)
    assert all(
        BRep_Tool.Triangulation_s(face.wrapped, TopLoc_Location()) is None for face in solid.Faces()
    )


def test_vertices_are_welded_and_hold_32_bit_values() -> None:
    mesh = mesh_of(tube(123.4, 111.1, 33.3))
    assert np.array_equal(mesh.vertices, mesh.vertices.astype(np.float32))
    assert len(np.unique(mesh.vertices, axis=0)) == len(mesh.vertices)
    # a closed surface through which one hole goes has 2 - 2 = 0 (Euler, from memory)
    assert mesh.euler_number == 0


def test_two_calls_give_the_same_mesh() -> None:
    first, second = mesh_of(tube(80, 70, 40)), mesh_of(tube(80, 70, 40))
    assert np.array_equal(first.vertices, second.vertices)
    assert np.array_equal(first.faces, second.faces)


def test_open_shell_is_refused() -> None:
    faces = box(10, 20, 30).Faces()[:-1]
    with pytest.raises(BuildError, match=r"lid cannot be meshed: it is not closed at 4 edges"):
        mesh_of(Shell.makeShell(faces), name="lid")


def test_solids_that_share_only_an_edge_are_refused() -> None:
    pair = compound(box(10, 10, 10), box(10, 10, 10).moved(Location((10, 10, 0))))
    with pytest.raises(BuildError, match=r"not closed at 1 edges, the first near x 5\.00, y 5\.00"):
        mesh_of(pair)


def test_inside_out_solid_is_refused() -> None:
    inside_out = Shape.cast(box(10, 20, 30).wrapped.Reversed())
    with pytest.raises(BuildError, match="its facets do not all look outward"):
        mesh_of(inside_out)


def test_nothing_is_refused() -> None:
    with pytest.raises(BuildError, match="it has no faces"):
        mesh_of(Solid(compound().wrapped))

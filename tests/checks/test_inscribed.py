"""Inscribed balls against closed forms and against another library's maximal balls."""

from __future__ import annotations

from math import radians, tan
from typing import TYPE_CHECKING

import numpy as np
import pytest
import trimesh
from cadquery.func import box, cylinder, extrude, face, polygon, sphere

from gyrecut.checks import measure_mesh, thickness_map
from gyrecut.checks.inscribed import inscribed_balls
from gyrecut.checks.rays import RayCaster
from gyrecut.checks.sampling import spread_samples
from gyrecut.checks.surface import surface_of

if TYPE_CHECKING:
    from collections.abc import Callable

    from cadquery import Shape
    from numpy.typing import NDArray
    from tests.checks.conftest import MeshOf

    from gyrecut.checks import PrintLimits
    from gyrecut.checks.inscribed import Inscribed


def balls_at(mesh: trimesh.Trimesh, places: NDArray[np.float64], inward: object) -> Inscribed:
    along = np.broadcast_to(np.array(inward, dtype=np.float64), places.shape)
    return inscribed_balls(RayCaster(surface_of(mesh)), places, along)


def test_between_two_faces_it_is_the_wall(mesh_of: MeshOf) -> None:
    places = np.array([[0.3, 0.2, 3.0], [-11.0, 7.0, 3.0]])
    balls = balls_at(mesh_of(box(40, 30, 3)), places, (0, 0, -1))
    np.testing.assert_allclose(balls.diameter_mm, 3, atol=1e-4)
    assert not balls.is_caught.any()


@pytest.mark.parametrize("from_edge", [0.2, 0.8, 2.0])
def test_beside_a_square_edge_it_shrinks_and_is_caught(from_edge: float, mesh_of: MeshOf) -> None:
    places = np.array([[20 - from_edge, 0.2, 10.0]])
    balls = balls_at(mesh_of(box(40, 30, 10)), places, (0, 0, -1))
    assert balls.diameter_mm[0] == pytest.approx(2 * from_edge, rel=1e-3)
    assert balls.is_caught[0]


@pytest.mark.parametrize("angle", [10, 20, 40, 60])
def test_in_a_wedge_it_rests_on_both_sides(angle: float, mesh_of: MeshOf) -> None:
    # A ball that touches both sides at x from the edge has radius x tan(angle / 2).
    outline = [(0, 0, 0), (30, 0, 0), (30, 0, 30 * tan(radians(angle)))]
    wedge = mesh_of(extrude(face(polygon(*outline)), (0, 40, 0)))
    balls = balls_at(wedge, np.array([[10.0, 20.0, 0.0]]), (0, 0, 1))
    assert balls.diameter_mm[0] == pytest.approx(20 * tan(radians(angle / 2)), rel=1e-3)
    assert not balls.is_caught[0]


def test_in_a_ball_it_is_the_ball(mesh_of: MeshOf) -> None:
    mesh = mesh_of(sphere(20), 0.02, 0.1)
    balls = balls_at(mesh, mesh.triangles_center, -mesh.face_normals)
    # A facet's normal is off by up to 0.05 rad, which at the fan's 70 degrees is a seventh.
    weights = mesh.area_faces / mesh.area
    assert weights @ balls.diameter_mm == pytest.approx(20, rel=0.02)
    assert weights[balls.is_caught].sum() < 0.02


SHAPES: dict[str, Callable[[], Shape]] = {
    "plate": lambda: box(40, 30, 6),
    "tube off the middle": lambda: cylinder(40, 20) - cylinder(34, 20).moved(x=1),
    "box with a rib": lambda: box(30, 30, 3) + box(2, 30, 15),
    "bored block": lambda: box(30, 30, 12) - cylinder(8, 12).moved(x=6),
    "cup": lambda: cylinder(30, 20) - cylinder(25, 17).moved(z=3),
    "lid with holes": lambda: cylinder(50, 5) - cylinder(20, 5) - cylinder(5, 5).moved(x=18),
}


@pytest.mark.parametrize("name", SHAPES)
def test_agrees_with_maximal_balls(name: str, mesh_of: MeshOf) -> None:
    """Outside check: `trimesh.proximity.thickness(method="max_sphere")` at the same places."""
    mesh = mesh_of(SHAPES[name]())
    surface, samples = surface_of(mesh), spread_samples(surface_of(mesh))
    chosen = np.linspace(0, len(samples.places) - 1, 200).astype(int)
    places, normals = samples.places[chosen], surface.normals[samples.triangle[chosen]]
    ours = balls_at(mesh, places, -normals)
    theirs: NDArray[np.float64] = trimesh.proximity.thickness(  # type: ignore[no-untyped-call]
        mesh, places, normals=normals, method="max_sphere"
    )
    off = np.abs(ours.diameter_mm - theirs) / theirs
    # Ours passes by a reentrant edge between two rays of the fan, and the next facet of a round
    # wall, where theirs is tiny (0.05 mm in a wall of 2.5): few places lie so.
    assert np.median(off) < 1e-3
    assert np.mean(off < 0.05) > 0.9


def test_never_wider_than_the_ray_is_long(mesh_of: MeshOf) -> None:
    mesh = mesh_of(cylinder(40, 20) - cylinder(34, 20).moved(x=1))
    surface, samples = surface_of(mesh), spread_samples(surface_of(mesh))
    along = -surface.normals[samples.triangle]
    caster = RayCaster(surface)
    rays = caster.leave(samples.places + 2e-3 * along, along).distance + 2e-3
    balls = inscribed_balls(caster, samples.places, along)
    assert (balls.diameter_mm <= rays + 1e-9).all()


def test_the_map_has_a_number_for_each_triangle(mesh_of: MeshOf) -> None:
    tube = mesh_of(cylinder(60, 40) - cylinder(54, 40))
    found = thickness_map(tube)
    assert found.shape == (len(tube.faces),)
    assert found.dtype == np.float32
    on_side = np.abs(tube.face_normals[:, 2]) < 0.5
    middle = np.abs(tube.triangles_center[:, 2] - 20) < 15
    np.testing.assert_allclose(found[on_side & middle], 3, atol=0.1)
    # On the end faces the balls rest on a side wall: no wall thickness is seen from there.
    assert np.isnan(found[~on_side]).all()


def test_what_only_the_ray_calls_thin_is_disputed(mesh_of: MeshOf, limits: PrintLimits) -> None:
    # The place of an upright plate where a ball of the wall's width rests on its upper edge.
    plate = mesh_of(box(40, 0.6, 30) + box(40, 20, 2))
    solid = measure_mesh(plate, limits).solid
    assert solid is not None
    assert 0 < solid.thickness.disputed_share < 0.05
    assert solid.thickness.thin_share == pytest.approx(2 * 40 * 28 / plate.area, rel=0.1)
    assert solid.thickness.inscribed_mm == pytest.approx(0.6, abs=1e-3)
    assert solid.thickness.smallest_mm == pytest.approx(0.6, abs=1e-6)

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np
import pytest
import trimesh
from cadquery import Location
from cadquery.func import box, cylinder

from gyrecut.kit.geometry_hash import geometry_hash
from gyrecut.pieces.meshing import mesh_of

if TYPE_CHECKING:
    from cadquery import Shape


def block(hole_x_mm: float = 20.0) -> Shape:
    hole = cylinder(8, 60).moved(Location((hole_x_mm, 15, -10)))
    return box(40, 30, 25).moved(Location((20, 15, 0))) - hole


def test_same_solid_made_anew_hashes_alike() -> None:
    assert geometry_hash(mesh_of(block())) == geometry_hash(mesh_of(block()))


def test_says_its_scheme() -> None:
    scheme, digits = geometry_hash(mesh_of(block())).split(":")
    assert scheme == "mesh-1"
    assert len(bytes.fromhex(digits)) == 32


@pytest.mark.parametrize("seed", [1, 2, 3])
def test_order_of_vertices_and_facets_does_not_matter(seed: int) -> None:
    mesh = mesh_of(block())
    chance = np.random.default_rng(seed)
    order = chance.permutation(len(mesh.vertices))
    place = np.argsort(order)
    faces = place[mesh.faces][chance.permutation(len(mesh.faces))]
    turned = np.array([np.roll(face, chance.integers(3)) for face in faces])
    shuffled = trimesh.Trimesh(mesh.vertices[order], turned, process=False)
    assert geometry_hash(shuffled) == geometry_hash(mesh)


def test_noise_below_a_print_does_not_matter() -> None:
    mesh = mesh_of(box(10, 20, 30))
    shaken = trimesh.Trimesh(mesh.vertices + 1e-6, mesh.faces, process=False)
    assert geometry_hash(shaken) == geometry_hash(mesh)


def test_hole_moved_by_a_hundredth_hashes_otherwise() -> None:
    assert geometry_hash(mesh_of(block(20.01))) != geometry_hash(mesh_of(block()))


def test_inside_out_hashes_otherwise() -> None:
    mesh = mesh_of(block())
    inverted = trimesh.Trimesh(mesh.vertices, mesh.faces[:, ::-1], process=False)
    assert geometry_hash(inverted) != geometry_hash(mesh)


def test_same_points_joined_otherwise_hash_otherwise() -> None:
    corners = [[0, 0, 0], [1, 0, 0], [1, 1, 0], [0, 1, 0]]
    one = trimesh.Trimesh(corners, [[0, 1, 2], [0, 2, 3]], process=False)
    other = trimesh.Trimesh(corners, [[0, 1, 3], [1, 2, 3]], process=False)
    assert geometry_hash(one) != geometry_hash(other)

"""A mesh library that the checks do not use, asked the same of every piece of every shipped kit.

PyMeshLab: its topological and geometric measures, its exact distances to a mesh, and its test for
facets that cut each other.
"""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache
from itertools import combinations
from pathlib import Path
from typing import TYPE_CHECKING, Any

import numpy as np
import pymeshlab  # type: ignore[import-untyped]  # ships no types
import pytest
import trimesh

from gyrecut import pipeline
from gyrecut.checks import (
    limits_of,
    measure_mesh,
    measure_nearness,
    nearness_findings,
)
from gyrecut.checks.inscribed import inscribed_balls
from gyrecut.checks.rays import RayCaster
from gyrecut.checks.sampling import spread_samples
from gyrecut.checks.surface import surface_of
from gyrecut.pieces import make_pieces
from gyrecut.pieces.meshing import mesh_of as placed_mesh
from gyrecut.profile import load_profile
from gyrecut.proportions.printing import bed_of
from gyrecut.solids import make_parts

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.checks import PrintLimits
    from gyrecut.pieces import Piece

PROFILES = Path(__file__).parents[2] / "profiles"
SHIPPED = sorted(path.stem for path in PROFILES.glob("*.yaml"))
CHORD_MM = 0.05  # of the pieces' own meshes
FAR_MM = 1000.0


@dataclass(frozen=True, kw_only=True)
class ShippedKit:
    limits: PrintLimits
    pieces: tuple[Piece, ...]


@cache
def kit_of(name: str) -> ShippedKit:
    profile = load_profile(PROFILES / f"{name}.yaml")
    bed = bed_of(profile.printer)
    pieces = tuple(
        piece
        for stage in pipeline.design(profile).stages
        for piece in make_pieces(make_parts(stage.dimensions), stage.dimensions, bed)
    )
    return ShippedKit(limits=limits_of(profile.printer), pieces=pieces)


@pytest.fixture(params=SHIPPED)
def kit(request: pytest.FixtureRequest) -> ShippedKit:
    return kit_of(request.param)


def second(mesh: trimesh.Trimesh) -> Any:  # noqa: ANN401 - their class has no type
    meshes = pymeshlab.MeshSet()
    meshes.add_mesh(pymeshlab.Mesh(mesh.vertices, mesh.faces))
    return meshes


def distances(mesh: trimesh.Trimesh, places: NDArray[np.float64]) -> NDArray[np.float64]:
    """Exact way from each place to the nearest point of the mesh."""
    meshes = second(mesh)
    meshes.add_mesh(pymeshlab.Mesh(places))
    meshes.compute_scalar_by_distance_from_another_mesh_per_vertex(
        measuremesh=1, refmesh=0, signeddist=False, maxdist=pymeshlab.PureValue(FAR_MM)
    )
    ways: NDArray[np.float64] = meshes.mesh(1).vertex_scalar_array()
    return ways


def test_manifold_one_body_and_its_volume(kit: ShippedKit) -> None:
    for piece in kit.pieces:
        theirs = second(piece.mesh)
        topology, geometry = theirs.get_topological_measures(), theirs.get_geometric_measures()
        ours = measure_mesh(piece.mesh, kit.limits)
        assert ours.closedness.is_one_body, piece.name
        assert topology["is_mesh_two_manifold"], piece.name
        assert topology["number_holes"] == 0
        assert topology["connected_components_number"] == ours.closedness.bodies == 1
        assert ours.solid is not None
        assert ours.solid.volume_mm3 == pytest.approx(geometry["mesh_volume"], rel=1e-9)
        # Its area is summed in single precision.
        assert ours.solid.area_mm2 == pytest.approx(geometry["surface_area"], rel=1e-6)
        centre = geometry["center_of_mass"]
        assert ours.solid.stance.centre_mm == pytest.approx(tuple(centre), abs=1e-3)


def test_faults_are_seen_by_both(kit: ShippedKit) -> None:
    mesh = kit.pieces[0].mesh
    holed = trimesh.Trimesh(mesh.vertices, mesh.faces[1:], process=False)
    assert second(holed).get_topological_measures()["number_holes"] == 1
    assert measure_mesh(holed, kit.limits).closedness.loose_edges == 3
    aside = mesh.copy()
    aside.apply_translation([2 * mesh.extents[0], 0, 0])
    two = trimesh.util.concatenate([mesh, aside])
    assert isinstance(two, trimesh.Trimesh)
    assert second(two).get_topological_measures()["connected_components_number"] == 2
    assert measure_mesh(two, kit.limits).closedness.bodies == 2


def test_inscribed_balls_are_empty(kit: ShippedKit) -> None:
    """No point of the surface is nearer to the middle of a ball than its radius."""
    for piece in kit.pieces:
        surface = surface_of(piece.mesh)
        samples = spread_samples(surface)
        chosen = samples.pick(np.arange(0, len(samples.places), 10))
        along = -surface.normals[chosen.triangle]
        balls = inscribed_balls(RayCaster(surface), chosen.places, along)
        met = np.flatnonzero(np.isfinite(balls.diameter_mm))
        assert len(met) > 0.95 * len(chosen.places), piece.name
        radius = balls.diameter_mm[met] / 2
        lacking = radius - distances(piece.mesh, chosen.places[met] + along[met] * radius[:, None])
        # It touches the place itself, so the surface is never further than that.
        assert lacking.min() > -2e-3, piece.name
        # What is nearer was between two rays of the fan: round edges of holes and rims.
        assert np.mean(lacking < 2 * CHORD_MM) > 0.85, piece.name
        assert np.median(lacking) < 2e-3, piece.name


def test_the_thinnest_wall_is_where_it_is_said_to_be(kit: ShippedKit) -> None:
    for piece in kit.pieces:
        solid = measure_mesh(piece.mesh, kit.limits).solid
        assert solid is not None
        thickness = solid.thickness
        (way,) = distances(piece.mesh, np.array([thickness.place_mm]))
        # Half the wall from its middle to either face; less where the faces lean, and never more.
        assert way <= thickness.smallest_mm / 2 + 1e-3, piece.name
        assert way >= thickness.smallest_mm / 2 * np.cos(np.radians(65)), piece.name
        assert thickness.inscribed_mm <= thickness.smallest_mm + 1e-9


def test_facets_cut_each_other_only_in_the_folds_of_a_duct(kit: ShippedKit) -> None:
    """The kernel folds a sliver here and there where the skins of the transition meet."""
    for piece in kit.pieces:
        theirs = second(piece.mesh)
        theirs.compute_selection_by_self_intersections_per_face()
        cut = theirs.current_mesh().face_selection_array()
        if "transition" in piece.name:
            assert np.count_nonzero(cut) < 0.003 * len(cut)
        else:
            assert not cut.any(), piece.name


def test_pieces_leave_each_other_room(kit: ShippedKit) -> None:
    placed = {piece.name: placed_mesh(piece.placed) for piece in kit.pieces}
    near = 0
    for one, other in combinations(placed, 2):
        # The transition is put on sideways, everything else along the axis.
        sideways = "transition" in one + other
        nearness = measure_nearness(
            placed[one], placed[other], assembly=(1, 0, 0) if sideways else (0, 0, 1)
        )
        found = nearness_findings(nearness, f"{one} and {other}", kit.limits, is_joint=True)
        assert found == (), found
        near += nearness.gap_mm < 1
    assert near >= len(placed) - 1  # so the kit hangs together, and it was looked at

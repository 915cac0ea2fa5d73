"""What the tests of the checks share: one printer, and meshes made the way an export makes them."""

from __future__ import annotations

from math import radians
from typing import TYPE_CHECKING, Protocol

import numpy as np
import pytest
import trimesh

from gyrecut.checks import PrintLimits

if TYPE_CHECKING:
    from collections.abc import Callable

    from cadquery import Shape


class MeshOf(Protocol):
    """Turns a CAD shape into a mesh on the bed; chord in mm, angle in rad."""

    def __call__(
        self, shape: Shape, chord: float = 0.05, angle: float = 0.2
    ) -> trimesh.Trimesh: ...


@pytest.fixture(scope="session")
def limits() -> PrintLimits:
    """An ordinary filament printer."""
    return PrintLimits(
        build_volume_mm=(250.0, 250.0, 250.0),
        margin_mm=5.0,
        smallest_wall_mm=0.8,
        overhang_limit=radians(45),
        bridge_limit_mm=8.0,
        process="filament",
        line_width_mm=0.4,
        clearance_mm=0.2,
    )


@pytest.fixture(scope="session")
def resin_limits() -> PrintLimits:
    """An ordinary resin printer."""
    return PrintLimits(
        build_volume_mm=(150.0, 150.0, 200.0),
        margin_mm=2.0,
        smallest_wall_mm=1.0,
        overhang_limit=radians(45),
        bridge_limit_mm=5.0,
        process="resin",
        line_width_mm=0.05,
        clearance_mm=0.1,
    )


@pytest.fixture(scope="session")
def mesh_of() -> Callable[..., trimesh.Trimesh]:
    """The mesher, see `MeshOf`."""

    def mesh(shape: Shape, chord: float = 0.05, angle: float = 0.2) -> trimesh.Trimesh:
        points, faces = shape.tessellate(chord, angle)
        made = trimesh.Trimesh(
            np.array([point.toTuple() for point in points]), np.array(faces), process=False
        )
        made.merge_vertices(digits_vertex=6)
        made.apply_translation([0, 0, -made.bounds[0, 2]])
        return made

    return mesh

"""Rays shot through a piece or the air round it: where each one leaves what it runs in."""

from __future__ import annotations

from copy import copy
from dataclasses import dataclass
from typing import TYPE_CHECKING, Any

import numpy as np

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.checks.surface import Surface

UPRIGHT = 0.01  # sine from the vertical, below which z gives no level direction
GRAZED = 1e-6  # a smaller cosine is a ray that runs along the face, with no distance to give
NUDGE_MM = 2e-3  # inward start: far above float32 rounding at 1 m (6e-5 mm), far below a wall


@dataclass(frozen=True, slots=True, kw_only=True)
class Exits:
    """Where rays leave the material.

    Parameters
    ----------
    distance : (n,) float
        Way from the start to the exit; inf where the ray did not leave through an inside [mm].
    facing : (n,) float
        Cosine between the ray and the outward normal at the exit; 1 is square on [-].
    normal : (n, 3) float
        Outward normal at the exit [-].
    """

    distance: NDArray[np.float64]
    facing: NDArray[np.float64]
    normal: NDArray[np.float64]


class RayCaster:
    """The ray tree of one surface.

    Parameters
    ----------
    surface : Surface
        A closed surface.
    """

    def __init__(self, surface: Surface) -> None:
        from embreex.mesh_construction import TriangleMesh  # noqa: PLC0415 - only when measuring
        from embreex.rtcore_scene import EmbreeScene  # noqa: PLC0415

        self._corners = surface.corners[:, 0]
        self._normals = surface.normals
        self._scene: Any = EmbreeScene()
        TriangleMesh(self._scene, surface.corners.astype(np.float32))

    def in_the_air(self) -> RayCaster:
        """Give the same surface seen from its other side: rays then run in air, not in material."""
        turned = copy(self)
        turned._normals = -self._normals  # noqa: SLF001 - our own copy
        return turned

    def leave(self, start: NDArray[np.float64], along: NDArray[np.float64]) -> Exits:
        """Follow rays to where they first meet the surface.

        Parameters
        ----------
        start : (n, 3) float
            Places inside the material [mm].
        along : (n, 3) float
            Unit directions [-].

        Returns
        -------
        Exits
            Distances worked out in double precision from the triangle that was hit.

        Notes
        -----
        A ray that meets an outside first did not start in the material; its distance is inf, as
        for one that meets nothing.
        """
        hit = np.asarray(
            self._scene.run(start.astype(np.float32), along.astype(np.float32)), dtype=np.int64
        )
        normal = self._normals[hit]
        facing = np.einsum("ij,ij->i", along, normal)
        leaves = (hit >= 0) & (facing > 0)
        ahead = np.einsum("ij,ij->i", self._corners[hit] - start, normal)
        distance = np.full(len(start), np.inf)
        np.divide(ahead, facing, out=distance, where=leaves & (facing > GRAZED))
        return Exits(distance=np.maximum(distance, 0), facing=facing, normal=normal)


def frame_of(along: NDArray[np.float64]) -> tuple[NDArray[np.float64], NDArray[np.float64]]:
    """Give two unit directions square to each one given and to each other, `(n, 3)` both.

    The first is level, but where the direction given is upright it is x.
    """
    level = np.cross(along, [0.0, 0.0, 1.0])
    level[np.abs(level).max(axis=1) < UPRIGHT] = (1.0, 0.0, 0.0)
    level -= np.einsum("ij,ij->i", level, along)[:, None] * along
    level /= np.linalg.norm(level, axis=1)[:, None]
    return level, np.cross(along, level)

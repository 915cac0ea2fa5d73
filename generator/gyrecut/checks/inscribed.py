"""Wall thickness by inscribed balls, the second opinion on the ray through the wall.

A ball that touches the surface at a place, from inside, is shrunk until it lies in the material.
Its diameter is never more than the ray's way through the wall there, and less where the faces lean
or something juts in from the side. It is shrunk by what rays meet: a fan from the place finds who
is in the way, and rays from the middle of the ball, square to the face found, settle it. On flat
facets that is the exact ball as long as a ray of the fan met the facet it rests on.

At a convex edge balls shrink to nothing. Those rest on a face that leans more than `GRAZING` from
opposite, and are clearly less than the ray is long; they are caught in the edge and say nothing
about a wall. Between rays of the fan a reentrant edge may go unseen, and so does the next facet of
a round wall, which would make a ball beside their common edge tiny.
"""

from __future__ import annotations

from dataclasses import dataclass
from math import cos, pi, radians, sin
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.checks.opposed import GRAZING
from gyrecut.checks.rays import NUDGE_MM, RayCaster, frame_of
from gyrecut.checks.surface import surface_of

if TYPE_CHECKING:
    import trimesh
    from numpy.typing import NDArray

# Rings of the fan: lean from the inward normal, and rays on the ring.
FAN = ((radians(25.0), 5), (radians(48.0), 8), (radians(70.0), 10))
SHRINKS = 3  # rays from the middle; on the solids of the tests a fourth changes nothing by 1e-3
CAUGHT = 0.9  # of the ray; where facets stand for a round wall, many touch a ball almost alike
DONE = 1 - 1e-4  # a ball that shrinks by less stays


@dataclass(frozen=True, slots=True, kw_only=True)
class Inscribed:
    """Balls that touch places of the surface from inside.

    Parameters
    ----------
    diameter_mm : (n,) float
        Largest that fits there; inf where no ray met anything [mm].
    is_caught : (n,) bool
        The ball rests in an edge, not between two faces of a wall.
    """

    diameter_mm: NDArray[np.float64]
    is_caught: NDArray[np.bool_]


def inscribed_balls(
    caster: RayCaster, places: NDArray[np.float64], along: NDArray[np.float64]
) -> Inscribed:
    """Inscribe a ball at each place.

    Parameters
    ----------
    caster : RayCaster
        Of a closed surface.
    places : (n, 3) float
        On the surface [mm].
    along : (n, 3) float
        Unit normal there, inward [-].
    """
    start = places + NUDGE_MM * along
    exits = caster.leave(start, along)
    radius = (exits.distance + NUDGE_MM) / 2
    of_ray, rests_on = radius, exits.normal
    level, upward = frame_of(along)
    for lean, count in FAN:
        for turn in np.arange(count) * 2 * pi / count:
            side = cos(turn) * level + sin(turn) * upward
            ray = cos(lean) * along + sin(lean) * side
            exits = caster.leave(start, ray)
            # Through the place and the exit; where the ray began is as good as the place.
            met = exits.distance / (2 * cos(lean)) + NUDGE_MM
            is_less = met < radius
            radius = np.where(is_less, met, radius)
            rests_on = np.where(is_less[:, None], exits.normal, rests_on)
    for _ in range(SHRINKS):
        middle = places + np.where(np.isfinite(radius), radius, 0.0)[:, None] * along
        exits = caster.leave(middle, rests_on)
        touch = exits.distance[:, None] * rests_on + middle - places
        ahead = np.einsum("ij,ij->i", touch, along)
        with np.errstate(invalid="ignore", divide="ignore"):
            met = np.einsum("ij,ij->i", touch, touch) / (2 * ahead)
        is_less = (exits.distance < radius) & (ahead > 0) & (met < DONE * radius)
        if not is_less.any():
            break
        radius = np.where(is_less, met, radius)
        rests_on = np.where(is_less[:, None], exits.normal, rests_on)
    is_aslant = np.einsum("ij,ij->i", rests_on, along) < cos(GRAZING)
    is_caught = ~np.isfinite(radius) | (is_aslant & (radius < CAUGHT * of_ray))
    return Inscribed(diameter_mm=2 * radius, is_caught=is_caught)


def thickness_map(mesh: trimesh.Trimesh) -> NDArray[np.float32]:
    """Give the wall thickness behind each triangle of a closed mesh, for a picture of it.

    Parameters
    ----------
    mesh : trimesh.Trimesh
        One closed body, equal vertices merged [mm].

    Returns
    -------
    (m,) float32
        Diameter of the ball inscribed at the triangle's middle; NaN where it is caught in an edge
        [mm].
    """
    surface = surface_of(mesh)
    balls = inscribed_balls(RayCaster(surface), surface.corners.mean(axis=1), -surface.normals)
    of_mesh = np.full(len(surface.is_kept), np.nan, dtype=np.float32)
    of_mesh[surface.is_kept] = np.where(balls.is_caught, np.nan, balls.diameter_mm)
    return of_mesh

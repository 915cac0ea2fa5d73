"""Local lows of a surface: where a part begins in the air, and where a pocket has its floor."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.checks.surface import BED_MM

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.checks.surface import Surface

LEVEL_MM = 1e-6  # vertices this close in height are level


@dataclass(frozen=True, slots=True, kw_only=True)
class Lows:
    """Places with no lower neighbour, one for each level patch.

    Parameters
    ----------
    starts : (n, 3) float
        Lowest places of parts that begin in the air [mm].
    floors : (m, 3) float
        Lowest places of pockets that are open upwards [mm].
    """

    starts: NDArray[np.float64]
    floors: NDArray[np.float64]


def lows_of(surface: Surface, *, upside_down: bool = False) -> Lows:
    """Find the lows of a closed surface.

    Parameters
    ----------
    surface : Surface
        Standing on z = 0.
    upside_down : bool
        Take down for up. What stands on the bed is then an ordinary place.

    Notes
    -----
    Level vertices that share an edge are taken as one. Where none of them has a lower neighbour
    the surface has a hollow: a part begins there when the facets round it look down, and it is
    the floor of a pocket when they look up.
    """
    from scipy.sparse import coo_array  # noqa: PLC0415 - see `patches_of`
    from scipy.sparse.csgraph import connected_components  # noqa: PLC0415

    up = -1.0 if upside_down else 1.0
    start, end = surface.faces.ravel(), np.roll(surface.faces, -1, axis=1).ravel()
    height = up * surface.vertices[:, 2]
    rise = height[end] - height[start]
    level = np.abs(rise) <= LEVEL_MM
    graph = coo_array(
        (np.ones(int(level.sum()), dtype=np.bool_), (start[level], end[level])),
        shape=(len(height), len(height)),
    )
    count, labels = connected_components(graph.tocsr(), directed=False)
    is_lowest = np.zeros(count, dtype=np.bool_)
    is_lowest[labels[surface.faces.ravel()]] = True  # a vertex of no triangle is no part
    is_lowest[labels[end[rise > LEVEL_MM]]] = False
    is_lowest[labels[start[rise < -LEVEL_MM]]] = False
    if not upside_down:
        is_lowest[labels[height < BED_MM]] = False
    if not is_lowest.any():
        nowhere = np.zeros((0, 3))
        return Lows(starts=nowhere, floors=nowhere)
    touches = is_lowest[labels[surface.faces]].any(axis=1)
    facing = np.repeat((up * surface.normals[:, 2] * surface.areas)[touches], 3)
    met = labels[surface.faces[touches].ravel()]
    looks_up = np.bincount(met, weights=facing, minlength=count)
    _, first = np.unique(labels, return_index=True)
    places = surface.vertices[first]
    return Lows(
        starts=places[is_lowest & (looks_up < 0)], floors=places[is_lowest & (looks_up > 0)]
    )

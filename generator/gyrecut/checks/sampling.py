"""Places spread over the surface of a piece, the same ones each time."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.checks.surface import Surface

SAMPLES = 20_000  # spread by area, on top of one in every facet that is not tiny
TINY_MM2 = 0.1  # a quarter of a bead squared; such facets are sampled by area only
FINEST_MM2 = 0.25  # no need for samples closer than about half a millimetre


@dataclass(frozen=True, slots=True, kw_only=True)
class Samples:
    """Places on a surface.

    Parameters
    ----------
    places : (n, 3) float
        Where [mm].
    triangle : (n,) int
        Triangle of each.
    weight : (n,) float
        Area each stands for [mm2].
    """

    places: NDArray[np.float64]
    triangle: NDArray[np.int64]
    weight: NDArray[np.float64]

    def pick(self, which: NDArray[np.int64]) -> Samples:
        """Keep some of the places."""
        return Samples(
            places=self.places[which], triangle=self.triangle[which], weight=self.weight[which]
        )


def spread_samples(surface: Surface) -> Samples:
    """Spread places over the surface.

    Notes
    -----
    A triangle gets its share by area, at least one where it is not tiny: thin places begin at
    edges of the design, so they have facets of their own however small they are. The first place
    is the centroid, the others follow the two-dimensional golden sequence.
    """
    areas = surface.areas
    per_sample = max(float(areas.sum()) / SAMPLES, FINEST_MM2)
    shares = np.floor(np.cumsum(areas) / per_sample).astype(np.int64)
    counts = np.maximum(np.diff(shares, prepend=0), areas >= TINY_MM2)
    triangle = np.repeat(np.arange(len(areas)), counts)
    rank = np.arange(len(triangle)) - np.repeat(np.cumsum(counts) - counts, counts)
    u = (1 / 3 + rank * 0.7548776662466927) % 1
    v = (1 / 3 + rank * 0.5698402909980532) % 1
    beyond = u + v > 1
    u[beyond], v[beyond] = 1 - u[beyond], 1 - v[beyond]
    first, second, third = surface.corners[triangle].transpose(1, 0, 2)
    places = first + u[:, None] * (second - first) + v[:, None] * (third - first)
    return Samples(places=places, triangle=triangle, weight=areas[triangle] / counts[triangle])

"""The thinnest wall of a piece, and where it is.

A wall is measured by a ray from one face, square to it, to where it leaves through another face.
That number alone also shrinks to nothing at every sharp edge, so three kinds of place are no wall:

* a grazing exit, where the far face leans more than `GRAZING` from square to the ray;
* a sharp edge: the two faces close at more than `EDGE_ANGLE`, and the material does end where
  they meet. A blunter angle than that is an edge that prints as one; a keener one is a wall that
  runs out, and counts from one smallest wall behind its edge;
* a small mark: the thin place does not go on for one smallest wall, to at least one side, along
  each of two directions square to one another. An embossed stroke that stands up less than one
  smallest wall is not a wall.

A groove or a drilled tip also closes two faces, but around material that goes on: it is found.
Not found: a thin spot less than about one smallest wall across, such as two cones tip to tip, and
a pin, which is thin but no wall.
"""

from __future__ import annotations

from dataclasses import dataclass
from math import cos, radians, tan
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.checks.rays import NUDGE_MM, RayCaster
from gyrecut.findings import Finding, Severity

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.checks.limits import PrintLimits
    from gyrecut.checks.surface import Surface

SAMPLES = 20_000  # spread by area, on top of one in every facet that is not tiny
TINY_MM2 = 0.1  # a quarter of a bead squared; such facets are sampled by area only
FINEST_MM2 = 0.25  # no need for samples closer than about half a millimetre
GRAZING = radians(65.0)
EDGE_ANGLE = radians(25.0)
PARALLEL = radians(2.0)  # faces within this have no meeting line worth looking for
UPRIGHT = 0.01  # sine from the vertical, below which z gives no level direction
CHORD_MM = 0.05  # what the facets of a curved wall may take from it (print meshes: 0.05)
BATCH = 512  # candidates looked at together; most pieces need one batch
THINNEST_KEPT = 4096  # of a wholly thin piece, this many samples stand for all


@dataclass(frozen=True, slots=True, kw_only=True)
class Thickness:
    """The thinnest wall found.

    Parameters
    ----------
    smallest_mm : float
        Its thickness; inf when no two faces stand opposite [mm].
    place_mm : tuple of 3 float
        Middle of the wall there [mm].
    thin_share : float
        Share of the surface that belongs to walls below the limit [-].
    samples : int
        Places measured.
    """

    smallest_mm: float
    place_mm: tuple[float, float, float]
    thin_share: float
    samples: int


@dataclass(frozen=True, slots=True, kw_only=True)
class _Walls:
    """Samples with a face opposite: `start (n, 3)`, inward `along (n, 3)`, and the rest `(n,)`."""

    start: NDArray[np.float64]
    along: NDArray[np.float64]
    thickness: NDArray[np.float64]
    normal: NDArray[np.float64]
    facing: NDArray[np.float64]
    weight: NDArray[np.float64]

    def pick(self, which: NDArray[np.int64]) -> _Walls:
        """Keep some of the samples, in the order given."""
        return _Walls(
            start=self.start[which],
            along=self.along[which],
            thickness=self.thickness[which],
            normal=self.normal[which],
            facing=self.facing[which],
            weight=self.weight[which],
        )


def measure_thickness(surface: Surface, smallest_wall_mm: float) -> Thickness:
    """Find the thinnest wall of a closed surface.

    Parameters
    ----------
    surface : Surface
        One closed body.
    smallest_wall_mm : float
        The limit; it also sets how big a thin place must be to count [mm].

    Returns
    -------
    Thickness
        The smallest of all samples that are walls. A sampled measure: the true least may be a
        little less, never more.
    """
    caster = RayCaster(surface)
    walls, samples = _opposed(surface, caster)
    order = np.argsort(walls.thickness, kind="stable")
    bound = smallest_wall_mm - CHORD_MM
    thin_count = int(np.searchsorted(walls.thickness[order], bound))
    step = max(1, -(-thin_count // THINNEST_KEPT))
    thin = walls.pick(order[:thin_count:step])
    is_real = _are_walls(caster, thin, smallest_wall_mm)
    thin_area = float(thin.weight[is_real].sum()) * step
    found = thin.pick(np.flatnonzero(is_real)[:1])
    rest = order[thin_count:]
    while len(found.thickness) == 0 and len(rest) > 0:
        batch, rest = walls.pick(rest[:BATCH]), rest[BATCH:]
        found = batch.pick(np.flatnonzero(_are_walls(caster, batch, smallest_wall_mm))[:1])
    if len(found.thickness) == 0:
        return Thickness(
            smallest_mm=float("inf"), place_mm=(0.0, 0.0, 0.0), thin_share=0.0, samples=samples
        )
    x, y, z = (found.start + found.along * found.thickness[:, None] / 2)[0].tolist()
    return Thickness(
        smallest_mm=float(found.thickness[0]),
        place_mm=(x, y, z),
        thin_share=min(1.0, thin_area / float(surface.areas.sum())),
        samples=samples,
    )


def spread_samples(surface: Surface) -> tuple[NDArray[np.float64], NDArray[np.int64]]:
    """Spread places over the surface, the same ones each time.

    Returns
    -------
    (n, 3) float
        Places [mm].
    (n,) int
        Triangle of each.

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
    return places, triangle


def _opposed(surface: Surface, caster: RayCaster) -> tuple[_Walls, int]:
    """Shoot inward from all samples; keep those that leave through a face opposite."""
    places, triangle = spread_samples(surface)
    along = -surface.normals[triangle]
    exits = caster.leave(places + NUDGE_MM * along, along)
    kept = np.flatnonzero(np.isfinite(exits.distance) & (exits.facing > cos(GRAZING)))
    per_triangle = np.bincount(triangle, minlength=len(surface.areas))
    return (
        _Walls(
            start=places[kept],
            along=along[kept],
            thickness=exits.distance[kept] + NUDGE_MM,
            normal=exits.normal[kept],
            facing=np.minimum(exits.facing[kept], 1.0),
            weight=surface.areas[triangle[kept]] / per_triangle[triangle[kept]],
        ),
        len(places),
    )


def _are_walls(caster: RayCaster, walls: _Walls, reach_mm: float) -> NDArray[np.bool_]:
    """Tell walls from sharp edges and small marks, `(n,) bool`."""
    if len(walls.thickness) == 0:
        return np.zeros(0, dtype=np.bool_)
    middle = walls.start + walls.along * (walls.thickness / 2)[:, None]
    lean = np.arccos(walls.facing)
    # The wall gets thinner the way the exit's normal leans: there the two faces meet.
    sideways = walls.normal - walls.facing[:, None] * walls.along
    level = np.cross(walls.along, [0.0, 0.0, 1.0])
    is_upright = np.abs(level).max(axis=1) < UPRIGHT
    level[is_upright] = (1.0, 0.0, 0.0)
    level -= np.einsum("ij,ij->i", level, walls.along)[:, None] * walls.along
    one = np.where((lean > PARALLEL)[:, None], sideways, level)
    one /= np.linalg.norm(one, axis=1)[:, None]
    two = np.cross(walls.along, one)

    to_meeting = walls.thickness / np.maximum(np.tan(lean), tan(PARALLEL))
    ahead = caster.leave(middle, one).distance
    is_keen = lean <= EDGE_ANGLE
    ends = np.where(is_keen, reach_mm, np.maximum(1.1 * to_meeting, reach_mm))
    is_edge = (lean > PARALLEL) & (ahead <= ends)

    goes_on = [
        _goes_on(caster, middle, direction, walls, reach_mm) for direction in (one, -one, two, -two)
    ]
    is_big = (goes_on[0] | goes_on[1]) & (goes_on[2] | goes_on[3])
    result: NDArray[np.bool_] = ~is_edge & is_big
    return result


def _goes_on(
    caster: RayCaster,
    middle: NDArray[np.float64],
    direction: NDArray[np.float64],
    walls: _Walls,
    reach_mm: float,
) -> NDArray[np.bool_]:
    """Tell whether a thin place is still thin, and still there, a reach away, `(n,) bool`."""
    aside = middle + reach_mm * direction
    is_inside = caster.leave(middle, direction).distance > reach_mm
    through = caster.leave(aside, walls.along).distance + caster.leave(aside, -walls.along).distance
    still: NDArray[np.bool_] = is_inside & (through < 2 * np.maximum(walls.thickness, reach_mm))
    return still


def thickness_findings(
    thickness: Thickness, piece: str, limits: PrintLimits
) -> tuple[Finding, ...]:
    """Hold the thinnest wall against the limit."""
    if thickness.thin_share <= 0:
        return ()
    x, y, z = thickness.place_mm
    return (
        Finding(
            code="thin-wall",
            severity=Severity.STOP,
            part=piece,
            what=f"a wall is {thickness.smallest_mm:.2f} mm thick, the least that prints sound is "
            f"{limits.smallest_wall_mm:.2f} mm; {thickness.thin_share:.2%} of the surface is "
            "below it",
            measured=thickness.smallest_mm,
            limit=limits.smallest_wall_mm,
            unit="mm",
            where=f"({x:.1f}, {y:.1f}, {z:.1f}) mm in print pose",
            fix="make the wall there thicker, or move what is cut into it",
        ),
    )

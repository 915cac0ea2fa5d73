"""Cups that hold resin: hollows with no way down, as the piece is printed and hanging from the bed.

Resin runs down and sideways. A place stays wet when every way out of it leads up over a sill, and
it is wet up to the lowest sill. The piece is cut into upright columns; the air in a column is a
stack of intervals, and neighbouring intervals that overlap are joined at a sill as high as the
higher of their floors. The lowest sill on the way out of an interval is the highest one on its way
through the minimum spanning tree, so that also a bent pipe drains as it does in life.

What stands on the bed is taken as open downwards: the bed closes a bore only until the piece is
taken off.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.checks.lows import lows_of
from gyrecut.checks.rays import NUDGE_MM
from gyrecut.findings import Finding, Severity

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.checks.rays import RayCaster
    from gyrecut.checks.surface import Surface

COLUMNS = 112  # across the longer side of the piece
FINEST_MM = 0.5  # half the thinnest resin wall: finer columns tell nothing more
OFF_CENTRE = (0.137, 0.219)  # of a column, so that rays miss edges drawn in round numbers
WET_MM = 0.01  # less is rounding of 32 bits
FAR_MM = 1e4  # above and below any printer
LEAST_CUP_MM3 = 1000.0  # a millilitre; less drips off with the rest: common practice, no source
LEAST_DEPTH_MM = 5.0  # a shallower one, such as a groove for a cord, drains by a tilt: same
DRAIN_MM = 3.0  # hole to let it out: common practice, no source


@dataclass(frozen=True, slots=True, kw_only=True)
class Cup:
    """A hollow that holds resin.

    Parameters
    ----------
    volume_mm3 : float
        What it holds [mm3].
    depth_mm : float
        From its lowest place to its sill [mm].
    drain_mm : tuple of 3 float
        Its lowest place, where a drain would go; the highest as the piece is printed when it only
        holds upside down [mm].
    is_upside_down : bool
        It holds as the piece hangs from the bed, not as it is drawn.
    """

    volume_mm3: float
    depth_mm: float
    drain_mm: tuple[float, float, float]
    is_upside_down: bool


@dataclass(frozen=True, slots=True, kw_only=True)
class _Columns:
    """Air in columns: `low`, `high (ranks, nx, ny)`, NaN for none; `xy (nx, ny, 2)`."""

    low: NDArray[np.float64]
    high: NDArray[np.float64]
    xy: NDArray[np.float64]
    pitch_mm: float


def measure_cups(surface: Surface, caster: RayCaster) -> tuple[Cup, ...]:
    """Find all cups, the largest first.

    Parameters
    ----------
    surface : Surface
        One closed body in print pose.
    caster : RayCaster
        Its rays run in the material.

    Notes
    -----
    A wall thinner than a column is wide may leak in this picture; it is thin anyway, and said to
    be so by another check. Volumes are sums of columns: right to their width along the rim.
    """
    directions = [down for down in (False, True) if len(lows_of(surface, upside_down=down).floors)]
    if not directions:
        return ()
    columns = _columns(surface, caster)
    cups = [cup for upside_down in directions for cup in _cups(columns, upside_down=upside_down)]
    return tuple(sorted(cups, key=lambda cup: -cup.volume_mm3))


def _columns(surface: Surface, caster: RayCaster) -> _Columns:
    """Shoot up through the piece from below, and note where each ray is in air."""
    low, high = surface.vertices.min(axis=0), surface.vertices.max(axis=0)
    pitch = max(float((high - low)[:2].max()) / COLUMNS, FINEST_MM)
    begin = low[:2] - pitch * (1 + np.array(OFF_CENTRE))
    counts = np.ceil((high[:2] - begin) / pitch).astype(int) + 2
    x, y = (begin[axis] + pitch * np.arange(counts[axis]) for axis in range(2))
    xy = np.stack(np.meshgrid(x, y, indexing="ij"), axis=2)
    start = np.concatenate([xy.reshape(-1, 2), np.full((xy[..., 0].size, 1), -1.0)], axis=1)
    up = np.array([0.0, 0.0, 1.0])
    floors: list[NDArray[np.float64]] = []
    roofs: list[NDArray[np.float64]] = []
    floor = np.full(len(start), -FAR_MM)
    live = np.arange(len(start))
    air = caster.in_the_air()
    while len(live) > 0:
        at = start[live]
        entry = at[:, 2] + air.leave(at, np.broadcast_to(up, at.shape)).distance
        roof = np.full(len(start), np.nan)
        roof[live] = np.where(np.isfinite(entry), entry, FAR_MM)
        floors.append(floor)
        roofs.append(roof)
        live, entry = live[np.isfinite(entry)], entry[np.isfinite(entry)]
        at = np.column_stack([start[live, :2], entry + NUDGE_MM])
        leave = at[:, 2] + caster.leave(at, np.broadcast_to(up, at.shape)).distance
        is_out = np.isfinite(leave)  # one that ran along a wall is solid from there on
        live, leave = live[is_out], leave[is_out]
        floor = np.full(len(start), np.nan)
        floor[live] = leave
        start[live, 2] = leave + NUDGE_MM
    shape = (len(floors), *xy.shape[:2])
    return _Columns(
        low=np.reshape(floors, shape), high=np.reshape(roofs, shape), xy=xy, pitch_mm=pitch
    )


def _cups(columns: _Columns, *, upside_down: bool) -> list[Cup]:
    """Fill the columns up to their sills."""
    from scipy.sparse import coo_array  # noqa: PLC0415 - only where there is something to fill
    from scipy.sparse.csgraph import connected_components  # noqa: PLC0415

    low, high = columns.low, columns.high
    if upside_down:
        low, high = -columns.high, -columns.low
    one, two, sill = _sills(low, high)
    floor, roof = low.ravel(), high.ravel()
    level = np.maximum(floor, _water_levels(one, two, sill, floor.size))
    held = np.minimum(level, roof) - floor
    is_wet = held > WET_MM  # false for NaN, where there is no air
    joined = is_wet[one] & is_wet[two]
    graph = coo_array(
        (np.ones(int(joined.sum()), dtype=np.bool_), (one[joined], two[joined])),
        shape=(floor.size, floor.size),
    )
    _, labels = connected_components(graph.tocsr(), directed=False)
    wet = np.flatnonzero(is_wet)
    _, index = np.unique(labels[wet], return_inverse=True)
    volumes = np.bincount(index, weights=held[wet]) * columns.pitch_mm**2
    cups = []
    for number in np.flatnonzero(volumes >= LEAST_CUP_MM3):
        members = wet[index == number]
        lowest = members[floor[members].argmin()]
        depth = float(level[lowest] - floor[lowest])
        if depth < LEAST_DEPTH_MM:
            continue
        x, y = columns.xy.reshape(-1, 2)[lowest % (low[0].size)].tolist()
        z = float(-floor[lowest] if upside_down else floor[lowest])
        cups.append(
            Cup(
                volume_mm3=float(volumes[number]),
                depth_mm=depth,
                drain_mm=(x, y, z),
                is_upside_down=upside_down,
            )
        )
    return cups


def _sills(
    low: NDArray[np.float64], high: NDArray[np.float64]
) -> tuple[NDArray[np.int64], NDArray[np.int64], NDArray[np.float64]]:
    """Join the intervals of neighbouring columns that overlap, `(e,)` each: one, two, sill."""
    numbers = np.arange(low.size).reshape(low.shape)
    ones, twos, sills = [], [], []
    for near, far in (
        ((slice(None, -1), slice(None)), (slice(1, None), slice(None))),
        ((slice(None), slice(None, -1)), (slice(None), slice(1, None))),
    ):
        for rank in range(len(low)):
            for other in range(len(low)):
                sill = np.maximum(low[rank][near], low[other][far])
                is_joined = sill < np.minimum(high[rank][near], high[other][far])
                ones.append(numbers[rank][near][is_joined])
                twos.append(numbers[other][far][is_joined])
                sills.append(sill[is_joined])
    return np.concatenate(ones), np.concatenate(twos), np.concatenate(sills)


def _water_levels(
    one: NDArray[np.int64], two: NDArray[np.int64], sill: NDArray[np.float64], count: int
) -> NDArray[np.float64]:
    """Give the highest sill on the lowest way out of each interval; -inf with no way at all."""
    from scipy.sparse import coo_array  # noqa: PLC0415 - see `_cups`
    from scipy.sparse.csgraph import breadth_first_order, minimum_spanning_tree  # noqa: PLC0415

    # A stored zero would be no edge, so heights are counted from further down than any.
    graph = coo_array((sill + 2 * FAR_MM, (one, two)), shape=(count, count)).tocsr()
    tree = minimum_spanning_tree(graph)
    _, parent = breadth_first_order(tree, 0, directed=False)  # the first column is outside
    is_reached = parent >= 0
    parent = np.where(is_reached, parent, np.arange(count))
    edges = tree.tocoo()
    weight = np.full(count, -np.inf)
    is_child = parent[edges.row] == edges.col
    child = np.where(is_child, edges.row, edges.col)
    weight[child] = edges.data - 2 * FAR_MM
    weight[~is_reached] = -np.inf
    # Each step doubles how far the way is known, until all of it is.
    while True:
        further = np.maximum(weight, weight[parent])
        parent = parent[parent]
        if np.array_equal(further, weight) and np.array_equal(parent, parent[parent]):
            return weight
        weight = further


def cup_findings(cups: tuple[Cup, ...], piece: str) -> tuple[Finding, ...]:
    """Say which cups hold resin: the largest of each way up, and how many there are."""
    findings = []
    for upside_down, way in ((False, "the way it is drawn"), (True, "as it hangs from the bed")):
        some = [cup for cup in cups if cup.is_upside_down is upside_down]
        if not some:
            continue
        total = sum(cup.volume_mm3 for cup in some)
        x, y, z = some[0].drain_mm
        findings.append(
            Finding(
                code="resin-cup",
                severity=Severity.WARN,
                part=piece,
                what=f"{len(some)} hollows hold {total / 1000:.1f} ml of resin {way}, the largest "
                f"{some[0].volume_mm3 / 1000:.1f} ml, {some[0].depth_mm:.0f} mm deep",
                measured=total / 1000,
                limit=LEAST_CUP_MM3 / 1000,
                unit="ml",
                where=f"its deepest place at ({x:.1f}, {y:.1f}, {z:.1f}) mm in print pose",
                fix=f"drill a drain of {DRAIN_MM:.0f} mm there, or print it another way up",
            )
        )
    return tuple(findings)

"""Whether two pieces that sit side by side in the machine leave each other room.

Between two pieces it is the gap square to the way they are put together that has to be there: a
spigot slides in past the sides of its socket, and then sits on its floor. So gaps between faces
that run along that way are held against the clearance, and faces that look along it may touch.

All by samples and rays; the boxes of the two pieces come first, and only what lies within reach of
the other's box is looked at.
"""

from __future__ import annotations

from dataclasses import dataclass
from math import cos, inf, radians
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.checks.opposed import CHORD_MM, opposed
from gyrecut.checks.rays import RayCaster
from gyrecut.checks.sampling import spread_samples
from gyrecut.checks.surface import surface_of
from gyrecut.findings import Finding, Severity

if TYPE_CHECKING:
    import trimesh
    from numpy.typing import NDArray

    from gyrecut.checks.limits import PrintLimits
    from gyrecut.checks.sampling import Samples

REACH_MM = 2.0  # a gap wider than this belongs to no joint
TOUCH_MM = 2 * CHORD_MM  # two curved faces that fit may cross by the facets of both
SLIDING = radians(45.0)  # a face within this of the way of assembly slides past its neighbour
SIDE_BY_SIDE = radians(30.0)  # more than this from parallel, two faces only meet in a corner
ROUNDING_MM = 1e-3  # a gap that equals the clearance passes, whatever its last digit
DIRECTIONS = np.array([[x, y, z] for x in (-1, 1) for y in (-1, 1) for z in (-1, 1)]) / 3**0.5


@dataclass(frozen=True, slots=True, kw_only=True)
class Nearness:
    """What is between two pieces.

    Parameters
    ----------
    gap_mm : float
        Least gap found between faces that look at each other; inf when there is none within reach
        [mm].
    sliding_mm : float
        The same between faces that run along the way of assembly [mm].
    sliding_place_mm : tuple of 3 float
        Where that is [mm].
    depth_mm : float
        How deep one reaches into the other; 0 when it does not [mm].
    depth_place_mm : tuple of 3 float
        Where that is [mm].
    inside : int
        Sampled places of either that lie deeper in the other than facets account for.
    """

    gap_mm: float
    sliding_mm: float
    sliding_place_mm: tuple[float, float, float]
    depth_mm: float
    depth_place_mm: tuple[float, float, float]
    inside: int


@dataclass(frozen=True, slots=True, kw_only=True)
class _Side:
    """One piece: samples within reach of the other, `outward (n, 3)`, and its rays."""

    samples: Samples
    outward: NDArray[np.float64]
    corners: NDArray[np.float64]
    caster: RayCaster


def measure_nearness(
    one: trimesh.Trimesh,
    other: trimesh.Trimesh,
    *,
    assembly: tuple[float, float, float] = (0.0, 0.0, 1.0),
    reach_mm: float = REACH_MM,
) -> Nearness:
    """Measure the room between two pieces.

    Parameters
    ----------
    one, other : trimesh.Trimesh
        Closed bodies where they sit in the machine, equal vertices merged [mm].
    assembly : tuple of 3 float
        Unit direction along which the two are put together; the axis of the machine for rings [-].
    reach_mm : float
        Wider gaps are not looked for [mm].

    Returns
    -------
    Nearness
        Gaps are measured square to a face, so between two edges that pass each other in the air
        none is seen; that they do not cross is.
    """
    low = np.maximum(one.bounds[0], other.bounds[0]) - reach_mm
    high = np.minimum(one.bounds[1], other.bounds[1]) + reach_mm
    nothing = np.zeros(0)
    widths, slides, depths = [nothing], [nothing.astype(np.bool_)], [nothing]
    gap_places, deep_places = [np.zeros((0, 3))], [np.zeros((0, 3))]
    if bool((low <= high).all()):
        sides = _side(one, low, high), _side(other, low, high)
        for mine, theirs in (sides, sides[::-1]):
            width, way = _gaps(mine, theirs.caster)
            kept = np.flatnonzero(width <= reach_mm)
            widths.append(width[kept])
            slides.append(np.abs(mine.outward[kept] @ np.array(assembly)) < cos(SLIDING))
            gap_places.append(mine.samples.places[kept] + way[kept] / 2)
            depth, places = _depths(mine, theirs.caster)
            depths.append(depth)
            deep_places.append(places)
    width, slide = np.concatenate(widths), np.concatenate(slides)
    depth = np.concatenate(depths)
    sliding = np.where(slide, width, inf)
    sliding_mm, sliding_place = _extreme(-sliding, np.concatenate(gap_places))
    depth_mm, depth_place = _extreme(depth, np.concatenate(deep_places))
    return Nearness(
        gap_mm=float(width.min(initial=inf)),
        sliding_mm=-sliding_mm,
        sliding_place_mm=sliding_place,
        depth_mm=max(0.0, depth_mm),
        depth_place_mm=depth_place,
        inside=int(np.count_nonzero(depth > TOUCH_MM)),
    )


def _extreme(
    values: NDArray[np.float64], places: NDArray[np.float64]
) -> tuple[float, tuple[float, float, float]]:
    """Give the highest of some values and its place; -inf when there is none."""
    if len(values) == 0 or not np.isfinite(values).any():
        return -inf, (0.0, 0.0, 0.0)
    best = int(values.argmax())
    x, y, z = places[best].tolist()
    return float(values[best]), (x, y, z)


def _side(mesh: trimesh.Trimesh, low: NDArray[np.float64], high: NDArray[np.float64]) -> _Side:
    surface = surface_of(mesh)
    every = spread_samples(surface)
    kept = np.flatnonzero(((every.places >= low) & (every.places <= high)).all(axis=1))
    near = ((surface.vertices >= low) & (surface.vertices <= high)).all(axis=1)
    return _Side(
        samples=every.pick(kept),
        outward=surface.normals[every.triangle[kept]],
        corners=surface.vertices[near],
        caster=RayCaster(surface),
    )


def _gaps(mine: _Side, theirs: RayCaster) -> tuple[NDArray[np.float64], NDArray[np.float64]]:
    """Shoot out from one piece to the other: widths `(n,)`, ways across `(n, 3)` [mm].

    A ray begins a touch inside its own piece, so that faces that lie on each other have a gap of
    0 and none is missed.
    """
    back = TOUCH_MM
    start = mine.samples.places - back * mine.outward
    exits = theirs.in_the_air().leave(start, mine.outward)
    faces = exits.facing > cos(SIDE_BY_SIDE)
    width = np.where(faces, np.maximum(exits.distance - back, 0.0), inf)
    finite = np.where(np.isfinite(width), width, 0.0)
    return width, finite[:, None] * mine.outward


def _depths(mine: _Side, theirs: RayCaster) -> tuple[NDArray[np.float64], NDArray[np.float64]]:
    """Give how deep places of one piece lie in the other, those that do, and where they are.

    Asked of samples, of corners, and of the middles of walls: of two equal bodies in one place no
    surface is in the other.
    """
    walls = opposed(mine.samples, mine.caster, -mine.outward)
    places = np.concatenate([mine.samples.places, mine.corners, walls.middle])
    square = np.concatenate(
        [mine.outward, np.broadcast_to(DIRECTIONS[0], mine.corners.shape), walls.along]
    )
    depth = np.full(len(places), inf)
    for way in (*DIRECTIONS, 1.0, -1.0):
        # The last two run square to the surface, to and fro.
        ray = way * square if np.ndim(way) == 0 else np.broadcast_to(way, places.shape)
        exits = theirs.leave(places, ray)
        is_inside = np.isfinite(exits.distance)
        # To the plane of the facet it leaves through: never more than the way along the ray.
        depth = np.minimum(depth[is_inside], exits.distance[is_inside] * exits.facing[is_inside])
        places, square = places[is_inside], square[is_inside]
        if len(places) == 0:
            break
    return depth, places


def nearness_findings(
    nearness: Nearness,
    pair: str,
    limits: PrintLimits,
    *,
    is_joint: bool,
    chord_mm: float = CHORD_MM,
) -> tuple[Finding, ...]:
    """Say when two pieces share room, or when a joint between them is too tight.

    Parameters
    ----------
    nearness : Nearness
        Of the two.
    pair : str
        What a finding calls them.
    limits : PrintLimits
        With the clearance.
    is_joint : bool
        Whether one slides into the other. Pieces that are only screwed face to face may touch.
    chord_mm : float
        Chord error of both meshes. A joint is let pass when their facets could account for what
        lacks; for a clearance of 0.1 mm mesh them finer than for printing [mm].
    """
    if nearness.depth_mm > TOUCH_MM:
        x, y, z = nearness.depth_place_mm
        return (
            Finding(
                code="pieces-interfere",
                severity=Severity.STOP,
                part=pair,
                what=f"the two pieces share room: one reaches {nearness.depth_mm:.2f} mm into the "
                "other",
                measured=nearness.depth_mm,
                limit=0.0,
                unit="mm",
                where=f"({x:.1f}, {y:.1f}, {z:.1f}) mm in the machine",
                fix="make room on one of them",
            ),
        )
    tightest = limits.clearance_mm - 2 * chord_mm - ROUNDING_MM
    if is_joint and nearness.sliding_mm < tightest:
        x, y, z = nearness.sliding_place_mm
        return (
            Finding(
                code="joint-too-tight",
                severity=Severity.STOP,
                part=pair,
                what=f"the joint has {nearness.sliding_mm:.2f} mm of room to slide, the printer "
                f"needs {limits.clearance_mm:.2f} mm",
                measured=nearness.sliding_mm,
                limit=limits.clearance_mm,
                unit="mm",
                where=f"({x:.1f}, {y:.1f}, {z:.1f}) mm in the machine",
                fix="make the spigot smaller, or its socket wider",
            ),
        )
    return ()

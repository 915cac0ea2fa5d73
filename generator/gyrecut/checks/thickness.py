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

What is left must be thin by a second measure too, the ball inscribed at the place. The ball is
never wider than the ray is long, so the two can only disagree over a ball that is caught in an
edge. Such a place is not counted as thin; its area is given as disputed.

A groove or a drilled tip also closes two faces, but around material that goes on: it is found.
Not found here: a thin spot less than about one smallest wall across, such as two cones tip to tip;
and a pin, which is no wall: see `features`.
"""

from __future__ import annotations

from dataclasses import dataclass
from math import radians
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.checks.inscribed import inscribed_balls
from gyrecut.checks.opposed import CHORD_MM, look_round
from gyrecut.findings import Finding, Severity

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.checks.limits import PrintLimits
    from gyrecut.checks.opposed import Opposed
    from gyrecut.checks.rays import RayCaster

EDGE_ANGLE = radians(25.0)
BATCH = 512  # candidates looked at together; most pieces need one batch
THINNEST_KEPT = 4096  # of a wholly thin piece, this many samples stand for all


@dataclass(frozen=True, slots=True, kw_only=True)
class Thickness:
    """The thinnest wall found.

    Parameters
    ----------
    smallest_mm : float
        Its thickness along a ray; inf when no two faces stand opposite [mm].
    inscribed_mm : float
        Diameter of the ball inscribed at the same place; inf likewise [mm].
    place_mm : tuple of 3 float
        Middle of the wall there [mm].
    thin_share : float
        Share of the surface that belongs to walls below the limit, by both measures [-].
    disputed_share : float
        Share of the surface that is such a wall by the ray alone [-].
    samples : int
        Places with a face opposite.
    """

    smallest_mm: float
    inscribed_mm: float
    place_mm: tuple[float, float, float]
    thin_share: float
    disputed_share: float
    samples: int


@dataclass(frozen=True, slots=True, kw_only=True)
class _Verdict:
    """What the two measures say of some places, `(n,)` each."""

    by_ray: NDArray[np.bool_]
    by_ball: NDArray[np.bool_]
    diameter_mm: NDArray[np.float64]

    @property
    def is_wall(self) -> NDArray[np.bool_]:
        return self.by_ray & self.by_ball


def measure_thickness(
    caster: RayCaster, walls: Opposed, smallest_wall_mm: float, area_mm2: float
) -> Thickness:
    """Find the thinnest wall of a closed surface.

    Parameters
    ----------
    caster : RayCaster
        Of the surface; its rays run in the material.
    walls : Opposed
        Samples with material between them and a face opposite.
    smallest_wall_mm : float
        The limit; it also sets how big a thin place must be to count [mm].
    area_mm2 : float
        Of the whole surface [mm2].

    Returns
    -------
    Thickness
        The smallest of all samples that are walls. A sampled measure: the true least may be a
        little less, never more.
    """
    order = np.argsort(walls.distance, kind="stable")
    thin_count = int(np.searchsorted(walls.distance[order], smallest_wall_mm - CHORD_MM))
    step = max(1, -(-thin_count // THINNEST_KEPT))
    thin = walls.pick(order[:thin_count:step])
    verdict = _judge(caster, thin, smallest_wall_mm)
    thin_area = float(thin.weight[verdict.is_wall].sum()) * step
    disputed_area = float(thin.weight[verdict.by_ray & ~verdict.by_ball].sum()) * step
    rest = order[thin_count:]
    batch = thin
    while not verdict.is_wall.any() and len(rest) > 0:
        batch, rest = walls.pick(rest[:BATCH]), rest[BATCH:]
        verdict = _judge(caster, batch, smallest_wall_mm)
    found = np.flatnonzero(verdict.is_wall)[:1]
    if len(found) == 0:
        smallest, diameter, place = np.inf, np.inf, (0.0, 0.0, 0.0)
    else:
        smallest, diameter = float(batch.distance[found[0]]), float(verdict.diameter_mm[found[0]])
        x, y, z = batch.middle[found[0]].tolist()
        place = (x, y, z)
    return Thickness(
        smallest_mm=smallest,
        inscribed_mm=diameter,
        place_mm=place,
        thin_share=min(1.0, thin_area / area_mm2),
        disputed_share=min(1.0, disputed_area / area_mm2),
        samples=len(walls.distance),
    )


def _judge(caster: RayCaster, walls: Opposed, reach_mm: float) -> _Verdict:
    """Ask both measures whether places are walls; the ball is only asked where the ray says so."""
    outlook = look_round(caster, walls, reach_mm, edge_angle=EDGE_ANGLE)
    by_ray = ~outlook.is_edge & outlook.is_wide
    asked = np.flatnonzero(by_ray)
    balls = inscribed_balls(caster, walls.place[asked], walls.along[asked])
    by_ball = np.zeros(len(by_ray), dtype=np.bool_)
    by_ball[asked] = ~balls.is_caught
    diameter = np.full(len(by_ray), np.inf)
    diameter[asked] = balls.diameter_mm
    return _Verdict(by_ray=by_ray, by_ball=by_ball, diameter_mm=diameter)


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

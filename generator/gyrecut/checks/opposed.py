"""Where two faces stand opposite: a wall when material is between them, a gap when air is.

The distance is that of a ray from one face, square to it, to where it leaves through another face.
Where the far face leans more than `GRAZING` from square to the ray it only grazes it, and that is
no wall and no gap.
"""

from __future__ import annotations

from dataclasses import dataclass
from math import cos, radians, tan
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.checks.rays import NUDGE_MM, frame_of

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.checks.rays import RayCaster
    from gyrecut.checks.sampling import Samples

GRAZING = radians(65.0)
PARALLEL = radians(2.0)  # faces within this have no meeting line worth looking for
CHORD_MM = 0.05  # what the facets of a curved wall may take from it (print meshes: 0.05)
LINES = 4  # looked along from the middle of a wall, in its own plane
ASKEW = radians(35.0)  # between the 22.5 degrees that a line may be off and a square corner's 45
ALL_BUT_SQUARE = 1.2  # a line 22.5 degrees askew through a hole or pin is 1.08 times its width


@dataclass(frozen=True, slots=True, kw_only=True)
class Opposed:
    """Places with a face opposite.

    Parameters
    ----------
    place : (n, 3) float
        On the near face [mm].
    along : (n, 3) float
        Unit direction of the ray [-].
    distance : (n,) float
        From face to face [mm].
    normal : (n, 3) float
        Unit normal of the far face, the way the ray leaves [-].
    facing : (n,) float
        Cosine between ray and that normal [-].
    weight : (n,) float
        Area that each place stands for [mm2].
    triangle : (n,) int
        Triangle of each place.
    """

    place: NDArray[np.float64]
    along: NDArray[np.float64]
    distance: NDArray[np.float64]
    normal: NDArray[np.float64]
    facing: NDArray[np.float64]
    weight: NDArray[np.float64]
    triangle: NDArray[np.int64]

    def pick(self, which: NDArray[np.int64]) -> Opposed:
        """Keep some of the places, in the order given."""
        return Opposed(
            place=self.place[which],
            along=self.along[which],
            distance=self.distance[which],
            normal=self.normal[which],
            facing=self.facing[which],
            weight=self.weight[which],
            triangle=self.triangle[which],
        )

    @property
    def middle(self) -> NDArray[np.float64]:
        """Half way to the far face, `(n, 3) float` [mm]."""
        return self.place + self.along * (self.distance / 2)[:, None]


def opposed(samples: Samples, caster: RayCaster, along: NDArray[np.float64]) -> Opposed:
    """Shoot from all samples; keep those whose ray leaves through a face opposite.

    Parameters
    ----------
    samples : Samples
        Places on the surface.
    caster : RayCaster
        Its rays run in the material, or in the air.
    along : (n, 3) float
        Unit normal of the surface at each sample, into what the rays run in [-].
    """
    exits = caster.leave(samples.places + NUDGE_MM * along, along)
    kept = np.flatnonzero(np.isfinite(exits.distance) & (exits.facing > cos(GRAZING)))
    return Opposed(
        place=samples.places[kept],
        along=along[kept],
        distance=exits.distance[kept] + NUDGE_MM,
        normal=exits.normal[kept],
        facing=np.minimum(exits.facing[kept], 1.0),
        weight=samples.weight[kept],
        triangle=samples.triangle[kept],
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class Outlook:
    """What lies round the middle of each place.

    Parameters
    ----------
    is_edge : (n,) bool
        The two faces meet close by, so this is an edge or a corner.
    is_wide : (n,) bool
        It goes on, no thicker, along both of two directions square to one another.
    """

    is_edge: NDArray[np.bool_]
    is_wide: NDArray[np.bool_]


def look_round(
    caster: RayCaster, walls: Opposed, reach_mm: float, *, edge_angle: float = 0.0
) -> Outlook:
    """Tell walls from edges and small marks.

    Parameters
    ----------
    caster : RayCaster
        The one that found them.
    walls : Opposed
        Places in question.
    reach_mm : float
        How far a thing must go on to count as wide [mm].
    edge_angle : float
        Faces that close at less than this make no edge, but something that runs out thin; only its
        last `reach_mm` is an edge then [rad].
    """
    if len(walls.distance) == 0:
        nothing = np.zeros(0, dtype=np.bool_)
        return Outlook(is_edge=nothing, is_wide=nothing)
    middle = walls.middle
    lean = np.arccos(walls.facing)
    # The two faces meet the way the normal of the far one leans.
    sideways = walls.normal - walls.facing[:, None] * walls.along
    level, _ = frame_of(walls.along)
    one = np.where((lean > PARALLEL)[:, None], sideways, level)
    one /= np.linalg.norm(one, axis=1)[:, None]
    two = np.cross(walls.along, one)

    to_meeting = walls.distance / np.maximum(np.tan(lean), tan(PARALLEL))
    ahead = caster.leave(middle, one).distance
    ends = np.where(lean <= edge_angle, reach_mm, np.maximum(1.1 * to_meeting, reach_mm))
    goes_on = [
        _goes_on(caster, walls, middle, direction, reach_mm) for direction in (one, -one, two, -two)
    ]
    return Outlook(
        is_edge=(lean > PARALLEL) & (ahead <= ends),
        is_wide=(goes_on[0] | goes_on[1]) & (goes_on[2] | goes_on[3]),
    )


def is_narrow_both_ways(
    caster: RayCaster, walls: Opposed, width_mm: float, reach_mm: float
) -> NDArray[np.bool_]:
    """Tell pins and holes from walls and gaps: narrow along two directions, and on along a third.

    Parameters
    ----------
    caster : RayCaster
        The one that found them.
    walls : Opposed
        Places in question, narrow along their rays.
    width_mm : float
        What counts as narrow across [mm].
    reach_mm : float
        How far it must go on the third way [mm].
    """
    count = len(walls.distance)
    level, upward = frame_of(walls.along)
    turns = np.arange(LINES) * np.pi / LINES
    lines = np.cos(turns)[:, None, None] * level + np.sin(turns)[:, None, None] * upward
    starts = np.broadcast_to(walls.middle, lines.shape).reshape(-1, 3)
    flat = lines.reshape(-1, 3)
    one, two = caster.leave(starts, flat), caster.leave(starts, -flat)
    # Across the corner of a slot a line is short too, but leaves it askew.
    is_across = np.minimum(one.facing, two.facing) > cos(ASKEW)
    chords = np.where(is_across, one.distance + two.distance, np.inf).reshape(LINES, count)
    best = chords.argmin(axis=0)
    rows = np.arange(count)
    axis = np.cross(walls.along, lines[best, rows])
    goes_on = _goes_on(caster, walls, walls.middle, axis, reach_mm)
    goes_on |= _goes_on(caster, walls, walls.middle, -axis, reach_mm)
    result: NDArray[np.bool_] = goes_on & (chords[best, rows] < ALL_BUT_SQUARE * width_mm)
    return result


def _goes_on(
    caster: RayCaster,
    walls: Opposed,
    middle: NDArray[np.float64],
    direction: NDArray[np.float64],
    reach_mm: float,
) -> NDArray[np.bool_]:
    """Tell whether a thin place is still thin, and still there, a reach away, `(n,) bool`."""
    aside = middle + reach_mm * direction
    is_inside = caster.leave(middle, direction).distance > reach_mm
    through = caster.leave(aside, walls.along).distance + caster.leave(aside, -walls.along).distance
    still: NDArray[np.bool_] = is_inside & (through < 2 * np.maximum(walls.distance, reach_mm))
    return still

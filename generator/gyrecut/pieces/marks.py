"""What is engraved on the pieces: names, an arrow up, and how a mark finds its place.

Marks lie where nothing seals and nothing flows. Each has a list of places, the best first; the
first that lies whole on one face is taken. A piece on which none is free goes without its name,
and says so (`Piece.mark`).
"""

from __future__ import annotations

from dataclasses import dataclass
from math import asin, cos, pi, tan
from typing import TYPE_CHECKING

from gyrecut.pieces.engraving import Mark, engraved
from gyrecut.pieces.glyphs import figures
from gyrecut.pieces.places import Round
from gyrecut.proportions.printing import NAME_MARGIN_MM, smallest_wall_mm, stroke_mm

if TYPE_CHECKING:
    from collections.abc import Iterable, Sequence

    from cadquery.func import Solid

    from gyrecut.pieces.glyphs import Figure
    from gyrecut.pieces.places import Spot, Triple
    from gyrecut.profile.models import Printer

DEEPEST_MM = 0.48  # its ceiling on an upright wall is a ledge that prints, see `checks.overhang`
SHALLOWEST_MM = 0.2  # less is not seen
WALL_SHARE = 1 / 3  # of a wall that a mark may take
LEFT_OF_STROKE = 0.25  # of its width is left of a stroke's floor where its ceiling is laid back
LEVEL = 1e-3  # rad


@dataclass(frozen=True, slots=True, kw_only=True)
class MarkStyle:
    """How marks are cut.

    Parameters
    ----------
    stroke_mm : float
        Width of a stroke, and least gap between two [mm].
    least_wall_mm : float
        What is left under a mark [mm].
    """

    stroke_mm: float
    least_wall_mm: float

    def depth_in(self, wall_mm: float) -> float:
        """Depth of a mark in a wall, 0 where it is too thin for one [mm]."""
        depth = min(DEEPEST_MM, WALL_SHARE * wall_mm, wall_mm - self.least_wall_mm)
        return depth if depth >= SHALLOWEST_MM else 0.0


def mark_style(printer: Printer) -> MarkStyle:
    """Give the marks that a printer makes."""
    return MarkStyle(
        stroke_mm=stroke_mm(printer),
        least_wall_mm=smallest_wall_mm(printer),
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class Pose:
    """How a piece prints: the way up, as a unit vector, and the steepest lean [rad]."""

    up: Triple
    slope: float

    @classmethod
    def upright(cls, slope: float) -> Pose:
        """Give the pose of a piece that prints as it stands in the machine."""
        return cls(up=(0.0, 0.0, 1.0), slope=slope)


def placed(
    spot: Spot, shapes: tuple[Figure, ...], depth_mm: float, pose: Pose, style: MarkStyle
) -> Mark | None:
    """Give a mark whose ceilings lean no further than the printer makes them.

    Parameters
    ----------
    spot : Flat or Round
        Where it lies.
    shapes : tuple of Figure
        What is sunk.
    depth_mm : float
        How deep at most [mm].
    pose : Pose
        Of the piece as it prints.
    style : MarkStyle

    Returns
    -------
    Mark or None
        None where no ceiling that prints leaves a mark deep enough to be seen.
    """
    rise, lean = _facing(spot, pose.up)
    if rise == (0, 0):
        deep, drop = depth_mm, 0.0
    else:
        # how far a ceiling of one millimetre of depth has to be laid back along the face
        if isinstance(spot, Round):
            per_depth = 1 / (tan(pose.slope) - tan(lean)) / cos(lean)
        else:
            per_depth = 1 / tan(pose.slope - lean)
        if lean >= pose.slope:
            return None
        deep = min(depth_mm, (1 - LEFT_OF_STROKE) * style.stroke_mm / per_depth)
        drop = deep * per_depth
    if deep < SHALLOWEST_MM:
        return None
    return Mark(
        spot=spot,
        figures=shapes,
        depth_mm=deep,
        margin_mm=NAME_MARGIN_MM,
        rise=rise,
        drop_mm=drop,
    )


def _facing(spot: Spot, up: Triple) -> tuple[tuple[int, int], float]:
    """Which way of the writing is up in print, and how far the face leans out over the bed."""
    if isinstance(spot, Round):
        way = 1 if up[2] > 0 else -1
        return (0, way), way * spot.lean
    lean = -asin(max(-1.0, min(1.0, _dot(spot.outward, up))))
    if abs(lean) > pi / 2 - LEVEL:
        return (0, 0), lean
    across, along = _dot(spot.right, up), _dot(spot.up, up)
    if abs(across) > abs(along):
        return (1 if across > 0 else -1, 0), lean
    return (0, 1 if along > 0 else -1), lean


def _dot(one: Triple, other: Triple) -> float:
    return sum(a * b for a, b in zip(one, other, strict=True))


def marked(
    solid: Solid,
    texts: Iterable[str],
    spots: Sequence[Spot],
    *,
    style: MarkStyle,
    pose: Pose,
    wall_mm: float,
    others: Sequence[Mark] = (),
) -> tuple[Solid, str]:
    """Engrave a piece with its name, and with marks that have their place already.

    Parameters
    ----------
    solid : Solid
        The piece in machine coordinates [mm].
    texts : iterable of str
        Its name, and what may stand for it where that is too long.
    spots : sequence of Flat or Round
        Where the name may stand, the best first.
    style : MarkStyle
        How it is cut.
    pose : Pose
        Of the piece as it prints.
    wall_mm : float
        Thickness under the name [mm].
    others : sequence of Mark
        Cut as well; the name keeps clear of them.

    Returns
    -------
    tuple of (Solid, str)
        The marked piece, and its name as it stands on it, "" where there was no place.

    Raises
    ------
    BuildError
        Where the marks do not come out as they were asked for.
    """
    depth = style.depth_in(wall_mm)
    for text in dict.fromkeys(texts):
        shapes = figures(text.upper(), style.stroke_mm)
        for spot in spots:
            mark = placed(spot, shapes, depth, pose, style)
            if mark is None or not all(_apart(mark, other) for other in others):
                continue
            if mark.ground_in(solid) is not None:
                return engraved(solid, (*others, mark), text), text
    return engraved(solid, others, "a piece without a name"), ""


def _apart(one: Mark, other: Mark) -> bool:
    """Say whether two marks on a turned wall keep clear of each other, their margins counted."""
    a, b = one.spot, other.spot
    if not isinstance(a, Round) or not isinstance(b, Round):
        return True
    (width, height), (other_width, other_height) = one.room_mm, other.room_mm
    turn = abs((a.angle - b.angle + pi) % (2 * pi) - pi)
    beside = turn > width / 2 / a.radius_mm + other_width / 2 / b.radius_mm
    return beside or abs(a.z_mm - b.z_mm) > (height + other_height) / 2

"""Lines across the joints of body and lid, so that the pieces go together in one position.

Across a ring joint: one line on the collar of the lower ring and one on the wall above it. Across
a seam: a short line on either side, at another height for each seam, so that sectors that only look
alike do not change places.
"""

from __future__ import annotations

from math import pi
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.pieces.glyphs import bar
from gyrecut.pieces.mark_places import (
    free_heights,
    lid_band,
    on_collar,
    on_top,
    on_wall,
    seam_angle,
)
from gyrecut.pieces.marks import Pose, placed
from gyrecut.proportions.division import slot_arc
from gyrecut.proportions.printing import NAME_MARGIN_MM

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator, Sequence

    from cadquery.func import Solid

    from gyrecut.pieces.engraving import Mark
    from gyrecut.pieces.glyphs import Figure
    from gyrecut.pieces.marks import MarkStyle
    from gyrecut.pieces.places import Spot
    from gyrecut.proportions.dimensions import Dimensions, Ring


LINE_MM = 8.0
SHORT_LINE_MM = 5.0
OFF_EDGE_MM = 0.8  # from a joint, beyond the margin
STEPS = 72  # angles tried for a line across a ring joint
ASIDE_MM = (0.0, 7.0)  # farther off where the kernel's own seam runs through the first place
SEAM_STEP = 3.0  # strokes between the heights of two seams' lines


def ring_lines(
    cut: Sequence[Sequence[Solid]], bin_ring: Solid, d: Dimensions, style: MarkStyle
) -> tuple[list[list[list[Mark]]], list[Mark]]:
    """Place the lines on the body's pieces and on the bin ring.

    Parameters
    ----------
    cut : sequence of sequence of Solid
        The rings from the top down, each in its sectors.
    bin_ring : Solid
        It takes the last of them.
    d : Dimensions
    style : MarkStyle

    Returns
    -------
    tuple of (list of list of list of Mark, list of Mark)
        For each sector of each ring, and for the bin ring. A line without a free place on both
        sides of its joint is left out on both.
    """
    marks: list[list[list[Mark]]] = [[[] for _ in sectors] for sectors in cut]
    on_bin_ring: list[Mark] = []
    division = d.division
    for index, ring in enumerate(division.rings):
        last = index == len(division.rings) - 1
        below = [bin_ring] if last else cut[index + 1]
        below_marks = [on_bin_ring] if last else marks[index + 1]
        lower = None if last else division.rings[index + 1]
        for upper_mark, lower_mark in _across(d, ring, lower, style):
            above = _holder(cut[index], upper_mark)
            under = _holder(below, lower_mark)
            if above is not None and under is not None:
                marks[index][above].append(upper_mark)
                below_marks[under].append(lower_mark)
                break
    for index, ring in enumerate(division.rings):
        if ring.sectors > 1:
            _add_seams(marks[index], cut[index], _ring_seams(d, ring, style))
    return marks, on_bin_ring


def lid_lines(sectors: Sequence[Solid], d: Dimensions, style: MarkStyle) -> list[list[Mark]]:
    """Place the lines across the lid's seams, for each sector."""
    marks: list[list[Mark]] = [[] for _ in sectors]
    if len(sectors) > 1:
        _add_seams(marks, sectors, _lid_seams(d, style))
    return marks


def _across(
    d: Dimensions, upper: Ring, lower: Ring | None, style: MarkStyle
) -> Iterator[tuple[Mark, Mark]]:
    """Lines across the joint under a ring, the best angle first."""
    seat, joint = upper.bottom_mm, d.joint
    depth = style.depth_in(min(d.body.wall_mm, joint.collar_mm))
    in_collar = joint.lap_mm - 2 * (OFF_EDGE_MM + NAME_MARGIN_MM)
    if not depth or in_collar < style.stroke_mm:
        return
    start = seat + joint.lap_mm + OFF_EDGE_MM + NAME_MARGIN_MM
    for angle in _angles(d, upper, lower):
        for length in (LINE_MM, SHORT_LINE_MM):
            wall = on_wall(d.body, start + length / 2, angle)
            collar = on_collar(d, seat, angle)
            yield from _pair(
                (wall, bar(style.stroke_mm, length)),
                (collar, bar(style.stroke_mm, in_collar)),
                depth,
                Pose.upright(d.slope),
                style,
            )


def _angles(d: Dimensions, upper: Ring, lower: Ring | None) -> list[float]:
    """Angles for a line, the one farthest from seams, slot and the kernel's own seam first."""
    tried = np.linspace(-pi, pi, STEPS, endpoint=False)
    low, high = slot_arc(d.body, d.portal)
    kept_off = [0.0, *np.linspace(low, high, 7).tolist()]
    for ring in (upper, lower):
        if ring is not None and ring.sectors > 1:
            kept_off += [seam_angle(d, ring, seam) for seam in range(ring.sectors)]
    away = np.abs((tried[:, None] - np.array(kept_off) + pi) % (2 * pi) - pi).min(axis=1)
    return [float(angle) for angle in tried[np.argsort(-away, kind="stable")][: STEPS // 3]]


def _holder(pieces: Sequence[Solid], mark: Mark) -> int | None:
    return next((k for k, piece in enumerate(pieces) if mark.ground_in(piece) is not None), None)


def _add_seams(
    marks: list[list[Mark]], sectors: Sequence[Solid], seams: Iterable[list[tuple[Mark, Mark]]]
) -> None:
    """Give each seam the first pair of lines that has a place on both sides."""
    for seam, pairs in enumerate(seams):
        first, second = (seam - 1) % len(sectors), seam
        for before, after in pairs:
            if before.ground_in(sectors[first]) and after.ground_in(sectors[second]):
                marks[first].append(before)
                marks[second].append(after)
                break


def _ring_seams(d: Dimensions, ring: Ring, style: MarkStyle) -> Iterator[list[tuple[Mark, Mark]]]:
    low, high = free_heights(d, ring)
    # a sector ends in a tongue of half the wall
    depth = style.depth_in((d.body.wall_mm - d.joint.clearance_mm) / 2)
    off = OFF_EDGE_MM + NAME_MARGIN_MM + d.joint.clearance_mm + SHORT_LINE_MM / 2
    short = bar(SHORT_LINE_MM, style.stroke_mm)
    for seam in range(ring.sectors):
        step = (seam - (ring.sectors - 1) / 2) * SEAM_STEP * style.stroke_mm
        z, angle = (low + high) / 2 + step, seam_angle(d, ring, seam)
        radius = d.body.outside_radius_at(z)
        yield [
            pair
            for aside in ASIDE_MM
            for pair in _pair(
                (on_wall(d.body, z, angle - (off + aside) / radius), short),
                (on_wall(d.body, z, angle + (off + aside) / radius), short),
                depth,
                Pose.upright(d.slope),
                style,
            )
        ]


def _lid_seams(d: Dimensions, style: MarkStyle) -> Iterator[list[tuple[Mark, Mark]]]:
    low, high = lid_band(d)
    count = d.division.lid_sectors
    depth = style.depth_in(d.lid.thickness_mm)
    off = OFF_EDGE_MM + NAME_MARGIN_MM + d.joint.clearance_mm / 2 + SHORT_LINE_MM / 2
    short = bar(SHORT_LINE_MM, style.stroke_mm)
    for seam in range(count):
        angle = d.division.lid_first_cut + seam * 2 * pi / count
        radius = (low + high) / 2 + (seam - (count - 1) / 2) * SEAM_STEP * style.stroke_mm
        before, after = (
            on_top(radius, angle, d.lid.thickness_mm, aside_mm=aside) for aside in (-off, off)
        )
        yield list(_pair((before, short), (after, short), depth, Pose.upright(d.slope), style))


def _pair(
    one: tuple[Spot, Figure],
    other: tuple[Spot, Figure],
    depth_mm: float,
    pose: Pose,
    style: MarkStyle,
) -> Iterator[tuple[Mark, Mark]]:
    """Give both marks of a pair, or neither."""
    first = placed(one[0], (one[1],), depth_mm, pose, style)
    second = placed(other[0], (other[1],), depth_mm, pose, style)
    if first is not None and second is not None:
        yield first, second

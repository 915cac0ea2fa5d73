"""The coupons as printed pieces: marked, and laid on the bed."""

from __future__ import annotations

from dataclasses import replace
from math import atan, pi
from typing import TYPE_CHECKING

from gyrecut.pieces.engraving import engraved
from gyrecut.pieces.glyphs import bar, figures
from gyrecut.pieces.marks import Pose, placed
from gyrecut.pieces.piece import AS_IT_STANDS, Piece, laid_down
from gyrecut.pieces.places import Flat, Round
from gyrecut.proportions.printing import NAME_MARGIN_MM
from gyrecut.solids.coupons import (
    cuff_gauge,
    gauge_radius,
    insert_coupon,
    insert_places,
    joint_body,
    lands,
    socket_coupon,
    spigot_coupon,
)

if TYPE_CHECKING:
    from collections.abc import Iterator

    from cadquery.func import Solid

    from gyrecut.pieces.engraving import Mark
    from gyrecut.pieces.marks import MarkStyle
    from gyrecut.proportions.dimensions import Cuff, Joint, Screws
    from gyrecut.proportions.printing import Bed

FRONT = -pi / 2
GAUGE_WALL = 1.25  # of the thinnest wall: stiff enough to push a hose on
JOINT_WALL = 2.0  # likewise; a thicker one would only take longer
LINE_PITCH = 2.0  # strokes from one line to the next
SPARE_MM = 0.1
SIGNS = ("-", "0", "+")


def gauge_piece(
    name: str,
    title: str,
    cuff: Cuff,
    mating_mm: float,
    *,
    land_mm: float,
    slope: float,
    bed: Bed,
    style: MarkStyle,
) -> Piece:
    """Make the gauge for one hose; its steps are marked with one to five lines from the foot up.

    Parameters
    ----------
    name, title : str
        As in `Piece`.
    cuff : Cuff
        The hose's cuff.
    mating_mm : float
        Diameter that it is made for [mm].
    land_mm : float
        Height of one step [mm].
    slope : float
        Steepest lean [rad].
    bed : Bed
        What the printer leaves.
    style : MarkStyle
        How lines are cut.
    """
    wall = GAUGE_WALL * style.least_wall_mm
    solid = cuff_gauge(cuff, mating_mm, land_mm=land_mm, wall_mm=wall)
    lean = atan((cuff.tip_diameter_mm - cuff.root_diameter_mm) / 2 / cuff.length_mm)
    plain = gauge_radius(cuff, mating_mm, land_mm, wall)
    pitch, height = LINE_PITCH * style.stroke_mm, land_mm - 2 * NAME_MARGIN_MM - SPARE_MM
    marks = []
    for count, land in enumerate(lands(cuff, mating_mm, land_mm), start=1):
        spot = Round(radius_mm=plain, z_mm=land.z_mm, angle=FRONT)
        if cuff.fit == "over":
            spot = Round(radius_mm=land.diameter_mm / 2, z_mm=land.z_mm, angle=FRONT, lean=lean)
        lines = tuple(
            bar(style.stroke_mm, height, (index - (count - 1) / 2) * pitch)
            for index in range(count)
        )
        marks.append(placed(spot, lines, style.depth_in(wall), Pose.upright(slope), style))
    return _laid(engraved(solid, _there(marks), name), bed, name, title)


def joint_pieces(
    joint: Joint, body_wall_mm: float, *, slope: float, bed: Bed, style: MarkStyle
) -> Iterator[Piece]:
    """Make a socket and the spigot that goes into it, with the machine's lap and gap."""
    wall = min(body_wall_mm, JOINT_WALL * style.least_wall_mm)
    thin = replace(joint, collar_mm=min(joint.collar_mm, wall))
    small = joint_body(wall)
    socket = socket_coupon(small, thin, slope)
    yield _laid(socket, bed, "coupon-socket", "socket of a ring joint")
    yield _laid(spigot_coupon(small, thin), bed, "coupon-spigot", "spigot of a ring joint")


def insert_piece(screws: Screws, *, slope: float, bed: Bed, style: MarkStyle) -> Piece:
    """Make the bar of insert holes, each marked with how far it is from the profile's hole."""
    solid, half = insert_coupon(screws), screws.boss_mm / 2
    marks = [
        placed(
            Flat(
                middle=(x, -half, screws.insert_depth_mm / 2),
                right=(1.0, 0.0, 0.0),
                up=(0.0, 0.0, 1.0),
            ),
            figures(SIGNS[index], style.stroke_mm),
            style.depth_in((screws.boss_mm - screws.insert_hole_mm) / 2),
            Pose.upright(slope),
            style,
        )
        for index, (x, _) in enumerate(insert_places(screws))
    ]
    name = "coupon-inserts"
    return _laid(engraved(solid, _there(marks), name), bed, name, "bar of insert holes")


def _there(marks: list[Mark | None]) -> list[Mark]:
    return [mark for mark in marks if mark is not None]


def _laid(solid: Solid, bed: Bed, name: str, title: str) -> Piece:
    return laid_down(solid, AS_IT_STANDS, bed, name=name, title=title, copies=1)

"""The two ends of the body: rim, lid, finder and outlet above, bin ring below."""

from __future__ import annotations

from itertools import pairwise
from math import atan2, cos, dist, pi, radians, sin, tan
from typing import TYPE_CHECKING

from gyrecut.airflow.entries import entry_loss_bell_mouth
from gyrecut.errors import UnbuildableError
from gyrecut.proportions.dimensions import (
    BellMouth,
    BinRing,
    Finder,
    Lid,
    OutletCuff,
    Rim,
)
from gyrecut.proportions.fasteners import PITCH_SPARE_MM, screw_line, screws, spread

if TYPE_CHECKING:
    from collections.abc import Iterable

    from gyrecut.proportions.dimensions import Body, Cuff, Groove, Joint, Point, Portal

RIM_FLOOR_MM = 2.0  # plastic left under an insert hole
RIM_LEAST_MM = 4.0
CONTRACTION_HALF_ANGLE = radians(15.0)  # lowest loss at 15 to 40 degrees included, SMACNA table
DIFFUSER_HALF_ANGLE = radians(7.5)
BELL_ROUNDING = 0.2  # rounding over throat: entry loss 0.03, Idelchik diagram 3-4
BELL_ROUNDING_LEAST = 0.05
REDUCER_LEAST_MM = 2.0
COLLAR_MM = 8.0  # how far the finder's collar lies on the lid, for glue
SPIGOT_REACH = 0.4  # blower spigot length over throat: common practice, no source


def rim_radius(body: Body, fastener: str, line_mm: float) -> float:
    """Outside radius of the lid's flange [mm]: half a boss beyond the screws."""
    return body.radius_mm + line_mm + screws(fastener, ()).boss_mm / 2


def rim(
    *,
    body: Body,
    portal: Portal,
    fastener: str,
    slope: float,
    line_mm: float,
    seams: tuple[float, ...],
    lap_mm: float,
) -> Rim:
    """Proportion the lid's flange and place its screws round barrel and slot.

    Parameters
    ----------
    body, portal : Body, Portal
        What the flange stands on.
    fastener : str
        Catalogue name of the screws.
    slope : float
        Lean of the gusset under the flange, from the vertical [rad].
    line_mm : float
        From the air's edge to the screws [mm].
    seams : tuple of float
        Angles of sector cuts that a screw has to keep clear of [rad].
    lap_mm : float
        How far the sectors lap over each other there [mm].

    Returns
    -------
    Rim
        Its thickness is the least at which every insert hole ends inside flange and gusset.
    """
    row = screws(fastener, ())
    boss, hole = row.boss_mm, row.insert_hole_mm
    gusset_at_hole = (boss / 2 - hole / 2) / tan(slope)
    circle = body.radius_mm + line_mm
    lintel_x = portal.face_x_mm + portal.depth_mm / 2
    outer_y = body.radius_mm + line_mm
    inner_y = body.radius_mm - portal.mouth_width_mm - line_mm
    # clockwise from the slot's tangent point, the long way round to the lintel's inner end
    last = atan2(inner_y, lintel_x) % (2 * pi) - 2 * pi
    arc = _clear_of_seams(
        last, pi / 2, seams, pitch=PITCH_SPARE_MM / circle, clear=(boss + lap_mm) / 2 / circle
    )
    beside: list[Point] = [(x, outer_y) for x in spread(0.0, lintel_x, PITCH_SPARE_MM)[1:]]
    beside.append((lintel_x, inner_y))
    round_barrel = [(circle * cos(angle), circle * sin(angle)) for angle in arc]
    return Rim(
        outer_radius_mm=rim_radius(body, fastener, line_mm),
        thickness_mm=max(RIM_LEAST_MM, row.insert_depth_mm + RIM_FLOOR_MM - gusset_at_hole),
        screws=screws(fastener, (*_apart(round_barrel, beside, boss), *beside)),
    )


def _apart(places: Iterable[Point], fixed: Iterable[Point], least: float) -> list[Point]:
    """Leave out the places nearer than `least` to a fixed one, or to one already kept."""
    kept: list[Point] = []
    for place in places:
        if all(dist(place, other) >= least for other in (*kept, *fixed)):
            kept.append(place)
    return kept


def _clear_of_seams(
    start: float, end: float, seams: tuple[float, ...], *, pitch: float, clear: float
) -> list[float]:
    """Spread angles over an arc, the ones next to a seam `clear` away from it [rad]."""
    inside = sorted(start + (seam - start) % (2 * pi) for seam in seams)
    edges = [start, *(seam for seam in inside if seam < end), end]
    angles: list[float] = []
    for low, high in pairwise(edges):
        first = low if low == start else low + clear
        last = high if high == end else high - clear
        if last > first:
            angles += spread(first, last, pitch)
        elif last > first - clear:
            angles.append((first + last) / 2)
    return angles


def finder(
    *, body: Body, bore_mm: float, length_mm: float, stub_mm: float, edge_mm: float
) -> Finder:
    """Proportion the vortex finder and the collar it hangs by, whose edge takes its name."""
    outer = bore_mm / 2 + body.wall_mm
    return Finder(
        bore_mm=bore_mm,
        length_mm=length_mm,
        wall_mm=body.wall_mm,
        collar_radius_mm=outer + COLLAR_MM,
        collar_thickness_mm=max(RIM_LEAST_MM, 1.5 * body.wall_mm, edge_mm),
        stub_mm=stub_mm,
    )


def lid(*, thickness_mm: float, finder: Finder, joint: Joint) -> Lid:
    """Proportion the lid: flat, with the hole the finder hangs in."""
    return Lid(
        thickness_mm=thickness_mm,
        finder_hole_mm=2 * (finder.outer_radius_mm + joint.clearance_mm),
    )


def outlet_cuff(*, finder: Finder, cuff: Cuff, joint: Joint, slope: float) -> OutletCuff:
    """Proportion the outlet: a socket over the finder's stub, a reducer, a hose cuff."""
    step = (finder.bore_mm - cuff.bore_mm) / 2
    half_angle = CONTRACTION_HALF_ANGLE if step > 0 else DIFFUSER_HALF_ANGLE
    socket = finder.outer_radius_mm + joint.clearance_mm + joint.collar_mm
    outside = abs(socket - cuff.widest_radius_mm)
    return OutletCuff(
        socket_mm=finder.stub_mm,
        socket_radius_mm=socket,
        reducer_length_mm=max(abs(step) / tan(half_angle), outside / tan(slope), REDUCER_LEAST_MM),
        cuff=cuff,
    )


def bell_mouth(*, finder: Finder, throat_mm: float, joint: Joint, edge_mm: float) -> BellMouth:
    """Proportion the rounded intake of a blower that stands on the finder.

    Parameters
    ----------
    finder : Finder
        The tube the bell-mouth plugs into.
    throat_mm : float
        The blower's intake [mm].
    joint : Joint
        Gap of the plug.
    edge_mm : float
        Least thickness of the stop, whose edge takes the piece's name [mm].

    Returns
    -------
    BellMouth
        Rounded with 0.2 of the throat where the finder leaves room, with less where it does not.

    Raises
    ------
    UnbuildableError
        Where the finder is too narrow for a rounded edge at all.
    """
    plug = finder.bore_mm / 2 - joint.clearance_mm
    lip = 0.5 * finder.wall_mm
    room = plug - lip - throat_mm / 2
    rounding = min(BELL_ROUNDING * throat_mm, room)
    if rounding < BELL_ROUNDING_LEAST * throat_mm:
        largest = (plug - lip) / (0.5 + BELL_ROUNDING_LEAST)
        raise UnbuildableError(
            key=("outlet", "intake_diameter"),
            what="is too wide for the vortex finder it sits in",
            given=f"{throat_mm:.1f} mm, with a finder of {finder.bore_mm:.1f} mm",
            allowed=f"at most {largest:.1f} mm, so that its edge can be rounded",
            fix="choose a smaller blower intake, or a larger body",
        )
    return BellMouth(
        throat_mm=throat_mm,
        rounding_mm=rounding,
        entry_loss=float(entry_loss_bell_mouth(rounding / throat_mm, end_wall=True)),
        plug_radius_mm=plug,
        plug_length_mm=finder.stub_mm,
        stop_radius_mm=finder.outer_radius_mm,
        stop_thickness_mm=max(RIM_LEAST_MM, finder.wall_mm, edge_mm),
        spigot_length_mm=max(12.0, SPIGOT_REACH * throat_mm),
        wall_mm=finder.wall_mm,
    )


def bin_ring(
    *, body: Body, joint: Joint, fastener: str, lid_thickness_mm: float, groove: Groove | None
) -> BinRing:
    """Proportion the ring on the bin's lid, screws outside its socket."""
    row = screws(fastener, ())
    socket = body.outside_radius_at(-body.total_height_mm + joint.lap_mm) + (
        joint.clearance_mm + joint.collar_mm
    ) / cos(body.half_angle)
    bore = body.dust_outlet_diameter_mm / 2
    line = screw_line(row, wall_mm=body.wall_mm, grooves=(groove,))
    circle = max(socket + row.boss_mm / 2, bore + line)
    count = max(4, len(spread(0.0, 2 * pi * circle, PITCH_SPARE_MM)) - 1)
    places = tuple(
        (
            circle * cos(2 * pi * k / count + pi / count),
            circle * sin(2 * pi * k / count + pi / count),
        )
        for k in range(count)
    )
    return BinRing(
        bore_mm=body.dust_outlet_diameter_mm,
        outer_radius_mm=circle + row.boss_mm / 2,
        thickness_mm=lid_thickness_mm,
        screws=screws(fastener, places),
    )

"""The inlet side: portal, transition and hose cuff."""

from __future__ import annotations

from math import atan, ceil, hypot, pi, radians, sqrt, tan
from typing import TYPE_CHECKING

from gyrecut.errors import UnbuildableError
from gyrecut.proportions.dimensions import Cuff, Portal, Transition
from gyrecut.proportions.fasteners import PITCH_SPARE_MM, screws, spread

if TYPE_CHECKING:
    from gyrecut.proportions.dimensions import Body, Groove, Point, Slot

TOOL_SPARE_MM = 1.0  # room round a screw head for the driver: common practice, no source
DIFFUSER_TARGET = radians(15.0)  # included angle above which the stream separates, ASHRAE practice
CUFF_TIP_UNDER_MM = 0.3  # entry of a hose cuff under nominal: common practice, no source
CUFF_ROOT_OVER_MM = 0.7  # root of a hose cuff over nominal: common practice, no source
CUFF_SHOULDER_MM = 1.5  # step the hose stops at
SOCKET_LEDGE_MM = 2.0  # step a hose end stops at inside the cuff
CUFF_SHORTEST_MM = 25.0
CUFF_REACH = 0.7  # engagement over diameter, 0.6 to 1.0: common practice, no source
LARGEST_AREA_RATIO = 6.0  # hose to slot, either way: beyond it the transition is no duct
LINTEL_LEAST_MM = 5.0


def hose_cuff(
    *, nominal_mm: float, measured_mm: float | None, fit: str, wall_mm: float, slope: float
) -> Cuff:
    """Proportion a tapered hose cuff.

    Parameters
    ----------
    nominal_mm : float
        The hose's name as a diameter [mm]: its bore for "over", its end's outside for "inside".
    measured_mm : float or None
        The same diameter measured on the real hose [mm], which wins.
    fit : str
        "over" (the hose goes over the cuff) or "inside" (it goes into the cuff).
    wall_mm : float
        Least wall of the cuff [mm].
    slope : float
        Lean of the shoulder's ramp from the vertical [rad].

    Returns
    -------
    Cuff
        Taper about 1:35 on the diameter over the engagement.
    """
    mating = measured_mm if measured_mm is not None else nominal_mm
    length = max(CUFF_SHORTEST_MM, CUFF_REACH * nominal_mm)
    if fit == "over":
        tip, root = mating - CUFF_TIP_UNDER_MM, mating + CUFF_ROOT_OVER_MM
        bore = tip - 2 * wall_mm
        shoulder = CUFF_SHOULDER_MM
        ramp = shoulder / tan(slope)
    else:
        tip, root = mating + CUFF_ROOT_OVER_MM, mating - CUFF_TIP_UNDER_MM
        bore = root - 2 * SOCKET_LEDGE_MM
        shoulder, ramp = 0.0, wall_mm
    if bore < mating / 2:
        raise UnbuildableError(
            key=("walls", "body"),
            what=f"leaves too little of a hose of {mating:g} mm",
            given=f"{wall_mm:g} mm, which leaves a bore of {bore:.1f} mm",
            allowed=f"a bore of at least {mating / 2:.1f} mm",
            fix="give a thinner wall, or a wider hose",
        )
    return Cuff(
        fit=fit,
        nominal_mm=nominal_mm,
        tip_diameter_mm=tip,
        root_diameter_mm=root,
        bore_mm=bore,
        length_mm=length,
        wall_mm=wall_mm,
        shoulder_mm=shoulder,
        ramp_mm=ramp,
    )


def portal(
    *,
    body: Body,
    slot: Slot,
    rim_radius_mm: float,
    cuff: Cuff,
    fastener: str,
    slope: float,
    bridge_limit_mm: float,
    edge_mm: float,
    line_mm: float,
    groove: Groove | None,
) -> Portal:
    """Proportion the framed mouth in front of the slot.

    The mouth's width follows from equal area: with lintel c, peak p and gable slope,
    b' (a - c) - (b' - p)^2 / (4 tan(slope)) = a b.

    Parameters
    ----------
    body, slot : Body, Slot
        What the portal stands on.
    rim_radius_mm : float
        Outside radius of the lid's flange [mm]; the portal's face stands clear of it.
    cuff : Cuff
        The hose cuff in front of it: the screws stand clear of it, so that a driver reaches them.
    fastener : str
        Catalogue name of the screws.
    slope : float
        Steepest lean from the vertical [rad].
    bridge_limit_mm : float
        Longest bridge the printer makes [mm]; the gable's flat peak uses most of it.
    edge_mm : float
        Thickness left where the slot's inner wall ends at the barrel's bore [mm].
    line_mm : float
        From the air's edge to the screws [mm].
    groove : Groove or None
        Round the mouth: the lintel is high enough for it.

    Returns
    -------
    Portal

    Raises
    ------
    UnbuildableError
        Where lintel and gable leave no mouth of the slot's area.
    """
    a, b, radius, wall = slot.height_mm, slot.width_mm, body.radius_mm, body.wall_mm
    row = screws(fastener, ())
    over_groove = 0.0 if groove is None else groove.clear_mm
    lintel = max(LINTEL_LEAST_MM, 2 * wall, over_groove)
    peak = min(0.8 * bridge_limit_mm, b / 2)
    width = _mouth_width(height=a - lintel, area=a * b, peak=peak, slope=slope)
    rise = (width - peak) / 2 / tan(slope)
    if not 0 < lintel + rise < 0.9 * a or width >= 2 * radius:
        raise UnbuildableError(
            key=("stages",),
            what="give a slot too small for a printed mouth of its area",
            given=f"a slot of {a:.1f} x {b:.1f} mm",
            allowed=f"room for a lintel of {lintel:.1f} mm and a gable at the printer's slope",
            fix="choose a larger body, a lower inlet_velocity, a family with a taller slot, or a "
            "thinner walls.body",
        )
    boss, head = row.boss_mm, row.head_diameter_mm
    beside = max(
        line_mm - wall,
        cuff.widest_radius_mm + head / 2 + TOOL_SPARE_MM - width / 2 - wall,
    )
    low_jamb, high_jamb = radius - width - wall - beside, radius + wall + beside
    sill = -a - line_mm
    highest = -(row.insert_depth_mm + boss / 2 + wall)
    if highest - sill < boss:
        raise UnbuildableError(
            key=("joints", "fastener"),
            what="is too large for the screws beside the slot",
            given=f"{row.thread}, and a slot {a:.1f} mm tall",
            allowed=f"two of them, one above the other, {boss:g} mm apart",
            fix="choose a thinner fastener, or a larger body",
        )
    jambs = spread(highest, sill, PITCH_SPARE_MM)
    between = spread(low_jamb, high_jamb, PITCH_SPARE_MM)[1:-1]
    places: tuple[Point, ...] = (
        *((low_jamb, z) for z in jambs),
        *((high_jamb, z) for z in jambs),
        *((y, sill) for y in between),
    )
    depth = row.insert_depth_mm + wall
    slot_edge = sqrt(radius**2 - max(radius - b, 0.0) ** 2)
    low = low_jamb - boss / 2
    rim_edge = sqrt(rim_radius_mm**2 - min(abs(low), rim_radius_mm) ** 2)
    if low < 0:
        rim_edge = rim_radius_mm
    return Portal(
        face_x_mm=-max(slot_edge + wall + depth, rim_edge + TOOL_SPARE_MM),
        depth_mm=depth,
        mouth_width_mm=width,
        mouth_top_mm=-lintel,
        peak_width_mm=min(peak, width),
        shoulder_mm=-lintel - max(rise, 0.0),
        floor_mm=-a,
        edge_mm=edge_mm,
        frame_low_y_mm=low,
        frame_high_y_mm=high_jamb + boss / 2,
        frame_bottom_z_mm=sill - boss / 2,
        screws=screws(fastener, places),
    )


def _mouth_width(*, height: float, area: float, peak: float, slope: float) -> float:
    """Smaller root of width * height - (width - peak)^2 / (4 tan slope) = area, or NaN."""
    k = 1 / (4 * tan(slope))
    linear = height + 2 * k * peak
    inner = linear**2 - 4 * k * (k * peak**2 + area)
    return (linear - sqrt(inner)) / (2 * k) if inner >= 0 else float("nan")


def mouth_centre(portal: Portal, body: Body) -> Point:
    """Centre (y, z) of the hose in front of the mouth."""
    return (
        body.radius_mm - portal.mouth_width_mm / 2,
        (portal.mouth_top_mm + portal.floor_mm) / 2,
    )


def longest_run(portal: Portal, body: Body, end_radius_mm: float) -> float:
    """Farthest the duct's wall moves sideways between the mouth and the circle [mm].

    Edges of the mouth run to the circle as plane triangles, corners as oblique cones: an edge
    moves by its distance from the centre less the radius, a corner likewise.
    """
    centre = mouth_centre(portal, body)
    outline = [(y - centre[0], z - centre[1]) for y, z in portal.mouth_outline(body.radius_mm)]
    runs = [hypot(y, z) - end_radius_mm for y, z in outline]
    for (y, z), (next_y, next_z) in zip(outline, (*outline[1:], outline[0]), strict=True):
        length = hypot(next_y - y, next_z - z)
        runs.append(end_radius_mm - (y * next_z - next_y * z) / length)
    return max(runs)


def transition(
    *,
    body: Body,
    slot: Slot,
    portal: Portal,
    cuff: Cuff,
    slope: float,
    tallest_mm: float,
) -> Transition:
    """Proportion the piece from the hose to the portal.

    It is as long as its widening asks for (15 degrees included), shortened where the printer is
    lower than that.

    Parameters
    ----------
    body, slot, portal, cuff : Body, Slot, Portal, Cuff
        Its two ends.
    slope : float
        Steepest lean from the vertical [rad], for a piece standing on its flange.
    tallest_mm : float
        Height the printer leaves [mm].

    Returns
    -------
    Transition

    Raises
    ------
    UnbuildableError
        Where hose and slot differ too much, or the printer is too low.
    """
    hose_area, slot_area = pi / 4 * cuff.bore_mm**2, slot.height_mm * slot.width_mm
    if not 1 / LARGEST_AREA_RATIO <= hose_area / slot_area <= LARGEST_AREA_RATIO:
        raise UnbuildableError(
            key=("air", "hose", "nominal"),
            what=f"is too {'wide' if hose_area > slot_area else 'narrow'} for the slot",
            given=f"{hose_area:.0f} mm2 in the cuff, {slot_area:.0f} mm2 in the slot",
            allowed=f"one at most {LARGEST_AREA_RATIO:g} times the other",
            fix="choose another hose, or another size of the stage",
        )
    radius = cuff.bore_mm / 2
    run = longest_run(portal, body, radius)
    sides = (
        (portal.mouth_top_mm - portal.floor_mm) / 2 - radius,
        portal.mouth_width_mm / 2 - radius,
    )
    widening = max(*sides, 0.0)
    flange = max(LINTEL_LEAST_MM, 2 * body.wall_mm)
    ideal = max(widening / tan(DIFFUSER_TARGET / 2), run / tan(slope), cuff.bore_mm / 2)
    room = tallest_mm - cuff.height_mm
    length = float(min(ceil(ideal), room))
    if room <= flange or length < run / tan(slope):
        raise UnbuildableError(
            key=("printer", "build_volume"),
            what="is too low for the transition from hose to slot",
            given=f"{tallest_mm:.0f} mm of height",
            allowed=f"at least {max(run / tan(slope), flange) + cuff.height_mm:.0f} mm",
            fix="choose a smaller hose or body, or a taller printer",
        )
    return Transition(
        flange_thickness_mm=flange,
        length_mm=length,
        wall_mm=body.wall_mm,
        included_angle=2 * atan(widening / length),
        cuff=cuff,
    )

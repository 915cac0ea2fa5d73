"""How the body and the lid divide for the printer: heights, sectors, angles. No CAD here."""

from __future__ import annotations

from dataclasses import dataclass
from itertools import pairwise
from math import asin, atan2, ceil, cos, degrees, hypot, inf, pi, sin, tan
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.errors import UnbuildableError
from gyrecut.proportions.dimensions import Division, Ring, keel_bottom

if TYPE_CHECKING:
    from collections.abc import Iterator

    from numpy.typing import NDArray

    from gyrecut.proportions.dimensions import Body, Joint, Portal
    from gyrecut.proportions.printing import Bed

MOST_SECTORS = 12
ARC_STEPS = 24
TURNS = np.deg2rad(np.arange(0.0, 180.0, 1.0))
SPARE_MM = 0.5
PLANNED_FILL = 0.996  # arcs are planned as chords, which fall a little short of them
KEEL_LAND_MM = 2.0  # width the cut keel stands on
MORE_RINGS = 6  # than the printer's height asks for, so that each stands steady
STEADY_FOOT = 0.12  # radius of a ring's foot over its height; common practice, no source
STEADY_LEAN = 0.93


def best_turn(outline_mm: NDArray[np.float64], bed: Bed) -> tuple[float, bool]:
    """Find the turn about the vertical at which an outline fits the bed best.

    Parameters
    ----------
    outline_mm : (n, 2) float
        Points whose convex hull is the piece seen from above [mm].
    bed : Bed
        What the printer leaves.

    Returns
    -------
    tuple of (float, bool)
        The turn [rad] that leaves most room, and whether it fits there.
    """
    turned_x = np.outer(np.cos(TURNS), outline_mm[:, 0]) - np.outer(np.sin(TURNS), outline_mm[:, 1])
    turned_y = np.outer(np.sin(TURNS), outline_mm[:, 0]) + np.outer(np.cos(TURNS), outline_mm[:, 1])
    fill = np.maximum(
        np.ptp(turned_x, axis=1) / bed.width_mm, np.ptp(turned_y, axis=1) / bed.depth_mm
    )
    best = int(np.argmin(fill))
    return float(TURNS[best]), bool(fill[best] <= PLANNED_FILL)


@dataclass(frozen=True, slots=True, kw_only=True)
class _Plan:
    """A ring or plate seen from above: its outer circle, and what stands out of it."""

    radius_mm: float
    corners_mm: tuple[tuple[float, float], ...]
    keep_whole: tuple[float, float] | None
    lap_mm: float


def _sectors(plan: _Plan, bed: Bed, stagger: float) -> tuple[int, float] | None:
    """Fewest equal sectors that fit, and the angle of the first cut; None where none do."""
    for count in range(1, MOST_SECTORS + 1):
        if count == 1:
            if best_turn(_outline(plan, 0.0, 2 * pi), bed)[1]:
                return 1, 0.0
            continue
        first = _first_cut(plan, count, stagger)
        if first is None:
            continue
        step = 2 * pi / count
        half_lap = plan.lap_mm / 2 / plan.radius_mm
        if all(
            best_turn(
                _outline(plan, first + k * step - half_lap, first + (k + 1) * step + half_lap), bed
            )[1]
            for k in range(count)
        ):
            return count, first
    return None


def _outline(plan: _Plan, start: float, end: float) -> NDArray[np.float64]:
    """Points round one sector: its arc, the inner ends, and the corners that lie in it."""
    angles = np.linspace(start, end, ARC_STEPS)
    arc = plan.radius_mm * np.column_stack((np.cos(angles), np.sin(angles)))
    corners = [
        corner
        for corner in plan.corners_mm
        if (atan2(corner[1], corner[0]) - start) % (2 * pi) <= end - start
    ]
    inner = 0.5 * arc[[0, -1]]
    return np.vstack((arc, inner, *(np.array([corner]) for corner in corners)))


def _first_cut(plan: _Plan, count: int, stagger: float) -> float | None:
    """Angle of the first cut: clear of the slot, the nearest on from `stagger`."""
    step = 2 * pi / count
    trials = stagger + np.linspace(0.0, step, 181)[:-1]
    cuts = trials[:, None] + step * np.arange(count)
    reach = (plan.lap_mm / 2 + SPARE_MM) / plan.radius_mm
    good = np.ones(trials.shape, dtype=bool)
    if plan.keep_whole is not None:
        low, high = plan.keep_whole
        inside = (cuts - (low - reach)) % (2 * pi) <= (high - low) + 2 * reach
        good &= ~inside.any(axis=1)
    chosen = np.flatnonzero(good)
    return float(trials[chosen[0]] % (2 * pi)) if chosen.size else None


def slot_arc(body: Body, portal: Portal) -> tuple[float, float]:
    """Angles [rad] between which slot, portal and keel stand out of the barrel."""
    low_y, spare = portal.frame_low_y_mm, portal.screws.boss_mm / 2 / body.radius_mm
    at_face = atan2(low_y, portal.face_x_mm) % (2 * pi)
    at_barrel = pi - asin(max(-1.0, min(1.0, low_y / body.outer_radius_mm)))
    return pi / 2 - spare, max(at_face, at_barrel) + body.wall_mm / body.radius_mm


def _top_plan(body: Body, portal: Portal, rim_radius_mm: float, joint: Joint) -> _Plan:
    x, low, high = portal.face_x_mm, portal.frame_low_y_mm, portal.frame_high_y_mm
    return _Plan(
        radius_mm=rim_radius_mm,
        corners_mm=((x, low), (x, high), (0.0, high)),
        keep_whole=slot_arc(body, portal),
        lap_mm=joint.lap_mm,
    )


def _ring_plan(body: Body, joint: Joint, top_mm: float) -> _Plan:
    reach = (joint.clearance_mm + joint.collar_mm) / cos(body.half_angle)
    return _Plan(
        radius_mm=body.outside_radius_at(top_mm + joint.lap_mm) + reach,
        corners_mm=(),
        keep_whole=None,
        lap_mm=joint.lap_mm,
    )


def divide(
    *, body: Body, portal: Portal, rim_radius_mm: float, joint: Joint, bed: Bed, slope: float
) -> Division:
    """Divide body and lid into pieces that fit the bed.

    The first ring holds slot and portal whole; the others share what is left in equal heights.

    Parameters
    ----------
    body, portal, joint : Body, Portal, Joint
        The separator.
    rim_radius_mm : float
        Outside radius of the lid's flange [mm].
    bed : Bed
        What the printer leaves for one piece.
    slope : float
        Lean of the keel from the vertical [rad].

    Returns
    -------
    Division

    Raises
    ------
    UnbuildableError
        Where a ring, a sector or the slot does not fit the printer.
    """
    top = _top_plan(body, portal, rim_radius_mm, joint)
    # a sector with the portal would tip over on its arc alone: let it stand on the keel
    on_keel = not best_turn(_outline(top, 0.0, 2 * pi), bed)[1]
    unsteady: tuple[Ring, ...] | None = None
    for heights in _cut_heights(
        body=body, portal=portal, joint=joint, bed=bed, slope=slope, on_keel=on_keel
    ):
        rings = _rings(heights, body=body, top=top, joint=joint, bed=bed)
        if all(_is_steady(ring, body) for ring in rings):
            break
        unsteady = unsteady or rings
    else:
        if unsteady is None:
            raise _no_way_to_cut(body, portal, joint, bed)
        rings = unsteady
    found = _sectors(top, bed, rings[0].first_cut + pi / max(rings[0].sectors, 2) / 2)
    if found is None:
        raise _too_wide("the lid", top, bed)
    return Division(rings=rings, lid_sectors=found[0], lid_first_cut=found[1])


def _rings(
    heights: tuple[float, ...], *, body: Body, top: _Plan, joint: Joint, bed: Bed
) -> tuple[Ring, ...]:
    """Give the rings between cut heights, each in as few sectors as fit."""
    rings = []
    stagger = 0.0
    edges = (0.0, *heights, -body.total_height_mm)
    for index, (high, low) in enumerate(pairwise(edges)):
        plan = _ring_plan(body, joint, high) if index else top
        found = _sectors(plan, bed, stagger)
        if found is None:
            raise _too_wide(f"ring {index + 1} of the body", plan, bed)
        count, first = found
        # half a sector on, so that no seam stands above the next
        stagger = first + pi / count
        rings.append(Ring(top_mm=high, bottom_mm=low, sectors=count, first_cut=first))
    return tuple(rings)


def _is_steady(ring: Ring, body: Body) -> bool:
    """Say whether a ring, or a sector of it, stands on its foot while it is printed."""
    foot, head = body.inside_radius_at(ring.bottom_mm), body.outside_radius_at(ring.top_mm)
    if ring.sectors == 1:
        return foot >= STEADY_FOOT * ring.height_mm
    # the middle of a leaning arc must not hang out beyond the arc it stands on
    half = pi / ring.sectors
    return sin(half) / half * (foot + head) / 2 <= STEADY_LEAN * foot


def _cut_heights(
    *, body: Body, portal: Portal, joint: Joint, bed: Bed, slope: float, on_keel: bool
) -> Iterator[tuple[float, ...]]:
    """Heights of the ring cuts from the top down, the fewest cuts that fit first."""
    total = body.total_height_mm
    if total <= bed.height_mm:
        yield ()
    least = _least_first_ring(portal, joint)
    if least > bed.height_mm:
        raise UnbuildableError(
            key=("printer", "build_volume"),
            what="is too low for the ring with slot and portal, which stays whole",
            given=f"{bed.height_mm:.0f} mm of height",
            allowed=f"at least {least:.0f} mm",
            fix="choose a smaller body, a family with a lower slot, or a taller printer",
        )
    usable = bed.height_mm - joint.lap_mm
    for rest in range(1, ceil(total / max(usable, 1.0)) + 1 + MORE_RINGS):
        even = (total + rest * joint.lap_mm) / (rest + 1)
        first = _clear_of_keel(
            min(max(even, least), bed.height_mm),
            least,
            body=body,
            portal=portal,
            joint=joint,
            bed=bed,
            slope=slope,
            on_keel=on_keel,
        )
        if first is None:
            continue
        height = (total - first) / rest
        if height <= usable and height > 2 * joint.lap_mm:
            yield tuple(-first - height * k for k in range(rest))


def _no_way_to_cut(body: Body, portal: Portal, joint: Joint, bed: Bed) -> UnbuildableError:
    return UnbuildableError(
        key=("printer", "build_volume"),
        what="leaves no way to cut the body into rings",
        given=f"{bed.height_mm:.0f} mm of height, and a body of {body.total_height_mm:.0f} mm",
        allowed=f"a first ring of at least {_least_first_ring(portal, joint):.0f} mm, clear of the "
        "keel under the slot",
        fix="choose another size of the stage, or a taller printer",
    )


def _least_first_ring(portal: Portal, joint: Joint) -> float:
    return -portal.frame_bottom_z_mm + joint.lap_mm + joint.clearance_mm + SPARE_MM


def _clear_of_keel(
    depth: float,
    least: float,
    *,
    body: Body,
    portal: Portal,
    joint: Joint,
    bed: Bed,
    slope: float,
    on_keel: bool,
) -> float | None:
    """Depth of the first cut nearest to `depth` at which keel and socket do not spoil each other.

    Either the keel ends above the socket's collar, or it is cut where it is wide enough to stand
    on the bed outside the collar's groove; between the two its tip would start in mid-air.
    """
    reach = portal.farthest_radius_mm - body.outer_radius_mm
    keel = -portal.frame_bottom_z_mm + reach / tan(slope)
    below_keel = -keel_bottom(body, portal, slope) + joint.lap_mm + joint.clearance_mm + SPARE_MM
    groove = joint.collar_mm + 2 * joint.clearance_mm + KEEL_LAND_MM
    through_keel = keel - groove / tan(slope)
    choices = []
    if through_keel >= least:
        choices.append(min(depth, through_keel))
    if below_keel <= bed.height_mm and not (on_keel and choices):
        choices.append(max(depth, below_keel))
    return min(choices, key=lambda choice: abs(choice - depth), default=None)


def _too_wide(what: str, plan: _Plan, bed: Bed) -> UnbuildableError:
    span = max((hypot(*corner) for corner in plan.corners_mm), default=-inf)
    whole = (
        f", {degrees(plan.keep_whole[1] - plan.keep_whole[0]):.0f} degrees of it (slot and portal) "
        "in one piece"
        if plan.keep_whole
        else ""
    )
    return UnbuildableError(
        key=("printer", "build_volume"),
        what=f"is too small for any sector of {what}",
        given=f"a bed that leaves {bed.width_mm:.0f} x {bed.depth_mm:.0f} mm",
        allowed=f"room for a piece that reaches {max(span, plan.radius_mm):.0f} mm from the "
        f"axis{whole}",
        fix="choose a smaller body, or a larger printer",
    )

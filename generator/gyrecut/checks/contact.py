"""Whether the piece stands on the bed by itself, and how well its foot holds it there."""

from __future__ import annotations

from dataclasses import dataclass
from math import atan2, cos, degrees, inf, pi, radians
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.checks.opposed import CHORD_MM
from gyrecut.checks.rays import NUDGE_MM
from gyrecut.findings import Finding, Severity

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.checks.limits import PrintLimits
    from gyrecut.checks.rays import RayCaster
    from gyrecut.checks.surface import Surface

LEAST_CONTACT_MM2 = 1.0  # about one bead by two: less does not hold the first layer; practice
STRAIGHT = 1e-9  # rad; a gap of half a turn to this much is a straight edge of the foot
LEAST_MARGIN = radians(5.0)  # a nozzle that catches tips less: common practice, no source
MOST_SLENDER = 10.0  # height by foot; from there on a brim is advised: common practice, no source
FACING = cos(radians(30.0))  # the two edges of a strip; more than this from parallel is a corner
PLACES = 1000  # looked at along the outline of the foot, on top of one on each edge of it
BEARINGS = 128  # looked along for the least width of a foot
ABOVE = np.array([0.0, 0.0, 0.02])  # mm; a chamfer of the foot is wider there by no more than that


@dataclass(frozen=True, slots=True, kw_only=True)
class Stance:
    """How the piece stands.

    Parameters
    ----------
    contact_mm2 : float
        Area that lies on the bed [mm2].
    footprint_share : float
        That area by the hull of the piece seen from above [-].
    strip_mm : float
        Narrowest strip of the foot; inf when it has no two edges that run side by side [mm].
    strip_place_mm : tuple of 3 float
        Where that is [mm].
    centre_mm : tuple of 3 float
        Centre of mass [mm].
    is_steady : bool
        Whether the centre of mass is above the hull of the contact.
    margin : float
        Lean at which it tips over the nearest edge of that hull; 0 when it does so by itself [rad].
    slenderness : float
        Height by the least width of that hull; inf without one [-].
    """

    contact_mm2: float
    footprint_share: float
    strip_mm: float
    strip_place_mm: tuple[float, float, float]
    centre_mm: tuple[float, float, float]
    is_steady: bool
    margin: float
    slenderness: float


def measure_stance(surface: Surface, caster: RayCaster) -> Stance:
    """Measure the foot, and where the centre of mass is over it.

    Notes
    -----
    A point is outside the hull of others exactly when they all lie within half a turn of it, so
    the widest gap between their bearings says it with no hull built.
    """
    flat = surface.is_on_bed
    centre = surface.centre_of_mass
    x, y, z = centre.tolist()
    contact = float(surface.areas[flat].sum())
    feet = surface.vertices[np.unique(surface.faces[flat])][:, :2] - centre[:2]
    is_steady = False
    if len(feet) > 0:
        bearings = np.sort(np.arctan2(feet[:, 1], feet[:, 0]))
        gaps = np.diff(bearings, append=bearings[0] + 2 * pi)
        is_steady = bool(gaps.max() < pi - STRAIGHT)
    strip, place = _narrowest_strip(surface, caster, flat)
    margin, slenderness = 0.0, inf
    footprint = _hull(surface.vertices[:, :2])
    if contact >= LEAST_CONTACT_MM2:
        hull = _hull(feet)
        slenderness = float(np.ptp(surface.vertices[:, 2])) / _least_width(hull)
        if is_steady:
            margin = atan2(_way_to_edge(hull), z)
    return Stance(
        contact_mm2=contact,
        footprint_share=contact / _area(footprint),
        strip_mm=strip,
        strip_place_mm=place,
        centre_mm=(x, y, z),
        is_steady=is_steady,
        margin=margin,
        slenderness=slenderness,
    )


def _hull(points: NDArray[np.float64]) -> NDArray[np.float64]:
    """Give the corners of the convex hull, counter-clockwise, `(n, 2) float` [mm]."""
    from scipy.spatial import ConvexHull  # noqa: PLC0415 - see `patches_of`

    corners: NDArray[np.float64] = points[ConvexHull(points).vertices]
    return corners


def _area(outline: NDArray[np.float64]) -> float:
    x, y = outline.T
    return float(x @ np.roll(y, -1) - y @ np.roll(x, -1)) / 2


def _sides(outline: NDArray[np.float64]) -> NDArray[np.float64]:
    """Give the outward unit normal of each side, `(n, 2) float`."""
    along = np.roll(outline, -1, axis=0) - outline
    along /= np.linalg.norm(along, axis=1)[:, None]
    return np.column_stack([along[:, 1], -along[:, 0]])


def _way_to_edge(outline: NDArray[np.float64]) -> float:
    """Give the way from the origin, inside, to the nearest side [mm]."""
    return float(np.einsum("ij,ij->i", _sides(outline), outline).min())


def _least_width(outline: NDArray[np.float64]) -> float:
    """Give the width between two parallel lines; the least has one of them along a side [mm]."""
    sides = _sides(outline)
    # Of the many sides of a round foot a few tell the same.
    ways = sides[:: max(1, len(sides) // BEARINGS)] @ outline.T
    return float((ways.max(axis=1) - ways.min(axis=1)).min())


def _narrowest_strip(
    surface: Surface, caster: RayCaster, is_foot: NDArray[np.bool_]
) -> tuple[float, tuple[float, float, float]]:
    """Shoot across the foot, just above the bed, from places along its outline.

    Notes
    -----
    Two edges make a strip where they run side by side and face away from one another; from the
    corners of a foot the ray leaves through another edge, and tells nothing.
    """
    triangles = np.flatnonzero(is_foot)
    row, side = np.nonzero(~is_foot[surface.neighbours[triangles]])
    if len(row) == 0:
        return inf, (0.0, 0.0, 0.0)
    faces, rows = surface.faces[triangles[row]], np.arange(len(row))
    start = surface.vertices[faces[rows, side]]
    edge = surface.vertices[faces[rows, (side + 1) % 3]] - start
    length = np.linalg.norm(edge[:, :2], axis=1)
    counts = np.ceil(length / (length.sum() / PLACES)).astype(np.int64)
    of = np.repeat(rows, counts)
    share = (np.arange(len(of)) - np.repeat(np.cumsum(counts) - counts, counts) + 0.5) / counts[of]
    # Seen from above a triangle of the foot runs clockwise: its inside is on the right.
    inward = np.column_stack([edge[:, 1], -edge[:, 0], np.zeros(len(edge))])[of]
    inward /= length[of, None]
    places = start[of] + share[:, None] * edge[of] + ABOVE
    exits = caster.leave(places + NUDGE_MM * inward, inward)
    is_across = exits.facing > FACING * np.linalg.norm(exits.normal[:, :2], axis=1)
    width = np.where(is_across, exits.distance + NUDGE_MM, inf)
    least = int(width.argmin())
    if not np.isfinite(width[least]):
        return inf, (0.0, 0.0, 0.0)
    x, y, _ = (places[least] + width[least] / 2 * inward[least]).tolist()
    return float(width[least]), (x, y, 0.0)


def stance_findings(stance: Stance, piece: str, limits: PrintLimits) -> tuple[Finding, ...]:
    """Say when a piece has no foot, falls over on the one it has, or may come off it."""
    x, y, z = stance.centre_mm
    if stance.contact_mm2 < LEAST_CONTACT_MM2:
        return (
            Finding(
                code="no-bed-contact",
                severity=Severity.STOP,
                part=piece,
                what="the piece does not lie on the bed",
                measured=stance.contact_mm2,
                limit=LEAST_CONTACT_MM2,
                unit="mm2",
                where="z = 0",
                fix="put the piece down on a flat face",
            ),
        )
    if not stance.is_steady:
        return (
            Finding(
                code="falls-over",
                severity=Severity.STOP,
                part=piece,
                what="the centre of mass is not above the foot",
                where=f"centre of mass at ({x:.1f}, {y:.1f}, {z:.1f}) mm",
                fix="choose another pose, or a wider foot",
            ),
        )
    return (*_strip_findings(stance, piece, limits), *_tipping_findings(stance, piece))


def _strip_findings(stance: Stance, piece: str, limits: PrintLimits) -> tuple[Finding, ...]:
    if stance.strip_mm >= limits.least_strip_mm - CHORD_MM:
        return ()
    x, y, _ = stance.strip_place_mm
    return (
        Finding(
            code="narrow-foot",
            severity=Severity.WARN,
            part=piece,
            what=f"a strip of the foot is {stance.strip_mm:.2f} mm wide; below "
            f"{limits.least_strip_mm:.2f} mm it may not hold on the bed",
            measured=stance.strip_mm,
            limit=limits.least_strip_mm,
            unit="mm",
            where=f"({x:.1f}, {y:.1f}, 0.0) mm in print pose",
            fix="print it with a brim, or make the chamfer of its foot less",
        ),
    )


def _tipping_findings(stance: Stance, piece: str) -> tuple[Finding, ...]:
    fix = "print it with a brim, or lay it down"
    if stance.margin < LEAST_MARGIN:
        x, y, z = stance.centre_mm
        return (
            Finding(
                code="tips-easily",
                severity=Severity.WARN,
                part=piece,
                what=f"the piece tips over when it leans by {degrees(stance.margin):.1f} degrees",
                measured=degrees(stance.margin),
                limit=degrees(LEAST_MARGIN),
                unit="deg",
                where=f"centre of mass at ({x:.1f}, {y:.1f}, {z:.1f}) mm",
                fix=fix,
            ),
        )
    if stance.slenderness > MOST_SLENDER:
        return (
            Finding(
                code="slender",
                severity=Severity.WARN,
                part=piece,
                what=f"the piece is {stance.slenderness:.1f} times as high as its foot is wide",
                measured=stance.slenderness,
                limit=MOST_SLENDER,
                where="whole piece",
                fix=fix,
            ),
        )
    return ()

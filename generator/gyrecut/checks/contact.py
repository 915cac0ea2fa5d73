"""Whether the piece stands on the bed by itself."""

from __future__ import annotations

from dataclasses import dataclass
from math import pi
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.findings import Finding, Severity

if TYPE_CHECKING:
    from gyrecut.checks.surface import Surface

LEAST_CONTACT_MM2 = 1.0  # about one bead by two: less does not hold the first layer; practice
STRAIGHT = 1e-9  # rad; a gap of half a turn to this much is a straight edge of the foot


@dataclass(frozen=True, slots=True, kw_only=True)
class Stance:
    """How the piece stands.

    Parameters
    ----------
    contact_mm2 : float
        Area that lies on the bed [mm2].
    centre_mm : tuple of 3 float
        Centre of mass [mm].
    is_steady : bool
        Whether the centre of mass is above the hull of the contact.
    """

    contact_mm2: float
    centre_mm: tuple[float, float, float]
    is_steady: bool


def measure_stance(surface: Surface) -> Stance:
    """Measure the foot, and where the centre of mass is over it.

    Notes
    -----
    A point is outside the hull of others exactly when they all lie within half a turn of it, so
    the widest gap between their bearings says it with no hull built.
    """
    flat = surface.is_on_bed
    centre = surface.centre_of_mass
    contact = float(surface.areas[flat].sum())
    feet = surface.vertices[np.unique(surface.faces[flat])][:, :2] - centre[:2]
    is_steady = False
    if len(feet) > 0:
        bearings = np.sort(np.arctan2(feet[:, 1], feet[:, 0]))
        gaps = np.diff(bearings, append=bearings[0] + 2 * pi)
        is_steady = bool(gaps.max() < pi - STRAIGHT)
    x, y, z = centre.tolist()
    return Stance(contact_mm2=contact, centre_mm=(x, y, z), is_steady=is_steady)


def stance_findings(stance: Stance, piece: str) -> tuple[Finding, ...]:
    """Say when a piece has no foot, or falls over on the one it has."""
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
    return ()

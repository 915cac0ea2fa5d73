"""Whether the piece fits the printer."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.findings import Finding, Severity

if TYPE_CHECKING:
    from gyrecut.checks.limits import PrintLimits

ROUNDING_MM = 1e-3  # a size that equals the limit passes, whatever its last digit


def room_mm(limits: PrintLimits) -> tuple[float, float, float]:
    """Give what is left of the build volume inside the margin [mm]."""
    width, depth, height = limits.build_volume_mm
    return width - 2 * limits.margin_mm, depth - 2 * limits.margin_mm, height


def fit_findings(
    size_mm: tuple[float, float, float], piece: str, limits: PrintLimits
) -> tuple[Finding, ...]:
    """Hold the size of a piece against the room on the printer, an axis a finding."""
    room = room_mm(limits)
    turned = (size_mm[1], size_mm[0], size_mm[2])
    fits_turned = all(side <= most + ROUNDING_MM for side, most in zip(turned, room, strict=True))
    fix = (
        "turn it by a quarter on the bed" if fits_turned else "cut the piece, or make the body less"
    )
    names = ("wide", "deep", "high")
    return tuple(
        Finding(
            code="does-not-fit",
            severity=Severity.STOP,
            part=piece,
            what=f"the piece is {side:.1f} mm {name}, the printer has room for {most:.1f} mm",
            measured=side,
            limit=most,
            unit="mm",
            where=f"along {axis}",
            fix=fix,
        )
        for side, most, name, axis in zip(size_mm, room, names, "xyz", strict=True)
        if side > most + ROUNDING_MM
    )

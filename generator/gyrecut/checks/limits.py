"""What the printer can do, as far as one piece is concerned."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from gyrecut.proportions.printing import smallest_wall_mm

if TYPE_CHECKING:
    from gyrecut.profile.models import Printer

MM = 1000.0


@dataclass(frozen=True, slots=True, kw_only=True)
class PrintLimits:
    """The limits that a piece is held against.

    Parameters
    ----------
    build_volume_mm : tuple of 3 float
        Width, depth and height that the printer reaches [mm].
    margin_mm : float
        Strip kept free along every edge of the bed [mm].
    smallest_wall_mm : float
        Thinnest wall that prints sound [mm].
    overhang_limit : float
        Steepest lean that prints without support, from the vertical [rad].
    bridge_limit_mm : float
        Longest span that prints between two held sides [mm].
    process : str
        `filament` or `resin`.
    """

    build_volume_mm: tuple[float, float, float]
    margin_mm: float
    smallest_wall_mm: float
    overhang_limit: float
    bridge_limit_mm: float
    process: str = "filament"


def limits_of(printer: Printer) -> PrintLimits:
    """Give the limits that a profile's printer sets."""
    x, y, z = (length * MM for length in printer.build_volume)
    return PrintLimits(
        build_volume_mm=(x, y, z),
        margin_mm=printer.margin * MM,
        smallest_wall_mm=smallest_wall_mm(printer),
        overhang_limit=printer.overhang_limit,
        bridge_limit_mm=printer.bridge_limit * MM,
        process=printer.process,
    )

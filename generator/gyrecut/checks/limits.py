"""What the printer can do, as far as one piece is concerned."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from gyrecut.proportions.printing import smallest_wall_mm

if TYPE_CHECKING:
    from gyrecut.profile.models import Printer

MM = 1000.0

# Least hole, and least width of what stands or gapes alone, by process. Holes, resin pins and resin
# details: print service design rules. The rest is common practice, no source: what is narrower
# than one line is left out by a slicer or runs together, and a pin of one line snaps.
HOLE_MM = {"filament": 2.0, "resin": 0.5}
RESIN_PIN_MM = 0.5
RESIN_DETAIL_MM = 0.2
PIXELS_IN_A_DETAIL = 2


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
    line_width_mm : float
        Width of a bead; of a pixel for resin [mm].
    clearance_mm : float
        Radial gap of a joint that slides [mm].
    """

    build_volume_mm: tuple[float, float, float]
    margin_mm: float
    smallest_wall_mm: float
    overhang_limit: float
    bridge_limit_mm: float
    process: str
    line_width_mm: float
    clearance_mm: float

    @property
    def least_detail_mm(self) -> float:
        """Narrowest stroke that still prints, and narrowest gap that stays open [mm]."""
        if self.process == "resin":
            return max(RESIN_DETAIL_MM, PIXELS_IN_A_DETAIL * self.line_width_mm)
        return self.line_width_mm

    @property
    def least_hole_mm(self) -> float:
        """Narrowest hole that stays open [mm]."""
        return HOLE_MM[self.process]

    @property
    def least_pin_mm(self) -> float:
        """Thinnest pin that does not snap [mm]."""
        return RESIN_PIN_MM if self.process == "resin" else self.smallest_wall_mm

    @property
    def least_strip_mm(self) -> float:
        """Narrowest strip of a foot that holds on the bed: that of the thinnest wall [mm]."""
        return self.smallest_wall_mm


def limits_of(printer: Printer) -> PrintLimits:
    """Give the limits that a profile's printer sets."""
    x, y, z = (length * MM for length in printer.build_volume)
    line = printer.line_width if printer.line_width is not None else printer.pixel
    if line is None:
        raise ValueError(f"a {printer.process} printer without a line width or a pixel")
    return PrintLimits(
        build_volume_mm=(x, y, z),
        margin_mm=printer.margin * MM,
        smallest_wall_mm=smallest_wall_mm(printer),
        overhang_limit=printer.overhang_limit,
        bridge_limit_mm=printer.bridge_limit * MM,
        process=printer.process,
        line_width_mm=line * MM,
        clearance_mm=printer.clearance * MM,
    )

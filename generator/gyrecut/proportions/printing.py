"""What a printer asks of the pieces it is given."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from gyrecut.profile.models import Printer

MM = 1000.0
BEADS_IN_A_WALL = 2  # a wall of one bead leaks and breaks: print service design rules
SMALLEST_RESIN_WALL_MM = 1.0  # free-standing, print service design rules


@dataclass(frozen=True, slots=True, kw_only=True)
class Bed:
    """What the printer leaves for one piece: its build volume less the margins."""

    width_mm: float
    depth_mm: float
    height_mm: float


def bed_of(printer: Printer) -> Bed:
    """Give what a printer leaves for one piece, in millimetres."""
    x, y, z = printer.build_volume
    return Bed(
        width_mm=(x - 2 * printer.margin) * MM,
        depth_mm=(y - 2 * printer.margin) * MM,
        height_mm=(z - printer.margin) * MM,
    )


def smallest_wall_mm(printer: Printer) -> float:
    """Give the thinnest wall a printer makes sound [mm]."""
    line = printer.line_width
    return SMALLEST_RESIN_WALL_MM if line is None else BEADS_IN_A_WALL * line * MM

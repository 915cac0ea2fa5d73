"""What a printer asks of the pieces it is given."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from gyrecut.profile.models import Printer

MM = 1000.0
BEADS_IN_A_WALL = 2  # a wall of one bead leaks and breaks: print service design rules
SMALLEST_RESIN_WALL_MM = 1.0  # free-standing, print service design rules
BEADS_IN_A_STROKE = 2  # of an engraved letter
RESIN_STROKE_MM = 0.8  # half of that prints, this can be read
LETTER_ROWS = 5  # strokes and gaps from foot to head of a letter
NAME_MARGIN_MM = 0.7  # of plain face round a name
SPARE_MM = 0.1


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


def stroke_mm(printer: Printer) -> float:
    """Give the width of an engraved stroke [mm]."""
    line = printer.line_width
    return RESIN_STROKE_MM if line is None else BEADS_IN_A_STROKE * line * MM


def name_band_mm(printer: Printer) -> float:
    """Give the height of an edge that a piece's name can be engraved on [mm]."""
    return LETTER_ROWS * stroke_mm(printer) + 2 * NAME_MARGIN_MM + SPARE_MM

"""Screws and heat-set inserts in millimetres, from the catalogue row."""

from __future__ import annotations

from math import ceil
from typing import TYPE_CHECKING

from gyrecut.catalogue import fasteners
from gyrecut.proportions.dimensions import Screws

if TYPE_CHECKING:
    from gyrecut.proportions.dimensions import Groove, Point

MM = 1000.0
INSERT_HOLE_SPARE_MM = 1.0  # melt collects under the insert: common practice, no source
PITCH_SPARE_MM = 55.0  # between screws of a flange in plastic: common practice, no source


def screws(name: str, places_mm: tuple[Point, ...]) -> Screws:
    """Give the screws of one interface.

    Parameters
    ----------
    name : str
        Row of the catalogue of fasteners.
    places_mm : tuple of (float, float)
        Where the screws stand, in the plane of the interface [mm].

    Returns
    -------
    Screws
        Holes are the coarse row of ISO 273, since printed holes come out small.
    """
    row = fasteners()[name]
    return Screws(
        thread=row.name,
        clearance_hole_mm=row.clearance_coarse * MM,
        head_diameter_mm=row.head_diameter * MM,
        insert_hole_mm=row.insert_hole * MM,
        insert_depth_mm=row.insert_length * MM + INSERT_HOLE_SPARE_MM,
        boss_mm=row.boss_diameter * MM,
        places_mm=places_mm,
    )


def screw_line(row: Screws, *, wall_mm: float, grooves: tuple[Groove | None, ...]) -> float:
    """Distance of the screws from the air's edge: clear of wall and groove, the nearest there is.

    Parameters
    ----------
    row : Screws
        The screws.
    wall_mm : float
        Wall between the air and what is outside of it [mm].
    grooves : tuple of Groove or None
        Of the joints that share the line.

    Returns
    -------
    float
        From the air's edge to the middle of the screws [mm].
    """
    plain = wall_mm + row.boss_mm / 2
    grooved = (groove.clear_mm + row.insert_hole_mm / 2 for groove in grooves if groove is not None)
    return max((plain, *grooved))


def spread(first: float, last: float, pitch: float) -> tuple[float, ...]:
    """Give evenly spaced values from `first` to `last`, both included, no wider than `pitch`."""
    steps = max(1, ceil(abs(last - first) / pitch - 1e-9))
    return tuple(first + (last - first) * step / steps for step in range(steps + 1))

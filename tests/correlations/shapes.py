"""Bodies of the published families, and the air that the tables below are for."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.catalogue import families
from gyrecut.correlations.geometry import RATIOS, CycloneGeometry, scaled

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

AIR_DENSITY = 1.2041  # dry air of 20 degC at sea level
VISCOSITY = 1.8133e-5  # same
TEMPERATURE = 293.15  # same


def cyclone(family: str, diameter: Numbers) -> CycloneGeometry:
    row = families()[family]
    unit = CycloneGeometry(body_diameter=1.0, **{name: getattr(row, name) for name in RATIOS})
    return scaled(unit, body_diameter=diameter)


def flow_at(body: CycloneGeometry, inlet_velocity: Numbers) -> Numbers:
    return inlet_velocity * body.slot_height * body.slot_width

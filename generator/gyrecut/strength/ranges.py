"""Ranges that the formulas for strength share."""

from __future__ import annotations

from gyrecut.airflow.ranges import Range

_SOURCE = "far beyond any workshop separator; common practice, no source"

MODULUS = Range(quantity="elastic modulus", low=1e6, high=1e12, unit="Pa", source=_SOURCE)
POISSON = Range(
    quantity="poisson ratio", low=0.0, high=0.499, unit="-", source="of any ordinary material"
)
WALL = Range(quantity="wall thickness", low=1e-5, high=1.0, unit="m", source=_SOURCE)
DIAMETER = Range(quantity="diameter", low=1e-3, high=10.0, unit="m", source=_SOURCE)
LENGTH = Range(quantity="length", low=1e-4, high=1e4, unit="m", source=_SOURCE)
PRESSURE = Range(quantity="pressure difference", low=0.0, high=1e8, unit="Pa", source=_SOURCE)
THIN_SHELL = Range(
    quantity="wall over diameter",
    low=1e-5,
    high=0.05,
    unit="-",
    source="thin shells: radius over wall above 10, Roark table 35 case 19a",
)
THIN_PLATE = Range(
    quantity="plate thickness over its shorter span or its diameter",
    low=1e-5,
    high=0.25,
    unit="-",
    source="thin plates, Roark chapter 11, from memory",
)
STRENGTH = Range(quantity="strength", low=1e4, high=1e10, unit="Pa", source=_SOURCE)
AREA = Range(quantity="area", low=1e-9, high=100.0, unit="m^2", source=_SOURCE)
FLOW = Range(quantity="air flow", low=0.0, high=100.0, unit="m^3/s", source=_SOURCE)
DENSITY = Range(quantity="density", low=0.2, high=25e3, unit="kg/m^3", source=_SOURCE)

"""Ranges that several correlations share.

The published tests lie in a narrower band, about 10 to 27 m/s of inlet velocity (EPA course 413,
from memory). The ranges here only stop what the formulas cannot mean anything for.
"""

from __future__ import annotations

from gyrecut.airflow.ranges import Range

_SOURCE = "far beyond any workshop cyclone; common practice, no source"

FLOW = Range(quantity="air flow", low=1e-6, high=100.0, unit="m^3/s", source=_SOURCE)
INLET_VELOCITY = Range(
    quantity="inlet velocity",
    low=1.0,
    high=60.0,
    unit="m/s",
    source="published tests cover about 10 to 27 m/s; the ends are common practice, no source",
)
PARTICLE_DENSITY = Range(
    quantity="particle density", low=10.0, high=25e3, unit="kg/m^3", source=_SOURCE
)
# 0 stands for a gas density that a textbook neglects beside the particle's.
AIR_DENSITY = Range(quantity="air density", low=0.0, high=5.0, unit="kg/m^3", source=_SOURCE)
VISCOSITY = Range(quantity="air viscosity", low=5e-6, high=1e-4, unit="Pa*s", source=_SOURCE)
PARTICLE_DIAMETER = Range(
    quantity="particle diameter",
    low=0.0,
    high=1e9,
    unit="m",
    source="finite; the tail of a log-normal dust reaches any size",
)
CUT_SIZE = Range(quantity="cut size", low=1e-9, high=1e-2, unit="m", source=_SOURCE)
TEMPERATURE = Range(
    quantity="air temperature",
    low=200.0,
    high=400.0,
    unit="K",
    source="as far as the viscosity formula of this program",
)
# What divides by the density, or by a Reynolds number, needs some.
REAL_AIR_DENSITY = Range(
    quantity="air density",
    low=0.2,
    high=5.0,
    unit="kg/m^3",
    source="the formula divides by it; common practice, no source",
)
FRICTION = Range(quantity="wall friction factor", low=0.0, high=0.1, unit="-", source=_SOURCE)
LOADING = Range(
    quantity="dust in the air, by mass",
    low=0.0,
    high=10.0,
    unit="-",
    source="room around published tests, which end near 2; common practice, no source",
)
SLOT_OVER_RADIUS = Range(
    quantity="slot width over body radius",
    low=0.0,
    high=1.0,
    unit="-",
    source="a wider slot reaches past the axis",
)

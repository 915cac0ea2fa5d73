"""Inlet velocity heads and pressure drop against published values and measured bodies."""

from __future__ import annotations

from math import pi

import pytest

from gyrecut.catalogue import families
from gyrecut.correlations.geometry import RATIOS, CycloneGeometry, scaled
from gyrecut.correlations.shepherd_lapple import (
    inlet_velocity_heads_shepherd_lapple,
    pressure_drop_shepherd_lapple,
)

# Leith and Mehta, Atmospheric Environment 7 (1973) 527; Koch and Licht, Chem. Eng. 84(24) (1977)
# 80 (both from memory), with half of the last digit printed.
HEADS = [
    ("stairmand-high-efficiency", 6.4, 0.05),
    ("stairmand-high-throughput", 8.0, 0.05),
    ("swift-high-efficiency", 9.24, 0.005),
    ("swift-general-purpose", 8.0, 0.05),
    ("swift-high-throughput", 8.0, 0.05),
    ("lapple-general-purpose", 8.0, 0.05),
    ("peterson-whitby", 7.8, 0.05),
]

# Euler number on v = 4 Q / (pi D^2) of Stairmand's 0.203 m bodies: Svarovsky (1981); Rhodes,
# Introduction to Particle Technology, ch. 9 (from memory); and the excess in per cent that the
# docstring of the correlation states.
MEASURED = [("stairmand-high-efficiency", 320, 23), ("stairmand-high-throughput", 46, 36)]


def cyclone(family: str, diameter: float) -> CycloneGeometry:
    row = families()[family]
    unit = CycloneGeometry(body_diameter=1.0, **{name: getattr(row, name) for name in RATIOS})
    return scaled(unit, body_diameter=diameter)


@pytest.mark.parametrize(("family", "printed", "half_digit"), HEADS)
def test_heads_are_the_published_ones(family: str, printed: float, half_digit: float) -> None:
    heads = inlet_velocity_heads_shepherd_lapple(cyclone(family, 0.2))
    assert heads == pytest.approx(printed, rel=0, abs=half_digit)


def test_cooper_and_alley_example_4_4() -> None:
    # Air Pollution Control (from memory): 8 heads, 1.01 kg/m3, 20 m/s, 2.5 m3/s: 1616 Pa, 4.04 kW.
    drop = pressure_drop_shepherd_lapple(
        cyclone("lapple-general-purpose", 1.0), flow=2.5, air_density=1.01
    )
    assert drop == pytest.approx(1616, rel=0, abs=0.5)
    assert 2.5 * drop == pytest.approx(4040, rel=0, abs=5)


@pytest.mark.parametrize(("family", "euler_number", "stated"), MEASURED)
def test_the_stated_excess_over_measured_bodies(
    family: str, euler_number: float, stated: float
) -> None:
    body = cyclone(family, 0.203)
    # From heads of the mean velocity in the body to heads of the velocity in the slot.
    slot_share = body.slot_height * body.slot_width / (pi / 4 * body.body_diameter**2)
    measured = euler_number * slot_share**2
    excess = inlet_velocity_heads_shepherd_lapple(body) / measured - 1
    assert 100 * excess == pytest.approx(stated, abs=0.5)

"""Air against published tables and an independent property library."""

from __future__ import annotations

import pytest
from fluids.atmosphere import ATMOSPHERE_1976

from gyrecut.airflow.air import (
    air_state,
    density,
    dynamic_viscosity,
    pressure_at_altitude,
    saturation_vapour_pressure,
)

# U.S. Standard Atmosphere 1976, SI table, altitude 20, 2, 0, -2 km: T in K, mu in Pa s (memory).
VISCOSITIES = [
    (216.65, 1.4216e-5),
    (275.15, 1.7260e-5),
    (288.15, 1.7894e-5),
    (301.15, 1.8515e-5),
]

# ISO 2533 standard atmosphere, geopotential altitude in m, pressure in Pa (from memory).
PRESSURES = [(0, 101325.0), (1000, 89874.6), (2000, 79495.2), (5000, 54019.9)]

# Saturation pressure of water, steam tables (IAPWS), degC and Pa (from memory).
STEAM = [(0.01, 611.657), (20, 2339.3), (40, 7384.9), (60, 19946.0)]

# CoolProp 8.0.0, evaluated at 101325 Pa: degC; viscosity of dry air; humid air density at
# relative humidity 0, 0.5 and 1.
COOLPROP = [
    (0, 1.7218e-5, (1.29310, 1.29162, 1.29016)),
    (20, 1.8206e-5, (1.20460, 1.19936, 1.19413)),
    (40, 1.9165e-5, (1.12748, 1.11199, 1.09661)),
    (60, 2.0099e-5, (1.05965, 1.02039, 0.98159)),
]


@pytest.mark.parametrize(("temperature", "printed"), VISCOSITIES)
def test_viscosity_is_the_standard_atmosphere(temperature: float, printed: float) -> None:
    # Half the last printed digit, 0.5e-9, and the rounding of the printed T, 0.005 K: 0.25e-9.
    assert dynamic_viscosity(temperature) == pytest.approx(printed, rel=0, abs=0.75e-9)


@pytest.mark.parametrize(("altitude", "printed"), PRESSURES)
def test_pressure_is_the_standard_atmosphere(altitude: float, printed: float) -> None:
    # Half the last printed digit, and five digits of the exponent: 3e-6 at 5000 m.
    assert pressure_at_altitude(altitude) == pytest.approx(printed, rel=3e-6, abs=0.05)


@pytest.mark.parametrize("altitude", [0.0, 500.0, 1500.0, 3000.0])
def test_dry_air_is_the_standard_atmosphere_of_fluids(altitude: float) -> None:
    # fluids 1.3: ATMOSPHERE_1976 takes the geometric height, here the geopotential one.
    standard = ATMOSPHERE_1976(altitude * 6356766.0 / (6356766.0 - altitude))
    here = air_state(standard.T, altitude=altitude, relative_humidity=0.0)
    assert here.pressure == pytest.approx(standard.P, rel=1e-5)
    assert here.density == pytest.approx(standard.rho, rel=3e-5)  # R of 287.05 and 287.053
    assert here.viscosity == pytest.approx(standard.mu, rel=1e-6)


@pytest.mark.parametrize(("celsius", "printed"), STEAM)
def test_vapour_pressure_is_near_the_steam_tables(celsius: float, printed: float) -> None:
    # The Magnus form is within 0.3 % up to 60 degC; that is 0.02 % of the density of air.
    assert saturation_vapour_pressure(celsius + 273.15) == pytest.approx(printed, rel=3e-3)


@pytest.mark.parametrize(("celsius", "viscosity", "densities"), COOLPROP)
def test_air_is_near_the_property_library(
    celsius: float, viscosity: float, densities: tuple[float, float, float]
) -> None:
    temperature = celsius + 273.15
    # Sutherland lies 0.3 to 0.6 % low; the ideal gases 0.04 % low, 0.12 % when hot and damp.
    assert dynamic_viscosity(temperature) == pytest.approx(viscosity, rel=6e-3)
    for humidity, expected in zip((0.0, 0.5, 1.0), densities, strict=True):
        found = density(temperature, pressure=101325.0, relative_humidity=humidity)
        assert found == pytest.approx(expected, rel=1.2e-3)
    # What the vapour takes off the density: 1.24 % more than the library where it is hottest.
    damp = density(temperature, pressure=101325.0, relative_humidity=1.0)
    lost = density(temperature, pressure=101325.0, relative_humidity=0.0) - damp
    assert lost == pytest.approx(densities[0] - densities[2], rel=1.3e-2)

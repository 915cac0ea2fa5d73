"""Laws that the state of the air has to follow."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from gyrecut.airflow.air import (
    air_state,
    air_state_at_pressure,
    density,
    dynamic_viscosity,
    pressure_at_altitude,
)
from gyrecut.errors import OutOfRangeError

TEMPERATURES = st.floats(min_value=230.0, max_value=330.0)
HUMIDITIES = st.floats(min_value=0.0, max_value=0.99)
ALTITUDES = st.floats(min_value=-400.0, max_value=5000.0)


@given(TEMPERATURES, HUMIDITIES, ALTITUDES)
def test_warmer_damper_and_higher_air_is_thinner(
    temperature: float, humidity: float, altitude: float
) -> None:
    here = air_state(temperature, altitude=altitude, relative_humidity=humidity)
    for there in (
        air_state(temperature + 1.0, altitude=altitude, relative_humidity=humidity),
        air_state(temperature, altitude=altitude, relative_humidity=humidity + 0.01),
        air_state(temperature, altitude=altitude + 10.0, relative_humidity=humidity),
    ):
        assert there.density < here.density


@given(TEMPERATURES)
def test_warmer_air_is_more_viscous(temperature: float) -> None:
    assert dynamic_viscosity(temperature + 1.0) > dynamic_viscosity(temperature)


def test_altitude_and_pressure_give_the_same_state() -> None:
    by_altitude = air_state(293.15, altitude=800.0, relative_humidity=0.4)
    by_pressure = air_state_at_pressure(
        293.15, pressure=by_altitude.pressure, relative_humidity=0.4
    )
    assert by_pressure == by_altitude


def test_arrays_broadcast() -> None:
    temperatures = np.array([[280.0], [300.0]])
    humidities = np.array([0.0, 0.5, 1.0])
    table = np.asarray(density(temperatures, pressure=101325.0, relative_humidity=humidities))
    assert table.shape == (2, 3)
    assert table[1, 2] == density(300.0, pressure=101325.0, relative_humidity=1.0)


def test_the_state_holds_plain_floats() -> None:
    state = air_state(293.15, altitude=0.0, relative_humidity=0.5)
    assert type(state.density) is float
    assert type(state.viscosity) is float
    assert type(state.pressure) is float


@pytest.mark.parametrize(
    ("temperature", "altitude", "humidity", "quantity"),
    [
        (200.0, 0.0, 0.5, "air temperature"),
        (350.0, 0.0, 0.5, "air temperature"),
        (float("nan"), 0.0, 0.5, "air temperature"),
        (293.15, 12000.0, 0.5, "altitude"),
        (293.15, 0.0, 50.0, "relative humidity"),
    ],
)
def test_air_outside_the_formulas_is_refused(
    temperature: float, altitude: float, humidity: float, quantity: str
) -> None:
    with pytest.raises(OutOfRangeError, match=f"^{quantity} is "):
        air_state(temperature, altitude=altitude, relative_humidity=humidity)


def test_a_viscosity_far_outside_is_refused() -> None:
    with pytest.raises(OutOfRangeError, match="allowed 200 to 400 K"):
        dynamic_viscosity(1000.0)


def test_a_pressure_in_the_wrong_unit_is_refused() -> None:
    with pytest.raises(OutOfRangeError, match="air pressure is 1013"):
        air_state_at_pressure(293.15, pressure=1013.0, relative_humidity=0.5)


def test_sea_level_is_the_standard_pressure() -> None:
    assert pressure_at_altitude(0.0) == 101325.0

"""What a filter costs and how long it lasts: round trips and refusals."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from gyrecut.airflow.filters import (
    REFERENCE_VISCOSITY,
    filter_life,
    filter_load_at_limit,
    filter_loss,
)
from gyrecut.errors import OutOfRangeError

VELOCITIES = st.floats(min_value=1e-3, max_value=0.2)
LOADS = st.floats(min_value=1e-3, max_value=1.0)


@given(VELOCITIES, LOADS)
def test_load_and_pressure_drop_are_a_round_trip(velocity: float, load: float) -> None:
    drop = filter_loss(
        velocity,
        clean_resistance=1500.0,
        cake_resistance=2.5e5,
        cake_load=load,
        viscosity=REFERENCE_VISCOSITY,
    )
    found = filter_load_at_limit(
        limit=drop, face_velocity=velocity, clean_resistance=1500.0, cake_resistance=2.5e5
    )
    assert found == pytest.approx(load, rel=1e-9)


@given(VELOCITIES)
def test_warm_air_is_more_viscous_and_costs_more(velocity: float) -> None:
    cold, warm = (
        filter_loss(
            velocity,
            clean_resistance=1500.0,
            cake_resistance=0.0,
            cake_load=0.0,
            viscosity=viscosity,
        )
        for viscosity in (1.81e-5, 1.91e-5)
    )
    assert warm == pytest.approx(float(cold) * 1.91 / 1.81)


def test_a_filter_over_its_limit_when_clean_takes_less_than_nothing() -> None:
    load = filter_load_at_limit(
        limit=100.0, face_velocity=0.1, clean_resistance=1500.0, cake_resistance=2.5e5
    )
    assert load < 0
    with pytest.raises(OutOfRangeError, match="dust on the filter is -"):
        filter_life(cake_load=load, area=0.5, dust_rate=1e-6)


def test_twice_the_area_at_twice_the_load_lasts_four_times_as_long() -> None:
    life = filter_life(cake_load=0.05, area=0.5, dust_rate=1e-6)
    assert life == pytest.approx(25e3)
    assert filter_life(cake_load=0.1, area=1.0, dust_rate=1e-6) == pytest.approx(4 * life)


def test_no_dust_is_refused() -> None:
    with pytest.raises(OutOfRangeError, match="dust that reaches the filter is 0 kg/s"):
        filter_life(cake_load=0.05, area=0.5, dust_rate=0.0)

"""Suction curves: they fall, go through their points, and promise no more than they say."""

from __future__ import annotations

from itertools import accumulate

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.interpolate import PchipInterpolator

from gyrecut.airflow.suction import (
    PARABOLA,
    STANDARD_DENSITY,
    STRAIGHT,
    SuctionCurve,
    suction_curve_from_ends,
    suction_curve_from_points,
)
from gyrecut.catalogue import sources
from gyrecut.errors import OutOfRangeError

STEPS = st.lists(st.floats(min_value=1e-3, max_value=0.02), min_size=2, max_size=8)
EXPONENTS = st.floats(min_value=1.0, max_value=3.0)


def drawn(exponent: float) -> SuctionCurve:
    return suction_curve_from_ends(
        shut_off=20e3, open_flow=0.05, exponent=exponent, air_density=STANDARD_DENSITY
    )


@given(STEPS, st.data())
def test_a_curve_through_points_falls_and_meets_each_of_them(
    steps: list[float], data: st.DataObject
) -> None:
    falls = data.draw(
        st.lists(st.floats(min_value=50.0, max_value=5e3), min_size=len(steps), max_size=len(steps))
    )
    flows = list(accumulate(steps))
    suctions = list(accumulate(falls))[::-1]
    curve = suction_curve_from_points(flows=flows, suctions=suctions, air_density=1.2)
    along = np.asarray(curve.suction(np.linspace(0.0, curve.open_flow, 400)))
    # the last digits of the largest suction are all that rounding may undo
    assert np.all(np.diff(along) <= 1e-12 * curve.shut_off)
    assert along[0] == curve.shut_off
    assert curve.suction(np.array(flows)) == pytest.approx(suctions, rel=1e-9)
    assert curve.suction(curve.open_flow) == pytest.approx(0.0, abs=1e-9 * curve.shut_off)
    assert (curve.known_from, curve.known_to) == (flows[0], flows[-1])


def test_it_is_the_monotone_interpolation_of_scipy() -> None:
    flows, suctions = [0.0, 0.010, 0.015, 0.035, 0.050], [20e3, 19.5e3, 15e3, 8e3, 0.0]
    curve = suction_curve_from_points(flows=flows, suctions=suctions, air_density=1.2)
    along = np.linspace(0.0, 0.05, 777)
    assert curve.suction(along) == pytest.approx(
        PchipInterpolator(flows, suctions)(along), abs=1e-9 * 20e3
    )


def test_points_that_stop_short_go_straight_on() -> None:
    curve = suction_curve_from_points(
        flows=[0.01, 0.02], suctions=[15e3, 10e3], air_density=STANDARD_DENSITY
    )
    assert curve.shut_off == pytest.approx(20e3)
    assert curve.open_flow == pytest.approx(0.04)
    assert curve.suction(0.03) == pytest.approx(5e3)
    assert (curve.known_from, curve.known_to) == (0.01, 0.02)


@pytest.mark.parametrize("exponent", [STRAIGHT, 1.05, 1.3, 1.7, PARABOLA, 2.6, 3.0])
def test_a_curve_from_its_ends_is_the_formula(exponent: float) -> None:
    flows = np.linspace(0.0, 0.05, 1001)
    formula = 20e3 * (1 - (flows / 0.05) ** exponent)
    exact = exponent in (STRAIGHT, PARABOLA)
    assert drawn(exponent).suction(flows) == pytest.approx(
        formula, rel=0, abs=(1e-11 if exact else 1e-4) * 20e3
    )


@given(EXPONENTS, st.floats(min_value=0.0, max_value=0.05))
def test_the_straight_line_promises_least(exponent: float, flow: float) -> None:
    least = float(drawn(STRAIGHT).suction(flow))
    assert drawn(exponent).suction(flow) >= least - 1e-9


@given(EXPONENTS, st.floats(min_value=0.5, max_value=1.5))
def test_thin_air_lowers_suction_in_proportion_and_leaves_the_flow(
    exponent: float, density: float
) -> None:
    here = drawn(exponent)
    there = here.at_density(density)
    assert there.shut_off == pytest.approx(here.shut_off * density / 1.2)
    assert there.open_flow == here.open_flow
    assert there.suction(0.02) == pytest.approx(float(here.suction(0.02)) * density / 1.2)
    assert there.at_density(STANDARD_DENSITY).suctions == pytest.approx(here.suctions)


def test_shapes_go_through() -> None:
    assert np.shape(drawn(1.3).suction(np.full((2, 3), 0.01))) == (2, 3)
    assert np.shape(drawn(1.3).suction(0.01)) == ()


@pytest.mark.parametrize(
    ("flows", "suctions", "message"),
    [
        ([0.0, 0.02, 0.01], [3.0, 2.0, 1.0], "step to the next flow of the suction curve is -0.01"),
        ([0.0, 0.01, 0.02], [3.0, 3.0, 1.0], "fall to the next suction of the suction curve is 0"),
        ([-0.01, 0.01], [3.0, 1.0], "flow of the suction curve is -0.01"),
        ([0.0, 0.01], [3.0, float("nan")], "suction is nan"),
        ([0.099, 0.1], [80e3, 1e3], "shut-off suction is"),
    ],
)
def test_points_that_are_no_curve_are_refused(
    flows: list[float], suctions: list[float], message: str
) -> None:
    with pytest.raises(OutOfRangeError, match=f"^{message}"):
        suction_curve_from_points(flows=flows, suctions=suctions, air_density=1.2)


def test_a_curve_from_ends_outside_is_refused() -> None:
    with pytest.raises(OutOfRangeError, match=r"exponent of the suction curve is 0\.9 -"):
        drawn(0.9)
    with pytest.raises(OutOfRangeError, match="open flow is 0 "):
        suction_curve_from_ends(shut_off=1e3, open_flow=0.0, exponent=1.0, air_density=1.2)
    with pytest.raises(OutOfRangeError, match="air density is 1200 "):
        drawn(1.0).at_density(1200.0)


@pytest.mark.parametrize("flow", [-1e-6, 0.0501, float("nan")])
def test_a_flow_that_no_source_draws_is_refused(flow: float) -> None:
    with pytest.raises(OutOfRangeError, match=r"flow through the suction source is .* 0 to 0\.05 "):
        drawn(1.3).suction(flow)


@pytest.mark.parametrize("name", sorted(sources()))
def test_every_shipped_source_gives_a_curve(name: str) -> None:
    row = sources()[name]
    curve = suction_curve_from_ends(
        shut_off=row.shut_off,
        open_flow=row.open_flow,
        exponent=row.exponent,
        air_density=STANDARD_DENSITY,
    )
    half = float(curve.suction(row.open_flow / 2))
    assert row.shut_off / 2 <= half < row.shut_off

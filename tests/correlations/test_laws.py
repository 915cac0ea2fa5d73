"""Laws that the correlations have to follow at any design, found by searching for exceptions."""

from __future__ import annotations

from functools import partial
from math import erf, log, sqrt
from typing import TYPE_CHECKING

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.integrate import quad
from scipy.stats import lognorm

from gyrecut.catalogue import families
from gyrecut.correlations.dust_outlet import (
    CHIPS_ACROSS_LEAST,
    CHIPS_ACROSS_SAFE,
    largest_mass_flow_zenz,
    smallest_outlet_for_chips,
    smallest_outlet_zenz,
)
from gyrecut.correlations.dust_sizes import mass_share_caught
from gyrecut.correlations.geometry import RATIOS, CycloneGeometry, mean_inlet_velocity, scaled
from gyrecut.correlations.lapple import (
    body_diameter_for_cut_size_lapple,
    cut_size_lapple,
    grade_efficiency_lapple,
)
from gyrecut.correlations.natural_length import natural_length_alexander
from gyrecut.correlations.saltation import saltation_velocity_kalen_zenz
from gyrecut.correlations.shepherd_lapple import (
    inlet_velocity_heads_shepherd_lapple,
    pressure_drop_shepherd_lapple,
)
from gyrecut.errors import OutOfRangeError

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.airflow.ranges import Numbers

AIR_DENSITY = 1.2
VISCOSITY = 1.81e-5

SHAPES = st.sampled_from(sorted(families()))
DIAMETERS = st.floats(min_value=0.06, max_value=0.6)
VELOCITIES = st.floats(min_value=8.0, max_value=25.0)
DENSITIES = st.floats(min_value=100.0, max_value=8000.0)


def cyclone(family: str, diameter: Numbers) -> CycloneGeometry:
    row = families()[family]
    unit = CycloneGeometry(body_diameter=1.0, **{name: getattr(row, name) for name in RATIOS})
    return scaled(unit, body_diameter=diameter)


def cut_size(body: CycloneGeometry, velocity: Numbers, particle_density: Numbers) -> Numbers:
    return cut_size_lapple(
        body,
        flow=velocity * body.slot_height * body.slot_width,
        particle_density=particle_density,
        air_density=AIR_DENSITY,
        viscosity=VISCOSITY,
    )


@given(SHAPES, DIAMETERS, VELOCITIES, DENSITIES)
def test_cut_size_goes_with_the_root_of_the_diameter_at_a_fixed_velocity(
    shape: str, diameter: float, velocity: float, density: float
) -> None:
    small = cut_size(cyclone(shape, diameter), velocity, density)
    large = cut_size(cyclone(shape, 2.25 * diameter), velocity, density)
    assert large == pytest.approx(1.5 * small, rel=1e-12)


@given(SHAPES, DIAMETERS, VELOCITIES, DENSITIES)
def test_heavier_dust_and_faster_air_are_caught_finer(
    shape: str, diameter: float, velocity: float, density: float
) -> None:
    body = cyclone(shape, diameter)
    here = cut_size(body, velocity, density)
    assert cut_size(body, velocity, 1.1 * density) < here
    assert cut_size(body, 1.1 * velocity, density) < here


@given(
    st.floats(min_value=1e-7, max_value=1e-3),
    st.floats(min_value=1e-6, max_value=2e-5),
)
def test_grade_efficiency_rises_with_size_from_none_over_half_to_all(
    diameter: float, cut: float
) -> None:
    share = grade_efficiency_lapple(diameter, cut_size=cut)
    assert 0 < share < grade_efficiency_lapple(1.1 * diameter, cut_size=cut) < 1
    assert grade_efficiency_lapple(0.0, cut_size=cut) == 0
    assert grade_efficiency_lapple(cut, cut_size=cut) == 0.5


@given(SHAPES, DIAMETERS, VELOCITIES, DENSITIES)
def test_diameter_for_a_cut_size_is_a_round_trip(
    shape: str, diameter: float, velocity: float, density: float
) -> None:
    body = cyclone(shape, diameter)
    found = body_diameter_for_cut_size_lapple(
        cyclone(shape, 1.0),
        cut_size=cut_size(body, velocity, density),
        flow=velocity * body.slot_height * body.slot_width,
        particle_density=density,
        air_density=AIR_DENSITY,
        viscosity=VISCOSITY,
    )
    assert found == pytest.approx(diameter, rel=1e-12)


def test_a_cut_size_that_only_a_gale_would_give_is_refused() -> None:
    with pytest.raises(OutOfRangeError, match=r"inlet velocity is [\d.]+ m/s; allowed 1 to 60"):
        body_diameter_for_cut_size_lapple(
            cyclone("stairmand-high-efficiency", 1.0),
            cut_size=0.2e-6,
            flow=0.05,
            particle_density=1000.0,
            air_density=AIR_DENSITY,
            viscosity=VISCOSITY,
        )


@given(SHAPES, DIAMETERS, VELOCITIES, st.floats(min_value=0.9, max_value=1.3))
def test_pressure_drop_scales_with_density_and_the_square_of_velocity(
    shape: str, diameter: float, velocity: float, density: float
) -> None:
    body = cyclone(shape, diameter)
    flow = velocity * body.slot_height * body.slot_width
    drop = pressure_drop_shepherd_lapple(body, flow=flow, air_density=density)
    assert pressure_drop_shepherd_lapple(body, flow=flow, air_density=2 * density) == pytest.approx(
        2 * drop, rel=1e-12
    )
    assert pressure_drop_shepherd_lapple(
        body, flow=1.5 * flow, air_density=density
    ) == pytest.approx(2.25 * drop, rel=1e-12)
    heads = inlet_velocity_heads_shepherd_lapple(body)
    assert drop == pytest.approx(heads * density * velocity**2 / 2, rel=1e-12)


@given(SHAPES, DIAMETERS, VELOCITIES, DENSITIES)
def test_the_ratio_to_saltation_velocity_grows_with_the_cube_root_of_velocity(
    shape: str, diameter: float, velocity: float, density: float
) -> None:
    body = cyclone(shape, diameter)

    def ratio(speed: float) -> Numbers:
        flow = speed * body.slot_height * body.slot_width
        return mean_inlet_velocity(body, flow=flow) / saltation_velocity_kalen_zenz(
            body,
            flow=flow,
            particle_density=density,
            air_density=AIR_DENSITY,
            viscosity=VISCOSITY,
        )

    assert ratio(2 * velocity) == pytest.approx(2 ** (1 / 3) * ratio(velocity), rel=1e-12)


def test_saltation_refuses_air_without_density() -> None:
    with pytest.raises(OutOfRangeError, match="air density is 0 "):
        saltation_velocity_kalen_zenz(
            cyclone("stairmand-high-efficiency", 0.2),
            flow=0.06,
            particle_density=1000.0,
            air_density=0.0,
            viscosity=VISCOSITY,
        )


@pytest.mark.parametrize("shape", sorted(families()))
def test_a_sweep_gives_what_the_single_bodies_give(shape: str) -> None:
    diameters = np.array([[0.08], [0.15], [0.3]])
    velocities = np.array([10.0, 20.0])
    bodies = cyclone(shape, diameters)
    table = np.asarray(cut_size(bodies, velocities, 1000.0))
    assert table.shape == (3, 2)
    assert table[1, 0] == pytest.approx(cut_size(cyclone(shape, 0.15), 10.0, 1000.0), rel=1e-14)
    lengths = np.asarray(natural_length_alexander(bodies))
    assert lengths[2, 0] == pytest.approx(natural_length_alexander(cyclone(shape, 0.3)), rel=1e-14)


@given(st.floats(min_value=1e-5, max_value=0.1), st.floats(min_value=20.0, max_value=2000.0))
def test_outlet_and_mass_flow_are_a_round_trip(mass_flow: float, bulk_density: float) -> None:
    outlet = smallest_outlet_zenz(mass_flow=mass_flow, bulk_density=bulk_density)
    assert largest_mass_flow_zenz(outlet=outlet, bulk_density=bulk_density) == pytest.approx(
        mass_flow, rel=1e-12
    )
    assert smallest_outlet_zenz(mass_flow=2 * mass_flow, bulk_density=bulk_density) > outlet


def test_no_dust_needs_no_outlet() -> None:
    assert smallest_outlet_zenz(mass_flow=0.0, bulk_density=200.0) == 0


def test_the_safe_outlet_takes_twice_the_chips_of_the_least() -> None:
    least = smallest_outlet_for_chips(0.025, chips_across=CHIPS_ACROSS_LEAST)
    assert least == pytest.approx(0.075)
    assert smallest_outlet_for_chips(0.025, chips_across=CHIPS_ACROSS_SAFE) == 2 * least
    with pytest.raises(OutOfRangeError, match="largest chip is 25 m"):
        smallest_outlet_for_chips(25.0, chips_across=CHIPS_ACROSS_LEAST)


@pytest.mark.parametrize("spread", [1.0, 1.5, 2.5, 10.0])
def test_half_is_caught_of_a_dust_whose_median_is_the_cut_size(spread: float) -> None:
    # The grade curve is antisymmetric about the cut size in the logarithm, the dust symmetric.
    grade = partial(grade_efficiency_lapple, cut_size=5e-6)
    assert mass_share_caught(grade, median=5e-6, spread=spread) == pytest.approx(0.5, abs=1e-12)


@pytest.mark.parametrize(("median", "spread"), [(10e-6, 2.0), (30e-6, 2.5), (1.5e-3, 2.0)])
def test_catch_is_what_adaptive_quadrature_gives(median: float, spread: float) -> None:
    cut = 4e-6
    dust = lognorm(s=log(spread), scale=median)
    expected, _ = quad(
        lambda quantile: 1 / (1 + (cut / dust.ppf(quantile)) ** 2), 0, 1, epsabs=1e-10
    )
    grade = partial(grade_efficiency_lapple, cut_size=cut)
    assert mass_share_caught(grade, median=median, spread=spread) == pytest.approx(
        expected, abs=1e-8
    )


def test_a_sharp_sieve_keeps_the_oversize_of_the_distribution() -> None:
    def sieve(diameter: NDArray[np.float64]) -> NDArray[np.float64]:
        return np.where(diameter > 20e-6, 1.0, 0.0)

    oversize = 0.5 * (1 - erf(log(20 / 10) / (sqrt(2) * log(2.0))))
    # Half a step of the integration, 0.005 standard deviations, at the density of 0.242 there.
    assert mass_share_caught(sieve, median=10e-6, spread=2.0) == pytest.approx(
        oversize, abs=0.00125
    )


@given(st.floats(min_value=1e-6, max_value=1e-3), st.floats(min_value=1.0, max_value=4.0))
def test_coarser_dust_is_caught_better(median: float, spread: float) -> None:
    grade = partial(grade_efficiency_lapple, cut_size=5e-6)
    finer = mass_share_caught(grade, median=median, spread=spread)
    assert 0 < finer < mass_share_caught(grade, median=1.2 * median, spread=spread) < 1


def test_the_widest_dust_stays_within_the_grade_curve() -> None:
    grade = partial(grade_efficiency_lapple, cut_size=5e-6)
    assert 0 < mass_share_caught(grade, median=0.1, spread=10.0) <= 1


@pytest.mark.parametrize(("median", "spread"), [(0.0, 2.0), (30.0, 2.0), (1e-5, 0.9), (1e-5, 25.0)])
def test_a_dust_that_cannot_be_is_refused(median: float, spread: float) -> None:
    grade = partial(grade_efficiency_lapple, cut_size=5e-6)
    with pytest.raises(OutOfRangeError):
        mass_share_caught(grade, median=median, spread=spread)

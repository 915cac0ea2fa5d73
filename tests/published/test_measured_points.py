"""The models against measured cyclones, within what each is known to be good for."""

from __future__ import annotations

from math import exp

import numpy as np
import pytest
from tests.correlations.shapes import cyclone

from gyrecut.catalogue import families, measured_points
from gyrecut.correlations.geometry import RATIOS
from gyrecut.correlations.measured import held_against, measured_geometry
from gyrecut.correlations.similarity import (
    STAIRMAND_NUMBERS,
    cut_size_from_stokes_number,
    pressure_drop_from_euler_number,
)

POINTS = measured_points()
GATING = [name for name, point in POINTS.items() if point.grade in {"A", "B"}]
STAIRMAND = {
    "stairmand-he-203": "stairmand-high-efficiency",
    "stairmand-ht-203": "stairmand-high-throughput",
}
CENTRAL = "Muschelknautz, f >= 0.005"

# Forecast over measured cut size, worked by independent code from the same formulas: Lapple, Barth
# with f 0.005 and 0.02, Muschelknautz smooth and with f of at least 0.005, Leith-Licht,
# Iozia-Leith. They check that the rows of the catalogue are typed in rightly.
RATIO_TABLE = {
    "stairmand-he-203": (1.62, 1.29, 2.06, 1.00, 1.14, 0.65, 1.29),
    "stairmand-ht-203": (0.70, 1.05, 1.18, 0.69, 0.75, 0.43, 0.44),
    "dirgo-leith-305": (2.04, 1.62, 2.59, 1.19, 1.44, 0.78, 1.62),
    "sampler-one-28": (0.80, 0.38, 0.54, 0.74, 0.74, 0.30, 0.47),
    "sampler-one-14": (0.73, 0.35, 0.50, 0.92, 0.92, 0.27, 0.43),
    "sampler-one-12-6": (0.65, 0.31, 0.44, 0.85, 0.85, 0.24, 0.38),
    "kenny-gussman-scc-22": (0.55, 0.21, 0.33, 0.52, 0.52, 0.21, 0.33),
    "kenny-gussman-scc-11": (0.61, 0.23, 0.37, 1.39, 1.39, 0.24, 0.36),
    "kenny-gussman-gk-42": (0.95, 0.32, 0.54, 1.73, 1.73, 0.36, 0.59),
    "kenny-gussman-gk-27": (0.71, 0.24, 0.40, 1.53, 1.53, 0.28, 0.44),
    "kenny-gussman-gk-20": (0.77, 0.25, 0.43, 1.46, 1.46, 0.30, 0.47),
    # Worked without slip; with it, as its aerodynamic diameter asks for, 0.07 um less.
    "1d3d-305": (1.30, 1.42, 1.89, 0.81, 0.98, 0.64, 1.14),
}


@pytest.mark.parametrize("name", POINTS)
def test_forecasts_over_measured_cut_sizes(name: str) -> None:
    found = held_against(POINTS[name]).cut_size_ratios
    slip_left_out = 0.07 / 3.8 if name == "1d3d-305" else 0.0
    # Two digits are given; the temperatures of air and slip differ by 0.5 % of a ratio.
    assert list(found.values()) == pytest.approx(
        np.array(RATIO_TABLE[name]) - slip_left_out, abs=0.006, rel=5e-3
    )


@pytest.mark.parametrize("name", STAIRMAND)
def test_central_model_is_near_stairmands_bodies(name: str) -> None:
    # Both have a ring Reynolds number above 2.5e4, where a workshop body of 0.1 m and more is.
    found = held_against(POINTS[name])
    assert found.annulus_reynolds > 2.5e4
    assert 1 / 1.35 <= found.cut_size_ratios[CENTRAL] <= 1.35


@pytest.mark.parametrize("name", [name for name in GATING if name not in STAIRMAND])
def test_friction_that_depends_on_reynolds_holds_in_small_samplers(name: str) -> None:
    found = held_against(POINTS[name])
    assert found.annulus_reynolds < 1e4
    assert 1 / 1.4 <= found.cut_size_ratios[CENTRAL] <= 1.4


@pytest.mark.parametrize("name", [name for name in GATING if name not in STAIRMAND])
def test_fixed_friction_is_too_fine_in_small_samplers(name: str) -> None:
    # The reason for a warning below a ring Reynolds number of 1e4.
    found = held_against(POINTS[name]).cut_size_ratios
    assert 1 / 3 <= found["Iozia and Leith"] <= 1 / 1.7
    assert 1 / 5 <= found["Barth, f 0.005"] <= 1 / 2.5


@pytest.mark.parametrize("name", GATING)
def test_leith_and_licht_never_promise_too_little(name: str) -> None:
    assert held_against(POINTS[name]).cut_size_ratios["Leith and Licht"] < 0.7


@pytest.mark.parametrize("name", STAIRMAND)
@pytest.mark.parametrize("model", ["Casal and Martinez-Benet", "Dirgo and Ramachandran"])
def test_two_pressure_drops_are_near_stairmands_bodies(name: str, model: str) -> None:
    measured = POINTS[name].inlet_velocity_heads
    assert measured is not None
    assert held_against(POINTS[name]).inlet_velocity_heads[model] == pytest.approx(
        measured, rel=0.25
    )


def test_total_pressure_models_are_far_above_a_narrow_finder() -> None:
    # Why their drop is not taken for the blower: 9.3 to 10.4 heads forecast, 5.2 measured.
    point = POINTS["stairmand-he-203"]
    assert point.inlet_velocity_heads is not None
    heads = held_against(point).inlet_velocity_heads
    for model in (CENTRAL, "Muschelknautz, smooth", "Barth, f 0.005"):
        assert 1.7 < heads[model] / point.inlet_velocity_heads < 2.05


@pytest.mark.parametrize(("name", "family"), STAIRMAND.items())
def test_stairmands_bodies_are_the_family_and_its_similarity_numbers(
    name: str, family: str
) -> None:
    point = POINTS[name]
    shape, body = cyclone(family, point.body_diameter), measured_geometry(point)
    for dimension in ("body_diameter", *RATIOS):
        assert getattr(body, dimension) == pytest.approx(getattr(shape, dimension), rel=1e-9)
    numbers = STAIRMAND_NUMBERS[family]
    cut = cut_size_from_stokes_number(
        stokes_number=numbers.stokes_number,
        body_diameter=point.body_diameter,
        flow=point.flow,
        particle_density=point.particle_density,
        viscosity=point.viscosity,
    )
    assert cut == pytest.approx(point.cut_size, abs=0.005e-6)  # two decimals are given
    drop = pressure_drop_from_euler_number(
        euler_number=numbers.euler_number,
        body_diameter=point.body_diameter,
        flow=point.flow,
        air_density=point.air_density,
    )
    velocity = point.flow / (body.slot_height * body.slot_width)
    heads = drop / (point.air_density * velocity**2 / 2)
    assert heads == pytest.approx(point.inlet_velocity_heads, rel=1e-4)


def test_other_bodies_are_their_families() -> None:
    for name, family in (
        ("dirgo-leith-305", "stairmand-high-efficiency"),
        ("1d3d-305", "1d3d"),
    ):
        body = measured_geometry(POINTS[name])
        for dimension in RATIOS:
            ratio = getattr(body, dimension) / body.body_diameter
            assert ratio == pytest.approx(getattr(families()[family], dimension), rel=1e-5)


def test_sampler_one_follows_the_published_powers_of_flow() -> None:
    # 44.6 over Q^0.63, Q in L/min, from memory; 5.43 at 28.3 L/min, where 5.4 um was read.
    for name in ("sampler-one-28", "sampler-one-14"):
        point = POINTS[name]
        litres = point.flow * 60000
        assert 44.6 / litres**0.63 == pytest.approx(point.cut_size * 1e6, rel=6e-3)
    # US EPA Method 201A (1990), from memory: acfm from viscosity in micropoise, degR, inHg.
    density_term = (70 + 459.67) / (28.96 * 29.92)
    acfm = 0.002837 * 181.3 * density_term**0.2949
    point = POINTS["sampler-one-12-6"]
    assert point.flow * 60000 / 28.3168 == pytest.approx(acfm, rel=3e-3)


@pytest.mark.parametrize("shape", ["scc", "gk"])
def test_samplers_have_the_published_ratios(shape: str) -> None:
    # Coury, Pisani and Hung (2004), Table 16, p. 136 (read): bores of inlet, finder and outlet;
    # barrel, cone and finder length, over the body diameter.
    ratios = {
        "scc": (0.24, 0.27, 0.24, 0.45, 1.13, 0.35),
        "gk": (0.20, 0.23, 0.20, 0.40, 0.90, 0.23),
    }[shape]
    rows = [point for name, point in POINTS.items() if f"-{shape}-" in name]
    assert rows
    for point in rows:
        assert point.inlet_bore is not None
        lengths = (
            *(point.inlet_bore, point.finder_diameter, point.dust_outlet_diameter),
            *(point.barrel_height, point.total_height - point.barrel_height, point.finder_length),
        )
        assert np.array(lengths) / point.body_diameter == pytest.approx(np.array(ratios), rel=1e-5)


def test_three_samplers_of_one_shape_fit_one_power_law() -> None:
    # d50 ~ D^2.13 Q^-1.13 within 9 %: no independent evidence, since all three come from memory.
    rows = [point for name, point in POINTS.items() if "-gk-" in name]
    constants = [
        np.log(point.cut_size * point.flow**1.13 / point.body_diameter**2.13) for point in rows
    ]
    assert np.abs(constants - np.mean(constants)).max() < np.log(1.09)


def test_mean_bias_of_the_models_is_what_was_worked_outside() -> None:
    # Geometric means over both Stairmand bodies, and over the three points of sampler I.
    names = list(held_against(POINTS["stairmand-he-203"]).cut_size_ratios)
    for rows, worked in (
        (tuple(STAIRMAND), (1.06, 1.16, 1.56, 0.83, 0.92, 0.53, 0.75)),
        (
            ("sampler-one-28", "sampler-one-14", "sampler-one-12-6"),
            (0.73, 0.35, 0.49, 0.83, 0.83, 0.27, 0.43),
        ),
    ):
        ratios = [held_against(POINTS[row]).cut_size_ratios for row in rows]
        means = [exp(np.mean([np.log(each[name]) for each in ratios])) for name in names]
        assert means == pytest.approx(worked, abs=0.006)


def test_inlets_are_either_round_or_slots() -> None:
    for point in POINTS.values():
        slot = (point.slot_height, point.slot_width)
        assert (point.inlet_bore is None) == all(slot)
        assert point.inlet_bore is None or slot == (None, None)
        assert len(point.source) > 10
    assert len(POINTS) == 12
    assert sorted(POINTS[name].grade for name in GATING) == ["A", "B", "B", "B", "B"]

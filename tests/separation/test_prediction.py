"""The first forecast combines the correlations, and says that it is only that."""

from __future__ import annotations

from dataclasses import asdict, replace

import pytest
from hypothesis import given
from hypothesis import strategies as st

from gyrecut.airflow.air import AirState, air_state
from gyrecut.catalogue import families
from gyrecut.correlations.geometry import RATIOS, CycloneGeometry, scaled
from gyrecut.errors import OutOfRangeError
from gyrecut.separation.prediction import FirstPrediction, first_prediction

AIR = air_state(293.15, altitude=0.0, relative_humidity=0.0)
ROW = families()["stairmand-high-efficiency"]
BODY = scaled(
    CycloneGeometry(body_diameter=1.0, **{name: getattr(ROW, name) for name in RATIOS}),
    body_diameter=0.15,
)


def predicted(
    *,
    body: CycloneGeometry = BODY,
    flow: float = 0.03375,
    air: AirState = AIR,
    particle_density: float = 600.0,
    median: float = 30e-6,
) -> FirstPrediction:
    return first_prediction(
        body,
        flow=flow,
        air=air,
        particle_density=particle_density,
        median=median,
        spread=2.5,
    )


def test_light_wood_in_a_small_body() -> None:
    # Worked outside this program from the printed formulas, four digits, with Sutherland air of
    # 1.8133e-5 Pa s and 1.2041 kg/m3; no book has this example.
    forecast = predicted()
    assert asdict(forecast) == pytest.approx(
        {
            "inlet_velocity": 15.0,
            "cut_size_lapple": 3.972e-6,
            "pressure_drop_shepherd_lapple": 867.0,
            "mass_kept": 0.9429,
            "saltation_velocity": 6.864,
            "natural_length": 0.3716,
        },
        rel=2e-4,
    )


def test_it_holds_plain_floats() -> None:
    assert {type(value) for value in asdict(predicted()).values()} == {float}


def test_every_number_but_the_mean_velocity_names_its_method() -> None:
    assert set(FirstPrediction.methods) == set(asdict(predicted())) - {"inlet_velocity"}
    assert FirstPrediction.note.startswith("First estimate: cut size and catch by Lapple, ")


@given(
    st.floats(min_value=100.0, max_value=3000.0),
    st.floats(min_value=5e-6, max_value=300e-6),
)
def test_more_is_kept_of_denser_and_of_coarser_dust(density: float, median: float) -> None:
    here = predicted(particle_density=density, median=median).mass_kept
    assert predicted(particle_density=1.2 * density, median=median).mass_kept > here
    assert predicted(particle_density=density, median=1.2 * median).mass_kept > here


@given(st.floats(min_value=0.02, max_value=0.06))
def test_more_flow_is_caught_finer_and_costs_more(flow: float) -> None:
    here, there = predicted(flow=flow), predicted(flow=1.1 * flow)
    assert there.cut_size_lapple < here.cut_size_lapple
    assert there.mass_kept > here.mass_kept
    assert there.pressure_drop_shepherd_lapple == pytest.approx(
        1.21 * here.pressure_drop_shepherd_lapple, rel=1e-12
    )


def test_thin_air_costs_less_pressure() -> None:
    thin = air_state(293.15, altitude=2000.0, relative_humidity=0.0)
    share = (
        predicted(air=thin).pressure_drop_shepherd_lapple
        / predicted().pressure_drop_shepherd_lapple
    )
    assert share == pytest.approx(thin.density / AIR.density, rel=1e-12)


def test_a_body_far_too_small_for_the_flow_is_refused() -> None:
    with pytest.raises(OutOfRangeError, match="inlet velocity is 133"):
        predicted(flow=0.3)
    with pytest.raises(OutOfRangeError, match=r"finder diameter over body diameter is 1\.33"):
        predicted(body=replace(BODY, finder_diameter=0.2))

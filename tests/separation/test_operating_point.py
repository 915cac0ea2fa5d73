"""Where source and air path meet: by another solver, by hand, and from the profile."""

from __future__ import annotations

from itertools import accumulate
from math import pi
from typing import TYPE_CHECKING

import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.optimize import brentq
from tests.correlations.shapes import cyclone
from tests.separation.machines import AIR, HIGH_EFFICIENCY, STAGE, beside_hose, changed

from gyrecut.airflow.air import STANDARD_PRESSURE, AirState
from gyrecut.airflow.elements import Filter, Hose, OutletDuct, PickUp
from gyrecut.airflow.suction import suction_curve_from_ends, suction_curve_from_points
from gyrecut.airflow.system import SystemCurve
from gyrecut.correlations.consensus import central_heads
from gyrecut.correlations.shepherd_lapple import inlet_velocity_heads_shepherd_lapple
from gyrecut.errors import UnbuildableError
from gyrecut.pipeline import design
from gyrecut.profile.dust import dust_of
from gyrecut.separation.air_path import Cyclones, hose_bore, pick_up_of, suction_source
from gyrecut.separation.operating_point import point_at, settle
from gyrecut.separation.outlook import sizing_flow

if TYPE_CHECKING:
    from pathlib import Path

    from gyrecut.airflow.suction import SuctionCurve
    from gyrecut.separation.operating_point import OperatingPoint

FROM_SOURCE = ("flow: 140 m3/h", "source: {shut_off: 18 kPa, open_flow: 150 m3/h, exponent: 1.2}")
PLAIN_AIR = AirState(
    temperature=293.15,
    pressure=STANDARD_PRESSURE,
    relative_humidity=0.5,
    density=1.2,
    viscosity=1.81e-5,
)
BY_HAND = SystemCurve(
    elements=(
        ("pick-up", PickUp(entry_loss=0.93, area=pi / 4 * 0.05**2, relief_area=0.0, choked=0.0)),
        ("hose", Hose(bore=0.05, length=4.0, roughness=0.0, wall_factor=1.0, bends=0)),
        ("separator", Cyclones(heads=6.0, slot_area=0.0025)),
        ("outlet", OutletDuct(bore=0.063, length=0.0, roughness=0.0, heads_lost=1.0)),
    )
)


def another_solver(source: SuctionCurve, system: SystemCurve) -> float:
    def spare(flow: float) -> float:
        return float(source.suction(flow)) - float(system.pressure_drop(flow, air=AIR))

    return float(brentq(spare, 0.0, source.open_flow, xtol=1e-15, rtol=1e-14))


def share(point: OperatingPoint, name: str) -> float:
    (found,) = (float(one.pressure_drop) for one in point.shares if one.name == name)
    return found


@given(
    shut_off=st.floats(min_value=500.0, max_value=25e3),
    open_flow=st.floats(min_value=0.01, max_value=0.3),
    exponent=st.floats(min_value=1.0, max_value=3.0),
    bore=st.floats(min_value=0.025, max_value=0.15),
    length=st.floats(min_value=0.1, max_value=20.0),
    bends=st.integers(min_value=0, max_value=6),
    choked=st.floats(min_value=0.0, max_value=0.95),
    area=st.floats(min_value=0.01, max_value=5.0),
    load=st.floats(min_value=0.0, max_value=2.0),
)
def test_bisection_settles_where_another_solver_does(
    *,
    shut_off: float,
    open_flow: float,
    exponent: float,
    bore: float,
    length: float,
    bends: int,
    choked: float,
    area: float,
    load: float,
) -> None:
    source = suction_curve_from_ends(
        shut_off=shut_off, open_flow=open_flow, exponent=exponent, air_density=1.2
    )
    cloth = Filter(area=area, clean_resistance=1500.0, cake_resistance=1e5, cake_load=load)
    system = SystemCurve(
        elements=(
            (
                "pick-up",
                PickUp(entry_loss=0.93, area=pi / 4 * bore**2, relief_area=1e-4, choked=choked),
            ),
            ("hose", Hose(bore=bore, length=length, roughness=1e-5, wall_factor=3.0, bends=bends)),
            ("separator", Cyclones(heads=5.0, slot_area=bore**2 / 2)),
            ("filter", cloth),
        )
    )
    flow = settle(source, system, air=AIR)
    assert flow == pytest.approx(another_solver(source, system), rel=1e-9)
    assert 0 < flow < open_flow
    assert float(source.suction(flow)) == pytest.approx(
        float(system.pressure_drop(flow, air=AIR)), rel=1e-6
    )


@given(
    steps=st.lists(st.floats(min_value=2e-3, max_value=0.02), min_size=2, max_size=6),
    fall=st.floats(min_value=100.0, max_value=4e3),
)
def test_so_it_does_on_a_curve_of_measured_points(steps: list[float], fall: float) -> None:
    flows = list(accumulate(steps))
    source = suction_curve_from_points(
        flows=flows,
        suctions=[fall * (len(flows) - number) for number in range(len(flows))],
        air_density=1.2,
    )
    assert settle(source, BY_HAND, air=AIR) == pytest.approx(
        another_solver(source, BY_HAND), rel=1e-9
    )


def test_a_machine_worked_by_hand() -> None:
    # At 0.04 m3/s, air of 1.2 kg/m3 and 1.81e-5 Pa s, all steps by hand:
    # hose   50 mm: 1.9635e-3 m2, 20.372 m/s, one head 249.01 Pa
    # pick-up 0.93 heads                                       231.58 Pa
    # hose   Re = 1.2 * 20.372 * 0.05 / 1.81e-5 = 67 531; smooth wall after Prandtl,
    #        1/sqrt f = 2 lg(Re sqrt f) - 0.8: f = 0.01956;
    #        0.01956 * 4 / 0.05 = 1.5648 heads                 389.65 Pa
    # separator 16 m/s in 25 cm2, 153.6 Pa a head, 6 heads     921.60 Pa
    # outlet 63 mm: 3.1172e-3 m2, 12.832 m/s, one head          98.80 Pa
    # together                                                1641.63 Pa
    # A straight source of 0.05 m3/s gives a fifth of its shut-off suction there: 8208.2 Pa.
    source = suction_curve_from_ends(shut_off=8208.2, open_flow=0.05, exponent=1.0, air_density=1.2)
    flow = settle(source, BY_HAND, air=PLAIN_AIR)
    # The program's explicit friction formula is within 1 % of Prandtl's law: 3.9 Pa, and where
    # source and system cross at 246 kPa s/m3, 1.6e-5 m3/s.
    assert flow == pytest.approx(0.04, rel=4e-4)
    point = point_at(flow, BY_HAND, suction=float(source.suction(flow)), bore=0.05, air=PLAIN_AIR)
    assert point.suction == pytest.approx(1641.63, rel=2.5e-3)
    assert point.hose_velocity == pytest.approx(20.372, rel=1e-3)
    by_hand = {"pick-up": 231.58, "hose": 389.65, "separator": 921.60, "outlet": 98.80}
    for name, pressure in by_hand.items():
        assert share(point, name) == pytest.approx(pressure, rel=1e-2 if name == "hose" else 1e-3)
    # static suction behind the pick-up: its loss and one head of the hose, 231.58 + 249.01
    assert point.tool_suction == pytest.approx(480.59, rel=1e-3)
    assert point.air_power == pytest.approx(0.04 * 480.59, rel=1e-3)


def test_a_straight_source_on_fixed_losses_has_a_closed_answer() -> None:
    # p0 (1 - Q/Q0) = K Q^2 is a quadratic: Q = (-p0/Q0 + sqrt((p0/Q0)^2 + 4 K p0)) / (2 K)
    system = SystemCurve(elements=(("separator", Cyclones(heads=8.0, slot_area=0.002)),))
    coefficient = 8.0 * 1.2 / 2 / 0.002**2
    source = suction_curve_from_ends(shut_off=5000.0, open_flow=0.06, exponent=1.0, air_density=1.2)
    slope = 5000.0 / 0.06
    exact = (-slope + (slope**2 + 4 * coefficient * 5000.0) ** 0.5) / (2 * coefficient)
    assert settle(source, system, air=PLAIN_AIR) == pytest.approx(exact, rel=1e-12)


def test_a_target_flow_says_what_the_source_must_supply(tmp_path: Path) -> None:
    of = design(changed(tmp_path, beside_hose("filter: {area: 0.5 m2, class: M}"))).forecast
    assert of.flow_is_target
    assert of.flow == of.clean.flow == pytest.approx(140 / 3600)
    parts = [one.name for one in of.clean.shares]
    assert parts == [
        *("pick-up", "hose", "transition", "separator", "outlet", "outlet cuff", "filter")
    ]
    assert of.clean.suction == pytest.approx(sum(share(of.clean, name) for name in parts))
    # the catalogue's class M: 1500 Pa s/m, at 0.0778 m/s, with the viscosity of 20 degC
    assert share(of.clean, "filter") == pytest.approx(1500 * 140 / 3600 / 0.5, rel=5e-3)


def test_the_suction_to_choose_a_source_by_has_the_separator_after_shepherd_and_lapple(
    tmp_path: Path,
) -> None:
    of = design(changed(tmp_path))
    geometry = of.stages[0].geometry
    slot = float(geometry.slot_height * geometry.slot_width)
    head = of.air.density / 2 * (of.forecast.flow / slot) ** 2
    by_shepherd = float(inlet_velocity_heads_shepherd_lapple(geometry)) * head
    expected = of.forecast.clean.suction - share(of.forecast.clean, "separator") + by_shepherd
    assert of.forecast.safe_suction == pytest.approx(expected, rel=1e-12)
    assert by_shepherd > share(of.forecast.clean, "separator")


def test_suction_at_the_tool_counts_the_step_behind_a_narrow_nozzle(tmp_path: Path) -> None:
    nozzle = beside_hose("pick_up: {kind: nozzle, diameter: 25 mm}")
    of = design(changed(tmp_path, nozzle))
    point = of.forecast.clean
    head = of.air.density / 2 * point.hose_velocity**2
    losses = share(point, "pick-up") + share(point, "step to the hose")
    assert share(point, "step to the hose") > 100
    assert point.tool_suction == pytest.approx(losses + head, rel=1e-12)


@pytest.mark.parametrize(
    ("stages", "slots", "inlets"),
    [
        (STAGE, [], [18.0]),
        (f"proportions: {HIGH_EFFICIENCY}\n    body_diameter: 140 mm", [0.1 * 0.14**2], []),
        (
            f"proportions: {HIGH_EFFICIENCY}\n    body_diameter: 100 mm\n    count: 2",
            [2 * 0.1 * 0.1**2],
            [],
        ),
        (
            f"proportions: {HIGH_EFFICIENCY}\n    body_diameter: 150 mm\n  - {STAGE}\n    count: 3",
            [0.1 * 0.15**2],
            [18.0],
        ),
    ],
)
def test_a_source_alone_sizes_at_the_flow_of_the_same_equation(
    tmp_path: Path, stages: str, slots: list[float], inlets: list[float]
) -> None:
    filtered = beside_hose("filter: {area: 0.5 m2, class: M}")
    profile = changed(tmp_path, FROM_SOURCE, filtered, (STAGE, stages))
    of = design(profile)
    dust, air = dust_of(profile.dust), of.air
    found = sizing_flow(profile, dust=dust, air=air)
    source = suction_source(profile, air)
    assert source is not None
    heads = float(central_heads(cyclone(HIGH_EFFICIENCY, 1.0)))

    def spare(flow: float) -> float:
        bore = hose_bore(profile)
        hose = Hose(bore=bore, length=3.0, roughness=1e-5, wall_factor=3.0, bends=2)
        path = float(pick_up_of(profile, 0.0).pressure_drop(flow, air=air))
        path += float(hose.pressure_drop(flow, air=air))
        path += 1500.0 * flow / 0.5 * air.viscosity / 1.81e-5
        squares = [inlet**2 for inlet in inlets] + [(flow / slot) ** 2 for slot in slots]
        path += heads * air.density / 2 * sum(squares)
        return float(source.suction(flow)) - path

    assert found == pytest.approx(brentq(spare, 0.0, source.open_flow, xtol=1e-14), rel=1e-9)
    # what comes on top, once the bodies have a size, are transition and outlet
    assert 0.9 * found < of.forecast.flow < found
    assert not of.forecast.flow_is_target
    assert of.forecast.clean.suction == pytest.approx(
        sum(float(one.pressure_drop) for one in of.forecast.clean.shares), rel=1e-9
    )


def test_a_source_alone_cannot_size_for_a_cut_size(tmp_path: Path) -> None:
    by_cut = changed(tmp_path, FROM_SOURCE, ("inlet_velocity: 18 m/s", "cut_size: 3 um"))
    with pytest.raises(UnbuildableError, match=r"needs air\.flow"):
        design(by_cut)


def test_a_source_in_thin_air_pulls_less_in_proportion(tmp_path: Path) -> None:
    low = design(changed(tmp_path, FROM_SOURCE))
    high = design(changed(tmp_path, FROM_SOURCE, beside_hose("altitude: 2000 m")))
    curves = [suction_source(of.profile, of.air) for of in (low, high)]
    assert all(curve is not None for curve in curves)
    ratio = curves[1].shut_off / curves[0].shut_off if curves[0] and curves[1] else 0.0
    assert ratio == pytest.approx(high.air.density / low.air.density, rel=1e-12)
    # quadratic losses and a source that both go with the density: nearly the same flow
    assert high.forecast.flow == pytest.approx(low.forecast.flow, rel=0.02)
    assert high.forecast.clean.suction < 0.85 * low.forecast.clean.suction


def test_a_filter_at_its_limit_and_a_choked_pick_up_take_flow(tmp_path: Path) -> None:
    loaded_filter = beside_hose("filter: {area: 0.5 m2, class: M, limit: 3 kPa}")
    of = design(changed(tmp_path, FROM_SOURCE, loaded_filter)).forecast
    assert of.loaded is not None
    for point in (of.choked, of.loaded):
        assert point.flow < of.clean.flow
        assert point.suction > of.clean.suction
        assert point.suction == pytest.approx(
            sum(float(one.pressure_drop) for one in point.shares), rel=1e-9
        )
        assert point.hose_velocity == pytest.approx(
            of.clean.hose_velocity * point.flow / of.clean.flow, rel=1e-12
        )
    # the filter is let come to 3 kPa at the flow that is left
    assert share(of.loaded, "filter") == pytest.approx(3000)
    # four fifths covered: a fifth of the opening, and a jet that is lost: 0.93 + 0.8^2 heads in it
    bore = 0.038
    jet = of.choked.flow / (0.2 * pi / 4 * bore**2)
    assert share(of.choked, "pick-up") == pytest.approx(
        (0.93 + 0.64) * AIR.density / 2 * jet**2, rel=1e-6
    )


def test_choked_without_a_source_keeps_the_suction_and_gives_way(tmp_path: Path) -> None:
    of = design(changed(tmp_path)).forecast
    assert of.choked.suction == pytest.approx(of.clean.suction)
    assert of.choked.flow < of.clean.flow
    assert sum(float(one.pressure_drop) for one in of.choked.shares) == pytest.approx(
        of.clean.suction, rel=1e-9
    )
    assert of.loaded is None

"""The parts of a duct: how their losses scale, where they end, and that they add up."""

from __future__ import annotations

from dataclasses import replace
from math import pi
from typing import TYPE_CHECKING, Any

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from gyrecut.airflow.air import air_state
from gyrecut.airflow.elements import (
    ENTRY_LOSSES,
    SHARP_LOSS,
    BellMouth,
    Filter,
    Hose,
    OutletDuct,
    PickUp,
    Transition,
)
from gyrecut.airflow.friction import (
    CORRUGATED_FACTOR,
    SMOOTH_PLASTIC,
    bend_loss_hose,
    friction_factor_churchill,
    friction_loss,
)
from gyrecut.airflow.system import SystemCurve
from gyrecut.errors import OutOfRangeError

if TYPE_CHECKING:
    from gyrecut.airflow.system import Element

AIR = air_state(293.15, altitude=0.0, relative_humidity=0.5)
THIN = air_state(293.15, altitude=2000.0, relative_humidity=0.5)

NOZZLE = PickUp(entry_loss=0.93, area=8e-4, relief_area=0.0, choked=0.0)
HOSE = Hose(
    bore=0.038, length=3.0, roughness=SMOOTH_PLASTIC, wall_factor=CORRUGATED_FACTOR, bends=2
)
WIDER = Transition(from_bore=0.038, to_bore=0.05, included_angle=0.4)
NARROWER = Transition(from_bore=0.05, to_bore=0.038, included_angle=0.4)
CLOTH = Filter(area=0.5, clean_resistance=1500.0, cake_resistance=2.5e5, cake_load=0.02)
BELL = BellMouth(bore=0.03, radius_ratio=0.1, end_wall=True)
BOX = OutletDuct(bore=0.05, length=0.0, roughness=SMOOTH_PLASTIC, heads_lost=1.0)
OUT = replace(BOX, length=0.2)

FIXED: list[Element] = [NOZZLE, replace(NOZZLE, relief_area=1e-4, choked=0.7), WIDER, NARROWER]
FIXED += [BELL, BOX]
EVERY: list[Element] = [*FIXED, HOSE, CLOTH, OUT]
FLOWS = st.floats(min_value=1e-4, max_value=0.06)


@pytest.mark.parametrize("element", FIXED, ids=repr)
@given(flow=FLOWS)
def test_a_fixed_loss_goes_with_density_and_the_square_of_the_flow(
    element: Element, flow: float
) -> None:
    drop = element.pressure_drop(flow, air=AIR)
    assert drop > 0
    assert element.pressure_drop(2 * flow, air=AIR) == pytest.approx(4 * drop, rel=1e-12)
    assert element.pressure_drop(flow, air=THIN) == pytest.approx(
        drop * THIN.density / AIR.density, rel=1e-12
    )


@pytest.mark.parametrize("element", EVERY, ids=repr)
@given(flow=FLOWS)
def test_more_flow_always_costs_more(element: Element, flow: float) -> None:
    # in the transition to turbulence friction rises fastest; nowhere may it fall
    assert element.pressure_drop(1.02 * flow, air=AIR) > element.pressure_drop(flow, air=AIR)


@pytest.mark.parametrize("element", EVERY, ids=repr)
def test_still_air_costs_nothing_and_arrays_go_through(element: Element) -> None:
    flows = np.array([[0.0, 0.01, 0.02], [0.03, 0.04, 0.05]])
    drops = np.asarray(element.pressure_drop(flows, air=AIR))
    assert drops.shape == (2, 3)
    assert drops[0, 0] == element.pressure_drop(0.0, air=AIR) == 0.0
    assert drops[1, 0] == pytest.approx(float(element.pressure_drop(0.03, air=AIR)), rel=1e-14)


@given(FLOWS)
def test_a_filter_goes_with_the_flow_and_not_with_density(flow: float) -> None:
    drop = CLOTH.pressure_drop(flow, air=AIR)
    assert CLOTH.pressure_drop(2 * flow, air=AIR) == pytest.approx(2 * drop)
    assert CLOTH.pressure_drop(flow, air=THIN) == pytest.approx(drop)
    clean = replace(CLOTH, cake_load=0.0).pressure_drop(flow, air=AIR)
    double = replace(CLOTH, cake_load=0.04).pressure_drop(flow, air=AIR)
    assert double - drop == pytest.approx(drop - clean)


def test_a_pick_up_is_its_entry_loss_in_heads() -> None:
    head = AIR.density / 2 * (0.02 / 8e-4) ** 2
    assert NOZZLE.pressure_drop(0.02, air=AIR) == pytest.approx(0.93 * head)
    assert set(ENTRY_LOSSES) == {"nozzle", "hood", "open-hose"}


@given(FLOWS, st.floats(min_value=0.0, max_value=0.95))
def test_a_choked_pick_up_costs_more_and_a_relief_notch_less(flow: float, choked: float) -> None:
    here = replace(NOZZLE, choked=choked)
    drop = here.pressure_drop(flow, air=AIR)
    assert replace(here, choked=choked + 0.04).pressure_drop(flow, air=AIR) > drop
    assert replace(here, relief_area=1e-5).pressure_drop(flow, air=AIR) < drop


def test_a_choked_pick_up_breathes_through_its_notch_alone() -> None:
    blocked = replace(NOZZLE, choked=1.0, relief_area=1e-4)
    head = AIR.density / 2 * (0.005 / 1e-4) ** 2
    assert blocked.pressure_drop(0.005, air=AIR) == pytest.approx(SHARP_LOSS * head)


def test_with_no_way_in_nothing_flows() -> None:
    shut = replace(NOZZLE, choked=1.0)
    assert shut.pressure_drop(0.0, air=AIR) == 0.0
    assert shut.pressure_drop(np.array([0.0, 1e-6]), air=AIR) == pytest.approx([0.0, np.inf])


def test_two_openings_share_the_flow_so_that_both_lose_the_same() -> None:
    both = replace(NOZZLE, relief_area=2e-4)
    drop = float(both.pressure_drop(0.02, air=AIR))
    through_notch = 2e-4 * (2 * drop / AIR.density / SHARP_LOSS) ** 0.5
    through_nozzle = 8e-4 * (2 * drop / AIR.density / 0.93) ** 0.5
    assert through_notch + through_nozzle == pytest.approx(0.02)


def test_a_transition_without_a_step_costs_nothing() -> None:
    same = Transition(from_bore=0.05, to_bore=0.05, included_angle=pi)
    assert same.pressure_drop(0.03, air=AIR) == 0.0


def test_a_duct_into_a_large_box_loses_its_head_by_either_part() -> None:
    into = Transition(from_bore=0.05, to_bore=5.0, included_angle=pi)
    assert into.pressure_drop(0.03, air=AIR) == pytest.approx(
        float(BOX.pressure_drop(0.03, air=AIR)), rel=1e-3
    )


@given(FLOWS)
def test_a_hose_is_its_friction_and_its_bends(flow: float) -> None:
    straight = replace(HOSE, bends=0)
    longer = replace(straight, length=6.0)
    smooth = replace(straight, wall_factor=1.0)
    drop = float(straight.pressure_drop(flow, air=AIR))
    assert longer.pressure_drop(flow, air=AIR) == pytest.approx(2 * drop)
    assert smooth.pressure_drop(flow, air=AIR) == pytest.approx(drop / CORRUGATED_FACTOR)
    head = AIR.density / 2 * (flow / (pi / 4 * 0.038**2)) ** 2
    bends = 2 * float(bend_loss_hose(0.038)) * head
    assert HOSE.pressure_drop(flow, air=AIR) == pytest.approx(drop + bends)


@given(st.floats(min_value=1.0, max_value=1e8), st.floats(min_value=0.0, max_value=0.05))
def test_a_rougher_wall_never_rubs_less(reynolds: float, roughness: float) -> None:
    smoother = friction_factor_churchill(reynolds, relative_roughness=roughness)
    rougher = friction_factor_churchill(reynolds, relative_roughness=2 * roughness)
    # at the turn from laminar flow the fit wavers by parts in a thousand
    assert rougher >= smoother * (1 - 5e-3)


def test_friction_has_no_step_where_creeping_flow_begins() -> None:
    one = AIR.viscosity / AIR.density / 0.038  # m/s, at a Reynolds number of 1
    below, above = (
        friction_loss(one * factor, bore=0.038, length=1.0, roughness=0.0, air=AIR)
        for factor in (1 - 1e-9, 1 + 1e-9)
    )
    assert above == pytest.approx(float(below), rel=1e-6)


def test_the_way_costs_what_its_parts_cost() -> None:
    parts = (("nozzle", NOZZLE), ("hose", HOSE), ("step", WIDER), ("filter", CLOTH), ("box", BOX))
    system = SystemCurve(elements=parts)
    flows = np.array([0.0, 0.01, 0.03])
    shares = system.shares(flows, air=AIR)
    assert [share.name for share in shares] == ["nozzle", "hose", "step", "filter", "box"]
    total = np.sum(np.array([share.pressure_drop for share in shares]), axis=0)
    assert system.pressure_drop(flows, air=AIR) == pytest.approx(total)
    assert system.pressure_drop(0.03, air=AIR) == pytest.approx(total[2])
    assert SystemCurve(elements=()).pressure_drop(0.03, air=AIR) == 0.0


@pytest.mark.parametrize(
    ("element", "change", "message"),
    [
        (NOZZLE, {"area": 0.0}, "opening of the pick-up is 0 "),
        (NOZZLE, {"choked": 1.5}, r"choked share of the pick-up is 1\.5 "),
        (NOZZLE, {"relief_area": -1e-4}, "relief opening of the pick-up is -0.0001 "),
        (NOZZLE, {"entry_loss": -0.1}, r"loss coefficient is -0\.1 "),
        (HOSE, {"bore": 38.0}, "hose bore is 38 m"),
        (HOSE, {"length": -1.0}, "length of the hose is -1 m"),
        (HOSE, {"wall_factor": 0.5}, r"friction of the hose .* is 0\.5 "),
        (HOSE, {"roughness": 0.01}, r"roughness over bore is 0\.263"),
        (HOSE, {"bends": -1}, "number of bends is -1 "),
        (WIDER, {"to_bore": 0.0}, "hose bore is 0 m"),
        (CLOTH, {"area": 0.0}, "filter area is 0 "),
        (CLOTH, {"cake_load": -1.0}, "dust on the filter is -1 "),
        (BELL, {"radius_ratio": -1.0}, "bell-mouth radius over bore is -1 "),
        (OUT, {"heads_lost": -1.0}, "loss coefficient is -1 "),
    ],
)
def test_parts_that_cannot_be_are_refused(
    element: Any,  # noqa: ANN401 - each part has fields of its own
    change: dict[str, float],
    message: str,
) -> None:
    with pytest.raises(OutOfRangeError, match=f"^{message}"):
        replace(element, **change).pressure_drop(0.01, air=AIR)


@pytest.mark.parametrize("element", EVERY, ids=repr)
def test_a_flow_backwards_is_refused(element: Element) -> None:
    with pytest.raises(OutOfRangeError, match=r"^air flow is -0\.01 "):
        element.pressure_drop(-0.01, air=AIR)


@pytest.mark.parametrize("bore", [0.014, 0.31])
def test_a_bend_outside_the_table_is_refused(bore: float) -> None:
    with pytest.raises(OutOfRangeError, match="bore of the bend is"):
        bend_loss_hose(bore)

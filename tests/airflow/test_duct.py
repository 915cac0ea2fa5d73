"""Entries, transitions and velocities: round trips, limits, refusals."""

from __future__ import annotations

from math import pi
from typing import TYPE_CHECKING

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from gyrecut.airflow.conveying import flow_for_velocity, mean_velocity, velocity_head
from gyrecut.airflow.entries import entry_loss_bell_mouth, radius_ratio_for_entry_loss
from gyrecut.airflow.transitions import contraction_loss_crane, expansion_loss_crane
from gyrecut.errors import OutOfRangeError

if TYPE_CHECKING:
    from collections.abc import Callable

    from gyrecut.airflow.ranges import Numbers


@given(ratio=st.floats(min_value=0.0, max_value=0.2), end_wall=st.booleans())
def test_radius_and_loss_of_a_bell_mouth_are_a_round_trip(*, ratio: float, end_wall: bool) -> None:
    loss = entry_loss_bell_mouth(ratio, end_wall=end_wall)
    assert radius_ratio_for_entry_loss(loss, end_wall=end_wall) == pytest.approx(ratio, abs=1e-12)


@given(ratio=st.floats(min_value=0.0, max_value=1.0), end_wall=st.booleans())
def test_a_rounder_bell_never_loses_more(*, ratio: float, end_wall: bool) -> None:
    assert entry_loss_bell_mouth(ratio / 2, end_wall=end_wall) >= entry_loss_bell_mouth(
        ratio, end_wall=end_wall
    )


@given(st.floats(min_value=0.0, max_value=0.199))
def test_an_end_wall_never_makes_it_worse(ratio: float) -> None:
    walled = entry_loss_bell_mouth(ratio, end_wall=True)
    assert walled <= entry_loss_bell_mouth(ratio, end_wall=False)


def test_a_bell_mouth_outside_the_table_is_refused() -> None:
    with pytest.raises(OutOfRangeError, match=r"bell-mouth radius over bore is -0\.01"):
        entry_loss_bell_mouth(-0.01, end_wall=True)
    with pytest.raises(OutOfRangeError, match=r"coefficient is 0\.02 -; allowed 0\.03 to 0\.5"):
        radius_ratio_for_entry_loss(0.02, end_wall=True)
    with pytest.raises(OutOfRangeError, match=r"coefficient is 0\.6 -; allowed 0\.03 to 0\.5"):
        radius_ratio_for_entry_loss(0.6, end_wall=True)


def test_a_duct_that_keeps_its_bore_loses_nothing() -> None:
    for angle in (0.1, pi / 2, pi):
        assert expansion_loss_crane(area_ratio=1.0, included_angle=angle) == 0
        assert contraction_loss_crane(area_ratio=1.0, included_angle=angle) == 0


def test_sudden_steps_are_the_classical_limits() -> None:
    # Borda-Carnot, and the flush sharp-edged entry from a room: both exact limits.
    assert expansion_loss_crane(area_ratio=0.25, included_angle=pi) == pytest.approx(0.75**2)
    assert contraction_loss_crane(area_ratio=0.0, included_angle=pi) == pytest.approx(0.5)


def test_transitions_take_arrays() -> None:
    angles = np.radians([10.0, 45.0, 46.0, 180.0])
    losses = np.asarray(expansion_loss_crane(area_ratio=0.5, included_angle=angles))
    assert losses.shape == (4,)
    assert np.all(np.diff(losses) >= 0)


@pytest.mark.parametrize("loss", [expansion_loss_crane, contraction_loss_crane])
def test_transitions_outside_are_refused(loss: Callable[..., Numbers]) -> None:
    with pytest.raises(OutOfRangeError, match=r"smaller over larger duct area is 1\.2"):
        loss(area_ratio=1.2, included_angle=0.2)
    with pytest.raises(OutOfRangeError, match="included angle of the transition is 30 rad"):
        loss(area_ratio=0.5, included_angle=30.0)


@given(st.floats(min_value=0.01, max_value=60.0), st.floats(min_value=0.01, max_value=0.5))
def test_flow_and_velocity_are_a_round_trip(velocity: float, bore: float) -> None:
    flow = flow_for_velocity(velocity=velocity, bore=bore)
    assert mean_velocity(flow=flow, bore=bore) == pytest.approx(velocity, rel=1e-12)


def test_one_cubic_metre_a_second_through_one_square_metre() -> None:
    assert mean_velocity(flow=1.0, bore=(4.0 / pi) ** 0.5) == pytest.approx(1.0)


def test_a_bore_in_millimetres_is_refused() -> None:
    with pytest.raises(OutOfRangeError, match=r"hose bore is 38 m; allowed 0\.001 to 5 m"):
        mean_velocity(flow=0.05, bore=38.0)


def test_a_velocity_head_grows_with_the_square() -> None:
    head = velocity_head(velocity=20.0, air_density=1.2)
    assert head == 240.0
    assert velocity_head(velocity=40.0, air_density=1.2) == 4 * head

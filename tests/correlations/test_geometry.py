"""Dimensions that cannot be a cyclone are refused; shapes scale."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest

from gyrecut.correlations.geometry import (
    CycloneGeometry,
    body_diameter_for_inlet_velocity,
    check_geometry,
    mean_inlet_velocity,
    scaled,
)
from gyrecut.errors import OutOfRangeError

BODY = CycloneGeometry(
    body_diameter=0.2,
    slot_height=0.1,
    slot_width=0.04,
    finder_diameter=0.1,
    finder_length=0.1,
    barrel_height=0.3,
    total_height=0.8,
    dust_outlet_diameter=0.075,
)


@pytest.mark.parametrize(
    ("name", "value", "message"),
    [
        ("body_diameter", 200.0, "body diameter is 200 m"),
        ("slot_height", 0.0, "slot height over body diameter is 0 "),
        ("slot_width", 0.15, "slot width over body diameter is 0.75 "),
        ("finder_diameter", 0.2, "finder diameter over body diameter is 1 "),
        ("finder_length", -0.1, "finder length over body diameter is -0.5 "),
        ("barrel_height", float("nan"), "barrel height over body diameter is nan "),
        ("barrel_height", 0.9, "barrel height over total height is 1.125 "),
        ("finder_length", 0.9, "finder length over total height is 1.125 "),
        ("dust_outlet_diameter", 0.3, "dust outlet diameter over body diameter is 1.5 "),
        ("total_height", float("inf"), "total height over body diameter is inf "),
    ],
)
def test_impossible_dimensions_are_refused(name: str, value: float, message: str) -> None:
    with pytest.raises(OutOfRangeError, match=f"^{message}"):
        check_geometry(replace(BODY, **{name: value}))


def test_scaling_there_and_back_changes_nothing() -> None:
    back = scaled(scaled(BODY, body_diameter=0.5), body_diameter=0.2)
    assert back.body_diameter == BODY.body_diameter
    assert back.total_height == pytest.approx(BODY.total_height, rel=1e-14)
    assert back.slot_width == pytest.approx(BODY.slot_width, rel=1e-14)


def test_body_diameter_and_inlet_velocity_are_a_round_trip() -> None:
    velocities = np.array([8.0, 15.0, 25.0])
    diameters = body_diameter_for_inlet_velocity(BODY, inlet_velocity=velocities, flow=0.05)
    bodies = scaled(BODY, body_diameter=diameters)
    assert mean_inlet_velocity(bodies, flow=0.05) == pytest.approx(velocities, rel=1e-12)


def test_a_flow_that_no_slot_takes_is_refused() -> None:
    with pytest.raises(OutOfRangeError, match="inlet velocity is 250 m/s; allowed 1 to 60 m/s"):
        mean_inlet_velocity(BODY, flow=1.0)

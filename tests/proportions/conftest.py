"""Shipped profiles, and a way to change one line of them."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING

import pytest

from gyrecut.airflow.air import air_state
from gyrecut.profile import load_profile
from gyrecut.profile.dust import dust_of
from gyrecut.proportions.proportioning import proportion

if TYPE_CHECKING:
    from gyrecut.profile import Profile
    from gyrecut.proportions.dimensions import Dimensions

PROFILES = Path(__file__).parents[2] / "profiles"


def shipped(name: str) -> Profile:
    """A shipped profile at its target flow: what a source would make of it is not asked here."""
    profile = load_profile(PROFILES / f"{name}.yaml")
    return profile.model_copy(update={"air": profile.air.model_copy(update={"source": None})})


def with_stage(profile: Profile, **changes: object) -> Profile:
    plain = {"inlet_velocity": None, "body_diameter": None, "cut_size": None, "fit_pieces": None}
    stage = profile.stages[0].model_copy(update=plain | changes)
    return profile.model_copy(update={"stages": (stage,)})


def with_printer(profile: Profile, **changes: object) -> Profile:
    return profile.model_copy(update={"printer": profile.printer.model_copy(update=changes)})


def with_hose(profile: Profile, **changes: object) -> Profile:
    hose = profile.air.hose.model_copy(update=changes)
    return profile.model_copy(update={"air": profile.air.model_copy(update={"hose": hose})})


def dimensions_of(profile: Profile) -> Dimensions:
    air = air_state(293.15, altitude=0.0, relative_humidity=0.5)
    stage, flow = profile.stages[0], profile.air.flow
    assert flow is not None
    return proportion(profile, stage, flow=flow / stage.count, air=air, dust=dust_of(profile.dust))


@pytest.fixture
def luthier() -> Profile:
    return shipped("luthier-sander")


@pytest.fixture
def joinery() -> Profile:
    return shipped("joinery-planer")


@pytest.fixture(params=["luthier-sander", "joinery-planer", "casting-bench"])
def each(request: pytest.FixtureRequest) -> Profile:
    return shipped(request.param)

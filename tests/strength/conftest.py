"""The shipped luthier's separator, and what its strength depends on."""

from __future__ import annotations

from dataclasses import replace
from functools import partial
from pathlib import Path
from typing import TYPE_CHECKING

import pytest

from gyrecut.catalogue import bin_materials, fasteners, polymers
from gyrecut.pipeline import design
from gyrecut.profile import load_profile
from gyrecut.strength.inputs import StrengthInputs

if TYPE_CHECKING:
    from gyrecut.proportions.dimensions import Dimensions

PROFILES = Path(__file__).parents[2] / "profiles"
INPUTS = StrengthInputs(
    polymer=polymers()["PETG"],
    fastener=fasteners()["M4"],
    bin_material=bin_materials()["steel"],
    bin_volume=0.020,
    bin_mouth=0.260,
    bin_wall=0.8e-3,
    bulk_density=200.0,
    shut_off=2500.0,
    open_flow=0.3,
    assumed_source="",
    relief_setting=None,
    working_suction=None,
    air_temperature=293.15,
    air_density=1.2,
)


inputs_with = partial(replace, INPUTS)


def dimensions_of(name: str) -> Dimensions:
    return design(load_profile(PROFILES / f"{name}.yaml")).stages[0].dimensions


@pytest.fixture(scope="session")
def luthier() -> Dimensions:
    return dimensions_of("luthier-sander")


@pytest.fixture(scope="session")
def joinery() -> Dimensions:
    return dimensions_of("joinery-planer")

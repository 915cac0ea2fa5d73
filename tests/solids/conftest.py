"""Designs of the shipped profiles, made once."""

from __future__ import annotations

from functools import cache
from pathlib import Path
from typing import TYPE_CHECKING

import pytest

from gyrecut import pipeline
from gyrecut.profile import load_profile
from gyrecut.solids import Parts, make_parts

if TYPE_CHECKING:
    from gyrecut.proportions.dimensions import Dimensions

PROFILES = Path(__file__).parents[2] / "profiles"
NAMES = ("luthier-sander", "joinery-planer", "casting-bench")


@cache
def _made(name: str) -> tuple[Dimensions, Parts]:
    dimensions = pipeline.design(load_profile(PROFILES / f"{name}.yaml")).stages[0].dimensions
    return dimensions, make_parts(dimensions)


@pytest.fixture(params=NAMES)
def made(request: pytest.FixtureRequest) -> tuple[Dimensions, Parts]:
    """Dimensions and parts of each shipped profile."""
    return _made(request.param)

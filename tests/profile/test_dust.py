"""The dust a profile means, and its sizes against the distributions that separation uses."""

from __future__ import annotations

from typing import Any

import pytest

from gyrecut.catalogue import dusts
from gyrecut.correlations.size_distributions import (
    RosinRammler,
    SieveTable,
    equivalent_log_normal,
)
from gyrecut.profile.dust import UNKNOWN_SHAPE_FACTOR, dust_of
from gyrecut.profile.models import DustFeed

OWN = {"particle_density": "700 kg/m3", "bulk_density": "150 kg/m3", "largest_chip": "5 mm"}


def dust(**keys: Any) -> DustFeed:  # noqa: ANN401 - as a person writes them
    return DustFeed.model_validate(keys)


def test_a_kind_alone_is_the_row_of_the_catalogue() -> None:
    assert dust_of(dust(kind="plaster")) == dusts()["plaster"]


def test_own_values_stand_before_those_of_the_kind() -> None:
    meant = dust_of(dust(kind="plaster", median="20 um", shape_factor=1.5))
    assert (meant.median, meant.shape_factor) == (20e-6, 1.5)
    assert (meant.spread, meant.cake_resistance) == (2.5, dusts()["plaster"].cake_resistance)


def test_an_own_dust_is_taken_for_the_worse() -> None:
    meant = dust_of(dust(**OWN, median="30 um", spread=2.5))
    assert meant.combustible
    assert meant.shape_factor == UNKNOWN_SHAPE_FACTOR > 1
    assert meant.cake_resistance == max(row.cake_resistance for row in dusts().values())
    assert dust_of(dust(**OWN, median="30 um", spread=2.5, shape_factor=1)).shape_factor == 1


def test_log_normal_sizes_are_the_same_as_median_and_spread() -> None:
    short = dust_of(dust(kind="saw-dust", median="30 um", spread=2.5))
    of = {"kind": "log-normal", "median": "30 um", "spread": 2.5}
    long = dust_of(dust(kind="saw-dust", distribution=of))
    assert long.median == pytest.approx(short.median, rel=1e-14)
    assert long.spread == pytest.approx(short.spread, rel=1e-14)


def test_rosin_rammler_sizes_become_the_nearest_median_and_spread() -> None:
    of = {"kind": "rosin-rammler", "size": "50 um", "exponent": 1.2}
    meant = dust_of(dust(**OWN, distribution=of))
    nearest = equivalent_log_normal(RosinRammler(size=50e-6, exponent=1.2))
    assert meant.median == pytest.approx(nearest.median, rel=1e-12)
    assert meant.spread == pytest.approx(nearest.spread, rel=1e-12)


@pytest.mark.parametrize(
    ("sizes", "undersize"),
    [
        ((20, 63, 125, 250), (5, 20, 70, 99)),
        ((63, 125), (40, 60)),  # both ends of the middle 68 % lie beyond the sieves
        ((10, 63, 125, 250), (0, 20, 84, 100)),
        ((63, 125, 250), (60, 80, 90)),
    ],
)
def test_sieves_become_the_nearest_median_and_spread(
    sizes: tuple[int, ...], undersize: tuple[int, ...]
) -> None:
    of = {
        "kind": "sieve",
        "sizes": [f"{size} um" for size in sizes],
        "undersize": [f"{share} %" for share in undersize],
    }
    meant = dust_of(dust(kind="saw-dust", distribution=of))
    table = SieveTable(
        sizes=tuple(size * 1e-6 for size in sizes),
        undersizes=tuple(share / 100 for share in undersize),
    )
    nearest = equivalent_log_normal(table)
    assert meant.median == pytest.approx(nearest.median, rel=1e-12)
    assert meant.spread == pytest.approx(nearest.spread, rel=1e-12)

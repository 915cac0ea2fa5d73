"""Size distributions against an independent library, ISO test dusts and worked numbers."""

from __future__ import annotations

from functools import partial
from math import log

import numpy as np
import pytest
from fluids.particle_size_distribution import PSDLognormal, PSDRosinRammler

from gyrecut.correlations.dust_sizes import FINE, mass_share_kept
from gyrecut.correlations.size_distributions import (
    LogNormal,
    RosinRammler,
    SieveTable,
    fit_log_normal,
    fit_rosin_rammler,
)

# ISO 12103-1:1997 (from memory, good): um, and cumulative volume % below, lowest and highest.
ISO_SIZES = (1, 2, 3, 4, 5, 7, 10, 20, 40, 80, 120)
ISO_12103_1 = {
    "A2": [
        *((2.5, 3.5), (10.5, 12.5), (18.5, 22), (25.5, 29.5), (31, 36), (41, 46), (50, 54)),
        *((70, 74), (88, 91)),
    ],
    "A3": [
        *((1, 2), (4, 5.5), (7.5, 9.5), (10.5, 13), (15, 19), (28, 33), (40, 45), (65, 69)),
        (84, 88),
    ],
    "A4": [
        *((0.6, 1), (2.2, 3.7), (4.2, 6), (6.2, 8.2), (8, 10.5), (12, 14.5), (17, 22), (32, 36)),
        *((57, 61), (87.5, 89.5), (97, 98)),
    ],
}
# Worked outside this program from the middles of these limits: median by logarithmic
# interpolation in um, size in um and exponent of the line on Rosin-Rammler paper, and its largest
# error of undersize.
WORKED = {
    "A2": (9.2, 14.2, 1.096, 0.065),
    "A3": (12.4, 18.6, 1.342, 0.079),
    "A4": (31.2, 39.5, 1.197, 0.048),
}


def iso_dust(grade: str) -> SieveTable:
    limits = ISO_12103_1[grade]
    return SieveTable(
        sizes=tuple(size * 1e-6 for size in ISO_SIZES[: len(limits)]),
        undersizes=tuple((low + high) / 200 for low, high in limits),
    )


@pytest.mark.parametrize("grade", ISO_12103_1)
def test_medians_of_the_test_dusts(grade: str) -> None:
    median, *_ = WORKED[grade]
    assert iso_dust(grade).quantile(0.5) == pytest.approx(median * 1e-6, rel=0.006)


@pytest.mark.parametrize("grade", ISO_12103_1)
def test_a_fit_misses_a_test_dust_less_than_a_line_on_paper(grade: str) -> None:
    _, size, exponent, error = WORKED[grade]
    table = iso_dust(grade)
    on_paper = RosinRammler(size=size * 1e-6, exponent=exponent)
    miss = np.abs(np.asarray(on_paper.undersize(np.array(table.sizes))) - table.undersizes)
    assert miss.max() == pytest.approx(error, abs=1e-3)  # four digits of size and exponent
    fitted = fit_rosin_rammler(table)
    assert fitted.largest_error < error
    # both describe the same dust
    assert fitted.distribution.size == pytest.approx(size * 1e-6, rel=0.1)
    assert fitted.distribution.exponent == pytest.approx(exponent, rel=0.2)


@pytest.mark.parametrize("grade", ISO_12103_1)
def test_a_table_says_more_than_either_fit_of_it(grade: str) -> None:
    table = iso_dust(grade)
    for fitted in (fit_rosin_rammler(table), fit_log_normal(table)):
        assert 0.01 < fitted.largest_error < 0.07


@pytest.mark.parametrize("grade", ISO_12103_1)
def test_a_test_dust_lies_between_its_limits(grade: str) -> None:
    table = iso_dust(grade)
    for size, (low, high) in zip(ISO_SIZES, ISO_12103_1[grade], strict=False):
        assert low / 100 <= float(table.undersize(size * 1e-6)) <= high / 100


@pytest.mark.parametrize(("median", "spread"), [(10e-6, 2.0), (30e-6, 2.5), (1.5e-3, 1.2)])
def test_log_normal_is_that_of_fluids(median: float, spread: float) -> None:
    ours = LogNormal(median=median, spread=spread)
    theirs = PSDLognormal(d_characteristic=median, s=log(spread))
    for factor in (0.05, 0.3, 1.0, 2.0, 7.0):
        expected = theirs.cdf(median * factor)
        assert ours.undersize(median * factor) == pytest.approx(expected, abs=1e-9)
    for share in (0.01, 0.1, 0.5, 0.9, 0.99):
        assert ours.quantile(share) == pytest.approx(theirs.dn(share), rel=1e-6)


@pytest.mark.parametrize(("size", "exponent"), [(50e-6, 1.2), (14e-6, 1.1), (1e-3, 2.5)])
def test_rosin_rammler_is_that_of_fluids(size: float, exponent: float) -> None:
    ours = RosinRammler(size=size, exponent=exponent)
    theirs = PSDRosinRammler(k=size**-exponent, m=exponent)  # type: ignore[no-untyped-call] # as shipped
    for factor in (0.01, 0.3, 1.0, 2.0, 4.0):
        expected = theirs.cdf(size * factor)
        assert ours.undersize(size * factor) == pytest.approx(expected, abs=1e-9)


def test_worked_quantiles_and_shares() -> None:
    # Worked outside this program with four digits.
    coarse = RosinRammler(size=50e-6, exponent=1.2)
    assert coarse.quantile(np.array([0.1, 0.5, 0.9])) == pytest.approx(
        np.array([7.665e-6, 36.84e-6, 100.2e-6]), rel=5e-4
    )
    fine = LogNormal(median=10e-6, spread=2.0)
    assert fine.undersize(np.array([5e-6, 10e-6, 30e-6])) == pytest.approx(
        [0.1587, 0.5, 0.9435], abs=5e-5
    )
    assert coarse.undersize(50e-6) == pytest.approx(0.632, abs=5e-4)  # by definition, 1 - 1/e


@pytest.mark.parametrize(
    ("cut_size", "exponent", "worked"), [(2e-6, 2, 0.9244), (5e-6, 2, 0.7367), (5e-6, 5, 0.8133)]
)
def test_worked_catch_of_a_log_normal_dust(cut_size: float, exponent: int, worked: float) -> None:
    # Worked outside this program with four digits, by a sum over 200001 sizes.
    def grade(diameter: np.ndarray, exponent: int, cut_size: float) -> np.ndarray:
        shares: np.ndarray = 1.0 / (1.0 + (cut_size / diameter) ** exponent)
        return shares

    kept = mass_share_kept(
        partial(grade, exponent=exponent, cut_size=cut_size),
        distribution=LogNormal(median=10e-6, spread=2.0),
        classes=FINE,
    )
    assert kept == pytest.approx(worked, rel=0, abs=5e-5)

"""Size distributions: round trips, sums over the mass, fits, and what is no distribution."""

from __future__ import annotations

from functools import partial
from typing import TYPE_CHECKING

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.integrate import quad
from scipy.optimize import curve_fit
from scipy.stats import norm

from gyrecut.correlations import dust_sizes
from gyrecut.correlations.dust_sizes import COARSE, FINE, mass_share_caught, mass_share_kept
from gyrecut.correlations.lapple import grade_efficiency_lapple
from gyrecut.correlations.size_distributions import (
    LogNormal,
    RosinRammler,
    SieveTable,
    equivalent_log_normal,
    fit_log_normal,
    fit_rosin_rammler,
)
from gyrecut.errors import OutOfRangeError

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.size_distributions import SizeDistribution

SIEVES = SieveTable(sizes=(20e-6, 63e-6, 125e-6, 250e-6), undersizes=(0.05, 0.2, 0.7, 0.99))
CLOSED = SieveTable(sizes=(5e-6, 20e-6, 80e-6), undersizes=(0.0, 0.6, 1.0))

LOG_NORMALS = st.builds(
    LogNormal, median=st.floats(1e-6, 1e-3), spread=st.floats(min_value=1.05, max_value=6.0)
)
ROSIN_RAMMLERS = st.builds(
    RosinRammler, size=st.floats(1e-6, 1e-3), exponent=st.floats(min_value=0.5, max_value=5.0)
)
DISTRIBUTIONS = st.one_of(LOG_NORMALS, ROSIN_RAMMLERS, st.sampled_from([SIEVES, CLOSED]))
# so that the finest sieve does not fall below what a sieve table takes
SIEVED = st.floats(min_value=2e-5, max_value=1e-3)
SHARES = st.floats(min_value=1e-6, max_value=1 - 1e-6)


@given(DISTRIBUTIONS, SHARES)
def test_undersize_and_quantile_are_a_round_trip(dust: SizeDistribution, share: float) -> None:
    assert dust.undersize(dust.quantile(share)) == pytest.approx(share, rel=1e-9, abs=1e-12)


@given(DISTRIBUTIONS, SHARES)
def test_more_of_the_mass_is_finer_than_a_larger_size(dust: SizeDistribution, share: float) -> None:
    size = float(dust.quantile(share))
    assert dust.undersize(size / 1.1) < dust.undersize(size * 1.1)


@given(DISTRIBUTIONS)
def test_nothing_is_finer_than_no_size_and_all_than_a_rock(dust: SizeDistribution) -> None:
    assert dust.undersize(0.0) == 0.0
    assert dust.undersize(1e6) == pytest.approx(1.0, abs=1e-12)


@given(DISTRIBUTIONS, st.integers(min_value=50, max_value=400))
def test_size_classes_rise_and_sum_to_the_whole_mass(dust: SizeDistribution, count: int) -> None:
    bins = dust.mass_bins(count)
    assert bins.sizes.shape == bins.masses.shape == (count,)
    assert np.all(np.diff(bins.sizes) >= 0)
    assert np.all(np.isfinite(bins.sizes))
    assert bins.masses.sum() == pytest.approx(1.0)


@given(DISTRIBUTIONS, st.floats(min_value=1e-6, max_value=2e-4))
def test_the_mass_in_the_classes_is_that_below_each_size(
    dust: SizeDistribution, size: float
) -> None:
    bins = dust.mass_bins(FINE)
    below = bins.masses[bins.sizes <= size].sum()
    # one class on the wrong side of the size holds at most its mass, 0.004
    assert below == pytest.approx(float(dust.undersize(size)), abs=0.0045)


@pytest.mark.parametrize(
    "dust", [LogNormal(median=30e-6, spread=2.5), RosinRammler(size=40e-6, exponent=1.2), SIEVES]
)
@pytest.mark.parametrize("exponent", [2.0, 6.4])
def test_catch_is_what_adaptive_quadrature_gives(dust: SizeDistribution, exponent: float) -> None:
    cut = 40e-6

    def grade(diameter: Numbers, cut_size: Numbers) -> Numbers:
        return 1.0 / (1.0 + (cut_size / diameter) ** exponent)

    expected, _ = quad(
        lambda share: float(grade(dust.quantile(share), cut)), 1e-12, 1 - 1e-12, limit=400
    )
    # a sieve table has corners, where the sum converges with the square of the step only
    coarse, fine = (2e-4, 2e-6) if dust is SIEVES else (1e-6, 1e-7)
    for classes, error in ((COARSE, coarse), (FINE, fine)):
        kept = mass_share_kept(grade, distribution=dust, classes=classes, cut_size=cut)
        assert kept == pytest.approx(expected, abs=error)


def test_many_designs_give_what_single_ones_do(monkeypatch: pytest.MonkeyPatch) -> None:
    cuts = np.geomspace(1e-6, 40e-6, 35).reshape(5, 7)
    dust = RosinRammler(size=40e-6, exponent=1.2)
    catch = partial(mass_share_kept, grade_efficiency_lapple, distribution=dust, classes=COARSE)
    whole = np.asarray(catch(cut_size=cuts))
    assert whole.shape == (5, 7)
    assert whole[2, 3] == pytest.approx(float(catch(cut_size=cuts[2, 3])), rel=1e-13)
    largest = []

    def watched(diameter: Numbers, *, cut_size: Numbers) -> Numbers:
        grades = grade_efficiency_lapple(diameter, cut_size=cut_size)
        largest.append(np.size(grades))
        return grades

    monkeypatch.setattr(dust_sizes, "LARGEST_BLOCK", 4 * COARSE + 3)
    blocks = mass_share_kept(watched, distribution=dust, classes=COARSE, cut_size=cuts)
    assert blocks == pytest.approx(whole, rel=1e-13)
    assert largest == [4 * COARSE] * 8 + [3 * COARSE]


def test_parameters_of_designs_broadcast() -> None:
    def grade(diameter: Numbers, *, cut_size: Numbers, slope: Numbers) -> Numbers:
        return 1.0 / (1.0 + (cut_size / diameter) ** slope)

    kept = mass_share_kept(
        grade,
        distribution=SIEVES,
        classes=COARSE,
        cut_size=np.array([[20e-6], [80e-6]]),
        slope=np.array([2.0, 4.0, 6.0]),
    )
    assert np.shape(kept) == (2, 3)


def test_a_curve_without_parameters_gives_one_number() -> None:
    grade = partial(grade_efficiency_lapple, cut_size=5e-6)
    dust = LogNormal(median=30e-6, spread=2.5)
    kept = mass_share_kept(grade, distribution=dust, classes=FINE)
    assert kept == mass_share_caught(grade, median=30e-6, spread=2.5)


def test_a_curve_that_keeps_more_than_there_is_is_refused() -> None:
    with pytest.raises(OutOfRangeError, match=r"grade efficiency is 1\.5 -"):
        mass_share_kept(lambda d: 1.5 + 0 * d, distribution=SIEVES, classes=COARSE)


@given(st.builds(LogNormal, median=SIEVED, spread=st.floats(min_value=1.05, max_value=4.0)))
def test_a_log_normal_dust_is_found_again_from_its_sieves(dust: LogNormal) -> None:
    shares = np.array([0.02, 0.2, 0.5, 0.9, 0.999])
    sizes = np.asarray(dust.quantile(shares))
    fitted = fit_log_normal(SieveTable(sizes=tuple(sizes), undersizes=tuple(shares)))
    assert fitted.distribution.median == pytest.approx(dust.median, rel=1e-6)
    assert fitted.distribution.spread == pytest.approx(dust.spread, rel=1e-6)
    assert fitted.largest_error < 1e-6


@given(st.builds(RosinRammler, size=SIEVED, exponent=st.floats(min_value=0.7, max_value=5.0)))
def test_a_rosin_rammler_dust_is_found_again_from_its_sieves(dust: RosinRammler) -> None:
    shares = np.array([0.02, 0.2, 0.5, 0.9, 0.999])
    sizes = np.asarray(dust.quantile(shares))
    fitted = fit_rosin_rammler(SieveTable(sizes=tuple(sizes), undersizes=tuple(shares)))
    assert fitted.distribution.size == pytest.approx(dust.size, rel=1e-6)
    assert fitted.distribution.exponent == pytest.approx(dust.exponent, rel=1e-6)
    assert fitted.largest_error < 1e-6


TABLES = [
    SIEVES,
    SieveTable(sizes=(1e-6, 3e-6, 10e-6, 40e-6, 120e-6), undersizes=(0.01, 0.05, 0.2, 0.6, 0.97)),
    SieveTable(sizes=(63e-6, 125e-6, 500e-6), undersizes=(0.5, 0.55, 0.999)),
]


@pytest.mark.parametrize("table", TABLES)
def test_fits_are_those_of_an_independent_least_squares(table: SieveTable) -> None:
    logs, shares = np.log(table.sizes), np.array(table.undersizes)
    nearest = fit_log_normal(table).distribution
    found, _ = curve_fit(
        lambda x, middle, width: norm.cdf((x - middle) / width),
        logs,
        shares,
        p0=(np.log(nearest.median) + 0.1, 1.2 * np.log(nearest.spread)),
        xtol=1e-12,
        ftol=1e-15,
    )
    assert (nearest.median, nearest.spread) == pytest.approx(tuple(np.exp(found)), rel=1e-5)
    powder = fit_rosin_rammler(table).distribution
    found, _ = curve_fit(
        lambda x, size, exponent: 1 - np.exp(-np.exp(exponent * (x - size))),
        logs,
        shares,
        p0=(np.log(powder.size) + 0.1, 1.2 * powder.exponent),
        xtol=1e-12,
        ftol=1e-15,
    )
    assert (powder.size, powder.exponent) == pytest.approx((np.exp(found[0]), found[1]), rel=1e-5)


def test_the_error_of_a_fit_is_its_largest_miss() -> None:
    fitted = fit_rosin_rammler(SIEVES)
    misses = [
        abs(float(fitted.distribution.undersize(size)) - share)
        for size, share in zip(SIEVES.sizes, SIEVES.undersizes, strict=True)
    ]
    assert fitted.largest_error == pytest.approx(max(misses))
    assert fitted.largest_error > 0.01


def test_a_log_normal_dust_is_its_own_equivalent() -> None:
    dust = LogNormal(median=30e-6, spread=2.5)
    same = equivalent_log_normal(dust)
    assert (same.median, same.spread) == pytest.approx((30e-6, 2.5))


def test_a_sieve_table_goes_through_its_points_and_on() -> None:
    assert SIEVES.undersize(np.array(SIEVES.sizes)) == pytest.approx(SIEVES.undersizes)
    middle = float(SIEVES.quantile(0.45))  # half way between 0.2 and 0.7
    assert middle == pytest.approx((63e-6 * 125e-6) ** 0.5)
    # the first line rises by 0.15 over a factor of 3.15: it ends a third of that lower
    assert SIEVES.quantile(1e-9) == pytest.approx(20e-6 / 3.15 ** (1 / 3), rel=1e-6)
    assert CLOSED.undersize(np.array([1e-6, 5e-6, 80e-6, 1.0])) == pytest.approx([0, 0, 1, 1])


def test_grains_of_one_size_have_no_width() -> None:
    dust = LogNormal(median=30e-6, spread=1.0)
    assert dust.undersize(np.array([29e-6, 30e-6, 31e-6])) == pytest.approx([0.0, 0.5, 1.0])
    assert dust.quantile(0.9) == dust.quantile(0.1) == 30e-6


@pytest.mark.parametrize(
    ("sizes", "undersizes", "message"),
    [
        ((2e-5, 1e-5), (0.1, 0.2), r"next sieve over the one before is 0\.5 "),
        ((1e-5, 2e-5), (0.2, 0.2), "share of the mass between two sieves is 0 "),
        ((1e-5, 2e-5), (10.0, 90.0), "undersize is 10 "),
        ((10.0, 20.0), (0.1, 0.9), "sieve size is 10 m"),
    ],
)
def test_a_table_that_is_none_is_refused(
    sizes: tuple[float, ...], undersizes: tuple[float, ...], message: str
) -> None:
    table = SieveTable(sizes=sizes, undersizes=undersizes)
    for ask in (table.undersize, table.quantile, lambda _: table.mass_bins(COARSE)):
        with pytest.raises(OutOfRangeError, match=f"^{message}"):
            ask(0.5)


@pytest.mark.parametrize(
    ("dust", "message"),
    [
        (LogNormal(median=30.0, spread=2.0), "median particle diameter is 30 m"),
        (LogNormal(median=3e-5, spread=0.5), r"geometric standard deviation is 0\.5 "),
        (RosinRammler(size=50.0, exponent=1.2), "Rosin-Rammler size is 50 m"),
        (RosinRammler(size=5e-5, exponent=0.0), "Rosin-Rammler exponent is 0 "),
    ],
)
def test_a_distribution_that_is_none_is_refused(dust: SizeDistribution, message: str) -> None:
    for ask in (dust.undersize, dust.quantile, lambda _: dust.mass_bins(COARSE)):
        with pytest.raises(OutOfRangeError, match=f"^{message}"):
            ask(0.5)


def test_all_of_the_mass_has_no_size() -> None:
    with pytest.raises(OutOfRangeError, match="share of the mass is 1 "):
        LogNormal(median=3e-5, spread=2.0).quantile(1.0)


def test_one_point_fits_nothing() -> None:
    table = SieveTable(sizes=(5e-6, 20e-6, 80e-6), undersizes=(0.0, 0.6, 1.0))
    with pytest.raises(
        OutOfRangeError, match="sieves with some but not all of the mass below is 1"
    ):
        fit_log_normal(table)
    with pytest.raises(
        OutOfRangeError, match="sieves with some but not all of the mass below is 1"
    ):
        fit_rosin_rammler(table)

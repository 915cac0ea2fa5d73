"""How the mass of a dust is spread over its grain sizes: by a formula, or by its sieves."""

from __future__ import annotations

from dataclasses import dataclass
from math import erf, erfc, exp, log, pi, sqrt
from statistics import NormalDist
from typing import TYPE_CHECKING, Protocol

import numpy as np

from gyrecut.airflow.ranges import Range
from gyrecut.correlations.validity import PARTICLE_DIAMETER

if TYPE_CHECKING:
    from collections.abc import Callable

    from numpy.typing import NDArray

    from gyrecut.airflow.ranges import Numbers

    _Curve = Callable[[NDArray[np.float64]], NDArray[np.float64]]

_SIZES = "far beyond any workshop dust; common practice, no source"

MEDIAN = Range(quantity="median particle diameter", low=1e-8, high=0.1, unit="m", source=_SIZES)
SPREAD = Range(
    quantity="geometric standard deviation",
    low=1.0,
    high=10.0,
    unit="-",
    source="1 by definition; the high end is common practice, no source",
)
SIZE = Range(quantity="Rosin-Rammler size", low=1e-8, high=0.1, unit="m", source=_SIZES)
EXPONENT = Range(
    quantity="Rosin-Rammler exponent",
    low=0.3,
    high=20.0,
    unit="-",
    source="common practice, no source; measured dusts have about 0.7 to 2",
)
SIEVE = Range(quantity="sieve size", low=1e-8, high=0.1, unit="m", source=_SIZES)
SIEVE_STEP = Range(
    quantity="next sieve over the one before",
    low=1.0001,
    high=1e7,
    unit="-",
    source="sieves have to stand in order, the finest first",
)
UNDERSIZE = Range(quantity="undersize", low=0.0, high=1.0, unit="-", source="by definition")
UNDERSIZE_STEP = Range(
    quantity="share of the mass between two sieves",
    low=1e-6,
    high=1.0,
    unit="-",
    source="undersize has to rise; leave out a sieve that holds nothing",
)
MASS_SHARE = Range(
    quantity="share of the mass",
    low=1e-16,
    high=1.0 - 1e-16,
    unit="-",
    source="none and all of it have no size",
)
BINS = Range(
    quantity="number of size classes", low=2.0, high=1e6, unit="-", source="room for any use"
)
FIT_POINTS = Range(
    quantity="sieves with some but not all of the mass below",
    low=2.0,
    high=1e6,
    unit="-",
    source="two parameters take two points",
)

TAIL = 8.0  # standard deviations to each side, beyond which less than 1e-14 of the mass lies
_FIT_STEPS = 60
_ONE_SIGMA = 0.5 * (1.0 + erf(1.0 / sqrt(2.0)))  # -, share below one standard deviation

_undersize_of = np.vectorize(lambda z: 0.5 * erfc(-z / sqrt(2.0)), otypes=[np.float64])
_deviation_of = np.vectorize(NormalDist().inv_cdf, otypes=[np.float64])


@dataclass(frozen=True, slots=True, kw_only=True)
class MassBins:
    """A dust as single sizes with weights, for summing anything over its mass.

    Parameters
    ----------
    sizes : ndarray
        (n,) grain sizes, rising [m]
    masses : ndarray
        (n,) share of the mass that each stands for; they sum to 1 [-]
    """

    sizes: NDArray[np.float64]
    masses: NDArray[np.float64]


class SizeDistribution(Protocol):
    """What every distribution of this module can say."""

    def undersize(self, diameter: Numbers) -> Numbers:
        """Share of the mass that is finer than a diameter [m]."""

    def quantile(self, share: Numbers) -> Numbers:
        """Diameter that a share of the mass is finer than [m]."""

    def mass_bins(self, count: int) -> MassBins:
        """Sizes and weights that integrate over the mass."""


@dataclass(frozen=True, slots=True, kw_only=True)
class LogNormal:
    r"""Log-normal by mass.

    .. math:: Q_3 = \frac{1}{2} (1 + \operatorname{erf} \frac{\ln(d/d_m)}{\sqrt{2} \ln \sigma_g})

    Parameters
    ----------
    median : float
        Mass median diameter :math:`d_m` [m]
    spread : float
        Geometric standard deviation :math:`\sigma_g`; 1 for grains of one size [-]

    References
    ----------
    .. [1] Hinds, Aerosol Technology, 2nd ed., Wiley 1999, ch. 4, from memory.
    """

    median: float
    spread: float

    def undersize(self, diameter: Numbers) -> Numbers:
        """Share of the mass that is finer than a diameter [m]; half of a single size is [-]."""
        self._check()
        PARTICLE_DIAMETER.check(diameter)
        if self.spread == 1.0:
            step: Numbers = np.heaviside(np.asarray(diameter) - self.median, 0.5)[()]
            return step
        ratio = np.maximum(diameter, np.finfo(float).tiny) / self.median
        share: Numbers = _undersize_of(np.log(ratio) / log(self.spread))[()]
        return share

    def quantile(self, share: Numbers) -> Numbers:
        """Diameter that a share of the mass [-] is finer than [m]."""
        self._check()
        MASS_SHARE.check(share)
        return self._at(_deviation_of(share)[()])

    def mass_bins(self, count: int) -> MassBins:
        """Sizes at even steps of the standard deviation, with the mass of each."""
        self._check()
        deviations, masses = _even_deviations(count)
        return MassBins(sizes=np.asarray(self._at(deviations)), masses=masses)

    def _at(self, deviations: Numbers) -> Numbers:
        size: Numbers = self.median * np.exp(deviations * log(self.spread))
        return size

    def _check(self) -> None:
        MEDIAN.check(self.median)
        SPREAD.check(self.spread)


@dataclass(frozen=True, slots=True, kw_only=True)
class RosinRammler:
    r"""Rosin and Rammler's distribution, by mass.

    .. math:: Q_3 = 1 - \exp(-(d/d')^n)

    Parameters
    ----------
    size : float
        Diameter that 63.2 % of the mass is finer than, :math:`d'` [m]
    exponent : float
        The larger, the narrower the dust, :math:`n` [-]

    References
    ----------
    .. [1] Rosin and Rammler, The laws governing the fineness of powdered coal. J. Institute of
       Fuel 7 (1933) 29, from memory.
    """

    size: float
    exponent: float

    def undersize(self, diameter: Numbers) -> Numbers:
        """Share of the mass that is finer than a diameter [m]."""
        self._check()
        PARTICLE_DIAMETER.check(diameter)
        # beyond this everything is finer, and the power would leave the range of a float
        ratio = np.minimum(np.asarray(diameter) / self.size, 1e3 ** (1.0 / self.exponent))
        share: Numbers = -np.expm1(-(ratio**self.exponent))
        return share

    def quantile(self, share: Numbers) -> Numbers:
        """Diameter that a share of the mass [-] is finer than [m]."""
        self._check()
        MASS_SHARE.check(share)
        size: Numbers = self.size * (-np.log1p(-np.asarray(share))) ** (1.0 / self.exponent)
        return size

    def mass_bins(self, count: int) -> MassBins:
        """Sizes at even steps of the standard deviation that their share has, with its mass."""
        self._check()
        deviations, masses = _even_deviations(count)
        oversize = _undersize_of(-deviations)
        sizes = self.size * (-np.log(oversize)) ** (1.0 / self.exponent)
        return MassBins(sizes=sizes, masses=masses)

    def _check(self) -> None:
        SIZE.check(self.size)
        EXPONENT.check(self.exponent)


@dataclass(frozen=True, slots=True, kw_only=True)
class SieveTable:
    """A measured table of undersize, taken as straight in the logarithm of the size.

    Beyond its ends the first and the last line go on until none or all of the mass is finer.

    Parameters
    ----------
    sizes : tuple of float
        Sieve openings, the finest first [m]
    undersizes : tuple of float
        Share of the mass that passes each, rising [-]

    References
    ----------
    .. [1] Common practice, no source, for the straight lines; through the points by definition.
    """

    sizes: tuple[float, ...]
    undersizes: tuple[float, ...]

    def undersize(self, diameter: Numbers) -> Numbers:
        """Share of the mass that is finer than a diameter [m]."""
        logs, shares = self._nodes()
        PARTICLE_DIAMETER.check(diameter)
        at = np.log(np.maximum(diameter, np.finfo(float).tiny))
        share: Numbers = np.interp(at, logs, shares)
        return share

    def quantile(self, share: Numbers) -> Numbers:
        """Diameter that a share of the mass [-] is finer than [m]."""
        logs, shares = self._nodes()
        MASS_SHARE.check(share)
        size: Numbers = np.exp(np.interp(share, shares, logs))
        return size

    def mass_bins(self, count: int) -> MassBins:
        """Sizes at even steps of the standard deviation that their share has, with its mass."""
        logs, shares = self._nodes()
        deviations, masses = _even_deviations(count)
        sizes = np.exp(np.interp(_undersize_of(deviations), shares, logs))
        return MassBins(sizes=sizes, masses=masses)

    def _nodes(self) -> tuple[NDArray[np.float64], NDArray[np.float64]]:
        sizes, shares = np.asarray(self.sizes), np.asarray(self.undersizes)
        SIEVE.check(sizes)
        SIEVE_STEP.check(sizes[1:] / sizes[:-1])
        UNDERSIZE.check(shares)
        UNDERSIZE_STEP.check(np.diff(shares))
        logs = np.log(sizes)
        slopes = np.diff(logs) / np.diff(shares)
        low, high = logs[0] - slopes[0] * shares[0], logs[-1] + slopes[-1] * (1.0 - shares[-1])
        if shares[0] > 0.0:
            logs, shares = np.insert(logs, 0, low), np.insert(shares, 0, 0.0)
        if shares[-1] < 1.0:
            logs, shares = np.append(logs, high), np.append(shares, 1.0)
        return logs, shares


@dataclass(frozen=True, slots=True, kw_only=True)
class FittedLogNormal:
    """A log-normal distribution in place of a sieve table.

    Parameters
    ----------
    distribution : LogNormal
        The line of best fit, with its median [m]
    largest_error : float
        Largest difference of undersize to the table's points [-]
    """

    distribution: LogNormal
    largest_error: float


@dataclass(frozen=True, slots=True, kw_only=True)
class FittedRosinRammler:
    """A Rosin-Rammler distribution in place of a sieve table.

    Parameters
    ----------
    distribution : RosinRammler
        The line of best fit, with its size [m]
    largest_error : float
        Largest difference of undersize to the table's points [-]
    """

    distribution: RosinRammler
    largest_error: float


def fit_log_normal(table: SieveTable) -> FittedLogNormal:
    """Log-normal distribution nearest to a sieve table.

    Parameters
    ----------
    table : SieveTable
        Two points or more that are neither 0 nor 1 [-]

    Returns
    -------
    FittedLogNormal
        The distribution, and how far it misses the table.

    Raises
    ------
    OutOfRangeError
        When the table is none, or comes out wider than a log-normal dust may be.

    References
    ----------
    .. [1] Least squares of the undersize; a straight line on probability paper.
    """
    slope, offset = _fitted_line(table, _deviation_of, _undersize_of, _normal_density)
    distribution = LogNormal(median=exp(-offset / slope), spread=exp(1.0 / slope))
    return FittedLogNormal(
        distribution=distribution, largest_error=_largest_error(distribution, table)
    )


def fit_rosin_rammler(table: SieveTable) -> FittedRosinRammler:
    """Rosin-Rammler distribution nearest to a sieve table.

    Parameters
    ----------
    table : SieveTable
        Two points or more that are neither 0 nor 1 [-]

    Returns
    -------
    FittedRosinRammler
        The distribution, and how far it misses the table.

    Raises
    ------
    OutOfRangeError
        When the table is none, or gives an exponent that no dust has.

    References
    ----------
    .. [1] Least squares of the undersize; a straight line on Rosin-Rammler paper.
    """
    exponent, offset = _fitted_line(
        table,
        lambda shares: np.log(-np.log1p(-shares)),
        lambda heights: -np.expm1(-np.exp(heights)),
        lambda heights: np.exp(heights - np.exp(heights)),
    )
    distribution = RosinRammler(size=exp(-offset / exponent), exponent=exponent)
    return FittedRosinRammler(
        distribution=distribution, largest_error=_largest_error(distribution, table)
    )


def equivalent_log_normal(distribution: SizeDistribution) -> LogNormal:
    """Log-normal distribution with the same median and the same middle 68 % of the mass.

    Parameters
    ----------
    distribution : SizeDistribution
        Any distribution, with its sizes [m]

    Returns
    -------
    LogNormal
        For whatever asks for a median and a spread.

    Raises
    ------
    OutOfRangeError
        When the distribution is none, or wider than a log-normal dust may be.

    References
    ----------
    .. [1] Hinds, Aerosol Technology, 2nd ed., Wiley 1999, ch. 4, from memory: the spread is the
       root of the sizes at one standard deviation to each side.
    """
    low, middle, high = (
        float(distribution.quantile(share)) for share in (1.0 - _ONE_SIGMA, 0.5, _ONE_SIGMA)
    )
    equivalent = LogNormal(median=middle, spread=sqrt(high / low))
    MEDIAN.check(equivalent.median)
    SPREAD.check(equivalent.spread)
    return equivalent


def _even_deviations(count: int) -> tuple[NDArray[np.float64], NDArray[np.float64]]:
    # The trapezoid rule: with both ends flat it converges faster than any power of the step.
    BINS.check(count)
    deviations = np.linspace(-TAIL, TAIL, count)
    weights = np.exp(-0.5 * deviations**2)
    return deviations, weights / weights.sum()


def _fitted_line(
    table: SieveTable, to_paper: _Curve, from_paper: _Curve, density: _Curve
) -> tuple[float, float]:
    """Slope and offset of the line on probability paper that misses the undersizes least.

    A line fitted on the paper itself would follow the first and last per cent, where the paper
    is stretched, and miss the middle.
    """
    table.undersize(0.0)  # refuses a table that is none
    sizes, shares = np.asarray(table.sizes), np.asarray(table.undersizes)
    inner = (shares > 0.0) & (shares < 1.0)
    FIT_POINTS.check(float(inner.sum()))
    logs, shares = np.log(sizes[inner]), shares[inner]
    basis = np.column_stack((logs, np.ones_like(logs)))
    heights = to_paper(shares)
    weights = density(heights)[:, np.newaxis]
    line = np.linalg.lstsq(weights * basis, weights[:, 0] * heights)[0]
    for _ in range(_FIT_STEPS):  # Gauss and Newton, halving a step that makes it worse
        heights = basis @ line
        misses = shares - from_paper(heights)
        step = np.linalg.lstsq(density(heights)[:, np.newaxis] * basis, misses)[0]
        while np.sum((shares - from_paper(basis @ (line + step))) ** 2) > np.sum(misses**2):
            step = step / 2.0
        line = line + step
    return float(line[0]), float(line[1])


def _normal_density(deviations: NDArray[np.float64]) -> NDArray[np.float64]:
    density: NDArray[np.float64] = np.exp(-0.5 * deviations**2) / sqrt(2.0 * pi)
    return density


def _largest_error(distribution: SizeDistribution, table: SieveTable) -> float:
    fitted = distribution.undersize(np.asarray(table.sizes))
    return float(np.abs(fitted - np.asarray(table.undersizes)).max())

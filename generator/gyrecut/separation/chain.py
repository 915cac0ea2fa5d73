"""Dust through one stage after the other: what each keeps, and what goes on to the next."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.correlations.consensus import central_cut_size
from gyrecut.correlations.grade import grade_efficiency_with_slope

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.airflow.air import AirState
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry

# Air drawn in through the dust outlet spoils the catch: 10 to 15 % of the flow bring it to almost
# nothing (Perry's handbook, ch. 17, and Strauss, from memory and weak; no measured curve known).
LEAK_THAT_SPOILS_ALL = 0.125


@dataclass(frozen=True, slots=True, kw_only=True)
class Step:
    """One separation step: equal bodies side by side.

    Parameters
    ----------
    geometry : CycloneGeometry
        One body [m]
    copies : int
        Bodies that share the flow [-]
    """

    geometry: CycloneGeometry
    copies: int


@dataclass(frozen=True, slots=True, kw_only=True)
class Grains:
    """Dust as size classes, one row or a row for each draw.

    Parameters
    ----------
    sizes : (..., n) ndarray
        Physical diameter of each class [m]
    masses : (n,) ndarray
        Share of the mass in each class, summing to 1 [-]
    density : float or (..., 1) ndarray
        Density of one grain [kg/m^3]
    shape_factor : float
        Dynamic shape factor [-]
    """

    sizes: NDArray[np.float64]
    masses: NDArray[np.float64]
    density: Numbers
    shape_factor: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Passed:
    """What a chain of stages does with a dust.

    Parameters
    ----------
    kept : tuple of (...) ndarray
        Share of the feed's mass that each stage keeps [-]
    passing : (..., n) ndarray
        Share of the feed's mass in each class that passes the last stage [-]
    """

    kept: tuple[Numbers, ...]
    passing: NDArray[np.float64]

    @property
    def kept_in_all(self) -> Numbers:
        """Share of the feed's mass that all stages together keep; 0 where none keeps any."""
        kept: Numbers = np.minimum(sum(self.kept, start=0.0), 1.0)
        return kept

    @property
    def passing_in_all(self) -> Numbers:
        """Share of the feed's mass that passes; has its digits where it is tiny."""
        passing: Numbers = self.passing.sum(axis=-1)
        return passing


def through(
    steps: tuple[Step, ...],
    grains: Grains,
    *,
    flow: Numbers,
    loading: float,
    leak: float,
    air: AirState,
    slope: Numbers,
    cut_factor: Numbers = 1.0,
    friction_scale: Numbers = 1.0,
) -> Passed:
    r"""Pass a dust through stages in series.

    .. math:: m_{k+1}(d) = m_k(d) \, (1 - \lambda \eta_k(d)), \quad \lambda = 1 - leak / 0.125

    Parameters
    ----------
    steps : tuple of Step
        In the order the air passes them.
    grains : Grains
        The dust fed.
    flow : float or (..., 1) ndarray
        Air through the whole machine [m^3/s]
    loading : float
        Mass of dust in the mass of air fed [-]
    leak : float
        Air drawn in through the dust outlet, as a share of the flow [-]
    air : AirState
        The air, SI
    slope : float or (..., 1) ndarray
        Slope of the grade curve [-]
    cut_factor : float or (..., 1) ndarray
        Cut size over the central one [-]
    friction_scale : float or (..., 1) ndarray
        Wall friction over the one assumed [-]

    Returns
    -------
    Passed
        Mass in is mass kept and mass passed, class by class.

    Raises
    ------
    OutOfRangeError
        When a body or a value lies outside what the models cover.

    References
    ----------
    .. [1] Mass balance; cut sizes of `correlations.consensus`; the leak's effect from memory, weak.
    """
    sound = max(0.0, 1.0 - leak / LEAK_THAT_SPOILS_ALL)
    remaining = np.broadcast_to(grains.masses, grains.sizes.shape).copy()
    kept: list[Numbers] = []
    left = loading
    for step in steps:
        consensus = central_cut_size(
            step.geometry,
            flow=flow / step.copies,
            particle_density=grains.density,
            shape_factor=grains.shape_factor,
            loading=left,
            air=air,
            friction_scale=friction_scale,
        )
        grade = grade_efficiency_with_slope(
            grains.sizes, cut_size=consensus.cut_size * cut_factor, slope=slope
        )
        caught = remaining * (sound * grade)
        remaining = remaining - caught
        kept.append(caught.sum(axis=-1))
        # the mean of the draws is near enough for the small effect of the loading
        left = loading * float(np.mean(remaining.sum(axis=-1)))
    return Passed(kept=tuple(kept), passing=remaining)


def median_of(sizes: NDArray[np.float64], masses: NDArray[np.float64]) -> float:
    """Size that half of a mass is finer than; masses need not sum to 1.

    Parameters
    ----------
    sizes, masses : (n,) ndarray
        Size classes in rising order [m], and the mass in each [-]

    Returns
    -------
    float
        Interpolated in the logarithm of the size [m]
    """
    summed = np.cumsum(masses)
    middle = (summed - masses / 2.0) / summed[-1]
    return float(np.exp(np.interp(0.5, middle, np.log(sizes))))

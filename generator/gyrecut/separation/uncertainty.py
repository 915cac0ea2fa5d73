"""How far the forecast may be off: the models' spread and the inputs a person cannot know well."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.correlations.consensus import SLOPE, SLOPE_HIGH, SLOPE_LOW, central_cut_size
from gyrecut.separation.chain import Grains, Step, through

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.airflow.air import AirState

NORMAL_95 = 1.6449  # 90 % of a normal distribution lie within this many standard deviations
DRAWS = 2000


@dataclass(frozen=True, slots=True, kw_only=True)
class Doubt:
    """How well the inputs are known: each the factor that 90 % of the truth lies within.

    All common practice, no source: judged from the spread of the published dust data.

    Parameters
    ----------
    median, spread : float
        Of the dust: mass median, and geometric standard deviation [-]
    density : float
        Of one grain [-]
    flow : float
        Of the air [-]
    friction : float
        Of the wall, printed and more or less smoothed [-]
    """

    median: float = 1.4
    spread: float = 1.15
    density: float = 1.2
    flow: float = 1.1
    friction: float = 1.4


@dataclass(frozen=True, slots=True, kw_only=True)
class Spread:
    """A share with the range that holds 90 % of the draws.

    Parameters
    ----------
    low, middle, high : float
        5th, 50th and 95th percentile.
    draws, seed : int
        How it was drawn; the same seed gives the same numbers.
    """

    low: float
    middle: float
    high: float
    draws: int
    seed: int


def catch_spread(
    steps: tuple[Step, ...],
    grains: Grains,
    *,
    median: float,
    flow: float,
    loading: float,
    leak: float,
    air: AirState,
    doubt: Doubt,
    draws: int = DRAWS,
    seed: int = 0,
) -> Spread:
    """Draw the catch many times, models and inputs varied together.

    The models' error is one factor on every cut size, log-normal, its 90 % range the band of the
    measured cyclones; all stages share it, since it is the same models that err.

    Parameters
    ----------
    steps : tuple of Step
        The stages.
    grains : Grains
        The dust as given, one row of classes.
    median : float
        Its mass median [m]
    flow : float
        Air through the machine [m^3/s]
    loading : float
        Mass of dust in the mass of air [-]
    leak : float
        Air drawn in through the dust outlet [-]
    air : AirState
        The air, SI
    doubt : Doubt
        How well the inputs are known.
    draws, seed : int
        How many draws, and the seed they come from.

    Returns
    -------
    Spread
        Of the share of the mass kept.
    """
    random = np.random.default_rng(seed)

    def factor(within: float) -> NDArray[np.float64]:
        drawn: NDArray[np.float64] = np.exp(
            np.log(within) / NORMAL_95 * random.standard_normal((draws, 1))
        )
        return drawn

    widened, shifted = factor(doubt.spread), factor(doubt.median)
    sizes = median * shifted * (grains.sizes / median) ** widened
    flows = flow * factor(doubt.flow)
    densities = grains.density * factor(doubt.density)
    band = max(
        float(
            central_cut_size(
                step.geometry,
                flow=flow / step.copies,
                particle_density=grains.density,
                shape_factor=grains.shape_factor,
                loading=loading,
                air=air,
            ).factor
        )
        for step in steps
    )
    passed = through(
        steps,
        Grains(
            sizes=sizes,
            masses=grains.masses,
            density=densities,
            shape_factor=grains.shape_factor,
        ),
        flow=flows,
        loading=loading,
        leak=leak,
        air=air,
        slope=random.triangular(SLOPE_LOW, SLOPE, SLOPE_HIGH, (draws, 1)),
        cut_factor=factor(band),
        friction_scale=factor(doubt.friction),
    )
    low, middle, high = np.percentile(passed.kept_in_all, (5.0, 50.0, 95.0))
    return Spread(low=float(low), middle=float(middle), high=float(high), draws=draws, seed=seed)

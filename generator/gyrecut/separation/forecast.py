"""The forecast for a whole machine: flow, catch, cost, and how wrong each may be."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.correlations.consensus import SLOPE
from gyrecut.correlations.geometry import mean_inlet_velocity
from gyrecut.correlations.loading import penetration_factor
from gyrecut.correlations.natural_length import natural_length_alexander
from gyrecut.correlations.saltation import saltation_velocity_kalen_zenz
from gyrecut.correlations.saturation import SATURATING_LOADING, share_skimmed_muschelknautz
from gyrecut.correlations.validity import INLET_VELOCITY
from gyrecut.separation.air_path import (
    CLEAN,
    Condition,
    cyclones,
    hose_bore,
    suction_source,
    system_of,
)
from gyrecut.separation.chain import Grains, Step, median_of, through
from gyrecut.separation.filter_outlook import FilterOutlook, filter_outlook
from gyrecut.separation.models import Agreement, cut_sizes, pressure_drops, safe_pressure_drop
from gyrecut.separation.operating_point import OperatingPoint, bisected, point_at, settle
from gyrecut.separation.uncertainty import Doubt, Spread, catch_spread

if TYPE_CHECKING:
    from gyrecut.airflow.air import AirState
    from gyrecut.airflow.suction import SuctionCurve
    from gyrecut.catalogue.rows import Dust
    from gyrecut.correlations.size_distributions import SizeDistribution
    from gyrecut.profile.models import Profile
    from gyrecut.proportions.dimensions import Dimensions

CLASSES = 101  # size classes; the catch is right to 1e-5 with them
CHOKED = 0.8  # share of the pick-up that a board or a sheet covers in the choked case
BIN_FILL = 0.8  # share of its volume a bin is used to: common practice, no source
REFERENCE_CONTENT = 2.3e-3  # kg/m3, one grain in a cubic foot: US course material, from memory

WEIGH = (
    "Weigh and measure after building: these models lie a factor apart from each other and from "
    "measured cyclones, and no reliable measurement of a printed one of this size is known to them."
)


@dataclass(frozen=True, slots=True, kw_only=True)
class StageForecast:
    """What one separation step does.

    Parameters
    ----------
    flow : float
        Through one of its bodies [m^3/s]
    inlet_velocity : float
        In the slot [m/s]
    cut_size, pressure_drop : Agreement
        All models, central value and band [m], [Pa]
    kept : float
        Share of the whole feed's mass that it keeps [-]
    kept_of_arriving : float
        Share of what reaches it that it keeps [-]
    natural_length : float
        Of the vortex below the finder, after Alexander [m]
    saltation_ratio : float
        Inlet over saltation velocity, after Kalen and Zenz; information only [-]
    """

    flow: float
    inlet_velocity: float
    cut_size: Agreement
    pressure_drop: Agreement
    kept: float
    kept_of_arriving: float
    natural_length: float
    saltation_ratio: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Catch:
    """What the whole machine keeps, and what passes.

    Parameters
    ----------
    kept : float
        Share of the mass kept, central [-]
    spread : Spread
        The same with its 90 % range.
    kept_when_choked : float or None
        The same with most of the pick-up covered; None where the air then gets slower than the
        models cover [-]
    passing_median : float
        Mass median of what passes [m]
    skimmed_at_most : float or None
        Share that would fall out at the inlet at once, after Muschelknautz: an upper estimate,
        None below the loadings it is meant for [-]
    loading_factor : float
        Share that passes over the share at 2.3 g/m3, from the dust loading alone; information [-]
    to_filter : float or None
        Dust that passes [kg/s], None where the profile has no feed.
    bin_fill_time : float or None
        Working time until the bin is full [s]
    """

    kept: float
    spread: Spread
    kept_when_choked: float | None
    passing_median: float
    skimmed_at_most: float | None
    loading_factor: float | None
    to_filter: float | None
    bin_fill_time: float | None


@dataclass(frozen=True, slots=True, kw_only=True)
class Forecast:
    """All that is expected of a machine.

    Parameters
    ----------
    flow : float
        That settles, or the profile's target where it names no source [m^3/s]
    flow_is_target : bool
        Whether it is only a target.
    loading : float
        Mass of dust in the mass of air [-]
    stages : tuple of StageForecast
        Step by step.
    catch : Catch
        All steps together.
    clean, choked : OperatingPoint
        Operation as built, and with most of the pick-up covered.
    loaded : OperatingPoint or None
        With the filter at its limit, None without such a limit.
    safe_suction : float
        Suction to choose a source by: separators after Shepherd and Lapple [Pa]
    filter : FilterOutlook or None
        None where the profile names no filter.
    advice : str
        What to do with these numbers.
    """

    flow: float
    flow_is_target: bool
    loading: float
    stages: tuple[StageForecast, ...]
    catch: Catch
    clean: OperatingPoint
    choked: OperatingPoint
    loaded: OperatingPoint | None
    safe_suction: float
    filter: FilterOutlook | None
    advice: str = WEIGH


def forecast(
    profile: Profile,
    *,
    air: AirState,
    dust: Dust,
    sizes: SizeDistribution,
    stages: tuple[tuple[Step, Dimensions], ...],
    flow: float,
    doubt: Doubt,
    seed: int = 0,
) -> Forecast:
    """Forecast what a machine does.

    Parameters
    ----------
    profile : Profile
        Hose, pick-up, source, filter, bin, feed.
    air : AirState
        The air, SI
    dust : Dust
        The dust.
    sizes : SizeDistribution
        Its sizes.
    stages : tuple of (Step, Dimensions)
        The stages with the lengths of one of their bodies.
    flow : float
        The target flow [m^3/s]; with a source the flow that settles takes its place.
    doubt : Doubt
        How well the inputs are known.
    seed : int
        Of the random draws.

    Returns
    -------
    Forecast

    Raises
    ------
    OutOfRangeError
        Where a body or a value lies outside what the models cover.
    """
    source = suction_source(profile, air)
    clean = _point(profile, dust, stages, CLEAN, source=source, target=flow, air=air)
    choked = _point(
        profile, dust, stages, Condition(choked=CHOKED), source=source, target=flow, air=air
    )
    steps = tuple(step for step, _ in stages)
    feed = profile.dust.feed
    loading = 0.0 if feed is None else feed / (clean.flow * air.density)
    bins = sizes.mass_bins(CLASSES)
    grains = Grains(
        sizes=bins.sizes,
        masses=bins.masses,
        density=dust.particle_density,
        shape_factor=dust.shape_factor,
    )
    leak = profile.air.bin_leak
    passed = through(
        steps, grains, flow=clean.flow, loading=loading, leak=leak, air=air, slope=SLOPE
    )
    forecasts = _stages(steps, dust, passed.kept, flow=clean.flow, loading=loading, air=air)
    kept = float(passed.kept_in_all)
    catch = Catch(
        kept=kept,
        spread=catch_spread(
            steps,
            grains,
            median=float(sizes.quantile(0.5)),
            flow=clean.flow,
            loading=loading,
            leak=leak,
            air=air,
            doubt=doubt,
            seed=seed,
        ),
        kept_when_choked=_kept_when_choked(
            steps, grains, flow=choked.flow, loading=loading, leak=leak, air=air
        ),
        passing_median=median_of(bins.sizes, passed.passing),
        skimmed_at_most=_skimmed(forecasts[0], sizes, loading),
        loading_factor=_loading_factor(loading * air.density),
        to_filter=None if feed is None else feed * float(passed.passing_in_all),
        bin_fill_time=(
            None
            if feed is None or kept <= 0
            else BIN_FILL * profile.bin.volume * dust.bulk_density / (feed * kept)
        ),
    )
    loaded, cloth = None, profile.air.filter
    clean_loss = sum(float(s.pressure_drop) for s in clean.shares if s.name == "filter")
    if cloth is not None and cloth.limit is not None and cloth.limit > clean_loss:
        at_limit = Condition(filter_loss=cloth.limit)
        loaded = _point(profile, dust, stages, at_limit, source=source, target=flow, air=air)
    return Forecast(
        flow=clean.flow,
        flow_is_target=source is None,
        loading=loading,
        stages=forecasts,
        catch=catch,
        clean=clean,
        choked=choked,
        loaded=loaded,
        safe_suction=clean.suction
        + sum(
            safe_pressure_drop(step.geometry, flow=clean.flow / step.copies, air=air)
            - float(cyclones(step).pressure_drop(clean.flow, air=air))
            for step in steps
        ),
        filter=filter_outlook(
            profile,
            dust,
            to_filter=catch.to_filter,
            clean_flow=clean.flow,
            loaded_flow=None if loaded is None else loaded.flow,
        ),
    )


def _point(
    profile: Profile,
    dust: Dust,
    stages: tuple[tuple[Step, Dimensions], ...],
    condition: Condition,
    *,
    source: SuctionCurve | None,
    target: float,
    air: AirState,
) -> OperatingPoint:
    system = system_of(profile, dust, stages, condition)
    if source is not None:
        flow = settle(source, system, air=air)
        suction = float(source.suction(flow))
    else:
        # a source that just gives the target when clean; what it does else is not known, so the
        # suction is kept and the flow gives way
        suction = float(system_of(profile, dust, stages).pressure_drop(target, air=air))
        flow = target
        if condition != CLEAN:
            flow = bisected(
                lambda trial: suction - float(system.pressure_drop(trial, air=air)),
                low=0.0,
                high=target,
            )
    return point_at(flow, system, suction=suction, bore=hose_bore(profile), air=air)


def _stages(
    steps: tuple[Step, ...],
    dust: Dust,
    kept: tuple[object, ...],
    *,
    flow: float,
    loading: float,
    air: AirState,
) -> tuple[StageForecast, ...]:
    made = []
    arriving = 1.0
    for step, share in zip(steps, kept, strict=True):
        each, caught = flow / step.copies, float(np.asarray(share))
        geometry = step.geometry
        velocity = float(mean_inlet_velocity(geometry, flow=each))
        saltation = saltation_velocity_kalen_zenz(
            geometry,
            flow=each,
            particle_density=dust.particle_density,
            air_density=air.density,
            viscosity=air.viscosity,
        )
        made.append(
            StageForecast(
                flow=each,
                inlet_velocity=velocity,
                cut_size=cut_sizes(
                    geometry,
                    flow=each,
                    particle_density=dust.particle_density,
                    shape_factor=dust.shape_factor,
                    loading=loading * arriving,
                    air=air,
                ),
                pressure_drop=pressure_drops(
                    geometry, flow=each, loading=loading * arriving, air=air
                ),
                kept=caught,
                kept_of_arriving=caught / arriving if arriving > 0 else 0.0,
                natural_length=float(natural_length_alexander(geometry)),
                saltation_ratio=velocity / float(saltation),
            )
        )
        arriving -= caught
    return tuple(made)


def _kept_when_choked(
    steps: tuple[Step, ...],
    grains: Grains,
    *,
    flow: float,
    loading: float,
    leak: float,
    air: AirState,
) -> float | None:
    """Give the catch with most of the pick-up covered, None below the slowest inlet covered."""
    slowest = min(
        flow / step.copies / float(step.geometry.slot_height * step.geometry.slot_width)
        for step in steps
    )
    if slowest < INLET_VELOCITY.low:
        return None
    passed = through(steps, grains, flow=flow, loading=loading, leak=leak, air=air, slope=SLOPE)
    return float(passed.kept_in_all)


def _skimmed(first: StageForecast, sizes: SizeDistribution, loading: float) -> float | None:
    if loading < SATURATING_LOADING.low:
        return None
    return float(
        share_skimmed_muschelknautz(
            cut_size=first.cut_size.central, median=float(sizes.quantile(0.5)), loading=loading
        )
    )


def _loading_factor(content: float) -> float | None:
    lowest = 1e-4
    if content < lowest:
        return None
    return float(penetration_factor(dust_content=content, reference_content=REFERENCE_CONTENT))

"""What the filter behind the separator gets, how long it lasts, and what it lets through."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from gyrecut.airflow.filters import CAKE_LOAD, DUST_RATE, filter_life, filter_load_at_limit
from gyrecut.catalogue import filters
from gyrecut.separation.air_path import clean_filter

if TYPE_CHECKING:
    from gyrecut.airflow.elements import Filter
    from gyrecut.catalogue.rows import Dust
    from gyrecut.profile.models import Profile

MILLIGRAM = 1e-6


@dataclass(frozen=True, slots=True, kw_only=True)
class FilterOutlook:
    """What the filter gets and lets through.

    Parameters
    ----------
    filter_class : str
        Row of the catalogue.
    face_velocity : float
        Flow over cloth area [m/s]
    life : float or None
        Working time until its limit [s]; None without a limit or a feed, or where hardly any dust
        arrives.
    after_filter : float or None
        Dust behind it, by the class's penetration [mg/m^3]; None where the class gives none.
    exposure_limit : float or None
        Of the dust in the breathing zone [mg/m^3]
    """

    filter_class: str
    face_velocity: float
    life: float | None
    after_filter: float | None
    exposure_limit: float | None


def filter_outlook(
    profile: Profile,
    dust: Dust,
    *,
    to_filter: float | None,
    clean_flow: float,
    loaded_flow: float | None,
) -> FilterOutlook | None:
    """Give the outlook of the profile's filter.

    Parameters
    ----------
    profile : Profile
        With the filter, if any.
    dust : Dust
        What passes the separator.
    to_filter : float or None
        How much of it [kg/s], None where the profile has no feed.
    clean_flow, loaded_flow : float
        Flow with the filter clean, and at its limit [m^3/s]; None for the second without a limit.

    Returns
    -------
    FilterOutlook or None
        None where the profile names no filter.
    """
    cloth, named = clean_filter(profile, dust), profile.air.filter
    if cloth is None or named is None:
        return None
    penetration = filters()[named.filter_class].penetration
    after = None
    if penetration is not None and to_filter is not None:
        after = penetration * to_filter / clean_flow / MILLIGRAM
    return FilterOutlook(
        filter_class=named.filter_class,
        face_velocity=clean_flow / cloth.area,
        life=_life(cloth, named.limit, to_filter=to_filter, loaded_flow=loaded_flow),
        after_filter=after,
        exposure_limit=dust.exposure_limit,
    )


def _life(
    cloth: Filter, limit: float | None, *, to_filter: float | None, loaded_flow: float | None
) -> float | None:
    if limit is None or not loaded_flow or to_filter is None or to_filter < DUST_RATE.low:
        return None
    load = float(
        filter_load_at_limit(
            limit=limit,
            face_velocity=loaded_flow / cloth.area,
            clean_resistance=cloth.clean_resistance,
            cake_resistance=cloth.cake_resistance,
        )
    )
    if load <= 0:
        return None
    # a filter that could carry more than the formulas know is said to last as long as they know
    return float(
        filter_life(cake_load=min(load, CAKE_LOAD.high), area=cloth.area, dust_rate=to_filter)
    )

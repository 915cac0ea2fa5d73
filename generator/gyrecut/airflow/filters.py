"""The filter behind the separator: what its cloth and its dust cake cost, and how long it lasts."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.airflow.ranges import Range

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

_SOURCE = "far beyond any workshop filter; common practice, no source"

FACE_VELOCITY = Range(
    quantity="velocity through the filter cloth", low=0.0, high=100.0, unit="m/s", source=_SOURCE
)
CLEAN_RESISTANCE = Range(
    quantity="resistance of the clean filter", low=0.0, high=1e7, unit="Pa*s/m", source=_SOURCE
)
CAKE_RESISTANCE = Range(
    quantity="specific resistance of the dust cake", low=0.0, high=1e8, unit="1/s", source=_SOURCE
)
CAKE_LOAD = Range(quantity="dust on the filter", low=0.0, high=100.0, unit="kg/m^2", source=_SOURCE)
DUST_RATE = Range(
    quantity="dust that reaches the filter", low=1e-12, high=1.0, unit="kg/s", source=_SOURCE
)
AREA = Range(quantity="filter area", low=1e-5, high=1000.0, unit="m^2", source=_SOURCE)
LIMIT = Range(
    quantity="pressure drop the filter may reach", low=0.0, high=90e3, unit="Pa", source=_SOURCE
)

# Temperature that cloths and cakes are measured at, about 20 degC; flow in them is laminar.
REFERENCE_VISCOSITY = 1.81e-5  # Pa s
# The published cake resistances lie so far apart for one dust: a factor either way, weak.
CAKE_SPREAD = 3.0
# inH2O/((lb/ft2)(ft/min)), the unit of the 1940 table, in 1/s
CAKE_UNIT = 249.089 / (0.45359237 / 0.3048**2 * 0.3048 / 60.0)


def filter_loss(
    face_velocity: Numbers,
    *,
    clean_resistance: Numbers,
    cake_resistance: Numbers,
    cake_load: Numbers,
    viscosity: Numbers,
) -> Numbers:
    r"""Pressure drop of a flat filter with dust on it.

    .. math:: \Delta p = v (S_0 + K_2 w) \mu / \mu_{20}

    Parameters
    ----------
    face_velocity : float or ndarray
        Flow over filter area, :math:`v` [m/s]
    clean_resistance : float or ndarray
        Of the cloth, :math:`S_0` [Pa*s/m]
    cake_resistance : float or ndarray
        Of a dust cake of 1 kg/m2, :math:`K_2` [1/s]
    cake_load : float or ndarray
        Dust on the filter, :math:`w` [kg/m^2]
    viscosity : float or ndarray
        Of the air, :math:`\mu` [Pa*s]

    Returns
    -------
    float or ndarray
        Pressure drop :math:`\Delta p` [Pa]

    Raises
    ------
    OutOfRangeError
        Outside the ranges named in this module.

    Notes
    -----
    Proportional to velocity, unlike every other loss of a duct. Dust that goes into the depth
    of a new cloth raises its own resistance to 1.5 to 3 times for good (common practice, no
    source); that is not counted here.

    References
    ----------
    .. [1] Darcy's law for cloth and cake, as in US EPA, Air Pollution Control Cost Manual,
       section 6, chapter 1, Baghouses, from memory.
    """
    FACE_VELOCITY.check(face_velocity)
    CLEAN_RESISTANCE.check(clean_resistance)
    CAKE_RESISTANCE.check(cake_resistance)
    CAKE_LOAD.check(cake_load)
    resistance = clean_resistance + cake_resistance * cake_load
    return face_velocity * resistance * viscosity / REFERENCE_VISCOSITY


def filter_load_at_limit(
    *, limit: Numbers, face_velocity: Numbers, clean_resistance: Numbers, cake_resistance: Numbers
) -> Numbers:
    r"""Dust on the filter at which it reaches a pressure drop, at 20 degC.

    .. math:: w = (\Delta p / v - S_0) / K_2

    Parameters
    ----------
    limit : float or ndarray
        Pressure drop at which it is cleaned, :math:`\Delta p` [Pa]
    face_velocity : float or ndarray
        Flow over filter area, :math:`v` [m/s]
    clean_resistance : float or ndarray
        Of the cloth, :math:`S_0` [Pa*s/m]
    cake_resistance : float or ndarray
        Of a dust cake of 1 kg/m2, :math:`K_2` [1/s]

    Returns
    -------
    float or ndarray
        Dust :math:`w` [kg/m^2]; below 0 where the clean filter is over the limit already.

    Raises
    ------
    OutOfRangeError
        Outside the ranges named in this module.

    References
    ----------
    .. [1] :func:`filter_loss` solved for the load.
    """
    LIMIT.check(limit)
    FACE_VELOCITY.check(face_velocity)
    CLEAN_RESISTANCE.check(clean_resistance)
    CAKE_RESISTANCE.check(cake_resistance)
    return (limit / face_velocity - clean_resistance) / cake_resistance


def filter_life(*, cake_load: Numbers, area: Numbers, dust_rate: Numbers) -> Numbers:
    r"""Time until so much dust lies on the filter.

    .. math:: t = w A / \dot{m}

    Parameters
    ----------
    cake_load : float or ndarray
        Dust on the filter at the end, :math:`w` [kg/m^2]
    area : float or ndarray
        Filter area :math:`A` [m^2]
    dust_rate : float or ndarray
        Dust that passes the separator, :math:`\dot{m}` [kg/s]

    Returns
    -------
    float or ndarray
        Running time :math:`t` [s]

    Raises
    ------
    OutOfRangeError
        Outside the ranges named in this module.

    Notes
    -----
    As weak as the cake resistance it rests on: a factor of 3 either way.

    References
    ----------
    .. [1] Mass balance; holds by definition.
    """
    CAKE_LOAD.check(cake_load)
    AREA.check(area)
    DUST_RATE.check(dust_rate)
    return cake_load * area / dust_rate

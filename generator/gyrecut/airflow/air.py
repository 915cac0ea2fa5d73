"""Density and viscosity of the air from temperature, pressure or altitude, and humidity."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

SUTHERLAND_BETA = 1.458e-6  # kg/(m s K^0.5), U.S. Standard Atmosphere 1976, eq. (51)
SUTHERLAND_S = 110.4  # K, same equation
GAS_CONSTANT_DRY_AIR = 287.05  # J/(kg K)
GAS_CONSTANT_WATER_VAPOUR = 461.5  # J/(kg K)
MAGNUS_PRESSURE = 611.2  # Pa, WMO No. 8, over water
MAGNUS_SLOPE = 17.62  # -, same formula
MAGNUS_TEMPERATURE = 243.12  # K, same formula
FREEZING_POINT = 273.15  # K
STANDARD_PRESSURE = 101325.0  # Pa, at sea level, ISO 2533
STANDARD_TEMPERATURE = 288.15  # K, at sea level, ISO 2533
LAPSE_RATE = 6.5e-3  # K/m, ISO 2533, up to 11 km
PRESSURE_EXPONENT = 5.25588  # -, g / (lapse rate times gas constant), ISO 2533

VISCOSITY_TEMPERATURE = Range(
    quantity="air temperature",
    low=200.0,
    high=400.0,
    unit="K",
    source="narrower than the 100 to 1900 K the Sutherland form is used for",
)
HUMID_TEMPERATURE = Range(
    quantity="air temperature",
    low=228.15,
    high=333.15,
    unit="K",
    source="Magnus formula over water, -45 to 60 degC, WMO No. 8",
)
RELATIVE_HUMIDITY = Range(
    quantity="relative humidity", low=0.0, high=1.0, unit="-", source="by definition"
)
ALTITUDE = Range(
    quantity="altitude",
    low=-500.0,
    high=11000.0,
    unit="m",
    source="lowest layer of the standard atmosphere, ISO 2533",
)
PRESSURE = Range(
    quantity="air pressure",
    low=20e3,
    high=150e3,
    unit="Pa",
    source="an ideal gas within 0.1 %; the ends are common practice, no source",
)


@dataclass(frozen=True, slots=True, kw_only=True)
class AirState:
    """The air that is drawn in.

    Parameters
    ----------
    temperature : float
        Static temperature [K]
    pressure : float
        Absolute static pressure [Pa]
    relative_humidity : float
        Vapour pressure over saturation pressure [-]
    density : float
        Of the humid air [kg/m^3]
    viscosity : float
        Dynamic viscosity [Pa*s]
    """

    temperature: float
    pressure: float
    relative_humidity: float
    density: float
    viscosity: float


def air_state(temperature: float, *, altitude: float, relative_humidity: float) -> AirState:
    """State of the air at a place, under the standard pressure of its altitude.

    Parameters
    ----------
    temperature : float
        Static temperature [K]
    altitude : float
        Height above sea level [m]
    relative_humidity : float
        Vapour pressure over saturation pressure [-]

    Returns
    -------
    AirState
        With density and viscosity.

    Raises
    ------
    OutOfRangeError
        Outside the ranges of the formulas combined here.

    References
    ----------
    .. [1] Those of :func:`pressure_at_altitude`, :func:`density` and :func:`dynamic_viscosity`.
    """
    return air_state_at_pressure(
        temperature,
        pressure=float(pressure_at_altitude(altitude)),
        relative_humidity=relative_humidity,
    )


def air_state_at_pressure(
    temperature: float, *, pressure: float, relative_humidity: float
) -> AirState:
    """State of the air under a pressure that was measured.

    Parameters
    ----------
    temperature : float
        Static temperature [K]
    pressure : float
        Absolute static pressure [Pa]
    relative_humidity : float
        Vapour pressure over saturation pressure [-]

    Returns
    -------
    AirState
        With density and viscosity.

    Raises
    ------
    OutOfRangeError
        Outside the ranges of the formulas combined here.

    References
    ----------
    .. [1] Those of :func:`density` and :func:`dynamic_viscosity`.
    """
    return AirState(
        temperature=temperature,
        pressure=pressure,
        relative_humidity=relative_humidity,
        density=float(density(temperature, pressure=pressure, relative_humidity=relative_humidity)),
        viscosity=float(dynamic_viscosity(temperature)),
    )


def dynamic_viscosity(temperature: Numbers) -> Numbers:
    r"""Dynamic viscosity of air, Sutherland form.

    .. math:: \mu = \beta T^{3/2} / (T + S)

    Parameters
    ----------
    temperature : float or ndarray
        Static temperature :math:`T` [K]

    Returns
    -------
    float or ndarray
        Dynamic viscosity :math:`\mu` [Pa*s]

    Raises
    ------
    OutOfRangeError
        Outside 200 K to 400 K.

    Notes
    -----
    Does not depend on pressure; humidity lowers it by less than 1 % below 40 degC. Property
    libraries lie 0.3 to 0.6 % higher between 0 and 60 degC.

    References
    ----------
    .. [1] U.S. Standard Atmosphere, 1976. NOAA, NASA, USAF. Eq. (51), from memory.
    """
    VISCOSITY_TEMPERATURE.check(temperature)
    viscosity: Numbers = SUTHERLAND_BETA * temperature**1.5 / (temperature + SUTHERLAND_S)
    return viscosity


def saturation_vapour_pressure(temperature: Numbers) -> Numbers:
    r"""Vapour pressure of water over a plane water surface, Magnus formula.

    .. math:: p_s = 611.2 \exp(17.62 t / (243.12 + t)), \quad t = T - 273.15

    Parameters
    ----------
    temperature : float or ndarray
        Temperature :math:`T` [K]

    Returns
    -------
    float or ndarray
        Saturation vapour pressure :math:`p_s` [Pa]

    Raises
    ------
    OutOfRangeError
        Outside 228.15 K to 333.15 K.

    References
    ----------
    .. [1] WMO No. 8, Guide to Instruments and Methods of Observation, Annex 4.B, from memory.
    """
    HUMID_TEMPERATURE.check(temperature)
    celsius = temperature - FREEZING_POINT
    pressure: Numbers = MAGNUS_PRESSURE * np.exp(
        MAGNUS_SLOPE * celsius / (MAGNUS_TEMPERATURE + celsius)
    )
    return pressure


def density(temperature: Numbers, *, pressure: Numbers, relative_humidity: Numbers) -> Numbers:
    r"""Density of humid air as a mixture of two ideal gases.

    .. math:: \rho = \frac{p - \varphi p_s}{R_a T} + \frac{\varphi p_s}{R_v T}

    Parameters
    ----------
    temperature : float or ndarray
        Static temperature :math:`T` [K]
    pressure : float or ndarray
        Absolute static pressure :math:`p` [Pa]
    relative_humidity : float or ndarray
        Vapour pressure over saturation pressure, :math:`\varphi` [-]

    Returns
    -------
    float or ndarray
        Density :math:`\rho` [kg/m^3]

    Raises
    ------
    OutOfRangeError
        Outside 228.15 K to 333.15 K, 20 kPa to 150 kPa, or 0 to 1.

    References
    ----------
    .. [1] Ideal gas law with R 287.05 and 461.5 J/(kg K), from memory.
    """
    PRESSURE.check(pressure)
    RELATIVE_HUMIDITY.check(relative_humidity)
    vapour = relative_humidity * saturation_vapour_pressure(temperature)
    return (
        (pressure - vapour) / GAS_CONSTANT_DRY_AIR + vapour / GAS_CONSTANT_WATER_VAPOUR
    ) / temperature


def pressure_at_altitude(altitude: Numbers) -> Numbers:
    r"""Air pressure of the standard atmosphere.

    .. math:: p = 101325 (1 - 0.0065 z / 288.15)^{5.25588}

    Parameters
    ----------
    altitude : float or ndarray
        Height above sea level :math:`z` [m]

    Returns
    -------
    float or ndarray
        Absolute static pressure :math:`p` [Pa]

    Raises
    ------
    OutOfRangeError
        Outside -500 m to 11000 m.

    Notes
    -----
    Takes the height as geopotential height, which is 0.08 % less at 5000 m.

    References
    ----------
    .. [1] ISO 2533:1975, Standard Atmosphere, from memory.
    """
    ALTITUDE.check(altitude)
    share = 1.0 - LAPSE_RATE * altitude / STANDARD_TEMPERATURE
    pressure: Numbers = STANDARD_PRESSURE * share**PRESSURE_EXPONENT
    return pressure

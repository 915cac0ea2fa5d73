"""Similar bodies: measured numbers of one size carried over to another."""

from __future__ import annotations

from dataclasses import dataclass
from math import pi
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range
from gyrecut.correlations.geometry import BODY_DIAMETER
from gyrecut.correlations.validity import AIR_DENSITY, FLOW, PARTICLE_DENSITY, VISCOSITY

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

STOKES_NUMBER = Range(
    quantity="Stokes number at the cut size",
    low=1e-6,
    high=1.0,
    unit="-",
    source="published bodies have 1e-4 to 1e-2; the ends are common practice, no source",
)
EULER_NUMBER = Range(
    quantity="Euler number",
    low=0.0,
    high=1e5,
    unit="-",
    source="published bodies have 40 to 1000; the ends are common practice, no source",
)


@dataclass(frozen=True, slots=True, kw_only=True)
class SimilarityNumbers:
    """What a shape has at any size, on the mean velocity in its body.

    Parameters
    ----------
    stokes_number : float
        At the cut size [-]
    euler_number : float
        Pressure drop over the velocity head [-]
    """

    stokes_number: float
    euler_number: float


# Stairmand, Trans. Institution of Chemical Engineers 29 (1951) 356, by family name; as quoted in
# Svarovsky 1981 and Rhodes, Introduction to Particle Technology, ch. 9, from memory. Bodies of
# 0.203 m, little dust.
STAIRMAND_NUMBERS = {
    "stairmand-high-efficiency": SimilarityNumbers(stokes_number=1.4e-4, euler_number=320.0),
    "stairmand-high-throughput": SimilarityNumbers(stokes_number=6.0e-3, euler_number=46.0),
}


def mean_body_velocity(*, body_diameter: Numbers, flow: Numbers) -> Numbers:
    r"""Mean velocity along the axis in the empty barrel.

    .. math:: v = 4 Q / (\pi D^2)

    Parameters
    ----------
    body_diameter : float or ndarray
        Bore of the barrel, :math:`D` [m]
    flow : float or ndarray
        Volume flow through this one cyclone, :math:`Q` [m^3/s]

    Returns
    -------
    float or ndarray
        Velocity :math:`v` [m/s]

    Raises
    ------
    OutOfRangeError
        Outside 5 mm to 10 m, or 1e-6 to 100 m3/s.

    References
    ----------
    .. [1] Continuity; holds by definition.
    """
    BODY_DIAMETER.check(body_diameter)
    FLOW.check(flow)
    return 4.0 * flow / (pi * body_diameter**2)


def cut_size_from_stokes_number(
    *,
    stokes_number: Numbers,
    body_diameter: Numbers,
    flow: Numbers,
    particle_density: Numbers,
    viscosity: Numbers,
) -> Numbers:
    r"""Cut size of a body whose Stokes number is known from a similar one.

    .. math:: d_{50} = \sqrt{Stk_{50} \cdot 18 \mu D / (\rho_p v)}

    Parameters
    ----------
    stokes_number : float or ndarray
        At the cut size, on the mean velocity in the body, :math:`Stk_{50}` [-]
    body_diameter : float or ndarray
        Bore of the barrel, :math:`D` [m]
    flow : float or ndarray
        Volume flow through this one cyclone, which gives :math:`v` [m^3/s]
    particle_density : float or ndarray
        Density of one grain, less that of air where it counts, :math:`\rho_p` [kg/m^3]
    viscosity : float or ndarray
        Dynamic viscosity of the air, :math:`\mu` [Pa*s]

    Returns
    -------
    float or ndarray
        Cut size :math:`d_{50}` [m]

    Raises
    ------
    OutOfRangeError
        When a value is outside its range.

    References
    ----------
    .. [1] Rhodes, Introduction to Particle Technology, ch. 9, from memory; by definition.
    """
    STOKES_NUMBER.check(stokes_number)
    PARTICLE_DENSITY.check(particle_density)
    VISCOSITY.check(viscosity)
    velocity = mean_body_velocity(body_diameter=body_diameter, flow=flow)
    diameter: Numbers = np.sqrt(
        18.0 * stokes_number * viscosity * body_diameter / (particle_density * velocity)
    )
    return diameter


def pressure_drop_from_euler_number(
    *, euler_number: Numbers, body_diameter: Numbers, flow: Numbers, air_density: Numbers
) -> Numbers:
    r"""Pressure drop of a body whose Euler number is known from a similar one.

    .. math:: \Delta p = Eu \rho v^2 / 2

    Parameters
    ----------
    euler_number : float or ndarray
        On the mean velocity in the body, :math:`Eu` [-]
    body_diameter : float or ndarray
        Bore of the barrel [m]
    flow : float or ndarray
        Volume flow through this one cyclone, which gives :math:`v` [m^3/s]
    air_density : float or ndarray
        Density of the air, :math:`\rho` [kg/m^3]

    Returns
    -------
    float or ndarray
        Pressure drop :math:`\Delta p` [Pa]

    Raises
    ------
    OutOfRangeError
        When a value is outside its range.

    References
    ----------
    .. [1] Rhodes, Introduction to Particle Technology, ch. 9, from memory; by definition.
    """
    EULER_NUMBER.check(euler_number)
    AIR_DENSITY.check(air_density)
    velocity = mean_body_velocity(body_diameter=body_diameter, flow=flow)
    drop: Numbers = euler_number * air_density * velocity**2 / 2.0
    return drop

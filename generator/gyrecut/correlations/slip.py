"""Slip of small grains between the molecules, and the diameters that it tells apart."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.air import PRESSURE, SUTHERLAND_S
from gyrecut.airflow.ranges import Range
from gyrecut.correlations.validity import PARTICLE_DENSITY, TEMPERATURE

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

MEAN_FREE_PATH = 66.5e-9  # m, at the next two; 66 nm in Hinds (from memory)
MEAN_FREE_PATH_TEMPERATURE = 293.15  # K
MEAN_FREE_PATH_PRESSURE = 101325.0  # Pa

# Allen and Raabe, Aerosol Science and Technology 4 (1985) 269: solid spheres, from memory.
SLIP_CONTINUUM = 1.142
SLIP_MOLECULAR = 0.558
SLIP_TRANSITION = 0.999

UNIT_DENSITY = 1000.0  # kg/m3, of the sphere that an aerodynamic diameter is of

# One step at least halves the error: the root of the slip factor falls with the diameter by a
# power that stays below one half.
STEPS = 60  # 0.5^60 is 9e-19
CLOSE_ENOUGH = 1e-14  # relative change of the diameter

DIAMETER = Range(
    quantity="particle diameter",
    low=1e-9,
    high=0.1,
    unit="m",
    source="far beyond any workshop dust; common practice, no source",
)
STOKES_DIAMETER = Range(
    quantity="cut size without slip",
    low=1e-7,
    high=0.1,
    unit="m",
    source="finer than any cyclone cuts; common practice, no source",
)
PATH = Range(
    quantity="mean free path",
    low=1e-9,
    high=1e-6,
    unit="m",
    source="air at about 0.07 to 60 bar; common practice, no source",
)
SHAPE_FACTOR = Range(
    quantity="dynamic shape factor",
    low=1.0,
    high=5.0,
    unit="-",
    source="1 for a sphere, 2 for flakes; the end is common practice, no source",
)


def mean_free_path(temperature: Numbers, *, pressure: Numbers) -> Numbers:
    r"""Mean free path of the molecules of air.

    .. math::
        \lambda = \lambda_0 \frac{T}{T_0} \frac{p_0}{p} \frac{1 + S/T_0}{1 + S/T}

    Parameters
    ----------
    temperature : float or ndarray
        Static temperature :math:`T` [K]
    pressure : float or ndarray
        Absolute static pressure :math:`p` [Pa]

    Returns
    -------
    float or ndarray
        Mean free path :math:`\lambda` [m]

    Raises
    ------
    OutOfRangeError
        Outside 200 K to 400 K, or 20 kPa to 150 kPa.

    References
    ----------
    .. [1] Willeke, Temperature dependence of particle slip in a gaseous medium. J. Aerosol
       Science 7 (1976) 381, from memory; it is viscosity times the root of temperature over
       pressure, with Sutherland's viscosity.
    """
    TEMPERATURE.check(temperature)
    PRESSURE.check(pressure)
    warmth = temperature / MEAN_FREE_PATH_TEMPERATURE
    collisions = (1.0 + SUTHERLAND_S / MEAN_FREE_PATH_TEMPERATURE) / (
        1.0 + SUTHERLAND_S / temperature
    )
    return MEAN_FREE_PATH * warmth * (MEAN_FREE_PATH_PRESSURE / pressure) * collisions


def slip_factor_allen_raabe(diameter: Numbers, *, mean_free_path: Numbers) -> Numbers:
    r"""Cunningham's factor: how much faster a small sphere drifts than Stokes' law has it.

    .. math::
        C = 1 + Kn (1.142 + 0.558 \exp(-0.999/Kn)), \quad Kn = 2 \lambda / d

    Parameters
    ----------
    diameter : float or ndarray
        Of the sphere, :math:`d` [m]
    mean_free_path : float or ndarray
        Mean free path of the air, :math:`\lambda` [m]

    Returns
    -------
    float or ndarray
        Slip factor :math:`C` [-]

    Raises
    ------
    OutOfRangeError
        Outside 1 nm to 0.1 m, or 1 nm to 1 um.

    References
    ----------
    .. [1] Allen and Raabe, Slip correction measurements of spherical solid aerosol particles in
       an improved Millikan apparatus. Aerosol Science and Technology 4 (1985) 269, from memory.
    """
    DIAMETER.check(diameter)
    PATH.check(mean_free_path)
    return _slip_factor(diameter, mean_free_path)


def physical_cut_size(stokes_diameter: Numbers, *, mean_free_path: Numbers) -> Numbers:
    r"""Diameter of the sphere that, with slip, drifts as one of another size without.

    .. math:: d \sqrt{C(d)} = d_{St}

    Parameters
    ----------
    stokes_diameter : float or ndarray
        Cut size of a model without slip, :math:`d_{St}` [m]
    mean_free_path : float or ndarray
        Mean free path of the air, :math:`\lambda` [m]

    Returns
    -------
    float or ndarray
        Cut size with slip, :math:`d` [m]

    Raises
    ------
    OutOfRangeError
        Outside 100 nm to 0.1 m, or 1 nm to 1 um.

    References
    ----------
    .. [1] Hinds, Aerosol Technology, 2nd ed., Wiley 1999, ch. 3, from memory; solved by repeated
       substitution for all elements of an array at once.
    """
    STOKES_DIAMETER.check(stokes_diameter)
    PATH.check(mean_free_path)
    return _with_slip(stokes_diameter, mean_free_path)


def aerodynamic_diameter(
    diameter: Numbers,
    *,
    particle_density: Numbers,
    shape_factor: Numbers,
    mean_free_path: Numbers,
) -> Numbers:
    r"""Diameter of the sphere of unit density that drifts as a grain does.

    .. math:: d_a \sqrt{C(d_a)} = d \sqrt{\frac{\rho_p C(d)}{1000 \chi}}

    Parameters
    ----------
    diameter : float or ndarray
        Of the sphere with the volume of the grain, :math:`d` [m]
    particle_density : float or ndarray
        Density of the grain, :math:`\rho_p` [kg/m^3]
    shape_factor : float or ndarray
        Drag of the grain over that of the sphere, :math:`\chi`; 1 for a sphere [-]
    mean_free_path : float or ndarray
        Mean free path of the air, :math:`\lambda` [m]

    Returns
    -------
    float or ndarray
        Aerodynamic diameter :math:`d_a` [m]

    Raises
    ------
    OutOfRangeError
        When a value is outside its range.

    References
    ----------
    .. [1] Hinds 1999, ch. 3, from memory.
    """
    PARTICLE_DENSITY.check(particle_density)
    SHAPE_FACTOR.check(shape_factor)
    slip = slip_factor_allen_raabe(diameter, mean_free_path=mean_free_path)
    without_slip = diameter * np.sqrt(particle_density * slip / (UNIT_DENSITY * shape_factor))
    return _with_slip(without_slip, mean_free_path)


def _with_slip(without_slip: Numbers, free_path: Numbers) -> Numbers:
    diameter: Numbers = without_slip / np.sqrt(_slip_factor(without_slip, free_path))
    for _ in range(STEPS):
        before = diameter
        diameter = without_slip / np.sqrt(_slip_factor(diameter, free_path))
        if np.all(np.abs(diameter - before) <= CLOSE_ENOUGH * diameter):
            break
    return diameter


def _slip_factor(diameter: Numbers, free_path: Numbers) -> Numbers:
    knudsen = 2.0 * free_path / diameter
    factor: Numbers = 1.0 + knudsen * (
        SLIP_CONTINUUM + SLIP_MOLECULAR * np.exp(-SLIP_TRANSITION / knudsen)
    )
    return factor

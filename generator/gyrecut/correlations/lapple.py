"""Cut size and grade efficiency after Lapple: the air makes a few turns, dust has that long."""

from __future__ import annotations

from math import pi
from typing import TYPE_CHECKING

from gyrecut.airflow.ranges import Range
from gyrecut.correlations.geometry import check_geometry, mean_inlet_velocity
from gyrecut.correlations.validity import (
    AIR_DENSITY,
    CUT_SIZE,
    FLOW,
    INLET_VELOCITY,
    PARTICLE_DENSITY,
    PARTICLE_DIAMETER,
    VISCOSITY,
)

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry

_SOURCE = "room around what textbooks use; common practice, no source"

TURNS = Range(quantity="effective turns", low=0.5, high=50.0, unit="-", source=_SOURCE)
SLOT_WIDTH = Range(quantity="slot width", low=1e-4, high=5.0, unit="m", source=_SOURCE)


def effective_turns_lapple(geometry: CycloneGeometry) -> Numbers:
    r"""Count the turns the air makes in the outer vortex.

    .. math:: N_e = (h + (H - h)/2) / a

    Parameters
    ----------
    geometry : CycloneGeometry
        With barrel height :math:`h`, total height :math:`H`, slot height :math:`a` [m]

    Returns
    -------
    float or ndarray
        Effective turns :math:`N_e` [-]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible.

    References
    ----------
    .. [1] Lapple, Processes use many collector types. Chemical Engineering 58 (1951) 144, from
       memory; as quoted in Tan, Air Pollution and Greenhouse Gases, Springer 2014, eq. 6.58.
    """
    check_geometry(geometry)
    cone_height = geometry.total_height - geometry.barrel_height
    return (geometry.barrel_height + cone_height / 2.0) / geometry.slot_height


def cut_size_from_turns_lapple(
    *,
    slot_width: Numbers,
    effective_turns: Numbers,
    inlet_velocity: Numbers,
    particle_density: Numbers,
    air_density: Numbers,
    viscosity: Numbers,
) -> Numbers:
    r"""Particle diameter caught by half, from the number of turns.

    .. math:: d_{50} = \sqrt{\frac{9 \mu b}{2 \pi N_e v_i (\rho_p - \rho)}}

    Parameters
    ----------
    slot_width : float or ndarray
        Width of the inlet slot along the radius, :math:`b` [m]
    effective_turns : float or ndarray
        Turns in the outer vortex, :math:`N_e` [-]
    inlet_velocity : float or ndarray
        Mean velocity in the slot, :math:`v_i` [m/s]
    particle_density : float or ndarray
        Density of one grain, :math:`\rho_p` [kg/m^3]
    air_density : float or ndarray
        Density :math:`\rho`, 0 to neglect it [kg/m^3]
    viscosity : float or ndarray
        Dynamic viscosity of the air, :math:`\mu` [Pa*s]

    Returns
    -------
    float or ndarray
        Cut size :math:`d_{50}` [m]

    Raises
    ------
    OutOfRangeError
        Outside the ranges named in this module and in :mod:`gyrecut.correlations.validity`.

    Notes
    -----
    Knows of the body only the slot width and the turns. Against measured 0.2 m Stairmand bodies
    it gives 1.6 times the cut size of the high efficiency shape and 0.7 times that of the high
    throughput shape (Stairmand 1951, as quoted in textbooks, from memory). Its sizes are
    physical diameters of spheres, without slip.

    References
    ----------
    .. [1] Lapple, Processes use many collector types. Chemical Engineering 58 (1951) 144, from
       memory.
    """
    SLOT_WIDTH.check(slot_width)
    TURNS.check(effective_turns)
    INLET_VELOCITY.check(inlet_velocity)
    PARTICLE_DENSITY.check(particle_density)
    AIR_DENSITY.check(air_density)
    VISCOSITY.check(viscosity)
    excess_density = particle_density - air_density
    diameter: Numbers = (
        9.0
        * viscosity
        * slot_width
        / (2.0 * pi * effective_turns * inlet_velocity * excess_density)
    ) ** 0.5
    return diameter


def cut_size_lapple(
    geometry: CycloneGeometry,
    *,
    flow: Numbers,
    particle_density: Numbers,
    air_density: Numbers,
    viscosity: Numbers,
) -> Numbers:
    """Particle diameter caught by half, for a body and a flow.

    Parameters
    ----------
    geometry : CycloneGeometry
        Inside dimensions [m]
    flow : float or ndarray
        Volume flow through this one cyclone [m^3/s]
    particle_density : float or ndarray
        Density of one grain [kg/m^3]
    air_density : float or ndarray
        Density of the air, 0 to neglect it [kg/m^3]
    viscosity : float or ndarray
        Dynamic viscosity of the air [Pa*s]

    Returns
    -------
    float or ndarray
        Cut size [m]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, or a value outside the ranges of the formulas combined.

    Notes
    -----
    :func:`cut_size_from_turns_lapple` with the turns of :func:`effective_turns_lapple`.

    References
    ----------
    .. [1] As those two.
    """
    return cut_size_from_turns_lapple(
        slot_width=geometry.slot_width,
        effective_turns=effective_turns_lapple(geometry),
        inlet_velocity=mean_inlet_velocity(geometry, flow=flow),
        particle_density=particle_density,
        air_density=air_density,
        viscosity=viscosity,
    )


def body_diameter_for_cut_size_lapple(
    shape: CycloneGeometry,
    *,
    cut_size: Numbers,
    flow: Numbers,
    particle_density: Numbers,
    air_density: Numbers,
    viscosity: Numbers,
) -> Numbers:
    r"""Body diameter at which a shape has a wanted cut size.

    .. math::
        D^3 = \frac{2 \pi N_e Q (\rho_p - \rho) d_{50}^2}{9 \mu \cdot a/D \cdot (b/D)^2}

    Parameters
    ----------
    shape : CycloneGeometry
        Proportions, at any size [m]
    cut_size : float or ndarray
        Cut size wanted, :math:`d_{50}` [m]
    flow : float or ndarray
        Volume flow through one cyclone, :math:`Q` [m^3/s]
    particle_density : float or ndarray
        Density of one grain, :math:`\rho_p` [kg/m^3]
    air_density : float or ndarray
        Density :math:`\rho`, 0 to neglect it [kg/m^3]
    viscosity : float or ndarray
        Dynamic viscosity of the air, :math:`\mu` [Pa*s]

    Returns
    -------
    float or ndarray
        Body diameter :math:`D` [m]

    Raises
    ------
    OutOfRangeError
        When the shape is impossible, a value outside its range, or when only an inlet velocity
        outside 1 m/s to 60 m/s could give that cut size.

    References
    ----------
    .. [1] :func:`cut_size_lapple` solved for the diameter.
    """
    CUT_SIZE.check(cut_size)
    FLOW.check(flow)
    PARTICLE_DENSITY.check(particle_density)
    AIR_DENSITY.check(air_density)
    VISCOSITY.check(viscosity)
    turns = effective_turns_lapple(shape)
    height_ratio = shape.slot_height / shape.body_diameter
    width_ratio = shape.slot_width / shape.body_diameter
    excess_density = particle_density - air_density
    diameter: Numbers = (
        2.0
        * pi
        * turns
        * flow
        * excess_density
        * cut_size**2
        / (9.0 * viscosity * height_ratio * width_ratio**2)
    ) ** (1.0 / 3.0)
    INLET_VELOCITY.check(flow / (height_ratio * width_ratio * diameter**2))
    return diameter


def grade_efficiency_lapple(diameter: Numbers, *, cut_size: Numbers) -> Numbers:
    r"""Share of the particles of one size that is kept.

    .. math:: \eta = 1 / (1 + (d_{50}/d)^2)

    Parameters
    ----------
    diameter : float or ndarray
        Particle diameter :math:`d` [m]
    cut_size : float or ndarray
        Cut size :math:`d_{50}` [m]

    Returns
    -------
    float or ndarray
        Grade efficiency :math:`\eta` [-]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 0.1 m, or 1 nm to 10 mm.

    References
    ----------
    .. [1] Theodore and DePaola, Predicting cyclone efficiency. J. Air Pollution Control
       Association 30 (1980) 1132, from memory: a fit to Lapple's curve.
    """
    PARTICLE_DIAMETER.check(diameter)
    CUT_SIZE.check(cut_size)
    return diameter**2 / (diameter**2 + cut_size**2)

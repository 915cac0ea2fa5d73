"""Cut size and pressure drop after Barth: grains turn on the core in balance with the inflow."""

from __future__ import annotations

from dataclasses import dataclass
from math import pi
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range
from gyrecut.correlations.geometry import mean_inlet_velocity
from gyrecut.correlations.validity import (
    AIR_DENSITY,
    FRICTION,
    LOADING,
    PARTICLE_DENSITY,
    SLOT_OVER_RADIUS,
)
from gyrecut.correlations.vortex import (
    core_height,
    cut_size_on_core,
    mean_finder_velocity,
    wall_velocity,
)

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry

# Two published choices for one place in the formula, a factor of four apart: the first gives
# measured cut sizes, the second measured pressure drops.
FRICTION_HOFFMANN_STEIN = 0.005
FRICTION_BARTH = 0.02

LIP_ROUNDED = 3.41
LIP_SHARP = 4.4

SLOPE_BARTH = 6.4  # of the grade curve: Dirgo and Leith 1985, a fit to Barth's curve, from memory

LIP_LOSS = Range(
    quantity="loss coefficient of the finder's lip",
    low=LIP_ROUNDED,
    high=LIP_SHARP,
    unit="-",
    source="rounded and sharp lip, Hoffmann and Stein 2008, ch. 4, from memory",
)


@dataclass(frozen=True, slots=True, kw_only=True)
class BarthResult:
    """What Barth's model says of one cyclone at one flow.

    Parameters
    ----------
    cut_size : float or ndarray
        Diameter of the sphere caught by half, without slip [m]
    pressure_drop : float or ndarray
        Loss of total pressure, body and core [Pa]
    body_loss, core_loss : float or ndarray
        Its two parts: to the lip of the finder, and from there on [Pa]
    constriction : float or ndarray
        Share of the slot width that the inlet jet keeps [-]
    wall_velocity, core_velocity, finder_velocity : float or ndarray
        Tangential at the wall, tangential at the core, along the axis in the finder [m/s]
    core_height : float or ndarray
        Of the control surface below the finder [m]
    """

    cut_size: Numbers
    pressure_drop: Numbers
    body_loss: Numbers
    core_loss: Numbers
    constriction: Numbers
    wall_velocity: Numbers
    core_velocity: Numbers
    finder_velocity: Numbers
    core_height: Numbers


def friction_with_dust_barth(*, clean_friction: Numbers, loading: Numbers) -> Numbers:
    r"""Wall friction of air that carries dust.

    .. math:: f = f_0 (1 + 3 \sqrt{c_0})

    Parameters
    ----------
    clean_friction : float or ndarray
        Of clean air, :math:`f_0` [-]
    loading : float or ndarray
        Mass of dust in the mass of air, :math:`c_0` [-]

    Returns
    -------
    float or ndarray
        Friction factor :math:`f` [-]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 0.1, or 0 to 10.

    References
    ----------
    .. [1] Hoffmann and Stein, Gas Cyclones and Swirl Tubes, 2nd ed., Springer 2008, ch. 4, from
       memory.
    """
    FRICTION.check(clean_friction)
    LOADING.check(loading)
    friction: Numbers = clean_friction * (1.0 + 3.0 * np.sqrt(loading))
    return friction


def barth(
    geometry: CycloneGeometry,
    *,
    flow: Numbers,
    particle_density: Numbers,
    air_density: Numbers,
    viscosity: Numbers,
    friction: Numbers,
    lip_loss: Numbers,
) -> BarthResult:
    r"""Cut size, pressure drop and velocities of one cyclone.

    .. math::
        \alpha = 1 - 0.4 \sqrt{b/R}, \quad
        v_{CS} = \frac{v_w R/R_x}{1 + \pi f H_{CS} R v_w / Q}, \quad
        d_{50} = \sqrt{\frac{9 \mu Q}{\pi (\rho_p - \rho) v_{CS}^2 H_{CS}}}

        \Delta p = \frac{\rho}{2} \left\{ \frac{R_x}{R} \left[ \left( \frac{v_w R}{R_x} \right)^2
        - v_{CS}^2 \right] + v_{CS}^2 + K v_{CS}^{4/3} v_x^{2/3} \right\}

    Parameters
    ----------
    geometry : CycloneGeometry
        Inside dimensions; radii :math:`R` of the body and :math:`R_x` of the finder [m]
    flow : float or ndarray
        Volume flow through this one cyclone, :math:`Q` [m^3/s]
    particle_density : float or ndarray
        Density of one grain, :math:`\rho_p` [kg/m^3]
    air_density : float or ndarray
        Density of the air, :math:`\rho` [kg/m^3]
    viscosity : float or ndarray
        Dynamic viscosity of the air, :math:`\mu` [Pa*s]
    friction : float or ndarray
        Wall friction :math:`f`; `FRICTION_HOFFMANN_STEIN` or `FRICTION_BARTH`, with dust
        :func:`friction_with_dust_barth` of them [-]
    lip_loss : float or ndarray
        Coefficient :math:`K` of the finder's lip; `LIP_ROUNDED` to `LIP_SHARP` [-]

    Returns
    -------
    BarthResult
        All numbers in SI.

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, or a value outside its range.

    Notes
    -----
    The body's loss is printed with :math:`[v_x/v_{CS} - f H_{CS}/R_x]^{-2}`; that is the core
    velocity without friction over :math:`v_x`, squared, and written so here. The drop is of total
    pressure with all swirl lost, and with a friction of 0.005 it lies up to twice above the
    measured static drop of narrow finders; 0.02 is near it.

    References
    ----------
    .. [1] Barth, Berechnung und Auslegung von Zyklonabscheidern. Brennstoff-Waerme-Kraft 8
       (1956) 1, in the form of Hoffmann and Stein 2008, ch. 4 and 5, from memory.
    """
    PARTICLE_DENSITY.check(particle_density)
    AIR_DENSITY.check(air_density)
    FRICTION.check(friction)
    LIP_LOSS.check(lip_loss)
    inlet_velocity = mean_inlet_velocity(geometry, flow=flow)
    body = geometry.body_diameter / 2.0
    SLOT_OVER_RADIUS.check(geometry.slot_width / body)
    constriction = 1.0 - 0.4 * np.sqrt(geometry.slot_width / body)
    at_wall = wall_velocity(geometry, inlet_velocity=inlet_velocity, constriction=constriction)
    height = core_height(geometry, core_diameter=geometry.finder_diameter)
    radius_ratio = geometry.body_diameter / geometry.finder_diameter
    without_friction = at_wall * radius_ratio
    at_core = without_friction / (1.0 + pi * friction * height * body * at_wall / flow)
    in_finder = mean_finder_velocity(geometry, flow=flow)
    half_density = air_density / 2.0
    body_loss = half_density * (without_friction**2 - at_core**2) / radius_ratio
    core_loss = half_density * (at_core**2 + lip_loss * np.cbrt(at_core**4 * in_finder**2))
    return BarthResult(
        cut_size=cut_size_on_core(
            flow=flow,
            core_velocity=at_core,
            core_height=height,
            excess_density=particle_density - air_density,
            viscosity=viscosity,
        ),
        pressure_drop=body_loss + core_loss,
        body_loss=body_loss,
        core_loss=core_loss,
        constriction=constriction,
        wall_velocity=at_wall,
        core_velocity=at_core,
        finder_velocity=in_finder,
        core_height=height,
    )

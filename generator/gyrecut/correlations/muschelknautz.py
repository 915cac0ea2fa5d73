"""Cut size and pressure drop after Muschelknautz: Barth's balance with a friction that is found.

The friction depends on the Reynolds number, that on the core velocity, and that on the friction;
it is found by repeated substitution for all designs of an array at once.
"""

from __future__ import annotations

from dataclasses import dataclass
from math import pi
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range
from gyrecut.correlations.geometry import mean_inlet_velocity
from gyrecut.correlations.validity import (
    FLOW,
    FRICTION,
    LOADING,
    PARTICLE_DENSITY,
    REAL_AIR_DENSITY,
    SLOT_OVER_RADIUS,
    VISCOSITY,
)
from gyrecut.correlations.vortex import (
    CORE_DEPTH,
    cut_size_on_core,
    mean_finder_velocity,
    wall_area,
    wall_velocity,
)

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry

GRAVITY = 9.81  # m/s2
MAIN_FLOW = 0.9  # share of the flow that goes through the body; the rest creeps along the roof
SMOOTH_FACTOR = 0.323  # hydraulically smooth wall
SMOOTH_EXPONENT = -0.623  # same

# The smooth law falls below what is measured above about 250 mm of body; the book's own values
# are 0.005 to 0.0065. A floor of 0.005 is an engineering choice, and gives measured cut sizes.
USUAL_FRICTION_FLOOR = 0.005

SLOPE_MUSCHELKNAUTZ = 5.0  # of the grade curve; Hoffmann and Stein 2008 see 2 to 7, from memory

# One step shrinks the error to less than 0.623 of it, whatever the design: a rise of the core
# velocity moves the friction by at most that exponent, and the friction it by less than itself.
STEPS = 70  # 0.623^70 is 4e-15
CLOSE_ENOUGH = 1e-13  # relative change of the friction

STRAND_DENSITY = Range(
    quantity="density of the dust strands",
    low=1.0,
    high=5e3,
    unit="kg/m^3",
    source="about 0.4 of the bulk density; the ends are common practice, no source",
)
SHARE = Range(
    quantity="share of the dust kept", low=0.0, high=1.0, unit="-", source="by definition"
)
DUCT_VELOCITY = Range(
    quantity="velocity in the inlet duct",
    low=0.0,
    high=60.0,
    unit="m/s",
    source="as the inlet velocity; common practice, no source",
)


@dataclass(frozen=True, slots=True, kw_only=True)
class MuschelknautzResult:
    """What the method says of one cyclone at one flow.

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
    friction : float or ndarray
        Wall friction factor that was found, with its dust part [-]
    reynolds : float or ndarray
        Body Reynolds number that it belongs to [-]
    wall_area : float or ndarray
        Of all walls the air rubs on [m^2]
    """

    cut_size: Numbers
    pressure_drop: Numbers
    body_loss: Numbers
    core_loss: Numbers
    constriction: Numbers
    wall_velocity: Numbers
    core_velocity: Numbers
    finder_velocity: Numbers
    friction: Numbers
    reynolds: Numbers
    wall_area: Numbers


def constriction_muschelknautz(geometry: CycloneGeometry, *, loading: Numbers) -> Numbers:
    r"""Share of the slot width that the inlet jet keeps.

    .. math::
        \alpha = \frac{1}{\xi} \left\{ 1 - \sqrt{1 + 4 \left[ \left( \frac{\xi}{2} \right)^2
        - \frac{\xi}{2} \right] \sqrt{1 - \frac{(1 - \xi^2)(2\xi - \xi^2)}{1 + c_0}}} \right\},
        \quad \xi = b/R

    Parameters
    ----------
    geometry : CycloneGeometry
        With slot width :math:`b` and body radius :math:`R` [m]
    loading : float or ndarray
        Mass of dust in the mass of air, :math:`c_0` [-]

    Returns
    -------
    float or ndarray
        Constriction :math:`\alpha` [-]

    Raises
    ------
    OutOfRangeError
        When the slot is wider than the radius, or the loading outside 0 to 10.

    References
    ----------
    .. [1] Hoffmann and Stein, Gas Cyclones and Swirl Tubes, 2nd ed., Springer 2008, ch. 6, from
       memory.
    """
    LOADING.check(loading)
    slot = geometry.slot_width / (geometry.body_diameter / 2.0)
    SLOT_OVER_RADIUS.check(slot)
    squeezed = np.sqrt(1.0 - (1.0 - slot**2) * (2.0 * slot - slot**2) / (1.0 + loading))
    constriction: Numbers = (1.0 - np.sqrt(1.0 + (slot**2 - 2.0 * slot) * squeezed)) / slot
    return constriction


def dust_friction_muschelknautz(
    geometry: CycloneGeometry,
    *,
    flow: Numbers,
    air_density: Numbers,
    loading: Numbers,
    share_kept: Numbers,
    strand_density: Numbers,
) -> Numbers:
    r"""Wall friction that the strands of dust on the wall add to that of the air.

    .. math::
        f_d = 0.25 \left( \frac{R}{R_x} \right)^{-0.625}
        \sqrt{\eta c_0 Fr_x \rho / \rho_s}, \quad Fr_x = \frac{v_x}{\sqrt{2 g R_x}}

    Parameters
    ----------
    geometry : CycloneGeometry
        With radii :math:`R` of the body and :math:`R_x` of the finder [m]
    flow : float or ndarray
        Volume flow through this one cyclone, which gives :math:`v_x` [m^3/s]
    air_density : float or ndarray
        Density of the air, :math:`\rho` [kg/m^3]
    loading : float or ndarray
        Mass of dust in the mass of air, :math:`c_0` [-]
    share_kept : float or ndarray
        Share of the dust that reaches the wall, :math:`\eta` [-]
    strand_density : float or ndarray
        Density of the strands, :math:`\rho_s`, about 0.4 of the bulk density [kg/m^3]

    Returns
    -------
    float or ndarray
        Dust part of the friction factor, :math:`f_d` [-]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, or a value outside its range.

    References
    ----------
    .. [1] Hoffmann and Stein 2008, ch. 6, from memory, and one of the less sure numbers here.
    """
    REAL_AIR_DENSITY.check(air_density)
    LOADING.check(loading)
    SHARE.check(share_kept)
    STRAND_DENSITY.check(strand_density)
    in_finder = mean_finder_velocity(geometry, flow=flow)
    froude = in_finder / np.sqrt(GRAVITY * geometry.finder_diameter)
    density_ratio = air_density / strand_density
    radius_ratio = geometry.body_diameter / geometry.finder_diameter
    friction: Numbers = (
        0.25 * radius_ratio**-0.625 * np.sqrt(share_kept * loading * froude * density_ratio)
    )
    return friction


def acceleration_loss_muschelknautz(
    *, inlet_velocity: Numbers, duct_velocity: Numbers, air_density: Numbers, loading: Numbers
) -> Numbers:
    r"""Pressure that it takes to bring air and dust from the duct's velocity to the slot's.

    .. math:: \Delta p = (1 + c_0) \rho (v_2^2 - v_1^2) / 2

    Parameters
    ----------
    inlet_velocity : float or ndarray
        Mean velocity in the slot, :math:`v_2` [m/s]
    duct_velocity : float or ndarray
        Mean velocity in the duct before it, :math:`v_1` [m/s]
    air_density : float or ndarray
        Density of the air, :math:`\rho` [kg/m^3]
    loading : float or ndarray
        Mass of dust in the mass of air, :math:`c_0` [-]

    Returns
    -------
    float or ndarray
        Pressure drop, below zero where the slot is wider than the duct [Pa]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 60 m/s, 0.2 to 5 kg/m3, or 0 to 10.

    References
    ----------
    .. [1] Hoffmann and Stein 2008, ch. 6, from memory; Bernoulli's law without loss.
    """
    DUCT_VELOCITY.check(inlet_velocity)
    DUCT_VELOCITY.check(duct_velocity)
    REAL_AIR_DENSITY.check(air_density)
    LOADING.check(loading)
    return (1.0 + loading) * air_density * (inlet_velocity**2 - duct_velocity**2) / 2.0


def muschelknautz(
    geometry: CycloneGeometry,
    *,
    flow: Numbers,
    particle_density: Numbers,
    air_density: Numbers,
    viscosity: Numbers,
    loading: Numbers,
    friction_floor: Numbers,
    dust_friction: Numbers,
) -> MuschelknautzResult:
    r"""Cut size, pressure drop, velocities and friction of one cyclone.

    .. math::
        v_{CS} = \frac{v_w R/R_x}{1 + f A_R v_w \sqrt{R/R_x} / (2 Q)}, \quad
        f = \max(f_{min}, 0.323 Re^{-0.623}) + f_d

        Re = \frac{R_{in} R_m v_{zw} \rho}{H \mu (1 + v_{zw}^2/(v_w v_{CS}))}, \quad
        v_{zw} = \frac{0.9 Q}{\pi (R^2 - R_m^2)}, \quad R_m = \sqrt{R_x R}

        d_{50} = \sqrt{\frac{18 \mu \cdot 0.9 Q}{2 \pi (\rho_p - \rho) v_{CS}^2 (H - S)}}

        \Delta p = \frac{f A_R \rho (v_w v_{CS})^{3/2}}{2 \cdot 0.9 Q}
        + \frac{\rho}{2} (2 v_x^2 + v_{CS}^2 + 3 v_{CS}^{4/3} v_x^{2/3})

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
    loading : float or ndarray
        Mass of dust in the mass of air, for the inlet jet; 0 for clean air [-]
    friction_floor : float or ndarray
        Least friction of the air, :math:`f_{min}`: 0 for the smooth law alone, or
        `USUAL_FRICTION_FLOOR` [-]
    dust_friction : float or ndarray
        Dust part :math:`f_d` of the friction: 0, or from :func:`dust_friction_muschelknautz` [-]

    Returns
    -------
    MuschelknautzResult
        All numbers in SI.

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, or a value outside its range.

    Notes
    -----
    Constriction, core velocity and cut size have the same form in VDI-Waermeatlas, 12th ed.,
    Springer 2019, ch. L3.4, as read in a published implementation of it.

    For a hydraulically smooth wall; the term for a rough one is left out, because the form
    remembered gives friction factors that cannot be right. The drop is of total pressure with
    all swirl lost: up to twice above the measured static drop of narrow finders. Where the inlet
    duct is wider than the slot, :func:`acceleration_loss_muschelknautz` comes on top of a static
    drop.

    References
    ----------
    .. [1] Muschelknautz and Trefz, VDI-Waermeatlas, in the form of Hoffmann and Stein 2008,
       ch. 6, from memory.
    """
    FLOW.check(flow)
    PARTICLE_DENSITY.check(particle_density)
    REAL_AIR_DENSITY.check(air_density)
    VISCOSITY.check(viscosity)
    FRICTION.check(friction_floor)
    FRICTION.check(dust_friction)
    inlet_velocity = mean_inlet_velocity(geometry, flow=flow)
    height = geometry.total_height - geometry.finder_length
    CORE_DEPTH.check(height / geometry.body_diameter)
    constriction = constriction_muschelknautz(geometry, loading=loading)
    at_wall = wall_velocity(geometry, inlet_velocity=inlet_velocity, constriction=constriction)
    in_finder = mean_finder_velocity(geometry, flow=flow)
    area = wall_area(geometry)
    radius_ratio = geometry.body_diameter / geometry.finder_diameter
    without_friction = at_wall * radius_ratio
    slowing = area * at_wall * np.sqrt(radius_ratio) / (2.0 * flow)

    body, finder = geometry.body_diameter / 2.0, geometry.finder_diameter / 2.0
    mean_radius = np.sqrt(body * finder)
    down_wall = MAIN_FLOW * flow / (pi * body * (body - finder))
    # The Reynolds number of a wall flow without axial motion, and what that motion takes off it.
    reynolds_ahead = (
        (body - geometry.slot_width / 2.0)
        * mean_radius
        * down_wall
        * air_density
        / (geometry.total_height * viscosity)
    )
    axial = down_wall**2 / at_wall
    friction: Numbers = friction_floor + dust_friction
    for _ in range(STEPS):
        at_core = without_friction / (1.0 + slowing * friction)
        reynolds = reynolds_ahead / (1.0 + axial / at_core)
        before = friction
        smooth = SMOOTH_FACTOR * reynolds**SMOOTH_EXPONENT
        friction = np.maximum(friction_floor, smooth) + dust_friction
        if np.all(np.abs(friction - before) <= CLOSE_ENOUGH * friction):
            break

    half_density = air_density / 2.0
    body_loss = friction * area * half_density * (at_wall * at_core) ** 1.5 / (MAIN_FLOW * flow)
    core_loss = half_density * (
        2.0 * in_finder**2 + at_core**2 + 3.0 * np.cbrt(at_core**4 * in_finder**2)
    )
    return MuschelknautzResult(
        cut_size=cut_size_on_core(
            flow=MAIN_FLOW * flow,
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
        friction=friction,
        reynolds=reynolds,
        wall_area=area,
    )

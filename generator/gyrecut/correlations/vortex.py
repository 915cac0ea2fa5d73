"""Surfaces and velocities of the vortex that several models share."""

from __future__ import annotations

from math import pi
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range
from gyrecut.correlations.geometry import check_geometry, mean_inlet_velocity
from gyrecut.correlations.validity import (
    FLOW,
    PARTICLE_DENSITY,
    REAL_AIR_DENSITY,
    SLOT_OVER_RADIUS,
    VISCOSITY,
)

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry

_SOURCE = "room around the published shapes; common practice, no source"

CONE_OVER_BODY = Range(
    quantity="cone height over body diameter",
    low=0.05,
    high=20.0,
    unit="-",
    source=_SOURCE,
)
CORE_SHARE = Range(
    quantity="core diameter over body diameter", low=0.02, high=0.95, unit="-", source=_SOURCE
)
CORE_DEPTH = Range(
    quantity="height of the core below the finder over body diameter",
    low=0.05,
    high=20.0,
    unit="-",
    source=_SOURCE,
)
CONSTRICTION = Range(
    quantity="constriction of the inlet jet", low=0.2, high=1.0, unit="-", source=_SOURCE
)
CORE_VELOCITY = Range(
    quantity="tangential velocity at the core",
    low=0.1,
    high=300.0,
    unit="m/s",
    source="incompressible flow; common practice, no source",
)
CORE_HEIGHT = Range(
    quantity="height of the core below the finder", low=1e-4, high=200.0, unit="m", source=_SOURCE
)


def core_height(geometry: CycloneGeometry, *, core_diameter: Numbers) -> Numbers:
    r"""Height of a cylinder about the axis, from the lip of the finder down to the wall.

    .. math:: z = h - S + (H - h) \min \left( 1, \frac{D - d_c}{D - B} \right)

    Parameters
    ----------
    geometry : CycloneGeometry
        With heights :math:`h`, :math:`H`, :math:`S` and diameters :math:`D`, :math:`B` [m]
    core_diameter : float or ndarray
        Diameter of the cylinder, :math:`d_c` [m]

    Returns
    -------
    float or ndarray
        Height :math:`z` [m]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, the cylinder as wide as the body, or hardly any of it
        stands below the finder.

    Notes
    -----
    With the bore of the finder it is the control surface of Barth, with Iozia and Leith's core
    their core length: both books print two cases, which this form joins.

    References
    ----------
    .. [1] Hoffmann and Stein, Gas Cyclones and Swirl Tubes, 2nd ed., Springer 2008, ch. 4, from
       memory; it follows from the shape of the cone.
    """
    check_geometry(geometry)
    CORE_SHARE.check(core_diameter / geometry.body_diameter)
    beside_core = geometry.body_diameter - core_diameter
    beside_outlet = geometry.body_diameter - geometry.dust_outlet_diameter
    cone_share = beside_core / np.maximum(beside_core, beside_outlet)
    cone = geometry.total_height - geometry.barrel_height
    height: Numbers = geometry.barrel_height - geometry.finder_length + cone * cone_share
    CORE_DEPTH.check(height / geometry.body_diameter)
    return height


def wall_area(geometry: CycloneGeometry) -> Numbers:
    r"""Area of all walls the air rubs on: roof, barrel, cone, and outside of the finder.

    .. math::
        A_R = \pi \left[ R^2 - R_x^2 + 2 R h + (R + R_d) \sqrt{(H - h)^2 + (R - R_d)^2}
        + 2 R_x S \right]

    Parameters
    ----------
    geometry : CycloneGeometry
        With radii :math:`R` of the body, :math:`R_x` of the finder, :math:`R_d` of the dust
        outlet, heights :math:`h`, :math:`H`, :math:`S` [m]

    Returns
    -------
    float or ndarray
        Area :math:`A_R` [m^2]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible.

    Notes
    -----
    Counts the slot as wall and the wall of the finder as thin.

    References
    ----------
    .. [1] Hoffmann and Stein 2008, ch. 6, from memory; the same area stands in Stairmand,
       Engineering 168 (1949) 409.
    """
    check_geometry(geometry)
    body, finder = geometry.body_diameter / 2.0, geometry.finder_diameter / 2.0
    outlet = geometry.dust_outlet_diameter / 2.0
    slant = np.hypot(geometry.total_height - geometry.barrel_height, body - outlet)
    area: Numbers = pi * (
        body**2
        - finder**2
        + 2.0 * body * geometry.barrel_height
        + (body + outlet) * slant
        + 2.0 * finder * geometry.finder_length
    )
    return area


def mean_finder_velocity(geometry: CycloneGeometry, *, flow: Numbers) -> Numbers:
    r"""Mean velocity along the axis in the vortex finder.

    .. math:: v_x = 4 Q / (\pi D_e^2)

    Parameters
    ----------
    geometry : CycloneGeometry
        With finder diameter :math:`D_e` [m]
    flow : float or ndarray
        Volume flow through this one cyclone, :math:`Q` [m^3/s]

    Returns
    -------
    float or ndarray
        Velocity :math:`v_x` [m/s]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, or the flow outside 1e-6 to 100 m3/s.

    References
    ----------
    .. [1] Continuity; holds by definition.
    """
    check_geometry(geometry)
    FLOW.check(flow)
    return 4.0 * flow / (pi * geometry.finder_diameter**2)


def wall_velocity(
    geometry: CycloneGeometry, *, inlet_velocity: Numbers, constriction: Numbers
) -> Numbers:
    r"""Tangential velocity beside the wall, where the inlet jet has been squeezed to it.

    .. math:: v_w = v_i \frac{R - b/2}{\alpha R}

    Parameters
    ----------
    geometry : CycloneGeometry
        With body radius :math:`R` and slot width :math:`b` [m]
    inlet_velocity : float or ndarray
        Mean velocity in the slot, :math:`v_i` [m/s]
    constriction : float or ndarray
        Share of the slot width that the jet keeps, :math:`\alpha` [-]

    Returns
    -------
    float or ndarray
        Velocity :math:`v_w` [m/s]

    Raises
    ------
    OutOfRangeError
        When the slot is wider than the radius, or the constriction outside 0.2 to 1.

    References
    ----------
    .. [1] Hoffmann and Stein 2008, ch. 4, from memory.
    """
    body = geometry.body_diameter / 2.0
    SLOT_OVER_RADIUS.check(geometry.slot_width / body)
    CONSTRICTION.check(constriction)
    return inlet_velocity * (body - geometry.slot_width / 2.0) / (constriction * body)


def cut_size_on_core(
    *,
    flow: Numbers,
    core_velocity: Numbers,
    core_height: Numbers,
    excess_density: Numbers,
    viscosity: Numbers,
) -> Numbers:
    r"""Particle diameter that turns on the surface of the core, neither in nor out.

    .. math:: d_{50} = \sqrt{\frac{9 \mu Q}{\pi \Delta\rho v^2 z}}

    Parameters
    ----------
    flow : float or ndarray
        Volume flow that passes inwards through the surface, :math:`Q` [m^3/s]
    core_velocity : float or ndarray
        Tangential velocity there, :math:`v` [m/s]
    core_height : float or ndarray
        Height of the surface, :math:`z` [m]
    excess_density : float or ndarray
        Density of a grain, less that of air, :math:`\Delta\rho` [kg/m^3]
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

    Notes
    -----
    The radius of the core cancels: centrifugal force and inward drag both go with 1/r. A sphere
    in Stokes flow without slip: for slip see
    :func:`gyrecut.correlations.slip.physical_cut_size`.

    References
    ----------
    .. [1] Barth, Brennstoff-Waerme-Kraft 8 (1956) 1, from memory; the balance of the two forces.
    """
    FLOW.check(flow)
    CORE_VELOCITY.check(core_velocity)
    CORE_HEIGHT.check(core_height)
    PARTICLE_DENSITY.check(excess_density)
    VISCOSITY.check(viscosity)
    diameter: Numbers = np.sqrt(
        9.0 * viscosity * flow / (pi * excess_density * core_velocity**2 * core_height)
    )
    return diameter


def annulus_reynolds(
    geometry: CycloneGeometry, *, flow: Numbers, air_density: Numbers, viscosity: Numbers
) -> Numbers:
    r"""Reynolds number of the ring between body and finder, which tells laminar-like flow.

    .. math:: Re = \frac{\rho v_i (D - D_e)}{2 \mu}

    Parameters
    ----------
    geometry : CycloneGeometry
        With diameters :math:`D` of the body and :math:`D_e` of the finder [m]
    flow : float or ndarray
        Volume flow through this one cyclone, which gives :math:`v_i` [m^3/s]
    air_density : float or ndarray
        Density of the air, :math:`\rho` [kg/m^3]
    viscosity : float or ndarray
        Dynamic viscosity of the air, :math:`\mu` [Pa*s]

    Returns
    -------
    float or ndarray
        Reynolds number :math:`Re` [-]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, or a value outside its range.

    Notes
    -----
    Below about 1e4 measured cut sizes are coarser than the models with a fixed friction say.

    References
    ----------
    .. [1] Moore and McFarland, Environmental Science and Technology 30 (1996) 271, abstract:
       small sampling cyclones fall on one line over this number.
    """
    REAL_AIR_DENSITY.check(air_density)
    VISCOSITY.check(viscosity)
    gap = (geometry.body_diameter - geometry.finder_diameter) / 2.0
    return air_density * mean_inlet_velocity(geometry, flow=flow) * gap / viscosity

"""Cut size and grade curve after Leith and Licht: grains mix back at every height of the body."""

from __future__ import annotations

from dataclasses import dataclass
from math import log, pi
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range
from gyrecut.correlations.geometry import mean_inlet_velocity
from gyrecut.correlations.natural_length import natural_length_alexander
from gyrecut.correlations.validity import (
    CUT_SIZE,
    PARTICLE_DENSITY,
    PARTICLE_DIAMETER,
    TEMPERATURE,
    VISCOSITY,
)
from gyrecut.correlations.vortex import CONE_OVER_BODY

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry

REFERENCE_TEMPERATURE = 283.0  # K, Alexander's tests

FINDER_IN_BARREL = Range(
    quantity="finder length over barrel height",
    low=0.0,
    high=1.0,
    unit="-",
    source="the volumes are those of a finder that ends in the barrel",
)
FINDER_BELOW_SLOT = Range(
    quantity="finder length over slot height",
    low=0.5,
    high=100.0,
    unit="-",
    source="the entry volume begins at half the slot height",
)
VORTEX_VOLUME = Range(
    quantity="volume around the core, over the body diameter cubed",
    low=1e-3,
    high=100.0,
    unit="-",
    source="below, the core would be wider than the cone it ends in",
)
VORTEX_EXPONENT = Range(
    quantity="vortex exponent", low=0.0, high=1.0, unit="-", source="rigid body to free vortex"
)


@dataclass(frozen=True, slots=True, kw_only=True)
class LeithLichtResult:
    """What the model says of one cyclone at one flow.

    Parameters
    ----------
    cut_size : float or ndarray
        Diameter of the sphere caught by half, without slip [m]
    vortex_exponent : float or ndarray
        Of the tangential velocity over the radius; the grade curve needs it too [-]
    natural_length : float or ndarray
        Of the vortex below the finder, after Alexander [m]
    vortex_end_diameter : float or ndarray
        Of the cone where the vortex ends [m]
    entry_volume, vortex_volume : float or ndarray
        Around the finder below the middle of the slot, and around the core below it [m^3]
    geometry_number : float or ndarray
        The constant C of the shape [-]
    configuration : float or ndarray
        The constant G of the shape, C D^2/(a b) [-]
    """

    cut_size: Numbers
    vortex_exponent: Numbers
    natural_length: Numbers
    vortex_end_diameter: Numbers
    entry_volume: Numbers
    vortex_volume: Numbers
    geometry_number: Numbers
    configuration: Numbers


def vortex_exponent_alexander(geometry: CycloneGeometry, *, temperature: Numbers) -> Numbers:
    r"""Exponent with which the tangential velocity grows towards the axis.

    .. math:: n = 1 - (1 - 0.67 D^{0.14}) (T/283)^{0.3}

    Parameters
    ----------
    geometry : CycloneGeometry
        With body diameter :math:`D` [m]
    temperature : float or ndarray
        Of the air, :math:`T` [K]

    Returns
    -------
    float or ndarray
        Vortex exponent :math:`n` [-]

    Raises
    ------
    OutOfRangeError
        Outside 200 K to 400 K.

    References
    ----------
    .. [1] Alexander, Proc. Australasian Institute of Mining and Metallurgy 152 (1949) 203, as
       quoted in Koch and Licht, Chemical Engineering 84(24) (1977) 80, from memory.
    """
    TEMPERATURE.check(temperature)
    exponent: Numbers = (
        1.0
        - (1.0 - 0.67 * geometry.body_diameter**0.14) * (temperature / REFERENCE_TEMPERATURE) ** 0.3
    )
    return exponent


def leith_licht(
    geometry: CycloneGeometry,
    *,
    flow: Numbers,
    particle_density: Numbers,
    viscosity: Numbers,
    temperature: Numbers,
) -> LeithLichtResult:
    r"""Cut size and the constants of the shape.

    .. math::
        C = \frac{8 (V_s + V/2)}{D a b}, \quad
        \Psi = \frac{\rho_p d^2 v_i (n+1)}{18 \mu D}, \quad
        C \Psi_{50} = (\ln 2 / 2)^{2n+2}

    Parameters
    ----------
    geometry : CycloneGeometry
        Inside dimensions [m]
    flow : float or ndarray
        Volume flow through this one cyclone, which gives :math:`v_i` [m^3/s]
    particle_density : float or ndarray
        Density of one grain, :math:`\rho_p` [kg/m^3]
    viscosity : float or ndarray
        Dynamic viscosity of the air, :math:`\mu` [Pa*s]
    temperature : float or ndarray
        Of the air, for the vortex exponent :math:`n` [K]

    Returns
    -------
    LeithLichtResult
        All numbers in SI.

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, the finder ends outside the barrel, or a value is outside
        its range.

    Notes
    -----
    The volume :math:`V` reaches down to the natural length, or to the foot of the cone where that
    is shorter. Cuts finer than every measured body it was held against: 0.4 to 0.8 of the
    measured size above a Reynolds number of 2.5e4, 0.2 to 0.4 in small samplers. Its grade curve
    is flatter than measured ones.

    References
    ----------
    .. [1] Leith and Licht, AIChE Symposium Series 68(126) (1972) 196; Koch and Licht, Chemical
       Engineering 84(24) (1977) 80, from memory.
    """
    PARTICLE_DENSITY.check(particle_density)
    VISCOSITY.check(viscosity)
    inlet_velocity = mean_inlet_velocity(geometry, flow=flow)
    body, finder = geometry.body_diameter, geometry.finder_diameter
    cone = geometry.total_height - geometry.barrel_height
    FINDER_IN_BARREL.check(geometry.finder_length / geometry.barrel_height)
    FINDER_BELOW_SLOT.check(geometry.finder_length / geometry.slot_height)
    CONE_OVER_BODY.check(cone / body)
    exponent = vortex_exponent_alexander(geometry, temperature=temperature)
    natural = natural_length_alexander(geometry)

    length = np.minimum(natural, geometry.total_height - geometry.finder_length)
    in_barrel = np.minimum(length, geometry.barrel_height - geometry.finder_length)
    in_cone = length - in_barrel
    end = body - (body - geometry.dust_outlet_diameter) * in_cone / cone
    entry_volume = (
        pi / 4.0 * (geometry.finder_length - geometry.slot_height / 2.0) * (body**2 - finder**2)
    )
    vortex_volume = (
        pi
        / 4.0
        * (
            body**2 * in_barrel
            + (body**2 + body * end + end**2) * in_cone / 3.0
            - finder**2 * length
        )
    )
    VORTEX_VOLUME.check(vortex_volume / body**3)
    slot_area = geometry.slot_height * geometry.slot_width
    number = 8.0 * (entry_volume + vortex_volume / 2.0) / (body * slot_area)
    half_caught = (log(2.0) / 2.0) ** (2.0 * exponent + 2.0) / number
    return LeithLichtResult(
        cut_size=np.sqrt(
            half_caught
            * 18.0
            * viscosity
            * body
            / (particle_density * inlet_velocity * (exponent + 1.0))
        ),
        vortex_exponent=exponent,
        natural_length=natural,
        vortex_end_diameter=end,
        entry_volume=entry_volume,
        vortex_volume=vortex_volume,
        geometry_number=number,
        configuration=number * body**2 / slot_area,
    )


def grade_efficiency_leith_licht(
    diameter: Numbers, *, cut_size: Numbers, vortex_exponent: Numbers
) -> Numbers:
    r"""Share of the particles of one size that is kept.

    .. math:: \eta = 1 - \exp(-2 (C \Psi)^{1/(2n+2)}) = 1 - 2^{-(d/d_{50})^{1/(n+1)}}

    Parameters
    ----------
    diameter : float or ndarray
        Particle diameter :math:`d` [m]
    cut_size : float or ndarray
        Cut size :math:`d_{50}` [m]
    vortex_exponent : float or ndarray
        Vortex exponent :math:`n` [-]

    Returns
    -------
    float or ndarray
        Grade efficiency :math:`\eta` [-]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 1e9 m, 1 nm to 10 mm, or 0 to 1.

    References
    ----------
    .. [1] Leith and Licht 1972, from memory, in terms of the cut size.
    """
    PARTICLE_DIAMETER.check(diameter)
    CUT_SIZE.check(cut_size)
    VORTEX_EXPONENT.check(vortex_exponent)
    relative = (diameter / cut_size) ** (1.0 / (vortex_exponent + 1.0))
    share: Numbers = -np.expm1(-log(2.0) * relative)
    return share

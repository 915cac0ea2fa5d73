"""Cut size and grade curve after Iozia and Leith: measured core, logistic curve."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range
from gyrecut.correlations.geometry import check_geometry, mean_inlet_velocity
from gyrecut.correlations.validity import CUT_SIZE
from gyrecut.correlations.vortex import core_height, cut_size_on_core

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry

CENTIMETRE = 0.01  # m, the unit that the fit of the slope takes the cut size in

# At the slots of the high throughput shapes, 0.28, the parabola gives a slope of 13.
SLOT_SHARE = Range(
    quantity="slot area over the square of the body diameter",
    low=0.05,
    high=0.16,
    unit="-",
    source="where the fit gives slopes as they are measured, about 2 to 7; own judgement",
)


@dataclass(frozen=True, slots=True, kw_only=True)
class IoziaLeithResult:
    """What the model says of one cyclone at one flow.

    Parameters
    ----------
    cut_size : float or ndarray
        Diameter of the sphere caught by half, without slip [m]
    core_velocity : float or ndarray
        Largest tangential velocity, at the edge of the core [m/s]
    core_diameter, core_height : float or ndarray
        Of the core below the finder [m]
    """

    cut_size: Numbers
    core_velocity: Numbers
    core_diameter: Numbers
    core_height: Numbers


def iozia_leith(
    geometry: CycloneGeometry, *, flow: Numbers, particle_density: Numbers, viscosity: Numbers
) -> IoziaLeithResult:
    r"""Cut size, and the core it belongs to.

    .. math::
        v_t = 6.1 v_i \left( \frac{ab}{D^2} \right)^{0.61} \left( \frac{D_e}{D} \right)^{-0.74}
        \left( \frac{H}{D} \right)^{-0.33}, \quad
        d_c = 0.47 D \left( \frac{ab}{D^2} \right)^{-0.25} \left( \frac{D_e}{D} \right)^{1.4}

        d_{50} = \sqrt{\frac{9 \mu Q}{\pi z_c \rho_p v_t^2}}

    Parameters
    ----------
    geometry : CycloneGeometry
        Inside dimensions [m]
    flow : float or ndarray
        Volume flow through this one cyclone, :math:`Q` [m^3/s]
    particle_density : float or ndarray
        Density of one grain, :math:`\rho_p` [kg/m^3]
    viscosity : float or ndarray
        Dynamic viscosity of the air, :math:`\mu` [Pa*s]

    Returns
    -------
    IoziaLeithResult
        All numbers in SI.

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, or a value outside its range.

    Notes
    -----
    Fitted to bodies of 0.25 m. Good where the slot area is near a tenth of the square of the
    diameter; for the high throughput shapes it cuts at half the measured size (from memory).

    References
    ----------
    .. [1] Iozia and Leith, Aerosol Science and Technology 10 (1989) 491 and 12 (1990) 598, from
       memory; the constants of 1990.
    """
    inlet_velocity = mean_inlet_velocity(geometry, flow=flow)
    body = geometry.body_diameter
    slot_share = geometry.slot_height * geometry.slot_width / body**2
    finder_ratio = geometry.finder_diameter / body
    velocity: Numbers = (
        6.1
        * inlet_velocity
        * slot_share**0.61
        * finder_ratio**-0.74
        * (geometry.total_height / body) ** -0.33
    )
    diameter: Numbers = 0.47 * body * slot_share**-0.25 * finder_ratio**1.4
    height = core_height(geometry, core_diameter=diameter)
    return IoziaLeithResult(
        cut_size=cut_size_on_core(
            flow=flow,
            core_velocity=velocity,
            core_height=height,
            excess_density=particle_density,
            viscosity=viscosity,
        ),
        core_velocity=velocity,
        core_diameter=diameter,
        core_height=height,
    )


def slope_iozia_leith(geometry: CycloneGeometry, *, cut_size: Numbers) -> Numbers:
    r"""Slope of the grade curve of :mod:`gyrecut.correlations.grade`.

    .. math::
        \ln \beta = 0.62 - 0.87 \ln(d_{50}/\mathrm{cm}) + 5.21 \ln \frac{ab}{D^2}
        + 1.05 \ln^2 \frac{ab}{D^2}

    Parameters
    ----------
    geometry : CycloneGeometry
        With slot :math:`a \times b` and body diameter :math:`D` [m]
    cut_size : float or ndarray
        Cut size :math:`d_{50}` [m]

    Returns
    -------
    float or ndarray
        Slope :math:`\beta` [-]

    Raises
    ------
    OutOfRangeError
        When the slot area is outside 0.05 to 0.16 of the square of the diameter, which refuses
        the high throughput shapes.

    References
    ----------
    .. [1] Iozia and Leith, Aerosol Science and Technology 12 (1990) 598, from memory.
    """
    check_geometry(geometry)
    CUT_SIZE.check(cut_size)
    slot_share = geometry.slot_height * geometry.slot_width / geometry.body_diameter**2
    SLOT_SHARE.check(slot_share)
    share = np.log(slot_share)
    slope: Numbers = np.exp(
        0.62 - 0.87 * np.log(cut_size / CENTIMETRE) + 5.21 * share + 1.05 * share**2
    )
    return slope

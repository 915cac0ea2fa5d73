"""Pressure drop after Stairmand, counted in inlet velocity heads."""

from __future__ import annotations

from math import pi
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range
from gyrecut.correlations.heads import slot_over_finder
from gyrecut.correlations.vortex import wall_area

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry

WALL_FRICTION = 0.005  # -, Stairmand's value for air in clean steel bodies

_SOURCE = "room around the published shapes; common practice, no source"

FRICTION_AREA_RATIO = Range(
    quantity="friction times wall area over slot area",
    low=0.01,
    high=20.0,
    unit="-",
    source=_SOURCE,
)
RADIUS_RATIO = Range(
    quantity="radius of the inlet jet over finder radius",
    low=0.4,
    high=20.0,
    unit="-",
    source=_SOURCE,
)
SPIN_FACTOR = Range(
    quantity="spin factor", low=0.0, high=4.0, unit="-", source="a fall of the spin by friction"
)
AREA_RATIO = Range(
    quantity="slot area over finder area", low=1e-3, high=1e3, unit="-", source=_SOURCE
)


def spin_factor_stairmand(*, friction_area_ratio: Numbers, radius_ratio: Numbers) -> Numbers:
    r"""Velocity at the radius of the inlet jet, over the velocity in the slot.

    .. math:: q = \frac{-\sqrt{k} + \sqrt{k + 4 y}}{2 y}, \quad k = \frac{1}{2 r_t/r_e}

    Parameters
    ----------
    friction_area_ratio : float or ndarray
        Wall friction times wall area over slot area, :math:`y` [-]
    radius_ratio : float or ndarray
        Radius at the middle of the slot over that of the finder, :math:`r_t/r_e` [-]

    Returns
    -------
    float or ndarray
        Spin factor :math:`q` [-]

    Raises
    ------
    OutOfRangeError
        Outside 0.01 to 20, or 0.4 to 20.

    References
    ----------
    .. [1] Stairmand, Pressure drop in cyclone separators. Engineering 168 (1949) 409, from
       memory.
    """
    FRICTION_AREA_RATIO.check(friction_area_ratio)
    RADIUS_RATIO.check(radius_ratio)
    narrowness = 0.5 / radius_ratio
    factor: Numbers = (np.sqrt(narrowness + 4.0 * friction_area_ratio) - np.sqrt(narrowness)) / (
        2.0 * friction_area_ratio
    )
    return factor


def inlet_velocity_heads_from_spin_stairmand(
    *, spin_factor: Numbers, radius_ratio: Numbers, area_ratio: Numbers
) -> Numbers:
    r"""Pressure drop in heads of the inlet velocity, from the spin.

    .. math::
        N_H = 1 + 2 q^2 \left( \frac{2 r_t}{r_e} - 1 \right)
        + 2 \left( \frac{A_1}{A_2} \right)^2

    Parameters
    ----------
    spin_factor : float or ndarray
        Of :func:`spin_factor_stairmand`, :math:`q` [-]
    radius_ratio : float or ndarray
        Radius at the middle of the slot over that of the finder, :math:`r_t/r_e` [-]
    area_ratio : float or ndarray
        Area of the slot over that of the finder, :math:`A_1/A_2` [-]

    Returns
    -------
    float or ndarray
        Inlet velocity heads :math:`N_H` [-]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 4, 0.4 to 20, or 0.001 to 1000.

    References
    ----------
    .. [1] Stairmand 1949, from memory; as used in Sinnott, Chemical Engineering Design, ch. 10.
    """
    SPIN_FACTOR.check(spin_factor)
    RADIUS_RATIO.check(radius_ratio)
    AREA_RATIO.check(area_ratio)
    heads: Numbers = 1.0 + 2.0 * spin_factor**2 * (2.0 * radius_ratio - 1.0) + 2.0 * area_ratio**2
    return heads


def inlet_velocity_heads_stairmand(geometry: CycloneGeometry) -> Numbers:
    r"""Pressure drop of a cyclone in velocity heads of its inlet slot.

    .. math::
        y = \frac{0.005 A}{a b}, \quad \frac{r_t}{r_e} = \frac{D - b}{D_e}, \quad
        \frac{A_1}{A_2} = \frac{4 a b}{\pi D_e^2}

    Parameters
    ----------
    geometry : CycloneGeometry
        With slot :math:`a \times b`, diameters :math:`D`, :math:`D_e`, wall area :math:`A` [m]

    Returns
    -------
    float or ndarray
        Inlet velocity heads :math:`N_H` [-]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, or a ratio outside its range.

    Notes
    -----
    Half of the measured drop for wide finders, such as the high throughput shapes (from memory).

    References
    ----------
    .. [1] :func:`spin_factor_stairmand`, :func:`inlet_velocity_heads_from_spin_stairmand`.
    """
    slot_area = geometry.slot_height * geometry.slot_width
    area_ratio = slot_over_finder(geometry) * (4.0 / pi)
    radius_ratio = (geometry.body_diameter - geometry.slot_width) / geometry.finder_diameter
    spin = spin_factor_stairmand(
        friction_area_ratio=WALL_FRICTION * wall_area(geometry) / slot_area,
        radius_ratio=radius_ratio,
    )
    return inlet_velocity_heads_from_spin_stairmand(
        spin_factor=spin, radius_ratio=radius_ratio, area_ratio=area_ratio
    )

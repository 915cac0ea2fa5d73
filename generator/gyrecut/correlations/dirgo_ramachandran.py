"""Pressure drop after Dirgo and Ramachandran, counted in inlet velocity heads."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range
from gyrecut.correlations.heads import slot_over_finder

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry

FINDER_OVER_BODY = Range(
    quantity="finder length over body diameter",
    low=0.1,
    high=5.0,
    unit="-",
    source="with no finder the formula gives no drop; common practice, no source",
)


def inlet_velocity_heads_dirgo_ramachandran(geometry: CycloneGeometry) -> Numbers:
    r"""Pressure drop of a cyclone in velocity heads of its inlet slot.

    .. math::
        N_H = 20 \frac{a b}{D_e^2} \left( \frac{S/D}{(H/D)(h/D)(B/D)} \right)^{1/3}

    Parameters
    ----------
    geometry : CycloneGeometry
        Inside dimensions :math:`a, b, D_e, S, H, h, B, D` [m]

    Returns
    -------
    float or ndarray
        Inlet velocity heads :math:`N_H` [-]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, or the finder shorter than a tenth of the diameter.

    Notes
    -----
    Static drop, clean air; a fit to 98 measured designs. The literature has this one formula
    under two names.

    References
    ----------
    .. [1] Dirgo, thesis, Harvard 1988; Ramachandran, Leith, Dirgo and Feldman, Aerosol Science
       and Technology 15 (1991) 135, from memory.
    """
    ratio = slot_over_finder(geometry)
    finder = geometry.finder_length / geometry.body_diameter
    FINDER_OVER_BODY.check(finder)
    shape = (
        finder
        * geometry.body_diameter**3
        / (geometry.total_height * geometry.barrel_height * geometry.dust_outlet_diameter)
    )
    heads: Numbers = 20.0 * ratio * np.cbrt(shape)
    return heads

"""Pressure drop after First, counted in inlet velocity heads."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np

from gyrecut.correlations.heads import slot_over_finder
from gyrecut.correlations.vortex import CONE_OVER_BODY

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry

NO_VANE = 24.0  # -, 12 over the vane constant 0.5 of an inlet without a vane


def inlet_velocity_heads_first(geometry: CycloneGeometry) -> Numbers:
    r"""Pressure drop of a cyclone in velocity heads of its inlet slot.

    .. math:: N_H = \frac{24 a b / D_e^2}{[(h/D) ((H - h)/D)]^{1/3}}

    Parameters
    ----------
    geometry : CycloneGeometry
        With slot :math:`a \times b`, diameters :math:`D_e`, :math:`D`, heights :math:`h`,
        :math:`H` [m]

    Returns
    -------
    float or ndarray
        Inlet velocity heads :math:`N_H` [-]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, or hardly has a cone.

    Notes
    -----
    Static drop, clean air, no inlet vane.

    References
    ----------
    .. [1] First, Fundamental factors in the design of cyclone dust collectors. Thesis, Harvard
       1950, as quoted in Leith and Mehta, Atmospheric Environment 7 (1973) 527, from memory, and
       one of the less sure constants here.
    """
    ratio = slot_over_finder(geometry)
    barrel = geometry.barrel_height / geometry.body_diameter
    cone = geometry.total_height / geometry.body_diameter - barrel
    CONE_OVER_BODY.check(cone)
    heads: Numbers = NO_VANE * ratio / np.cbrt(barrel * cone)
    return heads

"""Openings that let air in before the suction grows too strong for the bin."""

from __future__ import annotations

from math import pi
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range
from gyrecut.strength.joints import end_load
from gyrecut.strength.ranges import AREA, DENSITY, FLOW

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

SHARP_EDGED = 0.60  # discharge coefficient of a plain hole, 0.60 to 0.62; handbooks, from memory

DISCHARGE = Range(
    quantity="discharge coefficient",
    low=0.3,
    high=1.0,
    unit="-",
    source="0.6 for a plain hole, 0.98 for a rounded one; handbooks, from memory",
)
SUCTION = Range(
    quantity="suction behind the opening",
    low=0.01,
    high=10e3,
    unit="Pa",
    source="air counted as not compressible: below 2 % up to 5 kPa, 4 % at 10 kPa",
)
SHUT_OFF = Range(
    quantity="shut-off suction",
    low=1.0,
    high=90e3,
    unit="Pa",
    source="far beyond any workshop source; common practice, no source",
)
LIMIT_SHARE = Range(
    quantity="suction to hold over shut-off suction",
    low=0.0,
    high=1.0,
    unit="-",
    source="a source cannot draw stronger than at shut-off",
)


def inflow_through_opening(
    *, area: Numbers, suction: Numbers, air_density: Numbers, discharge: Numbers
) -> Numbers:
    r"""Air that an opening lets in.

    .. math:: Q = C A \sqrt{2 p / \rho}

    Parameters
    ----------
    area : float or ndarray
        Of the opening, :math:`A` [m^2]
    suction : float or ndarray
        Behind it, :math:`p` [Pa]
    air_density : float or ndarray
        Of the air before it, :math:`\rho` [kg/m^3]
    discharge : float or ndarray
        Discharge coefficient :math:`C` [-]

    Returns
    -------
    float or ndarray
        Volume flow :math:`Q` [m^3/s]

    Raises
    ------
    OutOfRangeError
        Above 10 kPa, where the air's own stretch counts, or when a value is outside its range.

    References
    ----------
    .. [1] Torricelli's law; coefficients as in any handbook of hydraulics, from memory.
    """
    AREA.check(area)
    SUCTION.check(suction)
    DENSITY.check(air_density)
    DISCHARGE.check(discharge)
    flow: Numbers = discharge * area * np.sqrt(2 * suction / air_density)
    return flow


def flow_at_limit(*, shut_off: Numbers, open_flow: Numbers, limit: Numbers) -> Numbers:
    r"""Air that a source draws at a suction, on the straight line between its two ends.

    .. math:: Q = Q_0 (1 - p / p_0)

    Parameters
    ----------
    shut_off : float or ndarray
        Suction of the blocked source, :math:`p_0` [Pa]
    open_flow : float or ndarray
        Flow with nothing in its way, :math:`Q_0` [m^3/s]
    limit : float or ndarray
        Suction :math:`p` [Pa]

    Returns
    -------
    float or ndarray
        Volume flow :math:`Q` [m^3/s]

    Raises
    ------
    OutOfRangeError
        When the limit is above shut-off, or a value outside its range.

    Notes
    -----
    A source with a curve that is bent outwards draws more; whoever has its curve reads it there.

    References
    ----------
    .. [1] Derived here; the line is a common first guess.
    """
    SHUT_OFF.check(shut_off)
    FLOW.check(open_flow)
    LIMIT_SHARE.check(limit / shut_off)
    flow: Numbers = open_flow * (1 - limit / shut_off)
    return flow


def opening_diameter(
    *, flow: Numbers, suction: Numbers, air_density: Numbers, discharge: Numbers
) -> Numbers:
    r"""Diameter of the round opening that lets a flow in at a suction.

    .. math:: d = \sqrt{\frac{4}{\pi} \frac{Q}{C \sqrt{2 p / \rho}}}

    Parameters
    ----------
    flow : float or ndarray
        Air to let in, :math:`Q` [m^3/s]
    suction : float or ndarray
        That must not be passed, :math:`p` [Pa]
    air_density : float or ndarray
        Of the air before the opening, :math:`\rho` [kg/m^3]
    discharge : float or ndarray
        Discharge coefficient :math:`C` [-]

    Returns
    -------
    float or ndarray
        Diameter :math:`d` [m]

    Raises
    ------
    OutOfRangeError
        Above 10 kPa, where the air's own stretch counts, or when a value is outside its range.

    References
    ----------
    .. [1] Torricelli's law; coefficients as in any handbook of hydraulics, from memory.
    """
    FLOW.check(flow)
    SUCTION.check(suction)
    DENSITY.check(air_density)
    DISCHARGE.check(discharge)
    diameter: Numbers = np.sqrt(4 / pi * flow / (discharge * np.sqrt(2 * suction / air_density)))
    return diameter


def opening_force(*, diameter: Numbers, suction: Numbers) -> Numbers:
    r"""Force of spring or weight that keeps a relief plate shut up to a suction.

    .. math:: F = p \frac{\pi}{4} d^2

    Parameters
    ----------
    diameter : float or ndarray
        Of the opening under the plate, :math:`d` [m]
    suction : float or ndarray
        At which the plate begins to lift, :math:`p` [Pa]

    Returns
    -------
    float or ndarray
        Force :math:`F` [N]

    Raises
    ------
    OutOfRangeError
        When a value is outside its range.

    References
    ----------
    .. [1] Holds by definition.
    """
    SUCTION.check(suction)
    return end_load(pressure=suction, diameter=diameter)

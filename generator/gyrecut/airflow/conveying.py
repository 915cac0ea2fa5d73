"""Mean velocity in a round hose, and the flow that a wanted velocity takes."""

from __future__ import annotations

from math import pi
from typing import TYPE_CHECKING

from gyrecut.airflow.ranges import Range

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

_SOURCE = "far beyond any workshop hose; common practice, no source"

FLOW = Range(quantity="air flow", low=0.0, high=100.0, unit="m^3/s", source=_SOURCE)
BORE = Range(quantity="hose bore", low=1e-3, high=5.0, unit="m", source=_SOURCE)
VELOCITY = Range(
    quantity="air velocity",
    low=0.0,
    high=100.0,
    unit="m/s",
    source="incompressible flow, Mach number below 0.3",
)


def mean_velocity(*, flow: Numbers, bore: Numbers) -> Numbers:
    r"""Mean velocity in a round duct.

    .. math:: v = 4 Q / (\pi D^2)

    Parameters
    ----------
    flow : float or ndarray
        Volume flow :math:`Q` [m^3/s]
    bore : float or ndarray
        Inside diameter :math:`D` [m]

    Returns
    -------
    float or ndarray
        Mean velocity :math:`v` [m/s]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 100 m3/s, or 1 mm to 5 m.

    References
    ----------
    .. [1] Continuity; holds by definition.
    """
    FLOW.check(flow)
    BORE.check(bore)
    return 4.0 * flow / (pi * bore**2)


def flow_for_velocity(*, velocity: Numbers, bore: Numbers) -> Numbers:
    r"""Volume flow that gives a mean velocity in a round duct.

    .. math:: Q = \pi D^2 v / 4

    Parameters
    ----------
    velocity : float or ndarray
        Mean velocity :math:`v` [m/s]
    bore : float or ndarray
        Inside diameter :math:`D` [m]

    Returns
    -------
    float or ndarray
        Volume flow :math:`Q` [m^3/s]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 100 m/s, or 1 mm to 5 m.

    References
    ----------
    .. [1] Continuity; holds by definition.
    """
    VELOCITY.check(velocity)
    BORE.check(bore)
    return pi * bore**2 * velocity / 4.0


def velocity_head(*, velocity: Numbers, air_density: Numbers) -> Numbers:
    r"""Dynamic pressure, the unit that loss coefficients count in.

    .. math:: p_d = \rho v^2 / 2

    Parameters
    ----------
    velocity : float or ndarray
        Mean velocity :math:`v` [m/s]
    air_density : float or ndarray
        Density :math:`\rho` [kg/m^3]

    Returns
    -------
    float or ndarray
        Velocity head :math:`p_d` [Pa]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 100 m/s.

    References
    ----------
    .. [1] Holds by definition.
    """
    VELOCITY.check(velocity)
    return 0.5 * air_density * velocity**2

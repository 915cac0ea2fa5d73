"""Friction in a straight hose, and what a bend of hose costs."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.conveying import BORE
from gyrecut.airflow.ranges import Range

if TYPE_CHECKING:
    from gyrecut.airflow.air import AirState
    from gyrecut.airflow.ranges import Numbers

REYNOLDS = Range(
    quantity="Reynolds number of the hose",
    low=1e-3,
    high=1e8,
    unit="-",
    source="creeping flow to far beyond any hose; common practice, no source",
)
RELATIVE_ROUGHNESS = Range(
    quantity="roughness over bore",
    low=0.0,
    high=0.1,
    unit="-",
    source="twice the 0.05 of the friction chart",
)
VELOCITY = Range(
    quantity="mean air velocity",
    low=0.0,
    high=1e6,
    unit="m/s",
    source="finite; the search for an operating point passes through flows no source can drive",
)
LENGTH = Range(
    quantity="length of the hose",
    low=0.0,
    high=1000.0,
    unit="m",
    source="far beyond any workshop hose; common practice, no source",
)
BEND_BORE = Range(
    quantity="bore of the bend",
    low=0.015,
    high=0.3,
    unit="m",
    source="pleated elbows of ASHRAE Fundamentals 2009 ch. 21, carried on below 100 mm",
)

SMOOTH_PLASTIC = 1e-5  # m; ASHRAE duct roughness table, 0.0015 to 0.01 mm, from memory
# Friction of a ribbed hose over that of a smooth one: 1.5 to 2.5 stretched, 2 to 4 for vacuum
# hose; from memory, weak. Pushed together it was measured at 4 to 10 times the stretched loss
# (Abushakra, Walker and Sherman, Compression effects on pressure loss in flexible HVAC ducts,
# abstract).
CORRUGATED_FACTOR = 3.0
CORRUGATED_FACTORS = Range(
    quantity="friction of the hose over that of a smooth one",
    low=1.0,
    high=10.0,
    unit="-",
    source="a smooth hose to one pushed together",
)

# Bore in m and loss of a pleated 90 degree elbow with a mean radius of 1.5 bores: ASHRAE
# Fundamentals 2009 ch. 21, fitting CD3-5.
PLEATED_BORES = (0.10, 0.15, 0.20, 0.23, 0.25, 0.30)
PLEATED_LOSSES = (0.57, 0.43, 0.34, 0.28, 0.28, 0.26)

_CREEPING = 1.0  # Reynolds number below which the laminar law is used as it stands


def friction_factor_churchill(reynolds: Numbers, *, relative_roughness: Numbers) -> Numbers:
    r"""Darcy friction factor of a round duct, laminar to rough, in one closed form.

    .. math::
        f = 8 \left[ (8/Re)^{12} + (A + B)^{-3/2} \right]^{1/12}

        A = \left[ 2.457 \ln \frac{1}{(7/Re)^{0.9} + 0.27 e/D} \right]^{16}, \quad
        B = (37530/Re)^{16}

    Parameters
    ----------
    reynolds : float or ndarray
        On mean velocity and bore, :math:`Re` [-]
    relative_roughness : float or ndarray
        Roughness over bore, :math:`e/D` [-]

    Returns
    -------
    float or ndarray
        Darcy friction factor :math:`f` [-]

    Raises
    ------
    OutOfRangeError
        Outside 0.001 to 1e8, or 0 to 0.1.

    Notes
    -----
    Has no jump where the flow becomes turbulent, so that a search for an operating point finds
    one. Within 3 % of Colebrook's implicit law from Re 5e3 on.

    References
    ----------
    .. [1] Churchill, Friction factor equation spans all fluid flow regimes. Chemical
       Engineering 84(24) (1977) 91, from memory.
    """
    REYNOLDS.check(reynolds)
    RELATIVE_ROUGHNESS.check(relative_roughness)
    rough = (7.0 / reynolds) ** 0.9 + 0.27 * relative_roughness
    turbulent = (2.457 * np.log(1.0 / rough)) ** 16 + (37530.0 / reynolds) ** 16
    factor: Numbers = 8.0 * ((8.0 / reynolds) ** 12 + turbulent**-1.5) ** (1.0 / 12.0)
    return factor


def friction_loss(
    velocity: Numbers, *, bore: float, length: float, roughness: float, air: AirState
) -> Numbers:
    r"""Pressure lost along a straight round duct.

    .. math:: \Delta p = f \frac{L}{D} \frac{\rho v^2}{2}

    Parameters
    ----------
    velocity : float or ndarray
        Mean velocity :math:`v` [m/s]
    bore : float
        Inside diameter :math:`D` [m]
    length : float
        Length :math:`L` [m]
    roughness : float
        Roughness of the wall [m]
    air : AirState
        With density [kg/m^3] and viscosity [Pa*s]

    Returns
    -------
    float or ndarray
        Pressure lost :math:`\Delta p` [Pa]

    Raises
    ------
    OutOfRangeError
        Outside the ranges named in this module.

    References
    ----------
    .. [1] Darcy and Weisbach, with :func:`friction_factor_churchill`; Hagen and Poiseuille below
       a Reynolds number of 1.
    """
    VELOCITY.check(velocity)
    BORE.check(bore)
    LENGTH.check(length)
    reynolds = np.asarray(air.density * velocity * bore / air.viscosity)
    factor = friction_factor_churchill(
        np.maximum(reynolds, _CREEPING), relative_roughness=roughness / bore
    )
    turbulent = factor * length / bore * air.density * np.square(velocity) / 2.0
    creeping = 32.0 * air.viscosity * velocity * length / bore**2
    loss: Numbers = np.where(reynolds < _CREEPING, creeping, turbulent)[()]
    return loss


def bend_loss_hose(bore: Numbers) -> Numbers:
    """Loss coefficient of a right-angle bend of hose, on the velocity head in it.

    Parameters
    ----------
    bore : float or ndarray
        Inside diameter of the hose [m]

    Returns
    -------
    float or ndarray
        Loss coefficient, for a bend around 1.5 bores [-]

    Raises
    ------
    OutOfRangeError
        Outside 15 mm to 300 mm.

    Notes
    -----
    Between the rows a line in the logarithms of both. The table begins at 100 mm: below, the
    slope of its first two rows is carried on, which no source supports; it errs towards too
    much loss.

    References
    ----------
    .. [1] ASHRAE Fundamentals 2009 ch. 21, fitting CD3-5, pleated elbow.
    """
    BEND_BORE.check(bore)
    bores, losses = np.log(PLEATED_BORES), np.log(PLEATED_LOSSES)
    below = np.minimum(np.log(bore) - bores[0], 0.0)
    slope = (losses[1] - losses[0]) / (bores[1] - bores[0])
    loss: Numbers = np.exp(np.interp(np.log(bore), bores, losses) + slope * below)
    return loss

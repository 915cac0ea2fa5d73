"""Loss where a duct becomes wider or narrower along a cone."""

from __future__ import annotations

from math import pi
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

_SOURCE = "Crane, Technical Paper 410"

STEEP = pi / 4  # rad, included angle where both formulas change over
INCLUDED_ANGLE = Range(
    quantity="included angle of the transition", low=0.0, high=pi, unit="rad", source=_SOURCE
)
AREA_RATIO = Range(
    quantity="smaller over larger duct area", low=0.0, high=1.0, unit="-", source="by definition"
)


def expansion_loss_crane(*, area_ratio: Numbers, included_angle: Numbers) -> Numbers:
    r"""Loss coefficient of a conical expansion, on the velocity head in the SMALLER duct.

    .. math:: K = \min(2.6 \sin(\theta/2), 1) (1 - A_1/A_2)^2

    Parameters
    ----------
    area_ratio : float or ndarray
        Smaller over larger duct area, :math:`A_1/A_2` [-]
    included_angle : float or ndarray
        Whole angle of the cone, :math:`\theta` [rad]

    Returns
    -------
    float or ndarray
        Loss coefficient :math:`K` [-]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 1, or 0 to pi.

    Notes
    -----
    The factor is 1 from 45 degrees on, where 2.6 sin(22.5 degrees) has just reached 0.995. For a
    round duct that runs into a rectangular one take the larger of the two plane angles.

    References
    ----------
    .. [1] Crane, Flow of Fluids, Technical Paper 410, after Gibson, from memory.
    """
    AREA_RATIO.check(area_ratio)
    INCLUDED_ANGLE.check(included_angle)
    angle = np.asarray(included_angle)
    factor = np.where(angle <= STEEP, 2.6 * np.sin(angle / 2), 1.0)
    loss: Numbers = (factor * (1.0 - area_ratio) ** 2)[()]
    return loss


def contraction_loss_crane(*, area_ratio: Numbers, included_angle: Numbers) -> Numbers:
    r"""Loss coefficient of a conical contraction, on the velocity head in the SMALLER duct.

    .. math::
        K = 0.8 \sin(\theta/2) (1 - A_1/A_2) \quad \theta \le 45^\circ

        K = 0.5 \sqrt{\sin(\theta/2)} (1 - A_1/A_2) \quad \text{above}

    Parameters
    ----------
    area_ratio : float or ndarray
        Smaller over larger duct area, :math:`A_1/A_2` [-]
    included_angle : float or ndarray
        Whole angle of the cone, :math:`\theta` [rad]

    Returns
    -------
    float or ndarray
        Loss coefficient :math:`K` [-]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 1, or 0 to pi.

    References
    ----------
    .. [1] Crane, Flow of Fluids, Technical Paper 410, from memory.
    """
    AREA_RATIO.check(area_ratio)
    INCLUDED_ANGLE.check(included_angle)
    sine = np.sin(np.asarray(included_angle) / 2)
    factor = np.where(np.asarray(included_angle) <= STEEP, 0.8 * sine, 0.5 * np.sqrt(sine))
    loss: Numbers = (factor * (1.0 - area_ratio))[()]
    return loss

"""Loss of air that enters a round duct through a bell-mouth."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

_SOURCE = "Idelchik, Handbook of Hydraulic Resistance, diagram 3-4"

# Bell radius over duct bore, and the loss coefficient on the velocity head in the duct.
END_WALL_RADII = (0.0, 0.01, 0.02, 0.03, 0.04, 0.05, 0.06, 0.08, 0.12, 0.16, 0.20)
END_WALL_LOSSES = (0.50, 0.44, 0.37, 0.31, 0.26, 0.22, 0.20, 0.15, 0.09, 0.06, 0.03)
FREE_RADII = (0.0, 0.01, 0.02, 0.03, 0.04, 0.05, 0.06, 0.08, 0.10, 0.12, 0.16, 0.20)
FREE_LOSSES = (1.0, 0.87, 0.74, 0.61, 0.51, 0.40, 0.32, 0.20, 0.15, 0.10, 0.06, 0.03)

RADIUS_RATIO = Range(
    quantity="bell-mouth radius over bore", low=0.0, high=1.0, unit="-", source=_SOURCE
)
END_WALL_LOSS = Range(
    quantity="bell-mouth loss coefficient", low=0.03, high=0.50, unit="-", source=_SOURCE
)
FREE_LOSS = Range(
    quantity="bell-mouth loss coefficient", low=0.03, high=1.0, unit="-", source=_SOURCE
)


def entry_loss_bell_mouth(radius_ratio: Numbers, *, end_wall: bool) -> Numbers:
    """Loss coefficient of a bell-mouth, on the velocity head in the duct behind it.

    Parameters
    ----------
    radius_ratio : float or ndarray
        Radius of the bell's quarter circle over the bore of the duct [-]
    end_wall : bool
        Whether the bell ends flush in a wall, instead of standing free in the room [-]

    Returns
    -------
    float or ndarray
        Loss coefficient [-]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 1.

    Notes
    -----
    Linear between the rows of the table, which ends at 0.2: larger bells do not get better.

    References
    ----------
    .. [1] Idelchik, Handbook of Hydraulic Resistance, diagram 3-4. Free-standing row as quoted
       in Principles of HVAC, 9th ed., ASHRAE 2021, supplement, fitting 1-2; row with end wall as
       quoted in the `fluids` library.
    """
    RADIUS_RATIO.check(radius_ratio)
    radii, losses = _table(end_wall=end_wall)
    loss: Numbers = np.interp(radius_ratio, radii, losses)
    return loss


def radius_ratio_for_entry_loss(loss: Numbers, *, end_wall: bool) -> Numbers:
    """Smallest bell-mouth that keeps to a wanted loss coefficient.

    Parameters
    ----------
    loss : float or ndarray
        Loss coefficient, on the velocity head in the duct [-]
    end_wall : bool
        Whether the bell ends flush in a wall, instead of standing free in the room [-]

    Returns
    -------
    float or ndarray
        Radius of the bell's quarter circle over the bore of the duct [-]

    Raises
    ------
    OutOfRangeError
        Outside 0.03 to 0.50 with an end wall, 0.03 to 1 without.

    References
    ----------
    .. [1] As :func:`entry_loss_bell_mouth`, read backwards.
    """
    (END_WALL_LOSS if end_wall else FREE_LOSS).check(loss)
    radii, losses = _table(end_wall=end_wall)
    ratio: Numbers = np.interp(loss, losses[::-1], radii[::-1])
    return ratio


def _table(*, end_wall: bool) -> tuple[tuple[float, ...], tuple[float, ...]]:
    return (END_WALL_RADII, END_WALL_LOSSES) if end_wall else (FREE_RADII, FREE_LOSSES)

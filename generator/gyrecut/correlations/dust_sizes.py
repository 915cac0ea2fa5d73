"""The share of a dust's mass that a grade efficiency keeps."""

from __future__ import annotations

from math import log
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range

if TYPE_CHECKING:
    from collections.abc import Callable

    from numpy.typing import NDArray

    from gyrecut.airflow.ranges import Numbers

MEDIAN = Range(
    quantity="median particle diameter",
    low=1e-8,
    high=0.1,
    unit="m",
    source="far beyond any workshop dust; common practice, no source",
)
SPREAD = Range(
    quantity="geometric standard deviation",
    low=1.0,
    high=10.0,
    unit="-",
    source="1 by definition; the high end is common practice, no source",
)
# Standard deviations to each side, where less than 1e-14 of the mass is left out, and steps.
TAIL = 8.0
STEPS = 1601


def mass_share_caught(
    grade_efficiency: Callable[[NDArray[np.float64]], Numbers],
    *,
    median: float,
    spread: float,
) -> float:
    r"""Share of a log-normal dust that is kept, by mass.

    .. math::
        E = \int \eta(d) \, dQ_3(d), \quad
        Q_3 = \frac{1}{2} \left( 1 + \operatorname{erf}
        \frac{\ln(d/d_m)}{\sqrt{2} \ln \sigma_g} \right)

    Parameters
    ----------
    grade_efficiency : callable
        Takes diameters [m], gives the share kept of each, :math:`\eta` [-]
    median : float
        Mass median diameter :math:`d_m` [m]
    spread : float
        Geometric standard deviation :math:`\sigma_g`; 1 for grains of one size [-]

    Returns
    -------
    float
        Mass share kept, :math:`E` [-]

    Raises
    ------
    OutOfRangeError
        Outside 10 nm to 0.1 m, or 1 to 10.

    Notes
    -----
    Trapezoid rule in the logarithm of the diameter over eight standard deviations to each side;
    it converges faster than any power of the step there, because both ends are flat.

    References
    ----------
    .. [1] Hinds, Aerosol Technology, 2nd ed., Wiley 1999, ch. 4, from memory.
    """
    MEDIAN.check(median)
    SPREAD.check(spread)
    deviations = np.linspace(-TAIL, TAIL, STEPS)
    weights = np.exp(-0.5 * deviations**2)
    diameters = median * np.exp(deviations * log(spread))
    return float(np.average(grade_efficiency(diameters), weights=weights))

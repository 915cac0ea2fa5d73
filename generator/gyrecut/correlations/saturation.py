"""Dust that falls out at the inlet because the air cannot carry more, after Muschelknautz."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range
from gyrecut.correlations.size_distributions import MEDIAN
from gyrecut.correlations.validity import CUT_SIZE

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

HEAVY_LOADING = 0.1  # mass of dust in the mass of air; from here on the exponent is fixed
HEAVY_EXPONENT = 0.15

SATURATING_LOADING = Range(
    quantity="dust in the air, by mass",
    low=1e-3,
    high=10.0,
    unit="-",
    source="at the low end the formula already drops most of any dust, which no test confirms",
)


def saturation_loading_muschelknautz(
    *, cut_size: Numbers, median: Numbers, loading: Numbers
) -> Numbers:
    r"""Dust that the air can carry past the inlet.

    .. math::
        c_L = 0.025 \frac{d_{50}}{d_m} (10 c_0)^k, \quad
        k = 0.15 \text{ for } c_0 \ge 0.1, \text{ else } k = -0.11 - 0.10 \ln c_0

    Parameters
    ----------
    cut_size : float or ndarray
        Cut size of the vortex, :math:`d_{50}` [m]
    median : float or ndarray
        Mass median diameter of the dust, :math:`d_m` [m]
    loading : float or ndarray
        Mass of dust in the mass of air that comes in, :math:`c_0` [-]

    Returns
    -------
    float or ndarray
        Mass of dust in the mass of air that is carried on, :math:`c_L` [-]

    Raises
    ------
    OutOfRangeError
        Outside 1 nm to 10 mm, 10 nm to 0.1 m, or 0.001 to 10.

    References
    ----------
    .. [1] Hoffmann and Stein, Gas Cyclones and Swirl Tubes, 2nd ed., Springer 2008, ch. 6, from
       memory; older editions have an exponent of 0.4 below 0.1.
    """
    CUT_SIZE.check(cut_size)
    MEDIAN.check(median)
    SATURATING_LOADING.check(loading)
    exponent = np.where(
        np.asarray(loading) >= HEAVY_LOADING, HEAVY_EXPONENT, -0.11 - 0.10 * np.log(loading)
    )
    carried: Numbers = 0.025 * cut_size / median * (10.0 * loading) ** exponent
    return carried


def share_skimmed_muschelknautz(*, cut_size: Numbers, median: Numbers, loading: Numbers) -> Numbers:
    r"""Share of the dust that falls out at the inlet, whatever its size: an upper estimate.

    .. math:: s = \max(0, 1 - c_L / c_0)

    Parameters
    ----------
    cut_size : float or ndarray
        Cut size of the vortex, :math:`d_{50}` [m]
    median : float or ndarray
        Mass median diameter of the dust, :math:`d_m` [m]
    loading : float or ndarray
        Mass of dust in the mass of air that comes in, :math:`c_0` [-]

    Returns
    -------
    float or ndarray
        Share skimmed off, :math:`s` [-]

    Raises
    ------
    OutOfRangeError
        As :func:`saturation_loading_muschelknautz`.

    Notes
    -----
    The share kept becomes s + (1 - s) E, with E of the vortex alone. At the loadings of a
    workshop, 0.001 to 0.01, s comes to 0.85 and more even of fines: never a promise.

    References
    ----------
    .. [1] As :func:`saturation_loading_muschelknautz`.
    """
    carried = saturation_loading_muschelknautz(cut_size=cut_size, median=median, loading=loading)
    skimmed: Numbers = np.maximum(0.0, 1.0 - carried / loading)
    return skimmed

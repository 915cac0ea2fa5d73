"""The share of a dust's mass that a grade efficiency keeps."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range
from gyrecut.correlations.size_distributions import LogNormal

if TYPE_CHECKING:
    from collections.abc import Callable

    from numpy.typing import NDArray

    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.size_distributions import SizeDistribution

GRADE = Range(quantity="grade efficiency", low=0.0, high=1.0, unit="-", source="by definition")
# Size classes over a dust: fine enough for a step, and enough for a published grade curve.
FINE = 1601
COARSE = 201
LARGEST_BLOCK = 1_000_000  # values held at a time, 8 MB


def mass_share_caught(
    grade_efficiency: Callable[[NDArray[np.float64]], Numbers],
    *,
    median: float,
    spread: float,
) -> float:
    """Share of a log-normal dust that is kept, by mass.

    Parameters
    ----------
    grade_efficiency : callable
        Takes diameters [m], gives the share kept of each [-]
    median : float
        Mass median diameter [m]
    spread : float
        Geometric standard deviation; 1 for grains of one size [-]

    Returns
    -------
    float
        Mass share kept [-]

    Raises
    ------
    OutOfRangeError
        Outside 10 nm to 0.1 m, or 1 to 10.

    References
    ----------
    .. [1] As :func:`mass_share_kept`.
    """
    dust = LogNormal(median=median, spread=spread)
    return float(mass_share_kept(grade_efficiency, distribution=dust, classes=FINE))


def mass_share_kept(
    grade_efficiency: Callable[..., Numbers],
    *,
    distribution: SizeDistribution,
    classes: int,
    **parameters: Numbers,
) -> Numbers:
    r"""Share of a dust that is kept, by mass, for one design or for many.

    .. math:: E = \int \eta(d) \, dQ_3(d)

    Parameters
    ----------
    grade_efficiency : callable
        Takes diameters [m] and the parameters by name, gives the share kept :math:`\eta` [-]
    distribution : SizeDistribution
        The dust, :math:`Q_3` over its sizes [m]
    classes : int
        Size classes to sum over; 201 reach 1e-6 with published grade curves [-]
    parameters : float or ndarray
        What the grade curve takes, one value or one for each design, such as cut_size [m]

    Returns
    -------
    float or ndarray
        Mass share kept, of the shape the parameters broadcast to, :math:`E` [-]

    Raises
    ------
    OutOfRangeError
        When the distribution is none, or the grade curve leaves 0 to 1.

    Notes
    -----
    Designs are taken in blocks, so that memory does not grow with their number.

    References
    ----------
    .. [1] Hinds, Aerosol Technology, 2nd ed., Wiley 1999, ch. 4, from memory.
    """
    bins = distribution.mass_bins(classes)
    spread_out = np.broadcast_arrays(*parameters.values())
    shape = spread_out[0].shape if spread_out else ()
    columns = {
        name: values.reshape(-1, 1) for name, values in zip(parameters, spread_out, strict=True)
    }
    designs = int(np.prod(shape))
    block = max(1, LARGEST_BLOCK // classes)
    kept = np.empty(designs)
    for start in range(0, designs, block):
        part = slice(start, start + block)
        given = {name: column[part] for name, column in columns.items()}
        grades = np.asarray(grade_efficiency(bins.sizes, **given))
        GRADE.check(grades)
        kept[part] = grades @ bins.masses
    share: Numbers = kept.reshape(shape)[()]
    return share

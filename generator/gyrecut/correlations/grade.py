"""The grade curve that several models share: one cut size and one slope."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.airflow.ranges import Range
from gyrecut.correlations.validity import CUT_SIZE, PARTICLE_DIAMETER

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

SLOPE = Range(
    quantity="slope of the grade curve",
    low=0.5,
    high=15.0,
    unit="-",
    source="measured curves have about 2 to 7; the ends are common practice, no source",
)


def grade_efficiency_with_slope(diameter: Numbers, *, cut_size: Numbers, slope: Numbers) -> Numbers:
    r"""Share of the particles of one size that is kept.

    .. math:: \eta = \frac{1}{1 + (d_{50}/d)^m}

    Parameters
    ----------
    diameter : float or ndarray
        Particle diameter :math:`d` [m]
    cut_size : float or ndarray
        Cut size :math:`d_{50}` [m]
    slope : float or ndarray
        Exponent :math:`m`, the higher the sharper; Barth's curve 6.4, Muschelknautz 5 [-]

    Returns
    -------
    float or ndarray
        Grade efficiency :math:`\eta` [-]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 1e9 m, 1 nm to 10 mm, or 0.5 to 15.

    References
    ----------
    .. [1] Hoffmann and Stein, Gas Cyclones and Swirl Tubes, 2nd ed., Springer 2008, ch. 5, from
       memory; Dirgo and Leith, Aerosol Science and Technology 4 (1985) 401, for Barth's curve,
       from memory.
    """
    PARTICLE_DIAMETER.check(diameter)
    CUT_SIZE.check(cut_size)
    SLOPE.check(slope)
    # In this order neither a diameter of 0 nor a boulder over- or underflows.
    odds: Numbers = (diameter / cut_size) ** slope
    return odds / (1.0 + odds)

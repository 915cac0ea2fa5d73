"""Flat rectangular walls of a box under pressure: how far they bend, and the stress that does it.

Deflection is counted at the centre. The supported plate is the safe choice for a wall whose
neighbours are no stiffer than itself.
"""

from __future__ import annotations

from functools import cache
from math import pi
from typing import TYPE_CHECKING

import numpy as np
from numpy.polynomial import Polynomial

from gyrecut.airflow.ranges import Range
from gyrecut.strength.plates import plate_stiffness
from gyrecut.strength.ranges import LENGTH, POISSON, PRESSURE, THIN_PLATE

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.airflow.ranges import Numbers

ASPECT = Range(
    quantity="longer over shorter side",
    low=1.0,
    high=10.0,
    unit="-",
    source="as far as the series was seen to hold six digits",
)
ASPECT_CLAMPED = Range(
    quantity="longer over shorter side",
    low=1.0,
    high=3.0,
    unit="-",
    source="as far as nine terms each way hold three digits of the edge stress",
)
_HARMONICS: NDArray[np.float64] = np.arange(1.0, 400.0, 2.0)
_TERMS = 9


def deflection_rectangle_supported(
    *,
    pressure: Numbers,
    modulus: Numbers,
    poisson: Numbers,
    thickness: Numbers,
    long_side: float,
    short_side: float,
) -> Numbers:
    r"""How far the centre of a rectangular plate sinks that lies loose on its four edges.

    .. math::

        w = \frac{16 q}{\pi^6 D} \sum_{m, n\ \mathrm{odd}}
        \frac{(-1)^{(m + n)/2 - 1}}{m n (m^2 / a^2 + n^2 / b^2)^2}

    Parameters
    ----------
    pressure : float or ndarray
        Over the whole plate, :math:`q` [Pa]
    modulus : float or ndarray
        Elastic modulus [Pa]
    poisson : float or ndarray
        Poisson ratio [-]
    thickness : float or ndarray
        Of the plate [m]
    long_side, short_side : float
        Between the supports, :math:`a, b` [m]

    Returns
    -------
    float or ndarray
        Deflection :math:`w`, true while it is below half of the thickness [m]

    Raises
    ------
    OutOfRangeError
        Beyond ten times as long as wide, when the plate is not thin, or a value outside its range.

    References
    ----------
    .. [1] Navier's series, in Timoshenko and Woinowsky-Krieger, Theory of Plates and Shells, 2nd
       ed., art. 28; from memory.
    """
    _check_rectangle(pressure, thickness, long_side, short_side, ASPECT)
    stiffness = plate_stiffness(modulus=modulus, poisson=poisson, thickness=thickness)
    amplitudes, _, _ = _navier(long_side / short_side)
    deflection: Numbers = float(amplitudes.sum()) * pressure * short_side**4 / stiffness
    return deflection


def stress_rectangle_supported(
    *,
    pressure: Numbers,
    poisson: Numbers,
    thickness: Numbers,
    long_side: float,
    short_side: float,
) -> Numbers:
    r"""Largest bending stress of a rectangular plate that lies loose on its edges, at its centre.

    .. math:: \sigma = \frac{6 D}{t^2} \left(\frac{\partial^2 w}{\partial y^2}
        + \nu \frac{\partial^2 w}{\partial x^2}\right)

    Parameters
    ----------
    pressure : float or ndarray
        Over the whole plate [Pa]
    poisson : float or ndarray
        Poisson ratio :math:`\nu` [-]
    thickness : float or ndarray
        Of the plate, :math:`t` [m]
    long_side, short_side : float
        Between the supports, along :math:`x` and :math:`y` [m]

    Returns
    -------
    float or ndarray
        Stress :math:`\sigma`, across the shorter span [Pa]

    Raises
    ------
    OutOfRangeError
        Beyond ten times as long as wide, when the plate is not thin, or a value outside its range.

    References
    ----------
    .. [1] Navier's series, in Timoshenko and Woinowsky-Krieger, Theory of Plates and Shells, 2nd
       ed., art. 28; from memory.
    """
    POISSON.check(poisson)
    _check_rectangle(pressure, thickness, long_side, short_side, ASPECT)
    amplitudes, along, across = _navier(long_side / short_side)
    moment = float((amplitudes * across).sum()) + poisson * float((amplitudes * along).sum())
    stress: Numbers = 6 * moment * pressure * (short_side / thickness) ** 2
    return stress


def deflection_rectangle_clamped(
    *,
    pressure: Numbers,
    modulus: Numbers,
    poisson: Numbers,
    thickness: Numbers,
    long_side: float,
    short_side: float,
) -> Numbers:
    r"""How far the centre of a rectangular plate sinks whose four edges cannot turn.

    .. math:: w = \sum_{i, j} c_{ij} x^{2 i} (1 - x^2)^2 y^{2 j} (1 - y^2)^2

    Parameters
    ----------
    pressure : float or ndarray
        Over the whole plate [Pa]
    modulus : float or ndarray
        Elastic modulus [Pa]
    poisson : float or ndarray
        Poisson ratio [-]
    thickness : float or ndarray
        Of the plate [m]
    long_side, short_side : float
        Between the clamped edges [m]

    Returns
    -------
    float or ndarray
        Deflection :math:`w`, true while it is below half of the thickness [m]

    Raises
    ------
    OutOfRangeError
        Beyond three times as long as wide, when the plate is not thin, or a value outside its
        range.

    References
    ----------
    .. [1] Ritz's method, in Timoshenko and Woinowsky-Krieger, Theory of Plates and Shells, 2nd ed.,
       art. 81; from memory.
    """
    _check_rectangle(pressure, thickness, long_side, short_side, ASPECT_CLAMPED)
    stiffness = plate_stiffness(modulus=modulus, poisson=poisson, thickness=thickness)
    deflection, _ = _ritz(long_side / short_side)
    sunk: Numbers = deflection * pressure * short_side**4 / stiffness
    return sunk


def stress_rectangle_clamped(
    *, pressure: Numbers, thickness: Numbers, long_side: float, short_side: float
) -> Numbers:
    r"""Largest bending stress of a rectangular plate whose edges cannot turn.

    .. math:: \sigma = \frac{6 D}{t^2} \frac{\partial^2 w}{\partial y^2}

    Parameters
    ----------
    pressure : float or ndarray
        Over the whole plate [Pa]
    thickness : float or ndarray
        Of the plate, :math:`t` [m]
    long_side, short_side : float
        Between the clamped edges, along :math:`x` and :math:`y` [m]

    Returns
    -------
    float or ndarray
        Stress :math:`\sigma`, at the middle of the longer edges [Pa]

    Raises
    ------
    OutOfRangeError
        Beyond three times as long as wide, when the plate is not thin, or a value outside its
        range.

    References
    ----------
    .. [1] Ritz's method, in Timoshenko and Woinowsky-Krieger, Theory of Plates and Shells, 2nd ed.,
       art. 81; from memory.
    """
    _check_rectangle(pressure, thickness, long_side, short_side, ASPECT_CLAMPED)
    _, moment = _ritz(long_side / short_side)
    stress: Numbers = 6 * moment * pressure * (short_side / thickness) ** 2
    return stress


def _check_rectangle(
    pressure: Numbers, thickness: Numbers, long_side: float, short_side: float, aspect: Range
) -> None:
    PRESSURE.check(pressure)
    LENGTH.check(short_side)
    LENGTH.check(long_side)
    aspect.check(long_side / short_side)
    THIN_PLATE.check(thickness / short_side)


@cache
def _navier(
    aspect: float,
) -> tuple[NDArray[np.float64], NDArray[np.float64], NDArray[np.float64]]:
    """Terms of the centre's deflection, and the factors that make curvatures along and across.

    Shorter side 1, stiffness 1, pressure 1.
    """
    m, n = np.meshgrid(_HARMONICS, _HARMONICS)
    signs = np.sin(m * pi / 2) * np.sin(n * pi / 2)
    terms = 16 * signs / (pi**6 * m * n * ((m / aspect) ** 2 + n**2) ** 2)
    return terms, (m * pi / aspect) ** 2, (n * pi) ** 2


@cache
def _ritz(aspect: float) -> tuple[float, float]:
    """Deflection of the centre and moment at the long edges; shorter side, D and pressure 1."""
    points, weights = np.polynomial.legendre.leggauss(60)
    shapes = [Polynomial([0] * (2 * i) + [1]) * Polynomial([1, 0, -1]) ** 2 for i in range(_TERMS)]
    bent = [shape.deriv(2) for shape in shapes]
    values = np.array([shape(points) for shape in shapes])
    curves = np.array([curve(points) for curve in bent])
    plain = values @ np.diag(weights) @ values.T
    crossed = values @ np.diag(weights) @ curves.T
    doubled = curves @ np.diag(weights) @ curves.T
    half_long, half_short = aspect / 2, 0.5
    energy = (
        np.einsum("ik,jl->ijkl", doubled, plain) / half_long**4
        + np.einsum("ik,jl->ijkl", plain, doubled) / half_short**4
        + (np.einsum("ik,lj->ijkl", crossed, crossed) + np.einsum("ki,jl->ijkl", crossed, crossed))
        / (half_long * half_short) ** 2
    ).reshape(_TERMS**2, _TERMS**2)
    load = np.outer(values @ weights, values @ weights).ravel()
    shares = np.linalg.lstsq(energy, load, rcond=None)[0].reshape(_TERMS, _TERMS)
    centre = np.array([shape(0.0) for shape in shapes])
    at_edge = np.array([curve(1.0) for curve in bent])
    deflection = float(centre @ shares @ centre)
    return deflection, abs(float(centre @ shares @ at_edge)) / half_short**2

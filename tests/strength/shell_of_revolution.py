"""Eigenvalues of thin shells of revolution under outside pressure, to hold the formulas against.

Nothing of the program is used here: straight conical elements, displacements along the meridian
and round it quadratic, the one square to the wall cubic, one harmonic round the circumference at
a time, and the generalised eigenvalue problem solved by scipy. Strains and curvatures as in
Novozhilov's shell theory; the stress before buckling is that of the membrane.
"""

from __future__ import annotations

from dataclasses import dataclass
from math import hypot

import numpy as np
from numpy.typing import NDArray
from scipy.linalg import eigh

Matrix = NDArray[np.float64]

_POINTS, _WEIGHTS = np.polynomial.legendre.leggauss(5)
NODE = 4  # radial and axial displacement, displacement round, rotation of the meridian


@dataclass(frozen=True, slots=True, kw_only=True)
class Frustum:
    """A cone between two middle radii, or a cylinder where they are equal."""

    top: float
    bottom: float
    height: float
    elements: int


def buckling_pressure(
    frusta: tuple[Frustum, ...], *, modulus: float, poisson: float, wall: float, ends_loaded: bool
) -> float:
    """Smallest critical pressure over 2 to 14 lobes, both ends round and free to turn [Pa]."""
    return min(
        _critical(frusta, modulus, poisson, wall, lobes, ends_loaded=ends_loaded)
        for lobes in range(2, 15)
    )


def _critical(
    frusta: tuple[Frustum, ...],
    modulus: float,
    poisson: float,
    wall: float,
    lobes: int,
    *,
    ends_loaded: bool,
) -> float:
    count = sum(part.elements for part in frusta)
    size = NODE * (count + 1) + 2 * count
    stiffness, geometric = np.zeros((size, size)), np.zeros((size, size))
    element = 0
    for part in frusta:
        for step in range(part.elements):
            shares = np.array([step, step + 1]) / part.elements
            radii = part.top + shares * (part.bottom - part.top)
            own, stressed = _element(
                top=radii[0],
                bottom=radii[1],
                height=part.height / part.elements,
                modulus=modulus,
                poisson=poisson,
                wall=wall,
                n=lobes,
                ends_loaded=ends_loaded,
            )
            middle = NODE * (count + 1) + 2 * element
            places = np.r_[NODE * element : NODE * (element + 2), middle, middle + 1]
            stiffness[np.ix_(places, places)] += own
            geometric[np.ix_(places, places)] += stressed
            element += 1
    held = [0, 2, NODE * count, NODE * count + 2]  # radial and round, at both ends
    free = np.setdiff1d(np.arange(size), held)
    # K x = p G x; turned over, since G has no sign of its own and K has
    inverse = eigh(
        geometric[np.ix_(free, free)],
        stiffness[np.ix_(free, free)],
        eigvals_only=True,
        subset_by_index=(len(free) - 1, len(free) - 1),
    )
    return float(1 / inverse[0])


def _element(
    *,
    top: float,
    bottom: float,
    height: float,
    modulus: float,
    poisson: float,
    wall: float,
    n: int,
    ends_loaded: bool,
) -> tuple[Matrix, Matrix]:
    length = hypot(height, top - bottom)
    sine, cosine = (top - bottom) / length, height / length
    stretch = modulus * wall / (1 - poisson**2)
    bend = modulus * wall**3 / (12 * (1 - poisson**2))
    law = np.array([[1, poisson, 0], [poisson, 1, 0], [0, 0, (1 - poisson) / 2]])
    stiffness, geometric = np.zeros((10, 10)), np.zeros((10, 10))
    for point, weight in zip((_POINTS + 1) / 2, _WEIGHTS / 2, strict=True):
        x, h = point, length
        r = top - point * (top - bottom)
        slope = -sine  # of the radius along the meridian
        quadratic = np.array([(1 - x) * (1 - 2 * x), x * (2 * x - 1), 4 * x * (1 - x)])
        d_quadratic = np.array([4 * x - 3, 4 * x - 1, 4 - 8 * x]) / h
        cubic = np.array([1 - 3 * x**2 + 2 * x**3, 0.0, 3 * x**2 - 2 * x**3, 0.0])
        cubic[[1, 3]] = h * (x - 2 * x**2 + x**3), h * (x**3 - x**2)
        d_cubic = np.array([-6 * x + 6 * x**2, h * (1 - 4 * x + 3 * x**2), 6 * x - 6 * x**2])
        d_cubic = np.append(d_cubic, h * (3 * x**2 - 2 * x)) / h
        dd_cubic = np.array([-6 + 12 * x, h * (-4 + 6 * x), 6 - 12 * x, h * (6 * x - 2)]) / h**2
        u, du = _along(quadratic, sine, cosine), _along(d_quadratic, sine, cosine)
        v, dv = _round(quadratic), _round(d_quadratic)
        w, dw = _normal(cubic, sine, cosine), _normal(d_cubic, sine, cosine)
        ddw = _normal(dd_cubic, sine, cosine)

        turn = (n * w + v * cosine) / r
        d_turn = (n * dw + dv * cosine) / r - slope * turn / r
        membrane = np.array(
            [du, (n * v + u * slope + w * cosine) / r, dv - v * slope / r - n * u / r]
        )
        curvature = np.array(
            [-ddw, n * turn / r - dw * slope / r, n * dw / r + d_turn - slope * turn / r]
        )
        area = weight * length * r
        stiffness += area * stretch * membrane.T @ law @ membrane
        stiffness += area * bend * curvature.T @ law @ curvature
        # what one pascal does: hoop force on the turned wall, and its potential as it follows
        hoop = r / cosine
        geometric += area * hoop * (np.outer(turn, turn) + np.outer(membrane[1], membrane[1]))
        if ends_loaded:
            geometric += area * hoop / 2 * (np.outer(dw, dw) + np.outer(dv, dv))
        outward = w * cosine - u * sine
        mixed = np.outer(outward, v)
        geometric -= (
            weight
            * length
            * cosine
            * (np.outer(outward, outward) + n * (mixed + mixed.T) + np.outer(v, v))
        )
    return stiffness, geometric


def _along(shape: Matrix, sine: float, cosine: float) -> Matrix:
    row = np.zeros(10)
    for node in (0, 1):
        row[NODE * node] = -sine * shape[node]
        row[NODE * node + 1] = -cosine * shape[node]
    row[8] = shape[2]
    return row


def _round(shape: Matrix) -> Matrix:
    row = np.zeros(10)
    row[[2, NODE + 2, 9]] = shape
    return row


def _normal(shape: Matrix, sine: float, cosine: float) -> Matrix:
    row = np.zeros(10)
    for node in (0, 1):
        row[NODE * node] = cosine * shape[2 * node]
        row[NODE * node + 1] = -sine * shape[2 * node]
        row[NODE * node + 3] = shape[2 * node + 1]
    return row

"""Thin tubes and cones under outside pressure: where they buckle, by elastic theory.

All pressures are those of a perfect shell; what a real one loses is counted where they are used.
"""

from __future__ import annotations

from math import pi, sqrt
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range
from gyrecut.strength.ranges import DIAMETER, LENGTH, MODULUS, POISSON, PRESSURE, THIN_SHELL, WALL

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.airflow.ranges import Numbers

SLENDERNESS = Range(
    quantity="free length over diameter",
    low=0.05,
    high=1e5,
    unit="-",
    source="shorter ones fail by their own strength first; common practice, no source",
)
SHORT_SHELL = Range(
    quantity="free length over diameter",
    low=0.3,
    high=4.0,
    unit="-",
    source="where it stays within 15 % of von Mises",
)
MIDDLING_WALL = Range(
    quantity="wall over diameter",
    low=0.001,
    high=0.02,
    unit="-",
    source="where it stays within 15 % of von Mises",
)
CRITICAL_SHARE = Range(
    quantity="free length over Southwell's critical length",
    low=0.0,
    high=0.5,
    unit="-",
    source="where it stays within 15 % of von Mises; longer ones are long tubes",
)
CONE_SLOPE = Range(
    quantity="half apex angle of the cone",
    low=0.0,
    high=1.05,
    unit="rad",
    source="up to 60 degrees, NASA SP-8019, from memory",
)
# The lobes of the thinnest and shortest shell allowed: (7 (D/t) / (L/D)^2)^(1/4) is about 130.
_LOBES: NDArray[np.float64] = np.arange(2.0, 250.0)


def collapse_pressure_long_tube(
    *, modulus: Numbers, poisson: Numbers, wall: Numbers, diameter: Numbers
) -> Numbers:
    r"""Outside pressure at which an endless tube folds flat, after Bresse and Bryan.

    .. math:: p = \frac{2 E}{1 - \nu^2} \left(\frac{t}{D}\right)^3

    Parameters
    ----------
    modulus : float or ndarray
        Elastic modulus :math:`E` [Pa]
    poisson : float or ndarray
        Poisson ratio :math:`\nu` [-]
    wall : float or ndarray
        Wall thickness :math:`t` [m]
    diameter : float or ndarray
        Diameter of the middle of the wall, :math:`D` [m]

    Returns
    -------
    float or ndarray
        Pressure difference :math:`p` [Pa]

    Raises
    ------
    OutOfRangeError
        When the wall is thicker than a tenth of the radius, or a value outside its range.

    Notes
    -----
    The lower bound for every tube, whatever its length: two lobes, no help from the ends.

    References
    ----------
    .. [1] Roark's Formulas for Stress and Strain, 6th ed., table 35 case 19a, read in a worksheet.
    """
    _check_shell(modulus, poisson, wall, diameter)
    pressure: Numbers = 2 * modulus / (1 - poisson**2) * (wall / diameter) ** 3
    return pressure


def collapse_pressure_von_mises(
    *, modulus: Numbers, poisson: Numbers, wall: Numbers, diameter: Numbers, length: Numbers
) -> Numbers:
    r"""Outside pressure on side and ends at which a tube with stiff ends buckles, von Mises.

    .. math::

        p = \min_n \frac{E t / R}{n^2 - 1 + Z^2 / 2} \left[\frac{1}{(n^2 / Z^2 + 1)^2}
        + \frac{t^2 (n^2 - 1 + Z^2)^2}{12 R^2 (1 - \nu^2)}\right], \quad Z = \pi R / L

    Parameters
    ----------
    modulus : float or ndarray
        Elastic modulus :math:`E` [Pa]
    poisson : float or ndarray
        Poisson ratio :math:`\nu` [-]
    wall : float or ndarray
        Wall thickness :math:`t` [m]
    diameter : float or ndarray
        Diameter of the middle of the wall, :math:`2 R` [m]
    length : float or ndarray
        Free length between ends that stay round, :math:`L` [m]

    Returns
    -------
    float or ndarray
        Pressure difference :math:`p`, the smallest over 2 and more lobes :math:`n` [Pa]

    Raises
    ------
    OutOfRangeError
        When the wall is thicker than a tenth of the radius, or a value outside its range.

    Notes
    -----
    The ends stay round and may turn. Falls to the long tube as the length grows.

    References
    ----------
    .. [1] von Mises 1914 and 1929, as in Windenburg and Trilling, Trans. ASME 56 (1934) 819, and
       in PD 5500 clause 3.6; from memory.
    """
    _check_shell(modulus, poisson, wall, diameter)
    SLENDERNESS.check(length / diameter)
    over_lobes = _von_mises(modulus, poisson, wall, diameter, length, on_ends=0.5)
    pressure: Numbers = np.min(over_lobes, axis=-1)[()]
    return pressure


def collapse_pressure_lateral_von_mises(
    *, modulus: Numbers, poisson: Numbers, wall: Numbers, diameter: Numbers, length: Numbers
) -> Numbers:
    r"""Outside pressure on the side alone at which a tube with stiff ends buckles, von Mises.

    .. math::

        p = \min_n \frac{E t / R}{n^2 - 1} \left[\frac{1}{(n^2 / Z^2 + 1)^2}
        + \frac{t^2 (n^2 - 1 + Z^2)^2}{12 R^2 (1 - \nu^2)}\right], \quad Z = \pi R / L

    Parameters
    ----------
    modulus : float or ndarray
        Elastic modulus :math:`E` [Pa]
    poisson : float or ndarray
        Poisson ratio :math:`\nu` [-]
    wall : float or ndarray
        Wall thickness :math:`t` [m]
    diameter : float or ndarray
        Diameter of the middle of the wall, :math:`2 R` [m]
    length : float or ndarray
        Free length between ends that stay round, :math:`L` [m]

    Returns
    -------
    float or ndarray
        Pressure difference :math:`p`, the smallest over 2 and more lobes :math:`n` [Pa]

    Raises
    ------
    OutOfRangeError
        When the wall is thicker than a tenth of the radius, or a value outside its range.

    References
    ----------
    .. [1] von Mises 1914, as in Windenburg and Trilling, Trans. ASME 56 (1934) 819; from memory.
    """
    _check_shell(modulus, poisson, wall, diameter)
    SLENDERNESS.check(length / diameter)
    over_lobes = _von_mises(modulus, poisson, wall, diameter, length, on_ends=0.0)
    pressure: Numbers = np.min(over_lobes, axis=-1)[()]
    return pressure


def collapse_pressure_windenburg_trilling(
    *, modulus: Numbers, poisson: Numbers, wall: Numbers, diameter: Numbers, length: Numbers
) -> Numbers:
    r"""Outside pressure on side and ends at which a short tube buckles, in closed form.

    .. math::

        p = \frac{2.42 E (t / D)^{2.5}}{(1 - \nu^2)^{0.75} (L / D - 0.45 \sqrt{t / D})}

    Parameters
    ----------
    modulus : float or ndarray
        Elastic modulus :math:`E` [Pa]
    poisson : float or ndarray
        Poisson ratio :math:`\nu` [-]
    wall : float or ndarray
        Wall thickness :math:`t` [m]
    diameter : float or ndarray
        Diameter of the middle of the wall, :math:`D` [m]
    length : float or ndarray
        Free length between ends that stay round, :math:`L` [m]

    Returns
    -------
    float or ndarray
        Pressure difference :math:`p` [Pa]

    Raises
    ------
    OutOfRangeError
        Outside lengths of 0.3 to 4 diameters, walls of 0.001 to 0.02 diameters, or beyond half of
        the critical length.

    Notes
    -----
    Fits the minimum of von Mises over the lobes; a check on it, since it was found another way.

    References
    ----------
    .. [1] Windenburg and Trilling, Trans. ASME 56 (1934) 819, from memory.
    """
    _check_shell(modulus, poisson, wall, diameter)
    SHORT_SHELL.check(length / diameter)
    MIDDLING_WALL.check(wall / diameter)
    CRITICAL_SHARE.check(
        length / critical_length_southwell(poisson=poisson, wall=wall, diameter=diameter)
    )
    slim = wall / diameter
    pressure: Numbers = (2.42 * modulus * slim**2.5) / (
        (1 - poisson**2) ** 0.75 * (length / diameter - 0.45 * slim**0.5)
    )
    return pressure


def critical_length_southwell(*, poisson: Numbers, wall: Numbers, diameter: Numbers) -> Numbers:
    r"""Length beyond which stiff ends no longer help a tube, after Southwell.

    .. math:: L = \frac{4 \pi \sqrt{6}}{27} (1 - \nu^2)^{1/4} D \sqrt{D / t}

    Parameters
    ----------
    poisson : float or ndarray
        Poisson ratio :math:`\nu` [-]
    wall : float or ndarray
        Wall thickness :math:`t` [m]
    diameter : float or ndarray
        Diameter of the middle of the wall, :math:`D` [m]

    Returns
    -------
    float or ndarray
        Length :math:`L` [m]

    Raises
    ------
    OutOfRangeError
        When the wall is thicker than a tenth of the radius, or a value outside its range.

    References
    ----------
    .. [1] Southwell 1915, as in Windenburg and Trilling, Trans. ASME 56 (1934) 819; from memory.
    """
    POISSON.check(poisson)
    DIAMETER.check(diameter)
    THIN_SHELL.check(wall / diameter)
    length: Numbers = (
        4 * pi * sqrt(6) / 27 * (1 - poisson**2) ** 0.25 * diameter * (diameter / wall) ** 0.5
    )
    return length


def collapse_pressure_cone(
    *,
    modulus: Numbers,
    wall: Numbers,
    wide_diameter: Numbers,
    narrow_diameter: Numbers,
    height: Numbers,
) -> Numbers:
    r"""Outside pressure at which a cone with stiff ends buckles, as its equivalent cylinder.

    .. math::

        p = \frac{0.92 E}{(s / \rho) (\rho / t)^{2.5}}, \quad
        \rho = \frac{r_1 + r_2}{2 \cos \alpha}, \quad s = \frac{h}{\cos \alpha}

    Parameters
    ----------
    modulus : float or ndarray
        Elastic modulus :math:`E` [Pa]
    wall : float or ndarray
        Wall thickness, square to the wall, :math:`t` [m]
    wide_diameter, narrow_diameter : float or ndarray
        Diameters of the middle of the wall at both ends, :math:`2 r_1, 2 r_2` [m]
    height : float or ndarray
        Along the axis, :math:`h` [m]

    Returns
    -------
    float or ndarray
        Pressure difference :math:`p`, for a poisson ratio of about 0.3 [Pa]

    Raises
    ------
    OutOfRangeError
        Above a half apex angle of 60 degrees, or when the wall is not thin.

    References
    ----------
    .. [1] NASA SP-8019, Buckling of thin-walled truncated cones, 1968, without its knock-down of
       0.75; from memory.
    """
    MODULUS.check(modulus)
    radius, slant = _as_cylinder(wide_diameter, narrow_diameter, height)
    WALL.check(wall)
    THIN_SHELL.check(wall / (2 * radius))
    pressure: Numbers = 0.92 * modulus / (slant / radius * (radius / wall) ** 2.5)
    return pressure


def equivalent_length(
    *, barrel_length: Numbers, wide_diameter: Numbers, narrow_diameter: Numbers, height: Numbers
) -> Numbers:
    r"""Length of the plain tube that buckles no later than a barrel with a cone below it.

    .. math:: L = L_b + s (\rho / R)^{3/2}

    Parameters
    ----------
    barrel_length : float or ndarray
        Length of the barrel, :math:`L_b` [m]
    wide_diameter, narrow_diameter : float or ndarray
        Diameters of the middle of the wall: barrel and cone's top :math:`2 R`, cone's foot [m]
    height : float or ndarray
        Height of the cone along the axis, whose slant is :math:`s` [m]

    Returns
    -------
    float or ndarray
        Length :math:`L` of a tube of the barrel's diameter and wall [m]

    Raises
    ------
    OutOfRangeError
        Above a half apex angle of 60 degrees, or when a value is outside its range.

    Notes
    -----
    The corner between barrel and cone is too slight to stay round, so both buckle as one. A short
    shell buckles at a pressure in proportion to :math:`1 / (L R^{3/2})`, from which the exponent
    follows; :math:`\rho` is the middle radius of curvature of the cone. The pressure found with
    it is 51 to 93 % of the one that eigenvalues give for nine barrels with cones
    (``tests/published/test_buckling.py``): it errs on the safe side, most with wide cones.

    References
    ----------
    .. [1] Derived here from [2], and held against eigenvalues in the test named above.
    .. [2] NASA SP-8007 and SP-8019, 1968, the exponents; from memory.
    """
    LENGTH.check(barrel_length)
    radius, slant = _as_cylinder(wide_diameter, narrow_diameter, height)
    length: Numbers = barrel_length + slant * (radius / (wide_diameter / 2)) ** 1.5
    return length


def ring_inertia_levy(
    *, pressure: Numbers, modulus: Numbers, diameter: Numbers, spacing: Numbers
) -> Numbers:
    r"""Second moment of area that lets a ring carry its share of tube without folding, Levy.

    .. math:: I = \frac{p D^3 l}{24 E}

    Parameters
    ----------
    pressure : float or ndarray
        Outside pressure that the ring has to stand, safety counted in, :math:`p` [Pa]
    modulus : float or ndarray
        Elastic modulus of the ring, :math:`E` [Pa]
    diameter : float or ndarray
        Of the ring, :math:`D` [m]
    spacing : float or ndarray
        Length of tube that leans on the ring, :math:`l` [m]

    Returns
    -------
    float or ndarray
        About the axis that the ring's wall bends round, :math:`I` [m^4]

    Raises
    ------
    OutOfRangeError
        When a value is outside its range.

    References
    ----------
    .. [1] Levy 1884; Timoshenko and Gere, Theory of Elastic Stability, art. 7.5; from memory.
    """
    PRESSURE.check(pressure)
    MODULUS.check(modulus)
    DIAMETER.check(diameter)
    LENGTH.check(spacing)
    inertia: Numbers = pressure * diameter**3 * spacing / (24 * modulus)
    return inertia


def _check_shell(modulus: Numbers, poisson: Numbers, wall: Numbers, diameter: Numbers) -> None:
    MODULUS.check(modulus)
    POISSON.check(poisson)
    WALL.check(wall)
    DIAMETER.check(diameter)
    THIN_SHELL.check(wall / diameter)


def _as_cylinder(wide: Numbers, narrow: Numbers, height: Numbers) -> tuple[Numbers, Numbers]:
    """Middle radius of curvature and slant length of a cone."""
    DIAMETER.check(wide)
    DIAMETER.check(narrow)
    LENGTH.check(height)
    lean = np.arctan2((wide - narrow) / 2, height)
    CONE_SLOPE.check(lean)
    return (wide + narrow) / (4 * np.cos(lean)), height / np.cos(lean)


def _von_mises(
    modulus: Numbers,
    poisson: Numbers,
    wall: Numbers,
    diameter: Numbers,
    length: Numbers,
    *,
    on_ends: float,
) -> NDArray[np.float64]:
    """Buckling pressure for each number of lobes, on a new last axis."""
    E, nu, t, D, L = (
        np.asarray(value, dtype=np.float64)[..., np.newaxis]
        for value in (modulus, poisson, wall, diameter, length)
    )
    R = D / 2
    Z2 = (pi * R / L) ** 2
    n2 = _LOBES**2
    membrane = 1 / (n2 / Z2 + 1) ** 2
    bending = t**2 / (12 * R**2 * (1 - nu**2)) * (n2 - 1 + Z2) ** 2
    pressures: NDArray[np.float64] = E * t / R / (n2 - 1 + on_ends * Z2) * (membrane + bending)
    return pressures

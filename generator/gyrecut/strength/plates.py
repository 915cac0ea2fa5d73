"""Flat round lids under pressure: how far they bend, and the stress that does it."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range
from gyrecut.strength.ranges import DIAMETER, MODULUS, POISSON, PRESSURE, THIN_PLATE, WALL

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

HOLE = Range(
    quantity="hole over plate diameter",
    low=1e-3,
    high=0.95,
    unit="-",
    source="a plate with less left is a ring; common practice, no source",
)


def plate_stiffness(*, modulus: Numbers, poisson: Numbers, thickness: Numbers) -> Numbers:
    r"""Bending stiffness of a plate, a strip of unit width.

    .. math:: D = \frac{E t^3}{12 (1 - \nu^2)}

    Parameters
    ----------
    modulus : float or ndarray
        Elastic modulus :math:`E` [Pa]
    poisson : float or ndarray
        Poisson ratio :math:`\nu` [-]
    thickness : float or ndarray
        Of the plate, :math:`t` [m]

    Returns
    -------
    float or ndarray
        Stiffness :math:`D` [N*m]

    Raises
    ------
    OutOfRangeError
        When a value is outside its range.

    References
    ----------
    .. [1] Timoshenko and Woinowsky-Krieger, Theory of Plates and Shells, 2nd ed., eq. (3); from
       memory.
    """
    MODULUS.check(modulus)
    POISSON.check(poisson)
    WALL.check(thickness)
    stiffness: Numbers = modulus * thickness**3 / (12 * (1 - poisson**2))
    return stiffness


def deflection_round_supported(
    *, pressure: Numbers, modulus: Numbers, poisson: Numbers, thickness: Numbers, diameter: Numbers
) -> Numbers:
    r"""How far the centre of a round plate sinks that lies loose on its edge.

    .. math:: w = \frac{5 + \nu}{1 + \nu} \frac{q a^4}{64 D}

    Parameters
    ----------
    pressure : float or ndarray
        Over the whole plate, :math:`q` [Pa]
    modulus : float or ndarray
        Elastic modulus [Pa]
    poisson : float or ndarray
        Poisson ratio :math:`\nu` [-]
    thickness : float or ndarray
        Of the plate [m]
    diameter : float or ndarray
        Of the circle it rests on, :math:`2 a` [m]

    Returns
    -------
    float or ndarray
        Deflection :math:`w`, true while it is below half of the thickness, too large above [m]

    Raises
    ------
    OutOfRangeError
        When the plate is not thin, or a value outside its range.

    References
    ----------
    .. [1] Civil Engineering Handbook, 2nd ed., eqs. 47.72 to 47.76; Roark table 11.2 case 10a.
    """
    _check_round(pressure, thickness, diameter)
    stiffness = plate_stiffness(modulus=modulus, poisson=poisson, thickness=thickness)
    deflection: Numbers = (
        (5 + poisson) / (1 + poisson) * pressure * (diameter / 2) ** 4 / (64 * stiffness)
    )
    return deflection


def stress_round_supported(
    *, pressure: Numbers, poisson: Numbers, thickness: Numbers, diameter: Numbers
) -> Numbers:
    r"""Largest bending stress of a round plate that lies loose on its edge, at its centre.

    .. math:: \sigma = \frac{3 (3 + \nu)}{8} q \left(\frac{a}{t}\right)^2

    Parameters
    ----------
    pressure : float or ndarray
        Over the whole plate, :math:`q` [Pa]
    poisson : float or ndarray
        Poisson ratio :math:`\nu` [-]
    thickness : float or ndarray
        Of the plate, :math:`t` [m]
    diameter : float or ndarray
        Of the circle it rests on, :math:`2 a` [m]

    Returns
    -------
    float or ndarray
        Stress :math:`\sigma` [Pa]

    Raises
    ------
    OutOfRangeError
        When the plate is not thin, or a value outside its range.

    References
    ----------
    .. [1] Civil Engineering Handbook, 2nd ed., eqs. 47.72 to 47.76; Roark table 11.2 case 10a.
    """
    POISSON.check(poisson)
    _check_round(pressure, thickness, diameter)
    stress: Numbers = 3 * (3 + poisson) / 8 * pressure * (diameter / (2 * thickness)) ** 2
    return stress


def deflection_round_clamped(
    *, pressure: Numbers, modulus: Numbers, poisson: Numbers, thickness: Numbers, diameter: Numbers
) -> Numbers:
    r"""How far the centre of a round plate sinks whose edge cannot turn.

    .. math:: w = \frac{q a^4}{64 D}

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
    diameter : float or ndarray
        Of the circle it is clamped at, :math:`2 a` [m]

    Returns
    -------
    float or ndarray
        Deflection :math:`w`, true while it is below half of the thickness, too large above [m]

    Raises
    ------
    OutOfRangeError
        When the plate is not thin, or a value outside its range.

    References
    ----------
    .. [1] Civil Engineering Handbook, 2nd ed., eqs. 47.72 to 47.76; Roark table 11.2 case 10b.
    """
    _check_round(pressure, thickness, diameter)
    stiffness = plate_stiffness(modulus=modulus, poisson=poisson, thickness=thickness)
    deflection: Numbers = pressure * (diameter / 2) ** 4 / (64 * stiffness)
    return deflection


def stress_round_clamped(*, pressure: Numbers, thickness: Numbers, diameter: Numbers) -> Numbers:
    r"""Largest bending stress of a round plate whose edge cannot turn, at that edge.

    .. math:: \sigma = \frac{3}{4} q \left(\frac{a}{t}\right)^2

    Parameters
    ----------
    pressure : float or ndarray
        Over the whole plate, :math:`q` [Pa]
    thickness : float or ndarray
        Of the plate, :math:`t` [m]
    diameter : float or ndarray
        Of the circle it is clamped at, :math:`2 a` [m]

    Returns
    -------
    float or ndarray
        Stress :math:`\sigma` [Pa]

    Raises
    ------
    OutOfRangeError
        When the plate is not thin, or a value outside its range.

    References
    ----------
    .. [1] Civil Engineering Handbook, 2nd ed., eqs. 47.72 to 47.76; Roark table 11.2 case 10b.
    """
    _check_round(pressure, thickness, diameter)
    stress: Numbers = 0.75 * pressure * (diameter / (2 * thickness)) ** 2
    return stress


def deflection_holed_supported(
    *,
    pressure: Numbers,
    modulus: Numbers,
    poisson: Numbers,
    thickness: Numbers,
    diameter: Numbers,
    hole: Numbers,
) -> Numbers:
    r"""How far the edge of the hole sinks in a round plate that lies loose on its outer edge.

    .. math::

        w = \frac{q r^4}{64 D} + A + B r^2 + C \ln r + F r^2 \ln r

    Parameters
    ----------
    pressure : float or ndarray
        Over the plate but not the hole, :math:`q` [Pa]
    modulus : float or ndarray
        Elastic modulus [Pa]
    poisson : float or ndarray
        Poisson ratio [-]
    thickness : float or ndarray
        Of the plate [m]
    diameter : float or ndarray
        Of the circle it rests on [m]
    hole : float or ndarray
        Diameter of a central hole with a free edge [m]

    Returns
    -------
    float or ndarray
        Deflection at the hole's edge, true while it is below half of the thickness [m]

    Raises
    ------
    OutOfRangeError
        When the plate is not thin or a hole above 0.95 of it, or a value outside its range.

    Notes
    -----
    A hole of a third of the plate bends it a fifth further than no hole. The four constants
    follow from no shear and no moment at the hole, no moment and no deflection at the support.

    References
    ----------
    .. [1] Timoshenko and Woinowsky-Krieger, Theory of Plates and Shells, 2nd ed., art. 17, table 3;
       from memory, solved anew.
    """
    _check_round(pressure, thickness, diameter)
    HOLE.check(hole / diameter)
    stiffness = plate_stiffness(modulus=modulus, poisson=poisson, thickness=thickness)
    x = hole / diameter
    squared, logarithmic, mixed = _holed_constants(poisson, x)
    shape = (
        (1 - x**4) / 64 + squared * (1 - x**2) - logarithmic * np.log(x) - mixed * x**2 * np.log(x)
    )
    deflection: Numbers = np.abs(shape) * pressure * (diameter / 2) ** 4 / stiffness
    return deflection


def stress_holed_supported(
    *, pressure: Numbers, poisson: Numbers, thickness: Numbers, diameter: Numbers, hole: Numbers
) -> Numbers:
    r"""Stress round the edge of the hole in a round plate that lies loose on its outer edge.

    .. math:: \sigma = \frac{6 D}{t^2} \left(\frac{w'}{r} + \nu w''\right)

    Parameters
    ----------
    pressure : float or ndarray
        Over the plate but not the hole [Pa]
    poisson : float or ndarray
        Poisson ratio :math:`\nu` [-]
    thickness : float or ndarray
        Of the plate, :math:`t` [m]
    diameter : float or ndarray
        Of the circle it rests on [m]
    hole : float or ndarray
        Diameter of a central hole with a free edge, :math:`2 r` [m]

    Returns
    -------
    float or ndarray
        Stress :math:`\sigma`, the largest in the plate [Pa]

    Raises
    ------
    OutOfRangeError
        When the plate is not thin or a hole above 0.95 of it, or a value outside its range.

    Notes
    -----
    Twice the stress of a plate without a hole where the hole is small.

    References
    ----------
    .. [1] Timoshenko and Woinowsky-Krieger, Theory of Plates and Shells, 2nd ed., art. 17, table 3;
       from memory, solved anew.
    """
    POISSON.check(poisson)
    _check_round(pressure, thickness, diameter)
    HOLE.check(hole / diameter)
    x = hole / diameter
    squared, logarithmic, mixed = _holed_constants(poisson, x)
    moment = (
        (1 + 3 * poisson) * x**2 / 16
        + 2 * (1 + poisson) * squared
        + (1 - poisson) * logarithmic / x**2
        + mixed * (2 * (1 + poisson) * np.log(x) + 1 + 3 * poisson)
    )
    stress: Numbers = 6 * np.abs(moment) * pressure * (diameter / (2 * thickness)) ** 2
    return stress


def _holed_constants(poisson: Numbers, hole: Numbers) -> tuple[Numbers, Numbers, Numbers]:
    """B, C and F for a plate of radius 1, stiffness 1 and pressure 1 with a hole of that radius."""

    def moment_of_known_terms(r: Numbers) -> Numbers:
        value: Numbers = (3 + poisson) * r**2 / 16 + mixed * (
            2 * (1 + poisson) * np.log(r) + 3 + poisson
        )
        return value

    mixed = -(hole**2) / 8
    at_hole, at_edge = moment_of_known_terms(hole), moment_of_known_terms(1.0)
    logarithmic = (at_hole - at_edge) / ((1 - poisson) * (1 / hole**2 - 1))
    squared = ((1 - poisson) * logarithmic - at_edge) / (2 * (1 + poisson))
    return squared, logarithmic, mixed


def _check_round(pressure: Numbers, thickness: Numbers, diameter: Numbers) -> None:
    PRESSURE.check(pressure)
    WALL.check(thickness)
    DIAMETER.check(diameter)
    THIN_PLATE.check(thickness / diameter)

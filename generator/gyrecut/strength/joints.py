"""Screws, flanges and glued laps: what they carry, and the weight that hangs on them."""

from __future__ import annotations

from math import pi, sqrt
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range
from gyrecut.strength.ranges import DENSITY, DIAMETER, LENGTH, MODULUS, PRESSURE, STRENGTH, WALL

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

GRAVITY = 9.80665  # m/s2, standard

GASKET_FACTOR = Range(
    quantity="gasket factor",
    low=0.0,
    high=6.5,
    unit="-",
    source="table 2-5.1 of ASME VIII-1 appendix 2, from memory",
)
LINE_LOAD = Range(
    quantity="load along the flange",
    low=0.0,
    high=1e7,
    unit="N/m",
    source="far beyond any soft gasket; common practice, no source",
)


def screw_pitch_tema(
    *, thread: Numbers, flange_thickness: Numbers, gasket_factor: Numbers
) -> Numbers:
    r"""Widest pitch of the screws of a steel flange that a gasket still seals under.

    .. math:: B = 2 d + \frac{6 t}{m + 0.5}

    Parameters
    ----------
    thread : float or ndarray
        Nominal diameter of the screws, :math:`d` [m]
    flange_thickness : float or ndarray
        Of the thinner flange, :math:`t` [m]
    gasket_factor : float or ndarray
        Factor of the gasket, 0.5 for soft rubber, :math:`m` [-]

    Returns
    -------
    float or ndarray
        Pitch :math:`B` [m]

    Raises
    ------
    OutOfRangeError
        When a value is outside its range.

    References
    ----------
    .. [1] Standards of the Tubular Exchanger Manufacturers Association, from memory.
    """
    DIAMETER.check(thread)
    WALL.check(flange_thickness)
    GASKET_FACTOR.check(gasket_factor)
    pitch: Numbers = 2 * thread + 6 * flange_thickness / (gasket_factor + 0.5)
    return pitch


def flange_bow(
    *, line_load: Numbers, pitch: Numbers, modulus: Numbers, width: Numbers, thickness: Numbers
) -> Numbers:
    r"""How far a flange bows between two screws under the push of its gasket.

    .. math:: w = \frac{g B^4}{384 E I}, \quad I = \frac{b t^3}{12}

    Parameters
    ----------
    line_load : float or ndarray
        Push of the gasket along the flange, :math:`g` [N/m]
    pitch : float or ndarray
        From screw to screw, :math:`B` [m]
    modulus : float or ndarray
        Elastic modulus :math:`E` [Pa]
    width, thickness : float or ndarray
        Of the flange, :math:`b, t` [m]

    Returns
    -------
    float or ndarray
        Bow :math:`w` half-way [m]

    Raises
    ------
    OutOfRangeError
        When a value is outside its range.

    References
    ----------
    .. [1] Beam with both ends built in, any textbook on strength of materials.
    """
    LINE_LOAD.check(line_load)
    LENGTH.check(pitch)
    MODULUS.check(modulus)
    WALL.check(width)
    WALL.check(thickness)
    bow: Numbers = line_load * pitch**4 / (384 * modulus * width * thickness**3 / 12)
    return bow


def pull_out_force(*, diameter: Numbers, engagement: Numbers, strength: Numbers) -> Numbers:
    r"""Pull that tears an insert or a screw out of plastic, by shear round its outside.

    .. math:: F = \pi d L \frac{S}{\sqrt{3}}

    Parameters
    ----------
    diameter : float or ndarray
        Outside of the insert, or of the thread in the plastic, :math:`d` [m]
    engagement : float or ndarray
        Length in the plastic, :math:`L` [m]
    strength : float or ndarray
        Tensile strength of the plastic across the shear, :math:`S` [Pa]

    Returns
    -------
    float or ndarray
        Force :math:`F` [N]

    Raises
    ------
    OutOfRangeError
        When a value is outside its range.

    References
    ----------
    .. [1] Design guides of polymer makers, from memory; shear strength after von Mises.
    """
    DIAMETER.check(diameter)
    LENGTH.check(engagement)
    STRENGTH.check(strength)
    force: Numbers = pi * diameter * engagement * strength / sqrt(3)
    return force


def lap_shear(*, force: Numbers, diameter: Numbers, lap: Numbers) -> Numbers:
    r"""Mean shear in the glue of a spigot in its socket.

    .. math:: \tau = \frac{F}{\pi D l}

    Parameters
    ----------
    force : float or ndarray
        Along the axis, :math:`F` [N]
    diameter : float or ndarray
        Of the glued face, :math:`D` [m]
    lap : float or ndarray
        Length of the glued face along the axis, :math:`l` [m]

    Returns
    -------
    float or ndarray
        Shear stress :math:`\tau` [Pa]

    Raises
    ------
    OutOfRangeError
        When a value is outside its range.

    References
    ----------
    .. [1] Holds by definition.
    """
    DIAMETER.check(diameter)
    LENGTH.check(lap)
    shear: Numbers = force / (pi * diameter * lap)
    return shear


def peak_shear_factor_volkersen(
    *,
    modulus: Numbers,
    wall: Numbers,
    lap: Numbers,
    glue_shear_modulus: Numbers,
    glue_thickness: Numbers,
) -> Numbers:
    r"""Shear at the ends of a glued lap over its mean, for two equal walls.

    .. math:: k \coth k, \quad k = \frac{l}{2} \sqrt{\frac{2 G}{E t g}}

    Parameters
    ----------
    modulus : float or ndarray
        Elastic modulus of the walls, :math:`E` [Pa]
    wall : float or ndarray
        Thickness of each wall, :math:`t` [m]
    lap : float or ndarray
        Length of the lap along the force, :math:`l` [m]
    glue_shear_modulus : float or ndarray
        Shear modulus of the glue, :math:`G` [Pa]
    glue_thickness : float or ndarray
        Thickness of the glue, :math:`g` [m]

    Returns
    -------
    float or ndarray
        Factor, 1 or more [-]

    Raises
    ------
    OutOfRangeError
        When a value is outside its range.

    Notes
    -----
    A stiff glue carries the load over a few millimetres at each end, so that a longer lap of it
    is tighter and straighter, but no stronger.

    References
    ----------
    .. [1] Volkersen, Luftfahrtforschung 15 (1938) 41, from memory.
    """
    MODULUS.check(modulus)
    WALL.check(wall)
    LENGTH.check(lap)
    MODULUS.check(glue_shear_modulus)
    WALL.check(glue_thickness)
    k = lap / 2 * np.sqrt(2 * glue_shear_modulus / (modulus * wall * glue_thickness))
    factor: Numbers = k / np.tanh(k)
    return factor


def end_load(*, pressure: Numbers, diameter: Numbers) -> Numbers:
    r"""Force of a pressure difference on a round end.

    .. math:: F = p \frac{\pi}{4} D^2

    Parameters
    ----------
    pressure : float or ndarray
        Difference over the end, :math:`p` [Pa]
    diameter : float or ndarray
        Of the end, :math:`D` [m]

    Returns
    -------
    float or ndarray
        Force :math:`F` [N]

    Raises
    ------
    OutOfRangeError
        When a value is outside its range.

    References
    ----------
    .. [1] Holds by definition.
    """
    PRESSURE.check(pressure)
    DIAMETER.check(diameter)
    force: Numbers = pressure * pi / 4 * diameter**2
    return force


def frustum_weight(
    *,
    density: Numbers,
    wall: Numbers,
    wide_diameter: Numbers,
    narrow_diameter: Numbers,
    height: Numbers,
) -> Numbers:
    r"""Weight of a thin cone, or of a tube where both ends are alike.

    .. math:: G = \rho g t \pi (r_1 + r_2) \sqrt{h^2 + (r_1 - r_2)^2}

    Parameters
    ----------
    density : float or ndarray
        Of the wall, :math:`\rho` [kg/m^3]
    wall : float or ndarray
        Thickness square to the wall, :math:`t` [m]
    wide_diameter, narrow_diameter : float or ndarray
        Diameters of the middle of the wall at both ends, :math:`2 r_1, 2 r_2` [m]
    height : float or ndarray
        Along the axis, :math:`h` [m]

    Returns
    -------
    float or ndarray
        Weight :math:`G` [N]

    Raises
    ------
    OutOfRangeError
        When a value is outside its range.

    References
    ----------
    .. [1] Holds by geometry; standard gravity.
    """
    DENSITY.check(density)
    WALL.check(wall)
    DIAMETER.check(wide_diameter)
    DIAMETER.check(narrow_diameter)
    LENGTH.check(height)
    slant = np.hypot(height, (wide_diameter - narrow_diameter) / 2)
    middle = (wide_diameter + narrow_diameter) / 2
    weight: Numbers = density * GRAVITY * wall * pi * middle * slant
    return weight

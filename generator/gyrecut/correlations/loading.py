"""What much dust in the air does to pressure drop and catch."""

from __future__ import annotations

from math import sqrt
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

BRIGGS = 0.0086 * sqrt(1000.0)  # m^1.5/kg^0.5; printed for g/m3
PENETRATION_EXPONENT = 0.18  # 0.182 and 0.2 are also in use

DUST_CONTENT = Range(
    quantity="dust in the air",
    low=0.0,
    high=1.0,
    unit="kg/m^3",
    source="tests reach about 0.13 kg/m^3; the end is common practice, no source",
)
SOME_DUST = Range(
    quantity="dust in the air",
    low=1e-4,
    high=1.0,
    unit="kg/m^3",
    source="a power law, about 0.0005 to 0.13 kg/m^3 tested; the ends are common practice, no "
    "source",
)


def pressure_drop_factor_briggs(dust_content: Numbers) -> Numbers:
    r"""Pressure drop with dust over that with clean air.

    .. math:: \Delta p / \Delta p_0 = 1 / (1 + 0.0086 \sqrt{c / (\mathrm{g/m^3})})

    Parameters
    ----------
    dust_content : float or ndarray
        Mass of dust in a volume of air, :math:`c` [kg/m^3]

    Returns
    -------
    float or ndarray
        Factor, at most 1 [-]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 1 kg/m3.

    Notes
    -----
    Dust rubs the spin away, so the drop falls. The effect varies with velocity, which no
    published formula shows (Hoffmann, Arends and Sie 1991, abstract).

    References
    ----------
    .. [1] Briggs, Trans. American Institute of Chemical Engineers 42 (1946) 511, from memory.
    """
    DUST_CONTENT.check(dust_content)
    factor: Numbers = 1.0 / (1.0 + BRIGGS * np.sqrt(dust_content))
    return factor


def penetration_factor(*, dust_content: Numbers, reference_content: Numbers) -> Numbers:
    r"""Share of dust that passes, over the share that passes at another dust content.

    .. math:: \frac{1 - \eta}{1 - \eta_1} = \left( \frac{c_1}{c} \right)^{0.18}

    Parameters
    ----------
    dust_content : float or ndarray
        Mass of dust in a volume of air, :math:`c` [kg/m^3]
    reference_content : float or ndarray
        The content at which the share is known, :math:`c_1`; often 0.0023 [kg/m^3]

    Returns
    -------
    float or ndarray
        Factor on the share that passes [-]

    Raises
    ------
    OutOfRangeError
        Outside 0.0001 to 1 kg/m3.

    References
    ----------
    .. [1] Baxter, as quoted in course material of the US EPA, from memory.
    """
    SOME_DUST.check(dust_content)
    SOME_DUST.check(reference_content)
    factor: Numbers = (reference_content / dust_content) ** PENETRATION_EXPONENT
    return factor

"""How wide the dust outlet has to be for the dust to leave through it."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.airflow.ranges import Range

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

_SOURCE = "far beyond any workshop cyclone; common practice, no source"

# Outlet over the longest chip: below the first, chips bridge it; above the second they do not.
CHIPS_ACROSS_LEAST = 3.0
CHIPS_ACROSS_SAFE = 6.0

# B = 3.5 cm (2450 w / bulk density)^0.4 with w in kg/s and density in kg/m3
ZENZ_LENGTH = 0.035  # m
ZENZ_RATE = 2450.0  # s kg/m3 per kg, as printed

MASS_FLOW = Range(quantity="dust feed", low=0.0, high=100.0, unit="kg/s", source=_SOURCE)
BULK_DENSITY = Range(quantity="bulk density", low=1.0, high=12e3, unit="kg/m^3", source=_SOURCE)
OUTLET = Range(quantity="dust outlet", low=0.0, high=10.0, unit="m", source=_SOURCE)
CHIP = Range(quantity="largest chip", low=0.0, high=1.0, unit="m", source=_SOURCE)


def smallest_outlet_zenz(*, mass_flow: Numbers, bulk_density: Numbers) -> Numbers:
    r"""Smallest dust outlet that a mass flow of free-flowing dust falls through.

    .. math:: B = 0.035 (2450 w / \rho_b)^{0.4}

    Parameters
    ----------
    mass_flow : float or ndarray
        Dust that is caught, :math:`w` [kg/s]
    bulk_density : float or ndarray
        Density of the loose heap, :math:`\rho_b` [kg/m^3]

    Returns
    -------
    float or ndarray
        Bore of the outlet, :math:`B` [m]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 100 kg/s, or 1 to 12000 kg/m3.

    Notes
    -----
    For free-flowing dust. Chips and fibres bridge: see :func:`smallest_outlet_for_chips`.

    References
    ----------
    .. [1] Zenz, as quoted in Koch and Licht, Chemical Engineering 84(24) (1977) 80, from memory.
    """
    MASS_FLOW.check(mass_flow)
    BULK_DENSITY.check(bulk_density)
    outlet: Numbers = ZENZ_LENGTH * (ZENZ_RATE * mass_flow / bulk_density) ** 0.4
    return outlet


def largest_mass_flow_zenz(*, outlet: Numbers, bulk_density: Numbers) -> Numbers:
    r"""Largest mass flow of free-flowing dust that falls through an outlet.

    .. math:: w = (B / 0.035)^{2.5} \rho_b / 2450

    Parameters
    ----------
    outlet : float or ndarray
        Bore of the outlet, :math:`B` [m]
    bulk_density : float or ndarray
        Density of the loose heap, :math:`\rho_b` [kg/m^3]

    Returns
    -------
    float or ndarray
        Mass flow :math:`w` [kg/s]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 10 m, or 1 to 12000 kg/m3.

    References
    ----------
    .. [1] :func:`smallest_outlet_zenz` solved for the mass flow.
    """
    OUTLET.check(outlet)
    BULK_DENSITY.check(bulk_density)
    mass_flow: Numbers = (outlet / ZENZ_LENGTH) ** 2.5 * bulk_density / ZENZ_RATE
    return mass_flow


def smallest_outlet_for_chips(largest_chip: Numbers, *, chips_across: float) -> Numbers:
    """Smallest dust outlet that chips of a length do not bridge.

    Parameters
    ----------
    largest_chip : float or ndarray
        Longest piece to expect [m]
    chips_across : float
        Chip lengths that have to fit across; `CHIPS_ACROSS_LEAST` to `CHIPS_ACROSS_SAFE` [-]

    Returns
    -------
    float or ndarray
        Bore of the outlet [m]

    Raises
    ------
    OutOfRangeError
        Outside 0 to 1 m.

    References
    ----------
    .. [1] Common practice, no source: three to six of the largest chip.
    """
    CHIP.check(largest_chip)
    return chips_across * largest_chip

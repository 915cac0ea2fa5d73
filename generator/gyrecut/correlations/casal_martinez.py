"""Pressure drop after Casal and Martinez-Benet, counted in inlet velocity heads."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.correlations.heads import slot_over_finder

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry


def inlet_velocity_heads_casal_martinez(geometry: CycloneGeometry) -> Numbers:
    r"""Pressure drop of a cyclone in velocity heads of its inlet slot.

    .. math:: N_H = 11.3 (a b / D_e^2)^2 + 3.33

    Parameters
    ----------
    geometry : CycloneGeometry
        With slot :math:`a \times b` and finder diameter :math:`D_e` [m]

    Returns
    -------
    float or ndarray
        Inlet velocity heads :math:`N_H` [-]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible.

    Notes
    -----
    Static drop, clean air. Within 5 % of both measured Stairmand bodies of 0.2 m (from memory).

    References
    ----------
    .. [1] Casal and Martinez-Benet, A better way to calculate cyclone pressure drop. Chemical
       Engineering 90(2) (1983) 99, from memory.
    """
    heads: Numbers = 11.3 * slot_over_finder(geometry) ** 2 + 3.33
    return heads

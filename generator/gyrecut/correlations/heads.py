"""From inlet velocity heads to pressure, for every correlation that counts in heads."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.airflow.conveying import velocity_head
from gyrecut.airflow.ranges import Range
from gyrecut.correlations.geometry import check_geometry, mean_inlet_velocity
from gyrecut.correlations.validity import AIR_DENSITY

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry

HEADS = Range(
    quantity="inlet velocity heads",
    low=0.0,
    high=1000.0,
    unit="-",
    source="published bodies have about 3 to 15; the ends are common practice, no source",
)


def pressure_drop_from_heads(
    geometry: CycloneGeometry, *, inlet_velocity_heads: Numbers, flow: Numbers, air_density: Numbers
) -> Numbers:
    r"""Pressure drop of a cyclone whose loss is known in heads of its inlet velocity.

    .. math:: \Delta p = N_H \rho v_i^2 / 2

    Parameters
    ----------
    geometry : CycloneGeometry
        With the slot that the inlet velocity :math:`v_i` is in [m]
    inlet_velocity_heads : float or ndarray
        From one of the correlations for them, :math:`N_H` [-]
    flow : float or ndarray
        Volume flow through this one cyclone [m^3/s]
    air_density : float or ndarray
        Density of the air, :math:`\rho` [kg/m^3]

    Returns
    -------
    float or ndarray
        Pressure drop :math:`\Delta p` [Pa]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, or a value outside its range.

    References
    ----------
    .. [1] Holds by definition.
    """
    HEADS.check(inlet_velocity_heads)
    AIR_DENSITY.check(air_density)
    velocity = mean_inlet_velocity(geometry, flow=flow)
    return inlet_velocity_heads * velocity_head(velocity=velocity, air_density=air_density)


def slot_over_finder(geometry: CycloneGeometry) -> Numbers:
    r"""Area of the slot over the square of the finder's bore, which all these heads depend on.

    .. math:: a b / D_e^2

    Parameters
    ----------
    geometry : CycloneGeometry
        With slot :math:`a \times b` and finder diameter :math:`D_e` [m]

    Returns
    -------
    float or ndarray
        Ratio [-]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible.

    References
    ----------
    .. [1] Holds by definition.
    """
    check_geometry(geometry)
    return geometry.slot_height * geometry.slot_width / geometry.finder_diameter**2

"""Pressure drop after Shepherd and Lapple, counted in inlet velocity heads."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.airflow.conveying import velocity_head
from gyrecut.correlations.geometry import check_geometry, mean_inlet_velocity
from gyrecut.correlations.validity import AIR_DENSITY

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry

TANGENTIAL_INLET = 16.0  # -, standard tangential inlet without a vane


def inlet_velocity_heads_shepherd_lapple(geometry: CycloneGeometry) -> Numbers:
    r"""Pressure drop of a cyclone in velocity heads of its inlet slot.

    .. math:: N_H = 16 a b / D_e^2

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
    Static drop from the inlet duct to the outlet duct, clean air, tangential slot inlet without
    a vane. Does not depend on velocity or size. On the safe side for choosing a blower: 23 to
    36 % above measured 0.2 m Stairmand bodies (from memory).

    References
    ----------
    .. [1] Shepherd and Lapple, Flow pattern and pressure drop in cyclone dust collectors.
       Industrial and Engineering Chemistry 31 (1939) 972; 32 (1940) 1246, from memory.
    """
    check_geometry(geometry)
    slot_area = geometry.slot_height * geometry.slot_width
    return TANGENTIAL_INLET * slot_area / geometry.finder_diameter**2


def pressure_drop_shepherd_lapple(
    geometry: CycloneGeometry, *, flow: Numbers, air_density: Numbers
) -> Numbers:
    r"""Pressure drop of a cyclone.

    .. math:: \Delta p = N_H \rho v_i^2 / 2

    Parameters
    ----------
    geometry : CycloneGeometry
        Inside dimensions [m]
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
        When the geometry is impossible, or the inlet velocity outside 1 m/s to 60 m/s.

    References
    ----------
    .. [1] As :func:`inlet_velocity_heads_shepherd_lapple`.
    """
    AIR_DENSITY.check(air_density)
    head = velocity_head(velocity=mean_inlet_velocity(geometry, flow=flow), air_density=air_density)
    return inlet_velocity_heads_shepherd_lapple(geometry) * head

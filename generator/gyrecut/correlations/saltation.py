"""The inlet velocity above which dust is taken up again from the wall."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.airflow.ranges import Range
from gyrecut.correlations.geometry import mean_inlet_velocity
from gyrecut.correlations.validity import PARTICLE_DENSITY, VISCOSITY

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry

GRAVITY = 9.81  # m/s2
# 2.055 in feet and feet per second; times 3.2808**0.7337 in metres.
KALEN_ZENZ = 4.913

BEST_VELOCITY_RATIO = 1.25  # inlet over saltation velocity where collection was best
REENTRAINMENT_RATIO = 1.36  # inlet over saltation velocity where dust is taken up again

AIR_DENSITY_FOR_SALTATION = Range(
    quantity="air density",
    low=0.2,
    high=5.0,
    unit="kg/m^3",
    source="the formula divides by it; common practice, no source",
)


def saltation_velocity_kalen_zenz(
    geometry: CycloneGeometry,
    *,
    flow: Numbers,
    particle_density: Numbers,
    air_density: Numbers,
    viscosity: Numbers,
) -> Numbers:
    r"""Saltation velocity at the wall, to be compared with the inlet velocity.

    .. math::
        W = \left( \frac{4 g \mu (\rho_p - \rho)}{3 \rho^2} \right)^{1/3}

        v_s = 4.913 W \frac{(b/D)^{0.4}}{(1 - b/D)^{1/3}} D^{0.067} v_i^{2/3}

    Parameters
    ----------
    geometry : CycloneGeometry
        With body diameter :math:`D` and slot width :math:`b` [m]
    flow : float or ndarray
        Volume flow through this one cyclone, which gives :math:`v_i` [m^3/s]
    particle_density : float or ndarray
        Density of one grain, :math:`\rho_p` [kg/m^3]
    air_density : float or ndarray
        Density of the air, :math:`\rho` [kg/m^3]
    viscosity : float or ndarray
        Dynamic viscosity of the air, :math:`\mu` [Pa*s]

    Returns
    -------
    float or ndarray
        Saltation velocity :math:`v_s` [m/s]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, or a value outside its range.

    Notes
    -----
    The criterion comes from large bodies and mineral dust. Small bodies with light dust exceed
    the ratio 1.36 at any useful velocity, a well working 0.2 m Stairmand body does so too: take
    it as information, not as a limit.

    References
    ----------
    .. [1] Kalen and Zenz, Theoretical-empirical approach to saltation velocity in cyclone
       design. AIChE Symposium Series 70(137) (1974) 388, as quoted in Koch and Licht, Chemical
       Engineering 84(24) (1977) 80, from memory.
    """
    PARTICLE_DENSITY.check(particle_density)
    AIR_DENSITY_FOR_SALTATION.check(air_density)
    VISCOSITY.check(viscosity)
    inlet_velocity = mean_inlet_velocity(geometry, flow=flow)
    excess_density = particle_density - air_density
    settling = (4.0 * GRAVITY * viscosity * excess_density / (3.0 * air_density**2)) ** (1 / 3)
    width_ratio = geometry.slot_width / geometry.body_diameter
    velocity: Numbers = (
        KALEN_ZENZ
        * settling
        * width_ratio**0.4
        / (1.0 - width_ratio) ** (1 / 3)
        * geometry.body_diameter**0.067
        * inlet_velocity ** (2 / 3)
    )
    return velocity

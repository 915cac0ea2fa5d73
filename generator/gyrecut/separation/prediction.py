"""A first forecast for one cyclone at one flow."""

from __future__ import annotations

from dataclasses import dataclass
from functools import partial
from typing import TYPE_CHECKING, ClassVar

from gyrecut.correlations.dust_sizes import mass_share_caught
from gyrecut.correlations.geometry import mean_inlet_velocity
from gyrecut.correlations.lapple import cut_size_lapple, grade_efficiency_lapple
from gyrecut.correlations.natural_length import natural_length_alexander
from gyrecut.correlations.saltation import saltation_velocity_kalen_zenz
from gyrecut.correlations.shepherd_lapple import pressure_drop_shepherd_lapple

if TYPE_CHECKING:
    from gyrecut.airflow.air import AirState
    from gyrecut.correlations.geometry import CycloneGeometry


@dataclass(frozen=True, slots=True, kw_only=True)
class FirstPrediction:
    """What one cyclone is expected to do, by one published formula for each number.

    Parameters
    ----------
    inlet_velocity : float
        Mean velocity in the inlet slot [m/s]
    cut_size_lapple : float
        Particle diameter kept by half, after Lapple [m]
    pressure_drop_shepherd_lapple : float
        Static pressure drop with clean air, after Shepherd and Lapple [Pa]
    mass_kept : float
        Share of the dust's mass kept, log-normal dust and Lapple's grade curve [-]
    saltation_velocity : float
        After Kalen and Zenz [m/s]
    natural_length : float
        Of the vortex below the vortex finder, after Alexander [m]
    """

    inlet_velocity: float
    cut_size_lapple: float
    pressure_drop_shepherd_lapple: float
    mass_kept: float
    saltation_velocity: float
    natural_length: float

    note: ClassVar[str] = (
        "First estimate: cut size and catch by Lapple, pressure drop by Shepherd and Lapple, "
        "with no other model beside them. For one body, published models lie a factor of 2 to 3 "
        "apart in cut size."
    )
    methods: ClassVar[dict[str, str]] = {
        "cut_size_lapple": "Lapple (1951)",
        "pressure_drop_shepherd_lapple": "Shepherd and Lapple (1939)",
        "mass_kept": "Lapple (1951), grade curve of Theodore and DePaola (1980)",
        "saltation_velocity": "Kalen and Zenz (1974)",
        "natural_length": "Alexander (1949)",
    }


def first_prediction(
    geometry: CycloneGeometry,
    *,
    flow: float,
    air: AirState,
    particle_density: float,
    median: float,
    spread: float,
) -> FirstPrediction:
    """Forecast for one cyclone, by one published formula for each number.

    Parameters
    ----------
    geometry : CycloneGeometry
        Inside dimensions, plain numbers [m]
    flow : float
        Volume flow through this one cyclone, not through its whole bank [m^3/s]
    air : AirState
        The air drawn in, SI
    particle_density : float
        Density of one grain [kg/m^3]
    median, spread : float
        Mass median diameter [m] and geometric standard deviation [-] of the dust

    Returns
    -------
    FirstPrediction
        All numbers in SI.

    Raises
    ------
    OutOfRangeError
        When a formula does not hold for these values.
    """
    cut_size = cut_size_lapple(
        geometry,
        flow=flow,
        particle_density=particle_density,
        air_density=air.density,
        viscosity=air.viscosity,
    )
    return FirstPrediction(
        inlet_velocity=float(mean_inlet_velocity(geometry, flow=flow)),
        cut_size_lapple=float(cut_size),
        pressure_drop_shepherd_lapple=float(
            pressure_drop_shepherd_lapple(geometry, flow=flow, air_density=air.density)
        ),
        mass_kept=mass_share_caught(
            partial(grade_efficiency_lapple, cut_size=cut_size), median=median, spread=spread
        ),
        saltation_velocity=float(
            saltation_velocity_kalen_zenz(
                geometry,
                flow=flow,
                particle_density=particle_density,
                air_density=air.density,
                viscosity=air.viscosity,
            )
        ),
        natural_length=float(natural_length_alexander(geometry)),
    )

"""Every model of cut size and of pressure drop under its name, all called alike."""

from __future__ import annotations

from dataclasses import dataclass
from types import MappingProxyType
from typing import TYPE_CHECKING

from gyrecut.airflow.conveying import velocity_head
from gyrecut.correlations.barth import (
    FRICTION_BARTH,
    FRICTION_HOFFMANN_STEIN,
    LIP_SHARP,
    BarthResult,
    barth,
    friction_with_dust_barth,
)
from gyrecut.correlations.casal_martinez import inlet_velocity_heads_casal_martinez
from gyrecut.correlations.dirgo_ramachandran import inlet_velocity_heads_dirgo_ramachandran
from gyrecut.correlations.first import inlet_velocity_heads_first
from gyrecut.correlations.geometry import mean_inlet_velocity
from gyrecut.correlations.iozia_leith import iozia_leith
from gyrecut.correlations.lapple import cut_size_lapple
from gyrecut.correlations.leith_licht import leith_licht
from gyrecut.correlations.muschelknautz import (
    USUAL_FRICTION_FLOOR,
    MuschelknautzResult,
    muschelknautz,
)
from gyrecut.correlations.shepherd_lapple import inlet_velocity_heads_shepherd_lapple
from gyrecut.correlations.stairmand import inlet_velocity_heads_stairmand

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry


@dataclass(frozen=True, slots=True, kw_only=True)
class Conditions:
    """What a cyclone works with.

    Parameters
    ----------
    flow : float or ndarray
        Volume flow through one cyclone [m^3/s]
    particle_density : float or ndarray
        Density of one grain [kg/m^3]
    air_density : float or ndarray
        Density of the air [kg/m^3]
    viscosity : float or ndarray
        Dynamic viscosity of the air [Pa*s]
    temperature : float or ndarray
        Of the air [K]
    loading : float or ndarray
        Mass of dust in the mass of air [-]
    """

    flow: Numbers
    particle_density: Numbers
    air_density: Numbers
    viscosity: Numbers
    temperature: Numbers
    loading: Numbers


if TYPE_CHECKING:
    Model = Callable[[CycloneGeometry, Conditions], Numbers]


def _barth(friction: float) -> Callable[[CycloneGeometry, Conditions], BarthResult]:
    return lambda geometry, at: barth(
        geometry,
        flow=at.flow,
        particle_density=at.particle_density,
        air_density=at.air_density,
        viscosity=at.viscosity,
        friction=friction_with_dust_barth(clean_friction=friction, loading=at.loading),
        lip_loss=LIP_SHARP,
    )


def _muschelknautz(floor: float) -> Callable[[CycloneGeometry, Conditions], MuschelknautzResult]:
    return lambda geometry, at: muschelknautz(
        geometry,
        flow=at.flow,
        particle_density=at.particle_density,
        air_density=at.air_density,
        viscosity=at.viscosity,
        loading=at.loading,
        friction_floor=floor,
        dust_friction=0.0,
    )


_VORTEX: dict[str, Callable[[CycloneGeometry, Conditions], BarthResult | MuschelknautzResult]] = {
    "Barth, f 0.005": _barth(FRICTION_HOFFMANN_STEIN),
    "Barth, f 0.02": _barth(FRICTION_BARTH),
    "Muschelknautz, smooth": _muschelknautz(0.0),
    "Muschelknautz, f >= 0.005": _muschelknautz(USUAL_FRICTION_FLOOR),
}


def _cut_size(
    whole: Callable[[CycloneGeometry, Conditions], BarthResult | MuschelknautzResult],
) -> Model:
    return lambda geometry, at: whole(geometry, at).cut_size


def _heads(
    whole: Callable[[CycloneGeometry, Conditions], BarthResult | MuschelknautzResult],
) -> Model:
    def heads(geometry: CycloneGeometry, at: Conditions) -> Numbers:
        velocity = mean_inlet_velocity(geometry, flow=at.flow)
        head = velocity_head(velocity=velocity, air_density=at.air_density)
        return whole(geometry, at).pressure_drop / head

    return heads


def _by_shape(heads: Callable[[CycloneGeometry], Numbers]) -> Model:
    return lambda geometry, _at: heads(geometry)


# Diameter caught by half, for spheres in continuous air [m].
CUT_SIZE_MODELS: Mapping[str, Model] = MappingProxyType(
    {
        "Lapple": lambda geometry, at: cut_size_lapple(
            geometry,
            flow=at.flow,
            particle_density=at.particle_density,
            air_density=at.air_density,
            viscosity=at.viscosity,
        ),
        **{name: _cut_size(whole) for name, whole in _VORTEX.items()},
        "Leith and Licht": lambda geometry, at: (
            leith_licht(
                geometry,
                flow=at.flow,
                particle_density=at.particle_density,
                viscosity=at.viscosity,
                temperature=at.temperature,
            ).cut_size
        ),
        "Iozia and Leith": lambda geometry, at: (
            iozia_leith(
                geometry,
                flow=at.flow,
                particle_density=at.particle_density,
                viscosity=at.viscosity,
            ).cut_size
        ),
    }
)

# Pressure drop over the head of the inlet velocity [-].
HEADS_MODELS: Mapping[str, Model] = MappingProxyType(
    {
        "Shepherd and Lapple": _by_shape(inlet_velocity_heads_shepherd_lapple),
        "First": _by_shape(inlet_velocity_heads_first),
        "Casal and Martinez-Benet": _by_shape(inlet_velocity_heads_casal_martinez),
        "Dirgo and Ramachandran": _by_shape(inlet_velocity_heads_dirgo_ramachandran),
        "Stairmand": _by_shape(inlet_velocity_heads_stairmand),
        **{name: _heads(whole) for name, whole in _VORTEX.items()},
    }
)

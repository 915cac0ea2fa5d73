"""What the published models say together: the central cut size and pressure drop, and their bands.

Which model is trusted where follows from the measured points in the catalogue; `tests/published`
holds the bands against every point of grade A or B, and no band may be narrower than those points.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.correlations.barth import (
    FRICTION_HOFFMANN_STEIN,
    LIP_ROUNDED,
    barth,
    friction_with_dust_barth,
)
from gyrecut.correlations.casal_martinez import inlet_velocity_heads_casal_martinez
from gyrecut.correlations.dirgo_ramachandran import inlet_velocity_heads_dirgo_ramachandran
from gyrecut.correlations.geometry import mean_inlet_velocity
from gyrecut.correlations.loading import pressure_drop_factor_briggs
from gyrecut.correlations.muschelknautz import USUAL_FRICTION_FLOOR, muschelknautz
from gyrecut.correlations.slip import mean_free_path, physical_cut_size
from gyrecut.correlations.vortex import annulus_reynolds

if TYPE_CHECKING:
    from gyrecut.airflow.air import AirState
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry

TURBULENT_ANNULUS = 25_000.0  # annulus Reynolds number; measured points lie on either side
LAMINAR_ANNULUS = 20_000.0  # from here up one answer fades into the other, so that no design jumps
FACTOR_TURBULENT = 1.35  # each way on the cut size, from the measured points of grade A and B
FACTOR_LAMINAR = 2.0  # same, below
PRESSURE_BAND = 0.25  # each way, as a share, from the two measured pressure drops
SLOPE = 5.0  # of the grade curve, Muschelknautz
SLOPE_LOW, SLOPE_HIGH = 2.5, 7.0  # what the book has seen: 2 to 7; only loaded cyclones reach 2


@dataclass(frozen=True, slots=True, kw_only=True)
class Consensus:
    """Central cut size of one design or many, and how wrong it may be.

    Parameters
    ----------
    cut_size : float or ndarray
        Physical diameter caught by half, slip and shape counted [m]
    factor : float or ndarray
        The band reaches from cut_size / factor to cut_size * factor [-]
    reynolds : float or ndarray
        Annulus Reynolds number, which decides which model is trusted [-]
    """

    cut_size: Numbers
    factor: Numbers
    reynolds: Numbers


def as_physical(stokes_diameter: Numbers, *, shape_factor: Numbers, air: AirState) -> Numbers:
    """Turn a model's cut size into the physical one: irregular shape, then slip.

    Parameters
    ----------
    stokes_diameter : float or ndarray
        Cut size by a model, for spheres in continuous air [m]
    shape_factor : float or ndarray
        Dynamic shape factor of the grains, 1 for spheres [-]
    air : AirState
        The air, all of it in SI [-]

    Returns
    -------
    float or ndarray
        Diameter of the volume-equal sphere [m]

    Raises
    ------
    OutOfRangeError
        When a value lies outside its range.

    References
    ----------
    .. [1] Hinds, Aerosol Technology, 2nd ed., Wiley 1999, ch. 3: drag grows by the shape factor.
       From memory.
    """
    free_path = mean_free_path(air.temperature, pressure=air.pressure)
    return physical_cut_size(stokes_diameter * np.sqrt(shape_factor), mean_free_path=free_path)


def central_cut_size(
    geometry: CycloneGeometry,
    *,
    flow: Numbers,
    particle_density: Numbers,
    shape_factor: Numbers,
    loading: Numbers,
    air: AirState,
    friction_scale: Numbers = 1.0,
) -> Consensus:
    r"""Central cut size, and the band that measured cyclones ask for.

    Above an annulus Reynolds number of 25 000 it is the geometric mean of Muschelknautz with a
    friction of at least 0.005 and Barth with 0.005; below 20 000, Muschelknautz with its
    smooth-wall friction, the one model whose friction follows the Reynolds number; between, the
    one fades into the other.

    Parameters
    ----------
    geometry : CycloneGeometry
        Inside dimensions [m]
    flow : float or ndarray
        Volume flow through one cyclone [m^3/s]
    particle_density : float or ndarray
        Density of one grain [kg/m^3]
    shape_factor : float or ndarray
        Dynamic shape factor of the grains [-]
    loading : float or ndarray
        Mass of dust in the mass of air [-]
    air : AirState
        The air, all of it in SI [-]
    friction_scale : float or ndarray
        Wall friction over the one assumed; a rough wall has more. Of no effect below 20 000, where
        the friction is that of a smooth wall [-]

    Returns
    -------
    Consensus

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, or a value outside its range.

    References
    ----------
    .. [1] The models as cited in their modules; the choice by the measured points of the
       catalogue, of which few are read and none lies between 45 mm and 200 mm.
    """
    state = {
        "flow": flow,
        "particle_density": particle_density,
        "air_density": air.density,
        "viscosity": air.viscosity,
    }
    reynolds = annulus_reynolds(
        geometry, flow=flow, air_density=air.density, viscosity=air.viscosity
    )
    fade = np.log(np.asarray(reynolds) / LAMINAR_ANNULUS) / np.log(
        TURBULENT_ANNULUS / LAMINAR_ANNULUS
    )
    turbulence = np.clip(fade, 0.0, 1.0)

    def by_muschelknautz(floor: Numbers) -> Numbers:
        return muschelknautz(
            geometry, **state, loading=loading, friction_floor=floor, dust_friction=0.0
        ).cut_size

    by_barth = barth(
        geometry,
        **state,
        friction=friction_with_dust_barth(
            clean_friction=FRICTION_HOFFMANN_STEIN * friction_scale, loading=loading
        ),
        lip_loss=LIP_ROUNDED,
    ).cut_size
    above = np.sqrt(by_muschelknautz(USUAL_FRICTION_FLOOR * friction_scale) * by_barth)
    below = by_muschelknautz(0.0) if np.any(turbulence < 1.0) else above
    stokes = above**turbulence * below ** (1.0 - turbulence)
    return Consensus(
        cut_size=as_physical(stokes, shape_factor=shape_factor, air=air),
        factor=np.where(turbulence < 1.0, FACTOR_LAMINAR, FACTOR_TURBULENT)[()],
        reynolds=reynolds,
    )


def central_heads(geometry: CycloneGeometry) -> Numbers:
    """Central pressure drop in heads of the inlet velocity, clean air.

    Parameters
    ----------
    geometry : CycloneGeometry
        Inside dimensions [m]

    Returns
    -------
    float or ndarray
        Mean of Casal and Martinez-Benet and of Dirgo and Ramachandran [-]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible.

    References
    ----------
    .. [1] The two as cited in their modules: the nearest to the two measured pressure drops.
    """
    heads: Numbers = (
        inlet_velocity_heads_casal_martinez(geometry)
        + inlet_velocity_heads_dirgo_ramachandran(geometry)
    ) / 2.0
    return heads


def central_pressure_drop(
    geometry: CycloneGeometry, *, flow: Numbers, loading: Numbers, air: AirState
) -> Numbers:
    r"""Central pressure drop with dust in the air.

    Parameters
    ----------
    geometry : CycloneGeometry
        Inside dimensions [m]
    flow : float or ndarray
        Volume flow through one cyclone [m^3/s]
    loading : float or ndarray
        Mass of dust in the mass of air [-]
    air : AirState
        The air, all of it in SI [-]

    Returns
    -------
    float or ndarray
        Pressure drop [Pa]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, or a value outside its range.

    References
    ----------
    .. [1] :func:`central_heads`, and Briggs for the dust.
    """
    velocity = mean_inlet_velocity(geometry, flow=flow)
    relief = pressure_drop_factor_briggs(loading * air.density)
    drop: Numbers = central_heads(geometry) * relief * air.density * velocity**2 / 2.0
    return drop

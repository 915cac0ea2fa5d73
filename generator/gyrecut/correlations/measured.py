"""Every model held against the measured cyclones of the catalogue."""

from __future__ import annotations

from dataclasses import dataclass
from math import pi, sqrt
from typing import TYPE_CHECKING

from gyrecut.airflow.air import STANDARD_PRESSURE
from gyrecut.correlations.geometry import RATIOS, CycloneGeometry, check_geometry
from gyrecut.correlations.side_by_side import CUT_SIZE_MODELS, HEADS_MODELS, Conditions
from gyrecut.correlations.slip import mean_free_path, physical_cut_size
from gyrecut.correlations.vortex import annulus_reynolds

if TYPE_CHECKING:
    from collections.abc import Mapping

    from gyrecut.catalogue.rows import MeasuredPoint


@dataclass(frozen=True, slots=True, kw_only=True)
class PointComparison:
    """Every model over one measured cyclone.

    Parameters
    ----------
    annulus_reynolds : float
        Reynolds number of the ring around the finder [-]
    cut_sizes : Mapping
        Name of the model to the cut size in the kind of diameter that was measured [m]
    cut_size_ratios : Mapping
        Name of the model to forecast over measured [-]
    inlet_velocity_heads : Mapping
        Name of the model to the pressure drop over the head of the inlet velocity [-]
    """

    annulus_reynolds: float
    cut_sizes: Mapping[str, float]
    cut_size_ratios: Mapping[str, float]
    inlet_velocity_heads: Mapping[str, float]


def measured_geometry(point: MeasuredPoint) -> CycloneGeometry:
    r"""Inside dimensions of a measured cyclone, a round inlet as the square of its area.

    Parameters
    ----------
    point : MeasuredPoint
        Row of the catalogue, lengths in [m]

    Returns
    -------
    CycloneGeometry
        Inside dimensions [m]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible.

    References
    ----------
    .. [1] Common practice, no source: the models know slots only.
    """
    lengths = {name: getattr(point, name) for name in ("body_diameter", *RATIOS)}
    if point.inlet_bore is not None:
        side = point.inlet_bore * sqrt(pi) / 2.0
        lengths |= {"slot_height": side, "slot_width": side}
    geometry = CycloneGeometry(**lengths)
    check_geometry(geometry)
    return geometry


def held_against(point: MeasuredPoint) -> PointComparison:
    """Hold every model against one measured cyclone.

    Parameters
    ----------
    point : MeasuredPoint
        Row of the catalogue, lengths in [m]

    Returns
    -------
    PointComparison
        Numbers in SI.

    Raises
    ------
    OutOfRangeError
        When any of the models does not hold there.

    Notes
    -----
    An aerodynamic cut size has slip in it, so slip is put into the forecasts too, for air at
    standard pressure. What was measured as a Stokes number has none.

    References
    ----------
    .. [1] As the models called.
    """
    geometry = measured_geometry(point)
    at = Conditions(
        flow=point.flow,
        particle_density=point.particle_density,
        air_density=point.air_density,
        viscosity=point.viscosity,
        temperature=point.temperature,
        loading=0.0,
    )
    cut_sizes = {name: model(geometry, at) for name, model in CUT_SIZE_MODELS.items()}
    if point.diameter_kind == "aerodynamic":
        path = mean_free_path(point.temperature, pressure=STANDARD_PRESSURE)
        cut_sizes = {
            name: physical_cut_size(size, mean_free_path=path) for name, size in cut_sizes.items()
        }
    reynolds = annulus_reynolds(
        geometry, flow=point.flow, air_density=point.air_density, viscosity=point.viscosity
    )
    return PointComparison(
        annulus_reynolds=float(reynolds),
        cut_sizes={name: float(size) for name, size in cut_sizes.items()},
        cut_size_ratios={name: float(size) / point.cut_size for name, size in cut_sizes.items()},
        inlet_velocity_heads={
            name: float(heads(geometry, at)) for name, heads in HEADS_MODELS.items()
        },
    )

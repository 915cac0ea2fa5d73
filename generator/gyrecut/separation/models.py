"""Every model's word on one design, side by side, and which of them are believed there."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache, partial
from typing import TYPE_CHECKING

from gyrecut.catalogue import measured_points
from gyrecut.correlations.consensus import (
    LAMINAR_ANNULUS,
    PRESSURE_BAND,
    TURBULENT_ANNULUS,
    as_physical,
    central_cut_size,
    central_pressure_drop,
)
from gyrecut.correlations.heads import pressure_drop_from_heads
from gyrecut.correlations.iozia_leith import SLOT_SHARE
from gyrecut.correlations.measured import held_against
from gyrecut.correlations.shepherd_lapple import inlet_velocity_heads_shepherd_lapple
from gyrecut.correlations.side_by_side import CUT_SIZE_MODELS, HEADS_MODELS, Conditions
from gyrecut.errors import OutOfRangeError

if TYPE_CHECKING:
    from collections.abc import Callable

    from gyrecut.airflow.air import AirState
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.catalogue.rows import MeasuredPoint
    from gyrecut.correlations.geometry import CycloneGeometry
    from gyrecut.correlations.measured import PointComparison

DECISIVE = ("A", "B")  # grades of measured points that may decide anything
ABOVE, BELOW = "above", "below"

CUT_SIZE_NOTES = {
    "Muschelknautz, f >= 0.005": "carries the central value above Re 20 000",
    "Barth, f 0.005": "carries the central value above Re 20 000; far too fine below",
    "Muschelknautz, smooth": "carries the central value below Re 25 000",
    "Barth, f 0.02": "coarser than the measured high-efficiency bodies",
    "Lapple": "sees slot width and turns only",
    "Iozia and Leith": "fitted to bodies of 0.25 m with a slot of a tenth of D squared",
    "Leith and Licht": "never a promise by itself",
}
# its fit leaves the measured ones by a factor of two at wider slots, and is not asked there
FITTED_TO_NARROW_SLOTS = "Iozia and Leith"
TRUSTED_CUT_SIZE = {
    ABOVE: ("Muschelknautz, f >= 0.005", "Barth, f 0.005"),
    BELOW: ("Muschelknautz, smooth",),
}
HEADS_NOTES = {
    "Casal and Martinez-Benet": "nearest to the measured drops",
    "Dirgo and Ramachandran": "fitted to 98 measured designs",
    "Shepherd and Lapple": "high: the safe one to choose a blower by",
    "First": "high",
    "Stairmand": "right for narrow outlets, half of the measured drop for wide ones",
    "Barth, f 0.005": "all swirl counted as lost: overshoots narrow outlets",
    "Barth, f 0.02": "all swirl counted as lost",
    "Muschelknautz, f >= 0.005": "all swirl counted as lost: overshoots narrow outlets",
    "Muschelknautz, smooth": "all swirl counted as lost: overshoots narrow outlets",
}
TRUSTED_HEADS = ("Casal and Martinez-Benet", "Dirgo and Ramachandran")


@dataclass(frozen=True, slots=True, kw_only=True)
class Word:
    """What one model says of one quantity.

    Parameters
    ----------
    model : str
        The model.
    value : float or None
        In SI; None where the design lies outside the model's range.
    trusted : bool
        Whether it carries the central value.
    measured : tuple of float
        Forecast over measured, for each decisive measured cyclone of this regime [-].
    why : str
        What to know of it, or why it is silent.
    """

    model: str
    value: float | None
    trusted: bool
    measured: tuple[float, ...]
    why: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Agreement:
    """One quantity: the models side by side, the central value and its band.

    Parameters
    ----------
    words : tuple of Word
        Every model.
    central, low, high : float
        Central value and the ends of the band, SI.
    basis : str
        How the band was got.
    """

    words: tuple[Word, ...]
    central: float
    low: float
    high: float
    basis: str


def cut_sizes(
    geometry: CycloneGeometry,
    *,
    flow: float,
    particle_density: float,
    shape_factor: float,
    loading: float,
    air: AirState,
) -> Agreement:
    """Set the cut sizes of all models side by side.

    Parameters
    ----------
    geometry : CycloneGeometry
        Inside dimensions of one body [m]
    flow : float
        Volume flow through it [m^3/s]
    particle_density : float
        Density of one grain [kg/m^3]
    shape_factor : float
        Dynamic shape factor of the grains [-]
    loading : float
        Mass of dust in the mass of air [-]
    air : AirState
        The air, SI

    Returns
    -------
    Agreement
        Physical diameters [m], slip and shape counted in each.

    Raises
    ------
    OutOfRangeError
        When the models that carry the central value do not cover the design.
    """
    at = _conditions(flow, particle_density, loading, air)
    consensus = central_cut_size(
        geometry,
        flow=flow,
        particle_density=particle_density,
        shape_factor=shape_factor,
        loading=loading,
        air=air,
    )
    reynolds = float(consensus.reynolds)
    regime, trusted = _regime(reynolds), _trusted_cut_sizes(reynolds)
    central, factor = float(consensus.cut_size), float(consensus.factor)
    return Agreement(
        words=tuple(
            _word(
                name,
                partial(_physical_cut_size, name, geometry, at, shape_factor, air),
                trusted=name in trusted,
                measured=_cut_size_ratios(regime)[name],
                why=why,
            )
            for name, why in CUT_SIZE_NOTES.items()
        ),
        central=central,
        low=central / factor,
        high=central * factor,
        basis=(
            f"a factor {factor:g} each way, no narrower than the decisive measured cyclones show "
            f"{regime} an annulus Reynolds number of {TURBULENT_ANNULUS:.0f}; here it is "
            f"{reynolds:.0f}"
        ),
    )


def pressure_drops(
    geometry: CycloneGeometry, *, flow: float, loading: float, air: AirState
) -> Agreement:
    """Set the pressure drops of all models side by side, the loading's effect in the centre only.

    Parameters
    ----------
    geometry : CycloneGeometry
        Inside dimensions of one body [m]
    flow : float
        Volume flow through it [m^3/s]
    loading : float
        Mass of dust in the mass of air [-]
    air : AirState
        The air, SI

    Returns
    -------
    Agreement
        Pressure drops [Pa], clean air in each model.
    """
    any_density = 1000.0  # no pressure drop depends on it
    at = _conditions(flow, any_density, 0.0, air)
    central = float(central_pressure_drop(geometry, flow=flow, loading=loading, air=air))
    return Agreement(
        words=tuple(
            _word(
                name,
                partial(_pressure_drop, name, geometry, at),
                trusted=name in TRUSTED_HEADS,
                measured=_heads_ratios()[name],
                why=why,
            )
            for name, why in HEADS_NOTES.items()
        ),
        central=central,
        low=central * (1 - PRESSURE_BAND),
        high=central * (1 + PRESSURE_BAND),
        basis=f"{PRESSURE_BAND:.0%} each way, from the two measured pressure drops",
    )


def safe_pressure_drop(geometry: CycloneGeometry, *, flow: float, air: AirState) -> float:
    """Give the pressure drop to choose a blower by: Shepherd and Lapple, clean air [Pa]."""
    return float(
        pressure_drop_from_heads(
            geometry,
            inlet_velocity_heads=inlet_velocity_heads_shepherd_lapple(geometry),
            flow=flow,
            air_density=air.density,
        )
    )


def _physical_cut_size(
    name: str, geometry: CycloneGeometry, at: Conditions, shape_factor: float, air: AirState
) -> Numbers:
    if name == FITTED_TO_NARROW_SLOTS:
        SLOT_SHARE.check(geometry.slot_height * geometry.slot_width / geometry.body_diameter**2)
    return as_physical(CUT_SIZE_MODELS[name](geometry, at), shape_factor=shape_factor, air=air)


def _pressure_drop(name: str, geometry: CycloneGeometry, at: Conditions) -> Numbers:
    return pressure_drop_from_heads(
        geometry,
        inlet_velocity_heads=HEADS_MODELS[name](geometry, at),
        flow=at.flow,
        air_density=at.air_density,
    )


def _conditions(flow: float, particle_density: float, loading: float, air: AirState) -> Conditions:
    return Conditions(
        flow=flow,
        particle_density=particle_density,
        air_density=air.density,
        viscosity=air.viscosity,
        temperature=air.temperature,
        loading=loading,
    )


def _regime(reynolds: float) -> str:
    return ABOVE if reynolds >= TURBULENT_ANNULUS else BELOW


def _trusted_cut_sizes(reynolds: float) -> tuple[str, ...]:
    """Models that have a part in the central value: both sets where one fades into the other."""
    above = TRUSTED_CUT_SIZE[ABOVE] if reynolds > LAMINAR_ANNULUS else ()
    below = TRUSTED_CUT_SIZE[BELOW] if reynolds < TURBULENT_ANNULUS else ()
    return above + below


@cache
def _decisive() -> tuple[tuple[MeasuredPoint, PointComparison], ...]:
    """Every decisive point with every model held against it, once for all stages."""
    return tuple(
        (point, held_against(point))
        for point in measured_points().values()
        if point.grade in DECISIVE
    )


@cache
def _cut_size_ratios(regime: str) -> dict[str, tuple[float, ...]]:
    """Forecast over measured of each model, for the decisive points of one regime."""
    there = [held for _, held in _decisive() if _regime(held.annulus_reynolds) == regime]
    return {name: tuple(held.cut_size_ratios[name] for held in there) for name in CUT_SIZE_MODELS}


@cache
def _heads_ratios() -> dict[str, tuple[float, ...]]:
    """Forecast over measured of each model, for the decisive points with a pressure drop."""
    return {
        name: tuple(
            held.inlet_velocity_heads[name] / point.inlet_velocity_heads
            for point, held in _decisive()
            if point.inlet_velocity_heads is not None
        )
        for name in HEADS_MODELS
    }


def _word(
    model: str,
    say: Callable[[], Numbers],
    *,
    trusted: bool,
    measured: tuple[float, ...],
    why: str,
) -> Word:
    try:
        value = float(say())
    except OutOfRangeError as outside:
        return Word(
            model=model, value=None, trusted=False, measured=measured, why=f"silent: {outside}"
        )
    return Word(model=model, value=value, trusted=trusted, measured=measured, why=why)

"""Questions asked backwards: which body, which flow, for a wanted cut size or pressure drop."""

from __future__ import annotations

from dataclasses import dataclass
from math import sqrt
from typing import TYPE_CHECKING

from gyrecut.catalogue import families
from gyrecut.correlations.consensus import SLOPE, central_heads
from gyrecut.correlations.geometry import RATIOS, CycloneGeometry, scaled
from gyrecut.correlations.loading import pressure_drop_factor_briggs
from gyrecut.errors import OutOfRangeError
from gyrecut.separation.chain import Grains, Step, through

if TYPE_CHECKING:
    from gyrecut.airflow.air import AirState

FASTEST_INLET = 27.0  # m/s; above it caught dust is stirred up: Koch and Licht 1977, from memory


@dataclass(frozen=True, slots=True, kw_only=True)
class Candidate:
    """One body that keeps within a pressure budget.

    Parameters
    ----------
    family : str
        Proportions, by their name in the catalogue.
    body_diameter : float
        The smallest that keeps within the budget [m]
    inlet_velocity, pressure_drop, kept : float
        What it comes to [m/s], [Pa], [-]
    """

    family: str
    body_diameter: float
    inlet_velocity: float
    pressure_drop: float
    kept: float


def flow_for_pressure_drop(
    geometry: CycloneGeometry, *, pressure_drop: float, loading: float, air: AirState
) -> float:
    r"""Flow at which one body takes a wanted pressure drop.

    .. math:: Q = a b \sqrt{2 \Delta p / (\rho N_H)}

    Parameters
    ----------
    geometry : CycloneGeometry
        The body [m]
    pressure_drop : float
        Wanted [Pa]
    loading : float
        Mass of dust in the mass of air [-]
    air : AirState
        The air, SI

    Returns
    -------
    float
        Flow through it [m^3/s]

    References
    ----------
    .. [1] `correlations.consensus.central_pressure_drop` solved for the flow.
    """
    relief = float(pressure_drop_factor_briggs(loading * air.density))
    heads = float(central_heads(geometry)) * relief
    slot = float(geometry.slot_height * geometry.slot_width)
    return slot * sqrt(2.0 * pressure_drop / (air.density * heads))


def body_diameter_for_pressure_drop(
    shape: CycloneGeometry, *, pressure_drop: float, flow: float, loading: float, air: AirState
) -> float:
    r"""Body diameter at which a shape takes a wanted pressure drop at a flow.

    .. math:: D = (Q / Q_1)^{1/2} D_1

    Parameters
    ----------
    shape : CycloneGeometry
        Proportions, at any size [m]
    pressure_drop : float
        Wanted [Pa]
    flow : float
        Through one body [m^3/s]
    loading : float
        Mass of dust in the mass of air [-]
    air : AirState
        The air, SI

    Returns
    -------
    float
        Body diameter [m]

    References
    ----------
    .. [1] :func:`flow_for_pressure_drop`; at one inlet velocity the flow goes as the diameter
       squared.
    """
    there = flow_for_pressure_drop(shape, pressure_drop=pressure_drop, loading=loading, air=air)
    return float(shape.body_diameter) * sqrt(flow / there)


def best_within_budget(
    grains: Grains,
    *,
    pressure_drop: float,
    flow: float,
    loading: float,
    air: AirState,
) -> tuple[Candidate, ...]:
    """Rank the catalogue's families by catch within a pressure budget, one body each.

    At one flow a smaller body catches more and takes more pressure, so the best of a shape is the
    smallest within the budget; no body is driven faster than the usable window.

    Parameters
    ----------
    grains : Grains
        The dust.
    pressure_drop : float
        Budget [Pa]
    flow : float
        Through the one body [m^3/s]
    loading : float
        Mass of dust in the mass of air [-]
    air : AirState
        The air, SI

    Returns
    -------
    tuple of Candidate
        Best catch first; families that the models do not cover there are left out.
    """
    found = []
    for row in families().values():
        shape = CycloneGeometry(body_diameter=1.0, **{name: getattr(row, name) for name in RATIOS})
        slot = row.slot_height * row.slot_width
        diameter = max(
            body_diameter_for_pressure_drop(
                shape, pressure_drop=pressure_drop, flow=flow, loading=loading, air=air
            ),
            sqrt(flow / (FASTEST_INLET * slot)),
        )
        try:
            geometry = scaled(shape, body_diameter=diameter)
            kept = through(
                (Step(geometry=geometry, copies=1),),
                grains,
                flow=flow,
                loading=loading,
                leak=0.0,
                air=air,
                slope=SLOPE,
            ).kept_in_all
        except OutOfRangeError:
            continue
        velocity = flow / (slot * diameter**2)
        relief = float(pressure_drop_factor_briggs(loading * air.density))
        found.append(
            Candidate(
                family=row.name,
                body_diameter=diameter,
                inlet_velocity=velocity,
                pressure_drop=float(central_heads(shape)) * relief * air.density * velocity**2 / 2,
                kept=float(kept),
            )
        )
    return tuple(sorted(found, key=lambda candidate: -candidate.kept))

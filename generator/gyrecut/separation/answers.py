"""The profile's limits asked backwards: which body or flow would meet them."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from gyrecut.separation.backwards import best_within_budget, flow_for_pressure_drop
from gyrecut.separation.chain import Grains
from gyrecut.separation.forecast import CLASSES

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.airflow.air import AirState
    from gyrecut.catalogue.rows import Dust
    from gyrecut.correlations.size_distributions import SizeDistribution
    from gyrecut.profile.models import Limits
    from gyrecut.separation.chain import Step
    from gyrecut.separation.forecast import Forecast


@dataclass(frozen=True, slots=True, kw_only=True)
class Answer:
    """One question asked backwards.

    Parameters
    ----------
    question, answer : str
        In plain words, with the numbers.
    value : float
        The number asked for, SI.
    """

    question: str
    answer: str
    value: float


def answers_to(
    limits: Limits,
    expected: Forecast,
    *,
    steps: tuple[Step, ...],
    dust: Dust,
    sizes: SizeDistribution,
    air: AirState,
) -> Iterator[Answer]:
    """Answer what the profile's pressure limit asks: which flow, and which body catches most.

    Parameters
    ----------
    limits : Limits
        Of the profile.
    expected : Forecast
        Of the machine as designed.
    steps : tuple of Step
        Its stages.
    dust : Dust
        The dust.
    sizes : SizeDistribution
        Its sizes.
    air : AirState
        The air, SI

    Yields
    ------
    Answer
    """
    budget = limits.pressure_drop
    if budget is None or len(steps) != 1:
        return
    (step,) = steps
    flow = step.copies * flow_for_pressure_drop(
        step.geometry, pressure_drop=budget, loading=expected.loading, air=air
    )
    yield Answer(
        question=f"At which flow does this body take {budget:.0f} Pa?",
        answer=f"{flow * 3600:.0f} m3/h",
        value=flow,
    )
    bins = sizes.mass_bins(CLASSES)
    ranked = best_within_budget(
        Grains(
            sizes=bins.sizes,
            masses=bins.masses,
            density=dust.particle_density,
            shape_factor=dust.shape_factor,
        ),
        pressure_drop=budget,
        flow=expected.flow / step.copies,
        loading=expected.loading,
        air=air,
    )
    for place, best in enumerate(ranked[:3], start=1):
        yield Answer(
            question=f"Which body catches most within {budget:.0f} Pa? ({place})",
            answer=(
                f"{best.family}, {best.body_diameter * 1000:.0f} mm, "
                f"{best.inlet_velocity:.1f} m/s, {best.pressure_drop:.0f} Pa: "
                f"keeps {best.kept * 100:.4g} %"
            ),
            value=best.body_diameter,
        )

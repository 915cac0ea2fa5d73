"""The whole way of the air for one profile: from pick-up to suction source, stages included."""

from __future__ import annotations

from dataclasses import dataclass
from math import pi, sqrt
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.elements import (
    ENTRY_LOSSES,
    BellMouth,
    Filter,
    Hose,
    OutletDuct,
    PickUp,
    Transition,
)
from gyrecut.airflow.friction import CORRUGATED_FACTOR, SMOOTH_PLASTIC
from gyrecut.airflow.suction import (
    STANDARD_DENSITY,
    STRAIGHT,
    suction_curve_from_ends,
    suction_curve_from_points,
)
from gyrecut.airflow.system import SystemCurve
from gyrecut.catalogue import filters, hoses, sources
from gyrecut.correlations.consensus import central_heads
from gyrecut.proportions.dimensions import OutletCuff

if TYPE_CHECKING:
    from gyrecut.airflow.air import AirState
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.airflow.suction import SuctionCurve
    from gyrecut.airflow.system import Element
    from gyrecut.catalogue.rows import Dust
    from gyrecut.profile.models import Profile
    from gyrecut.proportions.dimensions import Dimensions
    from gyrecut.separation.chain import Step

MM = 1e-3


@dataclass(frozen=True, slots=True, kw_only=True)
class Cyclones:
    """Equal bodies side by side as one part of the air's way.

    Parameters
    ----------
    heads : float
        Pressure drop in heads of the inlet velocity [-]
    slot_area : float
        Of all their slots together [m^2]
    """

    heads: float
    slot_area: float

    def pressure_drop(self, flow: Numbers, *, air: AirState) -> Numbers:
        """Pressure they take at a flow [Pa]."""
        drop: Numbers = self.heads * air.density / 2.0 * np.square(flow / self.slot_area)
        return drop


@dataclass(frozen=True, slots=True, kw_only=True)
class Unsized:
    """Stages that have no size yet: what they will take is fixed by the speed they ask for.

    Parameters
    ----------
    fixed : float
        Pressure of those passed at a fixed inlet velocity, whatever the flow [Pa]
    heads_over_area_squared : float
        Heads over slot area squared of those with a fixed diameter [1/m^4]
    """

    fixed: float
    heads_over_area_squared: float

    def pressure_drop(self, flow: Numbers, *, air: AirState) -> Numbers:
        """Pressure they take at a flow [Pa]."""
        drop: Numbers = self.fixed + self.heads_over_area_squared * air.density / 2 * np.square(
            flow
        )
        return drop


@dataclass(frozen=True, slots=True, kw_only=True)
class Condition:
    """In what state the way is.

    Parameters
    ----------
    choked : float
        Share of the pick-up that is covered [-]
    filter_loss : float or None
        Pressure the loaded filter has come to, whatever the flow [Pa]; None when it is clean.
    """

    choked: float = 0.0
    filter_loss: float | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class FixedLoss:
    """A part that takes the same pressure at every flow [Pa]: a filter let come to its limit."""

    loss: float

    def pressure_drop(self, flow: Numbers, *, air: AirState) -> Numbers:  # noqa: ARG002 - an `Element`
        """Pressure it takes [Pa]."""
        return np.full(np.shape(flow), self.loss)[()]


CLEAN = Condition()


def cyclones(step: Step) -> Cyclones:
    """Give one stage as a part of the air's way."""
    geometry = step.geometry
    return Cyclones(
        heads=float(central_heads(geometry)),
        slot_area=float(step.copies * geometry.slot_height * geometry.slot_width),
    )


def suction_source(profile: Profile, air: AirState) -> SuctionCurve | None:
    """Give the profile's suction source in the profile's air, None where it names none."""
    source = profile.air.source
    if source is None:
        return None
    if isinstance(source, str):
        row = sources()[source]
        curve = suction_curve_from_ends(
            shut_off=row.shut_off,
            open_flow=row.open_flow,
            exponent=row.exponent,
            air_density=STANDARD_DENSITY,
        )
    elif source.points is not None:
        curve = suction_curve_from_points(
            flows=[point.flow for point in source.points],
            suctions=[point.suction for point in source.points],
            air_density=STANDARD_DENSITY,
        )
    else:
        curve = suction_curve_from_ends(
            shut_off=source.shut_off or 0.0,
            open_flow=source.open_flow or 0.0,
            exponent=source.exponent or STRAIGHT,
            air_density=STANDARD_DENSITY,
        )
    return curve.at_density(air.density)


def hose_bore(profile: Profile) -> float:
    """Inside diameter of the hose [m]."""
    hose = profile.air.hose
    if hose.fit == "over" and hose.measured is not None:
        return hose.measured
    return hoses()[hose.nominal].nominal


def pick_up_of(profile: Profile, choked: float) -> PickUp:
    """Give the pick-up; the bare hose end where the profile names none."""
    named = profile.air.pick_up
    kind = "open-hose" if named is None else named.kind
    diameter = named.diameter if named is not None and named.diameter else hose_bore(profile)
    return PickUp(
        entry_loss=ENTRY_LOSSES[kind],
        area=pi / 4 * diameter**2,
        relief_area=0.0 if named is None else named.relief_area,
        choked=choked,
    )


def clean_filter(profile: Profile, dust: Dust) -> Filter | None:
    """Give the clean filter, None where the profile names none."""
    cloth = profile.air.filter
    if cloth is None:
        return None
    resistance = filters()[cloth.filter_class].clean_resistance
    if cloth.clean_loss is not None and profile.air.flow is not None:
        resistance = cloth.clean_loss * cloth.area / profile.air.flow
    return Filter(
        area=cloth.area,
        clean_resistance=resistance,
        cake_resistance=dust.cake_resistance,
        cake_load=0.0,
    )


def system_before_design(profile: Profile, dust: Dust, separators: Unsized) -> SystemCurve:
    """Give the way as far as it is known before the body has a size: no transition, no outlet."""
    return SystemCurve(
        elements=(
            *_way_in(profile, CLEAN),
            ("separators", separators),
            *_filter_part(profile, dust, CLEAN),
        )
    )


def system_of(
    profile: Profile,
    dust: Dust,
    stages: tuple[tuple[Step, Dimensions], ...],
    condition: Condition = CLEAN,
) -> SystemCurve:
    """Give the whole way in the order the air passes it.

    Parameters
    ----------
    profile : Profile
        Hose, pick-up, filter, outlet.
    dust : Dust
        What lies on the filter.
    stages : tuple of (Step, Dimensions)
        The stages with the lengths of one of their bodies.
    condition : Condition
        How choked and how loaded it is.

    Returns
    -------
    SystemCurve
    """
    elements: list[tuple[str, Element]] = [*_way_in(profile, condition)]
    several = len(stages) > 1
    for number, (step, d) in enumerate(stages, start=1):
        of = f" {number}" if several else ""
        slot = sqrt(4 / pi * d.slot.height_mm * d.slot.width_mm) * MM
        elements.append(
            (
                f"transition{of}",
                _Shared(
                    part=Transition(
                        from_bore=d.transition.cuff.bore_mm * MM,
                        to_bore=slot,
                        included_angle=d.transition.included_angle or pi,
                    ),
                    share=1 / step.copies,
                ),
            )
        )
        elements.append((f"separator{of}", cyclones(step)))
    last = stages[-1]
    elements += _outlet(last[1], share=1 / last[0].copies)
    return SystemCurve(elements=(*elements, *_filter_part(profile, dust, condition)))


@dataclass(frozen=True, slots=True, kw_only=True)
class _Shared:
    """A part that each body of a bank has, for the flow through all of them."""

    part: Element
    share: float

    def pressure_drop(self, flow: Numbers, *, air: AirState) -> Numbers:
        return self.part.pressure_drop(flow * self.share, air=air)


def _way_in(profile: Profile, condition: Condition) -> tuple[tuple[str, Element], ...]:
    """Pick-up, the step from it to the hose where there is one, and the hose."""
    pick_up, bore = pick_up_of(profile, condition.choked), hose_bore(profile)
    opening = sqrt(4 / pi * pick_up.area)
    step: tuple[tuple[str, Element], ...] = ()
    named = profile.air.pick_up
    if named is not None and named.kind == "nozzle" and opening != bore:
        step = (
            ("step to the hose", Transition(from_bore=opening, to_bore=bore, included_angle=pi)),
        )
    return (("pick-up", pick_up), *step, ("hose", hose_of(profile)))


def hose_of(profile: Profile) -> Hose:
    """Give the hose as a part of the air's way."""
    hose = profile.air.hose
    return Hose(
        bore=hose_bore(profile),
        length=hose.length,
        roughness=SMOOTH_PLASTIC,
        wall_factor=CORRUGATED_FACTOR if hose.wall == "corrugated" else 1.0,
        bends=hose.bends,
    )


def _filter_part(
    profile: Profile, dust: Dust, condition: Condition
) -> tuple[tuple[str, Element], ...]:
    cloth = clean_filter(profile, dust)
    if cloth is None:
        return ()
    if condition.filter_loss is not None:
        return (("filter", FixedLoss(loss=condition.filter_loss)),)
    return (("filter", cloth),)


def _outlet(d: Dimensions, *, share: float) -> list[tuple[str, Element]]:
    finder = d.finder.bore_mm * MM
    if isinstance(d.outlet, OutletCuff):
        cuff = d.outlet.cuff.bore_mm * MM
        reducer = Transition(
            from_bore=finder,
            to_bore=cuff,
            included_angle=2
            * float(np.arctan2(abs(finder - cuff) / 2, d.outlet.reducer_length_mm * MM)),
        )
        duct = OutletDuct(
            bore=cuff,
            length=d.outlet.cuff.height_mm * MM,
            roughness=SMOOTH_PLASTIC,
            heads_lost=0.0,
        )
        return [
            ("outlet", _Shared(part=reducer, share=share)),
            ("outlet cuff", _Shared(part=duct, share=share)),
        ]
    bell = BellMouth(
        bore=d.outlet.throat_mm * MM,
        radius_ratio=d.outlet.rounding_mm / d.outlet.throat_mm,
        end_wall=True,
    )
    return [("bell-mouth", _Shared(part=bell, share=share))]

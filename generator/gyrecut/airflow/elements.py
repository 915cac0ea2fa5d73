"""The parts of a duct, each with the pressure it takes at a flow.

Every loss is one of total pressure: what is left is the velocity head the air carries on with,
which the last part loses. The air counts as incompressible. Flows that no source could drive are
not refused, because the search for an operating point passes through them.
"""

from __future__ import annotations

from dataclasses import dataclass
from math import pi
from types import MappingProxyType
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.conveying import BORE, FLOW
from gyrecut.airflow.entries import entry_loss_bell_mouth
from gyrecut.airflow.filters import AREA, filter_loss
from gyrecut.airflow.friction import CORRUGATED_FACTORS, bend_loss_hose, friction_loss
from gyrecut.airflow.ranges import Range
from gyrecut.airflow.transitions import contraction_loss_crane, expansion_loss_crane

if TYPE_CHECKING:
    from collections.abc import Mapping

    from gyrecut.airflow.air import AirState
    from gyrecut.airflow.ranges import Numbers

_SOURCE = "far beyond any workshop duct; common practice, no source"

# Entry loss on the velocity head in the opening: ACGIH, Industrial Ventilation, 24th ed. 2001,
# fig. 3-16: plain opening, grinding hood with a straight take-off (0.40 with a tapered one).
ENTRY_LOSSES: Mapping[str, float] = MappingProxyType(
    {"nozzle": 0.93, "hood": 0.65, "open-hose": 0.93}
)
# Coefficient of discharge of a sharp-edged hole: 0.60 to 0.62, from memory. All of its jet is lost.
SHARP_DISCHARGE = 0.61
SHARP_LOSS = 1.0 / SHARP_DISCHARGE**2

OPENING = Range(quantity="opening of the pick-up", low=1e-6, high=10.0, unit="m^2", source=_SOURCE)
RELIEF = Range(
    quantity="relief opening of the pick-up", low=0.0, high=10.0, unit="m^2", source=_SOURCE
)
CHOKED = Range(
    quantity="choked share of the pick-up", low=0.0, high=1.0, unit="-", source="by definition"
)
LOSS = Range(quantity="loss coefficient", low=0.0, high=100.0, unit="-", source=_SOURCE)
BENDS = Range(quantity="number of bends", low=0.0, high=100.0, unit="-", source=_SOURCE)


@dataclass(frozen=True, slots=True, kw_only=True)
class PickUp:
    """Nozzle or hood, with a relief notch beside it that is never blocked.

    Parameters
    ----------
    entry_loss : float
        Loss coefficient, on the velocity head in the opening [-]
    area : float
        Of the opening, with nothing in front of it [m^2]
    relief_area : float
        Of the relief notch, 0 for none [m^2]
    choked : float
        Share of the opening that lies on the work or is blocked, 0 to 1 [-]
    """

    entry_loss: float
    area: float
    relief_area: float
    choked: float

    def pressure_drop(self, flow: Numbers, *, air: AirState) -> Numbers:
        """Pressure lost on the way in, infinite where everything is blocked [Pa].

        The two openings are in parallel. What is left of a choked one is a throat, behind which
        the air spreads out again with the loss of a sudden expansion (Borda and Carnot).
        """
        FLOW.check(flow)
        LOSS.check(self.entry_loss)
        OPENING.check(self.area)
        RELIEF.check(self.relief_area)
        CHOKED.check(self.choked)
        throat_loss = self.entry_loss + self.choked**2
        # an opening that loses nothing at all would take every flow for free
        main = self.area * (1.0 - self.choked) / max(throat_loss, 1e-9) ** 0.5
        conductance = main + self.relief_area / SHARP_LOSS**0.5
        if conductance == 0.0:
            blocked: Numbers = np.where(np.asarray(flow) > 0.0, np.inf, 0.0)[()]
            return blocked
        drop: Numbers = air.density / 2.0 * np.square(flow / conductance)
        return drop


@dataclass(frozen=True, slots=True, kw_only=True)
class Hose:
    """A hose with its bends.

    Parameters
    ----------
    bore : float
        Inside diameter [m]
    length : float
        Of the whole hose, bends counted [m]
    roughness : float
        Of a smooth wall [m]
    wall_factor : float
        Friction over that of a smooth wall: 1 smooth, 3 corrugated [-]
    bends : float
        Right-angle bends it lies in [-]
    """

    bore: float
    length: float
    roughness: float
    wall_factor: float
    bends: float

    def pressure_drop(self, flow: Numbers, *, air: AirState) -> Numbers:
        """Pressure lost to friction and bends [Pa]."""
        CORRUGATED_FACTORS.check(self.wall_factor)
        BENDS.check(self.bends)
        velocity = _velocity(flow, self.bore)
        friction = friction_loss(
            velocity, bore=self.bore, length=self.length, roughness=self.roughness, air=air
        )
        turning = self.bends * bend_loss_hose(self.bore) if self.bends else 0.0
        return self.wall_factor * friction + turning * _head(velocity, air)


@dataclass(frozen=True, slots=True, kw_only=True)
class Transition:
    """A cone from one bore to another, wider or narrower.

    Parameters
    ----------
    from_bore, to_bore : float
        Inside diameters, in the direction of the flow [m]
    included_angle : float
        Whole angle of the cone, pi for a step [rad]
    """

    from_bore: float
    to_bore: float
    included_angle: float

    def pressure_drop(self, flow: Numbers, *, air: AirState) -> Numbers:
        """Pressure lost, none where the bore stays the same [Pa]."""
        BORE.check(self.from_bore)
        BORE.check(self.to_bore)
        narrow, wide = sorted((self.from_bore, self.to_bore))
        loss = expansion_loss_crane if self.to_bore > self.from_bore else contraction_loss_crane
        coefficient = loss(area_ratio=(narrow / wide) ** 2, included_angle=self.included_angle)
        return coefficient * _head(_velocity(flow, narrow), air)


@dataclass(frozen=True, slots=True, kw_only=True)
class Filter:
    """A filter, clean or with dust on it.

    Parameters
    ----------
    area : float
        Of the cloth that the air passes, pleats unfolded [m^2]
    clean_resistance : float
        Pressure over face velocity when clean [Pa*s/m]
    cake_resistance : float
        Of a dust cake of 1 kg/m2 [1/s]
    cake_load : float
        Dust on the filter, 0 when clean [kg/m^2]
    """

    area: float
    clean_resistance: float
    cake_resistance: float
    cake_load: float

    def pressure_drop(self, flow: Numbers, *, air: AirState) -> Numbers:
        """Pressure lost in cloth and cake, in proportion to the flow [Pa]."""
        FLOW.check(flow)
        AREA.check(self.area)
        return filter_loss(
            flow / self.area,
            clean_resistance=self.clean_resistance,
            cake_resistance=self.cake_resistance,
            cake_load=self.cake_load,
            viscosity=air.viscosity,
        )


@dataclass(frozen=True, slots=True, kw_only=True)
class BellMouth:
    """A bell-mouth that air enters a duct or a blower's intake through.

    Parameters
    ----------
    bore : float
        Of the duct behind it [m]
    radius_ratio : float
        Radius of the bell over that bore, 0 for a sharp edge [-]
    end_wall : bool
        Whether the bell ends flush in a wall [-]
    """

    bore: float
    radius_ratio: float
    end_wall: bool

    def pressure_drop(self, flow: Numbers, *, air: AirState) -> Numbers:
        """Pressure lost on the way in [Pa]."""
        loss = entry_loss_bell_mouth(self.radius_ratio, end_wall=self.end_wall)
        return loss * _head(_velocity(flow, self.bore), air)


@dataclass(frozen=True, slots=True, kw_only=True)
class OutletDuct:
    """The straight smooth duct to the suction source, and what is lost where it ends.

    Parameters
    ----------
    bore : float
        Inside diameter [m]
    length : float
        Length, 0 for the end alone [m]
    roughness : float
        Of its wall [m]
    heads_lost : float
        Velocity heads lost at its end: 1 where it opens into a box, 0 where it runs on [-]
    """

    bore: float
    length: float
    roughness: float
    heads_lost: float

    def pressure_drop(self, flow: Numbers, *, air: AirState) -> Numbers:
        """Pressure lost to friction and at the end [Pa]."""
        LOSS.check(self.heads_lost)
        velocity = _velocity(flow, self.bore)
        friction = friction_loss(
            velocity, bore=self.bore, length=self.length, roughness=self.roughness, air=air
        )
        return friction + self.heads_lost * _head(velocity, air)


def _velocity(flow: Numbers, bore: float) -> Numbers:
    FLOW.check(flow)
    BORE.check(bore)
    return flow / (pi / 4.0 * bore**2)


def _head(velocity: Numbers, air: AirState) -> Numbers:
    head: Numbers = air.density / 2.0 * np.square(velocity)
    return head

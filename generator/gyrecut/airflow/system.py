"""The whole way of the air, part by part: what it costs, and where the pressure goes."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, Protocol

if TYPE_CHECKING:
    from gyrecut.airflow.air import AirState
    from gyrecut.airflow.ranges import Numbers


class Element(Protocol):
    """Anything the air passes, with the pressure it takes."""

    def pressure_drop(self, flow: Numbers, *, air: AirState) -> Numbers:
        """Pressure lost at a flow [m^3/s], never less at a larger one [Pa]."""


@dataclass(frozen=True, slots=True, kw_only=True)
class PressureShare:
    """What one part of the way takes.

    Parameters
    ----------
    name : str
        The part, in the words of its maker [-]
    pressure_drop : float or ndarray
        What it takes at the flow asked for [Pa]
    """

    name: str
    pressure_drop: Numbers


@dataclass(frozen=True, slots=True, kw_only=True)
class SystemCurve:
    """Everything between the room and the suction source, in the order the air passes it.

    Parameters
    ----------
    elements : tuple of (str, Element)
        Name of each part, and the part, which gives its loss [Pa]
    """

    elements: tuple[tuple[str, Element], ...]

    def pressure_drop(self, flow: Numbers, *, air: AirState) -> Numbers:
        """Pressure the whole way takes at a flow [m^3/s], the sum of its parts [Pa]."""
        return sum((share.pressure_drop for share in self.shares(flow, air=air)), start=0.0)

    def shares(self, flow: Numbers, *, air: AirState) -> tuple[PressureShare, ...]:
        """Where the pressure goes: each part by its name, at one flow or several."""
        return tuple(
            PressureShare(name=name, pressure_drop=element.pressure_drop(flow, air=air))
            for name, element in self.elements
        )

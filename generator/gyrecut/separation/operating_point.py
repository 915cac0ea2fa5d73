"""Where suction source and air path agree: the one loop of the problem, closed here."""

from __future__ import annotations

from dataclasses import dataclass
from itertools import takewhile
from math import pi
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Callable

    from gyrecut.airflow.air import AirState
    from gyrecut.airflow.suction import SuctionCurve
    from gyrecut.airflow.system import PressureShare, SystemCurve

HALVINGS = 80  # 2^-80 of the open flow: beyond the last digit, where it ends sooner


@dataclass(frozen=True, slots=True, kw_only=True)
class OperatingPoint:
    """The flow that settles, and what it comes to.

    Parameters
    ----------
    flow : float
        Through the machine [m^3/s]
    suction : float
        That the source gives, or has to give [Pa]
    hose_velocity : float
        Mean velocity in the hose [m/s]
    tool_suction : float
        Static suction at the beginning of the hose, just behind the pick-up [Pa]
    air_power : float
        Flow times the suction at the tool [W]
    shares : tuple of PressureShare
        Where the pressure goes, part by part.
    """

    flow: float
    suction: float
    hose_velocity: float
    tool_suction: float
    air_power: float
    shares: tuple[PressureShare, ...]


def settle(source: SuctionCurve, system: SystemCurve, *, air: AirState) -> float:
    """Find the flow at which the source's suction equals the system's pressure drop [m^3/s].

    Bisection: the source falls and the system rises with the flow, so there is exactly one.
    """

    def spare(flow: float) -> float:
        return float(source.suction(flow)) - float(system.pressure_drop(flow, air=air))

    return bisected(spare, low=0.0, high=source.open_flow)


def bisected(falling: Callable[[float], float], *, low: float, high: float) -> float:
    """Find the root of a function that falls from above zero at `low` to below it at `high`."""
    for _ in range(HALVINGS):
        middle = (low + high) / 2
        if middle in (low, high):  # no number lies between
            break
        if falling(middle) > 0:
            low = middle
        else:
            high = middle
    return (low + high) / 2


def point_at(
    flow: float, system: SystemCurve, *, suction: float, bore: float, air: AirState
) -> OperatingPoint:
    """Describe the operation at a flow.

    Parameters
    ----------
    flow : float
        Through the machine [m^3/s]
    system : SystemCurve
        The way of the air, with a part called "hose"; what comes before it is the pick-up.
    suction : float
        That the source gives there [Pa]
    bore : float
        Of the hose [m]
    air : AirState
        The air, SI

    Returns
    -------
    OperatingPoint
    """
    shares = tuple(
        type(share)(name=share.name, pressure_drop=float(share.pressure_drop))
        for share in system.shares(flow, air=air)
    )
    velocity = 4 * flow / (pi * bore**2)
    ahead = takewhile(lambda share: share.name != "hose", shares)
    tool = sum(float(share.pressure_drop) for share in ahead) + air.density * velocity**2 / 2
    return OperatingPoint(
        flow=flow,
        suction=suction,
        hose_velocity=velocity,
        tool_suction=tool,
        air_power=flow * tool,
        shares=shares,
    )

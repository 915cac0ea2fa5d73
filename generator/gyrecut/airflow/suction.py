"""The suction a source can keep up at each flow: a curve that falls from shut-off to open flow."""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.ranges import Range

if TYPE_CHECKING:
    from collections.abc import Sequence

    from numpy.typing import NDArray

    from gyrecut.airflow.ranges import Numbers

_SOURCE = "far beyond any workshop source; common practice, no source"

FLOW = Range(
    quantity="flow of the suction curve", low=0.0, high=100.0, unit="m^3/s", source=_SOURCE
)
SUCTION = Range(quantity="suction", low=0.0, high=90e3, unit="Pa", source=_SOURCE)
SHUT_OFF = Range(quantity="shut-off suction", low=1.0, high=90e3, unit="Pa", source=_SOURCE)
OPEN_FLOW = Range(quantity="open flow", low=1e-5, high=100.0, unit="m^3/s", source=_SOURCE)
FLOW_STEP = Range(
    quantity="step to the next flow of the suction curve",
    low=1e-6,
    high=100.0,
    unit="m^3/s",
    source="flows have to rise from point to point",
)
SUCTION_STEP = Range(
    quantity="fall to the next suction of the suction curve",
    low=1e-3,
    high=90e3,
    unit="Pa",
    source="suction has to fall from point to point",
)
EXPONENT = Range(
    quantity="exponent of the suction curve",
    low=1.0,
    high=3.0,
    unit="-",
    source="below 1 the curve would be hollow; above 3 no fan is; common practice, no source",
)
AIR_DENSITY = Range(
    quantity="air density", low=0.2, high=2.0, unit="kg/m^3", source="air a person can work in"
)

STANDARD_DENSITY = 1.2  # kg/m3, at which fan curves are drawn; common practice, no source
# A chord lies below every curve that is bent outwards, as those of fans and vacuum motors are:
# two numbers on a rating plate, joined by it, never promise suction that is not there.
STRAIGHT = 1.0
PARABOLA = 2.0  # radial fan at constant speed, near enough; common practice, no source

_NODES = 33


@dataclass(frozen=True, slots=True, kw_only=True)
class SuctionCurve:
    """Suction of one source against the flow it moves, a smooth curve through points.

    Parameters
    ----------
    flows : tuple of float
        Rising, the first 0 and the last the open flow [m^3/s]
    suctions : tuple of float
        Falling, the first the shut-off suction and the last 0 [Pa]
    slopes : tuple of float
        Slope of the curve at each point [Pa*s/m^3]
    air_density : float
        Of the air that the curve holds for [kg/m^3]
    known_from, known_to : float
        Flows between which the curve was given; beyond, it goes straight on [m^3/s]
    """

    flows: tuple[float, ...]
    suctions: tuple[float, ...]
    slopes: tuple[float, ...]
    air_density: float
    known_from: float
    known_to: float

    @property
    def shut_off(self) -> float:
        """Suction behind a blocked hose [Pa]."""
        return self.suctions[0]

    @property
    def open_flow(self) -> float:
        """Flow with nothing in its way [m^3/s]."""
        return self.flows[-1]

    def suction(self, flow: Numbers) -> Numbers:
        """Suction the source keeps up at a flow, by cubic pieces that keep the curve falling.

        Parameters
        ----------
        flow : float or ndarray
            Volume flow at the source [m^3/s]

        Returns
        -------
        float or ndarray
            Suction, 0 at the open flow [Pa]

        Raises
        ------
        OutOfRangeError
            Below 0, or above the open flow, where no source draws.
        """
        Range(
            quantity="flow through the suction source",
            low=0.0,
            high=self.open_flow,
            unit="m^3/s",
            source="0 to the open flow of its curve",
        ).check(flow)
        flows, suctions, slopes = map(np.asarray, (self.flows, self.suctions, self.slopes))
        piece = np.clip(np.searchsorted(flows, flow, side="right") - 1, 0, len(flows) - 2)
        width = flows[piece + 1] - flows[piece]
        t = (np.asarray(flow) - flows[piece]) / width
        # cubic Hermite pieces, as in any textbook on numerical analysis
        before = (1 + 2 * t) * suctions[piece] + t * width * slopes[piece]
        behind = (3 - 2 * t) * suctions[piece + 1] + (t - 1) * width * slopes[piece + 1]
        suction: Numbers = ((1 - t) ** 2 * before + t**2 * behind)[()]
        return suction

    def at_density(self, air_density: float) -> SuctionCurve:
        """Give the curve in other air: a fan that keeps its speed throws as much, but lighter.

        Parameters
        ----------
        air_density : float
            Of the air drawn in [kg/m^3]

        Returns
        -------
        SuctionCurve
            The same flows, every suction in proportion to the density.

        Raises
        ------
        OutOfRangeError
            Outside 0.2 to 2 kg/m3.

        Notes
        -----
        The fan laws, exact for incompressible flow. A vacuum's motor speeds up in thin air, so
        that it loses less than this says.
        """
        AIR_DENSITY.check(air_density)
        factor = air_density / self.air_density
        return replace(
            self,
            suctions=tuple(suction * factor for suction in self.suctions),
            slopes=tuple(slope * factor for slope in self.slopes),
            air_density=air_density,
        )


def suction_curve_from_points(
    *, flows: Sequence[float], suctions: Sequence[float], air_density: float
) -> SuctionCurve:
    """Suction curve through measured points.

    Parameters
    ----------
    flows : sequence of float
        Two or more, rising [m^3/s]
    suctions : sequence of float
        One for each flow, falling [Pa]
    air_density : float
        Of the air it was measured in [kg/m^3]

    Returns
    -------
    SuctionCurve
        Through every point, falling everywhere.

    Raises
    ------
    OutOfRangeError
        When flows do not rise, or suctions do not fall, or a value is outside its range.

    Notes
    -----
    Where the points stop short of no flow or of no suction, the line through the last two goes
    on. A curve that is bent outwards lies below both of these lines: shut-off suction and open
    flow found so are upper ends, and `known_from` and `known_to` say where that begins.

    References
    ----------
    .. [1] Fritsch and Butland, A method for constructing local monotone piecewise cubic
       interpolants. SIAM J. Sci. Stat. Comput. 5 (1984) 300, from memory.
    """
    x, y = np.asarray(flows, dtype=np.float64), np.asarray(suctions, dtype=np.float64)
    FLOW.check(x)
    SUCTION.check(y)
    FLOW_STEP.check(np.diff(x))
    SUCTION_STEP.check(y[:-1] - y[1:])
    AIR_DENSITY.check(air_density)
    known_from, known_to = float(x[0]), float(x[-1])
    steepness = np.diff(y) / np.diff(x)
    if x[0] > 0:
        x, y = np.insert(x, 0, 0.0), np.insert(y, 0, y[0] - steepness[0] * x[0])
        SHUT_OFF.check(float(y[0]))
    if y[-1] > 0:
        x, y = np.append(x, x[-1] - y[-1] / steepness[-1]), np.append(y, 0.0)
    return SuctionCurve(
        flows=tuple(x.tolist()),
        suctions=tuple(y.tolist()),
        slopes=tuple(_monotone_slopes(x, y).tolist()),
        air_density=air_density,
        known_from=known_from,
        known_to=known_to,
    )


def suction_curve_from_ends(
    *, shut_off: float, open_flow: float, exponent: float, air_density: float
) -> SuctionCurve:
    r"""Suction curve from its two ends.

    .. math:: p = p_0 (1 - (Q/Q_0)^n)

    Parameters
    ----------
    shut_off : float
        Suction behind a blocked hose, :math:`p_0` [Pa]
    open_flow : float
        Flow with nothing in its way, :math:`Q_0` [m^3/s]
    exponent : float
        How far the curve is bent outwards, :math:`n`: 1 is straight, 2 a parabola [-]
    air_density : float
        Of the air that the two were measured in [kg/m^3]

    Returns
    -------
    SuctionCurve
        Exact for 1 and 2; within 1e-4 of the shut-off suction between.

    Raises
    ------
    OutOfRangeError
        Outside 1 Pa to 90 kPa, 10 mL/s to 100 m3/s, 1 to 3, or 0.2 to 2 kg/m3.

    Notes
    -----
    Take 1 where only the two ends are known: it errs on the side of too little suction. Motors
    of vacuums come out near 1.3, radial fans near 2; both common practice, no source.

    References
    ----------
    .. [1] Common practice, no source, for the form; the ends hold by definition.
    """
    SHUT_OFF.check(shut_off)
    OPEN_FLOW.check(open_flow)
    EXPONENT.check(exponent)
    AIR_DENSITY.check(air_density)
    # closer together near no flow, where the curvature of exponents between 1 and 2 is
    share = np.linspace(0.0, 1.0, _NODES) ** 2
    return SuctionCurve(
        flows=tuple((open_flow * share).tolist()),
        suctions=tuple((shut_off * (1.0 - share**exponent)).tolist()),
        slopes=tuple((-shut_off / open_flow * exponent * share ** (exponent - 1.0)).tolist()),
        air_density=air_density,
        known_from=0.0,
        known_to=open_flow,
    )


def _monotone_slopes(x: NDArray[np.float64], y: NDArray[np.float64]) -> NDArray[np.float64]:
    """Slopes for a falling y: a weighted harmonic mean inside, a parabola's at the ends."""
    width = np.diff(x)
    steepness = np.diff(y) / width
    if len(steepness) == 1:
        return np.repeat(steepness, 2)
    left, right = 2 * width[1:] + width[:-1], width[1:] + 2 * width[:-1]
    inside = (left + right) / (left / steepness[:-1] + right / steepness[1:])
    first = _end_slope(width[0], width[1], steepness[0], steepness[1])
    last = _end_slope(width[-1], width[-2], steepness[-1], steepness[-2])
    return np.concatenate(([first], inside, [last]))


def _end_slope(width: float, next_width: float, steepness: float, next_steepness: float) -> float:
    slope = ((2 * width + next_width) * steepness - width * next_steepness) / (width + next_width)
    return min(slope, 0.0)

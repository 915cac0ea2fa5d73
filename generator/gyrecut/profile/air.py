"""The air of a profile: how much of it, what moves it, and what it passes beside the separator."""

from __future__ import annotations

from collections.abc import Mapping
from functools import partial
from typing import Annotated, Any, ClassVar, Literal

from pydantic import Field
from pydantic_core import PydanticCustomError

from gyrecut.catalogue import filters, hoses, sources
from gyrecut.profile.bounds import (
    AIR_PRESSURE,
    ALTITUDE,
    BIN_LEAK,
    CURVE_EXPONENT,
    CURVE_FLOW,
    CURVE_SUCTION,
    FILTER_AREA,
    FILTER_LOSS,
    FLOW,
    HOSE_BORE,
    HOSE_LENGTH,
    HUMIDITY,
    MOUTHPIECE,
    OPEN_FLOW,
    RELIEF_AREA,
    SHUT_OFF,
    TEMPERATURE,
)
from gyrecut.profile.group import Group, Mistakes, missing_value
from gyrecut.profile.order import out_of_order
from gyrecut.profile.problems import Code
from gyrecut.profile.scalars import OneOf, WholeNumber, closest, mistake
from gyrecut.profile.shapes import ListOf, NameOr


def _nearest_hose(given: object) -> str | None:
    """Give the size next to the one asked for: "39 mm" is not "93 mm" with a slip."""
    bare = isinstance(given, int | float)
    try:
        size = HOSE_BORE.read(f"{given} mm" if bare else given)
    except PydanticCustomError:
        return closest(given, hoses())
    return min(hoses().values(), key=lambda row: abs(row.nominal - size)).name


HOSE = OneOf(
    noun="hose",
    names=hoses,
    example="38 mm",
    nearest=_nearest_hose,
    otherwise="choose the nearest size, and give the hose's own as measured",
)
FIT = OneOf(noun="fit", names=lambda: ("over", "inside"), example="over")

Fit = Literal["over", "inside"]
HoseName = Annotated[str, HOSE]


class HoseRun(Group):
    """The hose from the tool to the separator."""

    line: ClassVar[str] = "hose: {nominal: 38 mm, fit: over, length: 3 m, wall: corrugated}"

    nominal: HoseName = Field(description="Nominal hose size, from the catalogue")
    fit: Annotated[Fit, FIT] = Field(
        description="over: the hose goes over the printed cuff; inside: the hose goes into it"
    )
    measured: Annotated[float, HOSE_BORE] | None = Field(
        default=None,
        description="Hose as measured: its bore for fit over, its outside for fit inside",
    )
    length: Annotated[float, HOSE_LENGTH] = Field(description="Length of the hose")
    wall: Annotated[
        Literal["smooth", "corrugated"],
        OneOf(noun="hose wall", names=lambda: ("smooth", "corrugated"), example="corrugated"),
    ] = Field(description="Inside of the hose wall")
    bends: Annotated[int, WholeNumber(low=0, high=50, example="2")] = Field(
        default=0, description="Right-angle bends the hose lies in; none where left out"
    )


class CurvePoint(Group):
    """One measured point of a suction source."""

    line: ClassVar[str] = "- {flow: 90 m3/h, suction: 9 kPa}"

    flow: Annotated[float, CURVE_FLOW] = Field(description="Air flow at this point")
    suction: Annotated[float, CURVE_SUCTION] = Field(description="Suction at this point")


class OwnSource(Group):
    """An own suction source: measured points of it, or the two ends of its curve."""

    line: ClassVar[str] = "source: {shut_off: 18 kPa, open_flow: 150 m3/h}"
    ENDS: ClassVar[Mapping[str, Any]] = {"shut_off": SHUT_OFF, "open_flow": OPEN_FLOW}

    points: (
        Annotated[
            tuple[CurvePoint, ...],
            ListOf(
                noun="points",
                low=2,
                high=40,
                example="[{flow: 0 m3/h, suction: 18 kPa}, {flow: 90 m3/h, suction: 9 kPa}]",
            ),
        ]
        | None
    ) = Field(default=None, description="Measured points, the one with the least flow first")
    shut_off: Annotated[float, SHUT_OFF] | None = Field(
        default=None, description="Suction behind a blocked hose"
    )
    open_flow: Annotated[float, OPEN_FLOW] | None = Field(
        default=None, description="Air flow with nothing in its way"
    )
    exponent: Annotated[float, CURVE_EXPONENT] | None = Field(
        default=None,
        description=(
            "How far the curve between the two ends is bent outwards; 1, a straight line that "
            "promises nothing, where left out"
        ),
    )

    @classmethod
    def rules(cls, given: Mapping[str, Any]) -> Mistakes:
        """Ask for points that make a curve, or for both ends, and not for both of these."""
        allowed = "points, or shut_off and open_flow"
        ends = [key for key in (*cls.ENDS, "exponent") if given.get(key) is not None]
        points = given.get("points")
        if points is None:
            lacking = [key for key in cls.ENDS if given.get(key) is None]
            if len(lacking) == len(cls.ENDS):
                what = "has neither points nor the two ends of its curve"
                fix = f'write it as in "{cls.line}"'
                yield (), mistake(Code.MISSING, what, allowed=allowed, fix=fix)
            else:
                for key in lacking:
                    yield (key,), missing_value(cls.ENDS[key], key)
            return
        for key in ends:
            fix = f"keep {key} or the points, and take the other out"
            what = "draws the curve a second time, beside the points"
            yield (
                (key,),
                mistake(Code.NOT_TOGETHER, what, allowed=allowed, fix=fix, about_key=True),
            )
        if not isinstance(points, list) or not all(isinstance(at, Mapping) for at in points):
            return
        for key, rule in (("flow", CURVE_FLOW), ("suction", CURVE_SUCTION)):
            values = [at.get(key) for at in points]
            for index, wrong in out_of_order(values, rule, falling=key == "suction"):
                yield ("points", index, key), wrong


class PickUp(Group):
    """Where the air and the dust go in."""

    line: ClassVar[str] = "pick_up: {kind: nozzle, diameter: 32 mm}"

    kind: Annotated[
        Literal["nozzle", "hood", "open-hose"],
        OneOf(noun="pick-up", names=lambda: ("nozzle", "hood", "open-hose"), example="nozzle"),
    ] = Field(description="nozzle: on the tool; hood: around the work; open-hose: the bare end")
    diameter: Annotated[float, MOUTHPIECE] | None = Field(
        default=None,
        description="Diameter of a round opening of its area; the hose's bore where left out",
    )
    relief_area: Annotated[float, RELIEF_AREA] = Field(
        default=0.0,
        description="Opening that stays free when the pick-up is choked; none where left out",
    )


class AirFilter(Group):
    """The filter behind the separator."""

    line: ClassVar[str] = "filter: {area: 0.5 m2, class: M}"

    area: Annotated[float, FILTER_AREA] = Field(description="Area of its cloth, pleats unfolded")
    filter_class: Annotated[str, OneOf(noun="filter class", names=filters, example="M")] = Field(
        alias="class", description="Filter class, from the catalogue"
    )
    position: Annotated[
        Literal["suction", "exhaust"],
        OneOf(noun="position", names=lambda: ("suction", "exhaust"), example="suction"),
    ] = Field(
        default="suction",
        description="suction: ahead of the suction source; exhaust: behind it",
    )
    clean_loss: Annotated[float, FILTER_LOSS] | None = Field(
        default=None,
        description="Pressure it takes at the air flow when clean; that of its class if left out",
    )
    limit: Annotated[float, FILTER_LOSS] | None = Field(
        default=None, description="Pressure at which it is cleaned or changed"
    )


class Air(Group):
    """The air that is moved, what moves it, and the hose it comes through."""

    line: ClassVar[str] = "air: {flow: 140 m3/h, hose: ...}"

    flow: Annotated[float, FLOW] | None = Field(
        default=None,
        description=(
            "Air flow the separator is sized for; may be left out where there is a source"
        ),
    )
    source: (
        Annotated[
            str | OwnSource,
            NameOr(
                name=OneOf(
                    noun="suction source",
                    names=sources,
                    example="shop-vacuum",
                    otherwise="choose one of the allowed names, or write its own curve below it",
                ),
                group=lambda: OwnSource,
            ),
        ]
        | None
    ) = Field(
        default=None,
        description="What moves the air: a suction source of the catalogue, or an own curve",
    )
    temperature: Annotated[float, TEMPERATURE] = Field(
        default_factory=partial(TEMPERATURE.si, "20 degC"),
        description="Air temperature; 20 degC where left out",
    )
    altitude: Annotated[float, ALTITUDE] = Field(
        default_factory=partial(ALTITUDE.si, "0 m"),
        description="Height of the workshop above the sea; 0 m where left out",
    )
    pressure: Annotated[float, AIR_PRESSURE] | None = Field(
        default=None, description="Air pressure as measured, in place of the altitude"
    )
    relative_humidity: Annotated[float, HUMIDITY] = Field(
        default_factory=partial(HUMIDITY.si, "50 %"),
        description="Relative humidity of the air; 50 % where left out",
    )
    hose: HoseRun = Field(description="The hose from the tool to the separator")
    pick_up: PickUp | None = Field(default=None, description="Where the air and the dust go in")
    filter: AirFilter | None = Field(default=None, description="The filter behind the separator")
    bin_leak: Annotated[float, BIN_LEAK] = Field(
        default=0.0,
        description="Air that leaks into the bin, as a share of the flow; none where left out",
    )

    @classmethod
    def rules(cls, given: Mapping[str, Any]) -> Mistakes:
        """Ask for a flow or a source, and for one way to the air pressure."""
        flow = given.get("flow")
        if flow is None and given.get("source") is None:
            what = "has neither a flow nor a source"
            fix = 'add a line such as "flow: 140 m3/h" or "source: shop-vacuum"'
            yield (), mistake(Code.MISSING, what, allowed="flow, source, or both", fix=fix)
        if given.get("altitude") is not None and given.get("pressure") is not None:
            what = "says the air pressure a second time, beside altitude"
            fix = "keep altitude or pressure, and take the other line out"
            wrong = mistake(
                Code.NOT_TOGETHER, what, allowed="altitude or pressure", fix=fix, about_key=True
            )
            yield ("pressure",), wrong
        cloth = given.get("filter")
        if flow is None and isinstance(cloth, Mapping) and cloth.get("clean_loss") is not None:
            what = "is counted at air.flow, and there is none"
            fix = "add air.flow, or take the line out"
            wrong = mistake(
                Code.NEEDS_FLOW, what, allowed="with air.flow only", fix=fix, about_key=True
            )
            yield ("filter", "clean_loss"), wrong

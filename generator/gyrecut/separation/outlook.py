"""The flow a body is sized for, and what the forecast has to warn of."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.correlations.consensus import central_heads
from gyrecut.errors import UnbuildableError
from gyrecut.findings import Finding, Severity
from gyrecut.proportions.proportioning import shape_of
from gyrecut.separation.air_path import (
    Unsized,
    suction_source,
    system_before_design,
)
from gyrecut.separation.operating_point import settle

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.airflow.air import AirState
    from gyrecut.catalogue.rows import Dust
    from gyrecut.profile.models import Profile, Stage
    from gyrecut.separation.forecast import Forecast

AFTER_SEPARATOR = ("outlet", "bell-mouth")  # parts of the air path, see `air_path.system_of`
MUCH_LEAK = 0.01  # 1 to 3 % visibly hurts: Perry's handbook and Strauss, from memory, weak
SMALL_GAIN = 0.01  # of the whole mass: a stage that keeps less than this hardly pays
# From here on the speed in body and hose is another one than what they were chosen for; within, no
# source curve is known any better. Common practice, no source.
FAR_FROM_TARGET = 0.15


def sizing_flow(profile: Profile, *, dust: Dust, air: AirState) -> float:
    """Give the flow the bodies are sized for [m3/s].

    Parameters
    ----------
    profile : Profile
        Its `air.flow`, or its source.
    dust : Dust
        What lies on the filter.
    air : AirState
        The air, SI

    Returns
    -------
    float
        `air.flow` where it is given. Otherwise the flow at which the source meets hose, pick-up,
        filter, and stages that are passed at the inlet velocity, or have the diameter, they ask
        for.

    Raises
    ------
    UnbuildableError
        Where there is no flow and a stage gives neither.
    """
    if profile.air.flow is not None:
        return profile.air.flow
    source = suction_source(profile, air)
    if source is None:
        raise ValueError("a profile without flow and source; profiles are checked for it")
    fixed, area_terms = 0.0, 0.0
    for index, stage in enumerate(profile.stages):
        heads, slot = float(central_heads(shape_of(stage))), _slot_area(stage)
        if stage.inlet_velocity is not None:
            fixed += heads * stage.inlet_velocity**2
        elif slot is not None:
            area_terms += heads / slot**2
        else:
            raise UnbuildableError(
                key=("stages", index),
                what="is sized in a way that needs air.flow",
                given="a suction source only",
                allowed="with a source alone: inlet_velocity or body_diameter",
                fix="add air.flow, the flow to size for",
            )
    unsized = Unsized(fixed=fixed * air.density / 2, heads_over_area_squared=area_terms)
    return settle(source, system_before_design(profile, dust, unsized), air=air)


def _slot_area(stage: Stage) -> float | None:
    """Slots of a stage whose bodies have a diameter already [m2]."""
    if stage.body_diameter is None:
        return None
    shape = shape_of(stage)
    return float(shape.slot_height * shape.slot_width) * stage.body_diameter**2 * stage.count


def suction_in_bin(expected: Forecast) -> float:
    """Give the suction in the bin in normal work [Pa]: all that is lost before the outlet.

    The core of the vortex lies below the pressure of the room by as much; the bin, at its foot,
    by no more.
    """
    lost = 0.0
    for share in expected.clean.shares:
        if share.name in AFTER_SEPARATOR:
            break
        lost += float(share.pressure_drop)
    return lost


def outlook_findings(
    expected: Forecast, *, dust: Dust, leak: float, target: float | None
) -> Iterator[Finding]:
    """Give what the forecast has to warn of.

    Parameters
    ----------
    expected : Forecast
        Of the whole machine.
    dust : Dust
        The dust.
    leak : float
        Air drawn in through the dust outlet, as a share of the flow [-].
    target : float or None
        Flow that the profile sizes for [m3/s], None where its source alone decides.

    Yields
    ------
    Finding
    """
    if target is not None:
        yield from _target(expected.flow, target)
    yield from _flow(expected, dust)
    yield from _stages(expected)
    if leak > MUCH_LEAK:
        yield Finding(
            code="bin-leaks",
            severity=Severity.WARN,
            part="bin",
            what="Air leaking into the bin lifts caught dust into the core and spoils the catch.",
            measured=100 * leak,
            limit=100 * MUCH_LEAK,
            unit="%",
            where="air.bin_leak; Perry's handbook and Strauss, from memory, weak",
            fix="Seal the joint at the dust outlet and test it at full suction.",
        )
    yield from _filter(expected)


def _target(settled: float, target: float) -> Iterator[Finding]:
    if abs(settled - target) <= FAR_FROM_TARGET * target:
        return
    falls_short = settled < target
    yield Finding(
        code="flow-far-from-target",
        severity=Severity.WARN,
        part="source",
        what=(
            "The source moves far less air than the separator is sized for."
            if falls_short
            else "The source moves far more air than the separator is sized for."
        ),
        measured=settled * 3600,
        limit=target * 3600,
        unit="m3/h",
        where="air.flow against the flow at which source and system meet",
        fix=(
            "Take a stronger source, a wider, shorter or smoother hose or more filter area, or "
            "size for the flow that settles."
            if falls_short
            else "Size for the flow that settles, or take a weaker source."
        ),
    )


def _flow(expected: Forecast, dust: Dust) -> Iterator[Finding]:
    choked = expected.choked
    if choked.hose_velocity < dust.conveying_velocity <= expected.clean.hose_velocity:
        yield Finding(
            code="hose-settles-when-choked",
            severity=Severity.NOTE,
            part="hose",
            what="With most of the pick-up covered the hose gets too slow for this dust.",
            measured=choked.hose_velocity,
            limit=dust.conveying_velocity,
            unit="m/s",
            where="hose, four fifths of the pick-up covered",
            fix="Give the pick-up a relief_area, so that air keeps moving.",
        )
    if expected.catch.kept_when_choked is None:
        yield Finding(
            code="choked-out-of-range",
            severity=Severity.NOTE,
            part="hose",
            what=(
                "With most of the pick-up covered the air gets slower than any model covers; what "
                "is then kept is not known."
            ),
            where="stages, four fifths of the pick-up covered",
            fix="Give the pick-up a relief_area, so that air keeps moving.",
        )
    loaded = expected.loaded
    if loaded is not None and loaded.hose_velocity < dust.conveying_velocity:
        yield Finding(
            code="hose-settles-when-loaded",
            severity=Severity.WARN,
            part="hose",
            what="With the filter at its limit the hose gets too slow for this dust.",
            measured=loaded.hose_velocity,
            limit=dust.conveying_velocity,
            unit="m/s",
            where="hose, filter at its limit",
            fix="Give the filter a lower limit or more area, or take a narrower hose.",
        )


def _stages(expected: Forecast) -> Iterator[Finding]:
    for number, stage in enumerate(expected.stages, start=1):
        if number > 1 and stage.kept < SMALL_GAIN:
            yield Finding(
                code="stage-adds-little",
                severity=Severity.NOTE,
                part=f"stage {number}",
                what=(
                    "This stage keeps little that the one before it does not: an equal second "
                    "stage sees only the fines it cannot catch either. A bank of smaller bodies "
                    "adds more."
                ),
                measured=100 * stage.kept,
                limit=100 * SMALL_GAIN,
                unit="%",
                where="share of the whole feed's mass",
            )
        silent = [word.model for word in stage.cut_size.words if word.value is None]
        if silent:
            yield Finding(
                code="model-out-of-range",
                severity=Severity.NOTE,
                part=f"stage {number}",
                what=f"Not every model covers this body; silent: {', '.join(silent)}.",
                where="cut size",
            )


def _filter(expected: Forecast) -> Iterator[Finding]:
    outlook = expected.filter
    if outlook is None or outlook.after_filter is None or outlook.exposure_limit is None:
        return
    over = outlook.after_filter > outlook.exposure_limit
    yield Finding(
        code="exhaust-above-exposure-limit" if over else "exhaust-below-exposure-limit",
        severity=Severity.WARN if over else Severity.NOTE,
        part="filter",
        what=(
            "The air behind the filter carries more dust than the limit for the breathing zone."
            if over
            else "The air behind the filter carries less dust than the limit for the breathing "
            "zone. That is no approval: what escapes at the tool and when emptying counts too."
        ),
        measured=outlook.after_filter,
        limit=outlook.exposure_limit,
        unit="mg/m3",
        where=f"filter class {outlook.filter_class}",
        fix="Take a better filter class, or exhaust outdoors." if over else "",
    )

"""The bin under suction: whether it collapses, and the relief opening that keeps it from it."""

from __future__ import annotations

from math import pi
from typing import TYPE_CHECKING

from gyrecut.findings import Finding, Severity
from gyrecut.strength.buckling import SLENDERNESS, collapse_pressure_von_mises
from gyrecut.strength.inputs import SAFETY_WITH_RELIEF, SAFETY_WITHOUT_RELIEF
from gyrecut.strength.joints import end_load
from gyrecut.strength.ranges import THIN_PLATE, THIN_SHELL
from gyrecut.strength.relief import (
    SHARP_EDGED,
    SUCTION,
    flow_at_limit,
    opening_diameter,
    opening_force,
)
from gyrecut.strength.verdicts import (
    HELD_SHARE,
    IMPERFECT_SHELL,
    KPA,
    as_thin,
    least_mm,
    verdict,
)
from gyrecut.strength.walls import ASPECT, stress_rectangle_supported

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.strength.inputs import StrengthInputs

MM = 1000.0
THICKEST_MM = 60.0
BEGINS_TO_OPEN = 0.75  # of the suction to hold, so that it is wide open there: common practice
MOST_KEPT = 0.9  # of the shut-off suction: an opening that keeps more of it is none


def bin_holds_to(inputs: StrengthInputs) -> float:
    """Suction at which the bin's wall gives way, held for hours [Pa]."""
    return _holds_to(inputs, inputs.bin_wall)


def bin_findings(inputs: StrengthInputs) -> Iterator[Finding]:
    """Hold the bin against the design suction.

    Parameters
    ----------
    inputs : StrengthInputs

    Yields
    ------
    Finding
        As a plain tube, or as a box with a square floor, whose size follows from volume and mouth.
    """
    suction, factor = inputs.design_suction, inputs.safety_factor
    holds_to = bin_holds_to(inputs)
    on_lid = float(end_load(pressure=suction, diameter=inputs.bin_mouth))
    yield verdict(
        ("bin-holds", "bin-collapses"),
        holds_to / suction,
        factor,
        part="bin",
        what=(
            f"The bin's wall holds {holds_to / KPA:.1f} kPa of suction; {suction / KPA:.1f} kPa "
            f"can come. Its lid is pressed on with {on_lid:.0f} N and is not checked."
        ),
        where=f"{inputs.bin_material.title.lower()}, {_height(inputs) * MM:.0f} mm tall, its rim "
        "held round by lid and floor",
        fix=lambda: _stronger(inputs),
    )


def relief_findings(inputs: StrengthInputs, *, holds_to: float) -> Iterator[Finding]:
    """Say whether a relief opening is needed, and how wide it has to be.

    Parameters
    ----------
    inputs : StrengthInputs
    holds_to : float
        Suction at which the weakest of body, lid and bin gives way [Pa]

    Yields
    ------
    Finding
    """
    setting = inputs.relief_setting
    if setting is not None and not inputs.has_relief:
        yield Finding(
            code="relief-never-opens",
            severity=Severity.WARN,
            part="bin",
            what="The source cannot draw as strongly as the relief is set, so it is none.",
            measured=setting / KPA,
            limit=inputs.shut_off / KPA,
            unit="kPa",
            where="relief setting against the source's shut-off suction",
            fix="Set it lower, or leave it out.",
        )
        return
    if setting is None and holds_to >= SAFETY_WITHOUT_RELIEF * inputs.shut_off:
        yield Finding(
            code="relief-not-needed",
            severity=Severity.NOTE,
            part="bin",
            what="Body, lid and bin hold what the source can draw, even behind a blocked hose.",
            measured=holds_to / inputs.shut_off,
            limit=SAFETY_WITHOUT_RELIEF,
            where="weakest of the three",
        )
        return
    kept = holds_to / SAFETY_WITH_RELIEF if setting is None else setting
    keep = min(kept, MOST_KEPT * inputs.shut_off, SUCTION.high)
    opens = BEGINS_TO_OPEN * keep
    if opens < SUCTION.low:
        return  # nothing to keep: the findings on the part itself have said stop
    flow = float(flow_at_limit(shut_off=inputs.shut_off, open_flow=inputs.open_flow, limit=keep))
    diameter = float(
        opening_diameter(
            flow=flow, suction=keep, air_density=inputs.air_density, discharge=SHARP_EDGED
        )
    )
    push = float(opening_force(diameter=diameter, suction=opens))
    fitted = setting is not None
    yield Finding(
        code="relief-opening" if fitted else "relief-needed",
        severity=Severity.NOTE if fitted else Severity.WARN,
        part="bin",
        what=(
            f"A relief opening that keeps {keep / KPA:.2f} kPa has to be "
            f"{diameter * MM:.0f} mm wide and kept shut with {push:.1f} N."
        ),
        measured=inputs.shut_off / KPA,
        limit=keep / KPA,
        unit="kPa",
        where="bin, or outlet of the separator; never its dusty inlet",
        fix="Fit it, screen it against shavings, and try it each time the bin is emptied.",
    )
    if inputs.working_suction is not None and inputs.working_suction > opens:
        yield Finding(
            code="relief-opens-at-work",
            severity=Severity.WARN,
            part="bin",
            what="A relief set so low stands open in normal work and takes the suction away.",
            measured=inputs.working_suction / KPA,
            limit=opens / KPA,
            unit="kPa",
            where="suction in the bin in normal work",
            fix="Take a stronger bin, or stiffen the part that gives way first.",
        )


def least_bin_wall_mm(inputs: StrengthInputs) -> float | None:
    """Least wall of such a bin that keeps the safety factor [mm], None where 60 mm do not."""
    wanted = inputs.design_suction * inputs.safety_factor
    return least_mm(
        lambda wall: _holds_to(inputs, wall / MM) >= wanted, low_mm=0.1, high_mm=THICKEST_MM
    )


def _stronger(inputs: StrengthInputs) -> str:
    wall = least_bin_wall_mm(inputs)
    thicker = f"Take a bin with a wall of {wall:.1f} mm, " if wall is not None else "Take "
    hoop = "or one with hoops" if inputs.bin_material.form == "round" else "or one with ribs"
    relief = "" if inputs.has_relief else ", or fit a relief opening"
    return f"{thicker}{hoop if wall is not None else 'a stronger bin'}{relief}."


def _height(inputs: StrengthInputs) -> float:
    across = inputs.bin_mouth
    floor = across**2 if inputs.bin_material.form == "box" else pi / 4 * across**2
    return inputs.bin_volume / floor


def _holds_to(inputs: StrengthInputs, wall: float) -> float:
    if inputs.bin_material.form == "box":
        return _box_holds_to(inputs, wall)
    material = inputs.bin_material
    diameter = inputs.bin_mouth + wall
    perfect = collapse_pressure_von_mises(
        modulus=material.modulus * material.creep_ratio,
        poisson=material.poisson_ratio,
        wall=as_thin(wall, diameter, THIN_SHELL),
        diameter=diameter,
        # a shorter one only holds more
        length=max(_height(inputs), SLENDERNESS.low * diameter * 1.001),
    )
    return IMPERFECT_SHELL * float(perfect)


def _box_holds_to(inputs: StrengthInputs, wall: float) -> float:
    short, long = sorted((inputs.bin_mouth, _height(inputs)))
    per_pascal = stress_rectangle_supported(
        pressure=1.0,
        poisson=inputs.bin_material.poisson_ratio,
        thickness=as_thin(wall, short, THIN_PLATE),
        # beyond ten times as long as wide a wall bends as if it had no ends
        long_side=min(long, ASPECT.high * short * (1 - 1e-9)),
        short_side=short,
    )
    return HELD_SHARE * inputs.bin_material.strength / float(per_pascal)

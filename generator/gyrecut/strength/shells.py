"""Barrel and cone against collapse: margin, least wall, rings that would do."""

from __future__ import annotations

from dataclasses import dataclass
from math import ceil
from typing import TYPE_CHECKING

from gyrecut.findings import Finding, Severity
from gyrecut.strength.buckling import (
    CONE_SLOPE,
    SLENDERNESS,
    collapse_pressure_cone,
    collapse_pressure_von_mises,
    equivalent_length,
    ring_inertia_levy,
)
from gyrecut.strength.ranges import THIN_SHELL
from gyrecut.strength.verdicts import (
    IMPERFECT_SHELL,
    KPA,
    SEAMS,
    as_thin,
    least_mm,
    verdict,
)

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.proportions.dimensions import Body, Dimensions
    from gyrecut.strength.inputs import StrengthInputs

MM = 1000.0
THICKEST_MM = 20.0
MOST_RINGS = 12
MM4 = MM**4
_FINEST = 1e-4  # of the diameter, to which a spacing is found


@dataclass(frozen=True, slots=True, kw_only=True)
class Rings:
    """Stiffening rings that would do: how many, how far apart, and the section of each [mm]."""

    count: int
    spacing_mm: float
    breadth_mm: float
    height_mm: float


def body_holds_to(d: Dimensions, inputs: StrengthInputs) -> float:
    """Suction at which barrel and cone collapse as one, knock-downs counted [Pa]."""
    return _holds_to(d.body, inputs, d.body.wall_mm, seams=_seams(d, inputs))


def body_findings(d: Dimensions, inputs: StrengthInputs) -> Iterator[Finding]:
    """Hold barrel and cone against the design suction.

    Parameters
    ----------
    d : Dimensions
    inputs : StrengthInputs

    Yields
    ------
    Finding
        On barrel and cone together, and on the cone as if a ring held its top.
    """
    suction, factor = inputs.design_suction, inputs.safety_factor
    holds_to = body_holds_to(d, inputs)
    yield verdict(
        ("body-holds", "body-collapses"),
        holds_to / suction,
        factor,
        part="barrel and cone",
        what=(
            f"Barrel and cone hold {holds_to / KPA:.1f} kPa of suction before they fold; "
            f"{suction / KPA:.1f} kPa can come."
        ),
        where=f"from lid to bin ring{_slight_ends(d, inputs)}",
        fix=lambda: _stiffer(d, inputs),
    )
    yield from _cone(d, inputs)


def least_wall_mm(d: Dimensions, inputs: StrengthInputs) -> float | None:
    """Least body wall that keeps the safety factor [mm], None where none up to 20 mm does."""
    wanted, seams = inputs.design_suction * inputs.safety_factor, _seams(d, inputs)
    return least_mm(
        lambda wall: _holds_to(d.body, inputs, wall, seams=seams) >= wanted,
        low_mm=0.4,
        high_mm=THICKEST_MM,
    )


def stiffening_rings(d: Dimensions, inputs: StrengthInputs) -> Rings | None:
    """Rings round the body that keep the safety factor with the wall as it is.

    Parameters
    ----------
    d : Dimensions
    inputs : StrengthInputs

    Returns
    -------
    Rings or None
        Evenly spaced, each twice as broad as the wall is thick; None where more than 12, or no
        number of them, would be needed.
    """
    wanted, seams = inputs.design_suction * inputs.safety_factor, _seams(d, inputs)
    wall = d.body.wall_mm
    diameter = (d.body.diameter_mm + wall) / MM

    def holds(length: float) -> bool:
        return _tube_holds_to(inputs, wall, diameter, length, seams=seams) >= wanted

    whole = _free_length(d.body, wall)
    low, high = SLENDERNESS.low * diameter * (1 + _FINEST), whole
    if not holds(low):
        return None
    if holds(high):
        return Rings(count=0, spacing_mm=whole * MM, breadth_mm=2 * wall, height_mm=0.0)
    while high - low > _FINEST * diameter:
        middle = (low + high) / 2
        low, high = (middle, high) if holds(middle) else (low, middle)
    count = ceil(whole / low) - 1
    if count > MOST_RINGS:
        return None
    spacing = whole / (count + 1)
    needed = _ring_needed(d, inputs, spacing)
    return Rings(
        count=count,
        spacing_mm=spacing * MM,
        breadth_mm=2 * wall,
        height_mm=(12 * needed * MM4 / (2 * wall)) ** (1 / 3),
    )


def _cone(d: Dimensions, inputs: StrengthInputs) -> Iterator[Finding]:
    body, suction, factor = d.body, inputs.design_suction, inputs.safety_factor
    if body.half_angle > CONE_SLOPE.high:
        yield Finding(
            code="cone-not-checked",
            severity=Severity.WARN,
            part="cone",
            what="The cone is flatter than the formulas for cones go; its strength is not checked.",
            measured=body.half_angle,
            limit=CONE_SLOPE.high,
            unit="rad",
            where="half apex angle",
            fix="Give a larger total_height.",
        )
        return
    wide, narrow = _middle_diameters(body, body.wall_mm)
    # the cylinder that stands for it is wider than its mean
    counted = as_thin(body.wall_mm / MM, (wide + narrow) / 2, THIN_SHELL)
    holds_to = (
        IMPERFECT_SHELL
        * _seams(d, inputs)
        * float(
            collapse_pressure_cone(
                modulus=_held_modulus(inputs),
                wall=counted,
                wide_diameter=wide,
                narrow_diameter=narrow,
                height=body.cone_height_mm / MM,
            )
        )
    )
    yield verdict(
        ("cone-holds", "cone-collapses"),
        holds_to / suction,
        factor,
        part="cone",
        what=(
            f"The cone alone, its top held round, holds {holds_to / KPA:.1f} kPa of suction; "
            f"{suction / KPA:.1f} kPa can come."
        ),
        where="from barrel to bin ring",
        fix=lambda: "Give a thicker walls.body, or put rings round the cone as well.",
    )


def _stiffer(d: Dimensions, inputs: StrengthInputs) -> str:
    ways: list[str] = []
    wall = least_wall_mm(d, inputs)
    if wall is not None:
        ways.append(f"give a walls.body of at least {wall:.1f} mm")
    rings = stiffening_rings(d, inputs)
    if rings is not None:
        ways.append(
            f"glue {rings.count} stiff ring{'s' if rings.count > 1 else ''} round the body, no "
            f"more than {rings.spacing_mm:.0f} mm apart, each {rings.breadth_mm:.1f} mm broad and "
            f"{rings.height_mm:.0f} mm high"
        )
    if not inputs.has_relief:
        ways.append("fit a relief opening")
    text = ", or ".join(ways) or "choose a smaller body or a weaker source"
    return f"{text[0].upper()}{text[1:]}."


def _slight_ends(d: Dimensions, inputs: StrengthInputs) -> str:
    """Say why neither corner nor sockets are counted as ends that stay round."""
    if len(d.division.rings) == 1:
        return "; the corner between them is too slight to count as a stiff end"
    has = d.joint.lap_mm * d.joint.collar_mm**3 / 12
    tallest = max(ring.height_mm for ring in d.division.rings)
    needed = _ring_needed(d, inputs, tallest / MM) * MM4
    if has >= needed:
        return "; corner and sockets are not counted as stiff ends, to be safe"
    return (
        "; corner and sockets are too slight to count as stiff ends "
        f"(a socket has {has:.0f} mm4, {needed:.0f} mm4 are needed)"
    )


def _ring_needed(d: Dimensions, inputs: StrengthInputs, spacing: float) -> float:
    wanted = inputs.design_suction * inputs.safety_factor / _seams(d, inputs)
    return float(
        ring_inertia_levy(
            pressure=wanted,
            modulus=_held_modulus(inputs),
            diameter=(d.body.diameter_mm + d.body.wall_mm) / MM,
            spacing=spacing,
        )
    )


def _holds_to(body: Body, inputs: StrengthInputs, wall_mm: float, *, seams: float) -> float:
    diameter, _ = _middle_diameters(body, wall_mm)
    return _tube_holds_to(inputs, wall_mm, diameter, _free_length(body, wall_mm), seams=seams)


def _tube_holds_to(
    inputs: StrengthInputs, wall_mm: float, diameter: float, length: float, *, seams: float
) -> float:
    perfect = collapse_pressure_von_mises(
        modulus=_held_modulus(inputs),
        poisson=inputs.polymer.poisson_ratio,
        wall=as_thin(wall_mm / MM, diameter, THIN_SHELL),
        diameter=diameter,
        length=length,
    )
    return IMPERFECT_SHELL * seams * float(perfect)


def _free_length(body: Body, wall_mm: float) -> float:
    """Length of the tube that stands for barrel and cone [m]."""
    if body.half_angle > CONE_SLOPE.high:
        return body.total_height_mm / MM
    wide, narrow = _middle_diameters(body, wall_mm)
    return float(
        equivalent_length(
            barrel_length=body.barrel_height_mm / MM,
            wide_diameter=wide,
            narrow_diameter=narrow,
            height=body.cone_height_mm / MM,
        )
    )


def _middle_diameters(body: Body, wall_mm: float) -> tuple[float, float]:
    """Diameters of the middle of the wall, barrel and cone's foot [m]."""
    return (body.diameter_mm + wall_mm) / MM, (body.dust_outlet_diameter_mm + wall_mm) / MM


def _held_modulus(inputs: StrengthInputs) -> float:
    polymer = inputs.polymer
    return polymer.modulus * polymer.creep_ratio * polymer.direction_ratio


def _seams(d: Dimensions, inputs: StrengthInputs) -> float:
    """Knock-down of a body with seams: every molten line begins with one."""
    whole = len(d.division.rings) == 1 and d.division.rings[0].sectors == 1
    return 1.0 if whole and inputs.polymer.process == "resin" else SEAMS

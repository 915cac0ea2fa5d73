"""Glued joints, screws and the warmth of the air: what they bear."""

from __future__ import annotations

from math import atan2, ceil, hypot, pi
from typing import TYPE_CHECKING

from gyrecut.findings import Finding, Severity
from gyrecut.strength.joints import (
    GRAVITY,
    flange_bow,
    frustum_weight,
    lap_shear,
    peak_shear_factor_volkersen,
    pull_out_force,
    screw_pitch_tema,
)
from gyrecut.strength.verdicts import HELD_SHARE, KPA, verdict

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.proportions.dimensions import Dimensions, Point
    from gyrecut.strength.inputs import StrengthInputs

MM = 1000.0
MPA = 1e6
GLUE_SHEAR_MODULUS = 0.9e9  # Pa, stiff epoxy, from memory
GLUE_STRENGTH = 5e6  # Pa in shear on a sanded print: common practice, no source
THINNEST_GLUE = 0.05e-3  # m, where the gap is less
GASKET_PRESSURE = 50e3  # Pa, closed-cell sponge drawn up: ASTM D1056 2A2 has 35-63, from memory
GASKET_SQUEEZE_MM = 1.0  # of a sponge of 3 mm: common practice, no source
GASKET_FACTOR = 0.5  # soft rubber, from memory
BOW_SHARE = 0.1  # of the squeeze that may be lost between screws: common practice, no source
PLASTIC_SHARE = 0.5  # of the pitch in steel flanges: common practice, no source


def joint_findings(d: Dimensions, inputs: StrengthInputs) -> Iterator[Finding]:
    """Hold the glue of ring joints and sector laps against weight and suction.

    Parameters
    ----------
    d : Dimensions
    inputs : StrengthInputs

    Yields
    ------
    Finding
        The rings as if the full bin hung from the lid, the laps as if glue alone bore the suction.
    """
    glue = max(d.joint.clearance_mm / MM, THINNEST_GLUE)
    modulus = inputs.polymer.modulus  # as the load comes on; the glue creeps as the walls do
    lap, wall = d.joint.lap_mm / MM, d.body.wall_mm / MM

    def peak(thickness: float) -> float:
        return float(
            peak_shear_factor_volkersen(
                modulus=modulus,
                wall=thickness,
                lap=lap,
                glue_shear_modulus=GLUE_SHEAR_MODULUS,
                glue_thickness=glue,
            )
        )

    if len(d.division.rings) > 1:
        narrowest = min(d.body.outside_radius_at(z) for z in d.division.cut_heights_mm)
        mean = lap_shear(force=hanging_weight(d, inputs), diameter=2 * narrowest / MM, lap=lap)
        yield _glued(
            "ring joints",
            float(mean) * peak(wall),
            inputs,
            load="the full bin hanging from the lid",
            gravest=Severity.STOP,
        )
    if any(ring.sectors > 1 for ring in d.division.rings):
        hoop = inputs.design_suction * d.body.outer_radius_mm / MM / lap
        yield _glued(
            "sector laps",
            hoop * peak(wall / 2),
            inputs,
            load=f"{inputs.design_suction / KPA:.1f} kPa of suction",
            # the steps of the laps bear on each other as well
            gravest=Severity.WARN,
        )


def screw_findings(d: Dimensions, inputs: StrengthInputs) -> Iterator[Finding]:
    """Hold the screws of the lid against the weight below, and their pitch against the gasket.

    Parameters
    ----------
    d : Dimensions
    inputs : StrengthInputs

    Yields
    ------
    Finding
    """
    places, fastener, factor = d.rim.screws.places_mm, inputs.fastener, inputs.safety_factor
    each = HELD_SHARE * float(
        pull_out_force(
            diameter=fastener.insert_hole,
            engagement=fastener.insert_length,
            strength=inputs.polymer.strength_across,
        )
    )
    load = hanging_weight(d, inputs) / len(places)
    yield verdict(
        ("screws-hold", "screws-pull-out"),
        each / load,
        factor,
        part="lid",
        what=(
            f"Were the separator lifted by its lid with the bin full, each of its {len(places)} "
            f"screws would carry {load:.0f} N; an insert holds {each:.0f} N."
        ),
        where="heat-set inserts of the rim; suction presses the lid on",
        fix=lambda: "Let the bin stand on the floor, or choose a larger joints.fastener.",
    )
    yield from _pitch(d, inputs)


def warmth_findings(inputs: StrengthInputs) -> Iterator[Finding]:
    """Hold the air's temperature against what the material bears under load.

    Parameters
    ----------
    inputs : StrengthInputs

    Yields
    ------
    Finding
    """
    limit = inputs.polymer.service_temperature
    too_warm = inputs.air_temperature > limit
    yield Finding(
        code="air-too-warm" if too_warm else "keep-cool",
        severity=Severity.WARN if too_warm else Severity.NOTE,
        part="body",
        what=(
            f"{inputs.polymer.name} under load softens in air this warm."
            if too_warm
            else f"{inputs.polymer.name} keeps its strength up to here: mind the exhaust of "
            "motors, the sun, and a closed car."
        ),
        measured=inputs.air_temperature - 273.15,
        limit=limit - 273.15,
        unit="degC",
        where="air.temperature",
        fix="Choose a material for warmer air." if too_warm else "",
    )


def hanging_weight(d: Dimensions, inputs: StrengthInputs) -> float:
    """Weight of body and full bin, were they lifted by the lid [N]."""
    body, density = d.body, inputs.polymer.density
    wall = body.wall_mm / MM
    wide, narrow = (body.diameter_mm / MM + wall, body.dust_outlet_diameter_mm / MM + wall)
    barrel = frustum_weight(
        density=density,
        wall=wall,
        wide_diameter=wide,
        narrow_diameter=wide,
        height=body.barrel_height_mm / MM,
    )
    cone = frustum_weight(
        density=density,
        wall=wall,
        wide_diameter=wide,
        narrow_diameter=narrow,
        height=body.cone_height_mm / MM,
    )
    across, shell = inputs.bin_mouth, inputs.bin_material
    # wall, floor and lid, as of a round bin
    area = pi * across * (inputs.bin_volume / (pi / 4 * across**2)) + pi / 2 * across**2
    empty = shell.density * GRAVITY * inputs.bin_wall * area
    dust = inputs.bulk_density * GRAVITY * inputs.bin_volume
    return float(barrel) + float(cone) + empty + dust


def widest_pitch_mm(places_mm: tuple[Point, ...]) -> float:
    """Widest gap between neighbours of screws that stand round the axis [mm]."""
    ordered = sorted(places_mm, key=lambda place: atan2(place[1], place[0]))
    return max(
        hypot(here[0] - there[0], here[1] - there[1])
        for here, there in zip(ordered, [*ordered[1:], ordered[0]], strict=True)
    )


def _glued(
    part: str, shear: float, inputs: StrengthInputs, *, load: str, gravest: Severity
) -> Finding:
    return verdict(
        ("joints-hold", "joints-shear"),
        HELD_SHARE * GLUE_STRENGTH / shear,
        inputs.safety_factor,
        part=part,
        what=(
            f"With {load} the glue of the {part} is sheared to {shear / MPA:.2f} MPa at its ends; "
            f"held for hours it bears {HELD_SHARE * GLUE_STRENGTH / MPA:.1f} MPa."
        ),
        where="epoxy on sanded faces, peak after Volkersen",
        fix=lambda: (
            "Use a tougher glue, or a thicker walls.body; a longer lap makes it tighter, not "
            "stronger."
        ),
        gravest=gravest,
    )


def _pitch(d: Dimensions, inputs: StrengthInputs) -> Iterator[Finding]:
    pitch = widest_pitch_mm(d.rim.screws.places_mm)
    width = d.rim.outer_radius_mm - d.body.radius_mm
    bow = MM * float(
        flange_bow(
            line_load=GASKET_PRESSURE * width / MM,
            pitch=pitch / MM,
            modulus=inputs.polymer.modulus * inputs.polymer.creep_ratio,
            width=width / MM,
            thickness=d.lid.thickness_mm / MM,
        )
    )
    by_rule = (
        PLASTIC_SHARE
        * MM
        * float(
            screw_pitch_tema(
                thread=inputs.fastener.thread,
                flange_thickness=min(d.lid.thickness_mm, d.rim.thickness_mm) / MM,
                gasket_factor=GASKET_FACTOR,
            )
        )
    )
    # the bow grows with the fourth power of the pitch
    by_bow = pitch * (BOW_SHARE * GASKET_SQUEEZE_MM / bow) ** 0.25
    widest = max(by_rule, by_bow)
    close = pitch <= widest
    # and falls with the third of the thickness
    enough = d.lid.thickness_mm * (bow / (BOW_SHARE * GASKET_SQUEEZE_MM)) ** (1 / 3)
    yield Finding(
        code="screws-near-enough" if close else "screws-far-apart",
        severity=Severity.NOTE if close else Severity.WARN,
        part="lid",
        what=(
            f"Between two screws the lid bows by {bow:.2f} mm over its gasket"
            + ("." if close else ", so that it can leak while the source is off.")
        ),
        measured=pitch,
        limit=widest,
        unit="mm",
        where="widest gap between the lid's screws; allowed by the bow of a strip of lid as wide "
        f"as the rim, or {by_rule:.0f} mm by half of the pitch in steel flanges",
        fix=""
        if close
        else f"Give a walls.lid of at least {ceil(10 * enough) / 10:.1f} mm, or take a softer "
        "gasket.",
    )

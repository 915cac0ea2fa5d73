"""The profile: what a person writes, checked and in SI."""

from __future__ import annotations

import hashlib
import json
from collections.abc import Mapping
from functools import partial
from typing import TYPE_CHECKING, Annotated, Any, ClassVar, Literal

from pydantic import Field

from gyrecut.catalogue import bin_materials, dusts, families, fasteners, polymers
from gyrecut.profile.air import FIT, Air, Fit, HoseName
from gyrecut.profile.bounds import (
    BIN_WALL,
    BODY,
    BRIDGE,
    BUILD,
    CHIP,
    CLEARANCE,
    CORD,
    CUT,
    FEED,
    GRAIN,
    GRAIN_DENSITY,
    HEAP_DENSITY,
    HEIGHT,
    HOSE_BORE,
    INTAKE,
    LAP,
    LAYER,
    LID,
    LINE_WIDTH,
    LOSS,
    MARGIN,
    MOUTH,
    NOZZLE,
    OVERHANG,
    PIXEL,
    RATIO,
    RELIEF,
    SHAPE_FACTOR,
    SPREAD,
    VELOCITY,
    VOLUME,
    WALL,
)
from gyrecut.profile.group import Group, Mistakes, missing_value
from gyrecut.profile.problems import Code
from gyrecut.profile.scalars import OneOf, PlainNumber, Slug, Text, WholeNumber, mistake
from gyrecut.profile.shapes import ByKind, ListOf, NameOr
from gyrecut.profile.sizes import LogNormalSizes, RosinRammlerSizes, SieveSizes

if TYPE_CHECKING:
    from gyrecut.profile.quantities import Quantity


NAME = Slug(example="my-separator")


def _distributions() -> dict[str, type[Group]]:
    return {
        "log-normal": LogNormalSizes,
        "rosin-rammler": RosinRammlerSizes,
        "sieve": SieveSizes,
    }


class DustFeed(Group):
    """The dust, by its kind in the catalogue or by own values, and how much of it."""

    line: ClassVar[str] = "dust: {kind: hardwood-sanding, feed: 150 g/h}"
    OWN: ClassVar[dict[str, Quantity | PlainNumber]] = {
        "particle_density": GRAIN_DENSITY,
        "bulk_density": HEAP_DENSITY,
        "median": GRAIN,
        "spread": SPREAD,
        "largest_chip": CHIP,
    }
    SIZES: ClassVar[tuple[str, ...]] = ("median", "spread")
    """What a distribution stands for."""

    kind: Annotated[str, OneOf(noun="dust", names=dusts, example="hardwood-sanding")] | None = (
        Field(default=None, description="Kind of dust, from the catalogue; or give all own values")
    )
    particle_density: Annotated[float, GRAIN_DENSITY] | None = Field(
        default=None, description="Density of one grain, in place of the catalogue's"
    )
    bulk_density: Annotated[float, HEAP_DENSITY] | None = Field(
        default=None, description="Density of the loose heap, in place of the catalogue's"
    )
    median: Annotated[float, GRAIN] | None = Field(
        default=None, description="Grain size that half of the mass is finer than"
    )
    spread: Annotated[float, SPREAD] | None = Field(
        default=None, description="Geometric standard deviation of the grain sizes by mass"
    )
    distribution: (
        Annotated[
            LogNormalSizes | RosinRammlerSizes | SieveSizes,
            ByKind(
                kinds=_distributions,
                example=LogNormalSizes.line.removeprefix("distribution: "),
            ),
        ]
        | None
    ) = Field(default=None, description="Grain sizes by mass, in place of median and spread")
    largest_chip: Annotated[float, CHIP] | None = Field(
        default=None, description="Longest piece to expect in the stream"
    )
    shape_factor: Annotated[float, SHAPE_FACTOR] | None = Field(
        default=None,
        description="Drag of a grain over that of a sphere of its volume, in place of the "
        "catalogue's",
    )
    feed: Annotated[float, FEED] | None = Field(
        default=None, description="Dust that arrives in an hour of work"
    )

    @classmethod
    def rules(cls, given: Mapping[str, Any]) -> Mistakes:
        """Ask for all own values where there is no kind, and for the sizes once."""
        sized = given.get("distribution") is not None
        for key in cls.SIZES:
            if sized and given.get(key) is not None:
                what = "says the grain sizes a second time, beside distribution"
                fix = f"keep {key} or distribution, and take the other out"
                allowed = "distribution, or median and spread"
                code = Code.NOT_TOGETHER
                yield (key,), mistake(code, what, allowed=allowed, fix=fix, about_key=True)
        if given.get("kind") is not None:
            return
        lacking = [
            key for key in cls.OWN if given.get(key) is None and not (sized and key in cls.SIZES)
        ]
        if lacking == list(cls.OWN):
            fix = 'add a line such as "kind: hardwood-sanding"'
            what = "has neither a kind nor own values"
        elif lacking:
            fix = f"add {', '.join(lacking)}; or add a kind, whose values stand in for them"
            what = f"has no kind, and lacks {', '.join(lacking)}"
        else:
            return
        allowed = f"a kind, or all of {', '.join(cls.OWN)}; distribution for median and spread"
        yield (), mistake(Code.DUST_INCOMPLETE, what, allowed=allowed, fix=fix)


class Ratios(Group):
    """Own proportions: each length as a ratio to the body diameter."""

    line: ClassVar[str] = "proportions: {slot_height: 0.5, slot_width: 0.2, ...}"

    slot_height: Annotated[float, RATIO] = Field(description="Height of the inlet slot")
    slot_width: Annotated[float, RATIO] = Field(description="Width of the inlet slot")
    finder_diameter: Annotated[float, RATIO] = Field(description="Bore of the vortex finder")
    finder_length: Annotated[float, RATIO] = Field(
        description="Length of the vortex finder below the lid"
    )
    barrel_height: Annotated[float, RATIO] = Field(description="Height of the barrel alone")
    total_height: Annotated[float, RATIO] = Field(description="Height of barrel and cone")
    dust_outlet_diameter: Annotated[float, RATIO] = Field(
        description="Opening at the foot of the cone"
    )


FAMILY = OneOf(noun="proportion family", names=families, example="stairmand-high-efficiency")


class Stage(Group):
    """One separation step: a cyclone, or a bank of equal ones."""

    line: ClassVar[str] = "- {proportions: stairmand-high-efficiency, inlet_velocity: 18 m/s}"
    SIZINGS: ClassVar[tuple[str, ...]] = (
        "inlet_velocity",
        "body_diameter",
        "cut_size",
        "fit_pieces",
    )

    proportions: Annotated[str | Ratios, NameOr(name=FAMILY, group=lambda: Ratios)] = Field(
        description="A proportion family of the catalogue, or own ratios"
    )
    inlet_velocity: Annotated[float, VELOCITY] | None = Field(
        default=None, description="Size the body for this air velocity in the inlet slot"
    )
    body_diameter: Annotated[float, BODY] | None = Field(
        default=None, description="Inside diameter of the barrel"
    )
    cut_size: Annotated[float, CUT] | None = Field(
        default=None, description="Size the body so that half of the grains of this size are caught"
    )
    fit_pieces: Annotated[int, WholeNumber(low=1, high=40, example="4")] | None = Field(
        default=None, description="Largest body that prints in this many pieces"
    )
    count: Annotated[int, WholeNumber(low=1, high=12, example="1")] = Field(
        default=1, description="Equal cyclones side by side; 1 where left out"
    )

    @classmethod
    def rules(cls, given: Mapping[str, Any]) -> Mistakes:
        """Ask for exactly one key to take the size from."""
        sizings = [key for key in cls.SIZINGS if given.get(key) is not None]
        allowed = f"exactly one of {', '.join(cls.SIZINGS)}"
        if not sizings:
            fix = 'add a line such as "inlet_velocity: 18 m/s"'
            what = "has nothing to take its size from"
            yield (), mistake(Code.MISSING, what, allowed=allowed, fix=fix)
        for extra in sizings[1:]:
            fix = f"keep {extra} or {sizings[0]}, and take the other line out"
            what = f"sizes the stage a second time, beside {sizings[0]}"
            wrong = mistake(Code.SEVERAL_SIZINGS, what, allowed=allowed, fix=fix, about_key=True)
            yield (extra,), wrong


class CuffOutlet(Group):
    """A cuff on the lid for the hose to the suction source."""

    line: ClassVar[str] = "outlet: {kind: cuff, hose: 50 mm, fit: over}"

    kind: Literal["cuff"] = Field(description="cuff: a hose leads on to the suction source")
    hose: HoseName = Field(description="Nominal hose size, from the catalogue")
    fit: Annotated[Fit, FIT] = Field(
        description="over: the hose goes over the printed cuff; inside: the hose goes into it"
    )
    measured: Annotated[float, HOSE_BORE] | None = Field(
        default=None,
        description="Hose as measured: its bore for fit over, its outside for fit inside",
    )


class BlowerOutlet(Group):
    """A seat on the lid for a blower."""

    line: ClassVar[str] = "outlet: {kind: blower, intake_diameter: 30 mm}"

    kind: Literal["blower"] = Field(description="blower: a blower sits on the lid")
    intake_diameter: Annotated[float, INTAKE] = Field(description="Intake opening of the blower")


class Bin(Group):
    """The bin below the cone."""

    line: ClassVar[str] = "bin: {volume: 20 L, mouth: 260 mm, wall: 2 mm, material: HDPE}"

    volume: Annotated[float, VOLUME] = Field(description="What the bin holds")
    mouth: Annotated[float, MOUTH] = Field(description="Inside diameter of its opening")
    wall: Annotated[float, BIN_WALL] = Field(description="Thickness of its wall")
    material: Annotated[str, OneOf(noun="bin material", names=bin_materials, example="HDPE")] = (
        Field(description="What it is made of, from the catalogue")
    )
    relief: Annotated[float, RELIEF] | None = Field(
        default=None,
        description="Suction at which a relief valve on the bin opens; none where left out",
    )


class Printer(Group):
    """The printer, and what it can do without support."""

    line: ClassVar[str] = "printer: {process: filament, build_volume: ..., nozzle: 0.4 mm, ...}"
    OWN: ClassVar[dict[str, dict[str, Quantity]]] = {
        "filament": {"nozzle": NOZZLE, "line_width": LINE_WIDTH},
        "resin": {"pixel": PIXEL},
    }

    process: Annotated[
        Literal["filament", "resin"],
        OneOf(noun="process", names=lambda: ("filament", "resin"), example="filament"),
    ] = Field(description="filament or resin")
    build_volume: Annotated[
        tuple[Annotated[float, BUILD], Annotated[float, BUILD], Annotated[float, BUILD]],
        ListOf(
            noun="lengths (width, depth, height)",
            low=3,
            high=3,
            example="[220 mm, 220 mm, 250 mm]",
        ),
    ] = Field(description="Width, depth and height the printer can fill")
    nozzle: Annotated[float, NOZZLE] | None = Field(
        default=None, description="Bore of the nozzle; filament printers only"
    )
    line_width: Annotated[float, LINE_WIDTH] | None = Field(
        default=None, description="Width of one printed line; filament printers only"
    )
    pixel: Annotated[float, PIXEL] | None = Field(
        default=None, description="Edge of one pixel of the screen; resin printers only"
    )
    layer_height: Annotated[float, LAYER] = Field(description="Height of one layer")
    overhang_limit: Annotated[float, OVERHANG] = Field(
        description="Steepest overhang that prints clean, measured from the vertical"
    )
    bridge_limit: Annotated[float, BRIDGE] = Field(
        description="Longest bridge that prints without sagging"
    )
    clearance: Annotated[float, CLEARANCE] = Field(
        description="Radial gap between two printed parts that slide together"
    )
    margin: Annotated[float, MARGIN] = Field(description="Strip kept free at each edge of the bed")

    @classmethod
    def rules(cls, given: Mapping[str, Any]) -> Mistakes:
        """Ask for the keys of the process, and no others."""
        process = given.get("process")
        if process not in ("filament", "resin"):
            return
        for of, keys in cls.OWN.items():
            for key, rule in keys.items():
                if of == process and given.get(key) is None:
                    yield (key,), missing_value(rule, key)
                if of != process and given.get(key) is not None:
                    what = f"does not belong to a {process} printer"
                    fix = f'take the line out, or write "process: {of}"'
                    allowed = f"{', '.join(cls.OWN[process])} for a {process} printer"
                    code = Code.NOT_FOR_THIS_PRINTER
                    yield (key,), mistake(code, what, allowed=allowed, fix=fix, about_key=True)


class Walls(Group):
    """Wall thicknesses of the printed parts."""

    line: ClassVar[str] = "walls: {body: 2.4 mm, lid: 6 mm}"

    body: Annotated[float, WALL] = Field(description="Wall of barrel, cone and inlet")
    lid: Annotated[float, LID] = Field(description="Thickness of the lid")


Seal = Literal["cord", "gasket"]
SEAL = OneOf(noun="seal", names=lambda: ("cord", "gasket"), example="cord")


class Joints(Group):
    """How pieces go together."""

    line: ClassVar[str] = "joints: {lap: 10 mm, fastener: M4}"

    lap: Annotated[float, LAP] = Field(
        default_factory=partial(LAP.si, "10 mm"),
        description="How far one piece reaches into the next; 10 mm where left out",
    )
    fastener: Annotated[str, OneOf(noun="fastener", names=fasteners, example="M4")] = Field(
        default="M4", description="Screw for all flanges; M4 where left out"
    )
    lid: Annotated[Seal, SEAL] = Field(
        default="gasket", description="Seal under the lid: cord in a groove, or a flat gasket"
    )
    transition: Annotated[Seal, SEAL] = Field(
        default="gasket", description="Seal behind the transition: cord in a groove, or gasket"
    )
    bin_ring: Annotated[Seal, SEAL] = Field(
        default="gasket", description="Seal under the bin ring: cord in a groove, or gasket"
    )
    cord: Annotated[float, CORD] = Field(
        default_factory=partial(CORD.si, "3 mm"),
        description="Diameter of the sealing cord; 3 mm where left out",
    )


class Limits(Group):
    """What the design may not exceed; each one a check, none a wish."""

    line: ClassVar[str] = "limits: {pressure_drop: 2 kPa, height: 1.2 m}"

    pressure_drop: Annotated[float, LOSS] | None = Field(
        default=None, description="Most pressure the separator may take"
    )
    height: Annotated[float, HEIGHT] | None = Field(
        default=None, description="Most height from the floor of the bin to the top"
    )
    cut_size: Annotated[float, CUT] | None = Field(
        default=None, description="Coarsest cut size that is good enough"
    )
    pieces: Annotated[int, WholeNumber(low=1, high=500, example="12")] | None = Field(
        default=None, description="Most printed pieces"
    )


def _outlets() -> dict[str, type[Group]]:
    return {"cuff": CuffOutlet, "blower": BlowerOutlet}


class Profile(Group):
    """A whole profile, in SI: metres, seconds, kilograms, pascals, kelvin, radians."""

    line: ClassVar[str] = "name: my-separator"

    name: Annotated[str, NAME] = Field(
        description="Name of the design; the kit's folder is called so"
    )
    description: Annotated[str, Text(example="for the sanding bench")] = Field(
        default="", description="What it is for, in your own words"
    )
    air: Air = Field(description="The air that is moved, and the hose it comes through")
    dust: DustFeed = Field(description="The dust")
    stages: Annotated[
        tuple[Stage, ...],
        ListOf(noun="stages", low=1, high=4, example=f"[{Stage.line.removeprefix('- ')}]"),
    ] = Field(description="Separation steps, in the order the air passes them")
    outlet: Annotated[
        CuffOutlet | BlowerOutlet,
        ByKind(kinds=_outlets, example=CuffOutlet.line.removeprefix("outlet: ")),
    ] = Field(description="Where the clean air goes")
    bin: Bin = Field(description="The bin below the cone")
    printer: Printer = Field(description="The printer")
    material: Annotated[str, OneOf(noun="polymer", names=polymers, example="PETG")] = Field(
        description="What the parts are printed from, from the catalogue"
    )
    walls: Walls = Field(description="Wall thicknesses of the printed parts")
    joints: Joints = Field(default_factory=Joints, description="How pieces go together")
    limits: Limits = Field(default_factory=Limits, description="What the design may not exceed")

    @classmethod
    def rules(cls, given: Mapping[str, Any]) -> Mistakes:
        """Ask for a material that suits the printer."""
        printer, polymer = given.get("printer"), polymers().get(str(given.get("material")))
        process = printer.get("process") if isinstance(printer, Mapping) else None
        if polymer and process in ("filament", "resin") and polymer.process != process:
            fitting = [row.name for row in polymers().values() if row.process == process]
            what = f"is a {polymer.process} material, and the printer is a {process} printer"
            fix = "choose one of the allowed materials, or change printer.process"
            code = Code.MATERIAL_NOT_FOR_PRINTER
            yield ("material",), mistake(code, what, allowed=", ".join(fitting), fix=fix)


def profile_hash(profile: Profile) -> str:
    """Give a hash of what the profile says, whatever units and comments it says it in.

    Returns
    -------
    str
        SHA-256 of the values in SI as JSON with sorted keys, in hexadecimal.
    """
    values = profile.model_dump(mode="json")
    text = json.dumps(values, sort_keys=True, separators=(",", ":"), allow_nan=False)
    return hashlib.sha256(text.encode()).hexdigest()

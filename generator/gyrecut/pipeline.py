"""From profile to kit: each stage of the work is called here once, in the order it happens."""

from __future__ import annotations

import json
from dataclasses import dataclass, replace
from math import pi
from typing import TYPE_CHECKING, Any

from gyrecut import __version__
from gyrecut.airflow.air import air_state, air_state_at_pressure
from gyrecut.catalogue import bin_materials, fasteners, polymers
from gyrecut.kit.assembly import hardware, steps
from gyrecut.kit.contents import KitContents, Polymer
from gyrecut.kit.facts import body_facts, estimate_facts
from gyrecut.kit.folder import MANIFEST
from gyrecut.kit.manifest import plain
from gyrecut.profile.dust import dust_of
from gyrecut.profile.models import profile_hash
from gyrecut.proportions.printing import bed_of
from gyrecut.proportions.proportioning import geometry_of, proportion
from gyrecut.proportions.rules import geometry_rules
from gyrecut.separation.air_path import suction_source
from gyrecut.separation.answers import answers_to
from gyrecut.separation.chain import Step
from gyrecut.separation.forecast import forecast
from gyrecut.separation.limits import Totals, limit_findings
from gyrecut.separation.outlook import outlook_findings, sizing_flow, suction_in_bin
from gyrecut.separation.sizes import sizes_of
from gyrecut.separation.uncertainty import Doubt
from gyrecut.strength.findings import strength_findings
from gyrecut.strength.inputs import StrengthInputs, assumed_source

if TYPE_CHECKING:
    from collections.abc import Callable, Iterator
    from pathlib import Path

    from gyrecut.airflow.air import AirState
    from gyrecut.catalogue.rows import Dust
    from gyrecut.correlations.geometry import CycloneGeometry
    from gyrecut.findings import Finding
    from gyrecut.kit.contents import Coupons, KitPiece
    from gyrecut.profile import Profile
    from gyrecut.proportions.dimensions import Dimensions
    from gyrecut.separation.answers import Answer
    from gyrecut.separation.forecast import Forecast, StageForecast

    Progress = Callable[[str, int, int], None]

MM = 1000.0
FIXED_PIECES = 4  # finder, outlet, transition, bin ring


@dataclass(frozen=True, slots=True, kw_only=True)
class StageDesign:
    """One separation step: the dimensions of one of its separators, and what it should do."""

    number: int
    copies: int
    flow: float
    dimensions: Dimensions
    geometry: CycloneGeometry
    forecast: StageForecast

    @property
    def piece_count(self) -> int:
        """Printed objects of the stage, copies counted."""
        return self.copies * (self.dimensions.division.piece_count + FIXED_PIECES)


@dataclass(frozen=True, slots=True, kw_only=True)
class Design:
    """All that can be said before a solid is made."""

    profile: Profile
    air: AirState
    dust: Dust
    stages: tuple[StageDesign, ...]
    forecast: Forecast
    answers: tuple[Answer, ...]
    findings: tuple[Finding, ...]

    def as_document(self) -> dict[str, Any]:
        """Give the design as data that JSON has words for."""
        return {
            "gyrecut": __version__,
            "profile": {"name": self.profile.name, "hash": profile_hash(self.profile)},
            "air": plain(self.air),
            "dust": plain(self.dust),
            "stages": [
                {
                    "number": stage.number,
                    "copies": stage.copies,
                    "flow": stage.flow,
                    "dimensions": plain(stage.dimensions),
                }
                for stage in self.stages
            ],
            "forecast": plain(self.forecast),
            "answers": plain(self.answers),
            "findings": plain(self.findings),
        }


@dataclass(frozen=True, slots=True, kw_only=True)
class BuildResult:
    """A kit on disk."""

    folder: Path
    findings: tuple[Finding, ...]
    manifest: dict[str, Any]


def design(profile: Profile) -> Design:
    """Work a profile out as far as it goes without CAD.

    Parameters
    ----------
    profile : Profile

    Returns
    -------
    Design

    Raises
    ------
    UnbuildableError, OutOfRangeError
        Where no separator can be made from the profile.
    """
    air = _air_of(profile)
    dust = dust_of(profile.dust)
    target = sizing_flow(profile, dust=dust, air=air)
    bodies = tuple(
        proportion(profile, stage, flow=target / stage.count, air=air, dust=dust)
        for stage in profile.stages
    )
    steps = tuple(
        Step(geometry=geometry_of(body), copies=stage.count)
        for body, stage in zip(bodies, profile.stages, strict=True)
    )
    sizes = sizes_of(profile.dust, dust)
    expected = forecast(
        profile,
        air=air,
        dust=dust,
        sizes=sizes,
        stages=tuple(zip(steps, bodies, strict=True)),
        flow=target,
        doubt=Doubt(),
    )
    stages = tuple(
        StageDesign(
            number=number,
            copies=step.copies,
            flow=said.flow,
            dimensions=body,
            geometry=step.geometry,
            forecast=said,
        )
        for number, (step, body, said) in enumerate(
            zip(steps, bodies, expected.stages, strict=True), start=1
        )
    )
    findings: list[Finding] = []
    arriving = profile.dust.feed
    for stage in stages:
        findings += geometry_rules(
            stage.dimensions,
            stage.geometry,
            flow=stage.flow,
            air=air,
            dust=dust,
            feed=None if arriving is None else arriving / stage.copies,
            hose_flow=expected.flow if stage.number == 1 else None,
            printer=profile.printer,
        )
        if arriving is not None:
            arriving *= 1 - stage.forecast.kept_of_arriving
    findings += _strength(profile, stages, expected=expected, air=air, dust=dust)
    findings += outlook_findings(
        expected, dust=dust, leak=profile.air.bin_leak, target=profile.air.flow
    )
    findings += limit_findings(profile.limits, _totals(profile, stages))
    return Design(
        profile=profile,
        air=air,
        dust=dust,
        stages=stages,
        forecast=expected,
        answers=tuple(
            answers_to(profile.limits, expected, steps=steps, dust=dust, sizes=sizes, air=air)
        ),
        findings=tuple(findings),
    )


def _strength(
    profile: Profile,
    stages: tuple[StageDesign, ...],
    *,
    expected: Forecast,
    air: AirState,
    dust: Dust,
) -> Iterator[Finding]:
    source = suction_source(profile, air)
    assumed = assumed_source(flow=expected.flow, on_board=profile.outlet.kind == "blower")
    inputs = StrengthInputs(
        polymer=polymers()[profile.material],
        fastener=fasteners()[profile.joints.fastener],
        bin_material=bin_materials()[profile.bin.material],
        bin_volume=profile.bin.volume,
        bin_mouth=profile.bin.mouth,
        bin_wall=profile.bin.wall,
        bulk_density=dust.bulk_density,
        shut_off=assumed.shut_off if source is None else source.shut_off,
        open_flow=assumed.open_flow if source is None else source.open_flow,
        assumed_source=assumed.title if source is None else "",
        relief_setting=profile.bin.relief,
        working_suction=suction_in_bin(expected),
        air_temperature=profile.air.temperature,
        air_density=air.density,
    )
    for stage in stages:
        yield from strength_findings(stage.dimensions, inputs)


def _air_of(profile: Profile) -> AirState:
    given = profile.air
    if given.pressure is not None:
        return air_state_at_pressure(
            given.temperature, pressure=given.pressure, relative_humidity=given.relative_humidity
        )
    return air_state(
        given.temperature, altitude=given.altitude, relative_humidity=given.relative_humidity
    )


def _totals(profile: Profile, stages: tuple[StageDesign, ...]) -> Totals:
    bin_height = profile.bin.volume / (pi / 4 * profile.bin.mouth**2)
    return Totals(
        pressure_drop=sum(stage.forecast.pressure_drop.central for stage in stages),
        height=bin_height + max(stage.dimensions.overall_height_mm for stage in stages) / MM,
        cut_size=min(stage.forecast.cut_size.central for stage in stages),
        pieces=sum(stage.piece_count for stage in stages),
    )


def build(design: Design, folder: Path, progress: Progress) -> BuildResult:
    """Make the solids, cut them, check the pieces and write the kit.

    Parameters
    ----------
    design : Design
    folder : Path
        Where the kit is to stand.
    progress : callable
        Told (what, done, total) as the work goes on.

    Returns
    -------
    BuildResult

    Raises
    ------
    BuildError
        Where the kernel or a file does not give what the design asks for.
    """
    from gyrecut.checks import (  # noqa: PLC0415 - CAD and meshes load here
        estimate_for,
        findings_of,
        limits_of,
        measure_mesh,
        settings_of,
    )
    from gyrecut.kit.coupons import make_coupons  # noqa: PLC0415 - same
    from gyrecut.kit.writing import write_kit  # noqa: PLC0415 - same

    pieces = tuple(_pieces(design, progress))
    coupons = make_coupons(design.profile, design.stages[0].dimensions)
    limits = limits_of(design.profile.printer)
    findings = list(design.findings)
    polymer = polymers()[design.profile.material]
    settings = settings_of(design.profile.printer, polymer)
    measured: list[KitPiece] = []
    to_check = (*pieces, *coupons.pieces)
    for done, piece in enumerate(to_check, start=1):
        measures = measure_mesh(piece.mesh, limits)
        findings += findings_of(measures, piece.name, limits)
        estimate = estimate_for(measures, settings=settings, density=polymer.density)
        measured.append(replace(piece, printing=estimate))
        progress("checks", done, len(to_check))
    progress("files", 0, 1)
    count = len(pieces)
    coupons = replace(coupons, pieces=tuple(measured[count:]))
    contents = _contents(design, tuple(measured[:count]), tuple(findings), coupons)
    written = write_kit(contents, folder)
    progress("files", 1, 1)
    manifest: dict[str, Any] = json.loads((written / MANIFEST).read_bytes())
    return BuildResult(folder=written, findings=tuple(findings), manifest=manifest)


def _pieces(design: Design, progress: Progress) -> Iterator[KitPiece]:
    from gyrecut.kit.measuring import kit_piece  # noqa: PLC0415 - CAD loads here
    from gyrecut.pieces import make_pieces  # noqa: PLC0415 - same
    from gyrecut.pieces.marks import mark_style  # noqa: PLC0415 - same
    from gyrecut.solids import make_parts  # noqa: PLC0415 - same

    density = polymers()[design.profile.material].density
    bed, style = bed_of(design.profile.printer), mark_style(design.profile.printer)
    several = len(design.stages) > 1
    total = sum(stage.piece_count // stage.copies for stage in design.stages)
    done = 0
    for stage in design.stages:
        progress("solids", stage.number - 1, len(design.stages))
        parts = make_parts(stage.dimensions)
        progress("solids", stage.number, len(design.stages))
        prefix = f"stage-{stage.number}-" if several else ""
        for piece in make_pieces(
            parts, stage.dimensions, bed, prefix=prefix, copies=stage.copies, style=style
        ):
            yield kit_piece(piece, density=density, stage=stage.number)
            done += 1
            progress("pieces", done, total)


def _contents(
    design: Design,
    pieces: tuple[KitPiece, ...],
    findings: tuple[Finding, ...],
    coupons: Coupons,
) -> KitContents:
    profile = design.profile
    polymer = polymers()[profile.material]
    fastener = fasteners()[profile.joints.fastener]
    several = len(design.stages) > 1
    return KitContents(
        version=__version__,
        profile_name=profile.name,
        profile_hash=profile_hash(profile),
        polymer=Polymer(
            name=polymer.name,
            density=polymer.density,
            softening_temperature=polymer.softening_temperature,
        ),
        dust_is_combustible=design.dust.combustible,
        dimensions=[stage.dimensions for stage in design.stages],
        prediction=design.forecast,
        body=tuple(
            fact
            for stage in design.stages
            for fact in body_facts(stage.dimensions, _of(stage, several))
        ),
        estimate=tuple(estimate_facts(design.forecast)),
        findings=findings,
        pieces=pieces,
        hardware=tuple(
            item
            for stage in design.stages
            for item in hardware(stage.dimensions, fastener, copies=stage.copies)
        ),
        steps=tuple(
            step for stage in design.stages for step in steps(stage.dimensions, copies=stage.copies)
        ),
        coupons=coupons,
    )


def _of(stage: StageDesign, several: bool) -> str:  # noqa: FBT001 - one plain question
    return f"stage {stage.number}" if several else ""

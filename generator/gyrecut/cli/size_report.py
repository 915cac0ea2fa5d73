"""What `size` shows: three plain sentences, then the numbers behind them."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.cli.cautions import cautions_for
from gyrecut.cli.dimension_rows import dimension_rows
from gyrecut.cli.figures import cubic_metres_an_hour, figure, micrometres, percent, tenths
from gyrecut.cli.findings import print_findings
from gyrecut.cli.tables import print_table
from gyrecut.kit.facts import estimate_facts

if TYPE_CHECKING:
    from collections.abc import Iterator
    from typing import TextIO

    from gyrecut.kit.contents import Fact
    from gyrecut.pipeline import Design, StageDesign
    from gyrecut.proportions.dimensions import Dimensions

FIRST_ESTIMATE = "first estimate (Lapple cut size, Shepherd-Lapple pressure drop)"


def show_design(design: Design, stream: TextIO) -> None:
    """Write a design for a person."""
    from gyrecut.cli.consoles import console  # noqa: PLC0415 - `--json` does without

    out = console(stream)
    for sentence in sentences(design):
        out.print(sentence)
    for stage in design.stages:
        of = f" of stage {stage.number}" if len(design.stages) > 1 else ""
        out.print()
        print_table(
            out,
            ("part", "what", "#mm"),
            _dimension_cells(stage.dimensions),
            title=f"Dimensions{of}; diameters are inside unless it says outside",
        )
        out.print()
        print_table(
            out,
            ("what", "#value", "unit", "after"),
            map(_estimate_cells, estimate_facts(stage.prediction, "")),
            title=f"First prediction{of}: {FIRST_ESTIMATE}",
        )
    out.print()
    print_findings(out, design.findings, title="Rules")
    out.print(f"\n{design.stages[0].prediction.note}")
    titles = "; ".join(caution.title for caution in cautions_for(design))
    out.print(f"\nCautions, in full in README.md and in every kit: {titles}.")


def sentences(design: Design) -> Iterator[str]:
    """Say in plain words how large it is, what it catches and what it costs."""
    profile, stages = design.profile, design.stages
    sizes = ", then ".join(map(_size, stages))
    yield f"{profile.name}: {sizes}."
    cuts = ", then ".join(f"{micrometres(stage.prediction.cut_size_lapple)} um" for stage in stages)
    kept = percent(stages[0].prediction.mass_kept)
    first = "the first stage" if len(stages) > 1 else "it"
    yield (
        f"First estimate of the catch: half of the grains of {cuts}, more of the larger ones; "
        f"{first} keeps {kept} % of this dust by mass."
    )
    drop = sum(stage.prediction.pressure_drop_shepherd_lapple for stage in stages)
    flow = cubic_metres_an_hour(profile.air.flow)
    yield f"First estimate of the cost: {figure(drop)} Pa of suction at {flow} m3/h."


def _size(stage: StageDesign) -> str:
    body = stage.dimensions.body
    bodies = "one cyclone" if stage.copies == 1 else f"{stage.copies} equal cyclones side by side"
    return (
        f"{bodies}, {figure(body.diameter_mm)} mm across inside and "
        f"{figure(body.total_height_mm)} mm tall from lid to dust outlet"
    )


def _dimension_cells(dimensions: Dimensions) -> Iterator[tuple[str, str, str]]:
    named = ""
    for part, what, millimetres in dimension_rows(dimensions):
        yield ("" if part == named else part), what, tenths(millimetres)
        named = part


def _estimate_cells(fact: Fact) -> tuple[str, str, str, str]:
    number = percent(fact.value / 100) if fact.unit == "%" else figure(fact.value)
    return fact.label, number, fact.unit, fact.note

"""What `size` shows: three plain sentences, then the numbers behind them."""

from __future__ import annotations

from typing import TYPE_CHECKING, Any

from gyrecut.cli.cautions import cautions_for
from gyrecut.cli.dimension_rows import dimension_rows
from gyrecut.cli.figures import cubic_metres_an_hour, figure, micrometres, percent, tenths
from gyrecut.cli.findings import print_findings
from gyrecut.cli.tables import print_table
from gyrecut.kit.facts import estimate_facts
from gyrecut.kit.manifest import plain

if TYPE_CHECKING:
    from collections.abc import Iterator
    from typing import TextIO

    from rich.console import Console

    from gyrecut.kit.contents import Fact
    from gyrecut.pipeline import Design, StageDesign
    from gyrecut.proportions.dimensions import Dimensions
    from gyrecut.separation.forecast import Forecast
    from gyrecut.separation.models import Agreement
    from gyrecut.separation.operating_point import OperatingPoint


def size_document(design: Design) -> dict[str, Any]:
    """Give a design as a JSON document holds it: all it is made of, and what is shown of it."""
    return {
        **design.as_document(),
        "expect": plain(tuple(estimate_facts(design.forecast))),
        "lengths": [
            {"stage": stage.number, "part": part, "what": what, "mm": length}
            for stage in design.stages
            for part, what, length in dimension_rows(stage.dimensions)
        ],
    }


def show_design(design: Design, stream: TextIO) -> None:
    """Write a design for a person."""
    from gyrecut.cli.consoles import console  # noqa: PLC0415 - `--json` does without

    out = console(stream)
    for sentence in sentences(design):
        out.print(sentence)
    out.print()
    print_table(
        out,
        ("what", "#value", "unit", "note"),
        map(_fact_cells, estimate_facts(design.forecast)),
        title="What to expect",
    )
    for stage in design.stages:
        of = f" of stage {stage.number}" if len(design.stages) > 1 else ""
        _show_agreement(
            out,
            stage.forecast.cut_size,
            title=f"Cut size{of}, every model",
            unit="um",
            factor=1e6,
        )
        _show_agreement(
            out,
            stage.forecast.pressure_drop,
            title=f"Pressure drop{of}, every model",
            unit="Pa",
            factor=1.0,
        )
    _show_air(out, design.forecast)
    _show_answers(out, design)
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
    print_findings(out, design.findings, title="Rules")
    out.print(f"\n{design.forecast.advice}")
    titles = "; ".join(caution.title for caution in cautions_for(design))
    out.print(f"\nCautions, in full in README.md and in every kit: {titles}.")


def sentences(design: Design) -> Iterator[str]:
    """Say in plain words how large it is, what it catches and what it costs."""
    expected, catch = design.forecast, design.forecast.catch
    sizes = ", then ".join(map(_size, design.stages))
    yield f"{design.profile.name}: {sizes}."
    cuts = ", then ".join(
        f"{micrometres(stage.forecast.cut_size.central)} um" for stage in design.stages
    )
    yield (
        f"It should keep {percent(catch.kept)} % of this dust by mass, in 9 of 10 cases "
        f"{percent(catch.spread.low)} to {percent(catch.spread.high)} %; of grains of {cuts} it "
        "keeps half, of larger ones more."
    )
    drops = [stage.forecast.pressure_drop for stage in design.stages]
    low, central, high = (sum(getattr(drop, end) for drop in drops) for end in _ENDS)
    gives = "a source has to give" if expected.flow_is_target else "the source gives"
    yield (
        f"It takes {figure(central)} Pa of suction, {figure(low)} to {figure(high)} by what was "
        f"measured; with the hose and all the rest it is {figure(expected.clean.suction)} Pa, "
        f"which {gives} at {cubic_metres_an_hour(expected.flow)} m3/h."
    )


_ENDS = ("low", "central", "high")


def _size(stage: StageDesign) -> str:
    body = stage.dimensions.body
    bodies = "one cyclone" if stage.copies == 1 else f"{stage.copies} equal cyclones side by side"
    return (
        f"{bodies}, {figure(body.diameter_mm)} mm across inside and "
        f"{figure(body.total_height_mm)} mm tall from lid to dust outlet"
    )


def _show_agreement(out: Console, said: Agreement, *, title: str, unit: str, factor: float) -> None:
    rows = [
        (
            "*" if word.trusted else "",
            word.model,
            "" if word.value is None else figure(word.value * factor),
            ", ".join(figure(ratio) for ratio in word.measured),
            word.why,
        )
        for word in said.words
    ]
    central, low, high = (figure(getattr(said, end) * factor) for end in ("central", "low", "high"))
    out.print()
    print_table(
        out,
        ("", "model", f"#{unit}", "over measured", "* carries the central value"),
        rows,
        title=title,
    )
    out.print(f"Central {central} {unit}, band {low} to {high}: {said.basis}.")


def _show_air(out: Console, expected: Forecast) -> None:
    points = [("as built", expected.clean), ("pick-up covered", expected.choked)]
    if expected.loaded is not None:
        points.append(("filter at its limit", expected.loaded))
    out.print()
    print_table(
        out,
        ("state", "#flow m3/h", "#suction Pa", "#at the tool Pa", "#air power W", "#hose m/s"),
        [(state, *_point_cells(point)) for state, point in points],
        title="Where suction and air path meet",
    )
    total = sum(float(share.pressure_drop) for share in expected.clean.shares)
    out.print()
    print_table(
        out,
        ("part", "#Pa", "#%"),
        [
            (
                share.name,
                figure(float(share.pressure_drop)),
                figure(100 * float(share.pressure_drop) / total, 2),
            )
            for share in expected.clean.shares
        ],
        title="Where the pressure goes, as built",
    )


def _point_cells(point: OperatingPoint) -> tuple[str, ...]:
    return (
        cubic_metres_an_hour(point.flow),
        figure(point.suction),
        figure(point.tool_suction),
        figure(point.air_power),
        figure(point.hose_velocity),
    )


def _show_answers(out: Console, design: Design) -> None:
    answers = design.answers
    if not answers:
        return
    out.print()
    print_table(
        out,
        ("question", "answer"),
        [(answer.question, answer.answer) for answer in answers],
        title="Asked backwards",
    )


def _dimension_cells(dimensions: Dimensions) -> Iterator[tuple[str, str, str]]:
    named = ""
    for part, what, millimetres in dimension_rows(dimensions):
        yield ("" if part == named else part), what, tenths(millimetres)
        named = part


def _fact_cells(fact: Fact) -> tuple[str, str, str, str]:
    number = percent(fact.value / 100) if fact.unit == "%" else figure(fact.value)
    return fact.label, number, fact.unit, fact.note

"""What a person reads says the same as the data it is made of."""

from __future__ import annotations

import io
import json
import re
from dataclasses import replace
from typing import TYPE_CHECKING

import pytest
from tests.cli.conftest import TABLES

from gyrecut import pipeline
from gyrecut.cli.figures import entry, figure, percent
from gyrecut.cli.findings import exit_code_of
from gyrecut.cli.listing import VIEWS
from gyrecut.cli.size_report import sentences, show_design
from gyrecut.findings import Finding, Severity
from gyrecut.kit.cautions import cautions
from gyrecut.profile import load_profile

if TYPE_CHECKING:
    from pathlib import Path

    from tests.cli.conftest import Run

COMPACT_ALL = {
    "polymer": "PETG",
    "softening_temperature": 338.15,
    "dust_is_combustible": True,
}


def test_tables_are_those_that_list_knows() -> None:
    assert list(TABLES) == list(VIEWS)


@pytest.fixture(scope="module")
def design(profile: Path) -> pipeline.Design:
    return pipeline.design(load_profile(profile))


def text_of(design: pipeline.Design) -> str:
    stream = io.StringIO()
    show_design(design, stream)
    return stream.getvalue()


def with_stages(design: pipeline.Design, *copies: int) -> pipeline.Design:
    (stage,) = design.stages
    stages = tuple(
        replace(stage, number=number, copies=count) for number, count in enumerate(copies, start=1)
    )
    return replace(design, stages=stages)


def test_size_begins_with_three_sentences_on_size_catch_and_cost(run: Run, profile: Path) -> None:
    result = json.loads(run("size", profile, "--json").stdout)["result"]
    body, forecast = result["stages"][0]["dimensions"]["body"], result["forecast"]
    (stage,), catch, clean = forecast["stages"], forecast["catch"], forecast["clean"]
    cut, drop, spread = stage["cut_size"], stage["pressure_drop"], catch["spread"]
    text = run("size", profile).stdout
    assert " ".join(text[: text.index("What to expect")].split()) == (
        f"luthier-sander: one cyclone, {body['diameter_mm']:.0f} mm across inside and "
        f"{body['total_height_mm']:.0f} mm tall from lid to dust outlet. "
        f"It should keep {catch['kept'] * 100:.1f} % of this dust by mass, in 9 of 10 cases "
        f"{spread['low'] * 100:.1f} to {spread['high'] * 100:.1f} %; of grains of "
        f"{cut['central'] * 1e6:.2f} um it keeps half, of larger ones more. "
        f"It takes {drop['central']:.0f} Pa of suction, {drop['low']:.0f} to {drop['high']:.0f} "
        f"by what was measured; with the hose and all the rest it is {clean['suction']:.0f} Pa, "
        f"which the source gives at {clean['flow'] * 3600:.0f} m3/h."
    )


def test_the_first_sentences_need_no_schooling(design: pipeline.Design) -> None:
    spoken = " ".join(sentences(design))
    schooled = "d50 median percentile Reynolds grade Lapple Barth Muschelknautz correlation heads"
    assert [word for word in schooled.split() if word in spoken] == []
    assert len(list(sentences(design))) == 3
    assert all(len(sentence) < 200 for sentence in sentences(design))


def test_a_target_flow_is_told_from_one_that_settles(design: pipeline.Design) -> None:
    target = replace(design, forecast=replace(design.forecast, flow_is_target=True))
    assert "which the source gives at" in list(sentences(design))[2]
    assert "which a source has to give at" in list(sentences(target))[2]
    assert "suction the source gives" in text_of(design)
    assert "suction the source has to give" in text_of(target)


def test_size_shows_every_model_its_verdict_and_the_band(design: pipeline.Design) -> None:
    text = text_of(design)
    rows = [" ".join(line.split()) for line in text.splitlines()]
    (stage,) = design.stages
    for said, factor in ((stage.forecast.cut_size, 1e6), (stage.forecast.pressure_drop, 1.0)):
        for word in said.words:
            assert word.value is not None
            shown = f"{word.model} {figure(word.value * factor)}"
            (row,) = (row for row in rows if shown in row)
            assert row.startswith("* ") is word.trusted
        band = " to ".join(figure(end * factor) for end in (said.low, said.high))
        assert f", band {band}: " in " ".join(text.split())
        assert said.basis in " ".join(text.split())
    assert design.forecast.advice in " ".join(text.split())
    assert design.forecast.advice.startswith("Weigh and measure after building")


def test_size_shows_where_the_pressure_goes(design: pipeline.Design) -> None:
    rows = [" ".join(line.split()) for line in text_of(design).splitlines()]
    clean = design.forecast.clean
    for share in clean.shares:
        drop = float(share.pressure_drop)
        assert f"{share.name} {figure(drop)} {figure(100 * drop / clean.suction, 2)}" in rows


def test_size_shows_the_dimensions(design: pipeline.Design) -> None:
    rows = [" ".join(line.split()) for line in text_of(design).splitlines()]
    d = design.stages[0].dimensions
    assert f"barrel diameter {d.body.diameter_mm:.1f}" in rows
    assert f"slot height {d.slot.height_mm:.1f}" in rows
    assert f"width {d.slot.width_mm:.1f}" in rows
    assert f"vortex finder bore {d.finder.bore_mm:.1f}" in rows


def test_stages_are_told_apart_and_their_cost_adds_up(design: pipeline.Design) -> None:
    one = design.stages[0].forecast
    two = with_stages(design, 1, 4)
    size, catch, cost = sentences(two)
    assert "one cyclone, " in size
    assert ", then 4 equal cyclones side by side, " in size
    cut = f"{figure(one.cut_size.central * 1e6)} um"
    assert f"of grains of {cut}, then {cut} it keeps half" in catch
    assert f" {figure(2 * one.pressure_drop.central)} Pa " in cost
    for title in ("Dimensions of stage 2;", "Cut size of stage 2,", "Pressure drop of stage 2,"):
        assert title in text_of(two)


def test_the_gravest_finding_comes_first(design: pipeline.Design) -> None:
    findings = tuple(
        Finding(code=f"invented-{level}", severity=level, part="lid", what=f"A {level}.")
        for level in (Severity.NOTE, Severity.STOP, Severity.WARN)
    )
    text = text_of(replace(design, findings=findings))
    assert text.index("A stop.") < text.index("A warn.") < text.index("A note.")
    assert exit_code_of(findings) == 1
    assert exit_code_of(findings[::2]) == 0


def test_no_findings_is_said(design: pipeline.Design) -> None:
    assert "Rules: nothing to say." in text_of(replace(design, findings=()))


def test_size_names_every_caution(design: pipeline.Design) -> None:
    text = " ".join(text_of(design).split())
    assert all(caution.title in text for caution in cautions(**COMPACT_ALL))  # type: ignore[arg-type]


def test_build_ends_with_the_kit_its_pieces_and_the_cautions(run: Run, profile: Path) -> None:
    text = run("build", profile, "--out", "kits/one", mishap="kit").stdout
    assert text.startswith("The kit of luthier-sander is in kits/one\n")
    rows = [" ".join(line.split()) for line in text.splitlines()]
    assert "Pieces: 3 prints, 0.500 kg of PETG" in rows
    assert "barrel-1 Barrel, first slice 2 150.0 x 151.5 x 90.2 210 10" in rows
    assert "lid Lid 1 170.0 x 170.0 x 6.0 80.0" in rows
    flat = " ".join(rows)
    for caution in cautions(**COMPACT_ALL):  # type: ignore[arg-type]
        assert f"{caution.title}. {caution.text}" in flat
    assert flat.index("Findings") < flat.index("Cautions")


@pytest.mark.parametrize("table", TABLES)
def test_list_shows_every_row_and_every_source(run: Run, table: str) -> None:
    lines = run("list", table).stdout.splitlines()
    names = [re.split(r"  +", line.strip())[0] for line in lines]
    heading = next(line for line in lines if line.split() == ["name", "source"])
    column = heading.index("source")
    sources = " ".join(line[column:].strip() for line in lines[lines.index(heading) :])
    for name, row in TABLES[table]().items():
        assert name in names
        assert " ".join(row.source.split()) in sources
    assert table in run("list", "--help").stdout


@pytest.mark.parametrize(
    ("value", "written"),
    [
        (0, "0"),
        (0.02, "0.0200"),
        (9.999, "10.00"),
        (1243.4, "1243"),
        (2300000.0, "2300000"),
        (-0.5, "-0.500"),
        (None, ""),
    ],
)
def test_figures_have_three_digits_and_no_exponent(value: float | None, written: str) -> None:
    assert figure(value) == written


@pytest.mark.parametrize(
    ("value", "written"), [(0.375, "0.375"), (40.0, "40"), (100.0, "100"), (0, "0"), (None, "")]
)
def test_entries_have_no_zeros_at_the_end(value: float | None, written: str) -> None:
    assert entry(value) == written


@pytest.mark.parametrize(
    ("share", "written"), [(0.967, "96.7"), (0.9994, "99.9"), (0.99961, "over 99.9"), (1, "100")]
)
def test_a_share_never_rounds_up_to_all(share: float, written: str) -> None:
    assert percent(share) == written

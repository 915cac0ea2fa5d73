"""What a person reads says the same as the data it is made of."""

from __future__ import annotations

import io
import json
import re
from dataclasses import replace
from typing import TYPE_CHECKING

import pytest

from gyrecut import catalogue, pipeline
from gyrecut.cli.figures import entry, figure, percent
from gyrecut.cli.findings import exit_code_of
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


def test_size_begins_with_size_catch_and_cost(run: Run, profile: Path) -> None:
    (stage,) = json.loads(run("size", profile, "--json").stdout)["result"]["stages"]
    body, prediction = stage["dimensions"]["body"], stage["prediction"]
    text = " ".join(run("size", profile).stdout.split())
    assert text.startswith(
        f"luthier-sander: one cyclone, {body['diameter_mm']:.0f} mm across inside and "
        f"{body['total_height_mm']:.0f} mm tall from lid to dust outlet. "
        f"First estimate of the catch: half of the grains of "
        f"{prediction['cut_size_lapple'] * 1e6:.2f} um, more of the larger ones; "
        f"it keeps {prediction['mass_kept'] * 100:.1f} % of this dust by mass. "
        f"First estimate of the cost: {prediction['pressure_drop_shepherd_lapple']:.0f} Pa of "
        "suction at 140 m3/h. "
    )
    assert (
        "First prediction: first estimate (Lapple cut size, Shepherd-Lapple pressure drop)" in text
    )


def test_size_shows_the_dimensions(design: pipeline.Design) -> None:
    rows = [" ".join(line.split()) for line in text_of(design).splitlines()]
    d = design.stages[0].dimensions
    assert f"barrel diameter {d.body.diameter_mm:.1f}" in rows
    assert f"slot height {d.slot.height_mm:.1f}" in rows
    assert f"width {d.slot.width_mm:.1f}" in rows
    assert f"vortex finder bore {d.finder.bore_mm:.1f}" in rows


def test_stages_are_told_apart_and_their_cost_adds_up(design: pipeline.Design) -> None:
    one = design.stages[0].prediction.pressure_drop_shepherd_lapple
    two = with_stages(design, 1, 4)
    size, catch, cost = sentences(two)
    assert "one cyclone, " in size
    assert ", then 4 equal cyclones side by side, " in size
    assert "the first stage keeps" in catch
    assert f" {figure(2 * one)} Pa " in cost
    assert "Dimensions of stage 2;" in text_of(two)


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
    assert "barrel-1 Barrel, first slice 2 150.0 x 151.5 x 90.2 210" in rows
    assert "lid Lid 1 170.0 x 170.0 x 6.0 80.0" in rows
    flat = " ".join(rows)
    for caution in cautions(**COMPACT_ALL):  # type: ignore[arg-type]
        assert f"{caution.title}. {caution.text}" in flat
    assert flat.index("Findings") < flat.index("Cautions")


@pytest.mark.parametrize("table", ["families", "dusts", "polymers", "hoses", "fasteners"])
def test_list_shows_every_row_and_every_source(run: Run, table: str) -> None:
    lines = run("list", table).stdout.splitlines()
    names = [re.split(r"  +", line.strip())[0] for line in lines]
    heading = next(line for line in lines if line.split() == ["name", "source"])
    column = heading.index("source")
    sources = " ".join(line[column:].strip() for line in lines[lines.index(heading) :])
    for name, row in getattr(catalogue, table)().items():
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

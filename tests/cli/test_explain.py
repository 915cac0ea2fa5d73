"""`size --explain`: whoever works the shown formulas out from the shown numbers gets the result."""

from __future__ import annotations

import io
import json
import math
import re
from dataclasses import replace
from functools import partial
from typing import TYPE_CHECKING, Any

import numpy as np
import pytest
from tests.cli.conftest import REPOSITORY

from gyrecut import catalogue, pipeline
from gyrecut.cli.explain import explained, explanations, with_explanations
from gyrecut.cli.explain_terms import Explanation, source_of
from gyrecut.cli.size_report import show_design
from gyrecut.correlations.barth import barth
from gyrecut.profile import load_profile

if TYPE_CHECKING:
    from pathlib import Path

    from tests.cli.conftest import Run

# What a formula may use beside its terms.
KNOWN = {
    "sqrt": np.sqrt, "exp": np.exp, "ln": np.log, "min": min, "max": max, "sum": np.sum,
    "pi": math.pi,
}  # fmt: skip
IN_WORDS = {"90 % range of the share kept"}  # drawn, not worked out
SHIPPED = ("luthier-sander", "joinery-planer", "casting-bench")
TWO_STAGES = """\
stages:
  - {proportions: 1d3d, inlet_velocity: 14 m/s}
  - {proportions: stairmand-high-efficiency, inlet_velocity: 16 m/s, count: 4}
"""


def design_of(path: Path) -> pipeline.Design:
    return pipeline.design(load_profile(path))


def shipped(name: str) -> Path:
    return REPOSITORY / "profiles" / f"{name}.yaml"


def changed(tmp_path: Path, *changes: tuple[str, str]) -> Path:
    text = shipped("luthier-sander").read_text()
    for pattern, instead in changes:
        text, count = re.subn(pattern, instead, text, flags=re.MULTILINE)
        assert count == 1, pattern
    path = tmp_path / "changed.yaml"
    path.write_text(text)
    return path


def worked_out(formula: str, terms: dict[str, Any]) -> float:
    # the formulas are our own output; nothing but arithmetic and the names above is reachable
    text = formula.replace("^", "**")
    return float(eval(text, {"__builtins__": {}}, {**KNOWN, **terms}))  # noqa: S307


def check(line: Explanation) -> None:
    terms = {
        one.symbol: np.asarray(one.value) if isinstance(one.value, tuple) else one.value
        for one in line.terms
    }
    assert len(terms) == len(line.terms), line.what
    names = set(re.findall(r"[A-Za-z_]\w*", line.formula)) - KNOWN.keys()
    assert names == terms.keys(), line.what
    # a source's curve is drawn by cubic pieces, within 1e-4 of the shut-off suction
    off = 1e-4 * float(terms["p_0"]) if line.what == "Suction of the source" else 0.0
    expected = pytest.approx(line.result.value, rel=1e-9, abs=off)
    assert worked_out(line.formula, terms) == expected, line.what


@pytest.mark.parametrize("name", SHIPPED)
def test_every_formula_gives_its_result(name: str) -> None:
    lines = explanations(design_of(shipped(name)))
    assert {line.what for line in lines} > IN_WORDS
    for line in lines:
        if line.what not in IN_WORDS:
            check(line)


def test_every_formula_gives_its_result_with_two_stages_and_a_leak(tmp_path: Path) -> None:
    path = changed(
        tmp_path,
        (r"^stages:(.|\n)*?(?=\noutlet:)", TWO_STAGES),
        (r"^  temperature:", "  bin_leak: 2 %\n  temperature:"),
        (r"^  kind: hardwood-sanding", "  kind: mdf-sanding"),
    )
    lines = explanations(design_of(path))
    for line in lines:
        if line.what not in IN_WORDS:
            check(line)
    said = {line.what for line in lines}
    assert "Cut size of stage 2: shape and slip of the grains" in said
    assert "Share of the dust's mass kept by stage 2" in said
    assert "Share of the dust's mass kept by all stages" in said


@pytest.mark.parametrize("velocity", [6, 8, 9, 14])
def test_models_are_explained_on_either_side_of_the_turbulent_annulus(
    tmp_path: Path, velocity: int
) -> None:
    path = changed(
        tmp_path,
        (r"^  flow: 140 m3/h", "  flow: 60 m3/h"),
        (r"^  source: .*\n", ""),
        (r"inlet_velocity: 18 m/s", f"inlet_velocity: {velocity} m/s"),
    )
    lines = explanations(design_of(path))
    for line in lines:
        if line.what not in IN_WORDS:
            check(line)
    (reynolds,) = (
        line.result.value for line in lines if line.what.startswith("Annulus Reynolds number")
    )
    assert isinstance(reynolds, float)
    said = " ".join(line.what for line in lines)
    assert ("Barth: velocity at the core" in said) is (reynolds > 20_000)
    assert ("smooth wall: velocity at the core" in said) is (reynolds < 25_000)


def test_a_measured_curve_is_explained_by_its_points(tmp_path: Path) -> None:
    points = (
        "  source: {points: [{flow: 0 m3/h, suction: 18 kPa}, {flow: 90 m3/h, suction: 9 kPa},"
        " {flow: 150 m3/h, suction: 0.5 kPa}]}"
    )
    design = design_of(changed(tmp_path, (r"^  source: .*", points)))
    (line,) = (one for one in explanations(design) if one.what == "Suction of the source")
    values = {term.symbol: term.value for term in line.terms}
    assert values["p_i"] == (18000.0, 9000.0, 500.0)
    assert values["Q_i"] == pytest.approx((0.0, 0.025, 150 / 3600))
    assert line.result.value == design.forecast.clean.suction


def test_without_a_source_or_a_feed_nothing_is_said_of_them(tmp_path: Path) -> None:
    path = changed(tmp_path, (r"^  source: .*\n", ""), (r"^  feed: .*\n", ""))
    lines = explanations(design_of(path))
    said = [line.what for line in lines]
    assert "Suction that a source has to give at the target flow" in said
    for silent in ("Suction of the source", "Dust in the air", "Working time to a full bin"):
        assert silent not in said


def test_results_are_those_of_the_forecast() -> None:
    design = design_of(shipped("luthier-sander"))
    results = {line.what: line.result.value for line in explanations(design)}
    (stage,), forecast = design.stages, design.forecast
    cut, drop = stage.forecast.cut_size, stage.forecast.pressure_drop
    said = {word.model: word.value for word in (*cut.words, *drop.words)}
    assert results["Cut size: shape and slip of the grains"] == cut.central
    assert results["Cut size: fine end of the band"] == cut.low
    assert results["Pressure drop, the two trusted models together"] == drop.central
    assert (
        results["Shepherd and Lapple: pressure drop with clean air"]
        == (said["Shepherd and Lapple"])
    )
    assert results["Share of the dust's mass kept"] == forecast.catch.kept
    assert results["90 % range of the share kept"] == (
        forecast.catch.spread.low,
        forecast.catch.spread.high,
    )
    assert results["Working time to a full bin"] == forecast.catch.bin_fill_time
    assert results["Suction to choose a source by"] == forecast.safe_suction


def test_another_number_in_the_result_would_be_noticed() -> None:
    line = explanations(design_of(shipped("luthier-sander")))[0]
    wrong = replace(line, result=replace(line.result, value=1.001 * float(line.result.value)))  # type: ignore[arg-type]
    check(line)
    with pytest.raises(AssertionError):
        check(wrong)


def test_the_text_can_be_worked_out_as_it_stands() -> None:
    design = design_of(shipped("luthier-sander"))
    stream = io.StringIO()
    with_explanations(partial(show_design, design), explanations(design), stream)
    text = stream.getvalue()
    assert text.startswith("luthier-sander: ")
    # symbol = formula, = the formula with numbers, = the result and its unit
    shown = re.findall(r"^  \w+ = .+\n +  = (.+)\n +  = (\S+)", text, re.MULTILINE)
    worked = [(formula, result) for formula, result in shown if "_i" not in formula]
    assert len(worked) > 20
    for formula, result in worked:
        # five digits go in; the source's curve falls steeply where it meets the system
        assert worked_out(formula, {}) == pytest.approx(float(result), rel=1e-3), formula


def test_sources_are_those_of_docstring_and_catalogue() -> None:
    design = design_of(shipped("luthier-sander"))
    lines = {line.what: line for line in explanations(design)}
    assert all(line.source.endswith(".") for line in lines.values())
    assert "Brennstoff-Waerme-Kraft 8 (1956) 1" in lines["Barth: velocity at the core"].source
    vacuum, dust = catalogue.sources()["shop-vacuum"], catalogue.dusts()["hardwood-sanding"]
    assert vacuum.source in lines["Suction of the source"].source
    assert dust.source in lines["Share of the dust's mass kept"].source
    assert all("`" not in line.source for line in lines.values())


def test_the_source_of_a_correlation_is_read_from_its_docstring() -> None:
    assert source_of(barth, barth) == (
        "Barth, Berechnung und Auslegung von Zyklonabscheidern. Brennstoff-Waerme-Kraft 8 (1956) "
        "1, in the form of Hoffmann and Stein 2008, ch. 4 and 5, from memory."
    )
    with pytest.raises(ValueError, match="design_of names no source"):
        source_of(design_of)


def test_json_has_the_same_and_only_when_asked(run: Run, profile: Path) -> None:
    plain = json.loads(run("size", profile, "--json").stdout)["result"]
    asked = json.loads(run("size", profile, "--json", "--explain").stdout)["result"]
    design = design_of(profile)
    assert "explanations" not in plain
    assert {key: asked[key] for key in plain} == plain
    document = json.loads(json.dumps(explained({}, explanations(design))))
    assert asked["explanations"] == document["explanations"]
    first = asked["explanations"][0]
    assert list(first) == ["what", "formula", "terms", "result", "source"]
    terms = {one["symbol"]: one["value"] for one in first["terms"]}
    assert worked_out(first["formula"], terms) == pytest.approx(first["result"]["value"])

"""The shipped profiles are examples: nothing warns, each line is commented, the air suffices."""

from __future__ import annotations

import json
import re
from typing import TYPE_CHECKING

import pytest
from tests.cli.conftest import REPOSITORY

from gyrecut import catalogue, pipeline
from gyrecut.findings import Severity
from gyrecut.profile import load_profile

if TYPE_CHECKING:
    from pathlib import Path

    from tests.cli.conftest import Run

SHIPPED = sorted(path.stem for path in (REPOSITORY / "profiles").glob("*.yaml"))


def of(name: str) -> Path:
    return REPOSITORY / "profiles" / f"{name}.yaml"


def test_there_are_three() -> None:
    assert SHIPPED == ["casting-bench", "joinery-planer", "luthier-sander"]


@pytest.mark.parametrize("name", SHIPPED)
def test_nothing_stops_or_warns(name: str) -> None:
    design = pipeline.design(load_profile(of(name)))
    grave = [found for found in design.findings if found.severity is not Severity.NOTE]
    assert grave == []


@pytest.mark.parametrize("name", SHIPPED)
def test_the_source_moves_about_the_air_it_is_sized_for(name: str) -> None:
    profile = load_profile(of(name))
    air, settled = profile.air, pipeline.design(profile).forecast.clean
    assert air.source in catalogue.sources()
    assert air.flow is not None
    assert settled.flow == pytest.approx(air.flow, rel=0.12)
    assert air.pick_up is not None
    assert air.pick_up.relief_area > 0
    assert air.filter is not None
    assert air.filter.limit is not None


@pytest.mark.parametrize("name", SHIPPED)
def test_every_line_has_a_comment(name: str) -> None:
    lines = of(name).read_text().splitlines()
    assert [line for line in lines if line and not re.search(r"# \w", line)] == []


def with_other_air(tmp_path: Path, pattern: str, instead: str) -> Path:
    text, count = re.subn(pattern, instead, of("luthier-sander").read_text(), flags=re.MULTILINE)
    assert count == 1
    path = tmp_path / "other.yaml"
    path.write_text(text)
    return path


@pytest.mark.parametrize(
    ("source", "says"),
    [
        ("on-board-blower", "moves far less air than the separator is sized for"),
        ("{shut_off: 50 kPa, open_flow: 400 m3/h}", "moves far more air"),
    ],
)
def test_a_source_that_moves_other_air_is_warned_of(
    run: Run, tmp_path: Path, source: str, says: str
) -> None:
    path = with_other_air(tmp_path, r"^  source: [\w-]+", f"  source: {source}")
    done = run("size", path, "--json")
    result = json.loads(done.stdout)["result"]
    (found,) = (one for one in result["findings"] if one["code"] == "flow-far-from-target")
    assert done.returncode == 0
    assert found["severity"] == "warn"
    assert says in found["what"]
    assert found["limit"] == pytest.approx(140)
    assert found["measured"] == pytest.approx(result["forecast"]["flow"] * 3600)


@pytest.mark.parametrize(
    ("target", "warned"), [(147, False), (150, True), (110, False), (108, True)]
)
def test_the_warning_begins_at_15_percent(tmp_path: Path, target: int, warned: bool) -> None:  # noqa: FBT001
    # a body of a given size: what settles does not move with the target
    path = with_other_air(tmp_path, r"^  flow: 140 m3/h", f"  flow: {target} m3/h")
    path.write_text(path.read_text().replace("inlet_velocity: 18 m/s", "body_diameter: 147 mm"))
    design = pipeline.design(load_profile(path))
    settled = design.forecast.flow * 3600
    assert (abs(settled / target - 1) > 0.15) is warned
    assert ("flow-far-from-target" in {found.code for found in design.findings}) is warned


def test_without_a_target_or_a_source_nothing_is_far(tmp_path: Path) -> None:
    for pattern in (r"^  flow: .*\n", r"^  source: .*\n"):
        design = pipeline.design(load_profile(with_other_air(tmp_path, pattern, "")))
        assert "flow-far-from-target" not in {found.code for found in design.findings}

"""What a newcomer finds: commands that can be copied, pinned versions, an orderly top level."""

from __future__ import annotations

import os
import re
import tomllib

import pytest
from tests.cli.conftest import REPOSITORY

from gyrecut import __version__
from gyrecut.kit.cautions import cautions

README = (REPOSITORY / "README.md").read_text()
COMMAND = re.compile(r"^<!-- command: (\w+) -->\n```sh\n(.+?)^```$", re.MULTILINE | re.DOTALL)
ALLOWED = {
    "README.md", "DEVELOPERS.md", "CHANGELOG.md", "LICENSE", "pyproject.toml",
    "generator", "profiles", "tests", "out",
}  # fmt: skip


def commands() -> dict[str, str]:
    return dict(COMMAND.findall(README))


def test_readme_opens_with_the_job_in_one_paragraph() -> None:
    title, job, heading = README.split("\n\n")[:3]
    assert title == "# gyrecut"
    assert heading == "## Set up"
    assert len(job.split()) > 50


def test_readme_has_two_set_up_commands() -> None:
    assert list(commands()) == ["build", "tests"]


@pytest.mark.parametrize("name", ["build", "tests"])
def test_set_up_command_stands_by_itself(name: str) -> None:
    command = commands()[name]
    lines = command.rstrip("\n").split("\n")
    assert all(line.endswith(" &&") for line in lines[:-1])  # stops at the first failure
    for package in ("libgl1", "libegl1", "python3-venv"):
        assert package in command
    assert "-c tests/constraints.txt" in command
    for path in re.findall(r"(?:tests|profiles)/[\w.-]+", command):
        assert (REPOSITORY / path).is_file()
    assert "sudo" not in command.replace("$(command -v sudo) ", "")
    assert "://" not in command


def test_test_command_runs_every_check() -> None:
    command = commands()["tests"]
    for tool in ("ruff check", "ruff format --check", "mypy", "lint-imports", "pytest"):
        assert f".venv/bin/{tool}" in command


def test_ci_runs_what_readme_says() -> None:
    script = REPOSITORY / ".ci" / "run"
    assert os.access(script, os.X_OK)
    called = re.findall(r"^run_readme_command (\w+)$", script.read_text(), re.MULTILINE)
    assert sorted(called) == sorted(commands())


def test_every_caution_stands_in_readme() -> None:
    shown = cautions(polymer="PETG", softening_temperature=338.15, dust_is_combustible=True)
    text = " ".join(README.split())
    assert [caution.title for caution in shown if caution.title not in text] == []


def test_constraints_hold_names_and_versions_only() -> None:
    lines = (REPOSITORY / "tests" / "constraints.txt").read_text().splitlines()
    pins = [line for line in lines if not line.startswith("#")]
    assert [pin for pin in pins if not re.fullmatch(r"[a-z0-9-]+==[0-9][0-9a-z.]*", pin)] == []
    names = [pin.partition("==")[0] for pin in pins]
    assert names == sorted(set(names))


def test_every_direct_dependency_is_pinned() -> None:
    pins = (REPOSITORY / "tests" / "constraints.txt").read_text()
    project = tomllib.loads((REPOSITORY / "pyproject.toml").read_text())["project"]
    for wanted in (*project["dependencies"], *project["optional-dependencies"]["test"]):
        name = re.split(r"[<>=!~ ]", wanted)[0].lower().replace(".", "-")
        assert f"\n{name}==" in pins


def test_top_level_holds_only_what_belongs_there() -> None:
    found = {path.name for path in REPOSITORY.iterdir() if not path.name.startswith(".")}
    assert found - ALLOWED == set()
    assert {name for name in ALLOWED if not (REPOSITORY / name).exists()} == set()


def test_changelog_knows_this_version() -> None:
    assert f"\n## {__version__}" in (REPOSITORY / "CHANGELOG.md").read_text()

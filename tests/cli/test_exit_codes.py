"""Each exit code README.md lists, seen from outside."""

from __future__ import annotations

import json
import os
import re
import signal
import subprocess
from pathlib import Path
from typing import TYPE_CHECKING

import pytest
from tests.cli.conftest import REPOSITORY, TABLES, clean_environment, command_line

from gyrecut import errors
from gyrecut.cli import main

if TYPE_CHECKING:
    from tests.cli.conftest import Run


def test_readme_lists_exactly_the_codes_there_are() -> None:
    listed = re.findall(r"^\| (\d+) \| \w", (REPOSITORY / "README.md").read_text(), re.MULTILINE)
    named = {
        errors.FINE,
        errors.FINDING_SAYS_STOP,
        errors.USAGE,
        errors.PROFILE_INVALID,
        errors.BUILD_FAILED,
        errors.OUR_FAULT,
        main.INTERRUPTED,
        main.READER_LEFT,
    }
    assert named == {0, 1, 2, 3, 4, 70, 130, 141}
    assert [int(code) for code in listed] == sorted(named)


@pytest.mark.parametrize(
    "arguments",
    [["--help"], ["-h"], ["--version"], ["build", "--help"], ["list", "hoses"], ["schema"]],
)
def test_0_where_there_is_an_answer(run: Run, arguments: list[str]) -> None:
    done = run(*arguments)
    assert (done.returncode, done.stderr) == (0, "")
    assert done.stdout


def test_0_for_the_starter_profile_as_it_is_written(run: Run) -> None:
    assert run("new", "shop.yaml").returncode == 0
    done = run("size", "shop.yaml")
    assert done.returncode == 0, done.stdout + done.stderr


@pytest.mark.parametrize(("command", "mishap"), [("size", "stop"), ("build", "kit_to_stop")])
def test_1_where_a_finding_says_stop(run: Run, profile: Path, command: str, mishap: str) -> None:
    done = run(command, profile, mishap=mishap)
    assert done.returncode == 1
    assert "The lid [invented] is too thin. (walls.lid)" in done.stdout
    assert "Do: make it thicker" in done.stdout
    assert "gyrecut build" not in done.stderr  # the hint to go on


@pytest.mark.parametrize(
    ("arguments", "message"),
    [
        (["paint"], "No such command 'paint'"),
        (["size"], "Missing argument 'PROFILE'"),
        (["size", "--colour", "x.yaml"], "No such option: --colour"),
        (["size", "a.yaml", "b.yaml"], "unexpected extra argument"),
        (["build", "x.yaml", "--out"], "--out"),
        (["list", "bolts"], ", ".join(TABLES)),
        (["new", "x.yaml", "--name", "../x"], '"../x"; allowed: 1 to 64 small letters'),
    ],
)
def test_2_for_wrong_usage(run: Run, arguments: list[str], message: str) -> None:
    done = run(*arguments)
    assert done.returncode == 2
    assert done.stdout == ""
    assert message in done.stderr
    assert re.search(r"see: gyrecut[ a-z]* --help$", done.stderr.strip())


def test_2_without_a_command_and_the_help_on_stderr(run: Run) -> None:
    done = run()
    assert (done.returncode, done.stdout) == (2, "")
    assert "Exit codes: 0 fine" in done.stderr


def test_2_for_a_path_that_is_taken(run: Run, tmp_path: Path) -> None:
    taken = tmp_path / "shop.yaml"
    taken.write_text("mine")
    done = run("new", "shop.yaml")
    assert done.returncode == 2
    assert "shop.yaml exists and is left as it is" in done.stderr
    assert taken.read_text() == "mine"


@pytest.mark.parametrize("command", ["size", "build"])
def test_3_for_an_invalid_profile_with_every_problem(
    run: Run, profile: Path, tmp_path: Path, command: str
) -> None:
    text = profile.read_text()
    broken = re.sub(r"^( *flow:) [^#\n]*", r"\1 140 mm ", text, count=1, flags=re.MULTILINE)
    broken = broken.replace("\nmaterial:", "\nglue: none\nmaterial:", 1)
    (tmp_path / "broken.yaml").write_text(broken)
    line = 1 + text[: text.index("flow:")].count("\n")
    done = run(command, "broken.yaml")
    assert (done.returncode, done.stdout) == (3, "")
    assert f"broken.yaml:{line}:" in done.stderr
    assert "glue" in done.stderr


def test_3_for_a_profile_that_is_not_there(run: Run) -> None:
    done = run("size", "nowhere.yaml")
    assert (done.returncode, done.stdout) == (3, "")
    assert "nowhere.yaml" in done.stderr


def test_4_where_the_build_fails(run: Run, profile: Path) -> None:
    done = run("build", profile, mishap="build_fails")
    assert (done.returncode, done.stdout) == (4, "")
    assert done.stderr == "gyrecut: the barrel did not come out as one solid\n"


def test_4_where_the_kit_may_not_stand_and_before_any_work(
    run: Run, profile: Path, tmp_path: Path
) -> None:
    (tmp_path / "taken").write_text("mine")
    done = run("build", profile, "--out", "taken", mishap="no_cadquery")
    assert done.returncode == 4
    assert "taken is a file, not a folder" in done.stderr


def test_4_where_a_starter_profile_cannot_be_written(run: Run) -> None:
    done = run("new", "no-such-folder/shop.yaml")
    assert (done.returncode, done.stdout) == (4, "")
    assert "no-such-folder/shop.yaml could not be written: No such file" in done.stderr


@pytest.mark.skipif(not Path("/dev/full").exists(), reason="needs a device that is always full")
@pytest.mark.parametrize("form", [[], ["--json"]])
def test_4_where_the_result_cannot_be_written(form: list[str]) -> None:
    with Path("/dev/full").open("w") as full:
        done = subprocess.run(
            command_line("list", "hoses", *form),
            env=clean_environment(),
            stdout=full,
            stderr=subprocess.PIPE,
            text=True,
            check=False,
        )
    assert done.returncode == 4
    assert done.stderr == "gyrecut: the result could not be written: No space left on device\n"


def test_70_for_our_own_fault_in_one_line_that_says_how_to_report(run: Run, profile: Path) -> None:
    done = run("size", profile, mishap="fault")
    assert (done.returncode, done.stdout) == (70, "")
    assert done.stderr.count("\n") == 1
    assert "a fault of gyrecut, not of yours (ZeroDivisionError: invented fault)" in done.stderr
    assert "gyrecut --version" in done.stderr
    assert "GYRECUT_DEBUG=1" in done.stderr


@pytest.mark.parametrize(("value", "tracebacks"), [("1", 1), ("0", 0), ("", 0)])
def test_70_with_the_traceback_for_whoever_asks(
    run: Run, profile: Path, value: str, tracebacks: int
) -> None:
    done = run("size", profile, mishap="fault", GYRECUT_DEBUG=value)
    assert done.returncode == 70
    assert done.stderr.count("Traceback (most recent call last)") == tracebacks


def test_70_for_a_number_json_cannot_hold(run: Run, profile: Path) -> None:
    assert run("size", profile, "--json", mishap="not_a_number").returncode == 70


@pytest.mark.parametrize("form", [[], ["--json"]])
def test_130_on_ctrl_c(profile: Path, tmp_path: Path, form: list[str]) -> None:
    with subprocess.Popen(
        command_line("build", profile, *form, mishap="long_build"),
        cwd=tmp_path,
        env=clean_environment(),
        stdout=subprocess.PIPE,
        stderr=subprocess.PIPE,
        text=True,
    ) as process:
        assert process.stderr is not None
        assert process.stderr.readline() == "solids: 0 of 2\n"
        process.send_signal(signal.SIGINT)
        out, err = process.communicate(timeout=30)
    assert (process.returncode, err) == (130, "gyrecut: stopped by Ctrl-C\n")
    if form:
        assert json.loads(out)["error"]["kind"] == "interrupted"
    else:
        assert out == ""


def test_130_in_a_real_build_leaves_the_earlier_kit(
    run: Run, profile: Path, tmp_path: Path
) -> None:
    first = run("build", profile)
    assert first.returncode == 0, first.stderr
    kit = tmp_path / "out" / "luthier-sander"
    earlier = {path: path.read_bytes() for path in kit.rglob("*") if path.is_file()}
    assert kit / "manifest.json" in earlier
    with subprocess.Popen(
        command_line("build", profile, mishap="interruptible"),
        cwd=tmp_path,
        env=clean_environment(),
        stdout=subprocess.PIPE,
        stderr=subprocess.PIPE,
        text=True,
    ) as process:
        assert process.stderr is not None
        while not process.stderr.readline().startswith("checks: 1 of"):
            assert process.poll() is None
        process.send_signal(signal.SIGINT)
        out, err = process.communicate(timeout=60)
    assert (process.returncode, out) == (130, "")
    assert err.endswith("gyrecut: stopped by Ctrl-C\n")
    assert {path: path.read_bytes() for path in kit.rglob("*") if path.is_file()} == earlier
    assert [path.name for path in kit.parent.iterdir()] == ["luthier-sander"]


@pytest.mark.parametrize("form", [[], ["--json"]])
def test_141_where_nobody_reads_the_result(form: list[str]) -> None:
    reading, writing = os.pipe()
    os.close(reading)
    try:
        done = subprocess.run(
            command_line("list", "dusts", *form),
            env=clean_environment(),
            stdout=writing,
            stderr=subprocess.PIPE,
            text=True,
            check=False,
        )
    finally:
        os.close(writing)
    assert (done.returncode, done.stderr) == (141, "")


def test_messages_nobody_reads_change_no_code() -> None:
    reading, writing = os.pipe()
    os.close(reading)
    try:
        done = subprocess.run(
            command_line("list", "bolts"),
            env=clean_environment(),
            stdout=subprocess.PIPE,
            stderr=writing,
            text=True,
            check=False,
        )
    finally:
        os.close(writing)
    assert (done.returncode, done.stdout) == (2, "")

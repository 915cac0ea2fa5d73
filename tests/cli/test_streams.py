"""Results on stdout, the rest on stderr, and nothing on either that it cannot show."""

from __future__ import annotations

import os
import pty
import re
import subprocess
from typing import TYPE_CHECKING

import pytest
from tests.cli.conftest import clean_environment, command_line

if TYPE_CHECKING:
    from pathlib import Path

    from tests.cli.conftest import Run

LOOK = re.compile(r"\x1b\[[0-9;]*m")
ESCAPE = "\x1b"


def on_terminal(
    *arguments: str | Path, mishap: str, stream: str, folder: Path, **environment: str
) -> str:
    """Run with `stream` on a terminal and the other one on none; give what the terminal got."""
    ours, theirs = pty.openpty()
    other = "stderr" if stream == "stdout" else "stdout"
    with subprocess.Popen(
        command_line(*arguments, mishap=mishap),
        cwd=folder,
        env=clean_environment(**{"TERM": "xterm", **environment}),
        stdin=subprocess.DEVNULL,
        **{stream: theirs, other: subprocess.DEVNULL},  # type: ignore[call-overload]
    ) as process:
        os.close(theirs)
        seen = b""
        while chunk := _read(ours):
            seen += chunk
        process.wait(timeout=60)
    os.close(ours)
    assert process.returncode in {0, 1}
    return seen.decode()


def _read(terminal: int) -> bytes:
    try:
        return os.read(terminal, 65536)
    except OSError:  # Linux says so when the last writer has closed a terminal
        return b""


def test_progress_and_hints_go_to_stderr(run: Run, profile: Path) -> None:
    build = run("build", profile, mishap="kit")
    assert build.stderr.splitlines() == [
        "solids: 0 of 2", "solids: 2 of 2", "files: 1 of 1",
    ]  # fmt: skip
    assert "solids" not in build.stdout
    assert "The kit of luthier-sander is in out/luthier-sander\n" in build.stdout
    size = run("size", profile)
    assert size.stderr == f"When it suits you: gyrecut build {profile}\n"
    assert size.stdout.startswith("luthier-sander: one cyclone, ")
    new = run("new", "my shop.yaml")
    assert new.stdout == "my shop.yaml\n"
    assert "gyrecut size 'my shop.yaml'\n" in new.stderr


@pytest.mark.parametrize(
    "arguments", [["build", "PROFILE"], ["size", "PROFILE"], ["new"], ["list", "hoses"], ["schema"]]
)
def test_quiet_hushes_stderr_and_leaves_the_result(
    run: Run, profile: Path, tmp_path: Path, arguments: list[str]
) -> None:
    given = [profile if word == "PROFILE" else word for word in arguments]
    loud = run(*given, mishap="kit")
    (tmp_path / "my-separator.yaml").unlink(missing_ok=True)
    quiet = run(*given, "--quiet", mishap="kit")
    assert (quiet.returncode, quiet.stderr) == (0, "")
    assert quiet.stdout == loud.stdout != ""


def test_quiet_never_hushes_an_error(run: Run) -> None:
    done = run("size", "nowhere.yaml", "--quiet")
    assert done.returncode == 3
    assert "nowhere.yaml" in done.stderr


@pytest.mark.parametrize("command", ["build", "size"])
def test_no_escape_without_a_terminal(run: Run, profile: Path, command: str) -> None:
    done = run(command, profile, mishap="kit_to_stop", FORCE_COLOR="1", TERM="xterm")
    assert done.returncode == 1
    assert ESCAPE not in done.stdout + done.stderr


def test_colour_on_a_terminal(profile: Path, tmp_path: Path) -> None:
    seen = on_terminal("size", profile, mishap="stop", stream="stdout", folder=tmp_path)
    assert LOOK.search(seen)


def test_no_color_counts_when_it_is_set(profile: Path, tmp_path: Path) -> None:
    seen = on_terminal(
        "size", profile, mishap="stop", stream="stdout", folder=tmp_path, NO_COLOR="1"
    )
    assert "thin." in seen  # a narrow column breaks the sentence before it
    assert ESCAPE not in seen


def test_no_color_does_not_count_when_it_is_empty(profile: Path, tmp_path: Path) -> None:
    seen = on_terminal(
        "size", profile, mishap="stop", stream="stdout", folder=tmp_path, NO_COLOR=""
    )
    assert LOOK.search(seen)


def test_a_bar_for_each_stage_on_a_terminal(profile: Path, tmp_path: Path) -> None:
    seen = on_terminal("build", profile, mishap="kit", stream="stderr", folder=tmp_path)
    drawn = LOOK.sub("", seen)
    assert re.search(r"solids +\S*━+ +2/2", drawn)
    assert re.search(r"files +\S*━+ +1/1", drawn)


def test_bars_without_colour(profile: Path, tmp_path: Path) -> None:
    seen = on_terminal(
        "build", profile, mishap="kit", stream="stderr", folder=tmp_path, NO_COLOR="1"
    )
    assert re.search(r"solids +\S*━+ +2/2", seen)
    assert not LOOK.search(seen)


def test_no_bar_on_a_terminal_when_quiet(profile: Path, tmp_path: Path) -> None:
    seen = on_terminal("build", profile, "-q", mishap="kit", stream="stderr", folder=tmp_path)
    assert seen == ""


def test_lines_on_a_terminal_that_cannot_draw(profile: Path, tmp_path: Path) -> None:
    seen = on_terminal(
        "build", profile, mishap="kit", stream="stderr", folder=tmp_path, TERM="dumb"
    )
    assert "solids: 2 of 2" in seen
    assert ESCAPE not in seen


def test_a_stream_that_lacks_a_character(run: Run, profile: Path) -> None:
    done = run("build", profile, mishap="kit", PYTHONIOENCODING="ascii")
    assert done.returncode == 0
    assert "softens near 65 ?C" in done.stdout

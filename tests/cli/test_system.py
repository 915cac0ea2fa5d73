"""A machine that lacks something is told what to install, in one line."""

from __future__ import annotations

from typing import TYPE_CHECKING

import pytest

from gyrecut.cli.system import MissingPartError

if TYPE_CHECKING:
    from pathlib import Path

    from tests.cli.conftest import Run


def test_missing_graphics_library(run: Run, profile: Path) -> None:
    done = run("build", profile, mishap="no_libgl")
    assert (done.returncode, done.stdout) == (4, "")
    assert done.stderr == (
        "gyrecut: cadquery cannot start: the system library libGL.so.1 is missing; on Debian or "
        "Ubuntu: sudo apt-get install libgl1 libegl1\n"
    )


def test_missing_library_nobody_has_heard_of(run: Run, profile: Path) -> None:
    done = run("build", profile, mishap="no_unheard_of_library")
    assert (done.returncode, done.stdout) == (4, "")
    assert done.stderr == (
        "gyrecut: lib3mf cannot start: the system library libunheard-of.so.7 is missing; install "
        "the package that holds it; on Debian or Ubuntu first try: sudo apt-get install libgl1 "
        "libegl1\n"
    )


def test_missing_python_package(run: Run, profile: Path) -> None:
    done = run("build", profile, mishap="no_cadquery")
    assert (done.returncode, done.stdout) == (4, "")
    assert done.stderr == (
        "gyrecut: cadquery cannot start: No module named 'cadquery'; run the set-up command of "
        "README.md again\n"
    )


@pytest.mark.parametrize(
    ("library", "install"),
    [
        ("libGL.so.1", "libgl1 libegl1"),
        ("libEGL.so.1", "libgl1 libegl1"),
        ("libXrender.so.1", "libgl1 libegl1 libxrender1"),
    ],
)
def test_every_known_library_names_its_package(library: str, install: str) -> None:
    wrong = MissingPartError(module="cadquery", reason=f"{library}: cannot open\nshared object")
    assert wrong.library == library
    assert str(wrong).endswith(f"sudo apt-get install {install}")

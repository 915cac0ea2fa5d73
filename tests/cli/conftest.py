"""How the tests of the command line run it: as a process of its own, as a user does."""

from __future__ import annotations

import os
import subprocess
import sys
from pathlib import Path
from typing import TYPE_CHECKING, Any, Protocol

import pytest

from gyrecut import catalogue

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

REPOSITORY = Path(__file__).parents[2]
STAND_IN = Path(__file__).with_name("stand_in.py")
TABLES: Mapping[str, Callable[[], Mapping[str, Any]]] = {
    "families": catalogue.families,
    "dusts": catalogue.dusts,
    "polymers": catalogue.polymers,
    "hoses": catalogue.hoses,
    "sources": catalogue.sources,
    "filters": catalogue.filters,
    "fasteners": catalogue.fasteners,
    "measured": catalogue.measured_points,
}
OURS = ("NO_COLOR", "FORCE_COLOR", "COLUMNS", "TERM", "GYRECUT_DEBUG", "PYTHONIOENCODING")


class Run(Protocol):
    """Runs `gyrecut` with arguments, in a mishap that `stand_in.py` knows or in none."""

    def __call__(
        self, *arguments: str | Path, mishap: str = "", **environment: str
    ) -> subprocess.CompletedProcess[str]: ...


def command_line(*arguments: str | Path, mishap: str = "") -> list[str]:
    way_in = [str(STAND_IN), mishap] if mishap else ["-m", "gyrecut"]
    return [sys.executable, *way_in, *map(str, arguments)]


def clean_environment(**changes: str) -> dict[str, str]:
    kept = {name: value for name, value in os.environ.items() if name not in OURS}
    return {**kept, **changes}


@pytest.fixture
def run(tmp_path: Path) -> Run:
    def _run(
        *arguments: str | Path, mishap: str = "", **environment: str
    ) -> subprocess.CompletedProcess[str]:
        return subprocess.run(
            command_line(*arguments, mishap=mishap),
            cwd=tmp_path,
            env=clean_environment(**environment),
            stdin=subprocess.DEVNULL,
            capture_output=True,
            text=True,
            timeout=120,
            check=False,
        )

    return _run


@pytest.fixture(scope="session")
def profile() -> Path:
    return REPOSITORY / "profiles" / "luthier-sander.yaml"

"""What a command loads: the quick ones nothing that is slow."""

from __future__ import annotations

import json
import subprocess
import sys
from typing import TYPE_CHECKING

import pytest
from tests.cli.conftest import TABLES, clean_environment

if TYPE_CHECKING:
    from pathlib import Path

CAD = {"cadquery", "OCP", "vtk", "vtkmodules", "trimesh", "embreex", "lib3mf"}
SLOW = CAD | {"fluids", "matplotlib", "numba", "scipy.optimize", "scipy.special", "scipy.linalg"}
AFTER = """
import json, sys
from gyrecut.cli.main import main
sys.argv = ["gyrecut", *sys.argv[1:]]
try:
    main()
except SystemExit as left:
    assert left.code == 0, left.code
print(json.dumps(list(sys.modules)), file=sys.stderr)
"""


def loaded_by(*arguments: str | Path) -> set[str]:
    done = subprocess.run(
        [sys.executable, "-c", AFTER, *map(str, arguments)],
        env=clean_environment(),
        capture_output=True,
        text=True,
        check=True,
    )
    return set(json.loads(done.stderr.splitlines()[-1]))


@pytest.mark.parametrize("arguments", [["--help"], ["--version"]])
def test_help_loads_next_to_nothing(arguments: list[str]) -> None:
    loaded = loaded_by(*arguments)
    assert "typer" in loaded  # the measurement itself works
    heavy = {"numpy", "pydantic", "pydantic_core", "pint", "rich", "ruamel", "scipy"}
    assert not loaded & (SLOW | heavy)


def test_help_of_a_command_loads_what_typer_parses_with_and_no_more() -> None:
    loaded = loaded_by("build", "--help")
    assert "pydantic" in loaded
    assert not loaded & (SLOW | {"numpy", "pint", "rich", "ruamel", "scipy"})


def test_size_loads_no_cad(profile: Path) -> None:
    loaded = loaded_by("size", profile)
    assert {"numpy", "pydantic", "pint", "rich"} <= loaded
    assert not loaded & SLOW  # the bare package scipy is loaded by pint, and costs 3 ms


def test_size_as_json_draws_no_tables(profile: Path) -> None:
    assert "rich" not in loaded_by("size", profile, "--json")


def test_explanations_are_loaded_when_asked_for(profile: Path) -> None:
    assert not {name for name in loaded_by("size", profile) if "explain" in name}
    assert "gyrecut.cli.explain_cut_size" in loaded_by("size", profile, "--explain")


@pytest.mark.parametrize("table", TABLES)
def test_list_loads_no_units_and_no_cad(table: str) -> None:
    assert not loaded_by("list", table) & (SLOW | {"pint", "numpy"})


def test_schema_and_new_load_no_cad(tmp_path: Path) -> None:
    assert not loaded_by("schema") & SLOW
    assert not loaded_by("new", tmp_path / "shop.yaml") & SLOW

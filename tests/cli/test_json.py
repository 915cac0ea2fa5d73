"""`--json`: one document, whatever happens."""

from __future__ import annotations

import json
from typing import TYPE_CHECKING, Any

import pytest
from tests.cli.conftest import TABLES

from gyrecut import __version__

if TYPE_CHECKING:
    import subprocess
    from pathlib import Path

    from tests.cli.conftest import Run


def only_document(done: subprocess.CompletedProcess[str]) -> dict[str, Any]:
    """Read the one document; `json.loads` refuses a second one or any other text beside it."""
    document: dict[str, Any] = json.loads(done.stdout)
    assert list(document) == ["schema", "gyrecut", "command", "exit_code", "result", "error"]
    assert (document["schema"], document["gyrecut"]) == (1, __version__)
    assert document["exit_code"] == done.returncode
    assert (document["result"] is None) is (document["error"] is not None)
    return document


def test_size(run: Run, profile: Path) -> None:
    document = only_document(run("size", profile, "--json"))
    assert (document["command"], document["exit_code"]) == ("size", 0)
    (stage,) = document["result"]["stages"]
    assert stage["dimensions"]["body"]["diameter_mm"] > 0
    forecast = document["result"]["forecast"]
    (said,) = forecast["stages"]
    assert 0 < said["cut_size"]["low"] < said["cut_size"]["central"] < said["cut_size"]["high"]
    assert [word["model"] for word in said["cut_size"]["words"] if word["trusted"]] == [
        "Muschelknautz, f >= 0.005",
        "Barth, f 0.005",
    ]
    spread = forecast["catch"]["spread"]
    assert 0 < spread["low"] < forecast["catch"]["kept"] < spread["high"] < 1
    assert forecast["clean"]["suction"] == pytest.approx(
        sum(share["pressure_drop"] for share in forecast["clean"]["shares"])
    )


def test_size_with_a_finding_that_says_stop(run: Run, profile: Path) -> None:
    document = only_document(run("size", profile, "--json", mishap="stop"))
    assert document["exit_code"] == 1
    assert document["result"]["findings"][-1]["severity"] == "stop"
    assert document["error"] is None


def test_build(run: Run, profile: Path) -> None:
    done = run("build", profile, "--json", mishap="kit")
    result = only_document(done)["result"]
    assert result["folder"] == "out/luthier-sander"
    assert [piece["name"] for piece in result["manifest"]["pieces"]] == ["barrel-1", "lid"]
    assert "local-rules" in [caution["code"] for caution in result["cautions"]]
    assert "solids: 2 of 2" in done.stderr  # progress does not disturb it


def test_new(run: Run) -> None:
    document = only_document(run("new", "a b.yaml", "--json"))
    assert document["result"] == {"path": "a b.yaml", "name": "a-b"}


@pytest.mark.parametrize("table", TABLES)
def test_list_gives_every_row_in_si(run: Run, table: str) -> None:
    document = only_document(run("list", table, "--json"))
    rows = TABLES[table]()
    assert [row["name"] for row in document["result"]["rows"]] == list(rows)
    for row in document["result"]["rows"]:
        for key, value in row.items():
            assert value == getattr(rows[row["name"]], key)


def test_schema_is_the_same_as_without_json(run: Run) -> None:
    document = only_document(run("schema", "--json"))
    assert document["result"]["schema"] == json.loads(run("schema").stdout)


@pytest.mark.parametrize(
    ("arguments", "command", "kind"),
    [
        (["size", "--json"], "size", "usage"),
        (["--json", "list", "hoses"], "list", "usage"),
        (["paint", "--json"], "paint", "usage"),
        (["--json"], None, "usage"),
        (["size", "nowhere.yaml", "--json"], "size", "profile"),
        (["new", "nowhere/x.yaml", "--json"], "new", "build"),
    ],
)
def test_failure(run: Run, arguments: list[str], command: str | None, kind: str) -> None:
    done = run(*arguments)
    document = only_document(done)
    assert document["command"] == command
    assert document["error"]["kind"] == kind
    assert document["error"]["message"] in done.stderr


def test_failure_lists_every_problem_of_a_profile(run: Run, profile: Path, tmp_path: Path) -> None:
    text = profile.read_text() + "\nglue: none\nsteam: 3 bar\n"
    (tmp_path / "broken.yaml").write_text(text)
    error = only_document(run("size", "broken.yaml", "--json"))["error"]
    last = text.count("\n")
    assert [
        (problem["file"], problem["line"], problem["column"], problem["path"])
        for problem in error["problems"]
    ] == [("broken.yaml", last - 1, 1, "glue"), ("broken.yaml", last, 1, "steam")]
    wanted = {"code", "file", "line", "column", "path", "what", "given", "allowed", "fix"}
    assert all(set(problem) == wanted for problem in error["problems"])


@pytest.mark.parametrize(
    ("mishap", "kind"),
    [("fault", "fault"), ("build_fails", "build"), ("no_libgl", "missing-part")],
)
def test_failure_on_the_way(run: Run, profile: Path, mishap: str, kind: str) -> None:
    document = only_document(run("build", profile, "--json", mishap=mishap))
    assert document["error"]["kind"] == kind

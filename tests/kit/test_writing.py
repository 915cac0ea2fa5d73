from __future__ import annotations

import hashlib
import json
from dataclasses import replace
from typing import TYPE_CHECKING

import pytest

from gyrecut.errors import BuildError
from gyrecut.kit import writing
from gyrecut.kit.folder import check_target
from gyrecut.kit.writing import kit_files, write_kit

if TYPE_CHECKING:
    from pathlib import Path

    from gyrecut.kit.contents import KitContents

STAMP = "2020-02-02T02:02:02"


def tree(folder: Path) -> dict[str, bytes]:
    found = folder.rglob("*")
    return {p.relative_to(folder).as_posix(): p.read_bytes() for p in found if p.is_file()}


def test_kit_holds_every_file_its_manifest_lists_and_no_other(
    contents: KitContents, tmp_path: Path
) -> None:
    files = tree(write_kit(contents, tmp_path / "kit"))
    manifest = json.loads(files.pop("manifest.json"))
    assert files.keys() == {
        "summary.md",
        "assembly.step",
        "kit.3mf",
        *(
            f"pieces/{name}.{end}"
            for name in ("barrel", "inlet", "plate")
            for end in ("stl", "step")
        ),
    }
    assert {said["path"]: said["sha256"] for said in manifest["files"]} == {
        path: hashlib.sha256(data).hexdigest() for path, data in files.items()
    }
    for piece in manifest["pieces"]:
        assert set(piece["files"].values()) <= files.keys()


def test_same_kit_made_anew_is_the_same_bytes(
    contents: KitContents, contents_again: KitContents, tmp_path: Path
) -> None:
    one = tree(write_kit(contents, tmp_path / "one"))
    other = tree(write_kit(contents_again, tmp_path / "other"))
    assert one == other


def test_time_of_the_files_is_the_given_one(
    contents: KitContents, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.setenv("SOURCE_DATE_EPOCH", "31536000")
    folder = write_kit(contents, tmp_path / "kit")
    assert b"1971-01-01T00:00:00" in (folder / "assembly.step").read_bytes()


def test_kit_replaces_an_earlier_one(contents: KitContents, tmp_path: Path) -> None:
    folder = write_kit(contents, tmp_path / "kit")
    check_target(folder)
    smaller = replace(contents, pieces=contents.pieces[:1])
    assert write_kit(smaller, folder) == folder
    assert sorted(path.name for path in (folder / "pieces").iterdir()) == [
        "barrel.step",
        "barrel.stl",
    ]


def test_piece_that_cannot_be_written_leaves_the_earlier_kit(
    contents: KitContents, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    folder = write_kit(contents, tmp_path / "kit")
    before = tree(folder)

    def failing(_contents: KitContents) -> bytes:
        raise BuildError("kit.3mf could not be made")

    monkeypatch.setattr(writing, "threemf_bytes", failing)
    with pytest.raises(BuildError, match=r"kit\.3mf could not be made"):
        write_kit(contents, folder)
    assert tree(folder) == before
    assert [path.name for path in tmp_path.iterdir()] == ["kit"]


@pytest.mark.parametrize("name", ["", "Barrel", "../barrel", "a b", "-a", "barrel\n"])
def test_piece_name_that_cannot_name_a_file_is_refused(name: str, contents: KitContents) -> None:
    broken = replace(contents, pieces=(replace(contents.pieces[0], name=name),))
    with pytest.raises(BuildError, match="cannot name a piece; allowed: small letters, digits"):
        list(kit_files(broken, stamp=STAMP))


def test_two_pieces_of_one_name_are_refused(contents: KitContents) -> None:
    broken = replace(contents, pieces=(contents.pieces[0], contents.pieces[0]))
    with pytest.raises(BuildError, match='two pieces are called "barrel"'):
        list(kit_files(broken, stamp=STAMP))

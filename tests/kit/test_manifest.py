from __future__ import annotations

import hashlib
import json
from dataclasses import replace
from typing import TYPE_CHECKING, Any

import numpy as np
import pytest

from gyrecut.findings import Finding, Severity
from gyrecut.kit.geometry_hash import geometry_hash
from gyrecut.kit.manifest import manifest_bytes, manifest_document, plain, recorded

if TYPE_CHECKING:
    from gyrecut.kit.contents import KitContents


def read_back(contents: KitContents) -> dict[str, Any]:
    document = json.loads(manifest_bytes(contents, [recorded("summary.md", b"text")]))
    assert isinstance(document, dict)
    return document


def test_pieces_agree_with_the_solids(contents: KitContents) -> None:
    for said, piece in zip(read_back(contents)["pieces"], contents.pieces, strict=True):
        box = piece.posed.BoundingBox()
        assert (said["name"], said["title"]) == (piece.name, piece.title)
        assert (said["copies"], said["stage"]) == (piece.copies, piece.stage)
        # a polygon in a circle is up to the chord error smaller at each side
        assert said["size_mm"] == pytest.approx([box.xlen, box.ylen, box.zlen], abs=0.1001)
        assert said["volume_mm3"] == pytest.approx(piece.posed.Volume(), abs=5e-4)
        assert said["mass_g"] == pytest.approx(piece.posed.Volume() * 1270e-6, abs=5e-4)
        assert said["geometry_hash"] == geometry_hash(piece.mesh)
        assert said["files"] == {
            "stl": f"pieces/{piece.name}.stl",
            "step": f"pieces/{piece.name}.step",
        }


def test_says_what_it_is_and_where_it_comes_from(contents: KitContents) -> None:
    document = read_back(contents)
    assert (document["format"], document["schema"]) == ("gyrecut-kit", 1)
    assert document["gyrecut"] == "0.1.0"
    assert document["profile"] == {"name": "test-bench", "hash": "sha256:00ff"}


def test_results_of_the_stages_are_kept_whole(contents: KitContents) -> None:
    document = read_back(contents)
    assert document["dimensions"] == [{"diameter_mm": 112.0, "stations_mm": [0.0, 80.0]}]
    assert document["prediction"] == {"cut_size": 3.2e-6}
    assert document["findings"] == [
        {
            "code": "thin-wall",
            "severity": "warn",
            "part": "barrel",
            "what": "the wall is thin",
            "measured": 1.1,
            "limit": 1.2,
            "unit": "mm",
            "where": "at the rim",
            "fix": "give walls.body 1.2 mm",
        }
    ]


def test_other_files_are_listed_with_their_hashes(contents: KitContents) -> None:
    (said,) = read_back(contents)["files"]
    assert said == {
        "path": "summary.md",
        "bytes": 4,
        "sha256": hashlib.sha256(b"text").hexdigest(),
    }


@pytest.mark.parametrize(
    ("severity", "can_be_built"), [(Severity.STOP, False), (Severity.WARN, True)]
)
def test_only_a_stop_keeps_it_from_being_built(
    *, severity: Severity, can_be_built: bool, contents: KitContents
) -> None:
    found = Finding(code="a-code", severity=severity, part="lid", what="it is so")
    document = manifest_document(replace(contents, findings=(found,)), [])
    assert document["can_be_built"] is can_be_built


def test_plain_leaves_only_what_json_knows() -> None:
    value = {Severity.STOP: (np.float64(1.5), True, None, 3)}
    assert plain(value) == {"stop": [1.5, True, None, 3]}
    assert type(plain(np.float64(1.5))) is float
    assert type(plain(Severity.STOP)) is str


@pytest.mark.parametrize("value", [{1, 2}, b"bytes", object, np.zeros(2)])
def test_plain_refuses_what_has_no_place(value: object) -> None:
    with pytest.raises(TypeError, match="has no place in a manifest"):
        plain(value)


def test_number_that_is_none_is_not_written(contents: KitContents) -> None:
    with pytest.raises(ValueError, match="JSON compliant"):
        manifest_bytes(replace(contents, prediction={"cut_size": float("nan")}), [])

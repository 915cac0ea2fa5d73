from __future__ import annotations

import re
from typing import TYPE_CHECKING

import pytest
from cadquery import Assembly, Location, Shape, Solid, importers
from cadquery.func import box
from OCP.Interface import Interface_Static
from OCP.STEPCAFControl import STEPCAFControl_Controller

from gyrecut.errors import BuildError
from gyrecut.kit.step import assembly_step_bytes, piece_step_bytes, time_stamp

if TYPE_CHECKING:
    from collections.abc import Iterator
    from pathlib import Path

    from gyrecut.kit.contents import KitContents

STAMP = "2020-02-02T02:02:02"


def difference_mm3(one: Shape, other: Shape) -> float:
    """Volume that is in one of them only; a one-sided cut would miss what was added."""
    return float(one.cut(other).Volume() + other.cut(one).Volume())


def products(data: bytes) -> list[str]:
    return re.findall(r"PRODUCT\('([^']*)','[^']*'", data.decode("ascii"))


def assembly_of(contents: KitContents) -> bytes:
    parts = [(piece.name, piece.placed) for piece in contents.pieces]
    return assembly_step_bytes("test-bench", parts, version="0.1.0", stamp=STAMP)


def test_piece_read_back_is_the_solid_in_its_print_pose(
    contents: KitContents, tmp_path: Path
) -> None:
    for piece in contents.pieces:
        data = piece_step_bytes(piece.name, piece.posed, version="0.1.0", stamp=STAMP)
        path = tmp_path / f"{piece.name}.step"
        path.write_bytes(data)
        (read,) = importers.importStep(str(path)).solids().vals()
        assert isinstance(read, Solid)
        assert read.isValid()
        assert read.Volume() == pytest.approx(piece.volume_mm3, rel=1e-9)
        assert difference_mm3(read, piece.posed) <= 1e-6 * piece.volume_mm3
        assert products(data) == [piece.name]


def test_assembly_read_back_has_every_part_named_in_its_place(
    contents: KitContents, tmp_path: Path
) -> None:
    data = assembly_of(contents)
    path = tmp_path / "assembly.step"
    path.write_bytes(data)
    read = Assembly.importStep(str(path))
    assert read.name == "test-bench"
    assert [child.name for child in read.children] == ["barrel", "inlet", "plate"]
    for child, piece in zip(read.children, contents.pieces, strict=True):
        assert isinstance(child.obj, Solid)
        there = child.obj.moved(child.loc)
        assert difference_mm3(there, piece.placed) <= 1e-6 * piece.volume_mm3
    assert products(data) == ["test-bench", "barrel", "inlet", "plate"]


def test_moved_copies_of_one_solid_keep_their_own_names() -> None:
    one = box(10, 10, 10)
    parts = [("left", one), ("right", one.moved(Location((20, 0, 0))))]
    data = assembly_step_bytes("pair", parts, version="0.1.0", stamp=STAMP)
    assert products(data) == ["pair", "left", "right"]


@pytest.fixture
def inches_left_by_another() -> Iterator[None]:
    """The kernel keeps its settings for the whole process, whoever made them."""
    STEPCAFControl_Controller.Init_s()
    assert Interface_Static.SetCVal_s("write.step.unit", "INCH")
    yield
    Interface_Static.SetCVal_s("write.step.unit", "MM")


@pytest.mark.usefixtures("inches_left_by_another")
def test_length_unit_is_the_millimetre(contents: KitContents) -> None:
    # ISO 10303-21 text of the SI unit with its prefix (from memory). An inch is written as a
    # conversion of the same millimetre, so finding that alone would prove nothing.
    piece = contents.pieces[0]
    alone = piece_step_bytes(piece.name, piece.posed, version="0.1.0", stamp=STAMP)
    for data in (alone, assembly_of(contents)):
        units = re.findall(rb"LENGTH_UNIT\(\) NAMED_UNIT\(\*\) SI_UNIT\(([^)]*)\)", data)
        assert units
        assert set(units) == {b".MILLI.,.METRE."}
        assert b"CONVERSION_BASED_UNIT" not in data


def test_header_names_the_piece_the_program_and_the_given_time(contents: KitContents) -> None:
    piece = contents.pieces[0]
    data = piece_step_bytes(piece.name, piece.posed, version="0.1.0", stamp=STAMP)
    header = re.sub(rb"\s+", b" ", data[: data.index(b"DATA;")])
    assert b"FILE_NAME('barrel','2020-02-02T02:02:02',(''),('')," in header
    assert b"'gyrecut 0.1.0'" in header


def test_same_parts_made_anew_are_the_same_file(
    contents: KitContents, contents_again: KitContents
) -> None:
    # the second file of a process is where the kernel's running numbers would show
    assert assembly_of(contents) == assembly_of(contents_again)


@pytest.mark.parametrize(
    ("environment", "stamp"),
    [
        ({}, "1980-01-01T00:00:00"),
        ({"SOURCE_DATE_EPOCH": ""}, "1980-01-01T00:00:00"),
        ({"SOURCE_DATE_EPOCH": "0"}, "1970-01-01T00:00:00"),
        # 86400 s a day, 365 days from the start of 1970
        ({"SOURCE_DATE_EPOCH": "31536000"}, "1971-01-01T00:00:00"),
    ],
)
def test_time_comes_from_the_environment(environment: dict[str, str], stamp: str) -> None:
    assert time_stamp(environment) == stamp


@pytest.mark.parametrize("given", ["yesterday", "1e9", "9" * 30])
def test_time_that_is_none_is_refused(given: str) -> None:
    with pytest.raises(BuildError, match=f'SOURCE_DATE_EPOCH is "{given}"; allowed: whole'):
        time_stamp({"SOURCE_DATE_EPOCH": given})

"""A small invented kit: a tube, a pierced block and a plate printed three times."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import pytest
from cadquery import Location, Solid
from cadquery.func import box, cylinder

from gyrecut.findings import Finding, Severity
from gyrecut.kit.contents import Fact, Hardware, KitContents, KitPiece, Polymer
from gyrecut.kit.measuring import kit_piece
from gyrecut.pieces.meshing import mesh_of
from gyrecut.pieces.piece import Piece

if TYPE_CHECKING:
    from cadquery import Shape

DENSITY = 1270.0


@dataclass(frozen=True, slots=True, kw_only=True)
class BodySize:
    diameter_mm: float
    stations_mm: tuple[float, ...]


def only_solid(shape: Shape) -> Solid:
    (solid,) = shape.Solids()
    return solid


def tube(outside_mm: float, bore_mm: float, length_mm: float) -> Solid:
    """A tube on z = 0, its outside touching x = 0 and y = 0."""
    solid = only_solid(cylinder(outside_mm, length_mm) - cylinder(bore_mm, length_mm))
    return solid.moved(Location((outside_mm / 2, outside_mm / 2, 0)))


def pierced_block() -> Solid:
    hole = cylinder(8, 60).moved(Location((20, 15, -10)))
    return only_solid(box(40, 30, 25).moved(Location((20, 15, 0))) - hole)


def measured(
    name: str, title: str, posed: Solid, placed: Solid, *, copies: int = 1, stage: int = 1
) -> KitPiece:
    mesh = mesh_of(posed, name=name)
    piece = Piece(name=name, title=title, placed=placed, posed=posed, mesh=mesh, copies=copies)
    return kit_piece(piece, density=DENSITY, stage=stage)


def made_contents() -> KitContents:
    barrel = tube(120, 112, 80)
    block = pierced_block()
    plate = only_solid(box(50, 50, 6).moved(Location((25, 25, 0))))
    return KitContents(
        version="0.1.0",
        profile_name="test-bench",
        profile_hash="sha256:00ff",
        polymer=Polymer(name="PETG", density=DENSITY, softening_temperature=353.15),
        dust_is_combustible=True,
        dimensions=(BodySize(diameter_mm=112.0, stations_mm=(0.0, 80.0)),),
        prediction={"cut_size": 3.2e-6},
        body=(Fact(label="body diameter inside", value=112.0, unit="mm"),),
        estimate=(Fact(label="cut size", value=3.2, unit="um", note="Lapple"),),
        findings=(
            Finding(
                code="thin-wall",
                severity=Severity.WARN,
                part="barrel",
                what="the wall is thin",
                measured=1.1,
                limit=1.2,
                unit="mm",
                where="at the rim",
                fix="give walls.body 1.2 mm",
            ),
        ),
        pieces=(
            measured("barrel", "Barrel", barrel, barrel.moved(Location((0, 0, 300), (180, 0, 0)))),
            measured(
                "inlet",
                "Inlet | transition",
                block,
                block.moved(Location((200, 0, 100), (0, 90, 0))),
            ),
            measured("plate", "Plate", plate, plate, copies=3, stage=2),
        ),
        hardware=(Hardware(what="screw M4 x 16", quantity="12", where="lid"),),
        steps=("Press the inserts in.", "Screw the lid on."),
    )


@pytest.fixture(scope="session")
def contents() -> KitContents:
    return made_contents()


@pytest.fixture(scope="session")
def contents_again() -> KitContents:
    """The same kit, its solids made anew."""
    return made_contents()

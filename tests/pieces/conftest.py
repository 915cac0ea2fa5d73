"""Pieces of the shipped profiles, made once."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache
from pathlib import Path
from typing import TYPE_CHECKING

import pytest

from gyrecut import pipeline
from gyrecut.checks import PrintLimits, limits_of
from gyrecut.pieces import Piece, make_pieces
from gyrecut.pieces.marks import MarkStyle, mark_style
from gyrecut.profile import load_profile
from gyrecut.proportions.printing import bed_of
from gyrecut.solids import Parts, make_parts

if TYPE_CHECKING:
    from gyrecut.proportions.dimensions import Dimensions
    from gyrecut.proportions.printing import Bed

PROFILES = Path(__file__).parents[2] / "profiles"
NAMES = ("luthier-sander", "joinery-planer", "casting-bench")


@dataclass(frozen=True, kw_only=True, eq=False)
class Made:
    """One shipped separator, cut."""

    dimensions: Dimensions
    bed: Bed
    parts: Parts
    pieces: tuple[Piece, ...]
    style: MarkStyle
    limits: PrintLimits

    @property
    def marked(self) -> tuple[Piece, ...]:
        """The same pieces with their marks."""
        return _marked(self)

    def named(self, start: str) -> tuple[Piece, ...]:
        return tuple(piece for piece in self.pieces if piece.name.startswith(start))


@cache
def made_from(name: str) -> Made:
    profile = load_profile(PROFILES / f"{name}.yaml")
    dimensions, bed = pipeline.design(profile).stages[0].dimensions, bed_of(profile.printer)
    parts = make_parts(dimensions)
    pieces = tuple(make_pieces(parts, dimensions, bed))
    return Made(
        dimensions=dimensions,
        bed=bed,
        parts=parts,
        pieces=pieces,
        style=mark_style(profile.printer),
        limits=limits_of(profile.printer),
    )


@cache
def _marked(made: Made) -> tuple[Piece, ...]:
    return tuple(make_pieces(made.parts, made.dimensions, made.bed, style=made.style))


@pytest.fixture(params=NAMES)
def made(request: pytest.FixtureRequest) -> Made:
    return made_from(request.param)


@pytest.fixture
def joinery() -> Made:
    """The one whose rings are cut into sectors."""
    return made_from("joinery-planer")

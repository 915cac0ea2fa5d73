"""Letters of square cells, five rows high, and the outlines of their strokes.

The outlines run along and across the line of writing only: wrapped round a cylinder or a cone they
become straight lines and arcs of circles, which the kernel holds exactly. No two cells of a letter
touch at a corner alone, so every outline is a simple polygon.
"""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache
from typing import TYPE_CHECKING

from gyrecut.proportions.printing import LETTER_ROWS

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.proportions.dimensions import Point

ROWS = LETTER_ROWS
UP = "^"  # the arrow that shows which way is up in the machine

# From the top row down; a row of one letter is as wide as the others of it.
_DRAWN = {
    UP: "..#.. .###. ##### ..#.. ..#..",
    "-": ".. .. ## .. ..",
    "0": "### #.# #.# #.# ###",
    "1": "##. .#. .#. .#. .#.",
    "2": "### ..# ### #.. ###",
    "3": "### ..# .## ..# ###",
    "4": "#.# #.# ### ..# ..#",
    "5": "### #.. ### ..# ###",
    "6": "### #.. ### #.# ###",
    "7": "### ..# ..# ..# ..#",
    "8": "### #.# ### #.# ###",
    "9": "### #.# ### ..# ###",
    "+": "... .#. ### .#. ...",
    ".": ". . . . #",
    "A": "### #.# ### #.# #.#",
    "B": "#.. #.. ### #.# ###",
    "C": "### #.. #.. #.. ###",
    "D": "..# ..# ### #.# ###",
    "E": "### #.. ### #.. ###",
    "F": "### #.. ### #.. #..",
    "G": "### #.. #.# #.# ###",
    "H": "#.# #.# ### #.# #.#",
    "I": "# # # # #",
    "J": "..# ..# ..# #.# ###",
    "K": "#..# #.## ###. #.## #..#",
    "L": "#.. #.. #.. #.. ###",
    "M": "##### #.#.# #.#.# #.#.# #.#.#",
    "N": "### #.# #.# #.# #.#",
    "O": "### #.# #.# #.# ###",
    "P": "### #.# ### #.. #..",
    "Q": "###. #.#. #.#. #.## ####",
    "R": "### #.. #.. #.. #..",
    "S": "### #.. ### ..# ###",
    "T": "### .#. .#. .#. .#.",
    "U": "#.# #.# #.# #.# ###",
    "V": "#...# ##.## .#.#. .###. ..#..",
    "W": "#.#.# #.#.# #.#.# #.#.# #####",
    "X": "#.# ### .#. ### #.#",
    "Y": "#.# #.# ### .#. .#.",
    "Z": "### ..# ### #.. ###",
}
LETTERS = frozenset(_DRAWN)

Cell = tuple[int, int]


@dataclass(frozen=True, slots=True, kw_only=True)
class Figure:
    """One connected groove: its outline counter-clockwise, and what stays standing in it."""

    outline: tuple[Point, ...]
    islands: tuple[tuple[Point, ...], ...] = ()

    @property
    def loops(self) -> tuple[tuple[Point, ...], ...]:
        """The outline, then the islands."""
        return (self.outline, *self.islands)


def bar(width: float, height: float, x: float = 0.0) -> Figure:
    """Give a straight groove with its middle at (x, 0) [mm]."""
    w, h = width / 2, height / 2
    return Figure(outline=((x - w, -h), (x + w, -h), (x + w, h), (x - w, h)))


def text_size(text: str, stroke_mm: float) -> Point:
    """Give width and height of a line of writing [mm]."""
    columns = sum(_width(letter) + 1 for letter in text) - 1
    return columns * stroke_mm, ROWS * stroke_mm


def figures(text: str, stroke_mm: float) -> tuple[Figure, ...]:
    """Give the grooves of a line of writing, its middle at (0, 0).

    Parameters
    ----------
    text : str
        Capital letters, digits, `-`, `+`, `.` and the arrow `UP`.
    stroke_mm : float
        Width of a stroke, and of the least gap between two [mm].

    Returns
    -------
    tuple of Figure
        Writing runs to +x, up is +y [mm].
    """
    width, height = text_size(text, stroke_mm)
    found: list[Figure] = []
    column = 0

    def laid(outline: tuple[Cell, ...]) -> tuple[Point, ...]:
        return tuple(
            ((x + column) * stroke_mm - width / 2, y * stroke_mm - height / 2) for x, y in outline
        )

    for letter in text:
        for outer, *inner in _outlines(letter):
            found.append(Figure(outline=laid(outer), islands=tuple(map(laid, inner))))
        column += _width(letter) + 1
    return tuple(found)


def _width(letter: str) -> int:
    return len(_DRAWN[letter].split()[0])


@cache
def _outlines(letter: str) -> tuple[tuple[tuple[Cell, ...], ...], ...]:
    """Each connected part of a letter: its outline, then the outlines of its holes."""
    rows = _DRAWN[letter].split()
    cells = {
        (x, ROWS - 1 - y) for y, row in enumerate(rows) for x, mark in enumerate(row) if mark == "#"
    }
    parts = []
    while cells:
        part = _connected(cells)
        cells -= part
        loops = sorted(_loops(part), key=_twice_area, reverse=True)
        parts.append(tuple(loops))  # holes run clockwise, so the outline comes first
    return tuple(parts)


def _connected(cells: set[Cell]) -> set[Cell]:
    reached, ahead = set(), [min(cells)]
    while ahead:
        here = ahead.pop()
        if here in cells and here not in reached:
            reached.add(here)
            x, y = here
            ahead += [(x + 1, y), (x - 1, y), (x, y + 1), (x, y - 1)]
    return reached


def _loops(cells: set[Cell]) -> Iterator[tuple[Cell, ...]]:
    """Follow the sides of the cells that have no neighbour, the cells to the left."""
    after: dict[Cell, Cell] = {}
    for x, y in cells:
        corners = ((x, y), (x + 1, y), (x + 1, y + 1), (x, y + 1))
        beyond = ((x, y - 1), (x + 1, y), (x, y + 1), (x - 1, y))
        for index, neighbour in enumerate(beyond):
            if neighbour not in cells:
                after[corners[index]] = corners[(index + 1) % 4]
    while after:
        start = here = min(after)
        loop = []
        while here in after:
            loop.append(here)
            here = after.pop(here)
        if here != start:
            raise ValueError("two cells of a letter touch at a corner alone")
        yield tuple(
            point
            for before, point, behind in zip(
                (loop[-1], *loop), loop, (*loop[1:], loop[0]), strict=False
            )
            if (point[0] - before[0], point[1] - before[1])
            != (behind[0] - point[0], behind[1] - point[1])
        )


def _twice_area(loop: tuple[Cell, ...]) -> int:
    return sum(x * v - u * y for (x, y), (u, v) in zip(loop, (*loop[1:], loop[0]), strict=True))

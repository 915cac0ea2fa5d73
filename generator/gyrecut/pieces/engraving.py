"""Sinks shallow grooves into a face of a solid by building their faces, with no boolean.

A boolean costs five to ten milliseconds a letter, nearly all of it to find intersections that are
known here: the sides of a groove are planes, along the axis or square to it, so each edge is a
straight line or an arc. The face gets the outlines as holes, and each hole its walls and its floor.
What comes out is held against the closed form of the volume and the kernel's validity check.

A side that would be a ceiling while the piece prints is laid back, so that nothing hangs over: its
lower edge is moved away from it, along the face, by `Mark.drop_mm`.
"""

from __future__ import annotations

from dataclasses import dataclass
from itertools import pairwise
from math import atan2, cos, hypot, pi, remainder, sin
from typing import TYPE_CHECKING

from cadquery.func import Compound, Face, Solid
from OCP.BRep import BRep_Builder, BRep_Tool
from OCP.BRepBuilderAPI import BRepBuilderAPI_MakeEdge, BRepBuilderAPI_MakeVertex
from OCP.BRepGProp import BRepGProp
from OCP.Geom import Geom_ConicalSurface, Geom_Plane
from OCP.Geom2d import Geom2d_Line
from OCP.gp import gp_Ax3, gp_Dir, gp_Dir2d, gp_Pln, gp_Pnt, gp_Pnt2d, gp_Vec
from OCP.GProp import GProp_GProps
from OCP.TopAbs import TopAbs_FORWARD
from OCP.TopLoc import TopLoc_Location
from OCP.TopoDS import TopoDS, TopoDS_Face, TopoDS_Iterator, TopoDS_Shell, TopoDS_Solid, TopoDS_Wire

from gyrecut.errors import BuildError
from gyrecut.pieces.places import FlatGround, Round, ground_of, straight

if TYPE_CHECKING:
    from collections.abc import Iterable, Sequence

    from OCP.Geom import Geom_Surface
    from OCP.TopoDS import TopoDS_Edge, TopoDS_Shape, TopoDS_Vertex

    from gyrecut.pieces.glyphs import Figure
    from gyrecut.pieces.places import Ground, Spot, Triple
    from gyrecut.proportions.dimensions import Point

TOLERANCE_MM = 1e-7  # the kernel's own
VOLUME_SHARE = 1e-4


@dataclass(frozen=True, slots=True, kw_only=True)
class Mark:
    """Figures at one place, sunk by one depth, with a margin kept free round them [mm].

    Parameters
    ----------
    spot : Flat or Round
        Where it lies.
    figures : tuple of Figure
        What is sunk, round the middle of the place.
    depth_mm : float
        Square to a plane, and level towards the axis in a turned wall [mm].
    margin_mm : float
        Of the face, kept free round it [mm].
    rise : (int, int)
        Which way of the writing is up while the piece prints, (0, 0) where the face lies level.
    drop_mm : float
        How far a ceiling is laid back, along the face [mm].
    """

    spot: Spot
    figures: tuple[Figure, ...]
    depth_mm: float
    margin_mm: float
    rise: tuple[int, int] = (0, 0)
    drop_mm: float = 0.0

    @property
    def volume_mm3(self) -> float:
        """What the groove takes away, in closed form [mm3]."""
        volume = 0.0
        for figure in self.figures:
            for loop in figure.loops:
                area, moment = _moments(loop)
                volume += self.spot.volume_mm3(area, moment, self.depth_mm)
                for start, end in pairwise((*loop, loop[0])):
                    if self.is_ceiling(start, end):
                        drop = (self.drop_mm * self.rise[0], self.drop_mm * self.rise[1])
                        volume -= self.spot.wedge_mm3(start, end, drop, self.depth_mm)
        return volume

    def is_ceiling(self, start: Point, end: Point) -> bool:
        """Say whether a side of a loop, with the groove to its left, looks down as it prints."""
        outward = (end[1] - start[1], start[0] - end[0])
        return outward[0] * self.rise[0] + outward[1] * self.rise[1] > 0

    def floor_of(self, loop: tuple[Point, ...]) -> tuple[Point, ...]:
        """Give the corners of the floor under a loop that has the groove to its left."""
        shift = (-self.drop_mm * self.rise[0], -self.drop_mm * self.rise[1])
        behind = pairwise((loop[-1], *loop))
        ahead = pairwise((*loop, loop[0]))
        return tuple(
            (x + shift[0], y + shift[1])
            if self.is_ceiling(*side) or self.is_ceiling(*before)
            else (x, y)
            for (x, y), before, side in zip(loop, behind, ahead, strict=True)
        )

    def ground_in(self, solid: Solid) -> Ground | None:
        """Find the one face of a solid that holds the groove and its margin, or None."""
        return ground_of(solid, self.spot, *self.room_mm)

    @property
    def room_mm(self) -> Point:
        """Width and height of the rectangle it needs, margin included [mm]."""
        across, up = (
            max(abs(point[axis]) for figure in self.figures for point in figure.outline)
            for axis in (0, 1)
        )
        return 2 * (across + self.margin_mm), 2 * (up + self.margin_mm)


def engraved(solid: Solid, marks: Sequence[Mark], what: str) -> Solid:
    """Sink grooves into the faces they lie on.

    Parameters
    ----------
    solid : Solid
        One closed solid [mm].
    marks : sequence of Mark
        None over another, and each where `Mark.ground_in` finds a face.
    what : str
        What an error calls the solid.

    Returns
    -------
    Solid

    Raises
    ------
    BuildError
        Where a groove has no face to lie on, or what comes out is not the solid less the grooves.
    """
    if not marks:
        return solid
    for mark in marks:
        ground = mark.ground_in(solid)
        if ground is None:
            raise BuildError(f"{what}: a mark has no face to lie on")
        made = _sunk(ground, mark)
        taken = _enclosed(ground.face, *(TopoDS.Face_s(face.Reversed()) for face in made))
        if abs(taken - mark.volume_mm3) > VOLUME_SHARE * mark.volume_mm3:
            raise BuildError(f"{what}: a mark took {taken:.4f} mm3, not {mark.volume_mm3:.4f}")
        # outlines that touch make this face invalid; the small ones behind it are as they were
        # laid out, and whether they close is asked of the mesh: to have the kernel try each of
        # their edges takes longer than making them
        if not Face(made[0]).isValid():
            raise BuildError(f"{what}: the CAD kernel calls the marked face invalid")
        solid = _exchanged(solid, ground.face, made)
    return solid


def _enclosed(*faces: TopoDS_Face) -> float:
    """Give the volume between faces that close: a face, and what stands in its place, reversed."""
    properties = GProp_GProps()
    BRepGProp.VolumeProperties_s(Compound.makeCompound(map(Face, faces)).wrapped, properties)
    return float(properties.Mass())


def _moments(loop: Sequence[Point]) -> tuple[float, float]:
    """Area of a polygon [mm2] and its moment about y = 0 [mm3], negative where it is a hole."""
    area = moment = 0.0
    for (x, y), (u, v) in pairwise((*loop, loop[0])):
        cross = x * v - u * y
        area += cross / 2
        moment += cross * (y + v) / 6
    return area, moment


def _sunk(ground: Ground, mark: Mark) -> tuple[TopoDS_Face, ...]:
    """Give the face with holes, and the walls, floors and islands in them."""
    builder, face = BRep_Builder(), ground.face
    side = face.Orientation()
    pierced = TopoDS.Face_s(face.Oriented(TopAbs_FORWARD).EmptyCopied())
    for wire in _parts_of(face.Oriented(TopAbs_FORWARD)):
        builder.Add(pierced, wire)
    below = ground.floor(mark.depth_mm)
    made: list[TopoDS_Face] = []
    for figure in mark.figures:
        floor = TopoDS_Face()
        builder.MakeFace(floor, below, TOLERANCE_MM)
        for index, loop in enumerate(figure.loops):
            hole = _Hole(ground, mark, loop, is_outline=index == 0)
            edge_of_face = hole.rim_wire()
            if index == 0:
                builder.Add(pierced, edge_of_face)
            else:
                island = TopoDS.Face_s(face.Oriented(TopAbs_FORWARD).EmptyCopied())
                builder.Add(island, edge_of_face)
                made.append(island)
            builder.Add(floor, hole.floor_wire(below))
            made += hole.walls()
        made.append(floor)
    return tuple(TopoDS.Face_s(part.Oriented(side)) for part in (pierced, *made))


class _Hole:
    """The edges of one hole: round its rim, round its floor, and from one to the other."""

    def __init__(
        self, ground: Ground, mark: Mark, loop: tuple[Point, ...], *, is_outline: bool
    ) -> None:
        floor = mark.floor_of(loop)
        # outlines run counter-clockwise in the face's parameters, islands clockwise
        if (_moments([ground.uv(point) for point in loop])[0] > 0) != is_outline:
            loop, floor = loop[::-1], floor[::-1]
        self._ground = ground
        self._loops = (loop, floor)
        top, bottom = 0.0, mark.depth_mm
        self._corners = (
            [ground.spot.at(point, top) for point in loop],
            [ground.spot.at(point, bottom) for point in floor],
        )
        rims, floors = ([_vertex(corner) for corner in row] for row in self._corners)
        self._rim = self._round(loop, rims, top)
        self._floor = self._round(floor, floors, bottom)
        self._rungs = [
            _edge(*straight(high, low), rims[k], floors[k])
            for k, (high, low) in enumerate(zip(*self._corners, strict=True))
        ]

    def _round(
        self, loop: tuple[Point, ...], vertices: list[TopoDS_Vertex], depth_mm: float
    ) -> list[TopoDS_Edge]:
        return [
            _edge(*self._ground.curve(start, end, depth_mm), one, other)
            for (start, end), (one, other) in zip(
                pairwise((*loop, loop[0])), pairwise((*vertices, vertices[0])), strict=True
            )
        ]

    def rim_wire(self) -> TopoDS_Wire:
        """Give the wire round the rim, the face to its left."""
        location = TopLoc_Location()
        surface = BRep_Tool.Surface_s(self._ground.face, location)
        self._lay_on(0, self._rim, surface, location)
        return _wire([edge.Reversed() for edge in reversed(self._rim)])

    def floor_wire(self, floor: Geom_Surface) -> TopoDS_Wire:
        """Give the wire round the floor, the floor to its left."""
        self._lay_on(1, self._floor, floor, TopLoc_Location())
        return _wire(self._floor)

    def _lay_on(
        self, which: int, edges: list[TopoDS_Edge], surface: Geom_Surface, place: TopLoc_Location
    ) -> None:
        """Tell edges where they run in a round surface; a plane needs no telling."""
        if isinstance(self._ground, FlatGround):
            return
        loop = self._loops[which]
        for edge, (start, end) in zip(edges, pairwise((*loop, loop[0])), strict=True):
            _run(edge, self._ground.uv(start), self._ground.uv(end), surface, place)

    def walls(self) -> list[TopoDS_Face]:
        """Give a wall under each side of the rim."""
        builder, made = BRep_Builder(), []
        rim, (high, low) = self._loops[0], self._corners
        count = len(rim)
        for k in range(count):
            after = (k + 1) % count
            is_level = rim[k][1] == rim[after][1]
            leans = is_level and abs(high[k][2] - low[k][2]) > TOLERANCE_MM
            wall = TopoDS_Face()
            if leans and isinstance(self._ground.spot, Round):
                builder.MakeFace(wall, self._leaning(k, after), TOLERANCE_MM)
            else:
                builder.MakeFace(wall, _plane(high[k], high[after], low[after]), TOLERANCE_MM)
            sides = [
                self._rim[k],
                self._rungs[after],
                self._floor[k].Reversed(),
                self._rungs[k].Reversed(),
            ]
            builder.Add(wall, _wire(sides))
            made.append(wall)
        return made

    def _leaning(self, k: int, after: int) -> Geom_Surface:
        """Give the cone under a side that is laid back, and tell its edges where they run in it."""
        high, low = self._corners[0][k], self._corners[1][k]
        radius, inner = hypot(*high[:2]), hypot(*low[:2])
        up = 1.0 if high[2] > low[2] else -1.0
        begin, end = (atan2(row[1], row[0]) for row in (high, self._corners[0][after]))
        turn = remainder(end - begin, 2 * pi)
        middle = begin + turn / 2
        frame = gp_Ax3(
            gp_Pnt(0.0, 0.0, high[2]),
            gp_Dir(0.0, 0.0, up),
            gp_Dir(cos(middle), sin(middle), 0.0),
        )
        across = up * turn / 2
        if across > 0:  # along the rim and then down has to be counter-clockwise: v falls
            across = -across
            frame.YReverse()
        surface = Geom_ConicalSurface(frame, atan2(radius - inner, abs(high[2] - low[2])), radius)
        down, place = -hypot(radius - inner, high[2] - low[2]), TopLoc_Location()
        _run(self._rim[k], (-across, 0.0), (across, 0.0), surface, place)
        _run(self._floor[k], (-across, down), (across, down), surface, place)
        _run(self._rungs[k], (-across, 0.0), (-across, down), surface, place)
        _run(self._rungs[after], (across, 0.0), (across, down), surface, place)
        return surface


def _run(
    edge: TopoDS_Edge, start: Point, end: Point, surface: Geom_Surface, place: TopLoc_Location
) -> None:
    """Tell an edge that it runs straight in the parameters of a surface."""
    run = Geom2d_Line(gp_Pnt2d(*start), gp_Dir2d(end[0] - start[0], end[1] - start[1]))
    BRep_Builder().UpdateEdge(edge, run, surface, place, TOLERANCE_MM)


def _vertex(corner: Triple) -> TopoDS_Vertex:
    return BRepBuilderAPI_MakeVertex(gp_Pnt(*corner)).Vertex()


def _edge(curve: object, length: float, one: TopoDS_Vertex, other: TopoDS_Vertex) -> TopoDS_Edge:
    return BRepBuilderAPI_MakeEdge(curve, one, other, 0.0, length).Edge()


def _wire(edges: Iterable[TopoDS_Shape]) -> TopoDS_Wire:
    builder, wire = BRep_Builder(), TopoDS_Wire()
    builder.MakeWire(wire)
    for edge in edges:
        builder.Add(wire, edge)
    wire.Closed(True)  # noqa: FBT003 (kernel's)
    return wire


def _plane(one: Triple, other: Triple, deep: Triple) -> Geom_Plane:
    along, down = gp_Vec(gp_Pnt(*one), gp_Pnt(*other)), gp_Vec(gp_Pnt(*other), gp_Pnt(*deep))
    return Geom_Plane(gp_Pln(gp_Pnt(*one), gp_Dir(along.Crossed(down))))


def _exchanged(solid: Solid, old: TopoDS_Face, new: Iterable[TopoDS_Face]) -> Solid:
    """Put faces in the place of one of a solid's."""
    builder, shell, whole = BRep_Builder(), TopoDS_Shell(), TopoDS_Solid()
    builder.MakeShell(shell)
    (outer,) = _parts_of(solid.wrapped)
    for face in _parts_of(outer):
        if not face.IsSame(old):
            builder.Add(shell, face)
    for face in new:
        builder.Add(shell, face)
    shell.Closed(True)  # noqa: FBT003 (kernel's)
    builder.MakeSolid(whole)
    builder.Add(whole, shell)
    return Solid(whole)


def _parts_of(shape: TopoDS_Shape) -> list[TopoDS_Shape]:
    found, iterator = [], TopoDS_Iterator(shape)
    while iterator.More():
        found.append(iterator.Value())
        iterator.Next()
    return found

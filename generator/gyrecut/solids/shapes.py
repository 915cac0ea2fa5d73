"""The few solid operations the parts are made with, each one checked.

Millimetres throughout. A boolean that misses leaves a body unchanged without a word, so every
one here says what it was for, and raises where that did not come about.
"""

from __future__ import annotations

from math import cos, degrees, pi, sin
from typing import TYPE_CHECKING

from cadquery import func
from cadquery.func import Edge, Shape, Solid, Vector, Wire

from gyrecut.errors import BuildError

if TYPE_CHECKING:
    from collections.abc import Callable, Sequence

    from gyrecut.proportions.dimensions import Point

    Arc = tuple[Point, Point]  # a point on the way, and the end

LEAST_CHANGE_MM3 = 1e-6
HOLE_TOLERANCE = 1e-6


def revolved(
    start: Point,
    *steps: Point | Arc,
    first: float = 0.0,
    last: float = 2 * pi,
) -> Solid:
    """Turn a closed outline in (radius, z) about the z axis.

    Parameters
    ----------
    start : (float, float)
        First corner (radius, z) [mm].
    *steps
        The next corners in order; a pair of points is an arc through the first to the second.
        The outline closes itself.
    first, last : float
        Angles the solid spans, from +x towards +y [rad].

    Returns
    -------
    Solid
    """
    section = func.face(
        func.wire(*_edges(start, steps, lambda point: Vector(point[0], 0, point[1])))
    )
    turned = func.revolve(section, (0, 0, 0), (0, 0, 1), degrees(last - first))
    if first:
        turned = turned.moved(rz=degrees(first))
    return one_solid(turned, "a turned outline")


def outline(start: Point, *steps: Point | Arc, z: float) -> Wire:
    """Give a closed outline in (x, y) as a wire at the height `z`."""
    return func.wire(*_edges(start, steps, lambda point: Vector(point[0], point[1], z)))


def prism(start: Point, *steps: Point | Arc, bottom: float, top: float) -> Solid:
    """Extrude a closed outline in (x, y) from z = `bottom` to z = `top`."""
    base = func.face(outline(start, *steps, z=bottom))
    return one_solid(func.extrude(base, (0, 0, top - bottom)), "a prism")


def prism_along_x(*corners: Point, start: float, end: float) -> Solid:
    """Extrude a closed polygon in (y, z) from x = `start` to x = `end`."""
    outline = func.face(
        func.wire(*_edges(corners[0], corners[1:], lambda point: Vector(start, *point)))
    )
    return one_solid(func.extrude(outline, (end - start, 0, 0)), "a prism")


def block(low: tuple[float, float, float], high: tuple[float, float, float]) -> Solid:
    """Give the box between two corners."""
    return prism(
        (low[0], low[1]),
        (high[0], low[1]),
        (high[0], high[1]),
        (low[0], high[1]),
        bottom=low[2],
        top=high[2],
    )


def upright_holes(
    places: Sequence[Point], diameter: float, *, bottom: float, top: float
) -> list[Solid]:
    """Cylinders for holes along z at (x, y) places."""
    return [Solid.makeCylinder(diameter / 2, top - bottom, Vector(x, y, bottom)) for x, y in places]


def holes_along_x(
    places: Sequence[Point], diameter: float, *, start: float, end: float
) -> list[Solid]:
    """Cylinders for holes along x at (y, z) places."""
    return [
        Solid.makeCylinder(diameter / 2, end - start, Vector(start, y, z), Vector(1, 0, 0))
        for y, z in places
    ]


def joined(what: str, first: Shape, *others: Shape) -> Solid:
    """Fuse solids that touch into one."""
    together = one_solid(func.fuse(first, *others), what)
    if together.Volume() - first.Volume() < LEAST_CHANGE_MM3:
        raise BuildError(f"{what}: joining added nothing")
    return together


def without(what: str, body: Shape, *tools: Shape) -> Solid:
    """Cut tools out of a body, one after the other: every one has to take something away."""
    left = one_solid(body, what)
    for tool in tools:
        before = left.Volume()
        left = one_solid(func.cut(left, tool), what)
        if before - left.Volume() < LEAST_CHANGE_MM3:
            raise BuildError(f"{what}: a cut took nothing away")
    return left


def drilled(what: str, body: Solid, holes: Sequence[Solid], *, depth: float) -> Solid:
    """Drill equal holes in one cut; each has to take a full cylinder of `depth` away."""
    if not holes:
        return body
    left = one_solid(body.cut(*holes), what)
    taken = body.Volume() - left.Volume()
    box = holes[0].BoundingBox()
    diameter = min(box.xlen, box.ylen, box.zlen)
    wanted = len(holes) * pi / 4 * diameter**2 * depth
    if abs(taken - wanted) > HOLE_TOLERANCE * wanted:
        raise BuildError(f"{what}: {len(holes)} holes took {taken:.1f} mm3, not {wanted:.1f}")
    return left


def common(what: str, first: Shape, second: Shape) -> Solid:
    """Give what two solids share."""
    return one_solid(func.intersect(first, second), what)


def one_solid(shape: Shape, what: str) -> Solid:
    """Give the one solid a shape holds, or raise."""
    solids = shape.Solids()
    if len(solids) != 1:
        raise BuildError(f"{what}: came out as {len(solids)} solids, not one")
    solid = solids[0]
    if solid.Volume() <= 0:
        raise BuildError(f"{what}: came out empty or inside out")
    return solid


def sound(what: str, solid: Solid) -> Solid:
    """Give the solid back when the kernel finds it valid, or raise."""
    if not solid.isValid():
        raise BuildError(f"{what}: the CAD kernel calls the solid invalid")
    return solid


def polar(radius: float, angle: float) -> Point:
    """Give the point at `radius` and `angle`."""
    return (radius * cos(angle), radius * sin(angle))


def _edges(
    start: Point, steps: Sequence[Point | Arc], place: Callable[[Point], Vector]
) -> list[Edge]:
    edges: list[Edge] = []
    here = start
    for step in (*steps, start):
        if isinstance(step[0], tuple):
            through, end = step
            edges.append(Edge.makeThreePointArc(place(here), place(through), place(end)))
        else:
            end = step
            if end == here:
                continue
            edges.append(func.segment(place(here), place(end)))
        here = end
    return edges

"""Where a mark lies: a place on a plane or on a wall turned about the z axis, and its face."""

from __future__ import annotations

from dataclasses import dataclass
from math import atan2, ceil, cos, hypot, pi, sin, tan
from typing import TYPE_CHECKING, Protocol

from OCP.BRepAdaptor import BRepAdaptor_Surface
from OCP.BRepClass import BRepClass_FaceClassifier
from OCP.Geom import (
    Geom_Circle,
    Geom_ConicalSurface,
    Geom_CylindricalSurface,
    Geom_Line,
    Geom_Plane,
)
from OCP.GeomAbs import GeomAbs_Cone, GeomAbs_Cylinder, GeomAbs_Plane
from OCP.gp import gp_Ax2, gp_Ax3, gp_Circ, gp_Dir, gp_Pnt, gp_Pnt2d, gp_Vec
from OCP.TopAbs import TopAbs_FACE, TopAbs_IN, TopAbs_REVERSED
from OCP.TopExp import TopExp_Explorer
from OCP.TopoDS import TopoDS

if TYPE_CHECKING:
    from collections.abc import Iterator

    from cadquery.func import Solid
    from OCP.Geom import Geom_Curve, Geom_Surface
    from OCP.TopoDS import TopoDS_Face

    from gyrecut.proportions.dimensions import Point

Triple = tuple[float, float, float]

SAME_MM = 1e-4  # how near a face must come to the place that is looked for
SAME_DIRECTION = 1e-6
SAMPLE_MM = 2.5  # closer together than any hole is wide that a mark must keep off
ON_FACE = 1e-7
LEAST_REFERENCE_MM = 1.0  # a cone told from its tip has no parallel cone inside told from there


@dataclass(frozen=True, slots=True, kw_only=True)
class Flat:
    """A place on a plane: its middle [mm], the way writing runs and the way up (unit vectors)."""

    middle: Triple
    right: Triple
    up: Triple

    @property
    def outward(self) -> Triple:
        """Unit normal, towards who reads it."""
        (a, b, c), (p, q, r) = self.right, self.up
        return (b * r - c * q, c * p - a * r, a * q - b * p)

    def at(self, point: Point, depth_mm: float = 0.0) -> Triple:
        """Give a point of the writing in space, `depth_mm` below the face."""
        x, y = point
        middle, outward = self.middle, self.outward
        return (
            middle[0] + x * self.right[0] + y * self.up[0] - depth_mm * outward[0],
            middle[1] + x * self.right[1] + y * self.up[1] - depth_mm * outward[1],
            middle[2] + x * self.right[2] + y * self.up[2] - depth_mm * outward[2],
        )

    def volume_mm3(self, area: float, _moment: float, depth_mm: float) -> float:
        """Give what a groove of this area takes away [mm3]."""
        return area * depth_mm

    def wedge_mm3(self, start: Point, end: Point, drop: Point, depth_mm: float) -> float:
        """Give what is left standing where a side is laid back by `drop` [mm3]."""
        return hypot(*drop) * depth_mm / 2 * hypot(end[0] - start[0], end[1] - start[1])


@dataclass(frozen=True, slots=True, kw_only=True)
class Round:
    """A place outside a wall turned about the z axis; writing runs round it, z is up.

    `lean` [rad] is the wall's from the vertical, positive where it widens upwards.
    """

    radius_mm: float
    z_mm: float
    angle: float
    lean: float = 0.0

    def height_of(self, y: float) -> float:
        """Give z where the writing is `y` above its middle [mm]."""
        return self.z_mm + y * cos(self.lean)

    def at(self, point: Point, depth_mm: float = 0.0) -> Triple:
        """Give a point of the writing in space, `depth_mm` nearer to the axis than the face."""
        x, y = point
        angle = self.angle + x / self.radius_mm
        radius = self.radius_mm + y * sin(self.lean) - depth_mm
        return (radius * cos(angle), radius * sin(angle), self.height_of(y))

    def volume_mm3(self, area: float, moment: float, depth_mm: float) -> float:
        """Give what a groove takes away [mm3]; `moment` is that of its area about y = 0 [mm3].

        It is the integral of depth times radius less half the depth squared, over angle and z.
        """
        mean = depth_mm * self.radius_mm - depth_mm**2 / 2
        turned = mean * area + depth_mm * sin(self.lean) * moment
        return turned * cos(self.lean) / self.radius_mm

    def wedge_mm3(self, start: Point, end: Point, drop: Point, depth_mm: float) -> float:
        """Give what is left standing where a level side is laid back by `drop` [mm3].

        A triangle turned about the axis: its area times the way of its middle (Pappus).
        """
        above = self.radius_mm + start[1] * sin(self.lean)
        below = above - drop[1] * sin(self.lean)
        middle = (above + (above - depth_mm) + (below - depth_mm)) / 3
        area = depth_mm * abs(drop[1]) * cos(self.lean) / 2
        return area * middle * abs(end[0] - start[0]) / self.radius_mm


Spot = Flat | Round


class Ground(Protocol):
    """A face, and how a place on it maps to the face's own parameters."""

    @property
    def face(self) -> TopoDS_Face:
        """The face."""

    @property
    def spot(self) -> Spot:
        """The place on it."""

    def uv(self, point: Point) -> Point:
        """Give a point of the writing in the face's parameters."""

    def curve(self, start: Point, end: Point, depth_mm: float) -> tuple[Geom_Curve, float]:
        """Give the curve between two points of the writing, and its length as a parameter."""

    def floor(self, depth_mm: float) -> Geom_Surface:
        """Give the surface `depth_mm` below, with the same parameters."""


@dataclass(frozen=True, slots=True)
class FlatGround:
    """A plane face."""

    face: TopoDS_Face
    spot: Flat
    frame: gp_Ax3

    def uv(self, point: Point) -> Point:
        """Give a point of the writing in the face's parameters."""
        away = gp_Vec(self.frame.Location(), gp_Pnt(*self.spot.at(point)))
        return (
            away.Dot(gp_Vec(self.frame.XDirection())),
            away.Dot(gp_Vec(self.frame.YDirection())),
        )

    def curve(self, start: Point, end: Point, depth_mm: float) -> tuple[Geom_Curve, float]:
        """Give the straight line between two points of the writing, and its length."""
        return straight(self.spot.at(start, depth_mm), self.spot.at(end, depth_mm))

    def floor(self, depth_mm: float) -> Geom_Surface:
        """Give the plane `depth_mm` below."""
        return Geom_Plane(self.frame.Translated(gp_Vec(*self.spot.outward).Multiplied(-depth_mm)))


@dataclass(frozen=True, slots=True)
class RoundGround:
    """A cylinder or cone face about the z axis."""

    face: TopoDS_Face
    spot: Round
    wall: _Wall

    def uv(self, point: Point) -> Point:
        """Give a point of the writing in the face's parameters."""
        wall = self.wall
        angle = wall.sense * (self.spot.angle + point[0] / self.spot.radius_mm - wall.zero)
        rise = (self.spot.height_of(point[1]) - wall.base_mm) * wall.direction
        return wall.first + (angle - wall.first) % (2 * pi), rise / cos(wall.half_angle)

    def curve(self, start: Point, end: Point, depth_mm: float) -> tuple[Geom_Curve, float]:
        """Give the arc or the straight line between two points, and its angle or length."""
        one = self.spot.at(start, depth_mm)
        if start[1] != end[1]:
            return straight(one, self.spot.at(end, depth_mm))
        turn = (end[0] - start[0]) / self.spot.radius_mm
        axis = gp_Dir(0.0, 0.0, 1.0 if turn > 0 else -1.0)
        radius = self.spot.radius_mm + start[1] * sin(self.spot.lean) - depth_mm
        begin = gp_Ax2(gp_Pnt(0.0, 0.0, one[2]), axis, gp_Dir(one[0], one[1], 0.0))
        return Geom_Circle(gp_Circ(begin, radius)), abs(turn)

    def floor(self, depth_mm: float) -> Geom_Surface:
        """Give the same wall, `depth_mm` nearer to the axis."""
        wall = self.wall
        if wall.half_angle:
            return Geom_ConicalSurface(wall.frame, wall.half_angle, wall.reference_mm - depth_mm)
        return Geom_CylindricalSurface(wall.frame, wall.reference_mm - depth_mm)


@dataclass(frozen=True, slots=True, kw_only=True)
class _Wall:
    """What the kernel says of a face turned about the z axis.

    Its angle begins at `zero` and runs as `sense` says, its height at z = `base_mm` and up where
    `direction` is 1; there its radius is `reference_mm`.
    """

    frame: gp_Ax3
    half_angle: float
    reference_mm: float
    zero: float
    sense: float
    base_mm: float
    direction: float
    first: float


def ground_of(solid: Solid, spot: Spot, width_mm: float, height_mm: float) -> Ground | None:
    """Find the face on which a whole rectangle round a place lies.

    Parameters
    ----------
    solid : Solid
        What is marked [mm].
    spot : Flat or Round
        Middle of the rectangle.
    width_mm, height_mm : float
        Along the writing, and square to it [mm].

    Returns
    -------
    Ground or None
        None where no face holds all of it.
    """
    samples = _samples(width_mm, height_mm)
    for face in _faces(solid):
        ground: Ground
        if isinstance(spot, Flat):
            frame = _plane_through(spot, face)
            if frame is None:
                continue
            ground = FlatGround(face, spot, frame)
        else:
            wall = _wall_through(spot, face)
            if wall is None:
                continue
            ground = RoundGround(face, spot, wall)
        places = [ground.uv(point) for point in samples]
        if isinstance(spot, Round) and not _in_one_run(places):
            continue
        if all(_is_inside(face, place) for place in places):
            return ground
    return None


def straight(start: Triple, end: Triple) -> tuple[Geom_Curve, float]:
    """Give the line between two points, and its length [mm]."""
    run = gp_Vec(gp_Pnt(*start), gp_Pnt(*end))
    return Geom_Line(gp_Pnt(*start), gp_Dir(run)), run.Magnitude()


def _samples(width: float, height: float) -> list[Point]:
    across, up = (max(2, ceil(extent / SAMPLE_MM)) for extent in (width, height))
    return [
        (width * (column / across - 0.5), height * (row / up - 0.5))
        for column in range(across + 1)
        for row in range(up + 1)
    ]


def _faces(solid: Solid) -> Iterator[TopoDS_Face]:
    explorer = TopExp_Explorer(solid.wrapped, TopAbs_FACE)
    while explorer.More():
        yield TopoDS.Face_s(explorer.Current())
        explorer.Next()


def _plane_through(spot: Flat, face: TopoDS_Face) -> gp_Ax3 | None:
    """Give the frame of a plane face that a place lies in."""
    surface = BRepAdaptor_Surface(face)
    if surface.GetType() != GeomAbs_Plane:
        return None
    frame = surface.Plane().Position()
    normal = gp_Vec(frame.XDirection().Crossed(frame.YDirection()))
    if face.Orientation() == TopAbs_REVERSED:
        normal.Reverse()
    away = gp_Vec(frame.Location(), gp_Pnt(*spot.middle)).Dot(normal)
    is_it = abs(away) < SAME_MM and normal.Dot(gp_Vec(*spot.outward)) > 1 - SAME_DIRECTION
    return frame if is_it else None


def _wall_through(spot: Round, face: TopoDS_Face) -> _Wall | None:
    """Describe a face turned about the z axis that a place lies in."""
    surface = BRepAdaptor_Surface(face)
    if surface.GetType() == GeomAbs_Cylinder:
        cylinder = surface.Cylinder()
        frame, half_angle, reference = cylinder.Position(), 0.0, cylinder.Radius()
    elif surface.GetType() == GeomAbs_Cone:
        cone = surface.Cone()
        frame, half_angle, reference = cone.Position(), cone.SemiAngle(), cone.RefRadius()
    else:
        return None
    centre, axis, zero = frame.Location(), frame.Direction(), frame.XDirection()
    if abs(axis.Z()) < 1 - SAME_DIRECTION or abs(centre.X()) + abs(centre.Y()) > SAME_MM:
        return None
    rise = (spot.z_mm - centre.Z()) * axis.Z()
    is_it = (
        reference > LEAST_REFERENCE_MM
        and abs(reference + rise * tan(half_angle) - spot.radius_mm) < SAME_MM
        and abs(half_angle * axis.Z() - spot.lean) < SAME_MM / spot.radius_mm
        # the kernel's own normal looks out of a right-handed frame
        and frame.Direct() != (face.Orientation() == TopAbs_REVERSED)
    )
    if not is_it:
        return None
    return _Wall(
        frame=frame,
        half_angle=half_angle,
        reference_mm=reference,
        zero=atan2(zero.Y(), zero.X()),
        sense=1.0 if frame.Direct() == (axis.Z() > 0) else -1.0,
        base_mm=centre.Z(),
        direction=axis.Z(),
        first=surface.FirstUParameter(),
    )


def _in_one_run(places: list[Point]) -> bool:
    """Whether a mark stays clear of the seam, where a turned face begins and ends."""
    turns = [u for u, _ in places]
    return max(turns) - min(turns) < pi


def _is_inside(face: TopoDS_Face, place: Point) -> bool:
    return bool(BRepClass_FaceClassifier(face, gp_Pnt2d(*place), ON_FACE).State() == TopAbs_IN)

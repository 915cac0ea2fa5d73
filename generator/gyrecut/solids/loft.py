"""A duct from a convex polygon to a circle, of plane triangles and patches of cones."""

from __future__ import annotations

from math import atan2, cos, pi, sin
from typing import TYPE_CHECKING

from cadquery import func
from cadquery.func import Edge, Face, Solid, Vector
from OCP.BRepBuilderAPI import BRepBuilderAPI_MakeFace
from OCP.GC import GC_MakeArcOfCircle
from OCP.Geom import Geom_BSplineCurve
from OCP.GeomConvert import GeomConvert
from OCP.GeomFill import GeomFill
from OCP.gp import gp_Pnt
from OCP.TColgp import TColgp_Array1OfPnt
from OCP.TColStd import TColStd_Array1OfInteger, TColStd_Array1OfReal

from gyrecut.solids.shapes import one_solid

if TYPE_CHECKING:
    from gyrecut.proportions.dimensions import Point

FACE_TOLERANCE_MM = 1e-7


def loft_to_circle(outline: tuple[Point, ...], radius: float, height: float) -> Solid:
    """Give the convex hull of a polygon at w = 0 and a circle round the origin at w = `height`.

    Each edge runs to the circle as a plane triangle, each corner as a patch of an oblique cone;
    the same faces unroll flat.

    Parameters
    ----------
    outline : tuple of (float, float)
        Corners (u, v) of a convex polygon round the origin, counter-clockwise [mm].
    radius, height : float
        Of the circle [mm].

    Returns
    -------
    Solid
    """
    normals = [
        atan2(here[0] - there[0], there[1] - here[1])
        for here, there in zip(outline, (*outline[1:], outline[0]), strict=True)
    ]

    def on_circle(angle: float) -> Vector:
        return Vector(radius * cos(angle), radius * sin(angle), height)

    faces, rim = [], []
    count = len(outline)
    for index, (u, v) in enumerate(outline):
        after = (index + 1) % count
        here, there = Vector(u, v, 0.0), Vector(*outline[after], 0.0)
        first = normals[index]
        last = first + (normals[after] - first) % (2 * pi)
        touch = on_circle(first)
        faces.append(func.face(func.polyline(here, there, touch, here)))
        arc = (touch, on_circle((first + last) / 2), on_circle(last))
        faces.append(_cone_patch(there, arc))
        rim.append(Edge.makeThreePointArc(*arc))
    foot = [Vector(u, v, 0.0) for u, v in outline]
    faces.append(func.face(func.polyline(*foot, foot[0])))
    faces.append(func.face(func.wire(*rim)))
    return one_solid(func.solid(func.shell(*faces)), "transition")


def _cone_patch(apex: Vector, arc: tuple[Vector, Vector, Vector]) -> Face:
    """Rule straight lines from one point to an arc."""
    poles = TColgp_Array1OfPnt(1, 2)
    knots, multiplicities = TColStd_Array1OfReal(1, 2), TColStd_Array1OfInteger(1, 2)
    for index in (1, 2):
        poles.SetValue(index, apex.toPnt())
        knots.SetValue(index, float(index - 1))
        multiplicities.SetValue(index, 2)
    point = Geom_BSplineCurve(poles, knots, multiplicities, 1)
    circle = GC_MakeArcOfCircle(*(gp_Pnt(*corner.toTuple()) for corner in arc)).Value()
    surface = GeomFill.Surface_s(point, GeomConvert.CurveToBSplineCurve_s(circle))
    return Face(BRepBuilderAPI_MakeFace(surface, FACE_TOLERANCE_MM).Face())

"""One triangle mesh of a solid, shared by the checks, the STL files and the print job."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np
from OCP.BRep import BRep_Tool
from OCP.BRepBuilderAPI import BRepBuilderAPI_Copy
from OCP.BRepMesh import BRepMesh_IncrementalMesh
from OCP.TopAbs import TopAbs_FACE, TopAbs_REVERSED
from OCP.TopExp import TopExp_Explorer
from OCP.TopLoc import TopLoc_Location
from OCP.TopoDS import TopoDS
from trimesh import Trimesh

from gyrecut.errors import BuildError

if TYPE_CHECKING:
    from cadquery import Shape
    from numpy.typing import NDArray
    from OCP.TopoDS import TopoDS_Shape

CHORD_ERROR_MM = 0.05  # far below a bead's width, far above the noise of the kernel
CHORD_ANGLE = 0.35  # rad; 18 sides at least, so that a hole too small for the chord stays round
WELD_DECIMALS = 6  # of a millimetre; ten times the kernel's own tolerance of 1e-7 mm


def mesh_of(
    solid: Shape,
    chord_error_mm: float = CHORD_ERROR_MM,
    angular: float = CHORD_ANGLE,
    *,
    name: str = "solid",
) -> Trimesh:
    """Mesh a solid once, closed, with facets that look outward.

    The solid is left as it was: a mesh kept on it would answer a later call that asks for
    another chord error, and would change the kernel's own bounding box.

    Parameters
    ----------
    solid : Shape
        One solid [mm].
    chord_error_mm : float
        Largest distance between a facet and the surface it stands for, absolute [mm].
    angular : float
        Largest turn between neighbouring facets [rad].
    name : str
        What an error calls it.

    Returns
    -------
    Trimesh
        Vertices welded, (n, 3) float [mm], holding only values a 32-bit float can hold, so
        that a file and a check see the same numbers.

    Raises
    ------
    BuildError
        When the kernel cannot mesh it, or the mesh is open, inside out or self-touching.
    """
    shape = BRepBuilderAPI_Copy(solid.wrapped, False, False).Shape()  # noqa: FBT003 (kernel's)
    mesher = BRepMesh_IncrementalMesh(shape, chord_error_mm, False, angular, True)  # noqa: FBT003
    if not mesher.IsDone():
        raise _unmeshable(name, "the CAD kernel gave up")
    points, facets = _triangulation(shape, name)
    vertices, facets = _welded(points, facets)
    mesh = Trimesh(vertices=vertices, faces=facets, process=False, validate=False)
    if not mesh.is_watertight:
        raise _unmeshable(name, f"it is not closed {_first_gap(mesh)}")
    if not mesh.is_volume:
        raise _unmeshable(name, "its facets do not all look outward")
    return mesh


def _triangulation(shape: TopoDS_Shape, name: str) -> tuple[NDArray[np.float64], NDArray[np.int64]]:
    points, facets, count = [], [], 0
    explorer = TopExp_Explorer(shape, TopAbs_FACE)
    while explorer.More():
        face = TopoDS.Face_s(explorer.Current())
        explorer.Next()
        location = TopLoc_Location()
        patch = BRep_Tool.Triangulation_s(face, location)
        if patch is None:
            raise _unmeshable(name, "the CAD kernel left a face without facets")
        # The kernel hands over one node at a time; a flat iterator is the quickest way in.
        nodes = np.fromiter(
            (number for node in patch.MapNodeArray() for number in node.Coord()),
            dtype=np.float64,
            count=3 * patch.NbNodes(),
        ).reshape(-1, 3)
        corners = np.fromiter(
            (index for facet in patch.InternalTriangles() for index in facet.Get()),
            dtype=np.int64,
            count=3 * patch.NbTriangles(),
        ).reshape(-1, 3)
        if face.Orientation() == TopAbs_REVERSED:
            corners = corners[:, ::-1]
        points.append(nodes if location.IsIdentity() else _moved(nodes, location))
        facets.append(corners + (count - 1))
        count += len(nodes)
    if not points:
        raise _unmeshable(name, "it has no faces")
    return np.concatenate(points), np.concatenate(facets)


def _moved(nodes: NDArray[np.float64], location: TopLoc_Location) -> NDArray[np.float64]:
    move = location.Transformation()
    matrix = np.array([[move.Value(row, column) for column in range(1, 5)] for row in range(1, 4)])
    moved: NDArray[np.float64] = nodes @ matrix[:, :3].T + matrix[:, 3]
    return moved


def _welded(
    points: NDArray[np.float64], facets: NDArray[np.int64]
) -> tuple[NDArray[np.float64], NDArray[np.int64]]:
    # Faces that share an edge share its nodes, each with its own copy of them. Adding zero
    # turns a negative zero into the other one, which would be another key.
    kept = np.round(points, WELD_DECIMALS).astype(np.float32) + np.float32(0)
    # One 12-byte key a vertex: far quicker than numpy's unique over rows.
    keys = np.ascontiguousarray(kept).view(np.dtype((np.void, 12))).ravel()
    _, first, index = np.unique(keys, return_index=True, return_inverse=True)
    # In order of first appearance, so that neighbours in the file are neighbours on the piece.
    order = np.argsort(first)
    rank = np.empty_like(order)
    rank[order] = np.arange(len(order))
    corners = rank[index.ravel()][facets]
    # A facet that lost a corner is gone from both sides of its edges; a thin one that kept
    # three must stay, or its neighbours would gape.
    flat = (
        (corners[:, 0] == corners[:, 1])
        | (corners[:, 1] == corners[:, 2])
        | (corners[:, 2] == corners[:, 0])
    )
    return kept[first[order]].astype(np.float64), corners[~flat]


def _first_gap(mesh: Trimesh) -> str:
    edges, uses = np.unique(mesh.edges_sorted, axis=0, return_counts=True)
    wrong = edges[uses != 2]  # noqa: PLR2004 (an edge has two sides)
    x, y, z = mesh.vertices[wrong[0]].mean(axis=0)
    return f"at {len(wrong)} edges, the first near x {x:.2f}, y {y:.2f}, z {z:.2f} mm"


def _unmeshable(name: str, why: str) -> BuildError:
    return BuildError(
        f"{name} cannot be meshed: {why}; nothing was written. "
        "Change a wall, a lap or a diameter in the profile a little and build again"
    )

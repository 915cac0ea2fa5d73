"""One triangle mesh, with what every check asks of it worked out once."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

if TYPE_CHECKING:
    import trimesh
    from numpy.typing import NDArray

SLIVER_HEIGHT_MM = 1e-3  # flatter than this, a triangle's own normal is rounding noise
PAIR = 2  # triangles that an edge of a closed surface has
BED_MM = 0.05  # a quarter of a 0.2 mm layer: lower than this is on the bed


@dataclass(frozen=True, slots=True, kw_only=True)
class Surface:
    """Triangles, their normals and who borders whom.

    Parameters
    ----------
    corners : (n, 3, 3) float
        Corners of each triangle [mm].
    faces : (n, 3) int
        Vertex numbers of each triangle.
    vertices : (v, 3) float
        Vertices [mm].
    normals : (n, 3) float
        Outward unit normals [-]; a sliver has the normal of the neighbour on its longest edge.
    areas : (n,) float
        Area of each triangle [mm2].
    neighbours : (n, 3) int
        Triangle across the edge from corner k to corner k + 1; -1 where the mesh is not closed.
    is_kept : (m,) bool
        Which triangles of the mesh are among them; one that merging shrank to an edge is not.
    loose_edges, crowded_edges : int
        Edges with one triangle only, and with three or more.
    turned_edges : int
        Edges whose two triangles run round in opposite senses.
    """

    corners: NDArray[np.float64]
    faces: NDArray[np.int64]
    vertices: NDArray[np.float64]
    normals: NDArray[np.float64]
    areas: NDArray[np.float64]
    neighbours: NDArray[np.int64]
    is_kept: NDArray[np.bool_]
    loose_edges: int
    crowded_edges: int
    turned_edges: int

    @property
    def is_closed(self) -> bool:
        """Whether every edge has exactly two triangles that agree which side is out."""
        return (
            len(self.faces) > 0
            and self.loose_edges == self.crowded_edges == self.turned_edges == 0
            and bool(np.isfinite(self.corners).all())
        )

    @property
    def cone_volumes(self) -> NDArray[np.float64]:
        """Signed volume between the origin and each triangle, `(n,) float` [mm3]."""
        first, second, third = self.corners.transpose(1, 0, 2)
        shares: NDArray[np.float64] = np.einsum("ij,ij->i", first, np.cross(second, third)) / 6
        return shares

    @property
    def volume_mm3(self) -> float:
        """Signed volume: negative when the surface is inside out [mm3]."""
        return float(self.cone_volumes.sum())

    @property
    def centre_of_mass(self) -> NDArray[np.float64]:
        """Centre of mass of the solid at one density, `(3,) float` [mm]."""
        shares = self.cone_volumes
        centre: NDArray[np.float64] = shares @ self.corners.sum(axis=1) / 4 / shares.sum()
        return centre

    @property
    def is_on_bed(self) -> NDArray[np.bool_]:
        """Which triangles lie flat on the bed, `(n,) bool`."""
        low: NDArray[np.bool_] = self.corners[:, :, 2].max(axis=1) < BED_MM
        return low & (self.normals[:, 2] < 0)


def surface_of(mesh: trimesh.Trimesh) -> Surface:
    """Read a mesh, whose equal vertices are merged, into a `Surface`.

    Parameters
    ----------
    mesh : trimesh.Trimesh
        The piece in print pose [mm].

    Returns
    -------
    Surface
        Also for a mesh that is not closed: it says so.
    """
    faces = np.asarray(mesh.faces, dtype=np.int64)
    # A triangle that merging shrank to an edge has no face; without it the others still close.
    is_kept = (faces != np.roll(faces, 1, axis=1)).all(axis=1)
    faces = faces[is_kept]
    vertices = np.asarray(mesh.vertices, dtype=np.float64)
    corners = vertices[faces]
    sides = np.roll(corners, -1, axis=1) - corners
    across = np.cross(sides[:, 0], sides[:, 1])
    lengths = np.sqrt(np.einsum("ij,ij->i", across, across))
    normals = across / np.maximum(lengths, 1e-300)[:, None]

    neighbours, loose, crowded, turned = _borders(faces, len(vertices))
    side_lengths = np.sqrt(np.einsum("ijk,ijk->ij", sides, sides))
    longest = side_lengths.argmax(axis=1)
    rows = np.arange(len(faces))
    slivers = np.flatnonzero(lengths < SLIVER_HEIGHT_MM * side_lengths[rows, longest])
    beyond = neighbours[slivers, longest[slivers]]
    normals[slivers[beyond >= 0]] = normals[beyond[beyond >= 0]]
    return Surface(
        corners=corners,
        faces=faces,
        vertices=vertices,
        normals=normals,
        areas=lengths / 2,
        neighbours=neighbours,
        is_kept=is_kept,
        loose_edges=loose,
        crowded_edges=crowded,
        turned_edges=turned,
    )


def _borders(
    faces: NDArray[np.int64], vertex_count: int
) -> tuple[NDArray[np.int64], int, int, int]:
    """Pair the half edges of all triangles.

    Returns
    -------
    tuple
        Neighbours `(n, 3) int`, and the counts of loose, crowded and turned edges.
    """
    start, end = faces.ravel(), np.roll(faces, -1, axis=1).ravel()
    keys = np.minimum(start, end) * vertex_count + np.maximum(start, end)
    order = np.argsort(keys, kind="stable")
    ranked = keys[order]
    is_first = np.empty(len(ranked), dtype=np.bool_)
    is_first[:1] = True
    np.not_equal(ranked[1:], ranked[:-1], out=is_first[1:])
    begins = np.flatnonzero(is_first)
    counts = np.diff(begins, append=len(ranked))
    pairs = begins[counts == PAIR]
    one, two = order[pairs], order[pairs + 1]
    neighbours = np.full(faces.size, -1, dtype=np.int64)
    neighbours[one], neighbours[two] = two // 3, one // 3
    return (
        neighbours.reshape(-1, 3),
        int((counts == 1).sum()),
        int((counts > PAIR).sum()),
        int((start[one] == start[two]).sum()),
    )


def patches_of(
    neighbours: NDArray[np.int64], chosen: NDArray[np.bool_]
) -> tuple[int, NDArray[np.int64]]:
    """Label the patches that the chosen triangles form over shared edges.

    Parameters
    ----------
    neighbours : (n, 3) int
        As in `Surface`.
    chosen : (n,) bool
        Triangles that may belong to a patch.

    Returns
    -------
    int
        How many patches there are.
    (n,) int
        Patch of each triangle; -1 where it was not chosen.
    """
    from scipy.sparse import coo_array  # noqa: PLC0415 - a quarter second that `size` need not pay
    from scipy.sparse.csgraph import connected_components  # noqa: PLC0415

    labels = np.full(len(chosen), -1, dtype=np.int64)
    places = np.flatnonzero(chosen)
    rank = np.full(len(chosen) + 1, -1, dtype=np.int64)  # the last entry answers for border -1
    rank[places] = np.arange(len(places))
    other = rank[neighbours[places]]
    one, side = np.nonzero(other >= 0)
    graph = coo_array(
        (np.ones(len(one), dtype=np.bool_), (one, other[one, side])),
        shape=(len(places), len(places)),
    )
    count, found = connected_components(graph.tocsr(), directed=False)
    labels[places] = found
    return int(count), labels

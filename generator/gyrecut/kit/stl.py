"""Binary STL: 84 bytes of header and count, then 50 bytes a facet, in millimetres."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np

from gyrecut.errors import BuildError

if TYPE_CHECKING:
    from trimesh import Trimesh

HEADER_BYTES = 80
FACET = np.dtype([("normal", "<f4", 3), ("corners", "<f4", (3, 3)), ("attribute", "<u2")])


def stl_bytes(mesh: Trimesh, label: str) -> bytes:
    """Write a mesh as binary STL.

    Parameters
    ----------
    mesh : Trimesh
        Closed and oriented [mm].
    label : str
        What the header says; cut at 80 bytes. No date, so that equal pieces are equal files.

    Returns
    -------
    bytes
        The file.

    Raises
    ------
    BuildError
        When the label begins with "solid", which makes a reader take the file for text.
    """
    header = label.encode("ascii", "replace")[:HEADER_BYTES]
    if header.lower().startswith(b"solid"):
        raise BuildError(f'an STL header may not begin with "solid", got "{label}"')
    corners = mesh.vertices[mesh.faces]
    across = np.cross(corners[:, 1] - corners[:, 0], corners[:, 2] - corners[:, 0])
    length = np.linalg.norm(across, axis=1, keepdims=True)
    facets = np.zeros(len(corners), dtype=FACET)
    # A facet without area keeps a zero normal: readers then work it out for themselves.
    facets["normal"] = np.divide(across, length, out=np.zeros_like(across), where=length > 0)
    facets["corners"] = corners
    count = np.array([len(facets)], dtype="<u4")
    return header.ljust(HEADER_BYTES) + count.tobytes() + facets.tobytes()

"""A fingerprint of a piece's geometry, to tell which printed pieces a new kit still needs."""

from __future__ import annotations

import hashlib
from typing import TYPE_CHECKING

import numpy as np

if TYPE_CHECKING:
    from trimesh import Trimesh

SCHEME = "mesh-1"  # goes up when the same geometry would get another hash
GRID_MM = 1e-4  # no printer resolves it; above the step of a 32-bit float up to 1000 mm


def geometry_hash(mesh: Trimesh) -> str:
    """Hash the facets of a posed mesh, in an order that does not depend on the kernel's.

    The mesh is hashed, not the CAD file: it is what gets printed, the kernel makes the same
    one from the same solid each time, and a CAD file holds seams and counters that may differ
    where the piece does not. A finer chord error or another kernel version gives another
    hash: the answer then is "print again", never a wrong "still good".

    Parameters
    ----------
    mesh : Trimesh
        Posed, welded mesh [mm].

    Returns
    -------
    str
        The scheme's name, a colon, and 64 hexadecimal digits.
    """
    points = np.rint(mesh.vertices / GRID_MM).astype("<i8")
    order = np.lexsort(points.T[::-1])
    rank = np.empty(len(order), dtype="<i8")
    rank[order] = np.arange(len(order))
    corners = rank[mesh.faces]
    # The smallest corner first; turned, not sorted, or an inside-out mesh would hash alike.
    start = corners.argmin(axis=1)[:, None]
    turned = np.take_along_axis(corners, (start + np.arange(3)) % 3, axis=1)
    turned = turned[np.lexsort(turned.T[::-1])]
    digest = hashlib.sha256(points[order].tobytes())
    digest.update(turned.tobytes())
    return f"{SCHEME}:{digest.hexdigest()}"

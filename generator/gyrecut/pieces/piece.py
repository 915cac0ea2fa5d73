"""One printed object: where it sits in the machine, and how it lies on the bed."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np
from cadquery.func import Location
from trimesh import Trimesh

from gyrecut.pieces.meshing import mesh_of
from gyrecut.proportions.division import best_turn

if TYPE_CHECKING:
    from cadquery.func import Solid
    from numpy.typing import NDArray

    from gyrecut.proportions.printing import Bed

AS_IT_STANDS = Location((0.0, 0.0, 0.0))


@dataclass(frozen=True, slots=True, kw_only=True)
class Piece:
    """One printed object.

    Parameters
    ----------
    name : str
        File-safe name, unique in the kit.
    title : str
        What it is, for people.
    placed : Solid
        In machine coordinates [mm].
    posed : Solid
        In print pose: standing on z = 0, its smallest x and y at 0 [mm].
    mesh : Trimesh
        The one mesh of `posed` [mm].
    copies : int
        How many of it the kit needs.
    mark : str
        What is engraved on it as its name, "" where nothing is.
    """

    name: str
    title: str
    placed: Solid
    posed: Solid
    mesh: Trimesh
    copies: int = 1
    mark: str = ""


def laid_down(
    placed: Solid,
    upright: Location,
    bed: Bed,
    *,
    name: str,
    title: str,
    copies: int,
    mark: str = "",
) -> Piece:
    """Lay a solid on the bed.

    Parameters
    ----------
    placed : Solid
        The piece where it sits in the machine [mm].
    upright : Location
        Turns the face it stands on to the bottom.
    bed : Bed
        What the printer leaves; the piece is turned about the vertical to fit it best.
    name, title, copies, mark
        As in `Piece`.

    Returns
    -------
    Piece

    Raises
    ------
    BuildError
        Where it cannot be meshed.
    """
    standing = placed.moved(upright)
    mesh = mesh_of(standing, name=name)
    turn, _ = best_turn(mesh.vertices[:, :2], bed)
    spin = Location((0.0, 0.0, 0.0), (0.0, 0.0, 1.0), float(np.degrees(turn)))
    vertices = mesh.vertices @ _about_z(turn).T
    low = vertices.min(axis=0)
    to_bed = Location(tuple(float(-step) for step in low))
    return Piece(
        name=name,
        title=title,
        placed=placed,
        posed=standing.moved(to_bed * spin),
        # as a file will hold it: 32 bits a number
        mesh=Trimesh(
            (vertices - low).astype(np.float32).astype(np.float64), mesh.faces, process=False
        ),
        copies=copies,
        mark=mark,
    )


def _about_z(angle: float) -> NDArray[np.float64]:
    c, s = np.cos(angle), np.sin(angle)
    return np.array([[c, -s, 0.0], [s, c, 0.0], [0.0, 0.0, 1.0]])

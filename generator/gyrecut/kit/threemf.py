"""The print job: every piece a named object of one 3MF file, laid out side by side."""

from __future__ import annotations

import ctypes
import io
import uuid
from dataclasses import dataclass
from math import sqrt
from typing import TYPE_CHECKING

import lib3mf
import numpy as np
from lib3mf import Lib3MF

from gyrecut.errors import BuildError

if TYPE_CHECKING:
    from collections.abc import Sequence

    from gyrecut.kit.contents import KitContents, KitPiece

GAP_MM = 10.0  # between two pieces: room for a brim on both
NAMES = uuid.uuid5(uuid.NAMESPACE_URL, "urn:gyrecut:kit.3mf")


@dataclass(frozen=True, slots=True, kw_only=True)
class Spot:
    """Where one copy lies in the print job: the low corner of its box.

    Parameters
    ----------
    piece : KitPiece
        The piece.
    copy : int
        Which of its copies, from 1.
    x_mm, y_mm : float
        Low corner in plan [mm].
    """

    piece: KitPiece
    copy: int
    x_mm: float
    y_mm: float


def laid_out(pieces: Sequence[KitPiece]) -> tuple[Spot, ...]:
    """Lay every copy of every piece in rows, none over another, all at x, y >= 0.

    The rows are not a printer's bed: a slicer places the pieces anew. They only keep the file
    readable, roughly square, and valid.

    Parameters
    ----------
    pieces : Sequence[KitPiece]
        In the order they are laid.

    Returns
    -------
    tuple[Spot, ...]
        One for each copy.
    """
    copies = [(piece, copy) for piece in pieces for copy in range(1, piece.copies + 1)]
    area = sum((p.size_mm[0] + GAP_MM) * (p.size_mm[1] + GAP_MM) for p, _ in copies)
    row_width = max([sqrt(area), *(piece.size_mm[0] for piece in pieces)])
    spots: list[Spot] = []
    x = y = row_depth = 0.0
    for piece, copy in copies:
        width, depth, _ = piece.size_mm
        if x > 0 and x + width > row_width:
            x, y, row_depth = 0.0, y + row_depth + GAP_MM, 0.0
        spots.append(Spot(piece=piece, copy=copy, x_mm=x, y_mm=y))
        x += width + GAP_MM
        row_depth = max(row_depth, depth)
    return tuple(spots)


def threemf_bytes(contents: KitContents) -> bytes:
    """Write all pieces as one 3MF file in millimetres, through lib3mf in strict mode.

    Identifiers that 3MF wants to be unique are made from the names, so that two runs give
    the same bytes.

    Parameters
    ----------
    contents : KitContents
        The kit.

    Returns
    -------
    bytes
        The file.

    Raises
    ------
    BuildError
        When lib3mf refuses a piece, or finds its mesh not manifold.
    """
    try:
        return _written(_model(contents))
    except Lib3MF.ELib3MFException as wrong:
        raise BuildError(f"a 3MF file could not be made: {wrong}") from wrong


def _model(contents: KitContents) -> Lib3MF.Model:
    model = lib3mf.Wrapper().CreateModel()
    model.SetUnit(lib3mf.ModelUnit.MilliMeter)
    model.SetBuildUUID(_identifier(contents.profile_name, "build"))
    about = model.GetMetaDataGroup()
    for key, value in (
        ("Title", contents.profile_name),
        ("Application", f"gyrecut {contents.version}"),
    ):
        about.AddMetaData("", key, value, "xs:string", True)  # noqa: FBT003
    objects = {piece.name: _mesh_object(model, piece) for piece in contents.pieces}
    for spot in laid_out(contents.pieces):
        item = model.AddBuildItem(objects[spot.piece.name], _move_to(spot))
        item.SetPartNumber(spot.piece.name)
        item.SetUUID(_identifier(spot.piece.name, f"copy {spot.copy}"))
    return model


def _mesh_object(model: Lib3MF.Model, piece: KitPiece) -> Lib3MF.MeshObject:
    mesh_object = model.AddMeshObject()
    mesh_object.SetName(piece.name)
    mesh_object.SetPartNumber(piece.name)
    mesh_object.SetUUID(_identifier(piece.name, "object"))
    vertices = np.array(piece.mesh.vertices, dtype=np.float32)
    facets = np.array(piece.mesh.faces, dtype=np.uint32)
    mesh_object.SetGeometry(
        (Lib3MF.Position * len(vertices)).from_buffer(vertices),
        (Lib3MF.Triangle * len(facets)).from_buffer(facets),
    )
    if not mesh_object.IsManifoldAndOriented():
        raise BuildError(f"{piece.name}: lib3mf finds its mesh not manifold; no 3MF file was made")
    return mesh_object


def _move_to(spot: Spot) -> Lib3MF.Transform:
    low = spot.piece.mesh.bounds[0]
    transform = Lib3MF.Transform()
    for axis in range(3):
        transform.Fields[axis][axis] = 1.0
    transform.Fields[3][:] = [spot.x_mm - low[0], spot.y_mm - low[1], -low[2]]
    return transform


def _identifier(*words: str) -> str:
    return str(uuid.uuid5(NAMES, "/".join(words)))


def _written(model: Lib3MF.Model) -> bytes:
    # lib3mf's own WriteToBuffer writes twice and hands over a list with one int a byte.
    file = io.BytesIO()

    @Lib3MF.WriteCallback  # type: ignore[untyped-decorator]  # ctypes builds it at run time
    def write(data: int, count: int, _user: int | None) -> None:
        file.write(ctypes.string_at(data, count))

    @Lib3MF.SeekCallback  # type: ignore[untyped-decorator]
    def seek(position: int, _user: int | None) -> None:
        file.seek(position)

    writer = model.QueryWriter("3mf")
    writer.SetStrictModeActive(True)  # noqa: FBT003
    writer.WriteToCallback(write, seek, None)
    return file.getvalue()

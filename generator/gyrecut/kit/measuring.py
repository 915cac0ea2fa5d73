"""From a piece to the piece of a kit: measured, weighed, hashed."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.kit.contents import KitPiece
from gyrecut.kit.geometry_hash import geometry_hash

if TYPE_CHECKING:
    from gyrecut.pieces.piece import Piece

GRAMS_PER_MM3 = 1e-6  # of a material of 1 kg/m^3


def kit_piece(piece: Piece, *, density: float, stage: int = 1) -> KitPiece:
    """Measure a piece for the kit.

    Parameters
    ----------
    piece : Piece
        Cut, jointed, posed and meshed.
    density : float
        Of the solid polymer [kg/m^3].
    stage : int
        The stage it belongs to.

    Returns
    -------
    KitPiece
    """
    x, y, z = (float(extent) for extent in piece.mesh.extents)
    volume = float(piece.posed.Volume())
    return KitPiece(
        name=piece.name,
        title=piece.title,
        stage=stage,
        copies=piece.copies,
        placed=piece.placed,
        posed=piece.posed,
        mesh=piece.mesh,
        size_mm=(x, y, z),
        volume_mm3=volume,
        mass_g=volume * density * GRAMS_PER_MM3,
        geometry_hash=geometry_hash(piece.mesh),
        mark=piece.mark,
    )

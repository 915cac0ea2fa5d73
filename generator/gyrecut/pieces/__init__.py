"""Cut, jointed and laid in print pose: what the printer makes."""

from gyrecut.pieces.kit_pieces import make_pieces
from gyrecut.pieces.piece import Piece

__all__ = ["Piece", "make_pieces"]

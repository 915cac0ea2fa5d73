"""Grooves for sealing cord round an opening, as solids to cut away, millimetres."""

from __future__ import annotations

from typing import TYPE_CHECKING

from cadquery import func

from gyrecut.errors import BuildError
from gyrecut.solids.shapes import one_solid

if TYPE_CHECKING:
    from cadquery.func import Solid, Wire

    from gyrecut.proportions.dimensions import Groove

BEYOND = 1.0


def cord_groove(opening: Wire, groove: Groove, *, face_mm: float, opens_up: bool) -> Solid:
    """Make the groove round an opening in a flat face.

    Parameters
    ----------
    opening : Wire
        Edge of the air, closed and flat, drawn on z = 0: the kernel offsets a wire where it was
        drawn, not where it was moved to.
    groove : Groove
        Its sizes.
    face_mm : float
        Height of the face [mm].
    opens_up : bool
        Whether the groove is cut down into a face that looks up, or up into one that looks down.

    Returns
    -------
    Solid
        The groove, a little higher than deep so that it breaks through the face.

    Raises
    ------
    BuildError
        Where the offset edges are no closed rings.
    """
    away = -1.0 if opens_up else 1.0
    inner = _around(opening, groove.wall_mm, groove.turn_mm + groove.width_mm / 2)
    outer = _around(opening, groove.outer_mm, groove.turn_mm - groove.width_mm / 2)
    band = func.face(outer, inner).moved(z=face_mm - away * BEYOND)
    return one_solid(
        func.extrude(band, (0.0, 0.0, away * (groove.depth_mm + BEYOND))), "cord groove"
    )


def _around(opening: Wire, distance: float, turn: float) -> Wire:
    """Edge at a distance round the opening; where it turns outwards, with at least that radius."""
    (far,) = func.offset2D(opening, distance + turn).Wires()
    (ring,) = func.offset2D(far, -turn).Wires()
    if not ring.IsClosed():
        raise BuildError("cord groove: its edge does not close")
    return ring

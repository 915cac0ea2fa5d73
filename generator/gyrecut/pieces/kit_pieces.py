"""Turns the parts of one separator into its printed pieces."""

from __future__ import annotations

from typing import TYPE_CHECKING

from cadquery.func import Location, Solid

from gyrecut.pieces.cutting import rings
from gyrecut.pieces.piece import Piece, laid_down
from gyrecut.pieces.sectors import plate_sectors, ring_sectors
from gyrecut.proportions.dimensions import BellMouth

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.proportions.dimensions import Dimensions
    from gyrecut.proportions.printing import Bed
    from gyrecut.solids import Parts

AS_IT_STANDS = Location((0.0, 0.0, 0.0))
TURNED_OVER = Location((0.0, 0.0, 0.0), (1.0, 0.0, 0.0), 180.0)
OUTLET_TITLES = {"bell-mouth": "bell-mouth for the blower", "outlet": "outlet with hose cuff"}
LETTERS = "abcdefghijkl"


def make_pieces(
    parts: Parts, d: Dimensions, bed: Bed, *, prefix: str = "", copies: int = 1
) -> Iterator[Piece]:
    """Cut the parts of one separator into printed pieces, one after the other.

    Parameters
    ----------
    parts : Parts
        The solids of the separator.
    d : Dimensions
        Their dimensions, with the division into rings and sectors.
    bed : Bed
        What the printer leaves for a piece.
    prefix : str
        Put before every piece's name, for a machine of several stages.
    copies : int
        How many equal separators the stage has.

    Yields
    ------
    Piece
    """

    def piece(name: str, title: str, made: Solid, upright: Location) -> Piece:
        return laid_down(made, upright, bed, name=prefix + name, title=title, copies=copies)

    lid = plate_sectors(
        parts.lid,
        sectors=d.division.lid_sectors,
        first_cut=d.division.lid_first_cut,
        thickness_mm=d.lid.thickness_mm,
        gap_mm=d.joint.clearance_mm,
        slope=d.slope,
    )
    for name, title, made in _named("lid", "lid", lid):
        yield piece(name, title, made, AS_IT_STANDS)
    yield piece("vortex-finder", "vortex finder", parts.finder, TURNED_OVER)
    name = "bell-mouth" if isinstance(d.outlet, BellMouth) else "outlet"
    yield piece(name, OUTLET_TITLES[name], parts.outlet, TURNED_OVER)
    # modelled on its flange; turned back to that from where it sits in the machine
    yield piece(
        "transition",
        "transition from hose to slot",
        parts.transition,
        parts.transition_place.inverse,
    )
    whole = rings(parts.body, d)
    for number, (ring, made) in enumerate(zip(d.division.rings, whole, strict=True), start=1):
        name = f"body-{number}"
        title = f"body ring {number} of {len(whole)}"
        for sector_name, sector_title, sector in _named(
            name, title, ring_sectors(made, ring, d.body, d.joint)
        ):
            yield piece(sector_name, sector_title, sector, AS_IT_STANDS)
    yield piece("bin-ring", "ring on the bin's lid", parts.bin_ring, AS_IT_STANDS)


def _named(name: str, title: str, solids: tuple[Solid, ...]) -> Iterator[tuple[str, str, Solid]]:
    if len(solids) == 1:
        yield name, title, solids[0]
        return
    for letter, solid in zip(LETTERS, solids, strict=False):
        yield f"{name}-{letter}", f"{title}, sector {letter}", solid

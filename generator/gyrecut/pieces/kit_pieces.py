"""Turns the parts of one separator into its printed pieces."""

from __future__ import annotations

from typing import TYPE_CHECKING

from cadquery.func import Location, Solid
from OCP.gp import gp_Vec

from gyrecut.pieces import mark_places as places
from gyrecut.pieces.cutting import rings
from gyrecut.pieces.glyphs import UP
from gyrecut.pieces.marks import Pose, marked
from gyrecut.pieces.mating import lid_lines, ring_lines
from gyrecut.pieces.piece import AS_IT_STANDS, Piece, laid_down
from gyrecut.pieces.sectors import plate_sectors, ring_sectors
from gyrecut.proportions.dimensions import BellMouth

if TYPE_CHECKING:
    from collections.abc import Iterator, Sequence

    from gyrecut.pieces.engraving import Mark
    from gyrecut.pieces.marks import MarkStyle
    from gyrecut.pieces.places import Spot, Triple
    from gyrecut.proportions.dimensions import Dimensions
    from gyrecut.proportions.printing import Bed
    from gyrecut.solids import Parts

TURNED_OVER = Location((0.0, 0.0, 0.0), (1.0, 0.0, 0.0), 180.0)
OUTLET_TITLES = {"bell-mouth": "bell-mouth for the blower", "outlet": "outlet with hose cuff"}
LETTERS = "abcdefghijkl"


def make_pieces(
    parts: Parts,
    d: Dimensions,
    bed: Bed,
    *,
    prefix: str = "",
    copies: int = 1,
    style: MarkStyle | None = None,
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
    style : MarkStyle or None
        How names and lines are engraved; None leaves the pieces bare.

    Yields
    ------
    Piece
    """

    def piece(
        name: str,
        title: str,
        made: Solid,
        upright: Location,
        spots: Sequence[Spot],
        *,
        wall_mm: float = d.body.wall_mm,
        sign: str = "",
        others: Sequence[Mark] = (),
    ) -> Piece:
        mark = ""
        if style is not None:
            texts = (sign + prefix + name, sign + name)
            made, mark = marked(
                made,
                texts,
                spots,
                style=style,
                pose=Pose(up=_up_in(upright), slope=d.slope),
                wall_mm=wall_mm,
                others=others,
            )
        return laid_down(
            made, upright, bed, name=prefix + name, title=title, copies=copies, mark=mark
        )

    lid = plate_sectors(
        parts.lid,
        sectors=d.division.lid_sectors,
        first_cut=d.division.lid_first_cut,
        thickness_mm=d.lid.thickness_mm,
        gap_mm=d.joint.clearance_mm,
        slope=d.slope,
    )
    lines = lid_lines(lid, d, style) if style else [[] for _ in lid]
    for sector, (name, title, made) in enumerate(_named("lid", "lid", lid)):
        yield piece(
            name,
            title,
            made,
            AS_IT_STANDS,
            places.on_lid(d, sector),
            wall_mm=d.lid.thickness_mm,
            others=lines[sector],
        )
    yield piece("vortex-finder", "vortex finder", parts.finder, TURNED_OVER, places.on_finder(d))
    name = "bell-mouth" if isinstance(d.outlet, BellMouth) else "outlet"
    yield piece(name, OUTLET_TITLES[name], parts.outlet, TURNED_OVER, places.on_outlet(d))
    # modelled on its flange; turned back to that from where it sits in the machine
    yield piece(
        "transition",
        "transition from hose to slot",
        parts.transition,
        parts.transition_place.inverse,
        places.on_transition(parts.transition, d),
    )
    cut = [
        ring_sectors(made, ring, d.body, d.joint)
        for ring, made in zip(d.division.rings, rings(parts.body, d), strict=True)
    ]
    across, on_bin_ring = (
        ring_lines(cut, parts.bin_ring, d, style)
        if style
        else ([[[] for _ in sectors] for sectors in cut], [])
    )
    for number, (ring, sectors) in enumerate(zip(d.division.rings, cut, strict=True), start=1):
        name = f"body-{number}"
        title = f"body ring {number} of {len(cut)}"
        for sector, (sector_name, sector_title, made) in enumerate(_named(name, title, sectors)):
            yield piece(
                sector_name,
                sector_title,
                made,
                AS_IT_STANDS,
                places.on_ring(d, ring, sector),
                sign=UP,
                others=across[number - 1][sector],
            )
    yield piece(
        "bin-ring",
        "ring on the bin's lid",
        parts.bin_ring,
        AS_IT_STANDS,
        places.on_bin_ring(d),
        others=on_bin_ring,
    )


def _up_in(upright: Location) -> Triple:
    """Which way of the machine is up while a piece prints."""
    up = gp_Vec(0.0, 0.0, 1.0).Transformed(upright.inverse.wrapped.Transformation())
    return up.X(), up.Y(), up.Z()


def _named(name: str, title: str, solids: tuple[Solid, ...]) -> Iterator[tuple[str, str, Solid]]:
    if len(solids) == 1:
        yield name, title, solids[0]
        return
    for letter, solid in zip(LETTERS, solids, strict=False):
        yield f"{name}-{letter}", f"{title}, sector {letter}", solid

"""The lengths of one separator that a person at a bench asks for, part by part."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.proportions.dimensions import OutletCuff

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.proportions.dimensions import Cuff, Dimensions

Row = tuple[str, str, float]


def dimension_rows(dimensions: Dimensions) -> Iterator[Row]:
    """Give part, length and value [mm], from the hose down to the bin and up to the outlet.

    Parameters
    ----------
    dimensions : Dimensions
        One separator. Diameters are inside unless the row says otherwise.

    Yields
    ------
    tuple of str, str, float
        Part, what is measured, millimetres.
    """
    yield from _cuff_rows("hose cuff", dimensions.transition.cuff)
    yield "transition", "length, slot to cuff", dimensions.transition.length_mm
    yield "slot", "height", dimensions.slot.height_mm
    yield "slot", "width", dimensions.slot.width_mm
    body = dimensions.body
    yield "barrel", "diameter", body.diameter_mm
    yield "barrel", "height", body.barrel_height_mm
    yield "cone", "height", body.cone_height_mm
    yield "cone", "dust outlet", body.dust_outlet_diameter_mm
    yield "barrel and cone", "height", body.total_height_mm
    yield "barrel and cone", "wall", body.wall_mm
    finder = dimensions.finder
    yield "vortex finder", "bore", finder.bore_mm
    yield "vortex finder", "length below the lid", finder.length_mm
    yield "lid", "thickness", dimensions.lid.thickness_mm
    yield "lid", "diameter, outside", 2 * dimensions.rim.outer_radius_mm
    yield "bin ring", "bore", dimensions.bin_ring.bore_mm
    yield "bin ring", "diameter, outside", 2 * dimensions.bin_ring.outer_radius_mm
    outlet = dimensions.outlet
    if isinstance(outlet, OutletCuff):
        yield from _cuff_rows("outlet cuff", outlet.cuff)
    else:
        yield "bell-mouth", "throat", outlet.throat_mm
        yield "bell-mouth", "rounding", outlet.rounding_mm
    yield "joints", "overlap", dimensions.joint.lap_mm
    yield "joints", "clearance", dimensions.joint.clearance_mm


def _cuff_rows(part: str, cuff: Cuff) -> Iterator[Row]:
    side = "outside" if cuff.fit == "over" else "inside"
    yield part, f"diameter at the tip, {side}", cuff.tip_diameter_mm
    yield part, f"diameter at the root, {side}", cuff.root_diameter_mm
    yield part, "length", cuff.length_mm

"""Outline of a hose cuff in (radius, z), shared by transition and outlet."""

from __future__ import annotations

from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from gyrecut.proportions.dimensions import Cuff, Point


def cuff_outside(cuff: Cuff, root_z: float) -> tuple[Point, ...]:
    """Give the outside of a cuff from its root up to its tip.

    Parameters
    ----------
    cuff : Cuff
        Its sizes.
    root_z : float
        Height of the cuff's root, where the hose stops [mm].

    Returns
    -------
    tuple of (float, float)
        Corners (radius, z). The shoulder is a ramp, so that it prints whichever end is up.
    """
    tip_z, widest = root_z + cuff.height_mm, cuff.widest_radius_mm
    if cuff.fit == "inside":
        return ((widest, root_z), (widest, tip_z))
    return (
        (widest, root_z),
        (cuff.root_diameter_mm / 2, root_z + cuff.ramp_mm),
        (cuff.tip_diameter_mm / 2, tip_z),
    )


def cuff_inside(cuff: Cuff, root_z: float) -> tuple[Point, ...]:
    """Give the inside of a cuff from its tip down to its root, as corners (radius, z)."""
    tip_z, bore = root_z + cuff.height_mm, cuff.bore_mm / 2
    if cuff.fit == "inside":
        return (
            (cuff.tip_diameter_mm / 2, tip_z),
            (cuff.root_diameter_mm / 2, root_z + cuff.ramp_mm),
            (bore, root_z + cuff.ramp_mm),
            (bore, root_z),
        )
    return ((bore, tip_z), (bore, root_z))

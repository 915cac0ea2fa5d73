"""All parts of one separator, where they sit in the machine."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from cadquery.func import clean

from gyrecut.solids.body import barrel, cone
from gyrecut.solids.ends import bin_ring, outlet
from gyrecut.solids.lid import finder, lid
from gyrecut.solids.shapes import joined, one_solid
from gyrecut.solids.transition import transition, transition_place

if TYPE_CHECKING:
    from cadquery.func import Location, Solid

    from gyrecut.proportions.dimensions import Dimensions


@dataclass(frozen=True, slots=True, kw_only=True)
class Parts:
    """The solids of one separator in machine coordinates [mm]; body is barrel and cone in one."""

    body: Solid
    lid: Solid
    finder: Solid
    transition: Solid
    transition_place: Location
    bin_ring: Solid
    outlet: Solid


def make_parts(d: Dimensions) -> Parts:
    """Make every part of one separator.

    Parameters
    ----------
    d : Dimensions

    Returns
    -------
    Parts

    Raises
    ------
    BuildError
        Where the kernel does not give what the dimensions ask for.
    """
    place = transition_place(d)
    return Parts(
        body=one_solid(clean(joined("body", barrel(d), cone(d))), "body"),
        lid=lid(d),
        finder=finder(d),
        transition=transition(d).moved(place),
        transition_place=place,
        bin_ring=bin_ring(d),
        outlet=outlet(d),
    )

"""The rows of the shipped tables: SI values, each row with the place its numbers come from."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Literal


@dataclass(frozen=True, slots=True, kw_only=True)
class Family:
    """One proportion family: every length of the body as a ratio to its diameter.

    Parameters
    ----------
    name, title : str
        Name in a profile, and name for people.
    slot_height, slot_width : float
        Inlet slot, inside [-]
    finder_diameter, finder_length : float
        Vortex finder: bore, and length below the roof [-]
    barrel_height, total_height : float
        Barrel alone, and barrel with cone [-]
    dust_outlet_diameter : float
        Opening at the foot of the cone [-]
    source : str
        Publication the ratios are given in.
    """

    name: str
    title: str
    slot_height: float
    slot_width: float
    finder_diameter: float
    finder_length: float
    barrel_height: float
    total_height: float
    dust_outlet_diameter: float
    source: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Dust:
    """One kind of workshop dust.

    Parameters
    ----------
    name, title : str
        Name in a profile, and name for people.
    particle_density, bulk_density : float
        Of one grain, and of the loose heap [kg/m^3]
    median : float
        Diameter that half of the mass is finer than [m]
    spread : float
        Geometric standard deviation of the log-normal mass distribution [-]
    largest_chip : float
        Longest piece to expect in the stream [m]
    conveying_velocity : float
        Mean velocity in the hose that keeps it moving [m/s]
    combustible : bool
        Whether a cloud of it has to be taken as explosible.
    exposure_limit : float or None
        Limit for the air breathed over eight hours [mg/m^3], None where none was found.
    exposure_limit_source : str
        Rule the limit stands in, and the dust fraction it is for.
    source : str
        Where the other numbers come from.
    """

    name: str
    title: str
    particle_density: float
    bulk_density: float
    median: float
    spread: float
    largest_chip: float
    conveying_velocity: float
    combustible: bool
    exposure_limit: float | None
    exposure_limit_source: str
    source: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Polymer:
    """One printing material, with the low end of what printed bars reach.

    Parameters
    ----------
    name, title : str
        Name in a profile, and name for people.
    process : {"filament", "resin"}
        The kind of printer it is for.
    density : float
        Of the solid [kg/m^3]
    modulus : float
        Tensile modulus [Pa]
    strength_along, strength_across : float
        Tensile strength in the plane of a layer, and across layers [Pa]
    softening_temperature : float
        Deflection temperature at 0.45 MPa [K]
    source : str
        Where the numbers come from.
    """

    name: str
    title: str
    process: Literal["filament", "resin"]
    density: float
    modulus: float
    strength_along: float
    strength_across: float
    softening_temperature: float
    source: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Hose:
    """One nominal hose size.

    Parameters
    ----------
    name : str
        The size as it is asked for, such as "38 mm" or "1.5 in".
    nominal : float
        The diameter that name says [m]; a real hose or cuff differs by about 1 mm.
    source : str
        Where the size is in use.
    """

    name: str
    nominal: float
    source: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Fastener:
    """One screw size with the holes, nut and heat-set insert that go with it.

    Parameters
    ----------
    name : str
        Thread designation, such as "M4".
    thread : float
        Nominal thread diameter [m]
    clearance_fine, clearance_medium, clearance_coarse : float
        Clearance hole diameters [m]
    head_diameter, head_height : float
        Socket head cap screw [m]
    nut_across_flats, nut_height : float
        Hexagon nut, largest [m]
    insert_hole, insert_length : float
        Hole for a heat-set insert, and length of that insert [m]
    boss_diameter : float
        Smallest boss around the insert [m]
    source : str
        The standards, and what is common practice.
    """

    name: str
    thread: float
    clearance_fine: float
    clearance_medium: float
    clearance_coarse: float
    head_diameter: float
    head_height: float
    nut_across_flats: float
    nut_height: float
    insert_hole: float
    insert_length: float
    boss_diameter: float
    source: str

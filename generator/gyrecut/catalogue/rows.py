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
    shape_factor : float
        Drag of a grain over that of a sphere of its volume, the dynamic shape factor [-]
    cake_resistance : float
        Of a cake of 1 kg/m2 of the fines that pass a separator, on a filter [1/s]
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
    shape_factor: float
    cake_resistance: float
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
    poisson_ratio : float
        Sideways over lengthwise strain [-]
    creep_ratio : float
        Share of the modulus left after 100 to 1000 hours under a small load at 23 degC [-]
    direction_ratio : float
        Stiffness across layers over that along them [-]
    service_temperature : float
        Above which a part under load should not be kept [K]
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
    poisson_ratio: float
    creep_ratio: float
    direction_ratio: float
    service_temperature: float
    source: str


@dataclass(frozen=True, slots=True, kw_only=True)
class BinMaterial:
    """One material that bins are made of, with the low end of what it reaches.

    Parameters
    ----------
    name, title : str
        Name in a profile, and name for people.
    form : {"round", "box"}
        Whether bins of it are tubes or have flat walls.
    density : float
        Of the solid [kg/m^3]
    modulus : float
        Elastic modulus [Pa]
    poisson_ratio : float
        Sideways over lengthwise strain [-]
    strength : float
        Tensile or bending strength, or yield stress where it yields [Pa]
    creep_ratio : float
        Share of the modulus left after 100 to 1000 hours under a small load [-]
    source : str
        Where the numbers come from.
    """

    name: str
    title: str
    form: Literal["round", "box"]
    density: float
    modulus: float
    poisson_ratio: float
    strength: float
    creep_ratio: float
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


@dataclass(frozen=True, slots=True, kw_only=True)
class MeasuredPoint:
    """One measured cyclone at one flow.

    Parameters
    ----------
    name, title : str
        Name in the table, and name for people.
    grade : {"A", "B", "C"}
        A: cut size read in its source; B: from memory, confirmed by a second number from memory;
        C: from memory, unchecked. Only A and B may decide anything.
    mark : {"read", "memory"}
        How the cut size was come by.
    source : str
        Publication, and what else is known of the numbers.
    body_diameter : float
        Bore of the barrel [m]
    inlet_bore : float or None
        Bore of a round inlet [m], None where the inlet is a slot.
    slot_height, slot_width : float or None
        Inlet slot [m], None where the inlet is round.
    finder_diameter, finder_length : float
        Vortex finder: bore, and length below the roof [m]
    barrel_height, total_height : float
        Barrel alone, and barrel with cone [m]
    dust_outlet_diameter : float
        Opening at the foot of the cone [m]
    flow : float
        Volume flow [m^3/s]
    particle_density, air_density : float
        Of a grain and of the air [kg/m^3]
    viscosity : float
        Of the air [Pa*s]
    temperature : float
        Of the air [K]
    diameter_kind : {"physical", "aerodynamic"}
        Which diameter the cut size is; an aerodynamic one has its slip counted.
    cut_size : float
        Measured diameter caught by half [m]
    cut_size_uncertainty : float or None
        Largest error to expect, as a share of it [-], None where nothing is known of it.
    inlet_velocity_heads : float or None
        Measured pressure drop over the head of the inlet velocity [-], None where not measured.
    """

    name: str
    title: str
    grade: Literal["A", "B", "C"]
    mark: Literal["read", "memory"]
    source: str
    body_diameter: float
    inlet_bore: float | None
    slot_height: float | None
    slot_width: float | None
    finder_diameter: float
    finder_length: float
    barrel_height: float
    total_height: float
    dust_outlet_diameter: float
    flow: float
    particle_density: float
    air_density: float
    viscosity: float
    temperature: float
    diameter_kind: Literal["physical", "aerodynamic"]
    cut_size: float
    cut_size_uncertainty: float | None
    inlet_velocity_heads: float | None


@dataclass(frozen=True, slots=True, kw_only=True)
class SuctionSource:
    """One kind of machine that moves the air, with an illustrative curve.

    Parameters
    ----------
    name, title : str
        Name in a profile, and name for people.
    shut_off : float
        Suction behind a blocked hose [Pa]
    open_flow : float
        Flow with nothing in its way [m^3/s]
    exponent : float
        How far the curve between them is bent outwards, 1 for a straight one [-]
    source : str
        Where the curve comes from.
    """

    name: str
    title: str
    shut_off: float
    open_flow: float
    exponent: float
    source: str


@dataclass(frozen=True, slots=True, kw_only=True)
class FilterClass:
    """One class of filters.

    Parameters
    ----------
    name, title : str
        Name in a profile, and name for people.
    penetration : float or None
        Largest share let through in the test of the class, all particles together [-]
    fine, middle, coarse : float or None
        Largest share let through of particles of 0.3-1, 1-3 and 3-10 um [-]
    dust_class : bool
        Whether the class is one for extractors of harmful dust.
    lowest_limit : float or None
        Exposure limit above which such a class may be used [mg/m^3]
    clean_resistance : float
        Pressure over velocity in the clean cloth, about [Pa*s/m]
    source : str
        The standard, and what is common practice.
    """

    name: str
    title: str
    penetration: float | None
    fine: float | None
    middle: float | None
    coarse: float | None
    dust_class: bool
    lowest_limit: float | None
    clean_resistance: float
    source: str

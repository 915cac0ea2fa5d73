"""From one stage of a profile to every dimension of its separator."""

from __future__ import annotations

from math import radians
from typing import TYPE_CHECKING

from gyrecut.catalogue import families, hoses
from gyrecut.correlations.consensus import central_cut_size
from gyrecut.correlations.geometry import (
    CycloneGeometry,
    body_diameter_for_inlet_velocity,
    scaled,
)
from gyrecut.errors import UnbuildableError
from gyrecut.proportions.dimensions import Body, Dimensions, Groove, Joint, Seals, Slot
from gyrecut.proportions.division import divide
from gyrecut.proportions.ends import (
    bell_mouth,
    bin_ring,
    finder,
    lid,
    outlet_cuff,
    rim,
    rim_radius,
)
from gyrecut.proportions.fasteners import MM, screw_line, screws
from gyrecut.proportions.inlet import hose_cuff, portal, transition
from gyrecut.proportions.printing import bed_of, name_band_mm, smallest_wall_mm

if TYPE_CHECKING:
    from gyrecut.airflow.air import AirState
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.catalogue.rows import Dust
    from gyrecut.profile.models import Profile, Stage
    from gyrecut.proportions.dimensions import BellMouth, Cuff, Finder, OutletCuff

SLOPE_SPARE = radians(1.0)  # facets of a mesh lean a little more than the surface they stand for
LAND_MM, LAND_SPARE = 1.2, 1.1  # plastic left outside a groove, of the smallest wall at least
CORD_SQUEEZE = 0.25  # of the cord, face seal: O-ring makers' guides, 20 to 30 %
CORD_WIDTH = 1.35  # groove over cord, filled to 78 % when closed: same guides
EDGE_SHARE = 0.75  # of the wall is left at the slot's inner edge
SMALLEST_BODY_MM, LARGEST_BODY_MM = 40.0, 900.0
SLOWEST_COVERED, FASTEST_COVERED = 1.0, 60.0  # m/s in the slot
HALVINGS = 60
FIT_STEP = 0.98  # two sizes tried one after the other differ by this factor


def shape_of(stage: Stage) -> CycloneGeometry:
    """Give a stage's proportions, its own or its family's, as a body of 1 m."""
    row = families()[stage.proportions] if isinstance(stage.proportions, str) else stage.proportions
    return CycloneGeometry(
        body_diameter=1.0,
        slot_height=row.slot_height,
        slot_width=row.slot_width,
        finder_diameter=row.finder_diameter,
        finder_length=row.finder_length,
        barrel_height=row.barrel_height,
        total_height=row.total_height,
        dust_outlet_diameter=row.dust_outlet_diameter,
    )


def geometry_of(d: Dimensions) -> CycloneGeometry:
    """Give the inside of a separator in metres, as the correlations take it."""
    return CycloneGeometry(
        body_diameter=d.body.diameter_mm / MM,
        slot_height=d.slot.height_mm / MM,
        slot_width=d.slot.width_mm / MM,
        finder_diameter=d.finder.bore_mm / MM,
        finder_length=d.finder.length_mm / MM,
        barrel_height=d.body.barrel_height_mm / MM,
        total_height=d.body.total_height_mm / MM,
        dust_outlet_diameter=d.body.dust_outlet_diameter_mm / MM,
    )


def proportion(
    profile: Profile, stage: Stage, *, flow: float, air: AirState, dust: Dust
) -> Dimensions:
    """Derive every dimension of one stage's separator.

    Parameters
    ----------
    profile : Profile
        The whole profile: hose, outlet, printer, walls, joints.
    stage : Stage
        The stage to proportion.
    flow : float
        Air through one of its bodies [m3/s].
    air : AirState
        The air, for a body sized by its cut size.
    dust : Dust
        The dust, for the same.

    Returns
    -------
    Dimensions

    Raises
    ------
    UnbuildableError
        Where no such separator can be made, with the reason and the profile's line.
    OutOfRangeError
        Where the proportions or the size lie outside what the correlations hold for.
    """
    shape = shape_of(stage)
    if stage.fit_pieces is not None:
        return _largest_that_fits(profile, shape, stage.fit_pieces)
    if stage.body_diameter is not None:
        diameter = stage.body_diameter
    elif stage.inlet_velocity is not None:
        diameter = float(
            body_diameter_for_inlet_velocity(shape, inlet_velocity=stage.inlet_velocity, flow=flow)
        )
    elif stage.cut_size is not None:
        diameter = _diameter_for_cut_size(
            shape, cut_size=stage.cut_size, flow=flow, air=air, dust=dust
        )
    else:
        raise ValueError("a stage without a size; profiles are checked for it")
    return _proportion_at(profile, shape, round(diameter * MM, 1))


def _diameter_for_cut_size(
    shape: CycloneGeometry, *, cut_size: float, flow: float, air: AirState, dust: Dust
) -> float:
    """Body diameter [m] at which the central cut size is the wanted one; it grows with the body."""
    slot = float(shape.slot_height * shape.slot_width)
    # between the fastest and the slowest inlet the correlations cover
    small, large = (
        (flow / (FASTEST_COVERED * slot)) ** 0.5,
        (flow / (SLOWEST_COVERED * slot)) ** 0.5,
    )
    for end, coarser in ((small := small * 1.0001, True), (large := large * 0.9999, False)):
        reached = _cut_size_at(shape, end, flow=flow, air=air, dust=dust)
        if (reached > cut_size) == coarser:
            raise UnbuildableError(
                key=("stages",),
                what="ask for a cut size that no body of these proportions has at this flow",
                given=f"cut_size: {cut_size * 1e6:g} um",
                allowed=f"{'at least' if coarser else 'at most'} {reached * 1e6:.2g} um",
                fix="give another cut size, or more bodies (count)",
            )
    for _ in range(HALVINGS):
        middle = (small * large) ** 0.5
        if _cut_size_at(shape, middle, flow=flow, air=air, dust=dust) < cut_size:
            small = middle
        else:
            large = middle
    return float((small * large) ** 0.5)


def _cut_size_at(
    shape: CycloneGeometry, diameter: float, *, flow: float, air: AirState, dust: Dust
) -> float:
    consensus = central_cut_size(
        scaled(shape, body_diameter=diameter),
        flow=flow,
        particle_density=dust.particle_density,
        shape_factor=dust.shape_factor,
        loading=0.0,
        air=air,
    )
    return float(consensus.cut_size)


def _largest_that_fits(profile: Profile, shape: CycloneGeometry, pieces: int) -> Dimensions:
    diameter = LARGEST_BODY_MM
    reason: UnbuildableError | None = None
    while diameter >= SMALLEST_BODY_MM:
        try:
            dimensions = _proportion_at(profile, shape, round(diameter, 1))
        except UnbuildableError as unbuildable:
            reason = unbuildable
        else:
            if dimensions.division.piece_count <= pieces:
                return dimensions
        diameter *= FIT_STEP
    raise UnbuildableError(
        key=("stages",),
        what="ask for a body in fewer pieces than this printer can make",
        given=f"fit_pieces: {pieces}",
        allowed=f"as many as some body of {SMALLEST_BODY_MM:g} to {LARGEST_BODY_MM:g} mm needs",
        fix="give a larger fit_pieces"
        + (f"; the smallest body fails too: {reason}" if reason else ""),
    )


def _proportion_at(profile: Profile, shape: CycloneGeometry, diameter_mm: float) -> Dimensions:
    if not SMALLEST_BODY_MM <= diameter_mm <= LARGEST_BODY_MM:
        raise UnbuildableError(
            key=("stages",),
            what="lead to a body of no useful size",
            given=f"{diameter_mm:g} mm across",
            allowed=f"{SMALLEST_BODY_MM:g} mm to {LARGEST_BODY_MM:g} mm",
            fix="choose another flow, inlet_velocity, cut_size or count",
        )
    printer, fastener = profile.printer, profile.joints.fastener
    wall = profile.walls.body * MM
    slope = printer.overhang_limit - SLOPE_SPARE
    bed = bed_of(printer)
    body = Body(
        diameter_mm=diameter_mm,
        barrel_height_mm=_times(shape.barrel_height, diameter_mm),
        total_height_mm=_times(shape.total_height, diameter_mm),
        dust_outlet_diameter_mm=_times(shape.dust_outlet_diameter, diameter_mm),
        wall_mm=wall,
    )
    slot = Slot(
        height_mm=_times(shape.slot_height, diameter_mm),
        width_mm=_times(shape.slot_width, diameter_mm),
    )
    joint = Joint(
        lap_mm=profile.joints.lap * MM, clearance_mm=printer.clearance * MM, collar_mm=wall
    )
    hose = profile.air.hose
    cuff = hose_cuff(
        nominal_mm=hoses()[hose.nominal].nominal * MM,
        measured_mm=None if hose.measured is None else hose.measured * MM,
        fit=hose.fit,
        wall_mm=wall,
        slope=slope,
    )
    seals = _seals(profile, wall, smallest_wall_mm(printer))
    _groove_bridges(seals, printer.bridge_limit * MM)
    line = screw_line(screws(fastener, ()), wall_mm=wall, grooves=(seals.lid, seals.transition))
    mouth = portal(
        body=body,
        slot=slot,
        rim_radius_mm=rim_radius(body, fastener, line),
        cuff=cuff,
        fastener=fastener,
        slope=slope,
        bridge_limit_mm=printer.bridge_limit * MM,
        edge_mm=max(EDGE_SHARE * wall, smallest_wall_mm(printer)),
        line_mm=line,
        groove=seals.transition,
    )
    division = divide(
        body=body,
        portal=mouth,
        rim_radius_mm=rim_radius(body, fastener, line),
        joint=joint,
        bed=bed,
        slope=slope,
    )
    tube = finder(
        body=body,
        bore_mm=_times(shape.finder_diameter, diameter_mm),
        length_mm=_times(shape.finder_length, diameter_mm),
        stub_mm=joint.lap_mm,
        edge_mm=name_band_mm(printer),
    )
    roof = lid(thickness_mm=profile.walls.lid * MM, finder=tube, joint=joint)
    return Dimensions(
        body=body,
        slot=slot,
        finder=tube,
        rim=rim(
            body=body,
            portal=mouth,
            fastener=fastener,
            slope=slope,
            line_mm=line,
            seams=division.seams_under_the_lid,
            lap_mm=joint.lap_mm,
        ),
        portal=mouth,
        transition=transition(
            body=body, slot=slot, portal=mouth, cuff=cuff, slope=slope, tallest_mm=bed.height_mm
        ),
        lid=roof,
        bin_ring=bin_ring(
            body=body,
            joint=joint,
            fastener=fastener,
            lid_thickness_mm=profile.walls.lid * MM,
            groove=seals.bin_ring,
        ),
        outlet=_outlet(profile, tube, joint, slope),
        joint=joint,
        seals=seals,
        division=division,
        slope=slope,
    )


def _seals(profile: Profile, wall_mm: float, smallest_mm: float) -> Seals:
    joints = profile.joints
    cord = joints.cord * MM
    groove = Groove(
        cord_mm=cord,
        width_mm=CORD_WIDTH * cord,
        depth_mm=(1 - CORD_SQUEEZE) * cord,
        wall_mm=wall_mm,
        land_mm=max(LAND_MM, LAND_SPARE * smallest_mm),
    )
    return Seals(
        lid=groove if joints.lid == "cord" else None,
        transition=groove if joints.transition == "cord" else None,
        bin_ring=groove if joints.bin_ring == "cord" else None,
    )


def _groove_bridges(seals: Seals, bridge_limit_mm: float) -> None:
    """Refuse a groove too wide to bridge: transition and bin ring print on their seals."""
    for groove in (seals.transition, seals.bin_ring):
        if groove is not None and groove.width_mm > bridge_limit_mm:
            raise UnbuildableError(
                key=("joints", "cord"),
                what="needs a groove wider than the printer bridges",
                given=f"{groove.cord_mm:g} mm, in a groove of {groove.width_mm:.1f} mm",
                allowed=f"at most {bridge_limit_mm / CORD_WIDTH:.1f} mm of cord",
                fix="give a thinner cord, or gasket for joints.transition and joints.bin_ring",
            )


def _times(ratio: Numbers, diameter_mm: float) -> float:
    """Give one length of one body; a shape may hold arrays, a separator does not."""
    return float(ratio) * diameter_mm


def _outlet(profile: Profile, tube: Finder, joint: Joint, slope: float) -> OutletCuff | BellMouth:
    outlet = profile.outlet
    if outlet.kind == "blower":
        return bell_mouth(
            finder=tube,
            throat_mm=outlet.intake_diameter * MM,
            joint=joint,
            edge_mm=name_band_mm(profile.printer),
        )
    cuff: Cuff = hose_cuff(
        nominal_mm=hoses()[outlet.hose].nominal * MM,
        measured_mm=None if outlet.measured is None else outlet.measured * MM,
        fit=outlet.fit,
        wall_mm=tube.wall_mm,
        slope=slope,
    )
    return outlet_cuff(finder=tube, cuff=cuff, joint=joint, slope=slope)

"""The rules of the field a body has to meet, each one a finding with its number and its limit."""

from __future__ import annotations

from math import degrees, radians
from typing import TYPE_CHECKING

from gyrecut.airflow.conveying import mean_velocity
from gyrecut.correlations.dust_outlet import (
    CHIPS_ACROSS_LEAST,
    smallest_outlet_for_chips,
    smallest_outlet_zenz,
)
from gyrecut.correlations.geometry import mean_inlet_velocity
from gyrecut.correlations.natural_length import natural_length_alexander
from gyrecut.correlations.saltation import REENTRAINMENT_RATIO, saltation_velocity_kalen_zenz
from gyrecut.findings import Finding, Severity
from gyrecut.proportions.dimensions import OutletCuff
from gyrecut.proportions.printing import bed_of, smallest_wall_mm

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.airflow.air import AirState
    from gyrecut.catalogue.rows import Dust
    from gyrecut.correlations.geometry import CycloneGeometry
    from gyrecut.profile.models import Printer
    from gyrecut.proportions.dimensions import Dimensions
    from gyrecut.proportions.printing import Bed

# usable window of inlet velocities: Koch and Licht 1977, from memory
SLOWEST_INLET, FASTEST_INLET = 10.0, 27.0
WIDEST_DIFFUSER = radians(15.0)  # where a stream separates: duct design practice
BLOCKED_DIFFUSER = radians(40.0)
MM = 1000.0


def geometry_rules(
    d: Dimensions,
    geometry: CycloneGeometry,
    *,
    flow: float,
    air: AirState,
    dust: Dust,
    feed: float | None,
    hose_flow: float | None,
    printer: Printer,
) -> tuple[Finding, ...]:
    """Hold one body against the rules of the field.

    Parameters
    ----------
    d : Dimensions
        The body with its inlet and ends.
    geometry : CycloneGeometry
        The same body in metres.
    flow : float
        Air through this one body [m3/s].
    air : AirState
        The air.
    dust : Dust
        The dust.
    feed : float or None
        Dust that arrives at this body [kg/s].
    hose_flow : float or None
        Air in the profile's hose [m3/s], None where another stage stands before this one.
    printer : Printer
        The profile's printer.

    Returns
    -------
    tuple of Finding
        Rules that hold give notes where the number is worth knowing, and nothing otherwise.
    """
    return (
        *_slot(d),
        *_vortex(d, geometry),
        *_inlet_velocity(geometry, flow),
        *_saltation(geometry, flow=flow, air=air, dust=dust),
        *_hose(d, hose_flow, dust),
        *_dust_outlet(d, dust, feed),
        *_transition(d),
        *_laps(d, smallest_wall_mm(printer)),
        *_round_pieces(d, bed_of(printer)),
    )


def _slot(d: Dimensions) -> Iterator[Finding]:
    beside = d.body.radius_mm - d.finder.outer_radius_mm
    if d.slot.width_mm > beside:
        yield Finding(
            code="slot-aims-at-finder",
            severity=Severity.WARN,
            part="slot",
            what="Part of the jet from the slot runs straight into the vortex finder.",
            measured=d.slot.width_mm,
            limit=beside,
            unit="mm",
            where="slot width against the gap between barrel and finder",
            fix="Take a family with a narrower slot or finder, or own ratios.",
        )
    if d.finder.length_mm < d.slot.height_mm:
        yield Finding(
            code="finder-above-slot-floor",
            severity=Severity.WARN,
            part="vortex finder",
            what="The finder ends above the slot's floor, so fresh dust can slip into it.",
            measured=d.finder.length_mm,
            limit=d.slot.height_mm,
            unit="mm",
            where="finder length against slot height",
            fix="Give a finder_length of at least slot_height.",
        )


def _vortex(d: Dimensions, geometry: CycloneGeometry) -> Iterator[Finding]:
    natural = float(natural_length_alexander(geometry)) * MM
    room = d.body.total_height_mm - d.finder.length_mm
    if natural > room:
        yield Finding(
            code="body-shorter-than-vortex",
            severity=Severity.WARN,
            part="body",
            what="The vortex would reach below the dust outlet and stir the bin.",
            measured=room,
            limit=natural,
            unit="mm",
            where="below the finder, against the natural length of Alexander (1949)",
            fix="Give a larger total_height, or a narrower finder.",
        )
    else:
        yield Finding(
            code="vortex-ends-in-body",
            severity=Severity.NOTE,
            part="body",
            what="The vortex is expected to end inside the cone.",
            measured=natural,
            limit=room,
            unit="mm",
            where="natural length of Alexander (1949) against the length below the finder",
        )


def _inlet_velocity(geometry: CycloneGeometry, flow: float) -> Iterator[Finding]:
    velocity = float(mean_inlet_velocity(geometry, flow=flow))
    if velocity < SLOWEST_INLET:
        yield Finding(
            code="inlet-too-slow",
            severity=Severity.WARN,
            part="slot",
            what="The air enters too slowly to throw fine dust out.",
            measured=velocity,
            limit=SLOWEST_INLET,
            unit="m/s",
            where="slot",
            fix="Choose a smaller body or a higher inlet_velocity.",
        )
    elif velocity > FASTEST_INLET:
        yield Finding(
            code="inlet-too-fast",
            severity=Severity.WARN,
            part="slot",
            what="The air enters so fast that it costs much suction and stirs caught dust up.",
            measured=velocity,
            limit=FASTEST_INLET,
            unit="m/s",
            where="slot",
            fix="Choose a larger body or a lower inlet_velocity.",
        )


def _saltation(
    geometry: CycloneGeometry, *, flow: float, air: AirState, dust: Dust
) -> Iterator[Finding]:
    saltation = saltation_velocity_kalen_zenz(
        geometry,
        flow=flow,
        particle_density=dust.particle_density,
        air_density=air.density,
        viscosity=air.viscosity,
    )
    ratio = float(mean_inlet_velocity(geometry, flow=flow) / saltation)
    if ratio > REENTRAINMENT_RATIO:
        yield Finding(
            code="above-saltation-window",
            severity=Severity.NOTE,
            part="slot",
            what=(
                "Inlet over saltation velocity is above the published window. The window comes "
                "from larger units with mineral dust; at this size it is information, no limit."
            ),
            measured=ratio,
            limit=REENTRAINMENT_RATIO,
            where="Kalen and Zenz (1974)",
        )


def _hose(d: Dimensions, flow: float | None, dust: Dust) -> Iterator[Finding]:
    if flow is None:
        return
    bore = d.transition.cuff.nominal_mm
    velocity = float(mean_velocity(flow=flow, bore=bore / MM))
    if velocity < dust.conveying_velocity:
        yield Finding(
            code="hose-too-slow",
            severity=Severity.WARN,
            part="hose",
            what=f"The hose is slower than {dust.title} needs; it can settle and block.",
            measured=velocity,
            limit=dust.conveying_velocity,
            unit="m/s",
            where="air.hose.nominal",
            fix="Choose a narrower hose or more flow.",
        )


def _dust_outlet(d: Dimensions, dust: Dust, feed: float | None) -> Iterator[Finding]:
    opening = d.body.dust_outlet_diameter_mm
    for_chips = (
        float(smallest_outlet_for_chips(dust.largest_chip, chips_across=CHIPS_ACROSS_LEAST)) * MM
    )
    if opening < for_chips:
        yield Finding(
            code="dust-outlet-bridges",
            severity=Severity.WARN,
            part="dust outlet",
            what="The largest chips can bridge over the dust outlet and plug the cone.",
            measured=opening,
            limit=for_chips,
            unit="mm",
            where=f"dust outlet against {CHIPS_ACROSS_LEAST:g} chips across",
            fix="Take a family with a wider dust outlet, or a larger body.",
        )
    if feed is None:
        return
    for_flow = float(smallest_outlet_zenz(mass_flow=feed, bulk_density=dust.bulk_density)) * MM
    if opening < for_flow:
        yield Finding(
            code="dust-outlet-too-narrow",
            severity=Severity.WARN,
            part="dust outlet",
            what="The dust cannot fall through the outlet as fast as it comes.",
            measured=opening,
            limit=for_flow,
            unit="mm",
            where="discharge rule of Zenz",
            fix="Take a family with a wider dust outlet, or a larger body.",
        )


def _transition(d: Dimensions) -> Iterator[Finding]:
    angle = d.transition.included_angle
    if angle > WIDEST_DIFFUSER * 1.001:
        yield Finding(
            code="transition-widens-fast",
            severity=Severity.WARN if angle > BLOCKED_DIFFUSER else Severity.NOTE,
            part="transition",
            what="The transition widens faster than the stream follows: it costs some suction.",
            measured=degrees(angle),
            limit=degrees(WIDEST_DIFFUSER),
            unit="deg",
            where="included angle between hose and slot",
            fix="A taller printer, a wider hose or a smaller slot makes it slimmer.",
        )


def _laps(d: Dimensions, smallest_mm: float) -> Iterator[Finding]:
    half = (d.body.wall_mm - d.joint.clearance_mm) / 2
    if any(ring.sectors > 1 for ring in d.division.rings) and half < smallest_mm:
        yield Finding(
            code="lap-too-thin",
            severity=Severity.STOP,
            part="body",
            what="The rings are cut into sectors, and half of the wall is too thin for their laps.",
            measured=half,
            limit=smallest_mm,
            unit="mm",
            where="half of walls.body less the clearance",
            fix=f"Give a walls.body of at least {2 * smallest_mm + d.joint.clearance_mm:.2f} mm.",
        )


def _round_pieces(d: Dimensions, bed: Bed) -> Iterator[Finding]:
    out = d.outlet
    below = out.socket_mm if isinstance(out, OutletCuff) else out.plug_length_mm
    across = out.socket_radius_mm if isinstance(out, OutletCuff) else out.stop_radius_mm
    rows = (
        ("vortex finder", d.finder.collar_radius_mm, d.finder_top_mm + d.finder.length_mm),
        ("outlet", across, d.outlet_top_mm - d.finder_top_mm + below),
        ("bin ring", d.bin_ring.outer_radius_mm, d.bin_ring.thickness_mm + d.joint.lap_mm),
    )
    for part, radius, height in rows:
        for measured, limit, where in (
            (2 * radius, min(bed.width_mm, bed.depth_mm), "diameter"),
            (height, bed.height_mm, "height"),
        ):
            if measured > limit:
                yield Finding(
                    code="piece-too-large",
                    severity=Severity.STOP,
                    part=part,
                    what=f"The {part} is printed whole, and it does not fit the printer.",
                    measured=measured,
                    limit=limit,
                    unit="mm",
                    where=where,
                    fix="Choose a smaller body, or a larger printer.build_volume.",
                )

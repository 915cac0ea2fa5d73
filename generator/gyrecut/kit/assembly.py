"""What to buy for a separator, and how its pieces go together."""

from __future__ import annotations

from dataclasses import dataclass
from itertools import pairwise
from math import ceil, dist, pi
from typing import TYPE_CHECKING

from gyrecut.kit.contents import Hardware
from gyrecut.proportions.dimensions import BellMouth

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.catalogue.rows import Fastener
    from gyrecut.proportions.dimensions import Dimensions, Groove

SCREW_LENGTHS_MM = (6, 8, 10, 12, 16, 20, 25, 30, 35, 40, 45, 50)  # preferred, ISO 4762 lists
CORD_SPARE = 1.05  # length to cut to fit
GASKET_MM = 3.0  # closed-cell foam
SQUEEZED_MM = 2.0  # the same drawn up by a third: seal makers' notes, common practice
BIN_LID_MM = 4.0  # thickness of a pail lid or drum head with a washer: common practice, no source
SPARE_MM = 1.0
GLUE_GAP_SPARE = 1.5  # what squeezes out: common practice, no source


def hardware(d: Dimensions, fastener: Fastener, *, copies: int) -> Iterator[Hardware]:
    """List what one stage needs besides its printed pieces.

    Parameters
    ----------
    d : Dimensions
        Of one separator of the stage.
    fastener : Fastener
        Its screws.
    copies : int
        How many equal separators the stage has.

    Yields
    ------
    Hardware
    """
    lid, portal, ring = d.rim.screws, d.portal.screws, d.bin_ring.screws
    in_lid, in_portal = len(lid.places_mm) * copies, len(portal.places_mm) * copies
    yield Hardware(
        what=f"{lid.thread} heat-set insert, hole {lid.insert_hole_mm:g} mm",
        quantity=str(in_lid + in_portal),
        where="rim and portal of the body",
    )
    in_rim = _screw_into_insert(d.lid.thickness_mm, lid.insert_depth_mm, d.seals.lid)
    yield Hardware(
        what=f"{lid.thread} x {in_rim} screw and washer",
        quantity=str(in_lid),
        where="lid",
    )
    in_frame = _screw_into_insert(
        d.transition.flange_thickness_mm, portal.insert_depth_mm, d.seals.transition
    )
    yield Hardware(
        what=f"{portal.thread} x {in_frame} screw and washer",
        quantity=str(in_portal),
        where="transition",
    )
    through = d.bin_ring.thickness_mm + BIN_LID_MM + SQUEEZED_MM + fastener.nut_height * 1000
    yield Hardware(
        what=f"{ring.thread} x {_shortest_screw(through)} screw, nut and two washers",
        quantity=str(len(ring.places_mm) * copies),
        where="bin ring, through the bin's lid",
    )
    yield from _seals(d, copies)
    yield Hardware(
        what="epoxy glue for the printed polymer",
        quantity=f"{max(5.0, ceil(_glue_cm3(d) * copies)):.0f} cm3",
        where="ring joints, sector laps, finder and outlet",
    )


def _seals(d: Dimensions, copies: int) -> Iterator[Hardware]:
    """List cord by its length and foam by its area, for the joints that take them."""
    joints = _sealed_joints(d)
    cords = [(joint, joint.groove) for joint in joints if joint.groove is not None]
    if cords:
        length = sum(joint.edge_mm + 2 * pi * groove.middle_mm for joint, groove in cords)
        yield Hardware(
            what=f"soft round cord {cords[0][1].cord_mm:g} mm, ends cut square and glued",
            quantity=f"{CORD_SPARE * length * copies / 1000:.2f} m",
            where=", ".join(joint.where for joint, _ in cords),
        )
    foamed = [joint for joint in joints if joint.groove is None]
    if foamed:
        area = sum(joint.face_mm2 for joint in foamed)
        yield Hardware(
            what=f"flat gasket, closed-cell foam {GASKET_MM:g} mm",
            quantity=f"{area * copies / 100:.0f} cm2",
            where=", ".join(joint.where for joint in foamed),
        )


@dataclass(frozen=True, slots=True, kw_only=True)
class _SealedJoint:
    where: str
    groove: Groove | None
    edge_mm: float
    face_mm2: float


def _sealed_joints(d: Dimensions) -> tuple[_SealedJoint, ...]:
    portal, ring, body = d.portal, d.bin_ring, d.body
    frame_width = portal.frame_high_y_mm - portal.frame_low_y_mm
    channel = -portal.face_x_mm - portal.depth_mm
    mouth = portal.mouth_outline(body.radius_mm)
    return (
        _SealedJoint(
            where="lid",
            groove=d.seals.lid,
            # three quarters of the barrel's edge, and the channel's three sides
            edge_mm=1.5 * pi * body.radius_mm + 2 * channel + portal.mouth_width_mm,
            face_mm2=pi * d.rim.outer_radius_mm**2 - portal.face_x_mm * frame_width,
        ),
        _SealedJoint(
            where="transition",
            groove=d.seals.transition,
            edge_mm=sum(dist(a, b) for a, b in pairwise((*mouth, mouth[0]))),
            face_mm2=-frame_width * portal.frame_bottom_z_mm,
        ),
        _SealedJoint(
            where="bin ring",
            groove=d.seals.bin_ring,
            edge_mm=pi * ring.bore_mm,
            face_mm2=pi * (ring.outer_radius_mm**2 - ring.bore_mm**2 / 4),
        ),
    )


def _seal_of(groove: Groove | None, groove_in: str, face: str) -> str:
    """Say how one joint is sealed, as the beginning of a sentence."""
    if groove is None:
        return f"Lay a gasket on {face}"
    return f"Press the cord into the groove in {groove_in}, its ends glued to a ring"


def steps(d: Dimensions, *, copies: int) -> Iterator[str]:
    """Say in what order the pieces of one separator go together, a step a sentence."""
    division, screws = d.division, d.rim.screws
    if copies > 1:
        yield f"Make {copies} of these separators, each the same way."
    if any(ring.sectors > 1 for ring in division.rings):
        yield (
            "Glue the sectors of each body ring into a ring: half of the wall of one laps over "
            "half of the wall of the next. Slide each sector in along the axis, the inner faces "
            "flush, and strap the ring round until it is hard."
        )
    if division.lid_sectors > 1:
        yield (
            "Glue the sectors of the lid on a flat board covered with film, tongue into groove, "
            "and weigh them down until they are hard."
        )
    yield (
        f"Press an {screws.thread} heat-set insert into each of the {len(screws.places_mm)} holes "
        f"in the rim and the {len(d.portal.screws.places_mm)} holes in the portal, flush with "
        "the face."
    )
    if len(division.rings) > 1:
        yield (
            "Glue the body rings together from the top down, each ring's plain end into the "
            "socket of the next until it stands on the seat; wipe the inside smooth before the "
            "glue is hard."
        )
    yield "Glue the foot of the cone into the socket of the bin ring."
    yield (
        "Brush the inside of body, transition and lid with epoxy or varnish, since layered walls "
        "leak; keep it off the faces that take gaskets."
    )
    yield (
        "Put the finder through the lid from above and glue its collar down all round; the round "
        "lip hangs below."
    )
    if isinstance(d.outlet, BellMouth):
        yield "Plug the bell-mouth into the finder's upper end, rounded side first, and glue it."
    else:
        yield "Glue the outlet's socket over the finder's upper end."
    yield (
        f"{_seal_of(d.seals.lid, 'the rim', 'the rim, cut out for barrel and slot')}. Lay the lid "
        "on it and draw its screws up crosswise; they come from above."
    )
    yield (
        f"{_seal_of(d.seals.transition, 'the flange', 'the portal, cut out for the mouth')}. "
        "Screw the transition to the portal; the screws stand beside the duct, a driver passes "
        "the cuff."
    )
    yield (
        f"Cut a hole of {d.bin_ring.bore_mm:.0f} mm into the bin's lid and drill it through the "
        f"ring's holes. {_seal_of(d.seals.bin_ring, 'the ring', 'the lid')}. Screw the "
        "ring down."
    )
    yield (
        "Close hose and outlet, draw a little suction and listen at every joint; any leak at the "
        "bin spoils the catch."
    )


def _screw_into_insert(plate_mm: float, hole_mm: float, groove: Groove | None) -> int:
    """Longest standard screw through plate and gasket that stays off the insert hole's bottom."""
    foam = SQUEEZED_MM if groove is None else 0.0
    deepest = plate_mm + foam + hole_mm - SPARE_MM
    return max(
        (length for length in SCREW_LENGTHS_MM if length <= deepest),
        default=SCREW_LENGTHS_MM[0],
    )


def _shortest_screw(grip_mm: float) -> int:
    return next(
        (length for length in SCREW_LENGTHS_MM if length >= grip_mm + SPARE_MM),
        SCREW_LENGTHS_MM[-1],
    )


def _glue_cm3(d: Dimensions) -> float:
    joint, division = d.joint, d.division
    laps = sum(
        2 * pi * d.body.outside_radius_at(height) * joint.lap_mm
        for height in (*division.cut_heights_mm, -d.body.total_height_mm)
    )
    seams = sum(
        ring.sectors * ring.height_mm * joint.lap_mm for ring in division.rings if ring.sectors > 1
    )
    collar = pi * (d.finder.collar_radius_mm**2 - d.finder.outer_radius_mm**2)
    return (laps + seams + collar) * joint.clearance_mm * GLUE_GAP_SPARE / 1000

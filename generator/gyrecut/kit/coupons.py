"""Coupons of a kit: small prints to try before the large ones, and the sheet that reads them."""

from __future__ import annotations

from dataclasses import dataclass
from math import cos, radians
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.catalogue import hoses, polymers
from gyrecut.checks import print_estimate, settings_of
from gyrecut.kit.contents import Coupons
from gyrecut.kit.measuring import kit_piece
from gyrecut.kit.tables import markdown_table
from gyrecut.pieces.coupon_pieces import SIGNS, gauge_piece, insert_piece, joint_pieces
from gyrecut.pieces.marks import mark_style
from gyrecut.proportions.dimensions import OutletCuff
from gyrecut.proportions.printing import bed_of
from gyrecut.solids.coupons import HOLE_STEPS_MM, lands

if TYPE_CHECKING:
    from collections.abc import Sequence

    from gyrecut.pieces.piece import Piece
    from gyrecut.profile import Profile
    from gyrecut.proportions.dimensions import Cuff, Dimensions

MM = 1000.0
LANDS_MM = (4.0, 3.0, 2.5)  # a lower step has no room for its lines
LONGEST_S = 3600.0
CLEARANCE_STEP_MM = 0.05
LEVEL = cos(radians(45.0))


@dataclass(frozen=True, slots=True, kw_only=True)
class Gauge:
    """One hose to try: where the profile names it, its cuff, and the diameter that is made for."""

    name: str
    key: str
    cuff: Cuff
    mating_mm: float


def make_coupons(profile: Profile, d: Dimensions) -> Coupons:
    """Make the coupons for a profile, with steps as high as an hour's printing allows.

    Parameters
    ----------
    profile : Profile
    d : Dimensions
        Of the first stage: cuffs, joint and screws.
    """
    tried = gauges(profile, d)
    bed, style = bed_of(profile.printer), mark_style(profile.printer)
    others = [
        *joint_pieces(d.joint, d.body.wall_mm, slope=d.slope, bed=bed, style=style),
        insert_piece(d.rim.screws, slope=d.slope, bed=bed, style=style),
    ]
    for land_mm in LANDS_MM:
        made = [
            gauge_piece(
                gauge.name,
                f"gauge for the hose of {gauge.key}",
                gauge.cuff,
                gauge.mating_mm,
                land_mm=land_mm,
                slope=d.slope,
                bed=bed,
                style=style,
            )
            for gauge in tried
        ]
        duration = job_duration([*made, *others], profile)
        if duration <= LONGEST_S:
            break
    density = polymers()[profile.material].density
    return Coupons(
        pieces=tuple(kit_piece(piece, density=density) for piece in (*made, *others)),
        duration_s=duration,
        sheet=_sheet(profile, d, tried, land_mm, duration),
    )


def gauges(profile: Profile, d: Dimensions) -> tuple[Gauge, ...]:
    """Give the hoses to try; one gauge where both ends take the same hose."""
    hose = profile.air.hose
    found = [_gauge("coupon-hose", "air.hose", hose.nominal, hose.measured, d.transition.cuff)]
    outlet = profile.outlet
    if outlet.kind == "cuff" and isinstance(d.outlet, OutletCuff):
        other = _gauge("coupon-outlet", "outlet", outlet.hose, outlet.measured, d.outlet.cuff)
        if (other.mating_mm, other.cuff.fit) != (found[0].mating_mm, found[0].cuff.fit):
            found.append(other)
    return tuple(found)


def _gauge(name: str, key: str, nominal: str, measured: float | None, cuff: Cuff) -> Gauge:
    mating = hoses()[nominal].nominal if measured is None else measured
    return Gauge(name=name, key=key, cuff=cuff, mating_mm=mating * MM)


def job_duration(pieces: Sequence[Piece], profile: Profile) -> float:
    """Estimate how long pieces take that are printed together [s]."""
    meshes = [piece.mesh for piece in pieces]
    level = sum(
        float(mesh.area_faces[np.abs(mesh.face_normals[:, 2]) > LEVEL].sum()) for mesh in meshes
    )
    polymer = polymers()[profile.material]
    return print_estimate(
        volume_mm3=sum(float(mesh.volume) for mesh in meshes),
        area_mm2=sum(float(mesh.area) for mesh in meshes),
        level_mm2=level,
        height_mm=max(float(mesh.extents[2]) for mesh in meshes),
        settings=settings_of(profile.printer, polymer),
        density=polymer.density,
    ).duration_s


def _sheet(
    profile: Profile, d: Dimensions, tried: Sequence[Gauge], land_mm: float, duration: float
) -> str:
    intro = (
        f"`coupons.3mf` holds them all in print pose; about {duration / 60:.0f} minutes with "
        f"{profile.material}, as the profile sets the printer. Print them with the settings, the "
        "material and the side of the bed that the kit will have. Let them cool, try them, write "
        "what you find into the empty column, change the profile's line, and build again."
    )
    sections = (
        f"# {profile.name}: print these first",
        intro,
        *(_hose_section(gauge, land_mm) for gauge in tried),
        _clearance_section(d),
        _insert_section(d),
    )
    return "\n\n".join(sections) + "\n"


def _hose_section(gauge: Gauge, land_mm: float) -> str:
    steps = lands(gauge.cuff, gauge.mating_mm, land_mm)
    how = "Push the hose over it" if gauge.cuff.fit == "over" else "Push the hose's end into it"
    tip = gauge.cuff.tip_diameter_mm - gauge.mating_mm
    root = gauge.cuff.root_diameter_mm - gauge.mating_mm
    rows = [
        (str(count), f"{step.diameter_mm:.2f}", f"`measured: {step.diameter_mm:.2f} mm`", "")
        for count, step in enumerate(steps, start=1)
    ]
    return (
        f"## Hose: `{gauge.name}`\n\n"
        f"{how}, straight and firmly by hand. Count the lines on the step at which it stops, and "
        f"write that step's line under `{gauge.key}` in the profile. The kit's cuff has the same "
        f"taper: {tip:+.1f} mm at the tip and {root:+.1f} mm at the root on what that line says. "
        "Where it stops at none, measure it with a calliper.\n\n"
        + markdown_table(("lines", "diameter mm", f"line under `{gauge.key}`", "stops here"), rows)
    )


def _clearance_section(d: Dimensions) -> str:
    now = d.joint.clearance_mm
    rows = [
        ("does not go in", _clearance(now + CLEARANCE_STEP_MM), ""),
        ("goes in by hand, does not rattle", _clearance(now), ""),
        ("rattles", _clearance(max(now - CLEARANCE_STEP_MM, CLEARANCE_STEP_MM)), ""),
    ]
    return (
        "## Ring joint: `coupon-socket` and `coupon-spigot`\n\n"
        f"Lap {d.joint.lap_mm:g} mm, gap {now:g} mm on the radius, as between the rings of the "
        "body. Sand off the brim, then put the spigot into the socket, down to the seat. The same "
        "line sets the gap in all joints; after a change print this pair again.\n\n"
        + markdown_table(("the spigot", "line under `printer`", "so it is"), rows)
    )


def _clearance(value: float) -> str:
    return f"`clearance: {value:.2f} mm`"


def _insert_section(d: Dimensions) -> str:
    screws = d.rim.screws
    rows = [
        (sign, f"{screws.insert_hole_mm + step:.2f}", "")
        for sign, step in zip(SIGNS, HOLE_STEPS_MM, strict=True)
    ]
    return (
        "## Insert holes: `coupon-inserts`\n\n"
        f"Press an {screws.thread} heat-set insert into each. The kit's holes are those marked 0, "
        f"{screws.insert_hole_mm:g} mm: the profile has no line for them, since they follow the "
        "insert. If + holds best, ream the kit's holes with a drill of that size before you press. "
        "If - holds best, take inserts with a coarser knurl, or set them in epoxy.\n\n"
        + markdown_table(("marked", "hole mm", "holds best"), rows)
    )

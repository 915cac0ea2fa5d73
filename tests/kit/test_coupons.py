"""Coupons: they fit as they should, print in an hour, and the sheet names lines that exist."""

from __future__ import annotations

import re
from functools import cache
from math import pi
from pathlib import Path
from typing import TYPE_CHECKING

import pytest
from cadquery import func

from gyrecut import pipeline
from gyrecut.checks import check_mesh, limits_of
from gyrecut.findings import Severity
from gyrecut.kit.coupons import LONGEST_S, gauges, make_coupons
from gyrecut.profile import Profile, load_profile
from gyrecut.proportions.inlet import hose_cuff
from gyrecut.proportions.printing import bed_of
from gyrecut.solids.coupons import (
    CUFF_STEPS_MM,
    cuff_gauge,
    insert_coupon,
    joint_body,
    lands,
    socket_coupon,
    spigot_coupon,
)

if TYPE_CHECKING:
    from gyrecut.kit.contents import Coupons, KitPiece
    from gyrecut.proportions.dimensions import Dimensions

PROFILES = Path(__file__).parents[2] / "profiles"
SHIPPED = ("casting-bench", "joinery-planer", "luthier-sander")
WALL = 1.2


@cache
def coupons_of(name: str) -> tuple[Profile, Dimensions, Coupons]:
    profile = load_profile(PROFILES / f"{name}.yaml")
    d = pipeline.design(profile).stages[0].dimensions
    return profile, d, make_coupons(profile, d)


def piece_called(coupons: Coupons, name: str) -> KitPiece:
    return next(piece for piece in coupons.pieces if piece.name == name)


@pytest.mark.parametrize("name", SHIPPED)
def test_coupons_pass_every_check_and_fit_the_bed(name: str) -> None:
    profile, _, coupons = coupons_of(name)
    limits, bed = limits_of(profile.printer), bed_of(profile.printer)
    for piece in coupons.pieces:
        found = check_mesh(piece.mesh, piece.name, limits)
        assert [f for f in found if f.severity is not Severity.NOTE] == []
        assert piece.size_mm[0] <= bed.width_mm
        assert piece.size_mm[1] <= bed.depth_mm
        assert piece.size_mm[2] <= bed.height_mm
        assert piece.mesh.is_volume


@pytest.mark.parametrize("name", SHIPPED)
def test_coupons_print_in_under_an_hour(name: str) -> None:
    _, _, coupons = coupons_of(name)
    assert 0 < coupons.duration_s <= LONGEST_S == 3600


@pytest.mark.parametrize("fit", ["over", "inside"])
def test_gauge_has_the_real_cuffs_taper_at_the_steps_it_says(fit: str) -> None:
    cuff = hose_cuff(nominal_mm=50.0, measured_mm=None, fit=fit, wall_mm=2.4, slope=0.75)
    gauge = cuff_gauge(cuff, 50.0, land_mm=4.0, wall_mm=WALL)
    taper = abs(cuff.root_diameter_mm - cuff.tip_diameter_mm) / cuff.length_mm
    steps = lands(cuff, 50.0, 4.0)
    assert sorted(step.diameter_mm - 50.0 for step in steps) == pytest.approx(sorted(CUFF_STEPS_MM))
    for step in steps:
        # measured by a slice of no height: the mating circle at three heights of the land
        for off in (-1.5, 0.0, 1.5):
            slab = func.box(200, 200, 0.5).moved(z=step.z_mm + off)  # from that height up
            ring = func.intersect(gauge, slab)
            radii = sorted(
                edge.radius()
                for edge in ring.Edges()
                if edge.geomType() == "CIRCLE"
                and edge.Center().z == pytest.approx(step.z_mm + off, abs=1e-6)
            )
            mating = 2 * (radii[-1] if fit == "over" else radii[0])
            wanted = step.diameter_mm + (-taper if fit == "over" else taper) * off
            assert mating == pytest.approx(wanted, abs=1e-6)
            assert radii[-1] - radii[0] >= WALL - 1e-9
    diameters = [step.diameter_mm for step in steps]
    assert diameters == sorted(diameters, reverse=fit == "over")


@pytest.mark.parametrize("name", SHIPPED)
def test_spigot_goes_into_the_socket_with_the_profiles_gap_and_lap(name: str) -> None:
    _, d, _ = coupons_of(name)
    small = joint_body(2.0)
    socket = socket_coupon(small, d.joint, d.slope)
    spigot = spigot_coupon(small, d.joint)
    assert func.intersect(socket, spigot).Volume() < 1e-6
    gap = d.joint.clearance_mm
    # moved sideways by the gap it touches, by more it does not fit
    assert func.intersect(socket, spigot.moved(x=0.99 * gap)).Volume() < 1e-6
    assert func.intersect(socket, spigot.moved(x=1.2 * gap)).Volume() > 0
    # it reaches down to the seat, and the socket reaches one lap up it
    assert func.intersect(socket, spigot.moved(z=-0.01)).Volume() > 0
    assert socket.BoundingBox().zmax == pytest.approx(d.joint.lap_mm)


@pytest.mark.parametrize("name", SHIPPED)
def test_insert_bar_has_the_profiles_hole_and_one_to_either_side(name: str) -> None:
    _, d, _ = coupons_of(name)
    screws = d.rim.screws
    bar = insert_coupon(screws)
    box = screws.boss_mm**2 * 3 * screws.insert_depth_mm
    holes = sum(pi / 4 * (screws.insert_hole_mm + step) ** 2 for step in (-0.1, 0.0, 0.1))
    assert bar.Volume() == pytest.approx(box - holes * screws.insert_depth_mm, rel=1e-9)
    circles = (edge for edge in bar.Edges() if edge.geomType() == "CIRCLE")
    assert sorted({2 * round(edge.radius(), 6) for edge in circles}) == pytest.approx(
        [screws.insert_hole_mm + step for step in (-0.1, 0.0, 0.1)]
    )


def test_steps_of_the_gauge_are_marked_with_one_to_five_lines() -> None:
    _, d, coupons = coupons_of("luthier-sander")
    profile = load_profile(PROFILES / "luthier-sander.yaml")
    gauge = next(g for g in gauges(profile, d) if g.name == "coupon-hose")
    marked = piece_called(coupons, "coupon-hose")
    land = marked.size_mm[2] / len(CUFF_STEPS_MM)
    bare = cuff_gauge(gauge.cuff, gauge.mating_mm, land_mm=land, wall_mm=1.25 * 0.9)
    lines = func.cut(bare, marked.placed).Solids()
    counts = [
        sum(k * land < line.Center().z < (k + 1) * land for line in lines)
        for k in range(len(CUFF_STEPS_MM))
    ]
    assert counts == [1, 2, 3, 4, 5]


def test_one_gauge_where_both_ends_take_the_same_hose() -> None:
    names = {
        name: [p.name for p in coupons_of(name)[2].pieces if "hose" in p.name or "outlet" in p.name]
        for name in SHIPPED
    }
    assert names["luthier-sander"] == ["coupon-hose", "coupon-outlet"]
    assert names["joinery-planer"] == ["coupon-hose"]
    assert names["casting-bench"] == ["coupon-hose"]  # a blower stands on the other end


@pytest.mark.parametrize("name", SHIPPED)
def test_lines_the_sheet_gives_are_taken_by_a_profile(name: str, tmp_path: Path) -> None:
    _, _, coupons = coupons_of(name)
    text = (PROFILES / f"{name}.yaml").read_text()
    measured = re.findall(r"`(measured: [^`]+)`", coupons.sheet)
    clearances = re.findall(r"`(clearance: [^`]+)`", coupons.sheet)
    assert len(measured) in {5, 10}
    assert len(clearances) == 3
    for line in measured[:5]:
        changed = re.sub(r"(\n  hose:[^\n]*\n)", rf"\1    {line}\n", text, count=1)
        path = tmp_path / "changed.yaml"
        path.write_text(changed)
        wanted = float(line.split()[1]) / 1000
        assert load_profile(path).air.hose.measured == pytest.approx(wanted)
    for line in clearances:
        path.write_text(re.sub(r"clearance: [^#\n]*", f"{line} ", text))
        wanted = float(line.split()[1]) / 1000
        assert load_profile(path).printer.clearance == pytest.approx(wanted)

"""The body comes out at the size the stage asks for, whichever way it asks."""

from __future__ import annotations

import itertools
from math import pi, sqrt
from typing import TYPE_CHECKING

import pytest
from tests.proportions.conftest import dimensions_of, with_hose, with_printer, with_stage

from gyrecut import pipeline
from gyrecut.catalogue import families
from gyrecut.errors import UnbuildableError

if TYPE_CHECKING:
    from gyrecut.profile import Profile

HALF_A_TENTH_MM = 0.05  # diameters are rounded to a tenth of a millimetre


def test_inlet_velocity_sets_the_slot_area(luthier: Profile) -> None:
    d = dimensions_of(with_stage(luthier, inlet_velocity=18.0))
    # continuity by hand: Q = v a b, with a = 0.5 D and b = 0.2 D
    diameter = sqrt(140 / 3600 / (18.0 * 0.5 * 0.2)) * 1000
    assert d.body.diameter_mm == pytest.approx(diameter, abs=HALF_A_TENTH_MM)


def test_body_diameter_is_taken_as_given(luthier: Profile) -> None:
    assert dimensions_of(with_stage(luthier, body_diameter=0.16)).body.diameter_mm == 160.0


def test_cut_size_is_met_by_the_body_it_gives(luthier: Profile) -> None:
    wanted = with_stage(luthier, cut_size=2.5e-6)
    reached = pipeline.design(wanted).stages[0].forecast.cut_size.central
    # cut size goes as the diameter to about 1.5: half a tenth of 140 mm, and the light dust load
    assert reached == pytest.approx(2.5e-6, rel=0.01)


def test_a_bank_shares_the_flow(luthier: Profile) -> None:
    one = dimensions_of(with_stage(luthier, inlet_velocity=18.0))
    four = dimensions_of(with_stage(luthier, inlet_velocity=18.0, count=4))
    assert four.body.diameter_mm == pytest.approx(one.body.diameter_mm / 2, abs=0.1)


@pytest.mark.parametrize("family", list(families()))
def test_every_family_keeps_its_ratios(luthier: Profile, family: str) -> None:
    d = dimensions_of(with_stage(luthier, body_diameter=0.13, proportions=family))
    row, diameter = families()[family], d.body.diameter_mm
    assert d.slot.height_mm == pytest.approx(row.slot_height * diameter)
    assert d.slot.width_mm == pytest.approx(row.slot_width * diameter)
    assert d.finder.bore_mm == pytest.approx(row.finder_diameter * diameter)
    assert d.finder.length_mm == pytest.approx(row.finder_length * diameter)
    assert d.body.barrel_height_mm == pytest.approx(row.barrel_height * diameter)
    assert d.body.total_height_mm == pytest.approx(row.total_height * diameter)
    assert d.body.dust_outlet_diameter_mm == pytest.approx(row.dust_outlet_diameter * diameter)


@pytest.mark.parametrize("pieces", [4, 6, 12])
def test_largest_body_in_so_many_pieces(luthier: Profile, pieces: int) -> None:
    d = dimensions_of(with_stage(luthier, fit_pieces=pieces))
    assert d.division.piece_count <= pieces
    larger = with_stage(luthier, body_diameter=d.body.diameter_mm * 1.03 / 1000)
    try:
        assert dimensions_of(larger).division.piece_count > pieces
    except UnbuildableError:
        # beyond it no body can be made at all, for the printer's or the hose's sake
        assert d.division.piece_count <= pieces


def test_the_mouth_has_the_area_of_the_slot(each: Profile) -> None:
    d = dimensions_of(each)
    corners = d.portal.mouth_outline(d.body.radius_mm)
    area = abs(
        sum(
            y * w - v * z
            for (y, z), (v, w) in zip(corners, (*corners[1:], corners[0]), strict=True)
        )
        / 2
    )
    assert area == pytest.approx(d.slot.height_mm * d.slot.width_mm, rel=1e-9)


def test_a_driver_passes_the_cuff_to_every_screw_of_the_transition(each: Profile) -> None:
    d = dimensions_of(each)
    centre_y = d.body.radius_mm - d.portal.mouth_width_mm / 2
    centre_z = (d.portal.mouth_top_mm + d.portal.floor_mm) / 2
    screws, cuff = d.portal.screws, d.transition.cuff
    for y, z in screws.places_mm:
        reach = sqrt((y - centre_y) ** 2 + (z - centre_z) ** 2)
        assert reach - screws.head_diameter_mm / 2 > cuff.widest_radius_mm


def test_screws_stand_apart_and_inside_the_flange(each: Profile) -> None:
    d = dimensions_of(each)
    for screws in (d.rim.screws, d.portal.screws, d.bin_ring.screws):
        places = screws.places_mm
        for index, (x, y) in enumerate(places):
            for u, v in places[index + 1 :]:
                assert sqrt((x - u) ** 2 + (y - v) ** 2) >= screws.boss_mm
    for x, y in d.rim.screws.places_mm:
        radius = sqrt(x**2 + y**2)
        on_ring = d.body.outer_radius_mm + d.rim.screws.boss_mm / 2 - 1e-6 <= radius
        assert on_ring
        on_disc = radius <= d.rim.outer_radius_mm - d.rim.screws.boss_mm / 2 + 1e-6
        on_tab = d.portal.face_x_mm < x <= 1e-6 and (
            d.portal.frame_low_y_mm < y < d.portal.frame_high_y_mm
        )
        assert on_disc or on_tab


def test_rings_cover_the_body_and_fit_the_printer(each: Profile) -> None:
    d = dimensions_of(each)
    rings = d.division.rings
    assert rings[0].top_mm == 0.0
    assert rings[-1].bottom_mm == pytest.approx(-d.body.total_height_mm)
    for above, below in itertools.pairwise(rings):
        assert above.bottom_mm == below.top_mm
    tallest = (each.printer.build_volume[2] - each.printer.margin) * 1000
    assert rings[0].height_mm <= tallest
    assert all(ring.height_mm + d.joint.lap_mm <= tallest for ring in rings[1:])


def test_sector_cuts_miss_slot_and_screws(joinery: Profile) -> None:
    import numpy as np  # noqa: PLC0415 - one test needs it

    d = dimensions_of(joinery)
    ring = d.division.rings[0]
    assert ring.sectors > 1
    cuts = ring.first_cut + 2 * pi / ring.sectors * np.arange(ring.sectors)
    bosses = np.arctan2(*np.array(d.rim.screws.places_mm).T[::-1])
    apart = np.abs((cuts[:, None] - bosses + pi) % (2 * pi) - pi) * d.rim.outer_radius_mm
    assert apart.min() >= (d.rim.screws.boss_mm + d.joint.lap_mm) / 2
    corner = np.arctan2(d.portal.frame_low_y_mm, d.portal.face_x_mm)
    inside = (cuts % (2 * pi) > pi / 2) & (cuts % (2 * pi) < corner % (2 * pi))
    assert not inside.any()


def test_measured_hose_wins_over_its_name(luthier: Profile) -> None:
    named = dimensions_of(luthier).transition.cuff
    measured = dimensions_of(with_hose(luthier, measured=0.0372)).transition.cuff
    assert named.tip_diameter_mm == pytest.approx(38.0 - 0.3)
    assert measured.tip_diameter_mm == pytest.approx(37.2 - 0.3)
    inside = dimensions_of(with_hose(luthier, fit="inside")).transition.cuff
    assert inside.tip_diameter_mm > inside.root_diameter_mm > inside.bore_mm


def test_a_low_printer_shortens_the_transition(luthier: Profile) -> None:
    low = with_printer(luthier, build_volume=(0.22, 0.22, 0.14))
    assert dimensions_of(low).transition.length_mm < dimensions_of(luthier).transition.length_mm
    assert dimensions_of(low).transition.included_angle > (
        dimensions_of(luthier).transition.included_angle
    )


@pytest.mark.parametrize("face_down", ["transition", "bin_ring"])
def test_a_groove_that_prints_face_down_has_to_be_bridged(luthier: Profile, face_down: str) -> None:
    # grooves for round cord are a third wider than it, as handbooks have them: 5.4 mm here
    with pytest.raises(UnbuildableError, match=r"joints\.cord needs a groove wider"):
        dimensions_of(with_narrow_bridges(luthier, face_down))


def test_a_groove_that_prints_face_up_needs_no_bridge(luthier: Profile) -> None:
    assert dimensions_of(with_narrow_bridges(luthier, "lid")).seals.lid is not None


def with_narrow_bridges(profile: Profile, corded: str) -> Profile:
    gaskets = dict.fromkeys(("lid", "transition", "bin_ring"), "gasket")
    joints = profile.joints.model_copy(update={**gaskets, corded: "cord", "cord": 0.004})
    printer = profile.printer.model_copy(update={"bridge_limit": 0.005})
    return profile.model_copy(update={"joints": joints, "printer": printer})

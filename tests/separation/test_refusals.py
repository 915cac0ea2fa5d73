"""What no published formula covers is said, never computed in silence."""

from __future__ import annotations

from typing import TYPE_CHECKING

import pytest
from tests.correlations.shapes import cyclone, flow_at
from tests.separation.machines import AIR, HIGH_EFFICIENCY, STAGE, changed, written

from gyrecut.catalogue import families
from gyrecut.correlations.geometry import CycloneGeometry
from gyrecut.errors import PROFILE_INVALID, OutOfRangeError
from gyrecut.pipeline import design
from gyrecut.profile import ProfileError, at_its_line, load_profile
from gyrecut.separation.models import CUT_SIZE_NOTES, HEADS_NOTES, cut_sizes, pressure_drops

if TYPE_CHECKING:
    from pathlib import Path

    from gyrecut.separation.models import Agreement, Word

WIDE_SLOTS = {"stairmand-high-throughput", "swift-high-throughput"}


def body(**ratios: float) -> CycloneGeometry:
    """Make a body of 0.2 m: Stairmand's high efficiency with other ratios."""
    usual = {
        "slot_height": 0.5,
        "slot_width": 0.2,
        "finder_diameter": 0.5,
        "finder_length": 0.5,
        "barrel_height": 1.5,
        "total_height": 4.0,
        "dust_outlet_diameter": 0.375,
    }
    return CycloneGeometry(
        body_diameter=0.2, **{name: 0.2 * ratio for name, ratio in (usual | ratios).items()}
    )


def said_of(geometry: CycloneGeometry, *, density: float = 1000.0) -> Agreement:
    return cut_sizes(
        geometry,
        flow=float(flow_at(geometry, 15.0)),
        particle_density=density,
        shape_factor=1.0,
        loading=0.0,
        air=AIR,
    )


def word(agreement: Agreement, model: str) -> Word:
    (found,) = (one for one in agreement.words if one.model == model)
    return found


@pytest.mark.parametrize("family", families())
def test_iozia_and_leith_are_silent_on_wide_slots_only(family: str) -> None:
    agreement = said_of(cyclone(family, 0.2))
    found = word(agreement, "Iozia and Leith")
    silent = [one.model for one in agreement.words if one.value is None]
    assert silent == (["Iozia and Leith"] if family in WIDE_SLOTS else [])
    assert found.why.startswith("silent: ") is (family in WIDE_SLOTS)
    if family in WIDE_SLOTS:
        assert "slot area over the square of the body diameter" in found.why
        assert "0.16" in found.why


@pytest.mark.parametrize(
    ("model", "ratios", "why"),
    [
        ("Iozia and Leith", {"slot_height": 0.2}, "slot area"),
        ("Leith and Licht", {"finder_length": 0.2}, "finder length over slot height"),
    ],
)
def test_a_model_outside_its_range_says_so_and_the_others_go_on(
    model: str, ratios: dict[str, float], why: str
) -> None:
    agreement = said_of(body(**ratios))
    found = word(agreement, model)
    assert found.value is None
    assert not found.trusted
    assert found.why.startswith("silent: ")
    assert why in found.why
    assert [one.model for one in agreement.words] == list(CUT_SIZE_NOTES)
    assert all(one.value is not None and one.value > 0 for one in agreement.words if one != found)
    assert word(said_of(body()), model).value is not None


def test_a_pressure_drop_outside_its_range_is_silent_too() -> None:
    # more than a thousand heads by the square of slot area over finder area
    narrow = body(finder_diameter=0.2, slot_height=0.83, slot_width=0.48)
    agreement = pressure_drops(narrow, flow=float(flow_at(narrow, 15.0)), loading=0.0, air=AIR)
    found = word(agreement, "Casal and Martinez-Benet")
    assert found.value is None
    assert found.why.startswith("silent: ")


def test_a_silent_model_is_a_finding_on_its_stage(tmp_path: Path) -> None:
    wide = ("stairmand-high-efficiency", "stairmand-high-throughput")
    of = design(changed(tmp_path, wide))
    (found,) = (one for one in of.findings if one.code == "model-out-of-range")
    assert found.severity == "note"
    assert found.part == "stage 1"
    assert "silent: Iozia and Leith" in found.what
    assert "model-out-of-range" not in {one.code for one in design(changed(tmp_path)).findings}


def test_no_central_value_without_the_models_that_carry_it() -> None:
    # a slot that reaches past the axis: Barth and Muschelknautz have no answer
    with pytest.raises(OutOfRangeError, match="slot width over body radius"):
        said_of(body(slot_width=0.55))
    with pytest.raises(OutOfRangeError, match="finder length over body diameter"):
        pressure_drops(body(finder_length=0.05), flow=0.06, loading=0.0, air=AIR)


@pytest.mark.parametrize("velocity", [0.9, 61.0])
def test_no_value_outside_the_velocities_covered(velocity: float) -> None:
    geometry = cyclone(HIGH_EFFICIENCY, 0.2)
    with pytest.raises(OutOfRangeError, match="inlet velocity"):
        cut_sizes(
            geometry,
            flow=velocity * 0.1 * 0.04,
            particle_density=1000.0,
            shape_factor=1.0,
            loading=0.0,
            air=AIR,
        )


def test_every_model_has_its_word() -> None:
    geometry = cyclone(HIGH_EFFICIENCY, 0.2)
    assert [one.model for one in said_of(geometry).words] == list(CUT_SIZE_NOTES)
    drops = pressure_drops(geometry, flow=0.06, loading=0.0, air=AIR)
    assert [one.model for one in drops.words] == list(HEADS_NOTES)
    for one in (*said_of(geometry).words, *drops.words):
        assert one.value is not None
        assert one.why


def test_more_dust_than_the_formulas_cover_is_told_at_its_line(tmp_path: Path) -> None:
    # 200 kg/h in 140 m3/h: 1.43 kg/m3
    path = written(tmp_path, ("feed: 150 g/h", "feed: 200 kg/h"))
    with pytest.raises(OutOfRangeError, match="dust in the air") as caught:
        design(load_profile(path))
    told = at_its_line(path, caught.value)
    assert isinstance(told, ProfileError)
    assert told.exit_code == PROFILE_INVALID
    (problem,) = told.problems
    assert str(problem.code) == "P090"
    lines = path.read_text(encoding="utf-8").splitlines()
    assert problem.line == lines.index("  feed: 200 kg/h") + 1
    assert "1.42857 kg/m^3" in str(told)
    assert "0 to 1 kg/m^3" in str(told)


def test_a_proportion_no_model_covers_is_told_at_its_line(tmp_path: Path) -> None:
    ratios = (
        "proportions: {slot_height: 0.5, slot_width: 0.2, finder_diameter: 0.5, "
        "finder_length: 0.05, barrel_height: 1.5, total_height: 4, dust_outlet_diameter: 0.375}\n"
        "    inlet_velocity: 18 m/s"
    )
    path = written(tmp_path, (STAGE, ratios))
    with pytest.raises(OutOfRangeError, match="finder length") as caught:
        design(load_profile(path))
    assert "P090" in str(at_its_line(path, caught.value))


def test_where_one_answer_fades_into_the_other_all_carry_it() -> None:
    geometry = cyclone(HIGH_EFFICIENCY, 0.12)
    trusted, reynolds = {}, {}
    for velocity in (9.0, 12.0, 20.0):
        said = cut_sizes(
            geometry,
            flow=float(flow_at(geometry, velocity)),
            particle_density=1000.0,
            shape_factor=1.0,
            loading=0.0,
            air=AIR,
        )
        reynolds[velocity] = AIR.density * velocity * 0.03 / AIR.viscosity
        trusted[velocity] = {one.model for one in said.words if one.trusted}
        values = [one.value for one in said.words if one.trusted and one.value is not None]
        assert min(values) * 0.999 <= said.central <= max(values) * 1.001
    assert reynolds[9.0] < 20_000 < reynolds[12.0] < 25_000 < reynolds[20.0]
    assert trusted[9.0] == {"Muschelknautz, smooth"}
    assert trusted[20.0] == {"Muschelknautz, f >= 0.005", "Barth, f 0.005"}
    assert trusted[12.0] == trusted[9.0] | trusted[20.0]

"""Bin, filter and air behind it, against hand calculations; and what the outlook warns of."""

from __future__ import annotations

from typing import TYPE_CHECKING

import pytest
from tests.separation.machines import AIR, SAME_AGAIN, STAGE, beside_hose, changed

from gyrecut.catalogue import dusts, filters
from gyrecut.pipeline import design
from gyrecut.separation.models import cut_sizes

if TYPE_CHECKING:
    from pathlib import Path

    from gyrecut.pipeline import Design

FEED = 0.150 / 3600  # kg/s, 150 g/h
FLOW = 140 / 3600  # m3/s
HOURS = 3600.0


def codes(of: Design) -> list[str]:
    return [finding.code for finding in of.findings]


def test_bin_fill_time_by_hand(tmp_path: Path) -> None:
    # A bin of 20 L counts as full at 16 L. With 120 kg/m3 in the heap that is 1.92 kg; at 150 g/h
    # and all of it kept, 12.8 h; what passes makes it longer.
    of = design(
        changed(
            tmp_path,
            ("kind: hardwood-sanding", "kind: hardwood-sanding\n  bulk_density: 120 kg/m3"),
        )
    )
    catch = of.forecast.catch
    assert catch.bin_fill_time is not None
    assert catch.bin_fill_time / HOURS == pytest.approx(12.8 / catch.kept, rel=1e-12)
    assert 12.8 < catch.bin_fill_time / HOURS < 13.0


def test_dust_to_the_filter_by_hand(tmp_path: Path) -> None:
    catch = design(changed(tmp_path)).forecast.catch
    assert catch.to_filter is not None
    assert catch.to_filter == pytest.approx(FEED * (1 - catch.kept), rel=1e-9)
    # 150 g/h, of which less than one in a hundred passes
    assert 0 < catch.to_filter * HOURS < 1.5e-3


def test_two_stages_pass_what_both_let_through(tmp_path: Path) -> None:
    of = design(changed(tmp_path, SAME_AGAIN)).forecast
    first, second = of.stages
    assert of.catch.kept == pytest.approx(first.kept + second.kept, rel=1e-12)
    assert second.kept_of_arriving == pytest.approx(second.kept / (1 - first.kept), rel=1e-9)
    assert of.catch.to_filter == pytest.approx(FEED * (1 - first.kept - second.kept), rel=1e-9)


def test_a_second_stage_sees_the_loading_that_the_first_lets_through(tmp_path: Path) -> None:
    # 60 kg/h, enough dust to slow the vortex of the first and not that of the second
    of = design(changed(tmp_path, SAME_AGAIN, ("feed: 150 g/h", "feed: 60 kg/h")))
    first, second = of.forecast.stages
    alone = [
        cut_sizes(
            stage.geometry,
            flow=stage.flow,
            particle_density=of.dust.particle_density,
            shape_factor=of.dust.shape_factor,
            loading=loading,
            air=of.air,
        ).central
        for stage, loading in zip(
            of.stages,
            (of.forecast.loading, of.forecast.loading * (1 - first.kept)),
            strict=True,
        )
    ]
    assert [first.cut_size.central, second.cut_size.central] == pytest.approx(alone, rel=1e-9)
    assert second.cut_size.central < 0.95 * first.cut_size.central


def test_loading_is_dust_over_air(tmp_path: Path) -> None:
    of = design(changed(tmp_path))
    # 150 g/h in 140 m3/h: 1.07 g/m3, with 1.2 kg/m3 of air 0.9 g/kg
    assert of.forecast.loading == pytest.approx(1.0714e-3 / of.air.density, rel=1e-4)


def test_filter_life_by_hand(tmp_path: Path) -> None:
    # 0.5 m2 at 140 m3/h: 0.07778 m/s when clean. At the flow v that is left, 2000 Pa are 2000 / v
    # Pa s/m, of which class M has 1500 when clean; the rest over the cake's resistance is the load.
    of = design(changed(tmp_path, beside_hose("filter: {area: 0.5 m2, class: M, limit: 2 kPa}")))
    outlook, catch = of.forecast.filter, of.forecast.catch
    assert outlook is not None
    assert outlook.face_velocity == pytest.approx(0.0777778, rel=1e-5)
    assert filters()["M"].clean_resistance == 1500
    assert of.forecast.loaded is not None
    left = of.forecast.loaded.flow / 0.5
    assert left < 0.0777
    load = (2000 / left - 1500) / of.dust.cake_resistance
    assert catch.to_filter is not None
    assert outlook.life == pytest.approx(load * 0.5 / catch.to_filter, rel=1e-5)


def test_a_filter_over_its_limit_when_clean_has_no_life(tmp_path: Path) -> None:
    of = design(changed(tmp_path, beside_hose("filter: {area: 0.5 m2, class: M, limit: 100 Pa}")))
    # clean it takes 1500 * 0.0778 = 117 Pa
    assert of.forecast.filter is not None
    assert of.forecast.filter.life is None
    assert of.forecast.loaded is None


def test_a_filters_own_clean_loss_is_taken_at_the_air_flow(tmp_path: Path) -> None:
    of = design(
        changed(
            tmp_path,
            beside_hose("filter: {area: 0.5 m2, class: M, clean_loss: 300 Pa, limit: 2 kPa}"),
        )
    )
    (taken,) = (one.pressure_drop for one in of.forecast.clean.shares if one.name == "filter")
    # its resistance is that of 20 degC, so the viscosity cancels to half a percent
    assert taken == pytest.approx(300, rel=6e-3)


def test_dust_behind_the_filter_by_hand(tmp_path: Path) -> None:
    # Class M lets through a thousandth: of d g/h that reach it, d / 1000 in 140 m3 an hour.
    of = design(changed(tmp_path, beside_hose("filter: {area: 0.5 m2, class: M}")))
    outlook, catch = of.forecast.filter, of.forecast.catch
    assert outlook is not None
    assert catch.to_filter is not None
    grams_an_hour = catch.to_filter * HOURS * 1000
    assert outlook.after_filter == pytest.approx(grams_an_hour / 1000 * 1000 / 140, rel=1e-9)
    assert outlook.life is None
    assert outlook.exposure_limit == dusts()["hardwood-sanding"].exposure_limit
    assert "exhaust-below-exposure-limit" in codes(of)


def test_dust_above_the_exposure_limit_is_a_warning(tmp_path: Path) -> None:
    # a fine dust through a coarse class: 10 kg/h of 2 um, and L lets through a hundredth
    of = design(
        changed(
            tmp_path,
            ("feed: 150 g/h", "feed: 10 kg/h\n  median: 2 um"),
            beside_hose("filter: {area: 0.5 m2, class: L}"),
        )
    )
    outlook = of.forecast.filter
    assert outlook is not None
    assert outlook.after_filter is not None
    assert outlook.exposure_limit is not None
    assert outlook.after_filter > outlook.exposure_limit
    assert "exhaust-above-exposure-limit" in codes(of)
    assert "exhaust-below-exposure-limit" not in codes(of)


def test_without_a_feed_nothing_is_said_of_times_and_grams(tmp_path: Path) -> None:
    of = design(
        changed(
            tmp_path,
            ("  feed: 150 g/h\n", ""),
            beside_hose("filter: {area: 0.5 m2, class: M, limit: 2 kPa}"),
        )
    ).forecast
    assert of.filter is not None
    assert (of.catch.to_filter, of.catch.bin_fill_time) == (None, None)
    assert (of.filter.life, of.filter.after_filter) == (None, None)
    assert of.loaded is not None


def test_a_dust_that_hardly_passes_does_not_stop_the_design(tmp_path: Path) -> None:
    # Coarse grains: less than a microgram a year reaches the filter. It has no life worth saying,
    # but the separator is a good one.
    of = design(
        changed(
            tmp_path,
            ("feed: 150 g/h", "feed: 0.1 g/h\n  median: 1 mm\n  spread: 1.05"),
            beside_hose("filter: {area: 1 m2, class: M, limit: 2 kPa}"),
        )
    ).forecast
    assert of.filter is not None
    assert of.filter.life is None
    assert of.catch.to_filter is not None
    assert 0 < of.catch.to_filter < 1e-12
    assert of.catch.kept == pytest.approx(1.0, abs=1e-9)


def test_a_choked_case_slower_than_the_models_does_not_stop_the_design(tmp_path: Path) -> None:
    # A hood of 20 mm takes most of the pressure, before a slow body: choked, 0.7 m/s in the slot.
    of = design(
        changed(
            tmp_path,
            beside_hose("pick_up: {kind: hood, diameter: 20 mm}"),
            ("inlet_velocity: 18 m/s", "inlet_velocity: 5 m/s"),
            ("nominal: 38 mm", "nominal: 75 mm"),
            ("hose: 50 mm", "hose: 75 mm"),
            ("length: 3 m", "length: 0.5 m"),
        )
    )
    assert of.forecast.catch.kept_when_choked is None
    assert 0.5 < of.forecast.catch.kept < 1.0
    assert "choked-out-of-range" in codes(of)
    assert "choked-out-of-range" not in codes(design(changed(tmp_path)))


@pytest.mark.parametrize(("limit", "told"), [("3 kPa", False), ("15 kPa", True)])
def test_a_loaded_filter_that_slows_the_hose_is_told(
    tmp_path: Path,
    limit: str,
    told: bool,  # noqa: FBT001 - a row of a table
) -> None:
    of = design(
        changed(
            tmp_path,
            ("flow: 140 m3/h", "source: {shut_off: 18 kPa, open_flow: 150 m3/h}"),
            beside_hose(f"filter: {{area: 0.5 m2, class: M, limit: {limit}}}"),
        )
    )
    loaded = of.forecast.loaded
    assert loaded is not None
    assert (loaded.hose_velocity < of.dust.conveying_velocity) is told
    assert ("hose-settles-when-loaded" in codes(of)) is told


def test_a_choked_hose_that_settles_is_told_unless_it_always_does(tmp_path: Path) -> None:
    usual = design(changed(tmp_path))
    assert usual.forecast.choked.hose_velocity < usual.dust.conveying_velocity
    assert "hose-settles-when-choked" in codes(usual)
    relieved = design(
        changed(
            tmp_path, beside_hose("pick_up: {kind: nozzle, diameter: 38 mm, relief_area: 6 cm2}")
        )
    )
    assert relieved.forecast.choked.hose_velocity >= relieved.dust.conveying_velocity
    assert "hose-settles-when-choked" not in codes(relieved)


def test_a_bank_shares_the_flow_and_the_feed(tmp_path: Path) -> None:
    of = design(changed(tmp_path, (STAGE, f"{STAGE}\n    count: 3")))
    (stage,) = of.forecast.stages
    assert stage.flow == pytest.approx(FLOW / 3)
    assert stage.inlet_velocity == pytest.approx(18.0, rel=2e-3)  # bodies are rounded to 0.1 mm
    assert of.air.density == pytest.approx(AIR.density)

"""Each rule of the field speaks up where it is broken, and keeps quiet where it holds."""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

import pytest
from tests.proportions.conftest import PROFILES, with_hose, with_printer, with_stage

from gyrecut import pipeline
from gyrecut.findings import Finding, Severity
from gyrecut.profile import load_profile
from gyrecut.proportions import rules
from gyrecut.proportions.printing import Bed

if TYPE_CHECKING:
    from pathlib import Path

    from gyrecut.profile import Profile


def found(profile: Profile) -> dict[str, Finding]:
    return {finding.code: finding for finding in pipeline.design(profile).findings}


def with_dust(profile: Profile, **changes: object) -> Profile:
    return profile.model_copy(update={"dust": profile.dust.model_copy(update=changes)})


@pytest.mark.parametrize("path", sorted(PROFILES.glob("*.yaml")), ids=lambda path: path.stem)
def test_a_shipped_profile_breaks_no_rule(path: Path) -> None:
    assert all(f.severity is Severity.NOTE for f in found(load_profile(path)).values())


def test_slot_that_aims_at_the_finder(luthier: Profile) -> None:
    # the high-throughput shape: b = 0.375 D, and (D - De) / 2 = 0.125 D
    finding = found(
        with_stage(luthier, body_diameter=0.12, proportions="stairmand-high-throughput")
    )
    assert finding["slot-aims-at-finder"].measured == pytest.approx(45.0)
    assert finding["slot-aims-at-finder"].limit == pytest.approx(15.0 - 2.4)
    assert finding["slot-aims-at-finder"].severity is Severity.WARN


def test_finder_that_ends_above_the_slot_floor(luthier: Profile) -> None:
    d = pipeline.design(luthier).stages[0].dimensions
    short = replace(d, finder=replace(d.finder, length_mm=d.slot.height_mm - 1.0))
    assert [f.code for f in rules._slot(short)] == ["finder-above-slot-floor"]  # noqa: SLF001
    assert list(rules._slot(d)) == []  # noqa: SLF001


@pytest.mark.parametrize(
    ("velocity", "code"), [(8.0, "inlet-too-slow"), (30.0, "inlet-too-fast"), (18.0, None)]
)
def test_inlet_velocity_window(luthier: Profile, velocity: float, code: str | None) -> None:
    codes = set(found(with_stage(luthier, inlet_velocity=velocity)))
    window = {"inlet-too-slow", "inlet-too-fast"}
    assert codes & window == ({code} if code else set())


def test_saltation_is_information_only(luthier: Profile) -> None:
    finding = found(luthier)["above-saltation-window"]
    assert finding.severity is Severity.NOTE
    assert finding.measured is not None
    assert finding.measured > 1.36


def test_hose_too_slow_for_the_dust(luthier: Profile) -> None:
    finding = found(with_hose(luthier, nominal="63 mm"))["hose-too-slow"]
    # continuity by hand: 140 m3/h through 63 mm
    assert finding.measured == pytest.approx(140 / 3600 / (3.14159 / 4 * 0.063**2), rel=1e-3)


def test_dust_outlet_against_chips_and_feed(luthier: Profile) -> None:
    chips = found(with_dust(luthier, largest_chip=0.03))["dust-outlet-bridges"]
    assert chips.limit == pytest.approx(90.0)
    flood = found(with_dust(luthier, feed=0.03, bulk_density=20.0))["dust-outlet-too-narrow"]
    assert flood.measured is not None
    assert flood.limit is not None
    assert flood.measured < flood.limit


def test_transition_that_widens_fast(luthier: Profile) -> None:
    low = with_printer(luthier, build_volume=(0.22, 0.22, 0.14))
    assert found(low)["transition-widens-fast"].limit == pytest.approx(15.0)


def test_walls_too_thin_for_laps(joinery: Profile) -> None:
    thin = joinery.model_copy(update={"walls": joinery.walls.model_copy(update={"body": 0.002})})
    finding = found(thin)["lap-too-thin"]
    assert finding.severity is Severity.STOP
    assert finding.measured == pytest.approx((2.0 - 0.25) / 2)


def test_piece_printed_whole_that_does_not_fit(luthier: Profile) -> None:
    d = pipeline.design(luthier).stages[0].dimensions
    roomy = Bed(width_mm=210.0, depth_mm=210.0, height_mm=245.0)
    narrow, low = replace(roomy, depth_mm=85.0), replace(roomy, height_mm=60.0)
    assert list(rules._round_pieces(d, roomy)) == []  # noqa: SLF001
    (wide, *_), tall = rules._round_pieces(d, narrow), list(rules._round_pieces(d, low))  # noqa: SLF001
    assert (wide.code, wide.severity, wide.where) == ("piece-too-large", Severity.STOP, "diameter")
    assert {finding.part for finding in tall} == {"vortex finder", "outlet"}


@pytest.mark.parametrize(
    ("limit", "value", "unit"),
    [
        ("pressure_drop", 500.0, "Pa"),
        ("height", 0.5, "mm"),
        ("cut_size", 1e-6, "um"),
        ("pieces", 3, ""),
    ],
)
def test_the_profiles_own_limits(luthier: Profile, limit: str, value: float, unit: str) -> None:
    limits = luthier.limits.model_copy(update={limit: value})
    finding = found(luthier.model_copy(update={"limits": limits}))[
        f"over-limit-{limit.replace('_', '-')}"
    ]
    assert finding.severity is Severity.STOP
    assert finding.unit == unit
    assert finding.measured is not None
    assert finding.limit is not None
    assert finding.measured > finding.limit

"""Profiles as they come out: SI values, defaults, hash, and what loading costs."""

from __future__ import annotations

import re
import subprocess
import sys
from math import pi
from pathlib import Path
from typing import TYPE_CHECKING

import pytest
from pydantic import ValidationError

from gyrecut.profile import Profile, ProfileError, load_profile, profile_hash, starter_text
from gyrecut.profile.air import OwnSource

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

    Write = Callable[[Mapping[str, str]], None]

PROFILES = Path(__file__).parents[2] / "profiles"
SHIPPED = sorted(PROFILES.glob("*.yaml"))


def test_three_workshops_are_shipped() -> None:
    assert [path.stem for path in SHIPPED] == ["casting-bench", "joinery-planer", "luthier-sander"]


@pytest.mark.parametrize("path", SHIPPED, ids=lambda path: path.stem)
def test_a_shipped_profile_is_good_and_commented_on_each_line(path: Path) -> None:
    assert load_profile(path).name == path.stem
    first, *lines = path.read_text(encoding="utf-8").splitlines()
    assert first == "# yaml-language-server: $schema=./profile.schema.json"
    assert "invented" in lines[0]
    assert [line for line in lines if line.strip() and "#" not in line] == []


def test_values_are_in_si() -> None:
    profile = load_profile(PROFILES / "casting-bench.yaml")
    assert profile.air.flow == pytest.approx(35 * 0.3048**3 / 60, rel=1e-15)
    assert profile.air.temperature == pytest.approx((72 - 32) / 1.8 + 273.15, rel=1e-15)
    assert profile.stages[0].inlet_velocity == pytest.approx(2950 * 0.3048 / 60, rel=1e-15)
    assert profile.printer.build_volume == (5.71 * 0.0254, 5.71 * 0.0254, 7.09 * 0.0254)
    assert profile.printer.overhang_limit == pi / 4
    assert profile.bin.volume == pytest.approx(231 * 0.0254**3, rel=1e-15)


def test_what_is_left_out_has_the_documented_value(good: str, write: Write) -> None:
    write({"good.yaml": good})
    profile = load_profile(Path("good.yaml"))
    air, joints = profile.air, profile.joints
    assert (air.temperature, air.altitude, air.relative_humidity) == (293.15, 0.0, 0.5)
    assert (air.hose.bends, profile.stages[0].count, profile.description) == (0, 1, "")
    assert (joints.lap, joints.fastener) == (0.01, "M4")
    assert set(profile.limits.model_dump().values()) == {None}


def test_a_profile_is_frozen(good: str, write: Write) -> None:
    write({"good.yaml": good})
    profile = load_profile(Path("good.yaml"))
    with pytest.raises(ValidationError, match="frozen"):
        profile.name = "other"


def test_a_finished_profile_stays_as_it_is(good: str, write: Write) -> None:
    write({"good.yaml": good})
    profile = load_profile(Path("good.yaml"))
    assert Profile.model_validate(profile) is profile


def test_hash_does_not_see_units_comments_and_order(good: str, write: Write) -> None:
    name, rest = good.split("\n", 1)
    other = rest.replace("mouth: 260 mm", "mouth: 26.0cm").replace("20 L", "0.02 m3")
    other = other.replace("140 m3/h", "1.4e2 m3/h  # measured").replace("2.4 mm", "2400 um")
    write({"good.yaml": good, "other.yaml": f"{other}joints: {{lap: 1 cm}}\n{name}\n"})
    assert profile_hash(load_profile(Path("other.yaml"))) == profile_hash(
        load_profile(Path("good.yaml"))
    )


def test_hash_sees_each_value(good: str, write: Write) -> None:
    texts = [
        good,
        good.replace("mouth: 260 mm", "mouth: 260.001 mm"),
        good.replace("name: good", "name: better"),
        good.replace("material: PETG", "material: PLA"),
        good.replace("    fit: over", "    fit: inside"),
    ]
    write({f"{n}.yaml": text for n, text in enumerate(texts)})
    hashes = [profile_hash(load_profile(Path(f"{n}.yaml"))) for n in range(len(texts))]
    assert len(set(hashes)) == len(texts)
    assert all(re.fullmatch("[0-9a-f]{64}", each) for each in hashes)


def test_the_starter_is_a_good_profile(write: Write) -> None:
    write({"first.yaml": starter_text("my-first")})
    assert load_profile(Path("first.yaml")).name == "my-first"


def test_the_starter_is_good_with_its_suggestions_taken_up(write: Write) -> None:
    text = re.sub(r"^( +)# (\w+: )", r"\1\2", starter_text("my-first"), flags=re.MULTILINE)
    write({"first.yaml": text})
    profile = load_profile(Path("first.yaml"))
    assert profile.air.hose.measured == 0.0386
    assert None not in profile.dust.model_dump(exclude={"distribution"}).values()
    assert profile.air.source == "shop-vacuum"
    assert profile.air.pick_up is not None
    assert profile.air.pick_up.diameter == 0.032
    assert profile.air.filter is not None
    assert (profile.air.filter.area, profile.air.filter.filter_class) == (0.5, "M")


def test_the_starter_refuses_a_bad_name() -> None:
    with pytest.raises(ProfileError) as caught:
        starter_text("My First")
    assert (
        str(caught.value)
        == """\
the new profile:1:7: P032 name cannot be used as a file name
   1 | name: My First
     |       ^
  given: My First
  allowed: 1 to 64 small letters, digits and hyphens, not a hyphen first
  do: write a name such as "my-separator\""""
    )


def test_the_unit_library_is_loaded_by_the_first_quantity_only() -> None:
    code = (
        "import sys, gyrecut.profile as p; assert 'pint' not in sys.modules; "
        "p.profile_schema(); p.starter_text('a'); assert 'pint' not in sys.modules"
    )
    subprocess.run([sys.executable, "-c", code], check=True)


def test_a_source_may_stand_in_for_the_flow(good: str, write: Write) -> None:
    write({"source.yaml": good.replace("flow: 140 m3/h", "source: on-board-blower")})
    air = load_profile(Path("source.yaml")).air
    assert air.flow is None
    assert air.source == "on-board-blower"


def test_both_flow_and_source_may_be_given(good: str, write: Write) -> None:
    ends = "source: {shut_off: 18 kPa, open_flow: 0.04 m3/s}"
    write({"both.yaml": good.replace("flow: 140 m3/h", f"flow: 140 m3/h\n  {ends}")})
    air = load_profile(Path("both.yaml")).air
    assert isinstance(air.source, OwnSource)
    assert (air.source.shut_off, air.source.open_flow, air.source.exponent) == (18e3, 0.04, None)
    assert air.flow == pytest.approx(140 / 3600)


def test_what_is_left_out_of_the_air_side_is_not_there(good: str, write: Write) -> None:
    parts = "pick_up: {kind: hood}\n  filter: {area: 50 cm2, class: M}"
    write({"parts.yaml": good.replace("flow: 140 m3/h", f"flow: 140 m3/h\n  {parts}")})
    air = load_profile(Path("parts.yaml")).air
    assert (air.source, air.pressure, air.bin_leak) == (None, None, 0.0)
    assert air.pick_up is not None
    assert (air.pick_up.diameter, air.pick_up.relief_area) == (None, 0.0)
    assert air.filter is not None
    assert (air.filter.position, air.filter.clean_loss, air.filter.limit) == ("suction", None, None)
    assert air.filter.area == pytest.approx(0.005, rel=1e-15)

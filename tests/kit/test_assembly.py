"""What is bought fits what was made, and the steps name every joint there is."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING

import pytest

from gyrecut import pipeline
from gyrecut.catalogue import fasteners
from gyrecut.kit.assembly import SCREW_LENGTHS_MM, hardware, steps
from gyrecut.profile import load_profile

if TYPE_CHECKING:
    from gyrecut.proportions.dimensions import Dimensions

PROFILES = Path(__file__).parents[2] / "profiles"
SHIPPED = ("luthier-sander", "joinery-planer", "casting-bench")


def designed(name: str) -> tuple[Dimensions, str]:
    profile = load_profile(PROFILES / f"{name}.yaml")
    return pipeline.design(profile).stages[0].dimensions, profile.joints.fastener


@pytest.mark.parametrize("name", SHIPPED)
def test_a_screw_bites_the_insert_and_stays_off_the_bottom(name: str) -> None:
    d, fastener = designed(name)
    row = fasteners()[fastener]
    bought = {item.where: item for item in hardware(d, row, copies=1) if "screw" in item.what}
    for where, plate, screws, groove in (
        ("lid", d.lid.thickness_mm, d.rim.screws, d.seals.lid),
        ("transition", d.transition.flange_thickness_mm, d.portal.screws, d.seals.transition),
    ):
        gasket = 2.0 if groove is None else 0.0  # 3 mm foam drawn up by a third
        assert bought[where].quantity == str(len(screws.places_mm))
        length = int(bought[where].what.split(" x ")[1].split()[0])
        assert length in SCREW_LENGTHS_MM
        reach = length - plate - gasket
        assert 0.5 * row.insert_length * 1000 <= reach < screws.insert_depth_mm


def test_a_bank_needs_everything_as_often_as_it_has_bodies() -> None:
    d, fastener = designed("luthier-sander")
    one = list(hardware(d, fasteners()[fastener], copies=1))
    four = list(hardware(d, fasteners()[fastener], copies=4))
    assert [int(item.quantity) for item in four[:4]] == [4 * int(item.quantity) for item in one[:4]]


@pytest.mark.parametrize("name", SHIPPED)
def test_steps_follow_the_kit(name: str) -> None:
    d, _ = designed(name)
    text = " ".join(steps(d, copies=1))
    assert ("sectors of each body ring" in text) == any(r.sectors > 1 for r in d.division.rings)
    assert ("sectors of the lid" in text) == (d.division.lid_sectors > 1)
    assert ("bell-mouth" in text) == (name == "casting-bench")
    assert text.index("heat-set insert") < text.index("Lay the lid on it")
    assert text.index("Glue the body rings") < text.index("foot of the cone")

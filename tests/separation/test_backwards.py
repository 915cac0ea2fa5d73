"""Questions asked backwards come back to where they began, and the best is the best."""

from __future__ import annotations

import re
from typing import TYPE_CHECKING

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from tests.correlations.shapes import cyclone
from tests.separation.machines import AIR, SAME_AGAIN, STAGE, changed, dust_like

from gyrecut.catalogue import families
from gyrecut.correlations.consensus import SLOPE, central_pressure_drop
from gyrecut.correlations.geometry import scaled
from gyrecut.errors import UnbuildableError
from gyrecut.pipeline import design
from gyrecut.separation.backwards import (
    FASTEST_INLET,
    best_within_budget,
    body_diameter_for_pressure_drop,
    flow_for_pressure_drop,
)
from gyrecut.separation.chain import Step, through

if TYPE_CHECKING:
    from pathlib import Path

FAMILY = st.sampled_from(list(families()))
DROP = st.floats(min_value=100.0, max_value=4e3)
LOADING = st.floats(min_value=0.0, max_value=0.3)
LIMIT = ("walls: {body: 2.4 mm, lid: 6 mm}", "walls: {body: 2.4 mm, lid: 6 mm}\nlimits: {}")


def limited(limit: str) -> tuple[str, str]:
    return (LIMIT[0], LIMIT[1].replace("{}", f"{{{limit}}}"))


@given(
    family=FAMILY,
    diameter=st.floats(min_value=0.05, max_value=0.6),
    drop=DROP,
    loading=LOADING,
)
def test_the_flow_for_a_pressure_drop_takes_it(
    family: str, diameter: float, drop: float, loading: float
) -> None:
    body = cyclone(family, diameter)
    flow = flow_for_pressure_drop(body, pressure_drop=drop, loading=loading, air=AIR)
    assert central_pressure_drop(body, flow=flow, loading=loading, air=AIR) == pytest.approx(
        drop, rel=1e-12
    )


@given(
    family=FAMILY,
    flow=st.floats(min_value=0.01, max_value=0.5),
    drop=DROP,
    loading=LOADING,
)
def test_the_body_for_a_pressure_drop_takes_it(
    family: str, flow: float, drop: float, loading: float
) -> None:
    shape = cyclone(family, 1.0)
    diameter = body_diameter_for_pressure_drop(
        shape, pressure_drop=drop, flow=flow, loading=loading, air=AIR
    )
    body = scaled(shape, body_diameter=diameter)
    assert central_pressure_drop(body, flow=flow, loading=loading, air=AIR) == pytest.approx(
        drop, rel=1e-9
    )


@pytest.mark.parametrize("wanted", ["1.6 um", "2.1 um", "3 um", "4 um"])
def test_a_body_for_a_cut_size_has_it(tmp_path: Path, wanted: str) -> None:
    of = design(
        changed(
            tmp_path,
            ("inlet_velocity: 18 m/s", f"cut_size: {wanted}"),
            ("  feed: 150 g/h\n", ""),
        )
    )
    micrometres = float(wanted.removesuffix(" um"))
    # bodies are rounded to 0.1 mm, a thousandth of their size; the cut goes as D^1.5 or so
    assert of.forecast.stages[0].cut_size.central * 1e6 == pytest.approx(micrometres, rel=2e-3)


def test_a_cut_size_that_no_body_has_is_refused(tmp_path: Path) -> None:
    with pytest.raises(UnbuildableError, match="no body of these proportions"):
        design(changed(tmp_path, ("inlet_velocity: 18 m/s", "cut_size: 0.5 um")))


@pytest.mark.parametrize("budget", [250.0, 800.0, 2500.0, 6000.0])
@pytest.mark.parametrize("median", [4e-6, 30e-6])
def test_the_best_within_a_budget_is_the_best_of_a_scan(budget: float, median: float) -> None:
    grains, flow = dust_like(median=median), 0.04
    ranked = best_within_budget(grains, pressure_drop=budget, flow=flow, loading=0.0, air=AIR)
    assert {best.family for best in ranked} == set(families())
    assert [best.kept for best in ranked] == sorted((best.kept for best in ranked), reverse=True)
    for best in ranked:
        diameters = np.geomspace(0.03, 0.9, 1500)[:, None]
        bodies = cyclone(best.family, diameters)
        velocity = flow / np.asarray(bodies.slot_height * bodies.slot_width)
        covered = (velocity > 1.0) & (velocity <= FASTEST_INLET)
        bodies = cyclone(best.family, diameters[covered][:, None])
        drops = np.asarray(central_pressure_drop(bodies, flow=flow, loading=0.0, air=AIR))
        kept = np.asarray(
            through(
                (Step(geometry=bodies, copies=1),),
                grains,
                flow=flow,
                loading=0.0,
                leak=0.0,
                air=AIR,
                slope=SLOPE,
            ).kept_in_all
        )
        within = drops[:, 0] <= budget
        assert within.any()
        top = float(kept[within].max())
        # the scan's steps are 0.23 % of a diameter, which move the catch by less than 0.002
        assert top <= best.kept + 1e-12
        assert best.kept <= top + 2e-3
        assert best.pressure_drop <= budget * (1 + 1e-12)
        assert best.inlet_velocity <= FASTEST_INLET * (1 + 1e-12)
        # one of the two is what holds it back
        assert best.pressure_drop > budget * 0.999 or best.inlet_velocity > FASTEST_INLET * 0.999


def test_a_pressure_limit_is_answered(tmp_path: Path) -> None:
    of = design(changed(tmp_path, limited("pressure_drop: 600 Pa")))
    which_flow, *bodies = of.answers
    assert "At which flow" in which_flow.question
    assert "600 Pa" in which_flow.question
    geometry = of.stages[0].geometry
    assert central_pressure_drop(
        geometry, flow=which_flow.value, loading=of.forecast.loading, air=of.air
    ) == pytest.approx(600.0, rel=1e-9)
    assert which_flow.answer == f"{which_flow.value * 3600:.0f} m3/h"
    assert len(bodies) == 3
    # 18 m/s take more than the limit, which is told as well
    assert "over-limit-pressure-drop" in {finding.code for finding in of.findings}


def test_the_bodies_of_the_answer_keep_what_it_says(tmp_path: Path) -> None:
    limit = limited("pressure_drop: 600 Pa")
    for answer in design(changed(tmp_path, limit)).answers[1:]:
        found = re.match(r"(\S+), (\d+) mm, .*: keeps (\S+) %$", answer.answer)
        assert found
        family, millimetres, kept = found[1], answer.value * 1000, float(found[3])
        assert round(millimetres) == int(found[2])
        of = design(
            changed(
                tmp_path,
                limit,
                (STAGE, f"proportions: {family}\n    body_diameter: {millimetres + 0.1:.1f} mm"),
            )
        )
        assert "over-limit-pressure-drop" not in {finding.code for finding in of.findings}
        assert of.forecast.catch.kept * 100 == pytest.approx(kept, abs=0.02)
        assert of.forecast.stages[0].pressure_drop.central == pytest.approx(600, rel=5e-3)


def test_a_banks_answer_is_for_one_of_its_bodies_and_all_their_flow(tmp_path: Path) -> None:
    limit = limited("pressure_drop: 600 Pa")
    bank = design(changed(tmp_path, limit, (STAGE, f"{STAGE}\n    count: 2")))
    geometry = bank.stages[0].geometry
    assert central_pressure_drop(
        geometry, flow=bank.answers[0].value / 2, loading=bank.forecast.loading, air=bank.air
    ) == pytest.approx(600.0, rel=1e-9)
    single = design(changed(tmp_path, limit))
    # half of the flow: the area is half, the diameter goes with its root
    assert bank.answers[1].value == pytest.approx(single.answers[1].value / 2**0.5, rel=1e-9)


def test_without_a_pressure_limit_or_with_two_stages_nothing_is_answered(tmp_path: Path) -> None:
    assert design(changed(tmp_path)).answers == ()
    limit = limited("pressure_drop: 600 Pa")
    assert design(changed(tmp_path, limit, SAME_AGAIN)).answers == ()


@pytest.mark.parametrize(
    ("limit", "code"),
    [
        ("height: 0.4 m", "over-limit-height"),
        ("cut_size: 1 um", "over-limit-cut-size"),
        ("pieces: 2", "over-limit-pieces"),
    ],
)
def test_each_limit_stops_what_exceeds_it(tmp_path: Path, limit: str, code: str) -> None:
    found = {
        finding.code: finding for finding in design(changed(tmp_path, limited(limit))).findings
    }
    assert found[code].severity == "stop"
    measured, most = found[code].measured, found[code].limit
    assert measured is not None
    assert most is not None
    assert measured > most
    loose = limited("height: 3 m, cut_size: 50 um, pieces: 300, pressure_drop: 20 kPa")
    assert not [
        one for one in design(changed(tmp_path, loose)).findings if "over-limit" in one.code
    ]

"""Entries and transitions against the handbook tables and an independent library."""

from __future__ import annotations

from math import radians

import pytest
from fluids.fittings import contraction_conical_Crane, diffuser_conical, entrance_rounded

from gyrecut.airflow.entries import entry_loss_bell_mouth
from gyrecut.airflow.transitions import contraction_loss_crane, expansion_loss_crane

# Idelchik diagram 3-4 as quoted in Principles of HVAC, 9th ed., ASHRAE 2021, supplement,
# fitting 1-2: bell radius over bore, loss of a bell-mouth that stands free.
FREE = [
    *((0.0, 1.0), (0.01, 0.87), (0.02, 0.74), (0.03, 0.61), (0.04, 0.51), (0.05, 0.40)),
    *((0.06, 0.32), (0.08, 0.20), (0.10, 0.15), (0.12, 0.10), (0.16, 0.06), (0.20, 0.03)),
]

# Idelchik diagram 3-4 with an end wall, every row, as quoted in fluids 1.3.
END_WALL = [0.0, 0.01, 0.02, 0.03, 0.04, 0.05, 0.06, 0.08, 0.12, 0.16, 0.20]

# Crane TP-410 and Swamee (2008), K = 0.5/(1 + 36 (r/D)^1.2), through fluids 1.3.
RATIOS = [0.02, 0.04, 0.06, 0.08, 0.10, 0.15, 0.20]


@pytest.mark.parametrize(("ratio", "printed"), FREE)
def test_a_free_bell_mouth_is_the_handbook_row(ratio: float, printed: float) -> None:
    assert entry_loss_bell_mouth(ratio, end_wall=False) == pytest.approx(printed, abs=1e-12)


@pytest.mark.parametrize("ratio", END_WALL)
def test_a_bell_mouth_in_a_wall_is_the_row_that_fluids_holds(ratio: float) -> None:
    expected = entrance_rounded(Di=0.1, rc=0.1 * ratio, method="Idelchik")
    assert entry_loss_bell_mouth(ratio, end_wall=True) == pytest.approx(expected, abs=1e-9)


@pytest.mark.parametrize("ratio", [0.005, 0.025, 0.045, 0.07, 0.10, 0.14, 0.18])
def test_between_the_rows_the_line_is_near_the_spline_of_fluids(ratio: float) -> None:
    # A chord of a falling, hollow curve lies above it, by at most 0.007 between these rows.
    expected = entrance_rounded(Di=0.1, rc=0.1 * ratio, method="Idelchik")
    assert entry_loss_bell_mouth(ratio, end_wall=True) == pytest.approx(expected, abs=7e-3)


@pytest.mark.parametrize("ratio", RATIOS)
def test_three_published_methods_agree_within_a_tenth_of_a_head(ratio: float) -> None:
    here = entry_loss_bell_mouth(ratio, end_wall=True)
    for method in ("Crane", "Swamee"):
        other = entrance_rounded(Di=0.1, rc=0.1 * ratio, method=method)
        assert here == pytest.approx(other, abs=0.1)


def test_a_large_bell_is_the_published_fitting() -> None:
    # ASHRAE duct fitting ER2-1, bell-mouth with wall, r/D 0.20 and more: 0.03.
    assert entry_loss_bell_mouth(0.21, end_wall=True) == 0.03


@pytest.mark.parametrize("degrees", [7.0, 10.0, 14.0, 20.0, 30.0, 44.0, 60.0, 180.0])
def test_transitions_are_those_of_fluids(degrees: float) -> None:
    angle = radians(degrees)
    area_ratio = (100.0 / 150.0) ** 2
    widening = diffuser_conical(Di1=0.1, Di2=0.15, angle=degrees, method="Crane")
    narrowing = contraction_conical_Crane(Di1=0.15, Di2=0.1, angle=degrees)
    assert expansion_loss_crane(area_ratio=area_ratio, included_angle=angle) == pytest.approx(
        widening, rel=1e-9
    )
    assert contraction_loss_crane(area_ratio=area_ratio, included_angle=angle) == pytest.approx(
        narrowing, rel=1e-9
    )

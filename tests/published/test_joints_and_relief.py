"""Screws, laps and relief openings against published rules and numbers worked elsewhere."""

from __future__ import annotations

from math import pi, sqrt

import numpy as np
import pytest

from gyrecut.strength.joints import (
    end_load,
    flange_bow,
    frustum_weight,
    lap_shear,
    peak_shear_factor_volkersen,
    pull_out_force,
    screw_pitch_tema,
)
from gyrecut.strength.relief import (
    flow_at_limit,
    inflow_through_opening,
    opening_diameter,
    opening_force,
)

# Worked from the same formulas by a program that shares nothing with this one.
# Shut-off in kPa, open flow in L/s, limit in kPa; flow in L/s, hole in mm; 1.2 kg/m3, C = 0.6.
WORKED_OPENINGS = [
    (20, 60, 5.0, 45.00, 32.34),
    (20, 60, 2.5, 52.50, 41.54),
    (25, 50, 5.0, 40.00, 30.49),
    (2.2, 300, 1.5, 95.45, 63.65),
]
# Lap in mm, peak over mean shear; E 2.5 GPa, wall 2.4 mm.
WORKED_STIFF_LAPS = [(5, 3.54), (7.2, 5.09), (10, 7.07), (15, 10.61)]  # G 0.9 GPa, 0.15 mm
WORKED_SOFT_LAPS = [(5, 1.05), (7.2, 1.09), (10, 1.18), (15, 1.39)]  # G 20 MPa, 0.3 mm


@pytest.mark.parametrize(("thread", "flange", "pitch"), [(4, 6, 44), (5, 8, 58), (6, 10, 72)])
def test_pitch_on_a_soft_gasket(thread: float, flange: float, pitch: float) -> None:
    # Tubular Exchanger Manufacturers Association, from memory: with a factor of 0.5 the pitch is
    # two threads and six flanges.
    found = screw_pitch_tema(thread=thread / 1e3, flange_thickness=flange / 1e3, gasket_factor=0.5)
    assert found * 1e3 == pytest.approx(pitch, rel=1e-12)


def test_bow_is_that_of_a_built_in_beam() -> None:
    # Any textbook: five times stiffer than the simply supported one, 5 g B^4 / (384 E I).
    bow = flange_bow(line_load=670.0, pitch=0.058, modulus=1e9, width=0.0134, thickness=0.006)
    inertia = 0.0134 * 0.006**3 / 12
    x = np.linspace(0.0, 0.058, 2001)
    moment = 670.0 * (6 * 0.058 * x - 6 * x**2 - 0.058**2) / 12
    slope = np.concatenate([[0.0], np.cumsum((moment[1:] + moment[:-1]) / 2 * np.diff(x))])
    sunk = np.trapezoid(slope[:1001], x[:1001]) / (1e9 * inertia)
    assert bow == pytest.approx(abs(sunk), rel=1e-5)


def test_pull_out_is_shear_round_the_insert() -> None:
    # 20 MPa in tension is 11.547 MPa in shear, after von Mises.
    force = pull_out_force(diameter=5.6e-3, engagement=8.1e-3, strength=20e6)
    assert force == pytest.approx(pi * 5.6e-3 * 8.1e-3 * 11.547e6, rel=1e-5)


@pytest.mark.parametrize(("lap", "factor"), WORKED_STIFF_LAPS)
def test_stiff_glue_is_sheared_at_its_ends(lap: float, factor: float) -> None:
    found = peak_shear_factor_volkersen(
        modulus=2.5e9, wall=2.4e-3, lap=lap / 1e3, glue_shear_modulus=0.9e9, glue_thickness=0.15e-3
    )
    assert found == pytest.approx(factor, abs=0.005)


@pytest.mark.parametrize(("lap", "factor"), WORKED_SOFT_LAPS)
def test_soft_glue_is_sheared_evenly(lap: float, factor: float) -> None:
    found = peak_shear_factor_volkersen(
        modulus=2.5e9, wall=2.4e-3, lap=lap / 1e3, glue_shear_modulus=20e6, glue_thickness=0.3e-3
    )
    assert found == pytest.approx(factor, abs=0.005)


def test_peak_shear_is_the_solution_of_the_lap() -> None:
    # Volkersen's equation tau'' = 2 G / (E t g) tau, with tau' = +-G N / (E t g) at the ends,
    # solved by finite differences for a pull N of 1 per width.
    modulus, wall, lap, shear_modulus, glue = 2e9, 2e-3, 8e-3, 0.3e9, 0.2e-3
    count = 1601
    step = lap / (count - 1)
    stiff = 2 * shear_modulus / (modulus * wall * glue)
    matrix = np.diag(np.full(count, -2 - stiff * step**2))
    matrix += np.diag(np.ones(count - 1), 1) + np.diag(np.ones(count - 1), -1)
    matrix[0, 1] = matrix[-1, -2] = 2
    right = np.zeros(count)
    right[0] = right[-1] = -2 * step * shear_modulus / (modulus * wall * glue)
    tau = np.linalg.solve(matrix, right)
    factor = peak_shear_factor_volkersen(
        modulus=modulus, wall=wall, lap=lap, glue_shear_modulus=shear_modulus, glue_thickness=glue
    )
    assert tau[0] / (1 / lap) == pytest.approx(float(factor), rel=1e-4)


def test_lap_shear_balances_the_load() -> None:
    shear = lap_shear(force=100.0, diameter=0.1, lap=0.01)
    assert shear * pi * 0.1 * 0.01 == pytest.approx(100.0, rel=1e-12)


def test_load_on_a_pail_lid() -> None:
    # 20 kPa on 290 mm: 1321 N, worked elsewhere.
    assert end_load(pressure=20e3, diameter=0.290) == pytest.approx(1321, abs=0.5)


def test_weight_of_a_printed_barrel() -> None:
    # 200 mm across, 250 mm long, 2.4 mm thick, 1240 kg/m3: 467 g, worked elsewhere.
    weight = frustum_weight(
        density=1240.0, wall=2.4e-3, wide_diameter=0.2, narrow_diameter=0.2, height=0.25
    )
    assert weight / 9.80665 * 1e3 == pytest.approx(467, abs=0.6)


def test_weight_of_a_cone_is_that_of_its_flat_pattern() -> None:
    # A frustum of 300 to 100 mm, 400 mm tall, unrolls to a ring sector: (R1^2 - R2^2) theta / 2.
    slant = sqrt(400**2 + 100**2)
    outer, inner = 150 * slant / 100, 50 * slant / 100
    area = (outer**2 - inner**2) * (2 * pi * 100 / slant) / 2
    weight = frustum_weight(
        density=1000.0, wall=1e-3, wide_diameter=0.3, narrow_diameter=0.1, height=0.4
    )
    assert weight / 9.80665 == pytest.approx(area / 1e6, rel=1e-9)


@pytest.mark.parametrize(("shut_off", "open_flow", "limit", "flow", "hole"), WORKED_OPENINGS)
def test_openings_as_worked_elsewhere(
    shut_off: float, open_flow: float, limit: float, flow: float, hole: float
) -> None:
    found = flow_at_limit(shut_off=shut_off * 1e3, open_flow=open_flow / 1e3, limit=limit * 1e3)
    assert found * 1e3 == pytest.approx(flow, rel=5e-4)
    diameter = opening_diameter(flow=found, suction=limit * 1e3, air_density=1.2, discharge=0.60)
    assert diameter * 1e3 == pytest.approx(hole, rel=5e-4)


def test_a_limit_at_shut_off_needs_no_opening() -> None:
    flow = flow_at_limit(shut_off=20e3, open_flow=0.06, limit=20e3)
    assert opening_diameter(flow=flow, suction=5e3, air_density=1.2, discharge=0.6) == 0.0


def test_inflow_without_losses_is_free_fall_of_the_air() -> None:
    # Torricelli: 60 Pa move air of 1.2 kg/m3 at 10 m/s.
    flow = inflow_through_opening(area=1e-3, suction=60.0, air_density=1.2, discharge=1.0)
    assert flow == pytest.approx(10.0 * 1e-3, rel=1e-12)


def test_force_of_a_relief_plate() -> None:
    # 5 kPa on a disc of 40 mm: 6.283 N, worked elsewhere.
    assert opening_force(diameter=0.040, suction=5e3) == pytest.approx(6.283, abs=0.0005)

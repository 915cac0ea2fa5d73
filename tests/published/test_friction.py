"""Friction and bends against an independent library, Colebrook's law and the duct tables."""

from __future__ import annotations

from math import pi

import numpy as np
import pytest
from fluids.fittings import bend_rounded
from fluids.friction import Churchill_1977, Colebrook, Swamee_Jain_1976

from gyrecut.airflow.air import AirState, air_state
from gyrecut.airflow.elements import ENTRY_LOSSES, Hose, PickUp
from gyrecut.airflow.friction import (
    CORRUGATED_FACTOR,
    SMOOTH_PLASTIC,
    bend_loss_hose,
    friction_factor_churchill,
    friction_loss,
)

REYNOLDS = [1.0, 100.0, 1500.0, 2300.0, 3000.0, 5e3, 2e4, 5e4, 1e5, 1e6, 1e7]
ROUGHNESSES = [0.0, 3e-4, 1.5e-3, 0.03]


@pytest.mark.parametrize("roughness", ROUGHNESSES)
def test_it_is_the_formula_that_fluids_holds(roughness: float) -> None:
    ours = friction_factor_churchill(np.array(REYNOLDS), relative_roughness=roughness)
    theirs = [Churchill_1977(Re=reynolds, eD=roughness) for reynolds in REYNOLDS]
    # fluids has 7/Re under 0.9, 0.27 e/D and 2.457 in the same places
    assert ours == pytest.approx(theirs, rel=1e-9)


@pytest.mark.parametrize("roughness", ROUGHNESSES)
@pytest.mark.parametrize("reynolds", [5e3, 2e4, 5e4, 1e5, 1e6, 1e7])
def test_it_is_near_the_implicit_law(reynolds: float, roughness: float) -> None:
    # Colebrook (1939) solved exactly, and Swamee and Jain (1976), both through fluids.
    ours = friction_factor_churchill(reynolds, relative_roughness=roughness)
    assert ours == pytest.approx(Colebrook(Re=reynolds, eD=roughness), rel=0.03)
    assert ours == pytest.approx(Swamee_Jain_1976(Re=reynolds, eD=roughness), rel=0.03)


@pytest.mark.parametrize("reynolds", [0.01, 1.0, 100.0, 1000.0])
def test_laminar_flow_is_the_exact_law(reynolds: float) -> None:
    # Hagen and Poiseuille: f = 64/Re.
    factor = friction_factor_churchill(reynolds, relative_roughness=0.0)
    assert factor == pytest.approx(64.0 / reynolds, rel=1e-3)


def test_a_smooth_hose_of_100_mm_at_20_metres_a_second() -> None:
    # Worked outside this program by Swamee and Jain: f 0.01754, 42.23 Pa/m, one head 240.8 Pa.
    air = AirState(
        temperature=293.15, pressure=101325.0, relative_humidity=0.0, density=1.204,
        viscosity=1.204 * 1.506e-5,
    )  # fmt: skip
    loss = friction_loss(20.0, bore=0.1, length=1.0, roughness=SMOOTH_PLASTIC, air=air)
    assert loss == pytest.approx(42.23, rel=0.03)  # as far as the two laws lie apart


# Duct tables of vacuum hoses give a friction factor of 0.03 to 0.08 (from memory, weak).
@pytest.mark.parametrize(("bore", "velocity"), [(0.032, 20.0), (0.038, 25.0), (0.1, 20.0)])
def test_a_corrugated_hose_has_the_friction_of_the_trade(bore: float, velocity: float) -> None:
    air = air_state(293.15, altitude=0.0, relative_humidity=0.5)
    hose = Hose(
        bore=bore, length=1.0, roughness=SMOOTH_PLASTIC, wall_factor=CORRUGATED_FACTOR, bends=0
    )
    drop = hose.pressure_drop(velocity * pi / 4 * bore**2, air=air)
    factor = float(drop) * bore / (air.density * velocity**2 / 2)
    assert 0.03 < factor < 0.08


# ASHRAE Fundamentals 2009 ch. 21, fitting CD3-5, pleated 90 degree elbow, R/D 1.5.
PLEATED = [(0.10, 0.57), (0.15, 0.43), (0.20, 0.34), (0.23, 0.28), (0.25, 0.28), (0.30, 0.26)]


@pytest.mark.parametrize(("bore", "printed"), PLEATED)
def test_a_bend_is_the_row_of_the_table(bore: float, printed: float) -> None:
    assert bend_loss_hose(bore) == pytest.approx(printed, rel=1e-12)


def test_below_the_table_the_loss_goes_on_rising() -> None:
    bores = np.array([0.027, 0.038, 0.05, 0.075, 0.1, 0.12, 0.15])
    losses = np.asarray(bend_loss_hose(bores))
    assert np.all(np.diff(losses) < 0)
    assert losses[0] < 2.0  # still what a sharp mitre costs, 1.2, within a factor of two


@pytest.mark.parametrize("bore", [0.038, 0.1, 0.15])
def test_a_bend_of_hose_costs_more_than_one_of_smooth_pipe(bore: float) -> None:
    # Rennels (2012) through fluids, smooth pipe around 1.5 bores: a lower bound.
    smooth = bend_rounded(Di=bore, angle=90.0, rc=1.5 * bore, fd=0.018, method="Rennels")
    assert float(bend_loss_hose(bore)) > smooth


# ACGIH, Industrial Ventilation, 24th ed. 2001, fig. 3-16, read in a public copy: entry loss in
# velocity heads of a plain opening, and of a grinding hood with straight and tapered take-off.
ACGIH = {"plain": 0.93, "straight": 0.65, "tapered": 0.40}


def test_pick_ups_have_the_entry_losses_of_the_handbook() -> None:
    assert ENTRY_LOSSES["open-hose"] == ENTRY_LOSSES["nozzle"] == ACGIH["plain"]
    assert ENTRY_LOSSES["hood"] == ACGIH["straight"] > ACGIH["tapered"]


def test_a_relief_hole_lets_in_what_a_sharp_edge_does() -> None:
    # Q = Cd A sqrt(2 dp/rho), Cd 0.60 to 0.62 for a sharp edge (from memory; 0.61 also in public
    # tables): 8.216 cm2 at 5 kPa and 1.2 kg/m3 take 45.0 L/s with 0.60.
    air = AirState(
        temperature=293.15, pressure=101325.0, relative_humidity=0.0, density=1.2, viscosity=1.81e-5
    )
    hole = PickUp(entry_loss=0.93, area=1e-3, relief_area=8.216e-4, choked=1.0)
    flow = 45.0e-3 * 0.61 / 0.60
    assert hole.pressure_drop(flow, air=air) == pytest.approx(5e3, rel=1e-3)

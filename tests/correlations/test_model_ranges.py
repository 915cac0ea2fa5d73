"""Each model refuses what it does not hold for, by name."""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

import numpy as np
import pytest
from tests.correlations.shapes import AIR_DENSITY, TEMPERATURE, VISCOSITY, cyclone

from gyrecut.correlations.barth import barth, friction_with_dust_barth
from gyrecut.correlations.dirgo_ramachandran import inlet_velocity_heads_dirgo_ramachandran
from gyrecut.correlations.first import inlet_velocity_heads_first
from gyrecut.correlations.grade import grade_efficiency_with_slope
from gyrecut.correlations.heads import pressure_drop_from_heads
from gyrecut.correlations.iozia_leith import iozia_leith, slope_iozia_leith
from gyrecut.correlations.leith_licht import grade_efficiency_leith_licht, leith_licht
from gyrecut.correlations.loading import penetration_factor, pressure_drop_factor_briggs
from gyrecut.correlations.muschelknautz import (
    acceleration_loss_muschelknautz,
    dust_friction_muschelknautz,
    muschelknautz,
)
from gyrecut.correlations.saturation import saturation_loading_muschelknautz
from gyrecut.correlations.similarity import (
    cut_size_from_stokes_number,
    pressure_drop_from_euler_number,
)
from gyrecut.correlations.slip import (
    aerodynamic_diameter,
    mean_free_path,
    physical_cut_size,
    slip_factor_allen_raabe,
)
from gyrecut.correlations.stairmand import (
    inlet_velocity_heads_from_spin_stairmand,
    inlet_velocity_heads_stairmand,
    spin_factor_stairmand,
)
from gyrecut.correlations.vortex import annulus_reynolds, core_height, wall_velocity
from gyrecut.errors import OutOfRangeError

if TYPE_CHECKING:
    from collections.abc import Callable

BODY = cyclone("stairmand-high-efficiency", 0.2)
WIDE_SLOT = replace(BODY, slot_width=0.11)
NO_CONE = replace(BODY, barrel_height=BODY.total_height)
SHORT_FINDER = replace(BODY, finder_length=0.01)
DEEP_FINDER = replace(BODY, finder_length=0.35)
DEEPEST_FINDER = replace(BODY, finder_length=0.795)
NAN = float("nan")

STATE = {"flow": 0.06, "particle_density": 1000.0, "viscosity": VISCOSITY}
AIR = {"air_density": AIR_DENSITY}
BARTH = STATE | AIR | {"friction": 0.005, "lip_loss": 4.4}
MUSCHELKNAUTZ = STATE | AIR | {"loading": 0.0, "friction_floor": 0.0, "dust_friction": 0.0}
LEITH_LICHT = STATE | {"temperature": TEMPERATURE}
DUST = {"flow": 0.06, "loading": 0.01, "share_kept": 0.9, "strand_density": 100.0} | AIR

REFUSED: list[tuple[Callable[[], object], str]] = [
    (lambda: barth(WIDE_SLOT, **BARTH), "slot width over body radius is 1.1 "),
    (lambda: barth(BODY, **BARTH | {"friction": 0.2}), "wall friction factor is 0.2 "),
    (
        lambda: barth(BODY, **BARTH | {"lip_loss": 3.0}),
        "loss coefficient of the finder's lip is 3 ",
    ),
    (lambda: barth(BODY, **BARTH | {"flow": 1.0}), "inlet velocity is 250 m/s"),
    (lambda: barth(BODY, **BARTH | {"flow": NAN}), "air flow is nan "),
    (lambda: barth(BODY, **BARTH | {"particle_density": 1.0}), "particle density is 1 "),
    (lambda: barth(DEEPEST_FINDER, **BARTH), "height of the core below the finder"),
    (lambda: friction_with_dust_barth(clean_friction=0.005, loading=11.0), "dust in the air, by "),
    (lambda: muschelknautz(WIDE_SLOT, **MUSCHELKNAUTZ), "slot width over body radius is 1.1 "),
    (lambda: muschelknautz(DEEPEST_FINDER, **MUSCHELKNAUTZ), "height of the core below the"),
    (lambda: muschelknautz(BODY, **MUSCHELKNAUTZ | {"air_density": 0.0}), "air density is 0 "),
    (
        lambda: muschelknautz(BODY, **MUSCHELKNAUTZ | {"loading": -0.1}),
        "dust in the air, by mass is -",
    ),
    (
        lambda: muschelknautz(BODY, **MUSCHELKNAUTZ | {"friction_floor": -1.0}),
        "wall friction factor",
    ),
    (lambda: muschelknautz(BODY, **MUSCHELKNAUTZ | {"dust_friction": NAN}), "wall friction factor"),
    (lambda: muschelknautz(BODY, **MUSCHELKNAUTZ | {"viscosity": 1.8}), "air viscosity is 1.8 "),
    (lambda: dust_friction_muschelknautz(BODY, **DUST | {"share_kept": 1.1}), "share of the dust "),
    (
        lambda: dust_friction_muschelknautz(BODY, **DUST | {"strand_density": 0.0}),
        "density of the ",
    ),
    (
        lambda: acceleration_loss_muschelknautz(
            inlet_velocity=15.0, duct_velocity=-1.0, loading=0.0, **AIR
        ),
        "velocity in the inlet duct is -1 ",
    ),
    (
        lambda: saturation_loading_muschelknautz(cut_size=2e-6, median=3e-5, loading=1e-4),
        "dust in the air, by mass is 0.0001 ",
    ),
    (lambda: leith_licht(NO_CONE, **LEITH_LICHT), "cone height over body diameter is 0 "),
    (lambda: leith_licht(SHORT_FINDER, **LEITH_LICHT), "finder length over slot height is 0.1 "),
    (lambda: leith_licht(DEEP_FINDER, **LEITH_LICHT), "finder length over barrel height is 1.1"),
    (lambda: leith_licht(BODY, **LEITH_LICHT | {"temperature": 20.0}), "air temperature is 20 K"),
    (
        lambda: grade_efficiency_leith_licht(1e-6, cut_size=1e-6, vortex_exponent=1.5),
        "vortex exponent is 1.5 ",
    ),
    (
        lambda: iozia_leith(replace(BODY, finder_diameter=0.18, slot_width=0.01), **STATE),
        "core diameter over body diameter is 1.0",
    ),
    (
        lambda: slope_iozia_leith(cyclone("swift-high-throughput", 0.2), cut_size=2e-6),
        "slot area over the square of the body diameter is 0.28 ",
    ),
    (lambda: grade_efficiency_with_slope(1e-6, cut_size=1e-6, slope=0.0), "slope of the grade "),
    (
        lambda: grade_efficiency_with_slope(-1e-6, cut_size=1e-6, slope=5.0),
        "particle diameter is -",
    ),
    (lambda: inlet_velocity_heads_first(NO_CONE), "cone height over body diameter is 0 "),
    (
        lambda: inlet_velocity_heads_dirgo_ramachandran(SHORT_FINDER),
        "finder length over body diameter is 0.05 ",
    ),
    (lambda: inlet_velocity_heads_stairmand(replace(BODY, slot_height=-0.1)), "slot height over "),
    (
        lambda: spin_factor_stairmand(friction_area_ratio=0.0, radius_ratio=1.8),
        "friction times wall area over slot area is 0 ",
    ),
    (
        lambda: inlet_velocity_heads_from_spin_stairmand(
            spin_factor=0.9, radius_ratio=0.1, area_ratio=0.5
        ),
        "radius of the inlet jet over finder radius is 0.1 ",
    ),
    (
        lambda: pressure_drop_from_heads(BODY, inlet_velocity_heads=-1.0, flow=0.06, **AIR),
        "inlet velocity heads is -1 ",
    ),
    (lambda: pressure_drop_factor_briggs(10.0), "dust in the air is 10 kg"),
    (
        lambda: penetration_factor(dust_content=0.0, reference_content=0.0023),
        "dust in the air is 0 kg",
    ),
    (lambda: mean_free_path(20.0, pressure=101325.0), "air temperature is 20 K"),
    (lambda: mean_free_path(293.15, pressure=1.0), "air pressure is 1 Pa"),
    (lambda: physical_cut_size(1e-9, mean_free_path=66e-9), "cut size without slip is 1e-09 m"),
    (lambda: slip_factor_allen_raabe(1e-6, mean_free_path=0.0), "mean free path is 0 m"),
    (
        lambda: aerodynamic_diameter(
            1e-6, particle_density=1000.0, shape_factor=0.5, mean_free_path=66e-9
        ),
        "dynamic shape factor is 0.5 ",
    ),
    (lambda: core_height(BODY, core_diameter=0.2), "core diameter over body diameter is 1 "),
    (
        lambda: wall_velocity(BODY, inlet_velocity=15.0, constriction=1.2),
        "constriction of the inlet jet is 1.2 ",
    ),
    (
        lambda: annulus_reynolds(BODY, flow=0.06, air_density=0.0, viscosity=VISCOSITY),
        "air density is 0 ",
    ),
    (
        lambda: cut_size_from_stokes_number(stokes_number=0.0, body_diameter=0.2, **STATE),
        "Stokes number at the cut size is 0 ",
    ),
    (
        lambda: pressure_drop_from_euler_number(
            euler_number=320.0, body_diameter=200.0, flow=0.06, **AIR
        ),
        "body diameter is 200 m",
    ),
]


@pytest.mark.parametrize(("call", "message"), REFUSED, ids=[message for _, message in REFUSED])
def test_what_a_model_does_not_hold_for_is_refused(
    call: Callable[[], object], message: str
) -> None:
    with pytest.raises(OutOfRangeError, match=f"^{message}"):
        call()


def test_one_impossible_design_of_a_sweep_is_named() -> None:
    bodies = replace(BODY, slot_width=np.array([0.04, 0.05, 0.115]))
    with pytest.raises(OutOfRangeError, match=r"slot width over body radius is 1\.15 "):
        muschelknautz(bodies, **MUSCHELKNAUTZ)

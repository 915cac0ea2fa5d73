"""Laws that the formulas for strength have to follow, and what they refuse."""

from __future__ import annotations

from math import inf, nan
from typing import TYPE_CHECKING, Any

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from gyrecut.errors import OutOfRangeError
from gyrecut.strength import buckling, joints, plates, relief, walls

if TYPE_CHECKING:
    from collections.abc import Callable

MODULI = st.floats(min_value=0.1e9, max_value=210e9)
POISSONS = st.floats(min_value=0.0, max_value=0.45)
DIAMETERS = st.floats(min_value=0.04, max_value=1.0)
SLIMS = st.floats(min_value=5e-4, max_value=0.04)  # wall over diameter
SLENDERS = st.floats(min_value=0.1, max_value=20.0)  # length over diameter
PRESSURES = st.floats(min_value=10.0, max_value=50e3)


@given(MODULI, POISSONS, DIAMETERS, SLIMS, SLENDERS)
def test_a_tube_holds_more_if_thicker_shorter_or_stiffer(
    modulus: float, poisson: float, diameter: float, slim: float, slender: float
) -> None:
    tube = {
        "modulus": modulus,
        "poisson": poisson,
        "wall": slim * diameter,
        "diameter": diameter,
        "length": slender * diameter,
    }
    for formula in (
        buckling.collapse_pressure_von_mises,
        buckling.collapse_pressure_lateral_von_mises,
    ):
        held = formula(**tube)
        assert formula(**tube | {"wall": 1.01 * tube["wall"]}) > held
        assert formula(**tube | {"length": 1.01 * tube["length"]}) < held
        assert formula(**tube | {"modulus": 2 * modulus}) == pytest.approx(2 * held, rel=1e-9)
    # pressure on the ends as well leaves less for the side
    assert buckling.collapse_pressure_von_mises(
        **tube
    ) < buckling.collapse_pressure_lateral_von_mises(**tube)


@given(
    modulus=MODULI,
    poisson=POISSONS,
    diameter=DIAMETERS,
    slim=SLIMS,
    slender=SLENDERS,
    scale=st.floats(min_value=0.6, max_value=5.0),
)
def test_only_proportions_decide_the_collapse(
    *, modulus: float, poisson: float, diameter: float, slim: float, slender: float, scale: float
) -> None:
    def held(factor: float) -> float:
        return float(
            buckling.collapse_pressure_von_mises(
                modulus=modulus,
                poisson=poisson,
                wall=slim * diameter * factor,
                diameter=diameter * factor,
                length=slender * diameter * factor,
            )
        )

    assert held(scale) == pytest.approx(held(1.0), rel=1e-9)


@given(MODULI, DIAMETERS, SLIMS, st.floats(min_value=0.1, max_value=0.99), SLENDERS)
def test_a_slimmer_cone_holds_more(
    modulus: float, diameter: float, slim: float, narrowing: float, slender: float
) -> None:
    def held(share: float) -> float:
        return float(
            buckling.collapse_pressure_cone(
                modulus=modulus,
                wall=slim * diameter / 2,
                wide_diameter=diameter,
                narrow_diameter=share * diameter,
                height=(0.5 + slender) * diameter,
            )
        )

    assert held(narrowing) > held(1.0)


@given(DIAMETERS, SLENDERS, st.floats(min_value=0.2, max_value=0.99))
def test_barrel_with_cone_is_between_barrel_alone_and_tube_of_full_length(
    diameter: float, slender: float, narrowing: float
) -> None:
    barrel, height = 0.5 * diameter, (0.3 + slender) * diameter
    length = buckling.equivalent_length(
        barrel_length=barrel,
        wide_diameter=diameter,
        narrow_diameter=narrowing * diameter,
        height=height,
    )
    assert barrel < length
    slant = np.hypot(height, diameter * (1 - narrowing) / 2)
    assert length <= barrel + slant * (slant / height) ** 1.5


@given(PRESSURES, MODULI, POISSONS, DIAMETERS, st.floats(min_value=1.1, max_value=3.0))
def test_plates_sink_with_the_load_and_against_the_cube_of_their_thickness(
    pressure: float, modulus: float, poisson: float, diameter: float, factor: float
) -> None:
    thickness = 0.02 * diameter
    round_plate = {"modulus": modulus, "poisson": poisson, "diameter": diameter}
    box_wall = {
        "modulus": modulus,
        "poisson": poisson,
        "long_side": 1.6 * diameter,
        "short_side": diameter,
    }
    cases: list[tuple[Callable[..., Any], dict[str, float]]] = [
        (plates.deflection_round_supported, round_plate),
        (plates.deflection_round_clamped, round_plate),
        (plates.deflection_holed_supported, round_plate | {"hole": 0.4 * diameter}),
        (walls.deflection_rectangle_supported, box_wall),
        (walls.deflection_rectangle_clamped, box_wall),
    ]
    for deflection, plate in cases:
        sunk = deflection(pressure=pressure, thickness=thickness, **plate)
        assert deflection(
            pressure=factor * pressure, thickness=thickness, **plate
        ) == pytest.approx(factor * sunk, rel=1e-9)
        assert deflection(
            pressure=pressure, thickness=factor * thickness, **plate
        ) == pytest.approx(sunk / factor**3, rel=1e-9)


@given(PRESSURES, POISSONS, DIAMETERS, st.floats(min_value=1.1, max_value=3.0))
def test_stress_in_plates_falls_with_the_square_of_their_thickness(
    pressure: float, poisson: float, diameter: float, factor: float
) -> None:
    sides = {"long_side": 1.6 * diameter, "short_side": diameter}
    cases: list[tuple[Callable[..., Any], dict[str, float]]] = [
        (plates.stress_round_supported, {"poisson": poisson, "diameter": diameter}),
        (plates.stress_round_clamped, {"diameter": diameter}),
        (
            plates.stress_holed_supported,
            {"poisson": poisson, "diameter": diameter, "hole": 0.4 * diameter},
        ),
        (walls.stress_rectangle_supported, {"poisson": poisson} | sides),
        (walls.stress_rectangle_clamped, sides),
    ]
    for stress, plate in cases:
        thin = stress(pressure=pressure, thickness=0.02 * diameter, **plate)
        thick = stress(pressure=pressure, thickness=0.02 * factor * diameter, **plate)
        assert thick == pytest.approx(thin / factor**2, rel=1e-9)


@given(st.floats(min_value=1e-6, max_value=1.0), st.floats(min_value=10.0, max_value=10e3))
def test_the_opening_lets_in_the_flow_it_was_made_for(flow: float, suction: float) -> None:
    diameter = relief.opening_diameter(flow=flow, suction=suction, air_density=1.2, discharge=0.6)
    area = np.pi / 4 * diameter**2
    if area >= 1e-9:
        assert relief.inflow_through_opening(
            area=area, suction=suction, air_density=1.2, discharge=0.6
        ) == pytest.approx(flow, rel=1e-9)


@given(st.floats(min_value=1e-3, max_value=0.05), st.floats(min_value=1.1, max_value=3.0))
def test_a_longer_lap_never_carries_less(lap: float, factor: float) -> None:
    def carried(length: float) -> float:  # per peak stress and width
        return length / float(
            joints.peak_shear_factor_volkersen(
                modulus=2e9, wall=2e-3, lap=length, glue_shear_modulus=1e9, glue_thickness=2e-4
            )
        )

    assert carried(factor * lap) >= carried(lap) * (1 - 1e-12)


def test_arrays_broadcast() -> None:
    pressures = np.asarray(
        buckling.collapse_pressure_von_mises(
            modulus=2e9,
            poisson=0.36,
            wall=np.array([[2e-3], [3e-3]]),
            diameter=0.2,
            length=np.array([0.1, 0.2, 0.3]),
        )
    )
    assert pressures.shape == (2, 3)
    assert pressures[1, 2] == buckling.collapse_pressure_von_mises(
        modulus=2e9, poisson=0.36, wall=3e-3, diameter=0.2, length=0.3
    )
    sunk = walls.deflection_rectangle_clamped(
        pressure=np.array([1e3, 2e3]),
        modulus=2e9,
        poisson=0.3,
        thickness=5e-3,
        long_side=0.3,
        short_side=0.2,
    )
    assert np.shape(sunk) == (2,)


TUBE = {"modulus": 2e9, "poisson": 0.36, "wall": 2e-3, "diameter": 0.2, "length": 0.3}
CONE = {"modulus": 2e9, "wall": 2e-3, "wide_diameter": 0.2, "narrow_diameter": 0.1, "height": 0.3}
LID = {"pressure": 1e3, "poisson": 0.3, "thickness": 5e-3, "diameter": 0.2}
BOX = {
    "pressure": 1e3,
    "poisson": 0.3,
    "modulus": 1e9,
    "thickness": 5e-3,
    "long_side": 0.3,
    "short_side": 0.2,
}


@pytest.mark.parametrize(
    ("formula", "good", "wrong", "message"),
    [
        (buckling.collapse_pressure_von_mises, TUBE, {"wall": 0.011}, "wall over diameter"),
        (buckling.collapse_pressure_von_mises, TUBE, {"length": nan}, "free length over diameter"),
        (buckling.collapse_pressure_von_mises, TUBE, {"modulus": inf}, "elastic modulus is inf"),
        (buckling.collapse_pressure_von_mises, TUBE, {"poisson": 0.5}, "poisson ratio is 0.5"),
        (
            buckling.collapse_pressure_lateral_von_mises,
            TUBE,
            {"length": 1e-3},
            "free length over diameter is 0.005",
        ),
        (
            buckling.collapse_pressure_windenburg_trilling,
            TUBE,
            {"length": 0.9},
            "allowed 0.3 to 4",
        ),
        (
            buckling.collapse_pressure_windenburg_trilling,
            TUBE,
            {"wall": 1e-4},
            "allowed 0.001 to 0.02",
        ),
        (
            buckling.collapse_pressure_windenburg_trilling,
            TUBE,
            {"wall": 4e-3, "length": 0.79},
            "Southwell's critical length",
        ),
        (buckling.collapse_pressure_cone, CONE, {"height": 0.02}, "half apex angle of the cone"),
        (plates.stress_round_supported, LID, {"thickness": 0.06}, "plate thickness over"),
        (plates.stress_holed_supported, LID | {"hole": 0.05}, {"hole": 0.199}, "hole over plate"),
        (walls.deflection_rectangle_supported, BOX, {"long_side": 2.1}, "longer over shorter side"),
        (walls.deflection_rectangle_supported, BOX, {"long_side": 0.1}, "longer over shorter side"),
        (walls.deflection_rectangle_clamped, BOX, {"long_side": 0.7}, "allowed 1 to 3"),
        (
            relief.flow_at_limit,
            {"shut_off": 2e3, "open_flow": 0.1, "limit": 1e3},
            {"limit": 2.1e3},
            "a source cannot draw stronger",
        ),
        (
            relief.opening_diameter,
            {"flow": 0.1, "suction": 1e3, "air_density": 1.2, "discharge": 0.6},
            {"suction": 11e3},
            "not compressible",
        ),
    ],
)
def test_what_a_formula_does_not_hold_for_is_refused(
    formula: Callable[..., Any], good: dict[str, float], wrong: dict[str, float], message: str
) -> None:
    formula(**good)
    with pytest.raises(OutOfRangeError, match=message):
        formula(**good | wrong)

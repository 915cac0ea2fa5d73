"""Material, time and cost of a print, against numbers worked by hand."""

from __future__ import annotations

from dataclasses import replace
from math import pi

import pytest

from gyrecut.catalogue import polymers
from gyrecut.checks import (
    FilamentSettings,
    PrintEstimate,
    ResinSettings,
    print_estimate,
    settings_of,
)
from gyrecut.checks.print_estimate import MELTS
from gyrecut.profile.models import Printer

SOLID = FilamentSettings(
    layer_height_mm=0.2, line_width_mm=0.45, perimeters=4, melts_mm3_s=11.0, flow_share=0.6
)


def barrel(settings: FilamentSettings | ResinSettings = SOLID, **other: float) -> PrintEstimate:
    """Barrel of 200 mm across the middle of its wall, 250 mm high, 2.4 mm thick."""
    return print_estimate(
        volume_mm3=pi * 200 * 250 * 2.4,
        area_mm2=2 * pi * 200 * (250 + 2.4),
        level_mm2=2 * pi * 200 * 2.4,
        height_mm=250,
        settings=settings,
        density=1240,
        **other,
    )


def test_a_barrel_worked_by_hand() -> None:
    # 377.0 cm3 at 1.24 g/cm3 is 467 g; at 11 mm3/s and 60 % of that, 57,120 s or 15.87 h.
    made = barrel()
    assert made.printed_mm3 == pytest.approx(377.0e3, abs=50)
    assert made.mass_g == pytest.approx(467, abs=0.5)
    assert made.duration_s / 3600 == pytest.approx(15.87, abs=0.005)
    assert made.layers == 1250
    # 335.3 m of 1.75 mm filament weigh 1 kg at this density.
    assert made.filament_m == pytest.approx(0.4675 * 335.3, rel=1e-3)
    assert made.cost is None
    assert barrel(price_per_kg=20.0).cost == pytest.approx(9.35, abs=0.01)


# Beads of 0.45 x 0.2 and 0.6 x 0.3 mm: walls of 1 to 6 beads, by s = w - h (1 - pi / 4).
@pytest.mark.parametrize(
    ("width", "layer", "walls"),
    [
        (0.45, 0.20, [0.450, 0.857, 1.264, 1.671, 2.078, 2.485]),
        (0.60, 0.30, [0.600, 1.136, 1.671, 2.207, 2.742, 3.278]),
    ],
)
def test_beads_side_by_side(width: float, layer: float, walls: list[float]) -> None:
    for beads, wall in enumerate(walls, start=1):
        made = replace(SOLID, line_width_mm=width, layer_height_mm=layer, perimeters=beads)
        assert made.shell_mm == pytest.approx(wall, abs=6e-4)
    # A bead has rectangle and two half rounds; as many as fill a wall have its section.
    many = replace(SOLID, line_width_mm=width, layer_height_mm=layer, perimeters=1000)
    assert many.shell_mm * layer / 1000 == pytest.approx(many.bead_mm2, rel=1e-3)


def test_a_wall_thicker_than_its_shells_is_filled_thinly() -> None:
    # A block of 60 mm: shells of 1.671 mm on four sides, five layers on top and below.
    made = print_estimate(
        volume_mm3=60**3,
        area_mm2=6 * 60**2,
        level_mm2=2 * 60**2,
        height_mm=60,
        settings=SOLID,
        density=1000,
    )
    shells = 4 * 3600 * 1.6712 + 2 * 3600 * 1.0
    assert made.printed_mm3 == pytest.approx(shells + 0.25 * (216000 - shells), rel=1e-4)
    full = replace(SOLID, infill=1.0)
    assert barrel(full).printed_mm3 == pytest.approx(barrel().printed_mm3)


def test_a_small_layer_waits_until_it_is_cool() -> None:
    # A pin of 4 mm: 12.6 mm2 x 0.2 mm a layer is 0.4 s of flow, but each layer takes 8 s.
    pin = print_estimate(
        volume_mm3=pi * 4 * 50,
        area_mm2=pi * 4 * 50 + 8 * pi,
        level_mm2=8 * pi,
        height_mm=50,
        settings=SOLID,
        density=1240,
    )
    assert pin.duration_s == pytest.approx(250 * 8)


def test_a_slow_nozzle_sets_the_time_before_the_hot_end_does() -> None:
    slow = replace(SOLID, speed_mm_s=50.0)
    assert barrel(slow).duration_s == pytest.approx(377.0e3 / (50 * slow.bead_mm2 * 0.6), rel=1e-3)


def test_resin_takes_the_same_time_for_each_layer() -> None:
    made = barrel(ResinSettings(layer_height_mm=0.05, exposure_s=3.0, lift_s=6.0))
    assert made.layers == 5000
    assert made.duration_s == pytest.approx(45_000)
    assert made.filament_m is None
    assert made.mass_g == pytest.approx(467, abs=0.5)


def test_a_last_digit_is_no_layer() -> None:
    made = print_estimate(
        volume_mm3=1.0,
        area_mm2=6.0,
        level_mm2=2.0,
        height_mm=0.1 + 0.2,
        settings=SOLID,
        density=1240,
    )
    assert made.layers == 2


@pytest.mark.parametrize("name", sorted(polymers()))
def test_each_polymer_has_settings(name: str) -> None:
    polymer = polymers()[name]
    printer = Printer.model_construct(
        process=polymer.process,
        layer_height=2e-4,
        line_width=4.5e-4 if polymer.process == "filament" else None,
    )
    settings = settings_of(printer, polymer)
    assert settings.layer_height_mm == pytest.approx(0.2)
    if isinstance(settings, FilamentSettings):
        assert polymer.process == "filament"
        assert settings.line_width_mm == pytest.approx(0.45)
        assert settings.melts_mm3_s == MELTS.get(name, 8.0)
    else:
        assert polymer.process == "resin"


@pytest.mark.parametrize(
    "wrong",
    [
        {"volume_mm3": 0.0},
        {"area_mm2": float("nan")},
        {"height_mm": -1.0},
        {"density": 0.0},
        {"level_mm2": 7.0},
    ],
)
def test_sizes_that_mean_nothing_are_refused(wrong: dict[str, float]) -> None:
    sizes = {
        "volume_mm3": 1.0,
        "area_mm2": 6.0,
        "level_mm2": 2.0,
        "height_mm": 1.0,
        "density": 1240.0,
    }
    with pytest.raises(ValueError, match="must"):
        print_estimate(settings=SOLID, **(sizes | wrong))

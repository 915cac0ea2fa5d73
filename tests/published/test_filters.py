"""Filters and their classes against the standards' tables and a printed table of dust cakes."""

from __future__ import annotations

import pytest

from gyrecut.airflow.filters import (
    CAKE_SPREAD,
    CAKE_UNIT,
    REFERENCE_VISCOSITY,
    filter_life,
    filter_load_at_limit,
    filter_loss,
)
from gyrecut.catalogue import dusts, filters
from gyrecut.profile.quantities import Quantity

INCH_OF_WATER = Quantity(dimension="pressure", low="", high="", example="").si("1 inH2O")
POUND = 0.45359237  # kg, exactly
FOOT = 0.3048  # m, exactly

# EN 60335-2-69 annex AA, as three dust class tables quote it: penetration in %, and the exposure
# limit in mg/m3 above which it may be used (H: any).
DUST_CLASSES = {"L": (1.0, 1.0), "M": (0.1, 0.1), "H": (0.005, None)}

# EN 1822, as three tables quote it: least overall efficiency in % at the most penetrating size.
EN_1822 = {"E10": 85.0, "E11": 95.0, "E12": 99.5, "H13": 99.95, "H14": 99.995}

# ASHRAE 52.2-2017 (from memory; 16 as in the older chart): least efficiency in % for 0.3-1, 1-3
# and 3-10 um.
MERV = {
    "MERV-8": (None, 20, 70),
    "MERV-11": (20, 65, 85),
    "MERV-13": (50, 85, 90),
    "MERV-14": (75, 90, 95),
    "MERV-15": (85, 90, 95),
    "MERV-16": (95, 95, 95),
}

# Dust cakes in inH2O/((lb/ft2)(ft/min)): Wang, Pereira and Hung, Air Pollution Control
# Engineering, Humana 2004, ch. 2, table 1, p. 62 (read): below 90, 44 or 20 um.
CAKES = {"wood": 25.20, "granite": 19.80, "gypsum": 18.90, "resin": 11.00}
CAKE_OF = {
    "hardwood-sanding": "wood",
    "softwood-sanding": "wood",
    "mdf-sanding": "wood",
    "planer-shavings": "wood",
    "saw-dust": "wood",
    "mineral-casting": "granite",
    "plaster": "gypsum",
    "carbon-laminate": "resin",
    "glass-laminate": "resin",
    "plastic-foam": "resin",
}


@pytest.mark.parametrize("name", DUST_CLASSES)
def test_dust_classes_are_those_of_the_standard(name: str) -> None:
    percent, limit = DUST_CLASSES[name]
    row = filters()[name]
    assert row.dust_class
    assert row.penetration == pytest.approx(percent / 100, rel=1e-12)
    assert row.lowest_limit == limit


@pytest.mark.parametrize("name", EN_1822)
def test_particulate_air_filters_are_those_of_the_standard(name: str) -> None:
    row = filters()[name]
    assert row.penetration == pytest.approx(1 - EN_1822[name] / 100, rel=1e-9)
    assert not row.dust_class
    assert row.lowest_limit is None


@pytest.mark.parametrize("name", MERV)
def test_reporting_values_are_those_of_the_standard(name: str) -> None:
    row = filters()[name]
    assert row.penetration is None
    for given, least in zip((row.fine, row.middle, row.coarse), MERV[name], strict=True):
        assert given == (None if least is None else pytest.approx(1 - least / 100, rel=1e-9))


def test_no_class_is_left_unchecked() -> None:
    assert set(filters()) == set(DUST_CLASSES) | set(EN_1822) | set(MERV)


def test_every_wood_dust_may_go_to_a_class_m() -> None:
    # EN 60335-2-69: class M is for all wood dust.
    least = filters()["M"].lowest_limit
    assert least is not None
    for name in ("hardwood-sanding", "softwood-sanding", "mdf-sanding", "saw-dust"):
        limit = dusts()[name].exposure_limit
        assert limit is not None
        assert limit > least


def test_the_unit_of_the_old_table_is_what_its_parts_are() -> None:
    unit = INCH_OF_WATER / (POUND / FOOT**2 * FOOT / 60)
    assert pytest.approx(unit, rel=1e-6) == CAKE_UNIT
    assert pytest.approx(10042.8, abs=0.05) == CAKE_UNIT  # worked outside this program


@pytest.mark.parametrize("name", sorted(dusts()))
def test_dust_cakes_are_those_of_the_table(name: str) -> None:
    # rounded to two digits in the catalogue
    assert dusts()[name].cake_resistance == pytest.approx(
        CAKES[CAKE_OF[name]] * CAKE_UNIT, rel=0.02
    )


def test_the_wood_cake_lies_in_the_band_of_measured_ones() -> None:
    # 2e4 to 2e5 1/s for wood sander dust (from memory, weak).
    low, high = (dusts()["hardwood-sanding"].cake_resistance * f for f in (1 / CAKE_SPREAD, 1))
    assert low < 2e5 < high * CAKE_SPREAD


def test_a_cloth_of_known_air_permeability() -> None:
    # 25 cfm/ft2 at 0.5 inH2O, the middle of felts and spunbond cloth: 0.127 m/s at 124.5 Pa.
    velocity = 25 * FOOT / 60
    drop = filter_loss(
        velocity,
        clean_resistance=filters()["L"].clean_resistance,
        cake_resistance=0.0,
        cake_load=0.0,
        viscosity=REFERENCE_VISCOSITY,
    )
    assert drop == pytest.approx(0.5 * INCH_OF_WATER, rel=0.03)


@pytest.mark.parametrize(("efficiency", "hours"), [(0.90, 2.845), (0.95, 5.690), (0.99, 28.45)])
def test_life_of_a_filter_behind_separators_of_three_grades(
    efficiency: float, hours: float
) -> None:
    # Worked outside this program: 1 kg/h, 50 L/s, 1 m2, 100 Pa clean to 1000 Pa, 63270 1/s.
    load = filter_load_at_limit(
        limit=1000.0, face_velocity=0.05, clean_resistance=2000.0, cake_resistance=63270.0
    )
    life = filter_life(cake_load=load, area=1.0, dust_rate=(1 - efficiency) / 3600)
    assert float(life) / 3600 == pytest.approx(hours, rel=5e-4)

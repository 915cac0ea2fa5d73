"""Units against their definitions, and against the unit library used the plain way."""

from __future__ import annotations

from fractions import Fraction
from math import pi

import pint
import pytest
from hypothesis import given
from hypothesis import strategies as st
from pydantic_core import PydanticCustomError

from gyrecut.profile.quantities import DEFINITIONS, SI, UNITS, Quantity

PLAIN: pint.UnitRegistry[float] = pint.UnitRegistry()
EXACT: pint.UnitRegistry[Fraction] = pint.UnitRegistry(non_int_type=Fraction)
ALL_UNITS = [(dimension, unit) for dimension, units in UNITS.items() for unit in units]

# One of each unit in SI. Inch, foot, pound and US gallon are exact by definition (NIST SP 811,
# appendix B.8, from memory: 0.0254 m, 0.3048 m, 0.453 592 37 kg, 231 in3); the conventional
# inch of water is 249.0889 Pa in the same table; degC and degF are defined from the kelvin.
DEFINED = {
    "mm": 1e-3, "cm": 1e-2, "m": 1.0, "um": 1e-6, "in": 0.0254, "ft": 0.3048,
    "mm2": 1e-6, "cm2": 1e-4, "m2": 1.0, "in2": 0.0254**2, "ft2": 0.3048**2,
    "m3/h": 1 / 3600, "m3/min": 1 / 60, "m3/s": 1.0, "L/min": 1 / 60000, "L/s": 1e-3,
    "cfm": 0.3048**3 / 60,
    "Pa": 1.0, "kPa": 1e3, "mbar": 100.0, "inH2O": 249.0889,
    "degC": 274.15, "degF": (1 - 32) / 1.8 + 273.15, "K": 1.0,
    "deg": pi / 180, "rad": 1.0,
    "kg/m3": 1.0, "g/cm3": 1000.0, "lb/ft3": 0.45359237 / 0.3048**3,
    "g/h": 1e-3 / 3600, "kg/h": 1 / 3600, "kg/s": 1.0,
    "m/s": 1.0, "ft/min": 0.3048 / 60, "fpm": 0.3048 / 60,
    "L": 1e-3, "m3": 1.0, "gal": 231 * 0.0254**3,
    "%": 0.01, "percent": 0.01,
}  # fmt: skip


def anything(dimension: str) -> Quantity:
    return Quantity(dimension=dimension, low="", high="", example="")


@pytest.mark.parametrize(("dimension", "unit"), ALL_UNITS)
def test_one_of_each_unit_is_what_it_is_defined_as(dimension: str, unit: str) -> None:
    # inH2O is printed with seven digits; the others are exact but for float rounding
    rel = 2e-7 if unit == "inH2O" else 1e-14
    assert anything(dimension).si(f"1 {unit}") == pytest.approx(DEFINED[unit], rel=rel)


@given(
    st.sampled_from(ALL_UNITS),
    st.decimals(min_value=-(10**6), max_value=10**6, places=4, allow_nan=False),
    st.sampled_from(["", " "]),
)
def test_value_is_what_the_unit_library_says(
    of: tuple[str, str], number: object, space: str
) -> None:
    dimension, unit = of
    library = PLAIN.Quantity(float(str(number)), UNITS[dimension][unit]).m_as(SI[dimension])
    # 1e-9 absolute: near absolute zero the library's float subtraction leaves rounding noise
    ours = anything(dimension).si(f"{number}{space}{unit}")
    assert ours == pytest.approx(float(library), rel=1e-12, abs=1e-9)


@pytest.mark.parametrize(("dimension", "unit"), ALL_UNITS)
def test_our_definitions_are_those_of_the_unit_library(dimension: str, unit: str) -> None:
    written, si = UNITS[dimension][unit], SI[dimension]
    number = Fraction(7, 3)
    ours: pint.UnitRegistry[Fraction] = pint.UnitRegistry(DEFINITIONS, non_int_type=Fraction)
    assert ours.Quantity(number, written).m_as(si) == EXACT.Quantity(number, written).m_as(si)


@given(st.integers(min_value=1, max_value=10**6))
def test_the_same_length_in_other_units_is_the_same_float(thousandths: int) -> None:
    length = anything("length")
    inch = f"{thousandths / 1000:.3f} in"
    millimetres = f"{thousandths * 254 // 10000}.{thousandths * 254 % 10000:04d} mm"
    assert length.si(inch) == length.si(millimetres)


@pytest.mark.parametrize(
    ("text", "kelvin"), [("20 degC", 293.15), ("68 degF", 293.15), ("-40 degF", 233.15)]
)
def test_temperatures_are_offset(text: str, kelvin: float) -> None:
    assert anything("temperature").si(text) == kelvin


@pytest.mark.parametrize(
    ("text", "metres"),
    [("38 mm", 0.038), ("38mm", 0.038), ("+38 mm", 0.038), ("3.8e1 mm", 0.038), ("-1 m", -1.0)],
)
def test_ways_to_write_a_number(text: str, metres: float) -> None:
    assert anything("length").si(text) == metres


@pytest.mark.parametrize(
    "text",
    [
        "1,5 mm", "1 500 mm", "1 1/2 in", "nan mm", "inf mm", "-inf mm", ".5 mm", "5. mm",
        "38  mm", " 38 mm", "38 mm ", "38", "mm", "", "1_000 mm", "0x10 mm", "\u0663 mm",
        "38 mm*2", "38 m m", "1e400 mm", "38 mm\n", "--3 mm", "2*19 mm", "38 MM", "38 parsec",
    ],
)  # fmt: skip
def test_what_is_unclear_is_refused(text: str) -> None:
    with pytest.raises(PydanticCustomError, match=r"^(is not|has)"):
        anything("length").si(text)


LENGTH = Quantity(dimension="length", low="40 mm", high="3 ft", example="160 mm")


@pytest.mark.parametrize("text", ["40 mm", "4 cm", "3 ft", "36 in", "914.4 mm"])
def test_the_ends_of_the_range_are_allowed_in_any_unit(text: str) -> None:
    assert LENGTH.read(text) == LENGTH.si(text)


@pytest.mark.parametrize("text", ["39.999999 mm", "914.400001 mm", "-40 mm", "0 mm"])
def test_beyond_the_range_is_refused_with_the_range(text: str) -> None:
    with pytest.raises(PydanticCustomError, match="is out of range; allowed: 40 mm to 3 ft"):
        LENGTH.read(text)


def test_every_unit_has_a_definition_here() -> None:
    assert set(DEFINED) == {unit for _, unit in ALL_UNITS}

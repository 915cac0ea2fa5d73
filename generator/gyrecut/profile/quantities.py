"""Quantities: "38 mm" becomes 0.038. The only module that knows units and conversion factors.

The text is split into number and unit here, and only the unit is handed to the unit library:
given a whole text it would read "1,5 mm" as 15 mm and "1 1/2 in" as half an inch, and to it
"cfm" is a femtometre's hundredth.
"""

from __future__ import annotations

import re
from dataclasses import dataclass
from fractions import Fraction
from functools import cache
from types import MappingProxyType
from typing import TYPE_CHECKING, Any

from gyrecut.profile.problems import Code
from gyrecut.profile.scalars import Scalar, closest, mistake, or_else

if TYPE_CHECKING:
    from collections.abc import Mapping

    import pint
    from pydantic_core import PydanticCustomError

NUMBER = r"[+-]?[0-9]{1,15}(\.[0-9]{1,15})?([eE][+-]?[0-9]{1,2})?"
_NUMBER_AND_UNIT = re.compile(rf"({NUMBER}) ?([^0-9\s.,+-][^\s]*)")
_BARE_NUMBER = re.compile(NUMBER)
_COMMA = re.compile(r"[0-9],[0-9]")
_FRACTION = re.compile(r"[0-9] *[/\u2044] *[0-9]|[\u00bc-\u00be]")

# Unit as written in a profile -> unit as the library spells it; the SI unit stands beside.
# "gal" is the US liquid gallon, "inH2O" the conventional inch of water, 249.08891 Pa.
UNITS: Mapping[str, Mapping[str, str]] = MappingProxyType(
    {
        "length": {"mm": "mm", "cm": "cm", "m": "m", "um": "um", "in": "inch", "ft": "foot"},
        "area": {
            "mm2": "mm**2",
            "cm2": "cm**2",
            "m2": "m**2",
            "in2": "inch**2",
            "ft2": "foot**2",
        },
        "flow": {
            "m3/h": "m**3/hour",
            "m3/min": "m**3/min",
            "m3/s": "m**3/s",
            "L/min": "liter/min",
            "L/s": "liter/s",
            "cfm": "foot**3/min",
        },
        "pressure": {"Pa": "Pa", "kPa": "kPa", "mbar": "mbar", "inH2O": "inH2O"},
        "temperature": {"degC": "degC", "degF": "degF", "K": "K"},
        "angle": {"deg": "degree", "rad": "radian"},
        "density": {"kg/m3": "kg/m**3", "g/cm3": "g/cm**3", "lb/ft3": "pound/foot**3"},
        "mass flow": {"g/h": "g/hour", "kg/h": "kg/hour", "kg/s": "kg/s"},
        "speed": {"m/s": "m/s", "ft/min": "foot/min", "fpm": "foot/min"},
        "volume": {"L": "liter", "m3": "m**3", "gal": "gallon"},
        "share": {"%": "percent", "percent": "percent"},
    }
)
SI: Mapping[str, str] = MappingProxyType(
    {
        "length": "m",
        "area": "m**2",
        "flow": "m**3/s",
        "pressure": "Pa",
        "temperature": "K",
        "angle": "radian",
        "density": "kg/m**3",
        "mass flow": "kg/s",
        "speed": "m/s",
        "volume": "m**3",
        "share": "",
    }
)

# The library's own definitions of no more than these units: to read all of its thousand would take
# most of the time that `size` takes. The tests hold each against the library as it comes.
DEFINITIONS = (
    "centi- = 1e-2 = c-",
    "micro- = 1e-6 = u-",
    "milli- = 1e-3 = m-",
    "kilo- = 1e3 = k-",
    "meter = [length] = m",
    "gram = [mass] = g",
    "second = [time] = s",
    "minute = 60 * second = min",
    "hour = 60 * minute",
    "inch = 0.0254 * meter",
    "foot = 12 * inch",
    "pound = 453.59237 * gram",
    "liter = 1e-3 * meter ** 3",
    "gallon = 231 * inch ** 3",
    "pascal = kilogram / meter / second ** 2 = Pa",
    "mbar = 100 * pascal",
    "inH2O = 249.08891 * pascal",
    "radian = []",
    "degree = 3.1415926535897932384626433832795028841971693993751 / 180 * radian",
    "percent = 0.01",
    "kelvin = [temperature]; offset: 0 = K",
    "degree_Celsius = kelvin; offset: 273.15 = degC",
    "degree_Fahrenheit = 5 / 9 * kelvin; offset: 233.15 + 200 / 9 = degF",
)


@cache
def _registry() -> pint.UnitRegistry[Fraction]:
    import pint  # noqa: PLC0415 - no command pays for it before it reads a profile

    # Fractions make "1.5 in" and "38.1 mm" the same float, and so the same profile hash.
    return pint.UnitRegistry(DEFINITIONS, non_int_type=Fraction)


@cache
def _exact_si(dimension: str, number: str, unit: str) -> Fraction:
    registry = _registry()
    quantity = registry.Quantity(Fraction(number), UNITS[dimension][unit])
    return Fraction(quantity.to(SI[dimension]).magnitude)


@dataclass(frozen=True, slots=True, kw_only=True)
class Quantity(Scalar):
    """A number and a unit, read into an SI float.

    Parameters
    ----------
    dimension : str
        A key of `UNITS`.
    low, high : str
        Smallest and largest value allowed, as they would be written in a profile.
    """

    dimension: str
    low: str
    high: str

    @property
    def allowed(self) -> str:
        """The range."""
        return f"{self.low} to {self.high}"

    @property
    def units(self) -> str:
        """The units that may be written."""
        return ", ".join(UNITS[self.dimension])

    def si(self, text: str) -> float:
        """Give the SI value of a good text, unchecked against the range.

        Raises
        ------
        PydanticCustomError
            `text` is not a number and a unit of this dimension.
        """
        return float(self._exact(text))

    def read(self, given: object) -> float:
        """Give the SI value of what stands in the profile.

        Raises
        ------
        PydanticCustomError
            `given` is not a number and a unit of this dimension, or out of range.
        """
        value = self._exact(given)
        if not self._exact(self.low) <= value <= self._exact(self.high):
            fix = "give a value in that range, and check the unit"
            raise mistake(Code.OUT_OF_RANGE, "is out of range", allowed=self.allowed, fix=fix)
        return float(value)

    def schema(self) -> dict[str, Any]:
        """Give the pattern; the range cannot be said in it, and stands in words."""
        units = "|".join(map(re.escape, UNITS[self.dimension]))
        return {
            "type": "string",
            "pattern": f"^{NUMBER} ?({units})$",
            "patternErrorMessage": f"write a number and a unit ({self.units}): {self.allowed}",
            "examples": [self.example],
        }

    def _exact(self, given: object) -> Fraction:
        if isinstance(given, int | float) and not isinstance(given, bool):
            raise self._without_unit() if abs(given) < float("inf") else self._not_a_quantity()
        if not isinstance(given, str) or not (match := _NUMBER_AND_UNIT.fullmatch(given)):
            raise self._not_a_quantity(given)
        number, unit = match[1], match[match.re.groups]
        if unit not in UNITS[self.dimension]:
            raise self._wrong_unit(unit)
        return _exact_si(self.dimension, number, unit)

    def _without_unit(self) -> PydanticCustomError:
        fix = f'add one of the units {self.units}, as in "{self.example}"'
        return mistake(Code.NO_UNIT, "has no unit", allowed=self.allowed, fix=fix)

    def _not_a_quantity(self, given: object = "") -> PydanticCustomError:
        text = str(given)
        what, fix = (
            "is not a number and a unit",
            f'write a number, one space and a unit, as in "{self.example}"',
        )
        if _BARE_NUMBER.fullmatch(text):
            return self._without_unit()
        if _COMMA.search(text):
            what, fix = "has a comma in its number", "write a decimal point, and no thousands mark"
        elif _FRACTION.search(text):
            what, fix = (
                "has a fraction in its number",
                'write it with a decimal point, as in "1.5 in"',
            )
        return mistake(Code.NOT_A_QUANTITY, what, allowed=self.allowed, fix=fix)

    def _wrong_unit(self, unit: str) -> PydanticCustomError:
        of = [dimension for dimension, units in UNITS.items() if unit in units]
        if of:
            article = "an" if self.dimension[0] in "aeiou" else "a"
            what = f"has a unit of {of[0]} where {article} {self.dimension} belongs"
            fix = f"use one of the units {self.units}"
        else:
            what = f'has the unknown unit "{unit[:20]}"'
            near = closest(unit, UNITS[self.dimension])
            fix = or_else(near, f"use one of the units {self.units}")
        allowed = f"{self.allowed}, in {self.units}"
        return mistake(Code.WRONG_UNIT, what, allowed=allowed, fix=fix)

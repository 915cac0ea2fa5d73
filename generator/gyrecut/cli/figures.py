"""Numbers for people: SI values in the units a profile is written in, to three digits."""

from __future__ import annotations

from math import floor, log10

CELSIUS_ZERO = 273.15  # K, exact by definition


def figure(value: float | None, digits: int = 3) -> str:
    """Write a number to so many significant digits and never with an exponent; "" for none."""
    if value is None:
        return ""
    if value == 0:
        return "0"
    return f"{value:.{max(0, digits - 1 - floor(log10(abs(value))))}f}"


def entry(value: float | None) -> str:
    """Write a table's entry: at most four digits, no zeros at the end; "" for none."""
    text = figure(value, 4)
    return text.rstrip("0").rstrip(".") if "." in text else text


def tenths(value: float) -> str:
    """Write a number with one decimal, as drawings do with millimetres."""
    return f"{value:.1f}"


def millimetres(metres: float) -> str:
    """Write a length, without its unit."""
    return entry(metres * 1e3)


def micrometres(metres: float) -> str:
    """Write a grain size, without its unit."""
    return figure(metres * 1e6)


def cubic_metres_an_hour(cubic_metres_a_second: float) -> str:
    """Write a flow, without its unit."""
    return figure(cubic_metres_a_second * 3600)


def megapascals(pascals: float) -> str:
    """Write a strength, without its unit."""
    return entry(pascals * 1e-6)


def degrees_celsius(kelvin: float) -> str:
    """Write a temperature, without its unit."""
    return figure(kelvin - CELSIUS_ZERO, 2)


def percent(share: float) -> str:
    """Write a share, without its sign; what would round up to all of it says so."""
    almost_all = 0.9995
    return "over 99.9" if almost_all <= share < 1 else figure(share * 100)

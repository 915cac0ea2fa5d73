"""Every physics docstring names its arguments, their units, and where the formula is from."""

from __future__ import annotations

import importlib
import inspect
import pkgutil
import re
from dataclasses import is_dataclass

import pint
import pytest

import gyrecut.airflow
import gyrecut.correlations

UNITS: pint.UnitRegistry[float] = pint.UnitRegistry()
# Holds the range helper, whose unit is one of its own fields.
NO_PHYSICS = {"gyrecut.airflow.ranges"}
SECTION = re.compile(r"^(\w+)\n-{3,}\n", re.MULTILINE)
ENTRY = re.compile(r"^(\w+(?:, \w+)*) : (.+)\n((?:    .+\n?)+)", re.MULTILINE)


def physics() -> list[object]:
    found: list[object] = []
    for package in (gyrecut.airflow, gyrecut.correlations):
        for module in pkgutil.iter_modules(package.__path__, f"{package.__name__}."):
            if module.name in NO_PHYSICS:
                continue
            loaded = importlib.import_module(module.name)
            found += [
                thing
                for name, thing in vars(loaded).items()
                if not name.startswith("_")
                and getattr(thing, "__module__", "") == module.name
                and (inspect.isfunction(thing) or is_dataclass(thing))
                and callable(thing)
            ]
    return found


def sections(thing: object) -> dict[str, str]:
    parts = SECTION.split(inspect.getdoc(thing) or "")
    return dict(zip(parts[1::2], parts[2::2], strict=True))


def assert_units(text: str) -> None:
    units = re.findall(r"\[([^\[\]]+)\](?!_)", text)
    assert units, f"no [unit] in {text!r}"
    for unit in units:
        if unit != "-":
            assert not UNITS.parse_units(unit).dimensionless or unit == "rad", unit


def test_the_correlations_are_found() -> None:
    names = {getattr(thing, "__name__", "") for thing in physics()}
    assert {"cut_size_lapple", "dynamic_viscosity", "CycloneGeometry", "AirState"} <= names


@pytest.mark.parametrize("thing", physics(), ids=lambda thing: thing.__name__)
def test_parameters_equal_the_signature_and_have_units(thing: object) -> None:
    assert callable(thing)
    entries = ENTRY.findall(sections(thing).get("Parameters", ""))
    documented = [name for names, _, _ in entries for name in names.split(", ")]
    assert documented == list(inspect.signature(thing).parameters)
    for _, kind, text in entries:
        assert kind
        assert_units(text)


@pytest.mark.parametrize(
    "thing", [thing for thing in physics() if inspect.isfunction(thing)], ids=lambda f: f.__name__
)
def test_functions_say_what_they_return_refuse_and_rest_on(thing: object) -> None:
    assert callable(thing)
    found = sections(thing)
    if inspect.signature(thing).return_annotation in {"Numbers", "float", "CycloneGeometry"}:
        assert_units(found["Returns"])
    assert "OutOfRangeError" in found["Raises"]
    assert ".. [1] " in found["References"]

"""Every formula names its arguments, their units, what it refuses and where it is from."""

from __future__ import annotations

import importlib
import inspect
from typing import TYPE_CHECKING

import pytest
from tests.correlations.test_docstrings import ENTRY, assert_units, sections

if TYPE_CHECKING:
    from collections.abc import Callable

FORMULAS = ("buckling", "plates", "walls", "joints", "relief")


def formulas() -> list[Callable[..., object]]:
    found: list[Callable[..., object]] = []
    for name in FORMULAS:
        module = importlib.import_module(f"gyrecut.strength.{name}")
        found += [
            thing
            for public, thing in vars(module).items()
            if not public.startswith("_")
            and inspect.isfunction(thing)
            and thing.__module__ == module.__name__
        ]
    return found


def test_the_formulas_are_found() -> None:
    names = {formula.__name__ for formula in formulas()}
    assert {"collapse_pressure_von_mises", "stress_rectangle_clamped", "lap_shear"} <= names


@pytest.mark.parametrize("formula", formulas(), ids=lambda formula: formula.__name__)
def test_a_docstring_is_complete(formula: Callable[..., object]) -> None:
    found = sections(formula)
    entries = ENTRY.findall(found["Parameters"])
    documented = [name for names, _, _ in entries for name in names.split(", ")]
    assert documented == list(inspect.signature(formula).parameters)
    for _, kind, text in entries:
        assert kind
        assert_units(text)
    assert_units(found["Returns"])
    assert "OutOfRangeError" in found["Raises"]
    assert ".. [1] " in found["References"]

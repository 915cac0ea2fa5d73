"""One explained number: the formula, what is put in, what comes out, and who says so.

Formulas are written so that a person can read them and a program can work them out: `^` is a power,
every name is a term beside it or one of sqrt, exp, ln, min, max, sum and pi.
"""

from __future__ import annotations

import inspect
import re
from dataclasses import dataclass
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Callable

    from gyrecut.airflow.ranges import Numbers

_NAME = re.compile(r"[A-Za-z_]\w*")
_REFERENCES = re.compile(r"^References\n-+\n(.*?)(?=\n\n\w|\Z)", re.MULTILINE | re.DOTALL)
_FOOTNOTE = re.compile(r"\.\. \[\d+\] ")
_CODE = re.compile(r"(?::\w+:)?`([^`]*)`")


@dataclass(frozen=True, slots=True, kw_only=True)
class Term:
    """One symbol of a formula.

    Parameters
    ----------
    symbol, what : str
        As the formula writes it, and in words.
    value : float or tuple of float
        In SI; several for a sum over size classes.
    unit : str
        Its SI unit, "" for a plain number.
    """

    symbol: str
    what: str
    value: float | tuple[float, ...]
    unit: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Explanation:
    """How one number is got.

    Parameters
    ----------
    what : str
        The number, in words.
    formula : str
        The right side of the equation.
    terms : tuple of Term
        What is put in.
    result : Term
        What comes out: the number as the forecast has it, not worked out anew.
    source : str
        Who says so.
    """

    what: str
    formula: str
    terms: tuple[Term, ...]
    result: Term
    source: str

    @property
    def numbers_put_in(self) -> str:
        """The formula with numbers for names; a row of numbers keeps its name."""
        numbers = {
            term.symbol: written(term.value) for term in self.terms if isinstance(term.value, float)
        }
        return _NAME.sub(lambda name: numbers.get(name[0], name[0]), self.formula)


def term(symbol: str, what: str, value: Numbers, unit: str = "") -> Term:
    """Give a term of one number, whichever kind of number it came as."""
    return Term(symbol=symbol, what=what, value=float(value), unit=unit)


def written(value: float | tuple[float, ...]) -> str:
    """Write a number to five digits, so that working it out again gives what is shown."""
    if isinstance(value, tuple):
        return f"{len(value)} values from {written(min(value))} to {written(max(value))}"
    return f"{value:.5g}"


def source_of(*functions: Callable[..., object]) -> str:
    """Give what the docstrings of correlations name as their sources, each once.

    Raises
    ------
    ValueError
        A docstring names none.
    """
    said = dict.fromkeys(map(_references, functions))
    return " ".join(text if text.endswith(".") else f"{text}." for text in said)


def _references(function: Callable[..., object]) -> str:
    found = _REFERENCES.search(inspect.getdoc(function) or "")
    if found is None:
        raise ValueError(f"the docstring of {function.__qualname__} names no source")
    text = _FOOTNOTE.sub("", " ".join(found[1].split()))
    return _CODE.sub(lambda name: name[1].rpartition(".")[2].replace("_", " "), text)

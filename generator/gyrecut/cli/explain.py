"""`size --explain`: every number that carries the result, with formula, numbers and source."""

from __future__ import annotations

from typing import TYPE_CHECKING, Any

from gyrecut.cli.explain_air import air_explanations
from gyrecut.cli.explain_catch import catch_explanations, grade_explanations
from gyrecut.cli.explain_cut_size import cut_size_explanations
from gyrecut.cli.explain_pressure import pressure_explanations, safe_suction_explanation
from gyrecut.cli.explain_terms import written
from gyrecut.kit.manifest import plain

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping
    from typing import TextIO

    from rich.console import Console

    from gyrecut.cli.explain_terms import Explanation
    from gyrecut.pipeline import Design

NUMBERS_IN_A_LINE = 120  # characters; a sum over size classes says its numbers below only


def explanations(design: Design) -> tuple[Explanation, ...]:
    """Explain a design, in the order the numbers follow from each other."""
    lines: list[Explanation] = [*air_explanations(design)]
    for stage in design.stages:
        lines += cut_size_explanations(design, stage)
        lines += grade_explanations(design, stage)
        lines += pressure_explanations(design, stage)
    return (*lines, safe_suction_explanation(design), *catch_explanations(design))


def explained(document: Mapping[str, Any], lines: tuple[Explanation, ...]) -> dict[str, Any]:
    """Add the explanations to a design's data; all of them are in SI."""
    return {**document, "explanations": plain(lines)}


def with_explanations(
    show: Callable[[TextIO], None], lines: tuple[Explanation, ...], stream: TextIO
) -> None:
    """Write a design as ever, and the explanations below it."""
    from gyrecut.cli.consoles import console  # noqa: PLC0415 - `--json` does without

    show(stream)
    out = console(stream)
    out.print("\nHow each number is got; all of it in SI, so that it can be worked out again")
    for line in lines:
        _print_one(out, line)


def _print_one(out: Console, line: Explanation) -> None:
    out.print(f"\n{line.what}", style="bold")
    out.print(f"  {line.result.symbol} = {line.formula}", soft_wrap=True)
    margin = " " * len(line.result.symbol)
    if len(line.numbers_put_in) <= NUMBERS_IN_A_LINE:
        out.print(f"  {margin} = {line.numbers_put_in}", soft_wrap=True)
    result = f"{written(line.result.value)} {line.result.unit}".rstrip()
    out.print(f"  {margin} = {result}", soft_wrap=True)
    widest = max(len(term.symbol) for term in line.terms)
    for term in line.terms:
        amount = f"{written(term.value)} {term.unit}".strip()
        out.print(f"    {term.symbol:{widest}}  {amount}  {term.what}", soft_wrap=True)
    out.print(f"  Source: {line.source}", soft_wrap=True)

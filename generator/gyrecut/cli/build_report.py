"""What `build` shows: where the kit is, what to print, what was found, what to beware of."""

from __future__ import annotations

from dataclasses import asdict
from typing import TYPE_CHECKING, Any

from gyrecut.cli.cautions import cautions_for, print_cautions
from gyrecut.cli.figures import figure, tenths
from gyrecut.cli.findings import as_rows, print_findings
from gyrecut.cli.tables import print_table

if TYPE_CHECKING:
    from collections.abc import Iterable, Mapping
    from typing import TextIO

    from gyrecut.pipeline import BuildResult, Design


def kit_document(design: Design, result: BuildResult) -> dict[str, Any]:
    """Give a finished kit as a JSON document holds it."""
    return {
        "folder": str(result.folder),
        "manifest": result.manifest,
        "findings": as_rows(result.findings),
        "cautions": [asdict(caution) for caution in cautions_for(design)],
    }


def show_kit(design: Design, result: BuildResult, stream: TextIO) -> None:
    """Write a finished kit for a person."""
    from gyrecut.cli.consoles import console  # noqa: PLC0415 - `--json` does without

    out = console(stream)
    pieces: list[Mapping[str, Any]] = result.manifest["pieces"]
    prints = sum(piece["copies"] for piece in pieces)
    out.print(f"The kit of {design.profile.name} is in {result.folder}", soft_wrap=True)
    out.print("Read summary.md there first; kit.3mf holds every piece, pieces/ each one alone.\n")
    print_table(
        out,
        ("piece", "what it is", "#copies", "#size mm", "#g full", "#about h"),
        map(_cells, pieces),
        title=f"Pieces: {prints} prints, {_kilograms(pieces)} kg of {design.profile.material}",
    )
    out.print()
    print_findings(out, result.findings, title="Findings")
    out.print()
    print_cautions(out, cautions_for(design))


def _cells(piece: Mapping[str, Any]) -> tuple[str, ...]:
    size = " x ".join(map(tenths, piece["size_mm"]))
    grams, printing = figure(piece["mass_g"]), piece["printing"]
    hours = "" if printing is None else figure(printing["duration_s"] / 3600, 2)
    return piece["name"], piece["title"], str(piece["copies"]), size, grams, hours


def _kilograms(pieces: Iterable[Mapping[str, Any]]) -> str:
    return figure(sum(piece["copies"] * piece["mass_g"] for piece in pieces) / 1000)

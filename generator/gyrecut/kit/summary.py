"""summary.md: the kit for the person at the bench, the verdict in its first line."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.findings import Severity
from gyrecut.kit.cautions import cautions
from gyrecut.kit.manifest import COUPON_SHEET, piece_files
from gyrecut.kit.tables import markdown_table

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator, Sequence

    from gyrecut.findings import Finding
    from gyrecut.kit.contents import Fact, KitContents, KitPiece

GRAMS_PER_KILOGRAM = 1000
SECONDS_PER_MINUTE = 60
SECONDS_PER_HOUR = 3600
PLAIN_FROM = 1e4  # from here four digits would need an exponent


def summary_text(contents: KitContents) -> str:
    """Write the summary as Markdown.

    Parameters
    ----------
    contents : KitContents
        The kit.

    Returns
    -------
    str
        The whole page, ending in a line end.
    """
    sections = (
        verdict(contents),
        _facts("The body", contents.body),
        _estimate(contents.estimate),
        _coupons(contents),
        _pieces(contents),
        _hardware(contents),
        _steps(contents.steps),
        _findings(contents.findings),
        _cautions(contents),
        _origin(contents),
    )
    return "\n\n".join(section for section in sections if section) + "\n"


def verdict(contents: KitContents) -> str:
    """Say whether it can be built, and what stops it.

    Parameters
    ----------
    contents : KitContents
        The kit.

    Returns
    -------
    str
        A heading, and under it one line for each finding that stops.
    """
    stops = [found for found in contents.findings if found.severity is Severity.STOP]
    warnings = sum(found.severity is Severity.WARN for found in contents.findings)
    if stops:
        heading = f"# {contents.profile_name}: do not build this yet"
        return "\n".join([heading, "", "What stops it:", "", *map(_finding_line, stops)])
    heading = f"# {contents.profile_name}: can be built"
    if not warnings:
        return f"{heading}\n\nNo check found anything against it. Read the cautions below first."
    count = "one warning" if warnings == 1 else f"{warnings} warnings"
    return f"{heading}, with {count}\n\nRead the findings and the cautions below first."


def _facts(title: str, facts: Iterable[Fact]) -> str:
    rows = [(fact.label, _amount(fact.value, fact.unit), fact.note) for fact in facts]
    return f"## {title}\n\n{markdown_table(('what', 'value', 'note'), rows)}"


def _estimate(facts: Sequence[Fact]) -> str:
    table = _facts("What to expect", facts)
    return (
        f"{table}\n\n"
        "An estimate: published models side by side, the central one where measured cyclones lie, "
        "and a band no narrower than those measurements. `gyrecut size` shows every model. Weigh "
        "and measure after building."
    )


def _coupons(contents: KitContents) -> str:
    if contents.coupons is None:
        return ""
    minutes = contents.coupons.duration_s / SECONDS_PER_MINUTE
    return (
        f"## Print first: the coupons\n\n`coupons.3mf` takes about {minutes:.0f} minutes and shows "
        f"how hoses, joints and inserts fit; `{COUPON_SHEET}` says which line of the profile to "
        "change."
    )


def _pieces(contents: KitContents) -> str:
    rows = [
        (
            piece.title,
            f"`{piece_files(piece.name)['stl']}`",
            str(piece.copies),
            " x ".join(f"{extent:.1f}" for extent in piece.size_mm),
            f"{piece.mass_g:.0f}",
            *_printing(piece),
        )
        for piece in contents.pieces
    ]
    count = sum(piece.copies for piece in contents.pieces)
    kilograms = sum(p.copies * p.mass_g for p in contents.pieces) / GRAMS_PER_KILOGRAM
    total = "one print" if count == 1 else f"{count} prints"
    header = ("piece", "file", "copies", "size mm", "g full", "about g", "about h")
    return (
        f"## Pieces to print\n\n{markdown_table(header, rows)}\n\n"
        f"In all {total}, {kilograms:.2f} kg of {contents.polymer.name} when printed full, "
        f"without brims and waste{_usual(contents)}. Every file is in millimetres and already in "
        "its print pose; `kit.3mf` holds all of them, `assembly.step` shows them in the machine. "
        f"{_marks(contents)}"
    )


def _printing(piece: KitPiece) -> tuple[str, str]:
    if piece.printing is None:
        return "", ""
    hours = piece.printing.duration_s / SECONDS_PER_HOUR
    return f"{piece.printing.mass_g:.0f}", f"{hours:.1f}"


def _usual(contents: KitContents) -> str:
    """Say what printing takes with shells and infill, where every piece has been estimated."""
    known = [(piece.copies, piece.printing) for piece in contents.pieces if piece.printing]
    if len(known) < len(contents.pieces):
        return ""
    kilograms = sum(copies * one.mass_g for copies, one in known) / GRAMS_PER_KILOGRAM
    hours = sum(copies * one.duration_s for copies, one in known) / SECONDS_PER_HOUR
    return f"; with shells and infill about {kilograms:.2f} kg and {hours:.0f} h"


def _marks(contents: KitContents) -> str:
    bare = [piece.title for piece in contents.pieces if not piece.mark]
    if len(bare) == len(contents.pieces):
        return "No piece carries its name; label them as they come off the bed."
    text = (
        "Each carries its name; an arrow points up in the machine, and lines stand on both sides "
        "of a joint and meet when it is together."
    )
    if bare:
        text += f" No room for a name was on: {', '.join(bare)}; label by hand."
    return text


def _hardware(contents: KitContents) -> str:
    if not contents.hardware:
        return ""
    rows = [(item.what, item.quantity, item.where) for item in contents.hardware]
    return f"## What to buy\n\n{markdown_table(('what', 'how much', 'for'), rows)}"


def _steps(steps: Sequence[str]) -> str:
    if not steps:
        return ""
    lines = (f"{number}. {step}" for number, step in enumerate(steps, start=1))
    return "\n".join(["## How it goes together", "", *lines])


def _findings(findings: Sequence[Finding]) -> str:
    if not findings:
        return ""
    in_order = [found for level in Severity for found in findings if found.severity is level]
    return "\n".join(["## What the checks found", "", *map(_finding_line, in_order)])


def _cautions(contents: KitContents) -> str:
    shown = cautions(
        polymer=contents.polymer.name,
        softening_temperature=contents.polymer.softening_temperature,
        dust_is_combustible=contents.dust_is_combustible,
    )
    lines = (f"- **{caution.title}.** {caution.text}" for caution in shown)
    return "\n".join(["## Cautions", "", *lines])


def _origin(contents: KitContents) -> str:
    return (
        f"Made by gyrecut {contents.version} from the profile `{contents.profile_name}` "
        f"({contents.profile_hash})."
    )


def _finding_line(found: Finding) -> str:
    return " ".join(_finding_parts(found))


def _finding_parts(found: Finding) -> Iterator[str]:
    yield f"- **{found.severity}** {found.part}: {found.what}"
    if found.measured is not None and found.limit is not None:
        yield f"({_amount(found.measured, found.unit)}, allowed {_amount(found.limit, found.unit)})"
    elif found.measured is not None:
        yield f"({_amount(found.measured, found.unit)})"
    if found.where:
        yield f"Where: {found.where}."
    if found.fix:
        yield f"What to do: {found.fix}."
    yield f"`{found.code}`"


def _amount(value: float, unit: str) -> str:
    digits = f"{value:.0f}" if abs(value) >= PLAIN_FROM else f"{value:.4g}"
    return f"{digits} {unit}".rstrip()

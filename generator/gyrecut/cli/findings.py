"""How findings are shown, and what they make of the exit code."""

from __future__ import annotations

from dataclasses import asdict
from typing import TYPE_CHECKING, Any

from gyrecut.cli.figures import figure
from gyrecut.cli.tables import print_table
from gyrecut.errors import FINDING_SAYS_STOP, FINE
from gyrecut.findings import Severity, worst

if TYPE_CHECKING:
    from collections.abc import Iterable

    from rich.console import Console

    from gyrecut.findings import Finding

_STYLES = {Severity.STOP: "bold red", Severity.WARN: "yellow", Severity.NOTE: "dim"}


def exit_code_of(findings: tuple[Finding, ...]) -> int:
    """Give 1 when a finding says stop, else 0."""
    return FINDING_SAYS_STOP if worst(findings) is Severity.STOP else FINE


def as_rows(findings: Iterable[Finding]) -> list[dict[str, Any]]:
    """Give findings as a JSON document holds them."""
    return [asdict(finding) for finding in findings]


def print_findings(out: Console, findings: tuple[Finding, ...], *, title: str) -> None:
    """Write findings, the gravest first, each with what to do about it."""
    if not findings:
        out.print(f"{title}: nothing to say.")
        return
    gravest_first = sorted(findings, key=lambda finding: list(Severity).index(finding.severity))
    rows = (
        (
            finding.severity,
            finding.part,
            _sentence(finding),
            _amount(finding.measured, finding.unit),
            _amount(finding.limit, finding.unit),
        )
        for finding in gravest_first
    )
    columns = ("says", "part", "what", "#found", "#limit")
    styles = (_STYLES[finding.severity] for finding in gravest_first)
    print_table(out, columns, rows, title=title, styles=styles)


def _sentence(finding: Finding) -> str:
    place = f" ({finding.where})" if finding.where else ""
    advice = f"\nDo: {finding.fix}" if finding.fix else ""
    return f"{finding.what}{place}{advice}"


def _amount(value: float | None, unit: str) -> str:
    return "" if value is None else f"{figure(value)} {unit}".strip()

"""What a check says: data, never a print and never an exception."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum


class Severity(StrEnum):
    """How far a finding should stop a person from building."""

    STOP = "stop"
    WARN = "warn"
    NOTE = "note"


@dataclass(frozen=True, slots=True, kw_only=True)
class Finding:
    """One result of one check.

    Parameters
    ----------
    code : str
        Stable name in kebab-case, never reused for another meaning.
    severity : Severity
        `stop` makes the command exit with 1.
    part : str
        The part or piece it is about.
    what : str
        One sentence in plain words.
    measured, limit : float or None
        The value found and the value allowed, in `unit`; None where a number says nothing.
    unit : str
        Unit of both numbers, "" for none or for plain ratios.
    where : str
        Place on the part, or the profile line it comes from.
    fix : str
        What to do about it.
    """

    code: str
    severity: Severity
    part: str
    what: str
    measured: float | None = None
    limit: float | None = None
    unit: str = ""
    where: str = ""
    fix: str = ""


def worst(findings: tuple[Finding, ...]) -> Severity | None:
    """Give the gravest severity present, or None when there is no finding."""
    present = {finding.severity for finding in findings}
    return next((level for level in Severity if level in present), None)

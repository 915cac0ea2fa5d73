"""All that the strength of one separator and its bin has to say."""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

from gyrecut.findings import Finding, Severity
from gyrecut.strength.bins import bin_findings, bin_holds_to, relief_findings
from gyrecut.strength.fixings import joint_findings, screw_findings, warmth_findings
from gyrecut.strength.lids import lid_findings, lid_holds_to
from gyrecut.strength.shells import body_findings, body_holds_to
from gyrecut.strength.verdicts import KPA

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.proportions.dimensions import Dimensions
    from gyrecut.strength.inputs import StrengthInputs


def strength_findings(d: Dimensions, inputs: StrengthInputs) -> tuple[Finding, ...]:
    """Hold one separator and its bin against the strongest suction they can meet.

    Parameters
    ----------
    d : Dimensions
        Of one separator.
    inputs : StrengthInputs
        Its materials, bin, source and air.

    Returns
    -------
    tuple of Finding
        A stop where the margin is below 1, a warning where it is below the safety factor (2 with
        a relief opening, 3 without), a note with the margin otherwise. A source that is only
        assumed stops nothing: its stops are warnings.

    Raises
    ------
    OutOfRangeError
        Where a number lies outside what the formulas hold for.
    """
    weakest = min(body_holds_to(d, inputs), lid_holds_to(d, inputs), bin_holds_to(inputs))
    found = (
        *_suction(inputs),
        *body_findings(d, inputs),
        *lid_findings(d, inputs),
        *bin_findings(inputs),
        *relief_findings(inputs, holds_to=weakest),
        *joint_findings(d, inputs),
        *screw_findings(d, inputs),
        *warmth_findings(inputs),
    )
    return tuple(map(_softened, found)) if inputs.assumed_source else found


def _softened(finding: Finding) -> Finding:
    stops = finding.severity is Severity.STOP
    return replace(finding, severity=Severity.WARN) if stops else finding


def _suction(inputs: StrengthInputs) -> Iterator[Finding]:
    if inputs.assumed_source:
        yield Finding(
            code="suction-assumed",
            severity=Severity.NOTE,
            part="source",
            what=(
                f"The source is not known; {inputs.assumed_source} is assumed, which draws this "
                "much behind a blocked hose."
            ),
            measured=inputs.shut_off / KPA,
            unit="kPa",
            where="air",
            fix="Write the source's own shut-off suction in the profile.",
        )

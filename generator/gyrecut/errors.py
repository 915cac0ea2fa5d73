"""The errors a user can meet, each with the exit code the command line gives it."""

from __future__ import annotations

from typing import ClassVar

FINE = 0
FINDING_SAYS_STOP = 1
USAGE = 2
PROFILE_INVALID = 3
BUILD_FAILED = 4
OUR_FAULT = 70


class GyrecutError(Exception):
    """Base of every error that is the input's or the machine's doing, not ours.

    Its text says what is wrong, where, what is allowed and what to do; it is shown to the
    user as it stands, with no traceback.
    """

    exit_code: ClassVar[int] = BUILD_FAILED


class OutOfRangeError(GyrecutError, ValueError):
    """A correlation was asked for a value outside the range it holds in.

    Parameters
    ----------
    quantity : str
        What was out of range, in the field's words.
    value, low, high : float
        The value given and the range allowed, in `unit`.
    unit : str
        Unit of the three numbers.
    source : str
        Where the range comes from.
    """

    exit_code = PROFILE_INVALID

    def __init__(
        self, *, quantity: str, value: float, low: float, high: float, unit: str, source: str
    ) -> None:
        self.quantity, self.value, self.low, self.high = quantity, value, low, high
        self.unit, self.source = unit, source
        super().__init__(
            f"{quantity} is {value:g} {unit}; allowed {low:g} to {high:g} {unit} ({source})"
        )


class BuildError(GyrecutError):
    """The CAD kernel, or a file, did not give what the design asked for."""


class UnbuildableError(GyrecutError):
    """The profile is well formed, but no body can be made from it.

    Parameters
    ----------
    key : tuple of str or int
        The profile's key to change first, such as ("air", "hose", "nominal").
    what : str
        What is wrong, as the rest of a sentence that begins with the key.
    given, allowed, fix : str
        What the profile comes to, what may be, what to do.
    """

    exit_code = PROFILE_INVALID

    def __init__(
        self, *, key: tuple[str | int, ...], what: str, given: str, allowed: str, fix: str
    ) -> None:
        self.key, self.what = key, what
        self.given, self.allowed, self.fix = given, allowed, fix
        super().__init__(
            f"{'.'.join(map(str, key))} {what}; given: {given}; allowed: {allowed}; do: {fix}"
        )

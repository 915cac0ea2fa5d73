"""The range a correlation holds in, kept beside it as data and enforced, never clamped to."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TypeAlias

import numpy as np
from numpy.typing import NDArray

from gyrecut.errors import OutOfRangeError

Numbers: TypeAlias = float | NDArray[np.float64]


@dataclass(frozen=True, slots=True, kw_only=True)
class Range:
    """A closed range of one quantity.

    Parameters
    ----------
    quantity : str
        What is limited, in the field's words.
    low, high : float
        Smallest and largest value allowed, in `unit`.
    unit : str
        Unit of both.
    source : str
        Where the range comes from.
    """

    quantity: str
    low: float
    high: float
    unit: str
    source: str

    def check(self, value: Numbers) -> None:
        """Refuse a value, or any element of an array, that is outside or not a number.

        Parameters
        ----------
        value : float or ndarray
            Value or values, in `unit`.

        Raises
        ------
        OutOfRangeError
            Names the first value refused.
        """
        # A search checks single numbers by the thousand; an array for each would cost the most.
        if isinstance(value, float) and self.low <= value <= self.high:
            return
        values = np.asarray(value, dtype=np.float64)
        inside = (values >= self.low) & (values <= self.high)
        if not inside.all():
            raise OutOfRangeError(
                quantity=self.quantity,
                value=float(values[~inside].flat[0]),
                low=self.low,
                high=self.high,
                unit=self.unit,
                source=self.source,
            )

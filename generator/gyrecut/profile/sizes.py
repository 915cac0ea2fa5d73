"""The grain sizes of a profile's own dust: by a formula, or by its sieves."""

from __future__ import annotations

import math
from bisect import bisect
from typing import TYPE_CHECKING, Annotated, Any, ClassVar, Literal

from pydantic import Field

from gyrecut.profile.bounds import GRAIN, ROSIN_RAMMLER, SPREAD, UNDERSIZE
from gyrecut.profile.group import Group, Mistakes
from gyrecut.profile.order import out_of_order
from gyrecut.profile.problems import Code
from gyrecut.profile.scalars import mistake
from gyrecut.profile.shapes import ListOf

if TYPE_CHECKING:
    from collections.abc import Mapping

MOST_SIEVES = 60


def _below(deviations: float) -> float:
    """Share of a normal distribution below so many standard deviations."""
    return 0.5 * math.erfc(-deviations / math.sqrt(2.0))


class LogNormalSizes(Group):
    """Log-normal by mass."""

    line: ClassVar[str] = "distribution: {kind: log-normal, median: 30 um, spread: 2.5}"

    kind: Literal["log-normal"] = Field(description="log-normal: by median and spread")
    median: Annotated[float, GRAIN] = Field(
        description="Grain size that half of the mass is finer than"
    )
    spread: Annotated[float, SPREAD] = Field(
        description="Geometric standard deviation of the grain sizes by mass"
    )

    def at(self, deviations: float) -> float:
        """Grain size [m] that as much is finer than as lies below so many deviations [-]."""
        return self.median * math.pow(self.spread, deviations)


class RosinRammlerSizes(Group):
    """Rosin and Rammler's distribution."""

    line: ClassVar[str] = "distribution: {kind: rosin-rammler, size: 50 um, exponent: 1.2}"

    kind: Literal["rosin-rammler"] = Field(description="rosin-rammler: by size and exponent")
    size: Annotated[float, GRAIN] = Field(
        description="Grain size that 63.2 % of the mass is finer than"
    )
    exponent: Annotated[float, ROSIN_RAMMLER] = Field(
        description="Exponent of the distribution; the larger, the narrower the dust"
    )

    def at(self, deviations: float) -> float:
        """Grain size [m] that as much is finer than as lies below so many deviations [-]."""
        return self.size * math.pow(-math.log(_below(-deviations)), 1.0 / self.exponent)


class SieveSizes(Group):
    """A sieve table."""

    line: ClassVar[str] = (
        "distribution: {kind: sieve, sizes: [63 um, 125 um], undersize: [20 %, 70 %]}"
    )

    kind: Literal["sieve"] = Field(description="sieve: by what passes each sieve")
    sizes: Annotated[
        tuple[Annotated[float, GRAIN], ...],
        ListOf(noun="sieve sizes", low=2, high=MOST_SIEVES, example="[63 um, 125 um]"),
    ] = Field(description="Sieve openings, the finest first")
    undersize: Annotated[
        tuple[Annotated[float, UNDERSIZE], ...],
        ListOf(noun="shares", low=2, high=MOST_SIEVES, example="[20 %, 70 %]"),
    ] = Field(description="Share of the whole mass that passes each sieve")

    @classmethod
    def rules(cls, given: Mapping[str, Any]) -> Mistakes:
        """Ask for as many shares as sieves, all in order."""
        sizes, undersize = given.get("sizes"), given.get("undersize")
        if not isinstance(sizes, list) or not isinstance(undersize, list):
            return
        if len(sizes) != len(undersize):
            what = f"has {len(undersize)} shares for {len(sizes)} sieves"
            fix = "give one share for each sieve"
            allowed = f"a list of {len(sizes)} shares"
            yield ("undersize",), mistake(Code.NUMBER_OF_ITEMS, what, allowed=allowed, fix=fix)
        for key, values, rule in (("sizes", sizes, GRAIN), ("undersize", undersize, UNDERSIZE)):
            for index, wrong in out_of_order(values, rule, falling=False):
                yield (key, index), wrong

    def at(self, deviations: float) -> float:
        """Grain size [m] that as much is finer than as lies below so many deviations [-].

        Straight in the logarithm of the size, between the sieves and beyond the last of them.
        """
        share = _below(deviations)
        above = min(max(bisect(self.undersize, share), 1), len(self.sizes) - 1)
        low, high = (math.log(size) for size in self.sizes[above - 1 : above + 1])
        start, end = self.undersize[above - 1 : above + 1]
        return math.exp(low + (high - low) * (share - start) / (end - start))

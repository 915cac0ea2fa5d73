"""The grain sizes a profile means, as a distribution the forecast can integrate over."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.correlations.size_distributions import LogNormal, RosinRammler, SieveTable
from gyrecut.profile.sizes import RosinRammlerSizes, SieveSizes

if TYPE_CHECKING:
    from gyrecut.catalogue.rows import Dust
    from gyrecut.correlations.size_distributions import SizeDistribution
    from gyrecut.profile.models import DustFeed


def sizes_of(feed: DustFeed, dust: Dust) -> SizeDistribution:
    """Give the distribution: the profile's own, or the log-normal of the dust's kind."""
    own = feed.distribution
    if isinstance(own, RosinRammlerSizes):
        return RosinRammler(size=own.size, exponent=own.exponent)
    if isinstance(own, SieveSizes):
        return SieveTable(sizes=own.sizes, undersizes=own.undersize)
    return LogNormal(median=dust.median, spread=dust.spread)

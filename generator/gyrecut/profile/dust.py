"""The dust a profile means: its kind in the catalogue, own values in place of the row's."""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

from gyrecut.catalogue import dusts
from gyrecut.catalogue.rows import Dust

if TYPE_CHECKING:
    from gyrecut.profile.models import DustFeed

UNKNOWN_CONVEYING_VELOCITY = 20.0  # m/s, "average industrial dust", ACGIH Industrial Ventilation


def dust_of(feed: DustFeed) -> Dust:
    """Give the dust with every value the profile leaves to the catalogue filled in.

    Parameters
    ----------
    feed : DustFeed
        The profile's dust; complete, as its validation asks for.

    Returns
    -------
    Dust
        An own dust is taken as combustible, since nothing says it is not.
    """
    own = {key: value for key in type(feed).OWN if (value := getattr(feed, key)) is not None}
    if feed.kind is not None:
        return replace(dusts()[feed.kind], **own)
    return Dust(
        name="own",
        title="own dust",
        **own,
        conveying_velocity=UNKNOWN_CONVEYING_VELOCITY,
        combustible=True,
        exposure_limit=None,
        exposure_limit_source="",
        source="the profile",
    )

"""The dust a profile means: its kind in the catalogue, own values in place of the row's."""

from __future__ import annotations

from dataclasses import replace
from math import sqrt
from typing import TYPE_CHECKING

from gyrecut.catalogue import dusts
from gyrecut.catalogue.rows import Dust

if TYPE_CHECKING:
    from gyrecut.profile.models import DustFeed

UNKNOWN_CONVEYING_VELOCITY = 20.0  # m/s, "average industrial dust", ACGIH Industrial Ventilation
# a short fibre or a broken grain: Hinds, Aerosol Technology, 2nd ed. 1999, table 3.2, from memory
UNKNOWN_SHAPE_FACTOR = 1.3  # -
UNKNOWN_CAKE_RESISTANCE = 2.5e5  # 1/s, as wood below 20 um, the highest of the catalogue; weak


def dust_of(feed: DustFeed) -> Dust:
    """Give the dust with every value the profile leaves to the catalogue filled in.

    Parameters
    ----------
    feed : DustFeed
        The profile's dust; complete, as its validation asks for.

    Returns
    -------
    Dust
        Median and spread are those of the distribution where the profile has one: its middle,
        and the log-normal with the same middle 68 % of the mass. An own dust is taken as
        combustible, since nothing says it is not.
    """
    keys = (*type(feed).OWN, "shape_factor")
    own = {key: value for key in keys if (value := getattr(feed, key)) is not None}
    if feed.distribution is not None:
        low, own["median"], high = map(feed.distribution.at, (-1.0, 0.0, 1.0))
        own["spread"] = sqrt(high / low)
    if feed.kind is not None:
        return replace(dusts()[feed.kind], **own)
    return Dust(
        name="own",
        title="own dust",
        **({"shape_factor": UNKNOWN_SHAPE_FACTOR} | own),
        cake_resistance=UNKNOWN_CAKE_RESISTANCE,
        conveying_velocity=UNKNOWN_CONVEYING_VELOCITY,
        combustible=True,
        exposure_limit=None,
        exposure_limit_source="",
        source="the profile",
    )

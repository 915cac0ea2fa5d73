"""Shipped tables: proportion families, dusts, polymers, hoses and fasteners."""

from gyrecut.catalogue.loading import (
    CatalogueError,
    dusts,
    families,
    fasteners,
    hoses,
    polymers,
)
from gyrecut.catalogue.rows import Dust, Family, Fastener, Hose, Polymer

__all__ = [
    "CatalogueError",
    "Dust",
    "Family",
    "Fastener",
    "Hose",
    "Polymer",
    "dusts",
    "families",
    "fasteners",
    "hoses",
    "polymers",
]

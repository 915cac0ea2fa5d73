"""Shipped tables: families, dusts, hoses, sources, filters, polymers, measured cyclones."""

from gyrecut.catalogue.loading import (
    CatalogueError,
    bin_materials,
    dusts,
    families,
    fasteners,
    filters,
    hoses,
    measured_points,
    polymers,
    sources,
)
from gyrecut.catalogue.rows import (
    BinMaterial,
    Dust,
    Family,
    Fastener,
    FilterClass,
    Hose,
    MeasuredPoint,
    Polymer,
    SuctionSource,
)

__all__ = [
    "BinMaterial",
    "CatalogueError",
    "Dust",
    "Family",
    "Fastener",
    "FilterClass",
    "Hose",
    "MeasuredPoint",
    "Polymer",
    "SuctionSource",
    "bin_materials",
    "dusts",
    "families",
    "fasteners",
    "filters",
    "hoses",
    "measured_points",
    "polymers",
    "sources",
]

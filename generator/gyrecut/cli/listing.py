"""What `list` shows: the shipped tables, in the units of a profile."""

from __future__ import annotations

from collections import defaultdict
from dataclasses import asdict, dataclass
from operator import attrgetter
from typing import TYPE_CHECKING, Any

from gyrecut import catalogue
from gyrecut.cli.figures import (
    cubic_metres_an_hour,
    degrees_celsius,
    entry,
    megapascals,
    millimetres,
)
from gyrecut.cli.tables import print_table

if TYPE_CHECKING:
    from collections.abc import Callable, Iterable, Mapping
    from typing import TextIO

    from gyrecut.catalogue import (
        Dust,
        Family,
        Fastener,
        FilterClass,
        Hose,
        MeasuredPoint,
        Polymer,
        SuctionSource,
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class _View:
    """How one table is read and shown."""

    rows: Callable[[], Mapping[str, Any]]
    note: str
    columns: tuple[str, ...]
    cells: Callable[[Any], Iterable[str]]
    source: Callable[[Any], str] = attrgetter("source")


def rows_of(listed: str) -> list[dict[str, Any]]:
    """Give every row as it is held: SI values under the names of the catalogue."""
    return [asdict(row) for row in VIEWS[listed].rows().values()]


def show_rows(listed: str, stream: TextIO) -> None:
    """Write the table for a person, and below it where its numbers come from."""
    view = VIEWS[listed]
    rows = view.rows().values()
    from gyrecut.cli.consoles import console  # noqa: PLC0415 - `--json` does without

    out = console(stream)
    print_table(out, view.columns, map(view.cells, rows))
    out.print(f"\n{view.note}\n")
    named_by = defaultdict(list)
    for row in rows:
        named_by[view.source(row)].append(row.name)
    sources = ((", ".join(names), source) for source, names in named_by.items())
    print_table(out, ("name", "source"), sources)


def _family(row: Family) -> Iterable[str]:
    return (
        row.name,
        entry(row.slot_height),
        entry(row.slot_width),
        entry(row.finder_diameter),
        entry(row.finder_length),
        entry(row.barrel_height),
        entry(row.total_height),
        entry(row.dust_outlet_diameter),
    )


def _dust(row: Dust) -> Iterable[str]:
    return (
        row.name,
        row.title,
        entry(row.particle_density),
        entry(row.bulk_density),
        entry(row.median * 1e6),
        entry(row.spread),
        millimetres(row.largest_chip),
        entry(row.conveying_velocity),
        "yes" if row.combustible else "no",
        entry(row.exposure_limit),
    )


def _polymer(row: Polymer) -> Iterable[str]:
    return (
        row.name,
        row.title,
        row.process,
        entry(row.density),
        megapascals(row.modulus),
        megapascals(row.strength_along),
        megapascals(row.strength_across),
        degrees_celsius(row.softening_temperature),
    )


def _hose(row: Hose) -> Iterable[str]:
    return (row.name, millimetres(row.nominal))


def _fastener(row: Fastener) -> Iterable[str]:
    return (
        row.name,
        millimetres(row.clearance_medium),
        millimetres(row.head_diameter),
        millimetres(row.head_height),
        millimetres(row.nut_across_flats),
        millimetres(row.nut_height),
        millimetres(row.insert_hole),
        millimetres(row.insert_length),
        millimetres(row.boss_diameter),
    )


def _suction_source(row: SuctionSource) -> Iterable[str]:
    return (
        row.name,
        row.title,
        entry(row.shut_off),
        cubic_metres_an_hour(row.open_flow),
        entry(row.exponent),
    )


def _filter(row: FilterClass) -> Iterable[str]:
    through = (row.penetration, row.fine, row.middle, row.coarse)
    return (
        row.name,
        row.title,
        *(entry(None if share is None else 100 * share) for share in through),
        "yes" if row.dust_class else "no",
        entry(row.lowest_limit),
        entry(row.clean_resistance),
    )


def _measured(row: MeasuredPoint) -> Iterable[str]:
    return (
        row.name,
        row.title,
        row.grade,
        row.mark,
        millimetres(row.body_diameter),
        cubic_metres_an_hour(row.flow),
        entry(row.cut_size * 1e6),
        row.diameter_kind,
        entry(row.inlet_velocity_heads),
    )


VIEWS = {
    "families": _View(
        rows=catalogue.families,
        note="Every length is a ratio to the inside diameter of the barrel.",
        columns=(
            "name", "#slot height", "#slot width", "#finder bore", "#finder length",
            "#barrel height", "#total height", "#dust outlet",
        ),
        cells=_family,
    ),
    "dusts": _View(
        rows=catalogue.dusts,
        note=(
            "Densities in kg/m3, median grain in um, largest chip in mm, conveying velocity in "
            "m/s, limit for eight hours of breathing in mg/m3 (an empty place: none found; local "
            "rules decide). Whoever has measured their own dust writes its values in the profile."
        ),
        columns=(
            "name", "dust", "#grain", "#heap", "#median", "#spread", "#chip", "#conveying",
            "burns", "#limit",
        ),
        cells=_dust,
        source=lambda row: f"{row.source} Limit: {row.exposure_limit_source}.",
    ),
    "polymers": _View(
        rows=catalogue.polymers,
        note="Density in kg/m3, modulus and strength along and across layers in MPa, softening in "
        "degC.",
        columns=(
            "name", "material", "printer", "#density", "#modulus", "#along", "#across",
            "#softens at",
        ),
        cells=_polymer,
    ),
    "hoses": _View(
        rows=catalogue.hoses,
        note="Diameter in mm, as the name says it. Measure your own hose: it may differ by 1 mm.",
        columns=("name", "#diameter"),
        cells=_hose,
    ),
    "sources": _View(
        rows=catalogue.sources,
        note="Suction behind a blocked hose in Pa, flow with nothing in its way in m3/h, and how "
        "far the curve between is bent outwards (1: straight). Invented curves of the usual size: "
        "whoever knows their own machine writes its points in the profile.",
        columns=("name", "source of suction", "#shut-off", "#open flow", "#exponent"),
        cells=_suction_source,
    ),
    "filters": _View(
        rows=catalogue.filters,
        note="What the class lets through at most, in % of all particles together and of those of "
        "0.3-1, 1-3 and 3-10 um (an empty place: the class says nothing); whether it is one for "
        "extractors of harmful dust, and down to which exposure limit in mg/m3; resistance of the "
        "clean cloth in Pa s/m, about. Cloth bought loose has no class.",
        columns=(
            "name", "class", "#all", "#fine", "#middle", "#coarse", "dust class", "#limit from",
            "#resistance",
        ),
        cells=_filter,
    ),
    "fasteners": _View(
        rows=catalogue.fasteners,
        note="All in mm: the screw's clearance hole (medium), head, nut, and heat-set insert.",
        columns=(
            "name", "#hole", "#head", "#head height", "#nut", "#nut height", "#insert hole",
            "#insert length", "#boss",
        ),
        cells=_fastener,
    ),
    "measured": _View(
        rows=catalogue.measured_points,
        note="Measured cyclones that the models are held against: body in mm, flow in m3/h, cut "
        "size in um and which diameter it is, pressure drop in inlet velocity heads (an empty "
        "place: not measured). Grade A: read in its source; B: from memory, confirmed by a second "
        "number from memory; C: from memory, unchecked. Only A and B decide which model is trusted "
        "and how wide the bands are.",
        columns=(
            "name", "cyclone", "grade", "known by", "#body", "#flow", "#cut size", "diameter",
            "#heads",
        ),
        cells=_measured,
    ),
}  # fmt: skip

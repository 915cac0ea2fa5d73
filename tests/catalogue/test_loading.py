"""The shipped tables load, hold what profiles may name, and refuse what does not fit."""

from __future__ import annotations

from dataclasses import fields
from typing import TYPE_CHECKING, Any

import pytest

from gyrecut.catalogue import (
    CatalogueError,
    Hose,
    bin_materials,
    dusts,
    families,
    fasteners,
    filters,
    hoses,
    polymers,
    sources,
)
from gyrecut.catalogue.loading import rows_from_text
from gyrecut.catalogue.rows import Dust, Polymer

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

TABLES: list[Callable[[], Mapping[str, Any]]] = [
    *(families, dusts, polymers, hoses, fasteners, sources, filters, bin_materials)
]

NAMES: dict[Callable[[], Mapping[str, Any]], list[str]] = {
    families: [
        "stairmand-high-efficiency",
        "stairmand-high-throughput",
        "swift-high-efficiency",
        "swift-general-purpose",
        "swift-high-throughput",
        "lapple-general-purpose",
        "peterson-whitby",
        "1d3d",
    ],
    dusts: [
        "hardwood-sanding",
        "softwood-sanding",
        "mdf-sanding",
        "planer-shavings",
        "saw-dust",
        "mineral-casting",
        "plaster",
        "carbon-laminate",
        "glass-laminate",
        "plastic-foam",
    ],
    polymers: ["PLA", "PETG", "ABS", "ASA", "PC", "PA12", "resin-standard", "resin-tough"],
    bin_materials: ["HDPE", "steel", "plywood", "card-drum"],
    fasteners: ["M3", "M4", "M5", "M6"],
    sources: [
        "bypass-motor-two-stage",
        "shop-vacuum",
        "extractor-small",
        "extractor-large",
        "side-channel-blower",
        "on-board-blower",
    ],
    filters: [
        *("L", "M", "H", "E10", "E11", "E12", "H13", "H14"),
        *("MERV-8", "MERV-11", "MERV-13", "MERV-14", "MERV-15", "MERV-16"),
    ],
}


@pytest.mark.parametrize("table", NAMES)
def test_rows_stand_in_the_order_of_the_file(table: Callable[[], Mapping[str, Any]]) -> None:
    assert list(table()) == NAMES[table]


@pytest.mark.parametrize("table", TABLES)
def test_every_row_knows_its_name_and_its_source(
    table: Callable[[], Mapping[str, Any]],
) -> None:
    for name, row in table().items():
        assert row.name == name
        assert len(row.source) > 10


@pytest.mark.parametrize("table", TABLES)
def test_a_table_is_loaded_once_and_cannot_be_changed(
    table: Callable[[], Mapping[str, Any]],
) -> None:
    rows: Any = table()
    again: Any = table()
    assert again is rows
    with pytest.raises(TypeError, match="does not support item assignment"):
        rows["new"] = None
    with pytest.raises(AttributeError):
        next(iter(rows.values())).source = "elsewhere"


def test_numbers_are_in_si() -> None:
    assert dusts()["saw-dust"].median == pytest.approx(250e-6)
    assert hoses()["38 mm"].nominal == pytest.approx(0.038)
    assert fasteners()["M4"].thread == pytest.approx(0.004)
    # A printing polymer is near the density of water, of a few GPa, and softens above 40 degC.
    for polymer in polymers().values():
        assert 900 < polymer.density < 1500
        assert 0.5e9 < polymer.modulus < 5e9
        assert polymer.strength_across <= polymer.strength_along < 100e6
        assert 313.15 < polymer.softening_temperature < 473.15
        assert 310.0 < polymer.service_temperature < polymer.softening_temperature
        assert 0.3 <= polymer.poisson_ratio < 0.5
        assert polymer.creep_ratio < polymer.direction_ratio < 1.0


def test_a_dust_lies_looser_than_its_grains() -> None:
    for dust in dusts().values():
        assert dust.bulk_density < dust.particle_density
        assert dust.spread > 1
        assert dust.largest_chip > dust.median


def test_presets_say_that_they_are_invented() -> None:
    assert all(dust.source.startswith("Invented preset.") for dust in dusts().values())
    invented = "Common practice, no source; illustrative."
    assert all(source.source.startswith(invented) for source in sources().values())


def test_every_number_says_whether_it_has_a_source() -> None:
    assert all("common practice, no source" in row.source for row in filters().values())
    for dust in dusts().values():
        assert "Shape: " in dust.source
        assert "Cake: " in dust.source


def test_sources_have_the_size_of_such_machines() -> None:
    # Common practice, no source: vacuum motors 15-25 kPa and 30-70 L/s, single-stage fans
    # 1.5-2.5 kPa and 150-600 L/s, side-channel blowers 10-30 kPa.
    for name, suctions, flows in (
        ("bypass-motor-two-stage", (15e3, 25e3), (0.03, 0.07)),
        ("shop-vacuum", (15e3, 25e3), (0.03, 0.07)),
        ("extractor-small", (1.5e3, 2.5e3), (0.15, 0.6)),
        ("extractor-large", (1.5e3, 2.5e3), (0.15, 0.6)),
        ("side-channel-blower", (10e3, 30e3), (0.01, 0.2)),
    ):
        row = sources()[name]
        assert suctions[0] <= row.shut_off <= suctions[1]
        assert flows[0] <= row.open_flow <= flows[1]


def test_a_filter_that_lets_less_through_resists_more() -> None:
    for names in (("L", "M", "H"), ("E10", "E11", "E12", "H13", "H14")):
        rows = [filters()[name] for name in names]
        assert [row.penetration for row in rows] == sorted(
            (row.penetration or 0.0 for row in rows), reverse=True
        )
        assert [row.clean_resistance for row in rows] == sorted(
            row.clean_resistance for row in rows
        )


def test_grains_are_dragged_more_than_spheres() -> None:
    # Hinds, Aerosol Technology, 2nd ed. 1999, table 3.2, from memory: from cube to talc.
    for dust in dusts().values():
        assert 1.08 <= dust.shape_factor <= 2.0


GOOD_HOSE = '"38 mm":\n  nominal: 0.038\n  source: common practice\n'


def test_a_whole_number_becomes_a_float() -> None:
    rows = rows_from_text(GOOD_HOSE.replace("0.038", "1"), Hose, table="hoses.yaml")
    assert isinstance(rows["38 mm"].nominal, float)


@pytest.mark.parametrize(
    ("text", "message"),
    [
        ("", "hoses.yaml: holds no rows"),
        ("- 38 mm", "hoses.yaml: holds no rows"),
        ("38: {}", "hoses.yaml: 38: is not a named row"),
        ('"38 mm": 0.038', "hoses.yaml: 38 mm: is not a named row"),
        (
            GOOD_HOSE + "  colour: grey\n",
            "hoses.yaml: 38 mm: missing columns [], unknown columns ['colour']",
        ),
        (
            '"38 mm":\n  nominal: 0.038\n',
            "hoses.yaml: 38 mm: missing columns ['source'], unknown columns []",
        ),
        (
            GOOD_HOSE.replace("0.038", "38 mm"),
            "hoses.yaml: 38 mm: column nominal cannot be '38 mm'",
        ),
        (GOOD_HOSE.replace("0.038", "true"), "hoses.yaml: 38 mm: column nominal cannot be True"),
        (GOOD_HOSE.replace("0.038", ".nan"), "hoses.yaml: 38 mm: column nominal cannot be nan"),
        (
            GOOD_HOSE.replace("0.038", "-0.038"),
            "hoses.yaml: 38 mm: column nominal cannot be -0.038",
        ),
        (GOOD_HOSE.replace("0.038", "null"), "hoses.yaml: 38 mm: column nominal cannot be None"),
        (
            GOOD_HOSE.replace("common practice", '" "'),
            "hoses.yaml: 38 mm: column source cannot be ' '",
        ),
    ],
)
def test_a_table_that_does_not_fit_is_refused(text: str, message: str) -> None:
    with pytest.raises(CatalogueError) as caught:
        rows_from_text(text, Hose, table="hoses.yaml")
    assert str(caught.value) == message


def test_a_row_given_twice_is_refused() -> None:
    with pytest.raises(CatalogueError, match="duplicate key"):
        rows_from_text(GOOD_HOSE + GOOD_HOSE, Hose, table="hoses.yaml")


def test_only_an_exposure_limit_may_be_left_open() -> None:
    columns = {field.name: "1.0" for field in fields(Dust) if field.name != "name"}
    columns |= {"title": "t", "source": "s", "exposure_limit_source": "e", "combustible": "true"}

    def read(**changed: str) -> Dust:
        body = "".join(f"  {key}: {value}\n" for key, value in (columns | changed).items())
        return rows_from_text(f"dust:\n{body}", Dust, table="dusts.yaml")["dust"]

    assert read(exposure_limit="null").exposure_limit is None
    assert read(combustible="false").combustible is False
    with pytest.raises(CatalogueError, match="column median cannot be None"):
        read(median="null")
    with pytest.raises(CatalogueError, match="column combustible cannot be 1"):
        read(combustible="1")


def test_a_process_other_than_the_two_is_refused() -> None:
    columns = {field.name: "1.0" for field in fields(Polymer) if field.name != "name"}
    columns |= {"title": "t", "source": "s", "process": "powder"}
    body = "".join(f"  {key}: {value}\n" for key, value in columns.items())
    with pytest.raises(CatalogueError, match="column process cannot be 'powder'"):
        rows_from_text(f"X:\n{body}", Polymer, table="polymers.yaml")


def test_bins_are_of_what_profiles_may_name() -> None:
    materials = bin_materials()
    assert {row.form for row in materials.values()} == {"round", "box"}
    for row in materials.values():
        assert 0 < row.creep_ratio <= 1
        assert row.poisson_ratio < 0.5
        assert row.strength < row.modulus / 50
    assert materials["steel"].modulus == max(row.modulus for row in materials.values())

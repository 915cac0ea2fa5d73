"""The measured cyclones load, and a row that does not say what it is worth is refused."""

from __future__ import annotations

import pytest

from gyrecut.catalogue import CatalogueError, MeasuredPoint, measured_points
from gyrecut.catalogue.loading import rows_from_text

ROW = """
one:
  title: t
  grade: C
  mark: memory
  source: somewhere
  body_diameter: 0.2
  inlet_bore: null
  slot_height: 0.1
  slot_width: 0.04
  finder_diameter: 0.1
  finder_length: 0.1
  barrel_height: 0.3
  total_height: 0.8
  dust_outlet_diameter: 0.075
  flow: 0.06
  particle_density: 1000.0
  air_density: 1.2
  viscosity: 1.8e-5
  temperature: 293.15
  diameter_kind: physical
  cut_size: 2.0e-6
  cut_size_uncertainty: null
  inlet_velocity_heads: null
"""


def test_rows_are_loaded_once_and_hold_si() -> None:
    rows = measured_points()
    assert measured_points() is rows
    for name, row in rows.items():
        assert row.name == name
        assert 0.005 < row.body_diameter < 0.5
        assert 1e-6 < row.cut_size < 2e-5
        assert 1.7e-5 < row.viscosity < 1.9e-5
        assert row.cut_size_uncertainty is None or 0 < row.cut_size_uncertainty < 0.5


def test_a_cut_size_from_memory_is_never_of_grade_a() -> None:
    for row in measured_points().values():
        assert (row.grade == "A") == (row.mark == "read")
        assert ("from memory" in row.source) or row.source.startswith("as ") or row.grade == "A"


@pytest.mark.parametrize(
    ("before", "after", "column"),
    [
        ("grade: C", "grade: D", "grade cannot be 'D'"),
        ("mark: memory", "mark: rumour", "mark cannot be 'rumour'"),
        ("diameter_kind: physical", "diameter_kind: optical", "diameter_kind cannot be 'optical'"),
        ("cut_size: 2.0e-6", "cut_size: null", "cut_size cannot be None"),
        ("slot_width: 0.04", "slot_width: -0.04", "slot_width cannot be -0.04"),
    ],
)
def test_a_row_that_does_not_fit_is_refused(before: str, after: str, column: str) -> None:
    assert rows_from_text(ROW, MeasuredPoint, table="measured_points.yaml")["one"].grade == "C"
    with pytest.raises(CatalogueError, match=f"column {column}"):
        rows_from_text(ROW.replace(before, after), MeasuredPoint, table="measured_points.yaml")

"""Reads a shipped table strictly: a column too many, missing or of the wrong kind is an error."""

from __future__ import annotations

from dataclasses import fields
from functools import cache
from importlib import resources
from math import isfinite
from types import MappingProxyType, NoneType
from typing import TYPE_CHECKING, Any, TypeVar, get_args, get_type_hints

from ruamel.yaml import YAML
from ruamel.yaml.error import YAMLError

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

if TYPE_CHECKING:
    from collections.abc import Mapping

Row = TypeVar(
    "Row",
    Family,
    Dust,
    Polymer,
    BinMaterial,
    Hose,
    Fastener,
    MeasuredPoint,
    SuctionSource,
    FilterClass,
)


class CatalogueError(ValueError):
    """A shipped table is broken: the program's own fault, never the user's.

    Parameters
    ----------
    table : str
        File name of the table.
    row : str
        Name of the row, "" when the file as a whole is wrong.
    problem : str
        What is wrong with it.
    """

    def __init__(self, *, table: str, row: str, problem: str) -> None:
        self.table, self.row, self.problem = table, row, problem
        super().__init__(f"{table}: {row}: {problem}" if row else f"{table}: {problem}")


@cache
def families() -> Mapping[str, Family]:
    """Give the proportion families by name, in the order of the table."""
    return _shipped("families.yaml", Family)


@cache
def dusts() -> Mapping[str, Dust]:
    """Give the dusts by name, in the order of the table."""
    return _shipped("dusts.yaml", Dust)


@cache
def polymers() -> Mapping[str, Polymer]:
    """Give the printing materials by name, in the order of the table."""
    return _shipped("polymers.yaml", Polymer)


@cache
def bin_materials() -> Mapping[str, BinMaterial]:
    """Give the materials of bins by name, in the order of the table."""
    return _shipped("bin_materials.yaml", BinMaterial)


@cache
def hoses() -> Mapping[str, Hose]:
    """Give the nominal hose sizes by name, in the order of the table."""
    return _shipped("hoses.yaml", Hose)


@cache
def sources() -> Mapping[str, SuctionSource]:
    """Give the suction sources by name, in the order of the table."""
    return _shipped("sources.yaml", SuctionSource)


@cache
def filters() -> Mapping[str, FilterClass]:
    """Give the filter classes by name, in the order of the table."""
    return _shipped("filters.yaml", FilterClass)


@cache
def fasteners() -> Mapping[str, Fastener]:
    """Give the screw sizes by name, in the order of the table."""
    return _shipped("fasteners.yaml", Fastener)


@cache
def measured_points() -> Mapping[str, MeasuredPoint]:
    """Give the measured cyclones by name, in the order of the table."""
    return _shipped("measured_points.yaml", MeasuredPoint)


def rows_from_text(text: str, row_type: type[Row], *, table: str) -> Mapping[str, Row]:
    """Read the rows of one table.

    Parameters
    ----------
    text : str
        YAML: one mapping of row names to mappings of columns.
    row_type : type
        The dataclass of :mod:`gyrecut.catalogue.rows` that every row must fill exactly.
    table : str
        File name used in errors.

    Returns
    -------
    Mapping
        Read-only, row name to row, in file order.

    Raises
    ------
    CatalogueError
        On anything but exactly the columns of `row_type`.
    """
    try:
        content: object = YAML(typ="safe", pure=True).load(text)
    except YAMLError as wrong:
        raise CatalogueError(table=table, row="", problem=str(wrong)) from wrong
    if not isinstance(content, dict) or not content:
        raise CatalogueError(table=table, row="", problem="holds no rows")
    kinds = get_type_hints(row_type)
    wanted = {field.name for field in fields(row_type)} - {"name"}
    rows: dict[str, Row] = {}
    for name, columns in content.items():
        if not isinstance(name, str) or not isinstance(columns, dict):
            raise CatalogueError(table=table, row=str(name), problem="is not a named row")
        missing, unknown = wanted - columns.keys(), columns.keys() - wanted
        if missing or unknown:
            problem = f"missing columns {sorted(missing)}, unknown columns {sorted(unknown)}"
            raise CatalogueError(table=table, row=name, problem=problem)
        for column, value in columns.items():
            if not _is_of_kind(value, kinds[column]):
                problem = f"column {column} cannot be {value!r}"
                raise CatalogueError(table=table, row=name, problem=problem)
        # Every value has just been held against its column's type, which mypy cannot follow.
        checked: dict[str, Any] = {
            column: float(value) if kinds[column] is float else value
            for column, value in columns.items()
        }
        rows[name] = row_type(name=name, **checked)
    return MappingProxyType(rows)


def _shipped(table: str, row_type: type[Row]) -> Mapping[str, Row]:
    text = resources.files("gyrecut.catalogue").joinpath(table).read_text(encoding="utf-8")
    return rows_from_text(text, row_type, table=table)


def _is_of_kind(value: object, kind: object) -> bool:
    allowed = get_args(kind) or (kind,)
    if isinstance(value, bool):
        return bool in allowed
    if isinstance(value, int | float):
        return float in allowed and isfinite(value) and value > 0
    if isinstance(value, str):
        return (str in allowed and bool(value.strip())) or value in allowed
    return value is None and NoneType in allowed

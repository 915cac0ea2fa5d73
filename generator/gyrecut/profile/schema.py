"""The profile as JSON Schema, so that an editor can complete and check it while it is typed."""

from __future__ import annotations

from copy import deepcopy
from typing import Any

from gyrecut.profile.air import OwnSource
from gyrecut.profile.models import DustFeed, Printer, Profile, Stage

DIALECT = "https://json-schema.org/draft/2020-12/schema"


def profile_schema() -> dict[str, Any]:
    """Describe a profile file as JSON Schema, draft 2020-12.

    Returns
    -------
    dict
        Accepts all that the reader accepts. It refuses less: ranges of quantities stand in
        words, and what an extended profile adds is not known to it.
    """
    schema = Profile.model_json_schema()
    groups: dict[str, Any] = schema.pop("$defs")
    groups["Profile"] = schema
    for group in groups.values():
        _tidy(group)
    _rules(groups)
    extends = {"type": "string", "description": "Path of a profile to take other keys from"}
    schema["properties"] = {"extends": extends} | schema["properties"]
    partial = {f"Part{name}": _partial(group) for name, group in groups.items()}
    return {
        "$schema": DIALECT,
        "title": "gyrecut profile",
        "description": "One workshop: air, dust, bin and printer of a cyclone dust separator.",
        "if": {"type": "object", "required": ["extends"]},
        "then": {"$ref": "#/$defs/PartProfile"},
        "else": {"$ref": "#/$defs/Profile"},
        "$defs": groups | partial,
    }


def _tidy(part: Any) -> None:  # noqa: ANN401 - any JSON value
    """Say ranges beside descriptions, and leave out titles that only repeat the key."""
    if isinstance(part, list):
        for item in part:
            _tidy(item)
    if not isinstance(part, dict):
        return
    if isinstance(part.get("title"), str):
        del part["title"]
    if isinstance(part.get("description"), str):
        options = [part, *part.get("anyOf", [])]
        ranges = [option["patternErrorMessage"] for option in options if _has_range(option)]
        part["description"] = "; ".join([part["description"], *ranges])
    for item in part.values():
        _tidy(item)


def _has_range(option: dict[str, Any]) -> bool:
    return "patternErrorMessage" in option


def _rules(groups: dict[str, Any]) -> None:
    """Add the rules that take more than one key to see."""
    groups["Stage"]["oneOf"] = [_given(key) for key in Stage.SIZINGS]
    own = [_given(key) for key in DustFeed.OWN if key not in DustFeed.SIZES]
    sizes = [_given(key) for key in DustFeed.SIZES]
    sized = {"anyOf": [{"allOf": sizes}, _given("distribution")]}
    groups["DustFeed"]["anyOf"] = [_given("kind"), {"allOf": [*own, sized]}]
    groups["DustFeed"]["allOf"] = [
        {"not": {"allOf": [_given("distribution"), {"anyOf": sizes}]}},
    ]
    ends = [_given(key) for key in OwnSource.ENDS]
    drawn = {"anyOf": [*ends, _given("exponent")]}
    forms = groups["Air"]["properties"]["source"]["anyOf"]
    own_source = next(form for form in forms if "properties" in form)
    own_source["oneOf"] = [
        {"allOf": [_given("points"), {"not": drawn}]},
        {"allOf": [*ends, {"not": _given("points")}]},
    ]
    counted = {"required": ["filter"], "properties": {"filter": _given("clean_loss")}}
    groups["Air"]["allOf"] = [
        {"anyOf": [_given("flow"), _given("source")]},
        {"not": {"allOf": [_given("altitude"), _given("pressure")]}},
        {"anyOf": [_given("flow"), {"not": counted}]},
    ]
    groups["Printer"]["allOf"] = [
        {
            "if": {"properties": {"process": {"const": process}}, "required": ["process"]},
            "then": {"allOf": [_given(key) for key in keys]},
            "else": {"not": {"anyOf": [_given(key) for key in keys]}},
        }
        for process, keys in Printer.OWN.items()
    ]


def _given(key: str) -> dict[str, Any]:
    return {"required": [key], "properties": {key: {"not": {"type": "null"}}}}


def _partial(group: dict[str, Any]) -> dict[str, Any]:
    """Describe a group of which an extended profile may hold the rest."""
    rest = ("required", "oneOf", "anyOf", "allOf")
    part = {key: deepcopy(value) for key, value in group.items() if key not in rest}
    for key, value in part["properties"].items():
        # these replace what is extended as a whole, and so are complete
        if key not in ("stages", "proportions", "source"):
            _point_to_parts(value)
    return part


def _point_to_parts(value: dict[str, Any]) -> None:
    if "$ref" in value:
        value["$ref"] = value["$ref"].replace("#/$defs/", "#/$defs/Part")
    for option in value.get("anyOf", []):
        _point_to_parts(option)

"""Every number that `size` prints is in its JSON document, but for a unit or a percentage."""

from __future__ import annotations

import io
import re
from typing import TYPE_CHECKING, Any

import pytest
from tests.cli.conftest import REPOSITORY

from gyrecut import pipeline
from gyrecut.cli import figures, findings, size_report
from gyrecut.profile import load_profile

if TYPE_CHECKING:
    from collections.abc import Iterator

NUMBER = re.compile(r"(?<![\w.])\d+(?:\.\d+)?(?![\w])")
# From SI to what is printed: um, percent, m3/h.
FACTORS = (1.0, 1e6, 100.0, 3600.0)
OUR_WORDS = {"90", "9", "10", "1"}  # "90 % range", "in 9 of 10 cases", stage numbers


def leaves(value: Any) -> Iterator[float | str]:  # noqa: ANN401 - JSON has no narrower type
    if isinstance(value, dict):
        for below in value.values():
            yield from leaves(below)
    elif isinstance(value, list):
        for below in value:
            yield from leaves(below)
    elif isinstance(value, str | int | float):
        yield value


@pytest.fixture(params=["luthier-sander", "joinery-planer", "casting-bench"])
def design(request: pytest.FixtureRequest) -> pipeline.Design:
    return pipeline.design(load_profile(REPOSITORY / "profiles" / f"{request.param}.yaml"))


def shown(
    design: pipeline.Design, monkeypatch: pytest.MonkeyPatch
) -> tuple[str, dict[str, list[float]]]:
    """Give the text, and every number that was written into it with the value behind it."""
    written: dict[str, list[float]] = {}

    def recording(name: str, place: Any) -> None:  # noqa: ANN401 - a module
        real = getattr(place, name)

        def record(value: float | None, *digits: int) -> str:
            text: str = real(value, *digits)
            if value is not None:
                written.setdefault(text.removeprefix("over "), []).append(float(value))
            return text

        monkeypatch.setattr(place, name, record)

    for place in (figures, size_report, findings):
        recording("figure", place)
    for name in ("tenths", "percent"):
        recording(name, size_report)
    stream = io.StringIO()
    size_report.show_design(design, stream)
    return stream.getvalue(), written


def test_every_printed_number_is_in_the_document(
    design: pipeline.Design, monkeypatch: pytest.MonkeyPatch
) -> None:
    document = size_report.size_document(design)
    numbers = [float(one) for one in leaves(document) if isinstance(one, int | float)]
    known = {f"{value * factor:.12g}" for value in numbers for factor in FACTORS}
    shares = [share["pressure_drop"] for share in document["forecast"]["clean"]["shares"]]
    known |= {f"{100 * share / sum(shares):.12g}" for share in shares}
    said = {
        number
        for text in leaves(document)
        if isinstance(text, str)
        for number in NUMBER.findall(text)
    }
    text, written = shown(design, monkeypatch)
    assert len(written) > 60
    for printed, values in written.items():
        for value in values:
            assert f"{value:.12g}" in known, f"{printed} ({value})"
    unknown = set(NUMBER.findall(text)) - written.keys() - said - OUR_WORDS
    assert unknown == set()


def test_a_number_that_is_missing_would_be_noticed(
    design: pipeline.Design, monkeypatch: pytest.MonkeyPatch
) -> None:
    real = pipeline.Design.as_document

    def without_shares(self: pipeline.Design) -> dict[str, Any]:
        document = real(self)
        document["forecast"].pop("choked")
        return document

    monkeypatch.setattr(pipeline.Design, "as_document", without_shares)
    with pytest.raises(AssertionError):
        test_every_printed_number_is_in_the_document(design, monkeypatch)

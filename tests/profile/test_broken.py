"""One file a mistake in broken/: lines taken out (-) and put in (+), then the whole message."""

from __future__ import annotations

import re
from pathlib import Path
from typing import TYPE_CHECKING

import pytest

from gyrecut.profile.problems import Code

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

HERE = Path(__file__).parent
CASES = sorted((HERE / "broken").glob("*.txt"))


def spoilt(good: str, case: str) -> tuple[str, str]:
    change, _, message = case.partition("\n\n")
    lines = change.splitlines()
    out = "".join(f"{line[1:]}\n" for line in lines if line.startswith("-"))
    into = "".join(f"{line[1:]}\n" for line in lines if line.startswith("+"))
    assert good.count(out) == 1
    return good.replace(out, into), message


@pytest.mark.parametrize("case", CASES, ids=lambda case: case.stem)
def test_refusal_says_the_whole_message(
    case: Path, good: str, refusal: Callable[[Mapping[str, str]], str]
) -> None:
    text, message = spoilt(good, case.read_text(encoding="utf-8"))
    assert refusal({"broken.yaml": text}) + "\n" == message


def test_every_code_is_provoked_by_a_test() -> None:
    later = HERE.parent / "cli" / "test_unbuildable.py"
    texts = [*CASES, *HERE.glob("test_*.py"), later]
    told = {
        code
        for text in texts
        for code in re.findall(r"(?:\d+: |code=\")(P\d{3})", text.read_text(encoding="utf-8"))
    }
    assert told == set(Code)


def test_several_mistakes_in_one_list_item_are_all_told(
    good: str, refusal: Callable[[Mapping[str, str]], str]
) -> None:
    text = good.replace("inlet_velocity: 18 m/s", "inlet_velocty: 18 m/s\n    count: 13")
    told = re.findall(r"^broken.yaml:(.+)$", refusal({"broken.yaml": text}), re.MULTILINE)
    assert told == [
        "12:5: P022 stages[0] has nothing to take its size from",
        "13:5: P021 stages[0].inlet_velocty is not a known key",
        "14:12: P028 stages[0].count is out of range",
    ]

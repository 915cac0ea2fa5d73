"""A range refuses what lies outside it, and names it."""

from __future__ import annotations

import numpy as np
import pytest

from gyrecut.airflow.ranges import Range
from gyrecut.errors import OutOfRangeError

WARM = Range(quantity="air temperature", low=200.0, high=400.0, unit="K", source="a table")


@pytest.mark.parametrize("value", [200.0, 400.0, np.array([200.0, 300.0, 400.0]), np.array([])])
def test_both_ends_belong_to_the_range(value: float) -> None:
    WARM.check(value)


@pytest.mark.parametrize("value", [199.9, 400.1, float("inf"), float("nan")])
def test_outside_is_refused(value: float) -> None:
    with pytest.raises(OutOfRangeError):
        WARM.check(value)


def test_the_text_names_the_first_element_refused() -> None:
    with pytest.raises(OutOfRangeError) as caught:
        WARM.check(np.array([[300.0, 401.0], [500.0, 300.0]]))
    assert caught.value.value == 401.0
    assert str(caught.value) == "air temperature is 401 K; allowed 200 to 400 K (a table)"

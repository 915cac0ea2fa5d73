"""Lists that have to rise or fall from value to value."""

from __future__ import annotations

from typing import TYPE_CHECKING

from pydantic_core import PydanticCustomError

from gyrecut.profile.problems import Code
from gyrecut.profile.scalars import mistake

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator

    from gyrecut.profile.quantities import Quantity


def out_of_order(
    values: Iterable[object], rule: Quantity, *, falling: bool
) -> Iterator[tuple[int, PydanticCustomError]]:
    """Give the place of each value that does not go on from the one before, and the mistake."""
    direction = "fall" if falling else "rise"
    before = None
    for index, value in enumerate(values):
        try:
            this = rule.read(value)
        except PydanticCustomError:
            return  # told where the value itself is read
        if before is not None and (this >= before if falling else this <= before):
            what = f"does not {direction} from the one before"
            yield (
                index,
                mistake(
                    Code.NOT_IN_ORDER,
                    what,
                    allowed=f"values that {direction} from the first to the last",
                    fix="put the values in order, and leave out one that says nothing new",
                ),
            )
        before = this

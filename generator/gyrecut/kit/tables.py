"""A table as Markdown has it."""

from __future__ import annotations

from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Iterable, Sequence


def markdown_table(header: Sequence[str], rows: Iterable[Sequence[str]]) -> str:
    """Write a table in Markdown.

    Parameters
    ----------
    header : sequence of str
        What stands over each column.
    rows : iterable of sequence of str
        The cells, as many in each row as there are columns.

    Returns
    -------
    str
        Its lines, the last without a line end.
    """
    lines = [header, ["---"] * len(header), *rows]
    return "\n".join(map(_line, lines))


def _line(cells: Sequence[str]) -> str:
    # An upright in a cell would end it.
    return "| " + " | ".join(cell.replace("|", "\\|") for cell in cells) + " |"

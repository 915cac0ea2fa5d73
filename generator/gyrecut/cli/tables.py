"""The one look our tables have: a title, plain columns, no boxes."""

from __future__ import annotations

from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Iterable

    from rich.console import Console


def print_table(
    out: Console,
    columns: Iterable[str],
    rows: Iterable[Iterable[str]],
    *,
    title: str = "",
    styles: Iterable[str] = (),
) -> None:
    """Write rows under headings; a heading that begins with "#" stands over numbers.

    Parameters
    ----------
    out : Console
        Where to.
    columns : iterable of str
        Headings, from the left.
    rows : iterable of iterable of str
        As many cells as there are headings.
    title : str
        One line above the table.
    styles : iterable of str
        Look of each row, where it has one of its own.
    """
    from rich.table import Table  # noqa: PLC0415 - `--json` does without

    if title:
        out.print(title, style="bold")
    table = Table(box=None, pad_edge=False, padding=(0, 2, 0, 0), header_style="underline")
    for heading in columns:
        is_number = heading.startswith("#")
        table.add_column(
            heading.removeprefix("#"),
            justify="right" if is_number else "left",
            no_wrap=is_number,
            overflow="fold",
        )
    for cells in rows:
        table.add_row(*cells)
    for row, style in zip(table.rows, styles, strict=False):
        row.style = style
    out.print(table)

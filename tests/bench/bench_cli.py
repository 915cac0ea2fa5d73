"""How fast the command line opens: `python tests/bench/bench_cli.py`.

Prints ratios, since seconds belong to a machine: `--help` over a typer program that does nothing,
and `size` over a script that only imports what `size` cannot do without.
"""

from __future__ import annotations

import subprocess
import sys
import time
from pathlib import Path
from statistics import median

ROUNDS = 15
PROFILE = Path(__file__).parents[2] / "profiles" / "luthier-sander.yaml"
BARE_TYPER = """
import typer
app = typer.Typer(rich_markup_mode=None, add_completion=False)
@app.command()
def nothing() -> None:
    "Do nothing."
app()
"""
BARE_IMPORTS = "import numpy, pint, pydantic, ruamel.yaml, typer; pint.UnitRegistry()"


def seconds(*arguments: str) -> float:
    start = time.perf_counter()
    subprocess.run([sys.executable, *arguments], check=True, capture_output=True)
    return time.perf_counter() - start


def compare(what: str, ours: tuple[str, ...], bare: tuple[str, ...]) -> None:
    """Take turns, so that a busy moment of the machine strikes both."""
    pairs = [(seconds(*ours), seconds(*bare)) for _ in range(ROUNDS)]
    our_median, bare_median = (median(column) for column in zip(*pairs, strict=True))
    print(  # noqa: T201 - the result
        f"{what}: {our_median / bare_median:.2f} ({our_median:.3f} s over {bare_median:.3f} s)"
    )


if __name__ == "__main__":
    compare(
        "--help over a bare typer program",
        ("-m", "gyrecut", "--help"),
        ("-c", BARE_TYPER, "--help"),
    )
    compare(
        "size over its bare imports",
        ("-m", "gyrecut", "size", str(PROFILE), "--quiet"),
        ("-c", BARE_IMPORTS),
    )

"""Which cautions go with a design, and how they are written at the end of a result."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.catalogue import polymers
from gyrecut.kit.cautions import cautions

if TYPE_CHECKING:
    from rich.console import Console

    from gyrecut.kit.cautions import Caution
    from gyrecut.pipeline import Design


def cautions_for(design: Design) -> tuple[Caution, ...]:
    """Give all cautions, in the order that suits the design's dust and polymer."""
    polymer = polymers()[design.profile.material]
    return cautions(
        polymer=polymer.name,
        softening_temperature=polymer.softening_temperature,
        dust_is_combustible=design.dust.combustible,
    )


def print_cautions(out: Console, shown: tuple[Caution, ...]) -> None:
    """Write cautions in full."""
    from rich.padding import Padding  # noqa: PLC0415 - `--json` does without

    out.print("Cautions", style="bold")
    for caution in shown:
        out.print(Padding(f"{caution.title}. {caution.text}", (0, 0, 0, 2)))

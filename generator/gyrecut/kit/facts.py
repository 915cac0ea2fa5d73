"""The few numbers of a design that a person at the bench reads."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.kit.contents import Fact

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.proportions.dimensions import Dimensions
    from gyrecut.separation.prediction import FirstPrediction


def body_facts(d: Dimensions, of: str) -> Iterator[Fact]:
    """Give the main dimensions of one separator; `of` names its stage where there are several."""
    body, slot = d.body, d.slot
    yield Fact(label="body diameter, inside", value=body.diameter_mm, unit="mm", note=of)
    yield Fact(label="barrel height", value=body.barrel_height_mm, unit="mm", note=of)
    yield Fact(label="cone height", value=body.cone_height_mm, unit="mm", note=of)
    yield Fact(label="slot height", value=slot.height_mm, unit="mm", note=of)
    yield Fact(label="slot width", value=slot.width_mm, unit="mm", note=of)
    yield Fact(label="vortex finder bore", value=d.finder.bore_mm, unit="mm", note=of)
    yield Fact(label="vortex finder below the lid", value=d.finder.length_mm, unit="mm", note=of)
    yield Fact(label="dust outlet", value=body.dust_outlet_diameter_mm, unit="mm", note=of)
    yield Fact(
        label="height over all, without the bin", value=d.overall_height_mm, unit="mm", note=of
    )


def estimate_facts(prediction: FirstPrediction, of: str) -> Iterator[Fact]:
    """Give the first estimate of one separator, each number with the formula it comes from."""

    def note(of_what: str) -> str:
        return ", ".join(part for part in (prediction.methods.get(of_what, ""), of) if part)

    yield Fact(
        label="inlet velocity",
        value=prediction.inlet_velocity,
        unit="m/s",
        note=note("inlet_velocity"),
    )
    yield Fact(
        label="cut size",
        value=prediction.cut_size_lapple * 1e6,
        unit="um",
        note=note("cut_size_lapple"),
    )
    yield Fact(
        label="pressure drop",
        value=prediction.pressure_drop_shepherd_lapple,
        unit="Pa",
        note=note("pressure_drop_shepherd_lapple"),
    )
    yield Fact(
        label="share of the dust's mass kept",
        value=prediction.mass_kept * 100,
        unit="%",
        note=note("mass_kept"),
    )

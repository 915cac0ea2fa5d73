"""The few numbers of a design that a person at the bench reads."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.kit.contents import Fact

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.proportions.dimensions import Dimensions
    from gyrecut.separation.forecast import Forecast

ALMOST_ALL = 0.99995  # from here four digits would say 100 %


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


def estimate_facts(expected: Forecast) -> Iterator[Fact]:
    """Give the forecast in the numbers a person at the bench reads."""
    catch, several = expected.catch, len(expected.stages) > 1
    yield Fact(
        label="air flow",
        value=expected.flow * 3600,
        unit="m3/h",
        note="the profile's target" if expected.flow_is_target else "where source and system meet",
    )
    yield Fact(
        label="share of the dust's mass kept",
        value=catch.kept * 100,
        unit="%",
        note=f"90 % range {_percent(catch.spread.low)} to {_percent(catch.spread.high)} %",
    )
    for number, stage in enumerate(expected.stages, start=1):
        of = f", stage {number}" if several else ""
        cut, drop = stage.cut_size, stage.pressure_drop
        yield Fact(label=f"inlet velocity{of}", value=stage.inlet_velocity, unit="m/s")
        yield Fact(
            label=f"cut size, half caught{of}",
            value=cut.central * 1e6,
            unit="um",
            note=f"{cut.low * 1e6:.2g} to {cut.high * 1e6:.2g} um by the measured cyclones",
        )
        yield Fact(
            label=f"pressure drop{of}",
            value=drop.central,
            unit="Pa",
            note=f"{drop.low:.0f} to {drop.high:.0f} Pa",
        )
    gives = "has to give" if expected.flow_is_target else "gives"
    yield Fact(label=f"suction the source {gives}", value=expected.clean.suction, unit="Pa")
    yield Fact(
        label="suction to choose a source by",
        value=expected.safe_suction,
        unit="Pa",
        note="separator after Shepherd and Lapple",
    )
    yield Fact(label="suction left at the tool", value=expected.clean.tool_suction, unit="Pa")
    yield Fact(label="air velocity in the hose", value=expected.clean.hose_velocity, unit="m/s")
    if catch.to_filter is not None:
        yield Fact(
            label="dust that reaches the filter",
            value=catch.to_filter * 3.6e6,
            unit="g/h",
            note=f"median {catch.passing_median * 1e6:.2g} um",
        )
    if catch.bin_fill_time is not None:
        yield Fact(label="working time to a full bin", value=catch.bin_fill_time / 3600, unit="h")
    if expected.filter is not None and expected.filter.life is not None:
        yield Fact(
            label="working time to the filter's limit",
            value=expected.filter.life / 3600,
            unit="h",
            note="weak: a factor of 3 either way",
        )


def _percent(share: float) -> str:
    """Write a share so that it never rounds up to all of it."""
    return "over 99.99" if ALMOST_ALL <= share < 1 else f"{share * 100:.4g}"

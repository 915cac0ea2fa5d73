"""The way of the air explained: hose, source, the point where they meet, dust in the air."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.airflow.friction import (
    SMOOTH_PLASTIC,
    bend_loss_hose,
    friction_factor_churchill,
    friction_loss,
)
from gyrecut.airflow.suction import (
    STANDARD_DENSITY,
    STRAIGHT,
    suction_curve_from_ends,
    suction_curve_from_points,
)
from gyrecut.catalogue import sources
from gyrecut.cli.explain_terms import Explanation, Term, source_of, term
from gyrecut.separation.air_path import hose_of

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.pipeline import Design


def air_explanations(design: Design) -> Iterator[Explanation]:
    """Explain the operating point, and what takes the pressure in the hose."""
    yield from _hose(design)
    yield from _source(design)
    yield from _balance(design)
    yield from _loading(design)


def _hose(design: Design) -> Iterator[Explanation]:
    air, clean, hose = design.air, design.forecast.clean, hose_of(design.profile)
    bore = term("D", "bore of the hose", hose.bore, "m")
    velocity = term("v", "mean velocity in the hose", clean.hose_velocity, "m/s")
    density = term("rho", "density of the air", air.density, "kg/m^3")
    yield Explanation(
        what="Air velocity in the hose",
        formula="4 * Q / (pi * D^2)",
        terms=(term("Q", "air through the machine", clean.flow, "m^3/s"), bore),
        result=velocity,
        source="Continuity; holds by definition.",
    )
    reynolds = air.density * clean.hose_velocity * hose.bore / air.viscosity
    number = term("Re", "Reynolds number of the hose", reynolds)
    yield Explanation(
        what="Reynolds number of the hose",
        formula="rho * v * D / mu",
        terms=(density, velocity, bore, term("mu", "viscosity of the air", air.viscosity, "Pa s")),
        result=number,
        source="Holds by definition.",
    )
    factor = term(
        "f",
        "friction factor of a smooth hose",
        friction_factor_churchill(reynolds, relative_roughness=hose.roughness / hose.bore),
    )
    yield Explanation(
        what="Friction factor of the hose",
        formula=(
            "8 * ((8 / Re)^12 + ((2.457 * ln(1 / ((7 / Re)^0.9 + 0.27 * e / D)))^16"
            " + (37530 / Re)^16)^(-1.5))^(1 / 12)"
        ),
        terms=(number, term("e", "roughness of a smooth wall", SMOOTH_PLASTIC, "m"), bore),
        result=factor,
        source=source_of(friction_factor_churchill),
    )
    (drop,) = (share.pressure_drop for share in clean.shares if share.name == "hose")
    yield Explanation(
        what="Pressure drop of the hose",
        formula="(w * f * L / D + n * zeta) * rho * v^2 / 2",
        terms=(
            term("w", "friction of this wall over that of a smooth one", hose.wall_factor),
            factor,
            term("L", "length of the hose", hose.length, "m"),
            bore,
            term("n", "right-angle bends", hose.bends),
            term("zeta", "loss of one bend", bend_loss_hose(hose.bore)),
            density,
            velocity,
        ),
        result=term("dp_h", "pressure drop of the hose", drop, "Pa"),
        source=source_of(friction_loss, bend_loss_hose),
    )


def _source(design: Design) -> Iterator[Explanation]:
    """Explain the suction at the operating point; nothing where the flow is only a target."""
    source, clean = design.profile.air.source, design.forecast.clean
    if source is None:
        return
    result = term("p", "suction that the source gives", clean.suction, "Pa")
    flow = term("Q", "air through the machine", clean.flow, "m^3/s")
    lighter = (
        term("rho", "density of the air", design.air.density, "kg/m^3"),
        term("rho_s", "density the curve is drawn for", STANDARD_DENSITY, "kg/m^3"),
    )
    if not isinstance(source, str) and source.points is not None:
        yield Explanation(
            what="Suction of the source",
            formula="a falling smooth curve through the points (Q_i, p_i), at Q, times rho / rho_s",
            terms=(
                flow,
                Term(
                    symbol="Q_i",
                    what="measured flows",
                    value=tuple(point.flow for point in source.points),
                    unit="m^3/s",
                ),
                Term(
                    symbol="p_i",
                    what="measured suctions",
                    value=tuple(point.suction for point in source.points),
                    unit="Pa",
                ),
                *lighter,
            ),
            result=result,
            source=f"{source_of(suction_curve_from_points)} Points: the profile.",
        )
        return
    row = sources()[source] if isinstance(source, str) else source
    yield Explanation(
        what="Suction of the source",
        formula="p_0 * (1 - (Q / Q_0)^n) * rho / rho_s",
        terms=(
            term("p_0", "suction behind a blocked hose", row.shut_off or 0.0, "Pa"),
            flow,
            term("Q_0", "flow with nothing in its way", row.open_flow or 0.0, "m^3/s"),
            term("n", "how far the curve is bent outwards", row.exponent or STRAIGHT),
            *lighter,
        ),
        result=result,
        source=source_of(suction_curve_from_ends)
        + f" Curve: {getattr(row, 'source', 'the profile')}",
    )


def _balance(design: Design) -> Iterator[Explanation]:
    expected = design.forecast
    parts = [
        term(f"p_{number}", share.name, share.pressure_drop, "Pa")
        for number, share in enumerate(expected.clean.shares, start=1)
    ]
    yield Explanation(
        what=(
            "Suction that a source has to give at the target flow"
            if expected.flow_is_target
            else "Where source and system meet: the flow at which both are equal"
        ),
        formula=" + ".join(part.symbol for part in parts),
        terms=tuple(parts),
        result=term("p", "suction", expected.clean.suction, "Pa"),
        source="Losses of total pressure in series add up.",
    )
    pick_up = parts[0]
    yield Explanation(
        what="Suction left at the tool",
        formula=f"{pick_up.symbol} + rho * v^2 / 2",
        terms=(
            pick_up,
            term("rho", "density of the air", design.air.density, "kg/m^3"),
            term("v", "mean velocity in the hose", expected.clean.hose_velocity, "m/s"),
        ),
        result=term("p_t", "static suction behind the pick-up", expected.clean.tool_suction, "Pa"),
        source="Bernoulli's law.",
    )


def _loading(design: Design) -> Iterator[Explanation]:
    feed = design.profile.dust.feed
    if feed is None:
        return
    yield Explanation(
        what="Dust in the air",
        formula="q / (Q * rho)",
        terms=(
            term("q", "dust that arrives", feed, "kg/s"),
            term("Q", "air through the machine", design.forecast.flow, "m^3/s"),
            term("rho", "density of the air", design.air.density, "kg/m^3"),
        ),
        result=term("c_0", "mass of dust in the mass of air", design.forecast.loading),
        source="Holds by definition.",
    )

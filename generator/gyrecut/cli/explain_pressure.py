"""The separator's pressure drop explained: the two models that carry it, the safe one, the dust."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.cli.explain_cut_size import arriving_loading, of_stage
from gyrecut.cli.explain_terms import Explanation, Term, source_of, term
from gyrecut.correlations.casal_martinez import inlet_velocity_heads_casal_martinez
from gyrecut.correlations.consensus import PRESSURE_BAND, central_heads
from gyrecut.correlations.dirgo_ramachandran import inlet_velocity_heads_dirgo_ramachandran
from gyrecut.correlations.heads import pressure_drop_from_heads
from gyrecut.correlations.loading import BRIGGS, pressure_drop_factor_briggs
from gyrecut.correlations.shepherd_lapple import (
    TANGENTIAL_INLET,
    inlet_velocity_heads_shepherd_lapple,
)

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.pipeline import Design, StageDesign
    from gyrecut.separation.models import Agreement

SAFE = "Shepherd and Lapple"


def pressure_explanations(design: Design, stage: StageDesign) -> Iterator[Explanation]:
    """Explain the pressure drop of one stage."""
    of, geometry, air = of_stage(design, stage), stage.geometry, design.air
    said = stage.forecast.pressure_drop
    slot = (
        term("a", "slot height", geometry.slot_height, "m"),
        term("b", "slot width", geometry.slot_width, "m"),
        term("D_e", "bore of the vortex finder", geometry.finder_diameter, "m"),
    )
    density = term("rho", "density of the air", air.density, "kg/m^3")
    velocity = term("v_i", "inlet velocity", stage.forecast.inlet_velocity, "m/s")
    models = (
        (
            "Casal and Martinez-Benet",
            "N_C",
            "11.3 * (a * b / D_e^2)^2 + 3.33",
            slot,
            inlet_velocity_heads_casal_martinez,
        ),
        (
            "Dirgo and Ramachandran",
            "N_D",
            "20 * a * b / D_e^2 * (S / D / (H / D * h / D * B / D))^(1/3)",
            (
                *slot,
                term("S", "finder length", geometry.finder_length, "m"),
                term("D", "body diameter", geometry.body_diameter, "m"),
                term("H", "total height", geometry.total_height, "m"),
                term("h", "barrel height", geometry.barrel_height, "m"),
                term("B", "dust outlet", geometry.dust_outlet_diameter, "m"),
            ),
            inlet_velocity_heads_dirgo_ramachandran,
        ),
        (
            SAFE,
            "N_S",
            f"{TANGENTIAL_INLET:.0f} * a * b / D_e^2",
            slot,
            inlet_velocity_heads_shepherd_lapple,
        ),
    )
    heads: dict[str, Term] = {}
    for name, symbol, formula, terms, model in models:
        heads[symbol] = term(symbol, f"inlet velocity heads, {name}", model(geometry))
        yield Explanation(
            what=f"{name}{of}: inlet velocity heads",
            formula=formula,
            terms=terms,
            result=heads[symbol],
            source=source_of(model),
        )
        yield Explanation(
            what=f"{name}{of}: pressure drop with clean air",
            formula=f"{symbol} * rho * v_i^2 / 2",
            terms=(heads[symbol], density, velocity),
            result=term(
                f"dp_{symbol[-1]}", "pressure drop with clean air", _word(said, name), "Pa"
            ),
            source=source_of(pressure_drop_from_heads),
        )
    content = arriving_loading(design, stage) * air.density
    relief = term("k", "drop with dust over that without", pressure_drop_factor_briggs(content))
    yield Explanation(
        what=f"Effect of the dust on the pressure drop{of}",
        formula=f"1 / (1 + {BRIGGS:.9g} * sqrt(c))",
        terms=(term("c", "dust in the air", content, "kg/m^3"),),
        result=relief,
        source=source_of(pressure_drop_factor_briggs),
    )
    central = term("dp", "central pressure drop", said.central, "Pa")
    yield Explanation(
        what=f"Pressure drop{of}, the two trusted models together",
        formula="k * (N_C + N_D) / 2 * rho * v_i^2 / 2",
        terms=(relief, heads["N_C"], heads["N_D"], density, velocity),
        result=central,
        source=source_of(central_heads, pressure_drop_factor_briggs),
    )
    band = term("w", "band that the measured cyclones ask for", PRESSURE_BAND)
    for what, sign, value in (("low", "-", said.low), ("high", "+", said.high)):
        yield Explanation(
            what=f"Pressure drop{of}: {what} end of the band",
            formula=f"dp * (1 {sign} w)",
            terms=(central, band),
            result=term(f"dp_{what}", f"{what} end of the band", value, "Pa"),
            source=source_of(central_heads),
        )


def safe_suction_explanation(design: Design) -> Explanation:
    """Explain the suction to choose a source by: the safe model in place of the trusted ones."""
    shares = {share.name: float(share.pressure_drop) for share in design.forecast.clean.shares}
    formula = "p"
    terms = [term("p", "suction at the operating point", design.forecast.clean.suction, "Pa")]
    for stage in design.stages:
        number = f"_{stage.number}" if len(design.stages) > 1 else ""
        name = f"separator {stage.number}" if number else "separator"
        formula += f" + dp_S{number} - dp{number}"
        safe = _word(stage.forecast.pressure_drop, SAFE)
        terms += [
            term(f"dp_S{number}", f"{name}, {SAFE}", safe, "Pa"),
            term(f"dp{number}", f"{name}, central, clean air", shares[name], "Pa"),
        ]
    return Explanation(
        what="Suction to choose a source by",
        formula=formula,
        terms=tuple(terms),
        result=term("p_safe", "suction", design.forecast.safe_suction, "Pa"),
        source=source_of(inlet_velocity_heads_shepherd_lapple),
    )


def _word(said: Agreement, model: str) -> float:
    (value,) = (word.value for word in said.words if word.model == model)
    if value is None:
        raise ValueError(f"{model} carries the pressure drop and is silent")
    return value

"""The cut size explained: the models that carry it, step by step, then shape, slip and band."""

from __future__ import annotations

from math import log, sqrt
from typing import TYPE_CHECKING

from gyrecut.cli.explain_terms import Explanation, source_of, term
from gyrecut.correlations.barth import (
    FRICTION_HOFFMANN_STEIN,
    LIP_ROUNDED,
    barth,
    friction_with_dust_barth,
)
from gyrecut.correlations.consensus import (
    LAMINAR_ANNULUS,
    TURBULENT_ANNULUS,
    as_physical,
    central_cut_size,
)
from gyrecut.correlations.geometry import mean_inlet_velocity
from gyrecut.correlations.muschelknautz import (
    MAIN_FLOW,
    SMOOTH_EXPONENT,
    SMOOTH_FACTOR,
    USUAL_FRICTION_FLOOR,
    constriction_muschelknautz,
    muschelknautz,
)
from gyrecut.correlations.slip import (
    SLIP_CONTINUUM,
    SLIP_MOLECULAR,
    SLIP_TRANSITION,
    mean_free_path,
    physical_cut_size,
    slip_factor_allen_raabe,
)
from gyrecut.correlations.vortex import (
    annulus_reynolds,
    core_height,
    cut_size_on_core,
    wall_area,
    wall_velocity,
)

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.airflow.ranges import Numbers
    from gyrecut.cli.explain_terms import Term
    from gyrecut.correlations.barth import BarthResult
    from gyrecut.correlations.muschelknautz import MuschelknautzResult
    from gyrecut.pipeline import Design, StageDesign

CONSTRICTION = "(1 - sqrt(1 + (x^2 - 2 * x) * sqrt(1 - (1 - x^2) * (2 * x - x^2) / (1 + c_0)))) / x"


def of_stage(design: Design, stage: StageDesign) -> str:
    """Tell stages apart where there are several."""
    return f" of stage {stage.number}" if len(design.stages) > 1 else ""


def arriving_loading(design: Design, stage: StageDesign) -> float:
    """Mass of dust in the mass of air that reaches a stage [-]."""
    before = design.stages[: stage.number - 1]
    return design.forecast.loading * (1 - sum(one.forecast.kept for one in before))


class _Symbols:
    """The terms of one stage, and the results of the models that carry its cut size."""

    def __init__(self, design: Design, stage: StageDesign) -> None:
        geometry, air, dust = stage.geometry, design.air, design.dust
        self.geometry, self.air, self.of = geometry, air, of_stage(design, stage)
        self.loading = arriving_loading(design, stage)
        self.state = {
            "flow": stage.flow,
            "particle_density": dust.particle_density,
            "air_density": air.density,
            "viscosity": air.viscosity,
        }
        self.shape_factor = dust.shape_factor
        self.flow = term("Q", "air through one body", stage.flow, "m^3/s")
        self.inlet = term("v_i", "inlet velocity", stage.forecast.inlet_velocity, "m/s")
        self.body = term("R", "radius of the body", geometry.body_diameter / 2, "m")
        self.finder = term("R_x", "radius of the vortex finder", geometry.finder_diameter / 2, "m")
        self.slot = term("b", "slot width", geometry.slot_width, "m")
        self.dusty = term("c_0", "mass of dust in the mass of air", self.loading)
        self.density = term("rho", "density of the air", air.density, "kg/m^3")
        self.viscosity = term("mu", "viscosity of the air", air.viscosity, "Pa s")
        self.grain = term("rho_p", "density of a grain", dust.particle_density, "kg/m^3")


def cut_size_explanations(design: Design, stage: StageDesign) -> Iterator[Explanation]:
    """Explain the central cut size of one stage, from the inlet velocity on."""
    s, geometry = _Symbols(design, stage), stage.geometry
    yield Explanation(
        what=f"Inlet velocity{s.of}",
        formula="Q / (a * b)",
        terms=(s.flow, term("a", "slot height", geometry.slot_height, "m"), s.slot),
        result=s.inlet,
        source=source_of(mean_inlet_velocity),
    )
    ring = float(
        annulus_reynolds(
            geometry, flow=stage.flow, air_density=s.air.density, viscosity=s.air.viscosity
        )
    )
    reynolds = term(
        "Re",
        f"below {LAMINAR_ANNULUS:.0f} the smooth wall is believed, above {TURBULENT_ANNULUS:.0f} "
        "the two models with a fixed friction, between the one fades into the other",
        ring,
    )
    yield Explanation(
        what=f"Annulus Reynolds number{s.of}, which decides whom to believe",
        formula="rho * v_i * (R - R_x) / mu",
        terms=(s.density, s.inlet, s.body, s.finder, s.viscosity),
        result=reynolds,
        source=source_of(annulus_reynolds),
    )
    fade = log(ring / LAMINAR_ANNULUS) / log(TURBULENT_ANNULUS / LAMINAR_ANNULUS)
    share = min(max(fade, 0.0), 1.0)
    if share > 0:
        yield from _muschelknautz(s, "Muschelknautz, f >= 0.005", USUAL_FRICTION_FLOOR, "d_M")
        yield from _barth(s)
    if share < 1:
        yield from _muschelknautz(s, "Muschelknautz, smooth wall", 0.0, "d_S")
    yield from _combined(s, stage, share)


def _muschelknautz(s: _Symbols, name: str, floor: float, symbol: str) -> Iterator[Explanation]:
    said, geometry = _by_muschelknautz(s, floor), s.geometry
    x = term("x", "slot width over radius", geometry.slot_width / (geometry.body_diameter / 2))
    squeezed = term("alpha", "share of the slot width that the jet keeps", said.constriction)
    at_wall = term("v_w", "velocity beside the wall", said.wall_velocity, "m/s")
    area = term("A_R", "area of all walls", said.wall_area, "m^2")
    friction = term("f", "wall friction", said.friction)
    at_core = term("v_CS", "velocity at the core", said.core_velocity, "m/s")
    reynolds = term("Re_b", "body Reynolds number", said.reynolds)
    whole = source_of(muschelknautz)
    yield Explanation(
        what=f"{name}{s.of}: constriction of the inlet jet",
        formula=CONSTRICTION,
        terms=(x, s.dusty),
        result=squeezed,
        source=source_of(constriction_muschelknautz),
    )
    yield Explanation(
        what=f"{name}{s.of}: velocity beside the wall",
        formula="v_i * (R - b / 2) / (alpha * R)",
        terms=(s.inlet, s.body, s.slot, squeezed),
        result=at_wall,
        source=source_of(wall_velocity),
    )
    outlet = term("R_d", "radius of the dust outlet", geometry.dust_outlet_diameter / 2, "m")
    barrel = term("h", "barrel height", geometry.barrel_height, "m")
    total = term("H", "total height", geometry.total_height, "m")
    length = term("S", "finder length", geometry.finder_length, "m")
    yield Explanation(
        what=f"{name}{s.of}: area of all walls",
        formula=(
            "pi * (R^2 - R_x^2 + 2 * R * h + (R + R_d) * sqrt((H - h)^2 + (R - R_d)^2)"
            " + 2 * R_x * S)"
        ),
        terms=(s.body, s.finder, outlet, barrel, total, length),
        result=area,
        source=source_of(wall_area),
    )
    yield Explanation(
        what=f"{name}{s.of}: wall friction, which friction and core velocity fix together",
        formula=f"max(f_min, {SMOOTH_FACTOR} * Re_b^({SMOOTH_EXPONENT}))",
        terms=(term("f_min", "least friction", floor), reynolds),
        result=friction,
        source=whole,
    )
    yield Explanation(
        what=f"{name}{s.of}: velocity at the core",
        formula="v_w * R / R_x / (1 + f * A_R * v_w * sqrt(R / R_x) / (2 * Q))",
        terms=(at_wall, s.body, s.finder, friction, area, s.flow),
        result=at_core,
        source=whole,
    )
    yield Explanation(
        what=f"{name}{s.of}: cut size of spheres without slip",
        formula=f"sqrt(18 * mu * {MAIN_FLOW} * Q / (2 * pi * (rho_p - rho) * v_CS^2 * (H - S)))",
        terms=(s.viscosity, s.flow, s.grain, s.density, at_core, total, length),
        result=term(symbol, "cut size of spheres", said.cut_size, "m"),
        source=whole,
    )


def _barth(s: _Symbols) -> Iterator[Explanation]:
    said, geometry = _by_barth(s), s.geometry
    squeezed = term("alpha", "share of the slot width that the jet keeps", said.constriction)
    at_wall = term("v_w", "velocity beside the wall", said.wall_velocity, "m/s")
    friction = term("f", "wall friction with dust", _barth_friction(s))
    height = term("H_CS", "height of the core below the finder", said.core_height, "m")
    at_core = term("v_CS", "velocity at the core", said.core_velocity, "m/s")
    whole = source_of(barth)
    yield Explanation(
        what=f"Barth{s.of}: constriction of the inlet jet",
        formula="1 - 0.4 * sqrt(b / R)",
        terms=(s.slot, s.body),
        result=squeezed,
        source=whole,
    )
    yield Explanation(
        what=f"Barth{s.of}: velocity beside the wall",
        formula="v_i * (R - b / 2) / (alpha * R)",
        terms=(s.inlet, s.body, s.slot, squeezed),
        result=at_wall,
        source=source_of(wall_velocity),
    )
    yield Explanation(
        what=f"Barth{s.of}: wall friction with dust in the air",
        formula="f_0 * (1 + 3 * sqrt(c_0))",
        terms=(term("f_0", "wall friction of clean air", FRICTION_HOFFMANN_STEIN), s.dusty),
        result=friction,
        source=source_of(friction_with_dust_barth),
    )
    yield Explanation(
        what=f"Barth{s.of}: height of the core",
        formula="h - S + (H - h) * min(1, (R - R_x) / (R - R_d))",
        terms=(
            term("h", "barrel height", geometry.barrel_height, "m"),
            term("S", "finder length", geometry.finder_length, "m"),
            term("H", "total height", geometry.total_height, "m"),
            s.body,
            s.finder,
            term("R_d", "radius of the dust outlet", geometry.dust_outlet_diameter / 2, "m"),
        ),
        result=height,
        source=source_of(core_height),
    )
    yield Explanation(
        what=f"Barth{s.of}: velocity at the core",
        formula="v_w * R / R_x / (1 + pi * f * H_CS * R * v_w / Q)",
        terms=(at_wall, s.body, s.finder, friction, height, s.flow),
        result=at_core,
        source=whole,
    )
    yield Explanation(
        what=f"Barth{s.of}: cut size of spheres without slip",
        formula="sqrt(9 * mu * Q / (pi * (rho_p - rho) * v_CS^2 * H_CS))",
        terms=(s.viscosity, s.flow, s.grain, s.density, at_core, height),
        result=term("d_B", "cut size of spheres", said.cut_size, "m"),
        source=source_of(cut_size_on_core),
    )


def _combined(s: _Symbols, stage: StageDesign, share: float) -> Iterator[Explanation]:
    said = stage.forecast.cut_size
    consensus = central_cut_size(
        s.geometry,
        flow=s.state["flow"],
        particle_density=s.state["particle_density"],
        shape_factor=s.shape_factor,
        loading=s.loading,
        air=s.air,
    )
    above, below = 1.0, 1.0
    terms: list[Term] = []
    if share > 0:
        of_muschelknautz = float(_by_muschelknautz(s, USUAL_FRICTION_FLOOR).cut_size)
        of_barth = float(_by_barth(s).cut_size)
        above = sqrt(of_muschelknautz * of_barth)
        terms += [
            term("d_M", "Muschelknautz, f >= 0.005", of_muschelknautz, "m"),
            term("d_B", "Barth", of_barth, "m"),
        ]
    if share < 1:
        below = float(_by_muschelknautz(s, 0.0).cut_size)
        terms.append(term("d_S", "Muschelknautz, smooth wall", below, "m"))
    formula = "sqrt(d_M * d_B)" if share == 1 else "d_S"
    if 0 < share < 1:
        formula = "sqrt(d_M * d_B)^w * d_S^(1 - w)"
        terms.append(term("w", "share of the turbulent answer", share))
    spheres = term(
        "d_St",
        "central cut size of spheres without slip",
        above**share * below ** (1 - share),
        "m",
    )
    yield Explanation(
        what=f"Cut size of spheres{s.of}, the models together",
        formula=formula,
        terms=tuple(terms),
        result=spheres,
        source=source_of(central_cut_size),
    )
    path = mean_free_path(s.air.temperature, pressure=s.air.pressure)
    free_path = term("l", "mean free path of the air", path, "m")
    slip = term(
        "C",
        "slip factor at the cut size",
        slip_factor_allen_raabe(said.central, mean_free_path=path),
    )
    central = term("d_50", "grain caught by half", said.central, "m")
    yield Explanation(
        what=f"Slip between the molecules of the air{s.of}",
        formula=(
            f"1 + 2 * l / d_50 * ({SLIP_CONTINUUM} + {SLIP_MOLECULAR}"
            f" * exp(-{SLIP_TRANSITION} * d_50 / (2 * l)))"
        ),
        terms=(free_path, central),
        result=slip,
        source=source_of(slip_factor_allen_raabe, mean_free_path),
    )
    yield Explanation(
        what=f"Cut size{s.of}: shape and slip of the grains",
        formula="d_St * sqrt(chi / C)",
        terms=(spheres, term("chi", "drag of a grain over a sphere's", s.shape_factor), slip),
        result=central,
        source=source_of(as_physical, physical_cut_size),
    )
    factor = term("k", "factor that the measured cyclones ask for", consensus.factor)
    for what, sign, value in (("fine", "/", said.low), ("coarse", "*", said.high)):
        yield Explanation(
            what=f"Cut size{s.of}: {what} end of the band",
            formula=f"d_50 {sign} k",
            terms=(central, factor),
            result=term(f"d_{what}", f"{what} end of the band", value, "m"),
            source=source_of(central_cut_size),
        )


def _barth_friction(s: _Symbols) -> Numbers:
    return friction_with_dust_barth(clean_friction=FRICTION_HOFFMANN_STEIN, loading=s.loading)


def _by_barth(s: _Symbols) -> BarthResult:
    return barth(s.geometry, **s.state, friction=_barth_friction(s), lip_loss=LIP_ROUNDED)


def _by_muschelknautz(s: _Symbols, floor: float) -> MuschelknautzResult:
    return muschelknautz(
        s.geometry, **s.state, loading=s.loading, friction_floor=floor, dust_friction=0.0
    )

"""The catch explained: the grade curve, its sum over the dust, and how long the bin lasts."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np

from gyrecut.cli.explain_cut_size import of_stage
from gyrecut.cli.explain_terms import Explanation, Term, source_of, term
from gyrecut.correlations.consensus import SLOPE, SLOPE_HIGH, SLOPE_LOW, central_cut_size
from gyrecut.correlations.grade import grade_efficiency_with_slope
from gyrecut.separation.chain import LEAK_THAT_SPOILS_ALL, through
from gyrecut.separation.forecast import BIN_FILL, CLASSES
from gyrecut.separation.sizes import sizes_of
from gyrecut.separation.uncertainty import Doubt

if TYPE_CHECKING:
    from collections.abc import Iterator

    from numpy.typing import NDArray

    from gyrecut.pipeline import Design, StageDesign


def grade_explanations(design: Design, stage: StageDesign) -> Iterator[Explanation]:
    """Explain what one stage keeps: one point of its grade curve, and the sum over all sizes."""
    of, dust = of_stage(design, stage), design.dust
    passing = design.forecast.catch.passing_median
    central = term("d_50", "cut size", stage.forecast.cut_size.central, "m")
    slope = term("m", "slope of the grade curve", SLOPE)
    yield Explanation(
        what=f"Grade curve{of}, at the median of what passes in the end",
        formula="1 / (1 + (d_50 / d)^m)",
        terms=(central, term("d", "median of what passes", passing, "m"), slope),
        result=term(
            "eta",
            "share of these grains kept",
            grade_efficiency_with_slope(
                passing, cut_size=stage.forecast.cut_size.central, slope=SLOPE
            ),
        ),
        source=source_of(grade_efficiency_with_slope),
    )
    bins = sizes_of(design.profile.dust, dust).mass_bins(CLASSES)
    sound = max(0.0, 1 - design.profile.air.bin_leak / LEAK_THAT_SPOILS_ALL)
    yield Explanation(
        what=f"Share of the dust's mass kept{' by stage ' + str(stage.number) if of else ''}",
        formula="s * sum(m_i / (1 + (d_50 / d_i)^m))",
        terms=(
            term("s", "what a leaking bin leaves of the catch, 1 for a tight one", sound),
            Term(
                symbol="m_i",
                what="share of the whole mass in each size class that arrives",
                value=tuple(_arriving(design, stage, bins.sizes, bins.masses, sound).tolist()),
            ),
            central,
            Term(symbol="d_i", what="sizes", value=tuple(bins.sizes.tolist()), unit="m"),
            slope,
        ),
        result=term("E", "share of the whole mass kept", stage.forecast.kept),
        source=f"{source_of(through)} Dust: {dust.source}",
    )


def catch_explanations(design: Design) -> Iterator[Explanation]:
    """Explain the catch of the whole machine, and when the bin is full."""
    catch, several = design.forecast.catch, len(design.stages) > 1
    kept = term("K", "share of the mass kept in all", catch.kept)
    if several:
        each = [
            term(f"E_{stage.number}", f"kept by stage {stage.number}", stage.forecast.kept)
            for stage in design.stages
        ]
        yield Explanation(
            what="Share of the dust's mass kept by all stages",
            formula=" + ".join(one.symbol for one in each),
            terms=tuple(each),
            result=kept,
            source=source_of(through),
        )
    yield _spread(design)
    feed = design.profile.dust.feed
    if feed is None or catch.bin_fill_time is None:
        return
    yield Explanation(
        what="Working time to a full bin",
        formula="F * V * rho_b / (q * K)",
        terms=(
            term("F", "share of its volume a bin is used to; common practice, no source", BIN_FILL),
            term("V", "volume of the bin", design.profile.bin.volume, "m^3"),
            term("rho_b", "density of the heap", design.dust.bulk_density, "kg/m^3"),
            term("q", "dust that arrives", feed, "kg/s"),
            kept,
        ),
        result=term("t", "time", catch.bin_fill_time, "s"),
        source=f"Mass balance. Dust: {design.dust.source}",
    )


def _spread(design: Design) -> Explanation:
    spread, doubt = design.forecast.catch.spread, Doubt()
    cut_sizes = [stage.forecast.cut_size for stage in design.stages]
    return Explanation(
        what="90 % range of the share kept",
        formula=(
            "5th and 95th percentile of K over n draws, in each of which every input is multiplied "
            "by a random factor (log-normal), 9 of 10 of them between 1 / k and k"
        ),
        terms=(
            term("n", "draws", spread.draws),
            term("seed", "the same seed draws the same", spread.seed),
            term(
                "k_d",
                "cut size: the band of the measured cyclones, one factor for all stages",
                max(cut.high / cut.central for cut in cut_sizes),
            ),
            term("k_m", "median of the dust", doubt.median),
            term("k_s", "spread of the dust", doubt.spread),
            term("k_rho", "density of a grain", doubt.density),
            term("k_Q", "air flow", doubt.flow),
            term("k_f", "wall friction", doubt.friction),
            term("m_low", "flattest grade curve drawn", SLOPE_LOW),
            term("m_high", "steepest grade curve drawn", SLOPE_HIGH),
        ),
        result=Term(
            symbol="K_90", what="low and high end of the range", value=(spread.low, spread.high)
        ),
        source=f"{source_of(central_cut_size)} Factors of the inputs: common practice, no source.",
    )


def _arriving(
    design: Design,
    stage: StageDesign,
    sizes: NDArray[np.float64],
    masses: NDArray[np.float64],
    sound: float,
) -> NDArray[np.float64]:
    """Share of the whole mass in each class that the stages before leave over."""
    for before in design.stages[: stage.number - 1]:
        grade = grade_efficiency_with_slope(
            sizes, cut_size=before.forecast.cut_size.central, slope=SLOPE
        )
        masses = masses * (1 - sound * np.asarray(grade))
    return masses

"""The flat lid under suction: whether it breaks, and whether it dishes off its gasket."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.findings import Finding, Severity
from gyrecut.strength.plates import deflection_holed_supported, stress_holed_supported
from gyrecut.strength.ranges import THIN_PLATE
from gyrecut.strength.verdicts import HELD_SHARE, KPA, SEAMS, as_thin, least_mm, verdict

if TYPE_CHECKING:
    from collections.abc import Iterator

    from gyrecut.proportions.dimensions import Dimensions
    from gyrecut.strength.inputs import StrengthInputs

MM = 1000.0
MPA = 1e6
THICKEST_MM = 60.0
LINEAR_SHARE = 0.5  # of its thickness, to which a plate's deflection follows its load


def lid_holds_to(d: Dimensions, inputs: StrengthInputs) -> float:
    """Suction at which the lid breaks at its hole, held for hours [Pa]."""
    return _strength(d, inputs) / _stress(d, inputs, 1.0, d.lid.thickness_mm)


def lid_findings(d: Dimensions, inputs: StrengthInputs) -> Iterator[Finding]:
    """Hold the lid against the design suction.

    Parameters
    ----------
    d : Dimensions
    inputs : StrengthInputs

    Yields
    ------
    Finding
        On its stress and on its deflection, as a plate that lies loose on the barrel and has a
        free hole: screws and the finder's collar make a real one stiffer.
    """
    suction, factor = inputs.design_suction, inputs.safety_factor
    thickness = d.lid.thickness_mm
    stress = _stress(d, inputs, suction, thickness)
    bears = _strength(d, inputs)

    def strong_mm() -> float | None:
        return least_mm(
            lambda t: bears >= factor * _stress(d, inputs, suction, t),
            low_mm=0.4,
            high_mm=THICKEST_MM,
        )

    yield verdict(
        ("lid-holds", "lid-breaks"),
        bears / stress,
        factor,
        part="lid",
        what=(
            f"At {suction / KPA:.1f} kPa the lid is stressed to {stress / MPA:.1f} MPa round the "
            f"finder; held for hours it bears {bears / MPA:.1f} MPa."
        ),
        where="as a loose plate with a free hole",
        fix=lambda: _thicker(strong_mm()),
    )
    sunk = _sunk_mm(d, inputs, thickness)
    stays = sunk <= LINEAR_SHARE * thickness

    def flat_mm() -> float | None:
        return least_mm(
            lambda t: _sunk_mm(d, inputs, t) <= LINEAR_SHARE * t, low_mm=0.4, high_mm=THICKEST_MM
        )

    yield Finding(
        code="lid-stays-flat" if stays else "lid-dishes",
        severity=Severity.NOTE if stays else Severity.WARN,
        part="lid",
        what=(
            f"At {suction / KPA:.1f} kPa the lid sinks this far round the finder."
            if stays
            else f"At {suction / KPA:.1f} kPa the lid dishes so far that its gasket can leak."
        ),
        measured=sunk,
        limit=LINEAR_SHARE * thickness,
        unit="mm",
        where="round the finder, against half of the lid's thickness",
        fix="" if stays else _thicker(flat_mm()),
    )


def _thicker(thickness_mm: float | None) -> str:
    if thickness_mm is None:
        return "Choose a smaller body or a stronger material."
    return f"Give a walls.lid of at least {thickness_mm:.1f} mm."


def _strength(d: Dimensions, inputs: StrengthInputs) -> float:
    # The lid prints lying down, so it bends along its layers; sectors are glued.
    glued = SEAMS if d.division.lid_sectors > 1 else 1.0
    return HELD_SHARE * glued * inputs.polymer.strength_along


def _stress(d: Dimensions, inputs: StrengthInputs, suction: float, thickness_mm: float) -> float:
    across = 2 * d.body.outer_radius_mm / MM
    return float(
        stress_holed_supported(
            pressure=suction,
            poisson=inputs.polymer.poisson_ratio,
            thickness=as_thin(thickness_mm / MM, across, THIN_PLATE),
            diameter=across,
            hole=d.lid.finder_hole_mm / MM,
        )
    )


def _sunk_mm(d: Dimensions, inputs: StrengthInputs, thickness_mm: float) -> float:
    across = 2 * d.body.outer_radius_mm / MM
    return MM * float(
        deflection_holed_supported(
            pressure=inputs.design_suction,
            modulus=inputs.polymer.modulus * inputs.polymer.creep_ratio,
            poisson=inputs.polymer.poisson_ratio,
            thickness=as_thin(thickness_mm / MM, across, THIN_PLATE),
            diameter=across,
            hole=d.lid.finder_hole_mm / MM,
        )
    )

"""All measures of one piece in one pass, and the findings they give."""

from __future__ import annotations

from dataclasses import dataclass
from math import cos, radians
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.checks.captive import Cup, cup_findings, measure_cups
from gyrecut.checks.closed import Closedness, closedness_findings, measure_closedness
from gyrecut.checks.contact import Stance, measure_stance, stance_findings
from gyrecut.checks.features import Features, feature_findings, measure_features
from gyrecut.checks.fit import fit_findings
from gyrecut.checks.opposed import opposed
from gyrecut.checks.overhang import Overhang, measure_overhang, overhang_findings
from gyrecut.checks.print_estimate import (
    FilamentSettings,
    PrintEstimate,
    ResinSettings,
    print_estimate,
)
from gyrecut.checks.rays import RayCaster
from gyrecut.checks.sampling import spread_samples
from gyrecut.checks.surface import surface_of
from gyrecut.checks.thickness import Thickness, measure_thickness, thickness_findings

LEVEL = cos(radians(45.0))

if TYPE_CHECKING:
    import trimesh

    from gyrecut.checks.limits import PrintLimits
    from gyrecut.findings import Finding


@dataclass(frozen=True, slots=True, kw_only=True)
class PieceMeasures:
    """What was measured on one piece in print pose.

    Parameters
    ----------
    closedness : Closedness
        How the surface closes.
    solid : SolidMeasures or None
        The rest; None when the mesh is not one closed body and nothing else means anything.
    """

    closedness: Closedness
    solid: SolidMeasures | None


@dataclass(frozen=True, slots=True, kw_only=True)
class SolidMeasures:
    """What only one closed body can be asked.

    Parameters
    ----------
    size_mm : tuple of 3 float
        Bounding box [mm]; the last is the print height.
    volume_mm3 : float
        Volume [mm3].
    area_mm2 : float
        Surface [mm2].
    level_mm2 : float
        What of it looks up or down more than sideways [mm2].
    triangles : int
        Triangles of the mesh.
    thickness : Thickness
        Smallest wall and its place.
    features : Features
        Gaps, holes, pins and details that are too small.
    overhang : Overhang
        Overhang area and bridges.
    stance : Stance
        Bed contact and centre of mass.
    cups : tuple of Cup
        Hollows that hold resin, the largest first; not looked for on a filament printer.
    """

    size_mm: tuple[float, float, float]
    volume_mm3: float
    area_mm2: float
    level_mm2: float
    triangles: int
    thickness: Thickness
    features: Features
    overhang: Overhang
    stance: Stance
    cups: tuple[Cup, ...]


def measure_mesh(mesh: trimesh.Trimesh, limits: PrintLimits) -> PieceMeasures:
    """Measure one piece.

    Parameters
    ----------
    mesh : trimesh.Trimesh
        The piece in print pose, +z up, standing on z = 0, equal vertices merged [mm].
    limits : PrintLimits
        The limits; they steer what is looked for, the verdict is `findings_of`.

    Returns
    -------
    PieceMeasures
        The same for the same mesh, each time.
    """
    surface = surface_of(mesh)
    closedness = measure_closedness(surface)
    if not closedness.is_one_body:
        return PieceMeasures(closedness=closedness, solid=None)
    caster, samples = RayCaster(surface), spread_samples(surface)
    outward = surface.normals[samples.triangle]
    walls = opposed(samples, caster, -outward)
    gaps = opposed(samples, caster.in_the_air(), outward)
    area = float(surface.areas.sum())
    width, depth, height = (
        surface.corners.max(axis=(0, 1)) - surface.corners.min(axis=(0, 1))
    ).tolist()
    return PieceMeasures(
        closedness=closedness,
        solid=SolidMeasures(
            size_mm=(width, depth, height),
            volume_mm3=closedness.volume_mm3,
            area_mm2=area,
            level_mm2=float(surface.areas[np.abs(surface.normals[:, 2]) > LEVEL].sum()),
            triangles=len(surface.faces),
            thickness=measure_thickness(caster, walls, limits.smallest_wall_mm, area),
            features=measure_features(caster, walls, gaps, limits),
            overhang=measure_overhang(surface, limits.overhang_limit, limits.bridge_limit_mm),
            stance=measure_stance(surface, caster),
            cups=measure_cups(surface, caster) if limits.process == "resin" else (),
        ),
    )


def findings_of(measures: PieceMeasures, piece: str, limits: PrintLimits) -> tuple[Finding, ...]:
    """Hold the measures of one piece against the limits."""
    findings = closedness_findings(measures.closedness, piece, limits)
    solid = measures.solid
    if solid is None:
        return findings
    return (
        *findings,
        *fit_findings(solid.size_mm, piece, limits),
        *stance_findings(solid.stance, piece, limits),
        *thickness_findings(solid.thickness, piece, limits),
        *feature_findings(solid.features, piece, limits),
        *overhang_findings(solid.overhang, piece, limits),
        *cup_findings(solid.cups, piece),
    )


def check_mesh(mesh: trimesh.Trimesh, piece_name: str, limits: PrintLimits) -> tuple[Finding, ...]:
    """Measure one piece and say what is wrong with it."""
    return findings_of(measure_mesh(mesh, limits), piece_name, limits)


def estimate_for(
    measures: PieceMeasures, *, settings: FilamentSettings | ResinSettings, density: float
) -> PrintEstimate | None:
    """Estimate what a measured piece takes to print; None where it is no closed body."""
    solid = measures.solid
    if solid is None:
        return None
    return print_estimate(
        volume_mm3=solid.volume_mm3,
        area_mm2=solid.area_mm2,
        level_mm2=solid.level_mm2,
        height_mm=solid.size_mm[2],
        settings=settings,
        density=density,
    )

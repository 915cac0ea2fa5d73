"""Time of the checks of one piece, and of our inscribed balls against trimesh's.

Run it by hand: `python tests/bench/bench_checks.py`. It prints ratios, so that the machine cancels
out: trimesh's `thickness(..., method="max_sphere")` by our balls at the same places, and by the
wall check for one place. Trimesh is asked for only some places, since on fine meshes its memory
grows out of hand. Goals: at least 5 for the balls; all checks of a piece of 20 000 triangles in
0.15 s on one core.
"""

from __future__ import annotations

from dataclasses import replace
from functools import partial
from math import radians
from time import perf_counter
from typing import TYPE_CHECKING

import trimesh

from gyrecut.checks import PrintLimits, measure_mesh
from gyrecut.checks.captive import measure_cups
from gyrecut.checks.closed import measure_closedness
from gyrecut.checks.contact import measure_stance
from gyrecut.checks.features import measure_features
from gyrecut.checks.inscribed import inscribed_balls
from gyrecut.checks.neighbours import measure_nearness
from gyrecut.checks.opposed import opposed
from gyrecut.checks.overhang import measure_overhang
from gyrecut.checks.rays import RayCaster
from gyrecut.checks.sampling import spread_samples
from gyrecut.checks.surface import surface_of
from gyrecut.checks.thickness import measure_thickness

if TYPE_CHECKING:
    from collections.abc import Callable

ROUNDS = 7
BALLS = 100
LIMITS = PrintLimits(
    build_volume_mm=(250.0, 250.0, 250.0),
    margin_mm=5.0,
    smallest_wall_mm=0.8,
    overhang_limit=radians(45),
    bridge_limit_mm=8.0,
    process="filament",
    line_width_mm=0.4,
    clearance_mm=0.2,
)
RESIN = replace(LIMITS, process="resin", smallest_wall_mm=1.0, line_width_mm=0.05)


def best(work: Callable[[], object], rounds: int = ROUNDS) -> float:
    """Least time of several rounds [s]: the rest is the machine's other business."""
    times = []
    for _ in range(rounds):
        start = perf_counter()
        work()
        times.append(perf_counter() - start)
    return min(times)


def pieces() -> dict[str, trimesh.Trimesh]:
    """Make closed pieces of about 1000 to 20 000 triangles."""
    barrel = trimesh.creation.annulus(97.6, 100, 240, sections=126)
    fine = trimesh.creation.annulus(97.6, 100, 240, sections=2500)
    ring = trimesh.creation.torus(90, 6, major_sections=200, minor_sections=50)
    profile = [[0, 0], [45, 0], [50, 5], [50, 100], [47, 100], [47, 6], [44, 4], [0, 4]]
    cup = trimesh.creation.revolve(profile, sections=1500)
    for mesh in (barrel, fine, ring, cup):
        mesh.apply_translation([0, 0, -mesh.bounds[0, 2]])
    return {"barrel": barrel, "fine barrel": fine, "ring": ring, "cup": cup}


def main() -> None:
    """Print one table."""
    for name, mesh in pieces().items():
        surface, samples = surface_of(mesh), spread_samples(surface_of(mesh))
        caster, outward = RayCaster(surface), surface.normals[samples.triangle]
        walls = opposed(samples, caster, -outward)
        gaps = opposed(samples, caster.in_the_air(), outward)
        area = float(surface.areas.sum())
        above = mesh.copy()
        above.apply_translation([0, 0, mesh.extents[2] + 0.2])
        parts: dict[str, Callable[[], object]] = {
            "surface": partial(surface_of, mesh),
            "closed": partial(measure_closedness, surface),
            "rays": partial(RayCaster, surface),
            "thickness": partial(measure_thickness, caster, walls, LIMITS.smallest_wall_mm, area),
            "features": partial(measure_features, caster, walls, gaps, LIMITS),
            "overhang": partial(
                measure_overhang, surface, LIMITS.overhang_limit, LIMITS.bridge_limit_mm
            ),
            "stance": partial(measure_stance, surface, caster),
            "cups": partial(measure_cups, surface, caster),
            "all, filament": partial(measure_mesh, mesh, LIMITS),
            "all, resin": partial(measure_mesh, mesh, RESIN),
            "with a neighbour": partial(measure_nearness, mesh, above),
        }
        times = {part: best(work) for part, work in parts.items()}
        some = slice(None, None, len(samples.places) // BALLS)
        places, normals = samples.places[some], outward[some]
        theirs = partial(trimesh.proximity.thickness, mesh, places, normals=normals)
        balls = best(partial(theirs, method="max_sphere"), rounds=1)
        few = best(partial(inscribed_balls, caster, places, -normals))
        many = best(partial(inscribed_balls, caster, samples.places, -outward))
        print(f"{name}: {len(surface.faces)} triangles, {len(samples.places)} places")  # noqa: T201
        print("  " + ", ".join(f"{part} {time * 1e3:.1f} ms" for part, time in times.items()))  # noqa: T201
        print(  # noqa: T201
            f"  max_sphere / our balls, same {len(places)} places: {balls / few:.0f}; "
            f"a place, of all: {balls / len(places) / (many / len(samples.places)):.0f}"
        )
        wall = (times["rays"] + times["thickness"]) / len(samples.places)
        print(f"  max_sphere / wall check, a place: {balls / len(places) / wall:.0f}")  # noqa: T201


if __name__ == "__main__":
    main()

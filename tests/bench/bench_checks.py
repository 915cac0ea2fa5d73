"""Time of the checks of one piece, and of the wall check against maximal inscribed balls.

Run it by hand: `python tests/bench/bench_checks.py`. It prints a ratio, so that the machine
cancels out: trimesh's `thickness(..., method="max_sphere")` by ours, both for one place. The balls
are asked for only some of the places, since on fine meshes their memory grows out of hand.
"""

from __future__ import annotations

from functools import partial
from math import radians
from time import perf_counter
from typing import TYPE_CHECKING

import trimesh

from gyrecut.checks import PrintLimits, measure_mesh
from gyrecut.checks.closed import measure_closedness
from gyrecut.checks.contact import measure_stance
from gyrecut.checks.overhang import measure_overhang
from gyrecut.checks.surface import surface_of
from gyrecut.checks.thickness import measure_thickness, spread_samples

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
)


def best(work: Callable[[], object], rounds: int = ROUNDS) -> float:
    """Least time of several rounds [s]: the rest is the machine's other business."""
    times = []
    for _ in range(rounds):
        start = perf_counter()
        work()
        times.append(perf_counter() - start)
    return min(times)


def pieces() -> dict[str, trimesh.Trimesh]:
    """Make closed pieces of about 500 to 20 000 triangles."""
    barrel = trimesh.creation.annulus(97.6, 100, 240, sections=126)
    fine = trimesh.creation.annulus(97.6, 100, 240, sections=2500)
    ring = trimesh.creation.torus(90, 6, major_sections=200, minor_sections=50)
    for mesh in (barrel, fine, ring):
        mesh.apply_translation([0, 0, -mesh.bounds[0, 2]])
    return {"barrel": barrel, "fine barrel": fine, "ring": ring}


def main() -> None:
    """Print one table."""
    for name, mesh in pieces().items():
        surface = surface_of(mesh)
        parts = {
            "surface": best(partial(surface_of, mesh)),
            "closed": best(partial(measure_closedness, surface)),
            "thickness": best(partial(measure_thickness, surface, LIMITS.smallest_wall_mm)),
            "overhang": best(
                partial(measure_overhang, surface, LIMITS.overhang_limit, LIMITS.bridge_limit_mm)
            ),
            "stance": best(partial(measure_stance, surface)),
            "all": best(partial(measure_mesh, mesh, LIMITS)),
        }
        places, triangle = spread_samples(surface)
        some = slice(None, None, len(places) // BALLS)
        normals = surface.normals[triangle[some]]
        inscribed = partial(trimesh.proximity.thickness, mesh, places[some], normals=normals)
        balls = best(partial(inscribed, method="max_sphere"), rounds=1)
        print(f"{name}: {len(surface.faces)} triangles, {len(places)} places")  # noqa: T201
        print("  " + ", ".join(f"{part} {time * 1e3:.1f} ms" for part, time in parts.items()))  # noqa: T201
        ratio = balls / len(places[some]) / (parts["thickness"] / len(places))
        print(f"  max_sphere / thickness, a place: {ratio:.0f}")  # noqa: T201


if __name__ == "__main__":
    main()

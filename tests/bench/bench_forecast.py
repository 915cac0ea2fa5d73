"""100,000 designs through every model and the consensus: `python tests/bench/bench_forecast.py`.

One thread. Bodies of 60 to 600 mm, each length drawn for itself between the least and the most of
the published families, so that no two designs are similar; what a model does not cover is counted,
and not taken for a result. Designs go through in chunks, so that memory depends on the chunk and
not on their number: the run is repeated with half of the designs, and both peaks are printed.
The closed-form models together should reach 500,000 designs a second and core; those that iterate
(Muschelknautz, and with it the consensus; slip) are printed apart.
"""

from __future__ import annotations

import resource
import tracemalloc
from dataclasses import dataclass
from functools import partial
from time import process_time
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.airflow.air import air_state
from gyrecut.catalogue import families
from gyrecut.correlations.consensus import as_physical, central_cut_size, central_heads
from gyrecut.correlations.geometry import RATIOS, CycloneGeometry
from gyrecut.correlations.side_by_side import CUT_SIZE_MODELS, HEADS_MODELS, Conditions

if TYPE_CHECKING:
    from collections.abc import Callable, Iterator

    from numpy.typing import NDArray

    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.side_by_side import Model

DESIGNS = 100_000
CHUNK = 5_000
SEED = 1
ROUNDS = 3
GOAL = 500_000
ITERATED = ("Muschelknautz", "consensus", "slip")
AIR = air_state(293.15, altitude=0.0, relative_humidity=0.5)
GRAIN = 1000.0
MEGABYTE = 1e6
KILOBYTE = 1024


@dataclass(frozen=True, slots=True, kw_only=True)
class Chunk:
    """Some designs, every one with its own lengths [m] and flow [m^3/s]."""

    bodies: CycloneGeometry
    at: Conditions


def chunks(designs: int) -> Iterator[Chunk]:
    """Draw designs chunk by chunk."""
    chance = np.random.default_rng(SEED)
    rows = list(families().values())
    ends = {
        name: (min(getattr(row, name) for row in rows), max(getattr(row, name) for row in rows))
        for name in RATIOS
    }
    made = 0
    while made < designs:
        lengths = _valid(
            {name: chance.uniform(low, high, 2 * CHUNK) for name, (low, high) in ends.items()}
        )
        count = min(CHUNK, designs - made, len(lengths["slot_height"]))
        made += count
        diameter = np.exp(chance.uniform(np.log(0.06), np.log(0.6), count))
        bodies = CycloneGeometry(
            body_diameter=diameter,
            **{name: ratios[:count] * diameter for name, ratios in lengths.items()},
        )
        velocity = chance.uniform(8.0, 25.0, count)
        yield Chunk(
            bodies=bodies,
            at=Conditions(
                flow=velocity * bodies.slot_height * bodies.slot_width,
                particle_density=GRAIN,
                air_density=AIR.density,
                viscosity=AIR.viscosity,
                temperature=AIR.temperature,
                loading=0.0,
            ),
        )


def _valid(lengths: dict[str, NDArray[np.float64]]) -> dict[str, NDArray[np.float64]]:
    """Leave out what no one would build, and what a model refuses a whole array for."""
    keep = (
        (lengths["finder_length"] >= 0.5 * lengths["slot_height"])
        & (lengths["finder_length"] < 0.95 * lengths["barrel_height"])
        & (lengths["barrel_height"] < 0.9 * lengths["total_height"])
        & (lengths["dust_outlet_diameter"] < 0.95)
        # so that Leith and Licht's vortex is wider than the finder where it ends
        & (lengths["finder_diameter"] < 0.7)
    )
    return {name: ratios[keep] for name, ratios in lengths.items()}


def _ask(model: Model, chunk: Chunk) -> Numbers:
    return model(chunk.bodies, chunk.at)


def works() -> dict[str, Callable[[Chunk], object]]:
    """Give every model, called alike."""
    found: dict[str, Callable[[Chunk], object]] = {}
    for quantity, models in (("cut size", CUT_SIZE_MODELS), ("heads", HEADS_MODELS)):
        for name, model in models.items():
            found[f"{quantity}, {name}"] = partial(_ask, model)
    found["consensus cut size"] = lambda chunk: (
        central_cut_size(
            chunk.bodies,
            flow=chunk.at.flow,
            particle_density=GRAIN,
            shape_factor=1.3,
            loading=0.0,
            air=AIR,
        ).cut_size
    )
    found["central heads"] = lambda chunk: central_heads(chunk.bodies)
    found["slip on a cut size"] = lambda chunk: as_physical(
        chunk.bodies.slot_width * 1e-4, shape_factor=1.3, air=AIR
    )
    return found


def timed(designs: int) -> tuple[dict[str, float], dict[str, int]]:
    """Pass all designs through every model: time [s] and values that are no number, by model."""
    times = dict.fromkeys(works(), 0.0)
    missing = dict.fromkeys(times, 0)
    for chunk in chunks(designs):
        for name, work in works().items():
            best = float("inf")
            for _ in range(ROUNDS):
                start = process_time()
                result = work(chunk)
                best = min(best, process_time() - start)
            times[name] += best
            missing[name] += int(np.count_nonzero(~np.isfinite(np.asarray(result))))
    return times, missing


def traced_peak(designs: int) -> float:
    """Most memory that the designs held at a time [MB]."""
    tracemalloc.start()
    for chunk in chunks(designs):
        for work in works().values():
            work(chunk)
    _, peak = tracemalloc.get_traced_memory()
    tracemalloc.stop()
    return peak / MEGABYTE


def main() -> None:
    """Print one table."""
    times, missing = timed(DESIGNS)
    closed = {
        name: time for name, time in times.items() if not any(word in name for word in ITERATED)
    }
    rows = {
        **times,
        f"closed form, {len(closed)} models together": sum(closed.values()),
        "all models and the consensus together": sum(times.values()),
    }
    for name, time in rows.items():
        note = f"  no number: {missing[name]}" if missing.get(name) else ""
        print(  # noqa: T201 - the result
            f"{name:42s}{time * 1e3:9.1f} ms {DESIGNS / time:12,.0f} designs/s{note}"
        )
    each = DESIGNS * len(closed) / sum(closed.values())
    print(  # noqa: T201 - same
        f"a closed-form model on average: {each:,.0f} designs/s; goal {GOAL:,}\n"
        f"memory held at most: {traced_peak(DESIGNS):.1f} MB for {DESIGNS:,} designs, "
        f"{traced_peak(DESIGNS // 2):.1f} MB for {DESIGNS // 2:,}, in chunks of {CHUNK:,}; process "
        f"{resource.getrusage(resource.RUSAGE_SELF).ru_maxrss * KILOBYTE / MEGABYTE:.0f} MB"
    )


if __name__ == "__main__":
    main()

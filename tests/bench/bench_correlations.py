"""How many designs a second the models take: `python tests/bench/bench_correlations.py`.

One thread, 100 000 designs in one array with every length its own, so nothing is shared between
designs. The closed-form models together should reach 500 000 designs a second and core; those
that iterate are reported apart. The last column is a ratio, so that the machine cancels out: time
by the time of one power of the same array, the dearest plain operation of all the formulas.
"""

from __future__ import annotations

from functools import partial
from time import perf_counter
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.catalogue import families
from gyrecut.correlations.barth import FRICTION_HOFFMANN_STEIN, LIP_SHARP, barth
from gyrecut.correlations.casal_martinez import inlet_velocity_heads_casal_martinez
from gyrecut.correlations.dirgo_ramachandran import inlet_velocity_heads_dirgo_ramachandran
from gyrecut.correlations.first import inlet_velocity_heads_first
from gyrecut.correlations.geometry import RATIOS, CycloneGeometry
from gyrecut.correlations.iozia_leith import iozia_leith
from gyrecut.correlations.lapple import cut_size_lapple
from gyrecut.correlations.leith_licht import leith_licht
from gyrecut.correlations.muschelknautz import muschelknautz
from gyrecut.correlations.slip import physical_cut_size
from gyrecut.correlations.stairmand import inlet_velocity_heads_stairmand

if TYPE_CHECKING:
    from collections.abc import Callable

    from numpy.typing import NDArray

DESIGNS = 100_000
ROUNDS = 7


def best(work: Callable[[], object]) -> float:
    """Least time of several rounds [s]: the rest is the machine's other business."""
    times = []
    for _ in range(ROUNDS):
        start = perf_counter()
        work()
        times.append(perf_counter() - start)
    return min(times)


def designs() -> tuple[CycloneGeometry, NDArray[np.float64]]:
    """Make bodies of 60 to 600 mm around the published shapes, and their flows at 8 to 25 m/s."""
    chance = np.random.default_rng(1)
    rows = list(families().values())
    which = chance.integers(len(rows), size=DESIGNS)
    diameter = np.exp(chance.uniform(np.log(0.06), np.log(0.6), DESIGNS))
    lengths = {
        name: np.array([getattr(row, name) for row in rows])[which]
        * chance.uniform(0.97, 1.03, DESIGNS)
        * diameter
        for name in RATIOS
    }
    bodies = CycloneGeometry(body_diameter=diameter, **lengths)
    velocity = chance.uniform(8.0, 25.0, DESIGNS)
    return bodies, velocity * lengths["slot_height"] * lengths["slot_width"]


def main() -> None:
    """Print one table."""
    bodies, flow = designs()
    grain, air, thick = 1000.0, 1.2, 1.81e-5
    closed: dict[str, Callable[[], object]] = {
        "Lapple": partial(
            cut_size_lapple,
            bodies,
            flow=flow,
            particle_density=grain,
            air_density=air,
            viscosity=thick,
        ),
        "Barth, with pressure drop": partial(
            barth,
            bodies,
            flow=flow,
            particle_density=grain,
            air_density=air,
            viscosity=thick,
            friction=FRICTION_HOFFMANN_STEIN,
            lip_loss=LIP_SHARP,
        ),
        "Leith and Licht": partial(
            leith_licht,
            bodies,
            flow=flow,
            particle_density=grain,
            viscosity=thick,
            temperature=293.15,
        ),
        "Iozia and Leith": partial(
            iozia_leith, bodies, flow=flow, particle_density=grain, viscosity=thick
        ),
        "First": partial(inlet_velocity_heads_first, bodies),
        "Stairmand": partial(inlet_velocity_heads_stairmand, bodies),
        "Casal and Martinez-Benet": partial(inlet_velocity_heads_casal_martinez, bodies),
        "Dirgo and Ramachandran": partial(inlet_velocity_heads_dirgo_ramachandran, bodies),
    }
    iterated: dict[str, Callable[[], object]] = {
        f"Muschelknautz, floor {floor:g}": partial(
            muschelknautz,
            bodies,
            flow=flow,
            particle_density=grain,
            air_density=air,
            viscosity=thick,
            loading=0.0,
            friction_floor=floor,
            dust_friction=0.0,
        )
        for floor in (0.0, 0.005)
    }
    cuts = np.asarray(
        muschelknautz(
            bodies,
            flow=flow,
            particle_density=grain,
            air_density=air,
            viscosity=thick,
            loading=0.0,
            friction_floor=0.0,
            dust_friction=0.0,
        ).cut_size
    )
    iterated["slip"] = partial(physical_cut_size, cuts, mean_free_path=66.5e-9)
    one_power = best(lambda: flow**0.623)
    times = {name: best(work) for name, work in (closed | iterated).items()}
    times["closed form, all together"] = sum(times[name] for name in closed)
    for name, time in times.items():
        print(  # noqa: T201 - the result
            f"{name:28s}{time * 1e3:8.1f} ms {DESIGNS / time:12,.0f} designs/s"
            f" {time / one_power:7.1f} powers"
        )


if __name__ == "__main__":
    main()

"""Every model beside every measured cyclone: `python tests/bench/table_measured.py`.

Cut sizes in um with forecast over measured in brackets, then inlet velocity heads where they were
measured. Points of grade C decide nothing.
"""

from __future__ import annotations

import numpy as np

from gyrecut.catalogue import measured_points
from gyrecut.correlations.measured import held_against

WIDTH = 26


def main() -> None:
    """Print two tables and the mean ratios by grade."""
    found = {point: held_against(point) for point in measured_points().values()}
    for point, against in found.items():
        print(  # noqa: T201 - the result
            f"{point.name} (grade {point.grade}, {point.mark}): {point.cut_size * 1e6:.3g} um "
            f"{point.diameter_kind}, ring Reynolds number {against.annulus_reynolds:.2g}"
        )
        for model, size in against.cut_sizes.items():
            ratio = against.cut_size_ratios[model]
            print(f"  {model:{WIDTH}s}{size * 1e6:8.3g} ({ratio:.2f})")  # noqa: T201
        if point.inlet_velocity_heads is not None:
            print(f"  {'heads measured':{WIDTH}s}{point.inlet_velocity_heads:8.2f}")  # noqa: T201
            for model, heads in against.inlet_velocity_heads.items():
                ratio = heads / point.inlet_velocity_heads
                print(f"  {model:{WIDTH}s}{heads:8.2f} ({ratio:.2f})")  # noqa: T201
    for title, grades in (("grades A and B", "AB"), ("all", "ABC")):
        rows = [against for point, against in found.items() if point.grade in grades]
        print(f"forecast over measured, geometric mean and spread, {title}")  # noqa: T201
        for model in rows[0].cut_size_ratios:
            logs = np.log([row.cut_size_ratios[model] for row in rows])
            print(  # noqa: T201
                f"  {model:{WIDTH}s}{np.exp(logs.mean()):8.2f} ({np.exp(logs.std()):.2f})"
            )


if __name__ == "__main__":
    main()

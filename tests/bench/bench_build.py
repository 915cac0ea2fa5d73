"""What `build` costs beyond the CAD kernel: `python tests/bench/bench_build.py [PROFILE]`.

Prints the ratio of a whole build to a bare script that imports cadquery and makes the same
solids, meshes and STEP texts, with nothing read, checked, named or kept.
"""

from __future__ import annotations

import pickle
import subprocess
import sys
import tempfile
import time
from pathlib import Path
from statistics import median

from gyrecut import pipeline
from gyrecut.profile import load_profile

ROUNDS = 5
PROFILES = Path(__file__).parents[2] / "profiles"
KERNEL_ONLY = """
import pickle, sys
import cadquery
from OCP.BRepMesh import BRepMesh_IncrementalMesh
from gyrecut.pieces.cutting import rings
from gyrecut.pieces.sectors import plate_sectors, ring_sectors
from gyrecut.solids import make_parts
from gyrecut.kit.step import piece_step_bytes, assembly_step_bytes
d = pickle.load(open(sys.argv[1], "rb"))
parts = make_parts(d)
solids = [parts.finder, parts.outlet, parts.transition, parts.bin_ring]
solids += plate_sectors(parts.lid, sectors=d.division.lid_sectors,
    first_cut=d.division.lid_first_cut, thickness_mm=d.lid.thickness_mm,
    gap_mm=d.joint.clearance_mm, slope=d.slope)
for ring, whole in zip(d.division.rings, rings(parts.body, d)):
    solids += ring_sectors(whole, ring, d.body, d.joint)
for solid in solids:
    BRepMesh_IncrementalMesh(solid.wrapped, 0.05, False, 0.35, True)
    solid.Volume()
    piece_step_bytes("piece", solid, version="0", stamp="1980-01-01T00:00:00")
assembly_step_bytes("all", [(f"p{i}", s) for i, s in enumerate(solids)], version="0",
    stamp="1980-01-01T00:00:00")
"""


def seconds(*arguments: str) -> float:
    """Time one fresh process."""
    start = time.perf_counter()
    subprocess.run([sys.executable, *arguments], check=True, capture_output=True)
    return time.perf_counter() - start


def main(name: str) -> None:
    """Take turns, so that a busy moment of the machine strikes both."""
    profile = PROFILES / f"{name}.yaml"
    with tempfile.TemporaryDirectory() as scratch:
        dimensions = pipeline.design(load_profile(profile)).stages[0].dimensions
        pickled = Path(scratch, "dimensions.pickle")
        pickled.write_bytes(pickle.dumps(dimensions))
        out = str(Path(scratch, "kit"))
        pairs = [
            (
                seconds("-m", "gyrecut", "build", str(profile), "--out", out, "--quiet"),
                seconds("-c", KERNEL_ONLY, str(pickled)),
            )
            for _ in range(ROUNDS)
        ]
    ours, bare = (median(column) for column in zip(*pairs, strict=True))
    ratio = median(one / other for one, other in pairs)
    print(  # noqa: T201 - the result
        f"build {name} over its kernel work alone: {ratio:.2f} ({ours:.2f} s over {bare:.2f} s)"
    )


if __name__ == "__main__":
    main(sys.argv[1] if len(sys.argv) > 1 else "luthier-sander")

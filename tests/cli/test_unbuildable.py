"""A well-formed profile no body can be made from: one message at its line, exit code 3."""

from __future__ import annotations

import subprocess
import sys
from pathlib import Path

import pytest

PROFILES = Path(__file__).parents[2] / "profiles"
CASES = {
    "printer too small for any piece": (
        "luthier-sander",
        ("[220 mm, 220 mm, 250 mm]", "[70 mm, 70 mm, 70 mm]"),
        """\
gyrecut: shop.yaml:51:3: P090 printer.build_volume is too low for the ring with slot and portal, \
which stays whole
  51 |   build_volume: [70 mm, 70 mm, 70 mm]      # width, depth, height
     |   ^^^^^^^^^^^^
  given: 65 mm of height
  allowed: at least 100 mm
  do: choose a smaller body, a family with a lower slot, or a taller printer
""",
    ),
    "bed too small for any sector": (
        "luthier-sander",
        ("[220 mm, 220 mm, 250 mm]", "[90 mm, 90 mm, 250 mm]"),
        """\
gyrecut: shop.yaml:51:3: P090 printer.build_volume is too small for any sector of ring 1 of the body
  51 |   build_volume: [90 mm, 90 mm, 250 mm]      # width, depth, height
     |   ^^^^^^^^^^^^
  given: a bed that leaves 80 x 80 mm
  allowed: room for a piece that reaches 125 mm from the axis, 82 degrees of it (slot and portal) \
in one piece
  do: choose a smaller body, or a larger printer
""",
    ),
    "hose larger than the slot allows": (
        "luthier-sander",
        ("nominal: 38 mm ", "nominal: 150 mm "),
        """\
gyrecut: shop.yaml:15:5: P090 air.hose.nominal is too wide for the slot
  15 |     nominal: 150 mm                            # as it is sold
     |     ^^^^^^^
  given: 16490 mm2 in the cuff, 2161 mm2 in the slot
  allowed: one at most 6 times the other
  do: choose another hose, or another size of the stage
""",
    ),
    "blower wider than the finder": (
        "casting-bench",
        ("intake_diameter: 1.2 in", "intake_diameter: 2.4 in"),
        """\
gyrecut: shop.yaml:41:3: P090 outlet.intake_diameter is too wide for the vortex finder it sits in
  41 |   intake_diameter: 2.4 in                     # its intake opening
     |   ^^^^^^^^^^^^^^^
  given: 61.0 mm, with a finder of 52.5 mm
  allowed: at most 45.2 mm, so that its edge can be rounded
  do: choose a smaller blower intake, or a larger body
""",
    ),
    "body of no useful size": (
        "luthier-sander",
        ("flow: 140 m3/h", "flow: 10 m3/h "),
        """\
gyrecut: shop.yaml:32:1: P090 stages lead to a body of no useful size
  32 | stages:                                       # one cyclone is enough here
     | ^^^^^^
  given: 39.3 mm across
  allowed: 40 mm to 900 mm
  do: choose another flow, inlet_velocity, cut_size or count
""",
    ),
    "formula asked beyond its range": (
        "luthier-sander",
        ("inlet_velocity: 18 m/s", "body_diameter: 60 mm  "),
        """\
gyrecut: shop.yaml:32:1: P090 stages leads out of what published formulas cover, in the \
inlet velocity
""",
    ),
    "cut size no body has": (
        "luthier-sander",
        ("inlet_velocity: 18 m/s", "cut_size: 40 um       "),
        """\
gyrecut: shop.yaml:32:1: P090 stages ask for a cut size that no body of these proportions has at \
this flow
  32 | stages:                                       # one cyclone is enough here
     | ^^^^^^
  given: cut_size: 40 um
""",
    ),
    "fewer pieces than possible": (
        "luthier-sander",
        ("inlet_velocity: 18 m/s", "fit_pieces: 1         "),
        """\
gyrecut: shop.yaml:32:1: P090 stages ask for a body in fewer pieces than this printer can make
  32 | stages:                                       # one cyclone is enough here
     | ^^^^^^
  given: fit_pieces: 1
  allowed: as many as some body of 40 to 900 mm needs
""",
    ),
}


@pytest.mark.parametrize("name", list(CASES))
def test_it_is_told_at_its_line(tmp_path: Path, name: str) -> None:
    shipped, (out, into), message = CASES[name]
    text = (PROFILES / f"{shipped}.yaml").read_text(encoding="utf-8")
    assert text.count(out) == 1
    (tmp_path / "shop.yaml").write_text(text.replace(out, into), encoding="utf-8")
    run = subprocess.run(
        [sys.executable, "-m", "gyrecut", "size", "shop.yaml"],
        cwd=tmp_path,
        capture_output=True,
        text=True,
        check=False,
    )
    assert run.stderr.startswith(message), run.stderr
    assert run.returncode == 3
    assert run.stdout == ""

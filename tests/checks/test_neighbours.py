"""Room between two pieces: gaps with their width, interference with its depth, joints held."""

from __future__ import annotations

from dataclasses import replace
from math import inf
from typing import TYPE_CHECKING

import pytest
from cadquery.func import box, cone, cylinder, sphere, torus

from gyrecut.checks import Nearness, PrintLimits, measure_nearness, nearness_findings
from gyrecut.findings import Severity
from gyrecut.pieces.meshing import mesh_of as placed_mesh

if TYPE_CHECKING:
    from collections.abc import Callable

    from cadquery import Shape

    Pair = Callable[[], tuple[Shape, Shape]]

CHORD_MM = 0.01


def nearness_of(
    pair: Pair, assembly: tuple[float, float, float] = (0, 0, 1)
) -> tuple[Nearness, float]:
    """Measure a pair by its meshes, and exactly what volume the two solids share."""
    one, other = pair()
    shared = (one * other).Volume()
    meshes = (placed_mesh(shape, CHORD_MM, 0.1) for shape in (one, other))
    return measure_nearness(*meshes, assembly=assembly), shared


def socket_and_spigot(gap: float, off: float = 0) -> tuple[Shape, Shape]:
    """Tube whose spigot stands in the socket of the tube below, sitting on its floor."""
    lower = cylinder(60, 30) - cylinder(50, 30) - cylinder(56, 12).moved(z=18)
    spigot = cylinder(56 - 2 * gap, 30).moved(z=18) - cylinder(50, 30).moved(z=18)
    return lower, spigot.moved(x=off)


# Two that share room: how deep one reaches into the other.
INTERFERE: dict[str, tuple[Pair, float]] = {
    "blocks": (lambda: (box(20, 20, 20), box(20, 20, 20).moved(x=19.5)), 0.5),
    "block on a plate": (lambda: (box(40, 40, 5), box(10, 10, 10).moved(z=4.6)), 0.4),
    "spigot too wide": (lambda: socket_and_spigot(-0.3), 0.3),
    "spigot off the middle": (lambda: socket_and_spigot(0.2, off=0.6), 0.4),
    "screw in a wall": (
        lambda: (box(40, 5, 40), cylinder(4, 40).moved(y=3.5).moved(z=0)),
        1.0,
    ),
    "ball in a corner": (lambda: (box(20, 20, 20), sphere(10).moved(x=14.4, z=10)), 0.6),
    "ring round a post": (
        lambda: (cylinder(20, 30), torus(22, 2.8).moved(z=15)),
        0.4,
    ),
    "two bodies in one place": (lambda: (box(20, 20, 4), box(20, 20, 4)), 2.0),
    "plate through a tube": (
        lambda: (cylinder(60, 40) - cylinder(56, 40), box(80, 80, 2).moved(z=20)),
        1.0,
    ),
    "crossed bars": (lambda: (box(60, 4, 4), box(4, 60, 4).moved(z=3)), 1.0),
}

# Two that do not, and the least gap between faces that look at each other, and between sides.
APART: dict[str, tuple[Pair, float, float]] = {
    "far apart": (lambda: (box(20, 20, 20), box(20, 20, 20).moved(x=60)), inf, inf),
    "side by side": (lambda: (box(20, 20, 20), box(20, 20, 20).moved(x=20.3)), 0.3, 0.3),
    "touching": (lambda: (box(20, 20, 20), box(20, 20, 20).moved(x=20)), 0, 0),
    "one on the other": (lambda: (box(20, 20, 20), box(20, 20, 20).moved(z=20)), 0, inf),
    "spigot in its socket": (lambda: socket_and_spigot(0.2), 0, 0.2),
    "spigot a little off": (lambda: socket_and_spigot(0.3, off=0.15), 0, 0.15),
    "cone in a cone": (
        lambda: (
            cylinder(60, 40) - cone(30, 50, 40),
            cone(29, 49, 40) - cone(24, 44, 40),
        ),
        0.5 * 40 / (40**2 + 10**2) ** 0.5,
        0.5 * 40 / (40**2 + 10**2) ** 0.5,
    ),
    "pin in a hole": (lambda: (box(30, 30, 8) - cylinder(6, 8), cylinder(5.6, 20)), 0.2, 0.2),
    "ball in a bowl": (
        lambda: (cylinder(60, 30) - sphere(50).moved(z=30), sphere(49).moved(z=30)),
        0.5,
        0.5,
    ),
    "box in a box": (
        lambda: (box(40, 40, 40) - box(30, 30, 30).moved(z=5), box(29, 29, 29).moved(z=5.5)),
        0.5,
        0.5,
    ),
    "boxes that overlap only as boxes": (
        lambda: (cylinder(60, 20) - cylinder(50, 20), cylinder(20, 20)),
        inf,
        inf,
    ),
    "neighbours in a ring": (
        lambda: (
            (cylinder(80, 20) - cylinder(60, 20)) * box(100, 100, 20).moved(y=50.1),
            (cylinder(80, 20) - cylinder(60, 20)) * box(100, 100, 20).moved(y=-50.1),
        ),
        0.2,
        0.2,
    ),
}


@pytest.mark.parametrize("name", INTERFERE)
def test_what_shares_room_is_found(name: str, limits: PrintLimits) -> None:
    pair, depth = INTERFERE[name]
    nearness, shared = nearness_of(pair)
    assert shared > 0
    # Sampled, and to the nearest plane: a corner that just reaches in is deeper than its samples.
    assert nearness.depth_mm == pytest.approx(depth, rel=0.25, abs=0.05)
    assert nearness.inside > 0
    for is_joint in (True, False):
        (finding,) = nearness_findings(nearness, "one and other", limits, is_joint=is_joint)
        assert (finding.code, finding.severity) == ("pieces-interfere", Severity.STOP)
        assert finding.part == "one and other"
        assert finding.measured == nearness.depth_mm


@pytest.mark.parametrize("name", APART)
def test_what_does_not_is_measured(name: str, limits: PrintLimits) -> None:
    pair, gap, sliding = APART[name]
    nearness, shared = nearness_of(pair)
    assert shared == pytest.approx(0, abs=1e-6)
    assert nearness.gap_mm == pytest.approx(gap, abs=2 * CHORD_MM + 1e-3)
    assert nearness.sliding_mm == pytest.approx(sliding, abs=2 * CHORD_MM + 1e-3)
    assert nearness.inside == 0
    assert nearness_findings(nearness, "pair", limits, is_joint=False) == ()


@pytest.mark.parametrize(
    ("gap", "is_tight"), [(0.05, True), (0.1, True), (0.15, True), (0.2, False), (0.3, False)]
)
def test_a_joint_is_held_against_the_clearance(
    gap: float, limits: PrintLimits, *, is_tight: bool
) -> None:
    nearness, _ = nearness_of(lambda: socket_and_spigot(gap))
    findings = nearness_findings(
        nearness, "spigot and socket", limits, is_joint=True, chord_mm=CHORD_MM
    )
    assert bool(findings) == is_tight
    if is_tight:
        assert findings[0].code == "joint-too-tight"
        assert findings[0].severity is Severity.STOP
        assert findings[0].measured == pytest.approx(gap, abs=2 * CHORD_MM)
        assert findings[0].limit == limits.clearance_mm


def test_what_may_touch_depends_on_the_way_of_assembly(limits: PrintLimits) -> None:
    def pair() -> tuple[Shape, Shape]:
        return box(20, 20, 20), box(20, 20, 20).moved(x=20)

    upward, _ = nearness_of(pair)
    along_x, _ = nearness_of(pair, assembly=(1, 0, 0))
    assert nearness_findings(upward, "pair", limits, is_joint=True)[0].code == "joint-too-tight"
    assert nearness_findings(along_x, "pair", limits, is_joint=True) == ()


def test_facets_of_a_coarse_mesh_are_allowed_for(limits: PrintLimits) -> None:
    one, other = (placed_mesh(shape) for shape in socket_and_spigot(limits.clearance_mm))
    nearness = measure_nearness(one, other)
    assert nearness_findings(nearness, "joint", limits, is_joint=True) == ()
    tight = replace(limits, clearance_mm=0.35)
    assert nearness_findings(nearness, "joint", tight, is_joint=True)

"""Details too small for the process are found with their width; sound ones raise no alarm."""

from __future__ import annotations

from itertools import product
from math import radians, tan
from typing import TYPE_CHECKING

import pytest
from cadquery.func import box, cone, cylinder, sphere
from tests.checks.test_detection_table import MESHES, SIZES, SOUND, lying, prism, tube

from gyrecut.checks import check_mesh, measure_mesh
from gyrecut.findings import Severity

if TYPE_CHECKING:
    from collections.abc import Callable

    from cadquery import Shape
    from tests.checks.conftest import MeshOf

    from gyrecut.checks import Feature, PrintLimits

    Builder = Callable[[float], Shape]

# The limits of the filament printer of these tests: line 0.4 mm, hole 2 mm, pin 0.8 mm.
PLANTED: dict[str, tuple[str, Builder, float]] = {
    "slot through a plate": (
        "gap",
        lambda k: box(30 * k, 20 * k, 4) - box(12, 0.3, 4),
        0.3,
    ),
    "blind slot": ("gap", lambda k: box(30 * k, 20 * k, 6) - box(12, 0.2, 6).moved(z=3), 0.2),
    "groove round a rod": (
        "gap",
        lambda k: cylinder(20 * k, 30) - tube(20 * k + 2, 20 * k - 6, 0.3).moved(z=15),
        0.3,
    ),
    "ring gap in a bush": (
        "gap",
        lambda k: cylinder(30 * k, 8) - tube(16, 15.4, 6).moved(z=2),
        0.3,
    ),
    "saw cut in a wall": (
        "gap",
        lambda k: tube(60 * k, 60 * k - 6, 30) - box(10, 0.25, 30).moved(x=30 * k, z=10),
        0.25,
    ),
    "closed slit": ("gap", lambda k: box(30 * k, 30 * k, 8) - box(12, 50 * k, 0.3).moved(z=4), 0.3),
    "vent hole": ("hole", lambda k: box(30 * k, 20 * k, 4) - cylinder(1.2, 4), 1.2),
    "vent hole askew": (
        "hole",
        lambda k: box(30 * k, 20 * k, 4) - cylinder(1.5, 20).moved(z=-10).moved(rx=25, z=2),
        1.5,
    ),
    "lying hole": ("hole", lambda k: box(30 * k, 20 * k, 8) - lying(1.4, 50 * k, 4), 1.4),
    "blind hole": ("hole", lambda k: cylinder(20 * k, 10) - cylinder(1, 6).moved(z=4), 1.0),
    "square hole": ("hole", lambda k: box(30 * k, 20 * k, 5) - box(1.2, 1.2, 5), 1.2),
    "hole in a barrel": (
        "hole",
        lambda k: tube(60 * k, 60 * k - 6, 30) - lying(1.6, 100 * k, 15),
        1.6,
    ),
    "pin": ("pin", lambda k: box(20 * k, 20 * k, 3) + cylinder(0.6, 8), 0.6),
    "thin pin": ("pin", lambda k: box(20 * k, 20 * k, 3) + cylinder(0.5, 6).moved(x=4), 0.5),
    "square pin": ("pin", lambda k: box(20 * k, 20 * k, 3) + box(0.7, 0.7, 8), 0.7),
    "pin that tapers": ("pin", lambda k: box(20 * k, 20 * k, 3) + cone(1.6, 0.5, 12), 0.55),
    "bar between two posts": (
        "pin",
        lambda k: (
            box(30 * k, 10, 3)
            + box(5, 10, 12).moved(x=10)
            + box(5, 10, 12).moved(x=-10)
            + cylinder(0.6, 20).moved(z=-10).moved(ry=90, z=9)
        ),
        0.6,
    ),
    "thin stroke": ("detail", lambda k: box(30 * k, 20 * k, 3) + box(0.25, 6, 3.3), 0.25),
    "thin ring stroke": ("detail", lambda k: box(30 * k, 20 * k, 3) + tube(8, 7.4, 3.4), 0.3),
}

# Sound: at the limits, and what a careless measure takes for one of the above.
PASSES: dict[str, Builder] = {
    "slot at the limit": lambda k: box(30 * k, 20 * k, 4) - box(12, 0.4, 4),
    "hole at the limit": lambda k: box(30 * k, 20 * k, 4) - cylinder(2, 4),
    "pin at the limit": lambda k: box(20 * k, 20 * k, 3) + cylinder(0.8, 8),
    "stroke at the limit": lambda k: box(30 * k, 20 * k, 3) + box(0.4, 6, 3.3),
    "narrow slot, blind": lambda k: box(30 * k, 20 * k, 6) - box(12, 1, 6).moved(z=3),
    "narrow slot, shallow": lambda k: box(30 * k, 20 * k, 6) - box(12, 0.8, 6).moved(z=5),
    "long slot in a wall": lambda k: tube(60 * k, 60 * k - 6, 30) - box(99 * k, 1, 20).moved(z=5),
    "letter o, cut": lambda k: box(30 * k, 20 * k, 3) - tube(2.2, 1.0, 3).moved(z=2.4),
    "letter i, cut": lambda k: box(30 * k, 20 * k, 3) - box(0.6, 4, 3).moved(z=2.4),
    "notch of 15 degrees": lambda k: (
        box(30 * k, 20 * k, 8)
        - prism(40 * k, (0, 2), (6 * tan(radians(7.5)), 8), (-6 * tan(radians(7.5)), 8)).moved(
            y=-20 * k
        )
    ),
    "teeth of 60 degrees": lambda k: prism(
        20 * k, (-12, 0), (12, 0), (12, 4), (8, 10), (4, 4), (0, 10), (-4, 4), (-12, 10)
    ),
    "dimple": lambda k: box(20 * k, 20 * k, 5) - sphere(1.8).moved(z=5),
    "two bores that meet": lambda k: (
        box(20 * k, 20 * k, 20) - cylinder(4, 20) - lying(4, 50 * k, 10)
    ),
    "spike": lambda k: box(20 * k, 20 * k, 3) + cone(8, 0.001, 9).moved(z=3),
    "barbs on a cuff": lambda _: (
        tube(30, 24, 30) + (cone(32, 30, 5).moved(z=10) - cylinder(24, 30))
    ),
}


def _found(
    shape: Shape, chord: float, angle: float, mesh_of: MeshOf, limits: PrintLimits
) -> dict[str, Feature | None]:
    solid = measure_mesh(mesh_of(shape, chord, angle), limits).solid
    assert solid is not None
    features = solid.features
    return {
        "gap": features.gap,
        "hole": features.hole,
        "pin": features.pin,
        "detail": features.detail,
    }


@pytest.mark.parametrize("name", PLANTED)
def test_a_planted_feature_is_found(name: str, mesh_of: MeshOf, limits: PrintLimits) -> None:
    kind, build, width = PLANTED[name]
    for size, (chord, angle) in product(SIZES, MESHES):
        found = _found(build(size), chord, angle, mesh_of, limits)[kind]
        assert found is not None, (size, chord)
        # A hole of few facets is narrower across its flats; 0.5 rad make twelve of them.
        assert found.width_mm == pytest.approx(width, rel=0.12), (size, chord)
        assert found.area_mm2 > 0


@pytest.mark.parametrize("name", [*PASSES, *SOUND])
def test_a_sound_feature_raises_no_alarm(name: str, mesh_of: MeshOf, limits: PrintLimits) -> None:
    build = PASSES.get(name) or SOUND[name]
    for size, (chord, angle) in product(SIZES, MESHES):
        found = _found(build(size), chord, angle, mesh_of, limits)
        assert not any(found.values()), (size, chord, found)


@pytest.mark.parametrize(
    ("shape", "code"),
    [
        pytest.param(box(30, 20, 4) - box(12, 0.3, 4), "narrow-gap", id="gap"),
        pytest.param(box(30, 20, 4) - cylinder(1.2, 4), "small-hole", id="hole"),
        pytest.param(box(20, 20, 3) + cylinder(0.6, 8), "thin-pin", id="pin"),
        pytest.param(box(30, 20, 3) + box(0.25, 6, 3.3), "lost-detail", id="detail"),
    ],
)
def test_findings_warn_with_width_and_limit(
    shape: Shape, code: str, mesh_of: MeshOf, limits: PrintLimits
) -> None:
    findings = {f.code: f for f in check_mesh(mesh_of(shape), "part", limits)}
    finding = findings[code]
    assert finding.severity is Severity.WARN
    assert finding.measured is not None
    assert finding.limit is not None
    assert finding.measured < finding.limit
    assert finding.unit == "mm"
    assert f"{finding.measured:.2f} mm" in finding.what


def test_resin_keeps_finer_details(mesh_of: MeshOf, resin_limits: PrintLimits) -> None:
    fine = box(30, 20, 4) - box(12, 0.3, 4) - cylinder(1.2, 4).moved(x=10)
    codes = {f.code for f in check_mesh(mesh_of(fine), "part", resin_limits)}
    assert codes.isdisjoint({"narrow-gap", "small-hole"})
    closed = box(30, 20, 4) - box(12, 0.1, 4) - cylinder(0.35, 4).moved(x=10)
    codes = {f.code for f in check_mesh(mesh_of(closed), "part", resin_limits)}
    assert {"narrow-gap", "small-hole"} <= codes

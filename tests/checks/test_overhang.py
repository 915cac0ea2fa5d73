"""Overhangs that must be found with their area, and bridges that must pass with their span."""

from __future__ import annotations

from math import degrees, pi, radians, sqrt, tan
from typing import TYPE_CHECKING

import numpy as np
import pytest
from cadquery.func import box, cone, cylinder, extrude, face, polygon, revolve, sphere

from gyrecut.checks import FacetClass, check_mesh, measure_mesh
from gyrecut.findings import Severity

if TYPE_CHECKING:
    from collections.abc import Callable

    from cadquery import Shape
    from tests.checks.conftest import MeshOf

    from gyrecut.checks import Overhang, PrintLimits

    Builder = Callable[[], Shape]


def spun(*outline: tuple[float, float]) -> Shape:
    """Solid of revolution about z from (radius, height) corners."""
    return revolve(face(polygon(*[(r, 0, z) for r, z in outline])), (0, 0, 0), (0, 0, 1))


def prism(length: float, *outline: tuple[float, float]) -> Shape:
    """Prism along y from (x, z) corners."""
    return extrude(face(polygon(*[(x, 0, z) for x, z in outline])), (0, length, 0))


def lying(diameter: float, length: float, height: float) -> Shape:
    return cylinder(diameter, length).moved(rx=90).moved(y=length / 2, z=height)


def ring(outer: float, inner: float, height: float) -> Shape:
    return cylinder(outer, height) - cylinder(inner, height)


def flare(lean: float) -> Shape:
    """Post that flares by 10 mm at a lean from the vertical."""
    rise = 10 / tan(radians(lean))
    return spun((0, 0), (20, 0), (20, 10), (30, 10 + rise), (30, 15 + rise), (0, 15 + rise))


# Needs support: the solid, the area in mm2 and the steepest lean in degrees.
HANGS: dict[str, tuple[Builder, float, float]] = {
    "ledge all round": (
        lambda: cylinder(20, 10) + cylinder(40, 5).moved(z=10),
        pi * (400 - 100),
        90,
    ),
    "ledge on one side": (lambda: box(20, 20, 10) + box(30, 20, 5).moved(x=5, z=10), 200, 90),
    "ledge of 1 mm": (lambda: box(20, 20, 10) + box(22, 20, 5).moved(z=10), 40, 90),
    "tee": (lambda: box(5, 20, 20) + box(45, 20, 3).moved(z=20), 800, 90),
    "ceiling of 20 mm": (lambda: box(40, 30, 20) - box(20, 30, 10), 600, 90),
    "ring ceiling of 12 mm": (
        lambda: cylinder(100, 20) - ring(80, 56, 10),
        pi / 4 * (80**2 - 56**2),
        90,
    ),
    # Its rim, where the chord square to the radius is within 8 mm, is carried.
    "round ceiling": (lambda: cylinder(60, 20) - cylinder(30, 10), pi * (15**2 - 4**2), 90),
    "flare of 60 degrees": (lambda: flare(60), pi * 50 * 10 / (sqrt(3) / 2), 60),
    "flare of 50 degrees": (lambda: flare(50), pi * 50 * 10 / 0.7660444, 50),
    "wide lying hole": (
        lambda: box(60, 30, 60) - lying(40, 30, 30),
        30 * 20 * (pi / 2 - 2 * radians(0.5)),
        90,
    ),
    "ceiling held at far ends only": (
        lambda: box(60, 4, 20) - box(50, 4, 15),
        200,
        90,
    ),
    "boss under a bridge": (
        lambda: box(12, 30, 20) - box(6, 30, 10) + cylinder(2, 4).moved(z=7),
        pi,
        90,
    ),
    "slot with one side open": (lambda: box(20, 40, 20) - box(6, 40, 6).moved(x=7, z=7), 240, 90),
}

# Passes: the solid and its longest bridge in mm, None where there is no bridge at all.
PASSES: dict[str, tuple[Builder, float | None]] = {
    "block": (lambda: box(10, 20, 30), None),
    "flare at the limit": (lambda: flare(45), None),
    "flare below the limit": (lambda: flare(30), None),
    "cone standing": (lambda: cone(30, 40), None),
    "cone the wide end up": (lambda: cone(20, 40, 40), None),
    "slot": (lambda: box(40, 30, 20) - box(6, 30, 10), 6),
    "slot blind at one end": (lambda: box(40, 30, 20) - box(6, 20, 10).moved(y=5), 6),
    "slot askew": (lambda: cylinder(60, 20) - box(6, 80, 10).moved(rz=17), 6),
    "slot at the limit": (lambda: box(40, 30, 20) - box(8, 30, 10), 8),
    "pocket": (lambda: box(40, 30, 20) - box(7, 15, 10), 7),
    "ring groove": (lambda: cylinder(220, 10) - ring(203, 197, 5), 3),
    "small ring groove": (lambda: cylinder(40, 10) - ring(20, 12, 5), 4),
    "lying hole": (lambda: box(40, 20, 40) - lying(8, 20, 20), 8 / sqrt(2)),
    "blind lying hole": (lambda: box(40, 40, 40) - lying(8, 20, 20).moved(y=10), 8 / sqrt(2)),
    "counterbore from below": (
        lambda: cylinder(40, 12) - cylinder(7.5, 4) - cylinder(4.5, 12),
        sqrt(7.5**2 - 4.5**2),
    ),
    "blind hole from below": (lambda: cylinder(40, 12) - cylinder(7, 6), 7),
    "round window": (lambda: ring(60, 54, 40) - lying(7, 100, 20), None),
    "teardrop": (
        lambda: (
            box(40, 20, 40)
            - lying(20, 20, 18)
            - prism(20, (-7.071, 25.071), (7.071, 25.071), (0, 32.142)).moved(y=-10)
        ),
        None,
    ),
    "ledge of 0.4 mm": (lambda: box(20, 20, 10) + box(20.8, 20.8, 5).moved(z=10), None),
    "ring ledge of 0.4 mm": (lambda: cylinder(20, 10) + cylinder(20.8, 5).moved(z=10), None),
    "dome over a hole": (
        lambda: cylinder(40, 30) - cylinder(10, 10) - sphere(10).moved(z=10),
        None,
    ),
    "arch with sides": (lambda: box(40, 10, 30) - box(8, 10, 20), 8),
    "pocket in a wall": (lambda: box(40, 10, 30) - box(7, 4, 7).moved(y=3, z=12), 7),
    "keel": (lambda: prism(30, (0, 0), (5, 0), (15, 10), (15, 30), (0, 30)), None),
    "foot chamfer": (lambda: spun((0, 0), (19.5, 0), (20, 0.5), (20, 10), (0, 10)), None),
}


def overhang_of(shape: Shape, mesh_of: MeshOf, limits: PrintLimits, angle: float = 0.1) -> Overhang:
    solid = measure_mesh(mesh_of(shape, 0.02, angle), limits).solid
    assert solid is not None
    return solid.overhang


@pytest.mark.parametrize("name", HANGS)
def test_what_hangs_is_found_with_its_area(name: str, mesh_of: MeshOf, limits: PrintLimits) -> None:
    build, area, lean = HANGS[name]
    overhang = overhang_of(build(), mesh_of, limits)
    # Areas are shares by 48 places; a curved cap also loses up to one facet at its limit.
    assert overhang.area_mm2 == pytest.approx(area, rel=0.08)
    assert degrees(overhang.worst_angle) == pytest.approx(lean, abs=3.5)


@pytest.mark.parametrize("name", PASSES)
def test_what_prints_passes_and_the_span_is_right(
    name: str, mesh_of: MeshOf, limits: PrintLimits
) -> None:
    build, span = PASSES[name]
    overhang = overhang_of(build(), mesh_of, limits)
    assert overhang.area_mm2 == 0
    assert overhang.starts_mm == ()
    if span is not None:
        assert len(overhang.bridges) == 1
        assert overhang.bridges[0].span_mm == pytest.approx(span, rel=0.04)


def test_the_bridge_limit_decides(mesh_of: MeshOf, limits: PrintLimits) -> None:
    too_wide = overhang_of(box(40, 30, 20) - box(8.5, 30, 10), mesh_of, limits)
    assert too_wide.area_mm2 == pytest.approx(255)
    assert too_wide.bridges == ()
    assert too_wide.place_mm == pytest.approx((0, 0, 10), abs=1e-6)


@pytest.mark.parametrize("angle", [0.05, 0.1, 0.2, 0.35])
@pytest.mark.parametrize(("lean", "passes"), [(45, True), (46, False), (47, False)])
def test_the_mesh_does_not_decide_on_a_flare_near_the_limit(
    angle: float, lean: float, mesh_of: MeshOf, limits: PrintLimits, *, passes: bool
) -> None:
    overhang = overhang_of(flare(lean), mesh_of, limits, angle)
    if passes:
        assert overhang.area_mm2 == 0
    else:
        assert overhang.area_mm2 > 0
        # Beyond the band that is evened out a facet keeps its own lean, 2 degrees off at worst.
        assert degrees(overhang.worst_angle) == pytest.approx(lean, abs=2.5)


@pytest.mark.parametrize(
    "hanging",
    [
        pytest.param(lambda: box(5, 20, 30) + cone(0.001, 10, 20).moved(x=6, z=8), id="tip"),
        pytest.param(
            lambda: box(5, 20, 40) + prism(10, (2, 30), (12, 30), (7, 20)), id="hanging keel"
        ),
    ],
)
def test_a_steep_part_that_begins_in_the_air_is_found(
    hanging: Builder, mesh_of: MeshOf, limits: PrintLimits
) -> None:
    mesh = mesh_of(hanging())
    codes = {finding.code: finding for finding in check_mesh(mesh, "part", limits)}
    assert codes["starts-in-air"].severity is Severity.WARN


def test_findings_carry_area_and_bridges(mesh_of: MeshOf, limits: PrintLimits) -> None:
    slotted = box(40, 30, 20) - box(6, 30, 10) - box(4, 30, 5).moved(x=12)
    shape = slotted + box(50, 30, 4).moved(x=5, z=20)
    findings = {f.code: f for f in check_mesh(mesh_of(shape), "part", limits)}
    assert findings["overhang"].severity is Severity.WARN
    assert findings["overhang"].measured == pytest.approx(300)
    note = findings["permitted-bridge"]
    assert note.severity is Severity.NOTE
    assert note.what.startswith("2 ceilings are bridged")
    assert note.measured == pytest.approx(6, rel=0.01)
    assert note.limit == limits.bridge_limit_mm


def areas_by_class(shape: Shape, mesh_of: MeshOf, limits: PrintLimits) -> dict[FacetClass, float]:
    mesh = mesh_of(shape)
    solid = measure_mesh(mesh, limits).solid
    assert solid is not None
    classes = solid.overhang.classes
    assert classes.dtype == np.int8
    assert classes.shape == (len(mesh.faces),)
    return {one: float(mesh.area_faces[classes == one].sum()) for one in FacetClass}


def test_each_triangle_has_a_class(mesh_of: MeshOf, limits: PrintLimits) -> None:
    # A slot of 6 mm is bridged, a ledge of 5 mm hangs, and the foot lies on the bed.
    shape = box(40, 30, 20) - box(6, 30, 10) + box(50, 30, 4).moved(x=5, z=20)
    areas = areas_by_class(shape, mesh_of, limits)
    assert areas[FacetClass.BED] == pytest.approx(34 * 30)
    assert areas[FacetClass.BRIDGE] == pytest.approx(6 * 30)
    assert areas[FacetClass.HANGING] == pytest.approx(10 * 30)
    assert sum(areas.values()) == pytest.approx(mesh_of(shape).area)


@pytest.mark.parametrize("name", HANGS)
def test_hanging_triangles_have_the_area_that_hangs(
    name: str, mesh_of: MeshOf, limits: PrintLimits
) -> None:
    build, area, _ = HANGS[name]
    hanging = areas_by_class(build(), mesh_of, limits)[FacetClass.HANGING]
    # A triangle has one class, so a large one that is carried in part is wrong in part.
    assert hanging == pytest.approx(area, rel=0.2)


@pytest.mark.parametrize("name", PASSES)
def test_no_triangle_hangs_on_what_prints(name: str, mesh_of: MeshOf, limits: PrintLimits) -> None:
    areas = areas_by_class(PASSES[name][0](), mesh_of, limits)
    assert areas[FacetClass.HANGING] == 0
    if PASSES[name][1] is not None:
        assert areas[FacetClass.BRIDGE] > 0

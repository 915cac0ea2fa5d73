"""Cups that hold resin are found with their volume and drain; what drains raises no alarm."""

from __future__ import annotations

from math import pi, radians, sqrt, tan
from typing import TYPE_CHECKING

import pytest
from cadquery.func import box, cone, cylinder, sphere
from tests.checks.test_detection_table import lying, prism, tube

from gyrecut.checks import check_mesh, measure_mesh
from gyrecut.findings import Severity

if TYPE_CHECKING:
    from collections.abc import Callable

    from cadquery import Shape
    from tests.checks.conftest import MeshOf

    from gyrecut.checks import Cup, PrintLimits

    Builder = Callable[[], Shape]


def cup(outer: float = 30, bore: float = 24, height: float = 30, floor: float = 4) -> Shape:
    return cylinder(outer, height) - cylinder(bore, height).moved(z=floor)


def u_pipe() -> Shape:
    """Block with two wells joined at their feet, one well's mouth 12 mm lower."""
    block = box(60, 20, 40) - box(40, 20, 12).moved(x=20, z=28)
    wells = box(10, 10, 40).moved(x=-20, z=5) + box(10, 10, 40).moved(x=20, z=5)
    return block - wells - box(50, 10, 8).moved(z=5)


# Holds: the solid, volume in mm3, depth in mm, and whether it holds only upside down.
HOLDS: dict[str, tuple[Builder, float, float, bool]] = {
    "cup": (cup, pi * 12**2 * 26, 26, False),
    "cup upside down": (lambda: cup().moved(rx=180), pi * 12**2 * 26, 26, True),
    "cup with a notch in its rim": (
        lambda: cup() - box(40, 4, 10).moved(x=20, z=20),
        pi * 12**2 * 16,
        16,
        False,
    ),
    "cup with a hole half way up": (
        lambda: cup() - lying(4, 40, 18),
        pi * 12**2 * 12,
        12,
        False,
    ),
    "cup with a drain that is not at its lowest": (
        lambda: (
            (cylinder(40, 30) - cylinder(32, 40).moved(z=12) - cylinder(16, 10).moved(z=4))
            - lying(2, 60, 13)
        ),
        pi * 8**2 * 8,
        8,
        False,
    ),
    "box with a pocket": (lambda: box(40, 30, 12) - box(20, 10, 12).moved(z=4), 1600, 8, False),
    "bowl": (
        lambda: cylinder(40, 20) - sphere(30).moved(z=20),
        2 / 3 * pi * 15**3,
        15,
        False,
    ),
    "funnel without an outlet": (
        lambda: cylinder(40, 25) - cone(0.001, 30, 20).moved(z=5),
        pi / 3 * 15**2 * 20,
        20,
        False,
    ),
    "tall ring groove": (
        lambda: cylinder(60, 20) - tube(50, 40, 20).moved(z=5),
        pi / 4 * (50**2 - 40**2) * 15,
        15,
        False,
    ),
    "bent pipe": (u_pipe, 2 * 100 * 23 + 30 * 10 * 8, 23, False),
    "ceiling pocket of a ring": (
        lambda: cylinder(60, 20) - tube(50, 40, 15),
        pi / 4 * (50**2 - 40**2) * 15,
        15,
        True,
    ),
    "blind well in a flange": (
        lambda: tube(80, 60, 30) + cylinder(20, 30).moved(x=45) - cylinder(14, 26).moved(x=45, z=4),
        pi * 7**2 * 26,
        26,
        False,
    ),
    "trough": (
        lambda: box(50, 30, 12) - box(40, 20, 12).moved(z=6),
        40 * 20 * 6,
        6,
        False,
    ),
}

DRAINS: dict[str, Builder] = {
    "block": lambda: box(30, 30, 30),
    "tube": lambda: tube(30, 24, 40),
    "cup with a drain": lambda: cup() - cylinder(3, 10),
    "cup with a drain at the side": lambda: cup() - lying(3, 40, 5),
    "funnel": lambda: cylinder(40, 25) - cone(4, 30, 25),
    "cone": lambda: cone(40, 20, 40) - cone(36, 16, 40),
    "groove for a cord": lambda: tube(60, 30, 10) - tube(50, 45, 10).moved(z=7.5),
    "shallow tray": lambda: box(50, 30, 6) - box(44, 24, 6).moved(z=3),
    "blind screw hole": lambda: box(30, 30, 20) - cylinder(4, 20).moved(z=4),
    "trough open at both ends": lambda: box(50, 30, 20) - box(60, 20, 20).moved(z=6),
    "arch": lambda: box(50, 20, 30) - box(20, 30, 20),
    "room with a door": lambda: (
        box(40, 40, 40)
        - box(30, 30, 30).moved(z=5)
        - box(60, 10, 30).moved(x=30, z=5)
        - cylinder(6, 50).moved(z=20)
    ),
    "lying tube": lambda: lying(30, 60, 15) - lying(24, 60, 15),
    "v gutter that slopes": lambda: prism(40, (0, 0), (30, 0), (30, 20), (15, 5), (0, 20)).moved(
        rx=6
    ),
    "bottom groove": lambda: tube(60, 30, 12) - tube(50, 45, 3),
    "ball": lambda: sphere(30),
}


def cups_of(shape: Shape, mesh_of: MeshOf, limits: PrintLimits) -> tuple[Cup, ...]:
    solid = measure_mesh(mesh_of(shape), limits).solid
    assert solid is not None
    return solid.cups


@pytest.mark.parametrize("name", HOLDS)
def test_what_holds_resin_is_found(name: str, mesh_of: MeshOf, resin_limits: PrintLimits) -> None:
    build, volume, depth, upside_down = HOLDS[name]
    cups = cups_of(build(), mesh_of, resin_limits)
    assert len(cups) == 1, cups
    # Columns of half a millimetre, whose rim is right to half of that.
    assert cups[0].volume_mm3 == pytest.approx(volume, rel=0.06)
    assert cups[0].depth_mm == pytest.approx(depth, abs=0.6)
    assert cups[0].is_upside_down is upside_down


@pytest.mark.parametrize("name", DRAINS)
def test_what_drains_passes(name: str, mesh_of: MeshOf, resin_limits: PrintLimits) -> None:
    assert cups_of(DRAINS[name](), mesh_of, resin_limits) == ()


def test_the_drain_goes_where_the_cup_is_lowest(mesh_of: MeshOf, resin_limits: PrintLimits) -> None:
    funnel = cylinder(40, 25) - cone(0.001, 30, 20).moved(z=5)
    (found,) = cups_of(funnel, mesh_of, resin_limits)
    x, y, z = found.drain_mm
    assert abs(x) < 1
    assert abs(y) < 1
    assert z == pytest.approx(5, abs=0.8)
    drained = funnel - cylinder(3, 12).moved(x=x, y=y)
    assert cups_of(drained, mesh_of, resin_limits) == ()


def test_a_leaning_cup_holds_up_to_its_sill(mesh_of: MeshOf, resin_limits: PrintLimits) -> None:
    # A square well, leaned by 20 degrees about y, loses the wedge above its lower lip.
    lean, width, deep = radians(20), 20.0, 30.0
    well = (box(30, 30, 40) - box(width, width, deep).moved(z=10)).moved(ry=20)
    (found,) = cups_of(well, mesh_of, resin_limits)
    volume = width * width * deep - width * (width**2 * tan(lean) / 2)
    assert found.volume_mm3 == pytest.approx(volume, rel=0.05)


def test_two_cups_are_two_and_the_larger_comes_first(
    mesh_of: MeshOf, resin_limits: PrintLimits
) -> None:
    both = box(60, 30, 20) - box(20, 20, 20).moved(x=-15, z=5) - box(10, 20, 20).moved(x=20, z=5)
    first, second = cups_of(both, mesh_of, resin_limits)
    assert first.volume_mm3 == pytest.approx(6000, rel=0.06)
    assert second.volume_mm3 == pytest.approx(3000, rel=0.08)


def test_the_finding_warns_on_resin_only(
    mesh_of: MeshOf, limits: PrintLimits, resin_limits: PrintLimits
) -> None:
    mesh = mesh_of(cup())
    (finding,) = (f for f in check_mesh(mesh, "cup", resin_limits) if f.code == "resin-cup")
    assert finding.severity is Severity.WARN
    assert finding.measured == pytest.approx(pi * 12**2 * 26 / 1000, rel=0.05)
    assert finding.unit == "ml"
    assert "drain" in finding.fix
    assert not [f for f in check_mesh(mesh, "cup", limits) if f.code == "resin-cup"]


def test_round_mouths_do_not_hide_a_cup(mesh_of: MeshOf, resin_limits: PrintLimits) -> None:
    # A flask whose neck is narrower than its belly.
    flask = cylinder(50, 40) - sphere(36).moved(z=20) - cylinder(8, 30).moved(z=20)
    (found,) = cups_of(flask, mesh_of, resin_limits)
    cap = 18 - sqrt(18**2 - 4**2)
    neck = pi * 16 * (2 + cap) - pi * cap**2 * (3 * 18 - cap) / 3
    assert found.volume_mm3 == pytest.approx(4 / 3 * pi * 18**3 + neck, rel=0.05)

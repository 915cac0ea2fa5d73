"""Thin walls planted in solids of known answer are all found; sound solids raise no alarm.

Every solid is built at two sizes and meshed finely and coarsely. The printer's smallest wall is
0.8 mm. What stays sharp or small on the sound ones is what the pieces of a separator have.
"""

from __future__ import annotations

from itertools import product
from math import cos, pi, radians, sin, tan
from typing import TYPE_CHECKING

import pytest
from cadquery.func import (
    box,
    cone,
    cylinder,
    extrude,
    face,
    fillet,
    polygon,
    revolve,
    sphere,
    torus,
)

from gyrecut.checks import measure_mesh

if TYPE_CHECKING:
    from collections.abc import Callable

    import trimesh
    from cadquery import Shape
    from tests.checks.conftest import MeshOf

    from gyrecut.checks import PrintLimits, SolidMeasures

    Builder = Callable[[float], Shape]
    Place = tuple[float, float]

SIZES = (1.0, 2.5)
MESHES = ((0.02, 0.15), (0.2, 0.5))  # chord mm, angle rad


def spun(*outline: Place) -> Shape:
    """Solid of revolution about z from (radius, height) corners."""
    return revolve(face(polygon(*[(r, 0, z) for r, z in outline])), (0, 0, 0), (0, 0, 1))


def prism(length: float, *outline: Place) -> Shape:
    """Prism along y from (x, z) corners."""
    return extrude(face(polygon(*[(x, 0, z) for x, z in outline])), (0, length, 0))


def tube(outer: float, bore: float, height: float, off: float = 0) -> Shape:
    """Tube on z = 0, its bore set off sideways."""
    return cylinder(outer, height) - cylinder(bore, height).moved(x=off)


def lying(diameter: float, length: float, height: float) -> Shape:
    """Cylinder along y, its middle at the height given."""
    return cylinder(diameter, length).moved(rx=90).moved(y=length / 2, z=height)


def holed_ring(k: float, count: int, hole: float, outer: float, bore: float) -> Shape:
    """Flange 6 mm high with holes half way out."""
    ring = tube(outer * k, bore * k, 6)
    middle = (outer + bore) * k / 4
    for one in range(count):
        turn = 2 * pi * one / count
        ring -= cylinder(hole, 6).moved(x=middle * cos(turn), y=middle * sin(turn))
    return ring


def inlet_body(k: float) -> Shape:
    """A barrel with a slot that enters along its side, its lip ending in a sharp edge."""
    radius, wall, slot = 40 * k, 2.4, 16 * k  # slot width 0.2 of the diameter, as usual
    duct = box(slot + 2 * wall, 70 * k, 40).moved(x=radius - slot / 2, y=-35 * k)
    way = box(slot, 70 * k, 40 - 2 * wall).moved(x=radius - slot / 2, y=-35 * k, z=wall)
    body = cylinder(2 * (radius + wall), 50) + duct
    return body - cylinder(2 * radius, 50) - way


def _hexagon(across: float) -> list[tuple[float, float, float]]:
    radius = across / 2 / cos(pi / 6)
    return [(radius * cos(pi / 3 * n), radius * sin(pi / 3 * n), 0) for n in range(6)]


def _rounded_disc(k: float) -> Shape:
    disc = cylinder(40 * k, 4)
    return fillet(disc, disc.edges(">Z"), 1.5)


PLANTED: dict[str, Builder] = {
    "pocket floor in a plate": lambda k: box(40 * k, 30 * k, 2) - box(5, 5, 1.5).moved(z=0.5),
    "pocket floor in an upright wall": lambda k: (
        box(40 * k, 2, 40 * k) - box(5, 1.5, 5).moved(y=0.25, z=20)
    ),
    "pocket floor in a barrel": lambda k: (
        tube(80 * k, 80 * k - 4, 60)
        - (tube(80 * k + 2, 80 * k - 3, 5).moved(z=30) * box(20, 6, 60).moved(x=40 * k))
    ),
    "flat bottom of a blind hole": lambda k: box(30 * k, 30 * k, 6) - cylinder(5, 6).moved(z=0.4),
    "drilled tip": lambda k: box(30 * k, 30 * k, 8) - spun((0, 0.3), (2.5, 1.8), (2.5, 9), (0, 9)),
    "groove bottom": lambda k: (
        box(30 * k, 40 * k, 4) - prism(50 * k, (0, 0.3), (5, 5.3), (-5, 5.3)).moved(y=-25 * k)
    ),
    "rib that runs out": lambda k: (
        box(40 * k, 40 * k, 2) + prism(20 * k, (-1.5, 1), (1.5, 1), (0.1, 14), (-0.1, 14))
    ),
    "rib": lambda k: box(40 * k, 40 * k, 2) + box(0.5, 20 * k, 10),
    "low rib": lambda k: box(40 * k, 40 * k, 2) + box(0.5, 20 * k, 4),
    "web between holes": lambda k: (
        box(40 * k, 20 * k, 5) - cylinder(6, 5).moved(x=3.2) - cylinder(6, 5).moved(x=-3.2)
    ),
    "web between small holes": lambda k: (
        box(40 * k, 20 * k, 3) - cylinder(3, 3).moved(x=1.75) - cylinder(3, 3).moved(x=-1.75)
    ),
    "web between hole and rim": lambda k: (
        cylinder(60 * k, 5) - cylinder(6, 5).moved(x=30 * k - 3.4)
    ),
    "web between hole and edge": lambda k: (
        box(40 * k, 20 * k, 5) - cylinder(5, 5).moved(y=10 * k - 2.9)
    ),
    "bore off the middle": lambda k: tube(60 * k, 60 * k - 4, 30, off=1.6),
    "thin tube": lambda k: tube(60 * k, 60 * k - 1.2, 30),
    "thin small tube": lambda _: tube(4, 3, 12),
    "thin cone": lambda k: spun((30 * k, 0), (30 * k + 0.5, 0), (10 * k + 0.5, 60), (10 * k, 60)),
    "groove round a barrel": lambda k: (
        tube(60 * k, 60 * k - 4, 40) - tube(60 * k + 2, 60 * k - 3, 3).moved(z=20)
    ),
    "thin lap": lambda k: tube(60 * k, 60 * k - 4, 20) + tube(60 * k, 60 * k - 1.2, 26),
    "thin floor": lambda k: cylinder(60 * k, 20) - cylinder(60 * k - 6, 20).moved(z=0.5),
    "thin side of a box": lambda k: (
        box(40 * k, 30 * k, 20) - box(40 * k - 4, 30 * k - 4, 20).moved(x=1.5, z=2)
    ),
    "skin over a slit": lambda k: box(40 * k, 30 * k, 8) - box(12, 40 * k, 2).moved(z=5.6),
    "keen blade": lambda k: prism(30 * k, (0, 0), (40, 0), (0, 40 * tan(radians(10)))),
    "lip on a thin wall": lambda k: (
        tube(60 * k, 60 * k - 1.2, 30) + torus(60 * k - 0.6, 0.6).moved(z=30)
    ),
    "thin bowl": lambda k: (sphere(40 * k) - sphere(40 * k - 1)) - box(99 * k, 99 * k, 99 * k),
    "nut trap near the face": lambda k: (
        box(30 * k, 30 * k, 8) - extrude(face(polygon(*_hexagon(7.3))), (0, 0, 8)).moved(z=0.4)
    ),
    "boss near the edge": lambda k: (
        box(30 * k, 30 * k, 10) - cylinder(5.6, 8).moved(x=15 * k - 2.8 - 0.5, z=2)
    ),
    "lying hole under the top": lambda k: box(30 * k, 40 * k, 12) - lying(6, 60 * k, 12 - 3.4),
    "two countersinks": lambda k: (
        box(30 * k, 30 * k, 6) - cone(2.2, 6.5, 2.8).moved(z=3.2) - cone(6.5, 2.2, 2.8)
    ),
    "tube that runs thin": lambda k: spun(
        (28 * k, 0), (28 * k + 2, 0), (28 * k + 0.4, 60), (28 * k, 60)
    ),
    "thin slice of a ring": lambda k: tube(60 * k, 40 * k, 10) * box(0.5, 200, 10).moved(y=100),
}


SOUND: dict[str, Builder] = {
    "block": lambda k: box(10 * k, 20 * k, 30),
    "barrel": lambda k: tube(80 * k, 80 * k - 4.8, 80),
    "wall at the limit": lambda k: tube(60 * k, 60 * k - 1.6, 30),
    "upright wall at the limit": lambda k: box(40 * k, 0.8, 20),
    "cone": lambda k: spun((30 * k, 0), (30 * k + 2, 0), (10 * k + 2, 60), (10 * k, 60)),
    "solid cone to a point": lambda k: cone(30 * k, 40 * k),
    "gusset plate": lambda k: prism(3, (0, 0), (30 * k, 0), (0, 30 * k)),
    "gusset on a wall": lambda k: (
        box(3, 40 * k, 50 * k) + box(60, 40 * k, 3) + prism(3, (0, 2), (25, 2), (0, 27))
    ),
    "flare to a sharp rim": lambda k: spun(
        (20 * k, 0), (22 * k, 0), (32 * k, 10 * k), (20 * k, 10 * k)
    ),
    "countersink flush with the face": lambda k: box(20 * k, 20 * k, 5) - cone(3, 13, 5),
    "bullnose lip": lambda k: tube(60 * k, 60 * k - 4, 30) + torus(60 * k - 2, 2).moved(z=30),
    "flange": lambda k: holed_ring(k, 8, 4.8, 90, 60),
    "flange with wide webs": lambda k: holed_ring(k, 12, 4.0, 60, 40),
    "lap joint": lambda k: tube(60 * k, 60 * k - 7.8, 20) + tube(60 * k, 60 * k - 3.8, 30),
    "lap joint with lead in": lambda k: spun(
        (30 * k - 3.9, 0),
        (30 * k, 0),
        (30 * k, 29.5),
        (30 * k - 0.5, 30),
        (30 * k - 1.4, 30),
        (30 * k - 1.9, 29.5),
        (30 * k - 1.9, 20),
        (30 * k - 3.9, 20),
    ),
    "gable": lambda k: prism(40 * k, (-10 * k, 0), (10 * k, 0), (0, 10 * k)),
    "wedge of 30 degrees": lambda k: prism(30 * k, (0, 0), (30, 0), (0, 30 * tan(radians(30)))),
    "corner plate": lambda k: extrude(
        face(polygon((0, 0, 0), (20 * k, 0, 0), (0, 20 * k, 0))), (0, 0, 4)
    ),
    "ball": lambda k: sphere(30 * k),
    "ring": lambda k: torus(60 * k, 5),
    "inlet": inlet_body,
    "shallow groove": lambda k: (
        box(30 * k, 40 * k, 4) - prism(50 * k, (0, 1.5), (5, 6.5), (-5, 6.5)).moved(y=-25 * k)
    ),
    "pocket with a sound floor": lambda k: box(40 * k, 30 * k, 3) - box(8, 8, 3).moved(z=1.2),
    "embossed strokes": lambda k: (
        box(40 * k, 30 * k, 3) + box(0.5, 6, 3.4).moved(x=3) + tube(4, 2.8, 3.5).moved(x=-5)
    ),
    "cut strokes": lambda k: (
        box(40 * k, 30 * k, 3)
        - box(0.6, 6, 3).moved(x=3, z=2.4)
        - tube(4, 2.8, 3).moved(x=-5, z=2.4)
        - tube(1.9, 0.7, 3).moved(x=-9, z=2.4)
    ),
    "foot chamfer": lambda k: spun(
        (30 * k + 0.5, 0),
        (30 * k + 1.9, 0),
        (30 * k + 2.4, 0.5),
        (30 * k + 2.4, 40),
        (30 * k, 40),
        (30 * k, 0.5),
    ),
    "cord groove": lambda k: tube(80 * k, 60 * k, 6) - tube(71.5 * k, 71.5 * k - 6, 3).moved(z=3),
    "nut trap": lambda k: (
        box(30 * k, 30 * k, 8)
        - extrude(face(polygon(*_hexagon(7.3))), (0, 0, 8)).moved(z=3)
        - cylinder(4.5, 8)
    ),
    "teardrop hole": lambda k: (
        box(30 * k, 40 * k, 30)
        - lying(10, 60 * k, 15)
        - prism(60 * k, (-3.536, 18.536), (3.536, 18.536), (0, 22.071)).moved(y=-30 * k)
    ),
    "dovetail": lambda k: (
        prism(40 * k, (-6, 0), (6, 0), (10, 4), (-10, 4)) + box(30, 80 * k, 4).moved(z=4)
    ),
    "sector of a ring": lambda k: (
        tube(60 * k, 40 * k, 10)
        * extrude(face(polygon((0, 0, 0), (99 * k, 0, 0), (99 * k, 99 * k, 0))), (0, 0, 10))
    ),
    "keel under a duct": lambda k: (
        box(20 * k, 60, 20).moved(z=10 * k)
        + prism(60, (-10 * k, 10 * k), (0, 0), (10 * k, 10 * k)).moved(y=-30)
    ),
    "disc with a rounded rim": _rounded_disc,
}


def _measures(
    name: str, table: dict[str, Builder], mesh_of: MeshOf, limits: PrintLimits
) -> list[SolidMeasures]:
    solids = []
    for size, (chord, angle) in product(SIZES, MESHES):
        shape = table[name](size)
        mesh: trimesh.Trimesh = mesh_of(shape, chord, angle)
        measures = measure_mesh(mesh, limits)
        assert measures.solid is not None, (name, size, measures.closedness)
        solids.append(measures.solid)
    return solids


@pytest.mark.parametrize("name", PLANTED)
def test_a_planted_thin_wall_is_found(name: str, mesh_of: MeshOf, limits: PrintLimits) -> None:
    found = [solid.thickness for solid in _measures(name, PLANTED, mesh_of, limits)]
    assert all(thickness.thin_share > 0 for thickness in found), found
    assert all(0 < thickness.smallest_mm < 0.76 for thickness in found), found


@pytest.mark.parametrize("name", SOUND)
def test_a_sound_solid_raises_no_alarm(name: str, mesh_of: MeshOf, limits: PrintLimits) -> None:
    found = [solid.thickness for solid in _measures(name, SOUND, mesh_of, limits)]
    assert all(thickness.thin_share == 0 for thickness in found), found
    assert all(thickness.smallest_mm > 0.74 for thickness in found), found


def test_the_table_is_long_enough_to_mean_something() -> None:
    assert len(PLANTED) >= 25
    assert len(SOUND) >= 25

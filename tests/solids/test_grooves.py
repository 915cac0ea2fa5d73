"""Cord grooves: closed, as deep and wide as the guides ask, clear of air, screws and edges.

Groove proportions: squeeze 20 to 30 % and a fill below 90 %, face seals in three O-ring makers'
guides. Shapes are held against shapely's own offset of the same outline.
"""

from __future__ import annotations

from dataclasses import replace
from math import cos, hypot, pi, sin
from typing import TYPE_CHECKING

import pytest
from cadquery import func
from shapely.geometry import Point, Polygon

from gyrecut.solids import Parts, make_parts
from gyrecut.solids.body import barrel, swirl_plan
from gyrecut.solids.ends import bin_ring
from gyrecut.solids.transition import transition

if TYPE_CHECKING:
    from gyrecut.proportions.dimensions import Dimensions, Groove


def plan_of_the_air(d: Dimensions) -> Polygon:
    """Barrel and slot channel, the arc in 4000 steps."""
    corner, start, tangent, on_bore, on_wall = swirl_plan(d)
    radius = d.body.radius_mm
    disc = Polygon(
        [(radius * cos(2 * pi * k / 4000), radius * sin(2 * pi * k / 4000)) for k in range(4000)]
    )
    channel = Polygon([corner, start, tangent, (0.0, 0.0), on_bore, on_wall])
    return disc.union(channel)


def band_round(opening: Polygon, groove: Groove) -> Polygon:
    """The groove seen from above; turning outwards, the cord's middle has the turn's radius."""

    def edge(distance: float, turn: float) -> Polygon:
        return opening.buffer(distance + turn, 256).buffer(-turn, 256)

    half = groove.width_mm / 2
    return edge(groove.outer_mm, groove.turn_mm - half).difference(
        edge(groove.wall_mm, groove.turn_mm + half)
    )


@pytest.fixture
def sealed(made: tuple[Dimensions, Parts]) -> Dimensions:
    d, _ = made
    assert d.seals.lid is not None
    assert d.seals.transition is not None
    return d


def test_proportions_keep_to_the_guides(sealed: Dimensions) -> None:
    groove = sealed.seals.lid
    assert groove is not None
    squeeze = 1 - groove.depth_mm / groove.cord_mm
    fill = pi / 4 * groove.cord_mm**2 / (groove.depth_mm * groove.width_mm)
    assert 0.20 <= squeeze <= 0.30
    assert 0.70 <= fill <= 0.90


def test_the_lids_groove_is_the_band_round_the_air(sealed: Dimensions) -> None:
    d, groove = sealed, sealed.seals.lid
    assert groove is not None
    plain = barrel(replace(d, seals=replace(d.seals, lid=None)))
    taken = func.cut(plain, barrel(d))
    assert len(taken.Solids()) == 1
    air = plan_of_the_air(d)
    band = band_round(air, groove)
    assert taken.Volume() == pytest.approx(band.area * groove.depth_mm, rel=2e-3)
    # a ring: one hole, so the cord closes on itself
    assert len(band.interiors) == 1
    assert taken.BoundingBox().zlen == pytest.approx(groove.depth_mm, abs=1e-6)


def test_nothing_crosses_the_lids_groove(sealed: Dimensions) -> None:
    d, groove = sealed, sealed.seals.lid
    assert groove is not None
    band = band_round(plan_of_the_air(d), groove)
    rim, portal = d.rim.screws, d.portal
    for x, y in rim.places_mm:
        away = band.distance(Point(x, y)) - rim.insert_hole_mm / 2
        assert away >= groove.land_mm - 1e-3
    # inside the outline of rim and lid on every side
    outer = Polygon(band.exterior)
    land = (
        Point(0, 0)
        .buffer(d.rim.outer_radius_mm, 256)
        .union(
            Polygon(
                [
                    (portal.face_x_mm, portal.frame_low_y_mm),
                    (0.0, portal.frame_low_y_mm),
                    (0.0, portal.frame_high_y_mm),
                    (portal.face_x_mm, portal.frame_high_y_mm),
                ]
            )
        )
    )
    assert land.buffer(-0.9 * groove.land_mm).contains(outer)
    # and the lintel's insert holes end beside it, the gable's peak below it
    assert portal.mouth_top_mm < -groove.depth_mm - 1.0


def test_the_transitions_groove_runs_round_the_mouth(sealed: Dimensions) -> None:
    d, groove = sealed, sealed.seals.transition
    assert groove is not None
    plain = transition(replace(d, seals=replace(d.seals, transition=None)))
    taken = func.cut(plain, transition(d))
    mouth = Polygon(d.portal.mouth_outline(d.body.radius_mm))
    band = band_round(mouth, groove)
    assert taken.Volume() == pytest.approx(band.area * groove.depth_mm, rel=1e-3)
    screws = d.portal.screws
    for y, z in screws.places_mm:
        assert mouth.distance(Point(y, z)) - groove.outer_mm > screws.clearance_hole_mm / 2
    # the flange ends at the roof: the groove passes over the mouth below it
    assert mouth.buffer(groove.clear_mm).bounds[3] <= 1e-6


def test_the_bin_rings_groove_lies_between_bore_and_screws(made: tuple[Dimensions, Parts]) -> None:
    d, _ = made
    groove = d.seals.bin_ring
    if groove is None:
        assert bin_ring(d).isValid()
        return
    taken = func.cut(bin_ring(replace(d, seals=replace(d.seals, bin_ring=None))), bin_ring(d))
    bore = d.bin_ring.bore_mm / 2
    area = pi * ((bore + groove.outer_mm) ** 2 - (bore + groove.wall_mm) ** 2)
    assert taken.Volume() == pytest.approx(area * groove.depth_mm, rel=1e-9)
    for x, y in d.bin_ring.screws.places_mm:
        hole = d.bin_ring.screws.clearance_hole_mm / 2
        assert hypot(x, y) - hole - bore - groove.outer_mm >= groove.land_mm - 1e-6


def test_cord_bought_reaches_round_every_groove(sealed: Dimensions) -> None:
    from gyrecut.catalogue import fasteners  # noqa: PLC0415 - one test buys
    from gyrecut.kit.assembly import hardware  # noqa: PLC0415

    d = sealed
    bought = next(
        item
        for item in hardware(d, fasteners()[d.rim.screws.thread], copies=1)
        if "cord" in item.what
    )
    air = plan_of_the_air(d)
    need = 0.0
    if d.seals.lid:
        need += air.buffer(d.seals.lid.middle_mm, 256).exterior.length
    if d.seals.transition:
        mouth = Polygon(d.portal.mouth_outline(d.body.radius_mm))
        need += mouth.buffer(d.seals.transition.middle_mm, 256).exterior.length
    if d.seals.bin_ring:
        need += 2 * pi * (d.bin_ring.bore_mm / 2 + d.seals.bin_ring.middle_mm)
    metres = float(bought.quantity.split()[0])
    assert need <= metres * 1000 <= 1.12 * need


def test_grooves_are_asked_for_joint_by_joint(made: tuple[Dimensions, Parts]) -> None:
    d, _ = made
    bare = replace(d, seals=replace(d.seals, lid=None, transition=None, bin_ring=None))
    assert make_parts(bare).body.Volume() > make_parts(d).body.Volume()

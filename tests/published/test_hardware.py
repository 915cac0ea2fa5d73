"""Hoses, screws, holes and nuts against their standards."""

from __future__ import annotations

import pytest

from gyrecut.catalogue import fasteners, hoses

# ISO 273, clearance holes for screws, fine, medium, coarse, in mm (two published copies agree).
ISO_273 = {"M3": (3.2, 3.4, 3.6), "M4": (4.3, 4.5, 4.8), "M5": (5.3, 5.5, 5.8), "M6": (6.4, 6.6, 7)}
# ISO 4762, socket head cap screws, head diameter and height, in mm.
ISO_4762 = {"M3": (5.5, 3), "M4": (7, 4), "M5": (8.5, 5), "M6": (10, 6)}
# ISO 4032, hexagon nuts style 1, width across flats and largest height, in mm.
ISO_4032 = {"M3": (5.5, 2.4), "M4": (7, 3.2), "M5": (8, 4.7), "M6": (10, 5.2)}

# Sizes met in dust extraction; common practice, no source.
MILLIMETRE_SIZES = (
    *(27, 32, 35, 36, 38, 40, 50, 58, 63, 64, 75, 76, 80),
    *(100, 102, 120, 125, 150, 160, 200),
)
INCH_SIZES = ("1.25", "1.5", "2", "2.25", "2.5", "3", "4", "5", "6")
# The same sizes as trade lists print them, in mm.
PRINTED_INCHES = (31.75, 38.1, 50.8, 57.15, 63.5, 76.2, 101.6, 127, 152.4)


@pytest.mark.parametrize("name", ISO_273)
def test_screws_are_the_standard_ones(name: str) -> None:
    screw = fasteners()[name]
    millimetres = [
        1000 * value
        for value in (
            screw.thread,
            screw.clearance_fine,
            screw.clearance_medium,
            screw.clearance_coarse,
            screw.head_diameter,
            screw.head_height,
            screw.nut_across_flats,
            screw.nut_height,
        )
    ]
    expected = [float(name[1:]), *ISO_273[name], *ISO_4762[name], *ISO_4032[name]]
    assert millimetres == pytest.approx(expected, rel=1e-12)


def test_every_screw_is_checked() -> None:
    assert set(fasteners()) == set(ISO_273)


def test_an_insert_takes_its_screw_and_leaves_a_wall() -> None:
    for screw in fasteners().values():
        assert screw.thread < screw.insert_hole < screw.boss_diameter
        # Common practice, no source: a boss of at least 1.9 holes, rounded to a millimetre.
        assert screw.boss_diameter >= 1.9 * screw.insert_hole
        assert screw.insert_length >= 1.5 * screw.thread


def test_inch_sizes_are_exact_inches() -> None:
    for size, printed in zip(INCH_SIZES, PRINTED_INCHES, strict=True):
        nominal = hoses()[f"{size} in"].nominal
        assert nominal == pytest.approx(float(size) * 0.0254, rel=1e-12)
        assert nominal * 1000 == pytest.approx(printed, rel=1e-12)


def test_millimetre_sizes_are_what_their_names_say() -> None:
    for size in MILLIMETRE_SIZES:
        assert hoses()[f"{size} mm"].nominal == pytest.approx(size / 1000, rel=1e-12)


def test_no_hose_is_left_unchecked() -> None:
    assert len(hoses()) == len(MILLIMETRE_SIZES) + len(INCH_SIZES)

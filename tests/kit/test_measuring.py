from __future__ import annotations

from math import pi
from typing import TYPE_CHECKING

import pytest

if TYPE_CHECKING:
    from gyrecut.kit.contents import KitContents


def test_tube_is_measured_by_its_closed_form(contents: KitContents) -> None:
    barrel = contents.pieces[0]
    volume = pi / 4 * (120**2 - 112**2) * 80
    assert barrel.volume_mm3 == pytest.approx(volume, rel=1e-9)
    # 1 kg/m^3 is 1e-6 g/mm^3
    assert barrel.mass_g == pytest.approx(volume * 1270e-6, rel=1e-9)
    assert barrel.size_mm == pytest.approx((120, 120, 80), abs=0.1)


def test_flat_piece_has_its_exact_size(contents: KitContents) -> None:
    plate = contents.pieces[2]
    assert plate.size_mm == pytest.approx((50, 50, 6), abs=1e-6)
    assert plate.mass_g == pytest.approx(50 * 50 * 6 * 1.27e-3, rel=1e-9)

from __future__ import annotations

import subprocess
import sys

import pytest

from gyrecut.kit.cautions import Caution, cautions

# What the project promises to show with every result a person could act on.
PROMISED = {
    "combustible-dust": ("explosion", "sparks", "competent person"),
    "forbidden-materials": ("aluminium", "grinder", "ash", "solvent", "liquid"),
    "static": ("Bond", "metal", "earth"),
    "fine-dust": ("filter", "respirator", "no health protection"),
    "vacuum-on-bin": ("relief valve", "buckles"),
    "blowers": ("plug", "Guard"),
    "printed-plastic": ("combustible", "insulator", "softens"),
    "noise": ("85 dB(A)", "hearing protection"),
    "estimates": ("Measure", "weigh"),
    "local-rules": ("licensed",),
}


def shown(*, combustible: bool) -> tuple[Caution, ...]:
    return cautions(polymer="PLA", softening_temperature=328.15, dust_is_combustible=combustible)


@pytest.mark.parametrize("combustible", [True, False])
def test_none_is_left_out(*, combustible: bool) -> None:
    said = {caution.code: caution.text for caution in shown(combustible=combustible)}
    assert said.keys() == PROMISED.keys()
    for code, words in PROMISED.items():
        assert all(word in said[code] for word in words), code


def test_combustible_dust_comes_first_for_a_dust_that_burns() -> None:
    assert shown(combustible=True)[0].code == "combustible-dust"
    assert shown(combustible=False)[0].code == "fine-dust"


def test_softening_is_said_in_degrees_celsius() -> None:
    # 273.15 K is 0 degrees Celsius by definition (SI brochure, from memory)
    text = next(c.text for c in shown(combustible=True) if c.code == "printed-plastic")
    assert "PLA is combustible" in text
    assert "softens near 55 °C" in text


def test_commands_that_build_nothing_can_show_them_without_the_cad_kernel() -> None:
    heavy = {"cadquery", "OCP", "trimesh", "lib3mf"}
    code = (
        "import sys, gyrecut.kit.cautions, gyrecut.kit.contents, gyrecut.kit.folder, "
        "gyrecut.kit.manifest, gyrecut.kit.summary; "
        f"print(sorted({heavy!r} & set(sys.modules)))"
    )
    done = subprocess.run([sys.executable, "-c", code], capture_output=True, text=True, check=True)
    assert done.stdout == "[]\n"

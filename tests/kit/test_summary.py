from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

import pytest

from gyrecut.findings import Finding, Severity
from gyrecut.kit.cautions import cautions
from gyrecut.kit.contents import Fact
from gyrecut.kit.summary import summary_text

if TYPE_CHECKING:
    from gyrecut.kit.contents import KitContents

STOP = Finding(
    code="too-tall", severity=Severity.STOP, part="barrel", what="it does not fit the printer"
)


def test_first_line_is_the_verdict(contents: KitContents) -> None:
    def first_line(*findings: Finding) -> str:
        return summary_text(replace(contents, findings=findings)).splitlines()[0]

    (warning,) = contents.findings
    assert first_line() == "# test-bench: can be built"
    assert first_line(warning) == "# test-bench: can be built, with one warning"
    assert first_line(warning, warning) == "# test-bench: can be built, with 2 warnings"
    assert first_line(warning, STOP) == "# test-bench: do not build this yet"


def test_what_stops_it_follows_the_verdict(contents: KitContents) -> None:
    lines = summary_text(replace(contents, findings=(*contents.findings, STOP))).splitlines()
    assert lines[1:5] == [
        "",
        "What stops it:",
        "",
        "- **stop** barrel: it does not fit the printer `too-tall`",
    ]


def test_finding_says_numbers_place_and_cure(contents: KitContents) -> None:
    assert (
        "- **warn** barrel: the wall is thin (1.1 mm, allowed 1.2 mm) Where: at the rim. "
        "What to do: give walls.body 1.2 mm. `thin-wall`"
    ) in summary_text(contents).splitlines()


def test_finding_with_a_measured_number_only(contents: KitContents) -> None:
    found = replace(STOP, measured=12345.6, unit="mm")
    text = summary_text(replace(contents, findings=(found,)))
    assert "it does not fit the printer (12346 mm) `too-tall`" in text


def test_gravest_finding_comes_first(contents: KitContents) -> None:
    text = summary_text(replace(contents, findings=(*contents.findings, STOP)))
    section = text[text.index("## What the checks found") :]
    assert section.index("too-tall") < section.index("thin-wall")


def test_estimate_is_called_one_and_says_what_to_do_with_it(contents: KitContents) -> None:
    text = summary_text(contents)
    section = text[text.index("## What to expect") : text.index("## Pieces")]
    assert "| cut size | 3.2 um | Lapple |" in section
    assert "An estimate: published models side by side" in section
    assert "Weigh and measure after building." in section


def test_pieces_are_listed_with_copies_sizes_and_masses(contents: KitContents) -> None:
    text = summary_text(contents)
    # 50 x 50 x 6 mm at 1270 kg/m3 is 19.05 g
    assert "| Plate | `pieces/plate.stl` | 3 | 50.0 x 50.0 x 6.0 | 19 |  |  |" in text
    assert "In all 5 prints, " in text
    mass = sum(piece.copies * piece.mass_g for piece in contents.pieces) / 1000
    assert f"{mass:.2f} kg of PETG" in text


def test_upright_in_a_title_does_not_break_the_table(contents: KitContents) -> None:
    assert "| Inlet \\| transition | `pieces/inlet.stl` |" in summary_text(contents)


def test_steps_are_numbered_and_hardware_listed(contents: KitContents) -> None:
    text = summary_text(contents)
    assert "1. Press the inserts in.\n2. Screw the lid on." in text
    assert "| screw M4 x 16 | 12 | lid |" in text


def test_empty_sections_are_left_out(contents: KitContents) -> None:
    text = summary_text(replace(contents, hardware=(), steps=(), findings=()))
    for title in ("What to buy", "How it goes together", "What the checks found"):
        assert title not in text
    assert "\n\n\n" not in text


def test_every_caution_is_shown(contents: KitContents) -> None:
    text = summary_text(contents)
    shown = cautions(polymer="PETG", softening_temperature=353.15, dust_is_combustible=True)
    for caution in shown:
        assert f"- **{caution.title}.** {caution.text}" in text


@pytest.mark.parametrize(
    ("value", "shown"),
    [(0.0, "0"), (0.1234567, "0.1235"), (999.95, "1000"), (9999.4, "9999"), (123456.7, "123457")],
)
def test_numbers_have_four_digits_and_no_exponent(
    value: float, shown: str, contents: KitContents
) -> None:
    text = summary_text(replace(contents, body=(Fact(label="length", value=value, unit="mm"),)))
    assert f"| length | {shown} mm |  |" in text

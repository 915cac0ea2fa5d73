"""`extends`: what is merged, what is refused, and files that are no profile at all."""

from __future__ import annotations

import re
from pathlib import Path
from typing import TYPE_CHECKING

import pytest

from gyrecut.profile import load_profile, profile_hash
from gyrecut.profile.air import OwnSource
from gyrecut.profile.models import BlowerOutlet
from gyrecut.profile.sizes import LogNormalSizes, RosinRammlerSizes

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

    Write = Callable[[Mapping[str, str | bytes]], None]
    Refusal = Callable[[Mapping[str, str | bytes]], str]


FILES: list[tuple[str, bytes, str]] = [
    (
        "empty",
        b"",
        """\
broken.yaml:1:1: P007 the profile is empty
  given: nothing
  allowed: the keys of a profile, from name to joints
  do: start from a shipped profile, or from the one `gyrecut new` writes""",
    ),
    (
        "only-comments",
        b"# nothing yet\n\n# still nothing\n",
        """\
broken.yaml:1:1: P007 the profile is empty
   1 | # nothing yet
     | ^
  given: # nothing yet
  allowed: the keys of a profile, from name to joints
  do: start from a shipped profile, or from the one `gyrecut new` writes""",
    ),
    (
        "list-at-the-top",
        b"- name: good\n",
        """\
broken.yaml:1:1: P008 the profile is not a group of keys
   1 | - name: good
     | ^
  given: a list of 1
  allowed: keys and values, one a line, with a colon and a space between
  do: begin with a line such as "name: my-separator\"""",
    ),
    (
        "text-at-the-top",
        b"good\n",
        """\
broken.yaml:1:1: P008 the profile is not a group of keys
   1 | good
     | ^^^^
  given: good
  allowed: keys and values, one a line, with a colon and a space between
  do: begin with a line such as "name: my-separator\"""",
    ),
    (
        "binary",
        b"PK\x03\x04\x00\x00",
        """\
broken.yaml:1:3: P003 the profile is not a text file
   1 | PK????
     |   ^
  given: the control character 0x03
  allowed: printable text
  do: check that it is the file you mean, or delete the character""",
    ),
    (
        "not-utf8",
        b"name: good\ndescription: pr\xe9cis\n",
        """\
broken.yaml:2:16: P004 the profile is not UTF-8 text
   2 | description: pr\ufffdcis
     |                ^
  given: the byte 0xe9
  allowed: text in UTF-8
  do: save the file again as UTF-8""",
    ),
    (
        "utf16",
        "name: good\n".encode("utf-16"),
        """\
broken.yaml:1:1: P004 the profile is not UTF-8 text
   1 | \ufffd\ufffdn?a?m?e?:? ?g?o?o?d?
     | ^
  given: the byte 0xff
  allowed: text in UTF-8
  do: save the file again as UTF-8""",
    ),
    (
        "too-large",
        b"#" * 1_000_001,
        """\
broken.yaml:1:1: P002 the profile is too large
  given: a larger file
  allowed: up to 1000000 bytes
  do: check that it is the file you mean""",
    ),
]


@pytest.mark.parametrize(
    ("content", "message"), [case[1:] for case in FILES], ids=[case[0] for case in FILES]
)
def test_a_file_that_is_no_profile(content: bytes, message: str, refusal: Refusal) -> None:
    assert refusal({"broken.yaml": content}) == message


def test_too_many_values_are_not_even_read(refusal: Refusal) -> None:
    told = refusal({"broken.yaml": "description: [" + "1," * 400_000 + "]\n"})
    # the group, its key and the list are three: item 4998 is one too many, in column 15 + 2 * 4997
    assert told.split("\n")[0] == "broken.yaml:1:10009: P011 the profile holds too many values"
    assert max(map(len, told.split("\n"))) < 140


def test_too_many_brackets_are_not_even_read(refusal: Refusal) -> None:
    told = refusal({"broken.yaml": "[" * 100_000})
    assert told.split("\n")[0] == "broken.yaml:1:21: P010 the profile is nested too deeply"


def test_a_file_that_is_not_there(refusal: Refusal) -> None:
    assert (
        refusal({})
        == """\
broken.yaml:1:1: P001 the profile cannot be read
  given: no such file or directory
  allowed: a YAML file that you may read
  do: check the path, and that it is a file"""
    )


def extends(value: str, *, code: str, what: str, given: str, allowed: str, fix: str) -> str:
    gutter = "   1 | extends: "
    return (
        f"broken.yaml:1:10: {code} extends {what}\n{gutter}{value}\n     | {' ' * 9}"
        f"{'^' * len(value)}\n  given: {given}\n  allowed: {allowed}\n  do: {fix}"
    )


@pytest.mark.parametrize(
    "path", ["../outside.yaml", "sub/../../outside.yaml", "/etc/hostname", "link.yaml"]
)
def test_extends_stays_in_the_folder(path: str, refusal: Refusal, write: Write) -> None:
    write({"../outside.yaml": "material: PETG\n"})
    Path("link.yaml").symlink_to("../outside.yaml")
    assert refusal({"broken.yaml": f"extends: {path}\n"}) == extends(
        path,
        code="P017",
        what="leads out of the profile's folder",
        given=path,
        allowed="a file in the folder of the profile, or below it",
        fix="copy that file beside the profile",
    )


def test_extends_a_file_that_is_not_there(refusal: Refusal) -> None:
    assert refusal({"broken.yaml": "extends: shop.yaml\n"}) == extends(
        "shop.yaml",
        code="P018",
        what="leads to no file",
        given="shop.yaml",
        allowed="a file in the folder of the profile, or below it",
        fix="check the name; the path begins at this file",
    )


@pytest.mark.parametrize(
    ("value", "given"),
    [
        ("[a.yaml, b.yaml]", "a list of 2"),
        ("3", "3"),
        ("{a: b}", "a group of keys"),
        ('"a\\0b"', "a?b"),
        ("loop", "loop"),
    ],
)
def test_extends_what_is_no_path(value: str, given: str, refusal: Refusal, write: Write) -> None:
    write({})
    Path("loop").symlink_to("loop")
    assert refusal({"broken.yaml": f"extends: {value}\n"}) == extends(
        value,
        code="P016",
        what="is not a path",
        given=given,
        allowed="one path, relative to this file",
        fix='write one file name, such as "extends: shop.yaml"',
    )


def test_extends_a_name_longer_than_a_file_name_can_be(refusal: Refusal) -> None:
    told = refusal({"broken.yaml": f"extends: {'a' * 300}\n"}).split("\n")
    assert told[0] == "broken.yaml:1:10: P016 extends is not a path"
    assert told[3] == f"  given: {'a' * 60}..."


def test_extends_in_a_circle_shows_the_chain(refusal: Refusal) -> None:
    files = {
        "broken.yaml": "extends: base/a.yaml\n",
        "base/a.yaml": "extends: b.yaml\n",
        "base/b.yaml": "# here it closes\nextends: ../broken.yaml\n",
    }
    assert (
        refusal(files)
        == """\
base/b.yaml:2:10: P019 extends leads back to a file that is already read
   2 | extends: ../broken.yaml
     |          ^^^^^^^^^^^^^^
  given: broken.yaml -> base/a.yaml -> base/b.yaml -> base/../broken.yaml
  allowed: a chain that ends
  do: take this line out, or another one of the circle"""
    )


def test_extends_goes_on_for_too_long(refusal: Refusal) -> None:
    files = {f"{n}.yaml": f"extends: {n + 1}.yaml\n" for n in range(9)}
    files["broken.yaml"] = "extends: 0.yaml\n"
    assert (
        refusal(files)
        == """\
4.yaml:1:10: P020 extends goes on for too long
   1 | extends: 5.yaml
     |          ^^^^^^
  given: 5.yaml
  allowed: up to 5 extended profiles
  do: put the shared keys of some of them into one file"""
    )


def split(good: str) -> dict[str, str | bytes]:
    """Cut the good profile in two: what the shop has, and what the job needs."""
    start, end = good.index("printer:\n"), good.index("walls:\n")
    return {
        "shop.yaml": good[start:end],
        "job.yaml": "extends: shop.yaml\n" + good[:start] + good[end:],
    }


def test_a_split_profile_is_the_whole_one(good: str, write: Write) -> None:
    write({**split(good), "good.yaml": good})
    job = load_profile(Path("job.yaml"))
    assert job == load_profile(Path("good.yaml"))
    assert profile_hash(job) == profile_hash(load_profile(Path("good.yaml")))


def test_groups_are_merged_and_lists_replaced(good: str, write: Write) -> None:
    own = """\
extends: good.yaml
air: {flow: 200 m3/h}
stages:
  - {proportions: 1d3d, cut_size: 3 um, count: 2}
"""
    write({"good.yaml": good, "own.yaml": own})
    profile = load_profile(Path("own.yaml"))
    assert profile.air.flow == pytest.approx(200 / 3600, rel=1e-15)
    assert profile.air.hose.nominal == "38 mm"
    assert [(stage.proportions, stage.count) for stage in profile.stages] == [("1d3d", 2)]
    assert profile.stages[0].inlet_velocity is None


def test_another_kind_of_outlet_replaces_the_inherited_one(good: str, write: Write) -> None:
    own = "extends: good.yaml\noutlet: {kind: blower, intake_diameter: 30 mm}\n"
    write({"good.yaml": good, "own.yaml": own})
    assert load_profile(Path("own.yaml")).outlet == BlowerOutlet.model_validate(
        {"kind": "blower", "intake_diameter": "30 mm"}
    )


def test_another_curve_replaces_the_inherited_one_whole(good: str, write: Write) -> None:
    ends = "source: {shut_off: 18 kPa, open_flow: 150 m3/h, exponent: 1.3}"
    own = """\
extends: good.yaml
air: {source: {points: [{flow: 0 L/s, suction: 20 kPa}, {flow: 20 L/s, suction: 9 kPa}]}}
"""
    write({"good.yaml": good.replace("flow: 140 m3/h", ends), "own.yaml": own})
    source = load_profile(Path("own.yaml")).air.source
    assert isinstance(source, OwnSource)
    assert source.points is not None
    assert [(point.flow, point.suction) for point in source.points] == [(0, 20e3), (0.02, 9e3)]
    assert source.shut_off is source.exponent is None


def test_another_kind_of_distribution_replaces_the_inherited_one(good: str, write: Write) -> None:
    of = "kind: hardwood-sanding\n  distribution: {kind: log-normal, median: 30 um, spread: 2.5}"
    own = """\
extends: good.yaml
dust: {distribution: {kind: rosin-rammler, size: 50 um, exponent: 1.2}}
"""
    same = "extends: good.yaml\ndust: {distribution: {spread: 3}}\n"
    write(
        {"good.yaml": good.replace("kind: hardwood-sanding", of), "own.yaml": own, "b.yaml": same}
    )
    replaced = load_profile(Path("own.yaml")).dust.distribution
    assert replaced == RosinRammlerSizes.model_validate(
        {"kind": "rosin-rammler", "size": "50 um", "exponent": 1.2}
    )
    merged = load_profile(Path("b.yaml")).dust.distribution
    assert merged == LogNormalSizes.model_validate(
        {"kind": "log-normal", "median": "30 um", "spread": 3}
    )


def test_the_same_kind_of_outlet_is_merged(good: str, write: Write) -> None:
    own = "extends: good.yaml\noutlet: {kind: cuff, hose: 63 mm}\n"
    write({"good.yaml": good, "own.yaml": own})
    outlet = load_profile(Path("own.yaml")).outlet
    assert not isinstance(outlet, BlowerOutlet)
    assert (outlet.hose, outlet.fit) == ("63 mm", "over")


def test_another_process_replaces_the_inherited_printer(good: str, refusal: Refusal) -> None:
    own = "extends: good.yaml\nprinter: {process: resin, pixel: 0.05 mm, margin: 5 mm}\n"
    told = refusal({"good.yaml": good, "broken.yaml": own})
    assert re.findall(r"printer\.(\w+) is missing", told) == [
        "build_volume",
        "layer_height",
        "overhang_limit",
        "bridge_limit",
        "clearance",
    ]


def test_each_mistake_is_told_in_its_own_file(good: str, refusal: Refusal) -> None:
    files = split(good)
    files["shop.yaml"] = str(files["shop.yaml"]).replace("nozzle: 0.4 mm", "nozzle: 4 mm")
    files["broken.yaml"] = str(files.pop("job.yaml")).replace("lid: 6 mm", "lid: 6")
    told = refusal(files)
    assert re.findall(r"^\S+: P\d+ .*$", told, re.MULTILINE) == [
        "broken.yaml:22:8: P026 walls.lid has no unit",
        "shop.yaml:4:11: P028 printer.nozzle is out of range",
    ]
    assert "   4 |   nozzle: 4 mm\n" in told


def test_a_mistake_in_the_text_is_told_before_a_broken_chain(refusal: Refusal) -> None:
    told = refusal({"broken.yaml": "name: a\nname: b\nextends: gone.yaml\n"})
    assert re.findall(r"P0\d\d", told) == ["P013", "P018"]


def test_line_ends_and_byte_order_mark_do_not_matter(good: str, write: Write) -> None:
    windows = b"\xef\xbb\xbf" + good.replace("\n", "\r\n").encode()
    write({"good.yaml": good, "windows.yaml": windows})
    assert load_profile(Path("windows.yaml")) == load_profile(Path("good.yaml"))


def test_an_alias_stands_for_its_value(good: str, write: Write) -> None:
    text = good.replace("  fit: over\nbin", "  fit: *fit\nbin").replace(
        "    fit: over", "    fit: &fit over"
    )
    write({"good.yaml": good, "alias.yaml": text})
    assert load_profile(Path("alias.yaml")) == load_profile(Path("good.yaml"))

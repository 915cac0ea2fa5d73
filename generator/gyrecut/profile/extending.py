"""A profile and the profiles it extends, read and merged into one tree."""

from __future__ import annotations

import re
from dataclasses import replace
from pathlib import Path
from typing import TYPE_CHECKING

from gyrecut.profile.problems import Code, Place, Problem, ProfileError, Source
from gyrecut.profile.tree import Branch, parse

if TYPE_CHECKING:
    from collections.abc import Mapping

LARGEST_FILE = 1_000_000  # bytes
LONGEST_CHAIN = 5

EXTENDS = "extends"

# These groups have other keys when this key of theirs changes, so that what was inherited
# for the old kind would only be in the way of the new one.
_REPLACED_WHEN_CHANGED: Mapping[tuple[str, ...], str] = {
    ("outlet",): "kind",
    ("printer",): "process",
    ("dust", "distribution"): "kind",
}
# All keys of these groups tell what it is: points, or the two ends of a curve.
_REPLACED = {("air", "source")}

_CONTROL = re.compile("[\x00-\x08\x0b\x0c\x0e-\x1f\x7f\ufffe\uffff]")
_TAB = re.compile(r"^ *\t", re.MULTILINE)


def with_extended(path: Path) -> tuple[Branch, list[Problem]]:
    """Read a profile and all it extends.

    Parameters
    ----------
    path : Path
        The profile; what it extends has to lie in its folder or below.

    Returns
    -------
    tuple of Branch and list of Problem
        The merged tree, in which each value still knows its own file, and the mistakes that
        leave a tree to go on with.

    Raises
    ------
    ProfileError
        A file cannot be read, or `extends` leads nowhere.
    """
    chain: list[Path] = []
    trees: list[Branch] = []
    problems: list[Problem] = []
    following: Path | None = path
    try:
        while following is not None:
            chain.append(following)
            source, text = _read(following, order=len(trees))
            tree, found = parse(source, text)
            problems += found
            tree, wish = _without_extends(tree)
            trees.append(tree)
            following = _next(wish, chain) if wish else None
    except ProfileError as wrong:
        raise ProfileError([*problems, *wrong.problems]) from wrong
    merged = trees.pop()
    while trees:
        merged = _merge(merged, trees.pop(), ())
    return merged, problems


def _read(path: Path, *, order: int) -> tuple[Source, str]:
    name = path.as_posix()
    nothing = Source(name=name, lines=(), order=order)
    try:
        with path.open("rb") as file:
            content = file.read(LARGEST_FILE + 1)
    except OSError as wrong:
        raise ProfileError([_unreadable(nothing, wrong)]) from wrong
    if len(content) > LARGEST_FILE:
        raise ProfileError([_not_a_text(Code.TOO_LARGE, Place(source=nothing), "a larger file")])
    try:
        text = content.decode("utf-8-sig")
    except UnicodeDecodeError as wrong:
        # what goes before the bad byte is good, so that line and column can be counted in it
        start = content[: wrong.start].decode("utf-8-sig", errors="ignore")
        source = _source(name, content.decode("utf-8", errors="replace"), order)
        byte = f"the byte 0x{content[wrong.start]:02x}"
        raise ProfileError(
            [_not_a_text(Code.NOT_UTF8, _place_after(source, start), byte)]
        ) from wrong
    text = text.replace("\r\n", "\n").replace("\r", "\n")
    source = _source(name, text, order)
    if control := _CONTROL.search(text):
        place = _place_after(source, text[: control.start()])
        given = f"the control character 0x{ord(control[0]):02x}"
        raise ProfileError([_not_a_text(Code.NOT_TEXT, place, given)])
    if tab := _TAB.search(text):
        place = _place_after(source, text[: tab.end() - 1])
        raise ProfileError([_not_a_text(Code.TAB, place, "a tab")])
    return source, text


def _source(name: str, text: str, order: int) -> Source:
    lines = (_CONTROL.sub("?", line) for line in text.split("\n"))
    return Source(name=name, lines=tuple(lines), order=order)


def _place_after(source: Source, text: str) -> Place:
    line, column = text.count("\n") + 1, len(text) - text.rfind("\n")
    return Place(source=source, line=line, column=column)


def _without_extends(tree: Branch) -> tuple[Branch, Branch | None]:
    if not isinstance(tree.content, dict):
        return tree, None
    rest = {key: below for key, below in tree.content.items() if key != EXTENDS}
    return replace(tree, content=rest), tree.content.get(EXTENDS)


def _next(wish: Branch, chain: list[Path]) -> Path:
    given = wish.content
    if not isinstance(given, str) or not given:
        raise ProfileError([_extends(Code.EXTENDS_NOT_A_PATH, wish, wish.written)])
    path = chain[-1].parent / given
    try:
        resolved, is_file = path.resolve(), path.is_file()
    except (OSError, RuntimeError, ValueError) as wrong:
        # a name too long, a circle of links, a character that no file name can hold
        raise ProfileError([_extends(Code.EXTENDS_NOT_A_PATH, wish, wish.written)]) from wrong
    if Path(given).is_absolute() or not resolved.is_relative_to(chain[0].resolve().parent):
        raise ProfileError([_extends(Code.EXTENDS_OUTSIDE, wish, given)])
    if resolved in [link.resolve() for link in chain]:
        circle = " -> ".join(link.as_posix() for link in [*chain, path])
        raise ProfileError([_extends(Code.EXTENDS_CYCLE, wish, circle)])
    if not is_file:
        raise ProfileError([_extends(Code.EXTENDS_MISSING, wish, given)])
    if len(chain) > LONGEST_CHAIN:
        raise ProfileError([_extends(Code.EXTENDS_TOO_LONG, wish, given)])
    return path


def _merge(base: Branch, own: Branch, path: tuple[str, ...]) -> Branch:
    """Lay `own` over `base`: groups are merged, everything else is replaced."""
    if not isinstance(base.content, dict) or not isinstance(own.content, dict):
        return own
    if path in _REPLACED:
        return own
    telling = _REPLACED_WHEN_CHANGED.get(path)
    if telling in own.content and telling in base.content:
        kinds = own.content[telling].content, base.content[telling].content
        if kinds[0] != kinds[1]:
            return own
    merged = dict(base.content)
    for key, branch in own.content.items():
        merged[key] = _merge(merged[key], branch, (*path, key)) if key in merged else branch
    return replace(own, content=merged)


def _unreadable(source: Source, wrong: OSError) -> Problem:
    return Problem(
        code=Code.UNREADABLE,
        place=Place(source=source),
        path="",
        what="cannot be read",
        given=(wrong.strerror or str(wrong)).lower(),
        allowed="a YAML file that you may read",
        fix="check the path, and that it is a file",
    )


_ALLOWED_TEXT: Mapping[Code, tuple[str, str, str]] = {
    Code.TOO_LARGE: (
        "is too large",
        f"up to {LARGEST_FILE} bytes",
        "check that it is the file you mean",
    ),
    Code.NOT_UTF8: (
        "is not UTF-8 text",
        "text in UTF-8",
        "save the file again as UTF-8",
    ),
    Code.NOT_TEXT: (
        "is not a text file",
        "printable text",
        "check that it is the file you mean, or delete the character",
    ),
    Code.TAB: (
        "has a tab at the beginning of a line",
        "spaces",
        "put spaces in the tab's place",
    ),
}


def _not_a_text(code: Code, place: Place, given: str) -> Problem:
    what, allowed, fix = _ALLOWED_TEXT[code]
    return Problem(
        code=code, place=place, path="", what=what, given=given, allowed=allowed, fix=fix
    )


_ALLOWED_EXTENDS: Mapping[Code, tuple[str, str, str]] = {
    Code.EXTENDS_NOT_A_PATH: (
        "is not a path",
        "one path, relative to this file",
        'write one file name, such as "extends: shop.yaml"',
    ),
    Code.EXTENDS_OUTSIDE: (
        "leads out of the profile's folder",
        "a file in the folder of the profile, or below it",
        "copy that file beside the profile",
    ),
    Code.EXTENDS_MISSING: (
        "leads to no file",
        "a file in the folder of the profile, or below it",
        "check the name; the path begins at this file",
    ),
    Code.EXTENDS_CYCLE: (
        "leads back to a file that is already read",
        "a chain that ends",
        "take this line out, or another one of the circle",
    ),
    Code.EXTENDS_TOO_LONG: (
        "goes on for too long",
        f"up to {LONGEST_CHAIN} extended profiles",
        "put the shared keys of some of them into one file",
    ),
}


def _extends(code: Code, wish: Branch, given: str) -> Problem:
    what, allowed, fix = _ALLOWED_EXTENDS[code]
    return Problem(
        code=code, place=wish.place, path=EXTENDS, what=what, given=given, allowed=allowed, fix=fix
    )

"""One YAML text as a tree in which every key and value knows where it stands.

Only plain YAML is taken: mappings with text keys, lists, and scalars without tags. What could
make a small text a large one (anchors) or exhaust the stack (nesting) is bounded first.
"""

from __future__ import annotations

import re
from dataclasses import dataclass, replace
from typing import TYPE_CHECKING, Any, TypeAlias

from ruamel.yaml import YAML
from ruamel.yaml.error import MarkedYAMLError, YAMLError
from ruamel.yaml.events import (
    CollectionEndEvent,
    CollectionStartEvent,
    DocumentStartEvent,
    NodeEvent,
)
from ruamel.yaml.nodes import MappingNode, ScalarNode, SequenceNode

from gyrecut.profile.problems import Code, Place, Problem, ProfileError, Source

if TYPE_CHECKING:
    from collections.abc import Iterator

MOST_VALUES = 5000
DEEPEST = 20

_TAGS = tuple(
    f"tag:yaml.org,2002:{kind}"
    for kind in ("str", "int", "float", "bool", "null", "timestamp", "merge", "map", "seq")
)
_INTEGER = re.compile(r"[+-]?[0-9]{1,18}")
_FLOAT = re.compile(r"[+-]?([0-9]{1,30}(\.[0-9]{0,30})?|\.[0-9]{1,30})([eE][+-]?[0-9]{1,3})?")
_INFINITE = re.compile(r"([+-]?)\.(inf|nan)", re.IGNORECASE)
_WRITTEN_WIDTH = 60

Key: TypeAlias = str | int
Scalar: TypeAlias = str | int | float | bool | None


@dataclass(frozen=True, slots=True, kw_only=True)
class Branch:
    """One value of the tree.

    Parameters
    ----------
    place : Place
        Where the value begins.
    key : Place or None
        Where its key stands; None for list items and for the whole.
    written : str
        The value as the user wrote it, shortened, for messages.
    content : scalar, dict or list
        The scalar, or the branches below.
    """

    place: Place
    key: Place | None
    written: str
    content: Scalar | dict[str, Branch] | list[Branch]

    def plain(self) -> Any:  # noqa: ANN401 - YAML has no narrower type
        """Give the value as plain Python data."""
        if isinstance(self.content, dict):
            return {key: below.plain() for key, below in self.content.items()}
        if isinstance(self.content, list):
            return [below.plain() for below in self.content]
        return self.content

    def below(self, part: Key) -> Branch | None:
        """Give the branch under a key or list index, or None."""
        if isinstance(self.content, dict):
            return self.content.get(str(part))
        if isinstance(self.content, list) and isinstance(part, int):
            return self.content[part] if part < len(self.content) else None
        return None


def parse(source: Source, text: str) -> tuple[Branch, list[Problem]]:
    """Read one YAML text.

    Parameters
    ----------
    source : Source
        What to name in messages.
    text : str
        The whole text.

    Returns
    -------
    tuple of Branch and list of Problem
        The tree, and the mistakes that leave a tree to go on with.

    Raises
    ------
    ProfileError
        There is no tree: not YAML, empty, several documents, too large or too deep.
    """
    yaml = YAML(typ="safe", pure=True)
    try:
        _bound(yaml.parse(text), source)
        yaml = YAML(typ="safe", pure=True)
        yaml.composer.warn_double_anchors = False
        node = yaml.compose(text)
    except MarkedYAMLError as wrong:
        raise ProfileError([_not_yaml(source, wrong)]) from wrong
    except YAMLError as wrong:
        raise ProfileError([_fatal(Code.NOT_YAML, source, Place(source=source))]) from wrong
    if node is None or (isinstance(node, ScalarNode) and node.value == ""):
        raise ProfileError([_fatal(Code.NO_CONTENT, source, Place(source=source))])
    reader = _Reader(source)
    tree = reader.branch(node, key=None, path=())
    if not isinstance(tree.content, dict):
        raise ProfileError([_fatal(Code.NOT_A_MAPPING, source, tree.place, tree.written)])
    return tree, reader.problems


def _bound(events: Iterator[Any], source: Source) -> None:
    """Refuse what `compose` would follow too far, before it is built."""
    documents = values = depth = 0
    for event in events:
        mark = event.start_mark
        place = Place(source=source, line=mark.line + 1, column=mark.column + 1)
        if isinstance(event, DocumentStartEvent):
            documents += 1
            if documents > 1:
                raise ProfileError([_fatal(Code.SEVERAL_DOCUMENTS, source, place)])
        values += isinstance(event, NodeEvent)
        depth += isinstance(event, CollectionStartEvent)
        depth -= isinstance(event, CollectionEndEvent)
        if values > MOST_VALUES:
            raise ProfileError([_fatal(Code.TOO_MANY_VALUES, source, place)])
        if depth > DEEPEST:
            raise ProfileError([_fatal(Code.TOO_DEEP, source, place)])


class _Reader:
    """Turn composed nodes into branches, counting each alias as often as it is used."""

    def __init__(self, source: Source) -> None:
        self.source = source
        self.problems: list[Problem] = []
        self.values = 0
        # An alias has the place of its anchor, so that too many are shown at the key above.
        self.top: Place | None = None

    def branch(self, node: Any, *, key: Place | None, path: tuple[str, ...]) -> Branch:  # noqa: ANN401
        place = self._place(node)
        depth = len(path) + 1
        self.values += 1
        if self.values > MOST_VALUES:
            raise ProfileError([_fatal(Code.TOO_MANY_VALUES, self.source, self.top or place)])
        if depth > DEEPEST:
            raise ProfileError([_fatal(Code.TOO_DEEP, self.source, self.top or place)])
        if str(node.tag) not in _TAGS:
            self.problems.append(_fatal(Code.TAG, self.source, place, str(node.tag)))
        if isinstance(node, MappingNode):
            content = self._mapping(node, path)
            return Branch(place=place, key=key, written="a group of keys", content=content)
        if isinstance(node, SequenceNode):
            items = [
                self.branch(item, key=None, path=(*path, f"[{index}]"))
                for index, item in enumerate(node.value)
            ]
            written = f"a list of {len(items)}"
            return Branch(place=place, key=key, written=written, content=items)
        value = _scalar(node)
        if value is None and key is not None and not node.value:
            # an empty value has its mark at whatever follows, perhaps lines below
            place = key
        return Branch(place=place, key=key, written=_written(node), content=value)

    def _mapping(self, node: MappingNode, path: tuple[str, ...]) -> dict[str, Branch]:
        content: dict[str, Branch] = {}
        for key_node, value_node in node.value:
            place = self._place(key_node)
            if not isinstance(key_node, ScalarNode) or not key_node.value:
                self.problems.append(_fatal(Code.BAD_KEY, self.source, place))
                continue
            name = str(key_node.value)
            if not path:
                self.top = place
            if name in content:
                first = content[name].key
                self.problems.append(_duplicate(place, (*path, name), first.line if first else 0))
                continue
            content[name] = self.branch(value_node, key=place, path=(*path, name))
        return content

    def _place(self, node: Any) -> Place:  # noqa: ANN401 - ruamel's nodes are untyped
        start, end = node.start_mark, node.end_mark
        width = end.column - start.column if end.line == start.line else 1
        place = Place(source=self.source, line=start.line + 1, column=start.column + 1)
        return replace(place, width=max(1, width))


def _scalar(node: ScalarNode) -> Scalar:
    """Give a scalar its value by what is written; a date stays a text."""
    kind, text = str(node.tag).rpartition(":")[2], str(node.value)
    if kind == "null":
        return None
    if kind == "bool":
        return text.casefold() == "true"
    if kind == "int" and _INTEGER.fullmatch(text):
        return int(text)
    if kind == "float":
        if match := _INFINITE.fullmatch(text):
            return float(match[1] + match[2])
        if _FLOAT.fullmatch(text):
            return float(text)
    return text


def _written(node: ScalarNode) -> str:
    text = str(node.value).replace("\n", " ")
    if not text:
        return "nothing"
    return text if len(text) <= _WRITTEN_WIDTH else text[:_WRITTEN_WIDTH] + "..."


_FATAL: dict[Code, tuple[str, str, str]] = {
    Code.NOT_YAML: (
        "is not YAML",
        "keys and values, one a line, with a colon and a space between",
        "compare the file with a shipped profile",
    ),
    Code.NO_CONTENT: (
        "is empty",
        "the keys of a profile, from name to joints",
        "start from a shipped profile, or from the one `gyrecut new` writes",
    ),
    Code.NOT_A_MAPPING: (
        "is not a group of keys",
        "keys and values, one a line, with a colon and a space between",
        'begin with a line such as "name: my-separator"',
    ),
    Code.SEVERAL_DOCUMENTS: (
        "holds a second YAML document",
        "one profile a file",
        'put what follows the "---" into a file of its own',
    ),
    Code.TOO_DEEP: (
        "is nested too deeply",
        f"up to {DEEPEST} levels",
        "take out the needless brackets, or the anchor that holds itself",
    ),
    Code.TOO_MANY_VALUES: (
        "holds too many values",
        f"up to {MOST_VALUES} values, each use of an alias counted",
        "write the values out without anchors and aliases",
    ),
    Code.TAG: (
        "uses a YAML tag",
        "texts, numbers, lists and groups of keys",
        'take out the word that begins with "!"',
    ),
    Code.BAD_KEY: (
        "has a key that is not a word",
        "a word before each colon",
        "write the key's name before the colon",
    ),
}


def _fatal(code: Code, source: Source, place: Place, given: str = "") -> Problem:
    what, allowed, fix = _FATAL[code]
    given = given or _line(source, place)
    return Problem(
        code=code, place=place, path="", what=what, given=given, allowed=allowed, fix=fix
    )


def _line(source: Source, place: Place) -> str:
    text = source.lines[place.line - 1].strip() if place.line <= len(source.lines) else ""
    return (text if len(text) <= _WRITTEN_WIDTH else text[:_WRITTEN_WIDTH] + "...") or "nothing"


# What the YAML library says -> what is wrong, what to do, and whether to show where it began.
_SYNTAX: tuple[tuple[str, str, str, bool], ...] = (
    (
        "mapping values are not allowed",
        "has a colon where none can stand",
        (
            "put a value that holds a colon in quotes, or look for a missing colon or a crooked "
            "indent just above"
        ),
        False,
    ),
    ("found unexpected end of stream", "has a quote that is not closed", "close the quote", True),
    (
        "expected ',' or",
        "has a bracket that is not closed",
        "close the bracket, and put a comma between its items",
        True,
    ),
    (
        "expected <block end>",
        "has a line that stands neither in nor below its group",
        "line it up with the key it belongs beside",
        False,
    ),
    (
        "could not find expected ':'",
        "has a line without a colon",
        "write a key, a colon, a space and a value",
        True,
    ),
    (
        "found character",
        "has a value that begins with a character of YAML's own",
        "put the value in quotes",
        False,
    ),
    (
        "found undefined alias",
        "uses an alias that no anchor above defines",
        "write the value out, or put a value that begins with a star in quotes",
        False,
    ),
)


def _not_yaml(source: Source, wrong: MarkedYAMLError) -> Problem:
    said = str(wrong.problem)
    what, fix, show_start = f"is not YAML here: {said}", "compare it with a shipped profile", False
    for start, words, remedy, at_start in _SYNTAX:
        if said.startswith(start):
            what, fix, show_start = words, remedy, at_start
    mark = (wrong.context_mark if show_start else None) or wrong.problem_mark
    place = Place(source=source, line=mark.line + 1, column=mark.column + 1)
    return replace(_fatal(Code.NOT_YAML, source, place), what=what, fix=fix)


def _duplicate(place: Place, path: tuple[str, ...], first_line: int) -> Problem:
    return Problem(
        code=Code.DUPLICATE_KEY,
        place=place,
        path=".".join(path).replace(".[", "["),
        what="is given twice",
        given=f"{path[-1]}, first on line {first_line}",
        allowed="each key once in its group",
        fix="keep one of the two lines",
    )

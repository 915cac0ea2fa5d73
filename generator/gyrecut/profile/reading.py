"""From a profile file to a `Profile`, with every mistake at its place in the file."""

from __future__ import annotations

import re
from typing import TYPE_CHECKING

from pydantic import ValidationError

from gyrecut.profile.extending import with_extended
from gyrecut.profile.models import Profile
from gyrecut.profile.problems import Place, Problem, ProfileError

if TYPE_CHECKING:
    from pathlib import Path

    from pydantic_core import ErrorDetails

    from gyrecut.profile.tree import Branch


def load_profile(path: Path) -> Profile:
    """Read a profile and the profiles it extends.

    Parameters
    ----------
    path : Path
        The YAML file; messages name it as it is given here.

    Raises
    ------
    ProfileError
        With all that is wrong, in file order.
    """
    tree, problems = with_extended(path)
    try:
        profile = Profile.model_validate(tree.plain())
    except ValidationError as wrong:
        problems += [_problem(tree, error) for error in wrong.errors()]
        raise ProfileError(problems) from wrong
    if problems:
        raise ProfileError(problems)
    return profile


def _problem(tree: Branch, error: ErrorDetails) -> Problem:
    words, path = error["ctx"], error["loc"]
    branch, found = tree, True
    for part in path:
        below = branch.below(part)
        if below is None:
            found = False
            break
        branch = below
    place: Place = branch.place
    # What spans lines (a group that lacks a key, say) is shown at its key, a slip in a key too.
    spans = isinstance(branch.content, dict | list) and branch.key
    if branch.key and (words["about_key"] or (spans and branch.key.line != place.line)):
        place = branch.key
    given = branch.written if found else "nothing"
    if found and words["about_key"]:
        given = str(path[-1])
    return Problem(
        code=words["code"],
        place=place,
        path=_path_text(path),
        what=words["what"],
        given=given,
        allowed=words["allowed"],
        fix=words["fix"],
    )


def _path_text(path: tuple[str | int, ...]) -> str:
    parts = (f"[{part}]" if isinstance(part, int) else f".{part}" for part in path)
    return re.sub(r"^\.", "", "".join(parts))

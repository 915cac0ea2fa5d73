"""From a profile file to a `Profile`, with every mistake at its place in the file."""

from __future__ import annotations

import re
from typing import TYPE_CHECKING

from pydantic import ValidationError

from gyrecut.errors import OutOfRangeError, UnbuildableError
from gyrecut.profile.extending import with_extended
from gyrecut.profile.models import Profile
from gyrecut.profile.problems import Code, Place, Problem, ProfileError

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


def at_its_line(path: Path, wrong: UnbuildableError | OutOfRangeError) -> ProfileError:
    """Tell at its line in the profile why nothing can be built from it.

    Parameters
    ----------
    path : Path
        The profile, read once before without a mistake.
    wrong : UnbuildableError or OutOfRangeError
        What the later work refused.

    Returns
    -------
    ProfileError
        With the one problem.
    """
    tree, _ = with_extended(path)
    if isinstance(wrong, UnbuildableError):
        key, what = wrong.key, wrong.what
        given, allowed, fix = wrong.given, wrong.allowed, wrong.fix
    else:
        # the one quantity here that the stages do not decide
        is_feed = wrong.quantity.startswith("dust in the air")
        key = ("dust", "feed") if is_feed else ("stages",)
        what = f"leads out of what published formulas cover, in the {wrong.quantity}"
        given = f"{wrong.value:g} {wrong.unit}".replace(" -", "")
        allowed = f"{wrong.low:g} to {wrong.high:g} {wrong.unit} ({wrong.source})".replace(
            " - ", " "
        )
        fix = "change this line, the proportions, the size or the flow"
    branch = tree
    for part in key:
        below = branch.below(part)
        if below is None:
            break
        branch = below
    return ProfileError(
        [
            Problem(
                code=Code.UNBUILDABLE,
                place=branch.key or branch.place,
                path=_path_text(key),
                what=what,
                given=given,
                allowed=allowed,
                fix=fix,
            )
        ]
    )


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

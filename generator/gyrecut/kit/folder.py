"""A folder of files that appears whole or not at all, in place of the one before."""

from __future__ import annotations

import errno
import json
import os
import re
import secrets
import shutil
import sys
from contextlib import contextmanager
from dataclasses import dataclass
from pathlib import Path, PurePosixPath
from typing import TYPE_CHECKING

from gyrecut.errors import BuildError
from gyrecut.kit.manifest import FORMAT

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator

MANIFEST = "manifest.json"
# What desktops leave in every folder somebody looks at; nobody misses it.
LITTER = frozenset({".DS_Store", "Thumbs.db", "desktop.ini"})
FULL = frozenset({errno.ENOSPC, errno.EDQUOT, errno.EFBIG})
FORBIDDEN = frozenset({errno.EACCES, errno.EPERM, errno.EROFS})


@dataclass(frozen=True, slots=True, kw_only=True)
class KitFile:
    """One file of a kit.

    Parameters
    ----------
    path : str
        Inside the kit, parts joined by "/".
    data : bytes
        What it holds.
    """

    path: str
    data: bytes


def check_target(folder: Path) -> None:
    """Refuse a place where a kit may not be written; cheap, so ask before a long build.

    Free are: a name nothing stands at, an empty folder, and an earlier kit that holds nothing
    but what its own manifest lists.

    Parameters
    ----------
    folder : Path
        Where the kit is to stand.

    Raises
    ------
    BuildError
        When it is a file, a link, or a folder with anything in it that is not a kit's.
    """
    with _explaining(folder):
        if folder.is_symlink():
            raise BuildError(f"{folder} is a link; name the folder it points to, or a new one")
        if not folder.exists():
            return
        if not folder.is_dir():
            raise BuildError(f"{folder} is a file, not a folder; name a new folder for the kit")
        present = set(_files_in(folder))
        if not present:
            return
        known = _files_of_kit(folder)
        if known is None:
            raise BuildError(
                f"{folder} holds files and is no kit of gyrecut, so it is left alone; "
                "name a new or an empty folder"
            )
        foreign = sorted(present - known)
        if foreign:
            raise BuildError(
                f"{folder} holds files that are not of the kit and would be lost: "
                f"{_listed(foreign)}; move them elsewhere, or name another folder"
            )


def replace_folder(folder: Path, files: Iterable[KitFile]) -> Path:
    """Write the files beside the folder, then put them in its place.

    An error, or the end of the process, at any moment before the last step leaves the earlier
    folder as it was. Killed between the two renames of the last step, it leaves the earlier
    folder beside its place under a hidden name; the next call puts it back first.

    Parameters
    ----------
    folder : Path
        Where they are to stand; parents are made.
    files : Iterable[KitFile]
        Taken one by one, so that they need not all fit in memory.

    Returns
    -------
    Path
        The folder, absolute.

    Raises
    ------
    BuildError
        When the place may not be used, or the disk or the system refuses.
    """
    # Not resolve(): that would follow a link, which is to be refused.
    folder = Path(os.path.abspath(folder))  # noqa: PTH100
    with _explaining(folder):
        check_target(folder)
        folder.parent.mkdir(parents=True, exist_ok=True)
        _clear_leftovers(folder)
        mark = f".{folder.name}.gyrecut-{os.getpid()}-{secrets.token_hex(4)}"
        staging, aside = folder.with_name(f"{mark}.new"), folder.with_name(f"{mark}.old")
        try:
            staging.mkdir()
            _write_files(staging, files)
            check_target(folder)  # a long build is time enough to put something there
            _swap(staging=staging, folder=folder, aside=aside)
        finally:
            # What cannot be removed now the next call removes; there is nothing to tell.
            shutil.rmtree(staging, ignore_errors=True)
    return folder


def _write_files(staging: Path, files: Iterable[KitFile]) -> None:
    folders = {staging}
    for file in files:
        inside = PurePosixPath(file.path)
        if inside.is_absolute() or ".." in inside.parts:
            raise BuildError(f'"{file.path}" leads out of the kit')
        target = staging / inside
        if target.parent not in folders:
            target.parent.mkdir(parents=True)
            folders.add(target.parent)
        # "x": two files of one name would lose one without a word
        with target.open("xb") as stream:
            stream.write(file.data)
            stream.flush()
            os.fsync(stream.fileno())
    for each in folders:
        _sync_folder(each)


def _swap(*, staging: Path, folder: Path, aside: Path) -> None:
    had_earlier = folder.exists()
    if had_earlier:
        folder.rename(aside)
    try:
        staging.rename(folder)
    except BaseException:
        if had_earlier:
            aside.rename(folder)
        raise
    _sync_folder(folder.parent)
    shutil.rmtree(aside, ignore_errors=True)  # as above


def _clear_leftovers(folder: Path) -> None:
    ours = re.compile(rf"\.{re.escape(folder.name)}\.gyrecut-(\d{{1,9}})-[0-9a-f]{{8}}\.(new|old)")
    for entry in sorted(folder.parent.iterdir()):
        match = ours.fullmatch(entry.name)
        if not match or entry.is_symlink() or not entry.is_dir() or _is_running(int(match[1])):
            continue
        if match[2] == "old" and not folder.exists():
            entry.rename(folder)  # killed between the two renames: this is the only kit there is
        else:
            shutil.rmtree(entry, ignore_errors=True)


def _is_running(process: int) -> bool:
    if sys.platform == "win32":
        return True  # asking there means to end it; leftovers stay until removed by hand
    try:
        os.kill(process, 0)
    except ProcessLookupError:
        return False
    except PermissionError:
        return True
    return True


def _files_in(folder: Path) -> Iterator[str]:
    for place, folders, names in os.walk(folder, onerror=_raise):
        links = [name for name in folders if Path(place, name).is_symlink()]
        for name in [*names, *links]:
            if name not in LITTER:
                yield Path(place, name).relative_to(folder).as_posix()


def _raise(wrong: OSError) -> None:
    raise wrong


def _files_of_kit(folder: Path) -> set[str] | None:
    try:
        manifest = json.loads((folder / MANIFEST).read_bytes())
    except (FileNotFoundError, IsADirectoryError, ValueError):
        return None
    if not isinstance(manifest, dict) or manifest.get("format") != FORMAT:
        return None
    files = manifest.get("files")
    if not isinstance(files, list):
        return None
    return {MANIFEST, *(str(file.get("path")) for file in files if isinstance(file, dict))}


def _sync_folder(folder: Path) -> None:
    if sys.platform == "win32":
        return  # a folder cannot be opened there
    handle = os.open(folder, os.O_RDONLY)
    try:
        os.fsync(handle)
    finally:
        os.close(handle)


def _listed(names: list[str], most: int = 5) -> str:
    rest = len(names) - most
    return ", ".join(names[:most]) + (f" and {rest} more" if rest > 0 else "")


@contextmanager
def _explaining(folder: Path) -> Iterator[None]:
    """Turn what the system says into what a person can do."""
    try:
        yield
    except OSError as wrong:
        if wrong.errno in FULL:
            cure = "no space is left there; free some, or name a folder on another disk"
        elif wrong.errno in FORBIDDEN:
            cure = "writing is not allowed there; name a folder of your own"
        else:
            cure = f"the system says: {wrong.strerror or wrong}; name another folder"
        raise BuildError(f"the kit could not be written to {folder}: {cure}") from wrong

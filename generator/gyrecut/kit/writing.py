"""A kit on disk: every file made in memory, written beside, put in place at the end."""

from __future__ import annotations

import os
import re
from dataclasses import replace
from typing import TYPE_CHECKING

from gyrecut.errors import BuildError
from gyrecut.kit.folder import MANIFEST, KitFile, replace_folder
from gyrecut.kit.manifest import (
    COUPON_SHEET,
    COUPONS,
    PIECES,
    manifest_bytes,
    piece_files,
    recorded,
)
from gyrecut.kit.step import assembly_step_bytes, piece_step_bytes, time_stamp
from gyrecut.kit.stl import stl_bytes
from gyrecut.kit.summary import summary_text
from gyrecut.kit.threemf import threemf_bytes

if TYPE_CHECKING:
    from collections.abc import Iterator, Sequence
    from pathlib import Path

    from gyrecut.kit.contents import KitContents, KitPiece

PIECE_NAME = re.compile(r"[a-z0-9][a-z0-9-]{0,63}")


def write_kit(contents: KitContents, folder: Path) -> Path:
    """Write a kit; it appears whole or not at all, see `gyrecut.kit.folder.replace_folder`.

    Parameters
    ----------
    contents : KitContents
        What goes into it.
    folder : Path
        Where it is to stand: a new name, an empty folder, or an earlier kit, which is replaced.

    Returns
    -------
    Path
        The folder, absolute.

    Raises
    ------
    BuildError
        When the place may not be used, a file cannot be made, or the disk refuses.
    """
    return replace_folder(folder, kit_files(contents, stamp=time_stamp(os.environ)))


def kit_files(contents: KitContents, *, stamp: str) -> Iterator[KitFile]:
    """Make the files of a kit one after another, the manifest, which lists the rest, last.

    Parameters
    ----------
    contents : KitContents
        What goes into them.
    stamp : str
        The time the STEP files carry, ISO 8601.

    Yields
    ------
    KitFile
        Path in the kit, and its bytes; the same for the same contents and stamp.
    """
    coupons = contents.coupons.pieces if contents.coupons is not None else ()
    _check_names((*contents.pieces, *coupons))
    records = []
    for file in _files_without_manifest(contents, stamp=stamp):
        records.append(recorded(file.path, file.data))
        yield file
    yield KitFile(path=MANIFEST, data=manifest_bytes(contents, records))


def _files_without_manifest(contents: KitContents, *, stamp: str) -> Iterator[KitFile]:
    version = contents.version
    yield KitFile(path="summary.md", data=summary_text(contents).encode())
    yield from _files_of(contents.pieces, PIECES, version=version, stamp=stamp)
    yield KitFile(path="kit.3mf", data=threemf_bytes(contents))
    parts = [(piece.name, piece.placed) for piece in contents.pieces]
    assembly = assembly_step_bytes(contents.profile_name, parts, version=version, stamp=stamp)
    yield KitFile(path="assembly.step", data=assembly)

    if contents.coupons is not None:
        coupons = contents.coupons
        yield from _files_of(coupons.pieces, COUPONS, version=version, stamp=stamp)
        job = replace(contents, pieces=coupons.pieces)
        yield KitFile(path="coupons.3mf", data=threemf_bytes(job))
        yield KitFile(path=COUPON_SHEET, data=coupons.sheet.encode())


def _files_of(
    pieces: Sequence[KitPiece], folder: str, *, version: str, stamp: str
) -> Iterator[KitFile]:
    for piece in pieces:
        paths = piece_files(piece.name, folder)
        label = f"gyrecut {version}, {piece.name}, millimetres"
        yield KitFile(path=paths["stl"], data=stl_bytes(piece.mesh, label))
        step = piece_step_bytes(piece.name, piece.posed, version=version, stamp=stamp)
        yield KitFile(path=paths["step"], data=step)


def _check_names(pieces: Sequence[KitPiece]) -> None:
    names = [piece.name for piece in pieces]
    for name in names:
        if not PIECE_NAME.fullmatch(name):
            raise BuildError(
                f'"{name}" cannot name a piece; allowed: small letters, digits and hyphens'
            )
        if names.count(name) > 1:
            raise BuildError(f'two pieces are called "{name}"; each needs its own name')

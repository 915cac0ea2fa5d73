"""manifest.json: what a kit holds, for programs; it also marks a folder as a kit of ours."""

from __future__ import annotations

import dataclasses
import hashlib
import json
from collections.abc import Iterable, Mapping, Sequence
from typing import TYPE_CHECKING

from gyrecut.findings import Severity, worst

if TYPE_CHECKING:
    from gyrecut.kit.contents import Coupons, KitContents, KitPiece

FORMAT = "gyrecut-kit"
SCHEMA = 1
PIECES, COUPONS = "pieces", "coupons"  # folders in a kit
COUPON_SHEET = "coupons.md"


@dataclasses.dataclass(frozen=True, slots=True, kw_only=True)
class FileRecord:
    """What the manifest says of another file.

    Parameters
    ----------
    path : str
        Inside the kit, parts joined by "/".
    bytes : int
        Its length.
    sha256 : str
        Its hash, in hexadecimal.
    """

    path: str
    bytes: int
    sha256: str


def recorded(path: str, data: bytes) -> FileRecord:
    """Describe a file for the manifest."""
    return FileRecord(path=path, bytes=len(data), sha256=hashlib.sha256(data).hexdigest())


def manifest_document(contents: KitContents, files: Iterable[FileRecord]) -> dict[str, object]:
    """Build the manifest.

    Parameters
    ----------
    contents : KitContents
        The kit.
    files : Iterable[FileRecord]
        Every other file of the kit.

    Returns
    -------
    dict[str, object]
        Only what JSON has a word for.
    """
    return {
        "format": FORMAT,
        "schema": SCHEMA,
        "gyrecut": contents.version,
        "profile": {"name": contents.profile_name, "hash": contents.profile_hash},
        "can_be_built": worst(contents.findings) is not Severity.STOP,
        "polymer": plain(contents.polymer),
        "dimensions": plain(contents.dimensions),
        "prediction": plain(contents.prediction),
        "findings": plain(contents.findings),
        "pieces": [_piece(piece) for piece in contents.pieces],
        "hardware": plain(contents.hardware),
        "steps": plain(contents.steps),
        "coupons": _coupons(contents.coupons),
        "files": plain(tuple(files)),
    }


def manifest_bytes(contents: KitContents, files: Iterable[FileRecord]) -> bytes:
    """Write the manifest as UTF-8 JSON, two spaces an indent.

    Parameters
    ----------
    contents : KitContents
        The kit.
    files : Iterable[FileRecord]
        Every other file of the kit.

    Returns
    -------
    bytes
        The file.
    """
    document = manifest_document(contents, files)
    text = json.dumps(document, indent=2, ensure_ascii=False, allow_nan=False)
    return f"{text}\n".encode()


def piece_files(name: str, folder: str = PIECES) -> dict[str, str]:
    """Say where the files of a piece stand in a kit, by format."""
    return {"stl": f"{folder}/{name}.stl", "step": f"{folder}/{name}.step"}


def plain(value: object) -> object:
    """Turn dataclasses, mappings and sequences into what JSON has a word for.

    Parameters
    ----------
    value : object
        A result of a stage.

    Returns
    -------
    object
        Dicts with text keys, lists, text, numbers, booleans and None.

    Raises
    ------
    TypeError
        For anything else: a result that only looked like data is a mistake of ours.
    """
    if dataclasses.is_dataclass(value) and not isinstance(value, type):
        return {
            field.name: plain(getattr(value, field.name)) for field in dataclasses.fields(value)
        }
    if isinstance(value, str):
        return str(value)
    if value is None or isinstance(value, bool | int):
        return value
    if isinstance(value, float):
        return float(value)
    if isinstance(value, Mapping):
        return {str(key): plain(item) for key, item in value.items()}
    if isinstance(value, Sequence) and not isinstance(value, bytes | bytearray | memoryview):
        return [plain(item) for item in value]
    raise TypeError(f"{type(value).__name__} has no place in a manifest: {value!r}")


def _piece(piece: KitPiece, folder: str = PIECES) -> dict[str, object]:
    return {
        "name": piece.name,
        "title": piece.title,
        "stage": piece.stage,
        "copies": piece.copies,
        "size_mm": [round(extent, 3) for extent in piece.size_mm],
        "volume_mm3": round(piece.volume_mm3, 3),
        "mass_g": round(piece.mass_g, 3),
        "printing": plain(piece.printing),
        "files": piece_files(piece.name, folder),
        "geometry_hash": piece.geometry_hash,
        "mark": piece.mark,
    }


def _coupons(coupons: Coupons | None) -> dict[str, object] | None:
    if coupons is None:
        return None
    return {
        "sheet": COUPON_SHEET,
        "duration_s": round(coupons.duration_s),
        "pieces": [_piece(piece, COUPONS) for piece in coupons.pieces],
    }

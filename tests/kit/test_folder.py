from __future__ import annotations

import errno
import json
import os
import signal
import subprocess
import sys
from pathlib import Path
from typing import TYPE_CHECKING

import pytest

from gyrecut.errors import BuildError
from gyrecut.kit.folder import KitFile, check_target, replace_folder

if TYPE_CHECKING:
    from collections.abc import Iterator

KILLED = -signal.SIGKILL

# A run that is killed: "writing" after its second file, "swapping" between the two renames.
CHILD = """
import os, signal, sys
from pathlib import Path
from gyrecut.kit.folder import KitFile, replace_folder

folder, moment = Path(sys.argv[1]), sys.argv[2]

def die():
    os.kill(os.getpid(), signal.SIGKILL)

def files():
    yield KitFile(path="summary.md", data=b"new")
    yield KitFile(path="pieces/lid.stl", data=b"new" * 10_000)
    if moment == "writing":
        die()

rename = Path.rename
def dying_rename(self, target):
    done = rename(self, target)
    if moment == "swapping" and str(target).endswith(".old"):
        die()
    return done
Path.rename = dying_rename

replace_folder(folder, files())
"""


def kit(mark: str, *names: str) -> list[KitFile]:
    paths = ["summary.md", *names]
    manifest = {"format": "gyrecut-kit", "files": [{"path": path} for path in paths]}
    files = [KitFile(path=path, data=f"{mark} {path}".encode()) for path in paths]
    return [*files, KitFile(path="manifest.json", data=json.dumps(manifest).encode())]


def tree(folder: Path) -> dict[str, bytes]:
    found = folder.rglob("*")
    return {p.relative_to(folder).as_posix(): p.read_bytes() for p in found if p.is_file()}


def expected(files: list[KitFile]) -> dict[str, bytes]:
    return {file.path: file.data for file in files}


def beside(folder: Path) -> list[str]:
    return sorted(path.name for path in folder.parent.iterdir() if path != folder)


@pytest.fixture
def folder(tmp_path: Path) -> Path:
    """Where a kit stands already."""
    return replace_folder(tmp_path / "kit", kit("old", "pieces/barrel.stl"))


def killed_run(folder: Path, moment: str) -> None:
    done = subprocess.run(
        [sys.executable, "-c", CHILD, str(folder), moment], capture_output=True, check=False
    )
    assert done.returncode == KILLED, done.stderr.decode()


def test_new_folder_holds_the_files_and_nothing_stands_beside(tmp_path: Path) -> None:
    files = kit("new", "pieces/lid.stl", "pieces/cone.stl")
    folder = replace_folder(tmp_path / "shop" / "kits" / "one", files)
    assert folder == tmp_path / "shop" / "kits" / "one"
    assert tree(folder) == expected(files)
    assert beside(folder) == []


def test_new_folder_is_open_to_others_as_the_umask_says(tmp_path: Path) -> None:
    plain = tmp_path / "plain"
    plain.mkdir()
    folder = replace_folder(tmp_path / "kit", kit("new"))
    assert folder.stat().st_mode == plain.stat().st_mode


def test_earlier_kit_is_replaced_whole(folder: Path) -> None:
    files = kit("new", "pieces/lid.stl")
    replace_folder(folder, files)
    assert tree(folder) == expected(files)
    assert beside(folder) == []


def test_relative_name_is_taken_from_where_the_process_stands(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.chdir(tmp_path)
    assert replace_folder(Path("kit"), kit("new")) == tmp_path / "kit"


def test_empty_folder_is_taken(tmp_path: Path) -> None:
    (tmp_path / "kit").mkdir()
    replace_folder(tmp_path / "kit", kit("new"))
    assert tree(tmp_path / "kit") == expected(kit("new"))


@pytest.mark.parametrize("error", [RuntimeError("ours"), BuildError("no solid"), KeyboardInterrupt])
def test_exception_in_the_middle_leaves_the_earlier_kit(
    error: BaseException | type[BaseException], folder: Path
) -> None:
    def breaking() -> Iterator[KitFile]:
        yield KitFile(path="summary.md", data=b"new")
        raise error

    before = tree(folder)
    with pytest.raises(error if isinstance(error, type) else type(error)):
        replace_folder(folder, breaking())
    assert tree(folder) == before
    assert beside(folder) == []


def test_failing_last_step_puts_the_earlier_kit_back(
    folder: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    rename = Path.rename

    def failing(self: Path, target: Path) -> Path:
        if self.name.endswith(".new"):
            raise OSError(errno.EIO, "Input/output error")
        return rename(self, target)

    before = tree(folder)
    monkeypatch.setattr(Path, "rename", failing)
    with pytest.raises(BuildError, match="the system says: Input/output error"):
        replace_folder(folder, kit("new"))
    assert tree(folder) == before
    assert beside(folder) == []


def test_killed_while_writing_leaves_the_earlier_kit_and_the_next_run_clears_up(
    folder: Path,
) -> None:
    before = tree(folder)
    killed_run(folder, "writing")
    assert tree(folder) == before
    (leftover,) = beside(folder)
    assert leftover.startswith(".kit.gyrecut-")
    replace_folder(folder, kit("new"))
    assert tree(folder) == expected(kit("new"))
    assert beside(folder) == []


def test_killed_between_the_renames_the_next_run_puts_the_earlier_kit_back(folder: Path) -> None:
    before = tree(folder)
    killed_run(folder, "swapping")
    assert not folder.exists()
    assert len(beside(folder)) == 2

    def breaking() -> Iterator[KitFile]:
        yield KitFile(path="summary.md", data=b"new")
        raise BuildError("no solid")

    with pytest.raises(BuildError, match="no solid"):
        replace_folder(folder, breaking())
    assert tree(folder) == before
    assert beside(folder) == []


def test_only_leftovers_of_dead_runs_for_this_kit_are_cleared(folder: Path) -> None:
    with subprocess.Popen([sys.executable, "-c", ""]) as ended:
        ended.wait()
    names = {
        "dead": f".kit.gyrecut-{ended.pid}-0123abcd.new",
        "running": f".kit.gyrecut-{os.getppid()}-0123abcd.new",
        "of another kit": f".box.gyrecut-{ended.pid}-0123abcd.new",
        "not our mark": f".kit.gyrecut-{ended.pid}-backup.new",
        "a stranger's": ".kit.new",
    }
    for name in names.values():
        (folder.parent / name).mkdir()
    replace_folder(folder, kit("new"))
    assert beside(folder) == sorted(set(names.values()) - {names["dead"]})


def test_file_is_refused(tmp_path: Path) -> None:
    place = tmp_path / "kit"
    place.write_text("mine")
    with pytest.raises(BuildError, match=r"kit is a file, not a folder; name a new folder"):
        replace_folder(place, kit("new"))
    assert place.read_text() == "mine"


@pytest.mark.parametrize("dangling", [True, False])
def test_link_is_refused(*, dangling: bool, folder: Path) -> None:
    link = folder.with_name("link")
    link.symlink_to(folder.with_name("nowhere") if dangling else folder)
    with pytest.raises(BuildError, match="is a link; name the folder it points to"):
        replace_folder(link, kit("new"))
    assert link.is_symlink()
    assert tree(folder) == expected(kit("old", "pieces/barrel.stl"))


@pytest.mark.parametrize(
    "manifest",
    [None, "not json", "[]", '{"format": "another"}', '{"format": "gyrecut-kit"}', "\udcff"],
)
def test_folder_that_is_no_kit_is_refused(manifest: str | None, tmp_path: Path) -> None:
    place = tmp_path / "kit"
    place.mkdir()
    (place / "letter.txt").write_text("dear")
    if manifest is not None:
        (place / "manifest.json").write_text(manifest, errors="surrogateescape")
    before = tree(place)
    with pytest.raises(BuildError, match="holds files and is no kit of gyrecut, so it is left"):
        replace_folder(place, kit("new"))
    assert tree(place) == before
    assert beside(place) == []


def test_kit_with_somebodys_own_files_is_refused(folder: Path) -> None:
    (folder / "pieces" / "barrel.gcode").write_text("G28")
    (folder / "photos").symlink_to(folder.parent)
    with pytest.raises(BuildError) as refused:
        replace_folder(folder, kit("new"))
    assert str(refused.value) == (
        f"{folder} holds files that are not of the kit and would be lost: "
        "photos, pieces/barrel.gcode; move them elsewhere, or name another folder"
    )


def test_long_list_of_own_files_is_cut(folder: Path) -> None:
    for number in range(8):
        (folder / f"note-{number}").touch()
    with pytest.raises(BuildError, match=r"note-0, .*, note-4 and 3 more; move"):
        check_target(folder)


def test_litter_of_the_desktop_does_not_matter(folder: Path) -> None:
    (folder / ".DS_Store").touch()
    replace_folder(folder, kit("new"))
    assert tree(folder) == expected(kit("new"))


def test_something_put_there_during_a_long_build_is_not_lost(tmp_path: Path) -> None:
    place = tmp_path / "kit"

    def slow() -> Iterator[KitFile]:
        yield KitFile(path="summary.md", data=b"new")
        place.mkdir()
        (place / "letter.txt").write_text("dear")

    with pytest.raises(BuildError, match="is no kit of gyrecut"):
        replace_folder(place, slow())
    assert tree(place) == {"letter.txt": b"dear"}


@pytest.mark.parametrize("path", ["../outside.txt", "/tmp/outside.txt", "a/../../outside.txt"])  # noqa: S108 (refused)
def test_file_outside_the_folder_is_refused(path: str, tmp_path: Path) -> None:
    with pytest.raises(BuildError, match="leads out of the kit"):
        replace_folder(tmp_path / "kit", [KitFile(path=path, data=b"new")])
    assert list(tmp_path.iterdir()) == []


def test_two_files_of_one_name_are_refused(tmp_path: Path) -> None:
    twice = [KitFile(path="summary.md", data=b"one"), KitFile(path="summary.md", data=b"two")]
    with pytest.raises(BuildError, match="the system says: File exists"):
        replace_folder(tmp_path / "kit", twice)


@pytest.mark.parametrize(
    ("code", "cure"),
    [
        (errno.ENOSPC, "no space is left there; free some, or name a folder on another disk"),
        (errno.EDQUOT, "no space is left there; free some, or name a folder on another disk"),
        (errno.EACCES, "writing is not allowed there; name a folder of your own"),
        (errno.EROFS, "writing is not allowed there; name a folder of your own"),
    ],
)
def test_refusal_of_the_system_says_what_to_do(code: int, cure: str, folder: Path) -> None:
    def failing() -> Iterator[KitFile]:
        yield KitFile(path="summary.md", data=b"new")
        raise OSError(code, os.strerror(code))

    before = tree(folder)
    with pytest.raises(BuildError) as refused:
        replace_folder(folder, failing())
    assert str(refused.value) == f"the kit could not be written to {folder}: {cure}"
    assert tree(folder) == before


@pytest.mark.skipif(not Path("/dev/full").exists(), reason="needs a full device")
def test_really_full_disk_is_reported(folder: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    real = Path.open

    def onto_full(self: Path, mode: str = "r") -> object:
        return real(Path("/dev/full"), "wb") if mode == "xb" else real(self, mode)

    monkeypatch.setattr(Path, "open", onto_full)
    with pytest.raises(BuildError, match="no space is left there"):
        replace_folder(folder, kit("new"))


def test_name_too_long_for_the_disk_is_reported(tmp_path: Path) -> None:
    with pytest.raises(BuildError, match="the system says: File name too long; name another"):
        replace_folder(tmp_path / ("k" * 250), kit("new"))


def test_file_where_a_parent_should_be_is_reported(tmp_path: Path) -> None:
    (tmp_path / "shop").write_text("mine")
    with pytest.raises(BuildError, match="the kit could not be written to"):
        replace_folder(tmp_path / "shop" / "kit", kit("new"))

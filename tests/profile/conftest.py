"""A good profile to spoil, and a folder to read it from under a short name."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING

import pytest

from gyrecut.errors import PROFILE_INVALID
from gyrecut.profile import ProfileError, load_profile

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

HERE = Path(__file__).parent


@pytest.fixture
def good() -> str:
    return (HERE / "good.yaml").read_text(encoding="utf-8")


@pytest.fixture
def write(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> Callable[[Mapping[str, str | bytes]], None]:
    """Write files into a new folder and go there, so that messages name no machine's paths."""
    (tmp_path / "shop").mkdir()
    monkeypatch.chdir(tmp_path / "shop")

    def write_files(files: Mapping[str, str | bytes]) -> None:
        for name, content in files.items():
            path = Path(name)
            path.parent.mkdir(parents=True, exist_ok=True)
            path.write_bytes(content.encode() if isinstance(content, str) else content)

    return write_files


@pytest.fixture
def refusal(
    write: Callable[[Mapping[str, str | bytes]], None],
) -> Callable[[Mapping[str, str | bytes]], str]:
    """Write files, read broken.yaml, and give the whole message of its refusal."""

    def refusal_of(files: Mapping[str, str | bytes]) -> str:
        write(files)
        with pytest.raises(ProfileError) as caught:
            load_profile(Path("broken.yaml"))
        assert caught.value.exit_code == PROFILE_INVALID
        places = [(p.place.source.order, p.line, p.column) for p in caught.value.problems]
        assert places == sorted(places)
        return str(caught.value)

    return refusal_of

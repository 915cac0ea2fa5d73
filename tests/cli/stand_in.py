"""Runs `gyrecut` with one thing gone wrong: `python stand_in.py MISHAP ARGUMENT...`.

Only what the mishap is about is replaced. A kit takes long to build, so those mishaps that are
about what happens around a build replace the build as well; that real builds work is tested where
the pipeline is.
"""

from __future__ import annotations

import signal
import sys
import time
from dataclasses import replace
from typing import TYPE_CHECKING, Any, NoReturn

from gyrecut import pipeline
from gyrecut.cli import system
from gyrecut.cli.main import main
from gyrecut.errors import BuildError
from gyrecut.findings import Finding, Severity

if TYPE_CHECKING:
    from collections.abc import Callable
    from pathlib import Path

    from gyrecut.profile import Profile

    Progress = Callable[[str, int, int], None]

BARREL = {"name": "barrel-1", "title": "Barrel, first slice", "copies": 2}
LID = {"name": "lid", "title": "Lid", "copies": 1}
PIECES = [
    {
        **BARREL,
        "size_mm": [150.0, 151.5, 90.25],
        "mass_g": 210.0,
        "printing": {"duration_s": 36000.0},
    },
    {**LID, "size_mm": [170.0, 170.0, 6.0], "mass_g": 80.0, "printing": None},
]
STOP = Finding(
    code="invented-stop",
    severity=Severity.STOP,
    part="lid",
    what="The lid [invented] is too thin.",
    measured=1.0,
    limit=2.0,
    unit="mm",
    where="walls.lid",
    fix="make it thicker",
)


def kit() -> None:
    """A build that is done at once."""

    def build(design: pipeline.Design, folder: Path, progress: Progress) -> pipeline.BuildResult:
        for done in range(3):
            progress("solids", done, 2)
        progress("files", 1, 1)
        manifest: dict[str, Any] = {"pieces": PIECES}
        return pipeline.BuildResult(folder=folder, findings=design.findings, manifest=manifest)

    system.require_cad = _nothing
    pipeline.build = build


def kit_to_stop() -> None:
    """A build, and a finding that says stop."""
    kit()
    stop()


def stop() -> None:
    """A design with a finding that says stop, after others."""
    real = pipeline.design

    def design(profile: Profile) -> pipeline.Design:
        good = real(profile)
        return replace(good, findings=(*good.findings, STOP))

    pipeline.design = design


def build_fails() -> None:
    """A build that the CAD kernel gives up."""

    def build(design: pipeline.Design, folder: Path, progress: Progress) -> NoReturn:  # noqa: ARG001
        raise BuildError("the barrel did not come out as one solid")

    system.require_cad = _nothing
    pipeline.build = build


def long_build() -> None:
    """A build that does not end, and can be interrupted even where the tests run in background."""

    def build(design: pipeline.Design, folder: Path, progress: Progress) -> NoReturn:  # noqa: ARG001
        progress("solids", 0, 2)
        time.sleep(60)
        raise AssertionError("nobody interrupted")

    interruptible()
    system.require_cad = _nothing
    pipeline.build = build


def interruptible() -> None:
    """Nothing wrong yet, and Ctrl-C works even where the tests run in background."""
    signal.signal(signal.SIGINT, signal.default_int_handler)


def fault() -> None:
    """A mistake of our own."""

    def design(profile: Profile) -> NoReturn:  # noqa: ARG001
        raise ZeroDivisionError("invented\nfault")

    pipeline.design = design


def not_a_number() -> None:
    """A result that JSON has no word for."""

    def as_document(self: pipeline.Design) -> dict[str, Any]:  # noqa: ARG001
        return {"cut_size": float("nan")}

    pipeline.Design.as_document = as_document  # type: ignore[method-assign]


def no_libgl() -> None:
    """What the CAD kernel says on a system without the graphics library."""
    _refuse("cadquery", ImportError(_cannot_open("libGL.so.1")))


def no_unheard_of_library() -> None:
    """The same for a library nobody has heard of, said in the other way there is."""
    _refuse("lib3mf", OSError(_cannot_open("libunheard-of.so.7")))


def no_cadquery() -> None:
    """A Python package that is not installed."""
    _refuse("cadquery", ModuleNotFoundError("No module named 'cadquery'"))


def _cannot_open(library: str) -> str:
    return f"{library}: cannot open shared object file: No such file or directory"


def _refuse(module: str, error: Exception) -> None:
    class Refusing:
        def find_spec(self, name: str, *_: object) -> None:
            if name == module:
                raise error

    sys.meta_path.insert(0, Refusing())


def _nothing() -> None:
    return None


MISHAPS = {
    mishap.__name__: mishap
    for mishap in (
        kit, kit_to_stop, stop, build_fails, long_build, interruptible, fault, not_a_number,
        no_libgl, no_unheard_of_library, no_cadquery,
    )
}  # fmt: skip

if __name__ == "__main__":
    MISHAPS[sys.argv[1]]()
    sys.argv = ["gyrecut", *sys.argv[2:]]
    main()

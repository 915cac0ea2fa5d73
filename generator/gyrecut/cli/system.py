"""Whether this machine can run the CAD kernel, told in one line when it cannot."""

from __future__ import annotations

import re
from importlib import import_module

from gyrecut.errors import BuildError

# What a graphical system has and a bare one lacks: library -> its Debian and Ubuntu package.
PACKAGES = {
    "libGL.so.1": "libgl1",
    "libEGL.so.1": "libegl1",
    "libOpenGL.so.0": "libopengl0",
    "libX11.so.6": "libx11-6",
    "libXrender.so.1": "libxrender1",
}
_ALWAYS_WANTED = ("libgl1", "libegl1")
_LIBRARY = re.compile(r"\blib[\w.+-]+\.so[.\d]*")


class MissingPartError(BuildError):
    """A library that the build stands on cannot be loaded.

    Parameters
    ----------
    module : str
        The Python module that did not load.
    reason : str
        What the loader said.
    """

    def __init__(self, *, module: str, reason: str) -> None:
        self.module, self.reason = module, " ".join(reason.split())
        found = _LIBRARY.search(self.reason)
        self.library = found[0] if found else None
        super().__init__(f"{module} cannot start: {self._what_is_wrong()}")

    def _what_is_wrong(self) -> str:
        if self.library is None:
            return f"{self.reason}; run the set-up command of README.md again"
        packages = dict.fromkeys((*_ALWAYS_WANTED, PACKAGES.get(self.library, "")))
        command = " ".join(("sudo apt-get install", *filter(None, packages)))
        if self.library in PACKAGES:
            advice = f"on Debian or Ubuntu: {command}"
        else:
            advice = f"install the package that holds it; on Debian or Ubuntu first try: {command}"
        return f"the system library {self.library} is missing; {advice}"


def require_cad() -> None:
    """Load what a build needs, before any work is done.

    Raises
    ------
    MissingPartError
        One of them cannot be loaded, most often for want of a system library.
    """
    for module in ("cadquery", "trimesh", "embreex", "lib3mf"):
        try:
            import_module(module)
        except (ImportError, OSError) as wrong:
            raise MissingPartError(module=module, reason=str(wrong)) from wrong

"""CadQuery solids, one function a part."""

from gyrecut.solids.parts import Parts, make_parts

__all__ = ["Parts", "make_parts"]

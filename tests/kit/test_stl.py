from __future__ import annotations

import io
from typing import TYPE_CHECKING

import numpy as np
import pytest
import trimesh

from gyrecut.errors import BuildError
from gyrecut.kit.stl import stl_bytes

if TYPE_CHECKING:
    from gyrecut.kit.contents import KitContents


def test_file_is_84_bytes_and_50_a_facet(contents: KitContents) -> None:
    for piece in contents.pieces:
        data = stl_bytes(piece.mesh, "gyrecut")
        count = int.from_bytes(data[80:84], "little")
        assert count == len(piece.mesh.faces)
        assert len(data) == 84 + 50 * count


def test_read_back_it_is_the_solid(contents: KitContents) -> None:
    for piece in contents.pieces:
        read = trimesh.load_mesh(io.BytesIO(stl_bytes(piece.mesh, "gyrecut")), file_type="stl")
        assert read.is_volume
        assert len(read.faces) == len(piece.mesh.faces)
        assert np.array_equal(read.bounds, piece.mesh.bounds)
        assert read.volume == pytest.approx(piece.mesh.volume, rel=1e-9)
        assert abs(read.volume - piece.volume_mm3) <= 0.05 * piece.posed.Area()


def test_normals_are_unit_and_look_outward(contents: KitContents) -> None:
    mesh = contents.pieces[0].mesh
    facets = np.frombuffer(stl_bytes(mesh, "gyrecut")[84:], dtype=np.dtype("V50"))
    normals = np.frombuffer(b"".join(bytes(f)[:12] for f in facets), "<f4").reshape(-1, 3)
    assert np.allclose(np.linalg.norm(normals, axis=1), 1, rtol=0, atol=1e-6)
    tops = mesh.triangles_center[:, 2] == mesh.bounds[1, 2]
    assert tops.any()
    assert np.allclose(normals[tops], (0, 0, 1), rtol=0, atol=1e-6)


def test_header_is_ours_and_undated(contents: KitContents) -> None:
    data = stl_bytes(contents.pieces[0].mesh, "gyrecut 0.1.0, barrel, millimetres")
    assert data[:80] == b"gyrecut 0.1.0, barrel, millimetres".ljust(80)


def test_facet_without_area_has_no_normal() -> None:
    flat = trimesh.Trimesh([[0, 0, 0], [1, 0, 0], [2, 0, 0]], [[0, 1, 2]], process=False)
    assert stl_bytes(flat, "gyrecut")[84:96] == bytes(12)


@pytest.mark.parametrize("label", ["solid barrel", "Solid"])
def test_label_of_a_text_file_is_refused(label: str, contents: KitContents) -> None:
    with pytest.raises(BuildError, match='may not begin with "solid"'):
        stl_bytes(contents.pieces[0].mesh, label)

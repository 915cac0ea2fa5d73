from __future__ import annotations

import io
import re
import zipfile
from dataclasses import replace
from itertools import combinations
from typing import TYPE_CHECKING

import lib3mf
import numpy as np
import pytest
import trimesh
from lib3mf import Lib3MF

from gyrecut.errors import BuildError
from gyrecut.kit.threemf import laid_out, threemf_bytes

if TYPE_CHECKING:
    from pathlib import Path

    from gyrecut.kit.contents import KitContents


@pytest.fixture(scope="module")
def written(contents: KitContents) -> bytes:
    return threemf_bytes(contents)


@pytest.fixture(scope="module")
def model(written: bytes, tmp_path_factory: pytest.TempPathFactory) -> Lib3MF.Model:
    path = tmp_path_factory.mktemp("threemf") / "kit.3mf"
    path.write_bytes(written)
    model = lib3mf.Wrapper().CreateModel()
    reader = model.QueryReader("3mf")
    reader.SetStrictModeActive(True)  # noqa: FBT003
    reader.ReadFromFile(str(path))
    assert reader.GetWarningCount() == 0
    return model


def objects_of(model: Lib3MF.Model) -> list[Lib3MF.MeshObject]:
    found, walk = [], model.GetMeshObjects()
    while walk.MoveNext():
        found.append(walk.GetCurrentMeshObject())
    return found


def items_of(model: Lib3MF.Model) -> list[Lib3MF.BuildItem]:
    found, walk = [], model.GetBuildItems()
    while walk.MoveNext():
        found.append(walk.GetCurrent())
    return found


def mesh_in(mesh_object: Lib3MF.MeshObject) -> trimesh.Trimesh:
    vertices = [list(vertex.Coordinates) for vertex in mesh_object.GetVertices()]
    faces = [list(facet.Indices) for facet in mesh_object.GetTriangleIndices()]
    return trimesh.Trimesh(vertices, faces, process=False)


def test_lib3mf_reads_every_piece_in_strict_mode(
    model: Lib3MF.Model, contents: KitContents
) -> None:
    assert model.GetUnit() == lib3mf.ModelUnit.MilliMeter
    objects = objects_of(model)
    names = [(each.GetName(), each.GetPartNumber()) for each in objects]
    assert names == [(piece.name, piece.name) for piece in contents.pieces]
    for each, piece in zip(objects, contents.pieces, strict=True):
        read = mesh_in(each)
        assert each.IsManifoldAndOriented()
        assert read.is_volume  # closed, and its volume positive: lib3mf does not look at that
        assert len(np.unique(read.vertices, axis=0)) == len(read.vertices)
        # lib3mf writes six decimals
        assert np.allclose(read.extents, piece.size_mm, rtol=0, atol=2e-6)
        assert read.volume == pytest.approx(piece.mesh.volume, rel=1e-6)


def test_every_copy_is_printed(model: Lib3MF.Model) -> None:
    printed = [item.GetPartNumber() for item in items_of(model)]
    assert printed == ["barrel", "inlet", "plate", "plate", "plate"]


def test_copies_lie_side_by_side_in_the_positive_octant(model: Lib3MF.Model) -> None:
    by_id = {each.GetResourceID(): mesh_in(each) for each in objects_of(model)}
    boxes = []
    for item in items_of(model):
        move = np.array(item.GetObjectTransform().Fields)
        assert np.array_equal(move[:3], np.eye(3))
        boxes.append(by_id[item.GetObjectResourceID()].bounds + move[3])
    assert min(box.min() for box in boxes) >= -1e-4
    for one, other in combinations(boxes, 2):
        apart = np.maximum(one[0] - other[1], other[0] - one[1])
        assert apart[:2].max() >= 9.9


def test_metadata_names_the_kit_and_the_program(model: Lib3MF.Model) -> None:
    about = model.GetMetaDataGroup()
    said = {
        about.GetMetaData(n).GetName(): about.GetMetaData(n).GetValue()
        for n in range(about.GetMetaDataCount())
    }
    assert said == {"Title": "test-bench", "Application": "gyrecut 0.1.0"}


def test_text_of_the_model_keeps_the_core_rules(written: bytes) -> None:
    # 3MF core specification 1.4.0: a unit is written, ids are above 0, the names of metadata
    # and the two parts of the package are these (from memory)
    with zipfile.ZipFile(io.BytesIO(written)) as package:
        assert package.testzip() is None
        assert {"[Content_Types].xml", "_rels/.rels"} < set(package.namelist())
        text = package.read("3D/3dmodel.model").decode()
    assert 'unit="millimeter"' in text
    ids = [int(found) for found in re.findall(r'<object id="(\d+)"', text)]
    assert min(ids) > 0
    assert len(set(ids)) == len(ids)
    identifiers = re.findall(r'UUID="([^"]+)"', text)
    assert len(set(identifiers)) == len(identifiers)


def test_trimesh_reads_every_piece(written: bytes, contents: KitContents, tmp_path: Path) -> None:
    path = tmp_path / "kit.3mf"
    path.write_bytes(written)
    scene = trimesh.load_scene(path)
    assert scene.units == "millimeter"
    for piece in contents.pieces:
        read = scene.geometry[piece.name]
        assert read.is_volume
        assert np.allclose(read.extents, piece.size_mm, rtol=0, atol=2e-6)
        assert abs(read.volume - piece.volume_mm3) <= 0.05 * piece.posed.Area()


def test_same_kit_made_anew_is_the_same_file(written: bytes, contents_again: KitContents) -> None:
    assert threemf_bytes(contents_again) == written


def test_open_mesh_is_refused(contents: KitContents) -> None:
    plate = contents.pieces[2]
    gaping = trimesh.Trimesh(plate.mesh.vertices, plate.mesh.faces[1:], process=False)
    broken = replace(contents, pieces=(replace(plate, mesh=gaping),))
    with pytest.raises(BuildError, match="plate: lib3mf finds its mesh not manifold"):
        threemf_bytes(broken)


def test_many_copies_fill_a_rough_square(contents: KitContents) -> None:
    spots = laid_out([replace(contents.pieces[2], copies=36)])
    assert [spot.copy for spot in spots] == list(range(1, 37))
    assert len({spot.y_mm for spot in spots}) == len({spot.x_mm for spot in spots}) == 6

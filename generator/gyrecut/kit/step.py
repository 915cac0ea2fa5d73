"""STEP: the machine put together, with its parts named, and each piece as it is printed."""

from __future__ import annotations

import io
from datetime import UTC, datetime
from typing import TYPE_CHECKING

from OCP.APIHeaderSection import APIHeaderSection_MakeHeader
from OCP.BRepBuilderAPI import BRepBuilderAPI_Transform
from OCP.IFSelect import IFSelect_ReturnStatus
from OCP.Interface import Interface_Static
from OCP.STEPCAFControl import STEPCAFControl_Controller, STEPCAFControl_Writer
from OCP.STEPControl import STEPControl_StepModelType
from OCP.StepRepr import StepRepr_NextAssemblyUsageOccurrence
from OCP.TCollection import TCollection_ExtendedString, TCollection_HAsciiString
from OCP.TDataStd import TDataStd_Name
from OCP.TDocStd import TDocStd_Document
from OCP.TopLoc import TopLoc_Location
from OCP.XCAFDoc import XCAFDoc_DocumentTool

from gyrecut.errors import BuildError

if TYPE_CHECKING:
    from collections.abc import Mapping, Sequence

    from cadquery import Solid
    from OCP.Interface import Interface_InterfaceModel
    from OCP.TDF import TDF_Label
    from OCP.TopoDS import TopoDS_Shape
    from OCP.XCAFDoc import XCAFDoc_ShapeTool

UNDATED = "1980-01-01T00:00:00"  # what the ZIP inside a 3MF says, too, where no time is given


def time_stamp(environment: Mapping[str, str]) -> str:
    """Say which time the files carry: that of SOURCE_DATE_EPOCH, or a fixed one.

    Parameters
    ----------
    environment : Mapping[str, str]
        The environment of the process.

    Returns
    -------
    str
        ISO 8601, in UTC.

    Raises
    ------
    BuildError
        When SOURCE_DATE_EPOCH is not a number of seconds.
    """
    given = environment.get("SOURCE_DATE_EPOCH", "")
    if not given:
        return UNDATED
    try:
        moment = datetime.fromtimestamp(int(given), tz=UTC)
    except (ValueError, OverflowError, OSError) as wrong:
        raise BuildError(
            f'SOURCE_DATE_EPOCH is "{given}"; allowed: whole seconds since 1970, or not set'
        ) from wrong
    return moment.strftime("%Y-%m-%dT%H:%M:%S")


def piece_step_bytes(name: str, posed: Solid, *, version: str, stamp: str) -> bytes:
    """Write one piece in its print pose; the product carries the piece's name.

    Parameters
    ----------
    name : str
        The piece's name.
    posed : Solid
        As printed [mm].
    version : str
        Version of gyrecut, for the header.
    stamp : str
        Time for the header, ISO 8601.

    Returns
    -------
    bytes
        The file.

    Raises
    ------
    BuildError
        When the kernel cannot write it.
    """
    document, shapes = _new_document()
    _named(shapes.AddShape(_own_shape(posed), False), name)  # noqa: FBT003
    return _written(document, name, version=version, stamp=stamp)


def assembly_step_bytes(
    name: str, parts: Sequence[tuple[str, Solid]], *, version: str, stamp: str
) -> bytes:
    """Write the parts where they sit in the machine, each a product with its own name.

    Parameters
    ----------
    name : str
        Name of the whole.
    parts : Sequence[tuple[str, Solid]]
        Name and placed solid [mm] of each part.
    version, stamp : str
        As in `piece_step_bytes`.

    Returns
    -------
    bytes
        The file.

    Raises
    ------
    BuildError
        When the kernel cannot write it.
    """
    document, shapes = _new_document()
    whole = _named(shapes.NewShape(), name)
    for part, placed in parts:
        label = _named(shapes.AddShape(_own_shape(placed), False), part)  # noqa: FBT003
        _named(shapes.AddComponent(whole, label, TopLoc_Location()), part)
    shapes.UpdateAssemblies()
    return _written(document, name, version=version, stamp=stamp, numbered=True)


def _new_document() -> tuple[TDocStd_Document, XCAFDoc_ShapeTool]:
    document = TDocStd_Document(TCollection_ExtendedString("XmlXCAF"))
    return document, XCAFDoc_DocumentTool.ShapeTool_s(document.Main())


def _named(label: TDF_Label, name: str) -> TDF_Label:
    TDataStd_Name.Set_s(label, TCollection_ExtendedString(name))
    return label


def _own_shape(solid: Solid) -> TopoDS_Shape:
    # Two moved copies of one solid share it in the kernel, and STEP would then hold a single
    # product under the first one's name. Moving the geometry itself gives each its own.
    shape = solid.wrapped
    move = shape.Location().Transformation()
    return BRepBuilderAPI_Transform(shape.Located(TopLoc_Location()), move, True).Shape()  # noqa: FBT003


def _written(
    document: TDocStd_Document, name: str, *, version: str, stamp: str, numbered: bool = False
) -> bytes:
    STEPCAFControl_Controller.Init_s()  # the settings below do not exist before
    Interface_Static.SetCVal_s("write.step.unit", "MM")
    # Curves in the parameter plane of each surface: every reader makes its own, and they take
    # two thirds of the file.
    Interface_Static.SetIVal_s("write.surfacecurve.mode", 0)
    writer = STEPCAFControl_Writer()
    writer.SetNameMode(True)  # noqa: FBT003
    if not writer.Transfer(document, STEPControl_StepModelType.STEPControl_AsIs):
        raise _unwritable(name)
    model = writer.ChangeWriter().Model()
    if numbered:
        _number_occurrences(model)
    header = APIHeaderSection_MakeHeader(model)
    header.SetName(TCollection_HAsciiString(name))
    header.SetTimeStamp(TCollection_HAsciiString(stamp))
    header.SetAuthorValue(1, TCollection_HAsciiString(""))
    header.SetOrganizationValue(1, TCollection_HAsciiString(""))
    header.SetOriginatingSystem(TCollection_HAsciiString(f"gyrecut {version}"))
    file = io.BytesIO()
    if writer.WriteStream(file) != IFSelect_ReturnStatus.IFSelect_RetDone:
        raise _unwritable(name)
    return file.getvalue()


def _number_occurrences(model: Interface_InterfaceModel) -> None:
    # The kernel counts them on through the life of the process; a file starts at 1 here.
    entities = (model.Value(number) for number in range(1, model.NbEntities() + 1))
    occurrences = (e for e in entities if isinstance(e, StepRepr_NextAssemblyUsageOccurrence))
    for number, occurrence in enumerate(occurrences, start=1):
        occurrence.SetId(TCollection_HAsciiString(str(number)))


def _unwritable(name: str) -> BuildError:
    return BuildError(f"{name}: the CAD kernel could not write it as STEP")

"""What a kit is made of, as plain data: the pipeline fills it, the writers read it."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from cadquery import Solid
    from trimesh import Trimesh

    from gyrecut.checks import PrintEstimate
    from gyrecut.findings import Finding


@dataclass(frozen=True, slots=True, kw_only=True, eq=False)
class KitPiece:
    """One kind of printed object; `gyrecut.kit.measuring.kit_piece` measures and builds it.

    Parameters
    ----------
    name : str
        Slug, unique in the kit; names the files and the products in them.
    title : str
        What the piece is, in the workshop's words.
    stage : int
        The separation step it belongs to, counted from 1.
    copies : int
        How often it is printed.
    placed : Solid
        Where it sits in the machine [mm].
    posed : Solid
        As it is printed, on z = 0, x and y from 0 up [mm].
    mesh : Trimesh
        The one mesh of `posed`, closed and oriented [mm].
    size_mm : tuple[float, float, float]
        Extents of the posed mesh [mm].
    volume_mm3 : float
        Volume of the solid, not of its mesh [mm^3].
    mass_g : float
        One copy printed full [g].
    printing : PrintEstimate or None
        What one copy takes to print with shells and infill; None before it is measured.
    geometry_hash : str
        Equal for equal posed geometry, see `gyrecut.kit.geometry_hash`.
    mark : str
        Its name as it is engraved on it, "" where nothing is; "^" is an arrow up.
    """

    name: str
    title: str
    stage: int = 1
    copies: int = 1
    placed: Solid
    posed: Solid
    mesh: Trimesh
    size_mm: tuple[float, float, float]
    volume_mm3: float
    mass_g: float
    geometry_hash: str
    mark: str = ""
    printing: PrintEstimate | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class Polymer:
    """What the pieces are printed from.

    Parameters
    ----------
    name : str
        Its name in the catalogue.
    density : float
        Density of the solid polymer [kg/m^3].
    softening_temperature : float
        Where a loaded print starts to give way [K].
    """

    name: str
    density: float
    softening_temperature: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Fact:
    """One labelled number for a reader.

    Parameters
    ----------
    label : str
        What it is, in the trade's words.
    value : float
        The number, in `unit`.
    unit : str
        Unit as a reader writes it, "" for a plain number.
    note : str
        What to know about it, such as the model it comes from.
    """

    label: str
    value: float
    unit: str = ""
    note: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Hardware:
    """Something to buy: screws, inserts, glue, cord.

    Parameters
    ----------
    what : str
        The article, with its size.
    quantity : str
        How much of it, with its unit where it has one ("12", "1.5 m").
    where : str
        What it is for.
    """

    what: str
    quantity: str
    where: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Coupons:
    """The small prints of a kit.

    Parameters
    ----------
    pieces : tuple[KitPiece, ...]
        Printed in one job.
    duration_s : float
        Of the whole job [s].
    sheet : str
        What to try, and which line of the profile to change; Markdown.
    """

    pieces: tuple[KitPiece, ...]
    duration_s: float
    sheet: str


@dataclass(frozen=True, slots=True, kw_only=True)
class KitContents:
    """Everything that goes into one kit.

    Parameters
    ----------
    version : str
        Version of gyrecut that built it.
    profile_name, profile_hash : str
        Slug of the profile, and the hash of what it says.
    polymer : Polymer
        What the pieces are printed from.
    dust_is_combustible : bool
        Whether the profile's dust can burn; moves the caution about it to the top.
    dimensions, prediction : object
        The stages' own results (dataclasses, mappings, sequences), kept whole in the manifest.
    body, estimate : tuple[Fact, ...]
        The few of those numbers a person at the bench reads.
    findings : tuple[Finding, ...]
        What the checks said.
    pieces : tuple[KitPiece, ...]
        What is printed.
    hardware : tuple[Hardware, ...]
        What is bought.
    steps : tuple[str, ...]
        How the pieces go together, a step a sentence.
    coupons : Coupons or None
        Small prints that come before the large ones.
    """

    version: str
    profile_name: str
    profile_hash: str
    polymer: Polymer
    dust_is_combustible: bool
    dimensions: object
    prediction: object
    body: tuple[Fact, ...]
    estimate: tuple[Fact, ...]
    findings: tuple[Finding, ...]
    pieces: tuple[KitPiece, ...]
    hardware: tuple[Hardware, ...] = ()
    steps: tuple[str, ...] = ()
    coupons: Coupons | None = None

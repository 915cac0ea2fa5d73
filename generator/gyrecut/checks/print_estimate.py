"""How much a piece takes to print: material, time and money, before a slicer has seen it.

A filament piece is shells of whole beads round an infill. Where the shells of both sides meet the
wall is solid, so what the shells take is never more than the volume. Its time is what the hot end
needs to melt that much, as long as no layer is over sooner than it takes to cool. A resin piece is
solid, and each of its layers takes the same time whatever is on it.

These are estimates: a slicer's own figures differ by a fifth and more with travel, acceleration and
supports, and each printer has its own. Sources: bead outline and flow limit are those that slicers
work with, the limits as read in filament guides for a 0.4 mm nozzle on an ordinary hot end; the
rest is common practice, no source.
"""

from __future__ import annotations

from dataclasses import dataclass
from math import ceil, pi
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from gyrecut.catalogue.rows import Polymer
    from gyrecut.profile.models import Printer

MM = 1000.0
MM3_IN_M3 = 1e9
G_IN_KG = 1000.0
# What an ordinary hot end melts through a 0.4 mm nozzle, low end of the range read [mm3/s]. A
# wider nozzle lets more through, so its pieces are done sooner than is said here.
MELTS = {"PLA": 11.0, "PETG": 8.0, "ABS": 10.0, "ASA": 10.0}
MELTS_AT_LEAST = 8.0  # mm3/s; for a polymer without a figure, the lowest of those
# From here on: common practice, no source.
SPEED_MM_S = 150.0
FLOW_SHARE = 0.6  # 0.5 to 0.7 of it is left after travel, acceleration and short lines
LEAST_LAYER_S = 8.0
PERIMETERS = 4  # fewer leak
LEVEL_LAYERS = 5
INFILL = 0.25
FILAMENT_MM = 1.75
EXPOSURE_S = 5.0  # 2 to 8
LIFT_S = 7.5  # 5 to 10


@dataclass(frozen=True, slots=True, kw_only=True)
class FilamentSettings:
    """How a filament printer is set.

    Parameters
    ----------
    layer_height_mm, line_width_mm : float
        Of one bead [mm].
    perimeters : int
        Beads side by side in a shell.
    level_layers : int
        Solid layers under each face that looks up, and on each that looks down.
    infill : float
        Share of material between the shells [-].
    speed_mm_s : float
        Of the nozzle along a bead [mm/s].
    melts_mm3_s : float
        Most that the hot end melts [mm3/s].
    flow_share : float
        Share of the possible flow that is reached on average [-].
    least_layer_s : float
        Shortest time for one layer, so that it cools [s].
    filament_mm : float
        Diameter of the filament [mm].
    """

    layer_height_mm: float
    line_width_mm: float
    perimeters: int = PERIMETERS
    level_layers: int = LEVEL_LAYERS
    infill: float = INFILL
    speed_mm_s: float = SPEED_MM_S
    melts_mm3_s: float
    flow_share: float = FLOW_SHARE
    least_layer_s: float = LEAST_LAYER_S
    filament_mm: float = FILAMENT_MM

    @property
    def bead_mm2(self) -> float:
        """Section of a bead with rounded sides [mm2]."""
        height, width = self.layer_height_mm, self.line_width_mm
        return height * (width - height) + pi * height**2 / 4

    @property
    def shell_mm(self) -> float:
        """Thickness of the perimeters together: beads overlap at their rounded sides [mm]."""
        spacing = self.line_width_mm - self.layer_height_mm * (1 - pi / 4)
        return self.line_width_mm + (self.perimeters - 1) * spacing if self.perimeters else 0.0


@dataclass(frozen=True, slots=True, kw_only=True)
class ResinSettings:
    """How a resin printer is set.

    Parameters
    ----------
    layer_height_mm : float
        Of one layer [mm].
    exposure_s, lift_s : float
        To cure a layer, and to peel it off and come back [s].
    """

    layer_height_mm: float
    exposure_s: float = EXPOSURE_S
    lift_s: float = LIFT_S


@dataclass(frozen=True, slots=True, kw_only=True)
class PrintEstimate:
    """What a piece takes to print.

    Parameters
    ----------
    printed_mm3 : float
        Material in it: shells and infill, or all of it [mm3].
    mass_g : float
        Mass of that [g].
    filament_m : float or None
        Length of filament; None for resin [m].
    layers : int
        Layers it has.
    duration_s : float
        Time to print it [s].
    cost : float or None
        What the material costs, in the money of the price given; None without one.
    """

    printed_mm3: float
    mass_g: float
    filament_m: float | None
    layers: int
    duration_s: float
    cost: float | None


def settings_of(printer: Printer, polymer: Polymer) -> FilamentSettings | ResinSettings:
    """Give the settings of a profile's printer; what it does not say is as practice has it."""
    layer = printer.layer_height * MM
    if printer.line_width is None:
        return ResinSettings(layer_height_mm=layer)
    return FilamentSettings(
        layer_height_mm=layer,
        line_width_mm=printer.line_width * MM,
        melts_mm3_s=MELTS.get(polymer.name, MELTS_AT_LEAST),
    )


def print_estimate(
    *,
    volume_mm3: float,
    area_mm2: float,
    level_mm2: float,
    height_mm: float,
    settings: FilamentSettings | ResinSettings,
    density: float,
    price_per_kg: float | None = None,
) -> PrintEstimate:
    """Estimate what a piece takes to print.

    Parameters
    ----------
    volume_mm3 : float
        Of the solid [mm3].
    area_mm2 : float
        Of its whole surface [mm2].
    level_mm2 : float
        Of the faces among it that look up or down more than sideways [mm2].
    height_mm : float
        In print pose [mm].
    settings : FilamentSettings or ResinSettings
        How the printer is set.
    density : float
        Of the polymer [kg/m3].
    price_per_kg : float or None
        In any money.

    Returns
    -------
    PrintEstimate

    Raises
    ------
    ValueError
        Where a size is not above zero, or the level faces have more area than all.

    Notes
    -----
    Of the piece alone: brim, purge and failed prints take 5 to 10 % more, common practice, no
    source. The least time for a layer is held against the mean layer, so a piece that is broad
    below and a spike above takes somewhat longer than is said.
    """
    if not all(size > 0 for size in (volume_mm3, area_mm2, height_mm, density)):
        raise ValueError(
            f"volume {volume_mm3} mm3, area {area_mm2} mm2, height {height_mm} mm and density "
            f"{density} kg/m3 must all be above zero"
        )
    if not 0 <= level_mm2 <= area_mm2:
        raise ValueError(f"level area {level_mm2} mm2 must be within 0 and {area_mm2} mm2")
    layers = ceil(height_mm / settings.layer_height_mm - 1e-6)  # a last digit is no layer
    filament_m = None
    if isinstance(settings, ResinSettings):
        printed = volume_mm3
        duration = layers * (settings.exposure_s + settings.lift_s)
    else:
        upright = (area_mm2 - level_mm2) * settings.shell_mm
        level = level_mm2 * settings.level_layers * settings.layer_height_mm
        shells = min(volume_mm3, upright + level)
        printed = shells + settings.infill * (volume_mm3 - shells)
        flow = min(settings.speed_mm_s * settings.bead_mm2, settings.melts_mm3_s)
        duration = max(printed / (flow * settings.flow_share), layers * settings.least_layer_s)
        filament_m = printed / (pi / 4 * settings.filament_mm**2) / MM
    mass_g = printed * density / MM3_IN_M3 * G_IN_KG
    return PrintEstimate(
        printed_mm3=printed,
        mass_g=mass_g,
        filament_m=filament_m,
        layers=layers,
        duration_s=duration,
        cost=None if price_per_kg is None else mass_g / G_IN_KG * price_per_kg,
    )

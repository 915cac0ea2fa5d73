"""What the strength of a separator depends on besides its dimensions, in SI."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from gyrecut.catalogue.rows import BinMaterial, Fastener, Polymer

SAFETY_WITH_RELIEF = 2.0  # the suction is bounded: common practice, no source
SAFETY_WITHOUT_RELIEF = 3.0  # against collapse, ASME VIII-1 UG-28, from memory

# A flow beyond what a vacuum moves: 30-70 L/s, common practice, no source.
_MOST_THROUGH_A_VACUUM = 0.075  # m3/s


@dataclass(frozen=True, slots=True, kw_only=True)
class AssumedSource:
    """The strongest source of a kind, taken where a profile does not name its own.

    Parameters
    ----------
    title : str
        The kind, as the rest of a sentence.
    shut_off : float
        Suction behind a blocked hose [Pa]
    open_flow : float
        Flow with nothing in its way [m^3/s]
    """

    title: str
    shut_off: float
    open_flow: float


# Upper ends of what such sources reach: common practice, no source.
VACUUM = AssumedSource(title="a workshop vacuum", shut_off=25e3, open_flow=0.070)
EXTRACTOR = AssumedSource(title="a single-stage extractor", shut_off=2.5e3, open_flow=0.600)
ON_BOARD = AssumedSource(title="a small blower on the lid", shut_off=2.5e3, open_flow=0.030)


@dataclass(frozen=True, slots=True, kw_only=True)
class StrengthInputs:
    """Materials, bin, source and air, as plain numbers and rows of the catalogue.

    Parameters
    ----------
    polymer : Polymer
        What body and lid are printed from.
    fastener : Fastener
        The screws of the lid.
    bin_material : BinMaterial
        What the bin is made of.
    bin_volume, bin_mouth, bin_wall : float
        What the bin holds [m^3], its opening and its wall [m]
    bulk_density : float
        Of the dust in the bin [kg/m^3]
    shut_off, open_flow : float
        Both ends of the source's curve [Pa], [m^3/s]
    assumed_source : str
        The kind of source both numbers were assumed for, "" where they are known.
    relief_setting : float or None
        Suction that a relief opening keeps [Pa], None where there is none.
    working_suction : float or None
        Suction in the bin in normal work [Pa], None where it is not known.
    air_temperature : float
        Of the air that is moved [K]
    air_density : float
        Of the air in the room [kg/m^3]
    """

    polymer: Polymer
    fastener: Fastener
    bin_material: BinMaterial
    bin_volume: float
    bin_mouth: float
    bin_wall: float
    bulk_density: float
    shut_off: float
    open_flow: float
    assumed_source: str
    relief_setting: float | None
    working_suction: float | None
    air_temperature: float
    air_density: float

    @property
    def has_relief(self) -> bool:
        """Whether a relief opening ever opens."""
        return self.relief_setting is not None and self.relief_setting < self.shut_off

    @property
    def design_suction(self) -> float:
        """Suction that everything has to stand [Pa]: a blocked hose, or what a relief leaves."""
        if self.relief_setting is None:
            return self.shut_off
        return min(self.relief_setting, self.shut_off)

    @property
    def safety_factor(self) -> float:
        """Margin to keep [-]."""
        return SAFETY_WITH_RELIEF if self.has_relief else SAFETY_WITHOUT_RELIEF


def assumed_source(*, flow: float, on_board: bool) -> AssumedSource:
    """Give the strongest source that a profile without one can mean.

    Parameters
    ----------
    flow : float
        Air that the profile asks for [m^3/s]
    on_board : bool
        Whether a blower sits on the lid.

    Returns
    -------
    AssumedSource
    """
    if on_board:
        return ON_BOARD
    return VACUUM if flow <= _MOST_THROUGH_A_VACUUM else EXTRACTOR

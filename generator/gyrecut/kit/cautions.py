"""What a person must know before they build or switch on, shown with every result."""

from __future__ import annotations

from dataclasses import dataclass

ZERO_CELSIUS = 273.15  # K


@dataclass(frozen=True, slots=True, kw_only=True)
class Caution:
    """One warning.

    Parameters
    ----------
    code : str
        Stable name in kebab-case.
    title : str
        The warning in a few words.
    text : str
        What can happen, and what to do.
    """

    code: str
    title: str
    text: str


COMBUSTIBLE_DUST = Caution(
    code="combustible-dust",
    title="Fine dust burns, and a cloud of it can explode",
    text=(
        "Wood, board, plastic, flour and most other organic dusts are combustible when fine and "
        "dry. Empty the bin often, keep layers off floors and ledges, keep flames and sparks "
        "away. This separator has no explosion vent, no isolation and no spark detection. Do "
        "not use it at work, or on more than a small hobby scale, before a competent person "
        "has assessed the dust and the room."
    ),
)
FORBIDDEN = Caution(
    code="forbidden-materials",
    title="Never metal dust, sparks, ash, flammables or liquids",
    text=(
        "No aluminium, magnesium, titanium or other metal dust, nothing from a grinder, no "
        "glowing or warm ash, no solvent vapour, no gas, no liquid, no asbestos. Never let "
        "metal and wood dust meet; empty and clean everything between materials."
    ),
)
STATIC = Caution(
    code="static",
    title="Earth every metal part",
    text=(
        "Dust rubbing along plastic charges it, and a metal part that is not earthed stores the "
        "charge until it sparks. Bond the hose wire, screws, metal bin and suction machine to one "
        "earth and measure it. A bare wire inside a plastic duct does not make the duct "
        "conductive. Put no foil or metal paint on the outside."
    ),
)
LUNGS = Caution(
    code="fine-dust",
    title="The finest dust passes through, and it harms the lungs",
    text=(
        "A cyclone lets the finest, most harmful dust go on to the filter. Keep a filter "
        "behind it whose class suits the dust, wear a respirator that fits when you empty the "
        "bin or change the filter, and empty outdoors. The separator is no health protection "
        "by itself."
    ),
)
VACUUM = Caution(
    code="vacuum-on-bin",
    title="Suction can crush the bin",
    text=(
        "A blocked hose puts the suction machine's whole vacuum on the bin, the body and the "
        "lid. Use a stiff bin or a relief valve, try it with the hose blocked for a moment from "
        "a distance, and stop if anything buckles. A lid that lets go can trap fingers."
    ),
)
BLOWERS = Caution(
    code="blowers",
    title="Blowers cut, and run hot when blocked",
    text=(
        "Pull the plug and wait until it stands still before you reach in. Guard every intake. "
        "A machine cooled by its working air overheats when the hose stays blocked."
    ),
)
NOISE = Caution(
    code="noise",
    title="Noise harms hearing",
    text="Suction machines are often louder than 85 dB(A) beside you: wear hearing protection.",
)
ESTIMATES = Caution(
    code="estimates",
    title="The numbers are estimates",
    text=(
        "They come from published models that differ from each other and from measurements. "
        "Measure the suction after building; weigh the dust fed, the dust in the bin and the "
        "dust on the filter, and believe the scales."
    ),
)
LOCAL_RULES = Caution(
    code="local-rules",
    title="Local codes and licensed practice decide",
    text=(
        "Fire, explosion, electrical and workplace rules differ from place to place and come "
        "before anything written here. Where they ask for a licensed designer, electrician or "
        "inspector, go to one."
    ),
)


def printed_plastic(polymer: str, softening_temperature: float) -> Caution:
    """Warn about the material the pieces are printed from.

    Parameters
    ----------
    polymer : str
        Its name.
    softening_temperature : float
        Where a loaded print starts to give way [K].

    Returns
    -------
    Caution
        With the temperature in degrees Celsius.
    """
    return Caution(
        code="printed-plastic",
        title="Printed plastic burns, insulates and softens",
        text=(
            f"{polymer} is combustible, is an electric insulator, and softens near "
            f"{softening_temperature - ZERO_CELSIUS:.0f} °C: keep it out of the sun, away from "
            "heaters and hot exhaust. Prints crack with age and knocks: look over every joint "
            "before use, and leave the machine off when nobody is there."
        ),
    )


def cautions(
    *, polymer: str, softening_temperature: float, dust_is_combustible: bool
) -> tuple[Caution, ...]:
    """Give every caution, the one that matters most for the dust first.

    None is ever left out: a dust that is not combustible today may be followed by one that is.

    Parameters
    ----------
    polymer : str
        What the pieces are printed from.
    softening_temperature : float
        Of that polymer [K].
    dust_is_combustible : bool
        Whether the profile's dust can burn.

    Returns
    -------
    tuple[Caution, ...]
        In the order they are shown.
    """
    rest = (
        FORBIDDEN,
        STATIC,
        VACUUM,
        BLOWERS,
        printed_plastic(polymer, softening_temperature),
        NOISE,
        ESTIMATES,
        LOCAL_RULES,
    )
    first = (COMBUSTIBLE_DUST, LUNGS) if dust_is_combustible else (LUNGS, COMBUSTIBLE_DUST)
    return first + rest

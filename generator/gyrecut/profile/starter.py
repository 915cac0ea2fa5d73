"""The profile that `gyrecut new` writes: whole, valid, and commented line by line."""

from __future__ import annotations

from pydantic_core import PydanticCustomError

from gyrecut.profile.models import NAME
from gyrecut.profile.problems import Code, Place, Problem, ProfileError, Source

_TEXT = """\
# yaml-language-server: $schema=./profile.schema.json
# A quantity is a number and a unit: 38 mm, 1.5 in, 85 cfm, 140 m3/h. Decimal point, no comma.
# All numbers below are an example: put in those of your own workshop.

name: @NAME@
description: a first separator  # what it is for, in your own words
# extends: shop.yaml            # take keys that are not given here from another profile

air:
  flow: 140 m3/h                # what your suction source really moves through the hose
  # source: shop-vacuum         # what moves it; or {shut_off: 18 kPa, open_flow: 150 m3/h}
  temperature: 20 degC
  altitude: 0 m                 # of the workshop, above the sea; or pressure: 1013 mbar
  relative_humidity: 50 %
  hose:                         # from the tool to the separator
    nominal: 38 mm              # the size it is sold as
    fit: over                   # over: the hose goes over the cuff; inside: into it
    # measured: 38.6 mm         # its bore (over) or its outside (inside), with a calliper
    length: 3 m
    wall: corrugated            # smooth or corrugated, seen from the inside
    bends: 2                    # right-angle bends it lies in
  # pick_up: {kind: nozzle, diameter: 32 mm}  # nozzle, hood or open-hose
  # filter: {area: 0.5 m2, class: M}          # behind the separator
  # bin_leak: 0 %               # air that leaks into the bin

dust:
  kind: hardwood-sanding        # from the catalogue; own values may stand beside it:
  # particle_density: 1400 kg/m3  # one grain
  # bulk_density: 200 kg/m3       # the loose heap
  # median: 30 um                 # half of the mass is finer
  # spread: 2.5                   # geometric standard deviation; or a distribution for both
  # largest_chip: 2 mm            # longest piece to expect
  # shape_factor: 1.3             # drag over that of a sphere
  feed: 150 g/h                 # what arrives in an hour of work

stages:                         # in the order the air passes them
  - proportions: stairmand-high-efficiency
    inlet_velocity: 18 m/s      # or body_diameter, or cut_size, or fit_pieces: exactly one
    count: 1                    # equal cyclones side by side

outlet:
  kind: cuff                    # cuff for a hose, or blower for one that sits on the lid
  hose: 50 mm                   # the hose to the suction source
  fit: over

bin:
  volume: 20 L
  mouth: 260 mm                 # inside of the opening
  wall: 2 mm                    # thickness; too thin, and the bin collapses
  material: HDPE                # HDPE, steel, plywood or card-drum
  # relief: 5 kPa               # where a relief valve on it opens

printer:
  process: filament             # filament or resin; resin takes pixel, not nozzle and line_width
  build_volume: [220 mm, 220 mm, 250 mm]
  nozzle: 0.4 mm
  line_width: 0.45 mm
  layer_height: 0.2 mm
  overhang_limit: 45 deg        # steepest clean overhang, from the vertical
  bridge_limit: 10 mm           # longest bridge that does not sag
  clearance: 0.2 mm             # radial gap between parts that slide together
  margin: 5 mm                  # kept free at each edge of the bed

material: PETG                  # from the catalogue

walls:
  body: 2.4 mm
  lid: 6 mm

joints:
  lap: 10 mm                    # how far one piece reaches into the next
  fastener: M4

limits:                         # each one a check; take out those you do not need
  pressure_drop: 2 kPa          # most the separator may take
  height: 1.2 m                 # floor of the bin to the top
  cut_size: 5 um                # coarsest that is good enough
  pieces: 20                    # most printed pieces
"""


def starter_text(name: str) -> str:
    """Give the text of a first profile.

    Parameters
    ----------
    name : str
        Name of the design.

    Raises
    ------
    ProfileError
        `name` cannot be used as a name.
    """
    try:
        return _TEXT.replace("@NAME@", NAME.read(name))
    except PydanticCustomError as wrong:
        words = wrong.context or {}
        problem = Problem(
            code=Code.BAD_NAME,
            place=Place(source=Source(name="the new profile", lines=(f"name: {name}",)), column=7),
            path="name",
            what=words["what"],
            given=name,
            allowed=words["allowed"],
            fix=words["fix"],
        )
        raise ProfileError([problem]) from wrong

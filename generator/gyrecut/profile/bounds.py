"""The hard limits on every value of a profile.

They catch slips (a wrong unit, a lost decimal point), and say nothing about whether a design
is a good one. Common practice, no source, where a value of that size is still seen in a small
workshop; a little beyond on both sides.
"""

from __future__ import annotations

from gyrecut.profile.quantities import Quantity
from gyrecut.profile.scalars import PlainNumber


def _length(low: str, high: str, example: str) -> Quantity:
    return Quantity(dimension="length", low=low, high=high, example=example)


FLOW = Quantity(dimension="flow", low="10 m3/h", high="4000 m3/h", example="140 m3/h")
TEMPERATURE = Quantity(dimension="temperature", low="-20 degC", high="60 degC", example="20 degC")
HUMIDITY = Quantity(dimension="share", low="0 %", high="100 %", example="50 %")
VELOCITY = Quantity(dimension="speed", low="5 m/s", high="40 m/s", example="18 m/s")
GRAIN_DENSITY = Quantity(
    dimension="density", low="20 kg/m3", high="8000 kg/m3", example="1400 kg/m3"
)
HEAP_DENSITY = Quantity(dimension="density", low="3 kg/m3", high="5000 kg/m3", example="200 kg/m3")
FEED = Quantity(dimension="mass flow", low="0.1 g/h", high="200 kg/h", example="150 g/h")
VOLUME = Quantity(dimension="volume", low="1 L", high="1000 L", example="20 L")
OVERHANG = Quantity(dimension="angle", low="10 deg", high="80 deg", example="45 deg")
LOSS = Quantity(dimension="pressure", low="50 Pa", high="30 kPa", example="2 kPa")
AIR_PRESSURE = Quantity(dimension="pressure", low="54 kPa", high="108 kPa", example="1013 mbar")
SHUT_OFF = Quantity(dimension="pressure", low="50 Pa", high="60 kPa", example="18 kPa")
OPEN_FLOW = Quantity(dimension="flow", low="5 m3/h", high="20000 m3/h", example="150 m3/h")
CURVE_SUCTION = Quantity(dimension="pressure", low="0 Pa", high="60 kPa", example="9 kPa")
CURVE_FLOW = Quantity(dimension="flow", low="0 m3/h", high="20000 m3/h", example="90 m3/h")
FILTER_LOSS = Quantity(dimension="pressure", low="1 Pa", high="20 kPa", example="150 Pa")
FILTER_AREA = Quantity(dimension="area", low="10 cm2", high="100 m2", example="0.5 m2")
RELIEF_AREA = Quantity(dimension="area", low="0 cm2", high="500 cm2", example="1 cm2")
BIN_LEAK = Quantity(dimension="share", low="0 %", high="30 %", example="1 %")
UNDERSIZE = Quantity(dimension="share", low="0 %", high="100 %", example="50 %")

ALTITUDE = _length("-450 m", "5000 m", "0 m")
HOSE_BORE = _length("15 mm", "250 mm", "38.6 mm")
MOUTHPIECE = _length("5 mm", "500 mm", "32 mm")
HOSE_LENGTH = _length("0.1 m", "50 m", "3 m")
BODY = _length("40 mm", "900 mm", "160 mm")
CUT = _length("0.5 um", "100 um", "3 um")
GRAIN = _length("0.5 um", "20 mm", "30 um")
CHIP = _length("1 um", "200 mm", "2 mm")
INTAKE = _length("10 mm", "250 mm", "30 mm")
MOUTH = _length("50 mm", "1000 mm", "260 mm")
RELIEF = Quantity(dimension="pressure", low="0.2 kPa", high="50 kPa", example="6 kPa")
BIN_WALL = _length("0.2 mm", "30 mm", "2 mm")
BUILD = _length("60 mm", "1500 mm", "220 mm")
NOZZLE = _length("0.1 mm", "2 mm", "0.4 mm")
LINE_WIDTH = _length("0.1 mm", "3 mm", "0.45 mm")
LAYER = _length("0.01 mm", "1.2 mm", "0.2 mm")
PIXEL = _length("0.01 mm", "0.3 mm", "0.05 mm")
BRIDGE = _length("0 mm", "100 mm", "10 mm")
CLEARANCE = _length("0 mm", "2 mm", "0.2 mm")
MARGIN = _length("0 mm", "50 mm", "5 mm")
WALL = _length("0.8 mm", "20 mm", "2.4 mm")
LID = _length("1 mm", "40 mm", "6 mm")
CORD = _length("1.5 mm", "8 mm", "3 mm")
LAP = _length("3 mm", "60 mm", "10 mm")
HEIGHT = _length("0.1 m", "5 m", "1.2 m")

RATIO = PlainNumber(low=0.02, high=10, example="0.5")
SPREAD = PlainNumber(low=1.05, high=10, example="2.5")
SHAPE_FACTOR = PlainNumber(low=1, high=5, example="1.3")
ROSIN_RAMMLER = PlainNumber(low=0.3, high=20, example="1.2")
CURVE_EXPONENT = PlainNumber(low=1, high=3, example="1.3")

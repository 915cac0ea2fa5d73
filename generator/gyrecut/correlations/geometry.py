"""The inside dimensions of one cyclone, in metres, as every correlation takes them."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from gyrecut.airflow.ranges import Range
from gyrecut.correlations.validity import FLOW, INLET_VELOCITY

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers

_SOURCE = "room around the published families; common practice, no source"

BODY_DIAMETER = Range(quantity="body diameter", low=5e-3, high=10.0, unit="m", source=_SOURCE)
RATIOS = {
    name: Range(
        quantity=f"{name.replace('_', ' ')} over body diameter",
        low=low,
        high=high,
        unit="-",
        source=_SOURCE,
    )
    for name, low, high in (
        ("slot_height", 0.05, 2.0),
        ("slot_width", 0.02, 0.6),
        ("finder_diameter", 0.05, 0.95),
        ("finder_length", 0.0, 5.0),
        ("barrel_height", 0.1, 10.0),
        ("total_height", 0.2, 20.0),
        ("dust_outlet_diameter", 0.02, 1.0),
    )
}
CONE_SHARE = Range(
    quantity="barrel height over total height", low=0.0, high=1.0, unit="-", source="by definition"
)
FINDER_SHARE = Range(
    quantity="finder length over total height", low=0.0, high=1.0, unit="-", source="by definition"
)


@dataclass(frozen=True, slots=True, kw_only=True)
class CycloneGeometry:
    """Inside dimensions of one cyclone; a field may hold an array, and arrays broadcast.

    Parameters
    ----------
    body_diameter : float or ndarray
        Bore of the barrel [m]
    slot_height : float or ndarray
        Inlet slot, along the axis [m]
    slot_width : float or ndarray
        Inlet slot, along the radius [m]
    finder_diameter : float or ndarray
        Bore of the vortex finder [m]
    finder_length : float or ndarray
        From the roof down to the lip of the vortex finder [m]
    barrel_height : float or ndarray
        From the roof to the top of the cone [m]
    total_height : float or ndarray
        From the roof to the dust outlet [m]
    dust_outlet_diameter : float or ndarray
        Bore at the foot of the cone [m]
    """

    body_diameter: Numbers
    slot_height: Numbers
    slot_width: Numbers
    finder_diameter: Numbers
    finder_length: Numbers
    barrel_height: Numbers
    total_height: Numbers
    dust_outlet_diameter: Numbers


def check_geometry(geometry: CycloneGeometry) -> None:
    """Refuse dimensions that no cyclone of the published kind can have.

    Parameters
    ----------
    geometry : CycloneGeometry
        Inside dimensions [m]

    Raises
    ------
    OutOfRangeError
        Names the first dimension refused, as a ratio.

    References
    ----------
    .. [1] Common practice, no source: room around the published proportion families.
    """
    BODY_DIAMETER.check(geometry.body_diameter)
    for name, allowed in RATIOS.items():
        allowed.check(getattr(geometry, name) / geometry.body_diameter)
    CONE_SHARE.check(geometry.barrel_height / geometry.total_height)
    FINDER_SHARE.check(geometry.finder_length / geometry.total_height)


def scaled(shape: CycloneGeometry, *, body_diameter: Numbers) -> CycloneGeometry:
    """Give the same proportions at another size.

    Parameters
    ----------
    shape : CycloneGeometry
        Proportions, at any size [m]
    body_diameter : float or ndarray
        Body diameter wanted [m]

    Returns
    -------
    CycloneGeometry
        All lengths in the ratio of the body diameters [m]

    Raises
    ------
    OutOfRangeError
        When no cyclone can have such proportions or such a size.

    References
    ----------
    .. [1] Similarity; holds by definition.
    """
    check_geometry(shape)
    BODY_DIAMETER.check(body_diameter)
    factor = body_diameter / shape.body_diameter
    return CycloneGeometry(
        body_diameter=body_diameter,
        **{name: getattr(shape, name) * factor for name in RATIOS},
    )


def mean_inlet_velocity(geometry: CycloneGeometry, *, flow: Numbers) -> Numbers:
    r"""Mean velocity in the inlet slot.

    .. math:: v_i = Q / (a b)

    Parameters
    ----------
    geometry : CycloneGeometry
        With slot height :math:`a` and slot width :math:`b` [m]
    flow : float or ndarray
        Volume flow through this one cyclone, :math:`Q` [m^3/s]

    Returns
    -------
    float or ndarray
        Inlet velocity :math:`v_i` [m/s]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible, or the velocity outside 1 m/s to 60 m/s.

    References
    ----------
    .. [1] Continuity; holds by definition.
    """
    check_geometry(geometry)
    FLOW.check(flow)
    velocity = flow / (geometry.slot_height * geometry.slot_width)
    INLET_VELOCITY.check(velocity)
    return velocity


def body_diameter_for_inlet_velocity(
    shape: CycloneGeometry, *, inlet_velocity: Numbers, flow: Numbers
) -> Numbers:
    r"""Body diameter at which a shape takes a flow at a wanted inlet velocity.

    .. math:: D = \sqrt{Q / (v_i \cdot a/D \cdot b/D)}

    Parameters
    ----------
    shape : CycloneGeometry
        Proportions, at any size [m]
    inlet_velocity : float or ndarray
        Mean velocity wanted in the slot, :math:`v_i` [m/s]
    flow : float or ndarray
        Volume flow through one cyclone, :math:`Q` [m^3/s]

    Returns
    -------
    float or ndarray
        Body diameter :math:`D` [m]

    Raises
    ------
    OutOfRangeError
        When the shape is impossible, or the velocity outside 1 m/s to 60 m/s.

    References
    ----------
    .. [1] Continuity; holds by definition.
    """
    check_geometry(shape)
    FLOW.check(flow)
    INLET_VELOCITY.check(inlet_velocity)
    slot_share = shape.slot_height * shape.slot_width / shape.body_diameter**2
    diameter: Numbers = (flow / (inlet_velocity * slot_share)) ** 0.5
    return diameter

"""How far the vortex reaches below the vortex finder."""

from __future__ import annotations

from typing import TYPE_CHECKING

from gyrecut.correlations.geometry import check_geometry

if TYPE_CHECKING:
    from gyrecut.airflow.ranges import Numbers
    from gyrecut.correlations.geometry import CycloneGeometry


def natural_length_alexander(geometry: CycloneGeometry) -> Numbers:
    r"""Natural length of the vortex, from the lip of the vortex finder down.

    .. math:: l = 2.3 D_e (D^2 / (a b))^{1/3}

    Parameters
    ----------
    geometry : CycloneGeometry
        With body diameter :math:`D`, finder diameter :math:`D_e`, slot :math:`a \times b` [m]

    Returns
    -------
    float or ndarray
        Natural length :math:`l` [m]

    Raises
    ------
    OutOfRangeError
        When the geometry is impossible.

    Notes
    -----
    Less than the height below the lip in all the classical shapes: the foot of their cones is
    nominally unused.

    References
    ----------
    .. [1] Alexander, Fundamentals of cyclone design and operation. Proc. Australasian Institute
       of Mining and Metallurgy 152 (1949) 203, from memory.
    """
    check_geometry(geometry)
    slot_area = geometry.slot_height * geometry.slot_width
    length: Numbers = (
        2.3 * geometry.finder_diameter * (geometry.body_diameter**2 / slot_area) ** (1 / 3)
    )
    return length

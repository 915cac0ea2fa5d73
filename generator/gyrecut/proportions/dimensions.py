"""Every length of one separator, in millimetres, in one frozen tree.

Machine coordinates: the axis of the body is the z axis, pointing up; z = 0 is the roof (the
underside of the lid); the gas enters through the slot in the +x direction, tangent to the
barrel at (0, +radius), and so turns clockwise seen from above.
"""

from __future__ import annotations

from dataclasses import dataclass
from math import atan2, cos, hypot, pi, tan

Point = tuple[float, float]


@dataclass(frozen=True, slots=True, kw_only=True)
class Body:
    """Barrel and cone: inside sizes, and one wall thickness measured square to the wall."""

    diameter_mm: float
    barrel_height_mm: float
    total_height_mm: float
    dust_outlet_diameter_mm: float
    wall_mm: float

    @property
    def radius_mm(self) -> float:
        """Inside radius of the barrel."""
        return self.diameter_mm / 2

    @property
    def outer_radius_mm(self) -> float:
        """Outside radius of the barrel."""
        return self.radius_mm + self.wall_mm

    @property
    def cone_height_mm(self) -> float:
        """Height of the cone alone."""
        return self.total_height_mm - self.barrel_height_mm

    @property
    def half_angle(self) -> float:
        """Half apex angle of the cone [rad]."""
        return atan2(self.radius_mm - self.dust_outlet_diameter_mm / 2, self.cone_height_mm)

    @property
    def mitre_z_mm(self) -> float:
        """Height at which the outside of the barrel meets the outside of the cone."""
        return -self.barrel_height_mm - self.wall_mm * tan(self.half_angle / 2)

    def inside_radius_at(self, z_mm: float) -> float:
        """Radius of the air side at the height `z_mm`, continued beyond both ends."""
        below = max(0.0, -self.barrel_height_mm - z_mm)
        return self.radius_mm - below * tan(self.half_angle)

    def outside_radius_at(self, z_mm: float) -> float:
        """Radius of the outside at the height `z_mm`, continued beyond both ends."""
        below = -self.barrel_height_mm - z_mm
        slanted = (
            self.radius_mm + self.wall_mm / cos(self.half_angle) - below * tan(self.half_angle)
        )
        return min(self.outer_radius_mm, slanted)

    def foot_of(self, radius_mm: float, z_mm: float, slope: float) -> float:
        """Height at which a line that runs down and inwards meets the outside.

        Parameters
        ----------
        radius_mm, z_mm : float
            Where the line starts, outside the wall [mm].
        slope : float
            Its lean from the vertical [rad].

        Returns
        -------
        float
            Height [mm].
        """
        on_barrel = z_mm - (radius_mm - self.outer_radius_mm) / tan(slope)
        if on_barrel >= self.mitre_z_mm:
            return on_barrel
        lean = tan(self.half_angle)
        slanted = self.radius_mm + self.wall_mm / cos(self.half_angle)
        return (slanted + lean * self.barrel_height_mm - radius_mm + z_mm * tan(slope)) / (
            tan(slope) - lean
        )


@dataclass(frozen=True, slots=True, kw_only=True)
class Slot:
    """The inlet opening in the barrel: the roof is its top."""

    height_mm: float
    width_mm: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Finder:
    """The vortex finder: a tube through the lid, with a collar that sits on the lid.

    Above the collar a stub of the tube takes the outlet.
    """

    bore_mm: float
    length_mm: float
    wall_mm: float
    collar_radius_mm: float
    collar_thickness_mm: float
    stub_mm: float

    @property
    def outer_radius_mm(self) -> float:
        """Outside radius of the tube."""
        return self.bore_mm / 2 + self.wall_mm


@dataclass(frozen=True, slots=True, kw_only=True)
class Screws:
    """Screws of one interface: what they need, and where they stand in its plane."""

    thread: str
    clearance_hole_mm: float
    head_diameter_mm: float
    insert_hole_mm: float
    insert_depth_mm: float
    boss_mm: float
    places_mm: tuple[Point, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Groove:
    """A groove for a sealing cord in one of two flat faces.

    `wall_mm` is left between the air's edge and the groove, where suction draws the cord;
    `land_mm` between the groove and what stands outside of it.
    """

    cord_mm: float
    width_mm: float
    depth_mm: float
    wall_mm: float
    land_mm: float

    @property
    def turn_mm(self) -> float:
        """Radius the cord takes where its way turns outwards: three cords, common practice."""
        return 3 * self.cord_mm

    @property
    def outer_mm(self) -> float:
        """From the air's edge to the groove's outer edge."""
        return self.wall_mm + self.width_mm

    @property
    def clear_mm(self) -> float:
        """From the air's edge to where the next hole or edge may begin."""
        return self.outer_mm + self.land_mm

    @property
    def middle_mm(self) -> float:
        """From the air's edge to the middle of the cord."""
        return self.wall_mm + self.width_mm / 2


@dataclass(frozen=True, slots=True, kw_only=True)
class Seals:
    """How the joints that open are sealed: a cord in a groove, or None for a flat gasket."""

    lid: Groove | None
    transition: Groove | None
    bin_ring: Groove | None


@dataclass(frozen=True, slots=True, kw_only=True)
class Rim:
    """The flange round the top of the barrel that the lid is screwed to."""

    outer_radius_mm: float
    thickness_mm: float
    screws: Screws


@dataclass(frozen=True, slots=True, kw_only=True)
class Portal:
    """Where the air enters the barrel piece: a framed mouth before the slot.

    The mouth is a rectangle with a gable, so that its lintel prints without support; it is
    wider than the slot by just as much as the gable and the lintel take away, so that its
    area equals the area of the slot. Screw places are (y, z).
    """

    face_x_mm: float
    depth_mm: float
    mouth_width_mm: float
    mouth_top_mm: float
    peak_width_mm: float
    shoulder_mm: float
    floor_mm: float
    edge_mm: float
    frame_low_y_mm: float
    frame_high_y_mm: float
    frame_bottom_z_mm: float
    screws: Screws

    def mouth_outline(self, radius_mm: float) -> tuple[Point, ...]:
        """Corners (y, z) of the mouth, counter-clockwise seen from -x towards +x."""
        high = radius_mm
        low = radius_mm - self.mouth_width_mm
        middle = (high + low) / 2
        half_peak = self.peak_width_mm / 2
        return (
            (low, self.floor_mm),
            (high, self.floor_mm),
            (high, self.shoulder_mm),
            (middle + half_peak, self.mouth_top_mm),
            (middle - half_peak, self.mouth_top_mm),
            (low, self.shoulder_mm),
        )

    @property
    def farthest_radius_mm(self) -> float:
        """Distance of the frame's farthest corner from the axis."""
        return max(
            hypot(self.face_x_mm, self.frame_high_y_mm),
            hypot(self.face_x_mm, self.frame_low_y_mm),
        )


@dataclass(frozen=True, slots=True, kw_only=True)
class Cuff:
    """A tapered end for a hose.

    `fit` is "over" where the hose goes over the cuff, "inside" where it goes into it. The ramp
    is the sloped shoulder below the root for the one, the floor of the socket for the other.
    """

    fit: str
    nominal_mm: float
    tip_diameter_mm: float
    root_diameter_mm: float
    bore_mm: float
    length_mm: float
    wall_mm: float
    shoulder_mm: float
    ramp_mm: float

    @property
    def height_mm(self) -> float:
        """Height of the cuff with its ramp."""
        return self.length_mm + self.ramp_mm

    @property
    def widest_radius_mm(self) -> float:
        """Largest outside radius of the cuff, shoulder included."""
        if self.fit == "over":
            return max(self.tip_diameter_mm, self.root_diameter_mm) / 2 + self.shoulder_mm
        return max(self.tip_diameter_mm, self.root_diameter_mm) / 2 + self.wall_mm


@dataclass(frozen=True, slots=True, kw_only=True)
class Transition:
    """The piece between hose and portal: flange, loft from the mouth to round, cuff."""

    flange_thickness_mm: float
    length_mm: float
    wall_mm: float
    included_angle: float
    cuff: Cuff


@dataclass(frozen=True, slots=True, kw_only=True)
class Lid:
    """The flat roof of barrel and slot."""

    thickness_mm: float
    finder_hole_mm: float


@dataclass(frozen=True, slots=True, kw_only=True)
class BinRing:
    """The ring on the bin's lid that takes the end of the cone."""

    bore_mm: float
    outer_radius_mm: float
    thickness_mm: float
    screws: Screws


@dataclass(frozen=True, slots=True, kw_only=True)
class OutletCuff:
    """Outlet on the finder's stub: a socket, a reducer and a hose cuff."""

    socket_mm: float
    socket_radius_mm: float
    reducer_length_mm: float
    cuff: Cuff


@dataclass(frozen=True, slots=True, kw_only=True)
class BellMouth:
    """Rounded intake of a blower that stands on the finder."""

    throat_mm: float
    rounding_mm: float
    entry_loss: float
    plug_radius_mm: float
    plug_length_mm: float
    stop_radius_mm: float
    stop_thickness_mm: float
    spigot_length_mm: float
    wall_mm: float

    @property
    def spigot_radius_mm(self) -> float:
        """Outside radius of the spigot the blower stands on."""
        return self.throat_mm / 2 + self.wall_mm

    def gusset_mm(self, slope: float) -> float:
        """Height over which the stop narrows to the spigot."""
        return max(self.stop_radius_mm - self.spigot_radius_mm, 0.0) / tan(slope)

    def height_mm(self, slope: float) -> float:
        """Height above the finder's upper end."""
        return self.stop_thickness_mm + self.gusset_mm(slope) + self.spigot_length_mm


@dataclass(frozen=True, slots=True, kw_only=True)
class Joint:
    """Spigot and socket between rings, and laps between sectors."""

    lap_mm: float
    clearance_mm: float
    collar_mm: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Ring:
    """One slice of the body between two heights, whole or cut into equal sectors.

    `first_cut` is the angle [rad] of the first sector cut, from +x towards +y.
    """

    top_mm: float
    bottom_mm: float
    sectors: int
    first_cut: float

    @property
    def cuts(self) -> tuple[float, ...]:
        """Angles of its sector cuts [rad], none where it is whole."""
        return cut_angles(self.sectors, self.first_cut)

    @property
    def height_mm(self) -> float:
        """Height of the slice without its socket collar."""
        return self.top_mm - self.bottom_mm


@dataclass(frozen=True, slots=True, kw_only=True)
class Division:
    """How body and lid are cut for the printer."""

    rings: tuple[Ring, ...]
    lid_sectors: int
    lid_first_cut: float

    @property
    def cut_heights_mm(self) -> tuple[float, ...]:
        """Heights of the ring cuts, from the top down."""
        return tuple(ring.bottom_mm for ring in self.rings[:-1])

    @property
    def seams_under_the_lid(self) -> tuple[float, ...]:
        """Angles of the sector cuts of lid and first ring [rad], where no screw can stand."""
        return (*self.rings[0].cuts, *cut_angles(self.lid_sectors, self.lid_first_cut))

    @property
    def piece_count(self) -> int:
        """Printed pieces of body and lid; each other part is one piece."""
        return sum(ring.sectors for ring in self.rings) + self.lid_sectors


@dataclass(frozen=True, slots=True, kw_only=True)
class Dimensions:
    """Every length of one separator of one stage.

    `slope` [rad from the vertical] is the steepest lean the design itself uses: the printer's
    overhang limit less a degree, so that the facets of a mesh stay inside the limit.
    """

    body: Body
    slot: Slot
    finder: Finder
    rim: Rim
    portal: Portal
    transition: Transition
    lid: Lid
    bin_ring: BinRing
    outlet: OutletCuff | BellMouth
    joint: Joint
    seals: Seals
    division: Division
    slope: float

    @property
    def keel_bottom_mm(self) -> float:
        """Lowest point of the keel that carries slot floor and portal, were it not cut."""
        return keel_bottom(self.body, self.portal, self.slope)

    @property
    def keel_is_cut(self) -> bool:
        """Whether the first ring cut passes through the keel."""
        cuts = self.division.cut_heights_mm
        return bool(cuts) and self.keel_bottom_mm < cuts[0]

    @property
    def finder_top_mm(self) -> float:
        """Height of the finder's plain upper end."""
        tube = self.finder
        gusset = (tube.collar_radius_mm - tube.outer_radius_mm) / tan(self.slope)
        return self.lid.thickness_mm + tube.collar_thickness_mm + gusset + tube.stub_mm

    @property
    def outlet_top_mm(self) -> float:
        """Height of the outlet's upper end."""
        if isinstance(self.outlet, OutletCuff):
            return self.finder_top_mm + self.outlet.reducer_length_mm + self.outlet.cuff.height_mm
        return self.finder_top_mm + self.outlet.height_mm(self.slope)

    @property
    def overall_height_mm(self) -> float:
        """From the underside of the bin ring to the outlet's upper end."""
        return self.outlet_top_mm + self.body.total_height_mm + self.bin_ring.thickness_mm


def cut_angles(sectors: int, first_cut: float) -> tuple[float, ...]:
    """Angles of equally spaced cuts [rad]; one sector is no cut."""
    if sectors == 1:
        return ()
    return tuple(first_cut + 2 * pi * index / sectors for index in range(sectors))


def keel_bottom(body: Body, portal: Portal, slope: float) -> float:
    """Height at which a keel at `slope` [rad] from the portal's frame meets the body [mm]."""
    return body.foot_of(portal.farthest_radius_mm, portal.frame_bottom_z_mm, slope)

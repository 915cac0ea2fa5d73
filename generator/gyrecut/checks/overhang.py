"""What hangs over with nothing under it, and what the printer may bridge.

A facet hangs when it leans out further than the limit. Facets that hang together make a ceiling.
Each edge of a ceiling is held, when the surface beyond it goes down (a wall to rest on), or free,
when it goes up. Seen from above, a strand across the ceiling from one held edge to another is a
bridge. A place on the ceiling is carried when its shortest such strand is within the bridge limit,
or when it lies on a ledge too narrow to sag.
"""

from __future__ import annotations

from dataclasses import dataclass, field
from enum import IntEnum
from math import cos, degrees, pi, radians
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.checks.lows import lows_of
from gyrecut.checks.surface import BED_MM, patches_of
from gyrecut.findings import Finding, Severity

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.checks.limits import PrintLimits
    from gyrecut.checks.surface import Surface

SLACK = radians(0.5)  # a lean at the limit passes, whatever its last digit
ROUNDING_MM = 0.01  # a span at the limit passes, whatever its last digit
FACET_SCATTER = radians(3.0)  # what the facets of one cone scatter round its lean, coarsely meshed
SAME_LEAN = radians(5.0)  # neighbours that differ less than this may be facets of one surface
SAME_SURFACE = cos(radians(30.0))  # and their normals less than this, a step of a coarse circle
LEDGE_MM = 0.5  # the low end of the 0.5 to 1.5 mm that one printer was read to pass
LEAST_PATCH_MM2 = 0.1  # less than one bead squared: rounding, not a ceiling
PLACES = 48  # looked at on each ceiling
BEARINGS = 12  # strands through each place, beside the one to the nearest edge
HELD_SLOPE = 0.1  # sine of the way down that counts as a wall


class FacetClass(IntEnum):
    """How a triangle prints."""

    FINE = 0
    BED = 1
    BRIDGE = 2
    HANGING = 3


@dataclass(frozen=True, slots=True, kw_only=True)
class Bridge:
    """A ceiling that the printer may bridge.

    Parameters
    ----------
    span_mm : float
        Its longest shortest strand [mm].
    area_mm2 : float
        Its area [mm2].
    place_mm : tuple of 3 float
        Its middle [mm].
    """

    span_mm: float
    area_mm2: float
    place_mm: tuple[float, float, float]


@dataclass(frozen=True, slots=True, kw_only=True)
class Overhang:
    """All that hangs over.

    Parameters
    ----------
    area_mm2 : float
        Area that needs support [mm2].
    worst_angle : float
        Steepest lean among it, from the vertical; 0 when there is none [rad].
    place_mm : tuple of 3 float
        Middle of the largest ceiling that needs support [mm].
    bridges : tuple of Bridge
        Ceilings that are bridged.
    ledge_mm2 : float
        Area on ledges that are narrow enough to be let pass [mm2].
    starts_mm : tuple of (float, float, float)
        Lowest places of parts that begin in the air [mm].
    classes : (m,) int8
        `FacetClass` of each triangle of the mesh. In a ceiling that is carried in part, each has
        the class of the nearest sampled place.
    """

    area_mm2: float
    worst_angle: float
    place_mm: tuple[float, float, float]
    bridges: tuple[Bridge, ...]
    ledge_mm2: float
    starts_mm: tuple[tuple[float, float, float], ...]
    classes: NDArray[np.int8] = field(repr=False, compare=False)


@dataclass(frozen=True, slots=True, kw_only=True)
class _Ceiling:
    """One patch of facets that hang: outline `(e, 2, 2)`, `is_held (e,)`, `places (p, 2)`."""

    triangles: NDArray[np.int64]
    outline: NDArray[np.float64]
    is_held: NDArray[np.bool_]
    places: NDArray[np.float64]


@dataclass(frozen=True, slots=True, kw_only=True)
class _Strands:
    """What runs through places of a ceiling, seen from above.

    Parameters
    ----------
    span_mm : (p,) float
        Shortest strand from held edge to held edge; inf when there is none [mm].
    width_mm : (p,) float
        Strand square to the nearest edge; inf when neither end of it is held [mm].
    toward : (p, 2) float
        Unit direction to the nearest edge [-].
    is_within : (p,) bool
        Whether the place lies on the ceiling.
    """

    span_mm: NDArray[np.float64]
    width_mm: NDArray[np.float64]
    toward: NDArray[np.float64]
    is_within: NDArray[np.bool_]


def measure_overhang(surface: Surface, overhang_limit: float, bridge_limit_mm: float) -> Overhang:
    """Find what needs support in print pose.

    Parameters
    ----------
    surface : Surface
        One closed body, +z up, standing on z = 0.
    overhang_limit : float
        From the vertical [rad].
    bridge_limit_mm : float
        Longest strand between held edges [mm].

    Returns
    -------
    Overhang
        Areas are shares of each ceiling by sampled places.
    """
    in_the_air = surface.corners[:, :, 2].max(axis=1) >= BED_MM
    leans = _leans(surface, overhang_limit)
    hangs = (leans > overhang_limit + SLACK) & in_the_air
    longest_span = bridge_limit_mm + ROUNDING_MM
    area, ledges, worst, largest = 0.0, 0.0, 0.0, 0.0
    place = (0.0, 0.0, 0.0)
    bridges: list[Bridge] = []
    classes = np.where(in_the_air, FacetClass.FINE, FacetClass.BED).astype(np.int8)
    for triangles in _ceilings(surface, hangs):
        ceiling = _ceiling_of(surface, triangles)
        sizes = surface.areas[triangles]
        size = float(sizes.sum())
        strands = _strands(ceiling, ceiling.places)
        is_bridged = strands.span_mm <= longest_span
        is_ledge = ~is_bridged & (strands.width_mm <= LEDGE_MM)
        rest = np.flatnonzero(~is_bridged & ~is_ledge)
        if 0 < len(rest) < PLACES:
            is_ledge[rest] = _overshoots(ceiling, rest, strands, longest_span)
        ledges += size * float(is_ledge.mean())
        is_lacking = ~is_bridged & ~is_ledge
        classes[triangles] = _classes(surface, ceiling, is_bridged, is_lacking)
        lacking = size * float(is_lacking.mean())
        x, y, z = (sizes @ surface.corners[triangles].mean(axis=1) / size).tolist()
        if lacking > 0:
            area += lacking
            worst = max(worst, float(leans[triangles].max()))
            if lacking > largest:
                largest, place = lacking, (x, y, z)
        elif is_bridged.any():
            bridges.append(
                Bridge(
                    span_mm=float(strands.span_mm[is_bridged].max()),
                    area_mm2=size,
                    place_mm=(x, y, z),
                )
            )
    of_mesh = np.full(len(surface.is_kept), FacetClass.FINE, dtype=np.int8)
    of_mesh[surface.is_kept] = classes
    return Overhang(
        area_mm2=area,
        worst_angle=worst,
        place_mm=place,
        bridges=tuple(bridges),
        ledge_mm2=ledges,
        starts_mm=tuple((x, y, z) for x, y, z in lows_of(surface).starts.tolist()),
        classes=of_mesh,
    )


def _classes(
    surface: Surface,
    ceiling: _Ceiling,
    is_bridged: NDArray[np.bool_],
    is_lacking: NDArray[np.bool_],
) -> NDArray[np.int8]:
    """Class the triangles of one ceiling by its places; a narrow ledge is fine."""
    of_place = np.where(is_bridged, FacetClass.BRIDGE, FacetClass.FINE)
    of_place = np.where(is_lacking, FacetClass.HANGING, of_place).astype(np.int8)
    if (of_place == of_place[0]).all():
        return np.full(len(ceiling.triangles), of_place[0])
    middles = surface.corners[ceiling.triangles, :, :2].mean(axis=1)
    ways = middles[:, None] - ceiling.places
    nearest = np.einsum("tpj,tpj->tp", ways, ways).argmin(axis=1)
    classes: NDArray[np.int8] = of_place[nearest]
    return classes


def _leans(surface: Surface, overhang_limit: float) -> NDArray[np.float64]:
    """Give how far each triangle leans out from the vertical, `(n,) float` [rad].

    Notes
    -----
    The facets of one cone lean a little more and a little less in turn, by two degrees on a
    coarse mesh. Near the limit a facet is therefore given the mean of those round it that may
    belong to the same surface, by area, three facets far.
    """
    leans = np.arcsin(np.clip(-surface.normals[:, 2], -1.0, 1.0))
    is_near = np.abs(leans - overhang_limit) < FACET_SCATTER
    if not is_near.any():
        return leans
    beyond = surface.neighbours
    alike = np.abs(leans[beyond] - leans[:, None]) < SAME_LEAN
    alike &= np.einsum("ij,ikj->ik", surface.normals, surface.normals[beyond]) > SAME_SURFACE
    weights = surface.areas[beyond] * alike
    total = surface.areas + weights.sum(axis=1)
    mean = leans
    for _ in range(3):
        mean = (surface.areas * mean + (weights * mean[beyond]).sum(axis=1)) / total
    return np.where(is_near, mean, leans)


def _ceilings(surface: Surface, hangs: NDArray[np.bool_]) -> list[NDArray[np.int64]]:
    """Split the facets that hang into ceilings, each an array of triangles."""
    if not hangs.any():
        return []
    count, labels = patches_of(surface.neighbours, hangs)
    order = np.argsort(labels, kind="stable")
    begins = np.searchsorted(labels[order], np.arange(count))
    sizes = np.bincount(labels[hangs], weights=surface.areas[hangs], minlength=count)
    pieces = np.split(order, begins)[1:]
    return [piece for piece, size in zip(pieces, sizes, strict=True) if size >= LEAST_PATCH_MM2]


def _ceiling_of(surface: Surface, triangles: NDArray[np.int64]) -> _Ceiling:
    """Outline one ceiling, tell held edges from free ones and choose places on it."""
    beyond = surface.neighbours[triangles]
    row, side = np.nonzero(~np.isin(beyond, triangles))
    faces = surface.faces[triangles[row]]
    rows = np.arange(len(row))
    start, end = faces[rows, side], faces[rows, (side + 1) % 3]
    far = surface.faces[beyond[row, side]]
    apex = far[(far != start[:, None]) & (far != end[:, None])]
    edge = surface.vertices[end] - surface.vertices[start]
    to_apex = surface.vertices[apex] - surface.vertices[start]
    along = np.einsum("ij,ij->i", to_apex, edge) / np.einsum("ij,ij->i", edge, edge)
    across = to_apex - along[:, None] * edge
    is_held = across[:, 2] < -HELD_SLOPE * np.linalg.norm(across, axis=1)
    outline = np.stack([surface.vertices[start], surface.vertices[end]], axis=1)[:, :, :2]
    return _Ceiling(
        triangles=triangles, outline=outline, is_held=is_held, places=_places(surface, triangles)
    )


def _places(surface: Surface, triangles: NDArray[np.int64]) -> NDArray[np.float64]:
    """Spread places over a ceiling by area, seen from above, `(p, 2) float`."""
    ends = np.cumsum(surface.areas[triangles])
    marks = (np.arange(PLACES) + 0.5) / PLACES * ends[-1]
    chosen = triangles[np.minimum(np.searchsorted(ends, marks), len(triangles) - 1)]
    rank = np.arange(PLACES)
    u = (1 / 3 + rank * 0.7548776662466927) % 1
    v = (1 / 3 + rank * 0.5698402909980532) % 1
    beyond = u + v > 1
    u[beyond], v[beyond] = 1 - u[beyond], 1 - v[beyond]
    first, second, third = surface.corners[chosen][:, :, :2].transpose(1, 0, 2)
    places: NDArray[np.float64] = (
        first + u[:, None] * (second - first) + v[:, None] * (third - first)
    )
    return places


def _overshoots(
    ceiling: _Ceiling, which: NDArray[np.int64], strands: _Strands, longest_span: float
) -> NDArray[np.bool_]:
    """Tell which places are only a ledge's width away from one that is carried, `(n,) bool`.

    A slot that ends on a curved wall has such places in the bow of its end, and a narrow ledge
    has them at its corners.
    """
    inward = ceiling.places[which] - LEDGE_MM * strands.toward[which]
    there = _strands(ceiling, inward)
    is_carried = (there.span_mm <= longest_span) | (there.width_mm <= LEDGE_MM)
    result: NDArray[np.bool_] = there.is_within & is_carried
    return result


def _strands(ceiling: _Ceiling, places: NDArray[np.float64]) -> _Strands:
    """Measure the strands through each place."""
    start, end = ceiling.outline[:, 0], ceiling.outline[:, 1]
    edge = end - start
    offset = start[None] - places[:, None]
    length2 = np.maximum(np.einsum("ij,ij->i", edge, edge), 1e-300)
    share = np.clip(-np.einsum("pej,ej->pe", offset, edge) / length2, 0, 1)
    nearest = offset + share[:, :, None] * edge
    gap2 = np.einsum("pej,pej->pe", nearest, nearest)
    toward = nearest[np.arange(len(gap2)), gap2.argmin(axis=1)]
    bearing = np.arctan2(toward[:, 1], toward[:, 0])
    turns = np.arange(BEARINGS) * pi / BEARINGS
    angles = bearing[:, None] + turns
    ray = np.stack([np.cos(angles), np.sin(angles)], axis=2)

    # A line through the place meets an edge where the edge's two ends lie on either side of it.
    # There are few such meetings, so only they are worked out.
    square = np.stack([-ray[:, :, 1], ray[:, :, 0]], axis=2)
    left_start = square @ offset.transpose(0, 2, 1)
    left_end = square @ (offset + edge).transpose(0, 2, 1)
    at, turn, met = np.nonzero((left_start > 0) != (left_end > 0))
    one, two = left_start[at, turn, met], left_end[at, turn, met]
    where = offset[at, met] + (one / (one - two))[:, None] * edge[met]
    way = np.einsum("ij,ij->i", ray[at, turn], where)
    line = at * BEARINGS + turn
    ahead, ahead_held = _nearest(line, way, ceiling.is_held[met], len(places))
    behind, behind_held = _nearest(line, -way, ceiling.is_held[met], len(places))
    strand = ahead + behind
    spans = np.where(ahead_held & behind_held, strand, np.inf).min(axis=1)
    # A slanting strand cuts a corner of any ledge short, so its width is taken square to an edge.
    widths = np.where(ahead_held | behind_held, strand, np.inf)[:, 0]
    crossings = np.bincount(at[(turn == 0) & (way > 0)], minlength=len(places))
    far = np.maximum(np.sqrt(gap2.min(axis=1)), 1e-300)
    return _Strands(
        span_mm=spans,
        width_mm=widths,
        toward=toward / far[:, None],
        is_within=crossings % 2 == 1,
    )


def _nearest(
    line: NDArray[np.int64], way: NDArray[np.float64], is_held: NDArray[np.bool_], places: int
) -> tuple[NDArray[np.float64], NDArray[np.bool_]]:
    """Give the way to the first edge along each line, and whether it is held, `(p, b)` both."""
    distance = np.full(places * BEARINGS, np.inf)
    held = np.zeros(places * BEARINGS, dtype=np.bool_)
    forward = np.flatnonzero(way > 0)
    forward = forward[np.argsort(-way[forward], kind="stable")]
    # Of several writes to one line the last one stays, which is the nearest.
    distance[line[forward]], held[line[forward]] = way[forward], is_held[forward]
    return distance.reshape(places, BEARINGS), held.reshape(places, BEARINGS)


def overhang_findings(overhang: Overhang, piece: str, limits: PrintLimits) -> tuple[Finding, ...]:
    """Say what needs support, what begins in the air, and which bridges were let pass."""
    findings: list[Finding] = []
    if overhang.area_mm2 > 0:
        x, y, z = overhang.place_mm
        findings.append(
            Finding(
                code="overhang",
                severity=Severity.WARN,
                part=piece,
                what=f"{overhang.area_mm2:.1f} mm2 hang over with nothing under them, up to "
                f"{degrees(overhang.worst_angle):.0f} degrees from the vertical; the printer "
                f"manages {degrees(limits.overhang_limit):.0f}",
                measured=overhang.area_mm2,
                limit=0.0,
                unit="mm2",
                where=f"the largest near ({x:.1f}, {y:.1f}, {z:.1f}) mm in print pose",
                fix="print it with support there, or chamfer the underside",
            )
        )
    if overhang.starts_mm:
        x, y, z = overhang.starts_mm[0]
        findings.append(
            Finding(
                code="starts-in-air",
                severity=Severity.WARN,
                part=piece,
                what=f"{len(overhang.starts_mm)} places begin in the air, on no layer below",
                measured=len(overhang.starts_mm),
                limit=0,
                where=f"({x:.1f}, {y:.1f}, {z:.1f}) mm in print pose",
                fix="print it with support there, or join it lower down",
            )
        )
    if overhang.bridges:
        longest = max(overhang.bridges, key=lambda bridge: bridge.span_mm)
        x, y, z = longest.place_mm
        findings.append(
            Finding(
                code="permitted-bridge",
                severity=Severity.NOTE,
                part=piece,
                what=f"{len(overhang.bridges)} ceilings are bridged, the longest over "
                f"{longest.span_mm:.1f} mm",
                measured=longest.span_mm,
                limit=limits.bridge_limit_mm,
                unit="mm",
                where=f"the longest near ({x:.1f}, {y:.1f}, {z:.1f}) mm in print pose",
                fix="nothing to do; keep bridge settings on in the slicer",
            )
        )
    return tuple(findings)

"""Whether the mesh is the closed surface of one body, with its outside out."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from gyrecut.checks.surface import patches_of
from gyrecut.findings import Finding, Severity

if TYPE_CHECKING:
    from numpy.typing import NDArray

    from gyrecut.checks.limits import PrintLimits
    from gyrecut.checks.surface import Surface


@dataclass(frozen=True, slots=True, kw_only=True)
class Closedness:
    """How the surface closes.

    Parameters
    ----------
    loose_edges, crowded_edges, turned_edges : int
        Edges with one triangle, with more than two, and with two that disagree which side is out.
    bodies : int
        Separate outer skins; 0 when the mesh is not closed, for then they cannot be told apart.
    voids : int
        Cavities with no way out.
    volume_mm3 : float
        Signed volume; 0 when the mesh is not closed, for then it means nothing [mm3].
    """

    loose_edges: int
    crowded_edges: int
    turned_edges: int
    bodies: int
    voids: int
    volume_mm3: float

    @property
    def is_one_body(self) -> bool:
        """Whether the mesh is fit to be measured."""
        return self.bodies == 1 and self.volume_mm3 > 0


def measure_closedness(surface: Surface) -> Closedness:
    """Count open edges, bodies and voids."""
    bodies = voids = 0
    volume = 0.0
    if surface.is_closed:
        shares = surface.cone_volumes
        volume = float(shares.sum())
        everything = np.ones(len(surface.faces), dtype=np.bool_)
        count, labels = patches_of(surface.neighbours, everything)
        inward = np.bincount(labels, weights=shares, minlength=count) <= 0
        if volume > 0 and bool(np.any(inward)):
            voids = _count_voids(surface, labels, inward)
        bodies = count - voids
    return Closedness(
        loose_edges=surface.loose_edges,
        crowded_edges=surface.crowded_edges,
        turned_edges=surface.turned_edges,
        bodies=bodies,
        voids=voids,
        volume_mm3=volume,
    )


def _count_voids(surface: Surface, labels: NDArray[np.int64], inward: NDArray[np.bool_]) -> int:
    """Count the inward skins that lie within an outward one; a stray one is no cavity."""
    order = np.argsort(labels, kind="stable")
    begins = np.searchsorted(labels[order], np.arange(len(inward)))
    low = np.minimum.reduceat(surface.corners.min(axis=1)[order], begins)
    high = np.maximum.reduceat(surface.corners.max(axis=1)[order], begins)
    below = (low[~inward] < low[inward, None]).all(axis=2)
    above = (high[~inward] > high[inward, None]).all(axis=2)
    is_held: NDArray[np.bool_] = np.logical_or.reduce(below & above, axis=1)
    return int(np.count_nonzero(is_held))


def closedness_findings(
    closedness: Closedness, piece: str, limits: PrintLimits
) -> tuple[Finding, ...]:
    """Say what keeps the mesh from being one printable body."""
    findings = [*_surface_findings(closedness, piece)]
    if closedness.bodies > 1:
        findings.append(
            Finding(
                code="more-than-one-body",
                severity=Severity.STOP,
                part=piece,
                what=f"the piece falls into {closedness.bodies} bodies that do not touch",
                measured=closedness.bodies,
                limit=1,
                where="whole piece",
                fix="join the bodies, or make each one a piece of its own",
            )
        )
    if closedness.voids > 0:
        is_resin = limits.process == "resin"
        findings.append(
            Finding(
                code="closed-void",
                severity=Severity.STOP if is_resin else Severity.WARN,
                part=piece,
                what=f"the piece holds {closedness.voids} cavities with no way out",
                measured=closedness.voids,
                limit=0,
                where="inside the piece",
                fix="open the cavity so that resin can drain"
                if is_resin
                else "fill the cavity: its roof cannot be reached to take support out",
            )
        )
    if not closedness.is_one_body:
        findings.append(
            Finding(
                code="not-checked",
                severity=Severity.NOTE,
                part=piece,
                what="walls, overhangs, fit and stance are not checked: "
                "they mean nothing until the mesh is one closed body",
                where="whole piece",
                fix="put the mesh right first",
            )
        )
    return tuple(findings)


def _surface_findings(closedness: Closedness, piece: str) -> tuple[Finding, ...]:
    """Say where the surface itself is wrong: open, turned or inside out."""
    open_edges = closedness.loose_edges + closedness.crowded_edges
    if open_edges > 0:
        what = (
            f"{closedness.loose_edges} edges have one triangle and "
            f"{closedness.crowded_edges} more than two; a closed surface has two on each"
        )
        code, measured, fix = "mesh-not-closed", open_edges, "merge equal vertices, close the holes"
    elif closedness.turned_edges > 0:
        what = f"on {closedness.turned_edges} edges two triangles disagree which side is out"
        code, measured, fix = "winding-mixed", closedness.turned_edges, "turn those triangles round"
    elif closedness.bodies == 0:
        what = "the mesh has no triangles, or a corner that is not a finite number"
        code, measured, fix = "mesh-not-closed", 0, "make the mesh again from the solid"
    elif closedness.volume_mm3 <= 0:
        what = f"the surface is inside out: its volume is {closedness.volume_mm3:.1f} mm3"
        return (
            Finding(
                code="inside-out",
                severity=Severity.STOP,
                part=piece,
                what=what,
                measured=closedness.volume_mm3,
                limit=0.0,
                unit="mm3",
                where="whole piece",
                fix="turn every triangle round",
            ),
        )
    else:
        return ()
    return (
        Finding(
            code=code,
            severity=Severity.STOP,
            part=piece,
            what=what,
            measured=measured,
            limit=0,
            where="whole piece",
            fix=fix,
        ),
    )

"""Bodies, dusts and profiles that the tests of the forecast share."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING

from gyrecut.airflow.air import air_state
from gyrecut.correlations.consensus import SLOPE
from gyrecut.correlations.size_distributions import LogNormal
from gyrecut.profile import load_profile
from gyrecut.separation.chain import Grains, through

if TYPE_CHECKING:
    from gyrecut.profile import Profile
    from gyrecut.separation.chain import Step

SHOP = Path(__file__).parent / "shop.yaml"
SHIPPED = Path(__file__).parents[2] / "profiles"
AIR = air_state(293.15, altitude=0.0, relative_humidity=0.5)
CLASSES = 101
HIGH_EFFICIENCY = "stairmand-high-efficiency"
STAGE = f"proportions: {HIGH_EFFICIENCY}\n    inlet_velocity: 18 m/s"
SAME_AGAIN = (STAGE, f"{STAGE}\n  - {STAGE}")


def dust_like(
    *, median: float, spread: float = 2.5, density: float = 1000.0, shape_factor: float = 1.3
) -> Grains:
    bins = LogNormal(median=median, spread=spread).mass_bins(CLASSES)
    return Grains(sizes=bins.sizes, masses=bins.masses, density=density, shape_factor=shape_factor)


def kept_by(
    steps: tuple[Step, ...], grains: Grains, *, flow: float, leak: float = 0.0
) -> tuple[float, ...]:
    """Share of the feed that each stage keeps, and in the last place all of them."""
    passed = through(steps, grains, flow=flow, loading=0.0, leak=leak, air=AIR, slope=SLOPE)
    return (*(float(share) for share in passed.kept), float(passed.kept_in_all))


def written(folder: Path, *changes: tuple[str, str]) -> Path:
    """Write the test shop's profile with some of its text changed."""
    text = SHOP.read_text(encoding="utf-8")
    for old, new in changes:
        assert text.count(old) == 1, f"{old!r} stands in {SHOP.name} {text.count(old)} times"
        text = text.replace(old, new)
    path = folder / SHOP.name
    path.write_text(text, encoding="utf-8")
    return path


def changed(folder: Path, *changes: tuple[str, str]) -> Profile:
    """Read the test shop's profile with some of its text changed."""
    return load_profile(written(folder, *changes))


def shipped(name: str) -> Profile:
    return load_profile(SHIPPED / f"{name}.yaml")


def beside_hose(lines: str) -> tuple[str, str]:
    """Add lines to the air of the test shop, before its hose."""
    return ("  hose:\n", f"  {lines}\n  hose:\n")

"""Thermal expansion for carrying a density over a few kelvin, fitted to the correlations at hand.

The coefficient at 25 degC is taken linear in 1/Tb, where Tb is the normal boiling point: low
boilers expand more. The fit runs over every chosen liquid with a Perry correlation and a boiling
point, and its scatter is printed by the build and quoted in the README.
"""

from __future__ import annotations

from dataclasses import dataclass
from statistics import fmean, stdev

from steps.equations import equation_105
from steps.liquid import ROOM, Liquid
from steps.tables import number, numbers, rows


@dataclass(frozen=True, slots=True)
class Expansion:
    """Coefficient a + b/Tb in 1/K with Tb in K; `scatter` is the standard deviation of the fit."""

    a: float
    b: float
    scatter: float
    count: int

    def coefficient(self, liquid: Liquid) -> float:
        """Thermal expansion coefficient in 1/K at 25 degC."""
        boiling = boiling_kelvin(liquid)
        return 1.05e-3 if boiling is None else self.a + self.b / boiling

    def carry(
        self, density: float, start: float, liquid: Liquid, end: float | None = None
    ) -> float:
        """Carry a density from `start` to `end` in K (default: the liquid's own temperature)."""
        stop = liquid.temperature if end is None else end
        return density * (1.0 - self.coefficient(liquid) * (stop - start))


def fit_expansion(liquids: list[Liquid]) -> Expansion:
    """Fit the coefficient against 1/Tb by least squares."""
    points = [p for p in (_point(liquid) for liquid in liquids) if p is not None]
    xs, ys = [p[0] for p in points], [p[1] for p in points]
    mx, my = fmean(xs), fmean(ys)
    slope = sum((x - mx) * (y - my) for x, y in points) / sum((x - mx) ** 2 for x in xs)
    start = my - slope * mx
    return Expansion(start, slope, stdev(y - start - slope * x for x, y in points), len(points))


def boiling_kelvin(liquid: Liquid) -> float | None:
    """Return a normal boiling point in K from the CRC tables, None if there is none."""
    return number("crc_organic", liquid.cas, "Tb") or number("crc_inorganic", liquid.cas, "Tb")


def _point(liquid: Liquid) -> tuple[float, float] | None:
    """1/Tb and the expansion coefficient at 25 degC of one liquid with a Perry correlation."""
    boiling = boiling_kelvin(liquid)
    for row in rows("perry_density", liquid.cas):
        *coefficients, low, high = numbers(row, "C1", "C2", "C3", "C4", "Tmin", "Tmax")
        in_range = low <= ROOM - 5 and high >= ROOM + 5
        if boiling is not None and in_range and liquid.id != "water":
            cold, warm = (equation_105(t, coefficients) for t in (ROOM - 5, ROOM + 5))
            return 1.0 / boiling, (cold - warm) / 10.0 / ((cold + warm) / 2.0)
    return None

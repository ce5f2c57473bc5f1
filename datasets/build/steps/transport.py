"""Viscosity and surface tension at the wanted temperature, from correlations in their range."""

from __future__ import annotations

from math import isfinite

from chemicals.interface import Jasper, REFPROP_sigma
from chemicals.viscosity import Viswanath_Natarajan_3

from steps.candidate import Candidate
from steps.equations import equation_101, ppds_9, ppds_14
from steps.expansion import boiling_kelvin
from steps.liquid import Liquid
from steps.tables import numbers, rows

MILLIPASCAL_SECOND = 1e3


def viscosities(liquid: Liquid) -> list[Candidate]:
    """Return dynamic viscosities in mPa s."""
    wanted = liquid.temperature
    found: list[tuple[str, float, float]] = []
    for row in rows("perry_viscosity", liquid.cas):
        *coefficients, low, high = numbers(row, "C1", "C2", "C3", "C4", "C5", "Tmin", "Tmax")
        if liquid.covers(low, high):
            found.append(("perry-2007-viscosity", equation_101(wanted, coefficients), 0.05))
    for row in rows("viswanath_3", liquid.cas):
        a, b, c, low, high = numbers(row, "A", "B", "C", "Tmin", "Tmax")
        if liquid.covers(low, high):
            value = Viswanath_Natarajan_3(wanted, a - 3.0, b, c)  # the file's A gives mPa s
            found.append(("viswanath-1989", value, 0.05))
    boiling = boiling_kelvin(liquid)
    for row in rows("vdi_viscosity", liquid.cas):
        if boiling is not None and liquid.covers(liquid.melting or wanted, boiling):
            value = ppds_9(wanted, numbers(row, "A", "B", "C", "D", "E"))
            found.append(("vdi-2010-viscosity", value, 0.05))
    return _values(liquid, "viscosity", found, MILLIPASCAL_SECOND)


def surface_tensions(liquid: Liquid) -> list[Candidate]:
    """Return surface tensions against air or vapour in mN/m."""
    wanted = liquid.temperature
    found: list[tuple[str, float, float]] = []
    for row in rows("jasper_tension", liquid.cas):
        a, b, low, high = numbers(row, "a", "b", "Tmin", "Tmax")
        if liquid.covers(low, high):
            found.append(("jasper-1972", Jasper(wanted, a, b), 0.01))
    for row in rows("mulero_tension", liquid.cas):
        tc, s0, n0, s1, n1, s2, n2, low, high = numbers(
            row, "Tc", "sigma0", "n0", "sigma1", "n1", "sigma2", "n2", "Tmin", "Tmax"
        )
        if liquid.covers(low, high):
            found.append(("mulero-2012", REFPROP_sigma(wanted, tc, s0, n0, s1, n1, s2, n2), 0.01))
    for row in rows("vdi_tension", liquid.cas):
        tm, tc, a, b, c = numbers(row, "Tm", "Tc", "A", "B", "C")
        if liquid.covers(tm, tc) and not any(numbers(row, "D", "E")):
            found.append(("vdi-2010-tension", ppds_14(wanted, tc, [a, b, c]), 0.03))
    return _values(liquid, "surface_tension", found, 1e3)


def _values(
    liquid: Liquid, quantity: str, found: list[tuple[str, float, float]], scale: float
) -> list[Candidate]:
    """Turn (source, SI value, relative uncertainty) into candidates, dropping nonsense."""
    return [
        liquid.value(
            quantity, si * scale, liquid.temperature, "derived", source, relative * si * scale
        )
        for source, si, relative in found
        if isfinite(si) and si > 0.0
    ]

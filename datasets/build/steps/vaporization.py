"""Vaporization enthalpy and vapour pressure at the wanted temperature."""

from __future__ import annotations

from math import exp, isfinite

from chemicals.vapor_pressure import Antoine, Wagner, Wagner_original

from steps.candidate import Candidate
from steps.equations import equation_101, equation_106, ppds_12
from steps.liquid import ROOM, Liquid
from steps.tables import number, numbers, rows


def vaporization_enthalpies(liquid: Liquid) -> list[Candidate]:
    """Return vaporization enthalpies in kJ/mol: tables at 25 C and correlations."""
    found = []
    if liquid.state == "liquid":
        for table, source, relative in (
            ("crc_vaporization", "crc-2014-vaporization", 0.01),
            ("gharagheizi_vaporization", "gharagheizi-2013", 0.02),
        ):
            joule = number(table, liquid.cas, "Hvap298")
            if joule is not None:
                found.append(_enthalpy(liquid, joule, ROOM, "measured", source, relative))
    wanted = liquid.temperature
    for row in rows("perry_vaporization", liquid.cas):
        tc, c1, c2, c3, c4, low, high = numbers(row, "Tc", "C1", "C2", "C3", "C4", "Tmin", "Tmax")
        if liquid.covers(low, high):
            joule = equation_106(wanted, tc, [c1, c2, c3, c4])
            source = "perry-2007-vaporization"
            found.append(_enthalpy(liquid, joule, wanted, "derived", source, 0.02))
    for row in rows("vdi_vaporization", liquid.cas):
        tc, a, b, c, d, e = numbers(row, "Tc", "A", "B", "C", "D", "E")
        if liquid.covers(liquid.melting or wanted, tc):
            joule = ppds_12(wanted, tc, [a, b, c, d, e])
            found.append(_enthalpy(liquid, joule, wanted, "derived", "vdi-2010-vaporization", 0.02))
    return found


def vapor_pressures(liquid: Liquid) -> list[Candidate]:
    """Return vapour pressures in kPa from correlations whose range holds the temperature."""
    found = []
    wanted = liquid.temperature
    for source, pascal, relative in _pressures(liquid, wanted):
        if isfinite(pascal) and pascal > 0.0:
            value = pascal / 1e3
            found.append(
                liquid.value("vapor_pressure", value, wanted, "derived", source, relative * value)
            )
    return found


def _pressures(liquid: Liquid, wanted: float) -> list[tuple[str, float, float]]:
    """(source, pressure in Pa, relative standard uncertainty) of each correlation in range."""
    found = []
    for row in rows("mcgarry_pressure", liquid.cas):
        tc, pc, a, b, c, d, low = numbers(row, "Tc", "Pc", "A", "B", "C", "D", "Tmin")
        if liquid.covers(low, tc):
            pascal = Wagner_original(wanted, tc, pc, a, b, c, d)
            found.append(("mcgarry-1983", pascal, 0.01))
    for row in rows("poling_wagner", liquid.cas):
        tc, pc, a, b, c, d, low, high = numbers(row, "Tc", "Pc", "A", "B", "C", "D", "Tmin", "Tmax")
        if liquid.covers(low, high):
            found.append(("poling-2001-wagner", Wagner(wanted, tc, pc, a, b, c, d), 0.01))
    for row in rows("poling_antoine", liquid.cas):
        a, b, c, low, high = numbers(row, "A", "B", "C", "Tmin", "Tmax")
        if liquid.covers(low, high):
            found.append(("poling-2001-antoine", Antoine(wanted, a, b, c), 0.02))
    for row in rows("landolt_antoine", liquid.cas):
        a, b, c, low, high = numbers(row, "A", "B", "C", "Tmin", "Tmax")
        if liquid.covers(low, high):
            found.append(("landolt-1999-antoine", exp(a - b / (wanted + c)), 0.03))
    for row in rows("perry_pressure", liquid.cas):
        *coefficients, low, high = numbers(row, "C1", "C2", "C3", "C4", "C5", "Tmin", "Tmax")
        if liquid.covers(low, high):
            found.append(("perry-2007-pressure", equation_101(wanted, coefficients), 0.02))
    for row in rows("vdi_pressure", liquid.cas):
        tm, tc, pc, a, b, c, d = numbers(row, "Tm", "Tc", "Pc", "A", "B", "C", "D")
        if liquid.covers(tm, tc):
            found.append(("vdi-2010-pressure", Wagner(wanted, tc, pc, a, b, c, d), 0.02))
    return found


def _enthalpy(
    liquid: Liquid, joule: float, temperature: float, kind: str, source: str, relative: float
) -> Candidate:
    """Make a vaporization enthalpy from J/mol."""
    value = joule / 1e3
    return liquid.value("vaporization_enthalpy", value, temperature, kind, source, relative * value)

"""Occupational exposure limits: eight-hour time-weighted averages of one jurisdiction.

A limit is set by rule; it is no property of the substance, changes with the years and differs
between countries. Limits printed in mg/m^3 stand in the raw table converted to ppm for the vapour
at 25 degC and 1 atm (24.45 L/mol).
"""

from __future__ import annotations

from steps.candidate import Candidate
from steps.liquid import Liquid
from steps.tables import exposure_table

SOURCE = "ontario-exposure-limits"
_RELATIVE = 0.005  # rounding of the conversion; the figure of the rule itself is exact


def exposure_limits(liquid: Liquid) -> list[Candidate]:
    """Return the time-weighted average limit in ppm, if the table has one."""
    entry = exposure_table().get(liquid.cas)
    if entry is None or not entry["TWA (ppm)"]:
        return []
    ppm = float(entry["TWA (ppm)"])
    note = "8 h time-weighted average, Ontario"
    if float(f"{ppm:.3g}") != ppm:
        note += f"; set as {entry['TWA (mg/m^3)']:.3g} mg/m^3"
    return [liquid.value("exposure_limit", ppm, None, "derived", SOURCE, _RELATIVE * ppm, note)]


def absorbed_through_skin(liquid: Liquid) -> bool:
    """Whether the table carries the skin notation for a liquid."""
    entry = exposure_table().get(liquid.cas)
    return bool(entry and entry["Skin"])

"""Melting, boiling and critical temperatures."""

from __future__ import annotations

from steps.candidate import Candidate
from steps.liquid import Liquid
from steps.tables import number

KELVIN = 273.15

# (table, column, source, standard uncertainty in K)
_MELTING = (
    ("crc_organic", "Tm", "crc-2014-organic", 0.5),
    ("crc_inorganic", "Tm", "crc-2014-inorganic", 0.5),
    ("webbook", "Tm", "nist-webbook", 1.0),
    ("open_melting", "Tm", "open-melting-point-2014", 2.0),
    ("wikidata", "Tm", "wikidata", 3.0),
)
_BOILING = (
    ("crc_organic", "Tb", "crc-2014-organic", 0.5),
    ("crc_inorganic", "Tb", "crc-2014-inorganic", 0.5),
    ("webbook", "Tb", "nist-webbook", 1.0),
    ("wikidata", "Tb", "wikidata", 3.0),
)
_CRITICAL = (
    ("iupac_critical", "Tc", "iupac-critical-1995-2015", 2.0),
    ("crc_critical", "Tc", "crc-2014-critical", 2.0),
    ("mathews_critical", "Tc", "mathews-1972", 3.0),
    ("webbook", "Tc", "nist-webbook", 4.0),
)


def melting_points(liquid: Liquid) -> list[Candidate]:
    """Return tabulated melting points in degC."""
    return _collect(liquid, "melting_point", _MELTING)


def boiling_points(liquid: Liquid) -> list[Candidate]:
    """Return tabulated normal boiling points in degC."""
    return _collect(liquid, "boiling_point", _BOILING)


def critical_temperatures(liquid: Liquid) -> list[Candidate]:
    """Return tabulated critical temperatures in degC."""
    return _collect(liquid, "critical_temperature", _CRITICAL)


def _collect(
    liquid: Liquid, quantity: str, tables: tuple[tuple[str, str, str, float], ...]
) -> list[Candidate]:
    """Read one temperature from each table that has it."""
    found = []
    for table, column, source, uncertainty in tables:
        kelvin = number(table, liquid.cas, column)
        if kelvin:
            found.append(
                liquid.value(quantity, kelvin - KELVIN, None, "measured", source, uncertainty)
            )
    return found

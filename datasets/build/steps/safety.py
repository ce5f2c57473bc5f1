"""Flash points, autoignition temperatures and flammability limits from the safety tables."""

from __future__ import annotations

from steps.candidate import Candidate
from steps.liquid import Liquid
from steps.phase import KELVIN
from steps.tables import number

_TABLES = (
    ("flash_iec", "iec-60079-20-1-2010"),
    ("flash_nfpa", "nfpa-497-2008"),
    ("flash_dippr", "serat-2017"),
    ("wikidata", "wikidata"),
)


def flash_points(liquid: Liquid) -> list[Candidate]:
    """Return tabulated flash points in degC.

    The third table holds measured values in whole degC and calculated ones with decimals; against
    the IEC values of 70 and 108 common liquids they scatter by 6 K and 12 K.
    """
    found = []
    for table, source in _TABLES:
        kelvin = number(table, liquid.cas, "T_flash")
        if kelvin is None:
            continue
        celsius = kelvin - KELVIN
        calculated = source == "serat-2017" and abs(celsius - round(celsius)) > 0.02
        kind, uncertainty = ("estimated", 12.0) if calculated else ("measured", 4.0)
        found.append(liquid.value("flash_point", celsius, None, kind, source, uncertainty))
    return found


# The limits and autoignition temperatures depend on vessel and criterion; the uncertainties are
# about what two of these tables differ by for common liquids (median 3 to 12 %, and 5 K).
_FIRE = (
    ("flash_iec", "iec-60079-20-1-2010"),
    ("flash_nfpa", "nfpa-497-2008"),
    ("wikidata", "wikidata"),
)
_LIMIT_COLUMNS = {"lower_flammability_limit": "LFL", "upper_flammability_limit": "UFL"}


def autoignition_temperatures(liquid: Liquid) -> list[Candidate]:
    """Return tabulated autoignition temperatures in degC."""
    quantity = "autoignition_temperature"
    return [
        liquid.value(quantity, kelvin - KELVIN, None, "measured", source, 15.0)
        for table, source in _FIRE
        if (kelvin := number(table, liquid.cas, "T_autoignition")) is not None
    ]


def flammability_limits(liquid: Liquid, quantity: str) -> list[Candidate]:
    """Return tabulated lower or upper flammability limits in per cent by volume in air."""
    return [
        liquid.value(quantity, 100.0 * part, None, "measured", source, 10.0 * abs(part))
        for table, source in _FIRE
        if (part := number(table, liquid.cas, _LIMIT_COLUMNS[quantity])) is not None
    ]

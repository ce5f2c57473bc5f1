"""Flash points from the safety tables."""

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

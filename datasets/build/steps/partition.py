"""Partition between 1-octanol and water: decadic logarithm of the ratio of concentrations."""

from __future__ import annotations

from steps.candidate import Candidate
from steps.liquid import Liquid
from steps.tables import number

# Standard uncertainties in log units: recommended values, a compilation, and an open collection.
_TABLES = (
    ("logp_crc", "crc-2014-logp", 0.1),
    ("logp_syrres", "syrres-2006-logp", 0.15),
    ("wikidata", "wikidata", 0.3),
)


def partitions(liquid: Liquid) -> list[Candidate]:
    """Return tabulated log P values near 25 degC."""
    return [
        liquid.value("log_p", value, None, "measured", source, uncertainty)
        for table, source, uncertainty in _TABLES
        if (value := number(table, liquid.cas, "logP")) is not None
    ]

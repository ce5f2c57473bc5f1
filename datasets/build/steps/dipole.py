"""Gas-phase dipole moments from the three measured tables."""

from __future__ import annotations

from steps.candidate import Candidate
from steps.liquid import Liquid
from steps.tables import number

# Standard uncertainties in debye: the NIST list gives two decimals, mostly from microwave and
# Stark work; Poling one decimal; the third table mixes gas and solution values.
_TABLES = (
    ("dipole_cccbdb", "nist-cccbdb-2015", 0.03),
    ("dipole_poling", "poling-2001", 0.10),
    ("dipole_muller", "muller-2012", 0.10),
)


def dipoles(liquid: Liquid) -> list[Candidate]:
    """Return the tabulated dipole moments in debye."""
    found = []
    for table, source, uncertainty in _TABLES:
        value = number(table, liquid.cas, "dipole_moment")
        if value is not None:
            found.append(liquid.value("dipole", value, None, "measured", source, uncertainty))
    return found

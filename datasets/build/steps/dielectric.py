"""Static relative permittivity of the liquid."""

from __future__ import annotations

from steps.candidate import Candidate
from steps.equations import crc_permittivity
from steps.liquid import Liquid
from steps.tables import numbers, rows


def permittivities(liquid: Liquid) -> list[Candidate]:
    """Return the CRC polynomial at the wanted temperature, if it reaches, and the table's value."""
    found = []
    for row in rows("crc_permittivity", liquid.cas):
        low, high = numbers(row, "Tmin", "Tmax")
        if low and liquid.covers(low, high):
            value = crc_permittivity(liquid.temperature, numbers(row, "A", "B", "C", "D"))
            found.append(
                liquid.value(
                    "permittivity",
                    value,
                    liquid.temperature,
                    "derived",
                    "crc-2014-permittivity-fit",
                    0.01 * value,
                )
            )
        if row["Permittivity"].strip():
            value, kelvin = numbers(row, "Permittivity", "T")
            found.append(
                liquid.value(
                    "permittivity",
                    value,
                    kelvin_of_table(kelvin),
                    "measured",
                    "crc-2014-permittivity",
                    0.01 * value,
                )
            )
    return found


def kelvin_of_table(kelvin: float) -> float:
    """Turn the table's rounded kelvin (293.2) into the temperature meant (293.15)."""
    return round(kelvin - 273.15) + 273.15

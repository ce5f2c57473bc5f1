"""Liquid density at the wanted temperature, and at the temperature of a refractive index."""

from __future__ import annotations

from steps.candidate import Candidate
from steps.equations import equation_105, vdi_density
from steps.expansion import Expansion
from steps.liquid import Liquid
from steps.tables import number, numbers, rows


def densities(liquid: Liquid, expansion: Expansion) -> list[Candidate]:
    """Return densities in kg/m^3: correlations at the wanted temperature, the CRC value at its own.

    A CRC value at another temperature within 15 K is also carried to the wanted one.
    """
    found = correlated(liquid, liquid.temperature)
    tabled = crc_density(liquid)
    if tabled is None:
        return found
    found.append(tabled)
    assert tabled.temperature is not None
    gap = liquid.temperature - tabled.temperature
    if 0.5 < abs(gap) <= 15.0:
        found.append(
            tabled.change(
                value=expansion.carry(tabled.value, tabled.temperature, liquid),
                temperature=liquid.temperature,
                kind="derived",
                source="crc-2014-organic-carried",
                uncertainty=tabled.uncertainty + abs(gap) * 0.0002 * tabled.value,
                note=f"CRC value at {tabled.temperature - 273.15:.0f} degC carried by the fitted"
                " thermal expansion",
            )
        )
    return found


def correlated(liquid: Liquid, temperature: float) -> list[Candidate]:
    """Return densities in kg/m^3 from correlations whose range holds the temperature in K."""
    found = []
    for row in rows("perry_density", liquid.cas):
        *coefficients, low, high = numbers(row, "C1", "C2", "C3", "C4", "Tmin", "Tmax")
        if liquid.covers(low, high, temperature):
            # equation 105 of table 2-32 gives mol/m^3 here
            value = equation_105(temperature, coefficients) * liquid.molar_mass / 1e3
            found.append(_derived(liquid, value, temperature, "perry-2007-density", 0.003))
    for row in rows("vdi_density", liquid.cas):
        tc, *coefficients = numbers(row, "Tc", "rhoc", "A", "B", "C", "D")
        if liquid.covers(liquid.melting or temperature, tc, temperature):
            value = vdi_density(temperature, tc, coefficients)
            found.append(_derived(liquid, value, temperature, "vdi-2010-density", 0.003))
    return found


def crc_density(liquid: Liquid) -> Candidate | None:
    """Return the density of the CRC physical-constants table at the temperature it was given for.

    The organic table prints the temperature in degC as a superscript that the raw file keeps as
    the digits after the last decimal: 0.8765 at 20 degC stands there as 876.52 kg/m^3.
    """
    raw = number("crc_organic", liquid.cas, "rho")
    if raw is not None:
        hot = liquid.melting is not None and liquid.melting > 298.15
        value, celsius = split_superscript(raw, warmest=99 if hot else 40)
        source = "crc-2014-organic"
    else:
        inorganic = number("crc_inorganic", liquid.cas, "rho")
        if inorganic is None:
            return None
        value, celsius, source = inorganic, 25.0, "crc-2014-inorganic"
    relative = 0.002 if raw is not None else 0.01  # the inorganic table names no temperature
    return liquid.value("density", value, celsius + 273.15, "measured", source, relative * value)


def split_superscript(raw: float, warmest: int = 40) -> tuple[float, float]:
    """Split 876.52 into (876.5 kg/m^3, 20 degC); without a superscript 20 degC is assumed.

    Four decimals of g/cm^3 are the rule, three and two happen; the superscript is two digits and
    not above `warmest` (648.19 is 0.648 at 19 degC, not 0.6481 at 90 degC).
    """
    digits = f"{raw / 1000:.6f}"
    for decimals in (4, 3, 2):
        head, tail = digits[: -(6 - decimals)], digits[-(6 - decimals) :]
        celsius = int(tail[:2])
        likely = celsius in (15, 20, 25) if decimals == 2 else 5 <= celsius <= warmest
        if likely and not tail[2:].strip("0"):
            return float(head) * 1000, float(celsius)
    return raw, 20.0


def _derived(
    liquid: Liquid, value: float, temperature: float, source: str, relative: float
) -> Candidate:
    """Make a density from a correlation with a relative standard uncertainty."""
    return liquid.value("density", value, temperature, "derived", source, relative * value)

"""Refractive index at the sodium D line, and the mean polarizability that follows from it."""

from __future__ import annotations

from math import pi

from scipy.constants import Avogadro

from steps.candidate import Candidate
from steps.density import correlated, crc_density
from steps.expansion import Expansion
from steps.liquid import Liquid
from steps.tables import number


def refractive_indices(liquid: Liquid) -> list[Candidate]:
    """Return tabulated refractive indices at the temperatures they were given for."""
    index = number("crc_index", liquid.cas, "RI")
    kelvin = number("crc_index", liquid.cas, "RIT")
    if index is None or kelvin is None:
        return []
    return [liquid.value("refractive_index", index, kelvin, "measured", "crc-2014-index", 0.0005)]


def polarizability(
    liquid: Liquid, index: Candidate, densities: list[Candidate], expansion: Expansion
) -> list[Candidate]:
    """Return the Lorentz-Lorenz polarizability volume in angstrom^3, none without a density.

    alpha = 3 M/(4 pi N_A rho) (n^2 - 1)/(n^2 + 2), with n and rho at the same temperature; this is
    the optical mean polarizability at 589 nm. Source: H. A. Lorentz, L. Lorenz 1880.
    """
    assert index.temperature is not None
    density = _density_at(liquid, index.temperature, densities, expansion)
    if density is None:
        return []
    n2 = index.value**2
    per_molecule = liquid.molar_mass / density.value * 1e-3 / Avogadro  # m^3
    value = 3.0 / (4.0 * pi) * per_molecule * (n2 - 1.0) / (n2 + 2.0) * 1e30
    slope = 6.0 * index.value / ((n2 - 1.0) * (n2 + 2.0))  # d ln alpha / d n
    relative = (
        (slope * index.uncertainty) ** 2 + (density.uncertainty / density.value) ** 2
    ) ** 0.5
    note = (
        f"optical, 589 nm; n_D = {index.value:.4f} ({index.source}) and"
        f" {density.value:.1f} kg/m^3 ({density.source}) at {index.temperature - 273.15:.1f} degC"
    )
    return [
        liquid.value(
            "polarizability",
            value,
            index.temperature,
            "derived",
            "lorentz-lorenz",
            max(relative, 0.003) * value,
            note,
        )
    ]


def _density_at(
    liquid: Liquid, temperature: float, densities: list[Candidate], expansion: Expansion
) -> Candidate | None:
    """Density at the temperature of the index: the nearest accepted value, carried if need be."""
    preferred = next((d for d in densities if d.preferred), None)
    if preferred is None or preferred.temperature is None:
        return None
    if _at(preferred, temperature):
        return preferred
    usable = {d.source for d in densities if not d.rejected or d.note.endswith("K away")}
    known = [d for d in correlated(liquid, temperature) if d.source in usable]
    tabled = crc_density(liquid)
    if tabled is not None and tabled.source in usable and _at(tabled, temperature):
        known.append(tabled)
    table = preferred.source.removesuffix("-carried")
    same = [d for d in known if d.source == table]
    if same or known:
        return (same or known)[0]
    gap = abs(temperature - preferred.temperature)
    return preferred.change(
        value=expansion.carry(preferred.value, preferred.temperature, liquid, temperature),
        uncertainty=preferred.uncertainty + gap * 0.0002 * preferred.value,
    )


def _at(density: Candidate, temperature: float) -> bool:
    """Whether a density holds for a temperature in K."""
    return density.temperature is not None and abs(density.temperature - temperature) <= 0.5

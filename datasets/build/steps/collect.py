"""All values of one liquid, from tables and curated files, with the preferred ones chosen."""

from __future__ import annotations

from steps.candidate import UNITS, Candidate
from steps.curated import Decision, apply
from steps.density import densities
from steps.dielectric import permittivities
from steps.dipole import dipoles
from steps.expansion import Expansion
from steps.exposure import exposure_limits
from steps.liquid import Liquid
from steps.optics import polarizability, refractive_indices
from steps.outliers import set_aside, too_far
from steps.partition import partitions
from steps.phase import boiling_points, critical_temperatures, melting_points
from steps.prefer import choose
from steps.safety import autoignition_temperatures, flammability_limits, flash_points
from steps.transport import surface_tensions, viscosities
from steps.vaporization import vapor_pressures, vaporization_enthalpies
from steps.water import water_values


def collect(liquid: Liquid, decisions: list[Decision], expansion: Expansion) -> list[Candidate]:
    """Return every value of a liquid in the order of the quantities."""
    tabled: dict[str, list[Candidate]] = {
        "dipole": dipoles(liquid),
        "molar_mass": [
            liquid.value(
                "molar_mass",
                liquid.molar_mass,
                None,
                "derived",
                "ciaaw-atomic-weights",
                0.0001 * liquid.molar_mass,
                f"from the formula {liquid.formula}",
            )
        ],
        "density": densities(liquid, expansion),
        "melting_point": melting_points(liquid),
        "boiling_point": boiling_points(liquid),
        "critical_temperature": critical_temperatures(liquid),
        "vaporization_enthalpy": vaporization_enthalpies(liquid),
        "vapor_pressure": vapor_pressures(liquid),
        "permittivity": permittivities(liquid),
        "refractive_index": refractive_indices(liquid),
        "viscosity": viscosities(liquid),
        "surface_tension": surface_tensions(liquid),
        "flash_point": flash_points(liquid),
        "autoignition_temperature": autoignition_temperatures(liquid),
        "lower_flammability_limit": flammability_limits(liquid, "lower_flammability_limit"),
        "upper_flammability_limit": flammability_limits(liquid, "upper_flammability_limit"),
        "exposure_limit": exposure_limits(liquid),
        "log_p": partitions(liquid),
    }
    for candidate in water_values(liquid):
        tabled[candidate.quantity].append(candidate)
    mine = [d for d in decisions if d.id == liquid.id]
    chosen = {
        quantity: choose(
            _sift([d for d in mine if d.quantity == quantity], tabled.get(quantity, []), liquid),
            liquid.temperature,
        )
        for quantity in UNITS
        if quantity != "polarizability"
    }
    index = next((c for c in chosen["refractive_index"] if c.preferred), None)
    worked = [] if index is None else polarizability(liquid, index, chosen["density"], expansion)
    chosen["polarizability"] = choose(
        apply([d for d in mine if d.quantity == "polarizability"], worked), liquid.temperature
    )
    return [candidate for quantity in UNITS for candidate in chosen[quantity]]


def _sift(
    decisions: list[Decision], candidates: list[Candidate], liquid: Liquid
) -> list[Candidate]:
    """Apply the curated decisions, then set aside what is too far away or stands alone."""
    return set_aside(too_far(apply(decisions, candidates), liquid.temperature))

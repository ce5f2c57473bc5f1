"""No row is grossly wrong: bounds, phases, relations between quantities."""

from __future__ import annotations

import numpy as np
import pandas as pd
import pytest

BOUNDS = {
    "dipole": (0.0, 6.5),
    "polarizability": (1.4, 65.0),
    "ionization_energy": (6.5, 13.0),
    "molar_mass": (18.0, 700.0),
    "density": (600.0, 3400.0),
    "melting_point": (-170.0, 65.0),
    "boiling_point": (25.5, 470.0),
    "critical_temperature": (150.0, 600.0),
    "vaporization_enthalpy": (18.0, 125.0),
    "vapor_pressure": (1e-8, 101.3),
    "permittivity": (1.6, 190.0),
    "refractive_index": (1.24, 1.75),
    "viscosity": (0.15, 1500.0),
    "surface_tension": (9.0, 75.0),
    "flash_point": (-60.0, 260.0),
    "autoignition_temperature": (20.0, 680.0),
    "lower_flammability_limit": (0.25, 20.0),
    "upper_flammability_limit": (2.0, 100.0),
    "exposure_limit": (0.003, 1500.0),
    "log_p": (-2.5, 20.0),
    "water_solubility": (0.00005, 100.0),
}


@pytest.mark.parametrize("quantity", BOUNDS)
def test_preferred_values_are_within_bounds(preferred: pd.DataFrame, quantity: str) -> None:
    low, high = BOUNDS[quantity]
    column = preferred[quantity].dropna()
    outside = column[(column < low) | (column > high)]
    assert outside.empty, outside.to_dict()


def test_liquids_melt_below_25_degrees_and_the_named_melts_above(
    liquids: pd.DataFrame, preferred: pd.DataFrame, selection: pd.DataFrame
) -> None:
    state = liquids.cas.map(selection.state)
    melting = preferred.melting_point
    solid = melting[(state.reindex(melting.index) == "liquid") & (melting >= 25.0)]
    assert solid.empty, solid.to_dict()
    melts = melting[state.reindex(melting.index) == "melt"]
    assert (melts > 25.0).all(), melts.to_dict()
    assert 10 <= len(melts) <= 30


def test_liquids_boil_above_their_melting_point_and_below_the_critical_temperature(
    preferred: pd.DataFrame,
) -> None:
    assert not (preferred.boiling_point <= preferred.melting_point).any()
    ratio = (preferred.boiling_point + 273.15) / (preferred.critical_temperature + 273.15)
    off = ratio[(ratio < 0.56) | (ratio > 0.82)].drop("squalane")  # squalane: Tb is extrapolated
    assert off.empty, off.to_dict()


def test_square_of_refractive_index_does_not_exceed_the_permittivity(
    preferred: pd.DataFrame,
) -> None:
    """n^2 <= eps within 4 % (different temperatures and the frequency dependence of n)."""
    ratio = (preferred.refractive_index**2 / preferred.permittivity).dropna()
    high = ratio[ratio > 1.04]
    assert high.empty, high.to_dict()
    assert len(ratio) > 450


def test_non_polar_liquids_have_a_permittivity_near_the_squared_index(
    preferred: pd.DataFrame,
) -> None:
    """Within 8 %.

    Exceptions: atomic polarization is large in perfluorides and bromine, and the polar groups of
    1,4-dioxane cancel only in the chair at rest.
    """
    exceptions = {"bromine", "perfluorohexane", "perfluoroheptane", "1,4-dioxane"}
    still = preferred[(preferred.dipole < 0.05) & preferred.permittivity.notna()]
    ratio = (still.permittivity / still.refractive_index**2).drop(list(exceptions))
    off = ratio[(ratio - 1.0).abs() > 0.08]
    assert off.empty, off.to_dict()


# Ratio of the Lorentz-Lorenz value to Miller's hybrid sum, and why the scheme misses by more than
# 8 % of the family's median: it was fitted without these bonds.
OUTSIDE_THE_SCHEME = {
    "formic-acid": "first of the series",
    "2,2,2-trifluoroethanol": "CF3",
    "salicylaldehyde": "internal hydrogen bond, conjugated",
    "4-methoxybenzaldehyde": "donor and acceptor across the ring",
    "bromine": "Br-Br",
    "nitric-acid": "inorganic",
    "sulfuric-acid": "sulfur(VI)",
    "hydrogen-peroxide": "O-O",
    "methanesulfonic-acid": "sulfur(VI)",
    "thionyl-chloride": "sulfur(IV)-Cl",
    "disulfur-dichloride": "S-Cl",
    "sulfuryl-chloride": "sulfur(VI)",
    "dimethyl-sulfate": "sulfur(VI)",
    "trifluoroacetic-acid": "CF3 beside C=O",
    "trifluoroacetic-anhydride": "CF3 beside C=O",
    "1,1,1,3,3,3-hexafluoro-2-propanol": "CF3",
    "sevoflurane": "CF3",
    "cinnamaldehyde": "conjugation through the chain",
    "furfural": "conjugation with the ring",
}


def test_polarizability_agrees_with_a_sum_of_atomic_hybrids(
    liquids: pd.DataFrame, preferred: pd.DataFrame, structures: pd.DataFrame
) -> None:
    """Miller (1990) against Lorentz-Lorenz: within 8 % of the median of the family.

    Perfluorinated liquids form a family of their own: the scheme's fluorine is too small for them.
    """
    additive = liquids.cas.map(structures.additive_polarizability_A3)
    ratio = (preferred.polarizability / additive).dropna()
    family = liquids.family.reindex(ratio.index)
    family[liquids.name.reindex(ratio.index).str.startswith("perfluoro")] = "perfluorinated"
    median = ratio.groupby(family).transform("median")
    off = ratio[((ratio / median) - 1.0).abs() > 0.08].drop(OUTSIDE_THE_SCHEME, errors="ignore")
    assert off.empty, off.round(3).to_dict()
    assert median.between(0.94, 1.20).all()
    assert len(ratio) > 800


def test_vaporization_enthalpy_follows_the_boiling_point(
    liquids: pd.DataFrame, preferred: pd.DataFrame
) -> None:
    """Trouton-like: at 25 C and without hydrogen bonds, dHvap against Tb scatters by 8 %."""
    plain = liquids[(liquids.hbond_donor != "strong")].index
    rows = preferred.reindex(plain)[["boiling_point", "vaporization_enthalpy"]].dropna()
    line = np.polyfit(rows.boiling_point, rows.vaporization_enthalpy, 2)
    ratio = rows.vaporization_enthalpy / np.polyval(line, rows.boiling_point)
    off = ratio[(ratio - 1.0).abs() > 0.22]
    assert off.empty, off.round(2).to_dict()
    assert float((ratio - 1.0).std()) < 0.08


def test_vapour_pressure_follows_the_boiling_point(preferred: pd.DataFrame) -> None:
    """Its logarithm at 25 C against Tb: a decade either way covers alcohols, acids, alkanes."""
    rows = preferred[["boiling_point", "vapor_pressure"]].dropna()
    rows = rows[rows.boiling_point < 260]
    line = np.polyfit(rows.boiling_point, np.log10(rows.vapor_pressure), 2)
    off = np.log10(rows.vapor_pressure) - np.polyval(line, rows.boiling_point)
    assert off[off.abs() > 1.1].empty, off[off.abs() > 1.1].round(2).to_dict()


def test_flash_points_lie_below_boiling_points(preferred: pd.DataFrame) -> None:
    assert not (preferred.flash_point >= preferred.boiling_point).any()


def test_kirkwood_factor_is_believable(liquids: pd.DataFrame, preferred: pd.DataFrame) -> None:
    """0.3 to 3.6 (J. G. Kirkwood 1939, H. Froehlich 1949); chain-forming amides reach 8.

    Exceptions: acids (dimers) and dipoles below 1 D, where solution values are too coarse.
    """
    from scipy.constants import Avogadro, Boltzmann, epsilon_0

    rows = preferred.dropna(subset=["dipole", "permittivity", "refractive_index", "density"])
    rows = rows[(rows.dipole >= 1.0) & (liquids.vapour_dimer.reindex(rows.index) == "no")]
    eps, optical = rows.permittivity, rows.refractive_index**2
    number = rows.density / rows.molar_mass * 1e3 * Avogadro
    moment = rows.dipole * 3.33564e-30
    factor = 9 * epsilon_0 * Boltzmann * 298.15 / (number * moment**2)
    factor *= (eps - optical) * (2 * eps + optical) / (eps * (optical + 2) ** 2)
    chains = {"n-methylacetamide", "n-methylformamide", "n-methylpropionamide"}
    off = factor.drop(list(chains))[lambda g: (g < 0.3) | (g > 3.7)]
    assert off.empty, off.round(2).to_dict()
    assert factor[list(chains)].between(3.5, 8.0).all()

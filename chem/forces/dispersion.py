"""Dispersion coefficients from polarizability, ionization energy and valence electrons.

Models, all for U = -C6/r^6 with C6 in J m^6:

london
    C6 = 3/2 I_a I_b/(I_a + I_b) a_a a_b, polarizability volumes a, ionization energies I
    (F. London, Trans. Faraday Soc. 33 (1937) 8).
slater-kirkwood
    C6 = 3/2 a_a a_b / (sqrt(a_a/N_a) + sqrt(a_b/N_b)) in atomic units, all valence electrons N
    (J. C. Slater, J. G. Kirkwood, Phys. Rev. 37 (1931) 682).
geometric
    The geometric mean of the two. London's formula sees only the outermost electron and is too
    low; Slater-Kirkwood with every valence electron at full strength is too high.
slater-kirkwood-effective
    Slater-Kirkwood with the fraction `EFFECTIVE_FRACTION` of the valence electrons; needs no
    ionization energy.
auto (default)
    `geometric` where both ionization energies are known, else `slater-kirkwood-effective`.
"""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike, NDArray

from stillroom.chem.data.constants import BOHR, C6_ATOMIC_UNIT, COULOMB
from stillroom.chem.data.errors import OutsideRange

Array = NDArray[np.float64]

MODELS = ("auto", "geometric", "london", "slater-kirkwood", "slater-kirkwood-effective")

EFFECTIVE_FRACTION = 0.60
"""Fraction of the valence electrons that reproduces C6 in the Slater-Kirkwood formula.

Fit report: 10 small molecules (hydrogen to ethane, hydrogen chloride) with C6 from dipole
oscillator strength distributions (Meath and co-workers) and static polarizabilities: 0.62, root
mean square error 8 %, 9 % when each molecule in turn is left out. Optical polarizabilities, as
the shelf has them, are 3 to 5 % larger and want 0.56. The value between them is off by less than
4 % in C6 either way.
"""

EFFECTIVE_ERROR = 0.09
"""Relative standard error of `slater-kirkwood-effective`: the left-one-out error of that fit."""

GEOMETRIC_ERROR = 0.05
"""Root mean square relative error of `geometric` on the same 10 molecules (nothing fitted; mean
absolute error 4 %, against 22 % for London and 27 % for Slater-Kirkwood); a floor under the model
part of the uncertainty."""

LONDON_ERROR = 0.28
"""Root mean square error of ln C6 by London's formula on the same molecules, nearly all too low."""


def london_c6(
    polarizability_a: ArrayLike,
    polarizability_b: ArrayLike,
    ionization_a: ArrayLike,
    ionization_b: ArrayLike,
) -> Array:
    """Return London's C6 in J m^6 (arguments in C^2 m^2/J and J; shapes broadcast)."""
    i_a, i_b = np.asarray(ionization_a, float), np.asarray(ionization_b, float)
    volumes = np.asarray(polarizability_a, float) * np.asarray(polarizability_b, float) / COULOMB**2
    return np.asarray(1.5 * volumes * i_a * i_b / (i_a + i_b))


def slater_kirkwood_c6(
    polarizability_a: ArrayLike,
    polarizability_b: ArrayLike,
    electrons_a: ArrayLike,
    electrons_b: ArrayLike,
) -> Array:
    """Return the Slater-Kirkwood C6 in J m^6 (C^2 m^2/J and electron counts; shapes broadcast)."""
    a = np.asarray(polarizability_a, float) / (COULOMB * BOHR**3)
    b = np.asarray(polarizability_b, float) / (COULOMB * BOHR**3)
    root = np.sqrt(a / np.asarray(electrons_a, float)) + np.sqrt(b / np.asarray(electrons_b, float))
    return np.asarray(1.5 * a * b / root * C6_ATOMIC_UNIT)


def dispersion_c6(
    polarizability_a: ArrayLike,
    polarizability_b: ArrayLike,
    ionization_a: ArrayLike,
    ionization_b: ArrayLike,
    electrons_a: ArrayLike,
    electrons_b: ArrayLike,
    model: str = "auto",
) -> Array:
    """Return C6 in J m^6 by one of `MODELS`; NaN where an input of the model is NaN.

    Polarizabilities in C^2 m^2/J, ionization energies in J, numbers of valence electrons; shapes
    broadcast. With `auto`, `geometric` falls back to whichever single model has its inputs:
    `slater-kirkwood-effective` without an ionization energy, `london` without electron counts.

    Raises
    ------
    OutsideRange
        If `model` is not one of `MODELS`.
    """
    if model not in MODELS:
        raise OutsideRange("dispersion model", model, " | ".join(MODELS))
    london = london_c6(polarizability_a, polarizability_b, ionization_a, ionization_b)
    if model == "london":
        return london
    full = slater_kirkwood_c6(polarizability_a, polarizability_b, electrons_a, electrons_b)
    if model == "slater-kirkwood":
        return full
    effective = full * np.sqrt(EFFECTIVE_FRACTION)  # C6 grows as the root of the electron count
    if model == "slater-kirkwood-effective":
        return np.asarray(effective)
    geometric = np.sqrt(london * full)
    if model == "geometric":
        return np.asarray(geometric)
    fallback = np.where(np.isnan(effective), london, effective)
    return np.asarray(np.where(np.isnan(geometric), fallback, geometric))


def model_used(ionization_known: bool, electrons_known: bool, model: str = "auto") -> str:
    """Return the model that `dispersion_c6` uses for a pair with these inputs."""
    if model != "auto":
        return model
    if ionization_known and electrons_known:
        return "geometric"
    return "slater-kirkwood-effective" if electrons_known else "london"


def model_uncertainty(london: ArrayLike, slater_kirkwood: ArrayLike) -> Array:
    """Return the relative standard uncertainty of C6 that comes from the choice of model.

    The two formulas bracket the truth; a rectangular distribution of ln C6 between them has the
    standard deviation |ln(C_SK/C_London)|/(2 sqrt 3) (JCGM 100:2008, 4.3.7), never less than
    `GEOMETRIC_ERROR`. Where only one formula can be used: `EFFECTIVE_ERROR` for Slater-Kirkwood
    effective, `LONDON_ERROR` for London's formula alone.
    """
    low, high = np.asarray(london, float), np.asarray(slater_kirkwood, float)
    spread = np.maximum(np.abs(np.log(high / low)) / (2 * np.sqrt(3)), GEOMETRIC_ERROR)
    alone = np.where(np.isnan(high), LONDON_ERROR, EFFECTIVE_ERROR)
    return np.where(np.isnan(spread), alone, spread)

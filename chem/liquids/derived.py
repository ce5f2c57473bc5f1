"""Quantities that follow from the stored ones, at any temperature, with their uncertainty.

`state` takes the stored columns of n liquids and returns every quantity the program knows at one
temperature: stored numbers carried there by a stated rule or dropped, and derived ones added.
"""

from __future__ import annotations

from collections.abc import Callable, Sequence

import numpy as np
from numpy.typing import ArrayLike, NDArray

from stillroom.chem.data.propagation import propagate
from stillroom.chem.data.quantities import QUANTITIES
from stillroom.chem.data.values import Column, Columns
from stillroom.chem.forces.dispersion import (
    dispersion_c6,
    london_c6,
    model_uncertainty,
    slater_kirkwood_c6,
)
from stillroom.chem.liquids.association import kirkwood_factor
from stillroom.chem.liquids.cohesion import cohesive_energy, solubility_parameter
from stillroom.chem.liquids.temperature import (
    GULDBERG,
    NEAR,
    RACKETT_ERROR,
    RACKETT_GUESS_ERROR,
    WATSON_ERROR,
    WATSON_GUESS_ERROR,
    rackett_density_ratio,
    watson_ratio,
)

Array = NDArray[np.float64]
Words = NDArray[np.object_]

_WEAKNESS = ("measured", "user", "derived", "computed", "estimated")
_TABULATED = ("vapor_pressure", "permittivity", "refractive_index", "viscosity", "surface_tension")
_BRIEF = 10.0  # K: a rule used over a shorter span keeps the kind of a derived number


def state(stored: Columns, electrons: Array, temperature: float) -> Columns:
    """Return all columns of n liquids at `temperature` (K).

    Parameters
    ----------
    stored : Columns
        Columns as tabulated, each of length n; quantities may be absent.
    electrons : float array (n,)
        Valence electrons of each liquid, NaN where unknown.
    temperature : float
        K.

    Returns
    -------
    Columns
        One column of length n for every quantity. Density follows Rackett's equation and the
        vaporization enthalpy Watson's, with the critical temperature or, failing that, one from the
        boiling point; other quantities that depend on temperature are kept within 5 K of their own
        temperature and missing beyond, with a note that says so.
    """
    n = electrons.size
    now = {name: stored.get(name) or Column.empty(q, n) for name, q in QUANTITIES.items()}
    critical = now["critical_temperature"].si
    guessed = np.isnan(critical)
    critical = np.where(guessed, GULDBERG * now["boiling_point"].si, critical)
    rackett_error = np.where(guessed, RACKETT_GUESS_ERROR, RACKETT_ERROR)
    now["density"] = _carried(
        now["density"], temperature, critical, guessed, rackett_density_ratio, rackett_error
    )
    watson_error = np.where(guessed, WATSON_GUESS_ERROR, WATSON_ERROR)
    now["vaporization_enthalpy"] = _carried(
        now["vaporization_enthalpy"], temperature, critical, guessed, watson_ratio, watson_error
    )
    for name in _TABULATED:
        now[name] = _kept_if_near(now[name], temperature)

    def derive(name: str, function: Callable[..., ArrayLike], inputs: Sequence[str]) -> None:
        now[name] = _derived(now[name], function, [now[i] for i in inputs], temperature)

    derive("molar_volume", lambda m, rho: m / rho, ("molar_mass", "density"))
    derive("cohesive_energy", lambda h: cohesive_energy(h, temperature), ("vaporization_enthalpy",))
    derive("solubility_parameter", solubility_parameter, ("cohesive_energy", "molar_volume"))
    derive(
        "kirkwood_factor",
        lambda eps, n, volume, mu: kirkwood_factor(eps, n, volume, mu, temperature),
        ("permittivity", "refractive_index", "molar_volume", "dipole"),
    )
    now["c6"] = _dispersion(now, electrons)
    now["valence_electrons"] = _counted(now["valence_electrons"], electrons)
    return now


def _carried(
    column: Column,
    temperature: float,
    critical: Array,
    guessed: NDArray[np.bool_],
    rule: Callable[..., Array],
    error: Array,
) -> Column:
    """Carry a column to `temperature` by a ratio rule; missing where the rule cannot be used."""
    shift = temperature - column.temperature
    ratio = np.where(
        np.nan_to_num(shift) == 0, 1.0, rule(temperature, column.temperature, critical)
    )
    ratio = np.where(np.isnan(ratio) & (np.abs(shift) <= NEAR), 1.0, ratio)
    moved = column.si * (ratio - 1)
    used_rule = (ratio != 1.0) & ~np.isnan(column.si)
    kind, note = column.kind.copy(), column.note.copy()
    for row in np.flatnonzero(used_rule):
        if np.isnan(ratio[row]):
            note[row] = _away(column.temperature[row])
            continue
        weak = "derived" if abs(shift[row]) <= _BRIEF else "estimated"
        kind[row] = max(kind[row], weak, key=_WEAKNESS.index)
        note[row] = f"carried from {_celsius(column.temperature[row])}"
        if guessed[row]:
            note[row] += ", critical temperature taken as 1.5 times the boiling point"
    return Column(
        column.quantity,
        column.si * ratio,
        np.hypot(column.uncertainty * ratio, error * moved),
        np.where(np.isnan(column.temperature), np.nan, temperature),
        kind,
        column.source,
        note,
    )


def _kept_if_near(column: Column, temperature: float) -> Column:
    far = np.abs(column.temperature - temperature) > NEAR + 1e-9
    if not far.any():
        return column
    note = column.note.copy()
    for row in np.flatnonzero(far & ~np.isnan(column.si)):
        note[row] = _away(column.temperature[row])
    return Column(
        column.quantity,
        np.where(far, np.nan, column.si),
        column.uncertainty,
        column.temperature,
        column.kind,
        column.source,
        note,
    )


def _derived(
    given: Column, function: Callable[..., ArrayLike], inputs: list[Column], temperature: float
) -> Column:
    """Fill `given` where it has no number of its own."""
    with np.errstate(invalid="ignore", divide="ignore"):
        si, spread = propagate(
            function, [c.si for c in inputs], [np.nan_to_num(c.uncertainty) for c in inputs]
        )
    own = ~np.isnan(given.si)
    origin = "from " + ", ".join(c.quantity.name for c in inputs)
    present = ~np.isnan(si)
    return Column(
        given.quantity,
        np.where(own, given.si, si),
        np.where(own, given.uncertainty, spread),
        np.where(own, given.temperature, np.where(present, temperature, np.nan)),
        np.where(own, given.kind, np.where(present, _weakest(inputs), "")),
        np.where(own, given.source, np.where(present, origin, "")),
        np.where(own | present, given.note, _why_missing(inputs)),
    )


def _why_missing(inputs: list[Column]) -> Words:
    """Return, row by row, which inputs are missing and why."""
    words = np.full(inputs[0].si.size, "", dtype=object)
    for column in inputs:
        for row in np.flatnonzero(np.isnan(column.si)):
            reason = f" ({column.note[row]})" if column.note[row] else ""
            comma = ", " if words[row] else ""
            words[row] += f"{comma}no {column.quantity.name.replace('_', ' ')}{reason}"
    return words


def _dispersion(now: Columns, electrons: Array) -> Column:
    """Return the column of like-pair C6 by the default model, its spread included."""
    alpha, ionization = now["polarizability"], now["ionization_energy"]
    column = _derived(
        now["c6"],
        lambda a, i: dispersion_c6(a, a, i, i, electrons, electrons),
        [alpha, ionization],
        np.nan,
    )
    model = model_uncertainty(
        london_c6(alpha.si, alpha.si, ionization.si, ionization.si),
        slater_kirkwood_c6(alpha.si, alpha.si, electrons, electrons),
    )
    worked_out = np.isnan(now["c6"].si) & ~np.isnan(column.si)
    spread = np.hypot(column.uncertainty, model * column.si)
    column.uncertainty[worked_out] = spread[worked_out]
    inputs = {
        (True, True): "from polarizability, ionization_energy, valence electrons",
        (False, True): "from polarizability, valence electrons",
        (True, False): "from polarizability, ionization_energy",
    }
    for row in np.flatnonzero(worked_out):
        known = bool(~np.isnan(ionization.si[row])), bool(~np.isnan(electrons[row]))
        column.source[row] = inputs[known]
    return column


def _counted(column: Column, electrons: Array) -> Column:
    """Return the column of valence electrons, exact numbers that follow from the formula."""
    known = ~np.isnan(electrons)
    return Column(
        column.quantity,
        electrons,
        np.where(known, 0.0, np.nan),
        column.temperature,
        np.where(known, "derived", ""),
        np.where(known, "from formula", ""),
        np.where(known, "", "no formula"),
    )


def _weakest(inputs: list[Column]) -> Words:
    """Return, row by row, the weakest kind among the inputs, at best `derived`."""
    rank = np.full(inputs[0].si.size, _WEAKNESS.index("derived"))
    for column in inputs:
        ranks = [_WEAKNESS.index(k) if k else 0 for k in column.kind]
        rank = np.maximum(rank, ranks)
    return np.array([_WEAKNESS[r] for r in rank], dtype=object)


def _away(kelvin: float) -> str:
    return f"tabulated at {_celsius(kelvin)} only"


def _celsius(kelvin: float) -> str:
    return f"{kelvin - 273.15:.4g} °C"

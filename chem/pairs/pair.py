"""Two liquids face to face: every term at one distance and temperature, with uncertainty."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Any

import numpy as np
from numpy.typing import NDArray

from stillroom.chem.data.constants import REFERENCE_TEMPERATURE
from stillroom.chem.data.propagation import propagate
from stillroom.chem.data.units import parse_distance, parse_temperature
from stillroom.chem.forces.contact import contact_distance
from stillroom.chem.forces.dispersion import (
    london_c6,
    model_uncertainty,
    model_used,
    slater_kirkwood_c6,
)
from stillroom.chem.liquids.liquid import Liquid
from stillroom.chem.pairs.reliability import Reason, judge
from stillroom.chem.pairs.terms import Molecule, PairTerms, pair_terms

FORCES = ("orientation", "induction", "dispersion")
_CONTACT_ERROR = 0.03
"""Relative standard uncertainty of a contact distance from molar volume: the spread between the
rule and the diffraction peaks named at `PACKING_FRACTION`, water left out (from memory)."""


@dataclass(frozen=True, slots=True)
class PairInteraction:
    """The interaction of `a` with `b`; energies in J/mol of pairs, negative when attractive.

    `terms` holds each energy, free energy and C6 as a 0-d array. `total_uncertainty` (J/mol) and
    `share_uncertainty` are standard uncertainties from all inputs, the choice of dispersion model
    and, where the distance follows from molar volume, the contact rule.
    """

    a: Liquid
    b: Liquid
    temperature: float
    distance: float
    distance_basis: str
    model: str
    terms: PairTerms
    total_uncertainty: float
    share_uncertainty: dict[str, float]
    verdict: str
    reasons: tuple[Reason, ...]

    @property
    def shares(self) -> dict[str, float]:
        """Share of each force in the total internal energy."""
        return {f: float(s) for f, s in zip(FORCES, self.terms.shares, strict=True)}

    @property
    def geometric_mean_departure(self) -> float:
        """Unlike dispersion C6 over the geometric mean of the like ones, minus 1.

        Negative values favour demixing; what it leaves out when one ionization energy is missing
        is small against its own size.
        """
        a, b = _molecule(self.a), _molecule(self.b)
        like = [pair_terms(m, m, 1e-9, self.temperature, self.model).c6_dispersion for m in (a, b)]
        return float(self.terms.c6_dispersion / np.sqrt(like[0] * like[1]) - 1)

    def to_dict(self) -> dict[str, Any]:
        """Return plain numbers and texts, the keys of the command line's JSON; unit in each key."""
        t = self.terms

        def kj(energy: NDArray[np.float64]) -> float:
            return float(energy) / 1e3 + 0.0

        c6 = (t.c6_orientation, t.c6_induction, t.c6_dispersion)
        return {
            "a": {"id": self.a.id, "name": self.a.name},
            "b": {"id": self.b.id, "name": self.b.name},
            "temperature_K": self.temperature,
            "distance_nm": self.distance * 1e9,
            "distance_basis": self.distance_basis,
            "coupling": float(t.coupling),
            "orientation": {
                "energy_kJ_mol": kj(t.orientation),
                "free_energy_kJ_mol": kj(t.orientation_free),
                "leading_energy_kJ_mol": kj(t.leading),
                "leading_free_energy_kJ_mol": kj(t.leading_free),
                "aligned_energy_kJ_mol": kj(t.aligned),
            },
            "induction": {"energy_kJ_mol": kj(t.induction)},
            "dispersion": {
                "energy_kJ_mol": kj(t.dispersion),
                "model": self.model,
                "geometric_mean_departure": self.geometric_mean_departure,
            },
            "total": {
                "energy_kJ_mol": kj(t.total),
                "free_energy_kJ_mol": kj(t.total_free),
                "uncertainty_kJ_mol": self.total_uncertainty / 1e3,
            },
            "share": self.shares,
            "share_uncertainty": dict(self.share_uncertainty),
            "c6_1e-79_J_m6": {
                **{f: float(c) * 1e79 for f, c in zip(FORCES, c6, strict=True)},
                "total": float(sum(c6)) * 1e79,
            },
            "force_pN": float(t.force) * 1e12,
            "verdict": self.verdict,
            "leading_order_error": float(t.leading_order_error),
            "reasons": [{"code": r.code, "text": r.text, "value": r.value} for r in self.reasons],
        }


def interact(
    a: Liquid,
    b: Liquid,
    temperature: float | str = REFERENCE_TEMPERATURE,
    distance: float | str | None = None,
    dispersion: str = "auto",
) -> PairInteraction:
    """Return how one molecule of `a` and one of `b` attract each other.

    Parameters
    ----------
    a, b : Liquid
        From the shelf or your own.
    temperature : float or str
        K, or a text with a unit.
    distance : float or str, optional
        Centre to centre, in m or a text with a unit; contact by default.
    dispersion : str
        One of `stillroom.chem.forces.dispersion.MODELS`.

    Raises
    ------
    MissingValue
        If a dipole moment or polarizability is missing, or a molar volume when no distance is
        given, or the inputs of the dispersion model.
    OutsideRange, UnitMismatch, BadNumber
        If temperature, distance or model cannot be used.

    Notes
    -----
    Energies and shares are internal energies; `terms.orientation_free` and `terms.total_free` are
    free energies; at leading order orientation differs by the factor two between them.

    Examples
    --------
    >>> hcl = Liquid("hydrogen chloride", formula="HCl", dipole="1.08 D",
    ...              polarizability="2.63 angstrom**3", ionization_energy="12.7 eV")
    >>> pair = interact(hcl, hcl, temperature=293.0, distance="0.4 nm", dispersion="london")
    >>> print(f"{float(pair.terms.c6_dispersion):.3g}")
    1.06e-77
    """
    kelvin = parse_temperature(temperature)
    a, b = a.at(kelvin), b.at(kelvin)
    basis = "contact" if distance is None else "given"
    for liquid in (a, b):
        liquid.need("dipole", "orientation cannot be computed")
        liquid.need("polarizability", "dispersion cannot be computed")
    r = _contact(a, b) if distance is None else parse_distance(distance)
    model = _model(a, b, dispersion)
    terms = pair_terms(_molecule(a), _molecule(b), r, kelvin, model)
    total_u, share_u = _uncertainty(a, b, r, kelvin, model, contact=distance is None)
    verdict, reasons = judge(a, b, float(terms.coupling), float(terms.leading_order_error))
    return PairInteraction(a, b, kelvin, r, basis, model, terms, total_u, share_u, verdict, reasons)


def _contact(a: Liquid, b: Liquid) -> float:
    volumes = [x.need("molar_volume", "give a distance instead").si for x in (a, b)]
    return float(contact_distance(*volumes))


def pair_molecules(pair: PairInteraction) -> tuple[Molecule, Molecule]:
    """Return what the pair formulas need of both sides."""
    return _molecule(pair.a), _molecule(pair.b)


def _molecule(liquid: Liquid) -> Molecule:
    return Molecule(*_inputs(liquid), liquid.identity.electrons)


def _inputs(liquid: Liquid) -> tuple[float, float, float]:
    """Return dipole moment, polarizability and ionization energy in SI, NaN where missing."""
    values = (liquid.dipole, liquid.polarizability, liquid.ionization_energy)
    dipole, polarizability, ionization = (np.nan if v is None else v.si for v in values)
    return dipole, polarizability, ionization


def _model(a: Liquid, b: Liquid, wanted: str) -> str:
    """Return the dispersion model for a pair; complain if its inputs are missing."""
    ionization = a.ionization_energy is not None and b.ionization_energy is not None
    electrons = not np.isnan(a.identity.electrons + b.identity.electrons)
    model = model_used(ionization, electrons, wanted)
    for liquid in (a, b):
        if model in ("london", "geometric"):
            liquid.need("ionization_energy", f"the dispersion model '{model}' needs it")
        if model != "london" and np.isnan(liquid.identity.electrons):
            liquid.need("formula", f"the dispersion model '{model}' counts its valence electrons")
    return model


def _uncertainty(
    a: Liquid, b: Liquid, r: float, kelvin: float, model: str, *, contact: bool
) -> tuple[float, dict[str, float]]:
    """Propagate all inputs to the total (J/mol) and to each share, to first order.

    A like pair has one set of inputs, so each moves both sides at once.
    """
    same = a.same_as(b)
    sides = (a,) if same else (a, b)
    values: list[float] = []
    spreads: list[float] = []
    for liquid in sides:
        for name in ("dipole", "polarizability", "ionization_energy"):
            value = liquid.values.get(name)
            values.append(np.nan if value is None else value.si)
            spreads.append(0.0 if value is None else float(np.nan_to_num(value.si_uncertainty)))
    values += [r, 1.0]
    spreads += [r * _CONTACT_ERROR if contact else 0.0, _model_spread(a, b, model)]

    def terms(*x: float) -> tuple[NDArray[np.float64], Sequence[NDArray[np.float64]]]:
        first = Molecule(x[0], x[1], x[2], a.identity.electrons)
        second = first if same else Molecule(x[3], x[4], x[5], b.identity.electrons)
        t = pair_terms(first, second, x[-2], kelvin, model)
        dispersion = t.dispersion * x[-1]
        total = t.orientation + t.induction + dispersion
        return total, (t.orientation / total, t.induction / total, dispersion / total)

    def everything(*x: float) -> NDArray[np.float64]:
        total, shares = terms(*x)
        return np.array([total, *shares])

    _, u = propagate(everything, values, spreads)
    return float(u[0]), {f: float(s) for f, s in zip(FORCES, u[1:], strict=True)}


def _model_spread(a: Liquid, b: Liquid, model: str) -> float:
    """Return the relative standard uncertainty of the dispersion term that its model brings."""
    (_, alpha_a, i_a), (_, alpha_b, i_b) = _inputs(a), _inputs(b)
    london = london_c6(alpha_a, alpha_b, i_a, i_b)
    full = slater_kirkwood_c6(alpha_a, alpha_b, a.identity.electrons, b.identity.electrons)
    if model == "slater-kirkwood-effective":
        london = np.asarray(np.nan)
    return float(model_uncertainty(london, full))

"""A liquid: who it is, and its values with unit, kind, source and uncertainty."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field, replace

import numpy as np

from stillroom.chem.data.clean import clean_text
from stillroom.chem.data.constants import REFERENCE_TEMPERATURE
from stillroom.chem.data.errors import (
    MissingValue,
    OutsideRange,
    UnitMismatch,
    UnknownQuantity,
)
from stillroom.chem.data.quantities import QUANTITIES, near, quantity
from stillroom.chem.data.units import parse_temperature, parse_value
from stillroom.chem.data.values import Column, Columns, Value
from stillroom.chem.liquids.derived import state
from stillroom.chem.liquids.structure import Structure, valence_electrons


@dataclass(frozen=True, slots=True)
class Identity:
    """Names and structure of a liquid. `id` is the key used in files and on the command line."""

    id: str
    name: str
    synonyms: tuple[str, ...] = ()
    cas: str = ""
    smiles: str = ""
    inchikey: str = ""
    formula: str = ""
    family: str = ""
    structure: Structure = field(default_factory=Structure)

    @property
    def electrons(self) -> float:
        """Valence electrons, NaN if the formula is not known."""
        return valence_electrons(self.formula)


class Liquid:
    """One liquid at one temperature; quantities are attributes holding a `Value` or None.

    Parameters
    ----------
    name : str
        What to call it.
    formula, cas, smiles, family : str
        Identity as far as known; the formula gives the valence electrons.
    structure : Structure
        Facts on hydrogen bonds and shape that the verdict uses.
    temperature : float or str
        K, or a text with a unit.
    **quantities : str, float or Value
        Values by quantity name, as text with a unit (`dipole="1.85 D"`) or a number in the
        quantity's own unit. Kind `user` unless a `Value` says otherwise.

    Raises
    ------
    UnknownQuantity, BadNumber, UnitMismatch
        If a quantity's name or text cannot be read.
    OutsideRange
        If a number is beyond what is believable for its quantity.

    Examples
    --------
    >>> water = Liquid("water", formula="H2O", dipole="1.85 D", polarizability="1.45 angstrom**3")
    >>> print(water.dipole)
    1.85 D (user)
    """

    __slots__ = ("identity", "notes", "stored", "temperature", "values")

    identity: Identity
    stored: Columns
    temperature: float
    values: Mapping[str, Value]
    notes: Mapping[str, str]

    def __init__(
        self,
        name: str,
        *,
        formula: str = "",
        cas: str = "",
        smiles: str = "",
        family: str = "",
        structure: Structure | None = None,
        temperature: float | str = REFERENCE_TEMPERATURE,
        **quantities: str | float | Value,
    ) -> None:
        label = clean_text(name)
        identity = Identity(
            id=label.lower().replace(" ", "-"),
            name=label,
            cas=clean_text(cas),
            smiles=clean_text(smiles),
            formula=clean_text(formula),
            family=clean_text(family),
            structure=structure or Structure(),
        )
        stored = {q: Column.of(_user_value(q, given)) for q, given in quantities.items()}
        self._settle(identity, stored, parse_temperature(temperature))

    @classmethod
    def from_columns(cls, identity: Identity, stored: Columns, temperature: float) -> Liquid:
        """Make a liquid from stored columns of length 1."""
        liquid = cls.__new__(cls)
        liquid._settle(identity, stored, temperature)
        return liquid

    def _settle(self, identity: Identity, stored: Columns, temperature: float) -> None:
        now = state(stored, np.array([identity.electrons]), temperature)
        self.identity, self.stored, self.temperature = identity, stored, temperature
        found = {name: column.value(0) for name, column in now.items()}
        self.values = {name: value for name, value in found.items() if value is not None}
        # Why a quantity is missing, where there is a reason.
        self.notes = {n: c.note[0] for n, c in now.items() if found[n] is None and c.note[0]}

    def at(self, temperature: float | str) -> Liquid:
        """Return the same liquid at another temperature (K, or a text with a unit)."""
        kelvin = parse_temperature(temperature)
        if kelvin == self.temperature:
            return self
        return Liquid.from_columns(self.identity, self.stored, kelvin)

    def same_as(self, other: Liquid) -> bool:
        """Return whether both are one liquid: the same identity and the same tabulated numbers."""
        return self.identity == other.identity and (
            self.stored is other.stored
            or (
                self.stored.keys() == other.stored.keys()
                and all(
                    np.array_equal(mine, its, equal_nan=True)
                    for name, column in self.stored.items()
                    for mine, its in (
                        (column.si, other.stored[name].si),
                        (column.uncertainty, other.stored[name].uncertainty),
                    )
                )
            )
        )

    def __getattr__(self, name: str) -> Value | None:
        if name in QUANTITIES:
            return self.values.get(name)
        raise AttributeError(f"Liquid has no attribute or quantity '{name}'")

    def need(self, name: str, consequence: str = "") -> Value:
        """Return a value that must be there.

        Raises
        ------
        MissingValue
            If it is not.
        """
        value = self.values.get(name)
        if value is None:
            reasons = filter(None, (self.notes.get(name, ""), consequence))
            raise MissingValue(self.name, name, "; ".join(reasons))
        return value

    @property
    def id(self) -> str:
        """Key of the liquid in files and on the command line."""
        return self.identity.id

    @property
    def name(self) -> str:
        """What the trade calls it."""
        return self.identity.name

    def liquid_range(self) -> tuple[float, float]:
        """Return melting and normal boiling point in K, NaN where not known."""
        low, high = self.values.get("melting_point"), self.values.get("boiling_point")
        return (low.si if low else np.nan), (high.si if high else np.nan)

    def outside_liquid_range(self, tolerance: float = 1.0) -> str | None:
        """Return what the substance is at its temperature if not a liquid at 1 atm, else None."""
        low, high = self.liquid_range()
        t = self.temperature
        if t < low - tolerance:
            return f"below its melting point, {low - 273.15:.1f} °C"
        if t > high + tolerance:
            return f"above its boiling point, {high - 273.15:.1f} °C"
        return None

    def __repr__(self) -> str:
        return f"<Liquid {self.name} at {self.temperature:g} K, {len(self.values)} values>"


def _user_value(name: str, given: str | float | Value) -> Value:
    if name not in QUANTITIES:
        raise UnknownQuantity(name, near(name, QUANTITIES))
    q = quantity(name)
    if isinstance(given, Value):
        if given.quantity != name:
            raise UnitMismatch(given.quantity, name.replace("_", " "), q.unit_label or "a number")
        given = _in_own_unit(given)
        number = given.number
    else:
        number = q.from_si(parse_value(given, q)) if isinstance(given, str) else float(given)
    if not q.low <= number <= q.high:
        raise OutsideRange(
            name.replace("_", " "),
            f"{number:g}",
            f"{q.low:g} to {q.high:g} {q.unit_label}".rstrip(),
        )
    return given if isinstance(given, Value) else Value(name, number, q.unit, "user", "user", 0.0)


def _in_own_unit(given: Value) -> Value:
    """Return the value with number and uncertainty in the unit of its quantity."""
    q = given.definition
    if given.unit in ("", q.unit):
        return given

    def own(number: float) -> float:
        return q.from_si(parse_value(f"{number!r} {given.unit}", q))

    number = own(given.number)
    scale = own(given.number + 1) - number  # so that degF spreads shrink without their offset
    return replace(given, number=number, unit=q.unit, uncertainty=given.uncertainty * scale)

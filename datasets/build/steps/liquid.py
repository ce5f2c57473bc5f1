"""A liquid during the build: identity and the temperature at which its properties are wanted."""

from __future__ import annotations

from dataclasses import dataclass

from steps.candidate import Candidate

ROOM = 298.15


@dataclass(frozen=True, slots=True)
class Liquid:
    """Identity of a chosen liquid; `temperature` in K (25 C, or just above melting for a melt)."""

    id: str
    cas: str
    name: str
    family: str
    formula: str
    molar_mass: float
    state: str
    melting: float | None
    temperature: float

    def value(
        self,
        quantity: str,
        value: float,
        temperature: float | None,
        kind: str,
        source: str,
        uncertainty: float,
        note: str = "",
    ) -> Candidate:
        """Make a candidate value of this liquid."""
        return Candidate(self.id, quantity, value, temperature, kind, source, uncertainty, note)

    def covers(self, low: float, high: float, temperature: float | None = None) -> bool:
        """Whether a correlation's range in K holds the wanted temperature."""
        wanted = self.temperature if temperature is None else temperature
        return low - 0.01 <= wanted <= high + 0.01

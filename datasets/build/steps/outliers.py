"""Set aside tabulated values that stand alone against two or more others, or are too far away.

A value further from the median than the limit of its quantity is set aside when at least two
independent sources stay within that limit. It remains in the table, marked, and out of use. Values
named by a curated decision are never touched.
"""

from __future__ import annotations

from statistics import median

from steps.candidate import Candidate

# Limits: in the unit of the quantity where the first item is given, else a fraction of the median.
LIMITS: dict[str, tuple[float | None, float]] = {
    "melting_point": (10.0, 0.0),
    "boiling_point": (6.0, 0.0),
    "critical_temperature": (12.0, 0.0),
    "flash_point": (15.0, 0.0),
    "log_p": (0.6, 0.0),
    "density": (None, 0.02),
    "vaporization_enthalpy": (None, 0.08),
    "vapor_pressure": (None, 0.30),
    "viscosity": (None, 0.40),
    "surface_tension": (None, 0.08),
}


FARTHEST = 10.0
"""Kelvin between the wanted temperature and the farthest value that may be preferred."""

_FOLLOWS_TEMPERATURE = {
    "density",
    "permittivity",
    "vaporization_enthalpy",
    "vapor_pressure",
    "viscosity",
    "surface_tension",
}


def too_far(candidates: list[Candidate], wanted: float) -> list[Candidate]:
    """Mark values measured far from the wanted temperature (K): kept for information only."""
    return [
        c.change(rejected=True, note=f"not used: {abs(c.temperature - wanted):.0f} K away")
        if c.quantity in _FOLLOWS_TEMPERATURE
        and c.temperature is not None
        and abs(c.temperature - wanted) > FARTHEST
        and not c.chosen_by_hand
        else c
        for c in candidates
    ]


def set_aside(candidates: list[Candidate]) -> list[Candidate]:
    """Return the candidates of one quantity with lonely ones marked as rejected."""
    if not candidates or candidates[0].quantity not in LIMITS:
        return candidates
    fixed, fraction = LIMITS[candidates[0].quantity]
    voters = [c for c in candidates if _votes(c, candidates)]
    if len(voters) < 3:
        return candidates
    middle = median(c.value for c in voters)
    limit = fixed if fixed is not None else fraction * abs(middle)
    near = [c for c in voters if abs(c.value - middle) <= limit]
    if len(near) < 2:
        return candidates
    others = ", ".join(f"{c.source} {c.value:.4g}" for c in near)
    return [
        c.change(rejected=True, note=f"not used: stands alone against {others}")
        if c in voters and c not in near
        else c
        for c in candidates
    ]


def _votes(candidate: Candidate, everyone: list[Candidate]) -> bool:
    """Whether a value takes part: accepted, not chosen by hand, at the commonest temperature."""
    if candidate.rejected or candidate.chosen_by_hand or candidate.kind == "estimated":
        return False
    if candidate.temperature is None:
        return True
    temperatures = [c.temperature for c in everyone]
    return candidate.temperature == max(temperatures, key=temperatures.count)

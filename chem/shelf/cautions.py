"""The caution line of a liquid: what is known to be dangerous, and who has the last word."""

from __future__ import annotations

from collections.abc import Sequence

from stillroom.chem.shelf.tables import Hazard

DEFER = "Follow the safety data sheet, local codes and licensed practice."
UNKNOWN = "No hazard is recorded here: that means not known here, never safe."


def caution_line(hazards: Sequence[Hazard]) -> str:
    """Return one line naming the known hazards and deferring to the safety data sheet."""
    if not hazards:
        return f"{UNKNOWN} {DEFER}"
    known = "; ".join(f"{h.hazard} ({h.detail})" if h.detail else h.hazard for h in hazards)
    return f"Caution: {known}. More may apply. {DEFER}"

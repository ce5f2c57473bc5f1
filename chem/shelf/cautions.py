"""The caution lines of a liquid: what is known to be dangerous, and who has the last word."""

from __future__ import annotations

from collections.abc import Sequence

from stillroom.chem.data.values import Value
from stillroom.chem.liquids.liquid import Liquid
from stillroom.chem.shelf.tables import Hazard

DEFER = "Follow the safety data sheet, local codes and licensed practice."
UNKNOWN = "No hazard is recorded here: that means not known here, never safe."
LIMITS_DEFER = "The safety data sheet and local limits decide."


def caution_line(hazards: Sequence[Hazard]) -> str:
    """Return one line naming the known hazards and deferring to the safety data sheet."""
    if not hazards:
        return f"{UNKNOWN} {DEFER}"
    known = "; ".join(f"{h.hazard} ({h.detail})" if h.detail else h.hazard for h in hazards)
    # Who has the last word stands first: a screen may have to cut the end off.
    return f"Caution ({DEFER[0].lower()}{DEFER[1:-1]}; more may apply): {known}"


def limits_line(liquid: Liquid) -> str:
    """Return the known limits of exposure and flammability in at most 160 characters.

    Empty if none is known here, which does not mean that there is none.
    """
    values = liquid.values
    known = []
    exposure = values.get("exposure_limit")
    if exposure is not None:
        known.append(f"8 h average {exposure.number:.3g} ppm (Ontario)")
    low, high = values.get("lower_flammability_limit"), values.get("upper_flammability_limit")
    if low is not None or high is not None:
        known.append(f"burns in air at {_plain(low)} to {_plain(high)} % by volume")
    ignition = values.get("autoignition_temperature")
    if ignition is not None:
        known.append(f"ignites by itself at {ignition.number:.0f} °C")
    return f"Limits: {'; '.join(known)}. {LIMITS_DEFER}" if known else ""


def _plain(value: Value | None) -> str:
    return "?" if value is None else f"{value.number:.3g}"

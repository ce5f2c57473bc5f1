"""Numbers and names as they are printed, the same on the command line and on the screens."""

from __future__ import annotations

import math

from stillroom.chem.data.constants import ZERO_CELSIUS
from stillroom.chem.data.quantities import Quantity
from stillroom.chem.data.values import KIND_MARKS, Value

MISSING = "-"
VERDICT_MARKS = {"sound": "+", "strained": "!", "unreliable": "x"}
"""One character per verdict, so that it reads without colour."""


def number(value: float, decimals: int) -> str:
    """Return a fixed-point number, `-` if it is NaN, never a negative zero."""
    if math.isnan(value):
        return MISSING
    text = f"{value:.{decimals}f}"
    return text.removeprefix("-") if float(text) == 0 else text


def cell(value: Value | None, quantity: Quantity) -> str:
    """Return a value as a table cell: number and the mark of its kind."""
    if value is None:
        return MISSING
    return number(value.number, quantity.decimals) + KIND_MARKS[value.kind]


def with_uncertainty(value: Value) -> str:
    """Return `2.88 ± 0.03 D`, the uncertainty to one or two digits, the number to match."""
    q = value.definition
    unit = f" {q.unit_label}" if q.unit_label else ""
    u = value.uncertainty
    if math.isnan(u) or u <= 0:
        return f"{number(value.number, q.decimals)}{unit}"
    digits = max(0, min(6, 1 - math.floor(math.log10(u))))
    if float(f"{u:.0e}"[0]) > 2:  # one digit is enough for 0.03, two for 0.012
        digits = max(0, digits - 1)
    return f"{value.number:.{digits}f} ± {u:.{digits}f}{unit}"


def celsius(kelvin: float | None) -> str:
    """Return a temperature in degrees Celsius, empty if it has no meaning."""
    return "" if kelvin is None else f"{kelvin - ZERO_CELSIUS:.4g} °C"


def share(value: float) -> str:
    """Return a share as whole percent."""
    return MISSING if math.isnan(value) else f"{100 * value:.0f} %"


def quantity_words(name: str) -> str:
    """Return a quantity's name as words."""
    return name.replace("_", " ")

"""Text such as `"1.85 D"` or `"25 degC"` turned into SI numbers; the only place that knows Pint.

Pint is imported when the first text with an unusual unit is read: the units a quantity is normally
written in are recognised without it.
"""

from __future__ import annotations

import math
import re
from functools import cache
from typing import TYPE_CHECKING, Any

from stillroom.chem.data.constants import ZERO_CELSIUS
from stillroom.chem.data.errors import BadNumber, OutsideRange, UnitMismatch
from stillroom.chem.data.quantities import Quantity

if TYPE_CHECKING:
    import pint

_NUMBER = re.compile(r"\s*([+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?)\s*(.*?)\s*$", re.DOTALL)
_ALIASES = {
    "": "",
    "°C": "degC",
    "C": "degC",
    "D": "debye",
    "Å³": "angstrom**3",
    "A3": "angstrom**3",
}
_MAX_TEXT = 80  # longer than any number with a unit; keeps hostile input away from the parser
# Pint works out every power it reads, so `9**9**9` would hang the program: a power is one small
# number, never on another power, and no other number than 1 stands in a unit.
_POWER = re.compile(
    r"(?:\*\*|\^)\s*(?:\(\s*[+-]?\d{1,2}(?:\.\d+|\s*/\s*\d)?\s*\)|[+-]?\d{0,2}(?:\.\d{1,3})?)(?![\w.])"
)
_RAISED = str.maketrans("⁰¹²³⁴⁵⁶⁷⁸⁹⁻", "0123456789-")
_UNREADABLE = re.compile(r"\*\*|\^|@\s*@|(?<![\w.])(?!1\b)[\d.]|\(.*\(.*\(", re.DOTALL)


@cache
def registry() -> pint.UnitRegistry[Any]:
    """Return the one Pint registry of the program."""
    import pint

    return pint.UnitRegistry(cache_folder=None)


def split_number(text: str, what: str, expected: str) -> tuple[float, str]:
    """Split `"12.5 kJ/mol"` into 12.5 and `"kJ/mol"`.

    Raises
    ------
    BadNumber
        If `text` does not start with a finite number, or is longer than any value with a unit.
    """
    match = _NUMBER.match(text) if len(text) <= _MAX_TEXT else None
    if match is None or not math.isfinite(float(match[1])):
        raise BadNumber(text[:_MAX_TEXT], what, expected)
    unit = match[2].strip()
    return float(match[1]), _ALIASES.get(unit, unit)


def readable(unit: str) -> bool:
    """Return whether Pint can be given a unit that somebody typed without hanging on it."""
    return _UNREADABLE.search(_POWER.sub("@", _written_out(unit))) is None


def _written_out(unit: str) -> str:
    return re.sub("[⁰¹²³⁴⁵⁶⁷⁸⁹⁻]+", lambda m: "**" + m[0].translate(_RAISED), unit)


def convert(number: float, unit: str, target: str) -> float | None:
    """Convert with Pint; None if the units are unknown or do not belong to the same dimension."""
    plain = _written_out(unit)
    if not readable(unit):
        return None
    ureg = registry()
    try:
        return float(ureg.Quantity(number, plain).to(target).magnitude)
    except Exception:  # Pint's parser lets many kinds of error through on arbitrary text
        return None


def parse_value(text: str, quantity: Quantity) -> float:
    """Read a value of `quantity`, with or without a unit, and return it in SI.

    A bare number is taken in the quantity's own unit.

    Raises
    ------
    BadNumber
        If the text is not a number, or one too large for this machine in SI.
    UnitMismatch
        If the unit is unknown or of another kind.

    Examples
    --------
    >>> from stillroom.chem.data.quantities import quantity
    >>> round(parse_value("80 degF", quantity("flash_point")), 2)
    299.82
    """
    what = quantity.name.replace("_", " ")
    expected = quantity.unit_label or "a plain number"
    number, unit = split_number(
        text, what, f"a number with {expected}" if quantity.unit else expected
    )
    si = _in_si(number, unit, quantity)
    if si is None:
        raise UnitMismatch(text, what, expected)
    if not math.isfinite(si):
        raise BadNumber(text, what, "a number this machine can hold")
    return si


def _in_si(number: float, unit: str, quantity: Quantity) -> float | None:
    """Return the number in SI, None if the unit does not fit the quantity."""
    if unit in ("", quantity.unit, quantity.unit_label):
        return quantity.to_si(number)
    own = convert(number, unit, quantity.unit or "dimensionless")
    if own is not None:
        return quantity.to_si(own)
    for other, factor in quantity.also:
        value = convert(number, unit, other)
        if value is not None:
            return value * factor
    return None


def parse_temperature(text: str | float) -> float:
    """Read a temperature (`"25 degC"`, `"298.15 K"`, `"77 degF"`; a bare number is kelvin) in K.

    Raises
    ------
    BadNumber, UnitMismatch
        If the text is not a temperature.
    OutsideRange
        If it is not above absolute zero or beyond 2000 K.
    """
    if isinstance(text, str):
        number, unit = split_number(text, "temperature", "a number with degC or K")
        if unit in ("", "K", "kelvin"):
            kelvin = number
        elif unit == "degC":
            kelvin = number + ZERO_CELSIUS
        else:
            converted = convert(number, unit, "kelvin")
            if converted is None:
                raise UnitMismatch(text, "temperature", "degC or K")
            kelvin = converted
    else:
        kelvin = float(text)
    if not 0.0 < kelvin <= 2000.0:
        shown = text if isinstance(text, str) else f"{text} K"
        raise OutsideRange("temperature", shown, "above absolute zero (0 K) and at most 2000 K")
    return kelvin


def parse_distance(text: str | float) -> float:
    """Read a distance (`"0.5 nm"`, `"5 angstrom"`; a bare number in a text is nm, a float m) in m.

    Raises
    ------
    BadNumber, UnitMismatch
        If the text is not a distance.
    OutsideRange
        If it is not between 0.1 nm and 1000 nm: below, no two molecules fit; zero and negative
        distances mean nothing.
    """
    if isinstance(text, str):
        number, unit = split_number(text, "distance", "a number with nm or angstrom")
        metres = number * 1e-9 if unit in ("", "nm") else convert(number, unit, "meter")
        if metres is None:
            raise UnitMismatch(text, "distance", "nm or angstrom")
    else:
        metres = float(text)
    if not 0.999e-10 <= metres <= 1.001e-6:
        shown = text if isinstance(text, str) else f"{metres * 1e9:g} nm"
        raise OutsideRange("distance", shown, "0.1 nm to 1000 nm, centre to centre")
    return metres

"""What several sub-commands need: shared options, the shelf, and the rule on liquid ranges."""

from __future__ import annotations

import argparse
import re
from collections.abc import Sequence
from pathlib import Path

from stillroom.chem.data.constants import REFERENCE_TEMPERATURE
from stillroom.chem.data.errors import OutsideRange
from stillroom.chem.data.units import parse_temperature
from stillroom.chem.liquids.liquid import Liquid
from stillroom.chem.shelf.shelf import Shelf, load_shelf
from stillroom.tui.output import FORMATS

STORE_HELP = "the file that keeps shortlists and notes (default: the user data folder)"


def add_common(parser: argparse.ArgumentParser, *, temperature: bool = True) -> None:
    """Add the options that every sub-command shares."""
    parser.add_argument("--format", choices=FORMATS, default="text", help="how to print")
    parser.add_argument(
        "--store", type=Path, metavar="PATH", default=argparse.SUPPRESS, help=STORE_HELP
    )
    if temperature:
        parser.add_argument(
            "--temperature",
            metavar="T",
            default=argparse.SUPPRESS,
            help='such as "40 degC" or "313 K" (default 25 degC)',
        )


def join_negative_values(words: Sequence[str]) -> list[str]:
    """Return the words with `--temperature -40degC` joined by `=`; it would read as an option."""
    joined: list[str] = []
    for word in words:
        if joined and joined[-1] in ("--temperature", "--distance") and re.match(r"-[\d.]", word):
            joined[-1] += f"={word}"
        else:
            joined.append(word)
    return joined


def temperature_of(args: argparse.Namespace) -> float:
    """Return the temperature asked for, in K."""
    text = getattr(args, "temperature", None)
    return REFERENCE_TEMPERATURE if text is None else parse_temperature(text)


def shelf_of(args: argparse.Namespace) -> Shelf:
    """Return the shipped shelf at the temperature asked for."""
    return load_shelf(temperature=temperature_of(args))


def add_beyond_range(parser: argparse.ArgumentParser) -> None:
    """Add the option that lifts the check of `require_liquid`."""
    parser.add_argument(
        "--beyond-range",
        action="store_true",
        help="compute even where a liquid is frozen or boils; the verdict says so",
    )


def require_liquid(liquid: Liquid, args: argparse.Namespace) -> None:
    """Refuse a temperature at which `liquid` is not liquid at 1 atm.

    The reference temperature of the table, 25 degC, is never refused: melts such as ethylene
    carbonate are on the shelf, and their verdict says that they are frozen there.

    Raises
    ------
    OutsideRange
        Unless `--beyond-range` is given.
    """
    problem = liquid.outside_liquid_range()
    if problem is None or args.beyond_range or liquid.temperature == REFERENCE_TEMPERATURE:
        return
    low, high = liquid.liquid_range()
    raise OutsideRange(
        f"{liquid.name} at",
        f"{liquid.temperature - 273.15:.1f} °C",
        f"its liquid range, {low - 273.15:.1f} to {high - 273.15:.1f} °C at 1 atm "
        "(or --beyond-range)",
    )

"""`stillroom show`: the sheet of one liquid."""

from __future__ import annotations

import argparse
from collections.abc import Iterator
from typing import Any

from stillroom.chem.data.errors import MissingValue
from stillroom.chem.data.quantities import QUANTITIES
from stillroom.chem.liquids.gaps import gaps
from stillroom.chem.liquids.liquid import Liquid
from stillroom.chem.pairs.pair import PairInteraction, interact
from stillroom.chem.shelf.cautions import caution_line, limits_line
from stillroom.chem.shelf.shelf import Shelf
from stillroom.tui.commands.common import (
    add_beyond_range,
    add_common,
    require_liquid,
    shelf_of,
)
from stillroom.tui.exits import OK
from stillroom.tui.formatting import celsius, quantity_words, share, with_uncertainty
from stillroom.tui.output import aligned, write_record, write_text


def register(commands: argparse._SubParsersAction[argparse.ArgumentParser]) -> None:
    """Add the sub-command."""
    parser = commands.add_parser(
        "show",
        help="all about one liquid",
        description="Print every value of a liquid with unit, temperature, kind, source and "
        "standard uncertainty; its shares; what is missing; the cautions.",
        allow_abbrev=False,
    )
    parser.add_argument("liquid", help="name, synonym, CAS number or unique formula")
    parser.add_argument("--all", action="store_true", help="also values of sources not preferred")
    add_beyond_range(parser)
    add_common(parser)
    parser.set_defaults(run=run)


def run(args: argparse.Namespace) -> int:
    """Print the sheet."""
    shelf = shelf_of(args)
    liquid = shelf[args.liquid]
    require_liquid(liquid, args)
    if args.format == "text":
        for line in sheet_lines(shelf, liquid, every=args.all):
            write_text(line)
    else:
        write_record(args.format, sheet_record(shelf, liquid, every=args.all))
    return OK


def like_pair(liquid: Liquid) -> PairInteraction | None:
    """Return the liquid with itself at contact, None if a value is missing."""
    try:
        return interact(liquid, liquid, liquid.temperature)
    except MissingValue:
        return None


def sheet_record(shelf: Shelf, liquid: Liquid, *, every: bool = False) -> dict[str, Any]:
    """Return the sheet as plain data, the unit in each key or beside each value."""
    who = liquid.identity
    pair = like_pair(liquid)
    record: dict[str, Any] = {
        "id": who.id,
        "name": who.name,
        "synonyms": list(who.synonyms),
        "cas": who.cas,
        "smiles": who.smiles,
        "inchikey": who.inchikey,
        "formula": who.formula,
        "family": who.family,
        "temperature_K": liquid.temperature,
        "values": {
            QUANTITIES[name].column: {
                "value": value.number,
                "uncertainty": value.uncertainty,
                "unit": value.unit,
                "temperature_K": value.temperature,
                "kind": value.kind,
                "source": value.source,
                "note": value.note,
            }
            for name, value in liquid.values.items()
        },
        "like_pair": None if pair is None else pair.to_dict(),
        "missing": {QUANTITIES[name].column: why for name, why in gaps(liquid)},
        "hazards": [
            {"hazard": h.hazard, "detail": h.detail, "source": h.source}
            for h in shelf.hazards.get(who.id, ())
        ],
        "caution": caution_line(shelf.hazards.get(who.id, ())),
        "limits": limits_line(liquid),
    }
    if every:
        record["tabulated"] = [
            {
                "quantity": r.value.quantity,
                "value": r.value.number,
                "uncertainty": r.value.uncertainty,
                "unit": r.value.unit,
                "temperature_K": r.value.temperature,
                "kind": r.value.kind,
                "source": r.value.source,
                "preferred": r.preferred,
                "note": r.value.note,
            }
            for r in shelf.records(who.id)
        ]
    return record


def sheet_lines(shelf: Shelf, liquid: Liquid, *, every: bool = False) -> Iterator[str]:
    """Yield the sheet as text."""
    who = liquid.identity
    yield f"{who.name}   {who.formula}   CAS {who.cas}   {who.family}"
    if who.synonyms:
        yield f"also: {', '.join(who.synonyms)}"
    yield f"SMILES {who.smiles}   at {celsius(liquid.temperature)}"
    outside = liquid.outside_liquid_range()
    if outside:
        yield f"NOTE: not a liquid at this temperature and 1 atm: {outside}"
    yield ""
    rows = [
        [value.definition.label, with_uncertainty(value), celsius(value.temperature), value.kind,
         value.source, value.note]
        for value in liquid.values.values()
    ]  # fmt: skip
    yield from aligned(["quantity", "value ± standard uncertainty", "at", "kind", "source", "note"],
                       rows)  # fmt: skip
    yield ""
    yield from like_lines(liquid)
    missing = gaps(liquid)
    if missing:
        yield ""
        yield "Missing here:"
        yield from (f"  {quantity_words(n)}{': ' + why if why else ''}" for n, why in missing)
    if every:
        yield ""
        yield "All tabulated values (* preferred):"
        yield from aligned(
            ["", "quantity", "value", "at", "kind", "source", "note"],
            [
                ["*" if r.preferred else " ", quantity_words(r.value.quantity),
                 with_uncertainty(r.value), celsius(r.value.temperature), r.value.kind,
                 r.value.source, r.value.note]
                for r in shelf.records(who.id)
            ],
        )  # fmt: skip
    yield ""
    yield caution_line(shelf.hazards.get(who.id, ()))
    limits = limits_line(liquid)
    if limits:
        yield limits


def like_lines(liquid: Liquid) -> Iterator[str]:
    """Yield what holds two molecules of the liquid together, in three lines."""
    pair = like_pair(liquid)
    if pair is None:
        yield "Like pair: dipole moment, polarizability or molar volume is missing."
        return
    shares, u = pair.shares, pair.share_uncertainty
    parts = ", ".join(f"{f} {share(shares[f])} ± {100 * u[f]:.0f}" for f in shares)
    yield f"Like pair at contact ({pair.distance * 1e9:.3f} nm, internal energy): {parts}"
    yield (
        f"Total {float(pair.terms.total) / 1e3:.2f} ± {pair.total_uncertainty / 1e3:.2f} kJ/mol "
        f"of pairs; verdict on the freely rotating average: {pair.verdict}"
    )
    yield from (f"  - {reason.text}" for reason in pair.reasons)

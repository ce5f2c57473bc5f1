"""`stillroom sources`: where the numbers come from."""

from __future__ import annotations

import argparse
from collections import Counter

from stillroom.chem.data.errors import UnknownLiquid
from stillroom.chem.shelf.shelf import Shelf
from stillroom.chem.shelf.tables import Source
from stillroom.tui.commands.common import add_common, shelf_of
from stillroom.tui.exits import OK
from stillroom.tui.output import write_table, write_text


def register(commands: argparse._SubParsersAction[argparse.ArgumentParser]) -> None:
    """Add the sub-command."""
    parser = commands.add_parser(
        "sources",
        help="where the numbers come from",
        description="Print the citations behind the values: all of them, those of one liquid, or "
        "one by its key.",
        allow_abbrev=False,
    )
    parser.add_argument("of", nargs="?", metavar="KEY|LIQUID", help="a source key or a liquid")
    add_common(parser, temperature=False)
    parser.set_defaults(run=run)


def run(args: argparse.Namespace) -> int:
    """Print the citations."""
    shelf = shelf_of(args)
    counts = Counter(r.value.source for who in shelf.identities for r in shelf.records(who.id))
    chosen = _chosen(shelf, args.of)
    if args.format == "text":
        for source in chosen:
            write_text(f"{source.key}  ({counts[source.key]} values)")
            write_text(f"    {source.full}")
            if source.note:
                write_text(f"    {source.note}")
        return OK
    write_table(
        args.format,
        ["key", "citation", "year", "doi", "isbn", "note", "values"],
        [[s.key, s.citation, s.year, s.doi, s.isbn, s.note, counts[s.key]] for s in chosen],
    )
    return OK


def _chosen(shelf: Shelf, of: str | None) -> list[Source]:
    sources = shelf.sources
    if of is None:
        return list(sources.values())
    if of in sources:
        return [sources[of]]
    try:
        liquid = shelf[of]
    except UnknownLiquid as problem:
        raise UnknownLiquid(of, [*problem.suggestions, *_near_keys(shelf, of)][:3]) from None
    used = {r.value.source for r in shelf.records(liquid.id)}
    used |= {h.source for h in shelf.hazards.get(liquid.id, ())}
    return [s for key, s in sources.items() if key in used]


def _near_keys(shelf: Shelf, text: str) -> list[str]:
    from stillroom.chem.data.quantities import near

    return near(text, shelf.sources)

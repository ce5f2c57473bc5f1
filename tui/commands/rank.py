"""`stillroom rank`: pairs in order of what you ask for."""

from __future__ import annotations

import argparse
import sys

from stillroom.chem.forces.dispersion import MODELS
from stillroom.chem.pairs.ranking import KEYS, Ranking, rank
from stillroom.chem.pairs.verdicts import VerdictBook
from stillroom.chem.shelf.shelf import Shelf
from stillroom.tui.commands.common import (
    add_beyond_range,
    add_common,
    require_liquid,
    shelf_of,
)
from stillroom.tui.commands.list import WHERE_HELP
from stillroom.tui.exits import NO_RESULT, OK
from stillroom.tui.formatting import celsius, number, share
from stillroom.tui.output import Cell, write_table

_SHOWN = {
    "total_energy_kJ_mol": ("total kJ/mol", 2),
    "orientation_share": ("orient", None),
    "induction_share": ("induct", None),
    "dispersion_share": ("disp", None),
    "interchange_energy_kJ_mol": ("interchange kJ/mol", 3),
    "coupling": ("x", 2),
    "leading_order_error": ("lead error", None),
}


def register(commands: argparse._SubParsersAction[argparse.ArgumentParser]) -> None:
    """Add the sub-command."""
    parser = commands.add_parser(
        "rank",
        help="pairs in order of energy, share, interchange or coupling",
        description="Rank all pairs of the shelf, or one liquid against the rest, each at contact.",
        epilog="Keys: "
        + "; ".join(
            f"{name}: {key.meaning}, {'largest' if key.largest_first else 'smallest'} first"
            for name, key in KEYS.items()
        )
        + ". Ties keep the order of the table.",
        allow_abbrev=False,
    )
    parser.add_argument("--where", default="", metavar="EXPR", help=WHERE_HELP)
    parser.add_argument("--with", dest="partner", metavar="LIQUID", help="one side of every pair")
    parser.add_argument("--by", default="total", metavar="KEY", help=" | ".join(KEYS))
    parser.add_argument("--top", type=int, default=20, metavar="N", help="rows (default 20)")
    order = parser.add_mutually_exclusive_group()
    order.add_argument("--ascending", action="store_true", default=None, help="smallest first")
    order.add_argument("--descending", dest="ascending", action="store_false", help="largest first")
    parser.add_argument(
        "--unlike", action="store_true", help="leave out like pairs (always so with interchange)"
    )
    parser.add_argument("--model", choices=MODELS, default="auto", help="dispersion model")
    add_beyond_range(parser)
    add_common(parser)
    parser.set_defaults(run=run)


def run(args: argparse.Namespace) -> int:
    """Print the ranking."""
    shelf = shelf_of(args)
    partner = None
    if args.partner is not None:
        partner = shelf.row(args.partner)
        require_liquid(shelf.liquid(partner), args)
    ranking = rank(
        shelf,
        args.by,
        top=args.top,
        rows=shelf.where(args.where),
        partner=partner,
        like=False if args.unlike else None,
        ascending=args.ascending,
        model=args.model,
    )
    _write(args.format, shelf, ranking)
    if ranking.left_out.size:
        names = ", ".join(shelf.identities[r].name for r in ranking.left_out[:5])
        more = f" and {ranking.left_out.size - 5} more" if ranking.left_out.size > 5 else ""
        sys.stderr.write(
            f"left out, no dipole moment, polarizability or molar volume: {names}{more}\n"
        )
    return OK if len(ranking) else NO_RESULT


def _write(format_: str, shelf: Shelf, ranking: Ranking) -> None:
    columns = ranking.columns
    verdicts = VerdictBook(shelf).verdicts(ranking.a, ranking.b, columns["leading_order_error"])
    names = ["a", "b", "a_id", "b_id", *columns, "verdict", "temperature_K"]
    who = shelf.identities
    rows: list[list[Cell]] = []
    shown: list[list[str]] = []
    for i, (a, b) in enumerate(zip(ranking.a, ranking.b, strict=True)):
        rows.append(
            [who[a].name, who[b].name, who[a].id, who[b].id]
            + [float(c[i]) for c in columns.values()]
            + [verdicts[i], ranking.temperature]
        )
        shown.append(
            [who[a].name, who[b].name]
            + [
                share(float(columns[name][i]))
                if decimals is None
                else number(float(columns[name][i]), decimals)
                for name, (_, decimals) in _SHOWN.items()
            ]
            + [verdicts[i]]
        )
    if format_ == "text":
        key = KEYS[ranking.key]
        end = "largest" if ranking.descending else "smallest"
        sys.stdout.write(
            f"{ranking.considered} pairs at {celsius(ranking.temperature)}, by {ranking.key} "
            f"({key.meaning}), {end} first; internal energies at contact\n"
        )
    headings = ["a", "b", *(h for h, _ in _SHOWN.values()), "verdict"]
    write_table(format_, names, rows, shown, headings)

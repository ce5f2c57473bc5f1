"""`stillroom list`: the shelf as a table."""

from __future__ import annotations

import argparse

import numpy as np

from stillroom.chem.data.errors import UnknownQuantity
from stillroom.chem.data.quantities import BY_COLUMN, QUANTITIES, near, quantity
from stillroom.chem.shelf.filters import TEXT_FIELDS
from stillroom.chem.shelf.shelf import Shelf, all_columns
from stillroom.tui.commands.common import add_common, shelf_of
from stillroom.tui.exits import NO_RESULT, OK
from stillroom.tui.formatting import cell
from stillroom.tui.output import Cell, write_table

DEFAULT = "name,family,dipole,polarizability,permittivity,boiling_point,molar_volume"
_IDENTITY = ("name", "cas", "smiles", "formula", "family", "id", "inchikey")


def register(commands: argparse._SubParsersAction[argparse.ArgumentParser]) -> None:
    """Add the sub-command."""
    parser = commands.add_parser(
        "list",
        help="the shelf as a table",
        description="Print the liquids of the shelf.",
        epilog="Marks after a number: = derived, c computed, ~ estimated, none measured.",
        allow_abbrev=False,
    )
    parser.add_argument("--where", default="", metavar="EXPR", help=WHERE_HELP)
    parser.add_argument(
        "--columns",
        default=DEFAULT,
        help="names separated by commas, or all (default: %(default)s)",
    )
    parser.add_argument("--sort", metavar="COL", default="name", help="column to sort by")
    parser.add_argument("--descending", action="store_true", help="largest first")
    parser.add_argument(
        "--provenance",
        action="store_true",
        help="add uncertainty, kind and source of every value (csv and json)",
    )
    add_common(parser)
    parser.set_defaults(run=run)


WHERE_HELP = (
    'such as "dipole > 3 D and boiling_point < 180 degC"; joined by and, or, not; '
    "text columns name, family, formula, cas, hazard take = != ~"
)


def run(args: argparse.Namespace) -> int:
    """Print the shelf."""
    columns = _columns(args.columns)
    shelf = shelf_of(args)
    wanted = np.zeros(len(shelf), dtype=bool)
    wanted[shelf.where(args.where)] = True
    if args.sort not in TEXT_FIELDS:
        quantity(args.sort)
    rows = [int(r) for r in shelf.order(args.sort, descending=args.descending) if wanted[r]]
    shown = [[_shown(shelf, r, c) for c in columns] for r in rows]
    names = [_header(c) for c in columns]
    raw = [[_raw(shelf, r, c) for c in columns] for r in rows]
    if args.provenance and args.format != "text":
        names, raw = _with_provenance(shelf, rows, columns)
    headings = [c if c in _IDENTITY else _heading(c) for c in columns]
    write_table(args.format, names, raw, shown, headings)
    return OK if rows else NO_RESULT


def _columns(text: str) -> list[str]:
    if text.strip() == "all":
        return all_columns()
    names = [n.strip() for n in text.split(",") if n.strip()]
    for name in names:
        if name not in _IDENTITY and name not in QUANTITIES and name not in BY_COLUMN:
            raise UnknownQuantity(name, near(name, [*_IDENTITY, *QUANTITIES]), "in --columns")
    return names


def _header(name: str) -> str:
    return name if name in _IDENTITY else quantity(name).column


def _heading(name: str) -> str:
    q = quantity(name)
    return f"{q.heading} {q.unit_label}".rstrip()


def _shown(shelf: Shelf, row: int, name: str) -> str:
    if name in _IDENTITY:
        return str(getattr(shelf.identities[row], name))
    q = quantity(name)
    return cell(shelf.columns[q.name].value(row), q)


def _raw(shelf: Shelf, row: int, name: str) -> Cell:
    if name in _IDENTITY:
        return str(getattr(shelf.identities[row], name))
    value = shelf.column(name).value(row)
    return None if value is None else value.number


def _with_provenance(
    shelf: Shelf, rows: list[int], columns: list[str]
) -> tuple[list[str], list[list[Cell]]]:
    names: list[str] = []
    for name in columns:
        names.append(_header(name))
        if name not in _IDENTITY:
            q = quantity(name)
            unit = f"_{q.suffix}" if q.suffix else ""
            names += [f"{q.name}_uncertainty{unit}", f"{q.name}_kind", f"{q.name}_source"]
    table: list[list[Cell]] = []
    for row in rows:
        cells: list[Cell] = []
        for name in columns:
            cells.append(_raw(shelf, row, name))
            if name not in _IDENTITY:
                value = shelf.column(name).value(row)
                cells += (
                    [None, None, None]
                    if value is None
                    else [value.uncertainty, value.kind, value.source]
                )
        table.append(cells)
    return names, table

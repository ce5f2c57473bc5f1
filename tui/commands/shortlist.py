"""`stillroom shortlist`: keep liquids and pairs, and hand them on as CSV."""

from __future__ import annotations

import argparse
from collections.abc import Callable, Sequence
from pathlib import Path

from stillroom.chem.choosing.export import export_csv
from stillroom.chem.choosing.reopen import reopen
from stillroom.chem.choosing.shortlist import DEFAULT_NAME, Entry
from stillroom.chem.choosing.store import Store
from stillroom.chem.data.errors import BadNumber
from stillroom.chem.shelf.shelf import Shelf
from stillroom.tui.commands.common import add_common, shelf_of
from stillroom.tui.exits import NO_RESULT, OK
from stillroom.tui.output import write_table, write_text

Run = Callable[[argparse.Namespace, Shelf, Store], int]


def register(commands: argparse._SubParsersAction[argparse.ArgumentParser]) -> None:
    """Add the sub-command with its actions."""
    parser = commands.add_parser(
        "shortlist",
        help="keep liquids and pairs, export them",
        description="Shortlists live in the store and outlast the program.",
        allow_abbrev=False,
    )
    actions = parser.add_subparsers(dest="action", metavar="ACTION", required=True)

    def action(name: str, run: Run, help_: str) -> argparse.ArgumentParser:
        sub = actions.add_parser(name, help=help_, description=help_, allow_abbrev=False)
        sub.add_argument("--list", default=DEFAULT_NAME, metavar="NAME", help="which shortlist")
        add_common(sub)
        sub.set_defaults(run=lambda args: _with_store(args, run))
        return sub

    for name, run, help_ in (
        ("add", _add, "put liquids on the list, or one pair with --pair"),
        ("remove", _remove, "take liquids off the list, or one pair with --pair"),
    ):
        sub = action(name, run, help_)
        sub.add_argument("liquids", nargs="+", metavar="LIQUID")
        sub.add_argument("--pair", action="store_true", help="the two liquids are one pair")
        if name == "add":
            sub.add_argument("--note", default="", help="why it is on the list")
    sub = action("note", _note, "replace the note of a liquid, or of a pair with --pair")
    sub.add_argument("liquids", nargs="+", metavar="LIQUID")
    sub.add_argument("--pair", action="store_true", help="the two liquids are one pair")
    sub.add_argument("--note", required=True, help="the note; empty takes it off")
    action("show", _show, "print the list")
    action("lists", _lists, "print the names of all shortlists")
    sub = action("export", _export, "write the list to FILE.csv and a data package beside it")
    sub.add_argument("file", type=Path, metavar="FILE.csv")
    sub.add_argument("--overwrite", action="store_true", help="replace files that exist")
    sub = action("reopen", _reopen, "rebuild a list from an export and say what has changed")
    sub.add_argument("file", type=Path, metavar="FILE", help="the CSV file or its data package")


def _with_store(args: argparse.Namespace, run: Run) -> int:
    with Store.open(getattr(args, "store", None)) as store:
        return run(args, shelf_of(args), store)


def _entries(args: argparse.Namespace, shelf: Shelf) -> list[Entry]:
    """Return the entries named on the command line, by their ids."""
    note = getattr(args, "note", "")
    ids = [shelf[name].id for name in args.liquids]
    if not args.pair:
        return [Entry(i, "", note) for i in ids]
    if len(ids) != 2:
        raise BadNumber(" ".join(args.liquids), "pair", "two liquids after --pair")
    return [Entry.pair(ids[0], ids[1], note)]


def _add(args: argparse.Namespace, shelf: Shelf, store: Store) -> int:
    done = []
    for entry in _entries(args, shelf):
        added = store.add(args.list, entry)
        done.append([entry.title, args.list, "put on" if added else "already on"])
    return _told(args, done)


def _remove(args: argparse.Namespace, shelf: Shelf, store: Store) -> int:
    done = []
    for entry in _entries(args, shelf):
        store.remove(args.list, entry)
        done.append([entry.title, args.list, "taken off"])
    return _told(args, done)


def _note(args: argparse.Namespace, shelf: Shelf, store: Store) -> int:
    done = []
    for entry in _entries(args, shelf):
        store.set_note(args.list, entry, args.note)
        done.append([entry.title, args.list, "noted"])
    return _told(args, done)


def _told(args: argparse.Namespace, done: Sequence[Sequence[str]]) -> int:
    """Print what was done to each entry."""
    if args.format == "text":
        for title, name, result in done:
            write_text(f"{title}: {result} {name}")
    else:
        write_table(args.format, ["entry", "list", "result"], done)
    return OK


def _show(args: argparse.Namespace, shelf: Shelf, store: Store) -> int:
    entries = store.entries(args.list)
    write_table(
        args.format,
        ["entry", "a", "b", "note", "missing"],
        [[e.kind, e.a, e.b, e.note, ", ".join(e.missing_from(shelf))] for e in entries],
    )
    return OK if entries else NO_RESULT


def _lists(args: argparse.Namespace, shelf: Shelf, store: Store) -> int:
    del shelf
    names = store.shortlists()
    write_table(args.format, ["name", "entries"], [[n, len(store.entries(n))] for n in names])
    return OK if names else NO_RESULT


def _export(args: argparse.Namespace, shelf: Shelf, store: Store) -> int:
    entries = store.entries(args.list)
    files = export_csv(entries, shelf, args.file, name=args.list, overwrite=args.overwrite)
    write_table(args.format, ["written"], [[str(path)] for path in files])
    return OK


def _reopen(args: argparse.Namespace, shelf: Shelf, store: Store) -> int:
    found = reopen(args.file, shelf)
    name = store.create(args.list)
    added = sum(store.add(name, entry) for entry in found.entries)
    if args.format == "text":
        write_text(f"{added} of {len(found.entries)} entries put on {name}")
        for change in found.changes or ["nothing"]:
            write_text(f"changed since the export: {change}")
    else:
        write_table(args.format, ["changed"], [[change] for change in found.changes])
    return OK

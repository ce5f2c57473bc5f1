"""The store: the one SQLite file that keeps shortlists, notes and the last state.

Every change is one transaction and is on the disk when the call returns, so the program may be
killed at any moment. A rollback journal is used rather than a write-ahead log: it needs no shared
memory and leaves one file, also on the network file systems that home folders live on. Programs
that share a store wait for each other up to `BUSY_SECONDS`.
"""

from __future__ import annotations

import json
import sqlite3
from collections.abc import Iterator
from contextlib import contextmanager
from datetime import UTC, datetime
from pathlib import Path
from types import TracebackType
from typing import Any, Self

from stillroom.chem.choosing.locations import store_path
from stillroom.chem.choosing.shortlist import DEFAULT_NAME, Entry
from stillroom.chem.data.clean import clean_text
from stillroom.chem.data.errors import (
    BadNumber,
    CannotWrite,
    StoreBusy,
    StoreDamaged,
    UnknownShortlist,
)

BUSY_SECONDS = 3.0
VERSION = 1
"""Version of the layout below, kept in the file's `user_version`."""
APPLICATION = 0x5371_6C6D
"""Marks the file as a store of this program (SQLite's `application_id`)."""

_LAYOUT = """
CREATE TABLE shortlist (
    name TEXT PRIMARY KEY,
    created_utc TEXT NOT NULL
);
CREATE TABLE entry (
    shortlist TEXT NOT NULL REFERENCES shortlist(name) ON DELETE CASCADE ON UPDATE CASCADE,
    a TEXT NOT NULL,
    b TEXT NOT NULL DEFAULT '',
    note TEXT NOT NULL DEFAULT '',
    position REAL NOT NULL,
    added_utc TEXT NOT NULL,
    PRIMARY KEY (shortlist, a, b)
);
CREATE TABLE setting (
    name TEXT PRIMARY KEY,
    value TEXT NOT NULL
);
"""


class Store:
    """An open store. Use `Store.open(...)` as a context manager.

    Raises, from every method
    -------------------------
    StoreBusy
        If another program holds the file for too long.
    StoreDamaged
        If the file is not a store, or broken; it is left as it is.
    CannotWrite
        If the disk is full or the file may not be written.
    """

    def __init__(self, path: Path, connection: sqlite3.Connection) -> None:
        self.path = path
        self._connection = connection

    @classmethod
    def open(cls, path: Path | None = None) -> Self:
        """Open the store, making it if there is none (see `locations.store_path`)."""
        where = store_path(path)
        try:
            where.parent.mkdir(parents=True, exist_ok=True)
        except OSError as problem:
            raise CannotWrite(str(where.parent), problem.strerror or str(problem)) from None
        if where.is_dir():
            raise CannotWrite(str(where), "it is a folder; name a file")
        try:
            connection = sqlite3.connect(where, timeout=BUSY_SECONDS, isolation_level=None)
        except sqlite3.Error as problem:
            raise CannotWrite(str(where), str(problem)) from None
        store = cls(where, connection)
        try:
            store._prepare()
        except BaseException:
            connection.close()
            raise
        return store

    def __enter__(self) -> Self:
        return self

    def __exit__(
        self,
        kind: type[BaseException] | None,
        problem: BaseException | None,
        trace: TracebackType | None,
    ) -> None:
        self.close()

    def close(self) -> None:
        """Close the file; everything is in it already."""
        self._connection.close()

    def _prepare(self) -> None:
        with self._translated():
            run = self._connection.execute
            run("PRAGMA foreign_keys = ON")
            run("PRAGMA synchronous = FULL")
            # Only a file that is empty is made into a store; a foreign one is left alone.
            with self._transaction():
                (mark,) = run("PRAGMA application_id").fetchone()
                (tables,) = run("SELECT count(*) FROM sqlite_schema").fetchone()
                if not tables and not mark:
                    for statement in filter(str.strip, _LAYOUT.split(";")):
                        run(statement)
                    run(f"PRAGMA application_id = {APPLICATION}")
                    run(f"PRAGMA user_version = {VERSION}")
                    return
            if mark != APPLICATION:
                raise StoreDamaged(str(self.path), "another program's database")
            (version,) = run("PRAGMA user_version").fetchone()
            if version > VERSION:
                raise StoreDamaged(str(self.path), f"made by a newer stillroom, layout {version}")
            (state,) = run("PRAGMA quick_check").fetchone()
            if state != "ok":
                raise StoreDamaged(str(self.path), state.splitlines()[0])

    @contextmanager
    def _translated(self) -> Iterator[None]:
        """Turn SQLite's errors into ours."""
        try:
            yield
        except sqlite3.Error as problem:
            code = getattr(problem, "sqlite_errorcode", 0) & 0xFF
            if code in (sqlite3.SQLITE_BUSY, sqlite3.SQLITE_LOCKED):
                raise StoreBusy(str(self.path)) from None
            if code in (sqlite3.SQLITE_NOTADB, sqlite3.SQLITE_CORRUPT):
                raise StoreDamaged(str(self.path), str(problem)) from None
            raise CannotWrite(str(self.path), str(problem)) from None

    @contextmanager
    def _transaction(self) -> Iterator[sqlite3.Connection]:
        """Hold the file for one change: all of it happens, or none."""
        with self._translated():
            self._connection.execute("BEGIN IMMEDIATE")
            try:
                yield self._connection
            except BaseException:
                if self._connection.in_transaction:
                    self._connection.execute("ROLLBACK")
                raise
            self._connection.execute("COMMIT")

    # Shortlists.

    def shortlists(self) -> list[str]:
        """Return the names of all shortlists, in alphabetical order."""
        with self._translated():
            rows = self._connection.execute("SELECT name FROM shortlist ORDER BY name").fetchall()
        return [name for (name,) in rows]

    def entries(self, name: str = DEFAULT_NAME) -> list[Entry]:
        """Return the entries of a shortlist in their order.

        Raises
        ------
        UnknownShortlist
            If there is no such list (the default one is empty until it is used).
        """
        with self._translated():
            rows = self._connection.execute(
                "SELECT a, b, note FROM entry WHERE shortlist = ? ORDER BY position, added_utc",
                (name,),
            ).fetchall()
            if not rows and name != DEFAULT_NAME and name not in self.shortlists():
                raise UnknownShortlist(name)
        return [Entry(*row) for row in rows]

    def create(self, name: str) -> str:
        """Make an empty shortlist if there is none of this name; return the cleaned name."""
        cleaned = clean_text(name, 60)
        if not cleaned:
            raise BadNumber(name, "name of a shortlist", "at least one visible character")
        with self._transaction() as connection:
            connection.execute("INSERT OR IGNORE INTO shortlist VALUES (?, ?)", (cleaned, _now()))
        return cleaned

    def delete(self, name: str) -> None:
        """Delete a shortlist with all its entries; raises `UnknownShortlist`."""
        with self._transaction() as connection:
            if not connection.execute("DELETE FROM shortlist WHERE name = ?", (name,)).rowcount:
                raise UnknownShortlist(name)

    def add(self, name: str, entry: Entry, position: float | None = None) -> bool:
        """Put an entry at the end of a list (made if need be); False if it was there already."""
        with self._transaction() as connection:
            connection.execute("INSERT OR IGNORE INTO shortlist VALUES (?, ?)", (name, _now()))
            if position is None:
                (position,) = connection.execute(
                    "SELECT coalesce(max(position), 0) + 1 FROM entry WHERE shortlist = ?", (name,)
                ).fetchone()
            row = (name, entry.a, entry.b, clean_text(entry.note), position, _now())
            added = connection.execute("INSERT OR IGNORE INTO entry VALUES (?,?,?,?,?,?)", row)
            return added.rowcount == 1

    def remove(self, name: str, entry: Entry) -> float:
        """Take an entry off and return its position, for `add`; raises `UnknownShortlist`."""
        with self._transaction() as connection:
            row = connection.execute(
                "DELETE FROM entry WHERE shortlist = ? AND a = ? AND b = ? RETURNING position",
                (name, *entry.key),
            ).fetchone()
            if row is None:
                raise UnknownShortlist(name, entry.title)
            return float(row[0])

    def set_note(self, name: str, entry: Entry, note: str) -> None:
        """Replace the note of an entry; raises `UnknownShortlist`."""
        with self._transaction() as connection:
            changed = connection.execute(
                "UPDATE entry SET note = ? WHERE shortlist = ? AND a = ? AND b = ?",
                (clean_text(note), name, *entry.key),
            )
            if not changed.rowcount:
                raise UnknownShortlist(name, entry.title)

    def move(self, name: str, entry: Entry, step: int) -> None:
        """Move an entry by `step` places, as far as the ends of the list."""
        with self._transaction() as connection:
            rows = connection.execute(
                "SELECT a, b FROM entry WHERE shortlist = ? ORDER BY position, added_utc", (name,)
            ).fetchall()
            if entry.key not in rows:
                raise UnknownShortlist(name, entry.title)
            at = rows.index(entry.key)
            rows.insert(max(0, min(at + step, len(rows) - 1)), rows.pop(at))
            connection.executemany(
                "UPDATE entry SET position = ? WHERE shortlist = ? AND a = ? AND b = ?",
                [(place, name, *key) for place, key in enumerate(rows, start=1)],
            )

    # Settings.

    def get_setting(self, name: str) -> Any:
        """Return a setting, None if it was never set or cannot be read."""
        with self._translated():
            row = self._connection.execute(
                "SELECT value FROM setting WHERE name = ?", (name,)
            ).fetchone()
        try:
            return json.loads(row[0]) if row else None
        except ValueError:
            return None

    def set_setting(self, name: str, value: Any) -> None:
        """Keep a setting (anything JSON can hold)."""
        with self._transaction() as connection:
            connection.execute(
                "INSERT INTO setting VALUES (?, ?) "
                "ON CONFLICT (name) DO UPDATE SET value = excluded.value",
                (name, json.dumps(value)),
            )


def _now() -> str:
    return datetime.now(UTC).isoformat(timespec="milliseconds")

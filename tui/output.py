"""Writes tables and records to standard output as text, CSV or JSON."""

from __future__ import annotations

import csv
import json
import math
import sys
from collections.abc import Mapping, Sequence
from typing import Any

from rich.cells import cell_len

FORMATS = ("text", "csv", "json")

Cell = str | float | int | None


def write_text(line: str = "") -> None:
    """Write one line."""
    sys.stdout.write(line + "\n")


def write_table(
    format_: str,
    columns: Sequence[str],
    rows: Sequence[Sequence[Cell]],
    shown: Sequence[Sequence[str]] | None = None,
    headings: Sequence[str] | None = None,
) -> None:
    """Write rows in one of `FORMATS`.

    `rows` hold raw numbers (NaN or None where missing) for CSV and JSON; `shown` and `headings`
    the same as printed text.
    """
    if format_ == "json":
        write_json([dict(zip(columns, map(_plain, row), strict=True)) for row in rows])
    elif format_ == "csv":
        writer = csv.writer(sys.stdout, lineterminator="\r\n")
        writer.writerow(columns)
        writer.writerows([["" if (v := _plain(c)) is None else v for c in row] for row in rows])
    else:
        texts = shown if shown is not None else [[_text(c) for c in row] for row in rows]
        for line in aligned(headings or columns, texts):
            write_text(line)


def write_json(data: object) -> None:
    """Write JSON with NaN as null."""
    sys.stdout.write(json.dumps(_clean(data), indent=2, ensure_ascii=False) + "\n")


def write_record(format_: str, record: Mapping[str, Any]) -> None:
    """Write one nested record as JSON, or flattened to one CSV row (keys joined by dots)."""
    if format_ == "json":
        write_json(record)
        return
    flat = dict(_flatten(record))
    write_table("csv", list(flat), [list(flat.values())])


def aligned(headings: Sequence[str], rows: Sequence[Sequence[str]]) -> list[str]:
    """Return a header, a rule and the rows in columns; numbers to the right, words to the left."""
    widths = [max(map(cell_len, column)) for column in zip(headings, *rows, strict=True)]
    right = [
        bool(rows) and all(_looks_numeric(c) for c in column) for column in zip(*rows, strict=True)
    ] or [False] * len(headings)

    def line(cells: Sequence[str]) -> str:
        padded = [
            " " * (w - cell_len(c)) + c if r else c + " " * (w - cell_len(c))
            for c, w, r in zip(cells, widths, right, strict=True)
        ]
        return "  ".join(padded).rstrip()

    return [line(headings), line(["-" * w for w in widths]), *map(line, rows)]


def _looks_numeric(text: str) -> bool:
    first = text.strip()[:1]
    return first == "" or first.isdigit() or first in "+-.<~"


def _text(value: Cell) -> str:
    plain = _plain(value)
    return "" if plain is None else f"{plain:.6g}" if isinstance(plain, float) else str(plain)


def _plain(value: Cell) -> Cell:
    if isinstance(value, float):
        return None if math.isnan(value) else float(f"{value:.10g}") + 0.0
    return value


def _clean(data: object) -> object:
    if isinstance(data, Mapping):
        return {k: _clean(v) for k, v in data.items()}
    if isinstance(data, list | tuple):
        return [_clean(v) for v in data]
    if isinstance(data, float):
        return data + 0.0 if math.isfinite(data) else None
    return data


def _flatten(record: Mapping[str, Any], prefix: str = "") -> list[tuple[str, Cell]]:
    flat: list[tuple[str, Cell]] = []
    for key, value in record.items():
        if isinstance(value, Mapping):
            flat += _flatten(value, f"{prefix}{key}.")
        elif isinstance(value, list | tuple):
            parts = [v.get("text", str(v)) if isinstance(v, Mapping) else str(v) for v in value]
            flat.append((prefix + key, "; ".join(parts)))
        else:
            flat.append((prefix + key, value))
    return flat

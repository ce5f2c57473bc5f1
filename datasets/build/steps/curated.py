"""Decisions and recalled values: every CSV file in `curated/values/` with the same columns.

An `action` says what a line does: `prefer` makes its value the preferred one (or, with a blank
value, prefers the tabulated value of that source); `add` offers a value that the ordinary rule
ranks; `reject` keeps the tabulated value of that source in the table but out of use. The reason is
required and becomes the note.
"""

from __future__ import annotations

import csv
from dataclasses import dataclass
from pathlib import Path

from steps.candidate import UNITS, Candidate

ACTIONS = ("prefer", "add", "reject")


@dataclass(frozen=True, slots=True)
class Decision:
    """One curated line; `value` is None when it speaks of a tabulated value."""

    where: str
    id: str
    quantity: str
    action: str
    value: float | None
    temperature: float | None
    kind: str
    source: str
    uncertainty: float
    reason: str


def read_decisions(folder: Path) -> list[Decision]:
    """Read all decision files in name order; stop at the first malformed line."""
    found = []
    for path in sorted(folder.glob("*.csv")):
        with path.open(encoding="utf-8", newline="") as file:
            for line, row in enumerate(csv.DictReader(file), start=2):
                found.append(_decision(f"{path.name} line {line}", row))
    return found


def _decision(where: str, row: dict[str, str]) -> Decision:
    """Check and convert one line."""
    if row["action"] not in ACTIONS or not row["reason"] or row["unit"] != UNITS[row["quantity"]]:
        raise SystemExit(f"{where}: action, unit or reason is not as expected")
    value = float(row["value"]) if row["value"] else None
    if value is None and row["action"] == "add":
        raise SystemExit(f"{where}: a value is needed to add one")
    return Decision(
        where,
        row["id"],
        row["quantity"],
        row["action"],
        value,
        float(row["temperature_K"]) if row["temperature_K"] else None,
        row["kind"],
        row["source"],
        float(row["uncertainty"]) if row["uncertainty"] else 0.0,
        row["reason"],
    )


def apply(decisions: list[Decision], candidates: list[Candidate]) -> list[Candidate]:
    """Apply the decisions for one quantity of one liquid to its candidates."""
    result = list(candidates)
    for decision in decisions:
        if decision.value is not None:
            result.append(_candidate(decision))
            continue
        hits = [
            i
            for i, c in enumerate(result)
            if c.source in (decision.source, f"{decision.source}-carried")
            and (decision.temperature is None or c.temperature == decision.temperature)
        ]
        if decision.action == "prefer":
            hits = [i for i in hits if result[i].source == decision.source]
        if not hits:
            raise SystemExit(f"{decision.where}: no {decision.quantity} from {decision.source}")
        for i in hits:
            note = f"{result[i].note}; {decision.reason}".strip("; ")
            if decision.action == "reject":
                result[i] = result[i].change(rejected=True, note=f"not used: {decision.reason}")
            else:
                result[i] = result[i].change(
                    chosen_by_hand=True,
                    note=note,
                    uncertainty=decision.uncertainty or result[i].uncertainty,
                )
    return result


def _candidate(decision: Decision) -> Candidate:
    """Make the candidate of a decision that brings its own value."""
    assert decision.value is not None
    return Candidate(
        decision.id,
        decision.quantity,
        decision.value,
        decision.temperature,
        decision.kind,
        decision.source,
        decision.uncertainty,
        decision.reason,
        chosen_by_hand=decision.action == "prefer",
        rejected=decision.action == "reject",
    )

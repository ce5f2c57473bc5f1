"""Hazards: fire from the preferred flash point, cancer classes from tables, and curated entries.

A liquid with no line for a hazard is not known to be free of it.
"""

from __future__ import annotations

import csv
from pathlib import Path

from steps.candidate import Candidate
from steps.exposure import SOURCE, absorbed_through_skin
from steps.liquid import Liquid
from steps.tables import rows

HAZARDS = (
    "highly flammable",
    "flammable",
    "carcinogen",
    "toxic",
    "absorbed through the skin",
    "reproductive toxicant",
    "organ toxicant",
    "sensitizer",
    "corrosive",
    "peroxide-forming",
    "explosive",
    "oxidizer",
    "reacts with water",
    "polymerizes",
    "lachrymator",
    "environment",
)

_IARC = {"1": "group 1", "11": "group 2A", "12": "group 2B"}
_NTP = {"1": "known", "2": "reasonably anticipated"}


def read_hazards(path: Path) -> list[dict[str, str]]:
    """Read the curated hazards; stop at a hazard outside the closed list."""
    with path.open(encoding="utf-8", newline="") as file:
        found = list(csv.DictReader(file))
    for line, row in enumerate(found, start=2):
        if row["hazard"] not in HAZARDS:
            raise SystemExit(f"{path.name} line {line}: hazard {row['hazard']!r} is not listed")
    return found


def hazard_rows(
    liquid: Liquid, values: list[Candidate], curated: list[dict[str, str]]
) -> list[list[str]]:
    """Return id, hazard, detail, source for one liquid in the order of `HAZARDS`."""
    found = [*_fire(liquid, values), *_cancer(liquid), *_skin(liquid)]
    found += [
        [r["id"], r["hazard"], r["detail"], r["source"]] for r in curated if r["id"] == liquid.id
    ]
    return sorted(found, key=lambda r: (HAZARDS.index(r[1]), r[3], r[2]))


def _fire(liquid: Liquid, values: list[Candidate]) -> list[list[str]]:
    """Flammability by flash point: below 23 degC highly, up to 60 degC flammable (GHS classes)."""
    flash = next((v for v in values if v.quantity == "flash_point" and v.preferred), None)
    if flash is None or flash.value > 60.0:
        return []
    hazard = "highly flammable" if flash.value < 23.0 else "flammable"
    return [[liquid.id, hazard, f"flash point {flash.value:.0f} degC", flash.source]]


def _skin(liquid: Liquid) -> list[list[str]]:
    """Skin notation of the table of exposure limits."""
    if not absorbed_through_skin(liquid):
        return []
    return [[liquid.id, "absorbed through the skin", "skin notation, Ontario", SOURCE]]


def _cancer(liquid: Liquid) -> list[list[str]]:
    """Classes of the IARC and NTP tables."""
    found = []
    for row in rows("iarc", liquid.cas)[:1]:
        if row["group"] in _IARC:
            detail = f"IARC {_IARC[row['group']]}, volume year {row['year']}"
            found.append([liquid.id, "carcinogen", detail, "iarc-monographs"])
    for row in rows("ntp", liquid.cas)[:1]:
        detail = f"NTP: {_NTP[row['Listing']]} to be a human carcinogen (13th report, 2014)"
        found.append([liquid.id, "carcinogen", detail, "ntp-report-on-carcinogens"])
    return found

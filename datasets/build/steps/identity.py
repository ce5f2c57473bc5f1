"""Identity of the chosen liquids: structure columns, molar mass, wanted temperature."""

from __future__ import annotations

import csv
from math import ceil
from pathlib import Path

from chemicals.elements import molecular_weight, nested_formula_parser

from steps.curated import Decision
from steps.liquid import ROOM, Liquid
from steps.phase import KELVIN
from steps.selection import Chosen
from steps.tables import number

STRUCTURE_COLUMNS = (
    "hbond_donor",
    "hbond_acceptor",
    "vapour_dimer",
    "polar_groups",
    "group_dipole_rss_D",
    "flexible_polar_bonds",
    "longest_path_bonds",
)


def read_structures(path: Path) -> dict[str, dict[str, str]]:
    """Read the cached structure columns by CAS number."""
    with path.open(encoding="utf-8", newline="") as file:
        return {row["cas"]: row for row in csv.DictReader(file)}


def liquid_of(chosen: Chosen, formula: str, decisions: list[Decision]) -> Liquid:
    """Return the liquid with the temperature at which its properties are wanted, in K."""
    melting = _melting(chosen, decisions)
    temperature = ROOM
    if chosen.state == "melt":
        if melting is None:
            raise SystemExit(f"{chosen.name}: a melt needs a melting point")
        temperature = max(ROOM, ceil(melting - KELVIN) + KELVIN)
    return Liquid(
        chosen.id,
        chosen.cas,
        chosen.name,
        chosen.family,
        formula,
        molecular_weight(nested_formula_parser(formula)),
        chosen.state,
        melting,
        temperature,
    )


def _melting(chosen: Chosen, decisions: list[Decision]) -> float | None:
    """Melting point in K: curated if there is one, else the first table that has it."""
    for decision in decisions:
        wanted = decision.id == chosen.id and decision.quantity == "melting_point"
        if wanted and decision.action == "prefer" and decision.value is not None:
            return decision.value + KELVIN
    for table in ("crc_organic", "crc_inorganic", "webbook", "open_melting", "wikidata"):
        kelvin = number(table, chosen.cas, "Tm")
        if kelvin is not None:
            return kelvin
    return None

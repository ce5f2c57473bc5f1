"""The columns of an exported shortlist: name, type, unit, meaning, and how to fill them."""

from __future__ import annotations

import math
from collections.abc import Callable, Sequence
from dataclasses import dataclass

from stillroom.chem.choosing.shortlist import Entry
from stillroom.chem.data.quantities import QUANTITIES, Quantity
from stillroom.chem.data.values import Value
from stillroom.chem.liquids.liquid import Liquid
from stillroom.chem.pairs.pair import FORCES, PairInteraction
from stillroom.chem.shelf.shelf import Shelf


@dataclass(frozen=True, slots=True)
class Row:
    """One entry with what the shelf knows of it; None where a liquid or value is missing."""

    entry: Entry
    first: Liquid | None
    second: Liquid | None
    pair: PairInteraction | None
    problem: str = ""


Content = str | float | None


@dataclass(frozen=True, slots=True)
class Field:
    """One column: Table Schema type (`string` or `number`), unit, description, content."""

    name: str
    type: str
    unit: str
    description: str
    content: Callable[[Row], Content]


def fields(rows: Sequence[Row], shelf: Shelf) -> list[Field]:
    """Return the columns for these rows: identity, values of liquids, energies of pairs."""
    found = _identity(shelf)
    if any(r.entry.kind == "liquid" for r in rows):
        for q in QUANTITIES.values():
            if any(_value(r, q.name) for r in rows):
                found += [
                    f
                    for f in _quantity(q)
                    if not f.name.endswith("_temperature_K") or any(f.content(r) for r in rows)
                ]
    if any(r.entry.kind == "pair" for r in rows):
        found += _pair()
    return found


def _identity(shelf: Shelf) -> list[Field]:
    def first(name: str) -> Callable[[Row], Content]:
        return lambda r: None if r.first is None else str(getattr(r.first.identity, name))

    def of_pair(name: str) -> Callable[[Row], Content]:
        return lambda r: (
            None
            if r.second is None or r.entry.kind != "pair"
            else str(getattr(r.second.identity, name))
        )

    def hazards(row: Row) -> Content:
        ids = dict.fromkeys(filter(None, row.entry.key))
        known = [
            (f"{i}: " if row.entry.b else "") + f"{h.hazard} ({h.detail})"
            for i in ids
            for h in shelf.hazards.get(i, ())
        ]
        return "; ".join(known) or None

    return [
        Field("entry", "string", "", "liquid or pair", lambda r: r.entry.kind),
        Field("id", "string", "", "key of the first liquid", lambda r: r.entry.a),
        Field("partner_id", "string", "", "key of a pair's second", lambda r: r.entry.b or None),
        Field("name", "string", "", "name of the liquid, or of a pair's first", first("name")),
        Field("partner", "string", "", "name of the second liquid of a pair", of_pair("name")),
        Field("cas", "string", "", "CAS number", first("cas")),
        Field("partner_cas", "string", "", "CAS number of the second liquid", of_pair("cas")),
        Field("formula", "string", "", "formula in Hill order", first("formula")),
        Field("family", "string", "", "chemical family", first("family")),
        Field("note", "string", "", "the note kept with the entry", lambda r: r.entry.note or None),
        Field(
            "hazards",
            "string",
            "",
            "dangers recorded in the table; blank means not known here, never safe: see the safety "
            "data sheet",
            hazards,
        ),
        Field("problem", "string", "", "why the row has no numbers", lambda r: r.problem or None),
    ]


def _value(row: Row, name: str) -> Value | None:
    if row.entry.kind != "liquid" or row.first is None:
        return None
    return row.first.values.get(name)


def _quantity(q: Quantity) -> list[Field]:
    def part(get: Callable[[Value], Content]) -> Callable[[Row], Content]:
        def content(row: Row) -> Content:
            value = _value(row, q.name)
            return None if value is None else get(value)

        return content

    unit, suffix = q.unit or "1", f"_{q.suffix}" if q.suffix else ""
    return [
        Field(q.column, "number", unit, q.label, part(lambda v: v.number)),
        Field(
            f"{q.name}_uncertainty{suffix}",
            "number",
            "kelvin" if q.offset else unit,
            f"standard uncertainty of the {q.label}",
            part(lambda v: v.uncertainty),
        ),
        Field(
            f"{q.name}_temperature_K",
            "number",
            "K",
            f"temperature of the {q.label}, blank where it has no meaning",
            part(lambda v: v.temperature),
        ),
        Field(
            f"{q.name}_kind",
            "string",
            "",
            "measured, derived, computed, estimated or user",
            part(lambda v: v.kind),
        ),
        Field(
            f"{q.name}_source",
            "string",
            "",
            "key of the source, or the quantities it is derived from",
            part(lambda v: v.source),
        ),
    ]


def _pair() -> list[Field]:
    def number(get: Callable[[PairInteraction], float]) -> Callable[[Row], Content]:
        return lambda r: None if r.pair is None else get(r.pair)

    def text(get: Callable[[PairInteraction], str]) -> Callable[[Row], Content]:
        return lambda r: None if r.pair is None else get(r.pair)

    def energy(name: str, what: str, get: Callable[[PairInteraction], float]) -> Field:
        return Field(name, "number", "kJ/mol", f"{what}, kJ per mole of pairs", number(get))

    def share(force: str) -> Field:
        what = f"share of {force} in the total internal energy"
        return Field(f"{force}_share", "number", "1", what, number(lambda p: p.shares[force]))

    def share_uncertainty(force: str) -> Field:
        return Field(
            f"{force}_share_uncertainty",
            "number",
            "1",
            f"standard uncertainty of the share of {force}",
            number(lambda p: p.share_uncertainty[force]),
        )

    return [
        Field(
            "distance_nm", "number", "nm", "centre to centre", number(lambda p: p.distance * 1e9)
        ),
        Field("distance_basis", "string", "", "contact or given", text(lambda p: p.distance_basis)),
        Field("coupling", "number", "1", "x in kT", number(lambda p: float(p.terms.coupling))),
        energy(
            "orientation_energy_kJ_mol",
            "exact angle average, internal energy",
            lambda p: float(p.terms.orientation) / 1e3,
        ),
        energy(
            "orientation_free_energy_kJ_mol",
            "exact angle average, free energy",
            lambda p: float(p.terms.orientation_free) / 1e3,
        ),
        energy(
            "induction_energy_kJ_mol",
            "induction, both directions",
            lambda p: float(p.terms.induction) / 1e3,
        ),
        energy("dispersion_energy_kJ_mol", "dispersion", lambda p: float(p.terms.dispersion) / 1e3),
        Field("dispersion_model", "string", "", "dispersion model", text(lambda p: p.model)),
        energy(
            "total_energy_kJ_mol", "total internal energy", lambda p: float(p.terms.total) / 1e3
        ),
        energy(
            "total_uncertainty_kJ_mol",
            "standard uncertainty of the total",
            lambda p: p.total_uncertainty / 1e3,
        ),
        *map(share, FORCES),
        *map(share_uncertainty, FORCES),
        Field(
            "leading_order_error",
            "number",
            "1",
            "relative error of the leading term of the internal energy",
            number(lambda p: float(p.terms.leading_order_error)),
        ),
        Field("verdict", "string", "", "sound, strained or unreliable", text(lambda p: p.verdict)),
        Field(
            "reasons",
            "string",
            "",
            "reasons of the verdict",
            text(lambda p: "; ".join(r.text for r in p.reasons)),
        ),
    ]


def plain(content: Content) -> str | float | None:
    """Return a number rounded to ten digits, None for NaN, text as it is."""
    if isinstance(content, float):
        return None if math.isnan(content) else float(f"{content:.10g}") + 0.0
    return content

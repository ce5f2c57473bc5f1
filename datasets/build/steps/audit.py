"""The audit report: what the tables hold, where sources disagree, what was decided, what is off."""

from __future__ import annotations

from collections import Counter
from collections.abc import Sequence
from dataclasses import dataclass
from pathlib import Path
from statistics import median

from steps.candidate import UNITS, Candidate, written
from steps.checks import (
    KIRKWOOD,
    TROUTON,
    TROUTON_BONDED,
    Finding,
    Values,
    findings,
    kirkwood_factor,
    read_explanations,
    trouton_constant,
)
from steps.curated import Decision
from steps.liquid import ROOM
from steps.series import departures, read_series

KINDS = ("measured", "derived", "computed", "estimated")
_SHARP = 3.0 * 2.0**0.5  # three standard deviations of the difference of two equally good values
_MOST = 40
_LEAST_TRUSTED = 20
_UNRATED = ("point", "temperature", "log_p", "dipole", "limit")


@dataclass(frozen=True, slots=True)
class Disagreement:
    """Two values of one quantity further apart than `_SHARP` of the other's own uncertainty."""

    preferred: Candidate
    other: Candidate
    ratio: float


def write_audit(
    path: Path,
    collected: dict[str, list[Candidate]],
    donors: set[str],
    decisions: list[Decision],
    curated: Path,
) -> None:
    """Write the report; `collected` holds all values by liquid id, `donors` the strong donors."""
    everything = [c for values in collected.values() for c in values]
    values = preferred_values(everything)
    lines = [
        "# Audit of the tables",
        "",
        "Written by `build/build.py` from the same values as the tables; never edited by hand.",
        "",
        *_coverage(len(collected), everything),
        *_sources(everything),
        *_disagreements(everything),
        *_decisions(decisions),
        *_outliers(list(collected), donors, values, curated),
        *_series(preferred_values(_near_room(everything)), curated),
        *_least_trusted(everything),
    ]
    path.write_text("\n".join(lines).rstrip() + "\n", encoding="utf-8")


def preferred_values(everything: list[Candidate]) -> Values:
    """Return preferred values by (id, quantity), with molar volumes in cm^3/mol added."""
    values = {(c.id, c.quantity): c.value for c in everything if c.preferred}
    for (name, quantity), density in list(values.items()):
        if quantity == "density" and (name, "molar_mass") in values:
            values[(name, "molar_volume")] = values[(name, "molar_mass")] / density * 1e3
    return values


def _near_room(everything: list[Candidate]) -> list[Candidate]:
    """Leave out values of melts, which stand at their own temperatures."""
    return [c for c in everything if c.temperature is None or abs(c.temperature - ROOM) <= 6.0]


def _coverage(count: int, everything: list[Candidate]) -> list[str]:
    """Preferred values by quantity and kind."""
    rows = []
    for quantity in UNITS:
        mine = [c for c in everything if c.preferred and c.quantity == quantity]
        kinds = Counter(c.kind for c in mine)
        recalled = sum(c.source.startswith("memory-") for c in mine)
        share = f"{100 * len(mine) / count:.0f}"
        rows.append([quantity, len(mine), share, *(kinds[k] for k in KINDS), recalled])
    header = ["quantity", "liquids", "%", *KINDS, "of these from memory"]
    return ["## Coverage", "", f"{count} liquids.", "", *_table(header, rows), ""]


def _sources(everything: list[Candidate]) -> list[str]:
    """How many sources stand behind the liquids of a quantity."""
    rows = []
    for quantity in UNITS:
        mine = [c for c in everything if c.quantity == quantity and not c.rejected]
        per_liquid = Counter(name for name, _ in {(c.id, c.source) for c in mine})
        several = Counter(min(n, 3) for n in per_liquid.values())
        sources = len({c.source for c in mine})
        out = sum(c.quantity == quantity and c.rejected for c in everything)
        rows.append([quantity, sources, several[1], several[2], several[3], out])
    header = ["quantity", "sources", "liquids with 1", "with 2", "with 3 or more", "set aside"]
    return ["## Sources behind each quantity", "", *_table(header, rows), ""]


def disagreements(everything: list[Candidate]) -> list[Disagreement]:
    """Return sharp disagreements, the sharpest first."""
    best = {(c.id, c.quantity): c for c in everything if c.preferred}
    found = []
    for other in everything:
        mine = best.get((other.id, other.quantity))
        if mine is None or other.preferred or other.kind == "estimated" or _apart(mine, other):
            continue
        ratio = abs(other.value - mine.value) / other.uncertainty
        if ratio > _SHARP:
            found.append(Disagreement(mine, other, ratio))
    return sorted(found, key=lambda d: (-d.ratio, d.other.id, d.other.quantity, d.other.source))


def _apart(one: Candidate, other: Candidate) -> bool:
    """Whether two values hold for different temperatures."""
    if one.temperature is None or other.temperature is None:
        return False
    return abs(one.temperature - other.temperature) > 0.5


def _disagreements(everything: list[Candidate]) -> list[str]:
    """Count them by quantity and list the sharpest."""
    found = disagreements(everything)
    accepted = [d for d in found if not d.other.rejected]
    counts = Counter(d.other.quantity for d in found)
    in_use = Counter(d.other.quantity for d in accepted)
    rows = [[q, counts[q], in_use[q]] for q in UNITS if counts[q]]
    listed = [
        [
            d.other.id,
            d.other.quantity,
            f"{written(d.other.quantity, d.preferred.value)} ({d.preferred.source})",
            f"{written(d.other.quantity, d.other.value)} ({d.other.source})",
            f"{d.ratio:.0f}",
        ]
        for d in accepted[:_MOST]
    ]
    return [
        "## Disagreements",
        "",
        "Values that differ from the preferred one, at the same temperature, by more than 3√2 of"
        " their own standard uncertainty. Those not set aside widen the uncertainty of the"
        " preferred value.",
        "",
        *_table(["quantity", "all", "of these not set aside"], rows),
        "",
        f"The {len(listed)} sharpest not set aside:",
        "",
        *_table(["liquid", "quantity", "preferred", "other", "times its uncertainty"], listed),
        "",
    ]


def _decisions(decisions: list[Decision]) -> list[str]:
    """Every decision by hand about a value of the tables."""
    mine = [d for d in decisions if d.where.startswith("overrides.csv")]
    rows = []
    for d in mine:
        value = "" if d.value is None else written(d.quantity, d.value)
        rows.append([d.id, d.quantity, d.action, value, d.source, d.reason])
    header = ["liquid", "quantity", "action", "value", "source", "reason"]
    return ["## Decisions by hand", "", f"{len(mine)} lines.", "", *_table(header, rows), ""]


def _outliers(ids: list[str], donors: set[str], values: Values, curated: Path) -> list[str]:
    """Liquids outside the limits of the relations, with the explanation of each."""
    why = read_explanations(curated / "outliers.csv")
    found = findings(ids, donors, values)
    trouton = [t for name in ids if (t := trouton_constant(name, values)) is not None]
    kirkwood = [k for name in ids if (k := kirkwood_factor(name, values)) is not None]
    rows = [_explained(f, why) for f in sorted(found, key=lambda f: (f.check, f.id))]
    return [
        "## Outliers",
        "",
        f"Trouton's constant within {TROUTON[0]:.0f} to {TROUTON[1]:.0f} J/(mol K), with strong"
        f" hydrogen-bond donors {TROUTON_BONDED[0]:.0f} to {TROUTON_BONDED[1]:.0f}:"
        f" {len(trouton)} liquids, median {median(trouton):.1f}."
        f" Kirkwood's factor within {KIRKWOOD[0]} to {KIRKWOOD[1]:.0f}:"
        f" {len(kirkwood)} liquids, median {median(kirkwood):.2f}. Squared"
        " refractive index not above the permittivity by more than 4 %. Outside:",
        "",
        *_table(["check", "liquid", "value", "why"], rows),
        "",
    ]


def _explained(finding: Finding, why: dict[tuple[str, str], str]) -> list[object]:
    """One row of the table of outliers."""
    reason = why.get((finding.check, finding.id), "not explained")
    return [finding.check, finding.id, f"{finding.value:.3g}", reason]


def _series(values: Values, curated: Path) -> list[str]:
    """Members of homologous series off their line."""
    why = read_explanations(curated / "outliers.csv")
    found, compared = departures(read_series(curated / "series.csv"), values)
    rows = [
        [d.series, d.quantity, d.id, f"{d.residual:+.2g}", why.get((d.quantity, d.id), "")]
        for d in sorted(found, key=lambda d: (d.series, d.quantity, d.id))
    ]
    return [
        "## Homologous series",
        "",
        f"{compared} values against a quadratic in the number of carbons of their series (from four"
        f" carbons up); tolerances in `build/steps/series.py`. {len(rows)} are off:",
        "",
        *_table(["series", "quantity", "liquid", "residual", "why"], rows),
        "",
    ]


def _least_trusted(everything: list[Candidate]) -> list[str]:
    """Preferred values with the largest uncertainty in proportion to the value."""
    rated = [
        (c.uncertainty / abs(c.value), c)
        for c in everything
        if c.preferred and c.value and not any(word in c.quantity for word in _UNRATED)
    ]
    dipoles = [
        (c.uncertainty / c.value, c)
        for c in everything
        if c.preferred and c.quantity == "dipole" and c.value >= 1.0
    ]
    worst = sorted(rated + dipoles, key=lambda r: (-r[0], r[1].id, r[1].quantity))
    rows = []
    for share, c in worst[:_LEAST_TRUSTED]:
        rivals = sum(
            o.id == c.id and o.quantity == c.quantity and not o.rejected and o is not c
            for o in everything
        )
        reason = "sources disagree" if rivals else "one source, wide by its nature"
        value = f"{written(c.quantity, c.value)} {UNITS[c.quantity]}".removesuffix(" 1")
        rows.append([c.id, c.quantity, value, f"{100 * share:.0f}", c.source, c.note or reason])
    header = ["liquid", "quantity", "value", "uncertainty, %", "source", "why"]
    return [
        "## The twenty least trustworthy values",
        "",
        "By relative standard uncertainty of the preferred value. Temperatures, log P and dipoles"
        " below 1 D are left out, having no meaningful relative uncertainty, and so are the limits"
        " of flammability and exposure, which are conventions.",
        "",
        *_table(header, rows),
    ]


def _table(header: Sequence[str], rows: Sequence[Sequence[object]]) -> list[str]:
    """A Markdown table."""
    lines = ["| " + " | ".join(header) + " |", "|" + "---|" * len(header)]
    return lines + ["| " + " | ".join(str(cell) for cell in row) + " |" for row in rows]

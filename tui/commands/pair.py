"""`stillroom pair`: how two liquids attract each other."""

from __future__ import annotations

import argparse
from collections.abc import Iterator

from stillroom.chem.forces.dispersion import MODELS
from stillroom.chem.pairs.pair import FORCES, PairInteraction, interact
from stillroom.tui.commands.common import (
    add_beyond_range,
    add_common,
    require_liquid,
    shelf_of,
    temperature_of,
)
from stillroom.tui.exits import OK
from stillroom.tui.formatting import celsius, number, share
from stillroom.tui.output import aligned, write_record, write_text


def register(commands: argparse._SubParsersAction[argparse.ArgumentParser]) -> None:
    """Add the sub-command."""
    parser = commands.add_parser(
        "pair",
        help="two liquids face to face",
        description="Orientation, induction and dispersion between one molecule of A and one of B, "
        "at contact or at a given distance, and how far the rotating average can be trusted.",
        allow_abbrev=False,
    )
    parser.add_argument("a", metavar="A", help="name, synonym, CAS number or unique formula")
    parser.add_argument("b", metavar="B")
    parser.add_argument("--distance", metavar="R", help='centre to centre, such as "0.5 nm"')
    parser.add_argument("--model", choices=MODELS, default="auto", help="dispersion model")
    add_beyond_range(parser)
    add_common(parser)
    parser.set_defaults(run=run)


def run(args: argparse.Namespace) -> int:
    """Print the pair."""
    shelf = shelf_of(args)
    a, b = shelf[args.a], shelf[args.b]
    for liquid in (a, b):
        require_liquid(liquid, args)
    pair = interact(a, b, temperature_of(args), args.distance, args.model)
    if args.format == "text":
        for line in pair_lines(pair):
            write_text(line)
    else:
        write_record(args.format, pair.to_dict())
    return OK


def pair_lines(pair: PairInteraction) -> Iterator[str]:
    """Yield the pair as text."""
    t = pair.terms
    yield f"{pair.a.name} + {pair.b.name} at {celsius(pair.temperature)}"
    basis = "contact, from molar volumes" if pair.distance_basis == "contact" else "as given"
    yield f"distance {pair.distance * 1e9:.3f} nm ({basis}); coupling x = {float(t.coupling):.3f}"
    yield ""
    u = pair.share_uncertainty
    c6 = (t.c6_orientation, t.c6_induction, t.c6_dispersion)
    free = (t.orientation_free, t.induction, t.dispersion)
    energy = (t.orientation, t.induction, t.dispersion)
    rows = [
        [f, number(float(e) / 1e3, 3), number(float(w) / 1e3, 3), share(pair.shares[f]),
         f"± {100 * u[f]:.0f} %", number(float(c) * 1e79, 1)]
        for f, e, w, c in zip(FORCES, energy, free, c6, strict=True)
    ]  # fmt: skip
    rows.append(
        ["total", number(float(t.total) / 1e3, 3), number(float(t.total_free) / 1e3, 3), "100 %",
         "", number(float(sum(c6)) * 1e79, 1)]
    )  # fmt: skip
    yield from aligned(
        ["force", "energy kJ/mol", "free energy kJ/mol", "share", "", "C6 1e-79 J m⁶"], rows
    )
    yield (
        f"total ± {pair.total_uncertainty / 1e3:.2f} kJ/mol (standard uncertainty); shares are of "
        "the internal energy"
    )
    yield ""
    yield (
        f"orientation, internal energy: exact {float(t.orientation) / 1e3:.3f}, leading (-2/3) "
        f"{float(t.leading) / 1e3:.3f}, aligned {float(t.aligned) / 1e3:.3f} kJ/mol"
    )
    yield (
        f"dispersion model: {pair.model}; unlike C6 {pair.geometric_mean_departure:+.2%} against "
        "the geometric mean of the like ones"
    )
    yield f"force -dw/dr {float(t.force) * 1e12:.1f} pN (negative: attraction)"
    yield ""
    yield f"verdict: {pair.verdict}"
    yield from (f"  - {reason.text}" for reason in pair.reasons)

"""The verdict: from the actual error, lowered by reasons that each carry a number."""

import numpy as np
import pytest

from stillroom.chem import Liquid, Shelf, interact, load_shelf
from stillroom.chem.data.values import Value
from stillroom.chem.liquids.structure import Structure
from stillroom.chem.pairs.pair import PairInteraction
from stillroom.chem.pairs.reliability import VERDICTS, coupling_verdict
from stillroom.chem.pairs.verdicts import VerdictBook


@pytest.fixture(scope="module")
def shelf() -> Shelf:
    return load_shelf()


def pair(shelf: Shelf, a: str, b: str, **options) -> PairInteraction:
    return interact(shelf[a], shelf[b], **options)


def codes(found: PairInteraction) -> set[str]:
    return {r.code for r in found.reasons}


@pytest.mark.parametrize(
    ("error", "verdict"),
    [(0.0, "sound"), (0.0499, "sound"), (0.05, "strained"), (0.2499, "strained"),
     (0.25, "unreliable"), (9.0, "unreliable")],
)  # fmt: skip
def test_thresholds(error: float, verdict: str) -> None:
    assert coupling_verdict(error) == verdict


@pytest.mark.parametrize(
    ("a", "b", "code", "verdict"),
    [
        # What is expected is common practice in the trade.
        ("ethanol", "ethanol", "hydrogen-bond", "unreliable"),
        ("water", "acetone", "hydrogen-bond", "unreliable"),
        ("chloroform", "acetone", "hydrogen-bond", "strained"),
        ("acetic acid", "propionic acid", "vapour-dimer", "unreliable"),
        ("1,4-dioxane", "acetone", "cancelled-dipole", "strained"),
        ("1,2-dichloroethane", "acetone", "conformers", "strained"),
        ("water", "nitrobenzene", "kirkwood", "strained"),
        ("decane", "benzene", "one-centre", "strained"),
        ("ethylene carbonate", "acetone", "outside-liquid-range", "unreliable"),
    ],
)
def test_reasons_where_they_belong(shelf: Shelf, a, b, code, verdict) -> None:
    found = pair(shelf, a, b)
    assert code in codes(found)
    assert VERDICTS.index(found.verdict) >= VERDICTS.index(verdict)
    (reason,) = [r for r in found.reasons if r.code == code][:1]
    assert reason.value is not None
    assert reason.lowers_to is not None


@pytest.mark.parametrize(
    ("a", "b"), [("cyclohexane", "benzene"), ("toluene", "cyclohexane"), ("acetone", "cyclohexane")]
)
def test_simple_pairs_are_sound(shelf: Shelf, a: str, b: str) -> None:
    assert pair(shelf, a, b).verdict == "sound"


def test_no_reason_raises_the_verdict(shelf: Shelf) -> None:
    rng = np.random.default_rng(3)
    usable = shelf.where("known(dipole) and known(molar_volume)")
    for i, j in rng.choice(usable, (150, 2)):
        found = interact(shelf.liquid(int(i)), shelf.liquid(int(j)))
        start = coupling_verdict(float(found.terms.leading_order_error))
        assert VERDICTS.index(found.verdict) >= VERDICTS.index(start)
        asked = [VERDICTS.index(r.lowers_to) for r in found.reasons if r.lowers_to]
        assert VERDICTS.index(found.verdict) == max(asked)
        assert found.reasons[0].code == "coupling"


def test_an_estimated_input_lowers_the_verdict() -> None:
    def liquid(kind: str) -> Liquid:
        dipole = Value("dipole", 0.5, "debye", kind, "x", 0.1)
        return Liquid("x", formula="C6H14", dipole=dipole, polarizability=12.0,
                      ionization_energy=10.0, molar_volume=130.0)  # fmt: skip

    assert interact(liquid("measured"), liquid("measured")).verdict == "sound"
    for kind in ("estimated", "computed"):
        found = interact(liquid(kind), liquid(kind))
        assert found.verdict == "strained"
        assert "estimated-input" in codes(found)


def test_a_greater_distance_can_make_the_coupling_sound(shelf: Shelf) -> None:
    near, far = (pair(shelf, "acetone", "acetone", distance=d) for d in ("0.45 nm", "1.2 nm"))
    assert near.reasons[0].lowers_to == "strained" or near.verdict == "unreliable"
    assert far.reasons[0].lowers_to == "sound"


def test_unknown_structure_gives_no_structural_reason() -> None:
    plain = Liquid("p", formula="CH4O", dipole=1.7, polarizability=3.2, molar_volume=40.0)
    bonded = Liquid(
        "q", formula="CH4O", dipole=1.7, polarizability=3.2, molar_volume=40.0,
        structure=Structure(hbond_donor="strong", hbond_acceptor="strong"),
    )  # fmt: skip
    assert "hydrogen-bond" not in codes(interact(plain, plain))
    assert "hydrogen-bond" in codes(interact(bonded, bonded))


def test_the_book_agrees_with_the_pair_by_pair_verdict(shelf: Shelf) -> None:
    rng = np.random.default_rng(11)
    usable = shelf.where("known(dipole) and known(molar_volume)")
    small = shelf.take(np.sort(rng.choice(usable, 25, replace=False)))
    a, b = (x.ravel() for x in np.meshgrid(np.arange(25), np.arange(25)))
    expected, errors = [], []
    for i, j in zip(a, b, strict=True):
        found = interact(small.liquid(int(i)), small.liquid(int(j)))
        expected.append(found.verdict)
        errors.append(float(found.terms.leading_order_error))
    assert VerdictBook(small).verdicts(a, b, np.array(errors)) == expected

"""Two liquids: symmetries, limits, convention, uncertainty, and the agreed plain-data form."""

import json
import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem import Liquid, Shelf, interact, load_shelf
from stillroom.chem.data.constants import AVOGADRO, COULOMB, DEBYE
from stillroom.chem.data.errors import MissingValue, OutsideRange, UnitMismatch
from stillroom.chem.data.values import Value
from stillroom.chem.pairs.pair import FORCES
from stillroom.chem.pairs.profile import along_distance, along_temperature
from stillroom.chem.pairs.terms import Molecule, pair_terms

SHELF = load_shelf()


@pytest.fixture(scope="module")
def shelf() -> Shelf:
    return SHELF


molecules = st.builds(
    lambda mu, alpha, ionization, electrons: Molecule(
        mu * DEBYE, alpha * COULOMB * 1e-30, ionization * 1.602e-19, electrons
    ),
    st.floats(0.0, 6.0),
    st.floats(1.0, 30.0),
    st.floats(7.0, 14.0),
    st.integers(8, 100),
)
distances = st.floats(0.3e-9, 3e-9)
temperatures = st.floats(150.0, 600.0)


@given(molecules, molecules, distances, temperatures)
def test_symmetric_bounded_and_additive(a, b, r, t) -> None:
    ab, ba = pair_terms(a, b, r, t), pair_terms(b, a, r, t)
    for name in ("orientation", "orientation_free", "induction", "dispersion", "force", "total"):
        assert getattr(ab, name) == pytest.approx(float(getattr(ba, name)), rel=1e-9)
    assert abs(ab.orientation) <= abs(ab.leading) * (1 + 1e-9) + 1e-12
    assert abs(ab.orientation_free) <= abs(ab.leading_free) * (1 + 1e-9) + 1e-12
    assert ab.orientation_free >= ab.aligned - 1e-9
    assert ab.total == pytest.approx(float(ab.orientation + ab.induction + ab.dispersion))
    assert sum(map(float, ab.shares)) == pytest.approx(1.0)
    assert ab.leading_order_error >= 0
    assert ab.leading == pytest.approx(2 * float(ab.leading_free), rel=1e-12)
    assert ab.total <= 0


@given(molecules, molecules, distances, temperatures)
def test_force_is_the_slope_of_the_free_energy(a, b, r, t) -> None:
    step = 1e-5 * r
    near, far = (pair_terms(a, b, x, t).total_free for x in (r - step, r + step))
    slope = (far - near) / (2 * step) / AVOGADRO
    assert float(pair_terms(a, b, r, t).force) == pytest.approx(-float(slope), rel=1e-5)


@given(molecules, molecules, distances)
def test_heat_and_distance_weaken_orientation(a, b, r) -> None:
    cold, hot = (pair_terms(a, b, r, t) for t in (250.0, 350.0))
    far = pair_terms(a, b, 2 * r, 250.0)
    assert cold.orientation <= hot.orientation + 1e-12
    assert cold.orientation <= far.orientation + 1e-12
    assert cold.induction == hot.induction


def test_far_apart_the_leading_terms_are_exact() -> None:
    a = Molecule(2 * DEBYE, COULOMB * 5e-30, 1.6e-18, 20)
    t = pair_terms(a, a, 3e-9, 298.15)
    assert t.orientation == pytest.approx(float(t.leading), rel=1e-4)
    total_c6 = t.c6_orientation + t.c6_induction + t.c6_dispersion
    assert t.total == pytest.approx(float(-total_c6 / 3e-9**6 * AVOGADRO), rel=1e-4)


def test_every_pair_of_a_sample_of_the_shelf_is_finite_and_symmetric(shelf: Shelf) -> None:
    rng = np.random.default_rng(7)
    usable = shelf.where("known(dipole) and known(polarizability) and known(molar_volume)")
    for i, j in rng.choice(usable, (60, 2)):
        a, b = shelf.liquid(int(i)), shelf.liquid(int(j))
        one, two = interact(a, b).to_dict(), interact(b, a).to_dict()
        assert one["total"]["energy_kJ_mol"] == pytest.approx(two["total"]["energy_kJ_mol"])
        assert one["verdict"] == two["verdict"]
        assert one["total"]["energy_kJ_mol"] < 0
        assert one["total"]["uncertainty_kJ_mol"] > 0
        assert all(0 <= u < 1 for u in one["share_uncertainty"].values())


class TestUncertainty:
    """First order, all inputs, and a like pair has one set of them."""

    @staticmethod
    def liquid(dipole_uncertainty: float, name: str = "one") -> Liquid:
        return Liquid(
            name,
            formula="C3H6O",
            dipole=Value("dipole", 2.0, "debye", "user", "user", dipole_uncertainty),
            polarizability=6.0,
            ionization_energy=10.0,
        )

    def test_a_like_pair_moves_both_sides_at_once(self) -> None:
        # At 2 nm orientation is the leading term, proportional to mu^4 for a like pair (relative
        # uncertainty 4 u/mu) and to mu_a^2 mu_b^2 for an unlike one (2 sqrt 2 u/mu).
        sure = self.liquid(0.0)
        base = interact(sure, sure, distance="2 nm")
        orientation = float(base.terms.orientation)
        for other, factor in ((self.liquid(0.02), 4), (self.liquid(0.02, "two"), 2 * math.sqrt(2))):
            pair = interact(self.liquid(0.02), other, distance="2 nm")
            polar = math.sqrt(pair.total_uncertainty**2 - base.total_uncertainty**2)
            induction = float(pair.terms.induction)
            expected = abs(orientation) * factor * 0.01 + abs(induction) * factor / 2 * 0.01
            assert polar == pytest.approx(expected, rel=2e-2)

    def test_better_inputs_give_a_smaller_uncertainty(self) -> None:
        rough, fine = (
            interact(x, x, distance="0.5 nm") for x in (self.liquid(0.3), self.liquid(0.01))
        )
        assert rough.total_uncertainty > fine.total_uncertainty
        for force in FORCES:
            assert rough.share_uncertainty[force] >= fine.share_uncertainty[force]

    def test_a_given_distance_is_exact_and_contact_is_not(self, shelf: Shelf) -> None:
        a = shelf["acetone"]
        touching = interact(a, a)
        given_ = interact(a, a, distance=touching.distance)
        assert given_.total_uncertainty < touching.total_uncertainty
        assert given_.distance_basis == "given"


class TestAsked:
    """What a caller may ask for, and what is refused."""

    def test_units_and_plain_numbers(self, shelf: Shelf) -> None:
        a, b = shelf["acetone"], shelf["water"]
        one = interact(a, b, temperature="40 degC", distance="5 angstrom")
        two = interact(a, b, temperature=313.15, distance=5e-10)
        assert one.to_dict() == two.to_dict()

    def test_refusals(self, shelf: Shelf) -> None:
        a = shelf["acetone"]
        with pytest.raises(OutsideRange, match="distance"):
            interact(a, a, distance=0.0)
        with pytest.raises(UnitMismatch):
            interact(a, a, distance="1 kg")
        with pytest.raises(OutsideRange, match="absolute zero"):
            interact(a, a, temperature=-1.0)
        with pytest.raises(OutsideRange, match="dispersion model"):
            interact(a, a, dispersion="best")
        with pytest.raises(MissingValue, match=r"molar volume; .*give a distance"):
            interact(Liquid("x", dipole=1.0, polarizability=5.0, formula="CH4"), a)
        with pytest.raises(MissingValue, match="dipole"):
            interact(Liquid("x", polarizability=5.0), a)
        with pytest.raises(MissingValue, match="ionization energy"):
            interact(shelf["cinnamaldehyde"], a, dispersion="london")

    def test_without_ionization_energy_it_says_so(self, shelf: Shelf) -> None:
        pair = interact(shelf["cinnamaldehyde"], shelf["acetone"])
        assert pair.model == "slater-kirkwood-effective"
        assert "no-ionization-energy" in {r.code for r in pair.reasons}

    def test_models_stay_selectable_and_bracket_the_default(self, shelf: Shelf) -> None:
        a = shelf["acetone"]
        low, default, high = (
            float(interact(a, a, dispersion=m).terms.c6_dispersion)
            for m in ("london", "auto", "slater-kirkwood")
        )
        assert low < default < high
        assert default == pytest.approx(math.sqrt(low * high))

    def test_plain_data_has_the_agreed_keys_and_is_json(self, shelf: Shelf) -> None:
        data = interact(shelf["acetone"], shelf["hexane"]).to_dict()
        text = json.dumps(data, allow_nan=False)
        assert json.loads(text) == data
        agreed = {
            "a", "b", "temperature_K", "distance_nm", "distance_basis", "coupling", "orientation",
            "induction", "dispersion", "total", "share", "c6_1e-79_J_m6", "verdict",
            "leading_order_error", "reasons",
        }  # fmt: skip
        assert agreed <= set(data)
        assert set(data["share"]) == set(FORCES)
        assert data["dispersion"]["model"]
        assert data["c6_1e-79_J_m6"]["total"] == pytest.approx(
            sum(data["c6_1e-79_J_m6"][f] for f in FORCES)
        )

    def test_profiles_pass_through_the_pair(self, shelf: Shelf) -> None:
        pair = interact(shelf["acetone"], shelf["water"])
        near, here = along_distance(pair, [0.9 * pair.distance, pair.distance]).total
        assert here == pytest.approx(float(pair.terms.total))
        assert near < here
        cold, same = along_temperature(pair, [250.0, pair.temperature]).total
        assert same == pytest.approx(float(pair.terms.total))
        assert cold < same

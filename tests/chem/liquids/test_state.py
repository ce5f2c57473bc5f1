"""What numbers become at a temperature: carried, kept, worked out, or missing and why."""

import math

import numpy as np
import pytest

from stillroom.chem import Liquid, Value, load_shelf
from stillroom.chem.data.quantities import QUANTITIES
from stillroom.chem.forces.dispersion import model_uncertainty
from stillroom.chem.liquids.gaps import DISABLES, gaps
from stillroom.chem.liquids.temperature import RACKETT_ERROR, RACKETT_GUESS_ERROR


def measured(name: str, number: float, spread: float = 0.0, temperature: float | None = 298.15):
    return Value(name, number, QUANTITIES[name].unit, "measured", "book", spread, temperature)


def acetone(**changes: Value | float | None) -> Liquid:
    """CRC Handbook values (from memory), with round uncertainties."""
    values: dict[str, Value | float | None] = {
        "dipole": measured("dipole", 2.88, 0.03, None),
        "polarizability": measured("polarizability", 6.4, 0.1, None),
        "ionization_energy": measured("ionization_energy", 9.70, 0.01, None),
        "molar_mass": measured("molar_mass", 58.08, 0.0, None),
        "density": measured("density", 784.5, 0.8),
        "vaporization_enthalpy": measured("vaporization_enthalpy", 30.99, 0.31),
        "permittivity": measured("permittivity", 20.7, 0.2),
        "refractive_index": measured("refractive_index", 1.356, 0.001),
        "boiling_point": measured("boiling_point", 56.1, 0.1, None),
        "critical_temperature": measured("critical_temperature", 235.0, 0.5, None),
    } | changes
    return Liquid("acetone", formula="C3H6O", **{k: v for k, v in values.items() if v is not None})


class TestWorkedOut:
    """Derived numbers, their kind, source and uncertainty."""

    def test_molar_volume(self) -> None:
        value = acetone().need("molar_volume")
        assert value.number == pytest.approx(58.08 / 0.7845)
        assert value.uncertainty == pytest.approx(value.number * 0.8 / 784.5, rel=1e-3)
        assert (value.kind, value.source) == ("derived", "from molar_mass, density")
        assert value.temperature == 298.15

    def test_cohesive_energy_and_solubility_parameter(self) -> None:
        energy = acetone().need("cohesive_energy")
        assert energy.number == pytest.approx(30.99 - 8.314462618e-3 * 298.15)
        assert energy.uncertainty == pytest.approx(0.31, rel=1e-6)
        delta = acetone().need("solubility_parameter")
        # Half of each relative uncertainty: delta^2 = E / V.
        relative = math.hypot(0.31 / energy.number, 0.8 / 784.5) / 2
        assert delta.uncertainty == pytest.approx(delta.number * relative, rel=1e-3)

    def test_kirkwood_factor(self) -> None:
        def spread(**changes: Value) -> float:
            return acetone(**changes).need("kirkwood_factor").uncertainty

        sure = {
            "permittivity": measured("permittivity", 20.7),
            "refractive_index": measured("refractive_index", 1.356),
            "density": measured("density", 784.5),
        }
        g = acetone().need("kirkwood_factor")
        assert g.kind == "derived"
        # Proportional to mu^-2, so twice the relative uncertainty of the moment when alone.
        assert spread(**sure) == pytest.approx(g.number * 2 * 0.03 / 2.88, rel=1e-3)
        assert spread() > spread(**sure)

    def test_c6_takes_in_the_spread_between_models(self) -> None:
        liquid = acetone()
        c6 = liquid.need("c6")
        alpha = liquid.need("polarizability").si
        from stillroom.chem.forces.dispersion import london_c6, slater_kirkwood_c6

        ionization = liquid.need("ionization_energy").si
        model = float(
            model_uncertainty(
                london_c6(alpha, alpha, ionization, ionization),
                slater_kirkwood_c6(alpha, alpha, 24, 24),
            )
        )
        # geometric mean of alpha^2 I and alpha^(3/2): alpha^1.75 I^0.5.
        inputs = math.hypot(1.75 * 0.1 / 6.4, 0.5 * 0.01 / 9.70)
        assert c6.uncertainty == pytest.approx(c6.number * math.hypot(inputs, model), rel=1e-3)

    @pytest.mark.parametrize(
        ("formula", "ionization", "source"),
        [
            ("C3H6O", 9.7, "from polarizability, ionization_energy, valence electrons"),
            ("C3H6O", None, "from polarizability, valence electrons"),
            ("", 9.7, "from polarizability, ionization_energy"),
            ("", None, None),
        ],
    )
    def test_c6_names_what_it_was_made_from(self, formula, ionization, source) -> None:
        given = {} if ionization is None else {"ionization_energy": ionization}
        value = Liquid("x", formula=formula, polarizability=6.4, **given).c6
        assert (None if value is None else value.source) == source

    def test_a_number_of_ones_own_wins_and_keeps_its_uncertainty(self) -> None:
        own = {
            name: measured(name, number, 0.5, None)
            for name, number in [
                ("molar_volume", 80.0), ("cohesive_energy", 20.0), ("kirkwood_factor", 2.0),
                ("c6", 700.0), ("solubility_parameter", 18.0),
            ]
        }  # fmt: skip
        for name, value in own.items():
            assert acetone(**own).values[name] == value

    @pytest.mark.parametrize("kind", ["computed", "estimated"])
    def test_the_weakest_input_gives_the_kind(self, kind: str) -> None:
        density = Value("density", 784.5, "kg/m**3", kind, "x", 8.0, 298.15)
        liquid = acetone(density=density)
        for name in ("molar_volume", "solubility_parameter", "kirkwood_factor"):
            assert liquid.need(name).kind == kind
        assert liquid.need("cohesive_energy").kind == "derived"

    def test_what_is_missing_says_which_input_it_lacks(self) -> None:
        liquid = acetone(density=None, dipole=None)
        assert liquid.molar_volume is None
        assert liquid.notes["molar_volume"] == "no density"
        assert liquid.notes["solubility_parameter"] == "no molar volume (no density)"
        assert liquid.notes["kirkwood_factor"] == "no molar volume (no density), no dipole"


class TestCarried:
    """Density and vaporization enthalpy follow temperature by a rule, and say so."""

    def test_kinds_and_notes_grow_weaker_with_distance(self) -> None:
        kinds = [acetone().at(t).need("density").kind for t in (298.15, 306.0, 313.15)]
        assert kinds == ["measured", "derived", "estimated"]
        assert acetone().need("density").note == ""
        assert acetone().at(313.15).need("density").note == "carried from 25 °C"

    def test_the_rule_adds_its_own_uncertainty(self) -> None:
        for critical, error in (
            (measured("critical_temperature", 235.0, 0.5, None), RACKETT_ERROR),
            (None, RACKETT_GUESS_ERROR),
        ):
            cold = acetone(critical_temperature=critical)
            warm = cold.at(328.15).need("density")
            moved = warm.number - 784.5
            scaled = 0.8 * warm.number / 784.5
            assert warm.uncertainty == pytest.approx(math.hypot(scaled, error * moved), rel=1e-6)

    def test_a_guessed_critical_temperature_is_named(self) -> None:
        warm = acetone(critical_temperature=None).at(328.15).need("vaporization_enthalpy")
        assert "1.5 times the boiling point" in warm.note
        assert warm.kind == "estimated"

    def test_without_a_rule_the_number_is_missing_and_says_why(self) -> None:
        bare = acetone(critical_temperature=None, boiling_point=None)
        assert bare.at(302.0).need("density").number == pytest.approx(784.5)  # within 5 K
        far = bare.at(320.0)
        assert far.density is None
        assert far.notes["density"] == "tabulated at 25 °C only"
        assert far.notes["molar_volume"] == "no density (tabulated at 25 °C only)"

    @pytest.mark.parametrize("name", ["permittivity", "refractive_index"])
    def test_tabulated_numbers_are_kept_near_and_dropped_far(self, name: str) -> None:
        assert acetone().at(303.15).need(name).number == acetone().need(name).number
        assert acetone().at(303.15).need(name).temperature == 298.15
        for far in (303.3, 292.9):
            assert acetone().at(far).values.get(name) is None
            assert acetone().at(far).notes[name] == "tabulated at 25 °C only"
            assert "tabulated at 25 °C only" in acetone().at(far).notes["kirkwood_factor"]

    def test_every_missing_derived_number_of_the_warm_shelf_says_why(self) -> None:
        shelf = load_shelf(temperature="80 degC")
        for liquid in shelf.take(np.arange(0, len(shelf), 25)):
            for name in ("molar_volume", "cohesive_energy", "density"):
                if name not in liquid.values:
                    at_home = liquid.at(298.15)
                    assert name not in at_home.values or liquid.notes[name], (liquid.name, name)


class TestGaps:
    """What a liquid lacks, and what that stops."""

    def test_only_what_is_stored_can_be_lacking(self) -> None:
        lacking = dict(gaps(acetone(density=None)))
        assert lacking["density"] == "no molar volume, so pairs need a given distance"
        assert "molar_volume" not in lacking
        assert "dipole" not in lacking

    def test_every_consequence_belongs_to_a_stored_quantity(self) -> None:
        assert all(not QUANTITIES[name].derived for name in DISABLES)

    def test_a_dropped_number_is_lacking_too(self) -> None:
        assert "permittivity" in dict(gaps(acetone().at(340.0)))
        assert "permittivity" not in dict(gaps(acetone()))

"""One liquid: handbook values of what follows from others, and the user's own liquids."""

import copy
import math
import pickle

import numpy as np
import pytest

from stillroom.chem import Liquid, Shelf, Value, load_shelf
from stillroom.chem.data.errors import (
    BadNumber,
    MissingValue,
    OutsideRange,
    UnitMismatch,
    UnknownQuantity,
)
from stillroom.chem.data.quantities import QUANTITIES


@pytest.fixture(scope="module")
def shelf() -> Shelf:
    return load_shelf()


@pytest.mark.parametrize(
    ("name", "g", "tolerance"),
    [
        # Kirkwood factors worked out from handbook inputs (from memory): water 2.8, methanol 3.1
        # (2.7 to 3.2 by author), ethanol 3.1, acetonitrile 0.8, pyridine 1.0, nitrobenzene 0.95.
        ("water", 2.8, 0.15),
        ("methanol", 3.0, 0.35),
        ("ethanol", 3.1, 0.3),
        ("acetonitrile", 0.8, 0.1),
        ("pyridine", 1.0, 0.15),
        ("nitrobenzene", 0.95, 0.15),
    ],
)
def test_kirkwood_factors(shelf: Shelf, name: str, g: float, tolerance: float) -> None:
    value = shelf[name].kirkwood_factor
    assert value is not None
    assert value.number == pytest.approx(g, abs=tolerance)
    assert value.kind == "derived"


def test_no_kirkwood_factor_without_a_dipole(shelf: Shelf) -> None:
    assert shelf["hexane"].kirkwood_factor is None
    assert shelf["benzene"].kirkwood_factor is None


@pytest.mark.parametrize(
    ("name", "delta"),
    [
        # Hildebrand solubility parameters at 25 degC in MPa^0.5: A. F. M. Barton, Chem. Rev. 75
        # (1975) 731, Table 5 (from memory).
        ("hexane", 14.9),
        ("cyclohexane", 16.8),
        ("benzene", 18.8),
        ("toluene", 18.2),
        ("carbon tetrachloride", 17.6),
        ("acetone", 20.0),
        ("ethanol", 26.5),
        ("methanol", 29.6),
        ("water", 47.8),
    ],
)
def test_solubility_parameters(shelf: Shelf, name: str, delta: float) -> None:
    value = shelf[name].solubility_parameter
    assert value is not None
    assert value.number == pytest.approx(delta, rel=0.03)


class TestOwnLiquid:
    """`Liquid(...)` with the user's own numbers."""

    def test_numbers_and_texts(self) -> None:
        mine = Liquid("mine", formula="CH4O", dipole="1.7 D", density=791, molar_mass="32.04 g/mol")
        assert mine.dipole is not None
        assert mine.dipole.kind == "user"
        assert mine.molar_volume is not None
        assert mine.molar_volume.to("cm**3/mol") == pytest.approx(32.04 / 0.791)
        assert mine.permittivity is None

    def test_wrong_input_is_told(self) -> None:
        with pytest.raises(UnknownQuantity, match="dipole"):
            Liquid("x", dipol="1 D")
        with pytest.raises(UnitMismatch):
            Liquid("x", dipole="1 kg")
        with pytest.raises(BadNumber):
            Liquid("x", dipole="much")
        with pytest.raises(OutsideRange):
            Liquid("x", dipole="500 D")
        with pytest.raises(AttributeError):
            _ = Liquid("x").colour

    @pytest.mark.parametrize("number", [math.nan, math.inf, -0.1, 15.1, "1e300 D", "-2 D"])
    def test_an_unbelievable_number_is_told(self, number: float | str) -> None:
        with pytest.raises(OutsideRange, match=r"dipole .* expected 0 to 15 D"):
            Liquid("x", dipole=number)

    def test_a_value_of_another_quantity_is_told(self) -> None:
        with pytest.raises(UnitMismatch, match="'density' is not a dipole"):
            Liquid("x", dipole=Value("density", 8.0, "kg/m**3", "user", "user", 0.0))
        with pytest.raises(UnknownQuantity):
            Liquid("x", dipol=Value("dipol", 8.0, "debye", "user", "user", 0.0))

    @pytest.mark.parametrize(
        ("name", "number", "unit", "spread", "own", "own_spread"),
        [
            # 1 D = 3.33564e-30 C m; a degree Fahrenheit is 5/9 of a kelvin.
            ("dipole", 6.17e-30, "coulomb*meter", 1e-31, 1.8497, 0.02998),
            ("flash_point", 68.0, "degF", 9.0, 20.0, 5.0),
            ("density", 0.8, "g/mL", 0.001, 800.0, 1.0),
            ("density", 800.0, "kg/m**3", math.nan, 800.0, math.nan),
        ],
    )
    def test_a_value_in_another_unit_is_converted_with_its_uncertainty(
        self, name, number, unit, spread, own, own_spread
    ) -> None:
        given = Value(name, number, unit, "measured", "paper", spread, 293.15, "note")
        kept = Liquid("x", **{name: given}).need(name)
        assert kept.number == pytest.approx(own, rel=1e-4)
        assert kept.uncertainty == pytest.approx(own_spread, rel=1e-3, nan_ok=True)
        assert kept.unit == QUANTITIES[name].unit
        assert (kept.kind, kept.source, kept.note) == ("measured", "paper", "note")

    def test_a_temperature_may_be_a_text_and_must_be_possible(self) -> None:
        assert Liquid("x", temperature="25 degC").temperature == 298.15
        with pytest.raises(OutsideRange, match="absolute zero"):
            Liquid("x", temperature="-300 degC")

    def test_texts_are_made_safe(self) -> None:
        mine = Liquid("my\x1b[31m liquid", formula="CH4\n", family="ketone\u202e", smiles="C\x00")
        who = mine.identity
        assert (who.name, who.id) == ("my [31m liquid", "my-[31m-liquid")
        assert (who.formula, who.family, who.smiles) == ("CH4", "ketone", "C")

    def test_two_liquids_are_the_same_only_with_the_same_numbers(self, shelf: Shelf) -> None:
        one, two = (Liquid("x", formula="CH4", dipole=d) for d in (1.0, 2.0))
        assert one.same_as(Liquid("x", formula="CH4", dipole=1.0))
        assert not one.same_as(two)
        assert not one.same_as(Liquid("y", formula="CH4", dipole=1.0))
        assert shelf["acetone"].same_as(shelf["propanone"].at(310))
        assert not shelf["acetone"].same_as(shelf["water"])

    def test_copies_are_whole(self, shelf: Shelf) -> None:
        """Worker processes get liquids by pickling."""
        acetone = shelf["acetone"]
        for again in (copy.deepcopy(acetone), pickle.loads(pickle.dumps(acetone))):
            assert again.values == acetone.values
            assert again.identity == acetone.identity

    def test_a_missing_value_names_what_it_stops(self) -> None:
        with pytest.raises(MissingValue, match="x has no dipole; no orientation"):
            Liquid("x").need("dipole", "no orientation")


class TestTemperature:
    """What follows temperature, what is missing, and what says why."""

    def test_density_and_enthalpy_fall_with_temperature(self, shelf: Shelf) -> None:
        cold, warm = shelf["acetone"], shelf["acetone"].at("50 degC")
        for name in ("density", "vaporization_enthalpy"):
            assert warm.need(name).number < cold.need(name).number
            assert warm.need(name).temperature == pytest.approx(323.15)

    def test_gas_phase_values_stay(self, shelf: Shelf) -> None:
        for name in ("dipole", "polarizability", "ionization_energy"):
            assert shelf["acetone"].at(340).values[name] == shelf["acetone"].values[name]

    def test_numbers_travel_back_unchanged(self, shelf: Shelf) -> None:
        there_and_back = shelf["acetone"].at(320).at(298.15)
        assert there_and_back.values == shelf["acetone"].values

    def test_an_estimate_is_never_shown_as_a_measurement(self, shelf: Shelf) -> None:
        for liquid in shelf.at("60 degC").take(np.arange(0, 800, 40)):
            for name, value in liquid.values.items():
                if value.quantity in ("density", "vaporization_enthalpy"):
                    assert value.kind in ("estimated", "derived"), name
                if value.kind == "estimated":
                    assert value.uncertainty > 0

    def test_outside_the_liquid_range(self, shelf: Shelf) -> None:
        acetone = shelf["acetone"]
        assert acetone.outside_liquid_range() is None
        assert "boiling" in str(acetone.at("90 degC").outside_liquid_range())
        assert "melting" in str(acetone.at("-120 degC").outside_liquid_range())
        assert "melting" in str(shelf["ethylene carbonate"].outside_liquid_range())

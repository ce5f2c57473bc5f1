"""One liquid: handbook values of what follows from others, and the user's own liquids."""

import numpy as np
import pytest

from stillroom.chem import Liquid, Shelf, load_shelf
from stillroom.chem.data.errors import (
    BadNumber,
    MissingValue,
    OutsideRange,
    UnitMismatch,
    UnknownQuantity,
)
from stillroom.chem.forces.contact import contact_diameter
from stillroom.chem.liquids.refraction import lorentz_lorenz_polarizability
from stillroom.chem.liquids.structure import valence_electrons
from stillroom.chem.liquids.temperature import rackett_density_ratio, watson_ratio


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


def test_lorentz_lorenz_of_water_and_benzene() -> None:
    # n_D and density at 20 degC: CRC Handbook. Water 1.45 to 1.47 A^3, benzene 10.3 to 10.4 A^3
    # (from memory).
    from stillroom.chem.data.constants import COULOMB

    water = lorentz_lorenz_polarizability(1.3330, 18.048e-6) / COULOMB * 1e30
    benzene = lorentz_lorenz_polarizability(1.5011, 88.87e-6) / COULOMB * 1e30
    assert 1.45 <= water <= 1.48
    assert 10.3 <= benzene <= 10.4


@pytest.mark.parametrize(
    ("formula", "count"), [("H2O", 8), ("C6H6", 30), ("CHCl3", 26), ("C2H6OS", 26), ("D2O", 8)]
)
def test_valence_electrons(formula: str, count: int) -> None:
    assert valence_electrons(formula) == count


@pytest.mark.parametrize("formula", ["", "Xx2", "C-6", "h2o"])
def test_valence_electrons_of_no_formula(formula: str) -> None:
    assert np.isnan(valence_electrons(formula))


@pytest.mark.parametrize(
    ("molar_volume_cm3", "peak_nm"),
    [
        # First centre-to-centre peak of the liquid by diffraction (from memory): benzene 0.575,
        # carbon tetrachloride 0.59, acetonitrile 0.46 nm.
        (89.4, 0.575),
        (97.1, 0.59),
        (52.9, 0.46),
    ],
)
def test_contact_is_near_the_first_diffraction_peak(molar_volume_cm3, peak_nm) -> None:
    assert contact_diameter(molar_volume_cm3 * 1e-6) * 1e9 == pytest.approx(peak_nm, rel=0.05)


def test_water_is_the_known_exception_of_the_contact_rule() -> None:
    # Oxygen-oxygen peak of liquid water: 0.28 nm (from memory).
    assert contact_diameter(18.07e-6) * 1e9 > 1.1 * 0.28


FLUIDS = {  # CoolProp's name, melting to boiling range used (K)
    "Water": (280, 370), "Ethanol": (250, 350), "Methanol": (220, 335), "Acetone": (220, 325),
    "Toluene": (220, 380), "n-Hexane": (200, 340), "Cyclohexane": (285, 350), "Benzene": (285, 350),
    "n-Octane": (230, 395),
}  # fmt: skip


@pytest.mark.parametrize("fluid", FLUIDS)
def test_rules_for_temperature_against_reference_equations(fluid: str) -> None:
    """Rackett and Watson against CoolProp's equations of state, from 25 degC.

    Water is the known exception of Rackett's rule (density maximum, hydrogen bonds): 4 %.
    """
    from CoolProp.CoolProp import PropsSI

    critical = PropsSI("Tcrit", fluid)
    at = np.linspace(*FLUIDS[fluid], 7)

    def density(t):
        return PropsSI("D", "T", t, "Q", 0, fluid)

    def enthalpy(t):
        return PropsSI("H", "T", t, "Q", 1, fluid) - PropsSI("H", "T", t, "Q", 0, fluid)

    rackett = rackett_density_ratio(at, 298.15, critical) * density(298.15)
    watson = watson_ratio(at, 298.15, critical) * enthalpy(298.15)
    assert rackett == pytest.approx(
        [density(t) for t in at], rel=0.04 if fluid == "Water" else 0.015
    )
    assert watson == pytest.approx([enthalpy(t) for t in at], rel=0.04)


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

"""Units at the edges: factors against Pint, constants against CODATA, texts in and out."""

import math

import pytest
import scipy.constants as codata
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem.data import constants
from stillroom.chem.data.clean import clean_text
from stillroom.chem.data.errors import BadNumber, OutsideRange, StillroomError, UnitMismatch
from stillroom.chem.data.quantities import QUANTITIES, Quantity, quantity
from stillroom.chem.data.units import parse_distance, parse_temperature, parse_value, registry

ALL = pytest.mark.parametrize("q", QUANTITIES.values(), ids=lambda q: q.name)
# Polarizabilities are volumes at the edges, and C^2 m^2/J inside: 4 pi eps0 stands between.
SI = {
    "dipole": "coulomb * meter",
    "ionization_energy": "joule",
    "c6": "joule * meter**6",
    "molar_mass": "kg / mol",
    "density": "kg / meter**3",
    "molar_volume": "meter**3 / mol",
    "vaporization_enthalpy": "joule / mol",
    "cohesive_energy": "joule / mol",
    "solubility_parameter": "pascal**0.5",
    "vapor_pressure": "pascal",
    "viscosity": "pascal * second",
    "surface_tension": "newton / meter",
}


def si_unit(q: Quantity) -> str:
    if q.unit == "degC":
        return "kelvin"
    if q.unit in ("percent", "ppm"):
        return "dimensionless"
    return SI.get(q.name, q.unit or "dimensionless")


@ALL
def test_factor_agrees_with_pint(q: Quantity) -> None:
    if q.name == "polarizability":
        expected = 4 * math.pi * codata.epsilon_0 * 1e-30
    else:
        unit = q.unit or "dimensionless"
        ureg = registry()
        here = ureg.parse_expression(unit) if q.name == "c6" else ureg.Quantity(1.0, unit)
        expected = here.to(si_unit(q)).magnitude - q.offset
    assert q.factor == pytest.approx(expected, rel=1e-8)


@ALL
def test_column_names_carry_the_unit(q: Quantity) -> None:
    assert (q.column == q.name) == (q.unit == "")
    assert quantity(q.column) is quantity(q.name) is q


@pytest.mark.parametrize(
    ("ours", "codata_name"),
    [
        (constants.AVOGADRO, "Avogadro constant"),
        (constants.BOLTZMANN, "Boltzmann constant"),
        (constants.GAS_CONSTANT, "molar gas constant"),
        (constants.ELEMENTARY_CHARGE, "elementary charge"),
        (constants.SPEED_OF_LIGHT, "speed of light in vacuum"),
        (constants.PLANCK, "Planck constant"),
        (constants.HBAR, "reduced Planck constant"),
        (constants.ELECTRON_MASS, "electron mass"),
        (constants.VACUUM_PERMITTIVITY, "vacuum electric permittivity"),
        (constants.BOHR, "Bohr radius"),
        (constants.HARTREE, "Hartree energy"),
    ],
)
def test_constants_are_codata(ours: float, codata_name: str) -> None:
    # Source: CODATA as carried by scipy.constants.
    assert ours == pytest.approx(codata.value(codata_name), rel=1e-8)


def test_debye() -> None:
    # 1 D = 3.33564e-30 C m: IUPAC Green Book, 3rd ed. 2007 (from memory).
    assert pytest.approx(3.33564e-30, rel=1e-5) == constants.DEBYE


@given(st.sampled_from(sorted(QUANTITIES)), st.floats(-1e6, 1e6))
def test_round_trip_through_si(name: str, number: float) -> None:
    q = QUANTITIES[name]
    assert q.from_si(q.to_si(number)) == pytest.approx(number, rel=1e-9, abs=1e-9)


@given(st.sampled_from(sorted(QUANTITIES)), st.floats(0.01, 1e4))
def test_round_trip_through_text(name: str, number: float) -> None:
    q = QUANTITIES[name]
    si = parse_value(f"{number!r} {q.unit}", q)
    assert si == pytest.approx(q.to_si(number), rel=1e-9)


@pytest.mark.parametrize(
    ("text", "name", "si"),
    [
        ("1.85 D", "dipole", 6.1709e-30),
        ("6.17e-30 C*m", "dipole", 6.17e-30),
        ("1.45 angstrom**3", "polarizability", 1.6133e-40),
        ("1.6133e-40 C^2 m^2/J", "polarizability", 1.6133e-40),
        ("12.6 eV", "ionization_energy", 2.01874e-18),
        ("1215.7 kJ/mol", "ionization_energy", 2.01873e-18),
        ("20 MPa^0.5", "solubility_parameter", 20e3),
        ("9.78 (cal/cm^3)**0.5", "solubility_parameter", 20.0e3),
        ("68 degF", "boiling_point", 293.15),
        ("1 atm", "vapor_pressure", 101325.0),
        ("0.9 g/mL", "density", 900.0),
        ("0.3 cP", "viscosity", 3e-4),
        ("22 dyn/cm", "surface_tension", 0.022),
        ("45.3 hartree*bohr**6", "c6", 4.337e-78),
    ],
)
def test_units_of_the_trade_are_read(text: str, name: str, si: float) -> None:
    assert parse_value(text, quantity(name)) == pytest.approx(si, rel=2e-3)


@pytest.mark.parametrize("text", ["3 kg", "3 D/m", "3 flurbs", "3 D D", "3 __import__('os')"])
def test_a_wrong_unit_is_told(text: str) -> None:
    with pytest.raises(UnitMismatch, match="dipole"):
        parse_value(text, quantity("dipole"))


@pytest.mark.parametrize("text", ["", "D", "nan D", "inf D", "1e400 D", "--3 D", "9" * 200])
def test_no_number_is_told(text: str) -> None:
    with pytest.raises(BadNumber, match="dipole"):
        parse_value(text, quantity("dipole"))


@given(st.text())
def test_any_text_is_a_value_or_a_clear_error(text: str) -> None:
    for read in (lambda t: parse_value(t, quantity("density")), parse_temperature, parse_distance):
        try:
            assert math.isfinite(read(text))
        except StillroomError as problem:
            assert "\n" not in clean_text(str(problem))


@pytest.mark.parametrize(
    ("text", "kelvin"),
    [("25 degC", 298.15), ("298.15 K", 298.15), ("77 degF", 298.15), ("25 °C", 298.15), (300, 300)],
)
def test_temperatures(text: str, kelvin: float) -> None:
    assert parse_temperature(text) == pytest.approx(kelvin)


@pytest.mark.parametrize("text", ["0 K", "-300 degC", "-1 K", "1e9 K", 0, -5.0, math.nan])
def test_impossible_temperatures(text: str) -> None:
    with pytest.raises(OutsideRange, match="absolute zero"):
        parse_temperature(text)


@pytest.mark.parametrize("text", ["0 nm", "-1 nm", "1e9 nm", 0.0, -5e-10, math.nan])
def test_impossible_distances(text: str) -> None:
    with pytest.raises(OutsideRange, match="distance"):
        parse_distance(text)


def test_distances_in_any_length() -> None:
    assert parse_distance("5 angstrom") == pytest.approx(parse_distance("0.5 nm"))
    assert parse_distance(5e-10) == pytest.approx(parse_distance("500 pm"))

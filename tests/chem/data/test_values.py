"""Values and columns: a number is never bare and never loses what travels with it."""

import copy
import json
import math
import pickle

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem import Value
from stillroom.chem.data import constants
from stillroom.chem.data.errors import UnitMismatch
from stillroom.chem.data.quantities import QUANTITIES, Quantity
from stillroom.chem.data.values import KIND_MARKS, KINDS, Column

ALL = pytest.mark.parametrize("q", QUANTITIES.values(), ids=lambda q: q.name)
DIPOLE = Value("dipole", 2.88, "debye", "measured", "somewhere", 0.03)


class TestValue:
    """One value of one quantity."""

    def test_in_other_units(self) -> None:
        assert DIPOLE.to("debye") == pytest.approx(2.88)
        assert DIPOLE.to("coulomb*meter").magnitude == pytest.approx(9.6066e-30, rel=1e-4)
        assert DIPOLE.to("debye").units == "debye"
        assert DIPOLE.si_uncertainty == pytest.approx(0.03 * constants.DEBYE)

    @pytest.mark.parametrize("unit", ["kelvin", "flurbs", "", "debye**2", "9**9**9"])
    def test_a_unit_of_another_kind(self, unit: str) -> None:
        with pytest.raises(UnitMismatch, match="dipole"):
            DIPOLE.to(unit)

    @ALL
    def test_every_quantity_in_its_own_unit_and_as_printed(self, q: Quantity) -> None:
        value = Value(q.name, 7.25, q.unit, "measured", "x", 0.5)
        assert value.to(q.unit or "dimensionless") == pytest.approx(7.25, rel=1e-12)
        assert value.to(q.unit_label) == 7.25

    def test_in_units_of_the_trade(self) -> None:
        # 1 MPa^0.5 = 0.48888 (cal/cm^3)^0.5 with 1 cal = 4.184 J; 1 eV = 96.485 kJ/mol;
        # 1 A^3 = 6.7483 bohr^3: CODATA and arithmetic.
        delta = Value("solubility_parameter", 20.0, "MPa**0.5", "derived", "x", 0.1)
        assert delta.to("(cal/cm**3)**0.5") == pytest.approx(20 * 0.48888, rel=1e-4)
        ionization = Value("ionization_energy", 10.0, "eV", "measured", "x", 0.1)
        assert ionization.to("kJ/mol") == pytest.approx(964.85, rel=1e-4)
        alpha = Value("polarizability", 1.0, "angstrom**3", "measured", "x", 0.1)
        assert alpha.to("bohr**3") == pytest.approx(6.7483, rel=1e-4)
        assert alpha.to("C^2 m^2/J") == pytest.approx(1.11265e-40, rel=1e-5)

    def test_the_zero_of_a_scale_moves_the_number_and_not_its_uncertainty(self) -> None:
        value = Value("boiling_point", 56.1, "degC", "measured", "x", 0.3)
        assert value.si == pytest.approx(329.25)
        assert value.si_uncertainty == 0.3
        assert value.to("degF") == pytest.approx(132.98)

    def test_printed_with_uncertainty_unit_and_kind(self) -> None:
        assert str(DIPOLE) == "2.88 ± 0.03 D (measured)"
        unknown = Value("permittivity", 20.7, "", "estimated", "x", math.nan)
        assert str(unknown) == "20.70 (estimated)"

    def test_every_kind_has_its_own_mark(self) -> None:
        assert set(KIND_MARKS) == set(KINDS)
        assert len(set(KIND_MARKS.values())) == len(KINDS)


class TestMagnitude:
    """A float that remembers its unit."""

    number = DIPOLE.to("debye")

    def test_arithmetic_gives_plain_numbers(self) -> None:
        assert type(self.number + 1) is float
        assert self.number * 2 == pytest.approx(5.76)
        assert json.loads(json.dumps(self.number)) == pytest.approx(2.88)
        assert float(np.sqrt(self.number)) == pytest.approx(math.sqrt(2.88))

    @pytest.mark.parametrize(
        "again", [copy.copy, copy.deepcopy, lambda m: pickle.loads(pickle.dumps(m))]
    )
    def test_copies_keep_the_unit(self, again) -> None:
        assert again(self.number) == self.number
        assert again(self.number).units == "debye"


class TestColumn:
    """The values of one quantity for many liquids."""

    @given(
        st.sampled_from(sorted(QUANTITIES)),
        st.floats(-1e5, 1e5),
        st.floats(0, 1e4) | st.just(math.nan),
        st.none() | st.floats(1, 2000),
        st.sampled_from(KINDS),
    )
    def test_what_is_put_comes_back(self, name, number, spread, temperature, kind) -> None:
        q = QUANTITIES[name]
        value = Value(name, number, q.unit, kind, "key", spread, temperature, "a note")
        column = Column.empty(q, 3)
        column.put(1, value)
        assert column.value(0) is None
        assert column.value(2) is None
        back = column.value(1)
        assert back is not None
        assert back.number == pytest.approx(number, rel=1e-9, abs=1e-9)
        assert back.uncertainty == pytest.approx(spread, rel=1e-9, nan_ok=True)
        assert (back.temperature, back.kind, back.source, back.note) == (
            temperature, kind, "key", "a note",
        )  # fmt: skip

    def test_taking_rows_keeps_their_order_and_everything_in_them(self) -> None:
        column = Column.empty(QUANTITIES["dipole"], 4)
        for row in (0, 3):
            column.put(row, Value("dipole", row + 1.0, "debye", "measured", f"s{row}", 0.1))
        taken = column.take(np.array([3, 1, 0, 3]))
        assert [taken.value(i) for i in range(4)] == [column.value(i) for i in (3, 1, 0, 3)]

"""Dipole coupling, orientation and induction against arithmetic in Gaussian units."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem.data.constants import COULOMB, DEBYE
from stillroom.chem.forces.polar import coupling, induction_c6, orientation_c6

A3 = COULOMB * 1e-30
BOLTZMANN = 1.380649e-23  # J/K, SI 2019

# In Gaussian units 1 D = 1e-18 esu cm, so 1 D^2 / A^3 = 1e-12 erg = 1e-19 J exactly, and
# 1 D^2 A^3 = 1e-60 erg cm^6 = 1e-79 J m^6 exactly; no vacuum permittivity is involved.
# The relative difference left is that between 4 pi eps0 and 1e7/c^2 (since SI 2019), below 1e-9.


def test_coupling_of_one_debye_each_at_one_angstrom() -> None:
    x = coupling(DEBYE, DEBYE, 1e-10, 300.0)
    assert x == pytest.approx(1e-19 / (BOLTZMANN * 300.0), rel=1e-8)


def test_orientation_coefficient() -> None:
    # C = 2 mu^4 / (3 kT): 2/3 (1e-36 esu^2 cm^2)^2 / kT = 2/3 (1e-79 J m^6)(1e-19 J)/kT x 1e0.
    kt = BOLTZMANN * 300.0
    one = orientation_c6(DEBYE, DEBYE, 300.0)
    assert one == pytest.approx(2 / 3 * 1e-19 * 1e-79 / kt, rel=1e-8)
    assert orientation_c6(2 * DEBYE, DEBYE, 300.0) == pytest.approx(4 * float(one), rel=1e-12)


def test_induction_coefficient_counts_both_directions() -> None:
    like = induction_c6(DEBYE, DEBYE, 2 * A3, 2 * A3)
    assert like == pytest.approx(2 * 2e-79, rel=1e-8)
    assert induction_c6(3 * DEBYE, 0.0, 1 * A3, 5 * A3) == pytest.approx(9 * 5e-79, rel=1e-8)
    assert induction_c6(0.0, 3 * DEBYE, 1 * A3, 5 * A3) == pytest.approx(9 * 1e-79, rel=1e-8)
    assert induction_c6(0.0, 0.0, 1 * A3, 5 * A3) == 0.0


moments = st.floats(0.0, 10.0).map(lambda x: x * DEBYE)
volumes = st.floats(0.5, 50.0).map(lambda x: x * A3)


@given(moments, moments, volumes, volumes, st.floats(2e-10, 1e-8), st.floats(100.0, 900.0))
def test_symmetric_in_both_molecules(a, b, alpha, beta, r, t) -> None:
    assert coupling(a, b, r, t) == pytest.approx(float(coupling(b, a, r, t)), rel=1e-12)
    assert orientation_c6(a, b, t) == pytest.approx(float(orientation_c6(b, a, t)), rel=1e-12)
    assert induction_c6(a, b, alpha, beta) == pytest.approx(
        float(induction_c6(b, a, beta, alpha)), rel=1e-12
    )


@given(moments, moments, st.floats(2e-10, 1e-8), st.floats(100.0, 900.0))
def test_leading_coefficient_and_coupling_agree(a, b, r, t) -> None:
    # -C/r^6 = -(2/3) x^2 kT, W. H. Keesom, Phys. Z. 22 (1921) 129.
    x = float(coupling(a, b, r, t))
    assert float(orientation_c6(a, b, t)) / r**6 == pytest.approx(
        2 / 3 * x**2 * BOLTZMANN * t, rel=1e-9
    )


def test_shapes_broadcast() -> None:
    x = coupling(np.full((3, 1), DEBYE), np.full(4, DEBYE), 5e-10, 300.0)
    assert x.shape == (3, 4)

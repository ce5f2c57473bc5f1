"""Propagation of uncertainty against the analytic first-order formula."""

import math

import numpy as np
import pytest
from hypothesis import assume, given
from hypothesis import strategies as st

from stillroom.chem.data.propagation import propagate

numbers = st.floats(0.1, 10)
relative = st.floats(0, 0.01)


def test_a_product_and_a_power() -> None:
    # u(f)/f = sqrt((u_x/x)^2 + (2 u_y/y)^2) for f = x y^2, by hand.
    value, spread = propagate(lambda x, y: x * y**2, [3.0, 2.0], [0.03, 0.01])
    assert value == pytest.approx(12.0)
    assert spread == pytest.approx(12.0 * math.hypot(0.01, 0.01), rel=1e-4)


@given(numbers, numbers, st.floats(0, 0.05), st.floats(0, 0.05))
def test_a_difference(x: float, y: float, ux: float, uy: float) -> None:
    assume(ux > 1e-9 or uy > 1e-9)
    _, spread = propagate(lambda a, b: a - b, [x, y], [ux, uy])
    assert spread == pytest.approx(math.hypot(ux, uy), rel=1e-6, abs=1e-12)


@given(numbers, numbers, numbers, relative, relative, relative)
def test_powers_and_quotients(x, y, z, rx, ry, rz) -> None:
    # Source: JCGM 100:2008, equation 12: relative uncertainties of products of powers add in
    # squares, each times its exponent; the differences used here are off by the cube only.
    assume(max(rx, ry, rz) > 1e-6)
    _, spread = propagate(
        lambda a, b, c: a**2 / b * np.sqrt(c), [x, y, z], [x * rx, y * ry, z * rz]
    )
    expected = x**2 / y * math.sqrt(z) * math.hypot(2 * rx, ry, rz / 2)
    assert spread == pytest.approx(expected, rel=1e-3)


def test_over_arrays() -> None:
    value, spread = propagate(np.multiply, [np.array([1.0, 2.0]), 3.0], [np.array([0.1, 0.2]), 0])
    assert value == pytest.approx([3.0, 6.0])
    assert spread == pytest.approx([0.3, 0.6])


def test_sure_inputs_give_a_sure_result() -> None:
    value, spread = propagate(lambda x: x**3, [2.0], [0.0])
    assert (value, spread) == (8.0, 0.0)


def test_an_unknown_uncertainty_makes_the_result_unknown_in_its_own_row_only() -> None:
    _, spread = propagate(np.add, [np.array([1.0, 2.0]), 3.0], [np.array([math.nan, 0.2]), 0.0])
    assert np.isnan(spread[0])
    assert spread[1] == pytest.approx(0.2)


def test_a_missing_input_makes_the_result_missing() -> None:
    value, spread = propagate(np.add, [np.array([math.nan, 1.0]), 1.0], [np.array([0.1, 0.1]), 0])
    assert np.isnan(value).tolist() == np.isnan(spread).tolist() == [True, False]

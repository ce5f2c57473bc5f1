"""The exact angle average against high-precision quadrature, its series, limits and Monte Carlo."""

import mpmath as mp
import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem import angle_average
from stillroom.chem.forces.angle_average import aligned_energy, leading_terms

GRID = [0.05, 0.3, 0.99, 1.999, 2.0, 2.001, 3.3, 7.99, 8.01, 15.0, 29.99, 30.01, 77.0, 300.0, 1e3]


def quadrature(x: float) -> tuple[float, float]:
    """F/kT and U/kT by adaptive quadrature with 30 digits (mpmath), written independently."""
    with mp.workdps(30):
        big = mp.mpf(x)
        ends = sorted(
            {mp.mpf(0), *(max(mp.mpf(0), 1 - mp.mpf(w) / big) for w in (2, 8, 40)), mp.mpf(1)}
        )

        def root(u):
            return mp.sqrt(1 + 3 * u * u)

        z = mp.quad(lambda u: mp.sinh(big * root(u)) / (big * root(u)), ends)
        xdz = mp.quad(
            lambda u: mp.cosh(big * root(u)) - mp.sinh(big * root(u)) / (big * root(u)), ends
        )
        return float(-mp.log(z)), float(-xdz / z)


@pytest.mark.parametrize("x", GRID)
def test_agrees_with_quadrature_to_ten_digits(x: float) -> None:
    free_energy, energy = angle_average(x)
    expected_free, expected = quadrature(x)
    assert free_energy == pytest.approx(expected_free, rel=1e-10)
    assert energy == pytest.approx(expected, rel=1e-10)


def test_known_values_from_independent_quadrature() -> None:
    # Values of the integral at x = 1 and x = 5 (numerical integration to 15 digits).
    free_energy, energy = angle_average([1.0, 5.0])
    assert free_energy == pytest.approx([-0.319237349299744, -5.17896043103288], rel=1e-12)
    assert energy == pytest.approx([-0.612878959677518, -7.77038091295087], rel=1e-12)


@pytest.mark.parametrize("x", [1e-12, 1e-8, 1e-5, 1e-4, 1e-3, 1e-2])
def test_small_coupling_follows_the_series(x: float) -> None:
    # F/kT = -x^2/3 + 7 x^4/450 - ...: expansion of ln Z by hand.
    free_energy, energy = angle_average(x)
    assert free_energy == pytest.approx(-(x**2) / 3 + 7 * x**4 / 450, rel=1e-10)
    assert energy == pytest.approx(-2 * x**2 / 3 + 28 * x**4 / 450, rel=1e-10)


def test_zero_is_zero() -> None:
    free_energy, energy = angle_average(0.0)
    assert free_energy == 0.0
    assert energy == 0.0


def test_strong_coupling_approaches_two_harmonic_dipoles() -> None:
    # Classical equipartition: 4 rotational degrees of freedom give U = -2x + 2 (in kT) as x grows.
    _, energy = angle_average(1e6)
    assert energy + 2e6 == pytest.approx(2.0, abs=1e-4)


def test_never_overflows() -> None:
    free_energy, energy = angle_average([1e10, 1e300])
    assert np.isfinite(free_energy).all()
    assert np.isfinite(energy).all()


def test_missing_stays_missing_and_shapes_are_kept() -> None:
    free_energy, energy = angle_average(np.array([[0.5, np.nan, 40.0]]))
    assert free_energy.shape == energy.shape == (1, 3)
    assert np.isnan(free_energy[0, 1])
    assert np.isfinite(free_energy[0, [0, 2]]).all()


def test_monte_carlo_over_orientations_agrees() -> None:
    # The definition itself: the mean of exp(-w/kT) over free orientations of both dipoles.
    rng = np.random.default_rng(20261201)
    n, x = 400_000, 1.0
    u, v = rng.normal(size=(2, n, 3))
    u /= np.linalg.norm(u, axis=1, keepdims=True)
    v /= np.linalg.norm(v, axis=1, keepdims=True)
    w = x * ((u * v).sum(axis=1) - 3 * u[:, 2] * v[:, 2])
    weight = np.exp(-w)
    free_energy, energy = angle_average(x)
    spread = weight.std() / weight.mean() / np.sqrt(n)
    assert -np.log(weight.mean()) == pytest.approx(float(free_energy), abs=5 * spread)
    mean = (w * weight).sum() / weight.sum()
    error = np.sqrt((weight**2 * (w - mean) ** 2).sum()) / weight.sum()
    assert mean == pytest.approx(float(energy), abs=5 * error)


@given(st.floats(0.0, 1e3))
def test_bounds_hold_for_every_coupling(x: float) -> None:
    free_energy, energy = (float(v) for v in angle_average(x))
    leading_free, leading = (float(v) for v in leading_terms(x))
    slack = 1e-12 * (1 + x)
    assert energy <= free_energy + slack  # entropy is lost
    assert free_energy >= float(aligned_energy(x)) - slack  # F never below the aligned pair
    assert energy >= float(aligned_energy(x)) - slack
    assert abs(free_energy) <= abs(leading_free) + slack  # the leading term overstates
    assert abs(energy) <= abs(leading) + slack


@given(st.floats(0.0, 1e3), st.floats(1e-3, 1.0))
def test_attraction_grows_with_coupling(x: float, step: float) -> None:
    (low, high), (slow, fast) = angle_average([x, x + step])
    assert high <= low + 1e-12 * (1 + x)
    assert fast <= slow + 1e-12 * (1 + x)


@given(st.floats(1e-3, 900.0))
def test_energy_is_the_logarithmic_derivative_of_the_free_energy(x: float) -> None:
    step = 1e-5 * x
    (low, high), _ = angle_average([x - step, x + step])
    _, energy = angle_average(x)
    assert (high - low) / (2 * step) * x == pytest.approx(float(energy), rel=1e-5, abs=1e-9)

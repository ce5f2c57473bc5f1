"""Ticks are round, inside the axis, few enough, and their texts read back."""

from __future__ import annotations

import math
from itertools import pairwise

from hypothesis import assume, given
from hypothesis import strategies as st

from stillroom.tui.widgets.ticks import log_ticks, tick_labels, ticks

sizes = st.floats(1e-30, 1e30)
counts = st.integers(1, 20)


def mantissa(value: float) -> float:
    return float(f"{value:.6e}".split("e")[0])


@given(st.floats(-1e3, 1e3), st.floats(1e-6, 1e6), counts)
def test_ticks_are_multiples_of_1_2_5_times_a_power_of_ten(start, extent, most):
    low, high = start * extent, start * extent + extent
    found = ticks(low, high, most)
    assert len(found) <= most
    assert all(low - extent * 1e-6 <= t <= high + extent * 1e-6 for t in found)
    for a, b in pairwise(found):
        step = float(f"{b - a:.3g}")  # 3 digits are left of a step a thousandth of its place
        assert mantissa(step) in (1.0, 2.0, 5.0)
        assert math.isclose(a / step, round(a / step), abs_tol=1e-6)


@given(st.floats(-1e6, 1e6), st.floats(1e-3, 1e6), st.integers(4, 20))
def test_there_are_enough_ticks_to_read_the_axis(low, extent, most):
    # The next finer 1-2-5 step is at most 2.5 times finer, so at least most/2.5 - 1 stay.
    assert len(ticks(low, low + extent, most)) >= max(1, math.floor(most / 2.5) - 1)


@given(sizes, st.floats(1.01, 1e12), st.integers(2, 20))
def test_logarithmic_ticks_stay_inside_and_increase(low, factor, most):
    high = low * factor
    assume(math.isfinite(high))
    found = log_ticks(low, high, most)
    assert len(found) <= most
    assert found == sorted(set(found))
    assert all(low * (1 - 1e-6) <= t <= high * (1 + 1e-6) for t in found)
    if factor > 10:
        assert found
        assert all(mantissa(t) in (1.0, 2.0, 5.0) for t in found)


@given(st.floats(-1e3, 1e3), st.floats(1e-6, 1e6), counts)
def test_labels_read_back_as_the_ticks(start, extent, most):
    found = ticks(start * extent, start * extent + extent, most)
    labels = tick_labels(found)
    assert len(set(labels)) == len(found)
    for label, tick in zip(labels, found, strict=True):
        assert math.isclose(float(label), tick, abs_tol=extent * 1e-6)


def test_no_axis_no_ticks():
    assert ticks(1.0, 1.0, 5) == []
    assert ticks(2.0, 1.0, 5) == []
    assert ticks(math.nan, 1.0, 5) == []
    assert log_ticks(0.0, 1.0, 5) == []
    assert log_ticks(-1.0, 1.0, 5) == []
    assert tick_labels([]) == []


def test_zero_is_never_negative():
    assert tick_labels(ticks(-1.0, 1.0, 5)) == ["-1.0", "-0.5", "0.0", "0.5", "1.0"]

"""A share bar is always as long as asked and divides by magnitude."""

from __future__ import annotations

import math
from fractions import Fraction
from itertools import pairwise

import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.tui.widgets.bars import MARKS, share_bar, share_cells

finite = st.floats(allow_nan=False, allow_infinity=False)
shares = st.lists(finite, max_size=len(MARKS))
widths = st.integers(0, 200)


@given(shares, widths)
def test_the_bar_has_exactly_the_width_asked_for(values, width):
    assert len(share_bar(values, width)) == width


@given(shares, widths)
def test_the_cells_add_up_and_each_is_its_exact_part_rounded_up_or_down(values, width):
    # The quota rule of the largest remainder method (Balinski & Young, Fair Representation, 1982,
    # from memory), with exact fractions.
    cells = share_cells(values, width)
    total = sum(abs(Fraction(v)) for v in values)
    assert sum(cells) == (width if total else 0)
    for value, n in zip(values, cells, strict=True):
        exact = abs(Fraction(value)) * width / total if total else Fraction(0)
        assert abs(n - exact) < 1 + Fraction(1, 10**9)


@given(st.lists(st.integers(0, 1000), min_size=1, max_size=8), st.integers(1, 100), finite)
def test_a_common_factor_changes_nothing(values, width, factor):
    if 1e-3 < abs(factor) < 1e3 and abs(math.frexp(factor)[0]) == 0.5:  # exact in binary
        assert share_cells([v * factor for v in values], width) == share_cells(values, width)


@given(st.lists(finite, min_size=2, max_size=8), st.integers(1, 100))
def test_a_larger_share_never_gets_fewer_cells(values, width):
    cells = share_cells(values, width)
    order = sorted(range(len(values)), key=lambda i: abs(values[i]))
    for small, large in pairwise(order):
        # Parts equal to within rounding may differ by the one cell that could not be divided.
        equal = math.isclose(abs(values[small]), abs(values[large]), rel_tol=1e-9)
        assert cells[large] >= cells[small] - equal


# Hamilton's apportionment of 10 seats over populations 47, 16, 16, 12, 9: quotas 4.7, 1.6, 1.6,
# 1.2, 0.9 give 5, 2, 1, 1, 1 with the tie of the two sixteens going to the earlier (by hand).
def test_the_largest_remainders_get_the_cells_left_over():
    assert share_cells([47, 16, 16, 12, 9], 10) == [5, 2, 1, 1, 1]


@pytest.mark.parametrize("bad", [math.nan, math.inf, -math.inf])
def test_a_share_that_is_no_number_makes_the_whole_split_unknown(bad):
    assert share_bar([0.5, bad, 0.2], 10) == "?         "


def test_a_negative_share_is_told_from_a_part_of_the_whole():
    assert share_bar([0.5, -0.25, 0.25], 8, marks="abc") == "aaaa--cc"


def test_nothing_to_divide_is_blank():
    assert share_bar([0.0, 0.0], 4) == "    "
    assert share_bar([], 4) == "    "


def test_shares_need_as_many_marks():
    with pytest.raises(ValueError, match="3 shares need as many marks"):
        share_bar([1, 2, 3], 10, marks="ab")


def test_neighbouring_marks_differ_without_colour():
    assert len(set(MARKS)) == len(MARKS)
    assert "-" not in MARKS
    assert "?" not in MARKS

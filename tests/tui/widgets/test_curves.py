"""A text plot puts each number where its axis says, and tells curves apart by their marks."""

from __future__ import annotations

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from rich.cells import cell_len
from textual.app import App, ComposeResult

from stillroom.tui.widgets.curves import SMALLEST, Curves, Series, plot

sizes = st.tuples(st.integers(0, 200), st.integers(0, 60))
numbers = st.floats(-1e150, 1e150) | st.sampled_from([math.nan, math.inf, -math.inf])
points = st.lists(st.tuples(numbers, numbers), max_size=30)


def body(lines) -> list[str]:
    """Return what is drawn right of the y axis, top row first."""
    texts = [line.plain for line in lines]
    return [t[t.find("│" if "│" in t else "┤") + 1 :] for t in texts if "│" in t or "┤" in t]


def columns_of(lines, mark: str) -> dict[int, list[int]]:
    """Return the rows (0 at the bottom) in which a mark stands, by column."""
    found: dict[int, list[int]] = {}
    for row, text in enumerate(reversed(body(lines))):
        for column, character in enumerate(text):
            if character == mark:
                found.setdefault(column, []).append(row)
    return found


@given(points, sizes, st.booleans(), st.booleans(), st.none() | numbers)
def test_any_data_at_any_size_stays_inside_its_frame(data, size, log, joined, mark):
    x, y = [p[0] for p in data], [p[1] for p in data]
    lines = plot(
        [Series("a\x1b[31m", x, y, "a", joined)],
        *size,
        x_label="distance, nm",
        y_label="energy, kJ/mol",
        x_log=log,
        mark_x=mark,
        mark_label="contact",
    )
    assert len(lines) <= max(1, size[1])
    for line in lines:
        assert cell_len(line.plain) <= size[0]
        assert line.plain.isprintable()


@given(st.integers(SMALLEST[0], 160), st.integers(SMALLEST[1], 50))
def test_a_rising_curve_rises_from_corner_to_corner_without_a_gap(width, height):
    x = np.linspace(2.0, 3.0, 50)
    lines = plot([Series("up", x, x**3, "u")], width, height)
    rows = columns_of(lines, "u")
    drawn = body(lines)
    assert sorted(rows) == list(range(len(rows)))
    assert min(rows[0]) == 0
    assert max(rows[len(rows) - 1]) == len(drawn) - 1
    for column in range(1, len(rows)):
        assert min(rows[column]) >= min(rows[column - 1])
        assert min(rows[column]) <= max(rows[column - 1]) + 1


@pytest.mark.parametrize(("width", "height"), [(78, 16), (158, 40)])
def test_a_level_curve_lies_on_the_row_of_its_tick(width, height):
    frame = Series("frame", [0.0, 10.0], [0.0, 10.0], "f", joined=False)
    lines = plot([frame, Series("level", [0.0, 10.0], [5.0, 5.0], "l")], width, height)
    (row,) = [line.plain for line in lines if line.plain.lstrip().startswith("5┤")]
    assert row.count("l") == len(row) - row.index("┤") - 1


@pytest.mark.parametrize(("width", "height"), [(78, 16), (158, 40)])
def test_the_marker_line_stands_over_the_tick_of_its_number(width, height):
    lines = plot([Series("s", [0.0, 1.0], [1.0, 2.0], "s")], width, height, mark_x=0.2)
    texts = [line.plain for line in lines]
    axis = next(i for i, t in enumerate(texts) if "└" in t)
    column = texts[axis - 1].index("┊")
    assert texts[axis][column] == "┬"
    label = texts[axis + 1]
    start = label.index("0.2")
    assert start <= column <= start + len("0.2")


def test_coinciding_curves_take_turns_so_that_both_are_seen():
    x = np.linspace(0.0, 1.0, 20)
    lines = plot([Series("exact", x, x, "o"), Series("leading", x, x, "l")], 78, 16)
    exact, leading = columns_of(lines, "o"), columns_of(lines, "l")
    assert abs(len(exact) - len(leading)) <= 0.2 * (len(exact) + len(leading))
    assert not set(exact) & set(leading)


def test_a_value_that_is_not_known_leaves_a_gap_only_between_points_not_joined():
    x = np.linspace(0.0, 10.0, 11)
    y = np.where((x > 3) & (x < 7), np.nan, x)
    drawn = columns_of(plot([Series("p", x, y, "p", joined=False)], 78, 16), "p")
    assert sum(map(len, drawn.values())) == np.isfinite(y).sum()


def test_decades_are_evenly_spaced_on_a_logarithmic_axis():
    x = np.logspace(-2, 3, 30)
    lines = [line.plain for line in plot([Series("s", x, x, "s")], 100, 16, x_log=True)]
    axis = next(t for t in lines if "└" in t)
    ticks = [i for i, c in enumerate(axis) if c == "┬"]
    steps = np.diff(ticks)
    assert len(ticks) == 6
    assert steps.max() - steps.min() <= 1


def test_numbers_that_a_logarithmic_axis_cannot_show_are_left_out():
    lines = plot([Series("s", [-1.0, 0.0, 1.0, 10.0], [70, 70, 1, 2], "s")], 60, 12, x_log=True)
    assert columns_of(lines, "s")
    assert not any("70" in line.plain for line in lines)


def test_numbers_outside_a_given_range_are_not_drawn():
    x = np.linspace(0.0, 10.0, 11)
    lines = plot([Series("p", x, x, "p", joined=False)], 78, 16, x_range=(2, 8), y_range=(0, 5))
    assert sum(map(len, columns_of(lines, "p").values())) == 4  # 2, 3, 4, 5


NOTHING = [[], [Series("s", [], [], "s")], [Series("s", [1], [math.nan], "s")]]


@pytest.mark.parametrize("series", NOTHING)
def test_nothing_to_plot_is_said(series):
    assert [line.plain.strip() for line in plot(series, 60, 12)] == ["nothing to plot"]


def test_no_room_is_said():
    (line,) = plot([Series("s", [1, 2], [1, 2], "s")], 20, 12)
    assert line.plain.strip() == "no room to plot"


def test_x_and_y_must_pair_up():
    with pytest.raises(ValueError, match="s: x has shape"):
        plot([Series("s", [1, 2, 3], [1, 2], "s")], 60, 12)
    with pytest.raises(ValueError, match="no axis"):
        plot([Series("s", [1, 2], [1, 2], "s")], 60, 12, x_range=(2, 1))
    with pytest.raises(ValueError, match="no axis"):
        plot([Series("s", [1, 2], [1, 2], "s")], 60, 12, x_range=(0, 1), x_log=True)


def test_the_legend_names_every_curve_or_says_that_it_was_cut():
    some = [Series(f"curve number {i}", [0, 1], [i, i + 1], chr(97 + i)) for i in range(4)]
    shown = "\n".join(line.plain for line in plot(some, 78, 16, mark_x=0.5, mark_label="contact"))
    for s in some:
        assert f"{s.mark} {s.label}" in shown
    assert "┊ contact" in shown
    assert "…" in plot(some, 30, 8)[-1].plain


class Sheet(App[None]):
    def compose(self) -> ComposeResult:
        yield Curves()


class TestCurvesWidget:
    """The widget draws at its own size and again after a resize."""

    @pytest.mark.parametrize("size", [(80, 24), (160, 50)])
    async def test_it_fills_the_screen(self, size):
        app = Sheet()
        async with app.run_test(size=size) as pilot:
            curves = app.query_one(Curves)
            x = np.linspace(0.3, 1.0, 50)
            curves.show([Series("exact", x, -1 / x, "e")], x_label="distance, nm", y_label="[b]")
            await pilot.pause()
            shown = [curves.render_line(y).text for y in range(size[1])]
            assert shown[0].rstrip() == "[b]"  # markup would have swallowed it
            assert shown[-1].rstrip() == "e exact"
            assert shown[-2].rstrip().endswith("distance, nm")
            assert len(shown[-2].rstrip()) == size[0]

    async def test_it_follows_the_size_down_to_nothing(self):
        app = Sheet()
        async with app.run_test(size=(80, 24)) as pilot:
            app.query_one(Curves).show([Series("s", [1, 2], [1, 2], "s")])
            for size in ((160, 50), (20, 5), (1, 1), (80, 24)):
                await pilot.resize_terminal(*size)
                await pilot.pause(0.05)
                assert app.query_one(Curves).size == size

"""Whole columns only, the first one always, and cells of exactly their width."""

from __future__ import annotations

from hypothesis import given
from hypothesis import strategies as st
from rich.cells import cell_len

from stillroom.tui.widgets.columns import GAP, Column, cell_text, fit_columns, last_skip
from stillroom.tui.widgets.printable import printable

columns = st.lists(st.integers(1, 40), min_size=1, max_size=15).map(
    lambda widths: [Column(f"c{i}", f"c{i}", w) for i, w in enumerate(widths)]
)
rooms = st.integers(1, 250)


@given(columns, rooms, st.integers(0, 20))
def test_what_is_shown_fits_and_every_column_is_shown_or_counted(some, room, skipped):
    fit = fit_columns(some, room, skipped)
    assert fit.width <= room
    assert len(fit.shown) + fit.before + fit.after == len(some)
    assert [p for p, _ in fit.shown] == [0, *range(1 + fit.before, len(some) - fit.after)]


@given(columns, rooms, st.integers(0, 20))
def test_columns_are_whole_unless_only_one_has_room(some, room, skipped):
    shown = fit_columns(some, room, skipped).shown[1:]
    if len(shown) > 1:
        assert all(w == some[p].width for p, w in shown)


@given(columns, rooms, st.integers(0, 20))
def test_as_many_as_fit_are_shown(some, room, skipped):
    fit = fit_columns(some, room, skipped)
    if fit.after and len(fit.shown) > 1:
        following = some[len(some) - fit.after]
        assert fit.width + GAP + following.width > room


@given(columns, rooms)
def test_scrolling_as_far_as_it_goes_shows_the_last_column_and_no_less_would(some, room):
    skipped = last_skip(some, room)
    fit = fit_columns(some, room, skipped)
    if fit.after:  # not even one column besides the first has room
        assert len(fit.shown) == 1
    if skipped:
        assert fit_columns(some, room, skipped - 1).after


@given(columns, st.integers(100, 300), st.integers(0, 30))
def test_room_left_over_goes_to_columns_that_may_grow_only_when_all_are_shown(some, room, more):
    growing = [Column(c.key, c.title, c.width, grow_to=c.width + more) for c in some]
    fit = fit_columns(growing, room)
    if fit.after:
        assert all(w <= growing[p].width for p, w in fit.shown)
    else:
        assert fit.width <= room
        spare = room - fit.width
        assert not spare or all(w >= growing[p].grow_to for p, w in fit.shown)


@given(st.text(), st.integers(0, 60), st.sampled_from(["left", "right"]))
def test_a_cell_takes_exactly_its_width_in_the_terminal(text, width, align):
    shown = cell_text(text, width, align)
    assert cell_len(shown) == width
    assert shown.isprintable()


@given(st.text(max_size=20).filter(str.isprintable), st.sampled_from(["left", "right"]))
def test_a_text_with_room_is_kept_whole_and_a_cut_one_says_so(text, align):
    length = cell_len(text)
    assert text in cell_text(text, length + 3, align)
    if length > 1:
        assert cell_text(text, length - 1, align).endswith("…")


@given(st.text())
def test_nothing_unprintable_is_left_and_no_place_moves(text):
    safe = printable(text)
    assert safe.isprintable()
    assert len(safe) == len(text)
    assert all(a == b or b == " " for a, b in zip(text, safe, strict=True))


# ECMA-48 (ISO 6429): CSI is ESC [ or the single C1 byte 9B, OSC is ESC ] or 9D.
def test_escape_sequences_and_direction_overrides_lose_their_control_characters():
    assert printable("\x1b[31m\x9b2J\x1b]52;c;eA==\x07\x9d\u202e\x00") == " [31m 2J ]52;c;eA==    "

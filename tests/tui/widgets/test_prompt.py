"""The prompt tells what is typed, checks it, and never loses it."""

from __future__ import annotations

import pytest
from textual.app import App, ComposeResult
from textual.widgets import Input, Static

from stillroom.tui.widgets.prompt import Prompt


def check(text: str) -> str | None:
    return "expected a number [like 3 D]" if not text.strip().isdigit() else None


class Asking(App[None]):
    def __init__(self, delay: float = 0.02) -> None:
        super().__init__()
        self.delay = delay
        self.told: list[tuple[str, ...]] = []

    def compose(self) -> ComposeResult:
        yield Static("rest")
        yield Prompt(delay=self.delay)

    @property
    def prompt(self) -> Prompt:
        return self.query_one(Prompt)

    def note(self) -> str:
        return self.query_one("#note", Static).render_line(0).text.strip()

    def on_prompt_changed(self, event: Prompt.Changed) -> None:
        self.told.append(("changed", event.text, event.error or ""))

    def on_prompt_submitted(self, event: Prompt.Submitted) -> None:
        self.told.append(("submitted", event.text))

    def on_prompt_cancelled(self) -> None:
        self.told.append(("cancelled",))


async def settle(app: Asking, pilot, count: int) -> None:
    """Wait until so many messages have come."""
    for _ in range(200):
        if len(app.told) >= count:
            return
        await pilot.pause(0.02)
    raise AssertionError(f"{app.told} after waiting for {count} messages")


@pytest.mark.parametrize("size", [(80, 24), (160, 50)])
class TestPrompt:
    """Typing, accepting, refusing, giving up."""

    async def test_it_is_closed_until_opened_and_takes_two_lines_at_the_bottom(self, size):
        app = Asking()
        async with app.run_test(size=size) as pilot:
            assert not app.prompt.is_open
            app.prompt.open(title="filter", placeholder="dipole > 3 D")
            await pilot.pause()
            assert app.prompt.is_open
            assert app.prompt.region.height == 2
            assert app.prompt.region.width == size[0]
            assert app.focused is app.query_one(Input)
            app.prompt.close()
            assert not app.prompt.is_open

    async def test_a_burst_of_typing_is_told_once(self, size):
        app = Asking(delay=0.4)
        async with app.run_test(size=size) as pilot:
            app.prompt.open(title="number", value="1")
            await pilot.press("2", "3", "4")
            await settle(app, pilot, 1)
            assert app.told == [("changed", "1234", "")]

    async def test_a_refused_text_stays_with_its_error_below(self, size):
        app = Asking()
        async with app.run_test(size=size) as pilot:
            app.prompt.open(title="number", validate=check)
            await pilot.press("a", "enter")
            await pilot.pause()
            assert app.prompt.text == "a"
            assert app.note() == "! expected a number [like 3 D]"
            assert not any(m[0] == "submitted" for m in app.told)
            await pilot.press("backspace", "7", "enter")
            await pilot.pause()
            assert app.told[-1] == ("submitted", "7")
            assert app.prompt.text == "7"

    async def test_an_error_while_typing_is_told_with_the_text(self, size):
        app = Asking()
        async with app.run_test(size=size) as pilot:
            app.prompt.open(title="number", validate=check)
            await pilot.press("x")
            await settle(app, pilot, 1)
            assert app.told == [("changed", "x", "expected a number [like 3 D]")]

    async def test_an_error_found_after_submitting_keeps_the_text(self, size):
        app = Asking()
        async with app.run_test(size=size) as pilot:
            app.prompt.open(title="file", value="/no/such/place.csv")
            await pilot.press("enter")
            app.prompt.show_error("cannot write /no/such/place.csv")
            await pilot.pause()
            assert app.prompt.text == "/no/such/place.csv"
            assert app.note() == "! cannot write /no/such/place.csv"

    async def test_escape_cancels_and_nothing_follows(self, size):
        app = Asking(delay=0.4)
        async with app.run_test(size=size) as pilot:
            app.prompt.open(title="number")
            await pilot.press("5", "escape")
            assert app.told == [("cancelled",)]
            assert app.prompt._timer is None  # the change that was waiting is dropped

    async def test_a_text_to_begin_with_is_kept_when_typing_goes_on(self, size):
        app = Asking()
        async with app.run_test(size=size) as pilot:
            app.prompt.open(title="filter", value="dipole > 3")
            await pilot.press("space", "D", "enter")
            await pilot.pause()
            assert app.told[-1] == ("submitted", "dipole > 3 D")

    async def test_tab_does_not_leave_an_open_prompt(self, size):
        app = Asking()
        async with app.run_test(size=size) as pilot:
            app.prompt.open(title="filter")
            await pilot.press("tab", "shift+tab")
            assert app.focused is app.query_one(Input)


async def test_control_characters_of_a_pasted_text_do_not_get_in():
    app = Asking()
    async with app.run_test(size=(80, 24)) as pilot:
        app.prompt.open(title="note\x1b[5m", placeholder="\x9b2J")
        app.query_one(Input).insert_text_at_cursor("a\x1b]52;c;eA==\x07b\x9b\u202e")
        await pilot.pause()
        assert app.prompt.text.isprintable()
        assert app.prompt.text == "a ]52;c;eA== b  "
        assert app.query_one("#title", Static).render_line(0).text.isprintable()


async def test_the_cursor_does_not_blink():
    app = Asking()
    async with app.run_test(size=(80, 24)):
        assert app.query_one(Input).cursor_blink is False

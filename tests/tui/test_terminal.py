"""The workbench opens only where it can work, covers what does not fit, and ends in good order."""

from __future__ import annotations

import io
import signal
import sys
import termios
from typing import ClassVar

import pytest
from textual.app import ComposeResult
from textual.screen import ModalScreen
from textual.widgets import Input

from stillroom.tui.terminal import SMALLEST, TerminalApp, TooSmall, check_terminal
from stillroom.tui.widgets.grid import Grid


class Stream(io.StringIO):
    def __init__(self, *, terminal: bool = True, encoding: str = "utf-8") -> None:
        super().__init__()
        self._terminal, self._encoding = terminal, encoding

    def isatty(self) -> bool:
        return self._terminal

    @property
    def encoding(self) -> str:
        return self._encoding


class TestCheck:
    """One line that names what is missing."""

    def problem(self, monkeypatch, term: str = "xterm-256color", **streams: Stream | None) -> str:
        with monkeypatch.context() as patch:
            for name in ("stdin", "stdout", "stderr"):
                patch.setattr(sys, name, streams.get(name, Stream()))
            patch.setenv("TERM", term)
            return check_terminal() or ""

    def test_a_good_terminal_passes(self, monkeypatch):
        assert self.problem(monkeypatch) == ""

    @pytest.mark.parametrize(
        ("name", "words"),
        [("stdin", "standard input"), ("stdout", "standard output"), ("stderr", "standard error")],
    )
    @pytest.mark.parametrize("stream", [Stream(terminal=False), None])
    def test_each_stream_must_be_a_terminal(self, monkeypatch, name, words, stream):
        assert words in self.problem(monkeypatch, **{name: stream})

    @pytest.mark.parametrize("term", ["dumb", "unknown", ""])
    def test_a_terminal_that_cannot_move_the_cursor_is_refused(self, monkeypatch, term):
        assert "TERM" in self.problem(monkeypatch, term)

    def test_a_locale_without_the_characters_is_refused(self, monkeypatch):
        problem = self.problem(monkeypatch, stderr=Stream(encoding="iso8859-1"))
        assert "iso8859-1" in problem
        assert "\n" not in problem


class Dialog(ModalScreen[None]):
    BINDINGS: ClassVar = [("escape", "dismiss", "leave")]

    def compose(self) -> ComposeResult:
        yield Input()


class Bench(TerminalApp):
    BINDINGS: ClassVar = [("q", "quit", "quit"), ("x", "note", "note")]
    noted = 0

    def compose(self) -> ComposeResult:
        yield Input()
        yield Grid()

    def on_mount(self) -> None:
        self.query_one(Input).focus()

    def action_note(self) -> None:
        self.noted += 1

    def covered(self) -> bool:
        return any(c.display and c.region.size == self.size for c in self.screen.query(TooSmall))


async def resized(app: Bench, pilot, *size: int, covered: bool) -> None:
    """Resize and wait until the screen is covered, or no longer is."""
    await pilot.resize_terminal(*size)
    for _ in range(200):
        if app.covered() == covered and app.screen.size == size:
            return
        await pilot.pause(0.01)
    raise AssertionError(f"covered is {app.covered()} at {app.screen.size}")


class TestTooSmall:
    """Below the smallest size the screen is covered and keeps what it holds."""

    async def test_nothing_is_lost_while_covered(self):
        app = Bench()
        async with app.run_test(size=(80, 24)) as pilot:
            await pilot.press("a", "b")
            await resized(app, pilot, SMALLEST.width - 1, 24, covered=True)
            await pilot.press("z", "backspace", "tab", "x")
            await resized(app, pilot, *SMALLEST, covered=False)
            assert app.query_one(Input).value == "ab"
            assert app.focused is app.query_one(Input)
            assert app.noted == 0
            await pilot.press("c")
            assert app.query_one(Input).value == "abc"

    @pytest.mark.parametrize("size", [(80, SMALLEST.height - 1), (20, 4), (1, 1)])
    async def test_the_cover_names_the_size_needed_as_far_as_it_fits(self, size):
        app = Bench()
        async with app.run_test(size=(80, 24)) as pilot:
            await resized(app, pilot, *size, covered=True)
            cover = app.screen.query_one(TooSmall)
            shown = "\n".join(cover.render_line(y).text for y in range(size[1]))
            if size[0] >= 20:
                assert f"{SMALLEST.width}x{SMALLEST.height} is needed" in shown

    async def test_it_starts_covered_in_a_small_terminal(self):
        app = Bench()
        async with app.run_test(size=(30, 10)) as pilot:
            await resized(app, pilot, 31, 10, covered=True)
            await resized(app, pilot, 80, 24, covered=False)

    async def test_a_dialog_is_covered_too_and_takes_no_key(self):
        app = Bench()
        async with app.run_test(size=(80, 24)) as pilot:
            dialog = Dialog()
            await app.push_screen(dialog)
            await resized(app, pilot, 30, 10, covered=True)
            await pilot.press("escape", "z")
            assert app.screen is dialog
            await resized(app, pilot, 80, 24, covered=False)
            assert dialog.query_one(Input).value == ""
            app.pop_screen()
            await pilot.pause()
            assert not app.covered()

    async def test_q_quits_even_with_the_focus_in_a_typing_line(self):
        app = Bench()
        async with app.run_test(size=(80, 24)) as pilot:
            await resized(app, pilot, 30, 10, covered=True)
            await pilot.press("q")
            assert app._exit

    async def test_nothing_is_animated(self):
        app = Bench()
        async with app.run_test(size=(80, 24)):
            assert app.animation_level == "none"


SCRIPT = """
import os, sys
from stillroom.tui import terminal
from stillroom.tui.widgets.grid import Column, Grid

class Rows:
    columns = (Column("n", "n", 30), Column("v", "v", 900))
    def __len__(self): return 10**6
    def cells(self, row): return [f"row {row}", str(row) * 90]
    def marker(self, row): return " "

class Show(terminal.TerminalApp):
    BINDINGS = [("q", "quit", "quit"), ("s", "stall", "stall")]
    def compose(self): yield Grid()
    def on_mount(self):
        self.query_one(Grid).set_source(Rows())
        self.query_one(Grid).focus()
    def action_stall(self):
        open(sys.argv[0] + ".log", "a").write("stalling")
        while True:  # until nobody reads any more and the queue of output is full
            self._driver.write("x" * 10000)
    def on_unmount(self):
        open(sys.argv[0] + ".log", "a").write("unmounted ")

terminal.GRACE = 0.5
app = Show()
try:
    app.run(mouse=False)
finally:
    open(sys.argv[0] + ".log", "a").write("finished")
sys.exit(app.return_code)
"""
# Leaving the alternate screen and showing the cursor: xterm control sequences, private modes
# 1049 and 25 (DECTCEM).
RESTORED = (b"\x1b[?1049l", b"\x1b[?25h")


@pytest.fixture
def show(run_in_terminal):
    program = run_in_terminal(SCRIPT)
    program.wait_for_text(b"row 20 ")
    return program


class TestSignals:
    """A real pseudo-terminal, the program as its session leader, as under `ssh host program`."""

    @pytest.mark.parametrize("number", [signal.SIGTERM, signal.SIGHUP, signal.SIGINT])
    def test_a_signal_ends_it_in_good_order(self, show, tmp_path, number):
        before = termios.tcgetattr(show.master)
        show.process.send_signal(number)
        show.wait_for(show.ended)
        while show.read():
            pass
        assert show.process.returncode == 128 + number
        assert (tmp_path / "program.py.log").read_text() == "unmounted finished"
        assert all(sequence in show.output for sequence in RESTORED)
        echo = termios.tcgetattr(show.master)[3] & termios.ECHO
        assert echo
        assert not before[3] & termios.ECHO  # it was off while the program ran

    def test_a_dropped_line_ends_it_in_good_order(self, show, tmp_path):
        show.hang_up()
        show.wait_for(show.ended, reading=False)
        assert show.process.returncode == 128 + signal.SIGHUP
        assert (tmp_path / "program.py.log").read_text() == "unmounted finished"

    @pytest.mark.parametrize("drop", [False, True])
    def test_a_stalled_line_cannot_keep_it_alive(self, show, tmp_path, drop):
        log = tmp_path / "program.py.log"
        show.send(b"s")
        show.wait_for(log.exists, reading=False)
        if drop:
            show.hang_up()
        else:
            show.process.send_signal(signal.SIGTERM)
        show.wait_for(show.ended, reading=False)
        assert show.process.returncode == 128 + (signal.SIGHUP if drop else signal.SIGTERM)
        assert log.read_text() == "stalling"  # the event loop never came back: ended by force

    def test_without_a_shell_it_does_not_suspend(self, show):
        start = len(show.output)
        show.send(b"\x1a")
        show.wait_for_text(b"no shell to come back", start)
        show.send(b"\x1b[B")
        show.wait_for_text(b"row 1 ", start)
        assert not show.ended()


def test_with_a_shell_it_suspends_and_comes_back(run_in_terminal, tmp_path):
    (tmp_path / "show.py").write_text(SCRIPT, encoding="utf-8")
    shell = run_in_terminal("", shell=True)
    prompt = shell.PROMPT.encode()
    shell.wait_for_text(prompt)
    shell.send(f"{sys.executable} {tmp_path}/show.py\n".encode())
    shell.wait_for_text(b"row 20 ")
    start = len(shell.output)
    shell.send(b"\x1a")
    shell.wait_for_text(prompt, start)
    assert b"Stopped" in shell.output[start:]
    assert RESTORED[0] in shell.output[start:]
    start = len(shell.output)
    shell.send(b"fg\n")
    shell.wait_for_text(b"row 20 ", start)
    start = len(shell.output)
    shell.send(b"q")
    shell.wait_for_text(prompt, start)
    shell.send(b"exit\n")
    shell.wait_for(shell.ended)
    assert (tmp_path / "show.py.log").read_text() == "unmounted finished"

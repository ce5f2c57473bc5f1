"""The real program in a pseudo-terminal, its screen read by a terminal emulator (pyte)."""

import fcntl
import os
import pty
import select
import signal
import struct
import subprocess
import sys
import termios
import time
from collections.abc import Callable
from pathlib import Path

import pyte
import pytest

LIMIT = 20.0  # seconds to wait for a condition


class Terminal:
    """A pseudo-terminal with the program in it."""

    def __init__(self, *arguments: str, size=(80, 24), cwd: Path, **environment: str) -> None:
        self.screen = pyte.Screen(*size)
        self.stream = pyte.ByteStream(self.screen)
        self.master, slave = pty.openpty()
        self.resize(*size, tell=False)
        self.process = subprocess.Popen(
            [sys.executable, "-m", "stillroom.tui.cli", *arguments],
            stdin=slave,
            stdout=slave,
            stderr=slave,
            cwd=cwd,
            start_new_session=True,
            preexec_fn=lambda: fcntl.ioctl(0, termios.TIOCSCTTY, 0),
            env={**os.environ, "TERM": "xterm-256color", "COLORTERM": "", **environment},
        )
        os.close(slave)
        self.output = b""

    def resize(self, width: int, height: int, *, tell: bool = True) -> None:
        fcntl.ioctl(self.master, termios.TIOCSWINSZ, struct.pack("HHHH", height, width, 0, 0))
        self.screen.resize(height, width)
        if tell:
            os.kill(self.process.pid, signal.SIGWINCH)

    def read(self, seconds: float = 0.05) -> None:
        ready, _, _ = select.select([self.master], [], [], seconds)
        if ready:
            try:
                new = os.read(self.master, 1 << 16)
            except OSError:  # the program has ended
                return
            self.output += new
            self.stream.feed(new)

    @property
    def text(self) -> str:
        return "\n".join(self.screen.display)

    def until(self, condition: Callable[[], bool]) -> None:
        end = time.monotonic() + LIMIT
        while not condition():
            self.read()
            if time.monotonic() > end:
                raise AssertionError("waited in vain; the terminal shows\n" + self.text)

    def until_text(self, *parts: str) -> None:
        self.until(lambda: all(p in self.text for p in parts))

    def send(self, keys: str) -> None:
        os.write(self.master, keys.encode())

    def fill(self, title: str, text: str) -> None:
        """Answer the prompt called `title`; typing replaces what stands in it."""
        self.until_text(f"{title}:", "enter accept")
        self.send(text)
        self.until_text(text[:40])
        self.send("\r")
        self.until(lambda: "enter accept" not in self.text)

    def ended(self) -> bool:
        self.read(0.01)
        return self.process.poll() is not None

    def close(self) -> None:
        if self.process.poll() is None:
            self.process.kill()
        self.process.wait()
        if self.master >= 0:
            os.close(self.master)


@pytest.fixture
def start(tmp_path: Path):
    """Return a function that starts the program in a terminal; all are ended afterwards."""
    running: list[Terminal] = []

    def run(*arguments: str, **options) -> Terminal:
        store = str(tmp_path / "store.sqlite3")
        terminal = Terminal("--store", store, *arguments, cwd=tmp_path, **options)
        running.append(terminal)
        return terminal

    yield run
    for terminal in running:
        terminal.close()

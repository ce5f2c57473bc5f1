"""Fixed rows, and a program run in a real pseudo-terminal."""

from __future__ import annotations

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
from collections.abc import Callable, Iterator, Sequence
from pathlib import Path
from typing import Self

import pytest

from stillroom.tui.widgets.columns import Column


class Numbered:
    """`count` rows whose texts say where they stand; remembers which rows were asked for."""

    def __init__(self, count: int, columns: int = 12, unit: str = "D", width: int = 8) -> None:
        self.columns: Sequence[Column] = [
            Column("name", "name", 22),
            *(Column(f"c{i}", f"col {i}", width, "right", unit) for i in range(1, columns + 1)),
        ]
        self.count = count
        self.asked: set[int] = set()

    def __len__(self) -> int:
        return self.count

    def cells(self, row: int) -> Sequence[str]:
        self.asked.add(row)
        return [f"row {row}", *(f"{row}.{i}" for i in range(1, len(self.columns)))]

    def marker(self, row: int) -> str:
        return "*" if row % 5 == 0 else " "


@pytest.fixture
def numbered() -> type[Numbered]:
    return Numbered


class Program:
    """A Python program in a pseudo-terminal of its own."""

    LIMIT = 20.0  # seconds to wait for a condition before the test fails
    PROMPT = "shell> "

    def __init__(self, arguments: Sequence[str], size: tuple[int, int], session: bool) -> None:
        self.master, slave = pty.openpty()
        fcntl.ioctl(slave, termios.TIOCSWINSZ, struct.pack("HHHH", size[1], size[0], 0, 0))
        self.output = b""

        def own_terminal() -> None:
            fcntl.ioctl(0, termios.TIOCSCTTY, 0)

        self.process = subprocess.Popen(
            arguments,
            stdin=slave,
            stdout=slave,
            stderr=slave,
            start_new_session=session,
            preexec_fn=own_terminal if session else None,
            env={**os.environ, "TERM": "xterm-256color", "COLORTERM": "", "PS1": self.PROMPT},
        )
        os.close(slave)

    def send(self, keys: bytes) -> None:
        os.write(self.master, keys)

    def read(self, seconds: float = 0.05) -> bytes:
        ready, _, _ = select.select([self.master], [], [], seconds)
        try:
            new = os.read(self.master, 1 << 16) if ready else b""
        except OSError:  # the last process that held the terminal has ended
            new = b""
        self.output += new
        return new

    def wait_for(self, condition: Callable[[], bool], *, reading: bool = True) -> None:
        end = time.monotonic() + self.LIMIT
        while not condition():
            if time.monotonic() > end:
                raise AssertionError(f"waited in vain; the last output is {self.output[-2000:]!r}")
            if reading:
                self.read()
            else:
                time.sleep(0.02)

    def wait_for_text(self, text: bytes, start: int = 0) -> None:
        self.wait_for(lambda: text in self.output[start:])

    def ended(self) -> bool:
        return self.process.poll() is not None

    def hang_up(self) -> None:
        os.close(self.master)
        self.master = -1

    def __enter__(self) -> Self:
        return self

    def __exit__(self, *_: object) -> None:
        if not self.ended():
            self.process.send_signal(signal.SIGKILL)
        self.process.wait()
        if self.master >= 0:
            os.close(self.master)


@pytest.fixture
def run_in_terminal(tmp_path: Path) -> Iterator[Callable[..., Program]]:
    """Return a function that runs a script's text; its programs end with the test."""
    running: list[Program] = []

    def run(script: str, *, size: tuple[int, int] = (80, 24), shell: bool = False) -> Program:
        file = tmp_path / "program.py"
        file.write_text(script, encoding="utf-8")
        arguments = [sys.executable, str(file)]
        if shell:
            arguments = ["bash", "--norc", "--noprofile", "-i"]
        program = Program(arguments, size, session=True)
        running.append(program)
        return program

    yield run
    for program in running:
        program.__exit__()

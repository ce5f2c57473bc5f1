"""A program in a pseudo-terminal, for benchmarks: bytes it sends, memory it takes."""

from __future__ import annotations

import contextlib
import fcntl
import os
import select
import signal
import struct
import subprocess
import termios
import time
from collections.abc import Sequence
from pathlib import Path
from typing import Self


class TerminalSession:
    """Runs `arguments` as the leader of a terminal of `size` = (columns, lines)."""

    def __init__(self, arguments: Sequence[str], size: tuple[int, int] = (80, 24)) -> None:
        self.master, slave = os.openpty()
        fcntl.ioctl(slave, termios.TIOCSWINSZ, struct.pack("HHHH", size[1], size[0], 0, 0))
        self.output = bytearray()
        self.started = time.perf_counter()
        self.process = subprocess.Popen(
            arguments,
            stdin=slave,
            stdout=slave,
            stderr=slave,
            start_new_session=True,
            env={**os.environ, "TERM": "xterm-256color", "COLORTERM": ""},
        )
        os.close(slave)

    def __enter__(self) -> Self:
        return self

    def __exit__(self, *_: object) -> None:
        if self.process.poll() is None:
            self.process.send_signal(signal.SIGKILL)
        self.process.wait()
        os.close(self.master)

    def send(self, keys: bytes) -> None:
        """Press keys."""
        os.write(self.master, keys)

    def read(self, seconds: float) -> int:
        """Wait at most so long for output, take what there is, return its length in bytes."""
        ready, _, _ = select.select([self.master], [], [], seconds)
        if not ready:
            return 0
        with contextlib.suppress(OSError):  # the program has ended
            new = os.read(self.master, 1 << 20)
            self.output += new
            return len(new)
        return 0

    def until(self, text: bytes, start: int = 0, limit: float = 300.0) -> float:
        """Return the seconds from now until `text` is in the output after `start`."""
        begun = time.perf_counter()
        while text not in self.output[start:]:
            self.read(0.5)
            if time.perf_counter() - begun > limit or self.process.poll() is not None:
                raise TimeoutError(f"{text!r} never came: {bytes(self.output[-500:])!r}")
        return time.perf_counter() - begun

    def settle(self, quiet: float) -> int:
        """Read until nothing comes for `quiet` seconds; return the number of bytes."""
        total = 0
        while count := self.read(quiet):
            total += count
        return total

    def memory_mb(self) -> float:
        """Return the resident memory in MB."""
        status = Path(f"/proc/{self.process.pid}/status").read_text(encoding="ascii")
        line = next(line for line in status.splitlines() if line.startswith("VmRSS"))
        return int(line.split()[1]) / 1024

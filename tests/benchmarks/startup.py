"""Time to the first frame of the workbench, against a bare Textual app: `python startup.py [N]`.

From the start of the process to the first rows on a pseudo-terminal of 80x24; the median of N
runs (default 9) of each, taking turns so that both meet the same load, after one that warms the
file cache. An app that only imports NumPy stands between the two.
"""

from __future__ import annotations

import statistics
import sys
import tempfile
from pathlib import Path

from terminal_session import TerminalSession

BARE = """
from textual.app import App
from textual.widgets import Static
class Bare(App):
    def compose(self):
        yield Static("first frame")
Bare().run(mouse=False)
"""
WORKBENCH = """
import sys
from stillroom.tui.cli import main
sys.exit(main(["--store", sys.argv[1]]))
"""
PROGRAMS = {
    "bare Textual app": (BARE, b"first frame"),
    "bare app + numpy": ("import numpy" + BARE, b"first frame"),
    "stillroom": (WORKBENCH, b" liquids, "),
}


def first_frame(script: str, text: bytes, store: Path) -> float:
    """Return the seconds from the start of the process until `text` is on the terminal."""
    with TerminalSession([sys.executable, "-c", script, str(store)]) as session:
        waited = session.until(text, limit=60)
        session.settle(0.2)  # so that ending it does not slow the next one
        return waited


def main(runs: int) -> None:
    """Print the medians and their ratios."""
    seconds: dict[str, list[float]] = {name: [] for name in PROGRAMS}
    with tempfile.TemporaryDirectory() as folder:
        for turn in range(runs + 1):
            for name, (script, text) in PROGRAMS.items():
                took = first_frame(script, text, Path(folder) / "store.sqlite")
                if turn:
                    seconds[name].append(took)
    base = statistics.median(seconds["bare Textual app"])
    print(f"first frame at 80x24, median of {runs}")
    for name, took in seconds.items():
        middle = statistics.median(took)
        print(
            f"{name:18}{middle * 1e3:7.0f} ms  (from {min(took) * 1e3:.0f} to "
            f"{max(took) * 1e3:.0f})  {middle / base:5.2f} times the bare app"
        )


if __name__ == "__main__":
    main(int(sys.argv[1]) if len(sys.argv) > 1 else 9)

"""The shipped files are what the build makes from its inputs, byte for byte."""

from __future__ import annotations

import subprocess
import sys
from pathlib import Path

BUILD = Path(__file__).resolve().parents[2] / "datasets" / "build" / "build.py"


def test_a_fresh_build_gives_the_shipped_files_byte_for_byte() -> None:
    run = subprocess.run(
        [sys.executable, str(BUILD), "--check"], capture_output=True, text=True, check=False
    )
    assert run.returncode == 0, run.stdout + run.stderr

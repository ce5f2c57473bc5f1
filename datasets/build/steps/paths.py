"""Where the build reads and writes, relative to `datasets/`."""

from __future__ import annotations

from pathlib import Path

BUILD = Path(__file__).resolve().parents[1]
CURATED = BUILD / "curated"
RAW = BUILD / "raw"
DATASETS = BUILD.parent

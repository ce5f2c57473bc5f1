"""The data files as tables, and the build's own steps importable for unit tests."""

from __future__ import annotations

import sys
from pathlib import Path

import pandas as pd
import pytest

ROOT = Path(__file__).resolve().parents[2]
DATASETS = ROOT / "datasets"
BUILD = DATASETS / "build"
REFERENCE = Path(__file__).parent / "reference"

sys.path.insert(0, str(BUILD))


def table(path: Path) -> pd.DataFrame:
    """Read a CSV file; only empty cells are missing."""
    return pd.read_csv(path, keep_default_na=False, na_values=[""])


@pytest.fixture(scope="session")
def liquids() -> pd.DataFrame:
    """`liquids.csv` by id."""
    return table(DATASETS / "liquids.csv").set_index("id", drop=False)


@pytest.fixture(scope="session")
def values() -> pd.DataFrame:
    """`values.csv`."""
    return table(DATASETS / "values.csv")


@pytest.fixture(scope="session")
def preferred(values: pd.DataFrame) -> pd.DataFrame:
    """Preferred values: one row a liquid, one column a quantity, in the unit of the quantity."""
    return values[values.preferred == 1].pivot(index="id", columns="quantity", values="value")


@pytest.fixture(scope="session")
def temperatures(values: pd.DataFrame) -> pd.DataFrame:
    """Temperature in K of each preferred value, shaped like `preferred`."""
    return values[values.preferred == 1].pivot(
        index="id", columns="quantity", values="temperature_K"
    )


@pytest.fixture(scope="session")
def sources() -> pd.DataFrame:
    """`sources.csv` by key."""
    return table(DATASETS / "sources.csv").set_index("key", drop=False)


@pytest.fixture(scope="session")
def hazards() -> pd.DataFrame:
    """`hazards.csv`."""
    return table(DATASETS / "hazards.csv")


@pytest.fixture(scope="session")
def shelf() -> pd.DataFrame:
    """`shelf.csv` by name."""
    return table(DATASETS / "shelf.csv").set_index("name", drop=False)


@pytest.fixture(scope="session")
def selection() -> pd.DataFrame:
    """The curated selection by CAS number."""
    return table(BUILD / "curated" / "selection.csv").set_index("cas", drop=False)


@pytest.fixture(scope="session")
def structures() -> pd.DataFrame:
    """The cached structure columns by CAS number."""
    return table(BUILD / "raw" / "structure.csv").set_index("cas", drop=False)


@pytest.fixture(scope="session")
def decisions() -> pd.DataFrame:
    """All curated decisions and recalled values."""
    files = sorted((BUILD / "curated" / "values").glob("*.csv"))
    return pd.concat([table(f).assign(file=f.name) for f in files], ignore_index=True)

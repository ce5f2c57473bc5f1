"""The computed values: their files, their fingerprints, their calibration. No quantum chemistry."""

from __future__ import annotations

import sys
from pathlib import Path

import numpy as np
import pandas as pd
import pytest

DATASETS = Path(__file__).resolve().parents[3] / "datasets"
QUANTUM = DATASETS / "build" / "quantum"
sys.path.insert(0, str(QUANTUM))

from cache import current, fingerprint, read_liquids  # noqa: E402
from calibration import CHECKS, factor, pairs, summary  # noqa: E402
from recommend import conformer_uncertainty  # noqa: E402
from shape import length, surface  # noqa: E402

RAW = {
    "xtb": ("id",),
    "pbe0_dipole": ("id", "method"),
    "conformers": ("id", "conformer"),
    "solvent_descriptors": ("id",),
}


def read(name: str) -> pd.DataFrame:
    """A file of this folder; only empty cells are missing."""
    return pd.read_csv(QUANTUM / name, keep_default_na=False, na_values=[""])


@pytest.mark.parametrize("name", list(RAW))
def test_every_row_belongs_to_a_liquid_as_drawn_today(name: str) -> None:
    table, liquids = read(f"raw/{name}.csv"), read_liquids()
    fresh = current(QUANTUM / "raw" / f"{name}.csv", liquids, RAW[name])
    stale = sorted(set(table.id) - {row["id"] for row in fresh})
    assert not stale, f"run the script that writes raw/{name}.csv again: {stale}"


@pytest.mark.parametrize("name", list(RAW))
def test_no_key_is_computed_twice_from_one_structure(name: str) -> None:
    table = read(f"raw/{name}.csv")
    assert not table.duplicated([*RAW[name], "fingerprint"]).any()


def test_fingerprint_is_the_head_of_a_sha256() -> None:
    """SHA-256 of `abc` from FIPS 180-4, appendix example."""
    assert fingerprint("abc") == "ba7816bf8f01"


def test_nearly_every_liquid_has_semi_empirical_values() -> None:
    assert len(set(read_liquids()) - set(read("raw/xtb.csv").id)) <= 5


def test_computed_values_are_within_physical_bounds() -> None:
    table = read("raw/xtb.csv")
    assert table.dipole_D.between(0, 10).all()
    assert table.polarizability_A3.between(1, 120).all()
    assert table.ionization_energy_eV.between(6, 16).all()
    # A sphere has the least surface for its volume.
    sphere = (36 * np.pi * table.volume_nm3**2) ** (1 / 3)
    assert (table.area_nm2 >= sphere).all()
    assert (table.length_nm >= (6 * table.volume_nm3 / np.pi) ** (1 / 3)).all()


def test_weights_of_conformers_do_not_exceed_one() -> None:
    total = read("raw/conformers.csv").groupby("id").weight.sum()
    assert total.between(0.3, 1.001).all(), total[~total.between(0.3, 1.001)]


def test_mean_square_dipole_follows_from_the_conformers_listed() -> None:
    """Boltzmann weights at 298.15 K of energies and copies, R = 8.314462618 J/(mol K)."""
    for row in read("raw/pbe0_dipole.csv").itertuples():
        energy, copies, dipole = (
            np.array(str(x).split(), float)
            for x in (row.energies_kJ_mol, row.copies, row.dipoles_D)
        )
        share = copies * np.exp(-energy / (8.314462618e-3 * 298.15))
        expected = np.sqrt(share @ dipole**2 / share.sum())
        assert row.dipole_D == pytest.approx(expected, abs=0.01), row.id


@pytest.mark.parametrize("check", CHECKS, ids=lambda check: f"{check.quantity}-{check.method}")
def test_published_calibration_follows_from_the_pairs(check) -> None:  # type: ignore[no-untyped-def]
    listed = read("calibration_pairs.csv").astype(str)
    mine = listed[(listed.quantity == check.quantity) & (listed.method == check.method)]
    again = pd.DataFrame(summary(mine.to_dict("records"))).astype(str)
    published = read("calibration.csv")
    published = published[
        (published.quantity == check.quantity) & (published.method == check.method)
    ]
    for column in ("n", "factor", "mae_unscaled", "mae", "rms_error", "max_error"):
        assert list(again[column].astype(float)) == list(published[column].astype(float))


@pytest.mark.parametrize("check", CHECKS, ids=lambda check: f"{check.quantity}-{check.method}")
def test_pairs_are_up_to_date(check) -> None:  # type: ignore[no-untyped-def]
    values = pd.read_csv(DATASETS / "values.csv", dtype=str, keep_default_na=False)
    now = {
        row["id"]: (row["measured"], row["computed"])
        for row in pairs(check, read_liquids(), values.to_dict("records"))
    }
    listed = pd.read_csv(QUANTUM / "calibration_pairs.csv", dtype=str, keep_default_na=False)
    mine = listed[(listed.quantity == check.quantity) & (listed.method == check.method)]
    kept = dict(zip(mine.id, zip(mine.measured, mine.computed, strict=True), strict=True))
    changed = sorted(k for k in now.keys() | kept.keys() if now.get(k) != kept.get(k))
    assert not changed, f"run datasets/build/quantum/calibrate.py again: {changed[:10]}"


def test_factor_is_the_ratio_of_proportional_values_and_ignores_a_wild_one() -> None:
    computed = np.array([1.0, 2.0, 3.0, 4.0, 5.0])
    noise = np.array([0.01, -0.01, 0.01, -0.01, 0.0])
    measured = 0.9 * computed + noise
    assert factor(measured, computed) == pytest.approx(0.9, abs=0.003)
    measured[2] = 40.0
    assert factor(measured, computed) == pytest.approx(0.9, abs=0.005)


def test_calibrated_errors_reach_what_the_method_is_known_for() -> None:
    """Hybrid functionals with a diffuse basis: regularized errors of 5 % or so.

    Hait and Head-Gordon 2018, 10.1021/acs.jctc.7b01252: good hybrids 4 to 6 %; measured
    moments add their own 0.1 D. D4 polarizabilities: 10.1063/1.5090222, a few per cent.
    """
    table = read("calibration.csv")
    every = table[table.family == "all"].set_index(["quantity", "method"])
    listed = read("calibration_pairs.csv")
    mine = listed[listed.method == "PBE0/def2-SVPD"]
    # The median: some measured values, and hydrogen peroxide's geometry, are wrong.
    error = every.factor["dipole", "PBE0/def2-SVPD"] * mine.computed - mine.measured
    assert error.abs().median() < 0.15
    assert 0.88 < every.factor["dipole", "PBE0/def2-SVPD"] < 1.0
    assert 0.95 < every.factor["polarizability", "D4"] < 1.1
    assert every.mae["ionization_energy", "IPEA1-xTB"] < 0.5


def test_recommended_values_are_scaled_raw_values() -> None:
    raw = read("raw/xtb.csv").set_index("id")
    better = read("raw/pbe0_dipole.csv").set_index("id").dipole_D
    column = {
        "PBE0/def2-SVPD": better,
        "GFN2-xTB": raw.dipole_D,
        "D4": raw.polarizability_A3,
        "IPEA1-xTB": raw.ionization_energy_eV,
    }
    table = read("computed.csv")
    assert (table.uncertainty > 0).all()
    assert set(table[table.method == "PBE0/def2-SVPD"].id) == set(better.index)
    for row in table[table.quantity != "c6"].itertuples():
        expected = row.factor * column[str(row.method)][row.id]
        assert row.value == pytest.approx(expected, rel=2e-3, abs=2e-3), row.id


def test_conformer_uncertainty_is_the_slope_of_the_mean() -> None:
    """One conformer has none; for two, a finite difference in each energy gives the same."""
    assert conformer_uncertainty([2.0], [1.0], 2.0) == 0

    def mean(first: float, second: float) -> float:
        weight = np.exp(-np.array([first, second]) / (8.314462618e-3 * 298.15))
        return float(np.sqrt(weight @ np.array([1.0, 9.0]) / weight.sum()))

    step = 1e-4
    slopes = [(mean(step, 1) - mean(0, 1)) / step, (mean(0, 1 + step) - mean(0, 1)) / step]
    weight = np.exp(-np.array([0, 1.0]) / (8.314462618e-3 * 298.15))
    found = conformer_uncertainty([1.0, 3.0], list(weight), 0.5)
    assert found == pytest.approx(0.5 * np.hypot(*slopes), rel=1e-3)


def test_descriptors_agree_with_published_abraham_values() -> None:
    """Abraham 1993, 10.1039/CS9932200073 (from memory): water 0.82 and 0.35, acetone 0.04, 0.49."""
    table = read("raw/solvent_descriptors.csv").set_index("id")
    assert table.hbond_acidity["water"] == pytest.approx(0.82)
    assert table.hbond_basicity["water"] == pytest.approx(0.35)
    assert table.hbond_acidity["acetone"] == pytest.approx(0.04)
    assert table.hbond_basicity["acetone"] == pytest.approx(0.49, abs=0.03)
    assert (table.hbond_acidity[["hexane", "benzene", "diethyl-ether"]] == 0).all()
    assert len(table) >= 170


def test_shape_of_one_and_of_two_spheres() -> None:
    """Closed formulas of a sphere and of two overlapping equal spheres (a lens counted once)."""
    radius = 1.7
    area, volume = surface(np.array([6]), np.zeros((1, 3)))
    assert area == pytest.approx(4 * np.pi * radius**2)
    assert volume == pytest.approx(4 / 3 * np.pi * radius**3)
    apart = 1.5
    pair = np.array([[0.0, 0, 0], [apart, 0, 0]])
    area, volume = surface(np.array([6, 6]), pair, points=4000)
    cap = radius - apart / 2
    lens = 2 * np.pi * cap**2 * (3 * radius - cap) / 3
    assert area == pytest.approx(2 * (4 * np.pi * radius**2 - 2 * np.pi * radius * cap), rel=0.01)
    assert volume == pytest.approx(2 * 4 / 3 * np.pi * radius**3 - lens, rel=0.01)
    assert length(np.array([6, 6]), pair) == pytest.approx(apart + 2 * radius)

"""Fire data, exposure limits, partition and solubility: bounds, relations, known values."""

from __future__ import annotations

import pandas as pd
import pytest
from steps.candidate import Candidate
from steps.prefer import choose


def test_limits_of_flammability_are_in_order(preferred: pd.DataFrame) -> None:
    both = preferred[["lower_flammability_limit", "upper_flammability_limit"]].dropna()
    assert len(both) > 200
    ratio = both.upper_flammability_limit / both.lower_flammability_limit
    assert ratio[ratio < 1.3].empty, ratio[ratio < 1.3].to_dict()


def test_autoignition_lies_above_the_flash_point(preferred: pd.DataFrame) -> None:
    """By 50 K and more; hydrazine is the exception: on rust it ignites at room temperature."""
    gap = (preferred.autoignition_temperature - preferred.flash_point).dropna().drop("hydrazine")
    assert len(gap) > 230
    assert gap[gap < 50.0].empty, gap[gap < 50.0].to_dict()


def test_vapour_over_the_liquid_at_its_flash_point_is_near_the_lower_limit(
    preferred: pd.DataFrame,
) -> None:
    """Volatile liquids (flash point below 25 degC) burn at room temperature.

    Their saturated vapour at 25 degC holds more than the lower limit (definition of the flash
    point), so vapour pressure over 101.325 kPa exceeds it.
    """
    rows = preferred[preferred.flash_point < 15.0][
        ["vapor_pressure", "lower_flammability_limit"]
    ].dropna()
    part = rows.vapor_pressure / 101.325 * 100.0
    poor = part[part < rows.lower_flammability_limit]
    assert len(rows) > 80
    assert poor.empty, poor.to_dict()


@pytest.mark.parametrize(
    ("name", "quantity", "value", "tolerance"),
    [
        # IEC 60079-20-1 and NFPA 497 (from memory)
        ("acetone", "lower_flammability_limit", 2.5, 0.1),
        ("benzene", "lower_flammability_limit", 1.2, 0.1),
        ("methanol", "lower_flammability_limit", 6.0, 0.5),
        ("methanol", "upper_flammability_limit", 36.0, 1.0),
        ("diethyl-ether", "lower_flammability_limit", 1.7, 0.2),
        ("diethyl-ether", "autoignition_temperature", 160.0, 20.0),
        ("carbon-disulfide", "autoignition_temperature", 90.0, 6.0),
        # Ontario table, Regulation 833 (from memory)
        ("toluene", "exposure_limit", 20.0, 0.0),
        ("benzene", "exposure_limit", 0.5, 0.0),
        ("methanol", "exposure_limit", 200.0, 0.0),
        ("carbon-disulfide", "exposure_limit", 1.0, 0.0),
        # C. Hansch, A. Leo, D. Hoekman, Exploring QSAR, 1995 (from memory)
        ("benzene", "log_p", 2.13, 0.05),
        ("1-octanol", "log_p", 3.0, 0.1),
        ("acetone", "log_p", -0.24, 0.05),
        ("ethanol", "log_p", -0.31, 0.05),
        ("hexane", "log_p", 4.0, 0.15),
    ],
)
def test_well_known_values(
    preferred: pd.DataFrame, name: str, quantity: str, value: float, tolerance: float
) -> None:
    assert preferred.loc[name, quantity] == pytest.approx(value, abs=tolerance + 1e-9)


def test_the_most_cautious_fire_value_is_preferred() -> None:
    def made(quantity: str, *numbers: float) -> list[Candidate]:
        sources = ("iec-60079-20-1-2010", "nfpa-497-2008", "wikidata")
        return [
            Candidate("x", quantity, n, None, "measured", s, 0.1)
            for n, s in zip(numbers, sources, strict=False)
        ]

    for quantity, expected in (
        ("lower_flammability_limit", 1.0),
        ("upper_flammability_limit", 3.0),
        ("autoignition_temperature", 1.0),
    ):
        best = choose(made(quantity, 2.0, 1.0, 3.0), 298.15)[0]
        assert (best.preferred, best.value) == (True, expected), quantity


def test_exposure_limits_say_whose_they_are(values: pd.DataFrame, hazards: pd.DataFrame) -> None:
    limits = values[values.quantity == "exposure_limit"]
    assert limits.note.str.startswith("8 h time-weighted average, Ontario").all()
    assert set(limits.source) == {"ontario-exposure-limits"}
    skin = set(hazards[hazards.hazard == "absorbed through the skin"].id)
    assert {"methanol", "n,n-dimethylformamide", "aniline", "nitrobenzene"} <= skin


def test_solubility_in_water_falls_with_log_p(preferred: pd.DataFrame) -> None:
    """Log of the mass fraction against log P: slope near -1 (C. Hansch 1968), scatter 0.5."""
    import numpy as np

    rows = preferred[["water_solubility", "log_p", "molar_mass"]].dropna()
    rows = rows[rows.water_solubility < 50.0].drop("2-methyltetrahydrofuran")  # see overrides.csv
    assert len(rows) > 70
    amount = np.log10(rows.water_solubility / rows.molar_mass)
    slope, intercept = np.polyfit(rows.log_p, amount, 1)
    residual = amount - slope * rows.log_p - intercept
    assert -1.4 < slope < -0.9
    assert float(residual.std()) < 0.35
    assert residual[residual.abs() > 1.0].empty, residual[residual.abs() > 1.0].to_dict()


def test_miscible_liquids_are_hydrophilic(preferred: pd.DataFrame) -> None:
    rows = preferred[preferred.water_solubility == 100.0].log_p.dropna()
    assert len(rows) > 40
    assert rows[rows > 1.2].empty, rows[rows > 1.2].to_dict()

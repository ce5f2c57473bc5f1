"""Hazards: a closed list, sourced, with the well-known ones present."""

from __future__ import annotations

import pandas as pd
import pytest
from steps.hazards import HAZARDS


def test_hazards_come_from_the_closed_list_and_name_liquids_on_the_shelf(
    hazards: pd.DataFrame, liquids: pd.DataFrame
) -> None:
    assert set(hazards.hazard) <= set(HAZARDS)
    assert set(hazards.id) <= set(liquids.id)
    assert hazards.detail.str.len().min() > 5
    assert not hazards.duplicated().any()


def test_flammability_follows_the_preferred_flash_point(
    hazards: pd.DataFrame, preferred: pd.DataFrame
) -> None:
    """GHS: below 23 degC highly flammable (categories 1 and 2), to 60 degC flammable (3)."""
    fire = hazards[hazards.hazard.str.contains("flammable")].set_index("id").hazard
    flash = preferred.flash_point.dropna()
    assert set(fire.index) == set(flash[flash <= 60.0].index)
    assert (fire[flash[flash < 23.0].index] == "highly flammable").all()


@pytest.mark.parametrize(
    ("name", "hazard"),
    [
        ("benzene", "carcinogen"),
        ("trichloroethylene", "carcinogen"),
        ("1,2-dichloroethane", "carcinogen"),
        ("hexamethylphosphoramide", "carcinogen"),
        ("diisopropyl-ether", "peroxide-forming"),
        ("tetrahydrofuran", "peroxide-forming"),
        ("1,4-dioxane", "peroxide-forming"),
        ("n,n-dimethylformamide", "reproductive toxicant"),
        ("n-methyl-2-pyrrolidone", "reproductive toxicant"),
        ("2-methoxyethanol", "reproductive toxicant"),
        ("methanol", "toxic"),
        ("hexane", "organ toxicant"),
        ("carbon-disulfide", "highly flammable"),
        ("acetone", "highly flammable"),
        ("diethyl-ether", "highly flammable"),
        ("sulfuric-acid", "corrosive"),
        ("nitromethane", "explosive"),
        ("acetyl-chloride", "reacts with water"),
        ("styrene", "polymerizes"),
    ],
)
def test_well_known_hazards_are_there(hazards: pd.DataFrame, name: str, hazard: str) -> None:
    """Common practice."""
    assert hazard in set(hazards[hazards.id == name].hazard)


def test_cancer_classes_state_the_year_of_the_table(hazards: pd.DataFrame) -> None:
    iarc = hazards[hazards.source == "iarc-monographs"]
    assert len(iarc) >= 25
    assert iarc.detail.str.contains(r"IARC group (?:1|2A|2B), volume year").all()


def test_carcinogens_of_group_1_match_the_monographs(hazards: pd.DataFrame) -> None:
    """IARC (from memory): benzene, trichloroethylene, 1,2-dichloropropane, o-toluidine."""
    group_1 = set(hazards[hazards.detail.str.contains("IARC group 1,")].id)
    assert {"benzene", "trichloroethylene", "1,2-dichloropropane", "2-methylaniline"} <= group_1
    assert "acetone" not in group_1

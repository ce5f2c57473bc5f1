"""Every package is installed under its name, and the data travel with it."""

import tomllib
from importlib.resources import files
from pathlib import Path

ROOT = Path(__file__).parents[1]


def test_every_package_is_listed() -> None:
    with (ROOT / "pyproject.toml").open("rb") as file:
        setuptools = tomllib.load(file)["tool"]["setuptools"]
    folders = {
        ".".join(("stillroom", *p.parent.relative_to(ROOT).parts))
        for part in ("chem", "tui")
        for p in (ROOT / part).rglob("__init__.py")
    }
    assert set(setuptools["packages"]) == folders | {"stillroom.datasets"}
    assert set(setuptools["package-dir"]) == {
        "stillroom.chem",
        "stillroom.tui",
        "stillroom.datasets",
    }


def test_the_tables_are_where_the_program_looks() -> None:
    for name in ("liquids.csv", "values.csv", "sources.csv", "hazards.csv", "datapackage.json"):
        assert (files("stillroom.datasets") / name).is_file()


def test_top_level_is_as_agreed() -> None:
    allowed = {
        "README.md", "DEVELOPERS.md", "pyproject.toml", "LICENSE", "chem", "tui", "tests",
        "datasets", "build", "dist",
    }  # fmt: skip
    visible = {p.name for p in ROOT.iterdir() if not p.name.startswith(".")}
    assert {n for n in visible if not n.endswith(".egg-info")} <= allowed

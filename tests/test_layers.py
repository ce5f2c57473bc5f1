"""Imports run downwards only, and the core neither prints nor knows the screens."""

import ast
from pathlib import Path

import pytest

ROOT = Path(__file__).parents[1]
FLOORS = ["data", "forces", "liquids", "shelf", "pairs", "choosing"]
MODULES = sorted(p for part in ("chem", "tui") for p in (ROOT / part).rglob("*.py"))


def imported(path: Path) -> set[str]:
    found = set()
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        if isinstance(node, ast.ImportFrom):
            assert node.level == 0, "relative import"
            found.add(node.module or "")
        elif isinstance(node, ast.Import):
            found |= {alias.name for alias in node.names}
    return found


@pytest.mark.parametrize("path", MODULES, ids=lambda p: str(p.relative_to(ROOT)))
def test_a_module_imports_only_from_its_floor_and_below(path: Path) -> None:
    room, *rest = path.relative_to(ROOT).parts
    names = imported(path)
    if room == "tui":
        return
    assert not any(n.startswith(("stillroom.tui", "textual", "rich")) for n in names)
    if len(rest) > 1:
        below = FLOORS[: FLOORS.index(rest[0]) + 1]
        for name in names:
            if name.startswith("stillroom.chem."):
                assert name.split(".")[2] in below, name


@pytest.mark.parametrize(
    "path", [p for p in MODULES if p.is_relative_to(ROOT / "chem")], ids=lambda p: p.name
)
def test_the_core_never_prints(path: Path) -> None:
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        assert not (isinstance(node, ast.Name) and node.id == "print")


def test_no_module_is_longer_than_four_hundred_lines() -> None:
    long = [str(p) for p in MODULES if len(p.read_text(encoding="utf-8").splitlines()) > 400]
    assert long == []

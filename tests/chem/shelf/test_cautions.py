"""The caution lines name what is known, defer to the data sheet, and never call a blank safe."""

from __future__ import annotations

from stillroom.chem import load_shelf
from stillroom.chem.shelf.cautions import LIMITS_DEFER, UNKNOWN, caution_line, limits_line


def test_limits_of_a_common_solvent_are_on_one_line() -> None:
    """Toluene: 20 ppm in Ontario, 1.0 to 7.8 % (IEC 60079-20-1, from memory)."""
    line = limits_line(load_shelf()["toluene"])
    assert "8 h average 20 ppm (Ontario)" in line
    assert "burns in air at 1 to 7.8 % by volume" in line
    assert line.endswith(LIMITS_DEFER)


def test_no_limits_line_is_longer_than_160_characters_or_lacks_the_deferral() -> None:
    shelf = load_shelf()
    lines = [line for i in shelf.identities if (line := limits_line(shelf[i.id]))]
    assert len(lines) > 250
    assert max(map(len, lines)) <= 160
    assert all(line.endswith(LIMITS_DEFER) for line in lines)


def test_a_liquid_without_limits_has_no_line_and_is_not_called_safe() -> None:
    shelf = load_shelf()
    assert limits_line(shelf["squalane"]) == ""
    assert caution_line(()).startswith(UNKNOWN)

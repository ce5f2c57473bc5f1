"""Text from files and users reaches the terminal as one printable line."""

import sys
import unicodedata

import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem.data.clean import clean_text

EVERY = [chr(code) for code in range(sys.maxunicode + 1)]


@given(st.text(max_size=200))
def test_the_result_is_one_printable_line_and_cleaning_it_again_changes_nothing(text: str) -> None:
    cleaned = clean_text(text)
    assert cleaned.isprintable()
    assert cleaned == cleaned.strip()
    assert cleaned == clean_text(cleaned)


@given(st.text(max_size=60), st.integers(1, 30))
def test_the_result_is_never_longer_than_asked(text: str, limit: int) -> None:
    cleaned = clean_text(text, limit)
    assert len(cleaned) <= limit
    assert cleaned == clean_text(cleaned, limit)


@pytest.mark.parametrize("category", ["Cc", "Cf", "Cs", "Co", "Cn", "Zl", "Zp", "Zs"])
def test_every_character_of_an_unsafe_category_becomes_a_space(category: str) -> None:
    """Control (C0, DEL, C1), format (bidi overrides, zero width), surrogates and the like."""
    found = [c for c in EVERY if unicodedata.category(c) == category]
    assert found
    assert clean_text("x".join(["", *found, ""]), sys.maxsize) == " ".join("x" * (len(found) + 1))


def test_every_other_character_is_kept() -> None:
    kept = "".join(c for c in EVERY if unicodedata.category(c)[0] in "LMNPS")
    assert len(kept) > 100_000
    assert clean_text(kept, sys.maxsize) == kept


@pytest.mark.parametrize(
    ("text", "cleaned"),
    [
        # What a hostile or careless file may hold: colours, a clipboard write (OSC 52), a C1
        # control sequence introducer, a bidi override, a byte order mark, a soft hyphen.
        ("acetone\x1b[31m\n dry", "acetone [31m dry"),
        ("\x1b]52;c;cm0gLXJm\x07", "]52;c;cm0gLXJm"),
        ("a\x9b2Jb", "a 2Jb"),
        ("abc\u202edef", "abc def"),
        ("\ufeffid", "id"),
        ("  two\u00a0\u2003words\t\r\n", "two words"),
        ("benzo[a]pyrene C1=CC=CC=C1 [/nope] µ½°Å", "benzo[a]pyrene C1=CC=CC=C1 [/nope] µ½°Å"),
    ],
)
def test_what_files_may_hold(text: str, cleaned: str) -> None:
    assert clean_text(text) == cleaned


def test_a_long_text_ends_in_an_ellipsis() -> None:
    assert clean_text("x" * 500, 10) == "x" * 9 + "…"
    assert clean_text("x" * 10, 10) == "x" * 10

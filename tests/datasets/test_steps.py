"""Single steps of the build."""

from __future__ import annotations

import pytest
from steps.candidate import Candidate, written
from steps.density import split_superscript
from steps.outliers import set_aside, too_far
from steps.prefer import choose
from steps.selection import slug


def _candidate(value: float, source: str, **more: object) -> Candidate:
    made = Candidate("x", "boiling_point", value, None, "measured", source, 1.0)
    return made.change(**more)


@pytest.mark.parametrize(
    ("raw", "density", "celsius"),
    [
        (876.52, 876.5, 20.0),
        (862.625, 862.6, 25.0),
        (809.2, 809.0, 20.0),
        (648.19, 648.0, 19.0),
        (1009.315, 1009.3, 15.0),
        (1352.5, 1350.0, 25.0),
        (1130.0, 1130.0, 20.0),
    ],
)
def test_superscript_temperatures_of_densities_are_split_off(
    raw: float, density: float, celsius: float
) -> None:
    """The CRC table prints benzene 0.8765 with superscript 20; the raw file holds 876.52."""
    assert split_superscript(raw) == pytest.approx((density, celsius))


def test_a_lonely_value_is_set_aside_and_two_that_disagree_are_kept() -> None:
    three = [_candidate(v, s) for v, s in ((80.0, "a"), (81.0, "b"), (206.0, "c"))]
    assert [c.rejected for c in set_aside(three)] == [False, False, True]
    assert "stands alone" in set_aside(three)[2].note
    assert not any(c.rejected for c in set_aside(three[1:]))


def test_a_value_far_from_the_wanted_temperature_is_kept_out_of_use() -> None:
    cold = Candidate("x", "permittivity", 9.2, 207.15, "measured", "crc-2014-permittivity", 0.1)
    near = cold.change(temperature=293.15)
    assert [c.rejected for c in too_far([cold, near], 298.15)] == [True, False]


def test_order_of_preference_is_hand_then_table_then_memory() -> None:
    table = _candidate(1.0, "nist-webbook")
    memory = _candidate(2.0, "memory-handbook")
    estimate = _candidate(3.0, "serat-2017", kind="estimated")
    assert choose([estimate, memory, table], 298.15)[0].value == 1.0
    by_hand = memory.change(chosen_by_hand=True)
    assert choose([estimate, by_hand, table], 298.15)[0].value == 2.0
    assert choose([estimate, memory], 298.15)[0].value == 2.0


def test_spread_between_sources_feeds_the_uncertainty_and_one_blunder_does_not() -> None:
    two = choose([_candidate(100.0, "nist-webbook"), _candidate(102.0, "wikidata")], 298.15)
    assert two[0].uncertainty == pytest.approx((1.0 + (1.4826 * 1.0) ** 2) ** 0.5)
    three = [
        _candidate(100.0, "nist-webbook"),
        _candidate(100.0, "wikidata"),
        _candidate(300.0, "z"),
    ]
    assert choose(three, 298.15)[0].uncertainty == pytest.approx(1.0)


def test_a_rejected_value_is_never_preferred() -> None:
    chosen = choose([_candidate(1.0, "nist-webbook", rejected=True)], 298.15)
    assert [c.preferred for c in chosen] == [False]


@pytest.mark.parametrize(
    ("quantity", "value", "text"),
    [
        ("dipole", 2.88, "2.88"),
        ("dipole", 0.0, "0"),
        ("boiling_point", 56.08, "56.08"),
        ("boiling_point", -0.001, "0"),
        ("density", 784.5, "784.5"),
        ("density", 1329.99, "1330"),
        ("vapor_pressure", 0.00012345, "0.0001234"),
        ("vapor_pressure", 0.0000012345, "1.234e-06"),
    ],
)
def test_numbers_are_written_plainly(quantity: str, value: float, text: str) -> None:
    assert written(quantity, value) == text


def test_slugs_keep_commas_and_lose_spaces() -> None:
    assert slug("Ethylene glycol") == "ethylene-glycol"
    assert slug("N,N-dimethylformamide") == "n,n-dimethylformamide"

"""The command line as a script uses it: output, exit status, one line for bad input."""

import csv
import io
import json

import pytest

from stillroom.tui.cli import main

Captured = pytest.CaptureFixture[str]


def run(capsys: Captured, *words: str) -> tuple[int, str, str]:
    try:
        status = main(words)
    except SystemExit as left:  # argparse leaves by itself
        status = int(left.code or 0)
    out, err = capsys.readouterr()
    return status, out, err


class TestPair:
    """`stillroom pair A B`."""

    def test_json_has_the_agreed_keys(self, capsys: Captured) -> None:
        status, out, _ = run(capsys, "pair", "acetone", "water", "--format", "json")
        pair = json.loads(out)
        assert status == 0
        assert pair["a"] == {"id": "acetone", "name": "acetone"}
        assert pair["distance_basis"] == "contact"
        assert pair["temperature_K"] == 298.15
        assert set(pair["orientation"]) == {
            "energy_kJ_mol",
            "free_energy_kJ_mol",
            "leading_energy_kJ_mol",
            "leading_free_energy_kJ_mol",
            "aligned_energy_kJ_mol",
        }
        assert sum(pair["share"].values()) == pytest.approx(1)
        assert set(pair["c6_1e-79_J_m6"]) == {"orientation", "induction", "dispersion", "total"}
        assert pair["verdict"] in ("sound", "strained", "unreliable")
        assert {"code", "text", "value"} == set(pair["reasons"][0])
        assert pair["total"]["uncertainty_kJ_mol"] > 0

    def test_text_names_both_conventions(self, capsys: Captured) -> None:
        _, out, _ = run(capsys, "pair", "acetone", "water")
        assert "energy kJ/mol" in out
        assert "free energy kJ/mol" in out

    def test_given_distance_and_temperature_are_used(self, capsys: Captured) -> None:
        words = ("pair", "acetone", "water", "--distance", "5 angstrom", "--temperature", "40 degC")
        _, out, _ = run(capsys, *words, "--format", "json")
        pair = json.loads(out)
        assert pair["distance_nm"] == pytest.approx(0.5)
        assert pair["distance_basis"] == "given"
        assert pair["temperature_K"] == pytest.approx(313.15)

    def test_csv_is_one_row(self, capsys: Captured) -> None:
        _, out, _ = run(capsys, "pair", "acetone", "water", "--format", "csv")
        (row,) = csv.DictReader(io.StringIO(out))
        assert float(row["orientation.energy_kJ_mol"]) < 0


class TestRank:
    """`stillroom rank`."""

    def test_one_liquid_against_the_rest_by_interchange(self, capsys: Captured) -> None:
        words = ("rank", "--with", "acetone", "--by", "interchange", "--top", "20")
        status, out, _ = run(capsys, *words, "--format", "json")
        rows = json.loads(out)
        assert status == 0
        assert len(rows) == 20
        assert {r["a"] for r in rows} == {"acetone"}
        values = [r["interchange_energy_kJ_mol"] for r in rows]
        assert values == sorted(values)

    def test_direction_can_be_turned(self, capsys: Captured) -> None:
        _, out, _ = run(capsys, "rank", "--by", "coupling", "--ascending", "--format", "json")
        values = [r["coupling"] for r in json.loads(out)]
        assert values == sorted(values)

    def test_direction_is_stated(self, capsys: Captured) -> None:
        _, out, _ = run(capsys, "rank", "--by", "coupling", "--top", "3")
        assert "largest first" in out.splitlines()[0]

    def test_filter_restricts_both_sides(self, capsys: Captured) -> None:
        _, out, _ = run(capsys, "rank", "--where", "family = nitrile", "--format", "json")
        names = {r[side] for r in json.loads(out) for side in ("a", "b")}
        _, listed, _ = run(capsys, "list", "--where", "family = nitrile", "--format", "json")
        assert names <= {r["name"] for r in json.loads(listed)}


class TestList:
    """`stillroom list`."""

    def test_all_columns_carry_their_unit(self, capsys: Captured) -> None:
        _, out, _ = run(capsys, "list", "--columns", "all", "--format", "csv")
        header = next(csv.reader(io.StringIO(out)))
        for column in [
            "name",
            "cas",
            "smiles",
            "formula",
            "family",
            "dipole_D",
            "polarizability_A3",
            "ionization_energy_eV",
            "c6_1e-79_J_m6",
            "molar_mass_g_mol",
            "density_kg_m3",
            "molar_volume_cm3_mol",
            "melting_point_degC",
            "boiling_point_degC",
            "vaporization_enthalpy_kJ_mol",
            "vapor_pressure_kPa",
            "permittivity",
            "refractive_index",
            "viscosity_mPa_s",
            "surface_tension_mN_m",
            "flash_point_degC",
            "cohesive_energy_kJ_mol",
            "solubility_parameter_MPa0.5",
            "kirkwood_factor",
            "hbond_acidity",
            "hbond_basicity",
        ]:
            assert column in header

    def test_filter_with_units(self, capsys: Captured) -> None:
        where = "dipole > 3 D and boiling_point < 356 K and flash_point > -20 degC"
        _, out, _ = run(capsys, "list", "--where", where, "--columns", "all", "--format", "json")
        rows = json.loads(out)
        assert "acetonitrile" in {r["name"] for r in rows}
        for row in rows:
            assert row["dipole_D"] > 3
            assert row["boiling_point_degC"] < 356 - 273.15
            assert row["flash_point_degC"] > -20

    def test_sorted_and_missing_last(self, capsys: Captured) -> None:
        words = ("list", "--columns", "name,dipole", "--sort", "dipole", "--descending")
        _, out, _ = run(capsys, *words, "--format", "json")
        values = [r["dipole_D"] for r in json.loads(out)]
        known = [v for v in values if v is not None]
        assert known == sorted(known, reverse=True)
        assert values[: len(known)] == known

    def test_provenance_travels(self, capsys: Captured) -> None:
        words = ("list", "--columns", "name,dipole", "--provenance", "--format", "json")
        _, out, _ = run(capsys, *words)
        row = next(r for r in json.loads(out) if r["name"] == "acetone")
        assert row["dipole_kind"] == "measured"
        assert row["dipole_uncertainty_D"] > 0
        assert row["dipole_source"]

    def test_nothing_found_is_status_1(self, capsys: Captured) -> None:
        status, _, err = run(capsys, "list", "--where", "dipole > 14 D")
        assert status == 1
        assert err == ""


class TestShow:
    """`stillroom show`."""

    @pytest.mark.parametrize("name", ["acetone", "67-64-1", "CC(C)=O", "ACETONE", "propanone"])
    def test_found_by_any_name(self, capsys: Captured, name: str) -> None:
        status, out, _ = run(capsys, "show", name, "--format", "json")
        assert status == 0
        assert json.loads(out)["id"] == "acetone"

    def test_every_value_has_its_provenance(self, capsys: Captured) -> None:
        _, out, _ = run(capsys, "show", "acetone", "--format", "json")
        for value in json.loads(out)["values"].values():
            assert value["kind"]
            assert value["source"]
            assert value["uncertainty"] is not None

    def test_caution_defers_to_the_data_sheet(self, capsys: Captured) -> None:
        _, out, _ = run(capsys, "show", "acetone")
        assert "safety data sheet" in out

    def test_sources_lead_to_citations(self, capsys: Captured) -> None:
        _, out, _ = run(capsys, "show", "acetone", "--all", "--format", "json")
        for row in json.loads(out)["tabulated"]:
            status, cited, _ = run(capsys, "sources", row["source"], "--format", "json")
            assert status == 0
            assert json.loads(cited)[0]["citation"]


BAD = [
    (("show", "acetne"), "acetone"),
    (("show", "C3H6O"), "fits"),
    (("list", "--where", "dipole > 3 kg"), "dipole"),
    (("list", "--where", "dipole >"), "character"),
    (("list", "--where", "dipol > 3 D"), "dipole"),
    (("list", "--where", "__import__('os')"), "character"),
    (("list", "--sort", "colour"), "colour"),
    (("list", "--columns", "dipol"), "dipole"),
    (("pair", "acetone", "water", "--temperature", "-300 degC"), "absolute zero"),
    (("pair", "acetone", "water", "--temperature", "-300degC"), "absolute zero"),
    (("pair", "acetone", "water", "--temperature", "0 K"), "absolute zero"),
    (("pair", "acetone", "water", "--temperature", "warm"), "warm"),
    (("pair", "acetone", "water", "--temperature", "3 kg"), "temperature"),
    (("pair", "acetone", "water", "--temperature", "90 degC"), "liquid range"),
    (("pair", "acetone", "water", "--distance", "0 nm"), "distance"),
    (("pair", "acetone", "water", "--distance", "-1 nm"), "distance"),
    (("pair", "acetone", "water", "--distance", "3 kg"), "distance"),
    (("rank", "--by", "beauty"), "total"),
    (("rank", "--top", "0"), "1 or more"),
    (("rank", "--with", "nothing-like-it"), "nothing-like-it"),
    (("sources", "no-such-thing"), "no-such-thing"),
    (("distil",), "distil"),
    (("pair", "acetone"), "B"),
]


@pytest.mark.parametrize(("words", "told"), BAD, ids=lambda v: " ".join(v) if v else "")
def test_bad_input_is_one_clear_line_and_status_2(
    capsys: Captured, words: tuple[str, ...], told: str
) -> None:
    status, out, err = run(capsys, *words)
    assert status == 2
    assert out == ""
    assert len(err.splitlines()) == 1
    assert told in err
    assert "Traceback" not in err


def test_beyond_the_liquid_range_on_request(capsys: Captured) -> None:
    words = ("pair", "acetone", "water", "--temperature", "90 degC", "--beyond-range")
    status, out, _ = run(capsys, *words, "--format", "json")
    assert status == 0
    assert "outside-liquid-range" in {r["code"] for r in json.loads(out)["reasons"]}


def test_help_of_every_command(capsys: Captured) -> None:
    for command in ("list", "show", "pair", "rank", "shortlist", "sources"):
        status, out, _ = run(capsys, command, "--help")
        assert status == 0
        assert out.startswith("usage: stillroom")

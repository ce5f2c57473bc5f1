"""`datapackage.json` against the Frictionless Data Package specification, rule by rule."""

from __future__ import annotations

import csv
import hashlib
import json
import re
from pathlib import Path
from typing import Any

import pytest

DATASETS = Path(__file__).resolve().parents[2] / "datasets"
PACKAGE: dict[str, Any] = json.loads((DATASETS / "datapackage.json").read_text(encoding="utf-8"))
RESOURCES: list[dict[str, Any]] = PACKAGE["resources"]
NAMES = [r["name"] for r in RESOURCES]
TYPES = {"string": str, "integer": int, "number": float}


def _rows(name: str) -> list[dict[str, str]]:
    with (DATASETS / f"{name}.csv").open(encoding="utf-8", newline="") as file:
        return list(csv.DictReader(file))


def test_package_has_the_required_properties_and_unique_resource_names() -> None:
    assert re.fullmatch(r"[a-z0-9._-]+", PACKAGE["name"])
    assert len(set(NAMES)) == len(NAMES)
    assert set(NAMES) == {"liquids", "values", "sources", "hazards", "shelf"}
    assert all(licence.get("name") or licence.get("path") for licence in PACKAGE["licenses"])


@pytest.mark.parametrize("resource", RESOURCES, ids=NAMES)
def test_bytes_and_checksum_match_the_file(resource: dict[str, Any]) -> None:
    content = (DATASETS / resource["path"]).read_bytes()
    assert resource["bytes"] == len(content)
    assert resource["hash"] == f"sha256:{hashlib.sha256(content).hexdigest()}"
    content.decode("utf-8")
    assert b"\r" not in content


@pytest.mark.parametrize("resource", RESOURCES, ids=NAMES)
def test_header_and_every_cell_obey_the_schema(resource: dict[str, Any]) -> None:
    fields = resource["schema"]["fields"]
    rows = _rows(resource["name"])
    assert list(rows[0]) == [f["name"] for f in fields]
    for field in fields:
        cells = [row[field["name"]] for row in rows]
        rules = field.get("constraints", {})
        assert not (rules.get("required") and "" in cells), field["name"]
        filled = [c for c in cells if c != ""]
        if rules.get("unique"):
            assert len(set(filled)) == len(filled), field["name"]
        converted = [TYPES[field["type"]](c) for c in filled]
        if "minimum" in rules:
            assert min(converted) >= rules["minimum"], field["name"]
        if "enum" in rules:
            assert set(converted) <= set(rules["enum"]), field["name"]
        if "pattern" in rules:
            assert all(re.fullmatch(rules["pattern"], c) for c in filled), field["name"]


@pytest.mark.parametrize("resource", RESOURCES, ids=NAMES)
def test_primary_and_foreign_keys_hold(resource: dict[str, Any]) -> None:
    rows = _rows(resource["name"])
    for key in resource["schema"].get("primaryKey", []):
        cells = [row[key] for row in rows]
        assert len(set(cells)) == len(cells)
    for key in resource["schema"].get("foreignKeys", []):
        reference = key["reference"]
        known = {row[reference["fields"]] for row in _rows(reference["resource"])}
        missing = {row[key["fields"]] for row in rows} - known
        assert not missing, f"{resource['name']}.{key['fields']}: {sorted(missing)[:5]}"


def test_every_unit_in_the_schemas_is_one_that_pint_reads() -> None:
    import pint

    registry = pint.UnitRegistry()
    units = {f["unit"] for r in RESOURCES for f in r["schema"]["fields"] if "unit" in f}
    units |= {row["unit"] for row in _rows("values")}
    for unit in sorted(units):
        registry.parse_units("" if unit == "1" else unit)

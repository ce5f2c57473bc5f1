"""The Frictionless data package: schemas with units, constraints, keys, sizes and checksums."""

from __future__ import annotations

import hashlib
import json
from pathlib import Path
from typing import Any

from steps.candidate import UNITS
from steps.hazards import HAZARDS
from steps.shelf import COLUMNS, IDENTITY

Field = dict[str, Any]

_SHELF_UNITS = {column: UNITS[quantity] for quantity, column in COLUMNS.items()}


def write_package(target: Path) -> None:
    """Describe the CSV files of `target` in its `datapackage.json`."""
    package = {
        "profile": "tabular-data-package",
        "name": "stillroom-datasets",
        "title": "Properties of liquids at 25 degC with sources and uncertainties",
        "description": "Built by datasets/build/build.py; the data dictionary is README.md.",
        "licenses": [
            {
                "name": "MIT",
                "title": "MIT License (this compilation; facts are cited in sources.csv)",
                "path": "https://opensource.org/license/mit",
            }
        ],
        "sources": [
            {"title": "chemicals 1.5.2 (MIT)", "path": "https://github.com/CalebBell/chemicals"}
        ],
        "resources": [
            _resource(target, "liquids", _liquids(), ["id"], []),
            _resource(
                target,
                "values",
                _values(),
                [],
                [_key("id", "liquids", "id"), _key("source", "sources", "key")],
            ),
            _resource(target, "sources", _sources(), ["key"], []),
            _resource(
                target,
                "hazards",
                _hazards(),
                [],
                [_key("id", "liquids", "id"), _key("source", "sources", "key")],
            ),
            _resource(target, "shelf", _shelf(), ["name"], []),
        ],
    }
    text = json.dumps(package, indent=2, ensure_ascii=False) + "\n"
    (target / "datapackage.json").write_text(text, encoding="utf-8")


def _resource(
    target: Path, name: str, fields: list[Field], primary: list[str], foreign: list[Field]
) -> Field:
    """Describe one CSV file."""
    content = (target / f"{name}.csv").read_bytes()
    schema: Field = {"fields": fields, "missingValues": [""]}
    if primary:
        schema["primaryKey"] = primary
    if foreign:
        schema["foreignKeys"] = foreign
    return {
        "name": name,
        "path": f"{name}.csv",
        "profile": "tabular-data-resource",
        "format": "csv",
        "mediatype": "text/csv",
        "encoding": "utf-8",
        "dialect": {"delimiter": ",", "quoteChar": '"', "lineTerminator": "\n", "header": True},
        "bytes": len(content),
        "hash": f"sha256:{hashlib.sha256(content).hexdigest()}",
        "schema": schema,
    }


def _key(field: str, resource: str, target: str) -> Field:
    """Make a foreign key."""
    return {"fields": field, "reference": {"resource": resource, "fields": target}}


def _field(name: str, kind: str, description: str, unit: str = "", **constraints: object) -> Field:
    """Make a field; `unit` is a Pint unit."""
    field: Field = {"name": name, "type": kind, "description": description}
    if unit:
        field["unit"] = unit
    if constraints:
        field["constraints"] = constraints
    return field


def _liquids() -> list[Field]:
    """Fields of `liquids.csv`."""
    sites = ["none", "weak", "strong"]
    return [
        _field("id", "string", "name as typed on a command line", required=True, unique=True),
        _field("name", "string", "name in the trade", required=True, unique=True),
        _field("synonyms", "string", "further names, separated by ' | '"),
        _field(
            "cas", "string", "CAS number", required=True, unique=True, pattern=r"\d{2,7}-\d{2}-\d"
        ),
        _field("smiles", "string", "structure as SMILES", required=True),
        _field(
            "inchikey",
            "string",
            "standard InChIKey",
            required=True,
            pattern="[A-Z]{14}-[A-Z]{10}-[A-Z]",
        ),
        _field("formula", "string", "formula in Hill order; D is deuterium", required=True),
        _field("family", "string", "chemical family from a closed list", required=True),
        _field("hbond_donor", "string", "hydrogen-bond donor", required=True, enum=sites),
        _field("hbond_acceptor", "string", "hydrogen-bond acceptor", required=True, enum=sites),
        _field("vapour_dimer", "string", "dimers in the vapour", required=True, enum=["yes", "no"]),
        _field("polar_groups", "integer", "number of polar groups", required=True, minimum=0),
        _field(
            "group_dipole_rss_D",
            "number",
            "root of the sum of the squared group moments",
            "debye",
            required=True,
            minimum=0,
        ),
        _field(
            "flexible_polar_bonds",
            "integer",
            "rotatable bonds that turn one polar group against another",
            required=True,
            minimum=0,
        ),
        _field(
            "longest_path_bonds",
            "integer",
            "bonds on the longest shortest path between heavy atoms",
            required=True,
            minimum=0,
        ),
    ]


def _values() -> list[Field]:
    """Fields of `values.csv`."""
    return [
        _field("id", "string", "liquid", required=True),
        _field("quantity", "string", "what is given", required=True, enum=list(UNITS)),
        _field("value", "number", "the value, in `unit`", required=True),
        _field("unit", "string", "Pint unit", required=True, enum=sorted(set(UNITS.values()))),
        _field("temperature_K", "number", "temperature, blank if meaningless", "kelvin", minimum=0),
        _field(
            "kind",
            "string",
            "how it came about",
            required=True,
            enum=["measured", "derived", "computed", "estimated"],
        ),
        _field("source", "string", "key in sources.csv", required=True),
        _field(
            "uncertainty", "number", "standard uncertainty, in `unit`", required=True, minimum=0
        ),
        _field("preferred", "integer", "1 for the value to use", required=True, enum=[0, 1]),
        _field("note", "string", "remark, or why it is not used"),
    ]


def _sources() -> list[Field]:
    """Fields of `sources.csv`."""
    return [
        _field("key", "string", "source key; memory-... is recalled from memory", required=True),
        _field("citation", "string", "full citation", required=True),
        _field("year", "integer", "year of publication"),
        _field("doi", "string", "digital object identifier"),
        _field("isbn", "string", "book number"),
        _field("note", "string", "remark"),
    ]


def _hazards() -> list[Field]:
    """Fields of `hazards.csv`."""
    return [
        _field("id", "string", "liquid", required=True),
        _field("hazard", "string", "kind of hazard", required=True, enum=list(HAZARDS)),
        _field("detail", "string", "what is known", required=True),
        _field("source", "string", "key in sources.csv", required=True),
    ]


def _shelf() -> list[Field]:
    """Fields of `shelf.csv`."""
    identity = [_field(name, "string", name, required=True) for name in IDENTITY]
    return identity + [
        _field(column, "number", "preferred value; blank if not known here", unit)
        for column, unit in _SHELF_UNITS.items()
    ]

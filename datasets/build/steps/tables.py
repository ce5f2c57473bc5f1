"""Raw tables of the `chemicals` package, read as text by CAS number.

Only the files named in `TABLES` are read; those with computed or predicted values are left alone.
"""

from __future__ import annotations

import csv
import gzip
import io
import json
from functools import cache
from importlib.metadata import version
from pathlib import Path
from typing import Any

import chemicals

from steps.paths import CURATED

EXPECTED_VERSION = "1.5.2"

TABLES = {
    "dipole_cccbdb": "Misc/cccbdb.nist.gov Dipoles.csv",
    "dipole_poling": "Misc/Poling Dipole.csv",
    "dipole_muller": "Misc/Muller Supporting Info Dipoles.csv",
    "crc_organic": "Misc/Physical Constants of Organic Compounds.csv",
    "crc_inorganic": "Misc/Physical Constants of Inorganic Compounds.csv",
    "crc_index": "Misc/CRC Handbook Organic RI.csv",
    "wikidata": "Misc/wikidata_properties.tsv",
    "webbook": "Misc/webbook_constants.tsv",
    "open_melting": "Phase Change/OpenNotebook Melting Points.tsv",
    "crc_critical": "Critical Properties/CRCCriticalOrganics.tsv",
    "iupac_critical": "Critical Properties/IUPACOrganicCriticalProps.tsv",
    "mathews_critical": "Critical Properties/Mathews1972InorganicCriticalProps.tsv",
    "perry_density": "Density/Perry Parameters 105.tsv",
    "vdi_density": "Density/VDI PPDS Density of Saturated Liquids.tsv",
    "crc_permittivity": "Electrolytes/Permittivity (Dielectric Constant) of Liquids.tsv",
    "crc_vaporization": "Phase Change/CRC Handbook Heat of Vaporization.tsv",
    "gharagheizi_vaporization": "Phase Change/Ghazerati Appendix Vaporization Enthalpy.tsv",
    "perry_vaporization": (
        "Phase Change/Table 2-150 Heats of Vaporization of Inorganic and Organic Liquids.tsv"
    ),
    "vdi_vaporization": "Phase Change/VDI PPDS Enthalpies of vaporization.tsv",
    "mcgarry_pressure": "Vapor Pressure/Wagner Original McGarry.tsv",
    "poling_wagner": "Vapor Pressure/Wagner Collection Poling.tsv",
    "poling_antoine": "Vapor Pressure/Antoine Collection Poling.tsv",
    "perry_pressure": (
        "Vapor Pressure/Table 2-8 Vapor Pressure of Inorganic and Organic Liquids.tsv"
    ),
    "vdi_pressure": "Vapor Pressure/VDI PPDS Boiling temperatures at different pressures.tsv",
    "landolt_antoine": "Vapor Pressure/Landolt_antoine_V20.tsv",
    "perry_viscosity": "Viscosity/Table 2-313 Viscosity of Inorganic and Organic Liquids.tsv",
    "vdi_viscosity": "Viscosity/VDI PPDS Dynamic viscosity of saturated liquids polynomials.tsv",
    "viswanath_3": "Viscosity/Viswanath Natarajan Dynamic 3 term.tsv",
    "jasper_tension": "Interface/Jasper-Lange.tsv",
    "mulero_tension": "Interface/MuleroCachadinaParameters.tsv",
    "vdi_tension": "Interface/VDI PPDS surface tensions.tsv",
    "flash_dippr": "Safety/DIPPR T_flash Serat.csv",
    "flash_nfpa": "Safety/NFPA 497 2008.tsv",
    "flash_iec": "Safety/IS IEC 60079-20-1 2010.tsv",
    "exposure": "Safety/Ontario Exposure Limits.json",
    "logp_crc": "Environment/CRC logP table.tsv",
    "logp_syrres": "Environment/Syrres logP data.csv.gz",
    "iarc": "Safety/IARC Carcinogen Database.tsv",
    "ntp": "Safety/National Toxicology Program Carcinogens.tsv",
}


def check_version() -> None:
    """Stop unless the installed `chemicals` is the one the data were built from."""
    installed = version("chemicals")
    if installed != EXPECTED_VERSION:
        raise SystemExit(f"chemicals {EXPECTED_VERSION} is needed to rebuild, found {installed}")


@cache
def table(name: str) -> dict[str, list[dict[str, str]]]:
    """Return rows of a raw table by CAS number (a substance may have several rows)."""
    path = Path(chemicals.__file__).parent / TABLES[name]
    rows: dict[str, list[dict[str, str]]] = {}
    content = path.read_bytes()
    text = (gzip.decompress(content) if path.suffix == ".gz" else content).decode("utf-8")
    for row in csv.DictReader(io.StringIO(text, newline=""), delimiter="\t"):
        rows.setdefault(_hyphenated(row["CAS"]), []).append(row)
    return rows


@cache
def exposure_table() -> dict[str, dict[str, Any]]:
    """Return the table of occupational exposure limits by CAS number."""
    path = Path(chemicals.__file__).parent / TABLES["exposure"]
    found: dict[str, dict[str, Any]] = json.loads(path.read_text(encoding="utf-8"))
    return found


@cache
def aliases() -> dict[str, str]:
    """Return the number under which tables list a liquid that they lack under its own."""
    with (CURATED / "aliases.csv").open(encoding="utf-8", newline="") as file:
        return {row["cas"]: row["table_cas"] for row in csv.DictReader(file)}


def rows(name: str, cas: str) -> list[dict[str, str]]:
    """Return all rows of a table for one CAS number, else for its alias."""
    return table(name).get(cas) or table(name).get(aliases().get(cas, ""), [])


def number(name: str, cas: str, column: str) -> float | None:
    """Return the first number in a column for one CAS number, None if blank or absent."""
    for row in rows(name, cas):
        cell = (row.get(column) or "").strip()
        if cell:
            return float(cell)
    return None


def numbers(row: dict[str, str], *columns: str) -> list[float]:
    """Return the cells of a row as floats; blanks are zero."""
    return [float(row[c]) if (row.get(c) or "").strip() else 0.0 for c in columns]


def _hyphenated(cas: str) -> str:
    """Write a CAS number with its hyphens (some tables hold bare digits)."""
    return cas if "-" in cas else f"{cas[:-3]}-{cas[-3:-1]}-{cas[-1]}"

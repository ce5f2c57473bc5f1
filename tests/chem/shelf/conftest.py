"""A small folder of tables that tests may break, with one liquid of each sort."""

import csv
from pathlib import Path

import pytest

from stillroom.chem import Shelf, load_shelf

LIQUID_COLUMNS = (
    "id,name,synonyms,cas,smiles,inchikey,formula,family,hbond_donor,hbond_acceptor,vapour_dimer,"
    "polar_groups,group_dipole_rss_D,flexible_polar_bonds,longest_path_bonds"
).split(",")
VALUE_COLUMNS = (
    "id,quantity,value,unit,temperature_K,kind,source,uncertainty,preferred,note"
).split(",")

# Columns as above. CRC Handbook values (from memory), rounded. None: not known here.
LIQUIDS = [
    "acetone|acetone|propanone;dimethyl ketone|67-64-1|CC(C)=O||C3H6O|ketone|none|strong|no|1|2.7"
    "|0|2",
    "propanal|propanal|propionaldehyde|123-38-6|CCC=O||C3H6O|aldehyde|none|strong|no|1|2.7|1|3",
    "water|water||7732-18-5|O||H2O|inorganic|strong|strong|no|1|1.85|0|0",
    "hexane|hexane|n-hexane|110-54-3|CCCCCC||C6H14|alkane|none|none|no|0|0|0|5",
    "ethanol|ethanol|alcohol|64-17-5|CCO||C2H6O|alcohol|strong|strong|no|1|1.7|0|2",
    "acetic-acid|acetic acid||64-19-7|CC(O)=O||C2H4O2|carboxylic acid|strong|strong|yes|1|1.7|0|2",
    "chloroform|chloroform||67-66-3|ClC(Cl)Cl||CHCl3|chlorinated|weak|none|no|3|3.2|0|2",
    "alpha-pinene|alpha-pinene|α-pinene|80-56-8|CC1=CCC2CC1C2(C)C||C10H16|terpene|none|weak|no|0|0|0|5",
    "mystery|Mystery Blend|||||||||||||",
]  # fmt: skip
UNITS = {
    "dipole": "debye", "polarizability": "angstrom**3", "ionization_energy": "eV",
    "molar_mass": "g/mol", "density": "kg/m**3", "boiling_point": "degC", "permittivity": "1",
}  # fmt: skip
NUMBERS = {
    "acetone": (2.88, 6.40, 9.70, 58.08, 784.5, 56.1, 20.7),
    "propanal": (2.52, 6.35, 9.96, 58.08, 791.0, 48.0, 18.5),
    "water": (1.855, 1.46, 12.62, 18.015, 997.0, 100.0, 78.4),
    "hexane": (0.05, 11.9, 10.13, 86.18, 655.0, 68.7, 1.88),
    "ethanol": (1.69, 5.11, 10.48, 46.07, 785.0, 78.3, 24.5),
    "acetic-acid": (1.70, 5.1, 10.65, 60.05, 1044.0, 117.9, 6.2),
    "chloroform": (1.04, 8.4, 11.37, 119.38, 1479.0, 61.2, 4.71),
    "alpha-pinene": (0.60, 18.0, None, 136.23, 858.0, 156.0, None),
}
SOURCES = "key,citation,year,doi,isbn,note\nbook,A Handbook,2000,,,\n"
HAZARDS = (
    "id,hazard,detail,source\n"
    "acetone,highly flammable,flash point -20 °C,book\n"
    "chloroform,carcinogen,group 2B,book\n"
    "chloroform,toxic,,book\n"
)


def write_tables(folder: Path) -> Path:
    """Write the four tables into `folder`."""
    with (folder / "liquids.csv").open("w", newline="", encoding="utf-8") as file:
        writer = csv.writer(file)
        writer.writerow(LIQUID_COLUMNS)
        for line in LIQUIDS:
            cells = line.split("|")
            cells[2] = cells[2].replace(";", "|")
            writer.writerow(cells)
    with (folder / "values.csv").open("w", newline="", encoding="utf-8") as file:
        writer = csv.writer(file)
        writer.writerow(VALUE_COLUMNS)
        for key, numbers in NUMBERS.items():
            for (name, unit), number in zip(UNITS.items(), numbers, strict=True):
                if number is None:
                    continue
                t = 298.15 if name in ("density", "permittivity") else ""
                writer.writerow([key, name, number, unit, t, "measured", "book", 0.1, 1, ""])
        writer.writerow(
            ["acetone", "dipole", 2.7, "debye", "", "computed", "book", 0.3, 0, "not preferred"]
        )
    (folder / "sources.csv").write_text(SOURCES, encoding="utf-8")
    (folder / "hazards.csv").write_text(HAZARDS, encoding="utf-8")
    return folder


@pytest.fixture
def folder(tmp_path: Path) -> Path:
    """A folder with the four tables, to be broken."""
    return write_tables(tmp_path)


@pytest.fixture(scope="module")
def mini(tmp_path_factory: pytest.TempPathFactory) -> Shelf:
    """The shelf of the small tables, unbroken."""
    return load_shelf(write_tables(tmp_path_factory.mktemp("tables")))

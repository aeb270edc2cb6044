"""Reads tables that the service wrote, with astropy, and compares them with what was to be written.

usage: written-tables.py folder; expects table.{csv,vot,fits,txt} and table.json with columns and rows.
Prints a JSON object: for each file the number of rows and the differences found (a few are told).
"""
import json
import sys
import warnings

import numpy as np
from astropy import units as u
from astropy.io import fits
from astropy.io.votable import parse
from astropy.table import Table

warnings.simplefilter("ignore")
folder = sys.argv[1]
with open(f"{folder}/table.json") as file:
    expected = json.load(file)
columns, rows = expected["columns"], expected["rows"]


def cells(column):
    """Values with None where missing, as Python knows them."""
    mask = np.ma.getmaskarray(column)
    values = np.ma.getdata(column)
    out = []
    for value, hidden in zip(values.tolist(), mask.tolist()):
        if isinstance(value, bytes):
            value = value.decode("ascii")
        if isinstance(value, str):
            value = value.strip() or None
        if hidden or (isinstance(value, float) and np.isnan(value)):
            value = None
        out.append(value)
    return out


def same(kind, wanted, found):
    if wanted is None or wanted == "":
        return found is None
    if kind == "boolean":
        return str(found).lower() in (str(wanted).lower(), str(wanted)[0].lower())
    if kind in ("double", "integer"):
        return found is not None and float(found) == float(wanted)
    # A text that a spreadsheet would run has an apostrophe before it in CSV, and only there.
    return str(found) == str(wanted) or (str(wanted)[0] in "=+-@" and str(found) == f"'{wanted}")


def unit_text(unit):
    return "" if unit is None else str(unit)


def fits_table(path):
    """The table with its TCOMM keywords, which astropy leaves in the header, as descriptions."""
    table = Table.read(path)
    header = fits.getheader(path, 1)
    for i, name in enumerate(table.colnames):
        table[name].description = header.get(f"TCOMM{i + 1}")
    return table


def compare(name, table, has_units, has_descriptions, labels, ascii_only):
    faults = []
    if len(table) != len(rows):
        faults.append(f"{len(table)} rows, not {len(rows)}")
    if list(table.colnames) != labels:
        faults.append(f"names {table.colnames} not {labels}")
    for i, (column, label) in enumerate(zip(columns, labels)):
        if faults and len(faults) > 20:
            break
        read = table[label]
        wanted = [row[i] for row in rows]
        kind = column["datatype"]
        if has_units and column.get("unit"):
            unit = column["unit"]
            # astropy knows no logarithms of units in these formats, and keeps the text; [x] is the journals' for log(x).
            found = unit_text(read.unit)
            parsed = u.Unit(unit.replace("log(solMass)", "dex(solMass)"), parse_strict="silent")
            if found not in (unit, str(parsed)) and u.Unit(found, parse_strict="silent") != parsed:
                faults.append(f"{label}: unit {found!r}, not {unit!r}")
        if has_descriptions and (read.description or "") != column["description"]:
            faults.append(f"{label}: description {read.description!r}, not {column['description']!r}")
        for at, (a, b) in enumerate(zip(wanted, cells(read))):
            if ascii_only and isinstance(a, str) and not a.isascii():
                continue
            if not same(kind, a, b):
                faults.append(f"{label}[{at}]: {b!r}, not {a!r}")
                break
    return {"rows": len(table), "faults": faults[:20]}


names = [column["name"] for column in columns]
labels = []
for column in columns:
    labels.append(column.get("label", column["name"])[:16])
text_columns = {c["name"]: [np.str_] for c in columns if c["datatype"] in ("text", "boolean")}
result = {
    "csv": compare("csv", Table.read(f"{folder}/table.csv", format="csv", comment="#", converters={k: str for k in text_columns}), False, False, names, False),
    "vot": compare("vot", parse(f"{folder}/table.vot").get_first_table().to_table(use_names_over_ids=True), True, True, names, False),
    "fits": compare("fits", fits_table(f"{folder}/table.fits"), True, True, names, True),
}
if len(sys.argv) < 3:
    result["txt"] = compare("txt", Table.read(f"{folder}/table.txt", format="ascii.mrt"), True, False, labels, True)
print(json.dumps(result))

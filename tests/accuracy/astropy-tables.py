"""Reads sample tables with astropy and prints what it finds as JSON lines, for astropy-tables.test.ts.

With --by-content: every table in the data folders of any package, its reader chosen by what the file begins with.
Each line: file, table index, format, rows, columns (name, unit, kind), first and last row, numbers of nulls.
"""

import glob
import gzip
import json
import math
import os
import sys
import warnings

import numpy as np

warnings.simplefilter("ignore")

from astropy.io import ascii as ascii_io  # noqa: E402
from astropy.io import fits  # noqa: E402
from astropy.io.votable import parse  # noqa: E402
from astropy.table import Table  # noqa: E402

ASCII_FORMATS = {
    ".ecsv": ["ecsv"],
    ".rdb": ["rdb"],
    ".csv": ["csv"],
    ".tab": ["tab"],
}


def plain(value):
    """One cell as JSON: None is missing; arrays are flat lists."""
    if value is np.ma.masked:
        return None
    if isinstance(value, bytes):
        value = value.decode("latin-1")
    if isinstance(value, str):
        return value.strip() or None
    if isinstance(value, (np.ma.MaskedArray, np.ndarray, list, tuple)):
        items = value if isinstance(value, (list, tuple)) else np.ma.asarray(value).ravel()
        flat = [plain(item) for item in items]
        # An array without any value is missing on either side.
        return {"array": flat} if any(item is not None for item in flat) else None
    if isinstance(value, (bool, np.bool_)):
        return bool(value)
    if isinstance(value, (complex, np.complexfloating)):
        return {"array": [float(value.real), float(value.imag)]}
    if isinstance(value, (int, np.integer)):
        return int(value) if abs(int(value)) < 2**53 else str(int(value))
    if isinstance(value, (float, np.floating)):
        return float(value) if math.isfinite(value) else None if math.isnan(value) else str(float(value))
    return str(value)


def describe(path, index, kind, table):
    names = table.colnames
    columns = [{"name": n, "unit": str(table[n].unit) if table[n].unit is not None else None} for n in names]
    rows = len(table)
    # A blank text is missing on either side.
    nulls = [sum(1 for v in table[n] if plain(v) is None) for n in names] if rows <= 5000 else None
    out = {"file": path, "table": index, "format": kind, "rows": rows, "columns": columns, "nulls": nulls}
    if rows:
        out["first"] = [plain(table[n][0]) for n in names]
        out["last"] = [plain(table[n][-1]) for n in names]
    return out


def votables(path):
    votable = parse(path, verify="ignore")
    for index, table in enumerate(votable.iter_tables()):
        yield describe(path, index, "votable", table.to_table(use_names_over_ids=True))


def fits_tables(path):
    with fits.open(path) as hdus:
        wanted = [h for h in hdus[1:] if isinstance(h, (fits.BinTableHDU, fits.TableHDU)) and not isinstance(h, fits.CompImageHDU)]
        for index, hdu in enumerate(wanted):
            yield describe(path, index, "fits", Table.read(hdu, character_as_bytes=False))


def ascii_tables(path):
    bare = path[:-3] if path.endswith(".gz") else path
    name, ending = os.path.basename(bare), os.path.splitext(bare)[1]
    if name.startswith("ReadMe"):
        return
    if "/cds/" in path or "/vizier/" in path:
        readme = os.path.join(os.path.dirname(path), "ReadMe")
        yield {**describe(path, 0, "cds", ascii_io.read(path, format="cds", readme=readme)), "readMe": readme}
        return
    if name.startswith("cds"):
        formats = ["cds"]
    elif "ipac" in name:
        formats = ["ipac"]
    elif name.startswith("sextractor"):
        formats = ["sextractor"]
    elif name.startswith("commented_header"):
        formats = ["commented_header"]
    elif name in ("space_delim_no_header.dat", "space_delim_no_names.dat", "simple4.txt"):
        formats = ["no_header"]
    else:
        formats = ASCII_FORMATS.get(ending, [None])
    by_name = {
        "simple4.txt": {"delimiter": "|"},
        "bars_at_ends.txt": {"format": "fixed_width", "delimiter": "|"},
        "nls1_stackinfo.dbout": {"delimiter": "|", "data_start": 2, "format": "fixed_width"},
        "commented_header2.dat": {"header_start": -1},
    }
    options = by_name.get(name, {})
    table = ascii_io.read(path, **{**({"format": formats[0]} if formats[0] else {}), **options})
    yield describe(path, 0, formats[0] or "guessed", table)


def reader_by_content(path):
    """The reader of a file of unknown name, or None: VOTables, FITS tables, IPAC tables, text with a header."""
    with open(path, "rb") as file:
        head = file.read(8192)
    if path.endswith(".gz"):
        with gzip.open(path) as file:
            head = file.read(8192)
    if head.startswith(b"SIMPLE  ="):
        return fits_tables
    if b"<VOTABLE" in head:
        return votables
    if head.lstrip()[:1] == b"<" or b"\0" in head:
        return None
    lines = [line for line in head.decode("utf-8", "replace").splitlines() if line.strip()]
    if lines and lines[0].startswith(("\\", "|")):
        return lambda path: [describe(path, 0, "ipac", ascii_io.read(path, format="ipac"))]
    lines = [line for line in lines if not line.startswith("#")]
    if path.endswith(".csv") or (len(lines) > 1 and lines[0].count(",") > 2):
        return lambda path: [describe(path, 0, "csv", ascii_io.read(path, format="csv", comment="#"))]
    if path.endswith((".txt", ".dat", ".tbl")):
        return lambda path: [describe(path, 0, "guessed", ascii_io.read(path))]
    return None


def jobs_by_content(root):
    for path in sorted(glob.glob(os.path.join(root, "**", "data", "**", "*"), recursive=True)):
        if not os.path.isfile(path) or path.endswith((".py", ".pyc", ".zip", ".bz2", ".tar", ".json", ".html")):
            continue
        reader = reader_by_content(path)
        if reader is not None:
            yield path, reader


def jobs_of_astropy(root):
    jobs = []
    for base, reader in (("votable", votables), ("fits", fits_tables), ("ascii", ascii_tables)):
        for path in sorted(glob.glob(os.path.join(root, "io", base, "tests", "data", "**", "*"), recursive=True)):
            if os.path.isfile(path) and "invalid" not in path and not path.endswith((".py", ".bz2", ".xz", ".tex", ".tex.gz", ".html", ".hdf5")):
                jobs.append((path, reader))
    return jobs


def main(root, by_content):
    for path, reader in jobs_by_content(root) if by_content else jobs_of_astropy(root):
        try:
            for found in reader(path):
                print(json.dumps(found))
        except Exception as error:  # astropy has many kinds of errors; the test only counts what it could read
            print(json.dumps({"file": path, "error": f"{type(error).__name__}: {str(error).splitlines()[0] if str(error) else ''}"[:200]}))


main(sys.argv[1], sys.argv[2:] == ["--by-content"])

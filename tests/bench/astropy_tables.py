"""Makes the tables of the intake benchmark from its CSV file, and times astropy's reading of one of them."""

import json
import resource
import sys
import time

import astropy
import numpy
from astropy.io import ascii
from astropy.table import Table


def read(path, kind):
    if kind == "csv":
        return ascii.read(path, format="csv", fast_reader=True, guess=False)
    if kind == "fits":
        # Left to itself astropy only maps the file. Here the bytes are read, and every column is made an array of its
        # own in the order of this machine, as any work with it would need; strings stay bytes.
        table = Table.read(path, format="fits", memmap=False)
        return [numpy.array(table[name], dtype=table[name].dtype.newbyteorder("=")) for name in table.colnames]
    return Table.read(path, format="votable")


def make(source, rows, path, kind):
    table = ascii.read(source, format="csv", fast_reader=True, guess=False)[:rows]
    if kind == "fits":
        table.write(path, format="fits", overwrite=True)
    else:
        table.write(path, format="votable", tabledata_format=kind, overwrite=True)


if sys.argv[1] == "make":
    make(sys.argv[2], int(sys.argv[3]), sys.argv[4], sys.argv[5])
else:
    path, kind = sys.argv[2], sys.argv[3]
    start = time.perf_counter()
    table = read(path, kind)
    seconds = time.perf_counter() - start
    rows = len(table[0]) if kind == "fits" else len(table)
    peak = resource.getrusage(resource.RUSAGE_SELF).ru_maxrss * 1024
    json.dump({"rows": rows, "seconds": seconds, "peakBytes": peak, "program": f"astropy {astropy.__version__}"}, sys.stdout)

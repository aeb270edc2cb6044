"""Reads the tables of a survey and finds the pairs within each detection's radius by astropy; nothing else."""

import json
import resource
import sys
import time

import astropy
import astropy.units as u
import numpy as np
from astropy.coordinates import SkyCoord, search_around_sky
from astropy.io import ascii

folder, names, repeats = sys.argv[1], sys.argv[2].split(","), int(sys.argv[3])
radius = np.fromfile(f"{folder}/radius.f64")
small = SkyCoord([1.0, 2.0], [1.0, 2.0], unit="deg")
search_around_sky(small, small, 1 * u.deg)  # its imports are not to be counted


def read(name):
    return ascii.read(f"{folder}/{name}.csv", format="csv", fast_reader=True, guess=False)


times, pairs = [], 0
for _ in range(repeats):
    start = time.perf_counter()
    hi = read("hi")
    at = SkyCoord(hi["ra_deg"], hi["dec_deg"], unit="deg")
    pairs = 0
    for name in names:
        rows = read(name)
        i, j, apart, _ = search_around_sky(at, SkyCoord(rows["ra"], rows["dec"], unit="deg"), radius.max() * u.arcsec)
        pairs += int(np.count_nonzero(apart.arcsec <= radius[i]))
    times.append(time.perf_counter() - start)
peak = resource.getrusage(resource.RUSAGE_SELF).ru_maxrss * 1024
json.dump({"seconds": times, "pairs": pairs, "peakBytes": peak, "program": f"astropy {astropy.__version__}"}, sys.stdout)

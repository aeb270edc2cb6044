"""Times a neighbour search by scipy's tree and numpy on the arrays of a folder; writes its pairs there."""

import json
import resource
import sys
import time

import numpy as np
import scipy
from scipy.spatial import cKDTree

folder, window, repeats = sys.argv[1], float(sys.argv[2]), int(sys.argv[3])
names = ("raDeg", "decDeg", "czKms", "angularRadiusDeg", "rowRaDeg", "rowDecDeg", "rowCzKms")
read = {name: np.fromfile(f"{folder}/{name}.f64") for name in names}
LIGHT = 299792.458


def vectors(ra, dec):
    ra, dec = np.radians(ra), np.radians(dec)
    return np.column_stack([np.cos(dec) * np.cos(ra), np.cos(dec) * np.sin(ra), np.sin(dec)])


times = []
for _ in range(repeats):
    start = time.perf_counter()
    known = np.flatnonzero(np.isfinite(read["rowCzKms"]))
    cz = read["rowCzKms"][known]
    tree = cKDTree(vectors(read["rowRaDeg"][known], read["rowDecDeg"][known]))
    at = vectors(read["raDeg"], read["decDeg"])
    chords = 2 * np.sin(np.radians(read["angularRadiusDeg"]) / 2)
    lists = tree.query_ball_point(at, chords, workers=-1)
    i = np.repeat(np.arange(len(lists)), [len(found) for found in lists])
    j = np.concatenate(lists).astype(np.int64)
    difference = (cz[j] - read["czKms"][i]) / (1 + read["czKms"][i] / LIGHT)
    inside = np.abs(difference) <= window
    i, j, difference = i[inside], j[inside], difference[inside]
    apart = 2 * np.arcsin(np.linalg.norm(tree.data[j] - at[i], axis=1) / 2)
    j = known[j]
    times.append(time.perf_counter() - start)
order = np.lexsort((j, i))
np.stack([i[order], j[order]], axis=1).astype("<u4").tofile(f"{folder}/pairs.u32")
peak = resource.getrusage(resource.RUSAGE_SELF).ru_maxrss * 1024
program = f"scipy {scipy.__version__}, numpy {np.__version__}"
json.dump({"seconds": times, "peakBytes": peak, "program": program}, sys.stdout)

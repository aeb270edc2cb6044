"""Times astropy's search_around_sky on the arrays of a folder; writes its pairs there and the times to stdout."""

import json
import resource
import sys
import time

import astropy
import astropy.units as u
import numpy as np
from astropy.coordinates import SkyCoord, search_around_sky

folder, radius, repeats = sys.argv[1], float(sys.argv[2]), int(sys.argv[3])
read = {name: np.fromfile(f"{folder}/{name}.f64") for name in ("raDeg", "decDeg", "rowRaDeg", "rowDecDeg")}
small = SkyCoord([1.0, 2.0], [1.0, 2.0], unit="deg")
search_around_sky(small, small, 1 * u.deg)  # its imports are not to be counted
times = []
for _ in range(repeats):
    at = SkyCoord(read["raDeg"], read["decDeg"], unit="deg")
    rows = SkyCoord(read["rowRaDeg"], read["rowDecDeg"], unit="deg")
    start = time.perf_counter()
    i, j, apart, _ = search_around_sky(at, rows, radius * u.arcsec)
    times.append(time.perf_counter() - start)
order = np.lexsort((j, i))
np.stack([i[order], j[order]], axis=1).astype("<u4").tofile(f"{folder}/pairs.u32")
peak = resource.getrusage(resource.RUSAGE_SELF).ru_maxrss * 1024
json.dump({"seconds": times, "peakBytes": peak, "program": f"astropy {astropy.__version__}"}, sys.stdout)

#!/usr/bin/env python3
"""Times SciPy on the table of the 400 lowest modes of BenchmarkModesTable.

SciPy has no ordered list of modes: zeros are found order by order with
jn_zeros, enough of each order to be complete, then sorted.

Prints one line of JSON, seconds a table (median).
"""
import json
import statistics
import time

import numpy as np
from scipy.special import jn_zeros

COUNT = 400


def table():
    # Orders m have no zero below m, and at most (x - m/2)/pi + 1 below x (the
    # phase of J_m); 445 modes lie below 60.
    zeros = []
    last = 60.0
    m = 0
    while m < last:
        n = max(1, int((last - m / 2) / np.pi) + 2)
        zeros.extend((z, m, k + 1) for k, z in enumerate(jn_zeros(m, n)))
        m += 1
    zeros.sort()
    kept = zeros[:COUNT]
    assert len(kept) == COUNT and kept[-1][0] < last
    return kept


table()
seconds = []
for _ in range(5):
    start = time.perf_counter()
    table()
    seconds.append(time.perf_counter() - start)
print(json.dumps({"name": "modes-table", "seconds": statistics.median(seconds)}))

#!/usr/bin/env python3
"""Times SciPy on the inputs of the benchmarks in core/bessel/bench_test.go.

Prints one JSON line per job: {"name": ..., "seconds": ...}, the median of
several runs. Names are those of the Go benchmarks.
"""
import json
import statistics
import time

import numpy as np
from scipy import special


def timed(name, job, repeats=5):
    seconds = []
    for _ in range(repeats):
        start = time.perf_counter()
        job()
        seconds.append(time.perf_counter() - start)
    print(json.dumps({"name": name, "seconds": statistics.median(seconds)}), flush=True)


def zeros():
    for m in range(40):
        special.jn_zeros(m, 250)


k = np.arange(1, 1_000_001, dtype=float)
nu = 60 * ((k * 0.6180339887498949) % 1)
x = 200 * ((k * 0.4142135623730951) % 1)

orders = np.arange(201.0)[None, :]
grid = 0.02 * np.arange(1, 10_001)[:, None]

timed("BenchmarkZeros10000", zeros)
timed("BenchmarkJRandom", lambda: special.jv(nu, x), repeats=3)
timed("BenchmarkJSeq200", lambda: special.jv(orders, grid), repeats=3)

#!/usr/bin/env python3
"""Times the sums of core/disc's Analyse and Synthesise in NumPy.

Analysis and synthesis on a polar grid of 256 radii and 512 angles, orders
0..64, 64 zeros each: a real FFT along each circle, one matrix product an order
for the radius (both parts at once), and the way back. Tables and index sets are
made beforehand, arrays are laid out so that NumPy hands every product to its
BLAS, and the better of two layouts is reported. The numbers in the tables do
not matter to the time, so they are random.

Prints one line of JSON, seconds a round trip (median).
"""
import json
import time

import numpy as np

M, N, NR, NT = 64, 64, 256, 512
rng = np.random.default_rng(1)
analyse = rng.standard_normal((M + 1, N, NR))  # weights and norms in it
synthesise = np.ascontiguousarray(rng.standard_normal((M + 1, NR, N)))
f = rng.standard_normal((NR, NT))
spectrum = np.zeros((NR, NT // 2 + 1), complex)
by_order = np.empty((M + 1, NR, 2))
coef = np.empty((M + 1, N, 2))
back = np.empty((M + 1, NR, 2))


def strided():
    """Products on views of the spectra, nothing copied by hand."""
    v = np.fft.rfft(f, axis=1).view(float).reshape(NR, NT // 2 + 1, 2)[:, :M + 1]
    np.matmul(analyse, v.transpose(1, 0, 2), out=coef)
    np.matmul(synthesise, coef, out=back)
    s = spectrum.view(float).reshape(NR, NT // 2 + 1, 2)
    s[:, :M + 1] = back.transpose(1, 0, 2)
    return np.fft.irfft(spectrum, n=NT, axis=1)


def packed():
    """Spectra copied to contiguous blocks, one an order, first."""
    v = np.fft.rfft(f, axis=1).view(float).reshape(NR, NT // 2 + 1, 2)
    by_order[...] = v[:, :M + 1].transpose(1, 0, 2)
    np.matmul(analyse, by_order, out=coef)
    np.matmul(synthesise, coef, out=back)
    s = spectrum.view(float).reshape(NR, NT // 2 + 1, 2)
    s[:, :M + 1] = back.transpose(1, 0, 2)
    return np.fft.irfft(spectrum, n=NT, axis=1)


def median(fn, rounds=60):
    for _ in range(5):
        fn()
    times = []
    for _ in range(rounds):
        start = time.perf_counter()
        fn()
        times.append(time.perf_counter() - start)
    return float(np.median(times))


print(json.dumps({"name": "disc-256x512", "seconds": min(median(strided), median(packed))}))

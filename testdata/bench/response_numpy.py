#!/usr/bin/env python3
"""Times NumPy on one frame of BenchmarkRespondFrame and of BenchmarkFrame1600
in core/response.

The same separable work: amplitudes of all modes, cosine and sine parts, at one
instant (damped, closed form); one matrix product an order for the radii; an
inverse real FFT of the angles a radius. Tables are made beforehand. The numbers
in them do not matter to the time, so they are random.

Prints lines of JSON, seconds a frame (median).
"""
import json
import statistics
import time

import numpy as np


def measure(name, M, N, NR, NT):
    rng = np.random.default_rng(1)
    table = rng.standard_normal((M + 1, NR, N))
    omega = np.sort(rng.uniform(2.4, 75, (M + 1, N)))
    zeta = 0.01
    root = np.sqrt(1 - zeta * zeta)
    a, b, va, vb = rng.standard_normal((4, M + 1, N))
    start = np.stack([a, b], axis=-1)
    speed = np.stack([va, vb], axis=-1) / omega[..., None]
    spectrum = np.zeros((NR, NT // 2 + 1), complex)

    def frame(t):
        decay = np.exp(-zeta * omega * t)
        s = decay * np.sin(root * omega * t) / root
        c = decay * np.cos(root * omega * t) + zeta * s
        coef = c[..., None] * start + s[..., None] * speed
        rows = table @ coef
        spectrum[:, : M + 1] = 0.5 * (rows[..., 0] - 1j * rows[..., 1]).T
        spectrum[:, 0] *= 2
        return np.fft.irfft(spectrum, NT, axis=1) * NT

    for _ in range(50):
        frame(0.1)
    seconds = []
    for k in range(300):
        begin = time.perf_counter()
        frame(0.01 * k)
        seconds.append(time.perf_counter() - begin)
    print(json.dumps({"name": name, "seconds": statistics.median(seconds)}))


measure("response-frame", 16, 16, 40, 80)
measure("response-frame-1600", 39, 40, 128, 256)

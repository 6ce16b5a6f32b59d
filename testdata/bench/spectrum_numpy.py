#!/usr/bin/python3
"""The work of BenchmarkWavToPeaks (core/spectrum) in NumPy and SciPy, for comparison.

Same signal up to the noise's seed: 3 s at 48 kHz, 16 bit, twelve decaying tones after 0.1 s of noise.
Same steps: decode, find the strike, low-pass to a third of the rate, Hann-windowed zero-padded
spectra over L, L/2, L/4 ..., noise floor by running median, peaks by threshold and prominence with a log
parabola, decay rates from the narrow-band envelope by a weighted straight line.

Prints one line of JSON: {"name": "wav-to-peaks", "seconds": ...}, the median of several runs.
"""
import io
import json
import statistics
import time
import wave

import numpy as np
from scipy.fft import next_fast_len, rfft
from scipy.signal import find_peaks, get_window, resample_poly

RATE, SECONDS, HIGHEST = 48000, 3, 5000.0


def signal():
    rng = np.random.default_rng(1)
    t = np.arange(RATE * SECONDS) / RATE - 0.1
    x = 3e-4 * rng.standard_normal(t.size)
    on = t >= 0
    for k in range(12):
        x[on] += 0.06 * np.exp(-(3 + k / 2) * t[on]) * np.cos(2 * np.pi * (60 + 47.3 * k) * t[on] + k)
    out = io.BytesIO()
    with wave.open(out, 'wb') as w:
        w.setnchannels(1)
        w.setsampwidth(2)
        w.setframerate(RATE)
        w.writeframes(np.rint(x * 32767).astype('<i2').tobytes())
    return out.getvalue()


def decay(x, rate, f, length, noise):
    n = int(length * rate) // 4 * 4
    hop = n // 4
    shifted = x * np.exp(-2j * np.pi * f / rate * np.arange(x.size))
    frames = np.lib.stride_tricks.sliding_window_view(shifted, n)[::hop]
    z = np.abs(frames @ get_window('hann', n))
    power = z ** 2
    floor = noise * 3 / 8 * n
    below = np.nonzero(power < 4 * floor)[0]
    used = below[0] if below.size else z.size
    if used < 5:
        return np.nan
    t = np.arange(used) * hop / rate
    w = 1 / (floor / power[:used] + 1e-4)
    y = np.log(z[:used])
    tm = np.average(t, weights=w)
    return -np.sum(w * (t - tm) * (y - np.average(y, weights=w))) / np.sum(w * (t - tm) ** 2)


def peaks(data):
    with wave.open(io.BytesIO(data)) as w:
        rate = w.getframerate()
        x = np.frombuffer(w.readframes(w.getnframes()), '<i2') / 32768.0
    x = x - x.mean()
    hop, frame = rate // 400, rate // 100
    energy = np.convolve(x ** 2, np.ones(frame) / frame, 'valid')[::hop]
    start = int(np.argmax(energy > 10 * np.quantile(energy, 0.1))) * hop + frame
    x = resample_poly(x[start:], 1, 3)
    rate = rate / 3
    found = []
    n = x.size
    while n >= 0.06 * rate:
        padded = next_fast_len(2 * n, real=True)
        power = np.abs(rfft(x[:n] * get_window('hann', n), padded)) ** 2
        step = rate / padded
        power = power[:int(HIGHEST / step)]
        width = max(32, int(200 / step)) // 2
        windows = np.lib.stride_tricks.sliding_window_view(np.pad(power[::2], width // 2, mode='reflect'), width)
        grid = np.arange(0, windows.shape[0], max(1, width // 8))
        medians = np.log(np.median(windows[grid], axis=1) / np.log(2))
        floor = np.exp(np.interp(np.arange(power.size), 2 * grid, medians))
        level = np.log(power)
        tops, _ = find_peaks(level, height=np.log(floor) + 1.5 * np.log(10), prominence=np.log(2))
        for k in tops:
            f = k * step
            if f < 20 or f * n / rate < 3 or any(abs(f - g[0]) < 2 * rate / n for g in found):
                continue
            a, b, c = level[k - 1:k + 2]
            found.append(((k + 0.5 * (a - c) / (a - 2 * b + c)) * step, floor[k] / (n * 3 / 8), n / rate))
        n //= 2
    return [(f, decay(x, rate, f, min(max(2.5 / 47, t / 8), t / 3), noise)) for f, noise, t in found]


def main():
    data = signal()
    got = peaks(data)
    assert sum(any(abs(f - (60 + 47.3 * k)) < 0.1 for f, _ in got) for k in range(12)) == 12, got
    runs = []
    for _ in range(7):
        begin = time.perf_counter()
        peaks(data)
        runs.append(time.perf_counter() - begin)
    print(json.dumps({'name': 'wav-to-peaks', 'seconds': statistics.median(runs)}))


if __name__ == '__main__':
    main()

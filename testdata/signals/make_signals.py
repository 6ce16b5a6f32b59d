#!/usr/bin/python3
"""Makes the test recordings in this folder and their truth, signals.json.

Independent of the Go code: numpy for samples and noise, scipy for Bessel zeros, struct for the
WAV headers. Every signal has its own fixed seed, so running it again gives the same files.

    python3 make_signals.py            writes beside itself

Tone: A exp(-d (t - t0)) cos(2 pi f (t - t0) + phase) for t >= t0. Noise is white and Gaussian.
"""
import json
import os
import struct

import numpy as np
from scipy.special import jn_zeros

HERE = os.path.dirname(os.path.abspath(__file__))
TRUTH = {}


def tones(n, rate, start, parts):
    """Sum of decaying tones that begin at `start` seconds; parts: (f, A, d, phase)."""
    t = np.arange(n) / rate - start
    x = np.zeros(n)
    on = t >= 0
    for f, a, d, phase in parts:
        x[on] += a * np.exp(-d * t[on]) * np.cos(2 * np.pi * f * t[on] + phase)
    return x


def encode(x, bits, floating, rng):
    """Samples (frames, channels) to bytes. Whole numbers get triangular dither of one step."""
    x = np.asarray(x, float)
    if floating:
        return x.astype('<f4' if bits == 32 else '<f8').tobytes()
    scale = 2.0 ** (bits - 1)
    dither = rng.uniform(-0.5, 0.5, x.shape) + rng.uniform(-0.5, 0.5, x.shape)
    q = np.clip(np.rint(x * scale + dither), -scale, scale - 1).astype(np.int64)
    if bits == 8:
        return (q + 128).astype(np.uint8).tobytes()
    raw = q.astype('<i8').tobytes()
    width = bits // 8
    return np.frombuffer(raw, np.uint8).reshape(-1, 8)[:, :width].tobytes()


def decode(data, bits, floating):
    """The samples that are really in the file, for the truth."""
    if floating:
        return np.frombuffer(data, '<f4' if bits == 32 else '<f8').astype(float)
    raw = np.frombuffer(data, np.uint8).reshape(-1, bits // 8).astype(np.int64)
    if bits == 8:
        return (raw[:, 0] - 128) / 128.0
    value = sum(raw[:, i] << (8 * i) for i in range(bits // 8))
    value = np.where(value >= 1 << (bits - 1), value - (1 << bits), value)
    return value / 2.0 ** (bits - 1)


def chunk(name, body):
    return name + struct.pack('<I', len(body)) + body + b'\0' * (len(body) & 1)


def fmt(bits, floating, channels, rate, extensible=False):
    align = channels * bits // 8
    tag = 3 if floating else 1
    if not extensible:
        return chunk(b'fmt ', struct.pack('<HHIIHH', tag, channels, rate, rate * align, align, bits))
    guid = struct.pack('<H', tag) + bytes.fromhex('000000001000800000aa00389b71')
    return chunk(b'fmt ', struct.pack('<HHIIHHHHI', 0xFFFE, channels, rate, rate * align, align, bits,
                                      22, bits, 0) + guid)


def riff(*chunks):
    body = b'WAVE' + b''.join(chunks)
    return b'RIFF' + struct.pack('<I', len(body)) + body


def save(name, x, rate, bits, floating=False, extensible=False, extra=b'', seed=0, truth=None):
    x = np.asarray(x, float)
    if x.ndim == 1:
        x = x[:, None]
    data = encode(x, bits, floating, np.random.default_rng(seed))
    back = decode(data, bits, floating).reshape(x.shape)
    with open(os.path.join(HERE, name), 'wb') as out:
        out.write(riff(fmt(bits, floating, x.shape[1], rate, extensible), extra, chunk(b'data', data)))
    TRUTH[name] = dict(rate=rate, channels=x.shape[1], bits=bits, float=floating, frames=x.shape[0],
                       sum=list(back.sum(axis=0)), squares=list((back ** 2).sum(axis=0)),
                       last=list(back[-1]),
                       **(truth or {}))


def parts_truth(parts):
    return [dict(frequency=f, amplitude=a, decay=d) for f, a, d, _ in parts]


PARTS = [(110.3, 0.30, 3.0, 0.4), (175.7, 0.22, 5.0, 1.1), (236.2, 0.15, 8.0, 2.0), (412.9, 0.10, 14.0, 0.2)]


def formats():
    """The same tap in every sample format: 0.15 s of quiet, then a tap, 0.6 s in all."""
    start = 0.15
    for name, rate, bits, floating, ext, channels, extra in [
            ('tap-8bit.wav', 44100, 8, False, False, 1, b''),
            ('tap-16bit.wav', 44100, 16, False, False, 1, b''),
            ('tap-24bit-stereo.wav', 48000, 24, False, True, 2, b''),
            ('tap-32bit.wav', 44100, 32, False, False, 1, b''),
            ('tap-float.wav', 48000, 32, True, False, 1, chunk(b'LIST', b'INFOICMT\x04\0\0\0tap\0') + chunk(b'odd ', b'abc'))]:
        n = int(0.6 * rate)
        rng = np.random.default_rng(20_260_101 + bits + channels + floating)
        x = tones(n, rate, start, PARTS)[:, None] * np.array([1.0, 0.6])[:channels]
        x = x + rng.normal(0, 1e-3, x.shape)
        save(name, x, rate, bits, floating, ext, extra, seed=bits,
             truth=dict(start=start, noise=1e-3, parts=parts_truth(PARTS)))


def hum():
    """A tap among mains hum (50 Hz and its third and fifth) and a steady foreign tone."""
    rate, start = 8000, 0.5
    n = int(3.0 * rate)
    rng = np.random.default_rng(20_260_201)
    steady = [(50.02, 0.02, 0.0, 0.3), (150.06, 0.03, 0.0, 1.0), (250.10, 0.01, 0.0, 2.0), (333.3, 0.008, 0.0, 0.1)]
    x = tones(n, rate, 0.0, steady) + tones(n, rate, start, PARTS) + rng.normal(0, 5e-4, n)
    save('tap-hum.wav', x, rate, 16, seed=1,
         truth=dict(start=start, noise=5e-4, parts=parts_truth(PARTS), steady=parts_truth(steady)))


def double():
    """Two taps, the second 1.1 s after the first and softer."""
    rate, starts = 8000, [0.4, 1.5]
    n = int(2.6 * rate)
    rng = np.random.default_rng(20_260_301)
    second = [(f, 0.6 * a, d, p + 0.7) for f, a, d, p in PARTS]
    x = tones(n, rate, starts[0], PARTS) + tones(n, rate, starts[1], second) + rng.normal(0, 5e-4, n)
    save('tap-double.wav', x, rate, 16, seed=2, truth=dict(start=starts[0], starts=starts, noise=5e-4, parts=parts_truth(PARTS)))


def clipped():
    """The tap four times too loud for the converter."""
    rate, start = 8000, 0.2
    n = int(1.5 * rate)
    rng = np.random.default_rng(20_260_401)
    x = 4 * tones(n, rate, start, PARTS) + rng.normal(0, 5e-4, n)
    share = float(np.mean(np.abs(x) >= 1))
    save('tap-clipped.wav', x, rate, 16, seed=3, truth=dict(start=start, parts=parts_truth(PARTS), clipped=share))


def demo():
    """For the fake microphone and the demo: an invented diaphragm, ideal sheet.

    f = j_mn / (2 pi a) sqrt(T / sigma), a = 0.45 m, T = 310 N/m, sigma = 0.0695 kg/m^2.
    """
    a, tension, sigma, rate, start = 0.45, 310.0, 0.0695, 44100, 1.0
    n = 4 * rate
    speed = np.sqrt(tension / sigma)
    modes = [((0, 1), 0.16, 9.0, 0.2), ((1, 1), 0.22, 3.0, 1.3), ((2, 1), 0.15, 3.5, 2.2),
             ((0, 2), 0.06, 7.0, 0.9), ((3, 1), 0.09, 4.5, 2.9), ((1, 2), 0.06, 5.5, 1.7)]
    parts, listed = [], []
    for (m, k), amp, decay, phase in modes:
        f = float(jn_zeros(m, k)[-1] / (2 * np.pi * a) * speed)
        parts.append((f, amp, decay, phase))
        listed.append(dict(m=m, n=k, frequency=f, amplitude=amp, decay=decay))
    rng = np.random.default_rng(20_260_501)
    x = tones(n, rate, start, parts) + rng.normal(0, 3e-4, n)
    save('tap-demo.wav', x, rate, 16, seed=4, truth=dict(start=start, noise=3e-4, parts=parts_truth(parts)))
    with open(os.path.join(HERE, 'tap-demo.json'), 'w') as out:
        json.dump(dict(invented=True, radius=a, tension=tension, arealDensity=sigma, start=start, rate=rate,
                       formula='f = j_mn / (2 pi a) sqrt(T / sigma), zeros by scipy.special.jn_zeros',
                       modes=listed), out, indent=1)
        out.write('\n')
    # The second one for the browser: the same diaphragm at 280 N/m (about 5 % lower in pitch),
    # tapped twice, with 50 Hz hum.
    low = float(np.sqrt(280.0 / tension))
    parts2 = [(f * low, 0.8 * amp, decay, phase) for f, amp, decay, phase in parts]
    again = [(f, 0.8 * amp, decay, phase + 0.5) for f, amp, decay, phase in parts2]
    rng = np.random.default_rng(20_260_502)
    starts = [0.7, 2.4]
    x = (tones(n, rate, starts[0], parts2) + tones(n, rate, starts[1], again)
         + tones(n, rate, 0.0, [(50.0, 0.004, 0.0, 0.1)]) + rng.normal(0, 3e-4, n))
    save('tap-demo-slack.wav', x, rate, 16, seed=5,
         truth=dict(start=starts[0], starts=starts, noise=3e-4, parts=parts_truth(parts2),
                    steady=[dict(frequency=50.0, amplitude=0.004, decay=0.0)]))
    with open(os.path.join(HERE, 'tap-demo-slack.json'), 'w') as out:
        json.dump(dict(invented=True, radius=a, tension=280.0, arealDensity=sigma, starts=starts, rate=rate,
                       formula='f = j_mn / (2 pi a) sqrt(T / sigma), zeros by scipy.special.jn_zeros',
                       modes=[dict(l, frequency=l['frequency'] * low, amplitude=0.8 * l['amplitude']) for l in listed]),
                  out, indent=1)
        out.write('\n')


def hostile():
    """Headers that lie, as seeds for fuzzing and for the table of errors. 40 frames of a ramp."""
    ramp = struct.pack('<40h', *range(-20000, 20000, 1000))
    good = fmt(16, False, 1, 8000)

    def raw_fmt(tag=1, channels=1, rate=8000, byte_rate=16000, align=2, bits=16):
        return chunk(b'fmt ', struct.pack('<HHIIHH', tag, channels, rate, byte_rate, align, bits))

    def data(size, body=ramp):
        return b'data' + struct.pack('<I', size) + body

    nan = struct.pack('<8f', 0.1, float('nan'), float('inf'), -0.2, 0.3, 0.1, 1e38, 0.0)
    one_nan = np.concatenate([np.linspace(-0.5, 0.5, 2000), [np.nan]]).astype('<f4').tobytes()
    cases = {
        'good': riff(good, chunk(b'data', ramp)),
        'empty': b'',
        'not-wav': b'OggS\0\2\0\0\0\0\0\0\0\0\0\0',
        'riff-but-avi': b'RIFF\x20\0\0\0AVI LIST',
        'only-header': b'RIFF\x24\0\0\0WAVE',
        'no-fmt': riff(chunk(b'data', ramp)),
        'short-fmt': riff(chunk(b'fmt ', b'\1\0\1\0'), chunk(b'data', ramp)),
        'no-data': riff(good),
        'data-too-large': riff(good, data(1_000_000)),
        'data-ffffffff': riff(good, data(0xFFFFFFFF)),
        'data-zero': riff(good, data(0)),
        'data-zero-then-list': riff(good, data(0, b'') + chunk(b'LIST', b'INFO')),
        'data-odd': riff(good, data(79, ramp[:79] + b'\0')),
        'list-too-large': riff(good, b'LIST' + struct.pack('<I', 0x7FFFFFFF) + data(80)),
        'zero-rate': riff(raw_fmt(rate=0), chunk(b'data', ramp)),
        'huge-rate': riff(raw_fmt(rate=0xFFFFFFFF), chunk(b'data', ramp)),
        'zero-channels': riff(raw_fmt(channels=0), chunk(b'data', ramp)),
        'many-channels': riff(raw_fmt(channels=65535, align=65534), chunk(b'data', ramp)),
        'align-wrong': riff(raw_fmt(align=3), chunk(b'data', ramp)),
        'align-zero': riff(raw_fmt(align=0), chunk(b'data', ramp)),
        'byte-rate-wrong': riff(raw_fmt(byte_rate=1), chunk(b'data', ramp)),
        'bits-12': riff(raw_fmt(bits=12), chunk(b'data', ramp)),
        'bits-zero': riff(raw_fmt(bits=0), chunk(b'data', ramp)),
        'compressed': riff(raw_fmt(tag=85), chunk(b'data', ramp)),
        'float-16': riff(raw_fmt(tag=3), chunk(b'data', ramp)),
        'nan': riff(fmt(32, True, 1, 8000), chunk(b'data', nan)),
        'one-nan': riff(fmt(32, True, 1, 8000), chunk(b'data', one_nan)),
        'float-big': riff(fmt(32, True, 1, 8000), chunk(b'data', struct.pack('<4f', 1.0, -32768.0, 5.0, 0.0))),
        'float-64': riff(fmt(64, True, 1, 8000), chunk(b'data', struct.pack('<4d', 0.5, -0.25, 0.125, 0.0))),
        'extensible': riff(fmt(16, False, 1, 8000, True), chunk(b'data', ramp)),
        'extensible-cut': riff(chunk(b'fmt ', struct.pack('<HHIIHH', 0xFFFE, 1, 8000, 16000, 2, 16)), chunk(b'data', ramp)),
        'odd-chunk': riff(chunk(b'junk', b'abc'), good, chunk(b'LIST', b'INFO!'), chunk(b'data', ramp)),
        'rf64': b'RF64\xff\xff\xff\xffWAVE' + chunk(b'ds64', b'\0' * 28) + good + data(0xFFFFFFFF),
        'cut-in-header': riff(good, chunk(b'data', ramp))[:30],
    }
    folder = os.path.join(HERE, 'fuzz')
    os.makedirs(folder, exist_ok=True)
    for name, body in cases.items():
        with open(os.path.join(folder, name + '.wav'), 'wb') as out:
            out.write(body)


if __name__ == '__main__':
    formats()
    hum()
    double()
    clipped()
    demo()
    hostile()
    with open(os.path.join(HERE, 'signals.json'), 'w') as out:
        json.dump(TRUTH, out, indent=1)
        out.write('\n')

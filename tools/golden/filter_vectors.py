"""Filter designs, responses and outputs by SciPy, for LiveWave.Dsp.Tests.

usage: filter_vectors.py OUT.json

Input: 400 normals of SplitMix64, seed 99 (Box-Muller: of each pair of uniforms first the cosine, then the sine value).
Responses and group delays: SciPy's coefficients evaluated with mpmath at 200 bits, so that only the design itself is compared.
Outputs: sosfilt from rest, and from sosfilt_zi times the first sample; every 10th sample.
"""
import json
import math
import platform
import sys

import mpmath
import numpy as np
import scipy
from mpmath import mp, mpf
from scipy import signal

mp.prec = 200
MASK = 2 ** 64 - 1
SEED, SAMPLES, EVERY = 99, 400, 10

BAND_PASS = [
    (250, (4, 8), (2,)), (250, (8, 12), (1, 2, 4)), (250, (16, 24), (2,)), (250, (30, 80), (4,)),
    (1000, (4, 8), (1, 2, 4)), (1000, (8, 12), (2,)), (1000, (16, 24), (1, 2, 4)), (1000, (30, 80), (2,)),
    (30000, (4, 8), (2,)), (30000, (8, 12), (1,)), (30000, (16, 24), (2,)), (30000, (30, 80), (1, 4)),
]
LOW_PASS = [(250, 100, (4,)), (1000, 100, (1, 2, 4)), (30000, 100, (4,))]
HIGH_PASS = [(250, 0.5, (2,)), (1000, 0.5, (1, 2, 4)), (1000, 14 / 16, (2,)), (1000, 4 / 16, (2,)), (30000, 0.5, (2,))]
NOTCH = [(1000, 50, 30), (1000, 150, 30), (250, 50, 30), (30000, 60, 10)]


# (kind, rate, edges, order): Chebyshev II with 40 dB, elliptic with 0.5 and 40 dB unless told; band-stop of Butterworth too
MORE = [
    ("butterworth", "band-stop", 1000, (48, 52), 1), ("butterworth", "band-stop", 1000, (48, 52), 2),
    ("butterworth", "band-stop", 250, (48, 52), 3), ("butterworth", "band-stop", 30000, (48, 52), 2),
    ("chebyshev-ii", "low-pass", 1000, (100,), 4), ("chebyshev-ii", "low-pass", 1000, (100,), 5), ("chebyshev-ii", "low-pass", 30000, (500,), 6),
    ("chebyshev-ii", "high-pass", 1000, (0.5,), 4), ("chebyshev-ii", "high-pass", 250, (2,), 3),
    ("chebyshev-ii", "band-pass", 1000, (8, 12), 4), ("chebyshev-ii", "band-pass", 250, (30, 80), 3), ("chebyshev-ii", "band-pass", 30000, (16, 24), 2),
    ("chebyshev-ii", "band-stop", 1000, (48, 52), 4), ("chebyshev-ii", "band-stop", 30000, (48, 52), 1),
    ("elliptic", "low-pass", 1000, (100,), 4), ("elliptic", "low-pass", 1000, (100,), 7), ("elliptic", "low-pass", 30000, (500,), 6),
    ("elliptic", "low-pass", 250, (40,), 1), ("elliptic", "low-pass", 250, (40,), 2),
    ("elliptic", "band-pass", 1000, (8, 12), 4), ("elliptic", "band-pass", 250, (30, 80), 3), ("elliptic", "band-pass", 30000, (16, 24), 2),
    ("elliptic", "band-stop", 1000, (48, 52), 4), ("elliptic", "band-stop", 250, (48, 52), 3),
]


def normals(seed, count):
    state, values = seed, []

    def uniform():
        nonlocal state
        state = (state + 0x9E3779B97F4A7C15) & MASK
        bits = state
        bits = ((bits ^ (bits >> 30)) * 0xBF58476D1CE4E5B9) & MASK
        bits = ((bits ^ (bits >> 27)) * 0x94D049BB133111EB) & MASK
        bits ^= bits >> 31
        return ((bits >> 11) + 0.5) / 2 ** 53

    while len(values) < count:
        length, angle = math.sqrt(-2 * math.log(uniform())), 2 * math.pi * uniform()
        values += [length * math.cos(angle), length * math.sin(angle)]
    return np.array(values[:count])


def evaluate(sos, rate, frequency):
    """Response and group delay (seconds) without rounding."""
    back = mpmath.expj(-2 * mp.pi * mpf(frequency) / rate)
    response, delay = mpf(1), mpf(0)
    for row in sos:
        b, a = [mpf(float(c)) for c in row[:3]], [mpf(float(c)) for c in row[3:]]
        for sign, c in ((1, b), (-1, a)):
            value = c[0] + c[1] * back + c[2] * back ** 2
            delay += sign * ((c[1] * back + 2 * c[2] * back ** 2) / value).real
            response = response * value if sign == 1 else response / value
    return [float(response.real), float(response.imag)], float(delay / rate)


def case(kind, order, edges, quality, rate, sos, probes, x, family=None, ripple=None, attenuation=None):
    points = [evaluate(sos, rate, f) for f in probes]
    named = {} if family is None else {"family": family, "ripple_db": ripple, "attenuation_db": attenuation}
    return named | {
        "kind": kind, "order": order, "edges_hz": edges, "quality": quality, "rate_hz": rate, "probe_hz": probes,
        "response": [p[0] for p in points], "group_delay_seconds": [p[1] for p in points],
        "from_rest": signal.sosfilt(sos, x)[::EVERY].tolist(),
        "settled": signal.sosfilt(sos, x, zi=signal.sosfilt_zi(sos) * x[0])[0][::EVERY].tolist(),
    }


def cases(x):
    for rate, (low, high), orders in BAND_PASS:
        for order in orders:
            sos = signal.butter(order, [low, high], "bandpass", fs=rate, output="sos")
            yield case("band-pass", order, [low, high], None, rate, sos, [low / 2, low, (low + high) / 2, high, 1.4 * high], x)
    for rate, cutoff, orders in LOW_PASS:
        for order in orders:
            sos = signal.butter(order, cutoff, "lowpass", fs=rate, output="sos")
            yield case("low-pass", order, [cutoff], None, rate, sos, [cutoff / 50, cutoff / 2, cutoff, 1.2 * cutoff], x)
    for rate, cutoff, orders in HIGH_PASS:
        for order in orders:
            sos = signal.butter(order, cutoff, "highpass", fs=rate, output="sos")
            yield case("high-pass", order, [cutoff], None, rate, sos, [cutoff / 2, cutoff, 8 * cutoff, 16 * cutoff, 0.3 * rate], x)
    for rate, centre, quality in NOTCH:
        b, a = signal.iirnotch(centre, quality, fs=rate)
        sos = np.array([np.concatenate([b, a])])
        yield case("notch", 2, [centre], quality, rate, sos, [centre / 4, 0.9 * centre, 0.99 * centre, 1.5 * centre], x)


    for family, kind, rate, edges, order in MORE:
        yield more(family, kind, rate, list(edges), order, x)


def more(family, kind, rate, edges, order, x):
    ripple, attenuation = (0.5 if family == "elliptic" else None), (None if family == "butterworth" else 40 if order < 6 else 80)
    common = {"Wn": edges if len(edges) == 2 else edges[0], "btype": kind.replace("-", ""), "fs": rate, "output": "sos"}
    if family == "butterworth":
        sos = signal.butter(order, **common)
    elif family == "chebyshev-ii":
        sos = signal.cheby2(order, attenuation, **common)
    else:
        sos = signal.ellip(order, ripple, attenuation, **common)
    low, high = edges[0], edges[-1]
    probes = [low / 2, 0.93 * low, low, (low + high) / 2 + 0.03 * low, high * 1.01, 1.2 * high]
    return case(kind, order, edges, None, rate, sos, probes, x, family, ripple, attenuation)


def main(path):
    x = normals(SEED, SAMPLES)
    versions = {"generator": "tools/golden/filter_vectors.py", "python": platform.python_version(),
                "numpy": np.__version__, "scipy": scipy.__version__, "mpmath": mpmath.__version__}
    with open(path, "w", encoding="utf-8") as out:
        rows = ",\n".join("    " + json.dumps(c) for c in cases(x))
        head = {"versions": versions, "input": {"seed": SEED, "samples": SAMPLES, "every": EVERY, "first": x[:3].tolist()}}
        out.write(json.dumps(head)[:-1] + ',\n  "designs": [\n%s\n  ]\n}\n' % rows)


main(sys.argv[1])

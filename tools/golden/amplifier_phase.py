"""Phase of analog amplifier stages by SciPy (the poles of butter, analog), for LiveWave.Dsp.Tests.

usage: amplifier_phase.py OUT.json

The phase is unwrapped from where the stage does nothing (high-pass: from far above its corner down; low-pass: from far below it up), so
that it is the whole turn; delay and polarity are added by hand.
"""
import json
import platform
import sys

import numpy as np
import scipy
from scipy import signal

# f, high-pass (corner, order), low-pass (corner, order), delay in seconds, inverted
CASES = [
    (10, (1, 1), None, 0, False), (1, (0.3, 1), None, 0, False), (4, (1, 3), None, 0, False), (2, (10, 4), None, 0, False),
    (20, None, (100, 4), 0, False), (80, None, (70, 2), 0, False), (80, None, (100, 5), 0, False), (300, None, (100, 8), 0, False),
    (40, (0.1, 2), (250, 3), 0.0005, False), (12, (0.5, 1), (70, 2), 0, True), (20, None, None, 0.002, False), (18, (1, 2), (200, 6), 0.004, True),
]


def stage(f, kind, corner, order):
    """Degrees, the whole turn."""
    start = corner * (1e-10 if kind == "lowpass" else 1e10)
    path = 2 * np.pi * np.geomspace(start, f, 40001)
    _, p, _ = signal.butter(order, 2 * np.pi * corner, kind, analog=True, output="zpk")
    factors = [np.unwrap(np.angle(1j * path - root)) for root in p]
    turned = -sum(factors)
    return float(np.degrees(turned[-1] - turned[0]))


def case(f, high, low, delay, inverted):
    degrees = -360 * f * delay + (180 if inverted else 0)
    degrees += stage(f, "highpass", *high) if high else 0
    degrees += stage(f, "lowpass", *low) if low else 0
    return {"frequency_hz": f, "high_pass": high, "low_pass": low, "delay_seconds": delay, "is_inverted": inverted, "degrees": degrees}


def main(path):
    versions = {"generator": "tools/golden/amplifier_phase.py", "python": platform.python_version(), "numpy": np.__version__, "scipy": scipy.__version__}
    with open(path, "w", encoding="utf-8") as out:
        rows = ",\n".join("    " + json.dumps(case(*c)) for c in CASES)
        out.write(json.dumps({"versions": versions})[:-1] + ',\n  "cases": [\n%s\n  ]\n}\n' % rows)


main(sys.argv[1])

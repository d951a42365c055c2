"""Exact values of elementary functions at hard points, for LiveWave.Dsp.Tests.

usage: portable_values.py OUT.json

Arguments as bit patterns; results computed with mpmath at 1300 bits and rounded once to double, as bit patterns too.
"""
import json
import math
import platform
import random
import struct
import sys

import mpmath
from mpmath import mp, mpf

mp.prec = 1300
FUNCTIONS = {
    "sin": mpmath.sin, "cos": mpmath.cos, "tan": mpmath.tan, "exp": mpmath.exp, "log": mpmath.log,
    "atan2": mpmath.atan2, "hypot": lambda x, y: mpmath.sqrt(x * x + y * y),
}


def bits(x):
    return "%016X" % struct.unpack(">Q", struct.pack(">d", x))[0]


def nearest_to_quarter_turns(count):
    """Doubles below 1e5 that lie nearest to a multiple of pi/2, relative to the step between doubles."""
    found = []
    for n in range(1, 63662):
        exact = n * mp.pi / 2
        x = float(exact)
        found.append((float(abs(mpf(x) - exact)), x))
    return [x for _, x in sorted(found)[:count]]


def arguments():
    lots = random.Random(11)
    angles = nearest_to_quarter_turns(20)
    angles += [lots.uniform(-7, 7) for _ in range(15)] + [lots.uniform(-1e5, 1e5) for _ in range(15)]
    angles += [2.0 ** 20, math.nextafter(2.0 ** 20, 0), 1e6, 1e9, 1e22, 6381956970095103.0 * 2.0 ** 797, 1.7976931348623157e308]
    angles += [math.pi / 4, math.nextafter(math.pi / 4, 1), 1e-8, 5e-324]
    for name in ("sin", "cos", "tan"):
        for x in angles:
            yield name, (x,)
    for x in [lots.uniform(-745, 709.7) for _ in range(25)] + [1e-17, -1e-17, 0.34657359027997264, 709.782712893384, -745.13, -708.5]:
        yield "exp", (x,)
    for x in [math.exp(lots.uniform(-700, 700)) for _ in range(15)] + [1 + lots.uniform(-1, 1) * 10.0 ** -k for k in range(16)]:
        yield "log", (x,)
    for x in (5e-324, 2.2250738585072014e-308, 1.7976931348623157e308, math.sqrt(0.5), math.sqrt(2)):
        yield "log", (x,)
    for _ in range(40):
        yield "atan2", (lots.gauss(0, 1) * 10.0 ** lots.randrange(-3, 4), lots.gauss(0, 1))
    for y, x in ((1.0, 1.0), (1e-310, 3.0), (1e-310, -3.0), (5e-324, 1.5e-323), (1.7e308, 1.6e308), (1e300, 1e-300), (-1.0, -1e-17)):
        yield "atan2", (y, x)
    for x, y in [(lots.gauss(0, 1), lots.gauss(0, 1)) for _ in range(10)] + [(1e308, 1e308), (3e-320, 4e-320), (1e200, 1e150), (3.0, 4.0)]:
        yield "hypot", (x, y)


def main(path):
    cases = []
    for name, args in arguments():
        cases.append([name, [bits(a) for a in args], bits(float(FUNCTIONS[name](*(mpf(a) for a in args))))])
    with open(path, "w", encoding="utf-8") as out:
        versions = json.dumps({"generator": "tools/golden/portable_values.py", "python": platform.python_version(), "mpmath": mpmath.__version__})
        rows = ",\n".join("    " + json.dumps(case) for case in cases)
        out.write('{\n  "versions": %s,\n  "cases": [\n%s\n  ]\n}\n' % (versions, rows))


main(sys.argv[1])

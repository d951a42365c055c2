"""Makes the Millrace demo recording with known truth: recording, electrodes, truth table, calibration.

Usage: make_millrace.py OUTDIR

Needs Python 3.11, numpy 1.24, scipy 1.10 and a few minutes; not run in continuous integration.  Everything follows
from the fixed seeds in scene.py and calibration.py.  check_millrace.py OUTDIR then judges what was written.
"""
import os

# one thread: sums of products keep their order, so the same machine writes the same bytes again
for _name in ("OMP_NUM_THREADS", "OPENBLAS_NUM_THREADS", "MKL_NUM_THREADS"):
    os.environ[_name] = "1"

import hashlib
import platform
import sys

import numpy as np
import scipy

import calibration
import layout
import scene
from phase_filter import response_at
from xdf_file import Writer

START_STAMP = 5000.0
MICROVOLTS_PER_COUNT = 0.05
CHUNK_S, OFFSET_EVERY_S, BOUNDARY_EVERY_S = 0.5, 5.0, 10.0
FILES = ("millrace.xdf", "millrace_electrodes.tsv", "millrace.truth.tsv", "millrace.calibration.json")


def description():
    """desc element of the stream header"""
    channels = [("channel", [("label", name), ("unit", "microvolts"), ("type", "LFP"),
                             ("location", [("X", f"{x:g}"), ("Y", f"{y:g}"), ("Z", "0")]),
                             ("conversion", f"{MICROVOLTS_PER_COUNT:g}")])
                for name, x, y in layout.electrodes()]
    return [
        ("channels", channels),
        ("array", [("frame", "the array's own: X to the right along columns, Y up along rows, in mm, seen from above; "
                             "r1 is Y 0, c1 is X 0; not an anatomical frame"),
                   ("conversion", "microvolts per count, per channel; value in microvolts = count * conversion")]),
        ("synchronization", [("can_drop_samples", "true")]),
    ]


def write_recording(path, counts):
    """counts (samples, channels) int16"""
    rate = layout.RATE_HZ
    info = [("name", "Fenmarsh array"), ("type", "LFP"), ("channel_count", counts.shape[1]), ("nominal_srate", f"{rate:g}"),
            ("channel_format", "int16"), ("source_id", "fenmarsh-array-millrace"), ("version", "1.1")]
    out = Writer(path, info, description())
    step, total = int(CHUNK_S * rate), len(counts)
    for first in range(0, total, step):
        seconds = first / rate
        if seconds % OFFSET_EVERY_S == 0:
            out.clock_offset(START_STAMP + seconds, 0.0)
        out.samples(START_STAMP + seconds, counts[first:first + step], 1.0 / rate)
        if (first + step) / rate % BOUNDARY_EVERY_S == 0:
            out.boundary()
    out.clock_offset(START_STAMP + total / rate, 0.0)
    out.close()


def to_counts(microvolts):
    """(channels, samples) -> (samples, channels) int16; refuses clipping"""
    counts = np.rint(microvolts.T / MICROVOLTS_PER_COUNT)
    if np.abs(counts).max() > 32767:
        raise ValueError("the recording does not fit into 16 bits at this conversion")
    return counts.astype(np.int16)


def make(folder):
    os.makedirs(folder, exist_ok=True)
    at = lambda name: os.path.join(folder, name)
    array = scene.Array()
    baseline = scene.as_recorded(array, scene.background(array, scene.BASELINE_S, scene.BASELINE_SEED))
    # the baseline passes the same converter as the recording
    learnt = calibration.learn(to_counts(baseline).T * MICROVOLTS_PER_COUNT)
    provenance = {
        "seconds": scene.BASELINE_S, "seed": scene.BASELINE_SEED, "arraySeed": scene.ARRAY_SEED,
        "python": platform.python_version(), "numpy": np.__version__, "scipy": scipy.__version__,
        "notes": "invented background of the Millrace scene without waves or decoys, another seed than the recording, not "
                 f"bundled; phase model fitted on its first {calibration.FIT_S:g} s, the rest learnt from all of it but the first "
                 f"{layout.START_UP_S:g} s; "
                 + (f"the gates alone hold the surrogate below the nominal rate ({learnt['floor_count']} events in "
                    f"{calibration.SURROGATE_MINUTES:g} min), so every threshold stands at its floor of -4" if learnt["at_floor"]
                    else "thresholds bisected to the nominal rate, then levelled by sector")
                 + f"; surrogate counts are from a second, held-out surrogate; coherence time {learnt['coherence_s']:.4f} s"}
    calibration.write(at("millrace.calibration.json"), learnt, provenance)

    noise_rms = scene.noise_before_gain(array, learnt["rms"])
    response = lambda f: float(response_at(learnt["model"], layout.LOW_HZ, layout.HIGH_HZ, f)[0])
    events = scene.draw_events()
    microvolts = scene.background(array, scene.RECORDING_S, scene.RECORDING_SEED)
    scene.add_events(array, microvolts, events, noise_rms, response)
    write_recording(at("millrace.xdf"), to_counts(scene.as_recorded(array, microvolts)))
    scene.write_truth(at("millrace.truth.tsv"), events)
    layout.write_electrodes(at("millrace_electrodes.tsv"))
    print(f"noise behind the filter {noise_rms:.3f} microvolts r.m.s. of |z|; a 0 dB wave at 18 Hz has an amplitude of "
          f"{noise_rms / response(18.0):.2f} microvolts")


def write_sums(folder):
    """names only, so the list can be checked from inside the folder"""
    with open(os.path.join(folder, "SHA256SUMS"), "w", encoding="utf-8", newline="\n") as out:
        for name in FILES:
            with open(os.path.join(folder, name), "rb") as f:
                out.write(f"{hashlib.sha256(f.read()).hexdigest()}  {name}\n")


if __name__ == "__main__":
    if len(sys.argv) != 2 or sys.argv[1].startswith("-"):
        sys.exit(__doc__)
    make(sys.argv[1])
    write_sums(sys.argv[1])

"""Is the bundled recording a lucky draw?  The same scene with other seeds, judged with the written calibration.

Usage: other_seeds.py DIR COUNT

DIR holds millrace.calibration.json.  Seeds of events and background follow the bundled ones by 1000, 1001, ...
"""
import sys

import check_millrace as check
import numpy as np

import calibration
import layout
import scene
from make_millrace import MICROVOLTS_PER_COUNT, to_counts
from phase_filter import response_at

if __name__ == "__main__":
    if len(sys.argv) != 3 or sys.argv[1].startswith("-"):
        sys.exit(__doc__)
    cal = calibration.load(sys.argv[1] + "/millrace.calibration.json")
    array = scene.Array()
    noise_rms = scene.noise_before_gain(array, cal["rms"])
    response = lambda f: float(response_at(cal["model"], layout.LOW_HZ, layout.HIGH_HZ, f)[0])
    met, tally = 0, {}
    for i in range(int(sys.argv[2])):
        events = scene.draw_events(scene.EVENT_SEED + 1000 + i)
        microvolts = scene.background(array, scene.RECORDING_S, scene.RECORDING_SEED + 1000 + i)
        scene.add_events(array, microvolts, events, noise_rms, response)
        reading, found = check.run_chain(to_counts(scene.as_recorded(array, microvolts)).T * MICROVOLTS_PER_COUNT, cal)
        truth = check.as_truth(scene.truth_rows(events))
        table, good, hits, _ = check.summarise(truth, found, check.pulses(reading, found, cal["enter"], layout.FRAME_RATE_HZ))
        met += good
        for name, value, _ in table:
            tally.setdefault(name.strip(), []).append(float(value.split()[0].rstrip(",")))
        print(i, "met" if good else "not met", "; ".join(f"{n.strip()}: {v}" for n, v, _ in table), flush=True)
    print(f"bar met in {met} of {sys.argv[2]}")
    for name, values in tally.items():
        print(f"{name:<36} mean {np.mean(values):.2f}, from {min(values):g} to {max(values):g}")

"""Judges the written Millrace files with the reference chain: reads recording, calibration and truth back and counts.

Usage: check_millrace.py DIR [REFERENCE.json]

With a second name it also writes the events and some frames in full, to compare another implementation with.
Exit code 0 when the bar is met, 1 when it is not.  Not run in continuous integration (needs SciPy).

Order of operations, the one the calibration was learnt with: counts times conversion -> DC block settled on the first
row -> one oscillator filter on all channels, turned back by the DC block's lead -> frames at rows 0, 4, 8, ... ->
divided by the channels' baseline r.m.s. -> evidence, refined wave vector, dL, Lq -> statistic E, or -infinity where a
gate fails -> state machine.  Every frame is refined, so the direction of a bridged frame counts in the resultant.
"""
import csv
import json
import os

for _name in ("OMP_NUM_THREADS", "OPENBLAS_NUM_THREADS", "MKL_NUM_THREADS"):
    os.environ[_name] = "1"

import sys

import numpy as np

import calibration
import layout
import scene
import xdf_file
from phase_filter import frames
from wave_events import EventMachine, sector_of, stay_of

AFTER_S = 0.150
RULE_SE_DEGREES, RULE_REST_S = 20.0, 1.0


def read_rows(path):
    """recording -> rows (channels, samples) in microvolts, checked against layout and footer"""
    got = xdf_file.read(path)
    channel = got["info"].findall("desc/channels/channel")
    assert [c.findtext("label") for c in channel] == layout.labels()
    assert all(c.findtext("unit") == "microvolts" for c in channel)
    place = np.array([[float(c.findtext("location/" + a)) for a in "XY"] for c in channel])
    assert np.allclose(place, layout.positions())
    assert int(got["footer"].findtext("sample_count")) == len(got["values"]) == len(got["stamps"])
    assert np.abs(got["stamps"] - got["stamps"][0] - np.arange(len(got["stamps"])) / layout.RATE_HZ).max() < 1e-6
    times = [t for t, _ in got["offsets"]]
    assert len(set(times)) == len(times) and all(v == 0.0 for _, v in got["offsets"])
    conversion = np.array([float(c.findtext("conversion")) for c in channel])
    return got["values"].T * conversion[:, None]


def read_truth(path):
    with open(path, encoding="utf-8", newline="") as f:
        return as_truth(csv.DictReader(f, delimiter="\t"))


def as_truth(rows):
    return [dict(onset=float(r["onset"]), end=float(r["onset"]) + float(r["duration"]), kind=r["trial_type"],
                 direction=float(r["direction_degrees"]) if r["direction_degrees"] != "n/a" else None,
                 apertures=float(r["wavelength_apertures"]) if r["wavelength_apertures"] != "n/a" else None,
                 decibels=float(r["snr_decibels"]), strong=r["strong"] == "yes", in_sector=r["in_sector"] == "yes") for r in rows]


def run_chain(rows, cal):
    """rows in microvolts -> per-frame readings and events after start-up"""
    print_ = cal["entry"]["fingerprint"]
    Z = frames(rows, cal["model"], print_["lowHz"], print_["highHz"], print_["rateHz"], print_["samplesPerFrame"]) / cal["rms"]
    reading = dict(cal["whitened"].read(Z), z=Z)
    rate = print_["rateHz"] / print_["samplesPerFrame"]
    statistic = reading["statistic"].copy()
    statistic[:int(layout.START_UP_S * rate)] = -np.inf
    events = EventMachine(rate, cal["enter"], cal["event"]).run(statistic, reading["theta"])
    return reading, [dict(onset=a / rate, trigger=t / rate, end=e / rate, direction=float(np.degrees(d) % 360), frames=(a, t, e))
                     for a, t, e, d in events]


def angle_between(a, b):
    return abs((a - b + 180.0) % 360.0 - 180.0)


def match(truth, events):
    """hit of each true event (index of the first event that answers it, or None), and the stray events.
    A wave is found when [trigger, end] overlaps [onset, end + 150 ms]; a decoy is taken for a wave when a trigger
    falls into [onset, end + 150 ms]"""
    hits, used = [], set()
    for t in truth:
        last = t["end"] + AFTER_S
        if t["kind"] == "planar":
            found = [i for i, e in enumerate(events) if e["trigger"] <= last and e["end"] >= t["onset"]]
        else:
            found = [i for i, e in enumerate(events) if t["onset"] <= e["trigger"] <= last]
        hits.append(found[0] if found else None)
        used.update(found)
    return hits, [i for i in range(len(events)) if i not in used]


def pulses(reading, events, enter, rate):
    """rule: planar, direction of the event at its trigger within 135 +- 30 deg, se <= 20 deg at the deciding frame
    (the first from the trigger on that is itself good), 1000 ms rest after a pulse"""
    stay = stay_of(enter)[sector_of(reading["theta"])]
    out, free = [], -np.inf
    for i, e in enumerate(events):
        if angle_between(e["direction"], scene.RULE_DEGREES) > scene.RULE_HALF_WIDTH_DEGREES:
            continue
        _, trigger, end = e["frames"]
        for f in range(trigger, end + 1):
            if reading["statistic"][f] >= stay[f] and reading["se"][f] <= RULE_SE_DEGREES and f / rate >= free:
                out.append((i, f / rate))
                free = f / rate + RULE_REST_S
                break
    return out


def summarise(truth, events, shots):
    hits, stray = match(truth, events)
    pick = lambda keep: [(t, events[h] if h is not None else None) for t, h in zip(truth, hits) if keep(t)]
    strong, weak = pick(lambda t: t["strong"]), pick(lambda t: t["kind"] == "planar" and not t["strong"])
    decoys = pick(lambda t: t["kind"] != "planar")
    found = [(t, e) for t, e in strong if e]
    error = np.array([angle_between(e["direction"], t["direction"]) for t, e in found])
    late = np.array([e["trigger"] - t["onset"] for t, e in found]) * 1000
    weak_found = [(t, e) for t, e in weak if e]
    answered = {h: t for t, h in zip(truth, hits) if h is not None}
    shot_truth = [answered.get(i) for i, _ in shots]
    right = sum(1 for t in shot_truth if t and t["in_sector"])
    table = [("strong waves found", f"{len(found)} of {len(strong)}", "at least 24"),
             ("  in the sector", f"{sum(t['in_sector'] for t, e in found)} of {sum(t['in_sector'] for t, _ in strong)}", ""),
             ("direction error at trigger, median", f"{np.median(error):.1f} deg", "at most 8, wanted 6"),
             ("  90 %, largest", f"{np.quantile(error, 0.9):.1f}, {error.max():.1f} deg", ""),
             ("latency from onset, median, 90 %", f"{np.median(late):.0f}, {np.quantile(late, 0.9):.0f} ms", ""),
             ("other waves found", f"{len(weak_found)} of {len(weak)}", ""),
             ("  0-5 dB, up to 2 apertures", f"{sum(t['apertures'] < 2 for t, e in weak_found)} of {sum(t['apertures'] < 2 for t, _ in weak)}", ""),
             ("  2-3.2 apertures", f"{sum(t['apertures'] >= 2 for t, e in weak_found)} of {sum(t['apertures'] >= 2 for t, _ in weak)}", ""),
             ("decoys taken for a wave", f"{sum(e is not None for _, e in decoys)} of {len(decoys)}", "at most 1"),
             ("stray events", str(len(stray)), ""),
             ("events in all", str(len(events)), ""),
             ("pulses of the rule", str(len(shots)), ""),
             ("  on a true wave of the sector", f"{right} (of {sum(t['in_sector'] for t in truth)} such waves)", "")]
    met = len(found) >= 24 and np.median(error) <= 8.0 and sum(e is not None for _, e in decoys) <= 1
    return table, met, hits, stray


def write_reference(path, reading, events, shots):
    """events, and every number of the frames at the first eight triggers and of three quiet frames"""
    number = lambda v: float(f"{float(v):.12g}")
    wanted = [e["frames"][1] for e in events[:8]] + [250, 500, 700]
    fired = {i for i, _ in shots}
    document = {
        "note": "frames are counted from 0, frame f is row 4 f; z is divided by the channels' baseline r.m.s., [re, im] in "
                "channel order; directions and se in degrees, k in rad/mm; compare to 1e-6 relative",
        "events": [{"onsetFrame": a, "triggerFrame": t, "endFrame": c, "directionDegrees": number(e["direction"]),
                    "evidenceAtTrigger": number(reading["E"][t]), "seAtTrigger": number(reading["se"][t]), "pulse": i in fired}
                   for i, e in enumerate(events) for a, t, c in [e["frames"]]],
        "frames": [{"frame": f, "evidence": number(reading["E"][f]), "k": [number(v) for v in reading["k"][f]],
                    "dL": number(reading["dL"][f]), "Lq": number(reading["Lq"][f]), "se": number(reading["se"][f]),
                    "z": [[number(v.real), number(v.imag)] for v in reading["z"][f]]} for f in wanted]}
    with open(path, "w", encoding="utf-8", newline="\n") as out:
        out.write("{\n" + json.dumps("note") + ": " + json.dumps(document["note"]))
        for part in ("events", "frames"):
            out.write(f",\n{json.dumps(part)}: [\n" + ",\n".join(json.dumps(v) for v in document[part]) + "\n]")
        out.write("\n}\n")


def describe(t):
    where = f" {t['direction']:.1f} deg, {t['apertures']:.2f} L" if t["direction"] is not None else ""
    return f"{t['kind']}{where}, {t['decibels']:.1f} dB" + (", strong" if t["strong"] else "")


def main(folder, reference=None):
    at = lambda name: os.path.join(folder, name)
    cal = calibration.load(at("millrace.calibration.json"))
    assert cal["entry"]["fingerprint"]["channels"] == layout.labels()
    truth = read_truth(at("millrace.truth.tsv"))
    reading, events = run_chain(read_rows(at("millrace.xdf")), cal)
    rate = layout.FRAME_RATE_HZ
    shots = pulses(reading, events, cal["enter"], rate)
    table, met, hits, stray = summarise(truth, events, shots)
    fired = {i: s for i, s in shots}
    owner = {h: t for t, h in zip(truth, hits) if h is not None}
    print("events: onset frame, trigger frame, end frame, direction deg, E at trigger, se deg, pulse, truth")
    for i, e in enumerate(events):
        t = owner.get(i)
        said = "stray" if i in stray else "again" if t is None else describe(t)
        a, b, c = e["frames"]
        print(f"  {a:6d} {b:6d} {c:6d} {e['direction']:7.2f} {reading['E'][b]:8.3f} {reading['se'][b]:6.2f} {'pulse' if i in fired else '-':>6}  {said}")
    for t, h in zip(truth, hits):
        if h is None and t["kind"] == "planar":
            print(f"  missed: {t['onset']:.3f} s, {describe(t)}")
    if reference:
        write_reference(reference, reading, events, shots)
    width = max(len(a) for a, _, _ in table)
    for name, value, bar in table:
        print(f"{name:<{width}}  {value:<28} {bar}")
    print("bar met" if met else "BAR NOT MET")
    return 0 if met else 1


if __name__ == "__main__":
    if len(sys.argv) not in (2, 3) or sys.argv[1].startswith("-"):
        sys.exit(__doc__)
    sys.exit(main(*sys.argv[1:]))

"""Calibration of the Millrace patch from a baseline without waves, and its JSON file.

Usage: imported by make_millrace.py (learn, write) and check_millrace.py (load); nothing to run by itself.
"""
import json

import numpy as np

from layout import (FRAME_RATE_HZ, HIGH_HZ, LOW_HZ, RATE_HZ, SAMPLES_PER_FRAME, START_UP_S, labels, positions)
from noise_model import baseline_model, coherence_time, surrogate_own
from phase_filter import OscillatorModel, centre_of_band, dc_block, oscillator_filter
from phase_fit import fit_patch
from plane_wave import Geometry, Whitened
from wave_events import SECTORS, EventMachine, calibrate, poisson_interval

EVENT = {"minimumMs": 60, "stabilityMs": 60, "stabilityDegrees": 25, "gapMs": 20, "refractoryMs": 100}
FIT_S = 120.0
PER_MINUTE = 1.0
SURROGATE_MINUTES = 30.0
BOOT_SEED, SURROGATE_SEED, HELD_OUT_SEED = 4111, 4112, 4113
DIGITS = 12


def learn(rows, report=print):
    """rows (channels, samples) in microvolts -> dict with the entry's parts as numpy arrays"""
    blocked, lead = dc_block(rows, LOW_HZ, HIGH_HZ, RATE_HZ)
    scale = blocked.std(axis=1)
    model, bursts = fit_patch(blocked[:, :int(FIT_S * RATE_HZ)], scale, LOW_HZ, HIGH_HZ, RATE_HZ)
    report("oscillators: centre", np.round(model.centres_hz(), 3), "width", np.round(model.widths_hz(), 3), "Hz, target",
           model.target, "burst factor", round(bursts, 3))
    Z = oscillator_filter(blocked, model, lead)[:, ::SAMPLES_PER_FRAME].T[int(START_UP_S * FRAME_RATE_HZ):]
    rms = np.sqrt((np.abs(Z) ** 2).mean(axis=0))
    Z = Z / rms
    g = Geometry(positions())
    C, C_null, facts = baseline_model(g, Z, np.random.default_rng(BOOT_SEED))
    whitened = Whitened(g, C, facts["loading"])
    tau = coherence_time(Z, FRAME_RATE_HZ, centre_of_band(LOW_HZ, HIGH_HZ))
    report("noise model:", facts, "coherence time", round(tau, 4), "s, independent snapshots", int(len(Z) / FRAME_RATE_HZ / tau))

    def null(seed):
        rng = np.random.default_rng(seed)
        return whitened.read(surrogate_own(Z, C_null, SURROGATE_MINUTES * 60, FRAME_RATE_HZ, rng))

    frames = null(SURROGATE_SEED)
    enter, at_floor, n_floor = calibrate(FRAME_RATE_HZ, frames["statistic"], frames["theta"], PER_MINUTE, EVENT)
    machine = EventMachine(FRAME_RATE_HZ, enter, EVENT)
    held_out = null(HELD_OUT_SEED)
    n_held_out = len(machine.run(held_out["statistic"], held_out["theta"]))
    own = whitened.read(Z)
    n_own = len(machine.run(own["statistic"], own["theta"]))
    own_minutes = len(Z) / FRAME_RATE_HZ / 60
    report("thresholds", np.round(enter, 4), "at the floor" if at_floor else "above the floor", "- at the floor", n_floor,
           "events; held-out surrogate", n_held_out, "in", SURROGATE_MINUTES, "min; baseline", n_own, "in", round(own_minutes, 3), "min")
    rates = {"nominal": PER_MINUTE}
    for name, n, minutes in (("surrogate", n_held_out, SURROGATE_MINUTES), ("baseline", n_own, own_minutes)):
        low, high = poisson_interval(n, minutes)
        rates.update({name: n / minutes, name + "Count": n, name + "Minutes": minutes, name + "Low": low, name + "High": high})
    return dict(model=model, scale=scale, rms=rms, C=C, facts=facts, frames=len(Z), enter=enter, at_floor=at_floor,
                rates=rates, bursts=bursts, floor_count=n_floor, coherence_s=tau)


def _number(v):
    if isinstance(v, (bool, np.bool_)):
        return "true" if v else "false"
    if isinstance(v, (int, np.integer)):
        return str(int(v))
    return format(float(v), f".{DIGITS}g")


def _text(value, indent):
    """JSON with matrices one row per line and short lists on one line"""
    pad, deeper = " " * indent, " " * (indent + 2)
    if isinstance(value, dict):
        flat = "{ " + ", ".join(f"{json.dumps(k)}: {_text(v, indent + 2)}" for k, v in value.items()) + " }"
        if "\n" not in flat and len(flat) <= 150:
            return flat
        return "{\n" + ",\n".join(f"{deeper}{json.dumps(k)}: {_text(v, indent + 2)}" for k, v in value.items()) + f"\n{pad}}}"
    if isinstance(value, np.ndarray):
        value = value.tolist()
    if isinstance(value, (list, tuple)):
        if any(isinstance(v, dict) for v in value) or (value and isinstance(value[0], list) and len(value[0]) > 2):
            return "[\n" + ",\n".join(deeper + _text(v, indent + 2) for v in value) + f"\n{pad}]"
        return "[" + ", ".join(_text(v, indent) for v in value) + "]"
    return json.dumps(value) if isinstance(value, str) else _number(value)


def write(path, learnt, provenance):
    m = learnt["model"]
    entry = {
        "patch": "quill", "band": "beta",
        "fingerprint": {
            "channels": labels(), "positionsMm": positions(), "rateHz": RATE_HZ, "lowHz": LOW_HZ, "highHz": HIGH_HZ,
            "conditioning": [], "phaseEstimator": "oscillator", "waveEstimator": "planar",
            "samplesPerFrame": SAMPLES_PER_FRAME, "event": EVENT},
        "unit": "microvolts",
        "phaseModel": {
            "rateHz": RATE_HZ,
            "oscillators": [{"poleRe": a.real, "poleIm": a.imag, "driveVariance": q, "isTarget": t}
                            for a, q, t in zip(m.poles, m.drive, m.target)],
            "background": [{"pole": b, "driveVariance": q} for b, q in zip(m.back_poles, m.back_drive)],
            "whiteVariance": m.white},
        "channelScale": learnt["scale"], "channelRms": learnt["rms"],
        "noise": {"covariance": learnt["C"], "loading": learnt["facts"]["loading"], "model": learnt["facts"]["model"],
                  "misfit": learnt["facts"]["misfit"][-1], "frames": learnt["frames"]},
        "thresholds": [{"kind": "planar", "sectors": SECTORS, "enter": learnt["enter"], "falseEventsPerMinute": learnt["rates"]}]}
    document = {"format": "livewave-calibration", "version": 1, "madeBy": "tools/golden/millrace/make_millrace.py",
                "provenance": provenance, "entries": [entry]}
    with open(path, "w", encoding="utf-8", newline="\n") as out:
        out.write(_text(document, 0) + "\n")


def load(path):
    """entry 'quill'/'beta' back as numpy arrays: model, rms, whitened evidence, enter, event settings, entry"""
    with open(path, encoding="utf-8") as f:
        document = json.load(f)
    entry = next(e for e in document["entries"] if e["patch"] == "quill" and e["band"] == "beta")
    p, print_ = entry["phaseModel"], entry["fingerprint"]
    model = OscillatorModel([o["poleRe"] + 1j * o["poleIm"] for o in p["oscillators"]], [o["driveVariance"] for o in p["oscillators"]],
                            [b["pole"] for b in p["background"]], [b["driveVariance"] for b in p["background"]],
                            p["whiteVariance"], [o["isTarget"] for o in p["oscillators"]], p["rateHz"])
    g = Geometry(print_["positionsMm"])
    return dict(model=model, rms=np.array(entry["channelRms"]), whitened=Whitened(g, entry["noise"]["covariance"], entry["noise"]["loading"]),
                enter=np.array(entry["thresholds"][0]["enter"]), event=print_["event"], entry=entry, document=document)

"""Golden vectors of the planar estimator and the event machine: waves.json, events.json.

usage: wave_vectors.py STUDY DSP_GOLDEN PIPELINE_GOLDEN          (Python 3, standard library only)

Cuts from the golden files of our wave study, made by its reference programme (numpy 1.24 or later, scipy 1.10 or later),
what the tests need: waves.json into DSP_GOLDEN, events.json into PIPELINE_GOLDEN. Nothing is computed here.
  layouts     positions and what follows from them (study section 3)
  frames      one-frame inputs with the whitened statistics (4.6-4.8) and the label at a threshold of 5.0
  quadrature  in-phase and travelling frames with both gates (4.8b) and the label at a threshold of 1.0
  slowness    conditional intervals (6c), by scipy's non-central chi-square
  events      sequences of statistic and direction with the events in them (7)
The noise covariance of all frames is 0.95*exp(-D/(0.5*L)) + 0.05*[i=j], loading 0.01 of the mean variance, L the aperture.
"""
import json
import os
import sys

FRAMES = (
    "plane-g8_0.4c-0", "plane-g8_0.4c-1", "plane-g8_0.4c-2", "plane-g10_0.4c-2", "plane-g4x16_1-1", "plane-irr40-0",
    "plane-irr40-1", "plane-irr40-2", "plane-lin16_0.1-0", "plane-lin16_0.1-1", "plane-lin16_0.1-2", "rotating-ccw-6dB",
    "sync-40dB", "sync-6dB", "standing-nodes-40dB", "two-planes-dominant-6dB", "noise-only", "plane-with-bad-channels",
)
WHITENED = ("lambda_max", "E_plane", "k_grid", "k_gls", "cov_k_unit_noise", "noise_scale", "se_direction_deg")


def frame(case):
    expected = case["expected"]
    whitened = {key: expected["whitened"][key] for key in WHITENED if key in expected["whitened"]}
    types = expected.get("types", {})
    cut = {
        "id": case["id"], "layout": case["layout"], "bad_channels": case.get("bad_channels", []), "z": case["z"],
        "R_uniform": expected["R_uniform"], "S2": expected["S2"], **whitened,
    }
    if types:
        cut.update(E_sync=types["evidence"]["sync"], dL=types["dL_plane_over_sync"], label=types["label_at_threshold_5"])
    return cut


def quadrature(case):
    expected = case["expected"]
    return {"id": case["id"], "layout": case["layout"], "z": case["z"],
            "dL": expected["dL"], "k": expected["k"], "x": expected["x"], "E": expected["E"],
            "whitened_energy": expected["whitened_energy"], "Lq": expected["Lq_plane"],
            "label": expected["label_with_Lq_4"]}


def layouts(found, names):
    positions = {entry["name"]: entry["xy_mm"] for entry in found if "xy_mm" in entry}
    keep = ("n", "rank", "pitch_mm", "aperture_mm", "lambda_min_mm", "k_max", "k_step", "n_k_grid", "principal_axis")
    return [{"name": entry["name"], "xy_mm": positions[entry["name"]], "bad_channels": entry.get("bad_channels", []),
             **{key: entry["derived"][key] for key in keep}}
            for entry in found if entry["name"] in names]


def main(study, dsp, pipeline):
    def load(name):
        with open(os.path.join(study, name), encoding="utf-8") as file:
            return json.load(file)

    def save(folder, name, content):
        with open(os.path.join(folder, name), "w", encoding="utf-8") as file:
            json.dump(content, file, separators=(",", ":"), allow_nan=False)
            file.write("\n")

    frames = [frame(case) for case in load("frames.json")["frames"] if case["id"] in FRAMES]
    tests = [quadrature(case) for case in load("quadrature.json")["cases"]]
    names = {case["layout"] for case in frames + tests}
    save(dsp, "waves.json", {
        "layouts": layouts(load("layouts.json")["layouts"], names), "frames": frames, "quadrature": tests,
        "slowness": load("longwave.json")["slowness"],
    })
    save(pipeline, "events.json", {"cases": load("events.json")["cases"]})


if __name__ == "__main__":
    if len(sys.argv) != 4:
        sys.exit(__doc__)
    main(*sys.argv[1:])

"""Golden vectors of the phase estimators: phase-models.json, phase-CASE-input.csv, phase-CASE-expected.csv.

usage: phase_vectors.py DIR          (Python 3, numpy 1.24.2, scipy 1.10.1: the files in the repository were made with these)

Cut from the reference programme of our phase study (sections 2, 3, 5, 8, 12). Everything is synthetic: SplitMix64 noise
through a known model. 'true' is that model; 'fitted' is what the study's spectral fit made of the 30 s before the vectors
(its numbers are constants here: the fit is not under test). Every filter starts from rest at the first sample of the input.
Columns, at every 10th sample:
  dc_blocked                  raw x, high-pass of order 2 at lowHz/16, settled on the first sample
  default_h0ms, default_h20ms dc_blocked, fitted model, all samples, rotated by minus the high-pass's phase at mid-band
  default_skip                the same with samples where valid = 0 held for the high-pass and skipped by the filter
  kalman_h0ms, kalman_h20ms   raw x, true model, all samples
  kalman_skip                 raw x, true model, samples where valid = 0 skipped
  bp2_quad                    raw x, Butterworth band-pass of order 2, quadrature from a quarter cycle back
"""
import json
import math
import os
import sys

import numpy as np
import scipy
from scipy import signal

TWO_PI = 2.0 * math.pi
SAMPLES, EVERY, BASELINE_S = 4000, 10, 30
HORIZONS_MS = (0, 5, 10, 20, 40)

# oscillators: centre Hz, full width at half maximum Hz, variance of the real part, target; background: corner Hz, variance
TRUE = {
    "alpha-1k": dict(fs=1000.0, band=(8.0, 12.0), seed=11, osc=[(10.0, 1.5, 1.0, True)],
                     back=[(0.5, 1.0), (4.0, 0.8), (32.0, 0.5)], white=0.05),
    "alpha-neighbour-1k": dict(fs=1000.0, band=(7.5, 11.5), seed=12, osc=[(9.5, 1.2, 1.0, True), (13.5, 1.5, 0.8, False)],
                               back=[(1.0, 1.2), (16.0, 0.5)], white=0.02),
    "beta-512": dict(fs=512.0, band=(16.0, 24.0), seed=13, osc=[(20.0, 4.0, 1.0, True)],
                     back=[(2.0, 2.0), (20.0, 0.5)], white=0.02),
    "theta-2k": dict(fs=2000.0, band=(4.0, 8.0), seed=14, osc=[(6.0, 1.0, 1.0, True)],
                     back=[(0.5, 1.0), (8.0, 0.5), (64.0, 0.3)], white=0.05),
}
FITTED = json.loads("""
{
 "alpha-1k": {
  "poles": [[0.9948990951179438, 0.06011150447198493], [0.9931270916151819, 0.06767933970516983]],
  "q": [0.004198793405011982, 0.003314104852719706],
  "back_poles": [0.9968633369849541, 0.987512256523656, 0.9509769232943149, 0.8178617799446645, 0.44742438871034146],
  "back_q": [1.7723991397473742e-07, 0.01797198283663716, 0.03617472898928984, 0.14066341138034044, 0.026887734331699418],
  "r": 0.03672549459619762,
  "target": [true, true]},
 "alpha-neighbour-1k": {
  "poles": [[0.9914489780686682, 0.08269000045374646], [0.9951873786792376, 0.05759474759155132]],
  "q": [0.00833652666816645, 0.004898589096015872],
  "back_poles": [0.9968633369849541, 0.987512256523656, 0.9509769232943149, 0.8178617799446645, 0.44742438871034146],
  "back_q": [2.1657689849096446e-07, 0.017914455130831924, 0.045768142111061304, 0.045556825807094824, 9.864466017854798e-06],
  "r": 0.01754242647722734,
  "target": [false, true]},
 "beta-512": {
  "poles": [[0.9374154415847742, 0.23347254214935656]],
  "q": [0.06639818157874333],
  "back_poles": [0.9938828631814474, 0.9757550547056902, 0.9064904621858286, 0.6752319066557773, 0.20787957635076193],
  "back_q": [3.3721815339975643e-07, 0.07556453163663626, 0.046203395402625524, 0.15441209847495715, 2.3952239404913205e-05],
  "r": 0.013449681207070286,
  "target": [true]},
 "theta-2k": {
  "poles": [[0.9975940420209268, 0.018553936627812777]],
  "q": [0.005451005658247796],
  "back_poles": [0.9984304367280448, 0.9937365126247782, 0.975180456784443, 0.9043571086383213, 0.6688978910942548],
  "back_q": [7.924357119179368e-08, 0.006740631223993196, 1.0258865131408231e-06, 0.07475280091382544, 0.04903097187969388],
  "r": 0.04783952723270257,
  "target": [true]}
}
""")
WITH_VECTORS = ("alpha-1k", "alpha-neighbour-1k", "beta-512")     # theta-2k: gains only, to keep the files small


class SplitMix:
    """SplitMix64, uniform from the upper 53 bits, Box-Muller pairs (cosine first)."""

    def __init__(self, seed):
        self.state, self.spare = seed, None

    def uniform(self):
        mask = (1 << 64) - 1
        self.state = (self.state + 0x9E3779B97F4A7C15) & mask
        z = self.state
        z = ((z ^ (z >> 30)) * 0xBF58476D1CE4E5B9) & mask
        z = ((z ^ (z >> 27)) * 0x94D049BB133111EB) & mask
        return (((z ^ (z >> 31)) >> 11) + 0.5) / 9007199254740992.0

    def normal(self):
        if self.spare is not None:
            value, self.spare = self.spare, None
            return value
        u1, u2 = self.uniform(), self.uniform()
        r = math.sqrt(-2.0 * math.log(u1))
        self.spare = r * math.sin(TWO_PI * u2)
        return r * math.cos(TWO_PI * u2)


class Model:
    """x = sum Re z_j + sum y_b + v; z_j complex, pole a_j, drive variance q_j per axis; y_b real; v white, variance r."""

    def __init__(self, poles, q, back_poles, back_q, r, target):
        self.poles, self.q = np.asarray(poles, complex), np.asarray(q, float)
        self.back_poles, self.back_q = np.asarray(back_poles, float), np.asarray(back_q, float)
        self.r, self.target = float(r), np.asarray(target, bool)

    @staticmethod
    def of_spectrum(fs, osc, back, white, **_):
        poles = [math.exp(-math.pi * w / fs) * np.exp(1j * TWO_PI * f / fs) for f, w, _, _ in osc]
        back_poles = [math.exp(-TWO_PI * c / fs) for c, _ in back]
        return Model(poles, [v * (1.0 - abs(a) ** 2) for (_, _, v, _), a in zip(osc, poles)],
                     back_poles, [v * (1.0 - b * b) for (_, v), b in zip(back, back_poles)], white, [o[3] for o in osc])

    def matrices(self):
        J, B = self.poles.size, self.back_poles.size
        A, Q, C = np.zeros((2 * J + B, 2 * J + B)), np.zeros((2 * J + B, 2 * J + B)), np.zeros((1, 2 * J + B))
        for j, a in enumerate(self.poles):
            A[2 * j:2 * j + 2, 2 * j:2 * j + 2] = [[a.real, -a.imag], [a.imag, a.real]]
            Q[2 * j, 2 * j] = Q[2 * j + 1, 2 * j + 1] = self.q[j]
            C[0, 2 * j] = 1.0
        for b in range(B):
            A[2 * J + b, 2 * J + b], Q[2 * J + b, 2 * J + b], C[0, 2 * J + b] = self.back_poles[b], self.back_q[b], 1.0
        return A, C, Q

    def steady(self):
        """Gain per state, filtered and predicted covariance, innovation variance."""
        A, C, Q = self.matrices()
        Pp = doubling(A.T, C.T @ C / self.r, Q)
        s = float((C @ Pp @ C.T)[0, 0] + self.r)
        K = (Pp @ C.T / s)[:, 0]
        return K, Pp - np.outer(K, C @ Pp), Pp, s

    def variance(self, P, h):
        rotation = lambda a: np.array([[a.real, -a.imag], [a.imag, a.real]])
        v, targets = 0.0, np.flatnonzero(self.target)
        for j in targets:
            for l in targets:
                block = P[2 * j:2 * j + 2, 2 * l:2 * l + 2]
                v += np.trace(rotation(self.poles[j] ** h) @ block @ rotation(self.poles[l] ** h).T) / 2.0
            m2 = abs(self.poles[j]) ** 2
            v += self.q[j] / (1.0 - m2) * (1.0 - m2 ** h)
        return v


def doubling(A, G, H):
    I = np.eye(A.shape[0])
    for _ in range(60):
        W = I + G @ H
        WA, WG = np.linalg.solve(W, A), np.linalg.solve(W, G)
        dH = A.T @ H @ WA
        G = G + A @ WG @ A.T
        H = H + dH
        A = A @ WA
        G, H = 0.5 * (G + G.T), 0.5 * (H + H.T)
        if np.abs(dH).max() <= 1e-13 * np.abs(H).max():
            return H
    raise ArithmeticError("no steady covariance")


def simulate(seed, n, model):
    g = SplitMix(seed)
    z, y = [0j] * model.poles.size, [0.0] * model.back_poles.size
    x = np.empty(n)
    for i in range(n):
        total = 0.0
        for j, a in enumerate(model.poles):
            re, im = g.normal(), g.normal()
            z[j] = complex(a) * z[j] + math.sqrt(model.q[j]) * complex(re, im)
            total += z[j].real
        for b, pole in enumerate(model.back_poles):
            y[b] = pole * y[b] + math.sqrt(model.back_q[b]) * g.normal()
            total += y[b]
        x[i] = total + math.sqrt(model.r) * g.normal()
    return x


def dc_block(x, lo, f0, fs):
    sos = signal.butter(2, lo / 16.0, "highpass", fs=fs, output="sos")
    y, _ = signal.sosfilt(sos, x, zi=signal.sosfilt_zi(sos) * x[0])
    _, h = signal.sosfreqz(sos, worN=[f0], fs=fs)
    return y, float(np.angle(h[0]))


def oscillators(x, model, horizons, valid=None):
    K = model.steady()[0]
    J = model.poles.size
    a = np.concatenate([model.poles, model.back_poles])
    k = np.concatenate([K[0:2 * J:2] + 1j * K[1:2 * J:2], K[2 * J:].astype(complex)])
    z, path = np.zeros(a.size, complex), np.empty((x.size, J), complex)
    for n in range(x.size):
        z = a * z
        if valid is None or valid[n]:
            z = z + k * (x[n] - z.real.sum())
        path[n] = z[:J]
    return [path @ (model.target * model.poles ** h) for h in horizons]


def bandpass_quadrature(x, f0, lo, hi, fs):
    sos = signal.butter(2, [lo, hi], "bandpass", fs=fs, output="sos")
    y = signal.sosfilt(sos, x)
    m = max(1, int(round(fs / (4.0 * f0))))
    th = TWO_PI * f0 / fs * m
    back = np.zeros_like(y)
    back[m:] = y[:-m]
    _, h = signal.sosfreqz(sos, worN=[f0], fs=fs)
    return (y + 1j * (back - y * math.cos(th)) / math.sin(th)) * np.exp(-1j * np.angle(h[0])) / abs(h[0])


def describe(model, horizons):
    K, P, Pp, s = model.steady()
    return dict(oscillators=[dict(poleRe=a.real, poleIm=a.imag, driveVariance=q, isTarget=bool(t))
                             for a, q, t in zip(model.poles, model.q, model.target)],
                background=[dict(pole=b, driveVariance=q) for b, q in zip(model.back_poles, model.back_q)],
                whiteVariance=model.r, gain=K.tolist(), innovationVariance=s,
                filteredDiagonal=np.diag(P).tolist(), predictedDiagonal=np.diag(Pp).tolist(),
                variancePerAxis=[model.variance(P, h) for h in horizons])


def vectors(directory, name, case, true, fitted, horizons):
    fs, (lo, hi) = case["fs"], case["band"]
    f0 = 0.5 * (lo + hi)
    x = simulate(case["seed"], BASELINE_S * int(fs) + SAMPLES, true)[BASELINE_S * int(fs):]
    valid = np.ones(SAMPLES, bool)
    for start, length in ((1500, 5), (2500, 5), (3000, 40)):
        valid[start:start + length] = False
    held = x[np.maximum.accumulate(np.where(valid, np.arange(x.size), 0))]
    xd, lead = dc_block(x, lo, f0, fs)
    rotation, h20 = np.exp(-1j * lead), horizons[3]
    default, truth = oscillators(xd, fitted, (0, h20)), oscillators(x, true, (0, h20))
    columns = [("dc_blocked", xd)]
    for column, m in (("default_h0ms", default[0] * rotation), ("default_h20ms", default[1] * rotation),
                      ("default_skip", oscillators(dc_block(held, lo, f0, fs)[0], fitted, (0,), valid)[0] * rotation),
                      ("kalman_h0ms", truth[0]), ("kalman_h20ms", truth[1]),
                      ("kalman_skip", oscillators(x, true, (0,), valid)[0]), ("bp2_quad", bandpass_quadrature(x, f0, lo, hi, fs))):
        columns += [(column + "_re", m.real), (column + "_im", m.imag)]
    write(directory, f"phase-{name}-input.csv", ["x", "valid"], zip(x, valid.astype(int)), ["%.9g", "%d"])
    at = range(0, SAMPLES, EVERY)
    write(directory, f"phase-{name}-expected.csv", ["n"] + [c for c, _ in columns],
          ([n] + [v[n] for _, v in columns] for n in at), ["%d"] + ["%.9g"] * len(columns))


def write(directory, file, header, rows, formats):
    with open(os.path.join(directory, file), "w", encoding="ascii", newline="\n") as out:
        out.write(",".join(header) + "\n")
        for row in rows:
            out.write(",".join(f % v for f, v in zip(formats, row)) + "\n")


def main(directory):
    models = []
    for name, case in TRUE.items():
        fit = FITTED[name]
        true = Model.of_spectrum(**case)
        fitted = Model([complex(*p) for p in fit["poles"]], fit["q"], fit["back_poles"], fit["back_q"], fit["r"], fit["target"])
        horizons = [int(round(h * case["fs"] / 1000.0)) for h in HORIZONS_MS]
        models += [dict(name=name, kind=kind, rateHz=case["fs"], lowHz=case["band"][0], highHz=case["band"][1],
                        horizonSamples=horizons, **describe(model, horizons)) for kind, model in (("true", true), ("fitted", fitted))]
        if name in WITH_VECTORS:
            vectors(directory, name, case, true, fitted, horizons)
    with open(os.path.join(directory, "phase-models.json"), "w", encoding="ascii", newline="\n") as out:
        json.dump(dict(numpy=np.__version__, scipy=scipy.__version__, models=models), out, indent=1)
        out.write("\n")


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit(__doc__)
    main(sys.argv[1])

"""Fit of the oscillator model to a baseline by penalised spectral likelihood, one model for a patch.

Usage: imported by calibration.py; nothing to run by itself.

Whittle-type likelihood on the mean periodogram of all rows divided by their SD, with the weights of one channel:
the rhythm is common to the channels, so they are not independent repeats.  One filter for the whole patch, because
filters that differ between channels turn a change of frequency into a direction.
"""
import math

import numpy as np
from scipy import optimize

from phase_filter import TWO_PI, OscillatorModel, burst_factor

CORNERS_HZ = (0.5, 2.0, 8.0, 32.0, 128.0)


def shape_oscillator(f, centre, width, rate):
    """spectrum of unit variance (two-sided, mean over the circle = 1) of Re z"""
    rho = math.exp(-math.pi * width / rate)
    w0, w = TWO_PI * centre / rate, TWO_PI * f / rate
    d1 = 1.0 - 2.0 * rho * np.cos(w - w0) + rho * rho
    d2 = 1.0 - 2.0 * rho * np.cos(w + w0) + rho * rho
    return 0.5 * (1.0 - rho * rho) * (1.0 / d1 + 1.0 / d2)


def shape_first_order(f, corner, rate):
    b = math.exp(-TWO_PI * corner / rate)
    return (1.0 - b * b) / (1.0 - 2.0 * b * np.cos(TWO_PI * f / rate) + b * b)


def tapered_periodogram(x, rate, fine, f_lo, per_octave=24):
    """Hann-tapered periodogram averaged over rows; every bin inside `fine`, 24 averages per octave elsewhere.
    Returns f, I, weight (bins averaged / 1.5, the correlation that the taper leaves)."""
    f_hi = 0.4 * rate
    n = x.shape[1]
    taper = np.hanning(n + 2)[1:-1]
    I = np.mean([np.abs(np.fft.rfft((r - r.mean()) * taper)) ** 2 for r in x], axis=0) / np.sum(taper * taper)
    f = np.fft.rfftfreq(n, 1.0 / rate)
    inside = (f >= fine[0]) & (f <= fine[1])
    F, P, W = [f[inside]], [I[inside]], [np.ones(inside.sum())]
    edges = f_lo * 2.0 ** (np.arange(0, int(per_octave * math.log2(f_hi / f_lo)) + 1) / per_octave)
    bin_of = np.digitize(f, edges)
    for b in range(1, edges.size):
        s = (bin_of == b) & ~inside
        if s.any():
            F.append([f[s].mean()])
            P.append([I[s].mean()])
            W.append([float(s.sum())])
    F, P, W = np.concatenate(F), np.concatenate(P), np.concatenate(W) / 1.5
    order = np.argsort(F)
    return F[order], P[order], W[order]


def _logistic(u, a, b):
    return a + (b - a) / (1.0 + np.exp(-u))


def _logit(y, a, b):
    q = min(max((y - a) / (b - a), 0.02), 0.98)
    return math.log(q / (1.0 - q))


class _Likelihood:
    """cost of a set of background powers and oscillators; p = ln powers, then (centre, ln width, ln power) each"""

    def __init__(self, x, low, high, rate, width_prior_sd=0.5):
        band = high - low
        fine = (max(1.5, low - 1.5 * band), high + 2.0 * band)
        self.f, self.I, self.weight = tapered_periodogram(x, rate, fine, f_lo=1.5)
        self.rate, self.low, self.high, self.prior_sd = rate, low, high, width_prior_sd
        self.corners = [c for c in CORNERS_HZ if c < 0.45 * rate]
        self.back = np.array([shape_first_order(self.f, c, rate) for c in self.corners] + [np.ones_like(self.f)])
        self.nb = len(self.back)
        self.power = float(x.var(axis=1).mean())
        self.base = math.log(self.power * 1e-5)
        self.lw = (math.log(0.25 * band), math.log(band))
        self.lw_mean = math.log(0.4 * band)
        self.reach = (max(2.0, low - 1.5 * band), high + 3.0 * band)
        self.kernel = np.exp(-0.5 * ((self.f[:, None] - self.f[None, :]) / (0.125 * band)) ** 2)
        self.band = band

    def parts(self, p, limits):
        nb, osc = self.nb, []
        for j, lim in enumerate(limits):
            u = p[nb + 3 * j:nb + 3 * j + 3]
            osc.append((_logistic(u[0], *lim), math.exp(_logistic(u[1], *self.lw)), math.exp(u[2])))
        return np.exp(p[:nb]), osc

    def spectrum(self, p, limits):
        powers, osc = self.parts(p, limits)
        S = powers @ self.back
        for centre, width, v in osc:
            S = S + v * shape_oscillator(self.f, centre, width, self.rate)
        return S

    def cost(self, p, limits):
        f, rate, nb = self.f, self.rate, self.nb
        powers, osc = self.parts(p, limits)
        shapes = [shape_oscillator(f, c, b, rate) for c, b, _ in osc]
        S = powers @ self.back + sum((o[2] * s for o, s in zip(osc, shapes)), np.zeros_like(f))
        L = float(np.sum(self.weight * (np.log(S) + self.I / S))) + 0.001 * float(np.sum((p[:nb] - self.base) ** 2))
        d = self.weight * (1.0 / S - self.I / (S * S))
        g = np.empty_like(p)
        g[:nb] = (self.back @ d) * powers + 0.002 * (p[:nb] - self.base)
        e = 1e-5
        for j, ((centre, width, v), lim) in enumerate(zip(osc, limits)):
            u = p[nb + 3 * j:nb + 3 * j + 3]
            up, down = _logistic(u[0] + e, *lim), _logistic(u[0] - e, *lim)
            by_centre = (shape_oscillator(f, up, width, rate) - shape_oscillator(f, down, width, rate)) / (2 * e)
            up, down = _logistic(u[1] + e, *self.lw), _logistic(u[1] - e, *self.lw)
            by_width = (shape_oscillator(f, centre, math.exp(up), rate) - shape_oscillator(f, centre, math.exp(down), rate)) / (2 * e)
            r = (math.log(width) - self.lw_mean) / self.prior_sd
            L += 0.5 * r * r
            g[nb + 3 * j] = v * np.dot(d, by_centre)
            g[nb + 3 * j + 1] = v * np.dot(d, by_width) + r / self.prior_sd * (up - down) / (2 * e)
            g[nb + 3 * j + 2] = v * np.dot(d, shapes[j])
        return L, g

    def minimise(self, p, limits):
        bounds = [(self.base - 6, self.base + 16)] * self.nb + [(-6, 6), (-6, 6), (self.base - 4, self.base + 16)] * len(limits)
        r = optimize.minimize(self.cost, p, args=(limits,), jac=True, method="L-BFGS-B", bounds=bounds,
                              options=dict(maxiter=300, ftol=1e-10))
        return r.x, float(r.fun)

    def smoothed_ratio(self, S):
        return (self.kernel @ (self.weight * self.I / S)) / (self.kernel @ self.weight)

    def best_addition(self, p, limits, centre, lim):
        """one more oscillator at this centre, the better of two starting widths"""
        level = np.interp(centre, self.f, self.kernel @ (self.weight * self.I) / (self.kernel @ self.weight))
        v = max(max(level, 1e-12) * math.pi / self.rate, self.power * 1e-4)
        best = None
        for width in (0.15 * self.band, 0.5 * self.band):
            width = min(max(width, 0.275 * self.band), 0.9 * self.band)
            start = [_logit(centre, *lim), _logit(math.log(width), *self.lw), math.log(v)]
            q, L = self.minimise(np.concatenate([p, start]), limits + [lim])
            if best is None or L < best[1]:
                best = (q, L)
        return best


def fit_oscillators(x, low, high, rate, most_extra=3):
    """oscillators are added one at a time where the spectrum exceeds the model most; each must pay by BIC, except
    that one inside the band is always placed"""
    lk = _Likelihood(x, low, high, rate)
    p, L = lk.minimise(np.full(lk.nb, math.log(lk.power / lk.nb / 4.0)), [])
    limits, price, inside = [], 3.0 * math.log(float(lk.weight.sum())), False
    reachable = (lk.f >= lk.reach[0]) & (lk.f <= lk.reach[1])
    in_band = (lk.f >= low) & (lk.f <= high)
    while len(limits) < 1 + most_extra:
        r = lk.smoothed_ratio(lk.spectrum(p, limits))
        centre = float(lk.f[reachable][np.argmax(r[reachable])])
        forced = not inside and (low <= centre <= high or len(limits) >= most_extra)
        if forced:
            centre = float(lk.f[in_band][np.argmax(r[in_band])])
        lim = (low, high) if low <= centre <= high else ((lk.reach[0], low) if centre < low else (high, lk.reach[1]))
        best = lk.best_addition(p, limits, centre, lim)
        if not forced and 2.0 * (L - best[1]) <= price:
            if inside:
                break
            lim = (low, high)
            best = lk.best_addition(p, limits, float(lk.f[in_band][np.argmax(r[in_band])]), lim)
        p, L = best
        limits = limits + [lim]
        inside = inside or lim == (low, high)
    powers, osc = lk.parts(p, limits)
    poles = [math.exp(-math.pi * b / rate) * np.exp(1j * TWO_PI * c / rate) for c, b, _ in osc]
    drive = [v * (1.0 - abs(a) ** 2) for (_, _, v), a in zip(osc, poles)]
    back_poles = [math.exp(-TWO_PI * c / rate) for c in lk.corners]
    back_drive = [v * (1.0 - b * b) for v, b in zip(powers[:-1], back_poles)]
    return OscillatorModel(poles, drive, back_poles, back_drive, max(powers[-1], 1e-6 * lk.power),
                           [lim == (low, high) for lim in limits], rate)


def fit_patch(x, scale, low, high, rate):
    """x (channels, samples), DC-blocked; scale: SD of each row -> one model in units of it, and the burst factor.
    The burst factor raises the target's drive: in bursts the filter then follows onsets faster."""
    model = fit_oscillators(x / scale[:, None], low, high, rate)
    bursts = float(np.median([burst_factor(r, low, high, rate) for r in x]))
    model.drive = model.drive * np.where(model.target, max(1.0, bursts), 1.0)
    return model, bursts

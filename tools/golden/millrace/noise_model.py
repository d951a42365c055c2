"""Noise of the array learnt from baseline frames: covariance for whitening, and surrogates that hold no wave.

Usage: imported by calibration.py; nothing to run by itself.

Frames are (frames, channels), divided by the channels' baseline RMS.  Covariances are real: zero-lag mixing is kept,
consistent lags (travel) are not.
"""
import numpy as np
from scipy.optimize import nnls

from plane_wave import Whitened

LOADING_FITTED, LOADING_EMPIRICAL = 0.01, 0.02


def real_covariance(Z):
    return np.real(Z.T @ Z.conj()) / len(Z)


def fit_isotropic(g, C):
    """c0 + c1 exp(-(d/l)^p) with the mean variance on the diagonal, least squares over pairs"""
    pairs = np.triu_indices(g.n, 1)
    d, y = g.distance[pairs], np.asarray(C)[pairs]
    variance = np.trace(C) / g.n
    best = None
    for p in (1.0, 1.5, 2.0):
        for length in g.aperture * np.geomspace(0.08, 8, 25):
            A = np.c_[np.ones_like(d), np.exp(-(d / length) ** p)]
            c, _ = nnls(A, y)
            if c.sum() > variance:
                c = c * variance / c.sum()
            r = np.linalg.norm(A @ c - y)
            if best is None or r < best[0] * (1 - 1e-6):
                best = (r, c, length, p)
    _, c, length, p = best
    M = c[0] + c[1] * np.exp(-(g.distance / length) ** p)
    M[np.diag_indices(g.n)] = variance
    return M, dict(common=c[0] / variance, local=c[1] / variance, lengthApertures=length / g.aperture, exponent=p)


def misfit(g, C):
    """r.m.s. over pairs of model minus covariance, in units of the variance; and the model"""
    pairs = np.triu_indices(g.n, 1)
    M = fit_isotropic(g, C)[0]
    return float(np.sqrt(((M - C)[pairs] ** 2).mean()) / (np.trace(C) / g.n)), M


def _trim(g, Z, keep, rounds, chunk=10000):
    """drop the frames that look most like a wave, refit, again"""
    C = real_covariance(Z)
    trace = [misfit(g, C)[0]]
    M = misfit(g, C)[1]
    for _ in range(rounds):
        w = Whitened(g, M, LOADING_FITTED)
        E = np.concatenate([w.evidence(Z[i:i + chunk])[0] for i in range(0, len(Z), chunk)])
        C = real_covariance(Z[E < np.quantile(E, keep)])
        m, M = misfit(g, C)
        trace.append(m)
    return C, trace


def baseline_model(g, Z, rng, limit=0.05, keep=0.70, rounds=2, n_boot=20000):
    """covariance of a baseline that may hold waves.  Trimming narrows pure noise too; that narrowing is simulated and
    undone.  Where the isotropic model misfits, the full empirical matrix is taken.
    Returns model for whitening, covariance for the surrogate, facts"""
    C0 = real_covariance(Z)
    trimmed, trace = _trim(g, Z, keep, rounds)
    if trace[-1] > limit:
        return C0, C0, dict(model="empirical", loading=LOADING_EMPIRICAL, misfit=trace, shape=None)
    L = np.linalg.cholesky(trimmed + 1e-9 * np.trace(trimmed) / g.n * np.eye(g.n))
    S = (rng.standard_normal((n_boot, g.n)) + 1j * rng.standard_normal((n_boot, g.n))) @ L.T * np.sqrt(0.5)
    corrected = 2 * trimmed - _trim(g, S, keep, rounds)[0]
    w, V = np.linalg.eigh(corrected)
    corrected = (V * np.maximum(w, 1e-4 * w.max())) @ V.T
    M, shape = fit_isotropic(g, corrected)
    return M, corrected, dict(model="fitted", loading=LOADING_FITTED, misfit=trace, shape=shape)


def surrogate_own(Z, C, seconds, frame_rate, rng, segment_s=8.0, amplitude_hz=0.5):
    """white noise shaped by the pooled spectrum of the whitened baseline, mixed by the Cholesky factor of C, times the
    baseline's own slow common amplitude played forwards and backwards"""
    n = len(C)
    L = np.linalg.cholesky(C + 1e-9 * np.trace(C) / n * np.eye(n))
    Y = np.linalg.solve(L, np.asarray(Z, complex).T).T
    m = int(frame_rate / amplitude_hz) | 1
    window = np.hanning(m + 2)[1:-1]
    window /= window.sum()
    slow = np.sqrt(np.convolve(np.pad((np.abs(Y) ** 2).mean(axis=1), m // 2, mode="reflect"), window, "valid"))
    slow /= np.sqrt((slow ** 2).mean())
    Y = Y / slow[:, None]
    s = int(segment_s * frame_rate)
    taper = np.hanning(s + 2)[1:-1]
    S = np.mean([(np.abs(np.fft.fft(Y[i:i + s] * taper[:, None], axis=0)) ** 2).mean(axis=1)
                 for i in range(0, len(Y) - s + 1, s // 2)], axis=0)
    F = int(seconds * frame_rate)
    f = np.fft.fftfreq(s, 1 / frame_rate)
    order = np.argsort(f)
    G = np.sqrt(np.interp(np.fft.fftfreq(F, 1 / frame_rate), f[order], S[order], period=frame_rate))
    G /= np.sqrt((G ** 2).mean())
    X = np.empty((F, n), complex)
    for i in range(n):
        white = (rng.standard_normal(F) + 1j * rng.standard_normal(F)) * np.sqrt(0.5)
        X[:, i] = np.fft.ifft(np.fft.fft(white) * G)
    X = X @ L.T
    t = np.arange(F) % max(1, 2 * len(slow) - 2)
    return X * slow[np.where(t < len(slow), t, 2 * len(slow) - 2 - t)][:, None]


def coherence_time(Z, frame_rate, centre_hz, most_s=2.0):
    """1 / noise bandwidth (s), from frames demodulated at the centre of the band"""
    Y = Z * np.exp(-2j * np.pi * centre_hz * np.arange(len(Z)) / frame_rate)[:, None]
    power, total = np.mean(np.abs(Y) ** 2), 1.0
    for lag in range(1, int(most_s * frame_rate)):
        r = np.real(np.mean(Y[lag:] * Y[:-lag].conj())) / power
        if r <= 0:
            break
        total += 2 * r
    return total / frame_rate

"""Causal phase of one rhythm on all channels of a patch: DC block, oscillator model, steady gain, recursion.

Usage: imported by calibration.py, scene.py, make_millrace.py and check_millrace.py; nothing to run by itself.

State-space oscillators after Matsuda & Komaki 2017, used causally as in Wodeyar et al. 2021.
phase 0 = peak; a real cosine of amplitude A gives |m| near A at the centre of the band.
"""
import numpy as np
from scipy import signal

TWO_PI = 2.0 * np.pi


class OscillatorModel:
    """x = sum_j Re z_j + sum_b y_b + v.  z_j complex first order with pole and drive variance per axis,
    y_b real first order, v white.  target marks the oscillators whose sum is the wanted rhythm."""

    def __init__(self, poles, drive, back_poles, back_drive, white, target, rate):
        self.poles = np.asarray(poles, complex)
        self.drive = np.asarray(drive, float)
        self.back_poles = np.asarray(back_poles, float)
        self.back_drive = np.asarray(back_drive, float)
        self.white = float(white)
        self.target = np.asarray(target, bool)
        self.rate = float(rate)

    def steady_gain(self):
        """complex gain per oscillator followed by the (real) gains of the background poles"""
        J, B = self.poles.size, self.back_poles.size
        n = 2 * J + B
        A, Q, C = np.zeros((n, n)), np.zeros((n, n)), np.zeros((1, n))
        for j, a in enumerate(self.poles):
            A[2 * j:2 * j + 2, 2 * j:2 * j + 2] = [[a.real, -a.imag], [a.imag, a.real]]
            Q[2 * j, 2 * j] = Q[2 * j + 1, 2 * j + 1] = self.drive[j]
            C[0, 2 * j] = 1.0
        for b in range(B):
            A[2 * J + b, 2 * J + b] = self.back_poles[b]
            Q[2 * J + b, 2 * J + b] = self.back_drive[b]
            C[0, 2 * J + b] = 1.0
        P = riccati_by_doubling(A.T, C.T @ C / self.white, Q)
        K = (P @ C.T / (float((C @ P @ C.T)[0, 0]) + self.white))[:, 0]
        return np.concatenate([K[0:2 * J:2] + 1j * K[1:2 * J:2], K[2 * J:].astype(complex)])

    def centres_hz(self):
        return np.angle(self.poles) * self.rate / TWO_PI

    def widths_hz(self):
        return -np.log(np.abs(self.poles)) * self.rate / np.pi


def riccati_by_doubling(A, G, H, iterations=60, tolerance=1e-13):
    """X = A' X (I + G X)^-1 A + H by structure-preserving doubling (quadratic convergence)"""
    eye = np.eye(A.shape[0])
    A, G, H = A.copy(), G.copy(), H.copy()
    for _ in range(iterations):
        W = eye + G @ H
        WA, WG = np.linalg.solve(W, A), np.linalg.solve(W, G)
        dH = A.T @ H @ WA
        G = G + A @ WG @ A.T
        H = H + dH
        A = A @ WA
        H, G = 0.5 * (H + H.T), 0.5 * (G + G.T)
        if np.abs(dH).max() <= tolerance * np.abs(H).max():
            break
    return H


def centre_of_band(low_hz, high_hz):
    return 0.5 * (low_hz + high_hz)


def dc_block(x, low_hz, high_hz, rate):
    """order-2 Butterworth high-pass at low/16, settled on the first sample of every row (electrode offsets).
    Returns the rows and the filter's phase at the centre of the band (rad, a lead)."""
    sos = signal.butter(2, low_hz / 16.0, "highpass", fs=rate, output="sos")
    x = np.atleast_2d(x)
    start = signal.sosfilt_zi(sos)[:, None, :] * x[:, 0][None, :, None]
    y, _ = signal.sosfilt(sos, x, axis=-1, zi=start)
    _, h = signal.sosfreqz(sos, worN=[centre_of_band(low_hz, high_hz)], fs=rate)
    return y, float(np.angle(h[0]))


def oscillator_filter(x, model, lead):
    """fixed-gain recursion, one model for all rows: x (channels, samples), DC-blocked -> m (channels, samples).
    Gains do not depend on the scale of x, so the result is in the unit of x."""
    channels, samples = x.shape
    poles = np.concatenate([model.poles, model.back_poles]).astype(complex)
    gain = model.steady_gain()
    state = np.zeros((channels, poles.size), complex)
    wanted = np.flatnonzero(model.target)
    rows = np.ascontiguousarray(x.T)
    out = np.empty((samples, channels), complex)
    for n in range(samples):
        state *= poles
        error = rows[n] - state.real.sum(axis=1)
        state += error[:, None] * gain
        out[n] = state[:, wanted].sum(axis=1)
    return out.T * np.exp(-1j * lead)


def response_at(model, low_hz, high_hz, frequency_hz):
    """|m| over A for a steady cosine of amplitude A at this frequency, after DC block and filter"""
    n = int(4 * model.rate)
    impulse = np.zeros((1, n))
    impulse[0, 0] = 1.0
    sos = signal.butter(2, low_hz / 16.0, "highpass", fs=model.rate, output="sos")
    h = oscillator_filter(signal.sosfilt(sos, impulse, axis=-1), model, 0.0)[0]
    w = TWO_PI * np.atleast_1d(frequency_hz) / model.rate
    return np.abs(np.exp(-1j * np.outer(w, np.arange(n))) @ h) / 2.0


def frames(x, model, low_hz, high_hz, rate, samples_per_frame):
    """whole phase path: rows in their unit (channels, samples) -> frames (frames, channels) in the same unit.
    Frame f is read at row f * samples_per_frame; row 0 is a frame."""
    blocked, lead = dc_block(x, low_hz, high_hz, rate)
    return oscillator_filter(blocked, model, lead)[:, ::samples_per_frame].T.copy()


def analytic_zero_phase(x, low_hz, high_hz, rate, order=2):
    """offline proxy, used only to measure how bursty the rhythm is"""
    sos = signal.butter(order, [low_hz, high_hz], "bandpass", fs=rate, output="sos")
    return signal.hilbert(signal.sosfiltfilt(sos, x, axis=-1), axis=-1)


def burst_factor(x, low_hz, high_hz, rate, trim=1000):
    """E A^4 / (2 (E A^2)^2) of the zero-phase band envelope: 1 for Gaussian, above 1 for bursts"""
    power = np.abs(analytic_zero_phase(x, low_hz, high_hz, rate)[trim:-trim]) ** 2
    return float(np.mean(power ** 2) / (2.0 * np.mean(power) ** 2))

"""Plane waves in single frames of analytic signals: whitened evidence, refined wave vector, the two gates.

Usage: imported by noise_model.py, calibration.py and check_millrace.py; nothing to run by itself.

Plane wave: phase_i = phase_0 - k.x_i, k in rad/mm points where the wave goes (towards electrodes that peak later).
Frames are arrays (frames, channels) already divided by the channels' baseline RMS.  The Beta law of the normalised
matched filter is Kelly's (1986); that zero-lag mixing has no quadrature part is the idea of Nolte et al. (2004).
"""
import numpy as np

TWO_PI = 2.0 * np.pi
GATE_PLANE_OVER_SYNC = 6.0
GATE_QUADRATURE = 4.0


class Geometry:
    """centred positions, aperture, pitch and the grid of wave vectors of a two-dimensional array"""

    def __init__(self, positions_mm):
        P = np.asarray(positions_mm, float)
        self.n = len(P)
        self.x = P - P.mean(axis=0)
        self.distance = np.sqrt(((self.x[:, None] - self.x[None]) ** 2).sum(-1))
        self.pitch = float(np.median((self.distance + np.diag(np.full(self.n, np.inf))).min(axis=1)))
        self.aperture = float(np.ptp(self.x, axis=0).max())
        self.k_max = TWO_PI / max(2.5 * self.pitch, 0.5 * self.aperture)
        self.dk = np.pi / (2 * self.aperture)
        m = int(np.floor(self.k_max / self.dk + 1e-9))
        ky, kx = np.meshgrid(np.arange(-m, m + 1), np.arange(-m, m + 1), indexing="ij")
        K = np.c_[kx.ravel(), ky.ravel()] * self.dk
        r = np.hypot(K[:, 0], K[:, 1])
        self.grid = K[(r <= self.k_max * (1 + 1e-9)) & (r > 0.5 * self.dk)]

    def template(self, k):
        """h_i = exp(-i k.x_i); k (frames, 2) -> (frames, channels)"""
        return np.exp(-1j * (k @ self.x.T))


def load(C, loading):
    """diagonal loading as a share of the mean variance"""
    return C + loading * np.trace(C) / len(C) * np.eye(len(C))


def energy(Z, Q):
    """z^H Q z per frame"""
    return np.maximum(np.real((Z.conj() * (Z @ Q)).sum(axis=1)), 1e-300)


class Whitened:
    """evidence of a plane wave against noise of known real covariance; scale free"""

    def __init__(self, geometry, C, loading):
        self.g = geometry
        self.Q = np.linalg.inv(load(np.asarray(C, float), loading))
        E = geometry.template(geometry.grid).conj().T
        self.W = self.Q @ E
        self.norm = np.real((E.conj() * self.W).sum(axis=0))

    def evidence(self, Z):
        """E_plane = ln mean_k exp(Lambda(k)) per frame, and the index of the largest Lambda"""
        n = self.g.n
        zz = energy(Z, self.Q)
        eta = np.minimum(np.abs(Z @ self.W) ** 2 / self.norm / zz[:, None], 1 - 1e-12)
        s = ((np.abs(Z) ** 2).mean(axis=1) * n / zz)[:, None] * self.norm[None]
        lam = -(n - 1) * np.log1p(-eta) * (s / (1 + s)) - np.log1p(s)
        best = lam.argmax(axis=1)
        top = lam[np.arange(len(Z)), best]
        return top + np.log(np.exp(lam - top[:, None]).mean(axis=1)), best

    def eta(self, Z, k):
        h = self.g.template(k)
        Qh = h @ self.Q
        return np.minimum(np.abs((Qh.conj() * Z).sum(axis=1)) ** 2 / np.real((h.conj() * Qh).sum(axis=1)) / energy(Z, self.Q), 1 - 1e-12)

    def refine(self, Z, k, iterations=3):
        """Gauss-Newton on generalised least squares, the complex amplitude eliminated; steps no longer than dk,
        halved up to twice, accepted only if the explained power grows.
        Returns k, amplitude, covariance of k for unit noise (xx, xy, yy)"""
        x, Q, dk, k_max = self.g.x, self.Q, self.g.dk, self.g.k_max
        k = np.array(k, float)
        Y = Z @ Q

        def parts(k):
            h = self.g.template(k)
            Qh = h @ Q
            norm = np.real((h.conj() * Qh).sum(axis=1))
            return h, Qh, norm, (h.conj() * Y).sum(axis=1) / norm

        h, Qh, norm, amp = parts(k)
        explained = np.abs(amp) ** 2 * norm
        for it in range(iterations + 1):
            D, QD = [], []
            for axis in (0, 1):
                d = -1j * amp[:, None] * x[:, axis][None] * h
                d = d - h * ((Qh.conj() * d).sum(axis=1) / norm)[:, None]
                D.append(d)
                QD.append(d @ Q)
            a11 = np.real((D[0].conj() * QD[0]).sum(axis=1))
            a22 = np.real((D[1].conj() * QD[1]).sum(axis=1))
            a12 = np.real((D[0].conj() * QD[1]).sum(axis=1))
            det = np.maximum(a11 * a22 - a12 ** 2, 1e-300)
            if it == iterations:
                return k, amp, 0.5 * np.stack([a22, -a12, a11], axis=1) / det[:, None]
            R = Z - amp[:, None] * h
            g1, g2 = (np.real((q.conj() * R).sum(axis=1)) for q in QD)
            step = np.c_[a22 * g1 - a12 * g2, a11 * g2 - a12 * g1] / det[:, None]
            length = np.hypot(step[:, 0], step[:, 1])
            step = step * np.minimum(1.0, dk / np.maximum(length, 1e-300))[:, None]
            for part in (1.0, 0.5, 0.25):
                k_new = k + part * step
                q = np.hypot(k_new[:, 0], k_new[:, 1])
                k_new = k_new * np.minimum(1.0, k_max / np.maximum(q, 1e-300))[:, None]
                h_new, Qh_new, norm_new, amp_new = parts(k_new)
                gain = np.abs(amp_new) ** 2 * norm_new
                up = gain > explained
                k[up], h[up], Qh[up], norm[up] = k_new[up], h_new[up], Qh_new[up], norm_new[up]
                amp[up], explained[up] = amp_new[up], gain[up]
                step = np.where(up[:, None], 0.0, step)

    def quadrature(self, Z, k):
        """Lq: log likelihood gain of an out-of-phase part in the template's own plane of cosine and sine"""
        n = self.g.n
        h = self.g.template(k)
        Qh, Y = h @ self.Q, Z @ self.Q
        c, s, Qc, Qs = h.real, -h.imag, Qh.real, -Qh.imag
        a11, a12, a22 = (c * Qc).sum(axis=1), (c * Qs).sum(axis=1), (s * Qs).sum(axis=1)
        u, v = (c * Y).sum(axis=1), (s * Y).sum(axis=1)
        det = np.maximum(a11 * a22 - a12 ** 2, 1e-9 * a11 * a22 + 1e-300)
        b1, b2 = u / np.sqrt(a11), (v - a12 / a11 * u) / np.sqrt(det / a11)
        x, E = (b1.conj() * b2).imag, np.abs(b1) ** 2 + np.abs(b2) ** 2
        small = 0.5 * (E - np.sqrt(np.maximum(E * E - 4 * x * x, 0.0)))
        return (n - 2) * np.log1p(small / np.maximum(energy(Z, self.Q) - E, 1e-300))

    def read(self, Z, chunk=10000):
        """every number of every frame: E, k (k_hat: better of the fits from the grid maximum and from zero), dL, Lq,
        se (direction, deg), statistic (E, or -infinity where a gate fails), theta (direction, rad)"""
        out = [self._read(np.asarray(Z[i:i + chunk], complex)) for i in range(0, len(Z), chunk)]
        return {name: np.concatenate([o[name] for o in out]) for name in out[0]}

    def _read(self, Z):
        n = self.g.n
        E, best = self.evidence(Z)
        zero = np.zeros((len(Z), 2))
        ka, amp_a, cov_a = self.refine(Z, self.g.grid[best])
        kb, amp_b, cov_b = self.refine(Z, zero)
        ea, eb, e0 = self.eta(Z, ka), self.eta(Z, kb), self.eta(Z, zero)
        first = ea >= eb
        k = np.where(first[:, None], ka, kb)
        amp, cov = np.where(first, amp_a, amp_b), np.where(first[:, None], cov_a, cov_b)
        dL = (n - 1) * np.log((1 - e0) / (1 - np.maximum(ea, eb)))
        Lq = self.quadrature(Z, k)
        R = Z - amp[:, None] * self.g.template(k)
        noise = energy(R, self.Q) / (n - 2)
        length = np.maximum(np.hypot(k[:, 0], k[:, 1]), 1e-9)
        tx, ty = -k[:, 1] / length, k[:, 0] / length
        spread = tx * tx * cov[:, 0] + 2 * tx * ty * cov[:, 1] + ty * ty * cov[:, 2]
        se = np.degrees(np.sqrt(np.maximum(spread * noise, 0.0)) / length)
        gated = (dL >= GATE_PLANE_OVER_SYNC) & (Lq >= GATE_QUADRATURE)
        return dict(E=E, k=k, dL=dL, Lq=Lq, se=se, statistic=np.where(gated, E, -np.inf), theta=np.arctan2(k[:, 1], k[:, 0]))

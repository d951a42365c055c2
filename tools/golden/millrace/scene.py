"""Signal model of the Millrace recording: background of the array, travelling waves, in-phase decoys.

Usage: imported by make_millrace.py and other_seeds.py; nothing to run by itself.

Everything is invented.  Fixed seeds: ARRAY (gains, offsets, the rhythm's field) belongs to the array and is shared by
baseline and recording; BASELINE and RECORDING draw the two backgrounds; EVENTS draws what happens when.
"""
import math

import numpy as np
from scipy import fft

from layout import APERTURE_MM, RATE_HZ, positions
from phase_filter import TWO_PI

ARRAY_SEED, BASELINE_SEED, RECORDING_SEED, EVENT_SEED = 4101, 4102, 4103, 4104
BASELINE_S, RECORDING_S = 300.0, 78.0

FIELD_MICROVOLTS, FIELD_LENGTH_APERTURES = 40.0, 0.5
COMMON_MICROVOLTS = 24.0
CONTACT_MICROVOLTS, WHITE_MICROVOLTS = 9.0, 1.5
NOISE_EXPONENT, NOISE_CORNER_HZ = 1.2, 0.5
RHYTHM_HZ, RHYTHM_WIDTH_HZ, RHYTHM_MICROVOLTS, RHYTHM_FIELD_SD = 18.0, 3.5, 9.0, 0.15
OFFSET_MICROVOLTS, GAIN_LOG_SD = 150.0, 0.2

RULE_DEGREES, RULE_HALF_WIDTH_DEGREES = 135.0, 30.0
RAMP_S = 0.030
FIRST_ONSET_S = 3.0
COLUMNS = ("onset", "duration", "trial_type", "direction_degrees", "speed_metres_per_second", "wavelength_millimetres",
           "wavelength_apertures", "snr_decibels", "frequency_hertz", "strong", "in_sector")


class Array:
    """what stays the same between two recordings of one array"""

    def __init__(self):
        rng = np.random.default_rng(ARRAY_SEED)
        self.x = positions() - positions().mean(axis=0)
        n = len(self.x)
        self.distance = np.sqrt(((self.x[:, None] - self.x[None]) ** 2).sum(-1))
        self.gain = np.exp(GAIN_LOG_SD * rng.standard_normal(n))
        self.offset = OFFSET_MICROVOLTS * rng.standard_normal(n)
        smooth = np.exp(-0.5 * (self.distance / (0.6 * APERTURE_MM)) ** 2) + 1e-6 * np.eye(n)
        field = np.exp(RHYTHM_FIELD_SD * (np.linalg.cholesky(smooth) @ rng.standard_normal(n)))
        self.rhythm_field = field / np.sqrt(np.mean(field ** 2))
        local = np.exp(-self.distance / (FIELD_LENGTH_APERTURES * APERTURE_MM))
        self.mixing = np.linalg.cholesky(local + 1e-9 * np.eye(n))


def power_law(rows, samples, rng):
    """unit-variance noise, spectrum f^-exponent above the corner and flat below it"""
    n = fft.next_fast_len(samples + int(RATE_HZ))
    f = np.fft.rfftfreq(n, 1.0 / RATE_HZ)
    p = np.maximum(f, NOISE_CORNER_HZ) ** -NOISE_EXPONENT
    p[0] = 0.0
    p /= np.concatenate([p, p[-2:0:-1]]).mean()
    out = np.empty((rows, samples))
    for i in range(rows):
        out[i] = np.fft.irfft(np.fft.rfft(rng.standard_normal(n)) * np.sqrt(p), n)[:samples]
    return out


def oscillator(samples, rng):
    """real part of a first-order complex process, unit variance: a rhythm that waxes and wanes by itself"""
    rho = math.exp(-math.pi * RHYTHM_WIDTH_HZ / RATE_HZ)
    a, run_in = rho * np.exp(1j * TWO_PI * RHYTHM_HZ / RATE_HZ), 2000
    drive = (rng.standard_normal(samples + run_in) + 1j * rng.standard_normal(samples + run_in)) * math.sqrt(1.0 - rho * rho)
    z, state = np.empty(samples + run_in, complex), 0j
    for n in range(samples + run_in):
        state = a * state + drive[n]
        z[n] = state
    return z.real[run_in:]


def background(array, seconds, seed):
    """(channels, samples) in microvolts before gain and offset"""
    n = int(round(seconds * RATE_HZ))
    rng = np.random.default_rng(seed)
    channels = len(array.x)
    out = FIELD_MICROVOLTS * (array.mixing @ power_law(channels, n, rng))
    out += COMMON_MICROVOLTS * power_law(1, n, rng)
    out += CONTACT_MICROVOLTS * power_law(channels, n, rng)
    out += WHITE_MICROVOLTS * rng.standard_normal((channels, n))
    out += RHYTHM_MICROVOLTS * array.rhythm_field[:, None] * oscillator(n, rng)[None]
    return out


def as_recorded(array, microvolts):
    return array.gain[:, None] * microvolts + array.offset[:, None]


def _apart(degrees):
    return abs((degrees - RULE_DEGREES + 180.0) % 360.0 - 180.0)


def _spread(rng, count):
    """directions over the full circle, one per equal share; none in the border zone 25-38 deg from the rule's
    direction, where 'inside' would be a matter of one standard error"""
    out, turn = [], rng.uniform(0, 360)
    while len(out) < count:
        d = (turn + (len(out) + rng.uniform(0, 1)) * 360.0 / count) % 360.0
        if not 25.0 < _apart(d) < 38.0:
            out.append(d)
    return out


def _wave(rng, direction, strong, apertures, decibels):
    """one plane wave; frequency and wavelength are drawn again until the speed is 0.04-0.15 m/s"""
    while True:
        frequency = round(rng.uniform(16.0, 20.0), 2)
        wavelength = round(rng.uniform(*apertures) * APERTURE_MM, 3)
        if 0.04 <= frequency * wavelength / 1000.0 <= 0.15:
            break
    direction = round(direction, 1) % 360.0
    return dict(kind="planar", direction=direction, wavelength=wavelength, frequency=frequency,
                decibels=round(rng.uniform(*decibels), 1), strong=strong, shape=None)


def draw_events(seed=EVENT_SEED):
    """60 events in shuffled order; values are rounded as the truth table prints them, so the table is exact"""
    rng = np.random.default_rng(seed)
    events = [_wave(rng, RULE_DEGREES + rng.uniform(-25, 25), True, (0.8, 2.0), (6.0, 12.0)) for _ in range(14)]
    events += [_wave(rng, d, True, (0.8, 2.0), (6.0, 12.0)) for d in _spread(rng, 11)]
    others = _spread(rng, 15)
    rng.shuffle(others)
    events += [_wave(rng, d, False, (0.8, 2.0), (0.0, 5.0)) for d in others[:8]]
    events += [_wave(rng, d, False, (2.0, 3.2), (6.0, 12.0)) for d in others[8:]]
    shapes = ["uniform"] * 8 + ["focus centre", "focus edge", "ramp", "two poles"] * 3
    for shape in shapes:
        events.append(dict(kind="synchronous" if shape == "uniform" else "in phase", shape=shape, turn=rng.uniform(0, TWO_PI),
                           frequency=round(rng.uniform(16.0, 20.0), 2), decibels=round(rng.uniform(6.0, 14.0), 1)))
    rng.shuffle(events)
    onset = FIRST_ONSET_S + rng.uniform(0.0, 0.2)
    for e in events:
        e["onset"], e["duration"], e["phase"] = round(onset, 3), round(rng.uniform(0.250, 0.500), 3), rng.uniform(0, TWO_PI)
        onset += rng.uniform(1.05, 1.35)
    if events[-1]["onset"] + 2.0 > RECORDING_S:
        raise ValueError("events do not fit into the recording")
    return events


def pattern(array, event):
    """complex amplitude per electrode, r.m.s. 1"""
    x, L = array.x, APERTURE_MM
    if event["kind"] == "planar":
        angle = math.radians(event["direction"])
        k = TWO_PI / event["wavelength"] * np.array([math.cos(angle), math.sin(angle)])
        return np.exp(-1j * x @ k)
    u = np.array([math.cos(event["turn"]), math.sin(event["turn"])])
    bump = lambda centre, width: np.exp(-0.5 * ((x - centre) ** 2).sum(axis=1) / (width * L) ** 2)
    p = {"uniform": lambda: np.ones(len(x)),
         "focus centre": lambda: bump(0.0 * u, 0.35),
         "focus edge": lambda: bump(0.5 * L * u, 0.5),
         "ramp": lambda: 0.6 + 0.8 * (x @ u) / L,
         "two poles": lambda: bump(0.4 * L * u, 0.35) - bump(-0.4 * L * u, 0.35)}[event["shape"]]()
    return (p / np.sqrt(np.mean(p ** 2))).astype(complex)


def noise_before_gain(array, channel_rms):
    """r.m.s. of |noise| behind the causal filter, brought back in front of the channels' gains (mean power)"""
    return float(np.sqrt(np.mean((channel_rms / array.gain) ** 2)))


def add_events(array, microvolts, events, noise_rms, response):
    """adds the events to a background.  noise_rms: of noise_before_gain; response: function of the frequency, what the
    filter leaves of a steady cosine's amplitude.  So that cosine stands `decibels` above the noise behind the filter"""
    for e in events:
        first = int(round(e["onset"] * RATE_HZ))
        n = int(round(e["duration"] * RATE_HZ))
        t = np.arange(n + 1) / RATE_HZ
        edge = np.minimum(np.minimum(t, e["duration"] - t) / RAMP_S, 1.0)
        envelope = 0.5 - 0.5 * np.cos(np.pi * np.clip(edge, 0.0, 1.0))
        amplitude = noise_rms * 10.0 ** (e["decibels"] / 20.0) / response(e["frequency"])
        carrier = amplitude * envelope * np.exp(1j * (TWO_PI * e["frequency"] * t + e["phase"]))
        microvolts[:, first:first + n + 1] += (pattern(array, e)[:, None] * carrier[None]).real


def truth_rows(events):
    """the truth table as a list of rows, every cell as text"""
    out = []
    for e in events:
        row = [f"{e['onset']:.3f}", f"{e['duration']:.3f}", e["kind"]]
        planar = e["kind"] == "planar"
        if planar:
            row += [f"{e['direction']:.1f}", f"{e['frequency'] * e['wavelength'] / 1000.0:.8f}", f"{e['wavelength']:.3f}",
                    f"{e['wavelength'] / APERTURE_MM:.4f}"]
        else:
            row += ["n/a"] * 4
        row += [f"{e['decibels']:.1f}", f"{e['frequency']:.2f}"]
        if planar:
            inside = _apart(e["direction"]) <= RULE_HALF_WIDTH_DEGREES
            row += ["yes" if e["strong"] else "no", "yes" if inside else "no"]
        else:
            row += ["n/a", "n/a"]
        out.append(dict(zip(COLUMNS, row)))
    return out


def write_truth(path, events):
    with open(path, "w", encoding="utf-8", newline="\n") as out:
        out.write("\t".join(COLUMNS) + "\n")
        for row in truth_rows(events):
            out.write("\t".join(row.values()) + "\n")

"""Wave events from a frame statistic: state machine with hysteresis, and thresholds for a wanted chance rate.

Usage: imported by calibration.py and check_millrace.py; nothing to run by itself.
"""
import math

import numpy as np
from scipy.stats import chi2

TWO_PI = 2.0 * np.pi
FLOOR = -4.0
SECTORS = 8


def stay_of(enter):
    """hysteresis that also works for negative thresholds"""
    return enter - 0.15 * np.abs(enter)


class EventMachine:
    """quiet -> forming -> passing (trigger) -> quiet"""

    def __init__(self, frame_rate, enter, settings):
        self.enter = np.broadcast_to(np.asarray(enter, float), (SECTORS,))
        self.stay = stay_of(self.enter)
        count = lambda ms: max(1, math.ceil(ms * frame_rate / 1000 - 1e-9))
        whole = lambda ms: math.floor(ms * frame_rate / 1000 + 1e-9)
        self.minimum, self.window = count(settings["minimumMs"]), count(settings["stabilityMs"])
        self.gap, self.rest = whole(settings["gapMs"]), whole(settings["refractoryMs"])
        self.resultant = math.exp(-0.5 * math.radians(settings["stabilityDegrees"]) ** 2)

    def run(self, statistic, theta):
        """list of (onset, trigger, end, direction rad); frames are counted from 0, end is the last good frame"""
        s, theta = np.asarray(statistic, float), np.asarray(theta, float)
        sector = sector_of(theta)
        enters, stays = s >= self.enter[sector], s >= self.stay[sector]
        sums = np.r_[0, np.cumsum(np.exp(1j * theta))]
        starts, events, start, free = np.flatnonzero(enters), [], 0, 0
        while True:
            p = np.searchsorted(starts, max(start, free))
            if p >= len(starts):
                return events
            first = last = t = int(starts[p])
            trigger, direction = -1, 0.0
            while t < len(s):
                if stays[t]:
                    last = t
                elif t - last > self.gap:
                    break
                if trigger < 0 and t - first + 1 >= self.minimum and stays[t]:
                    m = min(self.window, t - first + 1)
                    total = sums[t + 1] - sums[t + 1 - m]
                    if abs(total) / m >= self.resultant:
                        trigger, direction = t, float(np.angle(total))
                t += 1
            if trigger >= 0:
                events.append((first, trigger, last, direction))
                free = last + 1 + self.rest
            start = max(last + 1, first + 1)


def sector_of(theta):
    """eight sectors of 45 deg, sector 0 centred on 0 deg"""
    return np.floor((np.asarray(theta) % TWO_PI) / TWO_PI * SECTORS + 0.5).astype(int) % SECTORS


def poisson_interval(n, minutes):
    """exact 95 % interval of a rate per minute"""
    low = chi2.ppf(0.025, 2 * n) / 2 if n else 0.0
    return float(low / minutes), float(chi2.ppf(0.975, 2 * n + 2) / 2 / minutes)


def calibrate(frame_rate, statistic, theta, per_minute, settings, rounds=14):
    """thresholds per sector for the wanted rate of the complete gated rule.  First the floor: where the gates alone
    hold the rate, every sector stands there.  Else one threshold by bisection, then damped rounds per sector."""
    minutes = len(statistic) / frame_rate / 60
    count = lambda enter: EventMachine(frame_rate, enter, settings).run(statistic, theta)
    at_floor = count(FLOOR)
    if len(at_floor) <= per_minute * minutes:
        return np.full(SECTORS, FLOOR), True, len(at_floor)
    finite = statistic[np.isfinite(statistic)]
    low, high = FLOOR, float(finite.max()) + 1e-9
    for _ in range(30):
        middle = 0.5 * (low + high)
        low, high = (middle, high) if len(count(middle)) > per_minute * minutes else (low, middle)
    enter = np.full(SECTORS, high)
    wanted = per_minute * minutes / SECTORS
    q = float(np.std(finite[finite >= np.quantile(finite, 0.99)]))
    for _ in range(rounds):
        n = np.bincount(sector_of([e[3] for e in count(enter)]), minlength=SECTORS)
        enter = np.maximum(FLOOR, enter + 0.5 * q * np.log((n + 0.5) / (wanted + 0.5)))
    return enter, False, len(at_floor)

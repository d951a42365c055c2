"""The Fenmarsh array of subject Quill (invented): labels, positions, band, sampling.

Usage: imported by make_millrace.py and check_millrace.py; run alone it prints the electrode table.

Rows are counted from 1 at the bottom, columns from 1 at the left, seen from above: r1 is y = 0, c1 is x = 0,
x grows to the right and y upwards.  Positions in mm are ((column - 1) * 0.4, (row - 1) * 0.4).
The four corners carry no electrode.  Channels run row by row from the bottom, left to right inside a row.
"""
import numpy as np

PITCH_MM = 0.4
SIDE = 8
APERTURE_MM = (SIDE - 1) * PITCH_MM
RATE_HZ = 1000.0
LOW_HZ, HIGH_HZ = 14.0, 22.0
SAMPLES_PER_FRAME = 4
FRAME_RATE_HZ = RATE_HZ / SAMPLES_PER_FRAME
START_UP_S = 1.0
DATA_NAME = "millrace"


def electrodes():
    """list of (label, x mm, y mm) in channel order"""
    out = []
    for row in range(1, SIDE + 1):
        for column in range(1, SIDE + 1):
            if row in (1, SIDE) and column in (1, SIDE):
                continue
            out.append((f"r{row}c{column}", round((column - 1) * PITCH_MM, 6), round((row - 1) * PITCH_MM, 6)))
    return out


def labels():
    return [name for name, _, _ in electrodes()]


def positions():
    """(channels, 2) in mm"""
    return np.array([(x, y) for _, x, y in electrodes()])


def write_electrodes(path):
    """BIDS electrodes table.  Size (contact area, mm^2) is not part of the invention: n/a."""
    with open(path, "w", encoding="utf-8", newline="\n") as out:
        out.write("name\tx\ty\tz\tsize\n")
        for name, x, y in electrodes():
            out.write(f"{name}\t{x:g}\t{y:g}\t0\tn/a\n")


if __name__ == "__main__":
    write_electrodes("/dev/stdout")

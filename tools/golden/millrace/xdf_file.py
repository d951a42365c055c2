"""XDF 1.0: writer and reader for one regular int16 signal stream.

Usage: imported by make_millrace.py and check_millrace.py; run with a file to print its chunks:
       xdf_file.py FILE
"""
import struct
import sys
import xml.etree.ElementTree as ET
from xml.sax.saxutils import escape

import numpy as np

BOUNDARY = bytes.fromhex("43A546DCCBF5410FB30ED5467383CBE4")
HEADER, STREAM_HEADER, SAMPLES, CLOCK_OFFSET, BOUNDARY_TAG, STREAM_FOOTER = 1, 2, 3, 4, 5, 6
DECLARATION = '<?xml version="1.0"?>'


def element(name, content, indent=0):
    """content: text, or a list of (name, content)"""
    pad = "\n" + "\t" * indent
    if isinstance(content, list):
        return f"{pad}<{name}>" + "".join(element(n, c, indent + 1) for n, c in content) + f"{pad}</{name}>"
    return f"{pad}<{name}>{escape(str(content))}</{name}>"


class Writer:
    def __init__(self, path, info, description):
        """info: list of (name, text) before desc; description: nested list for desc"""
        self.out = open(path, "wb")
        self.out.write(b"XDF:")
        self._chunk(HEADER, (DECLARATION + element("info", [("version", "1.0")])).encode())
        self._chunk(STREAM_HEADER, struct.pack("<I", 1) + (DECLARATION + element("info", info + [("desc", description)])).encode())
        self.first = self.last = None
        self.count, self.offsets = 0, []

    def _chunk(self, tag, content):
        length = 2 + len(content)
        prefix = struct.pack("<BB", 1, length) if length < 256 else struct.pack("<BI", 4, length)
        self.out.write(prefix + struct.pack("<H", tag) + content)

    def samples(self, stamp, values, period):
        """values (samples, channels) int16; only the first sample carries its stamp"""
        row = np.zeros((len(values), 1 + 2 * values.shape[1]), np.uint8)
        row[:, 1:] = np.ascontiguousarray(values.astype("<i2")).view(np.uint8).reshape(len(values), -1)
        body = bytearray(row.tobytes())
        body[0:1] = struct.pack("<Bd", 8, stamp)
        self._chunk(SAMPLES, struct.pack("<IBI", 1, 4, len(values)) + bytes(body))
        self.first = stamp if self.first is None else self.first
        self.last = stamp + (len(values) - 1) * period
        self.count += len(values)

    def clock_offset(self, time, value):
        self._chunk(CLOCK_OFFSET, struct.pack("<Idd", 1, time, value))
        self.offsets.append((time, value))

    def boundary(self):
        self._chunk(BOUNDARY_TAG, BOUNDARY)

    def close(self):
        offsets = [("offset", [("time", repr(t)), ("value", repr(v))]) for t, v in self.offsets]
        footer = [("first_timestamp", repr(self.first)), ("last_timestamp", repr(self.last)),
                  ("sample_count", self.count), ("clock_offsets", offsets)]
        self._chunk(STREAM_FOOTER, struct.pack("<I", 1) + (DECLARATION + element("info", footer)).encode())
        self.out.close()


def chunks(data):
    """yield (tag, content) of a whole file in memory; refuses damage"""
    if data[:4] != b"XDF:":
        raise ValueError("not an XDF file")
    at = 4
    while at < len(data):
        size = data[at]
        if size not in (1, 4, 8):
            raise ValueError(f"damaged length at byte {at}")
        length = int.from_bytes(data[at + 1:at + 1 + size], "little")
        at += 1 + size
        if length < 2 or at + length > len(data):
            raise ValueError(f"length beyond the end at byte {at}")
        yield struct.unpack_from("<H", data, at)[0], data[at + 2:at + length]
        at += length


def read(path):
    """info (element), stamps, values (samples, channels) int16, clock offsets, footer (element), chunk counts"""
    with open(path, "rb") as f:
        data = f.read()
    info = footer = None
    stamps, values, offsets, counts = [], [], [], {}
    for tag, content in chunks(data):
        counts[tag] = counts.get(tag, 0) + 1
        if tag == STREAM_HEADER:
            info = ET.fromstring(content[4:])
            channels, period = int(info.findtext("channel_count")), 1.0 / float(info.findtext("nominal_srate"))
        elif tag == SAMPLES:
            size = content[4]
            n = int.from_bytes(content[5:5 + size], "little")
            at = 5 + size
            for _ in range(n):
                explicit = content[at]
                at += 1
                if explicit == 8:
                    stamps.append(struct.unpack_from("<d", content, at)[0])
                    at += 8
                elif explicit == 0:
                    stamps.append(stamps[-1] + period)
                else:
                    raise ValueError("damaged stamp")
                values.append(np.frombuffer(content, "<i2", channels, at))
                at += 2 * channels
            if at != len(content):
                raise ValueError("bytes left over in a samples chunk")
        elif tag == CLOCK_OFFSET:
            offsets.append(struct.unpack_from("<dd", content, 4))
        elif tag == STREAM_FOOTER:
            footer = ET.fromstring(content[4:])
    return dict(info=info, stamps=np.array(stamps), values=np.array(values), offsets=offsets, footer=footer, counts=counts)


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit(__doc__)
    got = read(sys.argv[1])
    print("chunks by tag:", got["counts"], "samples:", got["values"].shape, "stamps:", got["stamps"][0], "to", got["stamps"][-1])

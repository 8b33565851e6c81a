"""Area containers and a journal, built byte by byte from docs/certificate-format.md and from the layout in
src/format/journal_record.hpp; the C++ tests read them, the fuzzers begin with them and with the payloads. The
figures are invented: nothing in them need be true of M. Run it to write tests/format/area/ and tests/fuzz/area_block_seeds/
anew; the files are the same each time."""

import hashlib
import json
import struct
import zlib
from pathlib import Path

MAGIC = b"\x93merestone\r\n\x1a\n"
HEADER = {
    "at-least": "0x3p-1", "at-most": "0x7p-1", "content": "area", "format": "merestone-container", "version": 1,
    "cover": {"mirrored": True, "root": {"corner": ["-0x1p1", "0x0p0"], "side": "0x1p2"}, "rules": "all", "trunk-grade": 3},
}


def canonical(value):
    return json.dumps(value, sort_keys=True, separators=(",", ":")).encode()


def tree(data):
    return struct.pack("<I", len(data)) + data


def inside(period, disc=None):
    return struct.pack("<I", period) + (struct.pack("<ddd", *disc) if disc else b"")


def cover(kind, column, row, grade, cells, outside, inner, shown):
    return (kind + struct.pack("<IIBQQ", column, row, grade, *cells) + tree(outside) + tree(inner)
            + struct.pack("<I", len(shown)) + b"".join(shown))


def component(period, re, im, exponent, coefficients, bits):
    return struct.pack("<IddiHH", period, re, im, exponent, coefficients, bits)


# the trunk: split, its lower left quarter marked outside, its upper right one marked inside by a closed form
TRUNK = cover(b"T", 0, 0, 3, (16, 16), b"\x02\x01", b"\x02\x40", [inside(0)])
# a block marked outside as a whole and in all four quarters, with one disc of period 3 in its lower right quarter
BLOCK = cover(b"C", 5, 1, 6, (4096 - 7, 7), b"\x03\x55", b"\x02\x04", [inside(3, (-0.125, 0.75, 0.0625))])
LATER = cover(b"C", 2, 2, 6, (4096, 0), b"\x01", b"", [])
COMPONENTS = b"N" + component(2, -1.0, 0.0, -60, 16, 64) + component(3, -0.125, 0.75, -40, 32, 128)
PRESENT = [(2, TRUNK), (6, BLOCK), (1, LATER), (2, COMPONENTS)]


def present(ordinal, entries, payload):
    stored = zlib.compress(payload, 9)
    head = struct.pack("<QQQQI", ordinal, entries, len(payload), len(stored), zlib.crc32(payload))
    return b"BLK\n" + head + hashlib.sha256(payload).digest() + stored


def absent(ordinal, entries, payload):
    return b"ABS\n" + struct.pack("<QQQ", ordinal, entries, len(payload)) + payload[1:26] + hashlib.sha256(payload).digest()


def container(header, blocks, missing=()):
    head = canonical(header)
    data = MAGIC + struct.pack("<I", len(head)) + head
    rows = []
    for ordinal, (entries, payload) in enumerate(blocks):
        rows.append(struct.pack("<QQ", len(data), entries) + hashlib.sha256(payload).digest())
        data += (absent if ordinal in missing else present)(ordinal, entries, payload)
    return data + b"IDX\n" + struct.pack("<Q", len(rows)) + b"".join(rows) + struct.pack("<Q", len(data)) + b"END\n"


def digest(header, blocks):
    identity = {key: value for key, value in header.items() if key != "provenance"}
    identity["blocks"] = [hashlib.sha256(payload).hexdigest() for _, payload in blocks]
    return hashlib.sha256(canonical(identity)).hexdigest() + "\n"


def journal(work, blocks):
    data = b"\x9amerestone-journal\r\n\x1a\n" + struct.pack("<II", 1, len(work)) + work
    data += struct.pack("<I", zlib.crc32(data))
    for key, entries, payload in blocks:
        stored = zlib.compress(payload, 9)
        head = b"REC\n" + struct.pack("<QQQQI", key, entries, len(payload), len(stored), zlib.crc32(payload))
        head += hashlib.sha256(payload).digest()
        data += head + struct.pack("<I", zlib.crc32(head)) + stored
    return data


def files():
    yield "whole.mere", container({**HEADER, "provenance": {"seconds": 0.5}}, PRESENT)
    yield "absent.mere", container(HEADER, PRESENT, missing=(1, 2))
    yield "whole.digest", digest(HEADER, PRESENT).encode()
    only = {key: value for key, value in HEADER.items() if key not in ("cover", "at-most")}
    yield "components.mere", container(only, PRESENT[3:])
    yield "components.digest", digest(only, PRESENT[3:]).encode()
    yield "three.journal", journal(b'{"depth":6}', [(7, 6, BLOCK), (2, 2, TRUNK), (9, 1, LATER)])


def payloads():
    yield from (("trunk", TRUNK), ("block", BLOCK), ("later", LATER), ("components", COMPONENTS))


def write(folder, contents):
    folder.mkdir(exist_ok=True)
    for name, data in contents:
        (folder / name).write_bytes(data)


if __name__ == "__main__":
    write(Path(__file__).parent / "area", files())
    write(Path(__file__).parent.parent / "fuzz" / "area_block_seeds", payloads())

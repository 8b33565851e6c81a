"""Area containers taken apart and put together from docs/certificate-format.md, with numbers of entries that fit."""

import hashlib
import json
import struct
import zlib

MAGIC = b"\x93merestone\r\n\x1a\n"
_COMPONENT = 28


def read_container(data):
    """(the header, the payloads) of an undamaged container without absent blocks."""
    length, = struct.unpack_from("<I", data, len(MAGIC))
    at = len(MAGIC) + 4
    header, at, payloads = json.loads(data[at:at + length]), at + length, []
    while data[at:at + 4] == b"BLK\n":
        stored, = struct.unpack_from("<Q", data, at + 28)
        payloads.append(zlib.decompress(data[at + 72:at + 72 + stored]))
        at += 72 + stored
    return header, payloads


def _entries(payload):
    if payload[:1] == b"N":
        return (len(payload) - 1) // _COMPONENT
    outside, = struct.unpack_from("<I", payload, 26)
    inside, = struct.unpack_from("<I", payload, 30 + outside)
    trees = payload[30:30 + outside] + payload[34 + outside:34 + outside + inside]
    return sum((byte & 0x55).bit_count() for byte in trees)


def container_bytes(header, payloads):
    head = json.dumps(header, sort_keys=True, separators=(",", ":")).encode()
    data, index = MAGIC + struct.pack("<I", len(head)) + head, b""
    for ordinal, payload in enumerate(payloads):
        stored, digest = zlib.compress(payload), hashlib.sha256(payload).digest()
        index += struct.pack("<QQ", len(data), _entries(payload)) + digest
        numbers = ordinal, _entries(payload), len(payload), len(stored), zlib.crc32(payload)
        data += b"BLK\n" + struct.pack("<QQQQI", *numbers) + digest + stored
    return data + b"IDX\n" + struct.pack("<Q", len(payloads)) + index + struct.pack("<Q", len(data)) + b"END\n"

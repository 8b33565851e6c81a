"""The frame of a container: stream of bytes, header, blocks, index. What the blocks hold is not looked at."""

import hashlib
import zlib
from typing import NamedTuple

from rechecker.strict_json import Fault, canonical, count_of, fault_at, read_json, shown, text_of

VERSION = 1
LARGEST = 64 << 20  # bytes of a small certificate, of a block's payload and of its stored form
LARGEST_HEADER = 1 << 20
MAGIC = b"\x93merestone\r\n\x1a\n"
SUMMARY = 25  # bytes of what an absent block says of itself besides entries, length and digest


class ByteStream:
    """Reads from a file or a pipe and counts the bytes. Raises Fault."""

    def __init__(self, stream):
        self._stream = stream
        self.offset = 0

    def read(self, length):
        """At most `length` bytes; fewer only at the end of the file."""
        parts, missing = [], length
        while missing:
            try:
                part = self._stream.read(missing)
            except OSError as error:
                raise Fault(error.strerror or str(error), "input") from None
            if not part:
                break
            parts.append(part)
            missing -= len(part)
        self.offset += length - missing
        return b"".join(parts)

    def take(self, length, part):
        data = self.read(length)
        if len(data) < length:
            raise Fault(f"{part}: the file ends at byte {self.offset}; it was cut short")
        return data

    def integer(self, length, part):
        return int.from_bytes(self.take(length, part), "little")


class Block(NamedTuple):
    """One that stands in the file, whole and undamaged; of an absent one `summary` is known and `payload` is None."""

    ordinal: int
    entries: int
    payload: bytes
    summary: bytes = b""

    def name(self):
        return f"block {self.ordinal}"


def check_format(document, name):
    """Of a newer version nothing else is looked at."""
    if type(document) is not dict or "format" not in document or "version" not in document:
        raise fault_at("", "an object with the keys 'format' and 'version' should stand here")
    if text_of(document["format"], "/format") != name:
        raise fault_at("/format", f"{shown(document['format'])} is not '{name}'")
    if count_of(document["version"], "/version", 1) > VERSION:
        raise Fault(f"/version: version {document['version']} is newer than {VERSION}, which is what is read", "newer")


def check_provenance(document):
    if type(document.get("provenance", {})) is not dict:
        raise fault_at("/provenance", "an object should stand here")


def read_header(source, read_content):
    """What read_content(header) makes of the header, once its format and version are known."""
    length = source.integer(4, "header")
    if length > LARGEST_HEADER:
        raise Fault("header: it is longer than 1 MiB")
    data = source.take(length, "header")
    try:
        header = read_json(data)
        check_format(header, "merestone-container")
        return read_content(header)
    except Fault as fault:
        raise Fault(f"header: {fault}", fault.kind) from None


class Blocks:
    """Yields the blocks that follow the header, then verifies index and end; `digests` are those of the payloads."""

    def __init__(self, source, may_be_absent=False):
        self._source, self._may_be_absent = source, may_be_absent
        self._entries = []

    def digests(self):
        return [digest.hex() for _, _, digest in self._entries]

    def __iter__(self):
        source = self._source
        while True:
            offset, part = source.offset, f"block {len(self._entries)}"
            mark = source.take(4, part)
            if mark == b"IDX\n":
                break
            if mark == b"BLK\n":
                block, digest = self._stored(part)
            elif mark == b"ABS\n" and self._may_be_absent:
                block, digest = self._absent(part)
            else:
                raise Fault(f"{part}: neither a block nor the index begins at byte {offset}")
            self._entries.append((offset, block.entries, digest))
            yield block
        self._read_index(offset)

    def _ordinal(self, part):
        ordinal = self._source.integer(8, part)
        if ordinal != len(self._entries):
            raise Fault(f"{part}: it has the ordinal {ordinal}")
        return ordinal

    def _stored(self, part):
        source, ordinal = self._source, self._ordinal(part)
        entries, payload_length, stored_length = (source.integer(8, part) for _ in range(3))
        if payload_length > LARGEST or stored_length > LARGEST:
            raise Fault(f"{part}: it declares more than 64 MiB")
        crc, digest = source.integer(4, part), source.take(32, part)
        payload = _inflate(source.take(stored_length, part), payload_length, part)
        if zlib.crc32(payload) != crc or hashlib.sha256(payload).digest() != digest:
            raise Fault(f"{part}: CRC-32 or SHA-256 of the payload does not match: the block is damaged")
        return Block(ordinal, entries, payload), digest

    def _absent(self, part):
        source, ordinal = self._source, self._ordinal(part)
        entries, payload_length = source.integer(8, part), source.integer(8, part)
        if payload_length > LARGEST:
            raise Fault(f"{part}: it declares more than 64 MiB")
        summary = source.take(SUMMARY, part)
        return Block(ordinal, entries, None, summary), source.take(32, part)

    def _read_index(self, index_offset):
        source, entries = self._source, self._entries
        count = source.integer(8, "index")
        if not entries or count != len(entries):
            raise Fault(f"index: it counts {count} blocks; {len(entries)} were read")
        for i, entry in enumerate(entries):
            if (source.integer(8, "index"), source.integer(8, "index"), source.take(32, "index")) != entry:
                raise Fault(f"index: its entry for block {i} disagrees with the block")
        if source.integer(8, "end") != index_offset:
            raise Fault("end: it does not point to the index")
        if source.take(4, "end") != b"END\n":
            raise Fault("end: the mark END is missing")
        if source.read(1):
            raise Fault("end: bytes follow the end of the container")


def container_digest(claimed, blocks):
    """`claimed`: what of the header enters the digest, the content among it."""
    identity = {**claimed, "blocks": blocks.digests(), "format": "merestone-container", "version": VERSION}
    return hashlib.sha256(canonical(identity)).hexdigest()


def _inflate(stored, length, part):
    inflation = zlib.decompressobj()
    try:
        payload = inflation.decompress(stored, length + 1)
    except zlib.error as error:
        raise Fault(f"{part}: the stored data are not a zlib stream: {error}") from None
    if len(payload) != length or not inflation.eof or inflation.unused_data:
        raise Fault(f"{part}: the stored data do not inflate to exactly the {length} bytes declared")
    return payload

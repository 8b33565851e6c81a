"""The two forms of a certificate, read in one pass."""

import hashlib
import zlib

from rechecker.reading import read_claims
from rechecker.strict_json import Fault, canonical, check_keys, count_of, fault_at, read_json, shown, text_of

VERSION = 1
MOST_CLAIMS = 10_000
CLAIMS_OF_BLOCK = 4096
LARGEST = 64 << 20  # bytes of a small certificate, of a block's payload and of its stored form
LARGEST_HEADER = 1 << 20
MAGIC = b"\x93merestone\r\n\x1a\n"


def _check_format(document, name):
    """Of a newer version nothing else is looked at."""
    if type(document) is not dict or "format" not in document or "version" not in document:
        raise fault_at("", "an object with the keys 'format' and 'version' should stand here")
    if text_of(document["format"], "/format") != name:
        raise fault_at("/format", f"{shown(document['format'])} is not '{name}'")
    if count_of(document["version"], "/version", 1) > VERSION:
        raise Fault(f"/version: version {document['version']} is newer than {VERSION}, which is what is read", "newer")


def _check_provenance(document):
    if type(document.get("provenance", {})) is not dict:
        raise fault_at("/provenance", "an object should stand here")


class Certificate:
    """Yields lists of claims in order; `digest` is known when they are exhausted. Raises Fault."""

    def __init__(self, stream):
        self._stream = stream
        self._offset = 0
        self.digest = None

    def __iter__(self):
        start = self._read(len(MAGIC))
        if start == MAGIC:
            return self._blocks()
        if start[:1] == MAGIC[:1] or b"merestone\n" in start or b"merestone\r" in start:
            raise Fault("the first bytes are those of a container that a transfer in text mode damaged")
        return self._document(start)

    def _read(self, length):
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
        self._offset += length - missing
        return b"".join(parts)

    def _document(self, start):
        data = start + self._read(LARGEST + 1 - len(start))
        if not data:
            raise Fault("it is empty")
        if len(data) > LARGEST:
            raise Fault("it is larger than 64 MiB")
        document = read_json(data)
        _check_format(document, "merestone-certificate")
        check_keys(document, "", ("format", "version", "claims"), ("provenance",))
        _check_provenance(document)
        claims = read_claims(document["claims"], "/claims", MOST_CLAIMS)
        self.digest = hashlib.sha256(canonical(document["claims"])).hexdigest()
        yield claims

    def _take(self, length, part):
        data = self._read(length)
        if len(data) < length:
            raise Fault(f"{part}: the file ends at byte {self._offset}; it was cut short")
        return data

    def _integer(self, length, part):
        return int.from_bytes(self._take(length, part), "little")

    def _read_header(self):
        length = self._integer(4, "header")
        if length > LARGEST_HEADER:
            raise Fault("header: it is longer than 1 MiB")
        data = self._take(length, "header")
        try:
            header = read_json(data)
            _check_format(header, "merestone-container")
            check_keys(header, "", ("content", "format", "version"), ("provenance",))
            _check_provenance(header)
            if header["content"] != "list":
                raise fault_at("/content", "the content is not 'list'")
        except Fault as fault:
            raise Fault(f"header: {fault}", fault.kind) from None

    def _blocks(self):
        self._read_header()
        entries = []
        while True:
            offset, part = self._offset, f"block {len(entries)}"
            mark = self._take(4, part)
            if mark == b"IDX\n":
                break
            if mark != b"BLK\n":
                raise Fault(f"{part}: neither a block nor the index begins at byte {offset}")
            if entries and entries[-1][1] != CLAIMS_OF_BLOCK:
                raise Fault(f"block {len(entries) - 1}: it has {entries[-1][1]} claims and is not the last")
            claims, digest = self._read_block(part, len(entries))
            entries.append((offset, len(claims), digest))
            yield claims
        self._read_index(offset, entries)
        identity = {"blocks": [digest.hex() for _, _, digest in entries], "content": "list",
                    "format": "merestone-container", "version": VERSION}
        self.digest = hashlib.sha256(canonical(identity)).hexdigest()

    def _read_block(self, part, expected_ordinal):
        ordinal, count, payload_length, stored_length = (self._integer(8, part) for _ in range(4))
        if ordinal != expected_ordinal:
            raise Fault(f"{part}: it has the ordinal {ordinal}")
        if not 1 <= count <= CLAIMS_OF_BLOCK:
            raise Fault(f"{part}: it declares {count} claims")
        if payload_length > LARGEST or stored_length > LARGEST:
            raise Fault(f"{part}: it declares more than 64 MiB")
        crc, digest = self._integer(4, part), self._take(32, part)
        payload = _inflate(self._take(stored_length, part), payload_length, part)
        if zlib.crc32(payload) != crc or hashlib.sha256(payload).digest() != digest:
            raise Fault(f"{part}: CRC-32 or SHA-256 of the payload does not match: the block is damaged")
        try:
            value = read_json(payload)
            if canonical(value) != payload:
                raise Fault("the payload is not canonical JSON")
            claims = read_claims(value, "", CLAIMS_OF_BLOCK)
            if len(claims) != count:
                raise Fault(f"it declares {count} claims and has {len(claims)}")
        except Fault as fault:
            raise Fault(f"{part}, {fault}") from None
        return claims, digest

    def _read_index(self, index_offset, entries):
        count = self._integer(8, "index")
        if not entries or count != len(entries):
            raise Fault(f"index: it counts {count} blocks; {len(entries)} were read")
        for i, entry in enumerate(entries):
            if (self._integer(8, "index"), self._integer(8, "index"), self._take(32, "index")) != entry:
                raise Fault(f"index: its entry for block {i} disagrees with the block")
        if self._integer(8, "end") != index_offset:
            raise Fault("end: it does not point to the index")
        if self._take(4, "end") != b"END\n":
            raise Fault("end: the mark END is missing")
        if self._read(1):
            raise Fault("end: bytes follow the end of the container")


def _inflate(stored, length, part):
    inflation = zlib.decompressobj()
    try:
        payload = inflation.decompress(stored, length + 1)
    except zlib.error as error:
        raise Fault(f"{part}: the stored data are not a zlib stream: {error}") from None
    if len(payload) != length or not inflation.eof or inflation.unused_data:
        raise Fault(f"{part}: the stored data do not inflate to exactly the {length} bytes declared")
    return payload

"""The two forms of a certificate, read in one pass."""

import hashlib

from rechecker.area_files import AreaCertificate
from rechecker.container import (LARGEST, MAGIC, Blocks, ByteStream, check_format, check_provenance, container_digest,
                                 read_header)
from rechecker.reading import read_claims
from rechecker.strict_json import Fault, canonical, check_keys, fault_at, read_json, text_of

MOST_CLAIMS = 10_000
CLAIMS_OF_BLOCK = 4096


def open_certificate(stream):
    """A Document, a ListCertificate or an AreaCertificate. Raises Fault."""
    source = ByteStream(stream)
    start = source.read(len(MAGIC))
    if start == MAGIC:
        return read_header(source, lambda header: _of_content(header, source))
    if start[:1] == MAGIC[:1] or b"merestone\n" in start or b"merestone\r" in start:
        raise Fault("the first bytes are those of a container that a transfer in text mode damaged")
    return Document(source, start)


def _of_content(header, source):
    if "content" not in header:
        raise fault_at("", "the key 'content' is missing")
    content = text_of(header["content"], "/content")
    if content == "area":
        return AreaCertificate(header, source)
    if content == "list":
        return ListCertificate(header, source)
    raise fault_at("/content", "the content is neither 'list' nor 'area'")


class Document:
    """The small form: yields one list of claims; `digest` is known then. Raises Fault."""

    def __init__(self, source, start):
        self._source, self._start = source, start
        self.digest = None

    def __iter__(self):
        data = self._start + self._source.read(LARGEST + 1 - len(self._start))
        if not data:
            raise Fault("it is empty")
        if len(data) > LARGEST:
            raise Fault("it is larger than 64 MiB")
        document = read_json(data)
        check_format(document, "merestone-certificate")
        check_keys(document, "", ("format", "version", "claims"), ("provenance",))
        check_provenance(document)
        claims = read_claims(document["claims"], "/claims", MOST_CLAIMS)
        self.digest = hashlib.sha256(canonical(document["claims"])).hexdigest()
        yield claims


class ListCertificate:
    """Yields lists of claims in order; `digest` is known when they are exhausted. Raises Fault."""

    def __init__(self, header, source):
        check_keys(header, "", ("content", "format", "version"), ("provenance",))
        check_provenance(header)
        self._blocks = Blocks(source)
        self.digest = None

    def __iter__(self):
        before = None
        for block in self._blocks:
            if before and before.entries != CLAIMS_OF_BLOCK:
                raise Fault(f"{before.name()}: it has {before.entries} claims and is not the last")
            yield _claims_of(block)
            before = block
        self.digest = container_digest({"content": "list"}, self._blocks)


def _claims_of(block):
    if not 1 <= block.entries <= CLAIMS_OF_BLOCK:
        raise Fault(f"{block.name()}: it declares {block.entries} claims")
    try:
        value = read_json(block.payload)
        if canonical(value) != block.payload:
            raise Fault("the payload is not canonical JSON")
        claims = read_claims(value, "", CLAIMS_OF_BLOCK)
        if len(claims) != block.entries:
            raise Fault(f"it declares {block.entries} claims and has {len(claims)}")
    except Fault as fault:
        raise Fault(f"{block.name()}, {fault}") from None
    return claims

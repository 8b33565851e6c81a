#!/usr/bin/env python3
"""Establishes the claims of merestone certificates anew, in Python's standard library alone.

This is a third implementation beside merestone and merestone-check, slower than either, for whoever trusts neither.
It was written from docs/certificate-format.md and the lemmas in docs/proofs.md; its arithmetic is integers and
fractions. The parts are in the folder rechecker beside this file. Python 3.11 or newer.
"""

import argparse
import json
import os
import random
import sys

sys.dont_write_bytecode = True

from rechecker.area_files import AreaCertificate  # noqa: E402
from rechecker.area_report import check_area  # noqa: E402
from rechecker.files import open_certificate  # noqa: E402
from rechecker.rules import ESTABLISHED, NOT_ESTABLISHED, OVER_LIMIT, establish  # noqa: E402
from rechecker.strict_json import Fault  # noqa: E402
from rechecker.words import claim_in_words  # noqa: E402
from rechecker.work import Limits, work_of  # noqa: E402

FEW = 20  # claims of a file that are printed one by one
MOST_SHOWN = 100  # failures of a long list that are printed one by one
SEVEREST_FIRST = (4, 2, 1, 3, 5, 0)
EXIT_OF_FAULT = {"malformed": 2, "newer": 2, "input": 4}


class Sample:
    """At most `size` of a stream of unknown length, each as likely as any other (reservoir sampling)."""

    def __init__(self, size):
        self._size, self._draw = size, random.SystemRandom()
        self.kept, self.seen = [], 0

    def offer(self, item):
        self.seen += 1
        if len(self.kept) < self._size:
            self.kept.append(item)
        elif (slot := self._draw.randrange(self.seen)) < self._size:
            self.kept[slot] = item


class Report:
    """Counts outcomes of one file and prints them: each claim of few, the failures of many."""

    def __init__(self, name, options):
        self._name, self._options = name, options
        self.counts = {ESTABLISHED: 0, NOT_ESTABLISHED: 0, OVER_LIMIT: 0}
        self._held, self._shown = [], 0

    def add(self, position, claim, outcome):
        self.counts[outcome.outcome] += 1
        is_short = sum(self.counts.values()) <= FEW
        if self._options.all:
            self._print(position, claim, outcome)
        elif is_short or (outcome.outcome != ESTABLISHED and self._shown < MOST_SHOWN):
            self._shown += outcome.outcome != ESTABLISHED
            self._held.append((position, claim, outcome))

    def flush(self):
        is_short = sum(self.counts.values()) <= FEW
        for position, claim, outcome in self._held:
            if is_short or outcome.outcome != ESTABLISHED:
                self._print(position, claim, outcome)

    def _print(self, position, claim, outcome):
        if self._options.json:
            print(json.dumps({
                "file": self._name, "claim": position, "words": claim_in_words(claim), "outcome": outcome.outcome,
                "rule": claim.by.rule, **({"reason": outcome.reason} if outcome.reason else {}),
                "figures": outcome.figures, "lemmas": outcome.lemmas}))
            return
        figures = "".join(f"; {name} in [{lo}, {hi}]" for name, (lo, hi) in outcome.figures.items())
        why = f": {outcome.reason}" if outcome.reason else f" (Lemma {', '.join(outcome.lemmas)}{figures})"
        print(f"{self._name}: claim {position}: {claim_in_words(claim)}: {outcome.outcome}{why}")

    def exit_code(self, total):
        if self.counts[NOT_ESTABLISHED]:
            return 1
        if self.counts[OVER_LIMIT]:
            return 3
        return 0 if sum(self.counts.values()) == total else 5

    def summary(self, total, digest):
        code, checked = self.exit_code(total), sum(self.counts.values())
        if self._options.json:
            print(json.dumps({
                "file": self._name, "claims": total, **({"sample": {"claims": checked}} if checked < total else {}),
                "established": self.counts[ESTABLISHED], "not_established": self.counts[NOT_ESTABLISHED],
                "over_limit": self.counts[OVER_LIMIT], "claims_digest": digest, "exit": code}))
            return code
        of = f"a random sample, {checked} of {total} claims" if checked < total else f"{total} claims"
        print(f"{self._name}: {of}: {self.counts[ESTABLISHED]} established, {self.counts[NOT_ESTABLISHED]} not "
              f"established, {self.counts[OVER_LIMIT]} over the limit; claims-digest {digest}")
        return code


def numbered_claims(certificate):
    position = 0
    for claims in certificate:
        for claim in claims:
            yield position, claim
            position += 1


def drawn(claims, size):
    """The sample in the order of the file, and how many claims there were."""
    sample = Sample(size)
    for numbered in claims:
        sample.offer(numbered)
    return sorted(sample.kept, key=lambda numbered: numbered[0]), sample.seen


def check_stream(name, stream, options):
    certificate, report = open_certificate(stream), Report(name, options)
    limits = Limits(options.max_work, options.max_bits)
    if type(certificate) is AreaCertificate:
        return check_area(name, certificate, limits, options.sample, options.json)
    claims, total = numbered_claims(certificate), 0
    if options.sample is not None:
        claims, total = drawn(claims, options.sample)
    for position, claim in claims:
        outcome = establish(claim, limits)
        if outcome.outcome != OVER_LIMIT:
            limits = limits._replace(work=limits.work - work_of(claim))
        report.add(position, claim, outcome)
        total = max(total, position + 1)
    report.flush()
    return report.summary(total, certificate.digest)


def check_file(name, options):
    try:
        if name == "-":
            return check_stream("-", sys.stdin.buffer, options)
        try:
            stream = open(name, "rb")
        except (OSError, ValueError) as error:
            raise Fault(getattr(error, "strerror", None) or str(error), "input") from None
        with stream:
            return check_stream(name, stream, options)
    except Fault as fault:
        code = EXIT_OF_FAULT[fault.kind]
        if options.json:
            print(json.dumps({"file": name, "fault": fault.kind, "message": str(fault), "exit": code}))
        else:
            print(f"recheck.py: {name}: {fault}", file=sys.stderr)
        return code


def natural(text):
    value = int(text)
    if value < 1:
        raise argparse.ArgumentTypeError("a number of 1 or more is wanted")
    return value


def parse_options(arguments):
    parser = argparse.ArgumentParser(
        description=__doc__.split("\n\n")[0],
        epilog="Exit codes: 0 every claim established; 1 a claim not established; 2 usage or a malformed certificate; "
               "3 refused within the limits; 4 a file could not be read; 5 established on a sample only. With several "
               "files the first of 4, 2, 1, 3, 5, 0 that occurs.")
    parser.add_argument("files", nargs="+", metavar="FILE", help="a certificate of either form; - is standard input")
    parser.add_argument("--json", action="store_true", help="one JSON object a line")
    parser.add_argument("--all", action="store_true", help=f"print every claim, also of files with more than {FEW}")
    parser.add_argument("--sample", type=natural, metavar="N",
                        help="check N claims of each file, or N blocks and N components, drawn at random")
    parser.add_argument("--max-work", type=natural, metavar="N", default=Limits().work,
                        help="most steps of orbits for one file, weighted by the precision (%(default)s)")
    parser.add_argument("--max-bits", type=natural, metavar="N", default=Limits().bits,
                        help="most bits that a claim may ask for (%(default)s)")
    return parser.parse_args(arguments)


def main(arguments):
    options = parse_options(arguments)
    codes = [check_file(name, options) for name in options.files]
    sys.stdout.flush()
    return next(code for code in SEVEREST_FIRST if code in codes)


if __name__ == "__main__":
    try:
        sys.exit(main(sys.argv[1:]))
    except BrokenPipeError:
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        sys.exit(4)
    except MemoryError:
        print("recheck.py: there is not enough memory for this certificate", file=sys.stderr)
        sys.exit(3)
    except KeyboardInterrupt:
        sys.exit(130)

#!/usr/bin/env python3
"""Shares of the verdicts about 10,000 boxes near the boundary of M, by side.

Draws boxes of sides 2^-4 to 2^-40 with a fixed seed, has them decided and certified by merestone, has samples of them
contradicted, if that can be, by parameters of the boxes that merestone decides by other rules, and prints a table. The list
and the certificate stay in the folder that is named, for merestone-check and scripts/recheck.py.

    MERESTONE=build/release/src/cli/merestone tests/bench/region_survey.py FOLDER [BOXES]
"""

import collections
import json
import os
import pathlib
import random
import subprocess
import sys

SIDES = range(4, 41, 4)
ITERATIONS = 2_000  # that tell the inside from the outside for the draw
SAMPLES = 8  # parameters of each box that are decided by themselves
VERDICTS = ("outside", "inside", "straddles", "undecided")


def escapes(c):
    z = 0j
    for _ in range(ITERATIONS):
        z = z * z + c
        if z.real * z.real + z.imag * z.imag > 4:
            return True
    return False


def boundary_parameter(draw, distance):
    """Escapes, and another that does not is no farther than this: bisection."""
    def parameter(wanted):
        while True:
            c = complex(draw.uniform(-2, 0.6), draw.uniform(-1.2, 1.2))
            if escapes(c) == wanted:
                return c
    inner, outer = parameter(False), parameter(True)
    while abs(inner - outer) > distance:
        middle = (inner + outer) / 2
        if escapes(middle):
            outer = middle
        else:
            inner = middle
    return outer


def boxes(count):
    draw = random.Random(20261201)
    for k in range(count):
        places = SIDES[k % len(SIDES)]
        side = 2.0**-places
        corner = boundary_parameter(draw, side / 4) + side * complex(draw.uniform(-2.5, 1.5), draw.uniform(-2.5, 1.5))
        yield places, corner, corner + side * (1 + 1j)


def typed(c):
    return f"{c.real.hex()}{'+' if c.imag >= 0 else ''}{c.imag.hex()}i"


def answers(program, path, *options):
    run = subprocess.run([program, "decide", "--regions", str(path), "--json", *options], stdout=subprocess.PIPE, text=True)
    return [answer for answer in map(json.loads, run.stdout.splitlines()) if "verdict" in answer]


def contradictions(program, folder, drawn, verdicts):
    """Boxes called outside or inside of which a parameter is proved to be something else."""
    draw = random.Random(7)
    path, asked = folder / "samples.txt", []
    with open(path, "w") as list_:
        for (_, a, b), verdict in zip(drawn, verdicts):
            if verdict not in ("outside", "inside"):
                continue
            for _ in range(SAMPLES):
                asked.append(verdict)
                print(typed(complex(draw.uniform(a.real, b.real), draw.uniform(a.imag, b.imag))), file=list_)
    found = [answer["verdict"] for answer in answers(program, path, "--iterations", "100000")]
    wrong = sum(verdict not in (said, "undecided") for said, verdict in zip(asked, found))
    return wrong, sum(said == verdict for said, verdict in zip(asked, found)), len(asked)


def main(folder, count):
    program = os.environ["MERESTONE"]
    folder.mkdir(parents=True, exist_ok=True)
    drawn = list(boxes(count))
    path = folder / "boxes.txt"
    path.write_text("".join(f"box {typed(a)} {typed(b)}\n" for _, a, b in drawn))
    verdicts = [answer["verdict"] for answer in answers(program, path, "--out", str(folder / "boxes.mere"))]
    by_side = collections.defaultdict(collections.Counter)
    for (places, _, _), verdict in zip(drawn, verdicts, strict=True):
        by_side[places][verdict] += 1
    print("side   boxes  " + "  ".join(f"{verdict:>9}" for verdict in VERDICTS))
    for places, tally in sorted(by_side.items()):
        total = tally.total()
        print(f"2^-{places:<3} {total:>6}  " + "  ".join(f"{100 * tally[verdict] / total:>8.1f}%" for verdict in VERDICTS))
    wrong, upheld, asked = contradictions(program, folder, drawn, verdicts)
    print(f"{asked} parameters of boxes outside or inside: {upheld} decided alike by themselves, {wrong} contradict")
    return 1 if wrong else 0


if __name__ == "__main__":
    sys.exit(main(pathlib.Path(sys.argv[1]), int(sys.argv[2]) if len(sys.argv) > 2 else 10_000))

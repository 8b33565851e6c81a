#!/usr/bin/env python3
"""How the bounds of the area fall with effort: a table, and a plot.

    python3 tests/bench/area_effort.py BIN-DIR FOLDER DEPTH...     measures, one JSON line a depth, in FOLDER/effort.jsonl
    python3 tests/bench/area_effort.py --plot FOLDER PLOT.svg      draws what was measured

FOLDER keeps the certificates. Seconds are of processor time, all threads together.
"""

import json
import math
import resource
import subprocess
import sys
from pathlib import Path

ESTIMATE = 1.5065918849  # pixel counting, statistical (Förstemann 2012; verified in the reference values)


def seconds_of(command):
    before = resource.getrusage(resource.RUSAGE_CHILDREN)
    done = subprocess.run(command, stdout=subprocess.PIPE, text=True, check=True)
    after = resource.getrusage(resource.RUSAGE_CHILDREN)
    return after.ru_utime + after.ru_stime - before.ru_utime - before.ru_stime, json.loads(done.stdout)


def measured(programs, folder, depth):
    certificate = folder / f"area{depth}.mere"
    certificate.unlink(missing_ok=True)
    made, result = seconds_of([programs / "merestone", "area", "--depth", str(depth), "--json", "--out", certificate])
    checked, verdict = seconds_of([programs / "merestone-check", "--json", certificate])
    return {"depth": depth, "interval": json.loads(result["interval"]), "blocks": result["blocks"],
            "components": result["components"], "discs": verdict["outside_marks"], "made": round(made, 2),
            "checked": round(checked, 2), "bytes": result["certificate"]["bytes"],
            "digest": result["certificate"]["digest"], "verdict": verdict["verdict"]}


def row(m):
    low, high = m["interval"]
    return (f"| {m['depth']} | {low:.7f} | {high:.7f} | {m['components']:,} | {m['discs']:,} | {m['made']:.1f} | "
            f"{m['checked']:.1f} | {m['bytes'] / 1e6:.2f} |")


class Plot:
    """Logarithmic axes: processor seconds to the right, distance from the estimate upward."""

    WIDTH, HEIGHT, LEFT, RIGHT, TOP, BOTTOM = 720, 420, 70, 20, 20, 50

    def __init__(self, seconds, gaps):
        self.x_range = [math.floor(math.log10(min(seconds))), math.ceil(math.log10(max(seconds)))]
        self.y_range = [math.floor(math.log10(min(gaps))), math.ceil(math.log10(max(gaps)))]
        self.parts = []

    def x(self, seconds):
        lo, hi = self.x_range
        return self.LEFT + (math.log10(seconds) - lo) / (hi - lo) * (self.WIDTH - self.LEFT - self.RIGHT)

    def y(self, gap):
        lo, hi = self.y_range
        return self.HEIGHT - self.BOTTOM - (math.log10(gap) - lo) / (hi - lo) * (self.HEIGHT - self.TOP - self.BOTTOM)

    def text(self, x, y, words, anchor="middle", colour="#000"):
        self.parts.append(f'<text x="{x:.1f}" y="{y:.1f}" text-anchor="{anchor}" fill="{colour}">{words}</text>')

    def grid(self):
        for k in range(self.x_range[0], self.x_range[1] + 1):
            x = self.x(10.0 ** k)
            self.parts.append(f'<path d="M{x:.1f} {self.TOP}V{self.HEIGHT - self.BOTTOM}" stroke="#ddd"/>')
            self.text(x, self.HEIGHT - self.BOTTOM + 18, f"{10.0 ** k:g}")
        for k in range(self.y_range[0], self.y_range[1] + 1):
            y = self.y(10.0 ** k)
            self.parts.append(f'<path d="M{self.LEFT} {y:.1f}H{self.WIDTH - self.RIGHT}" stroke="#ddd"/>')
            self.text(self.LEFT - 8, y + 4, f"{10.0 ** k:g}", "end")
        self.text((self.LEFT + self.WIDTH) / 2, self.HEIGHT - 10, "processor seconds")

    def line(self, points, colour, name):
        path = " ".join(f"{self.x(s):.1f},{self.y(g):.1f}" for s, g in points)
        self.parts.append(f'<polyline points="{path}" fill="none" stroke="{colour}" stroke-width="2"/>')
        for s, g in points:
            self.parts.append(f'<circle cx="{self.x(s):.1f}" cy="{self.y(g):.1f}" r="4" fill="{colour}"/>')
        self.text(self.x(points[-1][0]) - 14, self.y(points[-1][1]) + 18, name, "end")  # below: the line falls

    def svg(self):
        return (f'<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 {self.WIDTH} {self.HEIGHT}" '
                f'font-family="sans-serif" font-size="13"><rect width="100%" height="100%" fill="#fff"/>'
                + "".join(self.parts) + "</svg>\n")


def draw(rows, path):
    above = [(m["made"], m["interval"][1] - ESTIMATE) for m in rows]
    below = [(m["made"], ESTIMATE - m["interval"][0]) for m in rows]
    plot = Plot([s for s, _ in above], [g for _, g in above + below])
    plot.grid()
    plot.line(above, "#d55e00", "upper bound, above the estimate")
    plot.line(below, "#0072b2", "lower bound, below it")
    path.write_text(plot.svg(), encoding="utf-8")


def main(words):
    if words[0] == "--plot":
        rows = [json.loads(line) for line in (Path(words[1]) / "effort.jsonl").read_text().splitlines()]
        draw(rows, Path(words[2]))
        print(*map(row, rows), sep="\n")
        return
    programs, folder = Path(words[0]), Path(words[1])
    folder.mkdir(parents=True, exist_ok=True)
    with open(folder / "effort.jsonl", "a", encoding="utf-8") as out:
        for depth in map(int, words[2:]):
            m = measured(programs, folder, depth)
            out.write(json.dumps(m) + "\n")
            out.flush()
            print(row(m), flush=True)


if __name__ == "__main__":
    main(sys.argv[1:])

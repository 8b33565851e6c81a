"""Breaks the rules one at a time and demands that the tests notice. Exit code 1 when a mutant survives.

mutants_*.py have the mutants: for each file under src/ what is broken, a text that occurs there exactly once, and its
replacement (and further such pairs where one check backs up another). A change after which everything proved is still
true does not belong there (to round |mid|^2 up instead of down in certainly_beyond, for one: the bound that it is
compared with has been rounded up before).

The sources and tests are copied to a temporary folder and built there once; for each mutant one file is changed, the
test programs of its room and of those above are built again and run until one fails.

    tests/kernel/mutants.py [--only TEXT] [--list] [--folder FOLDER] [--jobs N]
"""

import argparse
import os
import re
import shutil
import subprocess
import sys
import tempfile
from dataclasses import dataclass
from pathlib import Path

import mutants_area
import mutants_cover
import mutants_cover_lanes
import mutants_discs
import mutants_lanes
import mutants_regions
import mutants_rules
import mutants_safe_discs

ROOMS = ["kernel", "lanes", "search", "cover"]
LONGEST_RUN = 1800  # seconds; the tests of a room take less than one minute


@dataclass
class Mutant:
    """A change of one file."""

    file: str
    what: str
    changes: list  # of texts and their replacements

    def applied_to(self, text):
        for before, after in self.changes:
            if (times := text.count(before)) != 1:
                raise RuntimeError(f"the text to be replaced occurs {times} times:\n{before}")
            text = text.replace(before, after)
        return text

    def __str__(self):
        return f"{self.file}: {self.what}"


def all_mutants():
    for module in (mutants_discs, mutants_rules, mutants_regions, mutants_safe_discs, mutants_cover, mutants_lanes,
                   mutants_area, mutants_cover_lanes):
        for file, mutants in module.MUTANTS.items():
            for what, *texts in mutants:
                yield Mutant(file, what, list(zip(texts[::2], texts[1::2], strict=True)))


class Workshop:
    """A copy of the project, built."""

    def __init__(self, project, folder, jobs):
        self.project, self.folder, self.jobs = project, folder, jobs
        self.build = folder / "build"

    def prepare(self):
        shutil.copy(self.project / "CMakeLists.txt", self.folder)
        for part in ("src", "tests"):
            shutil.copytree(self.project / part, self.folder / part, ignore=shutil.ignore_patterns("__pycache__"))
        command = ["cmake", "-S", self.folder, "-B", self.build, "-DCMAKE_BUILD_TYPE=Release",
                   "-DMERESTONE_BUILD_TESTS=ON", "-DMERESTONE_BUILD_MANUALS=OFF"]
        if shutil.which("ninja"):
            command += ["-G", "Ninja"]
        if shutil.which("ccache"):
            command += ["-DCMAKE_CXX_COMPILER_LAUNCHER=ccache"]
        subprocess.run(command, check=True, stdout=subprocess.DEVNULL)

    def make(self, room):
        """Builds a room's tests; the compiler's words when that fails."""
        command = ["cmake", "--build", self.build, "--parallel", str(self.jobs), "--target", f"merestone_{room}_tests"]
        done = subprocess.run(command, capture_output=True, text=True)
        return None if done.returncode == 0 else (done.stdout + done.stderr)[-3000:]

    def run(self, room):
        """Runs a room's tests up to the first failure; where that was, or None."""
        program = self.build / "tests" / room / f"merestone_{room}_tests"
        environment = {k: v for k, v in os.environ.items() if k != "MERESTONE_THOROUGH"}
        try:
            done = subprocess.run([program, "--abort"], capture_output=True, text=True, errors="replace",
                                  timeout=LONGEST_RUN, env=environment)
        except subprocess.TimeoutExpired:
            return f"{room}: no end after {LONGEST_RUN} s"
        if done.returncode == 0:
            return None
        place = re.search(r"(\w+\.[ch]pp:\d+): FAILED", done.stdout)
        return place.group(1) if place else f"{room}: exit code {done.returncode}"

    def first_failure(self, rooms):
        for room in rooms:
            if (problem := self.make(room)) is not None:
                raise RuntimeError("does not compile:\n" + problem)
            if (place := self.run(room)) is not None:
                return place
        return None

    def with_mutant(self, mutant):
        """Where the tests noticed the mutant, or None."""
        path = self.folder / "src" / mutant.file
        text = path.read_text(encoding="utf-8")
        path.write_text(mutant.applied_to(text), encoding="utf-8")
        try:
            return self.first_failure(ROOMS[ROOMS.index(mutant.file.split("/")[0]):])
        finally:
            path.write_text(text, encoding="utf-8")


def arguments():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("--only", default="", help="mutants whose file or description contains this text")
    parser.add_argument("--list", action="store_true", help="print the mutants and stop")
    parser.add_argument("--folder", type=Path, help="an empty or missing folder to work in (default: a temporary one)")
    parser.add_argument("--jobs", type=int, default=len(os.sched_getaffinity(0)), help="compilers at a time")
    return parser.parse_args()


def try_all(workshop, chosen):
    workshop.prepare()
    if (place := workshop.first_failure(ROOMS)) is not None:
        sys.exit(f"the tests fail without a mutant: {place}")
    faults = 0
    for mutant in chosen:
        try:
            place = workshop.with_mutant(mutant)
            answer = "SURVIVES" if place is None else f"noticed at {place}"
        except RuntimeError as error:
            place, answer = None, f"NO MUTANT: {error}"
        faults += place is None
        print(f"{mutant}: {answer}", flush=True)
    print(f"{len(chosen)} mutants, {faults} not noticed")
    return faults


def main():
    options = arguments()
    chosen = [m for m in all_mutants() if options.only in str(m)]
    if options.list:
        print(*chosen, sep="\n")
        return 0
    if not chosen:
        sys.exit(f"no mutant has '{options.only}' in its file or description")
    project = Path(os.environ.get("MERESTONE_SOURCE_DIR") or Path(__file__).resolve().parents[2])
    if options.folder:
        options.folder.mkdir(parents=True, exist_ok=True)
        return 1 if try_all(Workshop(project, options.folder, options.jobs), chosen) else 0
    with tempfile.TemporaryDirectory(prefix="merestone-mutants-") as folder:
        return 1 if try_all(Workshop(project, Path(folder), options.jobs), chosen) else 0


if __name__ == "__main__":
    sys.exit(main())

"""The house keeps its arrows: includes, link lines and file lengths (docs: DEVELOPERS.md)."""

import os
import re
import sys
from pathlib import Path

LONGEST_FILE = 400

# A room may include itself and these; the first part of an include names the room.
MAY_INCLUDE = {
    "kernel": set(),
    "format": {"kernel"},
    "lanes": {"kernel"},
    "search": {"lanes", "kernel"},
    "image": set(),
    "cover": {"search", "lanes", "kernel", "format", "image"},
    "series": {"search", "lanes", "kernel", "format"},
    "audit": {"search", "lanes", "kernel", "format", "image"},
    "cli": {"audit", "cover", "series", "search", "lanes", "kernel", "format", "image"},
}
# merestone-check shares no code with the search: what its sources in cli/ may include.
CHECKER_SOURCE = re.compile(r"cli/(check_\w+|shared_\w+)\.(cpp|hpp)$")
CHECKER_MAY_INCLUDE = re.compile(r"(kernel|format)/|cli/check_|cli/shared_|cli/exit_code\.hpp$")
CHECKER_MAY_LINK = {"kernel", "format", "shared"}  # shared: cli/shared_*, what both programs need

INCLUDE = re.compile(r'^\s*#\s*include\s*"([^"]+)"', re.MULTILINE)


def sources(root):
    return sorted(p for p in (root / "src").rglob("*") if p.suffix in (".cpp", ".hpp"))


def include_faults(root):
    for path in sources(root):
        name = path.relative_to(root / "src").as_posix()
        room = name.split("/")[0]
        if room not in MAY_INCLUDE:
            yield f"{name}: no such room in the design"
            continue
        for included in INCLUDE.findall(path.read_text(encoding="utf-8")):
            target = included.split("/")[0]
            if not (root / "src" / included).is_file():
                yield f'{name}: "{included}" is no file of src/: includes start at the room'
            elif target != room and target not in MAY_INCLUDE[room]:
                yield f"{name}: includes {included}; {room} may include {sorted(MAY_INCLUDE[room]) or 'nothing else'}"
            elif CHECKER_SOURCE.search(name) and not CHECKER_MAY_INCLUDE.match(included):
                yield f"{name}: includes {included}, which is not for merestone-check"


def length_faults(root):
    for path in sources(root):
        lines = path.read_text(encoding="utf-8").count("\n")
        if lines > LONGEST_FILE:
            yield f"{path.relative_to(root)}: {lines} lines; a file has at most {LONGEST_FILE}"


class BuildPlan:
    """What each linked file is made of, by the build files of Ninja or of Make."""

    def __init__(self, build):
        self.inputs = {}
        ninja = build / "build.ninja"
        if ninja.is_file():
            self._read_ninja(ninja.read_text(encoding="utf-8").replace("$\n", " "))
        for path in build.rglob("link.txt"):
            name = path.parent.name.removesuffix(".dir")
            self.inputs.setdefault(name, path.read_text(encoding="utf-8").split())

    def _read_ninja(self, text):
        for rule in re.finditer(r"^build (\S+)[^:\n]*: \S*LINKER\S* (.*)\n((?:  .*\n)*)", text, re.MULTILINE):
            name = Path(rule.group(1)).name.removeprefix("lib").removesuffix(".a")
            libraries = re.search(r"^  LINK_LIBRARIES = (.*)$", rule.group(3), re.MULTILINE)
            self.inputs[name] = (rule.group(2) + " " + (libraries.group(1) if libraries else "")).split()


def link_faults(build):
    plan = BuildPlan(build)
    if not plan.inputs:
        yield f"{build}: no build files of Ninja or Make found"
    if "merestone-check" not in plan.inputs:
        return
    for program in ("merestone-check", "merestone_shared"):
        for word in plan.inputs[program]:
            library = re.search(r"libmerestone_(\w+)\.(?:a|so)", word)
            if library and library.group(1) not in CHECKER_MAY_LINK:
                yield f"{program} is linked with {word}, not with {sorted(CHECKER_MAY_LINK)} alone"
            compiled = re.search(r"(\w+)\.cpp\.o$", word)
            if compiled and not re.match(r"check_|shared_", compiled.group(1)):
                yield f"{program} is linked with {word}"


def main():
    root = Path(os.environ["MERESTONE_SOURCE_DIR"])
    build = Path(os.environ["MERESTONE_BUILD_DIR"])
    checked = len(sources(root))
    if checked < 40:
        sys.exit(f"only {checked} sources found under {root}/src")
    faults = [*include_faults(root), *length_faults(root), *link_faults(build)]
    for fault in faults:
        print(fault)
    print(f"{checked} sources, {len(faults)} faults")
    sys.exit(1 if faults else 0)


main()

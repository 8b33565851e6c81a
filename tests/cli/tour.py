"""The console blocks of README: their commands, run in a folder where the programs are in PATH.

`python3 tests/cli/tour.py SOURCE-DIR BIN-DIR README > NEW-README` writes the output of today's programs below each command.
"""

import os
import re
import subprocess
import sys
import tempfile
from pathlib import Path

BLOCK = re.compile(r"```console\n(.*?)```", re.DOTALL)


def commands(block):
    """The commands of a block with the lines that stand below each."""
    found = []
    for line in block.splitlines():
        if line.startswith("$ "):
            found.append((line[2:], []))
        else:
            found[-1][1].append(line)
    return found


def output_of(command, folder, programs):
    environment = dict(os.environ, PATH=f"{programs}:{os.environ['PATH']}", LC_ALL="C.UTF-8")
    done = subprocess.run(["bash", "-c", command], cwd=folder, env=environment, text=True,
                          stdout=subprocess.PIPE, stderr=subprocess.STDOUT)
    return done.stdout.splitlines()


class Folder:
    """A place that looks like a clone to the commands, and takes what they write."""

    def __init__(self, source):
        self.made = tempfile.TemporaryDirectory(prefix="merestone-tour-")
        self.path = Path(self.made.name)
        for name in ("docs", "scripts", "certs"):
            (self.path / name).symlink_to(Path(source) / name)

    def __enter__(self):
        return self.path

    def __exit__(self, *_):
        self.made.cleanup()


def rewritten(text, source, programs):
    with Folder(source) as folder:
        def with_output(match):
            lines = []
            for command, _ in commands(match.group(1)):
                lines += [f"$ {command}", *output_of(command, folder, programs)]
            return "```console\n" + "\n".join(lines) + "\n```"
        return BLOCK.sub(with_output, text)


if __name__ == "__main__":
    sys.stdout.write(rewritten(Path(sys.argv[3]).read_text(), Path(sys.argv[1]).resolve(), Path(sys.argv[2]).resolve()))

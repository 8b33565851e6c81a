"""Installs the build into a folder and links another project against it, by CMake's package and by pkg-config."""

import json
import os
import shutil
import subprocess
import tempfile
import unittest
from pathlib import Path

SOURCE = Path(os.environ["MERESTONE_SOURCE_DIR"])
BUILD = Path(os.environ["MERESTONE_BUILD_DIR"])
PROGRAM = Path(os.environ["MERESTONE"])  # the library's search must have been built


def run(*words, **options):
    done = subprocess.run([str(word) for word in words], capture_output=True, text=True, **options)
    if done.returncode != 0:
        raise AssertionError(f"{words} ended with {done.returncode}:\n{done.stdout}{done.stderr}")
    return done.stdout


def sanitizer_flags():
    cache = (BUILD / "CMakeCache.txt").read_text()
    value = next(line.split("=", 1)[1] for line in cache.splitlines() if line.startswith("MERESTONE_SANITIZE:"))
    return [f"-fsanitize={value}"] if value else []


class Consumer(unittest.TestCase):
    @classmethod
    def setUpClass(cls):
        cls.folder = Path(tempfile.mkdtemp(prefix="merestone-consumer-"))
        cls.addClassCleanup(shutil.rmtree, cls.folder)
        cls.prefix = cls.folder / "prefix"
        run("cmake", "--install", BUILD, "--prefix", cls.prefix)

    def check_output(self, program):
        claim = json.loads(run(program))
        # OEIS A097486: the counts for -3/4 + i/10^n are 3, 33, 315, ... (verified)
        self.assertEqual((claim["claim"], claim["index"]), ("count", 33))

    def test_cmake_package(self):
        build = self.folder / "build"
        flags = " ".join(sanitizer_flags())
        run("cmake", "-G", "Ninja", "-S", SOURCE / "tests/consumer", "-B", build,
            f"-DCMAKE_PREFIX_PATH={self.prefix}",
            f"-DCMAKE_CXX_FLAGS={flags}")
        run("cmake", "--build", build)
        self.check_output(build / "consumer")

    def test_pkg_config(self):
        [folder] = self.prefix.glob("lib*/**/pkgconfig")
        environment = dict(os.environ, PKG_CONFIG_PATH=str(folder))
        flags = run("pkg-config", f"--define-variable=prefix={self.prefix}", "--cflags", "--libs", "merestone",
                    env=environment).split()
        program = self.folder / "consumer"
        run("c++", *sanitizer_flags(), SOURCE / "tests/consumer/consumer.cpp", *flags, "-o", program)
        self.check_output(program)

    def test_manual_pages_and_completions_are_installed(self):
        for path in ("share/man/man1/merestone.1", "share/man/man1/merestone-check.1",
                     "share/bash-completion/completions/merestone", "share/zsh/site-functions/_merestone-check",
                     "share/fish/vendor_completions.d/merestone.fish"):
            self.assertGreater((self.prefix / path).stat().st_size, 200, path)

    def test_manual_pages_are_well_formed(self):
        if shutil.which("mandoc") is None:
            self.skipTest("mandoc is not installed")
        for page in (self.prefix / "share/man/man1").iterdir():
            run("mandoc", "-T", "lint", "-W", "error", page)


if __name__ == "__main__":
    unittest.main()

#!/usr/bin/env python3
"""Every fixture in tests/fixtures through merestone-check and scripts/recheck.py, against expected.json.

MERESTONE_SOURCE_DIR: the root of the sources. MERESTONE_CHECK: the path of merestone-check; without it only
recheck.py is run. Both programs were written from docs/certificate-format.md by different hands. Each takes all
fixtures in one run; merestone-check, and with MERESTONE_THOROUGH=1 recheck.py too, also each in a run of its own.
"""

import concurrent.futures
import json
import os
import pathlib
import subprocess
import sys
import unittest

SOURCE = pathlib.Path(os.environ.get("MERESTONE_SOURCE_DIR", pathlib.Path(__file__).resolve().parents[2]))
FIXTURES = SOURCE / "tests" / "fixtures"
SCHEMA = SOURCE / "docs" / "certificate.schema.json"
EXPECTED = json.loads((FIXTURES / "expected.json").read_text(encoding="utf-8"))
PROGRAMS = {"recheck.py": [sys.executable, str(SOURCE / "scripts" / "recheck.py")]}
if "MERESTONE_CHECK" in os.environ:
    PROGRAMS["merestone-check"] = [os.environ["MERESTONE_CHECK"]]
ONE_BY_ONE = PROGRAMS if os.environ.get("MERESTONE_THOROUGH") == "1" else PROGRAMS.keys() - {"recheck.py"}


def fixture_files():
    return sorted(path for folder in ("accept", "reject") for path in (FIXTURES / folder).iterdir())


def expectation(path):
    return EXPECTED[path.parent.name][path.name]


def expected_exit(path):
    return expectation(path).get("exit", 0)


def run(program, *arguments, **more):
    return subprocess.run([*PROGRAMS[program], *map(str, arguments)], stdin=more.pop("stdin", subprocess.DEVNULL),
                          capture_output=True, text=True, encoding="utf-8", errors="replace", timeout=600, **more)


def run_each(program, paths, *options):
    with concurrent.futures.ThreadPoolExecutor(os.cpu_count()) as pool:
        return list(pool.map(lambda path: run(program, *options, path), paths))


def by_file(result, files, case):
    """The JSON objects of each file. The program's own exit code is that of the worst file: one is malformed."""
    case.assertEqual(result.returncode, 2, result.stderr)
    reports = {}
    for line in result.stdout.splitlines():
        report = json.loads(line)
        reports.setdefault(report["file"], []).append(report)
    case.assertEqual(len(reports), files)
    return reports


class Fixtures(unittest.TestCase):
    def test_every_file_has_its_expectation_and_the_reverse(self):
        on_disk = {(path.parent.name, path.name) for path in fixture_files()}
        self.assertEqual(on_disk, {(folder, name) for folder in EXPECTED for name in EXPECTED[folder]})
        for folder, name in on_disk:
            self.assertTrue(EXPECTED[folder][name]["why"])
            self.assertEqual(folder == "reject", EXPECTED[folder][name].get("exit", 0) != 0, name)

    def test_exit_codes_and_messages(self):
        paths = fixture_files()
        for program in ONE_BY_ONE:
            results = run_each(program, paths)
            self.assertEqual(len(results), sum(len(names) for names in EXPECTED.values()))
            for path, result in zip(paths, results):
                with self.subTest(program=program, fixture=path.name):
                    self.judge(path, result)

    def judge(self, path, result):
        said = result.stdout + result.stderr
        self.assertEqual(result.returncode, expected_exit(path), said)
        if result.returncode:
            self.assertIn(path.name, said)
            self.assertIn(expectation(path).get("names", ""), said)
        if result.returncode == 2:
            self.assertEqual(len(result.stderr.splitlines()), 1, said)

    def test_json_of_all_in_one_run(self):
        paths = fixture_files()
        reports = {program: by_file(run(program, "--json", *paths), len(paths), self) for program in PROGRAMS}
        for path in paths:
            lines = {program: report[str(path)] for program, report in reports.items()}
            with self.subTest(fixture=path.name):
                for last in (report[-1] for report in lines.values()):
                    self.assertEqual(last["exit"], expected_exit(path))
                    self.assertEqual("fault" in last, last["exit"] == 2)
                    self.assertIn(expectation(path).get("names", ""), last.get("message", ""))
                if expected_exit(path) != 2:
                    self.agree(*lines.values())

    def agree(self, one, *others):
        """Digest, number of claims, and the outcome of each claim."""
        def told(lines):
            return [(line["claim"], line["outcome"], line["rule"]) for line in lines if "outcome" in line]

        for other in others:
            self.assertEqual(told(one), told(other))
            for key in ("claims", "claims_digest"):
                self.assertEqual(one[-1].get(key), other[-1].get(key))


class SeveralFiles(unittest.TestCase):
    """The first of 4, 2, 1, 3, 5, 0 that occurs is the answer."""

    GOOD = FIXTURES / "accept" / "escape_outside_point.mere.json"
    LIST = FIXTURES / "accept" / "container_of_two_blocks.mere"
    OVER_LIMIT = FIXTURES / "reject" / "bits_over_limit.mere.json"
    FALSE = FIXTURES / "reject" / "count_index_one_too_large.mere.json"
    MALFORMED = FIXTURES / "reject" / "duplicate_key.mere.json"
    MISSING = FIXTURES / "accept" / "there_is_no_such_file.mere.json"

    def check(self, code, *arguments, **more):
        for program in PROGRAMS:
            with self.subTest(program=program, arguments=arguments):
                result = run(program, *arguments, **more)
                self.assertEqual(result.returncode, code, result.stdout + result.stderr)

    def test_precedence(self):
        self.check(0, self.GOOD, self.LIST)
        self.check(3, self.GOOD, self.OVER_LIMIT, self.LIST)
        self.check(1, self.OVER_LIMIT, self.FALSE, self.GOOD)
        self.check(2, self.FALSE, self.MALFORMED, self.OVER_LIMIT)
        self.check(4, self.MALFORMED, self.MISSING, self.FALSE)
        self.check(4, FIXTURES)

    def test_usage(self):
        self.check(2)
        self.check(2, "--no-such-option", self.GOOD)
        self.check(2, "--max-work", "much", self.GOOD)

    def test_limits_can_be_moved(self):
        self.check(3, "--max-work", "10", self.GOOD)
        self.check(0, "--max-work", "1000", self.GOOD)
        self.check(3, "--max-bits", "63", self.GOOD)

    def test_a_sample_is_not_the_whole(self):
        for program in PROGRAMS:
            result = run(program, "--sample", 3, self.LIST)
            self.assertEqual(result.returncode, 5, result.stderr)
            self.assertRegex(result.stdout, r"\b3 .*\b4,?100\b")

    def test_standard_input(self):
        for path, code in ((self.GOOD, 0), (self.LIST, 0), (self.FALSE, 1), (self.MALFORMED, 2)):
            for program in PROGRAMS:
                with open(path, "rb") as stream, self.subTest(program=program, fixture=path.name):
                    self.assertEqual(run(program, "-", stdin=stream).returncode, code)


class Schema(unittest.TestCase):
    """docs/certificate.schema.json and the readers agree wherever a schema can decide."""

    def test_verdicts(self):
        try:
            import jsonschema
        except ImportError:
            self.skipTest("python3-jsonschema is not installed")
        if not SCHEMA.exists():
            self.skipTest(f"{SCHEMA} is not there")
        schema = json.loads(SCHEMA.read_text(encoding="utf-8"))
        validator = jsonschema.validators.validator_for(schema)
        validator.check_schema(schema)
        decided = 0
        for path in fixture_files():
            if path.suffix == ".json" and (expected_exit(path) != 2 or expectation(path).get("schema_decides")):
                with self.subTest(fixture=path.name):
                    document = json.loads(path.read_text(encoding="utf-8"))
                    self.assertEqual(validator(schema).is_valid(document), expected_exit(path) != 2)
                decided += 1
        self.assertGreater(decided, 200)


if __name__ == "__main__":
    unittest.main()

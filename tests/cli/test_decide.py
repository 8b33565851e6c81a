"""merestone decide as a person or a script uses it: verdicts, exit codes, streams, certificates, bad input."""

import json
import os
import signal
import subprocess
import time
import unittest

from region_support import ESTABLISHED, IO_FAILED, MALFORMED, REFUTED, UNDECIDED, Case

MERESTONE = os.environ["MERESTONE"]
CHECK = os.environ["MERESTONE_CHECK"]


def decide(*words, text=None, binary=None, timeout=120, **options):
    done = subprocess.run([MERESTONE, "decide", *map(str, words)], input=text.encode() if text is not None else binary,
                          capture_output=True, timeout=timeout, **options)
    done.stdout, done.stderr = done.stdout.decode(), done.stderr.decode()
    return done


def verdicts(*words, **options):
    done = decide("--json", *words, **options)
    return [json.loads(line) for line in done.stdout.splitlines()], done.returncode


class Verdicts(Case):
    def test_counts_near_minus_three_quarters(self):
        # OEIS A097486 (verified): the counts for -3/4 + i/10^n
        for exponent, count in enumerate([3, 33, 315, 3143, 31417, 314160]):
            [answer], code = verdicts(f"-0.75+{10 ** -exponent:.{exponent}f}i")
            self.assertEqual((answer["verdict"], answer["index"], code), ("outside", count, 0))

    def test_each_verdict_in_words(self):
        for point, words in [("0.26", "outside: escape index 30 for radius 2"),  # OEIS A299415 (verified)
                             ("0", "inside: attracting cycle of period 1"),
                             ("-1", "inside: attracting cycle of period 2"),
                             ("-17/20+1/5 i", "member: on the boundary of the disc of period 2"),
                             ("i", "member: a boundary point"), ("-1.5", "member: real and in [-2, 1/4]")]:
            done = decide(point)
            self.assertEqual(done.returncode, 0)
            self.assertIn(words, done.stdout)

    def test_multiplier_and_cycle_are_enclosed(self):
        # the multiplier of a cycle of period 2 is 4 (c + 1), its points are the zeros of z^2 + z + c + 1 (textbook)
        [answer], _ = verdicts("-1.1+0.05i")
        low, high = (float(part) for part in answer["multiplier"]["im"].strip("[]").split(", "))
        self.assertTrue(low <= 0.2 <= high)
        self.assertEqual(len(answer["cycle"]), 2)

    def test_undecided_names_the_limit(self):
        [answer], code = verdicts("-0.75+1e-6i", "--iterations", 1000)
        self.assertEqual((answer["verdict"], answer["limit"], code), ("undecided", "iterations", UNDECIDED))
        [answer], code = verdicts("-2+1e-60i", "--bits", 53)
        self.assertEqual((answer["limit"], code), ("precision", UNDECIDED))
        [answer], code = verdicts("-0.75+1e-12i", "--iterations", 10 ** 12, "--time-limit", 0.2)
        self.assertEqual((answer["limit"], code), ("time", UNDECIDED))

    def test_bailout(self):
        # |z_n| for c = 1 is 1, 2, 5, 26, 677, ...: worked by hand
        for bailout, index in [("2", 3), ("5", 4), ("26", 5), ("25.5", 4), ("0x1p4", 4), ("1024", 6)]:
            [answer], _ = verdicts("1", "--bailout", bailout)
            self.assertEqual(answer["index"], index, bailout)

    def test_expectations(self):
        for point, expected, code in [("0.3", "outside", 0), ("0.3", "member", 1), ("0.3", "inside", 1), ("0", "inside", 0),
                                      ("0", "member", 0), ("0", "outside", 1), ("i", "inside", 1), ("i", "member", 0),
                                      ("-1.5", "inside", 3), ("-1.5", "member", 0)]:
            self.assertEqual(decide("--expect", expected, point).returncode, code, (point, expected))
        self.assertEqual(decide("--expect", "outside", "0.3", "0").returncode, 1)
        self.assertEqual(decide("--expect", "outside", "0.3", "x").returncode, 2)


class Words(Case):
    def test_numbers_are_not_taken_for_options(self):
        for point in ("-1", "-.5", "-i", "-0.75+0.1i", ".25", "-1/8-1/8i", "\u22120.5", "-0x1p-1", " -1 "):
            [answer], code = verdicts(point)
            self.assertEqual(code, 0, point)
            self.assertEqual(answer["point"], point.strip().replace("\u2212", "-"))

    def test_spellings_of_one_parameter(self):
        for point in ("-0.75+0.1i", "-3/4+1/10i", "-0.75,0.1", "0.1i-0.75", "-75e-2 + 1e-1 i", "-0x3p-2,0.1", "-.75+.1i"):
            [answer], _ = verdicts(point)
            self.assertEqual((answer["verdict"], answer["index"]), ("outside", 33), point)

    def test_long_numbers_are_read_exactly(self):
        just_outside = "0.25" + "0" * 3000 + "1"
        just_inside = "0.24" + "9" * 3000
        [outside], _ = verdicts("-2." + "0" * 90000 + "1")
        self.assertEqual(outside["verdict"], "outside")
        [inside], _ = verdicts(just_inside)
        self.assertEqual(inside["verdict"], "inside")
        [right], code = verdicts(just_outside)
        self.assertEqual((right["verdict"], code), ("outside", 0))  # real and beyond 1/4

    def test_locale_does_not_matter(self):
        environment = dict(os.environ, LC_ALL="de_DE.UTF-8", LC_NUMERIC="de_DE.UTF-8")
        self.assertIn("escape index 33", decide("-0.75+0.1i", env=environment).stdout)

    def test_usage(self):
        for words in ([], ["0", "--points", "x"], ["--nonsense", "0"], ["0", "--bits", "1"], ["0", "--iterations", "0"],
                      ["0", "--iterations", "99999999999999999999"], ["0", "--bailout", "1.5"], ["0", "--bailout", "1/3"],
                      ["0", "--bailout", "nan"], ["0", "--expect", "maybe"], ["0", "--threads", "0"],
                      ["0", "--time-limit", "-1"], ["0", "--out", "claims.txt"], ["0", "--bits", "1e9999"]):
            self.assertOneLineError(decide(*words), MALFORMED)

    def test_help_teaches_and_version_is_printed(self):
        text = decide("--help").stdout
        for fragment in ("Examples:", "Exit codes:", "--bailout", "undecided"):
            self.assertIn(fragment, text)
        version = subprocess.run([MERESTONE, "--version"], capture_output=True, text=True)
        self.assertRegex(version.stdout, r"^merestone \d+\.\d+\.\d+\n$")

    def test_malformed_numbers(self):
        for point in ("abc", "nan", "inf", "-inf", "1/0", "1e", "0x", "1..2", "1+", "1+2", "i2", "1,2,3", "1e999999", "--1",
                      "0.1\x1b[31m", "1 2", "٣", "0.1+0.2j", "\u00bd"):
            done = decide("--", point)
            self.assertOneLineError(done, MALFORMED)
            self.assertTrue(done.stderr.isprintable() or done.stderr[:-1].isprintable(), done.stderr)


class Lists(Case):
    POINTS = ["0", "0.3", "-0.75+0.1i", "i", "-2", "1e-3+0.7i"]

    def test_comments_blank_lines_and_order(self):
        text = "# a list\n\n" + "\n".join(f"  {point}  # {k}" for k, point in enumerate(self.POINTS)) + "\r\n"
        answers, code = verdicts("--points", "-", text=text)
        self.assertEqual([answer["point"] for answer in answers], self.POINTS)
        self.assertEqual([answer["line"] for answer in answers], list(range(3, 3 + len(self.POINTS))))
        self.assertEqual(code, 0)

    def test_a_long_list_is_answered_in_order_whatever_the_threads(self):
        points = [f"{-2 + 2.6 * (k * 7919 % 5000) / 5000!r}{-1.2 + 2.4 * (k * 104729 % 5003) / 5003:+.17f}i" for k in range(5000)]
        outputs = {decide("--points", "-", "--json", "--threads", threads, text="\n".join(points)).stdout for threads in (1, 2, 5)}
        [output] = outputs
        self.assertEqual([json.loads(line)["point"] for line in output.splitlines()], points)

    def test_malformed_lines_lose_nothing(self):
        answers, code = verdicts("--points", "-", text="0\nnonsense\n0.3\n")
        self.assertEqual(code, MALFORMED)
        self.assertEqual([answer.get("verdict", "error") for answer in answers], ["inside", "error", "outside"])
        done = decide("--points", "-", text="0\nnonsense\n0.3\n")
        self.assertIn("-:2: 'nonsense'", done.stderr)
        self.assertIn("1 malformed", done.stdout)

    def test_answers_arrive_while_the_list_is_still_being_written(self):
        with subprocess.Popen([MERESTONE, "decide", "--points", "-", "--json"], stdin=subprocess.PIPE,
                              stdout=subprocess.PIPE, text=True) as program:
            for point in self.POINTS:
                program.stdin.write(point + "\n")
                program.stdin.flush()
                self.assertEqual(json.loads(program.stdout.readline())["point"], point)  # hangs if it is held back
            program.stdin.close()
            self.assertEqual(program.wait(60), 0)

    def test_a_reader_that_goes_away(self):
        done = subprocess.run(["bash", "-c", f"yes 0.3 | head -200000 | {MERESTONE} decide --points - | head -1; "
                               "echo ${PIPESTATUS[2]}"], capture_output=True, text=True, timeout=120)
        self.assertEqual(done.stdout.splitlines()[1], str(IO_FAILED))
        self.assertIn("standard output cannot be written", done.stderr)

    def test_output_that_is_full(self):
        with open("/dev/full", "w") as full:
            done = subprocess.run([MERESTONE, "decide", "0"], stdout=full, stderr=subprocess.PIPE, text=True)
        self.assertEqual(done.returncode, IO_FAILED)
        self.assertIn("standard output cannot be written", done.stderr)


class Certificates(Case):
    def check(self, path, *words):
        return subprocess.run([CHECK, "--json", *words, str(path)], capture_output=True, text=True, timeout=300)

    def test_both_forms_are_established_by_the_checker(self):
        text = "\n".join(["0", "i", "-1.5", "0.3", "-0.5+0.6i", "-2.5", "-17/20+1/5i", "6/5+8/5i"])
        for name in ("claims.mere.json", "claims.mere"):
            path = self.folder / name
            done = decide("--points", "-", "--out", path, text=text)
            self.assertEqual(done.returncode, 0, done.stderr)
            summary = json.loads(self.check(path).stdout.splitlines()[-1])
            self.assertEqual((summary["claims"], summary["established"], summary["exit"]), (8, 8, 0))
            self.assertIn(summary["claims_digest"], done.stdout)

    def test_the_digest_does_not_depend_on_threads(self):
        text = "\n".join(f"{k / 5000 - 0.7}+0.4i" for k in range(5000))
        digests = set()
        for threads in (1, 3):
            path = self.folder / f"claims{threads}.mere"
            self.assertEqual(decide("--points", "-", "--out", path, "--threads", threads, "--quiet", text=text).returncode, 0)
            digests.add(json.loads(self.check(path).stdout.splitlines()[-1])["claims_digest"])
        self.assertEqual(len(digests), 1)

    def test_the_request_stands_in_the_claim_as_typed(self):
        path = self.folder / "claims.mere.json"
        decide("  -0.750 + 1e-1 i", "--out", path)
        [claim] = json.loads(path.read_text())["claims"]
        self.assertEqual(claim["request"], "-0.750 + 1e-1 i")
        self.assertEqual(claim["region"], {"point": ["-3/4", "1/10"]})

    def test_undecided_points_are_left_out(self):
        path = self.folder / "claims.mere.json"
        done = decide("0", "-0.75+1e-6i", "--iterations", 1000, "--out", path)
        self.assertEqual(done.returncode, UNDECIDED)
        self.assertEqual(len(json.loads(path.read_text())["claims"]), 1)

    def test_too_many_claims_for_the_small_form(self):
        path = self.folder / "claims.mere.json"
        done = decide("--points", "-", "--out", path, "--quiet", text="0\n" * 10001)
        self.assertOneLineError(done, IO_FAILED, "10,000", "*.mere")
        self.assertEqual(list(self.folder.iterdir()), [])

    def test_nothing_proved_leaves_no_file(self):
        done = decide("-0.75+1e-6i", "--iterations", 1000, "--out", self.folder / "claims.mere")
        self.assertEqual(done.returncode, UNDECIDED)
        self.assertEqual(list(self.folder.iterdir()), [])

    def test_paths_that_cannot_be_written(self):
        for path in (self.folder / "missing" / "claims.mere", self.folder / ".mere.json"):
            (self.folder / ".mere.json").mkdir(exist_ok=True)
            done = decide("0", "--out", path)
            self.assertNotEqual(done.returncode, 0)
            self.assertEqual(done.stderr.count("\n"), 1)

    def test_an_interrupted_list_keeps_what_was_proved(self):
        path = self.folder / "claims.mere"
        with subprocess.Popen([MERESTONE, "decide", "--points", "-", "--out", str(path)], stdin=subprocess.PIPE,
                              stdout=subprocess.PIPE, stderr=subprocess.PIPE, text=True) as program:
            program.stdin.write("0.3\n" * 5000)
            program.stdin.flush()
            for _ in range(5000):
                program.stdout.readline()
            program.send_signal(signal.SIGINT)
            output, errors = program.communicate(timeout=60)
        self.assertEqual(program.returncode, 128 + signal.SIGINT)
        self.assertIn("interrupted", errors)
        self.assertEqual(json.loads(self.check(path).stdout.splitlines()[-1])["established"], 5000)

    def test_a_killed_run_leaves_the_older_certificate_alone(self):
        path = self.folder / "claims.mere"
        path.write_bytes(b"older")
        with subprocess.Popen([MERESTONE, "decide", "--points", "-", "--out", str(path), "--quiet"],
                              stdin=subprocess.PIPE) as program:
            program.stdin.write(b"0.3\n" * 9000)
            program.stdin.flush()
            time.sleep(0.3)
            program.kill()
            program.wait(60)
        self.assertEqual(path.read_bytes(), b"older")


class HostileInput(Case):
    def test_paths(self):
        self.assertOneLineError(decide("--points", self.folder), IO_FAILED, "directory")
        self.assertOneLineError(decide("--points", self.folder / "missing"), IO_FAILED, "No such file")

    def test_an_empty_list(self):
        for text in ("", "\n\n# only a comment\n"):
            self.assertOneLineError(decide("--points", "-", text=text), MALFORMED, "holds no parameter")

    def test_garbage(self):
        size = 100_000_000
        for name, block in (("one_line", b"7" * 1_000_000), ("zeros", bytes(1_000_000)),
                            ("noise", bytes(range(256)) * 4000)):
            path = self.folder / name
            with open(path, "wb") as file:
                for _ in range(size // len(block)):
                    file.write(block)
            done = decide("--points", path, "--quiet")
            self.assertEqual(done.returncode, MALFORMED, name)
            self.assertLess(len(done.stderr), 1_000_000)
            path.unlink()

    def test_memory_stays_bounded_on_a_line_without_end(self):
        limit = "ulimit -v 1000000; head -c 300000000 /dev/zero | tr '\\0' ' ' | "
        done = subprocess.run(["bash", "-c", limit + f"{MERESTONE} decide --threads 1 --points -"], capture_output=True,
                              text=True, timeout=120)
        if "Sanitizer" in done.stderr:
            self.skipTest("sanitizers need more address space")
        self.assertEqual(done.returncode, MALFORMED, done.stderr)


if __name__ == "__main__":
    unittest.main()

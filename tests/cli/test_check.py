#!/usr/bin/env python3
"""merestone-check: what it says of claims, its exit codes, limits and samples."""

import hashlib
import json
import re
import subprocess
import unittest
from decimal import Decimal
from fractions import Fraction

from check_support import (CHECK, CheckTest, Run, canonical, container, container_digest, costly, document, exact,
                           member, near_root)


def literal(text):
    """The ends of an IEEE 1788 literal."""
    ends = [Fraction(Decimal(end)) for end in text.strip("[]").split(", ")]
    return ends[0], ends[-1]


class Words(CheckTest):
    def test_an_established_claim_is_named_with_its_proof(self):
        run = Run(self.file("a.mere.json", document(near_root(request="-0.75+0.1i"))))
        self.assertEqual((run.exit, run.err), (0, ""))
        for words in ("Claim 0: established", "c = -3/4 + 1/10 i", "|z_n| > 2 is n = 33", "-0.75+0.1i, exactly this c",
                      "|z_32| <= 2, margin in [", "|z_33| > 2, margin in [", "|z_33| in [", "E1 (radius-2 criterion)"):
            self.assertIn(words, run.out)
        self.assertTrue(run.out.endswith("a.mere.json: its one claim established\n"))

    def test_a_failure_names_claim_rule_and_inequality(self):
        run = Run(self.file("a.mere.json", document(near_root(), near_root(34))))
        self.assertEqual(run.exit, 1)
        self.assertIn("Claim 1: NOT ESTABLISHED\n", run.out)
        self.assertRegex(run.out, r"rule +escape: enclosures of 64 bits\n +failed +\|z_33\| <= bailout does not hold")
        self.assertIn("a.mere.json: 1 of 2 claims established, 1 NOT ESTABLISHED\n", run.out)

    def test_every_rule_and_region_is_put_into_words(self):
        disc = {"centre": ["-0x1p0", "0x0p0"], "radius": "0x1p-4"}
        by_disc = {"rule": "attracting-disc", "period": 2, "disc": {"centre": ["0x0p0", "0x0p0"], "radius": "0x1p-2"},
                   "bits": 64}
        run = Run(self.file("a.mere.json", document(
            {"claim": "inside", "region": {"disc": disc}, "by": by_disc},
            {"claim": "member", "region": {"segment": ["-0x1p1", "0x1p-2"]}, "by": {"rule": "real-segment"}},
            {"claim": "member", "region": {"point": ["0", "-1"]},
             "by": {"rule": "preperiodic", "preperiod": 2, "period": 2}},
            {"claim": "member", "region": {"point": ["-17/20", "1/5"]}, "by": {"rule": "closed-form", "period": 2}})))
        self.assertEqual(run.exit, 0)
        for words in ("every c with |c - (-0x1p0)| <= 0x1p-4 lies in the interior of M", "re c in [-1.0625, -0.9375]",
                      "disjoint for k = 1: the period is exactly 2", "theorems of Schwarz-Pick and Fatou",
                      "every real c from -0x1p1 to 0x1p-2 lies in M", "c = -i lies in M", "z_4 = z_2",
                      "c = -17/20 + 1/5 i lies in M", "(x + 1)^2 + y^2 <= 1/16"):
            self.assertIn(words, run.out)

    def test_long_numbers_are_shortened_in_the_middle(self):
        tiny = "1/1" + "0" * 5000
        claim = {"claim": "inside", "region": {"point": [tiny, "0"]}, "by": {"rule": "closed-form", "period": 1}}
        run = Run(self.file("a.mere.json", document(claim)))
        self.assertEqual(run.exit, 0)
        self.assertIn(f"({5003 - 56:,} characters left out)", run.out)
        lower, upper = literal(re.search(r"re c in (\[.*\])", run.out).group(1))
        self.assertTrue(lower <= Fraction(1, 10**5000) <= upper <= lower * (1 + Fraction(1, 10**15)))
        self.assertLess(max(map(len, run.out.splitlines())), 250)

    def test_many_claims_are_counted_and_failures_listed(self):
        path = self.file("a.mere.json", document(*[near_root(34)] * 25, near_root()))
        run = Run(path)
        self.assertEqual(run.exit, 1)
        self.assertRegex(run.out, r"count +escape +1 +25 +0\n")
        self.assertEqual(len(re.findall(r"^  claim \d+ not established \(for c = -3/4", run.out, re.M)), 20)
        self.assertIn("... and 5 more; --json lists all", run.out)
        self.assertEqual(Run("--all", path).out.count("NOT ESTABLISHED\n  statement"), 25)

    def test_quiet_prints_errors_only(self):
        good = self.file("good.mere.json", document(near_root()))
        bad = self.file("bad.mere.json", document(near_root(34)))
        run = Run("--quiet", good)
        self.assertEqual((run.exit, run.out, run.err), (0, "", ""))
        run = Run("--quiet", bad)
        self.assertEqual(run.out, "")
        self.assert_fault(run, 1, "bad.mere.json: claim 0 not established", "|z_33|")


class Json(CheckTest):
    def test_a_line_for_each_claim_and_one_for_the_file(self):
        path = self.file("a.mere.json", document(near_root(request="-0.75+0.1i"), near_root(32), costly(2**53 - 1)))
        run = Run("--json", path)
        good, bad, refused, end = run.objects()
        self.assertEqual([o["claim"] for o in (good, bad, refused)], [0, 1, 2])
        self.assertEqual([o["outcome"] for o in (good, bad, refused)],
                         ["established", "not established", "over the limit"])
        self.assertEqual((good["rule"], good["lemmas"], good["request"]), ("escape", ["E1", "E2"], "-0.75+0.1i"))
        self.assertIn("|z_32| > bailout does not hold", bad["reason"])
        self.assertIn("--max-work", refused["reason"])
        self.assertEqual((end["file"], end["claims"], end["established"], end["not_established"], end["over_limit"],
                          end["exit"], run.exit), (str(path), 3, 1, 1, 1, 1, 1))

    def test_figures_enclose_the_modulus(self):
        """Against exact rational arithmetic: |z_n|^2 of -3/4 + 3/4 i, which escapes at step 4 for radius 2."""
        x, y, moduli = Fraction(-3, 4), Fraction(3, 4), [Fraction(0)]
        zx, zy = Fraction(0), Fraction(0)
        for _ in range(4):
            zx, zy = zx * zx - zy * zy + x, 2 * zx * zy + y
            moduli.append(zx * zx + zy * zy)
        index = next(n for n, square in enumerate(moduli) if square > 4)
        claim = near_root(index, region={"point": ["-3/4", "3/4"]})
        found = Run("--json", self.file("a.mere.json", document(claim))).objects()[0]
        self.assertEqual(set(found["figures"]), {f"|z_{index - 1}|", f"|z_{index}|"})
        for n in (index - 1, index):
            figure = found["figures"][f"|z_{n}|"]
            lower, upper = exact(figure["lower"]), exact(figure["upper"])
            self.assertTrue(lower**2 <= moduli[n] <= upper**2)
            self.assertLess(upper - lower, Fraction(1, 2**50))
            self.assertTrue(literal(figure["literal"])[0] <= lower <= upper <= literal(figure["literal"])[1])
        for fact, sign, n in zip(found["proved"], (-1, 1), (index - 1, index)):
            margin = exact(fact["margin"]["lower"])
            self.assertTrue(0 < margin and sign * (moduli[n] - (2 + sign * margin) ** 2) >= 0)

    def test_digest_and_number_of_claims(self):
        claims = [member(k) for k in range(5000)]
        for content, digest in ((document(*claims), hashlib.sha256(canonical(claims)).hexdigest()),
                                (container(claims), container_digest(claims))):
            path = self.file("a", content)
            end = Run("--json", path).objects()
            self.assertEqual([(e["claims"], e["claims_digest"], e["exit"]) for e in end], [(5000, digest, 0)])
            self.assertIn(f"5,000 claims, claims-digest {digest}\n", Run(path).out)

    def test_claims_of_a_container_stand_in_order_whatever_the_threads(self):
        claims = [member(k) for k in range(9000)]
        claims[17], claims[5000] = near_root(34), near_root(32)
        path = self.file("a.mere", container(claims))
        outputs = {Run("--json", "--all", "--threads", n, path).out for n in (1, 2, 7)}
        self.assertEqual(len(outputs), 1)
        objects = [json.loads(line) for line in outputs.pop().splitlines()]
        self.assertEqual([o["claim"] for o in objects[:-1]], list(range(9000)))
        self.assertEqual([o["claim"] for o in objects[:-1] if o["outcome"] != "established"], [17, 5000])
        self.assertEqual([o.get("claim") for o in Run("--json", path).objects()], [17, 5000, None])


class Inputs(CheckTest):
    def test_both_forms_from_standard_input(self):
        claims = [near_root(), member(1)]
        for content in (document(*claims), container(claims)):
            run = Run("-", given=content)
            self.assertEqual(run.exit, 0, run.err)
            self.assertTrue(run.out.endswith("standard input: all 2 claims established\n"))

    def test_several_files_answer_with_the_worst(self):
        good = self.file("0.mere.json", document(near_root()))
        files = {0: good, 1: self.file("1.mere.json", document(near_root(32))), 2: self.file("2.mere.json", b"{}"),
                 3: self.file("3.mere.json", document(costly(2**53 - 1))), 4: self.folder / "missing"}
        order = [4, 2, 1, 3, 0]
        for a in order:
            for b in order:
                run = Run(files[a], files[b])
                self.assertEqual(run.exit, min(a, b, key=order.index), (a, b))
                self.assertEqual(len(re.findall(r"^/.*: ", run.out, re.M)), 2)
        self.assertEqual(Run(good, good).exit, 0)
        self.assertIn("\n3 files: 2 established, 1 NOT ESTABLISHED\n", Run(good, files[1], good).out)

    def test_usage_errors_name_the_remedy(self):
        path = self.file("a.mere.json", document(near_root()))
        for words in ([], ["--nope", path], ["--max-work", "many", path], ["--max-work", "-1", path],
                      ["--max-work", "0", path], ["--threads", "0", path],
                      ["--sample", "0", path], ["--seed", "-1", path], ["-", "-"], ["--quiet", "--json", path]):
            with self.subTest(words=words):
                run = Run(*words)
                self.assert_fault(run, 2, "'merestone-check --help' explains")
                self.assertEqual(run.out, "")

    def test_help_version_and_manual(self):
        self.assertRegex(Run("--version").out, r"^merestone-check \d+\.\d+\.\d+\n$")
        run = Run("--help")
        self.assertEqual((run.exit, run.err), (0, ""))
        for words in ("Examples:", "Exit codes:", "--max-work", "--sample", "established on a sample only"):
            self.assertIn(words, run.out)
        for form, words in (("man", ".TH"), ("bash", "complete "), ("zsh", "#compdef"), ("fish", "complete ")):
            run = Run("--manual", form)
            self.assertEqual(run.exit, 0)
            self.assertIn(words, run.out)
            self.assertIn("max-work", run.out.replace("\\", ""))

    def test_a_reader_that_goes_away_is_a_failed_write(self):
        path = self.file("a.mere", container([member(k) for k in range(9000)]))
        pipeline = f"'{CHECK}' --json --all '{path}' 2>&1 >&3 | cat >&2; exit ${{PIPESTATUS[0]}}"
        done = subprocess.run(["bash", "-c", f"{{ {pipeline}; }} 3>&1 | head -1; exit ${{PIPESTATUS[0]}}"],
                              capture_output=True, timeout=300, check=False)
        self.assertEqual(done.returncode, 4)
        self.assertEqual(json.loads(done.stdout)["claim"], 0)
        self.assertEqual(done.stderr.decode(), "merestone-check: standard output cannot be written\n")
        with open("/dev/full", "wb") as full:
            done = subprocess.run([CHECK, path], stdout=full, stderr=subprocess.PIPE, timeout=300, check=False)
        self.assertEqual((done.returncode, done.stderr.count(b"\n")), (4, 1))


class LimitsAndSamples(CheckTest):
    def test_work_is_summed_over_the_file_and_refused_beforehand(self):
        path = self.file("a.mere.json", document(near_root(), costly(10**9), near_root(), costly(10**9), near_root()))
        for threads in (1, 3):
            run = Run("--json", "--max-work", "1000", "--threads", threads, path)
            self.assertEqual([o.get("outcome") for o in run.objects()],
                             ["established", "over the limit", "established", "over the limit", "established", None])
            self.assertEqual(run.exit, 3)
        path = self.file("a.mere.json", document(*[near_root()] * 30))
        outcomes = [o["outcome"] for o in Run("--json", "--all", "--max-work", "60", path).objects()[:-1]]
        established = outcomes.count("established")
        self.assertTrue(1 < established < 30)
        self.assertEqual(outcomes, ["established"] * established + ["over the limit"] * (30 - established))

    def test_bits_have_a_limit(self):
        claim = near_root(by={"rule": "escape", "bits": 1000})
        path = self.file("a.mere.json", document(claim))
        self.assertEqual(Run(path).exit, 0)
        run = Run("--max-bits", "999", path)
        self.assertEqual(run.exit, 3)
        self.assertIn("REFUSED", run.out)
        self.assertIn("raise --max-bits", run.out)

    def test_exact_arithmetic_with_huge_numbers_is_work_too(self):
        disc = {"disc": {"centre": ["0x1p-99999", "0x1p-100000"], "radius": "0x1p-6"}}
        claim = {"claim": "inside", "region": disc, "by": {"rule": "closed-form", "period": 1}}
        self.assertEqual(Run(self.file("a.mere.json", document(claim))).exit, 0)
        self.assertEqual(Run("--max-work", "5000", self.file("a.mere.json", document(claim))).exit, 3)
        disc = {"disc": {"centre": ["0x0p0", "0x0p0"], "radius": "0x1p-6"}}
        claim = {"claim": "inside", "region": disc, "request": "1e-100000", "by": {"rule": "closed-form", "period": 1}}
        self.assertEqual(Run("--max-work", "5000", self.file("a.mere.json", document(claim))).exit, 3)

    def drawn(self, path, *words):
        return [o["claim"] for o in Run("--json", "--all", *words, path).objects()[:-1]]

    def test_a_sample_is_drawn_without_replacement_and_repeatable(self):
        claims = [member(k) for k in range(9000)]
        for content in (document(*claims), container(claims)):
            path = self.file("a", content)
            run = Run("--json", "--all", "--sample", "500", path)
            *drawn, end = run.objects()
            self.assertEqual((run.exit, end["exit"], end["claims"], end["established"]), (5, 5, 9000, 500))
            positions = [o["claim"] for o in drawn]
            self.assertEqual(positions, sorted(set(positions)))
            self.assertEqual(len(positions), 500)
            self.assertEqual(self.drawn(path, "--sample", "500", "--seed", end["sample"]["seed"]), positions)
            self.assertNotEqual(self.drawn(path, "--sample", "500"), positions)
            self.assertIn("established on a sample only: 500 of 9,000 claims", Run("--sample", "500", path).out)

    def test_the_draw_depends_on_the_claims_and_reaches_each(self):
        few = self.file("few.mere.json", document(*[member(k) for k in range(30)]))
        other = self.file("other.mere.json", document(*[member(k) for k in range(1, 31)]))
        draws = [self.drawn(few, "--sample", "10", "--seed", seed) for seed in range(30)]
        self.assertEqual({k for draw in draws for k in draw}, set(range(30)))
        self.assertNotEqual(draws, [self.drawn(other, "--sample", "10", "--seed", seed) for seed in range(30)])

    def test_a_sample_of_everything_is_no_sample(self):
        claims = [member(k) for k in range(5000)]
        for content in (document(*claims), container(claims)):
            for size in (5000, 2**53):
                run = Run("--sample", size, self.file("a", content))
                self.assertEqual(run.exit, 0)
                self.assertIn("all 5,000 claims established", run.out)

    def test_a_sample_that_fails_or_a_damaged_file_is_no_success(self):
        path = self.file("a.mere", container([near_root(34)] * 5000))
        self.assertEqual(Run("--sample", "3", path).exit, 1)
        claims = [member(k) for k in range(9000)]
        for block in range(3):
            self.assert_fault(Run("--sample", "1", self.file("b.mere", container(claims, block))), 2, f"block {block}")

    def test_a_container_from_a_pipe_cannot_be_sampled(self):
        claims = [member(k) for k in range(30)]
        self.assert_fault(Run("--sample", "3", "-", given=container(claims)), 4, "save it to a file")
        self.assertEqual(Run("--sample", "3", "-", given=document(*claims)).exit, 5)


if __name__ == "__main__":
    unittest.main()

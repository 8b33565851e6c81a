#!/usr/bin/env python3
"""merestone-check --statement: sentences of established claims and of nothing else, exact, in both forms."""

import json
import re
import shutil
import subprocess
import unittest
from decimal import Decimal
from fractions import Fraction

from check_support import (CheckTest, Run, box, container, disc, document, dyadic, member, misiurewicz, near, near_root,
                           nucleus)

MINUS_I = {"claim": "member", "region": {"point": ["0", "-1"]}, "request": "-i",
           "by": {"rule": "preperiodic", "preperiod": 2, "period": 2}}
ESCAPES = {"rule": "escape", "index": 2, "bits": 64}  # |z_2| > 2 where 1 <= Re c, Im c <= 9/8: |c + 1| |c| > 3
EXTERIOR = {"rule": "exterior-disc", "centre": ["0x1p0", "0x1p0"], "index": 6, "bits": 128}
SEGMENT = {"claim": "member", "region": {"segment": ["-0x1p1", "0x1p-2"]}, "by": {"rule": "real-segment"}}
OUTSIDE = {"claim": "outside", "region": {"point": ["-3/4", "1/10"]}, "by": {"rule": "escape", "index": 33, "bits": 64}}

# The real nucleus of period 3: a root of c^3 + 2c^2 + c + 1 (OEIS A109134 negated, verified).
PERIOD_3 = nucleus(3, disc(near("-1.7548776662466927600495"), 0, Fraction(1, 2**40)))
# c = i, z_2 = z_4 = -1 + i, and c = -2, z_2 = z_3 = 2: exact.
AT_I = misiurewicz(2, 2, disc(0, 1, Fraction(1, 2**20)), request="disc 0.0001+i 0.001")
AT_MINUS_2 = misiurewicz(2, 1, disc(-2, 0, Fraction(1, 2**20)))
# A root of c^3 + 2c^2 + 2c + 2 (OEIS A256099 negated, verified): z_3 is a fixed point.
PREPERIOD_3 = misiurewicz(3, 1, disc(near("-1.54368901269207636157"), 0, Fraction(1, 2**40)))

STRADDLES_I = {"claim": "straddles", "region": box(-1, 1, 7, 9, 8), "request": "box -0.2+0.8i 0.2+1.2i",
               "by": {"rule": "witnesses", "witnesses": [{k: v for k, v in AT_I.items() if k != "request"}]}}
STRADDLES_NECK = {
    "claim": "straddles", "region": box(-8, -4, 0, 1, 8),
    "by": {"rule": "witnesses", "witnesses": [OUTSIDE, {"claim": "member", "region": {"point": ["-3/4", "0"]},
                                                        "by": {"rule": "closed-form", "period": 1}}]}}
QUARTERS = {"claim": "outside", "region": box(8, 9, 8, 9, 8), "request": "box 1.01+1.01i 1.1+1.1i",
            "by": {"rule": "quarters", "quarters": [ESCAPES, ESCAPES, EXTERIOR, ESCAPES]}}
IN_COMPONENT = {"claim": "inside", "region": {"disc": disc(-1, 0, Fraction(1, 16))},
                "by": {"rule": "interior-disc", "centre": ["-0x1p0", "0x0p0"], "period": 2,
                       "disc": disc(0, 0, Fraction(1, 1024)), "bits": 64}}
IN_PERIOD_2 = {"claim": "inside", "region": {"disc": disc(-1, 0, Fraction(1, 16))}, "request": "-1.01",
               "by": {"rule": "attracting-disc", "period": 2, "disc": disc(0, 0, Fraction(1, 4)), "bits": 64}}
AROUND_1 = {"claim": "outside", "region": {"disc": disc(1, 1, Fraction(1, 4))}, "by": EXTERIOR}

EVERY_KIND = [
    (near_root(request="-0.75+0.1i"), "For the parameter c = -3/4 + 1/10 i the first n >= 1 with |z_n| > 2 is n = 33",
     "This parameter was typed as \"-0.75+0.1i\"", "show |z_32| <= 2 and |z_33| > 2", "Lemmas E1, E2 of"),
    (OUTSIDE, "The parameter c = -3/4 + 1/10 i lies outside the Mandelbrot set. Proof: enclosures", "show |z_33| > 2"),
    (MINUS_I, "The parameter c = -i belongs to the Mandelbrot set.", "typed as \"-i\"", "z_4 = z_2 in exact arithmetic",
     "Lemma P1 of"),
    (SEGMENT, "Every real parameter c with -2 <= c <= 1/4 belongs to the Mandelbrot set.",
     "the segment from -2 to 1/4"),
    (IN_PERIOD_2, "Every parameter c with |c + 1| <= 1/16 lies in the interior of the Mandelbrot set.",
     "The parameter typed as \"-1.01\" is one of these.", "f_c^2 maps the disc |z| <= 1/4 into its own interior",
     "Schwarz and Pick", "Fatou's theorem (Milnor)"),
    (IN_COMPONENT, "Every parameter c with |c + 1| <= 1/16 lies in the interior", "for c = -1 enclosures",
     "(Douady and Hubbard 1984-85; Milnor)", "Bieberbach's theorem"),
    (AROUND_1, "Every parameter c with |c - (1 + i)| <= 1/4 lies outside the Mandelbrot set.",
     "Bieberbach's theorem on the second coefficient of univalent functions (Bieberbach 1916; Duren 1983)",
     "(Douady and Hubbard 1982)", "takes the value 1 + i", "from z_6 and its first two derivatives"),
    (QUARTERS, "Every parameter c with 1 <= Re c <= 9/8 and 1 <= Im c <= 9/8 lies outside the Mandelbrot set.",
     "The region typed as \"box 1.01+1.01i 1.1+1.1i\" lies within", "cut into 4 closed boxes", "with 1/2 of its sides",
     "on 3 of them by enclosures of the critical orbit", "on 1 of them by discs that Bieberbach's theorem"),
    (STRADDLES_I, "The closed box -1/8 <= Re c <= 1/8 and 7/8 <= Im c <= 9/8 meets the boundary of the Mandelbrot set.",
     "The region typed as \"box -0.2+0.8i 0.2+1.2i\" contains this one and therefore meets this boundary, too.",
     "a Misiurewicz point is on the boundary of the Mandelbrot set (Milnor)"),
    (STRADDLES_NECK, "The closed box -1 <= Re c <= -1/2 and 0 <= Im c <= 1/8 meets the boundary",
     "the parameter c = -3/4 + 1/10 i lies outside", "and the parameter c = -3/4 belongs to", "both lie in the region"),
    (PERIOD_3, "2^-60| <= 2^-40 is a nucleus of period 3: the critical point 0 is periodic, and its period is exactly",
     "Exactly one parameter c with |c + ", "This parameter is real", "Rouch\u00e9's theorem", "the equation z_3 = 0",
     "moreover z_1 != 0"),
    (AT_I, "Exactly one parameter c with |c - i| <= 2^-20 is a Misiurewicz point of preperiod 2 and period 2: z_2 is "
     "the first", "contains this one and therefore contains at least one such parameter.", "z_3 + z_1 = 0",
     "z_1 != 0, z_3 != z_2"),
    (AT_MINUS_2, "|c + 2| <= 2^-20 is a Misiurewicz point of preperiod 2 and period 1:", "z_2 + z_1 = 0"),
    (PREPERIOD_3, "is a Misiurewicz point of preperiod 3 and period 1:", "z_3 + z_2 = 0", "moreover z_2 != 0,"),
]
CLAIMS = [claim for claim, *_ in EVERY_KIND]


def paragraphs(text):
    """What stands between the definitions and the sources."""
    return [p for p in text.split("\n\n") if "claims-digest" in p]


def literals(text):
    """The decimal intervals of a sentence, as pairs of fractions."""
    plain = re.sub(r"\\allowbreak ", "", text)
    plain = re.sub(r"\\cdot 10\^\{(-?\d+)\}", r"e\1", plain)
    return [(Fraction(Decimal(a)), Fraction(Decimal(b))) for a, b in re.findall(r"\[(-?\d[^],]*), ?([^],]+)\]", plain)]


class StatementTest(CheckTest):
    def statement(self, form, *claims):
        return Run("--statement", form, self.file("a.mere.json", document(*claims)))

    def assert_sound_tex(self, text):
        """Braces and dollars are in pairs, no character needs an encoding, nothing special stands bare in the text."""
        lines = "\n".join(line for line in text.splitlines() if not line.startswith("%"))
        bare = re.sub(r"\\[{}$&#%_]", "", lines)
        depth = 0
        for c in bare:
            depth += {"{": 1, "}": -1}.get(c, 0)
            self.assertGreaterEqual(depth, 0)
        self.assertEqual(depth, 0)
        pieces = bare.split("$")
        self.assertEqual(len(pieces) % 2, 1)
        for outside in pieces[::2]:
            self.assertNotRegex(re.sub(r"polyn\\\^omes", "", outside), r"[&#%_^~](?!\\cite)")
        self.assertTrue(text.isascii())
        keys = {key for group in re.findall(r"\\cite\{([^}]*)\}", text) for key in group.split(",")}
        self.assertEqual(keys, set(re.findall(r"\\bibitem\{([^}]*)\}", text)))


class Sentences(StatementTest):
    def test_every_kind_of_claim_as_text(self):
        run = self.statement("text", *CLAIMS)
        self.assertEqual((run.exit, run.err), (0, ""))
        found = paragraphs(run.out)
        self.assertEqual(len(found), len(EVERY_KIND))
        digests = {re.search(r"claims-digest ([0-9a-f]{64}),", p).group(1) for p in found}
        path = self.file("b.mere.json", document(*CLAIMS))
        self.assertEqual(digests, {Run("--json", path).objects()[-1]["claims_digest"]})
        for position, (paragraph, (_, *parts)) in enumerate(zip(found, EVERY_KIND)):
            for part in parts:
                self.assertIn(part, paragraph)
            self.assertIn(f"claim {position};", paragraph)
            self.assertEqual(paragraph.count("\n"), 0)

    def test_every_kind_of_claim_as_tex(self):
        run = self.statement("tex", *CLAIMS)
        self.assertEqual((run.exit, run.err), (0, ""))
        self.assertEqual(len(paragraphs(run.out)), len(EVERY_KIND))
        self.assert_sound_tex(run.out)
        for part in ("$c = -\\frac{3}{4} + \\frac{1}{10}\\,i$", "$|z_{32}| \\le 2$", "$|c - i| \\le 2^{-20}$",
                     "$1 \\le \\mathrm{Re}\\,c \\le \\frac{9}{8}$", "\\texttt{box -0.2+0.8i 0.2+1.2i}", "Rouch\\'e"):
            self.assertIn(part, run.out)
        for claim in CLAIMS:
            self.assert_sound_tex(self.statement("tex", claim).out)

    def test_sources_are_those_cited_and_stand_once(self):
        path = self.file("a.mere.json", document(OUTSIDE))
        run = Run("--statement", "text", path, path)
        self.assertEqual(run.out.count("Here f_c(z)"), 1)
        self.assertTrue(run.out.endswith("Sources\n  F. Johansson, Arb: efficient arbitrary-precision midpoint-radius "
                                         "interval arithmetic, IEEE Trans. Computers 66, 2017.\n"), run.out)
        self.assertNotIn("Sources", self.statement("text", SEGMENT).out)

    def test_a_lemma_is_named_once(self):
        inside = {"claim": "inside", "region": {"point": ["-1", "0"]}, "by": IN_PERIOD_2["by"]}  # I1, E2
        claim = {**STRADDLES_NECK, "by": {"rule": "witnesses", "witnesses": [OUTSIDE, inside]}}
        self.assertIn("; Lemmas P3, E1, E2, I1 of merestone;", self.statement("text", claim).out)

    def test_numbers_are_those_claimed(self):
        """The spelled numbers against exact rationals from the published digits."""
        centre = near("-1.7548776662466927600495")
        text = self.statement("text", PERIOD_3).out
        mantissa, exponent = re.search(r"\|c \+ (\d+)\*2\^(-\d+)\| <= 2\^-40", text).groups()
        self.assertEqual(int(mantissa) * Fraction(2) ** int(exponent), -centre)
        tex = self.statement("tex", PERIOD_3).out
        self.assertIn(f"|c + {mantissa}\\cdot 2^{{{exponent}}}| \\le 2^{{-40}}", tex)
        root = Fraction(Decimal("-1.7548776662466927600495"))
        for form in (text, tex):
            (lower, upper), = literals(form)
            self.assertTrue(lower <= centre - Fraction(1, 2**40) < root < centre + Fraction(1, 2**40) <= upper)
            self.assertLess(upper - lower, Fraction(3, 2**40))

    def test_a_file_name_is_escaped(self):
        path = self.file("50%_{of}#all$.mere.json", document(OUTSIDE))
        run = Run("--statement", "tex", path)
        self.assertIn(r"\texttt{50\%\_\{of\}\#all\$.mere.json}", run.out)
        self.assert_sound_tex(run.out)
        run = Run("--statement", "tex", "-", given=document(OUTSIDE))
        self.assertIn("(merestone certificate, claims-digest", run.out)

    @unittest.skipUnless(shutil.which("pdflatex"), "pdflatex is not here")
    def test_it_compiles(self):
        tex = self.statement("tex", *CLAIMS).out
        self.file("paper.tex", ("\\documentclass{article}\\begin{document}\n" + tex + "\\end{document}\n").encode())
        for _ in range(2):
            done = subprocess.run(["pdflatex", "-interaction=nonstopmode", "-halt-on-error", "paper.tex"],
                                  cwd=self.folder, capture_output=True, timeout=120, check=False)
            self.assertEqual(done.returncode, 0, done.stdout[-2000:])
        self.assertNotIn(b"undefined references", done.stdout)


class OnlyEstablished(StatementTest):
    def refuted(self):
        """For each claim one that is false or proved wrongly, by one hint or key changed."""
        wrong = [near_root(34), {**OUTSIDE, "by": {**OUTSIDE["by"], "index": 32}},
                 {**MINUS_I, "region": {"point": ["0", "1/2"]}, "request": "i/2"}, {**SEGMENT, "request": "0.3"},
                 {**SEGMENT, "region": {"segment": ["-0x1p1", "0x1p-1"]}}, {**PERIOD_3, "period": 4},
                 {**AT_I, "period": 1}, {**AT_I, "preperiod": 3}, {**AT_I, "request": "disc 5 1"},
                 {**AT_MINUS_2, "preperiod": 3}, {**STRADDLES_I, "request": "box -0.1+0.8i 0.2+1.2i"},
                 {**STRADDLES_I, "region": box(-1, 1, 4, 6, 8)}]
        neck = json.loads(json.dumps(STRADDLES_NECK))
        neck["by"]["witnesses"][0]["by"]["index"] = 32
        quarters = json.loads(json.dumps(QUARTERS))
        quarters["by"]["quarters"][3]["index"] = 1
        return wrong + [neck, quarters]

    def test_a_refuted_claim_yields_no_sentence(self):
        for claim in self.refuted():
            for form in ("text", "tex"):
                with self.subTest(claim=claim, form=form):
                    run = self.statement(form, claim)
                    self.assertEqual(run.out, "")
                    self.assert_fault(run, 1, "a.mere.json: claim 0 not established")

    def test_of_a_mixed_file_only_the_others(self):
        wrong = self.refuted()
        mixed = [claim for pair in zip(wrong, CLAIMS) for claim in pair]
        run = self.statement("text", *mixed)
        self.assertEqual(run.exit, 1)
        positions = [int(p) for p in re.findall(r", claim (\d+); Lemma", run.out)]
        self.assertEqual(positions, list(range(1, len(mixed), 2)))
        self.assertEqual([int(p) for p in re.findall(r"claim (\d+) not established", run.err)],
                         list(range(0, len(mixed), 2)))

    def test_refusals_and_samples_keep_their_exit_codes(self):
        path = self.file("a.mere.json", document(OUTSIDE, near_root(by={"rule": "escape", "bits": 1000})))
        run = Run("--statement", "text", "--max-bits", "999", path)
        self.assertEqual((run.exit, len(paragraphs(run.out))), (3, 1))
        self.assertIn("claim 1 refused", run.err)
        run = Run("--statement", "text", "--sample", "1", path)
        self.assertEqual((run.exit, len(paragraphs(run.out))), (5, 1))

    def test_nothing_is_quoted_from_a_damaged_file(self):
        path = self.file("a.mere", container([member(k) for k in range(9000)], damaged_block=2))
        run = Run("--statement", "text", path)
        self.assertEqual(run.out, "")
        self.assert_fault(run, 2, "block 2")

    def test_more_failures_than_are_named_are_counted(self):
        run = self.statement("text", *[near_root(34)] * 25, OUTSIDE)
        self.assertEqual((run.exit, len(paragraphs(run.out)), run.err.count(" not established (")), (1, 1, 20))
        self.assertIn("a.mere.json: ... and 5 more; --json lists all\n", run.err)

    def test_many_claims_of_a_container(self):
        run = Run("--statement", "tex", self.file("a.mere", container([member(k) for k in range(5000)])))
        self.assertEqual((run.exit, len(paragraphs(run.out))), (0, 5000))
        run = Run("--statement", "tex", self.file("a.mere", container([member(k) for k in range(10001)])))
        self.assertEqual(run.out, "")
        self.assert_fault(run, 2, "more than 10,000 claims", "--sample")

    def test_words_that_do_not_go_together(self):
        path = self.file("a.mere.json", document(OUTSIDE))
        for words in (["text", "--json"], ["tex", "--quiet"], ["text", "--all"], ["latex"], ["0"]):
            run = Run("--statement", *words, path)
            self.assert_fault(run, 2, "--statement", words[-1], "'merestone-check --help' explains")
            self.assertEqual(run.out, "")


class LongNumbers(StatementTest):
    def test_a_long_number_is_enclosed_and_the_sentence_says_so(self):
        tiny = "1/1" + "0" * 5000
        claim = {"claim": "inside", "region": {"point": [tiny, f"-{tiny}"]}, "request": "1e-5000-1e-5000i",
                 "by": {"rule": "closed-form", "period": 1}}
        for form in ("text", "tex"):
            run = self.statement(form, claim)
            self.assertEqual(run.exit, 0)
            self.assertIn("stands in the certificate exactly; it lies between the decimals", run.out)
            self.assertLess(len(run.out), 3000)
            found = literals(run.out)
            self.assertEqual(len(found), 2)
            for lower, upper in found:
                self.assertTrue(lower < Fraction(1, 10**5000) < upper < lower * (1 + Fraction(1, 10**20)))
        self.assert_sound_tex(run.out)

    def test_a_few_hundred_digits_are_exact_and_may_be_broken(self):
        centre = -1 + Fraction(3**300, 2**600)  # a numerator of 181 digits, within 2^-124 of -1
        claim = {"claim": "inside", "region": {"disc": disc(centre, 0, Fraction(1, 2**700))}, "by": IN_PERIOD_2["by"]}
        tex = self.statement("tex", claim).out
        self.assert_sound_tex(tex)
        self.assertLess(max(map(len, re.findall(r"\d+", tex))), 21)
        for text, times in ((self.statement("text", claim).out, "*2^-600"), (tex, "\\cdot 2^{-600}")):
            digits = re.search(r"\|c \+ ([^*]*)" + re.escape(times), text.replace("\\allowbreak ", "")).group(1)
            self.assertEqual(Fraction(int(digits), 2**600), -centre)
            (lower, upper), *_ = literals(text)
            self.assertTrue(lower <= centre <= upper)

    def test_hostile_exponents_and_requests(self):
        region = {"disc": disc(-1 + Fraction(1, 2**99999), 0, Fraction(1, 2**100000))}
        run = self.statement("text", {"claim": "inside", "region": region, "by": IN_PERIOD_2["by"]})
        self.assertEqual(run.exit, 0, run.err)
        self.assertIn("| <= 2^-100000 lies in the interior", run.out)
        self.assertLess(len(run.out), 3000)
        run = self.statement("tex", {**IN_PERIOD_2, "request": "-1." + "0" * 50000 + "1"})
        self.assertIn("The parameter typed in the certificate is one of these.", run.out)
        self.assertLess(len(run.out), 3000)

    def test_no_number_is_written_too_long_for_a_line_of_tex(self):
        claim = nucleus(1, disc(0, 0, Fraction(1, 2**30000)), bits=64)
        run = self.statement("tex", claim)
        self.assertEqual(run.exit, 0, run.err)
        self.assert_sound_tex(run.out)
        self.assertIn("$|c| \\le 2^{-30000}$ is a nucleus of period 1", run.out)
        self.assertEqual(dyadic(Fraction(1, 2**30000)), "0x1p-30000")


if __name__ == "__main__":
    unittest.main()

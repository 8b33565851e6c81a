"""Area certificates that are damaged, forged or assembled wrongly: merestone-check says what is the matter, each in its
own words, and never accepts a bound that the blocks do not prove. Each begins with a certificate that merestone wrote,
taken apart and put together again from docs/certificate-format.md with every length, CRC and digest in order."""

import os
import random
import sys
import unittest
from dataclasses import replace
from fractions import Fraction
from pathlib import Path

sys.path.insert(0, str(Path(__file__).parent))
from area_support import (AREA_LOWER, AREA_UPPER, ESTABLISHED, IN_PART, MALFORMED, OVER_LIMIT, REFUTED,  # noqa: E402
                          Area, Cover, FaultCase, check, dyadic, entries_of, exact, marks_of, tree_of,
                          verdict)

MERESTONE = os.environ["MERESTONE"]
CHECK = os.environ["MERESTONE_CHECK"]
ULP = Fraction(1, 2**60)  # far below the width of a fine cell


class Rebuilding(FaultCase):
    def test_what_was_taken_apart_is_put_together_again(self):
        found, code = self.run_on(self.good.bytes())
        self.assertEqual((code, found["claims_digest"]), (ESTABLISHED, self.run_on(self.data)[0]["claims_digest"]))
        for i in range(self.list):
            cover = Cover.of(self.good.blocks[i][1])
            self.assertEqual(cover.block(), self.good.blocks[i])
            self.assertEqual(tree_of(marks_of(cover.outside)), cover.outside)

    def test_each_half_stands_alone(self):
        cover = {key: value for key, value in self.good.header.items() if key != "at-least"}
        found, code = self.run_on(Area(cover, self.good.blocks[: self.list]).bytes())
        self.assertEqual((code, "computed_at_least" in found), (ESTABLISHED, False))
        lower = {key: value for key, value in self.good.header.items() if key not in ("cover", "at-most")}
        found, code = self.run_on(Area(lower, self.good.blocks[self.list :]).bytes())
        self.assertEqual((code, "computed_at_most" in found), (ESTABLISHED, False))


class Damage(FaultCase):
    def test_truncated_anywhere(self):
        for size in sorted({*range(0, len(self.data), 61), 13, 14, 18, len(self.data) - 1, len(self.data) - 4}):
            path = self.folder / "cut.mere"
            path.write_bytes(self.data[:size])
            done = check("--quiet", path)
            self.assertEqual((done.returncode, done.stderr.count("\n")), (MALFORMED, 1), (size, done.stderr))
            self.assertRegex(done.stderr, f"cut.mere: .*: the file ends at byte {size}; it was cut short"
                             if size else "cut.mere: it is empty")

    def test_bits_flipped_anywhere(self):
        """In the header a flip may leave a weaker claim, or other provenance; else nothing but an error comes of it."""
        source, header_ends = random.Random(20261201), self.data.index(b"BLK\n")
        good = self.run_on(self.data)[0]
        for at in source.sample(range(header_ends, len(self.data)), 40) + source.sample(range(header_ends), 20):
            data = bytearray(self.data)
            data[at] ^= 1 << source.randrange(8)
            path = self.folder / "flipped.mere"
            path.write_bytes(data)
            done = check("--json", path)
            if done.returncode != ESTABLISHED:
                self.assertIn(done.returncode, (REFUTED, MALFORMED), (at, done.stderr))
                continue
            self.assertLess(at, header_ends)
            found = verdict(path)[0]
            self.assertGreaterEqual(exact(found["at_most"]), exact(good["computed_at_most"]))
            self.assertLessEqual(exact(found["at_least"]), exact(good["computed_at_least"]))

    def test_surplus_bytes(self):
        self.assertRefused(self.data + b"\0", MALFORMED, "end")
        self.assertRefused(self.data + self.data, MALFORMED, "end")
        entries, payload = self.good.blocks[self.block]
        self.assertRefused(self.good.with_block(self.block, (entries, payload + b"\0")), MALFORMED,
                           f"block {self.block}",
                           "1 bytes follow")
        tree = Cover.of(payload).outside + b"\x01"
        surplus = replace(Cover.of(payload), outside=tree).payload()
        self.assertRefused(self.good.with_block(self.block, (entries, surplus)), MALFORMED, f"block {self.block}",
                           "outside tree")
        entries, payload = self.good.blocks[self.list]
        self.assertRefused(self.good.with_block(self.list, (entries, payload + b"\0")), MALFORMED, f"block {self.list}",
                           "component is not whole")

    def test_index_and_entries(self):
        at = self.data.index(b"IDX\n")
        for offset, fragment in ((4, "index"), (12, "index"), (20, "index"), (28, "index"), (-12, "end")):
            data = bytearray(self.data)
            data[at + offset if offset > 0 else offset] ^= 1
            self.assertRefused(bytes(data), MALFORMED, fragment)
        entries, payload = self.good.blocks[self.block]
        self.assertRefused(self.good.with_block(self.block, (entries + 1, payload)), MALFORMED, f"block {self.block}",
                           "entries")

    def test_payloads_altered_and_every_digest_mended(self):
        """Whatever is accepted then is true: the bounds lie about the published estimate, as they must."""
        source, codes = random.Random(1), set()
        for _ in range(60):
            i = source.randrange(len(self.good.blocks))
            entries, payload = self.good.blocks[i]
            payload = bytearray(payload)
            payload[source.randrange(1, len(payload))] ^= 1 << source.randrange(8)
            forged = self.good.with_block(i, (entries_of(bytes(payload), entries), bytes(payload)))
            forged = forged.with_key("at-most", "0x1p4").with_key("at-least", "0x0p0")
            found, code = self.run_on(forged.bytes())
            codes.add(code)
            self.assertIn(code, (ESTABLISHED, REFUTED, MALFORMED, OVER_LIMIT))
            if code == ESTABLISHED:
                self.assertGreaterEqual(exact(found["computed_at_most"]), AREA_LOWER)
                self.assertLessEqual(exact(found["computed_at_least"]), AREA_UPPER)
        self.assertLessEqual({ESTABLISHED, REFUTED, MALFORMED}, codes)


class Order(FaultCase):
    def order(self, *moved):
        return self.good.with_order(moved)

    def test_blocks_swapped(self):
        self.assertRefused(self.order(0, 2, 1, 3, 4, 5), MALFORMED, "block 2",
                           "does not come after that of the block before it")

    def test_squares_swapped(self):
        """Each block says that it is of the other's square; the marks do not hold there."""
        one, other = (Cover.of(self.good.blocks[i][1]) for i in (1, 3))
        place = lambda cover: {"column": cover.column, "row": cover.row}  # noqa: E731
        forged = self.good.with_block(1, replace(other, **place(one)).block())
        forged = forged.with_block(3, replace(one, **place(other)).block())
        self.assertRefused(forged, REFUTED, "block 1", "outside mark")

    def test_a_block_removed(self):
        for i in (1, 2, 3, 4):
            rest = self.order(*(k for k in range(6) if k != i))
            self.assertRefused(rest, REFUTED, "is not decided, and there is no block of it")

    def test_a_block_repeated(self):
        self.assertRefused(self.order(0, 1, 1, 2, 3, 4, 5), MALFORMED, "block 2",
                           "does not come after that of the block before it")
        self.assertRefused(self.order(0, 1, 2, 3, 4, 5, 5), MALFORMED, "block 6",
                           "follows a block of them that is not full")
        self.assertRefused(self.order(0, 0, 1, 2, 3, 4, 5), MALFORMED, "block 1", "one trunk at most")

    def test_components_before_the_cover(self):
        self.assertRefused(self.order(0, 5, 1, 2, 3, 4), MALFORMED, "block 2", "blocks of the cover come first")
        self.assertRefused(self.order(5, 0, 1, 2, 3, 4), MALFORMED, "block 0", "the trunk should come before it")
        self.assertRefused(self.order(1, 0, 2, 3, 4, 5), MALFORMED, "block 0", "the trunk should come before it")

    def test_no_trunk_or_nothing_but_the_trunk(self):
        self.assertRefused(self.order(1, 2, 3, 4, 5), MALFORMED, "block 0", "the trunk should come before it")
        self.assertRefused(self.order(5), MALFORMED, "block 0", "the trunk should come before it")
        self.assertRefused(self.order(0, 5), REFUTED, "is not decided, and there is no block of it")

    def test_a_block_outside_the_root(self):
        self.assertRefused(self.changed(4, column=2), MALFORMED, "block 4", "outside the root")


class Header(FaultCase):
    def root(self, re="-0x1p1", im="0x0p0", side="0x1p2"):
        return self.good.with_cover(root={"corner": [re, im], "side": side})

    def test_a_root_that_does_not_cover_M(self):
        needed = "does not contain the upper half of |c| <= 2"
        for forged in (self.root(re="-0x11p-3"), self.root(re="-0xfp-3"), self.root(side="0x1p1"),
                       self.root(side="0x1p0"),
                       self.root(re="0x0p0"), self.root(re="-0x1fffffffffffffp-52")):
            self.assertRefused(forged, REFUTED, "block 0", needed)
        self.assertRefused(self.root(im="0x1p-20"), MALFORMED, "a mirrored cover stands upon the real axis")
        self.assertRefused(self.root(im="-0x1p0"), MALFORMED, "a mirrored cover stands upon the real axis")

    def test_a_larger_root_that_covers_M_puts_the_marks_elsewhere(self):
        self.assertRefused(self.root(re="-0x1p2", side="0x1p3"), REFUTED,
                           "at-most: the blocks prove a larger bound only")

    def test_not_mirrored(self):
        self.assertRefused(self.good.with_cover(mirrored=False), REFUTED, "block 0", "does not contain all of |c| <= 2")

    def test_a_box_named_afterwards(self):
        box = {"re": ["-1/2", "1/2"], "im": ["1/4", "1/2"]}
        self.assertRefused(self.good.with_cover(within=box), REFUTED, "block 0", "that is for all of M")
        box = {"re": ["-1/2", "1/2"], "im": ["-1/4", "1/2"]}
        self.assertRefused(self.good.with_cover(within=box, mirrored=False), REFUTED, "block 0",
                           "does not contain the box")

    def test_other_rules(self):
        """Discs mark cells that do not escape as a whole."""
        self.assertRefused(self.good.with_cover(rules="elementary"), REFUTED, "outside mark")
        self.assertRefused(self.good.with_cover(rules="most"), MALFORMED, "/cover/rules")

    def test_trunk_grade(self):
        self.assertRefused(self.good.with_cover(**{"trunk-grade": 2}), MALFORMED, "block 0", "the trunk's grade is 1")
        self.assertRefused(self.changed(self.trunk, grade=0), MALFORMED, "block 0", "the trunk's grade is 0")

    def test_bounds_better_than_proved(self):
        found = self.run_on(self.data)[0]
        for key, move in (("at-most", -ULP), ("at-least", ULP)):
            proved = exact(found["computed_" + key.replace("-", "_")])
            word = {"at-most": "larger", "at-least": "smaller"}[key]
            self.assertRefused(self.good.with_key(key, dyadic(proved + move)), REFUTED,
                               f"{key}: the blocks prove a {word} bound only")
            self.assertEqual(self.run_on(self.good.with_key(key, dyadic(proved)).bytes())[1], ESTABLISHED)
        self.assertRefused(self.good.with_key("at-most", "-0x1p0"), MALFORMED, "/at-most", "not negative")

    def test_keys_left_out(self):
        for key, fragment in (("at-most", "the key 'at-most' is missing"),
                              ("at-least", "the key 'at-least' is missing"),
                              ("cover", "an upper bound rests on a cover")):
            header = {name: value for name, value in self.good.header.items() if name != key}
            self.assertRefused(replace(self.good, header=header), MALFORMED, fragment)


class Absent(FaultCase):
    def test_it_says_which_blocks_it_did_not_see(self):
        for missing, named in (((1,), "namely 1\n"), ((1, 2, 3, 4), "namely 1 to 4\n"),
                               ((1, 2, 4), "namely 1 to 2, 4\n")):
            path = self.folder / "outline.mere"
            path.write_bytes(self.good.bytes(missing))
            done = check("--quiet", path)
            self.assertEqual((done.returncode, done.stderr.count("\n")), (IN_PART, 1))
            self.assertTrue(done.stderr.endswith(named), done.stderr)
            found, code = verdict(path)
            self.assertEqual((code, found["absent"], found["exit"]), (IN_PART, len(missing), IN_PART))
            self.assertIn(named.removeprefix("namely ").strip(), check(path).stdout)

    def test_absent_blocks_prove_nothing(self):
        """A block that is absent and claims to leave nothing; then its claim would be a bound below the truth."""
        cells = 4 ** Cover.of(self.good.blocks[1][1]).grade
        forged = self.changed(1, cells=(cells, 0)).with_key("at-most", "0x1p0")
        self.assertEqual(self.run_on(forged.bytes(missing=(1, 2, 3, 4)))[1], IN_PART)
        forged = forged.with_key("at-most", self.good.header["at-most"])
        self.assertEqual(self.run_on(forged.bytes(missing=(1,)))[1], IN_PART)
        self.assertRefused(forged, REFUTED, "fine cells are claimed to be outside")

    def test_their_figures_are_part_of_the_sum(self):
        forged = self.changed(1, cells=(0, 0))
        self.assertRefused(forged.bytes(missing=(1,)), REFUTED, "at-most: the blocks prove a larger bound only")


if __name__ == "__main__":
    unittest.main()

#!/usr/bin/env python3
"""merestone-check on damaged and hostile files: one line, the designed exit code, no crash, no hang."""

import json
import os
import pathlib
import random
import resource
import subprocess
import unittest

from check_support import CHECK, CheckTest, Run, container, container_digest, costly, document, member, near_root

SANITIZED = any(mark in pathlib.Path(CHECK).read_bytes() for mark in (b"__asan_init", b"__tsan_init"))


class Damaged(CheckTest):
    def test_a_container_cut_anywhere_is_malformed(self):
        whole = container([near_root(), member(1)])
        for length in range(1, len(whole)):
            run = Run("--json", "-", given=whole[:length])
            self.assertEqual(run.exit, 2, length)
            self.assertEqual([o["fault"] for o in run.objects() if "fault" in o], ["malformed"], length)

    def test_no_changed_bit_changes_a_claim(self):
        """A bit of a deflated stream may be padding: then the claims are the same, by their digest."""
        claims = [near_root(), member(1)]
        whole, rejected = container(claims), 0
        for position in random.Random(20240229).sample(range(len(whole)), 150):
            changed = bytearray(whole)
            changed[position] ^= 1 << (position % 8)
            end = Run("--json", "-", given=bytes(changed)).objects()[-1]
            rejected += end["exit"] == 2
            self.assertTrue(end["exit"] == 2 or end.get("claims_digest") == container_digest(claims), (position, end))
        self.assertGreater(rejected, 140)

    def test_damage_after_good_blocks_is_named_last(self):
        claims = [member(k) for k in range(9000)]
        claims[5] = near_root(34)
        path = self.file("a.mere", container(claims, damaged_block=1))
        run = Run("--json", path)
        failed, end = run.objects()
        self.assertEqual((failed["claim"], failed["outcome"]), (5, "not established"))
        self.assertEqual((end["fault"], end["exit"], run.exit), ("malformed", 2, 2))
        self.assertIn("block 1", end["message"])
        run = Run("--all", path)
        self.assert_fault(run, 2, "block 1")
        self.assertIn("\nClaim 4095: established\n", run.out)
        self.assertNotIn("\nClaim 4096:", run.out)
        self.assertTrue(run.out.endswith("a.mere: no verdict, the certificate is malformed or damaged\n"))


class Hostile(CheckTest):
    def test_files_that_are_no_certificates(self):
        random_bytes = random.Random(7).randbytes
        cases = {
            "empty": b"",
            "garbage": random_bytes(100_000_000),
            "zeros": bytes(100_000_000),
            "garbage_like_a_container": b"\x93merestone\r\n\x1a\n" + random_bytes(1_000_000),
            "deep": b"[" * 10_000_000,
            "deep_in_provenance": b'{"provenance":' + b'{"a":' * 10_000,
            "many_values": b'{"claims":[' + b"0," * 30_000_000,
            "long_key": b'{"' + b"k" * 50_000_000 + b'":0}',
            "long_number": b'{"version":' + b"9" * 50_000_000 + b"}",
            "escape_sequences": b'{"format":"\x1b[2J\\u001b]0;x\x07"}',
        }
        for name, content in cases.items():
            with self.subTest(name):
                run = Run(self.file(name, content))
                self.assert_fault(run, 2, name)
                self.assertLess(len(run.err), 1000)
                self.assertTrue(run.err.rstrip("\n").isprintable(), run.err)

    def test_paths_that_cannot_be_read(self):
        self.assert_fault(Run(self.folder), 4, self.folder, "folder")
        self.assert_fault(Run(self.folder / "missing"), 4, "missing")
        self.assert_fault(Run(self.file("a", b"x") / "b"), 4)
        self.assert_fault(Run("/proc/self/mem"), 4, "/proc/self/mem")
        self.assert_fault(Run(""), 4)
        locked = self.file("locked", document(near_root()))
        locked.chmod(0)
        if not os.access(locked, os.R_OK):
            self.assert_fault(Run(locked), 4, "locked")

    def test_standard_input_that_is_closed(self):
        done = subprocess.run(["bash", "-c", f"'{CHECK}' - <&-"], capture_output=True, timeout=60, check=False)
        self.assertEqual((done.returncode, done.stderr.count(b"\n")), (4, 1))

    def test_a_name_does_not_reach_the_terminal_as_it_stands(self):
        path = self.file("a\x1b[2J\n.mere.json", document(near_root()))
        run = Run(path)
        self.assertEqual(run.exit, 0)
        self.assertNotIn("\x1b", run.out)
        self.assertIn("a?[2J?.mere.json: its one claim established\n", run.out)
        self.assertEqual(Run("--json", path).objects()[-1]["file"], str(path))
        odd = os.fsencode(self.folder) + b"/\xff.mere.json"
        with open(odd, "wb") as file:
            file.write(document(near_root()))
        done = subprocess.run([CHECK, "--json", odd], capture_output=True, timeout=60, check=False)
        self.assertEqual((done.returncode, json.loads(done.stdout.splitlines()[-1])["exit"]), (0, 0))

    def test_absurd_hints_are_refused_at_once(self):
        huge = 2**53 - 1
        claims = [costly(huge), costly(1, bits=2**32 - 1),
                  {"claim": "inside", "region": {"point": ["0", "0"]}, "by": {
                      "rule": "attracting-disc", "period": huge, "bits": 64,
                      "disc": {"centre": ["0x0p0", "0x0p0"], "radius": "0x1p-4"}}}]
        run = Run("--json", self.file("a.mere.json", document(*claims)))
        self.assertEqual([o.get("outcome") for o in run.objects()], ["over the limit"] * 3 + [None])
        self.assertEqual(run.exit, 3)

    @unittest.skipIf(SANITIZED, "sanitizers need address space")
    def test_the_end_of_memory_is_said(self):
        path = self.file("a.mere", container([member(k % 16000) for k in range(40_000)]))

        def within(megabytes, *words):
            limit = (megabytes << 20, megabytes << 20)
            return subprocess.run([CHECK, *words], capture_output=True, timeout=300, check=False,
                                  preexec_fn=lambda: resource.setrlimit(resource.RLIMIT_AS, limit))

        least = next(m for m in range(10, 2000, 5) if within(m, "--version").returncode == 0)
        runs = [within(least + more, "--quiet", path) for more in range(0, 200, 20)]
        for run in runs:  # a thread that cannot start is said otherwise
            self.assertIn((run.returncode, run.stderr.count(b"\n")), ((0, 0), (4, 1)), run.stderr)
        self.assertTrue(any(b"out of memory" in run.stderr for run in runs))

    @unittest.skipIf(SANITIZED, "the address sanitizer keeps what was freed")
    def test_memory_does_not_grow_with_the_container(self):
        """Ten and sixty blocks: no more than 24 MiB between their peaks, though the longer has 12 MB of claims more."""
        peaks = []
        for blocks in (10, 60):
            path = self.file("a.mere", container([member(k % 16000) for k in range(4096 * blocks)]))
            run = f"import resource, subprocess; subprocess.run(['{CHECK}', '--threads', '2', '{path}'], check=True, " \
                  "stdout=subprocess.DEVNULL); print(resource.getrusage(resource.RUSAGE_CHILDREN).ru_maxrss)"
            done = subprocess.run(["/usr/bin/python3", "-c", run], capture_output=True, timeout=300, check=True)
            peaks.append(int(done.stdout))
        self.assertLess(peaks[1] - peaks[0], 24 * 1024, peaks)


if __name__ == "__main__":
    unittest.main()

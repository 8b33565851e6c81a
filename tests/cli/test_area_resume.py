"""merestone area when it is killed, interrupted or its disk is full, and goes on with its journal: the certificate is
the one of an undisturbed run. And outlines, whose blocks are left out."""

import functools
import os
import random
import re
import resource
import signal
import subprocess
import sys
import tempfile
import time
import unittest
from pathlib import Path

sys.path.insert(0, str(Path(__file__).parent))
from area_support import (ESTABLISHED, IN_PART, IO_FAILED, Case, area, bounds, check, verdict)  # noqa: E402

MERESTONE = os.environ["MERESTONE"]
CHECK = os.environ["MERESTONE_CHECK"]

DEPTH, DEEPER = 11, 13  # half a second or two of work
HALF = 12000  # bytes: about half of what a journal of the depth comes to
KILLS = 12
TMPFS = """mount -t tmpfs -o size=16k tmpfs "$1" || exit 77
shift
"$@"
echo "exit $?" >&2
mount -o remount,size=16m "$0" && exec "$@" --resume --json"""


def catches(pid, number):
    """Has the process set a handler for the signal?"""
    status = Path(f"/proc/{pid}/status").read_text()
    return int(re.search(r"^SigCgt:\s*([0-9a-f]+)$", status, re.M).group(1), 16) >> (number - 1) & 1


@functools.cache
def digest_without_a_break(*words, depth=DEPTH):
    with tempfile.TemporaryDirectory() as folder:
        return bounds("--depth", depth, *words, "--out", Path(folder) / "area.mere")[2]["certificate"]["digest"]


class ResumeCase(Case):
    def setUp(self):
        super().setUp()
        self.path = self.folder / "area.mere"
        self.journal = self.folder / "area.mere.journal"

    def words(self, depth=DEPTH, *more):
        return [MERESTONE, "area", "--depth", str(depth), "--out", str(self.path), *more]

    def started(self, *more, depth=DEPTH):
        """A run that has begun its journal and is not done."""
        run = subprocess.Popen(self.words(depth, *more), stdout=subprocess.PIPE, stderr=subprocess.PIPE, text=True)
        self.addCleanup(run.communicate)
        self.addCleanup(run.kill)
        while not self.journal.exists() or self.journal.stat().st_size == 0:
            self.assertIsNone(run.poll(), run.stderr)
            time.sleep(0.002)
        return run

    def killed_at_once(self, *more, depth=DEPTH):
        run = self.started(*more, depth=depth)
        run.kill()
        run.communicate()

    def stopped_short(self, *more, size=HALF):
        """A run whose files may not become larger: that ends it when the journal is so long."""
        def limit():
            signal.signal(signal.SIGXFSZ, signal.SIG_IGN)  # else the kernel ends the program
            resource.setrlimit(resource.RLIMIT_FSIZE, (size, size))

        done = subprocess.run(self.words(DEPTH, *more), capture_output=True, text=True, timeout=120, preexec_fn=limit)
        self.assertEqual((done.returncode, done.stdout), (IO_FAILED, ""), done.stderr)
        self.assertIn("area.mere.journal: writing failed: File too large\n", done.stderr)
        self.assertTrue(self.journal.exists() and not self.path.exists())
        return done

    def assertResumesTo(self, digest, *words, depth=DEPTH):
        answer = bounds("--depth", depth, *words, "--out", self.path, "--resume")[2]
        self.assertEqual(answer["certificate"]["digest"], digest)
        self.assertFalse(self.journal.exists())
        found, code = verdict(self.path)
        self.assertEqual((code, found["claims_digest"]), (ESTABLISHED, digest))
        return answer


class Killed(ResumeCase):
    def test_at_random_moments_many_times(self):
        """The moments are drawn from a seed; where in its work each finds the program is up to the machine."""
        source, kills, resumed = random.Random(4), 0, 0
        digest = digest_without_a_break(depth=DEEPER)
        for _ in range(40 * KILLS):
            more = ["--resume"] if self.journal.exists() else []
            run = subprocess.Popen(self.words(DEEPER, *more), stdout=subprocess.PIPE, stderr=subprocess.PIPE, text=True)
            try:
                run.communicate(timeout=source.uniform(0.02, 0.6))
                self.assertEqual(run.returncode, 0)
                self.assertTrue(self.path.exists() and not self.journal.exists())
            except subprocess.TimeoutExpired:
                run.kill()
                run.communicate()
                kills += 1
                resumed += bool(more)
            if self.path.exists():  # whole, or not at all
                self.assertEqual(verdict(self.path)[0]["claims_digest"], digest)
                self.path.unlink()
            if kills >= KILLS:
                break
        self.assertEqual(kills, KILLS)
        self.assertGreater(resumed, 0)
        if not self.journal.exists():  # the last was killed before it began one
            self.killed_at_once("--threads", "1", depth=DEEPER)
        self.assertResumesTo(digest, depth=DEEPER)
        self.assertEqual(sorted(p.name for p in self.folder.iterdir()), ["area.mere"])

    def test_while_it_begins(self):
        """By kill -9 as soon as the journal is there: the catalogue of components is being made."""
        for words in ([], ["--within", "-0.8", "-0.6+0.2i"], ["--rules", "elementary"]):
            digest = digest_without_a_break(*words)
            self.killed_at_once(*words)
            self.assertResumesTo(digest, *words)
            self.path.unlink()


class StoppedShort(ResumeCase):
    def test_what_was_finished_is_not_done_again(self):
        digest = digest_without_a_break()
        self.assertIn("area.mere.journal; --resume goes on with it", self.stopped_short().stderr)
        answer = self.assertResumesTo(digest)
        self.assertTrue(0 < answer["resumed_blocks"] < answer["blocks"])

    def test_in_a_box_and_by_elementary_rules(self):
        for words in (["--within", "-0.8", "-0.6+0.2i"], ["--rules", "elementary"]):
            digest = digest_without_a_break(*words)
            self.stopped_short(*words)
            self.assertGreater(self.assertResumesTo(digest, *words)["resumed_blocks"], 0)
            self.path.unlink()

    def test_on_other_threads_and_lanes(self):
        digest = digest_without_a_break("--threads", 1)
        self.stopped_short("--threads", "1", "--lanes", "SCALAR")
        self.assertGreater(self.assertResumesTo(digest, "--threads", 2)["resumed_blocks"], 0)

    def test_at_any_size(self):
        """100 bytes are too few for the description of the work, 1,000 for the components."""
        digest = digest_without_a_break()
        for size in (0, 100, 1000, 5000, HALF):
            self.stopped_short(size=size)
            self.assertResumesTo(digest)
            self.path.unlink()

    def test_the_end_of_the_journal_may_be_torn_and_damage_is_named(self):
        digest = digest_without_a_break()
        self.stopped_short()
        whole = self.journal.read_bytes()
        data = bytearray(whole)
        data[len(data) // 2] ^= 1
        self.journal.write_bytes(data)
        done = area("--depth", DEPTH, "--out", self.path, "--resume")
        self.assertOneLineError(done, IO_FAILED, "area.mere.journal", "damaged")
        self.assertEqual(self.journal.read_bytes(), data)
        self.journal.write_bytes(whole[:-5])
        self.assertResumesTo(digest)


class Interrupted(ResumeCase):
    def test_the_journal_is_kept(self):
        digest = digest_without_a_break(depth=DEEPER)
        for number in (signal.SIGINT, signal.SIGTERM):
            run = self.started(depth=DEEPER)
            run.send_signal(number)
            out, err = run.communicate()
            self.assertEqual((run.returncode, out), (128 + number, ""), err)
            self.assertIn("interrupted", err)
            self.assertIn("area.mere.journal; --resume goes on with it", err)
            self.assertTrue(self.journal.exists() and not self.path.exists())
            self.assertResumesTo(digest, depth=DEEPER)
            self.path.unlink()

    def test_without_a_journal_nothing_is_kept(self):
        run = subprocess.Popen([MERESTONE, "area", "--depth", "18"], stdout=subprocess.PIPE, stderr=subprocess.PIPE,
                               text=True)
        self.addCleanup(run.kill)
        while not catches(run.pid, signal.SIGINT):  # depth 18 takes minutes
            time.sleep(0.002)
        run.send_signal(signal.SIGINT)
        out, err = run.communicate()
        self.assertEqual((run.returncode, out), (130, ""), err)
        self.assertIn("nothing was kept; with --out", err)


class Refused(ResumeCase):
    def test_without_a_journal(self):
        done = area("--depth", 6, "--out", self.path, "--resume")
        self.assertOneLineError(done, IO_FAILED, "area.mere.journal", "without --resume")
        self.assertEqual(list(self.folder.iterdir()), [])

    def test_a_journal_of_other_work_or_none_at_all(self):
        self.stopped_short()
        before = self.journal.read_bytes()
        done = area("--depth", DEPTH - 1, "--out", self.path, "--resume")
        self.assertOneLineError(done, IO_FAILED, f'"depth":{DEPTH},', f'"depth":{DEPTH - 1},', "other work")
        done = area("--depth", DEPTH, "--rules", "elementary", "--out", self.path, "--resume")
        self.assertOneLineError(done, IO_FAILED, '"rules":"all"', '"rules":"elementary"')
        done = area("--depth", DEPTH, "--within", "0", "1+i", "--out", self.path, "--resume")
        self.assertOneLineError(done, IO_FAILED, '"within":{"im":["0","1"],"re":["0","1"]}')
        self.assertEqual(self.journal.read_bytes(), before)
        self.journal.write_bytes(b"a letter\n")
        done = area("--depth", DEPTH, "--out", self.path, "--resume")
        self.assertOneLineError(done, IO_FAILED, "area.mere.journal", "not a journal of merestone")
        self.assertEqual(self.journal.read_bytes(), b"a letter\n")

    def test_anew_while_a_journal_is_there(self):
        self.journal.write_bytes(b"")
        done = area("--depth", 6, "--out", self.path)
        self.assertOneLineError(done, IO_FAILED, "area.mere.journal", "--resume goes on with it, or remove it")
        self.assertTrue(self.journal.exists())

    def test_while_another_run_has_the_journal(self):
        digest = digest_without_a_break(depth=DEEPER)
        run = self.started(depth=DEEPER)
        run.send_signal(signal.SIGSTOP)
        done = area("--depth", DEEPER, "--out", self.path, "--resume")
        self.assertOneLineError(done, IO_FAILED, "area.mere.journal", "another run has it in use")
        self.assertOneLineError(area("--depth", DEEPER, "--out", self.path), IO_FAILED, "area.mere.journal")
        run.send_signal(signal.SIGCONT)
        run.communicate()
        self.assertEqual(run.returncode, 0)
        self.assertEqual(verdict(self.path)[0]["claims_digest"], digest)


class DiskFull(ResumeCase):
    def test_a_place_that_cannot_hold_a_file(self):
        self.path.mkdir()
        done = area("--depth", 8, "--out", self.path)
        self.assertOneLineError(done, IO_FAILED, "area.mere: is not a regular file")
        self.assertFalse(self.journal.exists())

    def test_a_full_disk(self):
        folder = self.folder / "disk"
        folder.mkdir()
        path = folder / "area.mere"
        words = [MERESTONE, "area", "--depth", str(DEPTH), "--out", str(path)]
        done = subprocess.run(["unshare", "--mount", "sh", "-c", TMPFS, str(folder), str(folder), *words],
                              capture_output=True, text=True, timeout=120)
        if "exit" not in done.stderr:  # no right to mount
            self.skipTest("a file system of its own cannot be mounted here")
        self.assertIn("area.mere.journal: writing failed: No space left on device\n", done.stderr)
        self.assertIn(f"exit {IO_FAILED}\n", done.stderr)
        self.assertEqual(done.returncode, 0, done.stderr)
        self.assertIn(digest_without_a_break(), done.stdout)


class Outlines(ResumeCase):
    def test_the_digest_is_the_same_and_the_blocks_are_named_as_absent(self):
        answer = bounds("--depth", 10, "--out", self.path)[2]
        outline = self.folder / "outline.mere"
        short = bounds("--depth", 10, "--outline", "--out", outline)[2]
        self.assertEqual(answer["certificate"]["digest"], short["certificate"]["digest"])
        self.assertLess(2 * outline.stat().st_size, self.path.stat().st_size)
        found, code = verdict(outline)
        self.assertEqual((code, found["absent"], found["claims_digest"]),
                         (IN_PART, answer["blocks"], answer["certificate"]["digest"]))
        self.assertEqual(found["absent_blocks"], [[1, answer["blocks"]]])
        self.assertEqual((found["at_most"], found["at_least"]), (answer["at_most"], answer["at_least"]))
        done = check(outline)
        self.assertEqual(done.returncode, IN_PART)
        self.assertIn(f"established in part: {answer['blocks']} of {answer['blocks'] + 2} blocks are absent",
                      done.stdout)
        self.assertIn(f"absent, not established: blocks 1 to {answer['blocks']}\n", done.stdout)
        done = check("--statement", "text", outline)
        self.assertEqual((done.returncode, done.stdout), (IN_PART, ""))


if __name__ == "__main__":
    unittest.main()

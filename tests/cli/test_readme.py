"""README's tour is real: every command is run and prints what stands below it."""

import os
import sys
import unittest
from pathlib import Path

sys.path.insert(0, str(Path(__file__).parent))
import tour  # noqa: E402

SOURCE = Path(os.environ["MERESTONE_SOURCE_DIR"])
PROGRAMS = Path(os.environ["MERESTONE"]).parent
assert Path(os.environ["MERESTONE_CHECK"]).parent == PROGRAMS


class Tour(unittest.TestCase):
    def test_every_command_prints_what_readme_shows(self):
        blocks = tour.BLOCK.findall((SOURCE / "README.md").read_text())
        self.assertGreater(sum(len(tour.commands(block)) for block in blocks), 8)
        with tour.Folder(SOURCE) as folder:
            for block in blocks:
                for command, shown in tour.commands(block):
                    with self.subTest(command=command):
                        self.assertEqual(tour.output_of(command, folder, PROGRAMS), shown)


if __name__ == "__main__":
    unittest.main()

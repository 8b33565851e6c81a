"""A square of fine cells, painted row by row in exact integers: a row is an integer with a bit for each cell."""

from math import isqrt

PLACES = 48  # of coordinates and radii in fine cells


class Canvas:
    """2^grade x 2^grade fine cells; cell (column, row) is [column, column + 1] x [row, row + 1]."""

    def __init__(self, grade):
        self.side = 1 << grade
        self.rows = [0] * self.side

    def paint_disc(self, x, y, radius):
        """Cells all of whose corners lie in the closed disc; x, y, radius in units of 2^-PLACES of a fine cell.

        Of a row the edge farther from the centre decides: the disc is convex, and symmetric about its horizontal axis.
        """
        one, side, rows = 1 << PLACES, self.side, self.rows
        first, end = max(0, -(-(y - radius) >> PLACES)), min(side, (y + radius) >> PLACES)
        square = radius * radius
        for row in range(first, end):
            reach = max(y - row * one, (row + 1) * one - y)
            room = square - reach * reach
            if room < 0:
                continue
            half = isqrt(room)
            left, right = max(0, -(-(x - half) >> PLACES)), min(side, (x + half) >> PLACES)
            if left < right:
                rows[row] |= (1 << right) - (1 << left)

    def paint_cell(self, column, row, size):
        bits = ((1 << size) - 1) << column
        for at in range(row, row + size):
            self.rows[at] |= bits

    def is_painted(self, column, row):
        return self.rows[row] >> column & 1 == 1

    def painted_in(self, columns, rows):
        """How many cells of a range of columns and a range of rows are painted."""
        mask = (1 << columns.stop) - (1 << columns.start) if columns else 0
        return sum((self.rows[row] & mask).bit_count() for row in rows)

    def overlaps(self, other):
        return any(mine & theirs for mine, theirs in zip(self.rows, other.rows, strict=True))

"""A block of a cover established: its marks shown anew, painted on a canvas, and counted (Lemmas A1, N2)."""

from fractions import Fraction
from typing import NamedTuple

from rechecker.canvas import PLACES, Canvas
from rechecker.cover_marks import (NotShown, box_of, exterior_mark, interior_mark, require_closed_form,
                                   require_escape)
from rechecker.exact import Dyadic
from rechecker.quadtree import marked_cells


class Place(NamedTuple):
    """A closed square from a corner to the right and upward, side 2^side_exponent, cut into 2^grade x 2^grade cells."""

    x: Dyadic
    y: Dyadic
    side_exponent: int
    grade: int

    def cell_area(self):
        return Fraction(4) ** (self.side_exponent - self.grade)

    def centre(self, cell):
        """Of a Cell: two Dyadics, and the exponent of half its side."""
        half = self.side_exponent - cell.depth - 1
        return _sum(self.x, 2 * cell.column + 1, half), _sum(self.y, 2 * cell.row + 1, half), half

    def part(self, column, row, grade):
        """The square of one of the fine cells, cut to that grade."""
        side = self.side_exponent - self.grade
        return Place(_sum(self.x, column, side), _sum(self.y, row, side), side, grade)


def _sum(start, count, exponent):
    low = min(start.exponent, exponent)
    return Dyadic((start.mantissa << start.exponent - low) + (count << exponent - low), low)


class Window(NamedTuple):
    """Ranges of columns and of rows: of the fine cells that meet the box in more than a line, of those within it."""

    touching_columns: range
    touching_rows: range
    within_columns: range
    within_rows: range

    def touches(self, column, row):
        return column in self.touching_columns and row in self.touching_rows

    def has_within(self, column, row):
        return column in self.within_columns and row in self.within_rows

    def touching(self):
        return len(self.touching_columns) * len(self.touching_rows)

    def within(self):
        return len(self.within_columns) * len(self.within_rows)


def _ranges(lo, hi, start, fine, side):
    """Of [lo, hi] in cells of the size `fine` from `start` on: those that it meets in more than a point, and has."""
    first, end = (lo - start) / fine, (hi - start) / fine

    def clamped(value):
        return min(side, max(0, value))

    return (range(clamped(first.__floor__()), clamped(end.__ceil__())),
            range(clamped(first.__ceil__()), clamped(end.__floor__())))


def window_of(place, box):
    """`box`: a Rectangle, or None for all cells."""
    side = 1 << place.grade
    if box is None:
        return Window(*[range(side)] * 4)
    fine = Fraction(2) ** (place.side_exponent - place.grade)
    columns = _ranges(box.x0, box.x1, place.x.fraction(), fine, side)
    rows = _ranges(box.y0, box.y1, place.y.fraction(), fine, side)
    return Window(columns[0], rows[0], columns[1], rows[1])


class Proof(NamedTuple):
    outside: Canvas
    inside: Canvas
    outside_cells: int  # of those that touch the window
    inside_cells: int  # of those within it
    outside_marks: int
    inside_marks: int


def _paint(canvas, place, disc):
    """The painted disc lies in the given one: the centre is off by less than two units, the radius less by three."""
    scale = place.grade - place.side_exponent + PLACES

    def units(value):
        shifted = value.numerator << scale if scale >= 0 else value.numerator
        return shifted // (value.denominator if scale >= 0 else value.denominator << -scale)

    canvas.paint_disc(units(disc.x - place.x.fraction()), units(disc.y - place.y.fraction()), units(disc.r) - 3)


def _paint_cell(canvas, place, cell):
    size = 1 << place.grade - cell.depth
    canvas.paint_cell(cell.column * size, cell.row * size, size)


class _Work:
    """The marks of one block on their way to a Proof."""

    def __init__(self, place, square, is_elementary, budget):
        self._place, self._square, self._is_elementary, self._budget = place, square, is_elementary, budget
        self.outside, self.inside = Canvas(place.grade), Canvas(place.grade)
        self.marks = {"outside": 0, "inside": 0}

    def _take_outside(self, cell, x, y, half):
        if self._is_elementary:
            require_escape(box_of(x, y, half), half, self._budget)
            _paint_cell(self.outside, self._place, cell)
        else:
            _paint(self.outside, self._place, exterior_mark(x, y, half, self._budget))

    def _take_inside(self, cell, x, y, half, shown):
        if shown.period == 0:
            require_closed_form(box_of(x, y, half))
            _paint_cell(self.inside, self._place, cell)
        else:
            _paint(self.inside, self._place, interior_mark(x, y, half, shown, self._budget))

    def take(self, name, tree, shown):
        for number, cell in enumerate(marked_cells(tree)):
            x, y, half = self._place.centre(cell)
            self._budget.spend(1, 64)
            try:
                if name == "outside":
                    self._take_outside(cell, x, y, half)
                else:
                    self._take_inside(cell, x, y, half, shown[number])
            except NotShown as reason:
                raise NotShown(f"{name} mark {number}, at {x.fraction()} + ({y.fraction()})i, depth {cell.depth}: "
                               f"{reason}") from None
            self.marks[name] += 1


def establish_square(place, square, window, is_elementary, budget):
    """The Proof of a present Square; raises NotShown, with the first thing that does not hold."""
    work = _Work(place, square, is_elementary, budget)
    work.take("outside", square.outside, ())
    work.take("inside", square.inside, square.shown)
    if work.outside.overlaps(work.inside):
        raise NotShown("a fine cell comes out both outside and inside: an error of this program")
    proof = Proof(work.outside, work.inside,
                  work.outside.painted_in(window.touching_columns, window.touching_rows),
                  work.inside.painted_in(window.within_columns, window.within_rows),
                  work.marks["outside"], work.marks["inside"])
    for name, claimed, painted in (("outside", square.outside_cells, proof.outside_cells),
                                   ("inside", square.inside_cells, proof.inside_cells)):
        if painted < claimed:
            raise NotShown(f"{claimed} fine cells are claimed to be {name}, and the marks show {painted}")
    return proof

"""What the blocks of a cover leave of an area, and what they show to be inside (Lemma A1)."""

from fractions import Fraction

from rechecker.cover import Place, establish_square, window_of
from rechecker.cover_marks import NotShown


def require_reach(cover):
    """Raises NotShown unless the root has all that the bound is about."""
    (x, y), side = (part.fraction() for part in cover.corner), Fraction(2) ** cover.side_exponent
    if cover.within and cover.is_mirrored:
        raise NotShown("the cover of a box is doubled by conjugation; that is for all of M")
    box = cover.within or (-2, 2, 0 if cover.is_mirrored else -2, 2)
    if not (x <= box[0] and box[1] <= x + side and y <= box[2] and box[3] <= y + side):
        raise NotShown("the root of the cover does not contain what the bound is about")


class CoverSum:
    """Takes the trunk first, then squares with figures that are established, or are taken as they are claimed."""

    def __init__(self, cover, trunk, budget):
        require_reach(cover)
        self._cover, self._budget = cover, budget
        self._root = Place(*cover.corner, cover.side_exponent, cover.trunk_grade)
        self._window = window_of(self._root, cover.within)
        self.trunk = establish_square(self._root, trunk, self._window, cover.is_elementary, budget)
        self._open = self._undecided()
        self._kept = self._inside = self.trunk.inside_cells * self._root.cell_area()

    def _undecided(self):
        """The trunk's fine cells that count and are neither outside nor inside: they are cut again."""
        window, trunk = self._window, self.trunk
        return {(column, row) for row in window.touching_rows for column in window.touching_columns
                if not trunk.outside.is_painted(column, row)
                and not (trunk.inside.is_painted(column, row) and window.has_within(column, row))}

    def _place(self, square):
        place = self._root.part(square.column, square.row, square.grade)
        return place, window_of(place, self._cover.within)

    def establish(self, square):
        """The Proof of a square. Raises NotShown."""
        place, window = self._place(square)
        return establish_square(place, square, window, self._cover.is_elementary, self._budget)

    def add(self, square, outside_cells, inside_cells):
        """Adds nothing where the trunk has decided. Raises NotShown."""
        place, window = self._place(square)
        if (square.column, square.row) not in self._open:
            return
        self._open.remove((square.column, square.row))
        if outside_cells > window.touching() or inside_cells > window.within():
            raise NotShown("more cells are claimed outside or inside than count there")
        self._kept += (window.touching() - outside_cells) * place.cell_area()
        self._inside += inside_cells * place.cell_area()

    def bounds(self):
        """(what is inside, what is left), once all squares were added. Raises NotShown."""
        if self._open:
            column, row = min(self._open)
            raise NotShown(f"column {column}, row {row} of the trunk is not decided, and there is no block of it")
        twice = 2 if self._cover.is_mirrored else 1
        return twice * self._inside, twice * self._kept

"""Bounds of an area, computed anew from a container's blocks (Lemmas A1, A2), and whether they are those claimed."""

import random
from fractions import Fraction

from rechecker.area_blocks import Components
from rechecker.budget import Budget, OverLimit
from rechecker.component_area import component_area, require_distinct
from rechecker.cover_marks import NotShown
from rechecker.cover_sum import CoverSum

MOST_FAILURES = 20  # that are kept in words


class Sample:
    """At most `size` of a stream of unknown length, each as likely as any other; None: all are taken at once."""

    def __init__(self, size, take):
        self._size, self._take, self._draw = size, take, random.SystemRandom()
        self._kept, self.seen = [], 0

    def offer(self, item):
        """The item that is not going to be taken: this one, one that was kept before, or none."""
        self.seen += 1
        if self._size is None:
            self._take(item)
            return None
        if len(self._kept) < self._size:
            self._kept.append(item)
            return None
        slot = self._draw.randrange(self.seen)
        if slot >= self._size:
            return item
        item, self._kept[slot] = self._kept[slot], item
        return item

    def finish(self):
        """Takes what was kept, in its order."""
        for item in sorted(self._kept, key=lambda kept: kept[0]):
            self._take(item)

    def taken(self):
        return self.seen if self._size is None else min(self.seen, self._size)


class AreaCheck:
    """Takes the blocks in their order; then `failures`, `over_limit` and the figures say what came out.

    Of a sample the trunk is established always, then so many squares and so many components.
    """

    def __init__(self, header, limits, sample=None):
        self.header, self._budget = header, Budget(limits)
        self.failures, self.failed, self.over_limit = [], 0, ""
        self.blocks = self.absent = self.as_claimed = self.outside_marks = self.inside_marks = 0
        self.at_least = self.at_most = None
        self._sum, self._components, self._area = None, [], Fraction(0)
        self._squares = Sample(sample, self._establish_square)
        self._drawn_components = Sample(sample, self._establish_component)

    # Each block as it comes; what is drawn is established at the end.

    def take(self, block):
        self.blocks += 1
        if self.failed or self.over_limit:
            return
        if type(block) is Components:
            for number, component in enumerate(block.components):
                self._drawn_components.offer((len(self._components), block.ordinal, number, component))
                self._components.append(component)
        elif block.is_trunk:
            self._guarded(f"block {block.ordinal}", self._establish_trunk, block)
        elif block.is_absent():
            self.absent += 1
            self._guarded(f"block {block.ordinal}", self._add_as_claimed, block)
        else:
            left_out = self._squares.offer((block.ordinal, block))
            if left_out is not None:
                self.as_claimed += 1
                self._guarded(f"block {left_out[0]}", self._add_as_claimed, left_out[1])

    def finish(self):
        self._squares.finish()
        self._drawn_components.finish()
        if not self.over_limit:
            self._guarded("components", self._require_components)
            self._guarded("cover", self._conclude)

    def components(self):
        """How many there are, how many of them are established."""
        return self._drawn_components.seen, self._drawn_components.taken()

    def has_all_components(self):
        total, taken = self.components()
        return total == taken

    def is_in_part(self):
        return self.absent > 0 or self.as_claimed > 0 or not self.has_all_components()

    def _guarded(self, where, step, *of):
        if self.over_limit:
            return
        try:
            step(*of)
        except NotShown as reason:
            self.failed += 1
            if len(self.failures) < MOST_FAILURES:
                self.failures.append(f"{where}: {reason}")
        except OverLimit as reason:
            self.over_limit = f"{where}: {reason}"

    def _count(self, proof):
        self.outside_marks += proof.outside_marks
        self.inside_marks += proof.inside_marks

    def _establish_trunk(self, block):
        self._sum = CoverSum(self.header.cover, block, self._budget)
        self._count(self._sum.trunk)

    def _establish_square(self, item):
        def step():
            proof = self._sum.establish(item[1])
            self._count(proof)
            self._sum.add(item[1], proof.outside_cells, proof.inside_cells)
        self._guarded(f"block {item[0]}", step)

    def _add_as_claimed(self, block):
        self._sum.add(block, block.outside_cells, block.inside_cells)

    def _establish_component(self, item):
        def step():
            self._area += component_area(item[3], self._budget)
        self._guarded(f"block {item[1]}, component {item[2]}", step)

    def _require_components(self):
        if self._components and self.header.cover and self.header.cover.within:
            raise NotShown("a component's area is of M, not of what M has in the box")
        require_distinct(self._components)

    def _conclude(self):
        if self.failed:
            return
        inside = Fraction(0)
        if self._sum:
            inside, self.at_most = self._sum.bounds()
            if self.at_most > self.header.at_most:
                raise NotShown("at-most: the blocks prove a larger bound only")
        if self.header.at_least is None:
            return
        self.at_least = max(inside, self._area)
        if self.at_least < self.header.at_least and self.has_all_components():
            raise NotShown("at-least: the blocks prove a smaller bound only")

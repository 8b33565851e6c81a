"""The limit on work while a cover or a list of components is established."""

from rechecker.work import GUARD_BITS, weight


class OverLimit(Exception):
    """What was refused, and within which limit."""


class Budget:
    """Units of Limits.work: steps of orbits, weighted by the precision."""

    def __init__(self, limits):
        self._limits, self._left = limits, limits.work

    def spend(self, steps, places):
        if places - GUARD_BITS > 2 * self._limits.bits:
            raise OverLimit(f"{places} bits are wanted; the limit is {self._limits.bits}")
        self._left -= steps * weight(places - GUARD_BITS)
        if self._left < 0:
            raise OverLimit(f"more than {self._limits.work} units of work are wanted")

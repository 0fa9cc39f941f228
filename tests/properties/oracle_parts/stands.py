"""The same question as `reach`, answered by trying every joint stand of the devices, for small circuits."""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from itertools import product
from math import prod

from tests.properties.oracle_parts.circuit import Circuit
from tests.properties.oracle_parts.freedom import Freedom
from tests.properties.oracle_parts.reach import passings

MOST_STANDS = 50_000


@dataclass(frozen=True, slots=True, kw_only=True)
class _Stand:
    """One device in one position: the lines it joins; it `needs` one of these lines hot to get there."""

    pairs: tuple[tuple[int, int], ...]
    needs: frozenset[int] | None


def flood_every_stand(circuit: Circuit, begin: frozenset[int], free: Mapping[str, Freedom]) -> frozenset[int] | None:
    """The lines that come under pressure in some joint stand, remembering what earlier stands left closed in.

    None where there are more than `MOST_STANDS` of them.
    """
    choices = [_choices(circuit, tag, freedom) for tag, freedom in free.items()]
    if prod(len(c) for c in choices) > MOST_STANDS:
        return None
    fixed = tuple(pair for c in choices if len(c) == 1 for pair in c[0].pairs)
    drives = tuple(
        (s.drive, s.line) for s in circuit.sources if s.live and s.drive is not None and not circuit.vent[s.line]
    )
    several = [c for c in choices if len(c) > 1]
    hot = set(begin)
    _soak(hot, fixed, drives)
    before = -1
    while len(hot) > before:
        before = len(hot)
        for joint in product(*several):
            if all(stand.needs is None or stand.needs & hot for stand in joint):
                while any(_cross(hot, stand.pairs) for stand in joint):
                    _soak(hot, fixed, drives)
    return frozenset(hot)


def _choices(circuit: Circuit, tag: str, freedom: Freedom) -> Sequence[_Stand]:
    def stand(position: str, needs: frozenset[int] | None) -> _Stand:
        pairs = tuple((p.first, p.second) for p in passings(circuit, tag, position))
        return _Stand(pairs=pairs, needs=needs)

    always = [stand(position, None) for position in sorted(freedom.always)]
    moved = [stand(position, freedom.by) for position in sorted(freedom.moved) if freedom.by]
    return always + moved


def _cross(hot: set[int], pairs: Sequence[tuple[int, int]]) -> bool:
    """Let pressure cross each pair once; whether any line came under pressure by it."""
    grew = False
    for first, second in pairs:
        if (first in hot) is not (second in hot):
            hot |= {first, second}
            grew = True
    return grew


def _soak(hot: set[int], fixed: Sequence[tuple[int, int]], drives: Sequence[tuple[int, int]]) -> None:
    """Let pressure go wherever no device needs to be moved for it."""
    grew = True
    while grew:
        grew = _cross(hot, fixed)
        for drive, line in drives:
            if drive in hot and line not in hot:
                hot.add(line)
                grew = True

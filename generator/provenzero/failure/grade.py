"""How well a set of locks keeps each source from the zone: barriers in series, and what one leak would do."""

from collections import deque
from collections.abc import Mapping
from dataclasses import dataclass
from enum import StrEnum

from provenzero.failure.single import bears
from provenzero.network.model import DeviceKind, DeviceTag, LineId, Source, SourceKind
from provenzero.state.held import held_open
from provenzero.state.model import State, Wiring


class IsolationGrade(StrEnum):
    """How well the opened part is kept from one source, best first."""

    DRAINED = "drained"
    ISOLATED_AT_ORIGIN = "isolated_at_origin"
    DOUBLE_BLOCK_AND_BLEED = "double_block_and_bleed"
    BLOCK_AND_BLEED = "block_and_bleed"
    DOUBLE_BLOCK = "double_block"
    SINGLE_BLOCK = "single_block"


@dataclass(frozen=True, slots=True, kw_only=True)
class Grade:
    """How the zone is kept from one source, and whether one leaking barrier still leaves the zone without pressure."""

    source: str
    barriers: tuple[DeviceTag, ...]
    grade: IsolationGrade
    survives_single_leak: bool


def grades(
    wiring: Wiring, start: State, state: State, zone: frozenset[LineId], locks: Mapping[DeviceTag, str]
) -> tuple[Grade, ...]:
    """The grade against each source that could have reached the zone before the locks, in the order of the network."""
    case = _Case(wiring=wiring, state=state, zone=zone, locks=locks, held=held_open(wiring, locks, state.pressures))
    found = []
    for source in wiring.network.sources:
        stored = source.kind is SourceKind.STORED
        if stored and start.high(source.line) <= 0.0:
            continue
        barriers = series(wiring, source, zone, locks)
        if stored and (source.line in zone or (barriers and state.high(source.line) <= 0.0)):
            found.append(_drained(case, source))
        elif barriers:
            found.append(_graded(case, source, barriers))
    return tuple(found)


@dataclass(frozen=True, slots=True, kw_only=True)
class _Case:
    """One set of locks in one state, with the lines it holds open to a vent."""

    wiring: Wiring
    state: State
    zone: frozenset[LineId]
    locks: Mapping[DeviceTag, str]
    held: Mapping[LineId, DeviceTag | None]


def _drained(case: _Case, source: Source) -> Grade:
    wiring, held = case.wiring, case.held
    way: list[DeviceTag] = []
    line = source.line
    while (tag := held.get(line)) is not None:
        way.append(tag)
        line = next((t for t in wiring.anywhere[tag].get(line, ()) if t in held and t != line), line)
        if len(way) > len(held):
            break
    movable = tuple(t for t in way if wiring.device(t).movable)
    return Grade(
        source=source.id,
        barriers=movable,
        grade=IsolationGrade.DRAINED,
        survives_single_leak=source.line in held,
    )


def _graded(case: _Case, source: Source, barriers: tuple[DeviceTag, ...]) -> Grade:
    survives = all(bears(case.wiring, case.state, case.zone, case.locks, tag) for tag in barriers)
    bleed = survives and any(line in case.held for line in case.wiring.anywhere[barriers[-1]])
    at_origin = source.kind is SourceKind.LIVE and case.wiring.device(barriers[0]).kind in {
        DeviceKind.ISOLATOR,
        DeviceKind.AIR_VALVE,
    }
    return Grade(
        source=source.id,
        barriers=barriers,
        grade=_name(len(barriers), bleed=bleed, at_origin=at_origin),
        survives_single_leak=survives,
    )


def _name(count: int, *, bleed: bool, at_origin: bool) -> IsolationGrade:
    if at_origin:
        return IsolationGrade.ISOLATED_AT_ORIGIN
    if count > 1:
        return IsolationGrade.DOUBLE_BLOCK_AND_BLEED if bleed else IsolationGrade.DOUBLE_BLOCK
    return IsolationGrade.BLOCK_AND_BLEED if bleed else IsolationGrade.SINGLE_BLOCK


def series(
    wiring: Wiring, source: Source, zone: frozenset[LineId], locks: Mapping[DeviceTag, str]
) -> tuple[DeviceTag, ...] | None:
    """The fewest locked devices between a source and the zone, in order of the way; None if no way exists."""
    starts = [source.line] if source.drive is None else []
    came: dict[LineId, tuple[int, LineId | None, DeviceTag | None]] = dict.fromkeys(starts, (0, None, None))
    queue = deque(starts)
    pumps = [s for s in wiring.network.sources if s.drive is not None]
    while queue:
        here = queue.popleft()
        cost = came[here][0]
        if here in zone:
            return _crossed(came, here) or None
        onward: list[tuple[int, LineId, DeviceTag | None]] = [(0, p.line, None) for p in pumps if p.drive == here]
        for tag in wiring.touching[here]:
            position = locks.get(tag)
            free = wiring.anywhere[tag] if position is None else wiring.joined[tag, position]
            onward += [(0, there, None) for there in free.get(here, ())]
            if position is not None:
                onward += [(1, there, tag) for there in wiring.anywhere[tag].get(here, ())]
        for extra, there, through in onward:
            if there in wiring.vents or (there in came and came[there][0] <= cost + extra):
                continue
            came[there] = (cost + extra, here, through)
            if extra:
                queue.append(there)
            else:
                queue.appendleft(there)
    return None


def _crossed(came: Mapping[LineId, tuple[int, LineId | None, DeviceTag | None]], end: LineId) -> tuple[DeviceTag, ...]:
    crossed: list[DeviceTag] = []
    here: LineId | None = end
    while here is not None:
        _, before, passed = came[here]
        if passed is not None:
            crossed.append(passed)
        here = before
    return tuple(dict.fromkeys(reversed(crossed)))

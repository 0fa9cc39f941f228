"""One complete isolation for one dead region, and the search for the region with the least impairment."""

import heapq
from collections.abc import Iterable, Mapping
from dataclasses import dataclass, replace

from provenzero.failure.single import exposed
from provenzero.network.model import DeviceKind, DeviceTag, LineId, Medium
from provenzero.plan.hold import Holding, hold_open, way_out
from provenzero.plan.impairment import Loss, loss
from provenzero.plan.model import Obstacle, Purpose
from provenzero.plan.region import Region, enclose, unheld_movers
from provenzero.plan.sequence import Made, Move, let_out_rest, perform, purpose_of
from provenzero.state.held import held_open
from provenzero.state.may import Reach, reach
from provenzero.state.model import State, Wiring
from provenzero.state.must import vented

_MOST_REGIONS = 60
_MOST_AFTER = 40
_LINES_TRIED = 3
_WAYS_TRIED = 4


@dataclass(frozen=True, slots=True, kw_only=True)
class Attempt:
    """An isolation: what was moved, which of it is locked, which lines that holds open; empty obstacles = it works."""

    region: Region
    made: tuple[Made, ...]
    locks: Mapping[DeviceTag, str]
    open_to_vent: tuple[LineId, ...]
    unheld: tuple[LineId, ...]
    state: State
    loss: Loss
    obstacles: tuple[Obstacle, ...]

    def score(self) -> tuple[object, ...]:
        """Impairment first, then unheld vents, then locks, then moves."""
        return (self.loss.key(), len(self.unheld), len(self.locks), len(self.made))


@dataclass(frozen=True, slots=True, kw_only=True)
class Worked:
    """What of a function is worked on: chambers whose vents locks should hold, pilots that should be dead."""

    chambers: frozenset[LineId] = frozenset()
    pilots: frozenset[LineId] = frozenset()


def search(wiring: Wiring, state: State, zone: Iterable[LineId], worked: Worked | None = None) -> Attempt:
    """The best isolation found: least impairment, then fewest locks. If none works, the one that came nearest.

    First with the pilots of what is worked on dead and trapped liquid beside the region taken in; where that never
    works, with locks between, and then without the pilots.
    """
    opened = frozenset(zone)
    worked = worked or Worked()
    found = None
    for pilots in dict.fromkeys((worked.pilots, frozenset[LineId]())):
        for take_in in (True, False):
            aim = _Aim(zone=opened, seed=opened | pilots, hold=worked.chambers)
            attempt = _search(wiring, state, aim, take_in=take_in)
            if not attempt.obstacles:
                return attempt
            found = found or attempt
    if found is None:
        raise AssertionError("a search always makes at least one attempt")
    return found


@dataclass(frozen=True, slots=True, kw_only=True)
class _Aim:
    """The lines that are opened, those that must be dead to begin with, and those whose vent locks should hold."""

    zone: frozenset[LineId]
    seed: frozenset[LineId]
    hold: frozenset[LineId]


def _explained(first: Attempt, nearest: Attempt, blocked: list[Obstacle]) -> Attempt:
    """The nearest attempt with the reasons of all: what the narrowest lacked and what stopped the wider ones."""
    reasons = [*first.obstacles, *nearest.obstacles, *blocked]
    root = [o for o in reasons if o.words != "reached"] or reasons
    return replace(nearest, obstacles=tuple(dict.fromkeys(root)))


def _search(wiring: Wiring, state: State, aim: _Aim, *, take_in: bool) -> Attempt:
    """Try regions in the order of what they cost; once one works, only others that cost no more impairment."""
    best: Attempt | None = None
    made: list[Attempt] = []
    blocked: list[Obstacle] = []
    queue: list[tuple[tuple[int, ...], int, frozenset[LineId]]] = [((0,), 0, aim.seed)]
    seen: set[frozenset[LineId]] = {aim.seed}
    tried = 0
    while queue and tried < (_MOST_REGIONS if best is None else _MOST_AFTER):
        rank, _, lines = heapq.heappop(queue)
        if best is not None and rank[:4] > best.loss.key():
            break
        tried += 1
        region = enclose(wiring, state, lines, take_in=take_in)
        attempt = isolate(wiring, state, aim, region)
        if not attempt.obstacles and (best is None or attempt.score() < best.score()):
            best = attempt
        made.append(attempt)
        if best is not None and not best.unheld:
            break
        for far in _directions(wiring, state, region, attempt):
            more = lines | far
            grown = enclose(wiring, state, more, take_in=take_in)
            blocked += grown.obstacles
            if not grown.obstacles and grown.dead not in seen:
                seen.add(grown.dead)
                key = loss(wiring, grown.dead, grown.barriers).key()
                heapq.heappush(queue, ((*key, len(grown.dead)), len(seen), more))
    if best is not None:
        return best
    return _explained(made[0], min(made[1:] or made, key=lambda a: len(a.obstacles)), blocked)


def _directions(wiring: Wiring, state: State, region: Region, attempt: Attempt) -> list[frozenset[LineId]]:
    """What else might go dead so that a line in trouble gets a vent: the ways on which a vent lies.

    None where the circuit has no such way at all, for then a wider region has none either.
    """
    if region.obstacles:
        return []
    idle = _idle_drives(wiring, region) if any(o.words == "not_quiet" for o in attempt.obstacles) else frozenset()
    if idle:
        return [idle]
    trapped = [o.line for o in attempt.obstacles if o.words == "trapped"]
    lines = trapped or list(attempt.unheld)
    if not lines:
        return _beyond(wiring, region)
    found: list[frozenset[LineId]] = []
    for line in lines[:_LINES_TRIED]:
        banned: dict[DeviceTag, str] = {}
        for _ in range(_WAYS_TRIED):
            legs = way_out(wiring, state, frozenset(), line, banned, through_checks=bool(trapped))
            if legs is None:
                if not banned and trapped:
                    return []
                break
            crossed = [leg for leg in legs if leg.device in region.barriers]
            onward = {leg.line for leg in legs} | {k for leg in crossed for k in wiring.anywhere[leg.device]}
            far = frozenset(onward - wiring.vents - region.dead)
            if far and far not in found:
                found.append(far)
            if not crossed:
                break
            banned[crossed[0].device] = region.barriers[crossed[0].device]
    return found


def _idle_drives(wiring: Wiring, region: Region) -> frozenset[LineId]:
    """Drives, still live, of automatic pumps: one may be called when a barrier takes the last bank from its line."""
    drives = {s.drive for s in wiring.network.sources if s.drive is not None and s.senses is not None}
    return frozenset(drives) - region.dead


def _beyond(wiring: Wiring, region: Region) -> list[frozenset[LineId]]:
    """For each barrier, what lies behind it: lines that would go dead too if it were left open."""
    return [
        frozenset(
            there
            for here, ways in wiring.anywhere[tag].items()
            if here in region.dead
            for there in ways
            if there not in wiring.vents and there not in region.dead
        )
        for tag in region.barriers
    ]


def isolate(wiring: Wiring, state: State, aim: _Aim, region: Region) -> Attempt:
    """Lock the region's edge, let it out, and keep only the locks that are needed."""
    zone = aim.zone
    targets = _targets(wiring, state, zone, region)
    targets += [k for k in wiring.network.lines if k in aim.hold and k not in targets]
    holding = hold_open(wiring, state, region.outside.lines, region.barriers, targets)
    weak = _weak(wiring, state, zone, region, holding.locked)
    if weak - set(targets):
        targets = [*targets, *(k for k in wiring.network.lines if k in weak and k not in targets)]
        holding = hold_open(wiring, state, region.outside.lines, region.barriers, targets)
    moves = _moves(wiring, region, holding)
    made, reached, pending = perform(wiring, state, moves)
    obstacles = [*region.obstacles]
    obstacles += [
        Obstacle(line=_line_of(wiring, m.device, region), words="not_quiet", path=(m.device,)) for m in pending
    ]
    rest, reached, trapped = let_out_rest(
        wiring, reached, region, {**holding.locked, **{m.device: m.position for m in moves}}
    )
    made += rest
    obstacles += trapped
    locks = {m.move.device: m.move.position for m in made if m.move.locks}
    obstacles += _reached(wiring, locks, reached, zone)
    open_lines = tuple(line for line in targets if line in holding.held)
    if not obstacles:
        locks = needed(wiring, reached, zone, locks, open_lines)
    now_held = held_open(wiring, locks, reached.pressures)
    weak = _weak(wiring, reached, zone, region, locks)
    return Attempt(
        region=region,
        made=tuple(made),
        locks=locks,
        open_to_vent=tuple(line for line in open_lines if line in now_held),
        unheld=tuple(k for k in wiring.network.lines if k in weak),
        state=reached,
        loss=loss(wiring, region.dead, locks),
        obstacles=tuple(obstacles),
    )


def _targets(wiring: Wiring, state: State, zone: frozenset[LineId], region: Region) -> list[LineId]:
    """Lines whose vent a lock should hold.

    Where a barrier could leak into the region, emptied banks (they can rebuild some pressure), and pilots that must
    stay dead. A single bottle behind its own valve lets out through its bank.
    """
    emptied = {
        _bank_side(wiring, s.line)
        for s in wiring.network.sources
        if s.gas
        and s.line in region.dead
        and state.high(s.line) > 0.0
        and wiring.network.lines[s.line].medium is Medium.CONTROL_FLUID
    }
    pilots = {line for tag in region.barriers for line in unheld_movers(wiring.device(tag))}
    edge = {line for tag in region.barriers for line in wiring.anywhere[tag] if line in region.dead}
    lines = wiring.network.lines
    wanted = [
        k
        for k in lines
        if k in (emptied | pilots | edge) & region.dead
        and k not in wiring.vents
        and lines[k].medium is not Medium.ELECTRIC
    ]
    return sorted(wanted, key=lambda k: k not in zone)


def _bank_side(wiring: Wiring, line: LineId) -> LineId:
    """The bank's line for a bottle behind its own valve; else the line itself."""
    devices = wiring.touching[line]
    if len(devices) == 1 and wiring.device(devices[0]).kind is DeviceKind.BOTTLE_VALVE:
        return wiring.anywhere[devices[0]][line][0]
    return line


def _weak(
    wiring: Wiring, state: State, zone: frozenset[LineId], region: Region, locks: Mapping[DeviceTag, str]
) -> set[LineId]:
    """Zone lines that one leaking barrier would put under pressure, because no locked vent takes the leak."""
    released = replace(state, pressures={k: (0.0, 0.0) if k in region.dead else v for k, v in state.pressures.items()})
    found = exposed(wiring, released, zone, locks, [t for t in region.barriers if t in locks])
    return {
        line for lines in found.values() for line in lines if wiring.network.lines[line].medium is not Medium.ELECTRIC
    }


def _moves(wiring: Wiring, region: Region, holding: Holding) -> list[Move]:
    moves = [
        Move(
            device=tag,
            position=position,
            purpose=purpose_of(wiring, tag, region.dead, barrier=tag in region.barriers),
            locks=True,
        )
        for tag, position in holding.locked.items()
    ]
    moves += [
        Move(device=tag, position=position, purpose=Purpose.VENT, locks=False)
        for tag, position in holding.loose.items()
    ]
    place = {tag: i for i, tag in enumerate(wiring.network.devices)}
    return sorted(moves, key=lambda m: place[m.device])


def _line_of(wiring: Wiring, device: DeviceTag, region: Region) -> LineId:
    lines = wiring.anywhere[device]
    return next((line for line in lines if line in region.dead), next(iter(lines)))


def _reached(wiring: Wiring, locks: Mapping[DeviceTag, str], state: State, zone: frozenset[LineId]) -> list[Obstacle]:
    flood = reach(wiring, locks, state.pressures)
    return [
        Obstacle(line=line, words="reached", path=flood.path(line))
        for line in wiring.network.lines
        if line in zone and line in flood.lines
    ]


def needed(
    wiring: Wiring,
    state: State,
    zone: frozenset[LineId],
    locks: Mapping[DeviceTag, str],
    open_lines: tuple[LineId, ...],
) -> dict[DeviceTag, str]:
    """The locks that are left when each one that nothing depends on has been left out, last ones first."""
    kept = dict(locks)
    for tag in reversed(list(locks)):
        fewer = {k: v for k, v in kept.items() if k != tag}
        if not _lost_without(wiring, state, zone, fewer, open_lines):
            kept = fewer
    return kept


def _lost_without(
    wiring: Wiring,
    state: State,
    zone: frozenset[LineId],
    locks: Mapping[DeviceTag, str],
    open_lines: tuple[LineId, ...],
) -> bool:
    flood: Reach = reach(wiring, locks, state.pressures)
    if flood.lines & zone:
        return True
    held = vented(wiring, {k: v for k, v in locks.items() if k not in flood.freed})
    return any(line not in held for line in open_lines)

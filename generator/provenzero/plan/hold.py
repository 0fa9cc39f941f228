"""How the lines of the dead region are let out to a vent, if possible through devices that a lock can hold open."""

import heapq
from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass, field
from itertools import product

from provenzero.network.model import FULL_OPEN, Device, DeviceKind, DeviceTag, LineId, PassageKind
from provenzero.plan.region import unheld_movers
from provenzero.state.model import State, Wiring

_MOVE = 0.01
_UNHELD = 50.0
_HANDLE = 10.0
_MANY = 2
_MOST_TRIED = 3


@dataclass(slots=True)
class Holding:
    """Positions chosen: `locked` to be held by a lock, `loose` needed but not lockable, and which lines that serves."""

    locked: dict[DeviceTag, str]
    loose: dict[DeviceTag, str] = field(default_factory=dict)
    held: list[LineId] = field(default_factory=list)
    unheld: list[LineId] = field(default_factory=list)
    stuck: list[LineId] = field(default_factory=list)


@dataclass(frozen=True, slots=True)
class Leg:
    """One device on the way out, the position it needs and the line reached through it."""

    device: DeviceTag
    position: str
    line: LineId


def hold_open(
    wiring: Wiring,
    state: State,
    shut: frozenset[LineId],
    barriers: Mapping[DeviceTag, str],
    targets: Sequence[LineId],
) -> Holding:
    """Choose positions that let every target out, not through `shut` lines, which may be under pressure.

    Tries each position of the four-way valves next to the targets.
    """
    several = [
        tag
        for tag, device in wiring.network.devices.items()
        if len(device.positions) > _MANY and tag not in barriers and any(t in wiring.anywhere[tag] for t in targets)
    ]
    if len(several) > _MOST_TRIED:
        return _choose(wiring, state, shut, dict(barriers), targets)
    best: tuple[tuple[float, ...], Holding] | None = None
    for positions in product(*(_current_first(wiring.device(t), state) for t in several)):
        assigned = dict(zip(several, positions, strict=True))
        lockable = {t: p for t, p in assigned.items() if _takes_lock(wiring.device(t), shut)}
        fixed = {t: p for t, p in assigned.items() if t not in lockable}
        holding = _choose(wiring, state, shut, {**barriers}, targets, tried=lockable, loose=fixed)
        moves = sum(state.positions[t] != p for t, p in {**holding.locked, **holding.loose}.items())
        score = (len(holding.stuck), len(holding.unheld), len(holding.locked), moves)
        if best is None or score < best[0]:
            best = (score, holding)
    if best is None:
        return _choose(wiring, state, shut, dict(barriers), targets)
    return best[1]


def _current_first(device: Device, state: State) -> list[str]:
    return sorted((p for p in device.positions if p != FULL_OPEN), key=lambda p: p != state.positions[device.tag])


def _choose(  # noqa: PLR0913 - the choice and what it may not touch
    wiring: Wiring,
    state: State,
    shut: frozenset[LineId],
    locked: dict[DeviceTag, str],
    targets: Sequence[LineId],
    *,
    tried: Mapping[DeviceTag, str] | None = None,
    loose: Mapping[DeviceTag, str] | None = None,
) -> Holding:
    holding = Holding(locked=locked)
    preset = {**(tried or {}), **(loose or {})}
    for target in targets:
        legs = way_out(wiring, state, shut, target, {**preset, **holding.loose, **holding.locked})
        if legs is None:
            holding.stuck.append(target)
            continue
        sure = True
        for leg in legs:
            device = wiring.device(leg.device)
            if not device.movable or leg.device in holding.locked:
                continue
            if _takes_lock(device, shut):
                holding.locked[leg.device] = leg.position
            else:
                holding.loose[leg.device] = leg.position
                sure = False
        (holding.held if sure else holding.unheld).append(target)
    return holding


def way_out(  # noqa: PLR0913 - a search, its start and what it may not touch
    wiring: Wiring,
    state: State,
    shut: frozenset[LineId],
    start: LineId,
    fixed: Mapping[DeviceTag, str],
    *,
    through_checks: bool = False,
    to_hold: bool = True,
) -> list[Leg] | None:
    """The cheapest way from a line to a vent through sure open passages; None if there is none.

    `to_hold`: the way is to be held by locks, so devices that take one are much cheaper than others.

    `shut` lines are not entered; `fixed` devices stand where they are put. `through_checks`: a check that opens
    outward may be used too (for a line that nobody opens: it follows the line outside it down).
    """
    queue: list[tuple[float, int, LineId]] = [(0.0, 0, start)]
    order = 0
    came: dict[LineId, tuple[float, LineId | None, Leg | None]] = {start: (0.0, None, None)}
    while queue:
        cost, _, here = heapq.heappop(queue)
        if cost > came[here][0]:
            continue
        if here in wiring.vents:
            return _legs(came, here)
        for tag in wiring.touching[here]:
            device = wiring.device(tag)
            for position, there in _exits(wiring, device, here, fixed, through_checks=through_checks):
                if there in shut and there not in wiring.vents:
                    continue
                if any(leg.device == tag and leg.position != position for leg in _legs(came, here)):
                    continue
                total = cost + _price(device, position, state, fixed, shut, to_hold=to_hold)
                if there not in came or total < came[there][0]:
                    order += 1
                    came[there] = (total, here, Leg(tag, position, there))
                    heapq.heappush(queue, (total, order, there))
    return None


def _exits(
    wiring: Wiring, device: Device, here: LineId, fixed: Mapping[DeviceTag, str], *, through_checks: bool
) -> Iterable[tuple[str, LineId]]:
    positions = [fixed[device.tag]] if device.tag in fixed else [p for p in device.positions if p != FULL_OPEN]
    for position in positions:
        for item in device.positions[position]:
            if item.kind is PassageKind.OPEN and item.certain:
                if item.source == here:
                    yield position, item.target
                elif item.target == here:
                    yield position, item.source
            elif through_checks and item.kind is PassageKind.CHECK and item.certain and item.source == here:
                yield position, item.target


def _price(  # noqa: PLR0913 - a device in a position, and all that makes it dear
    device: Device,
    position: str,
    state: State,
    fixed: Mapping[DeviceTag, str],
    shut: frozenset[LineId],
    *,
    to_hold: bool,
) -> float:
    """What using a device costs: a lock, a move, and much for throwing a handle to its other end."""
    if not device.movable or device.tag in fixed:
        return 0.0
    moves = state.positions[device.tag] != position
    handle = _HANDLE if moves and device.kind is DeviceKind.FOUR_WAY_VALVE and position != "centre" else 0.0
    if not to_hold:
        return handle + (1.0 if moves else _MOVE)
    return handle + (1.0 if _takes_lock(device, shut) else _UNHELD) + (_MOVE if moves else 0.0)


def _takes_lock(device: Device, shut: frozenset[LineId]) -> bool:
    """Whether a lock holds the device: it can be locked, and nothing that may be live can move it all the same."""
    return device.lockable and not any(line in shut for line in unheld_movers(device))


def _legs(came: Mapping[LineId, tuple[float, LineId | None, Leg | None]], end: LineId) -> list[Leg]:
    legs: list[Leg] = []
    here: LineId | None = end
    while here is not None:
        _, before, leg = came[here]
        if leg is not None:
            legs.append(leg)
        here = before
    return legs[::-1]

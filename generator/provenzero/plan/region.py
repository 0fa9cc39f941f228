"""Which lines must be dead so that the zone is: the zone, and all that nothing lockable can keep from it.

A device on the edge of the dead region is locked in a position that separates the two sides. Where it cannot be, or
where the far side holds nothing but liquid (or one bottle) that empties with the rest, the region takes the far side
in.
"""

from collections.abc import Iterable, Mapping
from dataclasses import dataclass

from provenzero.network.model import FULL_OPEN, Device, DeviceKind, DeviceTag, LineId, SourceKind
from provenzero.plan.model import Obstacle
from provenzero.state.may import Reach, reach
from provenzero.state.model import State, Wiring


@dataclass(frozen=True, slots=True, kw_only=True)
class Region:
    """The dead region and its barriers (device and the position that separates)."""

    dead: frozenset[LineId]
    barriers: Mapping[DeviceTag, str]
    outside: Reach
    obstacles: tuple[Obstacle, ...]


def enclose(wiring: Wiring, state: State, seed: Iterable[LineId], *, take_in: bool = True) -> Region:
    """Grow a region from its seed until locks alone stand on its edge. `take_in`: also take in what is only liquid."""
    dead = set(seed)
    while True:
        outside = reach(wiring, {}, state.pressures, walls=frozenset(dead))
        barriers, beyond = _edge(wiring, state, dead, outside, take_in=take_in)
        wanted = (beyond | _drives(wiring, dead)) - dead
        # Pilots last: a barrier of a narrower region may be none of the final one.
        wanted = wanted or _pilots(wiring, barriers, outside) - dead
        if not wanted:
            return Region(
                dead=frozenset(dead), barriers=barriers, outside=outside, obstacles=_live_inside(wiring, dead)
            )
        dead |= wanted


def touching(wiring: Wiring, dead: Iterable[LineId]) -> list[DeviceTag]:
    """Devices with a passage to any of the lines, in the order of the network."""
    found = {tag for line in dead for tag in wiring.touching[line]}
    return [tag for tag in wiring.network.devices if tag in found]


def unheld_movers(device: Device) -> tuple[LineId, ...]:
    """Lines that can move a device in spite of a lock on it."""
    return tuple(LineId(m) for m in device.moved_by if m != "hand" and m not in device.lock_holds_against)


def _edge(
    wiring: Wiring, state: State, dead: set[LineId], outside: Reach, *, take_in: bool
) -> tuple[dict[DeviceTag, str], set[LineId]]:
    barriers: dict[DeviceTag, str] = {}
    beyond: set[LineId] = set()
    for tag in touching(wiring, dead):
        far = {
            there
            for here, ways in wiring.anywhere[tag].items()
            if here in dead
            for there in ways
            if there not in dead and there in outside.lines
        }
        if not far:
            continue
        position = _separating(wiring, state, tag, dead, far)
        bottle = wiring.device(tag).kind is DeviceKind.BOTTLE_VALVE
        if position is None or (take_in and (bottle or not _energetic(wiring, state, far, dead))):
            beyond |= far
        else:
            barriers[tag] = position
    return barriers, beyond


def _separating(wiring: Wiring, state: State, tag: DeviceTag, dead: set[LineId], far: set[LineId]) -> str | None:
    """The position in which a lock on the device keeps the far lines from the dead ones; None if there is none.

    A centre is preferred to an end, because an end could move the piston; else the position it stands in.
    """
    device = wiring.device(tag)
    if not device.lockable:
        return None
    good = [
        position
        for position in device.positions
        if position != FULL_OPEN
        and not any(
            there in far for here, ways in wiring.joined[tag, position].items() if here in dead for there in ways
        )
    ]
    if not good:
        return None
    if "centre" in good:
        return "centre"
    return state.positions[tag] if state.positions[tag] in good else good[0]


def _energetic(wiring: Wiring, state: State, far: set[LineId], dead: set[LineId]) -> bool:
    """Whether the far side holds compressed gas or a live source, as against trapped liquid only."""
    seen = set(far)
    stack = list(far)
    while stack:
        here = stack.pop()
        for tag in wiring.touching[here]:
            for there in wiring.anywhere[tag].get(here, ()):
                if there not in seen and there not in dead and there not in wiring.vents:
                    seen.add(there)
                    stack.append(there)
    for source in wiring.network.sources:
        if source.line not in seen:
            continue
        if source.kind is SourceKind.STORED and state.high(source.line) > 0.0:
            return True
        if source.kind is SourceKind.LIVE and (source.drive is None or source.drive not in dead):
            return True
    return False


def _drives(wiring: Wiring, dead: set[LineId]) -> set[LineId]:
    """Drives of pumps that deliver into the region, or that would start because they sense its pressure fall."""
    return {
        source.drive
        for source in wiring.network.sources
        if source.drive is not None and (source.line in dead or source.senses in dead)
    }


def _pilots(wiring: Wiring, barriers: Mapping[DeviceTag, str], outside: Reach) -> set[LineId]:
    """Pilot or supply lines that could move a barrier although it is locked."""
    return {line for tag in barriers for line in unheld_movers(wiring.device(tag)) if line in outside.lines}


def _live_inside(wiring: Wiring, dead: set[LineId]) -> tuple[Obstacle, ...]:
    return tuple(
        Obstacle(line=source.line, words="no_isolator", path=(source.id,))
        for source in wiring.network.sources
        if source.kind is SourceKind.LIVE and source.drive is None and source.line in dead
    )

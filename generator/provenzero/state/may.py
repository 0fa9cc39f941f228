"""Where pressure could come from: every passage of every free device in any position, checks and regulators both ways.

A locked device stands still unless one of its movers is not withstood by the lock and can itself be live. Vents
swallow what reaches them.
"""

from collections.abc import Iterable, Mapping
from dataclasses import dataclass

from provenzero.network.model import HAND, DeviceTag, LineId, SourceKind
from provenzero.state.model import Interval, Wiring


@dataclass(frozen=True, slots=True, kw_only=True)
class Reach:
    """Lines that could be under pressure. `came` tells for each by which device and from which line, or its source."""

    lines: frozenset[LineId]
    came: Mapping[LineId, tuple[DeviceTag | None, LineId | str]]
    freed: frozenset[DeviceTag]

    def path(self, line: LineId) -> tuple[str, ...]:
        """The way of the pressure to a line: source, line, device, line, device ... line."""
        back: list[str] = [line]
        while True:
            device, origin = self.came[LineId(back[-1])]
            if device is None:
                return tuple(reversed([*back, origin]))
            back += [device, origin]


def pressurised(wiring: Wiring, pressures: Mapping[LineId, Interval]) -> dict[LineId, str]:
    """Lines that hold pressure of their own (beyond a standing fluid column), each with the name of its source."""
    found: dict[LineId, str] = {}
    for source in wiring.network.sources:
        if source.kind is SourceKind.STORED and pressures[source.line][1] > 0.0:
            found[source.line] = source.id
    for key, line in wiring.network.lines.items():
        if not line.vent and pressures[key][1] > line.static_head_pag:
            found.setdefault(key, f"pressure trapped in {key}")
    return found


def reach(
    wiring: Wiring,
    locked: Mapping[DeviceTag, str],
    pressures: Mapping[LineId, Interval],
    *,
    leaking: frozenset[DeviceTag] = frozenset(),
    walls: frozenset[LineId] = frozenset(),
) -> Reach:
    """Flood the circuit from every source. `leaking` devices pass as if not locked; `walls` are lines not entered."""
    flood = _Flood(wiring, locked, walls)
    flood.freed |= leaking & set(locked)
    flood.enter((line, None, name) for line, name in pressurised(wiring, pressures).items())
    while flood.spread():
        pass
    return Reach(lines=frozenset(flood.came), came=flood.came, freed=frozenset(flood.freed))


class _Flood:
    def __init__(self, wiring: Wiring, locked: Mapping[DeviceTag, str], walls: frozenset[LineId]) -> None:
        self.wiring = wiring
        self.locked = locked
        self.walls = walls
        self.came: dict[LineId, tuple[DeviceTag | None, LineId | str]] = {}
        self.freed: set[DeviceTag] = set()
        self.edge: list[LineId] = []

    def enter(self, found: Iterable[tuple[LineId, DeviceTag | None, LineId | str]]) -> bool:
        new = False
        for line, device, origin in found:
            if line in self.came or line in self.wiring.vents or line in self.walls:
                continue
            self.came[line] = (device, origin)
            self.edge.append(line)
            new = True
        return new

    def spread(self) -> bool:
        """Flood as far as it goes, then wake pumps and free movable locks; true if that opened something new."""
        while self.edge:
            here = self.edge.pop()
            for tag in self.wiring.touching[here]:
                position = self.locked.get(tag)
                held = position is not None and tag not in self.freed
                ways = self.wiring.joined[tag, position] if held and position else self.wiring.anywhere[tag]
                self.enter((there, tag, here) for there in ways.get(here, ()))
        new = False
        for source in self.wiring.network.sources:
            awake = source.kind is SourceKind.LIVE and (source.drive is None or source.drive in self.came)
            if awake:
                new |= self.enter([(source.line, None, source.id)])
        for tag in self.locked:
            if tag not in self.freed and self._movable(tag):
                self.freed.add(tag)
                self.edge.extend(line for line in self.wiring.anywhere[tag] if line in self.came)
                new = True
        return new

    def _movable(self, tag: DeviceTag) -> bool:
        device = self.wiring.device(tag)
        for mover in device.moved_by:
            if mover in device.lock_holds_against:
                continue
            if mover == HAND or LineId(mover) in self.came:
                return True
        return False

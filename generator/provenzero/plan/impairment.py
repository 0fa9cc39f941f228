"""What the unit can no longer do: functions, remote commands, banks, pumps, panels, power sources."""

from collections.abc import Mapping
from dataclasses import dataclass

from provenzero.network.model import DeviceTag, LineId, SourceKind
from provenzero.plan.model import Impairment
from provenzero.state.model import Wiring
from provenzero.unit.model import Drive, PanelKind, Unit


@dataclass(frozen=True, slots=True, kw_only=True)
class Loss:
    """What is lost, as far as alternatives are weighed by it."""

    functions: tuple[str, ...]
    stores: tuple[str, ...]
    pumps: tuple[str, ...]
    remote: tuple[str, ...]

    def key(self) -> tuple[int, int, int, int]:
        """Order of weight: functions, then stored fluid, then pumps, then remote commands."""
        return (len(self.functions), len(self.stores), len(self.pumps), len(self.remote))


def loss(wiring: Wiring, dead: frozenset[LineId], locks: Mapping[DeviceTag, str]) -> Loss:
    """What is lost while these lines are dead and these devices locked."""
    network = wiring.network
    supply = {p.equipment: p.line for p in network.ports if p.name == "supply"}
    functions = [
        a.name
        for a in network.actuators
        if a.valve in locks or supply[a.name] in dead or a.open_line in dead or a.close_line in dead
    ]
    stores = [
        s.id
        for s in network.sources
        if s.kind is SourceKind.STORED and s.gas and _fluid(wiring, s.line) and _cut(wiring, s.line, dead, locks)
    ]
    pumps = [
        s.id
        for s in network.sources
        if s.kind is SourceKind.LIVE
        and s.drive is not None
        and (s.drive in dead or s.line in dead or _cut(wiring, s.line, dead, locks))
    ]
    pilots: dict[str, list[LineId]] = {}
    for port in network.ports:
        if port.name == "pilot":
            pilots.setdefault(port.equipment, []).append(port.line)
    remote = [a.name for a in network.actuators if any(line in dead for line in pilots.get(a.name, ()))]
    return Loss(functions=tuple(functions), stores=tuple(stores), pumps=tuple(pumps), remote=tuple(remote))


def _fluid(wiring: Wiring, line: LineId) -> bool:
    return wiring.network.lines[line].medium.value == "control_fluid" and line != "reservoir.liquid"


def _cut(wiring: Wiring, line: LineId, dead: frozenset[LineId], locks: Mapping[DeviceTag, str]) -> bool:
    """Whether a line is dead, or every way from it to a pressure line of the unit is locked shut."""
    if line in dead:
        return True
    goals = {p.line for p in wiring.network.ports if p.name == "supply"}
    seen = {line}
    stack = [line]
    while stack:
        here = stack.pop()
        if here in goals and here not in dead:
            return False
        for tag in wiring.touching[here]:
            position = locks.get(tag)
            ways = wiring.anywhere[tag] if position is None else wiring.joined[tag, position]
            for there in ways.get(here, ()):
                if there not in seen and there not in wiring.vents and there not in dead:
                    seen.add(there)
                    stack.append(there)
    return True


def impairment(wiring: Wiring, unit: Unit, dead: frozenset[LineId], locks: Mapping[DeviceTag, str]) -> Impairment:
    """The impairment of a finished isolation, in the words and order of the description."""
    lost = loss(wiring, dead, locks)
    stores = set(lost.stores)
    banks = [
        b.tag for b in unit.banks if b.tag in stores or any(f"{b.tag}/{n}" in stores for n in range(1, b.bottles + 1))
    ]
    port = {(p.equipment, p.name): p.line for p in wiring.network.ports}
    panels = []
    for panel in unit.panels:
        energy = port.get((panel.tag, "air" if panel.kind is PanelKind.PNEUMATIC else "power"))
        air = port.get((panel.tag, "air"))
        if energy in dead or air in dead:
            panels.append(panel.tag)
    left = dict.fromkeys("rig air" if p.drive is Drive.AIR else p.supply for p in unit.pumps if p.tag not in lost.pumps)
    return Impairment(
        functions_lost=lost.functions,
        remote_lost=lost.remote,
        banks_lost=tuple(banks),
        pumps_lost=lost.pumps,
        panels_lost=tuple(panels),
        backups_lost=tuple(n.tag for n in unit.nitrogen_backups if port[n.tag, "outlet"] in dead),
        power_sources_left=tuple(left),
    )

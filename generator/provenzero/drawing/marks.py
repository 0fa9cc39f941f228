"""What is marked on a circuit: the role of each line, where each device stands, which lock holds it, what stands open."""

from collections.abc import Mapping
from dataclasses import dataclass
from enum import StrEnum

from provenzero.drawing.model import Role
from provenzero.network.model import DeviceTag, LineId, Network, PassageKind
from provenzero.plan.model import Plan, Purpose
from provenzero.state.model import State
from provenzero.unit.model import ATMOSPHERE, RESERVOIR


class Vent(StrEnum):
    """Where an open vent lets out to."""

    TANK = "tank"
    AIR = "air"


@dataclass(frozen=True, slots=True, kw_only=True)
class Marks:
    """The marks of one moment. `pistons`: open, close or unknown by function."""

    lines: Mapping[LineId, Role]
    positions: Mapping[DeviceTag, str]
    locks: Mapping[DeviceTag, int]
    open_vents: Mapping[DeviceTag, Vent]
    pistons: Mapping[str, str]

    def role(self, line: LineId) -> Role:
        """The role of a line; neutral if nothing is said about it."""
        return self.lines.get(line, Role.NEUTRAL)


def plain(network: Network) -> Marks:
    """The unit as described: normal positions, no pressures, nothing locked."""
    return Marks(
        lines=dict.fromkeys(network.lines, Role.NEUTRAL),
        positions={tag: device.normal for tag, device in network.devices.items()},
        locks={},
        open_vents={},
        pistons={},
    )


def marks_of(plan: Plan) -> Marks:
    """The unit as it stands when the work starts."""
    state = plan.isolated()
    zone = frozenset(plan.zone)
    dead = frozenset(plan.dead)
    return Marks(
        lines={line: _role(plan.network, state, line, zone, dead) for line in plan.network.lines},
        positions=state.positions,
        locks={lock.device: lock.number for lock in plan.locks},
        open_vents={
            lock.device: _vent(plan.network, state, lock.device)
            for lock in plan.locks
            if lock.purpose is Purpose.VENT or lock.keeps_open
        },
        pistons=state.pistons,
    )


def _role(network: Network, state: State, line: LineId, zone: frozenset[LineId], dead: frozenset[LineId]) -> Role:
    if line in zone:
        return Role.ZONE
    low, high = state.pressures[line]
    if line in (RESERVOIR, ATMOSPHERE) and high <= 0.0:
        return Role.VENTED
    if line in dead or high <= 0.0:
        return Role.DEAD
    if line in state.fed or network.lines[line].medium.value == "electric" or _charged(network, line):
        return Role.LIVE
    return Role.TRAPPED if low > 0.0 else Role.UNKNOWN


def _charged(network: Network, line: LineId) -> bool:
    """The line is a source of its own that still holds pressure."""
    return any(source.line == line for source in network.sources)


def _vent(network: Network, state: State, device: DeviceTag) -> Vent:
    """The nearest vent that open passages lead to from an open device."""
    joined: dict[LineId, list[LineId]] = {}
    for tag, other in network.devices.items():
        for item in other.positions[state.positions[tag]]:
            if item.kind is PassageKind.OPEN:
                joined.setdefault(item.source, []).append(item.target)
                joined.setdefault(item.target, []).append(item.source)
    passages = network.devices[device].positions[state.positions[device]]
    edge = [line for item in passages for line in (item.target, item.source)]
    seen = set(edge)
    while edge:
        for line in edge:
            if network.lines[line].vent:
                return Vent.AIR if line == ATMOSPHERE else Vent.TANK
        edge = [there for line in edge for there in joined.get(line, ()) if there not in seen]
        seen.update(edge)
    return Vent.TANK

"""Where every device stands and which pressures each line may have: one moment of a unit."""

from collections.abc import Mapping
from dataclasses import dataclass, field

from provenzero.network.model import Device, DeviceTag, LineId, Network

Interval = tuple[float, float]
DEAD: Interval = (0.0, 0.0)


@dataclass(frozen=True, slots=True, kw_only=True)
class State:
    """Positions, pressures [low, high] in Pa gauge, and at which end each piston stands (open, close, unknown).

    `fed`: lines under compressed gas or a running source; `gassed`: those joined to compressed gas. `running`: live
    sources that are awake. `let_out`: live sources that a vent takes.
    """

    positions: Mapping[DeviceTag, str]
    pressures: Mapping[LineId, Interval]
    pistons: Mapping[str, str]
    fed: frozenset[LineId]
    gassed: frozenset[LineId]
    running: frozenset[str]
    let_out: frozenset[str]

    def high(self, line: LineId) -> float:
        """Highest pressure the line may have [Pa gauge]."""
        return self.pressures[line][1]

    def low(self, line: LineId) -> float:
        """Lowest pressure the line may have [Pa gauge]."""
        return self.pressures[line][0]


@dataclass(frozen=True, slots=True)
class Wiring:
    """A network with the look-ups that its solvers share: which devices touch a line, what each position joins."""

    network: Network
    touching: Mapping[LineId, tuple[DeviceTag, ...]] = field(compare=False)
    joined: Mapping[tuple[DeviceTag, str], Mapping[LineId, tuple[LineId, ...]]] = field(compare=False)
    anywhere: Mapping[DeviceTag, Mapping[LineId, tuple[LineId, ...]]] = field(compare=False)
    vents: frozenset[LineId] = field(compare=False)

    def device(self, tag: DeviceTag) -> Device:
        """The device of a tag; KeyError if there is none."""
        return self.network.devices[tag]


def wire(network: Network) -> Wiring:
    """Build the look-ups of a network once."""
    touching: dict[LineId, list[DeviceTag]] = {line: [] for line in network.lines}
    joined: dict[tuple[DeviceTag, str], Mapping[LineId, tuple[LineId, ...]]] = {}
    anywhere: dict[DeviceTag, Mapping[LineId, tuple[LineId, ...]]] = {}
    for tag, device in network.devices.items():
        every: dict[LineId, list[LineId]] = {}
        for position, passages in device.positions.items():
            here: dict[LineId, list[LineId]] = {}
            for item in passages:
                for one, other in ((item.source, item.target), (item.target, item.source)):
                    here.setdefault(one, []).append(other)
                    every.setdefault(one, []).append(other)
            joined[tag, position] = {k: tuple(v) for k, v in here.items()}
        anywhere[tag] = {k: tuple(dict.fromkeys(v)) for k, v in every.items()}
        for line in every:
            touching[line].append(tag)
    return Wiring(network, {k: tuple(v) for k, v in touching.items()}, joined, anywhere, network.vents())

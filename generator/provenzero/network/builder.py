"""Collects lines, devices, sources and ports while a unit is turned into its network."""

from dataclasses import dataclass, field

from provenzero.network.model import (
    HAND,
    Actuator,
    Device,
    DeviceKind,
    DeviceTag,
    Gauge,
    Line,
    LineId,
    Medium,
    Passage,
    PassageKind,
    Port,
    Source,
)
from provenzero.unit.model import Isolator, Valve, ValvePosition

OPEN = "open"
CLOSED = "closed"
FITTED = "fitted"
ON = "on"
OFF = "off"


def passage(kind: PassageKind, source: LineId, target: LineId, set_pag: float | None = None) -> Passage:
    """One certain passage."""
    return Passage(kind=kind, source=source, target=target, set_pag=set_pag)


def way(source: LineId, target: LineId) -> Passage:
    """An open passage, both ways."""
    return passage(PassageKind.OPEN, source, target)


@dataclass(slots=True)
class Builder:
    """What has been compiled so far. Devices are added once each; a line is named by whoever first needs it."""

    lines: dict[LineId, Line] = field(default_factory=dict)
    devices: dict[DeviceTag, Device] = field(default_factory=dict)
    sources: list[Source] = field(default_factory=list)
    actuators: list[Actuator] = field(default_factory=list)
    gauges: list[Gauge] = field(default_factory=list)
    ports: list[Port] = field(default_factory=list)
    charged_pag: dict[LineId, tuple[float, float]] = field(default_factory=dict)

    def line(
        self,
        name: str,
        words: str,
        medium: Medium = Medium.CONTROL_FLUID,
        *,
        volume_m3: float = 0.0,
        static_head_pag: float = 0.0,
    ) -> LineId:
        """Add a line, or find the one of that id; returns the id."""
        key = LineId(name)
        if key not in self.lines:
            self.lines[key] = Line(
                id=key, name=words, medium=medium, volume_m3=volume_m3, static_head_pag=static_head_pag
            )
        return key

    def device(self, device: Device) -> None:
        """Add a device; a tag can stand only once."""
        if device.tag in self.devices:
            raise ValueError(f"device tag {device.tag} is used twice")
        self.devices[device.tag] = device

    def fixed(self, tag: str, kind: DeviceKind, name: str, location: str, *passages: Passage) -> None:
        """Add a device that has one position and no mover."""
        self.device(
            Device(
                tag=DeviceTag(tag),
                kind=kind,
                name=name,
                location=location,
                positions={FITTED: passages},
                normal=FITTED,
                movable=False,
                moved_by=(),
            )
        )

    def valve(
        self,
        valve: Valve,
        kind: DeviceKind,
        name: str,
        *,
        opened: tuple[Passage, ...],
        closed: tuple[Passage, ...] = (),
    ) -> None:
        """Add a two-position valve moved by hand."""
        self.device(
            Device(
                tag=DeviceTag(valve.tag),
                kind=kind,
                name=name,
                location=valve.location,
                positions={OPEN: opened, CLOSED: closed},
                normal=OPEN if valve.normal is ValvePosition.OPEN else CLOSED,
                lockable=valve.lockable,
                lock_holds_against=(HAND,) if valve.lockable else (),
                way=valve.way,
                flow_coefficient_cv=valve.flow_coefficient_cv,
            )
        )

    def isolator(self, isolator: Isolator, name: str, supply: LineId, load: LineId) -> None:
        """Add the isolator of an electric supply or an engine."""
        self.device(
            Device(
                tag=DeviceTag(isolator.tag),
                kind=DeviceKind.ISOLATOR,
                name=name,
                location=isolator.location,
                positions={ON: (way(supply, load),), OFF: ()},
                normal=ON,
                lockable=isolator.lockable,
                lock_holds_against=(HAND,) if isolator.lockable else (),
                way=isolator.way,
            )
        )

    def port(self, equipment: str, name: str, line: LineId) -> None:
        """Say on which line an opening of a piece of equipment lies."""
        self.ports.append(Port(equipment=equipment, name=name, line=line))

"""Lines joined by devices: what a unit is once its iron is forgotten and only passages for pressure are left."""

from collections.abc import Mapping
from dataclasses import dataclass, replace
from enum import StrEnum
from typing import NewType

LineId = NewType("LineId", str)
DeviceTag = NewType("DeviceTag", str)

HAND = "hand"
FULL_OPEN = "full_open"  # where an air-operated regulator goes by itself when its air fails; no hand can choose it


class Medium(StrEnum):
    """What a line carries."""

    CONTROL_FLUID = "control_fluid"
    AIR = "air"
    NITROGEN = "nitrogen"
    ELECTRIC = "electric"


class PassageKind(StrEnum):
    """How a device in one position joins two lines."""

    OPEN = "open"
    CHECK = "check"
    REGULATOR = "regulator"
    RELIEF = "relief"


class DeviceKind(StrEnum):
    """What a device is, for words and symbols; the planner looks at passages only."""

    SHUT_OFF_VALVE = "shut_off_valve"
    BLEED_VALVE = "bleed_valve"
    BYPASS_VALVE = "bypass_valve"
    BANK_ISOLATION_VALVE = "bank_isolation_valve"
    BOTTLE_VALVE = "bottle_valve"
    GAS_VALVE = "gas_valve"
    GAUGE_VALVE = "gauge_valve"
    AIR_VALVE = "air_valve"
    PILOT_VALVE = "pilot_valve"
    DRAIN_VALVE = "drain_valve"
    FOUR_WAY_VALVE = "four_way_valve"
    REGULATOR = "regulator"
    REDUCER = "reducer"
    CHECK_VALVE = "check_valve"
    RELIEF_VALVE = "relief_valve"
    STRAINER = "strainer"
    ISOLATOR = "isolator"
    PANEL_CONTROL = "panel_control"
    PIPING = "piping"


class SourceKind(StrEnum):
    """Live sources keep coming; stored ones can be emptied."""

    LIVE = "live"
    STORED = "stored"


@dataclass(frozen=True, slots=True, kw_only=True)
class Line:
    """A volume with one pressure. `static_head_pag`: the fluid column that stands on it, stated apart [Pa]."""

    id: LineId
    name: str
    medium: Medium
    volume_m3: float = 0.0
    vent: bool = False
    static_head_pag: float = 0.0


@dataclass(frozen=True, slots=True, kw_only=True)
class Passage:
    """A way for pressure through a device. `certain` is false where the description does not know it is there."""

    kind: PassageKind
    source: LineId
    target: LineId
    set_pag: float | None = None
    certain: bool = True


@dataclass(frozen=True, slots=True, kw_only=True)
class OnLoss:
    """The position a device takes by itself when the pressure of `line` is gone."""

    line: LineId
    position: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Device:
    """Anything with positions. `moved_by` and `lock_holds_against` hold `hand` or ids of pilot or supply lines."""

    tag: DeviceTag
    kind: DeviceKind
    name: str
    location: str
    positions: Mapping[str, tuple[Passage, ...]]
    normal: str
    movable: bool = True
    lockable: bool = False
    moved_by: tuple[str, ...] = (HAND,)
    lock_holds_against: tuple[str, ...] = ()
    on_loss: OnLoss | None = None
    way: str = ""
    flow_coefficient_cv: float | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class Source:
    """Where pressure comes from: live while `drive` is live (or always), stored while its line has pressure.

    A pump on automatic starts when the pressure of `senses` can be below `starts_below_pag`. `gas`: the pressure is
    that of compressed gas, so the line keeps its pressure when a little fluid leaves.
    """

    id: str
    name: str
    line: LineId
    kind: SourceKind
    low_pag: float
    pressure_pag: float
    drive: LineId | None = None
    senses: LineId | None = None
    starts_below_pag: float | None = None
    gas: bool = False


@dataclass(frozen=True, slots=True, kw_only=True)
class Actuator:
    """The two chambers of a function's piston and the valve that feeds them."""

    name: str
    label: str
    open_line: LineId
    close_line: LineId
    valve: DeviceTag


@dataclass(frozen=True, slots=True, kw_only=True)
class Gauge:
    """An instrument and the line it stands on (its own stub where it has a valve). Pressures in Pa."""

    tag: str
    location: str
    line: LineId
    reads: LineId
    full_scale_pag: float | None
    accuracy_fraction: float | None
    resolution_pa: float | None
    readable: bool


@dataclass(frozen=True, slots=True, kw_only=True)
class Port:
    """An opening of a piece of equipment that a job can open: on which line it lies."""

    equipment: str
    name: str
    line: LineId


@dataclass(frozen=True, slots=True, kw_only=True)
class Network:
    """The whole circuit in all its media, with the pressures it has in normal service ([low, high], Pa gauge)."""

    lines: Mapping[LineId, Line]
    devices: Mapping[DeviceTag, Device]
    sources: tuple[Source, ...]
    actuators: tuple[Actuator, ...]
    gauges: tuple[Gauge, ...]
    ports: tuple[Port, ...]
    charged_pag: Mapping[LineId, tuple[float, float]]

    def opened(self, equipment: str, names: tuple[str, ...]) -> tuple[LineId, ...]:
        """Lines at the named ports of a piece of equipment, in the order of the names, each once."""
        found = [p.line for n in names for p in self.ports if p.equipment == equipment and p.name == n]
        return tuple(dict.fromkeys(found))

    def with_vents(self, vents: frozenset[LineId]) -> "Network":
        """The same circuit, where exactly these lines swallow what reaches them."""
        lines = {k: replace(v, vent=k in vents) for k, v in self.lines.items()}
        return replace(self, lines=lines)

    def vents(self) -> frozenset[LineId]:
        """Lines that swallow what reaches them."""
        return frozenset(k for k, v in self.lines.items() if v.vent)

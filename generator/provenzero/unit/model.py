"""What is known of one hydraulic control unit: frozen values, SI inside, gauge pressures in pascal.

`unknown` in a description arrives here in one of two ways. Where one answer is the worse case whatever the
job (a lock that may not hold, a bleed that may not be there), the loader takes that answer. Where the worse
case depends on the question (a centre position, a volume), the value stays open: `Centre.UNKNOWN` or None.
Either way an `Assumption` says so on every document.
"""

from dataclasses import dataclass
from enum import StrEnum
from typing import TypeAlias

ATMOSPHERE = "atmosphere"
HEADER = "header"
RESERVOIR = "reservoir"
RETURNS = "returns"


class Jurisdiction(StrEnum):
    """Where the unit works, as far as a document must say which rules it was held against."""

    US_LAND = "us_land"
    US_OFFSHORE = "us_offshore"
    UK = "uk"
    NORWAY = "norway"
    OTHER = "other"
    UNKNOWN = "unknown"


class FluidKind(StrEnum):
    """Family of the control fluid; decides stiffness, expansion and density bands."""

    MINERAL_OIL = "mineral_oil"
    WATER_GLYCOL = "water_glycol"
    WATER_BASED = "water_based"
    UNKNOWN = "unknown"


class Separator(StrEnum):
    """What keeps nitrogen and fluid apart in a bottle."""

    BLADDER = "bladder"
    PISTON = "piston"
    DIAPHRAGM = "diaphragm"
    UNKNOWN = "unknown"


class Centre(StrEnum):
    """What the centre of a three-position four-way valve does with the two function lines."""

    VENTS = "vents"
    BLOCKS = "blocks"
    UNKNOWN = "unknown"


class ValvePosition(StrEnum):
    """Position of a shut-off valve."""

    OPEN = "open"
    CLOSED = "closed"


class HandlePosition(StrEnum):
    """Position of a four-way valve, named for what the function does."""

    OPEN = "open"
    CENTRE = "centre"
    CLOSE = "close"


class Drive(StrEnum):
    """What turns a pump."""

    ELECTRIC = "electric"
    AIR = "air"
    DIESEL = "diesel"
    HAND = "hand"


class RegulatorControl(StrEnum):
    """How the set pressure of a regulator is held."""

    MANUAL = "manual"
    AIR = "air"


class AirFailure(StrEnum):
    """What an air-operated regulator does when its air goes."""

    CLOSES = "closes"
    HOLDS = "holds"
    OPENS = "opens"
    UNKNOWN = "unknown"


class FunctionKind(StrEnum):
    """What a function works."""

    ANNULAR = "annular"
    PIPE_RAM = "pipe_ram"
    VARIABLE_RAM = "variable_ram"
    BLIND_RAM = "blind_ram"
    BLIND_SHEAR_RAM = "blind_shear_ram"
    GATE_VALVE = "gate_valve"
    SPARE = "spare"


class LineKind(StrEnum):
    """What a function line is made of."""

    HOSE = "hose"
    PIPE = "pipe"
    UNKNOWN = "unknown"


class RamLock(StrEnum):
    """How a closed ram is held mechanically."""

    NONE = "none"
    MANUAL = "manual"
    REMOTE = "remote"
    UNKNOWN = "unknown"


class PanelKind(StrEnum):
    """How a remote panel sends its commands."""

    PNEUMATIC = "pneumatic"
    ELECTRIC = "electric"


class InstrumentKind(StrEnum):
    """What shows or senses a pressure."""

    GAUGE = "gauge"
    SWITCH = "switch"
    TRANSMITTER = "transmitter"


@dataclass(frozen=True, slots=True, kw_only=True)
class Assumption:
    """A fact nobody knew: where it is missing in the description and which worse case was taken."""

    path: str
    line: int | None
    taken: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Valve:
    """A two-position shut-off valve in a run, or a bleed.

    `exhausts`: in the closed position the downstream side is let out (air valves).
    `flow_coefficient_cv`: Cv in US gallons a minute at 1 psi; None if not known.
    `way`: how a hand sees and turns it, in the words of the description.
    """

    tag: str
    location: str
    normal: ValvePosition
    lockable: bool
    exhausts: bool = False
    flow_coefficient_cv: float | None = None
    way: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Isolator:
    """An electric isolator or breaker (or the stop of an engine): `on` in normal service."""

    tag: str
    location: str
    lockable: bool
    way: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class CheckValve:
    """Passes in the order of the run; never a barrier against reverse flow."""

    tag: str
    location: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Strainer:
    """A filter or strainer: always open; its cover is a port that a job may open."""

    tag: str
    location: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Reducer:
    """A fixed pressure-reducing valve inside a run (nitrogen backup, air): not lockable, not a barrier."""

    tag: str
    location: str
    set_pressure_pag: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Bleed:
    """A valve that lets the line out, `to` the reservoir, the return header or the atmosphere."""

    valve: Valve
    to: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Relief:
    """A relief valve, to the reservoir unless `to` says otherwise."""

    tag: str
    location: str
    set_pressure_pag: float | None
    to: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Instrument:
    """A gauge, switch or transmitter. `resolution_pa` is the smallest step a reader can tell; accuracy is of span."""

    tag: str
    location: str
    kind: InstrumentKind
    full_scale_pag: float | None
    accuracy_fraction: float | None
    resolution_pa: float | None
    valve: Valve | None


Inline: TypeAlias = Valve | CheckValve | Strainer | Reducer
Fitting: TypeAlias = Bleed | Relief | Instrument
Element: TypeAlias = Inline | Fitting


@dataclass(frozen=True, slots=True, kw_only=True)
class Reservoir:
    """The tank. `suction_head_m`: greatest height of fluid above the pump suctions."""

    tag: str
    location: str
    volume_m3: float | None
    fluid_volume_m3: float | None
    suction_head_m: float | None
    drain: Valve | None
    indoors: bool


@dataclass(frozen=True, slots=True, kw_only=True)
class Bank:
    """Bottles behind one isolation valve and one bleed, on `attached_to` (a pressure line or `<function>.close`).

    `bottle_valves` are the per-bottle shut-offs in bottle order, empty if there are none.
    """

    tag: str
    location: str
    attached_to: str
    bottles: int
    gas_volume_m3: float
    separator: Separator
    precharge_pag: float | None
    precharge_temperature_k: float | None
    isolation: Valve | None
    bleed: Bleed | None
    bottle_valves: tuple[Valve, ...]
    fittings: tuple[Fitting, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Pump:
    """A pump from suction to the line it delivers to. Runs are in the order in which the fluid meets them.

    `supply`: the name of the independent power source (electric), or "air". `energy` is where that energy is cut.
    `automatic`: a pressure switch on `delivers_to` starts it below `start_pressure_pag`.
    """

    tag: str
    location: str
    drive: Drive
    supply: str
    energy: Isolator | Valve | None
    flow_m3_s: float | None
    automatic: bool
    start_pressure_pag: float | None
    stop_pressure_pag: float
    suction: tuple[Element, ...]
    discharge: tuple[Element, ...]
    delivers_to: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Regulator:
    """A reducing regulator feeding the pressure line `serves` from the pressure line `fed_from`."""

    tag: str
    location: str
    serves: str
    fed_from: str
    control: RegulatorControl
    relieving: bool
    set_pressure_pag: float
    lockable: bool
    air_failure: AirFailure
    upstream: tuple[Element, ...]
    fittings: tuple[Fitting, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Bypass:
    """A valve that joins two pressure lines around a regulator."""

    valve: Valve
    around: str
    from_line: str
    to_line: str


@dataclass(frozen=True, slots=True, kw_only=True)
class FourWayValve:
    """Three-position four-way control valve of one function.

    `lock_holds_against_pilot`: a lock on the handle also withstands the remote actuator.
    `panels`: tags of the panels that can move it. `pilot_isolation`: a shut-off in its own pilot lines.
    """

    tag: str
    location: str
    centre: Centre
    normal: HandlePosition
    lockable: bool
    lock_holds_against_pilot: bool
    guarded: bool
    supply: tuple[Element, ...]
    panels: tuple[str, ...]
    pilot_isolation: Valve | None


@dataclass(frozen=True, slots=True, kw_only=True)
class FunctionLines:
    """The two lines from unit to preventer. Height of the preventer over the unit; negative when below."""

    kind: LineKind
    length_m: float | None
    bore_m: float | None
    height_m: float | None


@dataclass(frozen=True, slots=True, kw_only=True)
class Function:
    """One preventer or gate valve with an opening and a closing chamber."""

    name: str
    label: str
    kind: FunctionKind
    bore_m: float | None
    open_volume_m3: float | None
    close_volume_m3: float | None
    closing_ratio: float | None
    ram_lock: RamLock
    fed_from: str
    valve: FourWayValve
    lines: FunctionLines
    open_fittings: tuple[Fitting, ...]
    close_fittings: tuple[Fitting, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class AirSupply:
    """Rig air to the unit: `run` in order of flow from the rig's air system to the unit's air line."""

    pressure_pag: float
    run: tuple[Element, ...]
    fittings: tuple[Fitting, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Panel:
    """A remote control panel.

    `energy` cuts its air (pneumatic) or its power (electric). `pilot_air`: for an electric panel whose solenoids
    send pilot air, the valve of that air; None when an electric panel moves the valves directly.
    """

    tag: str
    location: str
    kind: PanelKind
    supply: str
    energy: Valve | Isolator | None
    through_pilot_air: bool
    pilot_air: Valve | None


@dataclass(frozen=True, slots=True, kw_only=True)
class NitrogenBackup:
    """High-pressure nitrogen that can drive a pressure line; `run` in order of flow from the bottles."""

    tag: str
    location: str
    bottles: int
    bottle_volume_m3: float
    pressure_pag: float
    run: tuple[Element, ...]
    delivers_to: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Identity:
    """Which unit, where, and what else is written about it."""

    tag: str
    name: str
    site: str
    jurisdiction: Jurisdiction
    rated_pressure_pag: float
    drawing: str
    manual: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Verification:
    """Who walked the description down against the steel, and when (ISO date)."""

    by: str
    on: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Description:
    """Revision data of the file itself."""

    revision: str
    date: str
    written_by: str
    verification: Verification | None


@dataclass(frozen=True, slots=True, kw_only=True)
class Unit:
    """One hydraulic control unit with its lines up to the preventer actuators."""

    identity: Identity
    description: Description
    fluid: FluidKind
    fluid_name: str
    fluid_density_kg_m3: float | None
    ambient_low_k: float
    ambient_high_k: float
    reservoir: Reservoir
    common_returns: bool
    header_fittings: tuple[Fitting, ...]
    banks: tuple[Bank, ...]
    pumps: tuple[Pump, ...]
    regulators: tuple[Regulator, ...]
    bypasses: tuple[Bypass, ...]
    functions: tuple[Function, ...]
    air: AirSupply | None
    panels: tuple[Panel, ...]
    nitrogen_backups: tuple[NitrogenBackup, ...]
    assumptions: tuple[Assumption, ...]

"""From data that fits the schema to the model of a unit; what is not known becomes its worse case and is noted."""

from collections.abc import Mapping, Sequence
from typing import Any

from provenzero.quantity import Dimension, QuantityError, parse
from provenzero.reading.lines import Document
from provenzero.unit.model import (
    ATMOSPHERE,
    HEADER,
    RESERVOIR,
    AirFailure,
    AirSupply,
    Assumption,
    Bank,
    Bleed,
    Bypass,
    Centre,
    CheckValve,
    Description,
    Drive,
    Element,
    Fitting,
    FluidKind,
    FourWayValve,
    Function,
    FunctionKind,
    FunctionLines,
    HandlePosition,
    Identity,
    Instrument,
    InstrumentKind,
    Isolator,
    Jurisdiction,
    LineKind,
    NitrogenBackup,
    Panel,
    PanelKind,
    Pump,
    RamLock,
    Reducer,
    Regulator,
    RegulatorControl,
    Relief,
    Reservoir,
    Separator,
    Strainer,
    Unit,
    Valve,
    ValvePosition,
    Verification,
)

UNKNOWN = "unknown"
NONE = "none"
_COLDEST_K = 273.15
_WARMEST_K = 313.15
_ACCURACY_PERCENT = 2.5
_STEPS_OF_A_DIAL = 100.0

Path = tuple[str | int, ...]


class Reader:
    """Hands out values of a description, notes what is not known and what cannot be read."""

    def __init__(self, document: Document) -> None:
        """Start at the top of a description that fits the schema."""
        self.document = document
        self.assumptions: list[Assumption] = []
        self.errors: list[tuple[Path, QuantityError]] = []

    def assume(self, path: Path, taken: str) -> None:
        """Note that something is not known, and what is taken instead."""
        place = self.document.place(path)
        self.assumptions.append(Assumption(path=place.path, line=place.line, taken=taken))


class Node:
    """One mapping of the description, with its path."""

    def __init__(self, reader: Reader, data: Mapping[str, Any], path: Path) -> None:
        """Stand on a mapping."""
        self.reader = reader
        self.data = data
        self.path = path

    def at(self, key: str) -> "Node":
        """The mapping under a key; an empty one if the key is left out."""
        return Node(self.reader, self.data.get(key) or {}, (*self.path, key))

    def each(self, key: str) -> list["Node"]:
        """The mappings of a list under a key; none if the key is left out or not a list."""
        items = self.data.get(key)
        if not isinstance(items, list):
            return []
        return [Node(self.reader, item, (*self.path, key, i)) for i, item in enumerate(items)]

    def text(self, key: str, default: str = "") -> str:
        """Words under a key."""
        return str(self.data.get(key, default))

    def number(self, key: str, taken: str, default: float | None = None) -> float | None:
        """A plain number; where it is not known, the default, with a note."""
        value = self.data.get(key, UNKNOWN)
        if value == UNKNOWN:
            if key in self.data:
                self.reader.assume((*self.path, key), taken)
            return default
        return float(value)

    def quantity(self, key: str, dimension: Dimension) -> float:
        """A value with its unit, in SI; 0 after an error, which is noted."""
        try:
            return parse(str(self.data[key]), dimension)
        except QuantityError as error:
            self.reader.errors.append(((*self.path, key), error))
            return 0.0

    def maybe(self, key: str, dimension: Dimension, taken: str) -> float | None:
        """A value with its unit, or None where it is not known, with a note."""
        value = self.data.get(key, NONE)
        if value == UNKNOWN:
            self.reader.assume((*self.path, key), taken)
            return None
        return None if value == NONE else self.quantity(key, dimension)

    def yes(self, key: str, taken: str, *, unknown: bool = False, left_out: bool = False) -> bool:
        """A yes or no; what stands for unknown is noted."""
        value = self.data.get(key)
        if value is None:
            return left_out
        if value == UNKNOWN:
            self.reader.assume((*self.path, key), taken)
            return unknown
        return bool(value == "yes")

    def word(self, key: str, default: str, taken: str) -> str:
        """A word of a closed set; where it is not known, `unknown`, with a note."""
        value = self.text(key, default)
        if value == UNKNOWN and key in self.data:
            self.reader.assume((*self.path, key), taken)
        return value

    def part(self, key: str, taken: str) -> "Node | None":
        """A mapping, or None where it is not there or not known, the latter with a note."""
        value = self.data.get(key, NONE)
        if value == UNKNOWN:
            self.reader.assume((*self.path, key), taken)
            return None
        return self.at(key) if isinstance(value, Mapping) else None


def unit_of(reader: Reader) -> Unit | None:
    """The unit of a description that fits the schema; None if values in it cannot be read (see `reader.errors`)."""
    top = Node(reader, reader.document.data, ())
    fluid, about = top.at("fluid"), top.at("description")
    unit = Unit(
        identity=_identity(top.at("unit")),
        description=_description(about),
        fluid=FluidKind(fluid.word("kind", UNKNOWN, "the widest bands of stiffness and expansion are printed")),
        fluid_name=fluid.text("name"),
        fluid_density_kg_m3=fluid.maybe("density", Dimension.DENSITY, "the heaviest fluid of its kind is taken"),
        ambient_low_k=_ambient(top, "low", _COLDEST_K),
        ambient_high_k=_ambient(top, "high", _WARMEST_K),
        reservoir=_reservoir(top.at("reservoir")),
        common_returns=top.word("returns", UNKNOWN, "one common return header is taken") != "individual",
        header_fittings=_fittings(top.at("header"), "fittings"),
        banks=tuple(_bank(n) for n in top.each("banks")),
        pumps=tuple(_pump(n) for n in top.each("pumps")),
        regulators=tuple(_regulator(n) for n in top.each("regulators")),
        bypasses=tuple(_bypass(n) for n in top.each("bypasses")),
        functions=tuple(_function(n) for n in top.each("functions")),
        air=_air(top),
        panels=tuple(_panel(n) for n in top.each("panels")),
        nitrogen_backups=tuple(_backup(n) for n in top.each("nitrogen_backup")),
        assumptions=tuple(reader.assumptions),
    )
    return None if reader.errors else unit


def _identity(node: Node) -> Identity:
    return Identity(
        tag=node.text("tag"),
        name=node.text("name"),
        site=node.text("site"),
        jurisdiction=Jurisdiction(
            node.word("jurisdiction", UNKNOWN, "the permit is benchmarked against 29 CFR 1910.147")
        ),
        rated_pressure_pag=node.quantity("rated_pressure", Dimension.PRESSURE),
        drawing=node.text("drawing"),
        manual=node.text("manual"),
    )


def _description(node: Node) -> Description:
    seen = node.at("verified") if isinstance(node.data.get("verified"), Mapping) else None
    return Description(
        revision=node.text("revision"),
        date=node.text("date"),
        written_by=node.text("written_by"),
        verification=None if seen is None else Verification(by=seen.text("by"), on=seen.text("on")),
    )


def _ambient(top: Node, key: str, default: float) -> float:
    return default if "ambient" not in top.data else top.at("ambient").quantity(key, Dimension.TEMPERATURE)


def _reservoir(node: Node) -> Reservoir:
    drain = node.part("drain", "no drain valve is reckoned with")
    return Reservoir(
        tag=node.text("tag"),
        location=node.text("location"),
        volume_m3=node.maybe("volume", Dimension.VOLUME, "whether the fluid has room is not known"),
        fluid_volume_m3=node.maybe("fluid_volume", Dimension.VOLUME, "whether the fluid has room is not known"),
        suction_head_m=node.maybe("suction_head", Dimension.LENGTH, "3 m of fluid above the pump suctions is taken"),
        drain=None if drain is None else _valve(drain, normal="closed"),
        indoors=node.yes("indoors", "the unit is taken to stand in a room", unknown=True, left_out=True),
    )


def _lockable(node: Node, key: str = "lockable") -> bool:
    return node.yes(key, "it is taken that no lock holds it")


def _valve(node: Node, normal: str = "open") -> Valve:
    return Valve(
        tag=node.text("tag"),
        location=node.text("location"),
        normal=ValvePosition(node.text("normal", normal)),
        lockable=_lockable(node),
        exhausts=node.yes("exhausts", "it is taken not to exhaust"),
        flow_coefficient_cv=node.number("cv", "no bleed-down time is printed"),
        way=node.text("way"),
    )


def _isolator(node: Node) -> Isolator:
    return Isolator(
        tag=node.text("tag"), location=node.text("location"), lockable=_lockable(node), way=node.text("way")
    )


def _bleed(node: Node) -> Bleed:
    return Bleed(valve=_valve(node, normal="closed"), to=node.text("to", RESERVOIR))


def _element(node: Node) -> Element:
    tag, location = node.text("tag"), node.text("location")
    match node.text("kind"):
        case "valve":
            return _valve(node)
        case "check":
            return CheckValve(tag=tag, location=location)
        case "strainer":
            return Strainer(tag=tag, location=location)
        case "reducer":
            return Reducer(
                tag=tag, location=location, set_pressure_pag=node.quantity("set_pressure", Dimension.PRESSURE)
            )
        case _:
            return _fitting(node)


def _fitting(node: Node) -> Fitting:
    tag, location = node.text("tag"), node.text("location")
    match node.text("kind"):
        case "bleed":
            return _bleed(node)
        case "relief":
            opens = node.maybe("set_pressure", Dimension.PRESSURE, "the relief valve is not relied on")
            return Relief(tag=tag, location=location, set_pressure_pag=opens, to=node.text("to", RESERVOIR))
        case _:
            return _instrument(node)


def _instrument(node: Node) -> Instrument:
    own = node.part("valve", "no valve of its own is reckoned with")
    scale = node.maybe("full_scale", Dimension.PRESSURE, "its accuracy is not computed")
    step = node.maybe("resolution", Dimension.PRESSURE, "a hundredth of full scale is taken")
    accuracy = node.number("accuracy", "2.5 % of full scale is taken", _ACCURACY_PERCENT)
    return Instrument(
        tag=node.text("tag"),
        location=node.text("location"),
        kind=InstrumentKind(node.text("kind")),
        full_scale_pag=scale,
        accuracy_fraction=None if accuracy is None else accuracy / 100.0,
        resolution_pa=step if step is not None or scale is None else scale / _STEPS_OF_A_DIAL,
        valve=None if own is None else _valve(own),
    )


def _run(node: Node, key: str) -> tuple[Element, ...]:
    return tuple(_element(n) for n in node.each(key))


def _fittings(node: Node, key: str) -> tuple[Fitting, ...]:
    return tuple(_fitting(n) for n in node.each(key))


def _bank(node: Node) -> Bank:
    isolation = node.part("isolation", "no isolation valve is reckoned with")
    let_out = node.part("bleed", "no bleed valve is reckoned with")
    charge = node.part("precharge", "volumes and energies of the bank are not known")
    if node.data.get("bottle_valves") == UNKNOWN:
        node.reader.assume((*node.path, "bottle_valves"), "no bottle valves are reckoned with")
    return Bank(
        tag=node.text("tag"),
        location=node.text("location"),
        attached_to=node.text("attached_to", HEADER),
        bottles=int(node.data["bottles"]),
        gas_volume_m3=node.quantity("gas_volume", Dimension.VOLUME),
        separator=Separator(node.word("separator", UNKNOWN, "the kind of separator is not known")),
        precharge_pag=None if charge is None else charge.quantity("pressure", Dimension.PRESSURE),
        precharge_temperature_k=None if charge is None else charge.quantity("temperature", Dimension.TEMPERATURE),
        isolation=None if isolation is None else _valve(isolation),
        bleed=None if let_out is None else _bleed(let_out),
        bottle_valves=tuple(_valve(n) for n in node.each("bottle_valves")),
        fittings=_fittings(node, "fittings"),
    )


def _pump(node: Node) -> Pump:
    energy = node.part("energy", "it is taken that its energy cannot be cut")
    drive = Drive(node.text("drive"))
    return Pump(
        tag=node.text("tag"),
        location=node.text("location"),
        drive=drive,
        supply=node.text("supply"),
        energy=None if energy is None else _valve(energy) if drive is Drive.AIR else _isolator(energy),
        flow_m3_s=node.maybe("flow", Dimension.FLOW, "no charging time is printed"),
        automatic=node.yes("automatic", "it is taken to start by itself", unknown=True),
        start_pressure_pag=node.maybe(
            "start_pressure", Dimension.PRESSURE, "it is taken to start at its stop pressure"
        ),
        stop_pressure_pag=node.quantity("stop_pressure", Dimension.PRESSURE),
        suction=_run(node, "suction"),
        discharge=_run(node, "discharge"),
        delivers_to=node.text("delivers_to", HEADER),
    )


def _regulator(node: Node) -> Regulator:
    return Regulator(
        tag=node.text("tag"),
        location=node.text("location"),
        serves=node.text("serves"),
        fed_from=node.text("fed_from"),
        control=RegulatorControl(node.text("control")),
        relieving=node.yes("relieving", "it is taken not to relieve"),
        set_pressure_pag=node.quantity("set_pressure", Dimension.PRESSURE),
        lockable=_lockable(node),
        air_failure=AirFailure(node.word("air_failure", UNKNOWN, "it is taken to open when its air fails")),
        upstream=_run(node, "upstream"),
        fittings=_fittings(node, "fittings"),
    )


def _bypass(node: Node) -> Bypass:
    return Bypass(
        valve=_valve(node.at("valve"), normal="closed"),
        around=node.text("around"),
        from_line=node.text("from"),
        to_line=node.text("to"),
    )


def _function(node: Node) -> Function:
    return Function(
        name=node.text("name"),
        label=node.text("label"),
        kind=FunctionKind(node.text("kind")),
        bore_m=node.maybe("bore", Dimension.LENGTH, "the shorter closing time is asked for"),
        open_volume_m3=node.maybe("open_volume", Dimension.VOLUME, "the volume to open is not known"),
        close_volume_m3=node.maybe("close_volume", Dimension.VOLUME, "the volume to close is not known"),
        closing_ratio=node.number("closing_ratio", "the closing pressure against the well is not computed"),
        ram_lock=RamLock(node.word("ram_lock", UNKNOWN, "a ram lock may be there")),
        fed_from=node.text("fed_from"),
        valve=_four_way(node.at("valve")),
        lines=_lines(node.at("lines")),
        open_fittings=_fittings(node, "open_fittings"),
        close_fittings=_fittings(node, "close_fittings"),
    )


def _four_way(node: Node) -> FourWayValve:
    pilot = node.part("pilot_isolation", "no pilot shut-off is reckoned with")
    panels: Sequence[str] = node.data.get("panels", ())
    return FourWayValve(
        tag=node.text("tag"),
        location=node.text("location"),
        centre=Centre(node.word("centre", UNKNOWN, "each time the worse of vents and blocks is taken")),
        normal=HandlePosition(node.text("normal", "open")),
        lockable=_lockable(node),
        lock_holds_against_pilot=node.yes(
            "lock_holds_against_pilot", "it is taken that the remote actuator can overcome the lock"
        ),
        guarded=node.yes("guarded", "no guard is reckoned with"),
        supply=_run(node, "supply"),
        panels=tuple(panels),
        pilot_isolation=None if pilot is None else _valve(pilot),
    )


def _lines(node: Node) -> FunctionLines:
    return FunctionLines(
        kind=LineKind(node.word("kind", UNKNOWN, "hose and pipe are both reckoned with")),
        length_m=node.maybe("length", Dimension.LENGTH, "the volume of the lines is not known"),
        bore_m=node.maybe("bore", Dimension.LENGTH, "the volume of the lines is not known"),
        height_m=node.maybe("height", Dimension.HEIGHT, "a fluid column may stand on the lines"),
    )


def _air(top: Node) -> AirSupply | None:
    node = top.part("air", "")
    if node is None:
        return None
    return AirSupply(
        pressure_pag=node.quantity("pressure", Dimension.PRESSURE),
        run=_run(node, "run"),
        fittings=_fittings(node, "fittings"),
    )


def _panel(node: Node) -> Panel:
    energy = node.part("energy", "it is taken that its energy cannot be cut")
    kind = PanelKind(node.text("kind"))
    pilot = node.part("pilot_air", "no pilot air valve is reckoned with")
    return Panel(
        tag=node.text("tag"),
        location=node.text("location"),
        kind=kind,
        supply=node.text("supply", "panel supply"),
        energy=None if energy is None else _valve(energy) if kind is PanelKind.PNEUMATIC else _isolator(energy),
        through_pilot_air=kind is PanelKind.ELECTRIC and node.text("through_pilot_air", "no") == "yes",
        pilot_air=None if pilot is None else _valve(pilot),
    )


def _backup(node: Node) -> NitrogenBackup:
    return NitrogenBackup(
        tag=node.text("tag"),
        location=node.text("location"),
        bottles=int(node.data["bottles"]),
        bottle_volume_m3=node.quantity("bottle_volume", Dimension.VOLUME),
        pressure_pag=node.quantity("pressure", Dimension.PRESSURE),
        run=_run(node, "run"),
        delivers_to=node.text("delivers_to", HEADER),
    )


__all__ = ["ATMOSPHERE", "Reader", "unit_of"]

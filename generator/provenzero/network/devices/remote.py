"""Air to the unit, remote panels and the pilot lines by which they move four-way valves."""

from provenzero.network.builder import Builder, passage, way
from provenzero.network.devices.pumps import electric_supply
from provenzero.network.devices.runs import fitting, has_inline, run
from provenzero.network.model import (
    HAND,
    Device,
    DeviceKind,
    DeviceTag,
    LineId,
    Medium,
    PassageKind,
    Source,
    SourceKind,
)
from provenzero.unit.model import AirSupply, FourWayValve, Isolator, Panel, PanelKind, Valve

AIR = LineId("air")
NEUTRAL = "neutral"
SENDING = "sending"


def air(builder: Builder, item: AirSupply) -> None:
    """Compile the air supply up to the air line of the unit."""
    rig = builder.line("air.supply", "rig air supply", Medium.AIR)
    unit = builder.line("air", "air line of the unit", Medium.AIR)
    run(builder, item.run, start=rig, end=unit, prefix="air.feed", words="air supply", medium=Medium.AIR)
    for element in item.fittings:
        fitting(builder, element, unit)
    if not has_inline(item.run):
        builder.fixed("air-piping", DeviceKind.PIPING, "air pipe to the unit", "", way(rig, unit))
    builder.sources.append(
        Source(
            id="air.supply",
            name="rig air",
            line=rig,
            kind=SourceKind.LIVE,
            low_pag=item.pressure_pag,
            pressure_pag=item.pressure_pag,
        )
    )
    builder.port("air", "supply", unit)


def panel(builder: Builder, item: Panel) -> None:
    """Compile the energy of one panel: its air, or its power and the pilot air it sends."""
    if item.kind is PanelKind.PNEUMATIC:
        feed = AIR
        if isinstance(item.energy, Valve):
            feed = builder.line(f"{item.tag}.air", f"air of panel {item.tag}", Medium.AIR)
            run(
                builder,
                (item.energy,),
                start=AIR,
                end=feed,
                prefix=f"{item.tag}.air",
                words=f"air to panel {item.tag}",
            )
        builder.port(item.tag, "air", feed)
        return
    supply = electric_supply(builder, item.supply)
    if isinstance(item.energy, Isolator):
        power = builder.line(f"{item.tag}.power", f"power of panel {item.tag}", Medium.ELECTRIC)
        builder.isolator(item.energy, f"isolator of panel {item.tag}", supply, power)
        builder.port(item.tag, "power", power)
    else:
        builder.port(item.tag, "power", supply)
    if item.through_pilot_air:
        pilot_air = AIR
        if item.pilot_air is not None:
            pilot_air = builder.line(f"{item.tag}.air", f"pilot air of panel {item.tag}", Medium.AIR)
            run(
                builder,
                (item.pilot_air,),
                start=AIR,
                end=pilot_air,
                prefix=f"{item.tag}.air",
                words=f"pilot air of panel {item.tag}",
            )
        builder.port(item.tag, "air", pilot_air)


def _port(builder: Builder, equipment: str, name: str) -> LineId:
    return next(p.line for p in builder.ports if p.equipment == equipment and p.name == name)


def movers(builder: Builder, function: str, valve: FourWayValve, panels: tuple[Panel, ...]) -> tuple[str, ...]:
    """Make the pilot lines of one four-way valve; returns what can move it: the hand and line ids."""
    found: list[str] = [HAND]
    pilots: list[LineId] = []
    for item in panels:
        if item.tag not in valve.panels:
            continue
        if item.kind is PanelKind.ELECTRIC and not item.through_pilot_air:
            found.append(_port(builder, item.tag, "power"))
            continue
        pilots.append(_control(builder, function, item))
    if not pilots or valve.pilot_isolation is None:
        return (*found, *pilots)
    return (*found, _isolated(builder, function, valve.pilot_isolation, pilots))


def _control(builder: Builder, function: str, item: Panel) -> LineId:
    pilot = builder.line(f"{function}.pilot.{item.tag}", f"pilot lines of {function} from panel {item.tag}", Medium.AIR)
    feed = _port(builder, item.tag, "air")
    atmosphere = LineId("atmosphere")
    electric = item.kind is PanelKind.ELECTRIC
    moved_by = (HAND, _port(builder, item.tag, "power")) if electric else (HAND,)
    builder.device(
        Device(
            tag=DeviceTag(f"{item.tag}:{function}"),
            kind=DeviceKind.PANEL_CONTROL,
            name=f"control of {function} on panel {item.tag}",
            location=item.location,
            positions={
                NEUTRAL: (way(pilot, atmosphere),),
                SENDING: (way(feed, pilot),),
            },
            normal=NEUTRAL,
            moved_by=moved_by,
        )
    )
    builder.port(function, "pilot", pilot)
    return pilot


def _isolated(builder: Builder, function: str, valve: Valve, pilots: list[LineId]) -> LineId:
    own = builder.line(f"{function}.pilot", f"pilot lines of {function} at the valve", Medium.AIR)
    opened = tuple(passage(PassageKind.CHECK, p, own) for p in pilots)
    closed = (way(own, LineId("atmosphere")),) if valve.exhausts else ()
    builder.valve(valve, DeviceKind.PILOT_VALVE, f"pilot shut-off of {function}", opened=opened, closed=closed)
    builder.port(function, "pilot", own)
    return own

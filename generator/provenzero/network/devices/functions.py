"""Functions: the four-way valve, the two lines and the two chambers."""

from provenzero.network.builder import Builder, way
from provenzero.network.devices.remote import movers
from provenzero.network.devices.runs import fitting, has_inline, run
from provenzero.network.model import (
    HAND,
    Actuator,
    Device,
    DeviceKind,
    DeviceTag,
    LineId,
    Medium,
    Passage,
    PassageKind,
)
from provenzero.unit.model import RESERVOIR, RETURNS, Centre, Function, Panel

GRAVITY_M_S2 = 9.80665
QUARTER_PI = 0.7853981633974483


def chambers(builder: Builder, item: Function, density_kg_m3: float) -> None:
    """Make the two function lines, so that others (surge bottles) can refer to them."""
    head = density_kg_m3 * GRAVITY_M_S2 * max(item.lines.height_m or 0.0, 0.0)
    bore, length = item.lines.bore_m, item.lines.length_m
    line_m3 = 0.0 if bore is None or length is None else QUARTER_PI * bore**2 * length
    for side, volume in (("open", item.open_volume_m3), ("close", item.close_volume_m3)):
        builder.line(
            f"{item.name}.{side}",
            f"{item.label}, {'opening' if side == 'open' else 'closing'} line",
            volume_m3=line_m3 + (volume or 0.0),
            static_head_pag=head,
        )


def function(builder: Builder, item: Function, panels: tuple[Panel, ...], *, common_returns: bool) -> None:
    """Compile one function with its four-way valve."""
    valve = item.valve
    open_line, close_line = LineId(f"{item.name}.open"), LineId(f"{item.name}.close")
    feed = LineId(item.fed_from)
    supply = feed
    if has_inline(valve.supply):
        supply = builder.line(f"{item.name}.supply", f"{item.label}, supply of the four-way valve")
    run(
        builder,
        valve.supply,
        start=feed,
        end=supply,
        prefix=f"{item.name}.supply",
        words=f"supply of {valve.tag}",
    )
    tank = LineId(RETURNS)
    if not common_returns:
        tank = builder.line(f"{item.name}.return", f"{item.label}, return of the four-way valve")
        builder.fixed(
            f"{valve.tag}-return",
            DeviceKind.PIPING,
            f"return line of {valve.tag}",
            valve.location,
            way(tank, LineId(RESERVOIR)),
        )
    for element in item.open_fittings:
        fitting(builder, element, open_line)
    for element in item.close_fittings:
        fitting(builder, element, close_line)
    pilots = movers(builder, item.name, valve, panels)
    for line in pilots[1:]:
        if builder.lines[LineId(line)].medium is Medium.AIR:
            builder.port(valve.tag, "pilot", LineId(line))
    holds = () if not valve.lockable else pilots if valve.lock_holds_against_pilot else (HAND,)
    builder.device(
        Device(
            tag=DeviceTag(valve.tag),
            kind=DeviceKind.FOUR_WAY_VALVE,
            name=f"four-way valve, {item.label}",
            location=valve.location,
            positions={
                "open": (way(supply, open_line), way(close_line, tank)),
                "centre": _centre(valve.centre, open_line, close_line, tank),
                "close": (way(supply, close_line), way(open_line, tank)),
            },
            normal=valve.normal.value,
            lockable=valve.lockable,
            moved_by=pilots,
            lock_holds_against=holds,
        )
    )
    builder.actuators.append(
        Actuator(
            name=item.name,
            label=item.label,
            open_line=open_line,
            close_line=close_line,
            valve=DeviceTag(valve.tag),
        )
    )
    ports = (("open_line", open_line), ("close_line", close_line), ("supply", supply), ("return", tank))
    for name, line in ports:
        builder.port(item.name, name, line)
        builder.port(valve.tag, name, line)


def _centre(centre: Centre, open_line: LineId, close_line: LineId, tank: LineId) -> tuple[Passage, ...]:
    if centre is Centre.BLOCKS:
        return ()
    certain = centre is Centre.VENTS
    return tuple(
        Passage(kind=PassageKind.OPEN, source=line, target=tank, certain=certain) for line in (open_line, close_line)
    )

"""From the description of a unit to its network: lines joined by devices, in every medium."""

from provenzero.network.builder import Builder, way
from provenzero.network.devices.backup import backup
from provenzero.network.devices.banks import bank
from provenzero.network.devices.functions import GRAVITY_M_S2, chambers, function
from provenzero.network.devices.pumps import LIQUID, pump, reservoir_drain
from provenzero.network.devices.regulators import bypass, pressure_line, regulator
from provenzero.network.devices.remote import air, panel
from provenzero.network.devices.runs import fitting
from provenzero.network.model import DeviceKind, LineId, Medium, Network, Source, SourceKind
from provenzero.unit.model import ATMOSPHERE, HEADER, RESERVOIR, RETURNS, FluidKind, Unit

HEAVIEST_KG_M3 = {
    FluidKind.MINERAL_OIL: 900.0,
    FluidKind.WATER_GLYCOL: 1150.0,
    FluidKind.WATER_BASED: 1050.0,
    FluidKind.UNKNOWN: 1150.0,
}
GREATEST_SUCTION_HEAD_M = 3.0


def compile_network(unit: Unit) -> Network:
    """Compile a unit (already checked for consistency); raises ValueError where two things share a tag."""
    builder = Builder()
    density = unit.fluid_density_kg_m3 or HEAVIEST_KG_M3[unit.fluid]
    _tank(builder, unit, density)
    builder.line(HEADER, "accumulator header")
    for item in unit.regulators:
        pressure_line(builder, item)
    if unit.air is not None:
        air(builder, unit.air)
    for element in unit.header_fittings:
        fitting(builder, element, LineId(HEADER))
    for each in unit.panels:
        panel(builder, each)
    for actuator in unit.functions:
        chambers(builder, actuator, density)
    for store in unit.banks:
        bank(builder, store, _charge_pag(unit, store.attached_to), unit.identity.rated_pressure_pag)
    for machine in unit.pumps:
        pump(builder, machine)
    for item in unit.regulators:
        regulator(builder, item, common_returns=unit.common_returns)
    for link in unit.bypasses:
        bypass(builder, link)
    for actuator in unit.functions:
        function(builder, actuator, unit.panels, common_returns=unit.common_returns)
    for reserve in unit.nitrogen_backups:
        backup(builder, reserve)
    _whole(builder)
    return Network(
        lines=builder.lines,
        devices=builder.devices,
        sources=tuple(builder.sources),
        actuators=tuple(builder.actuators),
        gauges=tuple(builder.gauges),
        ports=tuple(builder.ports),
        charged_pag=builder.charged_pag,
    ).with_vents(_vents(unit))


def _vents(unit: Unit) -> frozenset[LineId]:
    names = (ATMOSPHERE, RESERVOIR, RETURNS) if unit.common_returns else (ATMOSPHERE, RESERVOIR)
    return frozenset(LineId(name) for name in names)


def vents_for(network: Network, zone: frozenset[LineId]) -> Network:
    """The network of a job: a tank or return header that the job opens no longer swallows what reaches it."""
    tank = {LineId(RESERVOIR), LineId(RETURNS)}
    if not zone & (tank | {LIQUID}):
        return network
    return network.with_vents(network.vents() - tank)


def _charge_pag(unit: Unit, line: str) -> tuple[float, float]:
    """The pressure that bottles on a line hold in service [low, high, Pa gauge]; low 0 where nobody can be sure."""
    if line == HEADER:
        starts = [p.start_pressure_pag for p in unit.pumps if p.start_pressure_pag is not None]
        high = max((p.stop_pressure_pag for p in unit.pumps), default=0.0)
        return (min(starts, default=high), high)
    for item in unit.regulators:
        if item.serves == line:
            return (0.0, min(item.set_pressure_pag, _charge_pag(unit, item.fed_from)[1]))
    feeds = [f.fed_from for f in unit.functions if line in (f"{f.name}.open", f"{f.name}.close")]
    return (0.0, max((_charge_pag(unit, feed)[1] for feed in feeds), default=0.0))


def _tank(builder: Builder, unit: Unit, density_kg_m3: float) -> None:
    tank = unit.reservoir
    atmosphere = builder.line(ATMOSPHERE, "atmosphere", Medium.AIR)
    reservoir = builder.line(RESERVOIR, f"reservoir {tank.tag}", volume_m3=tank.volume_m3 or 0.0)
    builder.fixed(f"{tank.tag}-breather", DeviceKind.PIPING, "breather", tank.location, way(reservoir, atmosphere))
    if unit.common_returns:
        returns = builder.line(RETURNS, "common return header")
        builder.fixed(f"{tank.tag}-returns", DeviceKind.PIPING, "return header", tank.location, way(returns, reservoir))
    head_m = GREATEST_SUCTION_HEAD_M if tank.suction_head_m is None else tank.suction_head_m
    head = density_kg_m3 * GRAVITY_M_S2 * head_m
    liquid = builder.line(LIQUID, f"fluid in reservoir {tank.tag}", static_head_pag=head)
    builder.sources.append(
        Source(
            id="reservoir.liquid",
            name="fluid standing in the reservoir",
            line=liquid,
            kind=SourceKind.STORED,
            low_pag=0.0,
            pressure_pag=head,
            gas=True,
        )
    )
    builder.charged_pag[liquid] = (0.0, head)
    if tank.drain is not None:
        reservoir_drain(builder, tank.drain, liquid, atmosphere)
    builder.port(tank.tag, "tank", reservoir)
    builder.port(tank.tag, "liquid", liquid)
    if unit.common_returns:
        builder.port(tank.tag, "returns", LineId(RETURNS))


def _whole(builder: Builder) -> None:
    """Ports of the whole unit: every line that would be opened if all of it were taken apart, gas sides apart."""
    vents = {ATMOSPHERE, RESERVOIR, RETURNS, str(LIQUID)}
    # A panel without an isolator hangs on its supply itself: the supply is then part of what is taken apart.
    uncut = {p.line for p in builder.ports if p.name == "power" and p.line.startswith("supply.")}
    for key, line in list(builder.lines.items()):
        if line.medium is Medium.CONTROL_FLUID and key not in vents and not key.endswith(".return"):
            builder.port("unit", "fluid", key)
        if key == "air" or (line.medium is Medium.AIR and key.endswith(".drive")):
            builder.port("unit", "air", key)
        if line.medium is Medium.ELECTRIC and (key in uncut or not key.startswith("supply.")):
            builder.port("unit", "power", key)

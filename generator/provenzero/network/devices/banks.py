"""Banks of bottles: fluid lines, the gas behind them, isolation, bleed and per-bottle valves."""

from provenzero.network.builder import Builder, way
from provenzero.network.devices.runs import bleed, fitting
from provenzero.network.model import Device, DeviceKind, DeviceTag, LineId, Medium, Source, SourceKind
from provenzero.unit.model import ATMOSPHERE, Bank

GAS_CLOSED = "closed"
GAS_VENTING = "venting"


def bank(builder: Builder, item: Bank, charge_pag: tuple[float, float], rated_pag: float) -> None:
    """Compile one bank on the line it is attached to."""
    main = LineId(item.attached_to)
    fluid = main
    if item.isolation is not None:
        fluid = builder.line(f"{item.tag}.fluid", f"fluid side of bank {item.tag}")
        builder.valve(
            item.isolation,
            DeviceKind.BANK_ISOLATION_VALVE,
            f"isolation valve of bank {item.tag}",
            opened=(way(main, fluid),),
        )
    if item.bleed is not None:
        bleed(builder, item.bleed, fluid, DeviceKind.BLEED_VALVE)
    for element in item.fittings:
        fitting(builder, element, fluid)
    builder.port(item.tag, "fluid", fluid)
    low, high = charge_pag
    if not item.bottle_valves:
        _source(builder, item.tag, f"bank {item.tag}, fluid under gas pressure", fluid, (low, high))
    for number in range(1, item.bottles + 1):
        bottle = f"{item.tag}/{number}"
        side = fluid
        if item.bottle_valves:
            valve = item.bottle_valves[number - 1]
            side = builder.line(f"{bottle}.fluid", f"fluid side of bottle {bottle}")
            builder.valve(valve, DeviceKind.BOTTLE_VALVE, f"valve of bottle {bottle}", opened=(way(fluid, side),))
            _source(builder, bottle, f"bottle {bottle}, fluid under gas pressure", side, (low, high))
        _gas(builder, item, number, high, rated_pag)
        builder.port(bottle, "fluid", side)
        builder.port(bottle, "gas", LineId(f"{bottle}.gas"))
        builder.port(item.tag, "gas", LineId(f"{bottle}.gas"))


def _source(builder: Builder, key: str, words: str, line: LineId, charge_pag: tuple[float, float]) -> None:
    low, high = charge_pag
    builder.sources.append(
        Source(id=key, name=words, line=line, kind=SourceKind.STORED, low_pag=low, pressure_pag=high, gas=True)
    )
    builder.charged_pag[line] = charge_pag


def _gas(builder: Builder, item: Bank, number: int, high_pag: float, rated_pag: float) -> None:
    bottle = f"{item.tag}/{number}"
    gas = builder.line(f"{bottle}.gas", f"nitrogen of bottle {bottle}", Medium.NITROGEN, volume_m3=item.gas_volume_m3)
    low = item.precharge_pag or 0.0
    high = max(low if item.precharge_pag is not None else rated_pag, high_pag)
    builder.charged_pag[gas] = (low, high)
    builder.sources.append(
        Source(
            id=f"{bottle} nitrogen",
            name=f"nitrogen precharge of bottle {bottle}",
            line=gas,
            kind=SourceKind.STORED,
            low_pag=low,
            pressure_pag=high,
            gas=True,
        )
    )
    builder.device(
        Device(
            tag=DeviceTag(f"{bottle}-gas"),
            kind=DeviceKind.GAS_VALVE,
            name=f"gas valve of bottle {bottle}",
            location=f"top of bottle {number}, {item.location}",
            positions={GAS_VENTING: (way(gas, LineId(ATMOSPHERE)),), GAS_CLOSED: ()},
            normal=GAS_CLOSED,
        )
    )

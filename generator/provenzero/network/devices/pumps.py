"""Pumps: where their energy comes from, what they draw on and where they deliver."""

from dataclasses import replace

from provenzero.network.builder import Builder, way
from provenzero.network.devices.runs import has_inline, run
from provenzero.network.model import DeviceKind, LineId, Medium, Source, SourceKind
from provenzero.unit.model import CheckValve, Drive, Element, Isolator, Pump, Valve

LIQUID = LineId("reservoir.liquid")


def pump(builder: Builder, item: Pump) -> None:
    """Compile one pump. A check valve right at its outlet belongs to the pump: neither is a barrier.

    A hand pump is always live, unless its lever can be taken off and locked away: that is its isolator.
    """
    suction = LIQUID
    if has_inline(item.suction):
        suction = builder.line(f"{item.tag}.suction", f"suction of pump {item.tag}")
    met = run(
        builder,
        item.suction,
        start=LIQUID,
        end=suction,
        prefix=f"{item.tag}.suction",
        words=f"suction of {item.tag}",
    )
    head = builder.lines[LIQUID].static_head_pag
    builder.lines.update({k: replace(builder.lines[k], static_head_pag=head) for k in met})
    delivery = LineId(item.delivers_to)
    elements, own_check = _without_own_check(item.discharge)
    outlet = delivery
    if has_inline(elements):
        outlet = builder.line(f"{item.tag}.outlet", f"outlet of pump {item.tag}")
    run(
        builder,
        elements,
        start=outlet,
        end=delivery,
        prefix=f"{item.tag}.discharge",
        words=f"discharge of {item.tag}",
    )
    if own_check is not None:
        words = f"check valve at the outlet of {item.tag}"
        builder.fixed(own_check.tag, DeviceKind.CHECK_VALVE, words, own_check.location)
    drive = _drive(builder, item)
    builder.sources.append(
        Source(
            id=item.tag,
            name=f"pump {item.tag}",
            line=outlet,
            kind=SourceKind.LIVE,
            low_pag=_low_pag(item),
            pressure_pag=item.stop_pressure_pag,
            drive=drive,
            senses=delivery if item.automatic else None,
            starts_below_pag=(item.start_pressure_pag or item.stop_pressure_pag) if item.automatic else None,
        )
    )
    builder.port(item.tag, "suction", suction)
    builder.port(item.tag, "discharge", outlet)
    if drive is not None:
        builder.port(item.tag, "drive", drive)


def _low_pag(item: Pump) -> float:
    """The pressure a pump is sure to hold [Pa gauge]: none when a hand works it."""
    if item.drive is Drive.HAND:
        return 0.0
    return item.stop_pressure_pag if item.start_pressure_pag is None else item.start_pressure_pag


def _without_own_check(elements: tuple[Element, ...]) -> tuple[tuple[Element, ...], CheckValve | None]:
    if elements and isinstance(elements[0], CheckValve):
        return elements[1:], elements[0]
    return elements, None


def _drive(builder: Builder, item: Pump) -> LineId | None:
    if item.drive is Drive.HAND and not isinstance(item.energy, Isolator):
        return None
    if item.drive is Drive.AIR:
        air = LineId("air")
        if not isinstance(item.energy, Valve):
            return air
        drive = builder.line(f"{item.tag}.drive", f"air to pump {item.tag}", Medium.AIR)
        run(
            builder,
            (item.energy,),
            start=air,
            end=drive,
            prefix=f"{item.tag}.air",
            words=f"air to {item.tag}",
        )
        return drive
    supply = electric_supply(builder, f"hand.{item.tag}" if item.drive is Drive.HAND else item.supply)
    if not isinstance(item.energy, Isolator):
        return supply
    drive = builder.line(f"{item.tag}.drive", f"power to pump {item.tag}", Medium.ELECTRIC)
    builder.isolator(item.energy, f"isolator of pump {item.tag}", supply, drive)
    return drive


def electric_supply(builder: Builder, name: str) -> LineId:
    """The live line of a named electric supply (or engine), made when first asked for."""
    key = f"supply.{name}"
    if LineId(key) not in builder.lines:
        line = builder.line(key, f"supply {name}", Medium.ELECTRIC)
        builder.sources.append(
            Source(id=key, name=f"supply {name}", line=line, kind=SourceKind.LIVE, low_pag=1.0, pressure_pag=1.0)
        )
    return LineId(key)


def reservoir_drain(builder: Builder, valve: Valve, liquid: LineId, atmosphere: LineId) -> None:
    """The drain of the reservoir, into a container in the open."""
    builder.valve(valve, DeviceKind.DRAIN_VALVE, "drain valve of the reservoir", opened=(way(liquid, atmosphere),))

"""Regulators and the bypasses around them."""

from provenzero.network.builder import Builder, passage, way
from provenzero.network.devices.runs import fitting, has_inline, run
from provenzero.network.model import (
    FULL_OPEN,
    HAND,
    Device,
    DeviceKind,
    DeviceTag,
    LineId,
    OnLoss,
    Passage,
    PassageKind,
)
from provenzero.unit.model import RETURNS, AirFailure, Bypass, Regulator, RegulatorControl

SET = "set"
BACKED_OFF = "backed_off"


def pressure_line(builder: Builder, item: Regulator) -> None:
    """Make the line a regulator serves, so that others can refer to it."""
    words = item.serves.replace("-", " ")
    builder.line(item.serves, words if words.endswith("line") else f"{words} line")


def regulator(builder: Builder, item: Regulator, *, common_returns: bool) -> None:
    """Compile one regulator between the line that feeds it and the line it serves."""
    main = LineId(item.fed_from)
    serves = LineId(item.serves)
    inlet = main
    if has_inline(item.upstream):
        inlet = builder.line(f"{item.tag}.inlet", f"inlet of regulator {item.tag}")
    run(builder, item.upstream, start=main, end=inlet, prefix=f"{item.tag}.inlet", words=f"feed of {item.tag}")
    for element in item.fittings:
        fitting(builder, element, serves)
    backed_off: tuple[Passage, ...] = ()
    if item.relieving:
        tank = LineId(RETURNS) if common_returns else _own_return(builder, item)
        backed_off = (way(serves, tank),)
        builder.port(item.tag, "return", tank)
    positions = {
        SET: (passage(PassageKind.REGULATOR, inlet, serves, item.set_pressure_pag),),
        BACKED_OFF: backed_off,
    }
    moved_by, on_loss = _pilot(builder, item, positions, inlet, serves)
    builder.device(
        Device(
            tag=DeviceTag(item.tag),
            kind=DeviceKind.REGULATOR,
            name=f"regulator, {builder.lines[serves].name}",
            location=item.location,
            positions=positions,
            normal=SET,
            lockable=item.lockable,
            moved_by=moved_by,
            lock_holds_against=(HAND,) if item.lockable else (),
            on_loss=on_loss,
        )
    )
    builder.port(item.tag, "inlet", inlet)
    builder.port(item.tag, "outlet", serves)


def _own_return(builder: Builder, item: Regulator) -> LineId:
    tank = builder.line(f"{item.tag}.return", f"return of regulator {item.tag}")
    builder.fixed(
        f"{item.tag}-return",
        DeviceKind.PIPING,
        f"return line of {item.tag}",
        item.location,
        way(tank, LineId("reservoir")),
    )
    return tank


def _pilot(
    builder: Builder,
    item: Regulator,
    positions: dict[str, tuple[Passage, ...]],
    inlet: LineId,
    serves: LineId,
) -> tuple[tuple[str, ...], OnLoss | None]:
    if item.control is RegulatorControl.MANUAL:
        return (HAND,), None
    pilot = LineId("air")
    builder.port(item.tag, "pilot", pilot)
    if item.air_failure is AirFailure.HOLDS:
        return (HAND, pilot), None
    if item.air_failure is AirFailure.CLOSES:
        return (HAND, pilot), OnLoss(line=pilot, position=BACKED_OFF)
    positions[FULL_OPEN] = (way(inlet, serves),)
    return (HAND, pilot), OnLoss(line=pilot, position=FULL_OPEN)


def bypass(builder: Builder, item: Bypass) -> None:
    """Compile a bypass valve between two pressure lines."""
    start, end = LineId(item.from_line), LineId(item.to_line)
    builder.valve(item.valve, DeviceKind.BYPASS_VALVE, f"bypass valve, {start} to {end}", opened=(way(start, end),))
    builder.port(item.valve.tag, "inlet", start)
    builder.port(item.valve.tag, "outlet", end)

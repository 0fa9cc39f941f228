"""Runs (valves, checks, strainers in the order of flow) and fittings (bleeds, reliefs, gauges) on a line."""

from collections.abc import Sequence

from provenzero.network.builder import Builder, passage, way
from provenzero.network.model import DeviceKind, Gauge, LineId, Medium, PassageKind
from provenzero.unit.model import (
    Bleed,
    CheckValve,
    Element,
    Fitting,
    Instrument,
    Reducer,
    Relief,
    Strainer,
    Valve,
)

_INLINE = (Valve, CheckValve, Strainer, Reducer)


def has_inline(elements: Sequence[Element]) -> bool:
    """Whether a run has anything that the fluid passes through, so that its two ends are two lines."""
    return any(isinstance(e, _INLINE) for e in elements)


def run(  # noqa: PLR0913 - a run is its two ends, its elements and its words
    builder: Builder,
    elements: Sequence[Element],
    *,
    start: LineId,
    end: LineId,
    prefix: str,
    words: str,
    medium: Medium = Medium.CONTROL_FLUID,
    valve_kind: DeviceKind = DeviceKind.SHUT_OFF_VALVE,
) -> tuple[LineId, ...]:
    """Join `start` to `end` through the elements; returns the lines met, start and end included."""
    inline = sum(isinstance(e, _INLINE) for e in elements)
    here = start
    met = [start]
    done = 0
    for element in elements:
        if not isinstance(element, _INLINE):
            fitting(builder, element, here)
            continue
        done += 1
        there = end if done == inline else builder.line(f"{prefix}.{done}", f"{words}, part {done}", medium)
        _inline(builder, element, here, there, words, valve_kind)
        met.append(there)
        here = there
    return tuple(met)


def _inline(  # noqa: PLR0913, PLR0917 - as above
    builder: Builder,
    element: Valve | CheckValve | Strainer | Reducer,
    here: LineId,
    there: LineId,
    words: str,
    valve_kind: DeviceKind,
) -> None:
    match element:
        case Valve():
            air = builder.lines[here].medium is Medium.AIR
            closed = (way(there, builder.line("atmosphere", "atmosphere", Medium.AIR)),) if element.exhausts else ()
            kind = DeviceKind.AIR_VALVE if air else valve_kind
            builder.valve(element, kind, f"shut-off valve, {words}", opened=(way(here, there),), closed=closed)
        case CheckValve():
            check = passage(PassageKind.CHECK, here, there)
            builder.fixed(element.tag, DeviceKind.CHECK_VALVE, f"check valve, {words}", element.location, check)
        case Strainer():
            builder.fixed(element.tag, DeviceKind.STRAINER, f"strainer, {words}", element.location, way(here, there))
            builder.port(element.tag, "inlet", here)
            builder.port(element.tag, "outlet", there)
        case Reducer():
            reduce = passage(PassageKind.REGULATOR, here, there, element.set_pressure_pag)
            builder.fixed(element.tag, DeviceKind.REDUCER, f"reducing valve, {words}", element.location, reduce)


def fitting(builder: Builder, element: Fitting, line: LineId) -> None:
    """Put a bleed, a relief or an instrument on a line."""
    match element:
        case Bleed():
            bleed(builder, element, line, DeviceKind.BLEED_VALVE)
        case Relief():
            lift = passage(PassageKind.RELIEF, line, LineId(element.to), element.set_pressure_pag)
            builder.fixed(
                element.tag,
                DeviceKind.RELIEF_VALVE,
                f"relief valve, {_words(builder, line)}",
                element.location,
                lift,
            )
            builder.port(element.tag, "inlet", line)
            builder.port(element.tag, "outlet", LineId(element.to))
        case Instrument():
            _instrument(builder, element, line)


def bleed(builder: Builder, element: Bleed, line: LineId, kind: DeviceKind) -> None:
    """Put a bleed valve between a line and where it lets out to."""
    to = LineId(element.to)
    builder.valve(element.valve, kind, f"bleed valve, {_words(builder, line)}", opened=(way(line, to),))
    builder.port(element.valve.tag, "inlet", line)
    builder.port(element.valve.tag, "outlet", to)


def _instrument(builder: Builder, element: Instrument, line: LineId) -> None:
    reads = line
    readable = True
    if element.valve is not None:
        medium = builder.lines[line].medium
        reads = builder.line(f"{element.tag}.stub", f"stub of {element.tag}", medium)
        builder.valve(
            element.valve,
            DeviceKind.GAUGE_VALVE,
            f"valve of {element.kind.value} {element.tag}",
            opened=(way(line, reads),),
        )
        readable = element.valve.normal.value == "open"
    builder.port(element.tag, "inlet", reads)
    if element.kind.value == "switch":
        return
    builder.gauges.append(
        Gauge(
            tag=element.tag,
            location=element.location,
            line=line,
            reads=reads,
            full_scale_pag=element.full_scale_pag,
            accuracy_fraction=element.accuracy_fraction,
            resolution_pa=element.resolution_pa,
            readable=readable,
        )
    )


def _words(builder: Builder, line: LineId) -> str:
    return builder.lines[line].name

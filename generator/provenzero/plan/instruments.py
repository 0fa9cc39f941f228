"""Which gauges show a line, and what each must read."""

from collections.abc import Iterable

from provenzero.network.model import Gauge, LineId, PassageKind
from provenzero.plan.model import Expect
from provenzero.state.model import State, Wiring
from provenzero.unit.model import ATMOSPHERE, RESERVOIR, RETURNS

TANKS = frozenset(LineId(name) for name in (RESERVOIR, RETURNS, ATMOSPHERE))


def joined_lines(wiring: Wiring, state: State, line: LineId) -> set[LineId]:
    """Lines that share the pressure of a line through sure open passages, not reaching through a vent or a tank."""
    seen = {line}
    stack = [line]
    while stack:
        here = stack.pop()
        if here in wiring.vents or here in TANKS:
            continue
        for tag in wiring.touching[here]:
            for item in wiring.device(tag).positions[state.positions[tag]]:
                if item.kind is not PassageKind.OPEN or not item.certain or here not in (item.source, item.target):
                    continue
                there = item.target if item.source == here else item.source
                if there not in seen:
                    seen.add(there)
                    stack.append(there)
    return seen


def gauges_of(wiring: Wiring, state: State, line: LineId) -> list[Gauge]:
    """Gauges that show the pressure of a line as the devices stand now, in the order of the description."""
    lines = joined_lines(wiring, state, line) - wiring.vents - TANKS
    return [g for g in wiring.network.gauges if g.readable and g.reads in lines]


def readings(wiring: Wiring, state: State, lines: Iterable[LineId]) -> tuple[Expect, ...]:
    """What the gauges standing on any of these lines must read in a state."""
    wanted = set(lines)
    return tuple(
        Expect(gauge=g.tag, line=g.reads, low_pag=state.low(g.reads), high_pag=state.high(g.reads))
        for g in wiring.network.gauges
        if g.readable and g.reads in wanted
    )


def changed(before: State, after: State) -> list[LineId]:
    """Lines whose interval is another than before."""
    return [k for k, v in after.pressures.items() if v != before.pressures[k]]

"""What happens by itself as a state changes: pistons that travel, pumps that start, live sources let out."""

from collections.abc import Iterator, Mapping
from dataclasses import dataclass

from tests.properties.oracle_parts.circuit import Circuit, Source
from tests.properties.oracle_parts.settle import settle
from tests.properties.oracle_parts.spread import ways_of
from tests.properties.oracle_parts.walk import Moment, State, Walk


@dataclass(frozen=True, slots=True, kw_only=True)
class Glance:
    """One state as far as it can surprise: ends that pistons are pushed to, sources that run, vented ones."""

    pushed: Mapping[str, str]
    vented: frozenset[str]
    started: frozenset[str]


@dataclass(frozen=True, slots=True, kw_only=True)
class Event:
    """`announced`: the step itself says so."""

    moment: Moment
    text: str
    announced: bool


def events(walked: Walk) -> Iterator[Event]:
    """Everything that the steps newly cause, in their order.

    A piston stands where it is pushed to at first; one that nothing pushes, where the plan says it does.
    """
    circuit = walked.circuit
    before = look(circuit, walked.start, walked.start)
    stands = dict(walked.said_pistons) | dict(before.pushed)
    for moment in walked.moments:
        if moment.after is moment.before:
            continue
        after = look(circuit, moment.before, moment.after)
        for name, end in after.pushed.items():
            if stands.get(name) != end:
                text = f"{name} travels to {end}"
                yield Event(moment=moment, text=text, announced=name in _named(moment, "moves_function"))
            stands[name] = end
        for source in sorted(after.started - before.started):
            announced = source in _named(moment, "starts_pump")
            yield Event(moment=moment, text=f"{source} starts", announced=announced)
        for source in sorted(after.vented - before.vented):
            yield Event(moment=moment, text=f"{source} is let out to a vent", announced=False)
        before = look(circuit, moment.after, moment.after)


def look(circuit: Circuit, earlier: State, state: State) -> Glance:
    """Glance at a state that was reached from an earlier one, or at one at rest where both are the same."""
    flows = _flows(circuit, state)
    running = _running(circuit, state)
    return Glance(
        pushed=_pushed(circuit, state, flows, running),
        vented=frozenset(
            s.id for s in running if any(circuit.vent[k] for k in _downstream(circuit, flows, {s.line}, s.high_pag))
        ),
        started=_started(circuit, earlier, state),
    )


def joined_to_source(circuit: Circuit, state: State) -> frozenset[int]:
    """Lines that a live source at work or a charged gas gives its pressure to."""
    return _supplied(circuit, state, _flows(circuit, state), _running(circuit, state))


def _running(circuit: Circuit, state: State) -> list[Source]:
    return [circuit.sources[place] for place in sorted(state.settled.running.may)]


ALWAYS = -1.0
Flows = Mapping[int, list[tuple[int, float]]]


def _flows(circuit: Circuit, state: State) -> Flows:
    """From each line the lines it flows into, each with the pressure above which it does."""
    flows: dict[int, list[tuple[int, float]]] = {}
    for way in ways_of(circuit, state.settled.standing):
        above = way.set_pag if way.kind == "relief" else ALWAYS
        if way.kind == "regulator" and way.set_pag <= 0:
            continue
        flows.setdefault(way.start, []).append((way.end, above))
        if way.kind == "open":
            flows.setdefault(way.end, []).append((way.start, ALWAYS))
    return flows


def _downstream(circuit: Circuit, flows: Flows, begin: set[int], pressure: float) -> set[int]:
    """Lines that fluid of this pressure flows to, up to and with the vents that swallow it."""
    found, todo = set(begin), list(begin)
    while todo:
        line = todo.pop()
        if circuit.vent[line]:
            continue
        for target, above in flows.get(line, ()):
            if target not in found and pressure > above:
                found.add(target)
                todo.append(target)
    return found


def _supplied(circuit: Circuit, state: State, flows: Flows, running: list[Source]) -> frozenset[int]:
    high = state.pressures.high
    begin = {s.line for s in running}
    begin |= {s.line for s in circuit.sources if s.gas and high[s.line] > 0}
    return frozenset(k for k in _downstream(circuit, flows, begin, 0.0) if high[k] > 0)


def _pushed(circuit: Circuit, state: State, flows: Flows, running: list[Source]) -> Mapping[str, str]:
    """The end that each piston is pushed to; those pushed from both sides or from neither are left out."""
    supplied = _supplied(circuit, state, flows, running)
    ends = {}
    for piston in circuit.pistons:
        opening, closing = piston.open_line in supplied, piston.close_line in supplied
        if opening is not closing:
            ends[piston.name] = "open" if opening else "close"
    return ends


def _started(circuit: Circuit, earlier: State, state: State) -> frozenset[str]:
    """Pumps that run. An automatic one is kept still first, to see how far its line falls without it."""
    running = [source for source in _running(circuit, state) if source.drive is not None]
    started = {s.id for s in running if not s.automatic and not circuit.electric(s.line)}
    automatic = [s for s in running if s.automatic]
    if automatic:
        still = settle(
            circuit,
            state.positions,
            earlier.pressures,
            state.locked,
            kept_still=frozenset(s.id for s in automatic),
        )
        low = still.pressures.low
        started |= {s.id for s in automatic if s.senses is not None and low[s.senses] < s.starts_below_pag}
    return frozenset(started)


def _named(moment: Moment, key: str) -> list[str]:
    """The names that a step announces, one or several with commas between."""
    return str(moment.step.get(key) or "").split(", ")

"""What one action does: the state after it, and everything about it that a plan must never do unannounced."""

from collections.abc import Mapping
from dataclasses import dataclass

from provenzero.network.model import DeviceTag, LineId, Source, SourceKind
from provenzero.state.model import DEAD, Interval, State, Wiring
from provenzero.state.must import vented
from provenzero.state.settle import Settled, settle

_NOISE_PA = 1.0


@dataclass(frozen=True, slots=True, kw_only=True)
class Effect:
    """An action's outcome: pistons that move, pumps that start, live sources let out, lines whose pressure rises."""

    after: State
    moved: tuple[str, ...]
    started: tuple[str, ...]
    live_vented: tuple[str, ...]
    risen: tuple[LineId, ...]
    fallen: tuple[LineId, ...]

    @property
    def quiet(self) -> bool:
        """Nothing moves, nothing starts and no live source is let out."""
        return not (self.moved or self.started or self.live_vented)


def initial(wiring: Wiring, positions: Mapping[DeviceTag, str] | None = None) -> State:
    """The state of the unit as described (or with some devices elsewhere), charged and at rest.

    A line that nothing feeds and nothing vents has held since before anyone looked: it may have any pressure up to
    the highest that could ever have reached it. Pilot lines stand vented.
    """
    network = wiring.network
    standing = {tag: device.normal for tag, device in network.devices.items()}
    standing.update(positions or {})
    before: dict[LineId, Interval] = dict.fromkeys(network.lines, DEAD)
    before.update(network.charged_pag)
    settled = settle(wiring, standing, before)
    known = dict(settled.pressures)
    for line in _nobody_knows(wiring, settled):
        known[line] = (0.0, _highest(wiring, line))
    settled = settle(wiring, standing, known)
    pistons = {}
    for item in network.actuators:
        ends = [e for e, line in (("open", item.open_line), ("close", item.close_line)) if _pushes(settled, line)]
        pistons[item.name] = ends[0] if len(ends) == 1 else "unknown"
    return _state(settled, standing, pistons)


def _state(settled: Settled, positions: Mapping[DeviceTag, str], pistons: Mapping[str, str]) -> State:
    return State(
        positions=positions,
        pressures=settled.pressures,
        pistons=pistons,
        fed=settled.fed,
        gassed=settled.gassed,
        running=settled.live_drives,
        let_out=frozenset(settled.live_vented),
    )


def refill(wiring: Wiring, state: State, line: LineId) -> State:
    """The state after a stored source has been given its charge again: nitrogen, tank fluid, a bank by a hand pump."""
    pressures = {**state.pressures, line: wiring.network.charged_pag[line]}
    return _state(settle(wiring, state.positions, pressures), state.positions, state.pistons)


def act(wiring: Wiring, state: State, device: DeviceTag, position: str) -> Effect:
    """Put one device in one position; ValueError if it has no such position or cannot be moved."""
    item = wiring.device(device)
    if position not in item.positions:
        raise ValueError(f"{device} has no position {position}")
    if not item.movable and position != state.positions[device]:
        raise ValueError(f"{device} cannot be moved")
    positions = {**state.positions, device: position}
    settled = settle(wiring, positions, state.pressures)
    pistons = dict(state.pistons)
    moved = []
    for actuator in wiring.network.actuators:
        for end, line, other in (
            ("open", actuator.open_line, actuator.close_line),
            ("close", actuator.close_line, actuator.open_line),
        ):
            if _pushes(settled, line) and not _pushes(settled, other) and pistons[actuator.name] != end:
                pistons[actuator.name] = end
                moved.append(actuator.name)
    new, old = settled.pressures, state.pressures
    return Effect(
        after=_state(settled, positions, pistons),
        moved=tuple(moved),
        started=tuple(s.id for s in wiring.network.sources if _starts(s, settled, state)),
        live_vented=tuple(s for s in settled.live_vented if s not in state.let_out),
        risen=tuple(k for k, v in new.items() if v[1] > old[k][1] + _NOISE_PA),
        fallen=tuple(k for k, v in new.items() if v[1] < old[k][1] - _NOISE_PA),
    )


def _starts(source: Source, settled: Settled, before: State) -> bool:
    """An automatic pump that is awake now and finds, or found, less than its start pressure.

    A pump without a switch may start as soon as its drive is live. So does an automatic pump whose sensed line loses
    its last compressed gas: the least leak then starts it, again and again.
    """
    if source.kind is not SourceKind.LIVE or source.drive is None or source.id not in settled.live_drives:
        return False
    if source.senses is None:
        return source.id not in before.running
    if source.senses in before.gassed and source.senses not in settled.gassed:
        return True
    threshold = (source.starts_below_pag or 0.0) - _NOISE_PA
    called_before = source.id in before.running and before.low(source.senses) < threshold
    return not called_before and min(before.low(source.senses), settled.pressures[source.senses][0]) < threshold


def _pushes(settled: Settled, line: LineId) -> bool:
    return line in settled.fed and settled.pressures[line][1] > _NOISE_PA


def _nobody_knows(wiring: Wiring, settled: Settled) -> list[LineId]:
    sources = {s.line for s in wiring.network.sources}
    pilots = {p.line for p in wiring.network.ports if p.name == "pilot"}
    held = {tag: settled.positions[tag] for tag in wiring.network.devices}
    surely = vented(wiring, held)
    return [
        line
        for line, item in wiring.network.lines.items()
        if line not in settled.fed
        and line not in surely
        and line not in sources
        and line not in pilots
        and item.medium.value in {"control_fluid", "nitrogen", "air"}
        and settled.pressures[line] == DEAD
    ]


def _highest(wiring: Wiring, line: LineId) -> float:
    """The highest pressure of any source that the line could be joined to [Pa gauge]."""
    seen = {line}
    stack = [line]
    while stack:
        here = stack.pop()
        for tag in wiring.touching[here]:
            for there in wiring.anywhere[tag].get(here, ()):
                if there not in seen and there not in wiring.vents:
                    seen.add(there)
                    stack.append(there)
    return max((s.pressure_pag for s in wiring.network.sources if s.line in seen), default=0.0)

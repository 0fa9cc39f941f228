"""The steps of a plan carried out one after another on its own network."""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any

from tests.properties.oracle_parts.circuit import Circuit, read_circuit
from tests.properties.oracle_parts.lockbook import LockBook, Step, open_book
from tests.properties.oracle_parts.settle import Settled, settle
from tests.properties.oracle_parts.spread import Pressures

FROM_WORK_ON = frozenset({"work", "reinstate", "test"})


@dataclass(frozen=True, slots=True, kw_only=True)
class State:
    """`positions` as set by people; `locks` in place: number to device."""

    positions: Mapping[str, str]
    locks: Mapping[int, str]
    settled: Settled

    @property
    def pressures(self) -> Pressures:
        return self.settled.pressures

    @property
    def locked(self) -> frozenset[str]:
        return frozenset(self.locks.values())


@dataclass(frozen=True, slots=True, kw_only=True)
class Moment:
    step: Step
    before: State
    after: State

    @property
    def name(self) -> str:
        return f"step {self.step['id']}"


@dataclass(frozen=True, slots=True, kw_only=True)
class Walk:
    """`during_work`: what the people at the opened part rely on. `misuse`: locks that don't work out.

    `said_dead` and `said_pistons` are what the plan itself says of lines at zero and of where pistons stand.
    """

    circuit: Circuit
    zone: tuple[int, ...]
    open_to_vent: tuple[int, ...]
    said_dead: tuple[int, ...]
    said_pistons: Mapping[str, str]
    start: State
    moments: tuple[Moment, ...]
    during_work: State
    misuse: tuple[str, ...]

    @property
    def end(self) -> State:
        return self.moments[-1].after if self.moments else self.start


def walk(plan: Mapping[str, Any]) -> Walk:
    """Carry out all steps of a plan.

    Raises:
        CannotJudgeError: the plan names lines, devices or positions that its network doesn't have.
    """
    circuit = read_circuit(plan["network"])
    book = open_book(circuit, plan["locks"])
    initial = plan["network"]["initial"]
    start = state = _initial(circuit, initial)
    moments: list[Moment] = []
    for step in plan["steps"]:
        before, state = state, _carry_out(book, start, state, step)
        moments.append(Moment(step=step, before=before, after=state))
    during_work = _before_work(start, moments)
    return Walk(
        circuit=circuit,
        zone=tuple(circuit.line(name) for name in plan["zone"]),
        open_to_vent=tuple(circuit.line(name) for name in plan["open_to_vent"]),
        said_dead=tuple(circuit.line(name) for name in plan.get("dead", ())),
        said_pistons=initial.get("pistons", {}),
        start=start,
        moments=tuple(moments),
        during_work=during_work,
        misuse=book.close(during_work.locks),
    )


def _initial(circuit: Circuit, initial: Mapping[str, Any]) -> State:
    positions = dict(initial["positions"])
    for tag in circuit.devices:
        circuit.check_position(tag, positions.get(tag))
    low, high = [0.0] * len(circuit.ids), [0.0] * len(circuit.ids)
    for name, (least, most) in initial["pressures_pag"].items():
        line = circuit.line(name)
        if not circuit.vent[line]:
            low[line], high[line] = float(least), float(most)
    given = Pressures(low=tuple(low), high=tuple(high))
    return State(positions=positions, locks={}, settled=settle(circuit, positions, given, frozenset()))


def _carry_out(book: LockBook, start: State, state: State, step: Step) -> State:
    """First the lock comes off, then the device is moved, then the lock goes on, then gas is filled in."""
    worn, positions = dict(state.locks), dict(state.positions)
    action = step.get("action")
    book.take_off(step, worn)
    if action is not None:
        book.circuit.check_position(action["device"], action["position"])
        book.watch_move(step, worn)
        positions[action["device"]] = action["position"]
    book.put_on(step, worn, positions)
    pressures = state.pressures
    if step.get("recharges") is not None:
        pressures = pressures.with_line(book.circuit.line(step["recharges"]), start.pressures)
    if (positions, worn, pressures) == (state.positions, state.locks, state.pressures):
        return state
    settled = settle(book.circuit, positions, pressures, frozenset(worn.values()))
    return State(positions=positions, locks=worn, settled=settled)


def _before_work(start: State, moments: Sequence[Moment]) -> State:
    """The state as the first step of the work begins; what is isolated after that comes too late to count."""
    state = start
    for moment in moments:
        if moment.step["section"] in FROM_WORK_ON:
            break
        state = moment.after
    return state

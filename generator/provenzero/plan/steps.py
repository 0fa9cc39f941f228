"""Collects the steps of a plan with the state after each, numbering steps and locks as it goes."""

from collections.abc import Mapping
from dataclasses import dataclass, field, replace

from provenzero.network.model import DeviceTag, LineId
from provenzero.plan.instruments import changed, readings
from provenzero.plan.model import Expect, Purpose, Section, Step, StepKind
from provenzero.plan.sequence import Move
from provenzero.state.action import Effect, act, refill
from provenzero.state.model import State, Wiring

_LETTER = {
    Section.PREPARE: "A",
    Section.ISOLATE: "B",
    Section.RELEASE: "C",
    Section.VERIFY: "D",
    Section.WORK: "E",
    Section.REINSTATE: "F",
    Section.TEST: "G",
}


@dataclass(slots=True)
class Script:
    """The steps so far. `numbers` gives the lock number of each device that has been locked."""

    wiring: Wiring
    states: list[State]
    steps: list[Step] = field(default_factory=list)
    numbers: dict[DeviceTag, int] = field(default_factory=dict)
    on: dict[DeviceTag, str] = field(default_factory=dict)

    @property
    def state(self) -> State:
        """The state after the last step."""
        return self.states[-1]

    def say(self, section: Section, kind: StepKind, **more: object) -> None:
        """Add a step that changes nothing."""
        self._add(Step(id=self._next(section), section=section, kind=kind, **more), self.state)  # type: ignore[arg-type]

    def move(self, section: Section, move: Move, reason: str, facts: Mapping[str, str] | None = None) -> Effect:
        """Add a step that puts a device in a position, with its lock if it gets one."""
        before = self.state
        was = before.positions[move.device]
        effect = act(self.wiring, before, move.device, move.position)
        lock = None
        if move.locks:
            lock = self.numbers.setdefault(move.device, len(self.numbers) + 1)
            self.on[move.device] = move.position
        kind = StepKind.SET
        if move.locks:
            kind = StepKind.CHECK_AND_LOCK if was == move.position else StepKind.SET_AND_LOCK
        self._add(
            Step(
                id=self._next(section),
                section=section,
                kind=kind,
                device=move.device,
                position=move.position,
                was=was,
                lock=lock,
                expect=self._expect(before, effect.after),
                lines=tuple(dict.fromkeys((*effect.fallen, *effect.risen))),
                facts=facts or {},
                reason=reason,
            ),
            effect.after,
        )
        return effect

    def restore(self, section: Section, device: DeviceTag, position: str, *, announce: tuple[str, ...]) -> Effect:
        """Add a step that takes the lock off a device (if it has one) and puts it back in a position."""
        before = self.state
        was = before.positions[device]
        effect = act(self.wiring, before, device, position)
        unlock = self.numbers[device] if device in self.on else None
        self.on.pop(device, None)
        kind = StepKind.RESTORE
        if unlock is not None:
            kind = StepKind.UNLOCK if was == position else StepKind.UNLOCK_AND_SET
        self._add(
            Step(
                id=self._next(section),
                section=section,
                kind=kind,
                device=device,
                position=position,
                was=was,
                unlock=unlock,
                moves_function=", ".join(dict.fromkeys([*effect.moved, *announce])) or None,
                starts_pump=", ".join(effect.started) or None,
                expect=self._expect(before, effect.after),
                lines=tuple(dict.fromkeys((*effect.fallen, *effect.risen))),
                reason="reinstate",
            ),
            effect.after,
        )
        return effect

    def operate(self, section: Section, kind: StepKind, device: DeviceTag, position: str, function: str) -> None:
        """Add a step that moves a function on purpose."""
        before = self.state
        effect = act(self.wiring, before, device, position)
        self._add(
            Step(
                id=self._next(section),
                section=section,
                kind=kind,
                device=device,
                position=position,
                was=before.positions[device],
                moves_function=", ".join(dict.fromkeys([function, *effect.moved])),
                starts_pump=", ".join(effect.started) or None,
                expect=self._expect(before, effect.after),
                facts={"function": function},
                hold_point=True,
                reason="function_test" if section is Section.TEST else "leave",
            ),
            effect.after,
        )

    def recharge(self, section: Section, line: LineId, facts: Mapping[str, str]) -> None:
        """Add a step that gives a gas line its charge again."""
        after = refill(self.wiring, self.state, line)
        step = Step(
            id=self._next(section),
            section=section,
            kind=StepKind.RECHARGE,
            recharges=line,
            facts=facts,
            lines=(line,),
            hold_point=True,
            reason="recharge",
        )
        self._add(step, after)

    def note(self, **more: object) -> None:
        """Change the last step (a hold point, a fact)."""
        self.steps[-1] = replace(self.steps[-1], **more)  # type: ignore[arg-type]

    def _expect(self, before: State, after: State) -> tuple[Expect, ...]:
        """Readings of the gauges that a move changes; left out where all that can be said is that it may fall."""
        found = readings(self.wiring, after, changed(before, after))
        return tuple(e for e in found if not (e.low_pag <= 0.0 < e.high_pag == before.high(e.line)))

    def _next(self, section: Section) -> str:
        return f"{_LETTER[section]}{sum(s.section is section for s in self.steps) + 1}"

    def _add(self, step: Step, after: State) -> None:
        self.steps.append(step)
        self.states.append(after)


def reason_of(move: Move) -> str:
    """The rule that puts a move into the plan."""
    if not move.locks:
        return "let_out"
    return {
        Purpose.REMOTE: "remote_first",
        Purpose.ENERGY: "energy_before_stored",
        Purpose.BARRIER: "keeps_out",
        Purpose.VENT: "keeps_open",
    }[move.purpose]

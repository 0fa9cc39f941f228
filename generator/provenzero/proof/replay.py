"""Runs the steps of a plan again from its start, trusting nothing the planner noted about them."""

from collections.abc import Mapping
from dataclasses import dataclass

from provenzero.network.model import DeviceTag
from provenzero.plan.model import Plan, Section, Step
from provenzero.state.action import Effect, act, refill
from provenzero.state.model import State, Wiring, wire

BEFORE_WORK = frozenset({Section.PREPARE, Section.ISOLATE, Section.RELEASE, Section.VERIFY})


@dataclass(frozen=True, slots=True, kw_only=True)
class Moment:
    """One step with the state it leads to, what it did, and the locks that are on after it."""

    step: Step
    state: State
    effect: Effect | None
    locks: Mapping[DeviceTag, str]


@dataclass(frozen=True, slots=True, kw_only=True)
class Replay:
    """All moments of a plan."""

    wiring: Wiring
    start: State
    moments: tuple[Moment, ...]

    def isolated(self) -> Moment:
        """The last moment before the work."""
        return [m for m in self.moments if m.step.section in BEFORE_WORK][-1]


def replay(plan: Plan) -> Replay:
    """Run all steps of a plan on its network."""
    wiring = wire(plan.network)
    state = plan.start()
    locks: dict[DeviceTag, str] = {}
    moments = []
    for step in plan.steps:
        effect = None
        if step.device is not None and step.position is not None:
            effect = act(wiring, state, step.device, step.position)
            state = effect.after
            if step.lock is not None:
                locks = {**locks, step.device: step.position}
            if step.unlock is not None:
                locks = {k: v for k, v in locks.items() if k != step.device}
        if step.recharges is not None:
            state = refill(wiring, state, step.recharges)
        moments.append(Moment(step=step, state=state, effect=effect, locks=locks))
    return Replay(wiring=wiring, start=plan.start(), moments=tuple(moments))

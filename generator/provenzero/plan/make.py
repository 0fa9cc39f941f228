"""From a job on a unit to the whole plan: isolation, verification, work, the way back and the tests."""

from collections.abc import Mapping
from dataclasses import dataclass, replace

from provenzero.catalogue.job import Equipment, Job, Leave, TestKind
from provenzero.failure.grade import grades
from provenzero.network.compile import vents_for
from provenzero.network.devices.pumps import LIQUID
from provenzero.network.model import Actuator, DeviceKind, DeviceTag, LineId, Medium, Network
from provenzero.plan.attempt import Attempt, Worked, search
from provenzero.plan.impairment import impairment
from provenzero.plan.instruments import TANKS, gauges_of, joined_lines, readings
from provenzero.plan.model import Lock, Obstacle, Plan, Purpose, Refusal, Section, StepKind
from provenzero.plan.region import unheld_movers
from provenzero.plan.reinstate import restore_all
from provenzero.plan.steps import Script, reason_of
from provenzero.state.action import initial
from provenzero.state.held import held_open
from provenzero.state.may import reach
from provenzero.state.model import State, Wiring, wire
from provenzero.unit.model import Unit

_INDICATIONS = 2


@dataclass(frozen=True, slots=True, kw_only=True)
class _Making:
    unit: Unit
    job: Job
    on: str
    wiring: Wiring
    zone: tuple[LineId, ...]
    attempt: Attempt
    script: Script

    def functions(self) -> list[Actuator]:
        """Functions whose chambers are opened."""
        return [a for a in self.wiring.network.actuators if a.open_line in self.zone or a.close_line in self.zone]


def make_plan(
    unit: Unit,
    network: Network,
    job: Job,
    on: str,
    positions: Mapping[DeviceTag, str] | None = None,
) -> Plan | Refusal:
    """Plan a job on one piece of equipment of a unit, from its normal state or with some devices standing elsewhere.

    ValueError if the equipment has none of the ports that the job opens.
    """
    zone = network.opened(on, job.opens)
    missing = [name for name in job.opens if name not in job.optional and not network.opened(on, (name,))]
    if not zone or (missing and on != "unit"):
        raise ValueError(f"{on} has no port {', '.join(missing)}")
    network = vents_for(network, frozenset(zone))
    wiring = wire(network)
    script = Script(wiring=wiring, states=[initial(wiring, positions)])
    start = script.state
    _prepare_texts(script, job)
    _leave(script, job, on)
    attempt = search(wiring, script.state, zone, _worked_on(wiring, job, zone))
    if attempt.obstacles:
        return Refusal(unit=unit, job=job, on=on, zone=zone, obstacles=attempt.obstacles)
    making = _Making(unit=unit, job=job, on=on, wiring=wiring, zone=zone, attempt=attempt, script=script)
    script.say(
        Section.PREPARE,
        StepKind.READ_BEFORE,
        expect=readings(wiring, script.state, attempt.region.dead),
        reason="read_before",
    )
    purposes = _isolate(making)
    isolated = script.state
    _verify(making)
    _work(making)
    stuck = _reinstate(making, start, purposes)
    if stuck:
        obstacles = tuple(Obstacle(line=next(iter(wiring.anywhere[t])), words="no_way_back", path=(t,)) for t in stuck)
        return Refusal(unit=unit, job=job, on=on, zone=zone, obstacles=obstacles)
    _tests(making, start)
    other = [k for k in start.fed if start.low(k) > 0.0 and script.state.pressures[k] != start.pressures[k]]
    if other:
        obstacles = tuple(Obstacle(line=k, words="not_restored") for k in other)
        return Refusal(unit=unit, job=job, on=on, zone=zone, obstacles=obstacles)
    locks = _locks(making, isolated, purposes)
    return Plan(
        unit=unit,
        job=job,
        on=on,
        network=network,
        zone=zone,
        dead=tuple(k for k in network.lines if k in attempt.region.dead),
        steps=tuple(script.steps),
        states=tuple(script.states),
        locks=locks,
        open_to_vent=attempt.open_to_vent,
        unheld=attempt.unheld,
        grades=grades(wiring, start, isolated, frozenset(zone), attempt.locks),
        impairment=impairment(wiring, unit, attempt.region.dead, attempt.locks),
    )


def _prepare_texts(script: Script, job: Job) -> None:
    script.say(Section.PREPARE, StepKind.WELL_STATE, hold_point=True, reason="well_state")
    script.say(Section.PREPARE, StepKind.NOTIFY, reason="notify")
    script.say(Section.PREPARE, StepKind.IDENTIFY, hold_point=True, reason="identify")
    for text in job.prepare:
        script.say(Section.PREPARE, StepKind.JOB_TEXT, facts={"text": text}, reason="job")


def _worked_on(wiring: Wiring, job: Job, zone: tuple[LineId, ...]) -> Worked:
    """Chambers of a function that is worked on, and the pilots that could move its handle.

    The vents of these chambers are held by locks and its remote commands are dead, so that nobody's hand at a panel
    reaches the piston, even while there is nothing to move it with.
    """
    if job.equipment is not Equipment.FUNCTION:
        return Worked()
    items = [a for a in wiring.network.actuators if a.open_line in zone or a.close_line in zone]
    return Worked(
        chambers=frozenset(k for a in items for k in (a.open_line, a.close_line)),
        pilots=frozenset(line for a in items for line in unheld_movers(wiring.device(a.valve))),
    )


def _leave(script: Script, job: Job, on: str) -> None:
    """Put the function at the end where the job wants its piston."""
    if job.leave is Leave.AS_FOUND:
        return
    for item in script.wiring.network.actuators:
        if on in (item.name, item.valve) and script.state.pistons[item.name] != job.leave.value:
            script.operate(Section.PREPARE, StepKind.MOVE_FUNCTION, item.valve, job.leave.value, item.name)


def _isolate(making: _Making) -> dict[DeviceTag, Purpose]:
    script, attempt = making.script, making.attempt
    purposes: dict[DeviceTag, Purpose] = {}
    section = Section.ISOLATE
    for made in attempt.made:
        move = made.move
        purposes[move.device] = move.purpose
        if move.purpose is Purpose.VENT:
            section = Section.RELEASE
        locked = move.locks and move.device in attempt.locks
        if not locked and script.state.positions[move.device] == move.position:
            continue
        before = script.state
        script.move(section, move if locked == move.locks else replace(move, locks=False), reason_of(move))
        for source in making.wiring.network.sources:
            drive = source.drive
            if drive is not None and before.high(drive) > 0.0 and script.state.high(drive) <= 0.0:
                script.say(section, StepKind.TRY_START, facts={"pump": source.id}, lines=(drive,), reason="try_start")
    return purposes


def _verify(making: _Making) -> None:
    script, wiring = making.script, making.wiring
    names = [a.name for a in making.functions()]
    commanded = [f for f in making.unit.functions if f.name in names and _commands_dead(making, DeviceTag(f.valve.tag))]
    for panel in making.unit.panels:
        tried = [f.name for f in commanded if panel.tag in f.valve.panels]
        if tried:
            facts = {"function": ", ".join(tried), "panel": panel.tag}
            script.say(Section.VERIFY, StepKind.TRY_OPERATE, facts=facts, reason="try_operate")
    unseen: dict[int, list[LineId]] = {}
    for group in _groups(making):
        shown = gauges_of(wiring, script.state, group[0])
        if shown:
            script.say(
                Section.VERIFY,
                StepKind.READ_ZERO,
                lines=group,
                expect=readings(wiring, script.state, [g.reads for g in shown]),
                reason="zero_read",
            )
        if len(shown) < _INDICATIONS:
            unseen.setdefault(len(shown), []).extend(group)
    for count, lines in unseen.items():
        script.say(
            Section.VERIFY,
            StepKind.TEST_GAUGE,
            lines=tuple(lines),
            facts={"gauges": str(count)},
            reason="second_indication",
        )
    script.say(Section.VERIFY, StepKind.WATCH, lines=making.zone, hold_point=True, reason="hold")
    script.say(Section.VERIFY, StepKind.RELEASE_WORK, hold_point=True, reason="release_work")


def _commands_dead(making: _Making, valve: DeviceTag) -> bool:
    """Whether no remote command can move a valve: a handle that a panel could throw is not tried."""
    locks = making.attempt.locks
    flood = reach(making.wiring, locks, making.script.state.pressures)
    device = making.wiring.device(valve)
    holds = device.lock_holds_against if valve in locks else ()
    return not any(mover in flood.lines for mover in device.moved_by if mover not in holds)


def _groups(making: _Making) -> list[tuple[LineId, ...]]:
    """Zone lines that hold pressure media, those that share one pressure together."""
    wiring, state = making.wiring, making.script.state
    left = [
        k
        for k in making.zone
        if wiring.network.lines[k].medium is not Medium.ELECTRIC and k not in wiring.vents | TANKS
    ]
    groups = []
    while left:
        same = joined_lines(wiring, state, left[0])
        groups.append(tuple(k for k in left if k in same))
        left = [k for k in left if k not in same]
    return groups


def _work(making: _Making) -> None:
    for text in making.job.work:
        making.script.say(Section.WORK, StepKind.JOB_TEXT, facts={"text": text}, reason="job")


def _reinstate(making: _Making, start: State, purposes: Mapping[DeviceTag, Purpose]) -> list[DeviceTag]:
    script, wiring = making.script, making.wiring
    for text in making.job.restore:
        script.say(Section.REINSTATE, StepKind.JOB_TEXT, facts={"text": text}, reason="job")
    script.say(Section.REINSTATE, StepKind.CLEAR, hold_point=True, reason="clear")
    for tag, device in wiring.network.devices.items():
        if device.kind is DeviceKind.GAS_VALVE and script.state.positions[tag] != start.positions[tag]:
            script.restore(Section.REINSTATE, tag, start.positions[tag], announce=())
            line = next(k for k in wiring.anywhere[tag] if k not in wiring.vents)
            script.recharge(Section.REINSTATE, line, {"device": tag})
    emptied = [
        source.line
        for source in wiring.network.sources
        if source.line in (LIQUID, *_reserves(making.unit))
        and start.high(source.line) > 0.0 >= script.state.high(source.line)
    ]
    stuck = restore_all(script, start, purposes, making.zone, emptied)
    if not stuck:
        script.say(
            Section.REINSTATE,
            StepKind.READ_RESTORED,
            expect=readings(wiring, script.state, making.attempt.region.dead),
            reason="read_restored",
        )
    return stuck


def _reserves(unit: Unit) -> tuple[LineId, ...]:
    """Gas lines of the nitrogen backups, which only new bottles fill again."""
    return tuple(LineId(f"{n.tag}.gas") for n in unit.nitrogen_backups)


def _tests(making: _Making, start: State) -> None:
    script = making.script
    plain = {
        TestKind.LEAK: StepKind.LEAK_TEST,
        TestKind.PUMP: StepKind.PUMP_TEST,
        TestKind.REGULATOR: StepKind.REGULATOR_TEST,
        TestKind.PRECHARGE: StepKind.PRECHARGE_TEST,
        TestKind.DRAWDOWN: StepKind.DRAWDOWN_TEST,
    }
    for kind in making.job.tests:
        if kind is TestKind.FUNCTION:
            for item in making.functions():
                _function_test(script, item, start)
            continue
        lines = tuple(k for k in making.zone if script.state.high(k) > 0.0)
        script.say(
            Section.TEST,
            plain[kind],
            lines=making.zone,
            facts={"on": making.on},
            reason="test",
            expect=readings(making.wiring, script.state, lines),
        )
    script.say(Section.TEST, StepKind.HAND_BACK, hold_point=True, reason="hand_back")


def _function_test(script: Script, item: Actuator, start: State) -> None:
    """Work the function once to its other end and back, and leave the handle where it stood."""
    stood = start.positions[item.valve]
    other = "open" if stood == "close" else "close"
    for position in dict.fromkeys((other, "open" if other == "close" else "close", stood)):
        script.operate(Section.TEST, StepKind.FUNCTION_TEST, item.valve, position, item.name)


def _locks(making: _Making, isolated: State, purposes: Mapping[DeviceTag, Purpose]) -> tuple[Lock, ...]:
    wiring, attempt = making.wiring, making.attempt
    locks = []
    for tag, number in sorted(making.script.numbers.items(), key=lambda item: item[1]):
        fewer = {k: v for k, v in attempt.locks.items() if k != tag}
        flood = reach(wiring, fewer, isolated.pressures)
        held = held_open(wiring, fewer, isolated.pressures)
        locks.append(
            Lock(
                number=number,
                device=tag,
                position=attempt.locks[tag],
                purpose=purposes[tag],
                holds_back=tuple(flood.path(k) for k in making.zone if k in flood.lines),
                keeps_open=tuple(k for k in attempt.open_to_vent if k not in held),
            )
        )
    return tuple(locks)

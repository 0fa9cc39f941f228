"""Things that happened, as published in safety alerts of the drilling contractors' association; the plan catches each.

The alert numbers and what went wrong are as summarised by that association (98-16, 01-45, 03-51, 06-32, 13-09, 99-38).
"""

from tests.properties.planning import example, network_of, places, plan_of, unit_from
from tests.unit.plan.changing import changed

from provenzero.network.model import DeviceTag, LineId
from provenzero.plan.model import Plan, Section, StepKind
from provenzero.proof.locked import locked
from provenzero.proof.replay import BEFORE_WORK, replay
from provenzero.state.action import act, initial
from provenzero.state.may import reach
from provenzero.state.model import wire


def _plan(unit: str, job: str, on: str) -> Plan:
    plan = plan_of(example(unit), job, on)
    assert isinstance(plan, Plan)
    return plan


def test_98_16_the_nitrogen_side_of_a_bottle_is_a_source_of_its_own_and_is_let_out_after_the_fluid() -> None:
    plan = _plan("land-rig", "replace-bottle-bladder", "BK-1/3")
    assert LineId("BK-1/3.gas") in plan.zone
    steps = [s.device for s in plan.steps if s.section is Section.RELEASE and s.device]
    assert steps.index(DeviceTag("BV-1")) < steps.index(DeviceTag("BK-1/3-gas"))
    drained_only = next(i for i, s in enumerate(plan.steps) if s.device == "BV-1")
    assert plan.states[drained_only + 1].high(LineId("BK-1/3.gas")) > 6e6
    assert plan.isolated().high(LineId("BK-1/3.gas")) == 0.0


def test_01_45_a_bottle_is_opened_only_with_its_fluid_port_and_its_gas_side_at_zero() -> None:
    for unit, on in (("land-rig", "BK-2/8"), ("jack-up", "BK-4/2"), ("workover", "BK-A/1")):
        plan = _plan(unit, "replace-bottle-bladder", on)
        assert len(plan.zone) == 2
        assert all(plan.isolated().high(line) == 0.0 for line in plan.zone)
        assert {s.kind for s in plan.steps if s.section is Section.VERIFY} & {StepKind.READ_ZERO, StepKind.TEST_GAUGE}


def test_03_51_work_on_a_preventer_takes_both_chambers_into_the_zone() -> None:
    plan = _plan("jack-up", "work-on-preventer-end", "annular")
    assert set(plan.zone) == {"annular.open", "annular.close"}
    # The surge bottle stands on the closing chamber: it must be at zero or cut off as well.
    assert plan.isolated().high(LineId("annular.close")) == 0.0


def test_06_32_a_handle_put_to_a_blocked_centre_leaves_pressure_behind_and_is_no_isolation() -> None:
    network = network_of("land-rig")
    wiring = wire(network)
    state = act(wiring, initial(wiring), network.actuators[1].valve, "centre").after
    assert state.high(LineId("upper-pipe-rams.open")) > 1e7
    plan = _plan("land-rig", "replace-hoses", "upper-pipe-rams")
    assert ("HV-2", "centre") not in {(lock.device, lock.position) for lock in plan.locks}


def test_13_09_a_gauge_behind_a_closed_valve_is_not_read_and_one_zero_is_never_enough() -> None:
    def shut(data: dict[str, object]) -> None:
        header = data["header"]
        assert isinstance(header, dict)
        header["fittings"][0]["valve"]["normal"] = "closed"

    plan = plan_of(unit_from(changed("jack-up", shut)), "replace-bypass-valve", "BP-1")
    assert isinstance(plan, Plan)
    assert all(e.gauge != "PG-1" for s in plan.steps for e in s.expect)
    for unit in ("land-rig", "jack-up", "workover"):
        for job, on in places(example(unit)):
            made = plan_of(example(unit), job.id, on)
            assert isinstance(made, Plan)
            shown = dict.fromkeys(made.zone, 0)
            for step in (s for s in made.steps if s.section is Section.VERIFY):
                for line in step.lines:
                    if step.kind is StepKind.READ_ZERO and line in shown:
                        shown[line] += len(step.expect)
                    if step.kind is StepKind.TEST_GAUGE and line in shown:
                        shown[line] += 2
            media = {k: made.network.lines[k].medium.value for k in made.zone}
            weak = [k for k, n in shown.items() if n < 2 and media[k] != "electric" and not made.network.lines[k].vent]
            assert not [k for k in weak if k not in {"reservoir", "returns"}], (unit, job.id, on, weak)


def test_99_38_a_valve_that_is_opened_has_every_port_in_the_zone() -> None:
    plan = _plan("jack-up", "replace-four-way-valve", "HV-3")
    assert set(plan.zone) >= {
        "blind-shear-rams.supply",
        "blind-shear-rams.open",
        "blind-shear-rams.close",
        "returns",
    }
    assert locked(plan, replay(plan)).holds


def test_left_out_any_lock_of_the_hose_job_lets_pressure_in_by_the_way_that_the_plan_names() -> None:
    plan = _plan("land-rig", "replace-hoses", "upper-pipe-rams")
    wiring = wire(plan.network)
    locks = {lock.device: lock.position for lock in plan.locks}
    for lock in plan.locks:
        fewer = {k: v for k, v in locks.items() if k != lock.device}
        flood = reach(wiring, fewer, plan.isolated().pressures)
        assert bool(flood.lines & set(plan.zone)) == bool(lock.holds_back)
        assert lock.holds_back or lock.keeps_open


def test_nothing_is_said_to_be_at_zero_before_the_step_that_brings_it_there() -> None:
    for unit in ("land-rig", "jack-up", "workover"):
        for job, on in places(example(unit)):
            plan = plan_of(example(unit), job.id, on)
            assert isinstance(plan, Plan)
            for step, state in zip(plan.steps, plan.states[1:], strict=True):
                if step.section in BEFORE_WORK:
                    assert all(state.high(e.line) <= e.high_pag for e in step.expect), (unit, job.id, on, step.id)

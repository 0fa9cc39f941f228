"""A sound plan proves; a plan that was spoiled in one place fails in the property that place belongs to."""

from collections.abc import Callable
from dataclasses import replace

import pytest
from tests.properties.planning import example, plan_of

from provenzero.network.model import DeviceTag
from provenzero.plan.model import Plan, Section, Step
from provenzero.proof.prove import prove


def _plan(unit: str = "land-rig", job: str = "replace-bypass-valve", on: str = "BP-1") -> Plan:
    plan = plan_of(example(unit), job, on)
    assert isinstance(plan, Plan)
    return plan


def _without(plan: Plan, drop: Callable[[Step], bool]) -> Plan:
    return replace(plan, steps=tuple(s for s in plan.steps if not drop(s)))


def _changed(plan: Plan, which: Callable[[Step], bool], change: Callable[[Step], Step]) -> Plan:
    return replace(plan, steps=tuple(change(s) if which(s) else s for s in plan.steps))


def _failing(plan: Plan) -> set[str]:
    return {name for name, verdict in prove(plan).items() if not verdict.holds}


def test_a_plan_as_it_was_made_proves_in_every_property() -> None:
    assert not _failing(_plan())


def test_every_verdict_carries_evidence() -> None:
    assert all(len(v.evidence) > 10 for v in prove(_plan()).values())


def test_without_its_bleeds_the_zone_is_not_dead() -> None:
    spoiled = _without(_plan(), lambda s: s.section is Section.RELEASE and s.position == "open")
    assert "dead" in _failing(spoiled)


def test_with_one_isolator_not_locked_the_zone_is_not_locked() -> None:
    spoiled = _changed(_plan(), lambda s: s.device == "Q-1" and s.lock is not None, lambda s: replace(s, lock=None))
    assert "locked" in _failing(spoiled)


def test_a_lock_that_nothing_depends_on_is_found() -> None:
    plan = _plan("jack-up", "replace-hoses", "upper-pipe-rams")
    extra = replace(
        next(s for s in plan.steps if s.lock is not None), device=DeviceTag("DR-3"), position="closed", lock=9
    )
    at = next(i for i, s in enumerate(plan.steps) if s.section is Section.VERIFY)
    spoiled = replace(plan, steps=(*plan.steps[:at], extra, *plan.steps[at:]))
    assert "least" in _failing(spoiled)


def test_a_bleed_opened_while_a_pump_is_live_is_not_quiet() -> None:
    spoiled = _without(_plan(), lambda s: s.device in ("Q-1", "AV-2") and s.section is Section.ISOLATE)
    assert "quiet" in _failing(spoiled)


def test_a_movement_that_is_not_announced_is_not_quiet() -> None:
    plan = _plan("land-rig", "replace-hoses", "upper-pipe-rams")
    spoiled = _changed(plan, lambda s: s.section is Section.TEST, lambda s: replace(s, moves_function=None))
    assert "quiet" in _failing(spoiled)


def test_a_zero_promised_too_early_is_not_honest() -> None:
    plan = _plan()
    zero = next(s for s in plan.steps if s.section is Section.RELEASE and s.expect)
    spoiled = _changed(
        plan,
        lambda s: s.id == "A4" or bool(s.section is Section.PREPARE and s.expect),
        lambda s: replace(s, expect=zero.expect),
    )
    assert "honest" in _failing(spoiled)


@pytest.mark.parametrize("device", ["IV-2", "Q-1"])
def test_a_device_left_out_on_the_way_back_is_not_reversible(device: str) -> None:
    spoiled = _without(_plan(), lambda s: s.device == device and s.section is Section.REINSTATE)
    assert "reversible" in _failing(spoiled)

"""Grades of the isolations on the example units, and what one leak does."""

from tests.properties.planning import example, plan_of

from provenzero.failure.grade import Grade, IsolationGrade
from provenzero.plan.model import Plan


def _grades(unit: str, job: str, on: str) -> dict[str, Grade]:
    plan = plan_of(example(unit), job, on)
    assert isinstance(plan, Plan)
    return {g.source: g for g in plan.grades}


def test_a_centre_that_vents_is_one_block_with_a_bleed_behind_it() -> None:
    grade = _grades("jack-up", "replace-hoses", "upper-pipe-rams")["BK-1"]
    assert grade.barriers == ("HV-2",)
    assert grade.grade is IsolationGrade.BLOCK_AND_BLEED
    assert grade.survives_single_leak


def test_a_pump_on_its_isolator_is_cut_at_the_origin_but_bears_no_single_failure() -> None:
    grade = _grades("land-rig", "overhaul-electric-pump", "P-1")["supply.rig switchboard"]
    assert grade.grade is IsolationGrade.ISOLATED_AT_ORIGIN
    assert not grade.survives_single_leak


def test_a_bank_let_out_with_its_bleed_locked_open_is_drained() -> None:
    grade = _grades("land-rig", "replace-bottle-bladder", "BK-1/1")["BK-1"]
    assert grade.grade is IsolationGrade.DRAINED
    assert grade.barriers == ("BV-1",)


def test_the_gas_side_is_graded_apart_from_the_fluid_side() -> None:
    grades = _grades("land-rig", "replace-bottle-bladder", "BK-1/1")
    assert grades["BK-1/1 nitrogen"].grade is IsolationGrade.DRAINED
    assert not grades["BK-1/1 nitrogen"].survives_single_leak

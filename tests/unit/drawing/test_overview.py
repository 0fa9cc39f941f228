"""The circuit drawing: nothing lies on anything else, everything is there once, and what the job does is marked."""

import pytest
from tests.properties.planning import example, places, plan_of
from tests.unit.drawing.circuit import unmarked, untruths
from tests.unit.drawing.faults import faults

from provenzero.drawing.arrange import overview
from provenzero.drawing.marks import marks_of
from provenzero.drawing.model import Kind
from provenzero.plan.model import Plan
from provenzero.render.svg import svg

UNITS = ("land-rig", "jack-up", "workover")


def _plans(name: str) -> list[Plan]:
    found = [plan_of(example(name), job.id, on) for job, on in places(example(name))]
    return [p for p in found if isinstance(p, Plan)]


@pytest.mark.parametrize("name", UNITS)
def test_on_every_job_of_an_example_nothing_lies_on_anything_else_and_no_line_crosses_a_symbol(name: str) -> None:
    for plan in _plans(name):
        sheets = overview(plan.unit, plan.network, marks_of(plan))
        assert not [f for sheet in sheets for f in faults(sheet)], (plan.job.id, plan.on)


@pytest.mark.parametrize("name", UNITS)
def test_every_device_is_drawn_once_and_every_line_ends_at_the_devices_it_joins(name: str) -> None:
    plan = _plans(name)[0]
    assert not untruths(plan.unit, plan.network, overview(plan.unit, plan.network, marks_of(plan)))


@pytest.mark.parametrize("name", UNITS)
def test_opened_and_trapped_lines_and_locks_are_marked(name: str) -> None:
    for plan in _plans(name):
        marks = marks_of(plan)
        sheets = overview(plan.unit, plan.network, marks)
        assert not list(unmarked(marks, sheets)), (plan.job.id, plan.on)
        words = {
            getattr(shape, "words", "") for s in sheets for g in s.groups if g.kind is Kind.MARK for shape in g.shapes
        }
        assert {str(lock.number) for lock in plan.locks} <= words, (plan.job.id, plan.on)


def test_the_same_plan_is_drawn_the_same() -> None:
    plan = _plans("land-rig")[0]
    one, other = (["".join(svg(s) for s in overview(plan.unit, plan.network, marks_of(plan)))] for _ in range(2))
    assert one == other


def test_every_sheet_says_in_words_what_it_shows() -> None:
    for name in UNITS:
        plan = _plans(name)[0]
        for sheet in overview(plan.unit, plan.network, marks_of(plan)):
            drawn = svg(sheet)
            assert "<title>" in drawn
            assert "<desc>" in drawn

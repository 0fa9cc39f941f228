"""Drawings of generated units: whatever the unit, nothing lies on anything else and nothing is left out."""

from typing import Any

from hypothesis import HealthCheck, Phase, given, settings
from tests.properties.planning import places, unit_from
from tests.properties.strategies import unit_data
from tests.unit.drawing.circuit import untruths
from tests.unit.drawing.faults import faults

from provenzero.drawing.arrange import overview
from provenzero.drawing.marks import marks_of
from provenzero.network.compile import compile_network
from provenzero.plan.make import make_plan
from provenzero.plan.model import Plan


@settings(
    max_examples=20,
    phases=(Phase.explicit, Phase.reuse, Phase.generate),
    suppress_health_check=[HealthCheck.too_slow, HealthCheck.data_too_large],
)
@given(unit_data())
def test_a_generated_unit_is_drawn_without_overlaps_and_completely(data: dict[str, Any]) -> None:
    unit = unit_from(data)
    network = compile_network(unit)
    for job, on in places(unit):
        plan = make_plan(unit, network, job, on)
        if isinstance(plan, Plan):
            sheets = overview(unit, plan.network, marks_of(plan))
            assert not [f for sheet in sheets for f in faults(sheet)], (job.id, on)
            assert not untruths(unit, plan.network, sheets), (job.id, on)
            return

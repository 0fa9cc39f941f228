"""Dead, Locked, Least, Quiet, Honest, Reversible: held against a search that shares no code with the planner."""

from typing import Any

import pytest
from hypothesis import HealthCheck, Phase, given, settings
from tests.properties.oracle import check_all
from tests.properties.planning import example, network_of, places, unit_from, written
from tests.properties.strategies import unit_data

from provenzero.network.compile import compile_network
from provenzero.network.model import DeviceTag
from provenzero.plan.make import make_plan
from provenzero.plan.model import Plan
from provenzero.proof.prove import prove

# A whole unit takes minutes to shrink; the first failing one is shown as it is.
PHASES = (Phase.explicit, Phase.reuse, Phase.generate)
SLOW = (HealthCheck.too_slow, HealthCheck.data_too_large)
UNITS = ("land-rig", "jack-up", "workover")


def _faults(plan: Plan) -> list[str]:
    own = [f"own {name}: {v.evidence}" for name, v in prove(plan).items() if not v.holds]
    return own + [f"{name}: {v.evidence}" for name, v in check_all(written(plan)).items() if not v.holds]


@pytest.mark.parametrize("name", UNITS)
def test_every_job_on_an_example_unit_has_a_plan_that_keeps_all_properties(name: str) -> None:
    count = 0
    for job, on in places(example(name)):
        plan = make_plan(example(name), network_of(name), job, on)
        assert isinstance(plan, Plan), (job.id, on)
        assert not _faults(plan), (job.id, on)
        count += 1
    assert count > 8


@settings(max_examples=60, phases=PHASES, suppress_health_check=SLOW)
@given(unit_data())
def test_every_plan_made_for_a_generated_unit_keeps_all_properties(data: dict[str, Any]) -> None:
    unit = unit_from(data)
    network = compile_network(unit)
    for job, on in places(unit):
        plan = make_plan(unit, network, job, on)
        if isinstance(plan, Plan):
            assert not _faults(plan), (job.id, on)
        else:
            assert plan.obstacles, (job.id, on)


@settings(max_examples=20, phases=PHASES, suppress_health_check=SLOW)
@given(unit_data(most_functions=3, most_banks=2, most_pumps=2))
def test_the_same_input_gives_the_same_plan_file(data: dict[str, Any]) -> None:
    unit = unit_from(data)
    for job, on in places(unit):
        one, other = (make_plan(unit_from(data), compile_network(unit), job, on) for _ in range(2))
        if isinstance(one, Plan) and isinstance(other, Plan):
            assert written(one) == written(other)
        else:
            assert type(one) is type(other)


@pytest.mark.parametrize(
    ("name", "standing"),
    [
        ("land-rig", {"HV-2": "close", "HV-5": "open"}),
        ("land-rig", {"HV-2": "centre", "IV-1": "closed"}),
        ("jack-up", {"HV-3": "close", "Q-1": "off", "IV-2": "closed"}),
        ("jack-up", {"HV-1": "close"}),
        ("workover", {"HV-B": "close", "AV-A2": "closed"}),
    ],
)
def test_a_plan_from_where_the_devices_stand_now_keeps_all_properties_and_ends_there(
    name: str, standing: dict[str, str]
) -> None:
    positions = {DeviceTag(tag): position for tag, position in standing.items()}
    for job, on in places(example(name)):
        plan = make_plan(example(name), network_of(name), job, on, positions)
        if isinstance(plan, Plan):
            assert not _faults(plan), (job.id, on)
            assert {tag: plan.end().positions[tag] for tag in positions} == positions
        else:
            assert plan.obstacles

"""From data of a unit to its plans, as the command makes them, and to the plan file."""

import json
from collections.abc import Iterator, Mapping
from functools import cache
from pathlib import Path
from typing import Any

from provenzero.catalogue.applies import applies_to
from provenzero.catalogue.job import Job
from provenzero.catalogue.load import catalogue
from provenzero.document.context import PermitContext
from provenzero.document.model import Paper
from provenzero.document.permit_figures import permit_figures
from provenzero.document.plan_json import plan_json
from provenzero.document.wording import Wording, load_wording
from provenzero.network.compile import compile_network
from provenzero.network.model import Network
from provenzero.plan.make import make_plan
from provenzero.plan.model import Plan, Refusal, Verdict
from provenzero.proof.prove import prove
from provenzero.quantity import US
from provenzero.unit.load import load, load_data
from provenzero.unit.model import Unit

EXAMPLES = Path(__file__).parents[2] / "schemas" / "examples"
CONTEXT = PermitContext(
    number="N-1",
    issued="2026-01-01",
    company="",
    paper=Paper.A4,
    units=US,
    tool_version="0",
    fingerprint="00" * 32,
    site="default",
)


@cache
def jobs() -> tuple[Job, ...]:
    return catalogue().jobs


@cache
def wording() -> Wording:
    return load_wording()


@cache
def example(name: str) -> Unit:
    unit = load(EXAMPLES / f"{name}.yaml").unit
    assert unit is not None
    return unit


@cache
def network_of(name: str) -> Network:
    return compile_network(example(name))


def unit_from(data: Mapping[str, Any]) -> Unit:
    loaded = load_data(data)
    assert loaded.unit is not None, [str(f) for f in loaded.findings]
    return loaded.unit


def places(unit: Unit, *, every_bottle: bool = False) -> Iterator[tuple[Job, str]]:
    """Each job with each piece it applies to; of the bottles of a bank only the first, if not told otherwise."""
    for job in jobs():
        seen = set()
        for on in applies_to(job, unit):
            key = on if every_bottle else on.partition("/")[0]
            if key not in seen:
                seen.add(key)
                yield job, on


def plan_of(unit: Unit, job: str, on: str) -> Plan | Refusal:
    wanted = next(j for j in jobs() if j.id == job)
    return make_plan(unit, compile_network(unit), wanted, on)


def written(plan: Plan, proof: Mapping[str, Verdict] | None = None) -> dict[str, Any]:
    """The plan file as another program would read it."""
    text = plan_json(plan, proof or prove(plan), permit_figures(plan), CONTEXT, wording())
    data: dict[str, Any] = json.loads(text)
    return data

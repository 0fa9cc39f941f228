"""The plan file: valid, the same each time, and complete enough to repeat the proof."""

import json
from dataclasses import replace
from types import MappingProxyType

import pytest

from provenzero.document.brief import Brief
from provenzero.document.plan_json import plan_json
from provenzero.plan.model import Plan
from provenzero.resources import schemas

jsonschema = pytest.importorskip("jsonschema")
SCHEMA = json.loads(schemas().joinpath("plan.schema.json").read_text(encoding="utf-8"))


@pytest.fixture
def text(brief: Brief) -> str:
    return made(brief)


def made(brief: Brief) -> str:
    return plan_json(brief.plan, brief.proof, brief.figures, brief.context, brief.wording)


def test_the_schema_is_sound() -> None:
    jsonschema.Draft202012Validator.check_schema(SCHEMA)


def test_the_file_is_valid(text: str) -> None:
    assert not list(jsonschema.Draft202012Validator(SCHEMA).iter_errors(json.loads(text)))


@pytest.mark.parametrize("name", ["zone", "network", "proof", "locks", "open_to_vent", "inputs"])
def test_a_file_without_a_part_of_the_contract_is_not_valid(name: str, text: str) -> None:
    data = json.loads(text)
    del data[name]
    assert list(jsonschema.Draft202012Validator(SCHEMA).iter_errors(data))


def test_the_same_input_gives_the_same_bytes(text: str, brief: Brief) -> None:
    assert text == made(replace(brief, proof=dict(reversed(list(brief.proof.items())))))


def test_the_network_is_whole(text: str, plan: Plan) -> None:
    network = json.loads(text)["network"]
    assert [line["id"] for line in network["lines"]] == list(plan.network.lines)
    assert [line["id"] for line in network["lines"] if line["vent"]] == ["atmosphere", "reservoir"]
    assert [device["tag"] for device in network["devices"]] == list(plan.network.devices)
    assert [source["id"] for source in network["sources"]] == [s.id for s in plan.network.sources]


def test_a_passage_says_whether_it_is_certain_and_its_set_pressure(text: str) -> None:
    devices = {device["tag"]: device for device in json.loads(text)["network"]["devices"]}
    centre = devices["4W-1"]["positions"]["centre"]
    assert centre == [
        {"passage": "open", "from": "ram.open", "to": "reservoir", "certain": True},
        {"passage": "open", "from": "ram.close", "to": "reservoir", "certain": False},
    ]
    assert devices["CV-1"]["positions"]["fitted"][0]["set_pag"] == 2e7
    assert devices["CV-1"]["on_loss"] == {"line": "header", "position": "fitted"}
    assert devices["Q-1"]["on_loss"] is None


def test_the_start_is_the_state_before_the_first_step(text: str, plan: Plan) -> None:
    initial = json.loads(text)["network"]["initial"]
    assert initial["positions"]["Q-1"] == "on"
    assert initial["pressures_pag"]["header"] == list(plan.states[0].pressures[plan.zone[0]])


def test_a_step_that_moves_something_has_an_action_and_others_have_none(text: str, plan: Plan) -> None:
    steps = {step["id"]: step for step in json.loads(text)["steps"]}
    assert list(steps) == [step.id for step in plan.steps]
    assert steps["B1"]["action"] == {"device": "Q-1", "position": "off"}
    assert steps["B1"]["lock"] == 1
    assert steps["F5"]["unlock"] == 1
    assert steps["F4"]["moves_function"] == "ram"
    assert steps["F5"]["starts_pump"] == "P-1"
    assert steps["A1"]["action"] is None
    assert steps["C1"]["expect"] == [{"gauge": "PG-1", "line": "header", "low_pag": 0.0, "high_pag": 0.0}]


def test_the_text_of_a_step_stands_alone(text: str) -> None:
    steps = {step["id"]: step["text"] for step in json.loads(text)["steps"]}
    assert steps["B1"] == "Switch Q-1 OFF. (Q-1, isolator of pump P-1, place of Q-1) LOCK 1 ON."
    assert steps["F5"].startswith("LOCK 1 OFF (own lock, own hand). Switch Q-1 ON.")


def test_a_figure_that_is_not_known_is_null(text: str) -> None:
    figures = json.loads(text)["figures"]
    assert figures["banks"][0]["free_gas_m3"] is None
    assert figures["steps"]["C1"]["returned_m3"] == [0.010, 0.012]


def test_figures_may_come_in_any_kind_of_mapping(text: str, brief: Brief) -> None:
    frozen = replace(brief.figures, steps=MappingProxyType(dict(brief.figures.steps)))
    assert made(replace(brief, figures=frozen)) == text


def test_a_figure_that_is_not_finite_is_a_fault(brief: Brief) -> None:
    with pytest.raises(ValueError, match="JSON"):
        made(replace(brief, figures=replace(brief.figures, reservoir_room_m3=float("inf"))))

"""Why a lock and a step are there, in words that a person understands."""

import pytest
from tests.properties.planning import EXAMPLES

from provenzero import pipeline
from provenzero.cli.explain import explained
from provenzero.plan.model import Plan

CASES = [
    ("land-rig", "replace-hoses", "upper-pipe-rams"),
    ("land-rig", "replace-bottle-bladder", "BK-1/1"),
    ("jack-up", "work-on-preventer-end", "annular"),
    ("jack-up", "overhaul-air-pump", "P-3"),
    ("workover", "lock-out-for-transport", "unit"),
]


def explanation(name: str, job: str, on: str) -> tuple[Plan, list[str]]:
    request = pipeline.Request(unit_file=EXAMPLES / f"{name}.yaml", job=job, on=on, issued="now")
    asked = pipeline.ask(request)
    assert isinstance(asked, pipeline.Asked)
    plan = pipeline.plan(asked)
    assert isinstance(plan, Plan)
    return plan, list(explained(plan, pipeline.permit(asked, plan).document))


@pytest.mark.parametrize("case", CASES, ids=[f"{name} {job}" for name, job, _ in CASES])
def test_each_step_has_a_reason_in_words(case: tuple[str, str, str]) -> None:
    plan, lines = explanation(*case)
    reasons = [line.strip() for line in lines if line.startswith("    because: ")]
    assert len(reasons) == len(plan.steps)
    for reason in reasons:
        words = reason.removeprefix("because: ")
        assert " " in words, "a bare key instead of a sentence"
        assert "_" not in words.split()[0], "a bare key instead of a sentence"


@pytest.mark.parametrize("case", CASES, ids=[f"{name} {job}" for name, job, _ in CASES])
def test_each_lock_says_what_it_holds_back_or_keeps_open(case: tuple[str, str, str]) -> None:
    plan, lines = explanation(*case)
    heads = [i for i, line in enumerate(lines) if line.startswith("lock ")]
    assert len(heads) == len(plan.locks)
    for i in heads:
        assert lines[i + 1].startswith(("    holds back ", "    keeps open to a vent: ")), lines[i]


def test_a_lock_names_the_source_and_the_way_from_it() -> None:
    _, lines = explanation("land-rig", "replace-hoses", "upper-pipe-rams")
    at = next(i for i, line in enumerate(lines) if "Q-1 off" in line)
    assert lines[at + 1].startswith("    holds back pump P-1, by P-1.outlet > DV-1 > header > ")
    assert lines[at + 1].endswith(" > upper-pipe-rams.open")

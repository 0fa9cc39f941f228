"""From a request to a permit: what is refused, how documents are named, and what the fingerprint stands for."""

import json
from dataclasses import replace
from pathlib import Path
from typing import Any

import pytest
from tests.properties.planning import EXAMPLES

from provenzero import pipeline
from provenzero.plan.model import Plan, Refusal
from provenzero.unit.load import Loaded

LAND_RIG = EXAMPLES / "land-rig.yaml"
REQUEST = pipeline.Request(unit_file=LAND_RIG, job="replace-hoses", on="annular", issued="2026-03-01 08:00 UTC")
OWN = """\
format: 1
job: own-job
title: A job of the site
equipment: regulator
opens: [{opens}]
limits: [Open no other connection.]
hazards: [Fluid runs out.]
work: [Change it.]
restore: [Check the connections.]
tests: [leak]
"""


def asked(**changes: Any) -> pipeline.Asked:
    found = pipeline.ask(replace(REQUEST, **changes))
    assert isinstance(found, pipeline.Asked), found
    return found


def mistake(**changes: Any) -> pipeline.Mistake:
    found = pipeline.ask(replace(REQUEST, **changes))
    assert isinstance(found, pipeline.Mistake), found
    return found


def own_job(folder: Path, opens: str) -> pipeline.Asked:
    (folder / "own.yaml").write_text(OWN.format(opens=opens), encoding="utf-8")
    return asked(job="own-job", on="RG-1", own_jobs=folder)


def changed(folder: Path, old: str, new: str) -> Path:
    text = LAND_RIG.read_text(encoding="utf-8")
    assert old in text
    file = folder / "changed.yaml"
    file.write_text(text.replace(old, new, 1), encoding="utf-8")
    return file


def test_documents_are_named_for_unit_job_and_equipment() -> None:
    assert asked().stem() == "HCU-7_replace-hoses_annular"


def test_a_name_that_a_file_cannot_have_is_written_with_hyphens() -> None:
    assert asked(job="replace-bottle-bladder", on="BK-1/3").stem() == "HCU-7_replace-bottle-bladder_BK-1-3"


def test_the_document_number_comes_from_the_inputs_unless_one_is_given() -> None:
    made = asked()
    assert made.number() == f"HCU-7-{made.fingerprint[:8].upper()}"
    assert asked(number="PTW 17").number() == "PTW 17"


def test_neither_the_time_of_issue_nor_the_layout_of_the_file_changes_the_fingerprint(tmp_path: Path) -> None:
    file = tmp_path / "moved.yaml"
    text = LAND_RIG.read_text(encoding="utf-8")
    file.write_bytes(("# a remark\n" + text).replace("\n", "\r\n").encode())
    assert asked(unit_file=file, issued="another time").fingerprint == asked().fingerprint


def test_each_input_of_the_plan_changes_the_fingerprint(tmp_path: Path) -> None:
    (tmp_path / "jobs").mkdir()
    own = OWN.format(opens="open_line, close_line").replace("own-job", "replace-hoses")
    (tmp_path / "jobs" / "own.yaml").write_text(own.replace("regulator", "function"), encoding="utf-8")
    prints = [
        asked().fingerprint,
        asked(unit_file=changed(tmp_path, "set_pressure: 1500 psi", "set_pressure: 1400 psi")).fingerprint,
        asked(job="work-on-preventer-end").fingerprint,
        asked(on="upper-pipe-rams").fingerprint,
        asked(own_jobs=tmp_path / "jobs").fingerprint,
        asked(units="bar").fingerprint,
        asked(standing=("IV-1=closed",)).fingerprint,
    ]
    assert len(set(prints)) == len(prints)
    assert all(len(text) == 64 for text in prints)


def test_the_version_of_the_program_changes_the_fingerprint(monkeypatch: pytest.MonkeyPatch) -> None:
    before = asked().fingerprint
    monkeypatch.setattr(pipeline, "__version__", "0.0.0")
    assert asked().fingerprint != before


def test_a_bad_description_comes_back_with_its_findings(tmp_path: Path) -> None:
    found = pipeline.ask(replace(REQUEST, unit_file=changed(tmp_path, "drive: air", "drive: steam")))
    assert isinstance(found, Loaded)
    assert found.unit is None
    assert [f.place.path for f in found.findings] == ["pumps[1].drive"]


def test_a_bad_job_file_of_the_site_comes_back_with_its_findings(tmp_path: Path) -> None:
    (tmp_path / "own.yaml").write_text(OWN.format(opens="suction"), encoding="utf-8")
    found = pipeline.ask(replace(REQUEST, own_jobs=tmp_path))
    assert isinstance(found, Loaded)
    assert [f.place.path for f in found.findings] == ["opens[0]"]


def test_no_nearest_name_is_guessed_for_a_thing_that_is_there() -> None:
    found = mistake(job="overhaul-air-pump", on="P-1")
    assert found.words == "P-1 is a pump (drive: electric); overhaul-air-pump asks for drive: air"
    assert found.cure == "possible: P-2"


def test_a_job_that_applies_to_nothing_on_the_unit_says_so() -> None:
    found = mistake(unit_file=EXAMPLES / "workover.yaml", job="replace-bypass-valve", on="BP-1")
    assert "applies to nothing on this unit" in found.cure


def test_a_port_that_the_piece_lacks_is_a_mistake_in_the_job_file(tmp_path: Path) -> None:
    found = pipeline.plan(own_job(tmp_path, "inlet, outlet, pilot"))
    assert isinstance(found, pipeline.Mistake)
    assert found.words == "RG-1 has no port pilot, which own-job opens"


def test_a_port_that_is_opened_only_where_it_is_fitted_is_passed_over(tmp_path: Path) -> None:
    with_it, without = (own_job(tmp_path, opens) for opens in ("inlet, outlet, pilot?", "inlet, outlet"))
    plans = [pipeline.plan(each) for each in (with_it, without)]
    assert all(isinstance(plan, Plan) for plan in plans)
    zones = [plan.zone for plan in plans if isinstance(plan, Plan)]
    assert zones[0] == zones[1]


def test_a_job_that_would_open_nothing_gets_no_permit(tmp_path: Path) -> None:
    found = pipeline.plan(own_job(tmp_path, "pilot?"))
    assert isinstance(found, pipeline.Mistake)
    assert found.words == "RG-1 has none of the ports that own-job opens (pilot)"


def test_a_permit_carries_its_proof_and_the_fingerprint_of_its_inputs() -> None:
    request = asked()
    plan = pipeline.plan(request)
    assert isinstance(plan, Plan)
    made = pipeline.permit(request, plan)
    assert made.unproven() == []
    assert set(made.proof) >= {"dead", "locked", "least", "quiet", "reversible"}
    inputs = json.loads(made.plan_json)["inputs"]
    assert inputs["fingerprint"] == request.fingerprint
    assert made.document.issued == REQUEST.issued


def test_a_refused_plan_gives_a_sentence_for_each_obstacle(tmp_path: Path) -> None:
    lines = LAND_RIG.read_text(encoding="utf-8").splitlines()
    kept = ["    bleed: none" if line.startswith("    bleed:") else line for line in lines if "kind: bleed" not in line]
    file = tmp_path / "no-bleeds.yaml"
    file.write_text("\n".join(kept).replace("relieving: yes", "relieving: no"), encoding="utf-8")
    request = asked(unit_file=file, on="upper-pipe-rams")
    plan = pipeline.plan(request)
    assert isinstance(plan, Refusal)
    reasons = pipeline.refusal(request, plan)
    assert len(reasons) == len(plan.obstacles)
    assert all(reason.endswith(".") for reason in reasons)

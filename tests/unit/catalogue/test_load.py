"""The shipped jobs fit their schema; a site's own jobs stand beside them or replace them, with all faults told."""

from dataclasses import replace
from pathlib import Path
from typing import Any

import pytest
from tests.properties.planning import EXAMPLES

from provenzero.catalogue.applies import applies_to
from provenzero.catalogue.job import ATTRIBUTES, PORTS, Condition, Equipment, Job, Leave, TestKind
from provenzero.catalogue.load import catalogue, job_of, read_job
from provenzero.network.compile import compile_network
from provenzero.reading.lines import Document, load_text
from provenzero.reading.schema import check
from provenzero.resources import checklists
from provenzero.unit.load import load

SHIPPED = {
    file.name: file.read_text(encoding="utf-8")
    for file in checklists().joinpath("jobs").iterdir()
    if file.name.endswith(".yaml")
}
OWN = """\
format: 1
job: replace-hoses
title: Replace the hoses the way of this site
equipment: function
only: {kind: [annular]}
opens: [open_line, close_line?]
leave: open
limits: [Open no other connection.]
hazards: [Fluid runs out.]
work: [Change the hoses.]
restore: [Check the connections.]
tests: [leak]
"""


def data(text: str) -> Any:
    document = load_text(text, "job.yaml")
    assert isinstance(document, Document)
    return document.data


def shipped(name: str) -> Job:
    job = catalogue().job(name)
    assert job is not None
    return job


@pytest.fixture
def own(tmp_path: Path) -> Path:
    folder = tmp_path / "jobs"
    folder.mkdir()
    (folder / "hoses.yaml").write_text(OWN, encoding="utf-8")
    return folder


def test_ten_jobs_are_shipped() -> None:
    assert len(SHIPPED) == 10


@pytest.mark.parametrize("name", sorted(SHIPPED))
def test_a_shipped_job_fits_the_schema(name: str) -> None:
    document = load_text(SHIPPED[name], name)
    assert isinstance(document, Document), document
    assert [str(f) for f in check(document, "job")] == []


@pytest.mark.parametrize("name", sorted(SHIPPED))
def test_a_shipped_file_is_named_for_its_job(name: str) -> None:
    assert data(SHIPPED[name])["job"] == name.removesuffix(".yaml")


def test_the_catalogue_has_every_shipped_job_in_the_order_of_names() -> None:
    jobs = catalogue()
    assert [f"{job.id}.yaml" for job in jobs.jobs] == sorted(SHIPPED)
    assert jobs.findings == ()


def test_a_job_that_is_not_there_is_none() -> None:
    assert catalogue().job("paint-the-skid") is None


def test_a_job_keeps_what_its_file_says() -> None:
    job = job_of(data(OWN))
    assert job.equipment is Equipment.FUNCTION
    assert job.conditions == (Condition(attribute="kind", allowed=("annular",)),)
    assert job.opens == ("open_line", "close_line")
    assert job.optional == ("close_line",)
    assert job.leave is Leave.OPEN
    assert job.tests == (TestKind.LEAK,)
    assert job.work == ("Change the hoses.",)


def test_what_a_job_leaves_out_is_empty_and_the_piston_stays_as_it_is_found() -> None:
    job = job_of(data(OWN.replace("leave: open\n", "")))
    assert job.leave is Leave.AS_FOUND
    assert (job.tools, job.prepare) == ((), ())


def test_a_job_of_the_site_replaces_the_shipped_one_of_its_name(own: Path) -> None:
    jobs = catalogue(own)
    job = jobs.job("replace-hoses")
    assert job is not None
    assert job.title == "Replace the hoses the way of this site"
    assert len(jobs.jobs) == len(SHIPPED)
    assert shipped("replace-hoses").title != job.title


def test_a_job_of_another_name_stands_beside_the_shipped_ones_with_either_ending(own: Path) -> None:
    (own / "gauge.yml").write_text(OWN.replace("job: replace-hoses", "job: replace-a-gauge"), encoding="utf-8")
    jobs = catalogue(own)
    assert jobs.job("replace-a-gauge") is not None
    assert len(jobs.jobs) == len(SHIPPED) + 1
    assert [job.id for job in jobs.jobs] == sorted(job.id for job in jobs.jobs)


def test_files_that_are_no_jobs_by_their_ending_are_left_alone(own: Path) -> None:
    (own / "notes.txt").write_text("not a job", encoding="utf-8")
    assert catalogue(own).findings == ()


def test_all_faults_of_a_job_file_are_told_with_file_line_and_cure(own: Path) -> None:
    text = OWN.replace("equipment: function", "equipment: funktion").replace("tests: [leak]", "tests: [leek]")
    (own / "hoses.yaml").write_text(text.replace("hazards:", "hasards:"), encoding="utf-8")
    jobs = catalogue(own)
    assert [(f.place.line, f.place.path) for f in jobs.findings] == [
        (4, "equipment"),
        (9, "hasards"),
        (12, "tests[0]"),
    ]
    assert {f.place.file for f in jobs.findings} == {str(own / "hoses.yaml")}
    assert "function" in jobs.findings[0].expected
    assert "hazards" in jobs.findings[1].expected
    assert "leak" in jobs.findings[2].expected


def test_a_file_that_is_no_yaml_is_told(tmp_path: Path) -> None:
    file = tmp_path / "torn.yaml"
    file.write_text("job: [", encoding="utf-8")
    read = read_job(file)
    assert read.jobs == ()
    assert read.findings
    assert read.findings[0].place.file == str(file)


def test_one_job_in_two_files_of_the_site_is_told(own: Path) -> None:
    (own / "more-hoses.yaml").write_text(OWN, encoding="utf-8")
    [finding] = catalogue(own).findings
    assert finding.place.file == str(own / "more-hoses.yaml")
    assert "first in hoses.yaml" in finding.found


def test_a_folder_that_is_not_there_is_told(tmp_path: Path) -> None:
    [finding] = catalogue(tmp_path / "none").findings
    assert finding.found == "no such folder"


def test_a_folder_whose_name_no_folder_can_have_is_told(tmp_path: Path) -> None:
    [finding] = catalogue(tmp_path / ("x" * 300)).findings
    assert finding.found == "no such folder"


MISMATCHES = [
    ("opens: [open_line, close_line?]", "opens: [open_line, suction]", "opens[1]", "suction, which no function has"),
    ("opens: [open_line, close_line?]", "opens: [open_line, open_line?]", "opens[1]", "the port open_line a second"),
    ("only: {kind: [annular]}", "only: {drive: [air]}", "only.drive", "drive, which no function has"),
]


@pytest.mark.parametrize(("right", "wrong", "path", "found"), MISMATCHES, ids=[path for _, _, path, _ in MISMATCHES])
def test_what_no_piece_of_the_kind_has_is_told_with_its_line(
    right: str, wrong: str, path: str, found: str, own: Path
) -> None:
    (own / "hoses.yaml").write_text(OWN.replace(right, wrong), encoding="utf-8")
    jobs = catalogue(own)
    [finding] = jobs.findings
    line = OWN.splitlines().index(right) + 1
    assert (finding.place.line, finding.place.path) == (line, path)
    assert finding.found.startswith(found)
    assert jobs.job("replace-hoses") == shipped("replace-hoses")


def test_a_piston_can_be_left_only_where_there_is_one(own: Path) -> None:
    text = OWN.replace("equipment: function", "equipment: pump").replace("only: {kind: [annular]}\n", "")
    text = text.replace("opens: [open_line, close_line?]", "opens: [suction]")
    (own / "hoses.yaml").write_text(text, encoding="utf-8")
    [finding] = catalogue(own).findings
    assert finding.place.path == "leave"
    (own / "hoses.yaml").write_text(text.replace("leave: open", "leave: as_found"), encoding="utf-8")
    assert catalogue(own).findings == ()


@pytest.mark.parametrize("equipment", list(Equipment))
def test_the_ports_of_a_kind_are_those_that_the_circuits_of_the_examples_have(equipment: Equipment) -> None:
    any_of_kind = replace(shipped("replace-hoses"), equipment=equipment, conditions=())
    found = set()
    for file in EXAMPLES.glob("*.yaml"):
        unit = load(file).unit
        assert unit is not None
        on = applies_to(any_of_kind, unit)
        found |= {port.name for port in compile_network(unit).ports if port.equipment in on}
    assert found == set(PORTS[equipment])


def test_each_kind_of_equipment_has_ports_and_says_what_can_be_asked_of_it() -> None:
    assert set(PORTS) == set(ATTRIBUTES) == set(Equipment)

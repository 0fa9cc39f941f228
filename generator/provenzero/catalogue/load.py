"""Job files to jobs: the shipped catalogue, and a folder of the site's own beside it."""

import os.path
from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from provenzero.catalogue.job import (
    ATTRIBUTES,
    CALLED,
    PORTS,
    WITH_PISTON,
    Condition,
    Equipment,
    Job,
    Leave,
    TestKind,
)
from provenzero.finding import Finding, Place, has_errors, in_order
from provenzero.reading.lines import Document, load, load_text
from provenzero.reading.schema import check
from provenzero.resources import checklists

_ENDINGS = frozenset({".yaml", ".yml"})
_FOLDER = "a folder with the job files of the site"


@dataclass(frozen=True, slots=True, kw_only=True)
class Catalogue:
    """The jobs there are, in the order of their names, and what is wrong with files that were left out."""

    jobs: tuple[Job, ...]
    findings: tuple[Finding, ...]

    def job(self, name: str) -> Job | None:
        """The job of a name, or None."""
        return next((j for j in self.jobs if j.id == name), None)


def catalogue(own: Path | None = None) -> Catalogue:
    """Read the shipped jobs, and those of a folder of the site, which replace shipped ones of the same name."""
    found: dict[str, Job] = {}
    findings: list[Finding] = []
    for file in sorted(checklists().joinpath("jobs").iterdir(), key=lambda f: f.name):
        if file.name.endswith(".yaml"):
            document = load_text(file.read_text(encoding="utf-8"), file.name)
            if isinstance(document, Document):  # the tests hold every shipped file against its schema
                job = job_of(document.data)
                found[job.id] = job
    if own is not None:
        of_site = read_folder(own)
        findings += of_site.findings
        found.update({j.id: j for j in of_site.jobs})
    return Catalogue(jobs=tuple(found[k] for k in sorted(found)), findings=tuple(findings))


def read_folder(folder: Path) -> Catalogue:
    """Read the job files of a folder of the site, each job once."""
    place = Place(file=str(folder))
    if not os.path.isdir(folder):  # Path.is_dir raises where a name is too long
        return Catalogue(jobs=(), findings=(Finding(place=place, found="no such folder", expected=_FOLDER),))
    try:
        paths = sorted(p for p in folder.iterdir() if p.suffix in _ENDINGS)
    except OSError as error:
        found = f"a folder that cannot be read ({error.strerror})"
        return Catalogue(jobs=(), findings=(Finding(place=place, found=found, expected=_FOLDER),))
    files: dict[str, Path] = {}
    jobs: list[Job] = []
    findings: list[Finding] = []
    for path in paths:
        read = read_job(path)
        findings += read.findings
        for job in read.jobs:
            if job.id in files:
                found = f"the job {job.id} a second time (first in {files[job.id].name})"
                findings.append(Finding(place=Place(file=str(path), path="job"), found=found, expected="each job once"))
            files.setdefault(job.id, path)
            jobs.append(job)
    return Catalogue(jobs=tuple(jobs), findings=tuple(findings))


def read_job(path: Path) -> Catalogue:
    """Read one job file with all its faults."""
    document = load(path)
    if not isinstance(document, Document):
        return Catalogue(jobs=(), findings=tuple(document))
    findings = check(document, "job")
    if not has_errors(findings):  # what goes with which equipment can be told once each word is one of ours
        findings += in_order(_mismatches(document))
    jobs = () if has_errors(findings) else (job_of(document.data),)
    return Catalogue(jobs=jobs, findings=tuple(findings))


def _mismatches(document: Document) -> Iterator[Finding]:
    """What a job asks of its kind of equipment and no piece of that kind has."""
    data: Any = document.data
    kind = Equipment(data["equipment"])
    seen: set[str] = set()
    for i, name in enumerate(data["opens"]):
        port, place = name.removesuffix("?"), document.place(("opens", i))
        if port not in PORTS[kind]:
            expected = f"a port of a {CALLED[kind]}: {', '.join(PORTS[kind])}"
            yield Finding(place=place, found=f"{port}, which no {CALLED[kind]} has", expected=expected)
        elif port in seen:
            yield Finding(place=place, found=f"the port {port} a second time", expected="each port once")
        seen.add(port)
    for key in data.get("only", {}):
        if key not in ATTRIBUTES[kind]:
            place = document.key_place(("only", key))
            expected = ", ".join(ATTRIBUTES[kind]) or f"no condition on a {CALLED[kind]}"
            yield Finding(place=place, found=f"{key}, which no {CALLED[kind]} has", expected=expected)
    if data.get("leave", Leave.AS_FOUND) != Leave.AS_FOUND and kind not in WITH_PISTON:
        expected = "leave only where there is a piston: on a function or a four-way valve"
        yield Finding(place=document.key_place(("leave",)), found=f"leave on a {CALLED[kind]}", expected=expected)


def job_of(data: Any) -> Job:
    """The job of data that fits the schema."""
    only: Mapping[str, list[str]] = data.get("only", {})
    return Job(
        id=data["job"],
        title=data["title"],
        equipment=Equipment(data["equipment"]),
        conditions=tuple(Condition(attribute=k, allowed=tuple(v)) for k, v in only.items()),
        opens=tuple(name.removesuffix("?") for name in data["opens"]),
        optional=tuple(name.removesuffix("?") for name in data["opens"] if name.endswith("?")),
        leave=Leave(data.get("leave", "as_found")),
        limits=tuple(data["limits"]),
        hazards=tuple(data["hazards"]),
        tools=tuple(data.get("tools", ())),
        prepare=tuple(data.get("prepare", ())),
        work=tuple(data["work"]),
        restore=tuple(data["restore"]),
        tests=tuple(TestKind(name) for name in data["tests"]),
    )

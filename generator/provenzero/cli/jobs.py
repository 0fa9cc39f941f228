"""`provenzero jobs`: what can be done on a unit, and on which pieces of it."""

from pathlib import Path
from typing import Annotated

import typer

from provenzero.cli.report import Form, as_json, bad_input, table


def jobs(
    unit: Annotated[Path, typer.Argument(help="Description of the unit (YAML).")],
    form: Annotated[Form, typer.Option("--format", help="text for people, json for machines.")] = Form.TEXT,
    own_jobs: Annotated[Path | None, typer.Option(help="Folder with job files of the site's own.")] = None,
) -> None:
    """List the jobs that apply to a unit, each with the names and tags it can be done on.

    Example: provenzero jobs rig-7.yaml
    """
    from provenzero.pipeline import jobs_of  # noqa: PLC0415 - only what this command needs
    from provenzero.unit.load import load  # noqa: PLC0415

    loaded = load(unit)
    if loaded.unit is None:
        bad_input(loaded.findings, form)
    catalogue, pairs = jobs_of(loaded.unit, own_jobs)
    if catalogue.findings:
        bad_input(catalogue.findings, form)
    if form is Form.JSON:
        as_json({"jobs": [{"job": job.id, "title": job.title, "on": list(on)} for job, on in pairs]})
        return
    table(("Job", "What", "On"), [(job.id, job.title, ", ".join(_short(on))) for job, on in pairs])


def _short(on: tuple[str, ...]) -> list[str]:
    """Bottles by bank: `BK-1/1 to BK-1/8` instead of eight tags."""
    groups: dict[str, list[str]] = {}
    for name in on:
        groups.setdefault(name.partition("/")[0], []).append(name)
    return [names[0] if len(names) == 1 else f"{names[0]} to {names[-1]}" for names in groups.values()]

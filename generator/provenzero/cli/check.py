"""`provenzero check`: whether a description can be used, and what in it is not known."""

from pathlib import Path
from typing import Annotated

import typer

from provenzero.cli.report import DONE, FOUND, Form, as_json, bad_input, data_of, say, table, tell
from provenzero.unit.model import Unit


def check(
    unit: Annotated[Path, typer.Argument(help="Description of the unit (YAML).")],
    form: Annotated[Form, typer.Option("--format", help="text for people, json for machines.")] = Form.TEXT,
) -> None:
    """Check a description: every fault with file, line and what would be right; everything that is not known.

    Exit code 0: can be used. 1: can be used, with warnings. 2: cannot be used.

    Example: provenzero check rig-7.yaml
    """
    from provenzero.unit.load import load  # noqa: PLC0415 - only what this command needs

    loaded = load(unit)
    if loaded.unit is None:
        bad_input(loaded.findings, form)
    code = FOUND if loaded.findings else DONE
    if form is Form.JSON:
        notes = [{"path": a.path, "line": a.line, "taken": a.taken} for a in loaded.unit.assumptions]
        as_json({"findings": [data_of(f) for f in loaded.findings], "assumptions": notes, "unit": _facts(loaded.unit)})
        raise typer.Exit(code)
    for finding in loaded.findings:
        tell(str(finding))
    table(("Unit", ""), list(_facts(loaded.unit).items()))
    if loaded.unit.assumptions:
        say("")
        rows = [(f"line {note.line}", note.path, note.taken) for note in loaded.unit.assumptions]
        table(("Where", "Not known", "What is taken"), rows)
    raise typer.Exit(code)


def _facts(unit: Unit) -> dict[str, str]:
    seen = unit.description.verification
    return {
        "unit": f"{unit.identity.tag}, {unit.identity.name}",
        "revision": f"{unit.description.revision} of {unit.description.date}",
        "verified": f"by {seen.by} on {seen.on}" if seen else "NOT VERIFIED against the steel",
        "banks": str(len(unit.banks)),
        "pumps": str(len(unit.pumps)),
        "functions": str(len(unit.functions)),
        "not known": str(len(unit.assumptions)),
    }

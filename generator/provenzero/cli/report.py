"""Findings and results to a person or to a machine; exit codes."""

import json
from collections.abc import Iterable, Mapping
from enum import StrEnum
from typing import Any, NoReturn

import typer

from provenzero.finding import Finding

DONE = 0
FOUND = 1
BAD_INPUT = 2


class Form(StrEnum):
    """How a result is written."""

    TEXT = "text"
    JSON = "json"


def say(words: str) -> None:
    """A line of the result."""
    typer.echo(words)


def tell(words: str) -> None:
    """A message beside the result."""
    typer.echo(words, err=True)


def as_json(data: Mapping[str, Any]) -> None:
    """A result for a machine."""
    typer.echo(json.dumps(data, indent=1, ensure_ascii=False))


def data_of(finding: Finding) -> dict[str, Any]:
    """A finding as plain data."""
    place = finding.place
    return {
        "severity": finding.severity.value,
        "file": place.file,
        "line": place.line,
        "column": place.column,
        "path": place.path,
        "found": finding.found,
        "expected": finding.expected,
    }


def bad_input(findings: Iterable[Finding], form: Form = Form.TEXT) -> NoReturn:
    """Report findings that stop the work and leave."""
    listed = list(findings)
    if form is Form.JSON:
        as_json({"findings": [data_of(f) for f in listed]})
    else:
        for finding in listed:
            tell(str(finding))
    raise typer.Exit(BAD_INPUT)


def mistake(words: str, cure: str) -> NoReturn:
    """Report a mistake on the command line and leave."""
    tell(f"{words}; {cure}")
    raise typer.Exit(BAD_INPUT)

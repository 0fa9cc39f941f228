"""Findings and results to a person or to a machine; exit codes."""

import json
import sys
from collections.abc import Iterable, Iterator, Mapping, Sequence
from contextlib import contextmanager
from enum import StrEnum
from typing import Any, NoReturn, TextIO

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
    """A line of the result. A reader that has gone ends the program quietly; a full disk is told."""
    try:
        typer.echo(words)
    except BrokenPipeError:
        raise
    except OSError as error:
        tell(f"found an output that takes no more ({error.strerror}); expected room for the result")
        raise typer.Exit(BAD_INPUT) from error


def tell(words: str) -> None:
    """A message beside the result."""
    typer.echo(words, err=True)


def table(heads: Sequence[str], rows: Iterable[Sequence[str]]) -> None:
    """A table: drawn on a terminal, columns of plain text in a pipe or a file."""
    listed = [[_plain(cell) for cell in row] for row in rows]
    if _is_terminal(sys.stdout):
        from rich.console import Console  # noqa: PLC0415 - only for eyes
        from rich.table import Table  # noqa: PLC0415
        from rich.text import Text  # noqa: PLC0415

        drawn = Table(show_lines=True)
        for i, head in enumerate(heads):
            drawn.add_column(head, no_wrap=i == 0, overflow="fold")
        for row in listed:
            drawn.add_row(*(Text(cell) for cell in row))
        Console().print(drawn)
        return
    widths = [max((len(row[i]) for row in listed), default=0) for i in range(len(heads))]
    for row in listed:
        say("  ".join(f"{cell:<{width}}" for cell, width in zip(row, widths, strict=True)).rstrip())


@contextmanager
def progress(words: str) -> Iterator[None]:
    """Say that something takes a moment: a moving line on a terminal, one plain line elsewhere."""
    if not _is_terminal(sys.stderr):
        tell(f"{words} ...")
        yield
        return
    from rich.console import Console  # noqa: PLC0415 - only for eyes

    with Console(stderr=True).status(words):
        yield


def _is_terminal(stream: TextIO | None) -> bool:
    """Whether a person looks on; a stream that was closed before the start is None."""
    return stream is not None and stream.isatty()


def _plain(cell: str) -> str:
    return "".join(c if c.isprintable() else " " for c in cell)


def as_json(data: Mapping[str, Any]) -> None:
    """A result for a machine."""
    say(json.dumps(data, indent=1, ensure_ascii=False))


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
    tell(_plain(f"{words}; {cure}"))
    raise typer.Exit(BAD_INPUT)

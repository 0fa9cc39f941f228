"""`provenzero schema`: the schemas of the files that people write, and of the plan."""

from enum import StrEnum
from typing import Annotated

import typer

from provenzero.cli.report import say


class Kind(StrEnum):
    """Kinds of file that have a schema."""

    UNIT = "unit"
    JOB = "job"
    PLAN = "plan"


def schema(
    kind: Annotated[Kind, typer.Argument(help="unit, job or plan.")] = Kind.UNIT,
) -> None:
    """Print the JSON Schema (2020-12) of a kind of file.

    Example: provenzero schema unit > unit.schema.json
    """
    from provenzero.resources import schemas  # noqa: PLC0415 - only what this command needs

    say(schemas().joinpath(f"{kind.value}.schema.json").read_text(encoding="utf-8").rstrip())

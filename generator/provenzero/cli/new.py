"""`provenzero new`: a starter description to fill in."""

import os.path
from pathlib import Path
from typing import Annotated

import typer

from provenzero.cli.report import BAD_INPUT, mistake, say, tell


def new(
    file: Annotated[Path, typer.Argument(help="Where to write it; never over a file that is there.")] = Path(
        "unit.yaml"
    ),
) -> None:
    """Write a commented description of a unit to start from.

    Example: provenzero new rig-7.yaml
    """
    from provenzero.reading.write import write_atomically  # noqa: PLC0415 - only what this command needs
    from provenzero.resources import schemas  # noqa: PLC0415

    if os.path.lexists(file):  # Path.exists raises where a name is too long
        mistake(f"{file} is already there", "give another name, or move it away first")
    fault = write_atomically(file, schemas().joinpath("starter", "unit.yaml").read_bytes())
    if fault is not None:
        tell(str(fault))
        raise typer.Exit(BAD_INPUT)
    say(f"{file} written. Fill it in beside the unit, then: provenzero check {file}")

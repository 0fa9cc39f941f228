"""`provenzero permit`: the lock-out permit of one job on one unit."""

import gc
from collections.abc import Callable
from datetime import UTC, datetime
from enum import StrEnum
from pathlib import Path
from typing import TYPE_CHECKING, Annotated

import typer

from provenzero.cli.report import BAD_INPUT, FOUND, bad_input, mistake, progress, say, tell

if TYPE_CHECKING:
    from provenzero.pipeline import Permit


class Paper(StrEnum):
    """Sheets to print on."""

    A4 = "a4"
    LETTER = "letter"


class Pressure(StrEnum):
    """Which units come first on the page."""

    PSI = "psi"
    BAR = "bar"


FORMATS = ("pdf", "html", "json")


def permit(  # noqa: PLR0913, PLR0917 - each is an option of the command line, given there by its name
    unit: Annotated[Path, typer.Argument(help="Description of the unit (YAML).")],
    job: Annotated[str, typer.Option(help="What is done; `provenzero jobs UNIT` lists it.")],
    on: Annotated[str, typer.Option(help="Name or tag of the piece of equipment.")],
    out: Annotated[Path, typer.Option(help="Folder for the documents.")] = Path("out"),
    formats: Annotated[str, typer.Option("--format", help="pdf, html, json; several with commas.")] = "pdf,html",
    number: Annotated[str, typer.Option(help="Document number; made from unit and fingerprint if left out.")] = "",
    company: Annotated[str, typer.Option(help="Company name at the head of the permit.")] = "",
    paper: Annotated[Paper, typer.Option(help="Sheet.")] = Paper.A4,
    units: Annotated[Pressure, typer.Option(help="Units that come first.")] = Pressure.PSI,
    own_jobs: Annotated[Path | None, typer.Option(help="Folder with job files of the site's own.")] = None,
    standing: Annotated[
        list[str] | None,
        typer.Option(
            help="A device that is not in its normal position now, as TAG=position; several times if need be."
        ),
    ] = None,
    issued: Annotated[str, typer.Option(help="Time of issue, as it is printed; now if left out.")] = "",
    explain: Annotated[bool, typer.Option("--explain", help="Print why each lock and each step is there.")] = False,
) -> None:
    """Plan a job on a unit, prove the plan, and write the permit.

    Exit code 0: written. 1: refused, no safe plan was found or proven. 2: bad input.

    For example:

    provenzero permit rig-7.yaml --job replace-hoses --on upper-pipe-rams

    provenzero permit rig-7.yaml --job overhaul-air-pump --on P-2 --format json
    """
    from provenzero import pipeline  # noqa: PLC0415 - `--help` answers without it
    from provenzero.plan.model import Refusal  # noqa: PLC0415

    # One document and the process ends: looking often for circular garbage costs a tenth of the time and finds nothing.
    gc.set_threshold(100_000, 50, 50)
    wanted = _formats(formats)
    now = datetime.now(UTC).astimezone().strftime("%Y-%m-%d %H:%M %Z")
    request = pipeline.Request(
        unit_file=unit,
        job=job,
        on=on,
        issued=issued or now,
        number=number,
        company=company,
        paper=paper.value,
        units=units.value,
        own_jobs=own_jobs,
        standing=tuple(standing or ()),
    )
    asked = pipeline.ask(request)
    if isinstance(asked, pipeline.Mistake):
        mistake(asked.words, asked.cure)
    if not isinstance(asked, pipeline.Asked):
        bad_input(asked.findings)
    for finding in asked.loaded.findings:
        tell(str(finding))
    plan = pipeline.plan(asked)
    if isinstance(plan, pipeline.Mistake):
        mistake(plan.words, plan.cure)
    if isinstance(plan, Refusal):
        tell(f"refused: no safe plan for {job} on {on} of {asked.unit.identity.tag}")
        for reason in pipeline.refusal(asked, plan):
            tell(f"  {reason}")
        tell("  The maker's procedure is needed, or a description that says more. Open nothing on this unit.")
        raise typer.Exit(FOUND)
    made = pipeline.permit(asked, plan)
    if made.unproven():
        tell("refused: the plan could not be proven")
        for words in made.unproven():
            tell(f"  {words}")
        raise typer.Exit(FOUND)
    if explain:
        from provenzero.cli.explain import explained  # noqa: PLC0415 - as above

        for line in explained(plan, made.document):
            say(line)
    _write(made, out, asked.stem(), wanted)


def _formats(text: str) -> list[str]:
    wanted = [word.strip().lower() for word in text.split(",") if word.strip()]
    wrong = [word for word in wanted if word not in FORMATS]
    if wrong or not wanted:
        mistake(f"there is no format {', '.join(wrong) or text!r}", f"possible: {', '.join(FORMATS)}")
    return list(dict.fromkeys(wanted))


def _write(made: "Permit", out: Path, stem: str, wanted: list[str]) -> None:
    """Write all formats; the PDF last, for it is the one that may lack its library."""
    from provenzero.reading.write import write_atomically  # noqa: PLC0415 - as above

    try:
        out.mkdir(parents=True, exist_ok=True)
    except FileExistsError:
        mistake(f"{out}: found a file of that name", "expected --out with a folder to write in")
    except (OSError, ValueError) as error:
        reason = error.strerror if isinstance(error, OSError) else "no folder can have that name"
        mistake(f"{out}: found a folder that cannot be made ({reason})", "expected --out with a folder to write in")
    pages = _once(made)
    for form in sorted(wanted, key=lambda f: f == "pdf"):
        target = out / f"{stem}.{form}"
        fault = write_atomically(target, _content(made, form, pages))
        if fault is not None:
            tell(str(fault))
            raise typer.Exit(BAD_INPUT)
        say(str(target))


def _once(made: "Permit") -> Callable[[], str]:
    """The HTML, made when first asked for and then kept."""
    kept: list[str] = []

    def pages() -> str:
        if not kept:
            from provenzero.render.html import html  # noqa: PLC0415 - not needed for JSON alone
            from provenzero.render.svg import svg  # noqa: PLC0415

            kept.append(html(made.document, *(svg(sheet) for sheet in made.drawings)))
        return kept[0]

    return pages


def _content(made: "Permit", form: str, pages: Callable[[], str]) -> bytes:
    if form == "json":
        return made.plan_json.encode("utf-8")
    if form == "html":
        return pages().encode("utf-8")
    from provenzero.render.pdf import PdfUnavailableError, pdf  # noqa: PLC0415 - a second to load

    try:
        with progress("building the PDF"):
            return pdf(pages())
    except PdfUnavailableError as error:
        tell(str(error))
        raise typer.Exit(BAD_INPUT) from error

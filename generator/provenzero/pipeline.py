"""The ways through the house: from files to a plan, and from a plan to the bytes of each document."""

import hashlib
import json
from collections.abc import Sequence
from dataclasses import dataclass
from pathlib import Path
from typing import TYPE_CHECKING

from provenzero import __version__
from provenzero.catalogue.applies import applies_to, misfit
from provenzero.catalogue.job import Equipment, Job
from provenzero.catalogue.load import Catalogue, catalogue
from provenzero.quantity import METRIC, US, Units
from provenzero.reading.nearest import nearest
from provenzero.unit.load import Loaded, load
from provenzero.unit.model import Unit

if TYPE_CHECKING:
    from provenzero.document.context import PermitContext
    from provenzero.document.model import Document
    from provenzero.drawing.model import Drawing
    from provenzero.network.model import DeviceTag, Network
    from provenzero.plan.model import Plan, Refusal, Verdict

_GROUP = 8
_HOLD_S = 600.0
_RECHECK_S = 7200.0
UNITS = {"psi": US, "bar": METRIC}


@dataclass(frozen=True, slots=True, kw_only=True)
class Request:
    """What somebody asks for. `issued` is the time printed as the time of issue; nothing here reads a clock.

    `standing`: devices that do not stand in their normal position now, each as `TAG=position`.
    """

    unit_file: Path
    job: str
    on: str
    issued: str
    number: str = ""
    company: str = ""
    paper: str = "a4"
    units: str = "psi"
    own_jobs: Path | None = None
    standing: tuple[str, ...] = ()


@dataclass(frozen=True, slots=True, kw_only=True)
class Asked:
    """A request that can be planned: the unit, the job and the piece of equipment are there."""

    request: Request
    loaded: Loaded
    unit: Unit
    job: Job
    fingerprint: str

    def number(self) -> str:
        """The document number: as asked for, or the unit's tag with the head of the fingerprint."""
        return self.request.number or f"{self.unit.identity.tag}-{self.fingerprint[:_GROUP].upper()}"

    def stem(self) -> str:
        """The file name of the documents without its ending."""
        words = (self.unit.identity.tag, self.job.id, self.request.on)
        return "_".join("".join(c if c.isalnum() or c in "-." else "-" for c in word) for word in words)


@dataclass(frozen=True, slots=True, kw_only=True)
class Mistake:
    """A request that names what is not there."""

    words: str
    cure: str


def jobs_of(unit: Unit, own: Path | None = None) -> tuple[Catalogue, list[tuple[Job, tuple[str, ...]]]]:
    """The catalogue, and its jobs that apply to a unit with the equipment each can be done on."""
    jobs = catalogue(own)
    pairs = [(job, applies_to(job, unit)) for job in jobs.jobs]
    return jobs, [(job, on) for job, on in pairs if on]


def ask(request: Request) -> Asked | Mistake | Loaded:
    """Check a request. A description that cannot be used comes back as it was loaded, with its findings."""
    loaded = load(request.unit_file)
    if loaded.unit is None:
        return loaded
    jobs, pairs = jobs_of(loaded.unit, request.own_jobs)
    if jobs.findings:
        return Loaded(unit=None, findings=jobs.findings)
    job = jobs.job(request.job)
    if job is None:
        known = [j.id for j in jobs.jobs]
        return Mistake(words=f"there is no job {request.job}", cure=_near(request.job, known))
    places = next((on for each, on in pairs if each.id == job.id), ())
    if request.on not in places:
        why = misfit(job, loaded.unit, request.on)
        meant = why.meant if why.known else nearest(request.on, places)
        return Mistake(words=why.words, cure=_possible(places, meant))
    return Asked(
        request=request, loaded=loaded, unit=loaded.unit, job=job, fingerprint=_fingerprint(request, loaded, job)
    )


def _near(word: str, known: Sequence[str]) -> str:
    return _possible(known, nearest(word, known))


def _possible(known: Sequence[str], meant: str | None) -> str:
    if not known:
        return "this job applies to nothing on this unit; `provenzero jobs` lists what does"
    shown = ", ".join(known if len(known) <= _GROUP else [*known[:_GROUP], "..."])
    return (f"did you mean {meant}? " if meant else "") + f"possible: {shown}"


def _fingerprint(request: Request, loaded: Loaded, job: Job) -> str:
    """SHA-256 over the description as data, the job, the equipment, the printed units and the tool's version."""
    document = loaded.document
    inputs = {
        "unit": document.data if document is not None else None,
        "job": repr(job),
        "on": request.on,
        "units": request.units,
        "standing": sorted(request.standing),
        "tool": __version__,
    }
    text = json.dumps(inputs, sort_keys=True, ensure_ascii=False, separators=(",", ":"))
    return hashlib.sha256(text.encode("utf-8")).hexdigest()


def plan(asked: Asked) -> "Plan | Refusal | Mistake":
    """Plan what was asked, from where the devices stand."""
    from provenzero.network.compile import compile_network  # noqa: PLC0415 - help and check do without
    from provenzero.plan.make import make_plan  # noqa: PLC0415

    network = compile_network(asked.unit)
    positions = _standing(network, asked.request.standing)
    if isinstance(positions, Mistake):
        return positions
    lacking = _lacking(network, asked)
    if lacking is not None:
        return lacking
    return make_plan(asked.unit, network, asked.job, asked.request.on, positions)


def _lacking(network: "Network", asked: Asked) -> Mistake | None:
    """A port that the job opens and this piece does not have: a job file asks for more than was built."""
    job, on = asked.job, asked.request.on
    lacking = [name for name in job.opens if not network.opened(on, (name,))]
    needed = [name for name in lacking if name not in job.optional]
    cure = "see `opens` in the job file: a name with ? at its end is opened only where there is such a port"
    if len(lacking) == len(job.opens):
        return Mistake(words=f"{on} has none of the ports that {job.id} opens ({', '.join(lacking)})", cure=cure)
    if needed and job.equipment is not Equipment.UNIT:
        return Mistake(words=f"{on} has no port {', '.join(needed)}, which {job.id} opens", cure=cure)
    return None


def _standing(network: "Network", words: tuple[str, ...]) -> "dict[DeviceTag, str] | Mistake":
    """Positions by device from `TAG=position`; each must be there."""
    found: dict[DeviceTag, str] = {}
    devices = {str(tag): device for tag, device in network.devices.items() if device.movable}
    for word in words:
        tag, sign, position = word.partition("=")
        if not sign:
            return Mistake(words=f"{word} does not say a position", cure="write TAG=position, such as HV-2=close")
        if tag not in devices:
            return Mistake(words=f"there is no device {tag} that can be moved", cure=_near(tag, list(devices)))
        if position not in devices[tag].positions:
            return Mistake(
                words=f"{tag} has no position {position}", cure=_near(position, list(devices[tag].positions))
            )
        found[devices[tag].tag] = position
    return found


@dataclass(frozen=True, slots=True, kw_only=True)
class Permit:
    """A permit as a document, its drawings, its plan as JSON, and the verdicts of the proof."""

    document: "Document"
    drawings: "tuple[Drawing, ...]"
    plan_json: str
    proof: "dict[str, Verdict]"

    def unproven(self) -> list[str]:
        """Properties that do not hold, each with its evidence."""
        return [f"{name}: {verdict.evidence}" for name, verdict in self.proof.items() if not verdict.holds]


def permit(asked: Asked, made: "Plan") -> Permit:
    """Prove a plan and write it as a permit."""
    from provenzero.document.permit import permit as permit_of  # noqa: PLC0415 - as above
    from provenzero.document.permit_figures import permit_figures  # noqa: PLC0415
    from provenzero.document.plan_json import plan_json  # noqa: PLC0415
    from provenzero.document.wording import load_wording  # noqa: PLC0415
    from provenzero.drawing.arrange import overview  # noqa: PLC0415
    from provenzero.drawing.marks import marks_of  # noqa: PLC0415
    from provenzero.proof.prove import prove  # noqa: PLC0415

    proof = prove(made)
    figures = permit_figures(made)
    wording = load_wording()
    context = _context(asked)
    return Permit(
        document=permit_of(made, figures, proof, context, wording),
        drawings=overview(made.unit, made.network, marks_of(made)),
        plan_json=plan_json(made, proof, figures, context, wording),
        proof=proof,
    )


def refusal(asked: Asked, made: "Refusal") -> tuple[str, ...]:
    """Why there is no plan, a sentence an obstacle."""
    from provenzero.document.refusal import reasons  # noqa: PLC0415 - only when a plan is refused
    from provenzero.document.wording import load_wording  # noqa: PLC0415

    del asked
    return reasons(made, load_wording())


def _context(asked: Asked) -> "PermitContext":
    from provenzero.document.context import PermitContext  # noqa: PLC0415 - as above
    from provenzero.document.model import Paper  # noqa: PLC0415

    request = asked.request
    units: Units = UNITS[request.units]
    return PermitContext(
        number=asked.number(),
        issued=request.issued,
        company=request.company,
        paper=Paper(request.paper),
        units=units,
        tool_version=__version__,
        fingerprint=asked.fingerprint,
        site="default",
        hold_s=_HOLD_S,
        recheck_s=_RECHECK_S,
    )

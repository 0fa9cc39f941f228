"""A plan, its figures and its proof as the lock-out permit: the parts in the order in which they are used."""

from collections.abc import Mapping

from provenzero.document.brief import Brief
from provenzero.document.cautions import cautions, protection
from provenzero.document.context import PermitContext
from provenzero.document.evidence import assumptions, basis, figures, grades, properties, repeat
from provenzero.document.figures import PermitFigures
from provenzero.document.hazards import acknowledged, energies
from provenzero.document.head import head, impairment, unproven
from provenzero.document.model import Block, Document, DrawingSlot, Identity, Section, Steps, Words
from provenzero.document.register import register, roster, zero_table
from provenzero.document.signoffs import closing, count, handover, lift, recheck, start
from provenzero.document.steps import cards
from provenzero.document.wording import Wording
from provenzero.plan import model as plan_model
from provenzero.plan.model import Plan, Verdict


def permit(
    plan: Plan,
    figures: PermitFigures,
    proof: Mapping[str, Verdict],
    context: PermitContext,
    wording: Wording,
) -> Document:
    """The permit of a plan. `proof` by property name; a property not in it is printed as not checked."""
    brief = Brief(plan=plan, figures=figures, proof=proof, context=context, wording=wording)
    facts = {"job": plan.job.title, "on": brief.equipment(plan.on), "unit": plan.unit.identity.tag}
    return Document(
        language=wording.language,
        title=brief.say("permit.title"),
        subtitle=brief.say("permit.subtitle", **facts),
        subject=brief.say("permit.subject", **facts),
        issued=context.issued,
        paper=context.paper,
        identity=identity(brief, _marks(brief)),
        words=wording.branch("page"),
        sections=tuple(_sections(brief)),
    )


def identity(brief: Brief, marks: tuple[str, ...]) -> Identity:
    """What stands on every page."""
    unit = brief.plan.unit
    return Identity(
        facts=(
            (brief.say("identity.document"), brief.context.number),
            (brief.say("identity.unit"), unit.identity.tag),
            (brief.say("identity.job"), f"{brief.plan.job.title}, {brief.plan.on}"),
            (brief.say("identity.revision"), unit.description.revision),
            (brief.say("identity.fingerprint"), brief.context.short_fingerprint()),
        ),
        marks=marks,
    )


def _marks(brief: Brief) -> tuple[str, ...]:
    marks = []
    if brief.plan.unit.description.verification is None:
        marks.append(brief.say("permit.marks.unverified"))
    doubtful = unproven(brief)
    if doubtful:
        marks.append(brief.say("permit.marks.unproven", properties=", ".join(doubtful)))
    return tuple(marks)


def _sections(brief: Brief) -> list[Section]:
    part = plan_model.Section
    found = [
        _section(brief, "permit", *head(brief)),
        _section(
            brief,
            "hazards",
            *cautions(brief),
            protection(brief),
            impairment(brief),
            energies(brief),
            acknowledged(brief),
        ),
        _section(brief, "locks", *register(brief)),
        _section(brief, "drawing", assumptions(brief), _drawing(brief)),
        _steps(brief, part.PREPARE, fresh=True),
        _steps(brief, part.ISOLATE),
        _steps(brief, part.RELEASE),
        _steps(brief, part.VERIFY, zero_table(brief), start(brief), roster(brief)),
        _steps(brief, part.WORK, recheck(brief), lift(brief)),
        _steps(brief, part.REINSTATE, count(brief)),
        _steps(brief, part.TEST),
        _section(brief, "signoff", handover(brief), *closing(brief)),
        _section(brief, "proof", properties(brief), grades(brief), *figures(brief), basis(brief), repeat(brief)),
    ]
    return [section for section in found if any(not isinstance(block, Words) for block in section.blocks)]


def _section(brief: Brief, key: str, *blocks: Block, fresh: bool = False) -> Section:
    return Section(id=key, mark=brief.say(f"marks.{key}"), title=brief.say(f"titles.{key}"), blocks=blocks, fresh=fresh)


def _steps(brief: Brief, part: plan_model.Section, *after: Block, fresh: bool = False) -> Section:
    lead = Words(paragraphs=(brief.say(f"sections.{part.value}"),))
    found = cards(brief, part)
    return _section(brief, part.value, lead, *((Steps(cards=found),) if found else ()), *after, fresh=fresh)


def _drawing(brief: Brief) -> DrawingSlot:
    alternative = brief.say(
        "drawing.alternative",
        unit=brief.plan.unit.identity.tag,
        job=brief.plan.job.title,
        on=brief.equipment(brief.plan.on),
    )
    return DrawingSlot(caption=brief.say("drawing.caption"), alternative=alternative)

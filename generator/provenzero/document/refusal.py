"""A refusal on paper: why there is no permit, by which way the pressure comes, and what can be done."""

from provenzero.document.context import PermitContext
from provenzero.document.model import (
    Bullets,
    Column,
    Document,
    Fact,
    Facts,
    Identity,
    Notice,
    Section,
    Signal,
    Table,
    Text,
)
from provenzero.document.wording import Wording
from provenzero.plan.model import Obstacle, Refusal

_SHARES = (("line", 24), ("reason", 42), ("way", 34))


def refusal(refused: Refusal, context: PermitContext, wording: Wording) -> Document:
    """The paper that says that nothing may be opened."""
    unit = refused.unit
    facts = {"job": refused.job.title, "on": refused.on, "unit": unit.identity.tag}
    known = (
        (wording.say("identity.document"), context.number),
        (wording.say("identity.unit"), unit.identity.tag),
        (wording.say("identity.job"), f"{refused.job.title}, {refused.on}"),
        (wording.say("identity.revision"), unit.description.revision),
        (wording.say("identity.fingerprint"), context.short_fingerprint()),
    )
    stop = Notice(
        signal=Signal.DANGER,
        word=wording.say("signal.danger"),
        title=wording.say("refusal.title"),
        lines=(wording.say("refusal.lead"),),
    )
    return Document(
        language=wording.language,
        title=wording.say("refusal.title"),
        subtitle=wording.say("refusal.subtitle", **facts),
        subject=wording.say("refusal.subject", **facts),
        issued=context.issued,
        paper=context.paper,
        identity=Identity(facts=known, marks=(wording.say("refusal.mark"),)),
        words=wording.branch("page"),
        sections=(
            Section(
                id="refused",
                mark=wording.say("refusal.section"),
                title=wording.say("refusal.title"),
                blocks=(
                    Facts(items=tuple(Fact(label=label, value=Text(words=words)) for label, words in known)),
                    stop,
                    _obstacles(refused, wording),
                    Bullets(title=wording.say("refusal.next_title"), points=wording.points("refusal.next")),
                ),
            ),
        ),
    )


def reasons(refused: Refusal, wording: Wording) -> tuple[str, ...]:
    """The obstacles in one line each, for a terminal."""
    return tuple(f"{item.line}: {_reason(item, wording)}" for item in refused.obstacles)


def _obstacles(refused: Refusal, wording: Wording) -> Table:
    columns = tuple(Column(title=wording.say(f"refusal.{key}"), percent=percent) for key, percent in _SHARES)
    rows = tuple(
        (
            Text(words=item.line, strong=True),
            Text(words=_reason(item, wording)),
            Text(words=" > ".join(item.path) or wording.say("none")),
        )
        for item in refused.obstacles
    )
    return Table(title=wording.say("refusal.obstacles"), columns=columns, rows=rows)


def _reason(item: Obstacle, wording: Wording) -> str:
    key = f"refusal.words.{item.words}"
    return wording.say(key) if wording.has(key) else wording.say("refusal.other", words=item.words)

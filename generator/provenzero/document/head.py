"""The first pages: what the permit is, what it covers, who answers for it, what is out of service meanwhile."""

from provenzero.document.brief import Brief
from provenzero.document.model import (
    Blank,
    Block,
    Bullets,
    Cell,
    Column,
    Fact,
    Facts,
    Notice,
    Signal,
    Table,
    Text,
    Ticks,
    Words,
)
from provenzero.document.panels import panel


def head(brief: Brief) -> tuple[Block, ...]:
    """Identity, warnings about the plan itself, overview, scope, rules, well state and people."""
    return (
        _facts(brief),
        *_doubts(brief),
        *_glance(brief),
        _scope(brief),
        _well(brief),
        _people(brief),
        _rules(brief),
        _jurisdiction(brief),
    )


def unproven(brief: Brief) -> tuple[str, ...]:
    """Names of the properties that do not hold or were not checked."""
    names = brief.wording.branch("proof.names")
    return tuple(words for key, words in names.items() if not _holds(brief, key))


def _holds(brief: Brief, key: str) -> bool:
    return key in brief.proof and brief.proof[key].holds


def _fact(brief: Brief, key: str, value: str) -> Fact:
    return Fact(label=brief.say(f"head.{key}"), value=Text(words=value or brief.say("head.not_given")))


def _facts(brief: Brief) -> Facts:
    unit, context = brief.plan.unit, brief.context
    identity, description = unit.identity, unit.description
    revision = brief.say(
        "head.revision_value", revision=description.revision, date=description.date, by=description.written_by
    )
    verified = brief.say("head.unverified_value")
    if description.verification is not None:
        seen = description.verification
        verified = brief.say("head.verified_value", by=seen.by, on=seen.on)
    return Facts(
        items=(
            _fact(brief, "document", context.number),
            _fact(brief, "issued", context.issued),
            _fact(brief, "unit", ", ".join(w for w in (identity.tag, identity.name) if w)),
            _fact(brief, "site", identity.site),
            _fact(brief, "on", brief.equipment(brief.plan.on)),
            _fact(brief, "job", brief.plan.job.title),
            _fact(brief, "company", context.company),
            _fact(brief, "revision", revision),
            Fact(label=brief.say("head.verified"), value=Text(words=verified, strong=True)),
            _fact(brief, "drawing", identity.drawing),
            _fact(brief, "manual", identity.manual),
            Fact(label=brief.say("head.valid"), value=Blank()),
            Fact(label=brief.say("head.linked"), value=Blank()),
            Fact(label=brief.say("head.copy"), value=Ticks(words=brief.wording.points("head.copies"))),
        )
    )


def _doubts(brief: Brief) -> tuple[Notice, ...]:
    notices = []
    doubtful = unproven(brief)
    if doubtful:
        notices.append(panel(brief, Signal.DANGER, "unproven", names=", ".join(doubtful)))
    if brief.plan.unit.description.verification is None:
        notices.append(panel(brief, Signal.WARNING, "unverified"))
    if brief.plan.unheld:
        notices.append(panel(brief, Signal.WARNING, "unheld", names=brief.lines(brief.plan.unheld)))
    weak = [tag for g in brief.plan.grades if not g.survives_single_leak for tag in g.barriers]
    if weak:
        notices.append(panel(brief, Signal.WARNING, "single", names=brief.some(weak, most=6)))
    loose = [brief.source(g.source) for g in brief.plan.grades if not (g.survives_single_leak or g.barriers)]
    if loose:
        notices.append(panel(brief, Signal.WARNING, "loose", names=brief.some(loose)))
    return tuple(notices)


def _glance(brief: Brief) -> tuple[Block, ...]:
    plan, figures, measure = brief.plan, brief.figures, brief.measure
    lost, left = plan.impairment.functions_lost, plan.impairment.power_sources_left
    holds = sum(step.hold_point for step in plan.steps)
    values = (
        ("locks", str(len(plan.locks))),
        ("steps", brief.say("glance.steps_value", count=str(len(plan.steps)), holds=str(holds))),
        ("functions", brief.some((brief.function(n) for n in lost), most=8)),
        ("power", brief.wording.names(left)),
        ("fluid", measure.volumes(figures.returned_total_m3)),
        ("room", measure.volume(figures.reservoir_room_m3)),
    )
    facts = Facts(
        items=tuple(Fact(label=brief.say(f"glance.{k}"), value=Text(words=v, strong=True)) for k, v in values)
    )
    return (facts, panel(brief, Signal.WARNING, "room")) if figures.room_short() else (facts,)


def _scope(brief: Brief) -> Bullets:
    plan = brief.plan
    points = (
        brief.say("scope.use", job=plan.job.title, on=brief.equipment(plan.on), unit=plan.unit.identity.tag),
        brief.say("scope.opens", names=brief.lines(plan.zone, most=8)),
        *_standing(brief),
        *plan.job.limits,
        brief.say("scope.not_covered"),
        brief.say("scope.change"),
        brief.say("scope.stop"),
        brief.say("scope.maker"),
    )
    return Bullets(title=brief.say("scope.title"), points=points)


def _standing(brief: Brief) -> tuple[str, ...]:
    """What does not stand in its normal position when the job starts."""
    start = brief.plan.start().positions
    away = [tag for tag, device in brief.plan.network.devices.items() if start[tag] != device.normal]
    if not away:
        return ()
    return (brief.say("scope.standing", names=brief.some((f"{t} {brief.position(start[t])}" for t in away), most=8)),)


def _rules(brief: Brief) -> Bullets:
    return Bullets(title=brief.say("rules.title"), points=brief.wording.points("rules.points"))


def _jurisdiction(brief: Brief) -> Words:
    words = brief.say(f"jurisdiction.{brief.plan.unit.identity.jurisdiction.value}")
    return Words(title=brief.say("jurisdiction.title"), paragraphs=(words,))


def _well(brief: Brief) -> Table:
    rows: list[tuple[Cell, ...]] = []
    for key in ("state", "allowed", "suspended", "approved", "third", "resume"):
        value: Cell = Blank()
        if key == "suspended":
            value = Ticks(words=brief.wording.points("well.suspended_ticks"))
        rows.append((Text(words=brief.say(f"well.{key}"), strong=True), value))
    columns = (Column(title=brief.say("well.what"), percent=36), Column(title=brief.say("well.entry"), percent=64))
    return Table(title=brief.say("well.title"), columns=columns, rows=tuple(rows))


def _people(brief: Brief) -> Table:
    columns = (
        Column(title=brief.say("people.role"), percent=36),
        Column(title=brief.say("people.name"), percent=26),
        Column(title=brief.say("people.sign"), percent=20),
        Column(title=brief.say("people.when"), percent=18),
    )
    roles = brief.wording.points("people.roles")
    rows = tuple((Text(words=role, strong=True), Blank(), Blank(), Blank()) for role in roles)
    return Table(title=brief.say("people.title"), columns=columns, rows=rows)


def impairment(brief: Brief) -> Table:
    """What is lost while the job lasts, with room for the measure taken instead."""
    lost = brief.plan.impairment
    functions = tuple(brief.function(n) for n in lost.functions_lost)
    remote = tuple(brief.function(n) for n in lost.remote_lost)
    named = (
        ("functions", functions),
        ("remote", remote),
        ("banks", lost.banks_lost),
        ("pumps", lost.pumps_lost),
        ("panels", lost.panels_lost),
        ("backups", lost.backups_lost),
    )
    rows = [_loss(brief, key, names) for key, names in named if names]
    rows.append((_strong(brief, "power"), Text(words=_power(brief)), Blank(), Blank()))
    figures, measure = brief.figures, brief.measure
    capacity = brief.say(
        "impairment.capacity_value",
        left=measure.volumes(figures.usable_left_m3),
        needed=measure.volume(figures.usable_needed_m3),
    )
    rows.append((_strong(brief, "capacity"), Text(words=capacity), Blank(), Blank()))
    left = brief.plan.impairment.power_sources_left
    charging = measure.durations(figures.charging_s) if left else brief.say("impairment.no_power")
    rows.append((_strong(brief, "charging"), Text(words=charging), Blank(), Blank()))
    columns = tuple(
        Column(title=brief.say(f"impairment.{key}"), percent=percent)
        for key, percent in (("what", 22), ("names", 30), ("measure", 28), ("until", 20))
    )
    return Table(title=brief.say("impairment.title"), columns=columns, rows=tuple(rows))


def _strong(brief: Brief, key: str) -> Text:
    return Text(words=brief.say(f"impairment.{key}"), strong=True)


def _loss(brief: Brief, key: str, names: tuple[str, ...]) -> tuple[Cell, ...]:
    return (_strong(brief, key), Text(words="; ".join(names)), Blank(), Blank())


def _power(brief: Brief) -> str:
    left = brief.plan.impairment.power_sources_left
    if not left:
        return brief.say("impairment.no_power")
    names = brief.wording.names(left)
    return brief.say("impairment.one_power", names=names) if len(left) == 1 else names

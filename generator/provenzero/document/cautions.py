"""Cautions of the job as a whole, and what to wear and bring."""

from collections import Counter
from collections.abc import Iterable

from provenzero.catalogue.job import Equipment
from provenzero.document.brief import Brief
from provenzero.document.model import Block, Bullets, Notice, Signal, Words
from provenzero.document.register import test_gauges
from provenzero.network.model import LineId, Medium
from provenzero.plan.instruments import joined_lines
from provenzero.state.model import wire
from provenzero.unit.model import RETURNS


def cautions(brief: Brief) -> tuple[Block, ...]:
    """The panels that apply to this job, the gravest first."""
    found = [Words(title=brief.say("cautions.title"), paragraphs=())]
    panels: list[Notice] = []
    nitrogen = _nitrogen(brief)
    if nitrogen or brief.plan.job.equipment is Equipment.BOTTLE:
        panels.append(_caution(brief, Signal.DANGER, "bottle"))
    panels.append(_caution(brief, Signal.WARNING, "injection"))
    if nitrogen:
        panels.append(_caution(brief, Signal.WARNING, "nitrogen", volume=_free_gas(brief)))
    if brief.plan.unit.banks:
        panels.append(_caution(brief, Signal.WARNING, "gas"))
    panels.append(_caution(brief, Signal.WARNING, "control"))
    panels.append(_caution(brief, Signal.WARNING, "first_turn"))
    if brief.plan.unit.bypasses:
        panels.append(_caution(brief, Signal.WARNING, "bypass"))
    if _joined_to_returns(brief):
        panels.append(_caution(brief, Signal.CAUTION, "returns"))
    head = max((brief.head_pag(k) for k in brief.plan.zone), default=0.0)
    if head > 0.0:
        panels.append(_caution(brief, Signal.CAUTION, "head", pressure=brief.measure.pressure(head)))
    return (*found, *panels)


def protection(brief: Brief) -> Bullets:
    """What to wear and what to bring, counted from the plan."""
    plan, measure = brief.plan, brief.measure
    gauges = test_gauges(brief)
    points = [brief.say("protection.wear"), brief.say("protection.locks", locks=str(len(plan.locks)))]
    if gauges:
        high = max((plan.start().high(k) for k in plan.zone), default=0.0)
        points.append(brief.say("protection.gauges", count=str(gauges), pressure=measure.pressure(high)))
    if brief.figures.room_short() or brief.figures.returned_total_m3 is not None:
        volume = measure.volumes(brief.figures.returned_total_m3)
        points.append(brief.say("protection.container", volume=volume))
    if plan.job.tools:
        points.append(brief.say("protection.tools", names=_listed(plan.job.tools)))
    if plan.job.hazards:
        points.append(brief.say("protection.job", names=_listed(plan.job.hazards)))
    return Bullets(title=brief.say("protection.title"), points=tuple(points))


def _listed(items: Iterable[str]) -> str:
    """Short sentences as one list."""
    return "; ".join(item.rstrip(".") for item in items)


def _caution(brief: Brief, signal: Signal, key: str, **facts: str) -> Notice:
    return Notice(
        signal=signal,
        word=brief.say(f"signal.{signal.value}"),
        title=brief.say(f"cautions.{key}_title"),
        lines=brief.wording.points(f"cautions.{key}", **facts),
    )


def _joined_to_returns(brief: Brief) -> bool:
    """Whether an opened line stands open to a return header that other functions use too."""
    plan = brief.plan
    if not plan.unit.common_returns:
        return False
    wiring, state = wire(plan.network), plan.isolated()
    return any(LineId(RETURNS) in joined_lines(wiring, state, line) for line in plan.zone)


def _nitrogen(brief: Brief) -> list[LineId]:
    """Gas lines that the job empties."""
    plan = brief.plan
    return [
        k
        for k in plan.dead
        if plan.network.lines[k].medium is Medium.NITROGEN and plan.start().high(k) > plan.isolated().high(k)
    ]


def _free_gas(brief: Brief) -> str:
    """Free nitrogen that the emptied bottles give off; not known where that of one of them is not."""
    emptied = Counter(str(k).partition("/")[0] for k in _nitrogen(brief))
    low = high = 0.0
    for bank in brief.plan.unit.banks:
        if bank.tag not in emptied:
            continue
        figures = brief.figures.bank(bank.tag)
        if figures is None or figures.free_gas_m3 is None:
            return brief.measure.volumes(None)
        share = emptied[bank.tag] / bank.bottles
        low, high = low + figures.free_gas_m3[0] * share, high + figures.free_gas_m3[1] * share
    return brief.measure.volumes((low, high))

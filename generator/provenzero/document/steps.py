"""Steps of a plan as cards: the action in words, the band on the gauge, the boxes, and what to do if it is not so."""

from collections.abc import Iterable

from provenzero.document.brief import Brief
from provenzero.document.figures import StepFigures
from provenzero.document.model import Notice, Reading, StepCard
from provenzero.document.panels import panels
from provenzero.network.model import Device, Medium
from provenzero.plan.model import Expect, Section, Step, StepKind

_MOST_LINES = 8
_NAMED = {"keeps_out", "keeps_open", "let_out"}
_MOVES = {
    StepKind.SET_AND_LOCK,
    StepKind.CHECK_AND_LOCK,
    StepKind.SET,
    StepKind.UNLOCK_AND_SET,
    StepKind.UNLOCK,
    StepKind.RESTORE,
}


def cards(brief: Brief, section: Section) -> tuple[StepCard, ...]:
    """The cards of one section, in order."""
    before = panels(brief)
    return tuple(_card(brief, step, before[step.id]) for step in brief.plan.steps if step.section is section)


def action(brief: Brief, step: Step) -> str:
    """What a step asks for, in one short sentence."""
    facts = _facts(brief, step)
    kind = _key(brief, step)
    if brief.wording.has(f"step.{kind}.text"):
        return brief.say(f"step.{kind}.text", **facts)
    device = brief.device(str(step.device))
    keys = (f"act.{device.kind.value}.{step.position}", f"act.{step.position}", "act.other")
    return brief.wording.first(*keys, **facts)


def _key(brief: Brief, step: Step) -> str:
    """Under which key the words of a step stand."""
    if step.kind is StepKind.WATCH and brief.context.hold_s is None:
        return "watch_unknown"
    if step.kind is StepKind.TEST_GAUGE and step.facts.get("gauges") == "0":
        return "test_gauges"
    if step.kind is StepKind.TRY_OPERATE and "," in step.facts["function"]:
        return "try_operate_each"
    if step.recharges is not None and brief.plan.network.lines[step.recharges].medium is not Medium.NITROGEN:
        return "refill"
    return step.kind.value


def sentence(brief: Brief, step: Step) -> str:
    """A step in one piece of text that stands alone: action, device and place, lock."""
    device = "" if step.device is None else f"({', '.join(_device(brief.device(step.device)))})"
    unlock, lock = (f"{words}." if words else "" for words in (_unlock(brief, step), _lock(brief, step)))
    return " ".join(words for words in (unlock, action(brief, step), device, lock) if words)


def _facts(brief: Brief, step: Step) -> dict[str, str]:
    facts = {
        "unit": brief.plan.unit.identity.tag,
        "on": brief.equipment(brief.plan.on),
        "tag": step.device or "",
        "position": brief.position(step.position),
        "was": brief.position(step.was),
        "line": brief.line(step.recharges or ""),
        "gauges": brief.wording.names(tuple(dict.fromkeys(e.gauge for e in step.expect))),
        "hold": "" if brief.context.hold_s is None else brief.measure.duration(brief.context.hold_s),
        **step.facts,
    }
    if "function" in step.facts:
        facts["function"] = brief.functions(step.facts["function"])
    if "on" in step.facts:
        facts["on"] = brief.equipment(step.facts["on"])
    return facts


def _card(brief: Brief, step: Step, warnings: tuple[Notice, ...]) -> StepCard:
    kind = _key(brief, step)
    outcomes, otherwise, asks = f"step.{kind}.outcomes", f"step.{kind}.otherwise", f"step.{kind}.asks"
    figures = brief.figures.steps.get(step.id, StepFigures())
    return StepCard(
        number=step.id,
        action=action(brief, step),
        warnings=warnings,
        device=() if step.device is None else _device(brief.device(step.device)),
        speaks_of=_speaks_of(brief, step),
        unlock=_unlock(brief, step),
        lock=_lock(brief, step),
        readings=tuple(_reading(brief, e) for e in step.expect),
        outcomes=(*_each(brief, step), *brief.wording.lists.get(outcomes, ())),
        asks=brief.wording.lists.get(asks, ()),
        figures=(*_figures(brief, figures), *_column(brief, step.expect)),
        why=_why(brief, step),
        otherwise=brief.say(otherwise),
        hold=brief.say("lock.hold") if step.hold_point else "",
    )


def _each(brief: Brief, step: Step) -> tuple[str, ...]:
    """One outcome for each of several functions that are tried in one step."""
    names = step.facts.get("function", "").split(", ")
    if step.kind is not StepKind.TRY_OPERATE or len(names) == 1:
        return ()
    return tuple(brief.say("step.try_operate_each.each", function=brief.function(name)) for name in names)


def _device(device: Device) -> tuple[str, ...]:
    return tuple(words for words in (device.tag, device.name, device.location, device.way) if words)


def _speaks_of(brief: Brief, step: Step) -> str:
    if step.kind in _MOVES or step.device is not None or step.recharges is not None or not step.lines:
        return ""
    return brief.say("step.lines", names=brief.lines(step.lines, most=_MOST_LINES))


def _lock(brief: Brief, step: Step) -> str:
    return "" if step.lock is None else brief.say("lock.on", number=str(step.lock))


def _unlock(brief: Brief, step: Step) -> str:
    return "" if step.unlock is None else brief.say("lock.off", number=str(step.unlock))


def _reading(brief: Brief, expect: Expect) -> Reading:
    gauge = brief.gauge(expect.gauge)
    return Reading(
        gauge=expect.gauge,
        place="" if gauge is None else gauge.location,
        expected=brief.measure.pressures(brief.band(expect)),
        label=brief.measure.gauge_unit(),
    )


def _figures(brief: Brief, figures: StepFigures) -> Iterable[str]:
    measure = brief.measure
    if figures.returned_m3 is not None:
        key = "figure.returned" if figures.time_s is None else "figure.returned_in"
        volume, time = measure.volumes(figures.returned_m3), measure.durations(figures.time_s)
        yield brief.say(key, volume=volume, time=time)
    elif figures.time_s is not None:
        yield brief.say("figure.time", time=measure.durations(figures.time_s))
    if figures.rebound_pag is not None:
        yield brief.say("figure.rebound", pressure=measure.pressures(figures.rebound_pag))
    if figures.accept_pag is not None:
        yield brief.say("figure.accept", pressure=measure.pressures(figures.accept_pag))
    if figures.accept_s is not None:
        yield brief.say("figure.within", time=measure.duration(figures.accept_s))
    if figures.limit:
        yield brief.say("figure.limit", text=figures.limit)


def _column(brief: Brief, expects: Iterable[Expect]) -> Iterable[str]:
    """Says once that a reading near zero is only the fluid column."""
    heads = [e.high_pag for e in expects if 0.0 < e.high_pag <= brief.head_pag(e.line)]
    if heads:
        yield brief.say("figure.head", pressure=brief.measure.pressure(max(heads)))


def _why(brief: Brief, step: Step) -> str:
    key = f"reason.{step.reason}"
    if step.reason in _NAMED:
        names = _named(brief, step)
        return brief.say(key, names=brief.some(names)) if names else brief.wording.texts.get(f"{key}_plain", "")
    return brief.say(key, **_facts(brief, step)) if brief.wording.has(key) else ""


def _named(brief: Brief, step: Step) -> list[str]:
    lock = brief.lock_on(step.device)
    if step.reason == "let_out":
        return [brief.line(k) for k in step.lines]
    if lock is None:
        return []
    if step.reason == "keeps_out":
        return brief.held_back(lock)
    return [brief.line(k) for k in lock.keeps_open]

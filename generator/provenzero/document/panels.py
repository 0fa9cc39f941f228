"""The warning panels that stand before a step: what moves, starts or comes out when it is done."""

from provenzero.document.brief import Brief
from provenzero.document.model import Notice, Signal
from provenzero.network.model import DeviceKind, LineId, Medium, Passage
from provenzero.plan.model import Section, Step
from provenzero.state.model import State


def panel(brief: Brief, signal: Signal, key: str, **facts: str) -> Notice:
    """One panel of the wording file: its title and its lines."""
    return Notice(
        signal=signal,
        word=brief.say(f"signal.{signal.value}"),
        title=brief.say(f"panel.{key}_title", **facts),
        lines=brief.wording.points(f"panel.{key}", **facts),
    )


def panels(brief: Brief) -> dict[str, tuple[Notice, ...]]:
    """The panels of every step by step id. What comes out is told once a section, what moves or starts each time."""
    told: set[tuple[Section, str]] = set()
    found: dict[str, tuple[Notice, ...]] = {}
    for place, step in enumerate(brief.plan.steps):
        before, after = brief.plan.states[place], brief.plan.states[place + 1]
        notices = _announced(brief, step)
        for key in _released(brief, step, before, after):
            if (step.section, key) not in told:
                told.add((step.section, key))
                notices.append(panel(brief, Signal.WARNING, key))
        found[step.id] = tuple(notices)
    return found


def _announced(brief: Brief, step: Step) -> list[Notice]:
    notices = []
    if step.moves_function is not None:
        notices.append(panel(brief, Signal.WARNING, "moves", names=brief.functions(step.moves_function)))
    if step.starts_pump is not None:
        notices.append(panel(brief, Signal.WARNING, "pump", names=step.starts_pump))
    if step.recharges is not None and _medium(brief, step.recharges) is Medium.NITROGEN:
        notices.append(panel(brief, Signal.WARNING, "charge"))
    return notices


def _released(brief: Brief, step: Step, before: State, after: State) -> list[str]:
    keys = []
    if step.device is not None and step.position is not None and step.position != step.was:
        media = {_medium(brief, line) for line in _let_out(brief, step, before)}
        handle = brief.device(step.device).kind is DeviceKind.FOUR_WAY_VALVE
        if Medium.CONTROL_FLUID in media and not handle:
            keys.append("bleed")
        if Medium.NITROGEN in media:
            keys.append("gas")
    if step.section is Section.REINSTATE and any(
        before.high(k) <= brief.head_pag(k) < after.high(k)
        for k in brief.plan.dead
        if _medium(brief, k) is Medium.CONTROL_FLUID
    ):
        keys.append("pressure")
    return keys


def _let_out(brief: Brief, step: Step, before: State) -> list[LineId]:
    """Lines under pressure that the position of a step joins to a vent."""
    device = brief.device(str(step.device))
    passages = device.positions.get(str(step.position), ())
    return [line for item in passages for line in _ends(brief, item) if before.high(line) > brief.head_pag(line)]


def _ends(brief: Brief, item: Passage) -> tuple[LineId, ...]:
    lines = brief.plan.network.lines
    ways = ((item.source, item.target), (item.target, item.source))
    return tuple(here for here, there in ways if lines[there].vent and not lines[here].vent)


def _medium(brief: Brief, line: LineId) -> Medium:
    return brief.plan.network.lines[line].medium

"""A plan to the reasons behind it: what each lock holds back and by which way, and the rule behind each step."""

from collections.abc import Iterator
from typing import Final

from provenzero.document.model import Document, StepCard, Steps
from provenzero.plan.model import Lock, Plan

_TRAPPED: Final = "pressure trapped in "
_RULES: Final = {
    "clear": "people and tools leave before pressure comes back",
    "function_test": "a function is proven from the place it is commanded from",
    "hand_back": "the unit goes back only when its user takes it",
    "identify": "the paper is held against the steel before anything is moved",
    "job": "the job file asks for it",
    "leave": "the piston must stand at the end that the job file asks for",
    "notify": "everyone touched by the job knows before the first lock",
    "read_before": "a gauge that reads wrong now proves nothing later",
    "read_restored": "the unit ends where it started",
    "recharge": "what was let out is put back before the unit is used",
    "reinstate": "what was set for the job goes back, after what it depends on",
    "release_work": "nobody opens anything before the zero is shown",
    "test": "a test proves again what was opened",
    "well_state": "the well must bear what the unit cannot do meanwhile",
}


def explained(plan: Plan, document: Document) -> Iterator[str]:
    """For each lock its sources and their ways into the opened part; for each step its words and its reason."""
    names = {source.id: source.name for source in plan.network.sources}
    for lock in plan.locks:
        yield f"lock {lock.number}  {lock.device} {lock.position}  ({lock.purpose.value})"
        yield from _ways(plan, lock, names)
    cards = {card.number: card for card in _cards(document)}
    for step in plan.steps:
        card = cards[step.id]
        yield f"step {step.id}  {card.action}"
        yield f"    because: {card.why or _RULES.get(step.reason, step.reason)}"


def _ways(plan: Plan, lock: Lock, names: dict[str, str]) -> Iterator[str]:
    for source, *way in lock.holds_back:
        trapped = source.removeprefix(_TRAPPED)
        name = names.get(source, source) if trapped == source else f"{_TRAPPED}{_line(plan, trapped)}"
        yield f"    holds back {name}, by {' > '.join(way)}" if way else f"    holds back {name}"
    kept = [_line(plan, line) for line in lock.keeps_open]
    if kept:
        yield f"    keeps open to a vent: {'; '.join(kept)}"


def _line(plan: Plan, line: str) -> str:
    return next((item.name for key, item in plan.network.lines.items() if key == line), line)


def _cards(document: Document) -> Iterator[StepCard]:
    for section in document.sections:
        for block in section.blocks:
            if isinstance(block, Steps):
                yield from block.cards

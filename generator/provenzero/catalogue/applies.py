"""Which equipment of a unit a job applies to, and why it does not apply to what somebody named."""

from collections.abc import Iterator
from dataclasses import dataclass

from provenzero.catalogue.job import CALLED, Equipment, Job
from provenzero.unit.model import FunctionKind, Regulator, Unit


@dataclass(frozen=True, slots=True, kw_only=True)
class Misfit:
    """Why a job is not done on what somebody named. `known`: the unit has a thing of that name.

    `meant`: the piece of the right kind that goes with the one named; None if none does.
    """

    words: str
    known: bool
    meant: str | None


def applies_to(job: Job, unit: Unit) -> tuple[str, ...]:
    """Names or tags of the equipment that a job applies to, in the order of the description."""
    return tuple(name for name, facts in _equipment(job.equipment, unit) if _fits(job, facts))


def misfit(job: Job, unit: Unit, name: str) -> Misfit:
    """Why a job does not apply to a name: nothing is called so, or it is of another kind than the job asks for."""
    if job.equipment is Equipment.UNIT:
        return Misfit(words=f"{job.id} is done on the whole unit, not on {name}", known=True, meant="unit")
    kind = CALLED[job.equipment]
    facts = dict(_equipment(job.equipment, unit)).get(name)
    if facts is not None:
        wrong = next(c for c in job.conditions if facts.get(c.attribute) not in c.allowed)
        has = f"{wrong.attribute}: {facts.get(wrong.attribute, 'none')}"
        asked = f"{wrong.attribute}: {', '.join(wrong.allowed)}"
        return Misfit(words=f"{name} is a {kind} ({has}); {job.id} asks for {asked}", known=True, meant=None)
    places = applies_to(job, unit)
    what = next((words for other, words in _called(unit) if other == name), None)
    if what is None:
        return Misfit(words=f"there is no {kind} {name} on {unit.identity.tag}", known=False, meant=None)
    meant = next((p for p in _beside(unit, name) if p in places), None)
    return Misfit(words=f"{name} is {what}; {job.id} is done on a {kind}", known=True, meant=meant)


def _called(unit: Unit) -> Iterator[tuple[str, str]]:
    """Everything that a person may name, and what it is."""
    for kind in Equipment:
        if kind is not Equipment.UNIT:
            yield from ((name, f"a {CALLED[kind]}") for name, _ in _equipment(kind, unit))
    yield from ((bank.tag, "a bank of bottles") for bank in unit.banks)
    yield from ((panel.tag, "a remote panel") for panel in unit.panels)
    yield from ((backup.tag, "a nitrogen backup") for backup in unit.nitrogen_backups)
    yield (unit.reservoir.tag, "the reservoir")
    yield (unit.identity.tag, "the whole unit")
    yield ("unit", "the whole unit")


def _beside(unit: Unit, name: str) -> Iterator[str]:
    """Pieces that a person may mean with the name of another: a function and its valve, a bank and its bottles."""
    for function in unit.functions:
        if name in (function.name, function.valve.tag):
            yield from (function.name, function.valve.tag)
    for bank in unit.banks:
        if name == bank.tag:
            yield from (f"{bank.tag}/{n}" for n in range(1, bank.bottles + 1))


def _fits(job: Job, facts: dict[str, str]) -> bool:
    return all(facts.get(c.attribute) in c.allowed for c in job.conditions)


def _equipment(kind: Equipment, unit: Unit) -> list[tuple[str, dict[str, str]]]:  # noqa: PLR0911 - one a kind
    """The pieces of a kind with the attributes that a job may ask for."""
    match kind:
        case Equipment.FUNCTION:
            return [(f.name, {"kind": f.kind.value}) for f in unit.functions]
        case Equipment.FOUR_WAY_VALVE:
            return [(f.valve.tag, {"kind": f.kind.value}) for f in unit.functions]
        case Equipment.PUMP:
            return [(p.tag, {"drive": p.drive.value}) for p in unit.pumps]
        case Equipment.REGULATOR:
            return [(r.tag, {"serves": _serves(unit, r)}) for r in unit.regulators]
        case Equipment.BYPASS:
            return [(b.valve.tag, {}) for b in unit.bypasses]
        case Equipment.BOTTLE:
            return [
                (f"{b.tag}/{n}", {"separator": b.separator.value}) for b in unit.banks for n in range(1, b.bottles + 1)
            ]
        case Equipment.UNIT:
            return [("unit", {})]


def _serves(unit: Unit, item: Regulator) -> str:
    """`annular` where the line of a regulator feeds annulars only, else `manifold`."""
    kinds = {f.kind for f in unit.functions if f.fed_from == item.serves}
    return "annular" if kinds == {FunctionKind.ANNULAR} else "manifold"

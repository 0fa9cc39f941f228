"""Which equipment of a unit a job applies to."""

from provenzero.catalogue.job import Equipment, Job
from provenzero.unit.model import FunctionKind, Regulator, Unit


def applies_to(job: Job, unit: Unit) -> tuple[str, ...]:
    """Names or tags of the equipment that a job applies to, in the order of the description."""
    return tuple(name for name, facts in _equipment(job.equipment, unit) if _fits(job, facts))


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

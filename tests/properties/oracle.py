"""A second opinion on a plan: every property of a sound plan, found again from the plan JSON alone.

It shares no code with the program. Each question takes the plan as `permit --format json` writes it and gives
a verdict with its evidence; `check_all` asks all of them. A plan that contradicts itself gets no verdict but
a `CannotJudgeError`.
"""

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Any

from tests.properties.oracle_parts.circuit import CannotJudgeError, Circuit
from tests.properties.oracle_parts.events import events, joined_to_source
from tests.properties.oracle_parts.freedom import Freedom, freedoms
from tests.properties.oracle_parts.reach import Reach, origins, reach
from tests.properties.oracle_parts.readings import untrue_readings
from tests.properties.oracle_parts.stands import flood_every_stand
from tests.properties.oracle_parts.walk import State, Walk, walk

__all__ = [
    "CannotJudgeError", "Verdict", "check_all", "dead", "honest", "least", "locked", "quiet", "reversible",
]  # fmt: skip

Plan = Mapping[str, Any]
SAME_PA = 1000.0


@dataclass(frozen=True, slots=True)
class Verdict:
    holds: bool
    evidence: str


def dead(plan: Plan) -> Verdict:
    """As the work begins no line of the zone is under pressure; what only stands in a column is let be."""
    return _dead(walk(plan))


def locked(plan: Plan) -> Verdict:
    """Move what no lock holds as you like: no pressure comes to the zone."""
    return _locked(walk(plan))


def least(plan: Plan) -> Verdict:
    """Each lock is needed, each is where the list says, and what must stay vented stays vented."""
    return _least(walk(plan))


def quiet(plan: Plan) -> Verdict:
    """Nothing moves, starts or blows that the step doesn't announce."""
    return _quiet(walk(plan))


def honest(plan: Plan) -> Verdict:
    """Every reading that a step promises is one that the circuit can't but show."""
    return _honest(walk(plan))


def reversible(plan: Plan) -> Verdict:
    """In the end the unit is as it was in the beginning."""
    return _reversible(walk(plan))


def check_all(plan: Plan) -> dict[str, Verdict]:
    """The verdict on each property, under its name."""
    walked = walk(plan)
    questions: dict[str, Callable[[Walk], Verdict]] = {
        "dead": _dead,
        "locked": _locked,
        "least": _least,
        "quiet": _quiet,
        "honest": _honest,
        "reversible": _reversible,
    }
    return {name: question(walked) for name, question in questions.items()}


def _verdict(faults: list[str], otherwise: str) -> Verdict:
    return Verdict(not faults, "; ".join(faults) if faults else otherwise)


def _dead(walked: Walk) -> Verdict:
    circuit, pressures = walked.circuit, walked.during_work.pressures
    faults = [
        f"{circuit.ids[line]} may hold {pressures.text(line)}"
        for line in walked.zone
        if pressures.high[line] > circuit.head_pag[line]
    ]
    if not walked.zone:
        faults.append("the zone is empty: nothing was shown of anything")
    return _verdict(faults, f"{len(walked.zone)} lines of the zone are at zero")


def _hazard(walked: Walk, worn: frozenset[str]) -> tuple[Reach, Mapping[str, Freedom]]:
    state = walked.during_work
    free = freedoms(walked.circuit, state, worn)
    return reach(walked.circuit, origins(walked.circuit, state), free), free


def _locked(walked: Walk) -> Verdict:
    circuit, state = walked.circuit, walked.during_work
    found, free = _hazard(walked, state.locked)
    stand_by_stand = flood_every_stand(circuit, frozenset(origins(circuit, state)), free)
    if stand_by_stand is not None and stand_by_stand != found.hot:
        differ = circuit.named(stand_by_stand ^ found.hot)
        raise AssertionError(f"the two searches disagree on where pressure can come: {differ}")
    faults = [found.path(line) for line in walked.zone if line in found.hot]
    how = "by growth only" if stand_by_stand is None else "by growth and stand by stand"
    return _verdict(faults, f"{len(found.hot)} lines can be under pressure, none of them in the zone ({how})")


def _least(walked: Walk) -> Verdict:
    worn = walked.during_work.locked
    reached, unvented = _weak_spots(walked, worn)
    faults = list(walked.misuse)
    faults += [f"{walked.circuit.ids[line]} has no sure vent" for line in sorted(unvented)]
    for number, tag in sorted(walked.during_work.locks.items()):
        reached_without, unvented_without = _weak_spots(walked, worn - {tag})
        if reached_without <= reached and unvented_without <= unvented:
            faults.append(f"without lock {number} on {tag} nothing comes to the zone and every vent stays")
    return _verdict(faults, f"each of {len(worn)} locks is needed")


def _weak_spots(walked: Walk, worn: frozenset[str]) -> tuple[frozenset[int], frozenset[int]]:
    """Lines of the zone that pressure can come to, and lines whose vent can be lost, with these locks on."""
    found, free = _hazard(walked, worn)
    vented = _surely_vented(walked.circuit, walked.during_work, worn, free, found.hot)
    return found.hot & frozenset(walked.zone), frozenset(walked.open_to_vent) - vented


def _surely_vented(
    circuit: Circuit,
    state: State,
    worn: frozenset[str],
    free: Mapping[str, Freedom],
    hot: frozenset[int],
) -> frozenset[int]:
    """Lines joined to a vent by passages that are sure and that nobody can close."""
    near: dict[int, set[int]] = {}
    for tag, device in circuit.devices.items():
        if device.movable and tag not in worn:
            continue
        ways = [device.positions[position] for position in free[tag].given(hot)]
        pairs = [{(w.start, w.end) for w in some if w.kind == "open" and w.certain} for some in ways]
        for one, other in frozenset.intersection(*map(frozenset, pairs)):
            near.setdefault(one, set()).add(other)
            near.setdefault(other, set()).add(one)
    todo = [line for line, vent in enumerate(circuit.vent) if vent]
    found = set(todo)
    while todo:
        fresh = near.get(todo.pop(), set()) - found
        found |= fresh
        todo += fresh
    return frozenset(found)


def _quiet(walked: Walk) -> Verdict:
    happened = list(events(walked))
    faults = [f"in {e.moment.name} {e.text}, unannounced" for e in happened if not e.announced]
    return _verdict(faults, f"{len(walked.moments)} steps, {len(happened)} announced events and no other")


def _honest(walked: Walk) -> Verdict:
    number = sum(len(moment.step.get("expect") or ()) for moment in walked.moments)
    circuit, pressures = walked.circuit, walked.during_work.pressures
    faults = [
        f"{circuit.ids[line]} is called dead and may hold {pressures.text(line)}"
        for line in walked.said_dead
        if pressures.high[line] > circuit.head_pag[line]
    ]
    faults += untrue_readings(walked)
    return _verdict(faults, f"{number} promised readings contain what is computed")


def _reversible(walked: Walk) -> Verdict:
    start, end = walked.start, walked.end
    faults = [
        f"{tag} ends in {end.positions[tag]}, began in {position}"
        for tag, position in start.positions.items()
        if end.positions[tag] != position
    ]
    faults += [f"lock {number} is still on {tag}" for number, tag in sorted(end.locks.items())]
    faults += _pressures_not_restored(walked)
    return _verdict(faults, "positions, locks and pressures are those of the beginning")


def _pressures_not_restored(walked: Walk) -> list[str]:
    """Lines that end unlike they began.

    A line that was opened, or emptied and filled again, may hold another interval, if it holds pressure now
    where it did at first, as far as a source stands behind it. Every other line has to be as it was.
    """
    circuit, first, last = walked.circuit, walked.start.pressures, walked.end.pressures
    supplied = joined_to_source(circuit, walked.start) | joined_to_source(circuit, walked.end)
    opened = set(walked.zone)
    for moment in walked.moments:
        highs = moment.after.pressures.high
        opened |= {k for k, high in enumerate(highs) if high <= circuit.head_pag[k] and high < first.high[k]}
    faults = []
    for line, name in enumerate(circuit.ids):
        apart = max(abs(first.low[line] - last.low[line]), abs(first.high[line] - last.high[line]))
        # Where nobody knew whether there was pressure at first, none at the end is no fault.
        alike = (first.high[line] > 0) is (last.high[line] > 0) or first.low[line] <= 0
        if apart > SAME_PA and not (line in opened and (alike or line not in supplied)):
            faults.append(f"{name} ends at {last.text(line)}, began at {first.text(line)}")
    return faults

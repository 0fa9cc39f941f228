"""Least: no lock is there for nothing. Without any one of them a source gets in, or a line loses its open vent."""

from provenzero.plan.model import Plan, Verdict
from provenzero.proof.locked import reached_exhaustively
from provenzero.proof.replay import Replay
from provenzero.state.held import held_open


def least(plan: Plan, run: Replay) -> Verdict:
    """Whether each lock, left out alone, would break the isolation."""
    locks = run.isolated().locks
    zone = set(plan.zone)
    held = held_open(run.wiring, locks, run.isolated().state.pressures)
    lost = [k for k in plan.open_to_vent if k not in held]
    if lost:
        return Verdict(holds=False, evidence=f"not held open to a vent: {', '.join(lost)}")
    idle = []
    for tag in locks:
        fewer = {k: v for k, v in locks.items() if k != tag}
        still_held = held_open(run.wiring, fewer, run.isolated().state.pressures)
        loses = any(k not in still_held for k in plan.open_to_vent)
        if not loses and not reached_exhaustively(plan, run, fewer) & zone:
            idle.append(tag)
    if idle:
        return Verdict(holds=False, evidence=f"locks that nothing depends on: {', '.join(idle)}")
    return Verdict(
        holds=True,
        evidence=f"each of the {len(locks)} locks was left out once; each time a protection was gone",
    )

"""Reversible: the way back ends where the plan began, with every lock off."""

from provenzero.plan.model import Plan, Verdict
from provenzero.proof.replay import Replay


def reversible(plan: Plan, run: Replay) -> Verdict:
    """Whether positions are as they were, no lock is on, and what was surely under pressure is so again."""
    end = run.moments[-1]
    moved = [k for k, v in end.state.positions.items() if v != run.start.positions[k]]
    if moved:
        return Verdict(holds=False, evidence=f"not where they stood: {', '.join(moved)}")
    if end.locks:
        return Verdict(holds=False, evidence=f"locks left on: {', '.join(end.locks)}")
    sure = [k for k in run.start.fed if run.start.low(k) > 0.0]
    unfed = [k for k in sure if k not in end.state.fed]
    if unfed:
        return Verdict(holds=False, evidence=f"not under pressure again: {', '.join(sorted(unfed))}")
    changed = [k for k in sure if end.state.pressures[k] != run.start.pressures[k]]
    if changed:
        return Verdict(holds=False, evidence=f"another pressure than before: {', '.join(sorted(changed))}")
    return Verdict(holds=True, evidence=f"{len(plan.network.devices)} devices back in position, all locks off")

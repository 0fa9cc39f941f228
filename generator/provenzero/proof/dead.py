"""Dead: after the last isolation step no line of the zone can hold pressure (a standing fluid column apart)."""

from provenzero.network.model import Medium
from provenzero.plan.model import Plan, Verdict
from provenzero.proof.replay import Replay


def dead(plan: Plan, run: Replay) -> Verdict:
    """Whether every line of the zone is at zero before the work starts."""
    state = run.isolated().state
    lines = plan.network.lines
    alive = [k for k in plan.zone if k not in run.wiring.vents and state.high(k) > lines[k].static_head_pag]
    if alive:
        return Verdict(holds=False, evidence=f"may hold pressure: {', '.join(alive)}")
    heads = [k for k in plan.zone if state.high(k) > 0.0 and lines[k].medium is Medium.CONTROL_FLUID]
    apart = f"; a standing fluid column remains on {', '.join(heads)}" if heads else ""
    return Verdict(holds=True, evidence=f"{len(plan.zone)} lines of the zone are at zero{apart}")

"""Quiet and Honest: no step makes happen what it does not announce, and no reading is promised that is not sure."""

from provenzero.plan.model import Plan, Verdict
from provenzero.proof.replay import Moment, Replay


def quiet(plan: Plan, run: Replay) -> Verdict:
    """Whether nothing moves, starts or is let out unannounced in any step."""
    loud = [f"step {m.step.id}: {words}" for m in run.moments for words in _unannounced(m)]
    if loud:
        return Verdict(holds=False, evidence="; ".join(loud))
    announced = sum(m.step.moves_function is not None or m.step.starts_pump is not None for m in run.moments)
    return Verdict(
        holds=True,
        evidence=f"{len(plan.steps)} steps simulated; {announced} of them announce a movement or a start",
    )


def _unannounced(moment: Moment) -> list[str]:
    if moment.effect is None:
        return []
    moves = set((moment.step.moves_function or "").split(", "))
    starts = set((moment.step.starts_pump or "").split(", "))
    found = [f"{name} moves" for name in moment.effect.moved if name not in moves]
    found += [f"{name} starts" for name in moment.effect.started if name not in starts]
    found += [f"{name} is let out to a vent" for name in moment.effect.live_vented]
    return found


def honest(plan: Plan, run: Replay) -> Verdict:
    """Whether every promised reading contains what the simulation says the gauge may show."""
    wrong = []
    count = 0
    for moment in run.moments:
        for expect in moment.step.expect:
            count += 1
            low, high = moment.state.pressures[expect.line]
            if expect.low_pag > low or expect.high_pag < high:
                wrong.append(f"step {moment.step.id}: {expect.gauge} may read between {low:.0f} and {high:.0f} Pa")
    if wrong:
        return Verdict(holds=False, evidence="; ".join(wrong))
    return Verdict(holds=True, evidence=f"{count} predicted readings held against the simulation")

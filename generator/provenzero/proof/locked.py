"""Locked: whatever stands free may stand anywhere, and still no source reaches the zone. Shown two ways."""

from collections.abc import Mapping

from provenzero.network.model import DeviceTag
from provenzero.plan.model import Plan, Verdict
from provenzero.proof.exhaust import ever_pressurised
from provenzero.proof.replay import Replay
from provenzero.state.may import pressurised, reach


def locked(plan: Plan, run: Replay) -> Verdict:
    """Whether the locks that are on before the work keep every source from the zone."""
    moment = run.isolated()
    zone = set(plan.zone)
    flood = reach(run.wiring, moment.locks, moment.state.pressures)
    reached = [k for k in plan.zone if k in flood.lines]
    if reached:
        return Verdict(holds=False, evidence=" > ".join(flood.path(reached[0])))
    second = reached_exhaustively(plan, run, moment.locks)
    if second & zone:
        return Verdict(holds=False, evidence=f"the exhaustive search reaches {', '.join(sorted(second & zone))}")
    count = len(moment.locks)
    return Verdict(holds=True, evidence=f"{count} locks; every position of every other device tried, in two ways")


def reached_exhaustively(plan: Plan, run: Replay, locks: Mapping[DeviceTag, str]) -> frozenset[str]:
    """Lines the exhaustive search can put under pressure with these locks."""
    holding = pressurised(run.wiring, run.isolated().state.pressures)
    return frozenset(str(k) for k in ever_pressurised(plan.network, locks, holding))

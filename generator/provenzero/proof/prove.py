"""All properties of one plan."""

from provenzero.plan.model import Plan, Verdict
from provenzero.proof.dead import dead
from provenzero.proof.least import least
from provenzero.proof.locked import locked
from provenzero.proof.quiet import honest, quiet
from provenzero.proof.replay import replay
from provenzero.proof.reversible import reversible


def prove(plan: Plan) -> dict[str, Verdict]:
    """Show each property anew on the plan's network: dead, locked, least, quiet, honest, reversible."""
    run = replay(plan)
    checks = {
        "dead": dead,
        "locked": locked,
        "least": least,
        "quiet": quiet,
        "honest": honest,
        "reversible": reversible,
    }
    return {name: check(plan, run) for name, check in checks.items()}

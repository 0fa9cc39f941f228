"""Everything that is signed: start of work, re-checks, test lifts, hand-over, lock count, hand-back, closing."""

from provenzero.document.brief import Brief
from provenzero.document.model import Blank, Block, Cell, Column, SignOff, SignOffs, Table, Text

_RECHECKS = 6
_SHIFTS = 4
_NAMED_GAUGES = 4


def start(brief: Brief) -> SignOffs:
    """Issue and acceptance, after verification and before the work."""
    boxes = brief.wording.points("start.boxes")
    items = tuple(SignOff(statement=brief.say(f"start.{key}"), boxes=boxes) for key in ("issue", "acceptance"))
    return SignOffs(title=brief.say("start.title"), items=items)


def recheck(brief: Brief) -> Table:
    """The log of looking again whether pressure builds up."""
    seconds = brief.context.recheck_s
    interval = brief.say("recheck.interval_unknown") if seconds is None else brief.measure.duration(seconds)
    gauges = tuple(dict.fromkeys(e.gauge for s in brief.plan.steps for e in s.expect if s.reason == "zero_read"))
    shown = gauges[:_NAMED_GAUGES]
    titles = [brief.say("recheck.gauge", gauge=tag) for tag in shown]
    if not shown or len(gauges) > len(shown):
        titles.append(brief.say("recheck.gauges"))
    columns = (
        Column(title=brief.say("recheck.due"), percent=12),
        Column(title=brief.say("recheck.time"), percent=12),
        *(Column(title=title, percent=48 // len(titles)) for title in titles),
        Column(title=brief.say("recheck.bleeds"), percent=14),
        Column(title=brief.say("recheck.by"), percent=14),
    )
    rows: tuple[tuple[Cell, ...], ...] = tuple((Blank(),) * len(columns) for _ in range(_RECHECKS))
    return Table(
        title=brief.say("recheck.title"),
        columns=columns,
        rows=rows,
        before=(brief.say("recheck.before", interval=interval),),
    )


def lift(brief: Brief) -> Table:
    """Energy back for a test in the middle of the work: five rows in order."""
    columns = (
        Column(title=brief.say("lift.stage"), percent=56),
        Column(title=brief.say("lift.by"), percent=26),
        Column(title=brief.say("lift.when"), percent=18),
    )
    rows: tuple[tuple[Cell, ...], ...] = tuple(
        (Text(words=stage, strong=True), Blank(), Blank()) for stage in brief.wording.points("lift.stages")
    )
    return Table(title=brief.say("lift.title"), columns=columns, rows=rows, before=(brief.say("lift.before"),))


def count(brief: Brief) -> Table:
    """Locks, tags and test gauges counted back."""
    keys = ("expected", "back", "tags", "gauges", "left")
    shares = (14, 16, 16, 18, 36)
    columns = tuple(Column(title=brief.say(f"count.{k}"), percent=p) for k, p in zip(keys, shares, strict=True))
    row: tuple[Cell, ...] = (Text(words=str(len(brief.plan.locks)), strong=True), Blank(), Blank(), Blank(), Blank())
    return Table(title=brief.say("count.title"), columns=columns, rows=(row,))


def handover(brief: Brief) -> Table:
    """One row a shift, signed by both."""
    shares = (("off", 19), ("on", 19), ("time", 9), ("locks", 10), ("zero", 10), ("open", 21), ("until", 12))
    columns = tuple(Column(title=brief.say(f"handover.{key}"), percent=percent) for key, percent in shares)
    rows: tuple[tuple[Cell, ...], ...] = tuple((Blank(),) * len(columns) for _ in range(_SHIFTS))
    return Table(title=brief.say("handover.title"), columns=columns, rows=rows, before=(brief.say("handover.before"),))


def closing(brief: Brief) -> tuple[Block, ...]:
    """Hand-back by two people, cancellation, yearly inspection."""
    boxes = brief.wording.points("closing.boxes")

    def signed(title: str, *keys: str) -> SignOffs:
        items = tuple(SignOff(statement=brief.say(f"closing.{key}"), boxes=boxes) for key in keys)
        return SignOffs(title=brief.say(f"closing.{title}"), items=items)

    return (
        signed("hand_back_title", "done", "ready"),
        signed("cancel_title", "cancelled"),
        signed("inspection_title", "inspection"),
    )

"""The isolation register, the roster of the work party and the table of zero shown twice."""

from collections.abc import Sequence

from provenzero.document.brief import Brief
from provenzero.document.model import Blank, Block, Bullets, Cell, Column, Table, Text
from provenzero.network.model import LineId, Medium
from provenzero.plan.instruments import joined_lines
from provenzero.plan.model import Lock, Step, StepKind
from provenzero.state.model import wire

_COLUMNS = (
    ("number", 6),
    ("device", 23),
    ("positions", 14),
    ("purpose", 30),
    ("placed", 9),
    ("checked", 9),
    ("removed", 9),
)
_ROSTER = (("name", 32), ("lock", 14), ("shift", 10), ("on", 22), ("off", 22))
_ZERO = (("line", 27), ("first", 20), ("read_first", 11), ("second", 20), ("read_second", 11), ("by", 11))
_PARTY = 6
_TWO = 2


def register(brief: Brief) -> tuple[Block, ...]:
    """One row for each lock, and what no lock can hold."""
    columns = tuple(Column(title=brief.say(f"register.{key}"), percent=percent) for key, percent in _COLUMNS)
    table = Table(
        title=brief.say("register.title"),
        columns=columns,
        rows=tuple(_lock(brief, lock) for lock in brief.plan.locks),
        before=(brief.say("register.before", legend=brief.say("register.legend")),),
    )
    if not brief.plan.unheld:
        return (table,)
    points = tuple(brief.say("register.unheld", name=brief.line(k)) for k in brief.plan.unheld)
    return (table, Bullets(title=brief.say("register.unheld_title"), points=points))


def _lock(brief: Brief, lock: Lock) -> tuple[Cell, ...]:
    device = brief.device(lock.device)
    place = ", ".join(words for words in (device.tag, device.name, device.location) if words)
    normal, locked = brief.position(device.normal), brief.position(lock.position)
    return (
        Text(words=str(lock.number), strong=True),
        Text(words=place, strong=True),
        Text(words=brief.say("register.position", locked=locked, normal=normal), strong=True),
        Text(words="\n".join(_purpose(brief, lock))),
        Blank(),
        Blank(),
        Blank(),
    )


def _purpose(brief: Brief, lock: Lock) -> list[str]:
    words = [brief.say(f"register.{lock.purpose.value}")]
    held = brief.held_back(lock)
    if held:
        words.append(brief.say("register.holds", names=brief.some(held)))
    if lock.keeps_open:
        words.append(brief.say("register.keeps", names=brief.lines(lock.keeps_open)))
    return words


def roster(brief: Brief) -> Table:
    """Everyone of the work party with a personal lock."""
    columns = tuple(Column(title=brief.say(f"roster.{key}"), percent=percent) for key, percent in _ROSTER)
    rows: tuple[tuple[Cell, ...], ...] = tuple((Blank(),) * len(_ROSTER) for _ in range(_PARTY))
    return Table(title=brief.say("roster.title"), columns=columns, rows=rows, before=(brief.say("roster.before"),))


def zero_table(brief: Brief) -> Table:
    """Two independent indications for each group of lines that share one pressure."""
    rows = [_zero(brief, brief.lines(lines, most=4), shown) for lines, shown in indications(brief)]
    shown = {line for lines, _ in indications(brief) for line in lines}
    lines = brief.plan.network.lines
    for key in brief.plan.zone:
        if key not in shown and not lines[key].vent:
            rows.append(_zero(brief, brief.line(key), _other(brief, key)))
    columns = tuple(Column(title=brief.say(f"zero_table.{key}"), percent=percent) for key, percent in _ZERO)
    return Table(
        title=brief.say("zero_table.title"),
        columns=columns,
        rows=tuple(rows),
        before=(brief.say("zero_table.before"),),
    )


def indications(brief: Brief) -> list[tuple[tuple[LineId, ...], list[str]]]:
    """For each group of zone lines with one pressure: the two indications of its zero, or as many as there are."""
    steps = brief.plan.steps
    read = [s for s in steps if s.kind is StepKind.READ_ZERO]
    fitted = [s for s in steps if s.kind is StepKind.TEST_GAUGE]
    groups = [s.lines for s in read]
    seen = {line for lines in groups for line in lines}
    groups += _together(brief, [k for s in fitted for k in s.lines if k not in seen])
    found = []
    for lines in groups:
        words = [w for s in read if s.lines == lines for w in _readings(brief, s)]
        for step in fitted:
            if set(lines) <= set(step.lines):
                words += [brief.say("zero_table.test_gauge", step=step.id)] * (_TWO - len(words))
        found.append((lines, words))
    return found


def test_gauges(brief: Brief) -> int:
    """How many readings are taken with a test gauge."""
    wanted = {brief.say("zero_table.test_gauge", step=s.id) for s in brief.plan.steps if s.kind is StepKind.TEST_GAUGE}
    return sum(words in wanted for _, shown in indications(brief) for words in shown)


def _together(brief: Brief, lines: Sequence[LineId]) -> list[tuple[LineId, ...]]:
    """Lines grouped by shared pressure in the isolated state."""
    wiring, state = wire(brief.plan.network), brief.plan.isolated()
    left, groups = list(dict.fromkeys(lines)), []
    while left:
        same = joined_lines(wiring, state, left[0])
        groups.append(tuple(k for k in left if k in same))
        left = [k for k in left if k not in same]
    return groups


def _readings(brief: Brief, step: Step) -> list[str]:
    shown = [(e.gauge, brief.measure.pressures(brief.band(e))) for e in step.expect]
    return [brief.say("zero_table.cell", gauge=gauge, expected=words, step=step.id) for gauge, words in shown]


def _other(brief: Brief, line: LineId) -> list[str]:
    """A line without any gauge step: a drive shows by its try-start; electric ones by a voltage tester as well."""
    found = [
        brief.say("zero_table.try_start", step=step.id)
        for step in brief.plan.steps
        if step.kind is StepKind.TRY_START and line in step.lines
    ]
    if brief.plan.network.lines[line].medium is Medium.ELECTRIC:
        found.append(brief.say("zero_table.voltage"))
    return found


def _zero(brief: Brief, name: str, indications: list[str]) -> tuple[Cell, ...]:
    missing = [brief.say("zero_table.nothing")] * (_TWO - len(indications))
    first, second = [*indications, *missing][:_TWO]
    return (Text(words=name, strong=True), Text(words=first), Blank(), Text(words=second), Blank(), Blank())

"""Every energy of the unit: its type and size now, its hazard, what stands against it and what is left of it."""

from collections.abc import Iterable, Sequence
from dataclasses import dataclass

from provenzero.document.brief import Brief
from provenzero.document.figures import Band
from provenzero.document.model import Column, SignOff, SignOffs, Table, Text
from provenzero.failure.grade import IsolationGrade
from provenzero.network.devices.pumps import LIQUID
from provenzero.network.model import LineId, Medium, Source, SourceKind
from provenzero.unit.model import Bank

_COLUMNS = (("source", 24), ("type", 13), ("size", 17), ("hazard", 17), ("control", 16), ("after", 13))


@dataclass(frozen=True, slots=True, kw_only=True)
class _Group:
    """Sources that stand in one row. `left_pag`: what is left of them, where it is known better than by the plan."""

    name: str
    type: str
    sources: tuple[Source, ...]
    energy_j: Band | None = None
    left_pag: Band | None = None


def energies(brief: Brief) -> Table:
    """The energy table, gas side and fluid side of the bottles apart, trapped lines last."""
    rows = _merged([_row(brief, group) for group in _groups(brief)]) + _trapped(brief)
    columns = tuple(Column(title=brief.say(f"energy.{key}"), percent=percent) for key, percent in _COLUMNS)
    return Table(
        title=brief.say("energy.title"), columns=columns, rows=tuple(rows), before=(brief.say("energy.before"),)
    )


def acknowledged(brief: Brief) -> SignOffs:
    """The signature that the energies are known before anything is shut down."""
    item = SignOff(statement=brief.say("energy.acknowledged"), boxes=brief.wording.points("closing.boxes"))
    return SignOffs(title="", items=(item,))


def _merged(rows: Sequence[tuple[Text, ...]]) -> list[tuple[Text, ...]]:
    """Rows that differ in nothing but the name, as one."""
    names: dict[tuple[Text, ...], list[str]] = {}
    for name, *rest in rows:
        names.setdefault(tuple(rest), []).append(name.words)
    return [(Text(words="; ".join(same), strong=True), *rest) for rest, same in names.items()]


def _groups(brief: Brief) -> Iterable[_Group]:
    left = list(brief.plan.network.sources)
    for bank in brief.plan.unit.banks:
        own = [s for s in left if s.id == bank.tag or s.id.startswith(f"{bank.tag}/")]
        left = [s for s in left if s not in own]
        yield from _bank(brief, bank, own)
    for source in left:
        energy = brief.figures.energy_j.get(source.id)
        yield _Group(name=source.name, type=_type(brief, source), sources=(source,), energy_j=energy)


def _bank(brief: Brief, bank: Bank, own: Sequence[Source]) -> Iterable[_Group]:
    """Fluid side, nitrogen that is let out and nitrogen that stays, each with its energy if it is the whole bank's."""
    figures = brief.figures.bank(bank.tag)
    charged = None if figures is None else figures.energy_charged_j
    gas = [s for s in own if brief.plan.network.lines[s.line].medium is Medium.NITROGEN]
    fluid = tuple(s for s in own if s not in gas)
    if fluid:
        name = brief.say("energy.fluid_group", bank=bank.tag)
        yield _Group(name=name, type="bank", sources=fluid, energy_j=charged)
    out = tuple(s for s in gas if _emptied(brief, [s]))
    stays = tuple(s for s in gas if s not in out)
    drained = None if figures is None or (out and stays) else figures.energy_drained_j
    if out:
        name = brief.some(s.name for s in out)
        yield _Group(name=name, type="gas", sources=out, energy_j=drained)
    if stays:
        key = "energy.gas_others" if out else "energy.gas_group"
        name = brief.say(key, bank=bank.tag, count=str(len(stays)))
        precharge = None
        if figures is not None and all(brief.plan.isolated().high(s.line) <= 0.0 for s in fluid):
            precharge = figures.precharge_pag
        yield _Group(name=name, type="gas", sources=stays, energy_j=drained, left_pag=precharge)


def _type(brief: Brief, source: Source) -> str:
    medium = brief.plan.network.lines[source.line].medium
    if source.line == LIQUID:
        return "liquid"
    if source.kind is SourceKind.LIVE:
        return {Medium.ELECTRIC: "electric", Medium.AIR: "air"}.get(medium, "pump")
    return "gas" if medium is Medium.NITROGEN else "other"


def _row(brief: Brief, group: _Group) -> tuple[Text, ...]:
    return (
        Text(words=group.name, strong=True),
        Text(words=brief.say(f"energy.types.{group.type}")),
        Text(words=_size(brief, group)),
        Text(words=brief.say(f"energy.hazards.{group.type}")),
        Text(words=_control(brief, group), strong=True),
        Text(words=_after(brief, group)),
    )


def _size(brief: Brief, group: _Group) -> str:
    if group.type == "electric":
        return brief.say("energy.voltage")
    high = max(max(s.pressure_pag, brief.plan.start().high(s.line)) for s in group.sources)
    words = brief.say("energy.up_to", pressure=brief.measure.pressure(high))
    if group.type in {"bank", "gas"}:
        words += "; " + brief.say("energy.energy_each", energy=brief.measure.energies(group.energy_j))
    return words


def _control(brief: Brief, group: _Group) -> str:
    numbers = _numbers(brief, group.sources)
    graded = [g for g in brief.plan.grades if any(g.source == s.id for s in group.sources)]
    if graded and all(g.grade is IsolationGrade.DRAINED for g in graded):
        return _locked(brief, "drained", numbers) if numbers else brief.say("energy.let_out")
    if numbers:
        return _locked(brief, "locked", numbers)
    if _emptied(brief, group.sources):
        return brief.say("energy.let_out")
    if not ("locked" in brief.proof and brief.proof["locked"].holds):
        return brief.say("energy.not_shown")
    return brief.say("energy.retained" if group.type == "gas" else "energy.no_way")


def _numbers(brief: Brief, sources: Sequence[Source]) -> list[int]:
    """Locks that stand against these sources: by the grade, by what each lock holds back, by the drive they cut."""
    ids = {s.id for s in sources}
    tags = [tag for g in brief.plan.grades if g.source in ids for tag in g.barriers]
    tags += [lock.device for lock in brief.plan.locks if any(way[0] in ids for way in lock.holds_back)]
    feeds = {f.id for s in sources for f in _feeds(brief, s)}
    tags += [tag for g in brief.plan.grades if g.source in feeds for tag in g.barriers]
    dead = {s.drive for s in sources if s.drive is not None and brief.plan.isolated().high(s.drive) <= 0.0}
    tags += [lock.device for lock in brief.plan.locks if dead & _touched(brief, lock.device)]
    return brief.lock_numbers(tags)


def _feeds(brief: Brief, pump: Source) -> list[Source]:
    """The supplies that can drive a pump, through whatever device stands between."""
    network = brief.plan.network
    if pump.drive is None:
        return []
    medium = network.lines[pump.drive].medium
    seen, edge = {pump.drive}, [pump.drive]
    while edge:
        here = edge.pop()
        for tag in network.devices:
            touched = _touched(brief, tag)
            new = {k for k in touched if network.lines[k].medium is medium and not network.lines[k].vent} - seen
            if here in touched and new:
                seen |= new
                edge += new
    return [s for s in network.sources if s.kind is SourceKind.LIVE and s.drive is None and s.line in seen]


def _touched(brief: Brief, tag: str) -> set[LineId]:
    return {line for items in brief.device(tag).positions.values() for p in items for line in (p.source, p.target)}


def _locked(brief: Brief, key: str, numbers: Sequence[int]) -> str:
    return brief.say(f"energy.{key}", numbers=", ".join(str(n) for n in numbers))


def _emptied(brief: Brief, sources: Sequence[Source]) -> bool:
    start, state = brief.plan.start(), brief.plan.isolated()
    return all(
        s.kind is SourceKind.STORED and start.high(s.line) > brief.head_pag(s.line) >= state.high(s.line)
        for s in sources
    )


def _after(brief: Brief, group: _Group) -> str:
    state = brief.plan.isolated()
    if group.left_pag is not None:
        return brief.say("energy.precharge", pressure=brief.measure.pressures(group.left_pag))
    if group.sources[0].kind is SourceKind.LIVE:
        drive = group.sources[0].drive
        return brief.say("energy.dead" if drive is not None and state.high(drive) <= 0.0 else "energy.live")
    return _left(brief, [s.line for s in group.sources])


def _left(brief: Brief, lines: Sequence[LineId]) -> str:
    state = brief.plan.isolated()
    high = max(state.high(k) for k in lines)
    if high <= 0.0:
        return brief.say("energy.zero")
    words = brief.measure.pressure(high)
    if all(state.high(k) <= brief.head_pag(k) for k in lines):
        return brief.say("energy.head", pressure=words)
    return brief.say("energy.stays", pressure=words)


def _trapped(brief: Brief) -> list[tuple[Text, ...]]:
    """One row for the lines that hold pressure without being a store of it."""
    sources = {s.line for s in brief.plan.network.sources if s.kind is SourceKind.STORED}
    start, lines = brief.plan.start(), brief.plan.network.lines
    held = [
        k
        for k in brief.plan.dead
        if k not in sources and lines[k].medium is not Medium.ELECTRIC and start.high(k) > brief.head_pag(k)
    ]
    if not held:
        return []
    vents = [lock.number for lock in brief.plan.locks if set(lock.keeps_open) & set(held)]
    control = _locked(brief, "drained", sorted(vents)) if vents else brief.say("energy.let_out")
    row = (
        Text(words=brief.say("energy.trapped_group", names=brief.lines(held)), strong=True),
        Text(words=brief.say("energy.types.trapped")),
        Text(words=brief.say("energy.up_to", pressure=brief.measure.pressure(max(start.high(k) for k in held)))),
        Text(words=brief.say("energy.hazards.trapped")),
        Text(words=control, strong=True),
        Text(words=_left(brief, held)),
    )
    return [row]

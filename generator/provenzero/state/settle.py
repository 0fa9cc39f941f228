"""From positions and the pressures before to the pressures after: what the circuit does once hands are off.

Lines joined by open passages share one pressure (a group). A group that holds a vent and no live source falls to
zero. Compressed gas and running pumps are stiff: they decide the pressure of their group and feed onward through
checks and regulators. Everything else keeps what it had, as an interval; whatever could leak backwards through a
check or a regulator lowers the low end, so that no reading is promised that is not sure.
"""

from collections.abc import Mapping
from dataclasses import dataclass

from provenzero.network.model import DeviceTag, LineId, Medium, PassageKind, Source, SourceKind
from provenzero.state.model import DEAD, Interval, Wiring

_ROUNDS = 60
_ATTEMPTS = 5


@dataclass(frozen=True, slots=True, kw_only=True)
class Settled:
    """The pressures after settling, which lines are fed, which by gas joined to them, and what reaches a vent."""

    pressures: Mapping[LineId, Interval]
    fed: frozenset[LineId]
    gassed: frozenset[LineId]
    live_vented: tuple[str, ...]
    live_drives: frozenset[str]
    positions: Mapping[DeviceTag, str]


@dataclass(slots=True)
class _Group:
    low: float
    high: float
    vent: bool
    stiff: bool
    gas: bool = False
    bottle: bool = False
    live: bool = False
    drained: bool = False


@dataclass(frozen=True, slots=True)
class _Edge:
    kind: PassageKind
    source: int
    target: int
    limit: float
    certain: bool


def settle(wiring: Wiring, positions: Mapping[DeviceTag, str], before: Mapping[LineId, Interval]) -> Settled:
    """Settle the circuit with these positions, starting from these pressures [Pa gauge]."""
    standing = dict(positions)
    settled = _settle(wiring, standing, before)
    for _ in range(_ATTEMPTS):
        moved = _on_loss(wiring, positions, settled.pressures)
        if moved == standing:
            break
        standing = moved
        settled = _settle(wiring, standing, before)
    return settled


def _on_loss(
    wiring: Wiring, positions: Mapping[DeviceTag, str], pressures: Mapping[LineId, Interval]
) -> dict[DeviceTag, str]:
    standing = dict(positions)
    for tag, device in wiring.network.devices.items():
        if device.on_loss is not None and pressures[device.on_loss.line][1] <= 0.0:
            standing[tag] = device.on_loss.position
    return standing


def _settle(wiring: Wiring, positions: Mapping[DeviceTag, str], before: Mapping[LineId, Interval]) -> Settled:
    group_of, edges = _groups(wiring, positions)
    groups = _begin(wiring, group_of, before)
    live: set[str] = set()
    sources = wiring.network.sources
    for _ in range(_ROUNDS):
        changed = False
        for source in sources:
            if source.kind is SourceKind.LIVE and source.id not in live:
                driven = source.drive is None or groups[group_of[source.drive]].high > 0.0
                if driven:
                    live.add(source.id)
                    _feed(groups[group_of[source.line]], source)
                    changed = True
        if changed or not _:
            _drain(groups, edges)
        changed |= sum(_pass_on(groups, edge) for edge in edges) > 0
        if not changed:
            break
    pressures = {line: (groups[g].low, groups[g].high) for line, g in group_of.items()}
    fed = frozenset(line for line, g in group_of.items() if groups[g].stiff and not groups[g].vent)
    gassed = frozenset(line for line, g in group_of.items() if groups[g].gas and groups[g].high > 0.0)
    vented = tuple(s.id for s in sources if s.id in live and _reaches_vent(groups, edges, group_of[s.line]))
    return Settled(
        pressures=pressures,
        fed=fed,
        gassed=gassed,
        live_vented=vented,
        live_drives=frozenset(live),
        positions=positions,
    )


def _groups(wiring: Wiring, positions: Mapping[DeviceTag, str]) -> tuple[dict[LineId, int], list[_Edge]]:
    parent: dict[LineId, LineId] = {}

    def root(line: LineId) -> LineId:
        while (up := parent.get(line)) is not None:
            line = up
        return line

    others = []
    for tag, device in wiring.network.devices.items():
        for item in device.positions[positions[tag]]:
            if item.kind is PassageKind.OPEN and item.certain:
                one, other = root(item.source), root(item.target)
                if one != other:
                    parent[one] = other
            else:
                others.append(item)
    numbers: dict[LineId, int] = {}
    group_of = {}
    for line in wiring.network.lines:
        group_of[line] = numbers.setdefault(root(line), len(numbers))
    edges = [
        _Edge(p.kind, group_of[p.source], group_of[p.target], _limit(p.kind, p.set_pag), p.certain)
        for p in others
        if group_of[p.source] != group_of[p.target]
    ]
    return group_of, edges


def _limit(kind: PassageKind, set_pag: float | None) -> float:
    if kind is PassageKind.REGULATOR and set_pag is not None:
        return set_pag
    if kind is PassageKind.RELIEF:
        return set_pag or 0.0
    return float("inf")


def _begin(wiring: Wiring, group_of: Mapping[LineId, int], before: Mapping[LineId, Interval]) -> list[_Group]:
    count = max(group_of.values()) + 1
    members: list[list[LineId]] = [[] for _ in range(count)]
    for line, number in group_of.items():
        members[number].append(line)
    bottles = {s.line for s in wiring.network.sources if s.gas}
    charged = {line for line in bottles if before[line][1] > 0.0}
    groups = []
    for lines in members:
        vent = any(line in wiring.vents for line in lines)
        if vent or wiring.network.lines[lines[0]].medium is Medium.ELECTRIC:
            groups.append(_Group(*DEAD, vent=vent, stiff=False))
            continue
        stiff = [line for line in lines if line in charged]
        # Bottles share their pressure with emptied ones beside them, so those count for the low end too.
        low = min(before[line][0] for line in ([k for k in lines if k in bottles] if stiff else lines))
        high = max(before[line][1] for line in lines)
        # An empty bottle that trapped liquid finds takes some in, and then pushes.
        bottle = any(line in bottles for line in lines)
        gas = bottle and high > 0.0
        groups.append(_Group(low, high, vent=False, stiff=gas, gas=gas, bottle=bottle))
    return groups


def _feed(group: _Group, source: Source) -> None:
    """Let a live source work on its group: an automatic or steady one holds its low, a manual pump may only raise."""
    steady = source.senses is not None or (source.drive is None and source.low_pag > 0.0)
    low = group.low
    if steady and not group.vent:
        low = max(low, source.low_pag) if group.live else source.low_pag
    group.low, group.high = low, max(group.high, source.pressure_pag)
    group.live = True
    group.stiff = True
    group.drained = False


def _drain(groups: list[_Group], edges: list[_Edge]) -> None:
    """What lies upstream of a check that opens into a vented group follows it down."""
    changed = True
    while changed:
        changed = False
        for edge in edges:
            up, down = groups[edge.source], groups[edge.target]
            open_ended = (down.vent or down.drained) and not down.live
            if (
                edge.kind is PassageKind.CHECK
                and edge.certain
                and open_ended
                and not (up.vent or up.live or up.drained)
            ):
                up.low, up.high, up.drained, up.stiff = 0.0, 0.0, True, False
                changed = True


def _pass_on(groups: list[_Group], edge: _Edge) -> bool:
    up, down = groups[edge.source], groups[edge.target]
    old = (up.low, up.high, down.low, down.high, down.stiff)
    if not edge.certain:
        _perhaps(up, down)
    elif edge.kind is PassageKind.RELIEF:
        if up.high > edge.limit and not down.vent:
            _raise(down, up.high)
    elif not (down.vent or down.drained):
        _raise(down, min(up.high, edge.limit))
        sure = min(up.low, edge.limit)
        if up.stiff and sure >= down.low:
            down.low = sure
            down.stiff = down.stiff or up.high > 0.0
        elif up.low < down.low and not down.stiff:
            down.low = up.low
        if down.high > up.high and not (up.vent or up.drained or up.gas or up.live):
            _raise(up, down.high)  # what is trapped beyond could leak back
    return old != (up.low, up.high, down.low, down.high, down.stiff)


def _raise(group: _Group, high: float) -> None:
    """Lift the high end of a group; a bottle in it takes some in, and then pushes."""
    group.high = max(group.high, high)
    if group.bottle and group.high > 0.0:
        group.gas = group.stiff = True


def _perhaps(one: _Group, other: _Group) -> None:
    """A passage that may or may not be there: either side could be at the other's pressure, neither is sure."""
    low, high = min(one.low, other.low), max(one.high, other.high)
    for group in (one, other):
        if not group.vent:
            group.low = low
            _raise(group, high)


def _reaches_vent(groups: list[_Group], edges: list[_Edge], start: int) -> bool:
    seen = {start}
    stack = [start]
    while stack:
        here = stack.pop()
        if groups[here].vent:
            return True
        for edge in edges:
            onward = edge.source == here and edge.target not in seen and edge.kind is not PassageKind.RELIEF
            if onward:
                seen.add(edge.target)
                stack.append(edge.target)
    return False

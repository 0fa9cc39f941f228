"""Whether sheets show the circuit as it is: every device once, on the lines it joins, and every line in one piece."""

from collections import Counter
from collections.abc import Iterator, Sequence

from tests.unit.drawing.faults import BOX_MARGIN, TOUCH, segments

from provenzero.drawing.marks import Marks
from provenzero.drawing.model import Box, Drawing, Group, Kind, Point, Role
from provenzero.network.model import Device, DeviceKind, LineId, Network
from provenzero.unit.model import ATMOSPHERE, RESERVOIR, Unit


def untruths(unit: Unit, network: Network, sheets: Sequence[Drawing]) -> list[str]:
    """Everything in which the sheets differ from the network."""
    return [*not_once(unit, network, sheets), *off_their_lines(network, sheets), *in_pieces(sheets)]


def not_once(unit: Unit, network: Network, sheets: Sequence[Drawing]) -> Iterator[str]:
    drawn = Counter(
        name for sheet in sheets for group in sheet.groups if group.kind is Kind.SYMBOL for name in group.names
    )
    equipment = [unit.reservoir.tag, *(p.tag for p in unit.pumps), *(p.tag for p in unit.panels)]
    equipment += [f.name for f in unit.functions] + [b.tag for b in unit.banks] + [n.tag for n in unit.nitrogen_backups]
    equipment += [port.equipment for port in network.ports if port.name == "gas" and "/" in port.equipment]
    for name in dict.fromkeys([*network.devices, *(g.tag for g in network.gauges), *equipment]):
        if drawn[name] != 1:
            yield f"{name} is drawn {drawn[name]} times"


def off_their_lines(network: Network, sheets: Sequence[Drawing]) -> Iterator[str]:
    """Each line that a device joins must end at its symbol."""
    for sheet in sheets:
        ends = {
            name: [point for piece in segments(group) for point in piece]
            for group in sheet.groups
            if group.kind is Kind.LINE
            for name in group.names
        }
        for group in sheet.groups:
            for name in group.names if group.kind is Kind.SYMBOL and group.body is not None else ():
                device = next((d for d in network.devices.values() if d.tag == name), None)
                for line in _joined(device) if device is not None else ():
                    if not any(_meets(point, group) for point in ends.get(line, ())):
                        yield f"{line} does not end at {name}"


def _joined(device: Device) -> list[LineId]:
    """The lines that must be seen at a device; what it lets out at its own place is part of its symbol."""
    if device.kind is DeviceKind.PANEL_CONTROL:
        return [device.positions["neutral"][0].source]
    found = [line for items in device.positions.values() for item in items for line in (item.source, item.target)]
    own = "closed" in device.positions
    outside = {ATMOSPHERE, RESERVOIR} if device.kind is DeviceKind.PIPING else {ATMOSPHERE} if own else set()
    return [line for line in dict.fromkeys(found) if line not in outside]


def _meets(point: Point, symbol: Group) -> bool:
    body = symbol.body or Box(0.0, 0.0, 0.0, 0.0)
    outer, inner = body.grown(TOUCH), body.grown(-BOX_MARGIN - 2 * TOUCH)
    x, y = point
    inside = outer.left <= x <= outer.right and outer.top <= y <= outer.bottom
    return inside and not (inner.left < x < inner.right and inner.top < y < inner.bottom)


def in_pieces(sheets: Sequence[Drawing]) -> Iterator[str]:
    """A line may lie in several pieces only if each ends in a ring, a flag or an outlet, or at a symbol between them."""
    for sheet in sheets:
        symbols = [group for group in sheet.groups if group.body is not None]
        for group in sheet.groups:
            if group.kind is not Kind.LINE:
                continue
            pieces = _pieces(list(segments(group)))
            for piece in pieces if len(pieces) > 1 else ():
                if not any(_meets(point, s) for s in symbols for pair in piece for point in pair):
                    yield f"a piece of {group.names} hangs in the air"


def _pieces(left: list[tuple[Point, Point]]) -> list[list[tuple[Point, Point]]]:
    found: list[list[tuple[Point, Point]]] = []
    while left:
        piece = [left.pop()]
        grown = True
        while grown:
            near = [pair for pair in left if any(_touch(pair, other) for other in piece)]
            left = [pair for pair in left if pair not in near]
            piece += near
            grown = bool(near)
        found.append(piece)
    return found


def _touch(one: tuple[Point, Point], other: tuple[Point, Point]) -> bool:
    a, b = (_box(*pair).grown(TOUCH) for pair in (one, other))
    return a.left <= b.right and b.left <= a.right and a.top <= b.bottom and b.top <= a.bottom


def _box(start: Point, end: Point) -> Box:
    return Box(min(start[0], end[0]), min(start[1], end[1]), max(start[0], end[0]), max(start[1], end[1]))


def unmarked(marks: Marks, sheets: Sequence[Drawing]) -> Iterator[str]:
    """Every opened, trapped or doubtful line that is drawn must be drawn as such and carry its word once or more."""
    lines = {n: g for s in sheets for g in s.groups if g.kind is Kind.LINE for n in g.names}
    words = {n for s in sheets for g in s.groups if g.kind is Kind.LABEL for n in g.names}
    alike = {n: g.names[0] for g in lines.values() for n in g.names}
    for line, role in marks.lines.items():
        if role not in (Role.ZONE, Role.TRAPPED, Role.UNKNOWN):
            continue
        if line not in lines:
            yield f"{line} is {role} and not drawn"
        elif lines[line].role is not role:
            yield f"{line} is {role} and drawn as {lines[line].role}"
        elif alike[line] not in words:
            yield f"{line} is {role} and has no word"

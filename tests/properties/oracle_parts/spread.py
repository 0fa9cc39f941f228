"""Devices standing still and sources running or not: the pressure interval that each line comes to.

Lines joined by passages that are surely open make one body of fluid. Each body is given a level of its own
first (vented, fed, backed by gas, or trapped); then every passage that is not surely open tells the bodies on
its two sides apart or alike:

- `high` only rises: forward, and backwards too, since no check valve or regulator is tight for ever;
- `floor`, what a running source or a charged gas surely keeps up, only rises, and only forward;
- `low` of a body that nothing keeps up only falls, towards whatever lower pressure it may leak to.

Each of the three is a monotone sweep to a fixpoint, so the order of devices doesn't matter.
"""

from collections.abc import Iterator, Mapping
from dataclasses import dataclass, field

from tests.properties.oracle_parts.circuit import Circuit, Way


@dataclass(frozen=True, slots=True, kw_only=True)
class Pressures:
    low: tuple[float, ...]
    high: tuple[float, ...]

    def with_line(self, line: int, other: "Pressures") -> "Pressures":
        """These, with one line at the pressure it has among the others."""
        low, high = list(self.low), list(self.high)
        low[line], high[line] = other.low[line], other.high[line]
        return Pressures(low=tuple(low), high=tuple(high))

    def text(self, line: int) -> str:
        return f"[{self.low[line]:.0f}, {self.high[line]:.0f}] Pa"


@dataclass(frozen=True, slots=True, kw_only=True)
class Running:
    """Live sources at work, by their place in the plan: those that may be, and those that surely are."""

    may: frozenset[int]
    surely: frozenset[int]


@dataclass(slots=True, kw_only=True)
class _Bodies:
    """The bodies of fluid, each under the number of one of its lines, with the way they are kept up."""

    of: list[int]
    low: dict[int, float] = field(default_factory=dict)
    high: dict[int, float] = field(default_factory=dict)
    vented: set[int] = field(default_factory=set)
    may_live: set[int] = field(default_factory=set)
    surely_live: set[int] = field(default_factory=set)
    gas: set[int] = field(default_factory=set)
    swallows: set[int] = field(default_factory=set)
    fed: set[int] = field(default_factory=set)


@dataclass(frozen=True, slots=True, kw_only=True)
class _Link:
    """A passage between two bodies. A vent line at its end swallows; one at its start gives nothing."""

    way: Way
    up: int
    down: int
    from_vent: bool
    to_vent: bool

    def forward(self, pressure: float) -> float:
        """What arrives downstream of this pressure upstream."""
        if self.from_vent:
            return 0.0
        if self.way.kind == "regulator":
            return min(pressure, self.way.set_pag)
        if self.way.kind == "relief":
            return pressure if pressure > self.way.set_pag else 0.0
        return pressure

    @property
    def supplies(self) -> bool:
        """Flow through it is part of its duty, not the exception that a relief valve is."""
        return self.way.kind != "relief" and self.way.set_pag > 0 and not self.from_vent


def ways_of(circuit: Circuit, standing: Mapping[str, str]) -> Iterator[Way]:
    """Every passage there is while the devices stand so."""
    for tag, device in circuit.devices.items():
        yield from device.positions[standing[tag]]


def spread(circuit: Circuit, standing: Mapping[str, str], running: Running, start: Pressures) -> Pressures:
    """The intervals the lines come to, from those they start from [Pa gauge]."""
    ways = tuple(ways_of(circuit, standing))
    bodies = _bodies(circuit, ways, running, start)
    links = tuple(_links(circuit, ways, bodies))
    _mark_fed(bodies, links)
    _drain_through_checks(bodies, links)
    base_high = dict(bodies.high)
    _raise_highs(circuit, bodies, links)
    floor = _floors(bodies, links)
    _drop_lows(bodies, links, floor, base_high)
    lines = range(len(circuit.ids))
    low = tuple(0.0 if circuit.vent[k] else bodies.low[bodies.of[k]] for k in lines)
    high = tuple(0.0 if circuit.vent[k] else bodies.high[bodies.of[k]] for k in lines)
    return Pressures(low=tuple(min(a, b) for a, b in zip(low, high, strict=True)), high=high)


def _joined(circuit: Circuit, ways: tuple[Way, ...]) -> list[int]:
    """For each line the number that stands for its body."""
    of = list(range(len(circuit.ids)))

    def find(line: int) -> int:
        while of[line] != line:
            of[line] = of[of[line]]
            line = of[line]
        return line

    for way in ways:
        if way.kind == "open" and way.certain:
            of[find(way.start)] = find(way.end)
    return [find(line) for line in of]


def _bodies(circuit: Circuit, ways: tuple[Way, ...], running: Running, start: Pressures) -> _Bodies:
    bodies = _Bodies(of=_joined(circuit, ways))
    electric = set()
    for line, body in enumerate(bodies.of):
        if circuit.vent[line]:
            bodies.vented.add(body)
            continue
        if circuit.electric(line):
            electric.add(body)
        bodies.low[body] = min(bodies.low.get(body, start.low[line]), start.low[line])
        bodies.high[body] = max(bodies.high.get(body, start.high[line]), start.high[line])
    for body in bodies.vented | electric:  # electricity is never trapped
        bodies.low[body] = bodies.high[body] = 0.0
    _charge(circuit, bodies, start)
    _feed(circuit, bodies, running)
    bodies.swallows = set(bodies.vented)
    return bodies


def _charge(circuit: Circuit, bodies: _Bodies, start: Pressures) -> None:
    """A body with compressed gas behind it keeps the interval of the gas."""
    for source in circuit.sources:
        body = bodies.of[source.line]
        if not source.gas or start.high[source.line] <= 0 or body in bodies.vented:
            continue
        low, high = start.low[source.line], start.high[source.line]
        if body in bodies.gas:
            low, high = min(low, bodies.low[body]), max(high, bodies.high[body])
        bodies.gas.add(body)
        bodies.low[body], bodies.high[body] = low, high


def _feed(circuit: Circuit, bodies: _Bodies, running: Running) -> None:
    """A body with a running source is at its pressure; with one that may be running, it may be."""
    for place in sorted(running.surely):
        source = circuit.sources[place]
        body = bodies.of[source.line]
        if body not in bodies.surely_live and body not in bodies.gas:
            bodies.low[body] = bodies.high[body] = 0.0
        bodies.surely_live.add(body)
        bodies.low[body] = max(bodies.low[body], source.low_pag)
    for place in sorted(running.may):
        source = circuit.sources[place]
        body = bodies.of[source.line]
        bodies.may_live.add(body)
        bodies.high[body] = max(bodies.high[body], source.high_pag)
    for body in bodies.may_live & bodies.vented:
        bodies.low[body] = 0.0


def _links(circuit: Circuit, ways: tuple[Way, ...], bodies: _Bodies) -> Iterator[_Link]:
    for way in ways:
        up, down = bodies.of[way.start], bodies.of[way.end]
        if up != down:
            from_vent, to_vent = circuit.vent[way.start], circuit.vent[way.end]
            yield _Link(way=way, up=up, down=down, from_vent=from_vent, to_vent=to_vent)
            if way.kind == "open":
                yield _Link(way=way, up=down, down=up, from_vent=to_vent, to_vent=from_vent)


def _mark_fed(bodies: _Bodies, links: tuple[_Link, ...]) -> None:
    """Bodies that a live source may be flowing into: a vent there doesn't make sure of zero."""
    bodies.fed = set(bodies.may_live)
    grew = True
    while grew:
        before = len(bodies.fed)
        bodies.fed |= {k.down for k in links if k.supplies and not k.to_vent and k.up in bodies.fed}
        grew = len(bodies.fed) > before


def _drain_through_checks(bodies: _Bodies, links: tuple[_Link, ...]) -> None:
    """What stands upstream of a check valve follows down into a vent, unless something keeps coming."""
    sure = [k for k in links if k.way.kind == "check" and k.way.certain]
    grew = True
    while grew:
        grew = False
        for link in sure:
            sinks = link.down in bodies.swallows and link.down not in bodies.fed
            if sinks and link.up not in bodies.fed and link.up not in bodies.swallows:
                bodies.swallows.add(link.up)
                bodies.low[link.up] = bodies.high[link.up] = 0.0
                grew = True


def _raise_highs(circuit: Circuit, bodies: _Bodies, links: tuple[_Link, ...]) -> None:
    high, grew = bodies.high, True
    while grew:
        grew = False
        for link in links:
            arriving = link.forward(high[link.up])
            accepts = not link.to_vent and (
                link.down not in bodies.swallows or (link.up in bodies.fed and link.supplies)
            )
            if accepts and arriving > high[link.down]:
                high[link.down] = arriving
                grew = True
            leaks = not link.to_vent and not circuit.electric(link.way.start)
            if leaks and link.up not in bodies.swallows and high[link.down] > high[link.up]:
                high[link.up] = high[link.down]
                grew = True


def _floors(bodies: _Bodies, links: tuple[_Link, ...]) -> dict[int, float]:
    """The pressure that a source surely keeps up in each body [Pa gauge]; none where it flows out."""
    emptied = bodies.swallows | {k.up for k in links if k.supplies and k.down in bodies.swallows}
    kept = bodies.surely_live | (bodies.gas - emptied)
    floor = {body: low if body in kept else 0.0 for body, low in bodies.low.items()}
    sure = [k for k in links if k.way.certain and k.down not in emptied]
    grew = True
    while grew:
        grew = False
        for link in sure:
            arriving = link.forward(floor[link.up])
            if arriving > floor[link.down]:
                floor[link.down] = arriving
                grew = True
    return floor


def _drop_lows(
    bodies: _Bodies, links: tuple[_Link, ...], floor: Mapping[int, float], base_high: Mapping[int, float]
) -> None:
    """Let the lows fall, as far as their floor, wherever one body may lose pressure to another."""
    low = bodies.low
    for body, kept in floor.items():
        low[body] = max(low[body], kept)
    leaks = [
        (link.up, link.down, link.way.set_pag if link.way.kind == "relief" else 0.0)
        for link in links
        if link.way.kind != "regulator" or base_high[link.down] < link.way.set_pag  # else it takes nothing
    ]
    leaks += [(link.down, link.up, 0.0) for link in links]
    fell = True
    while fell:
        fell = False
        for body, other, above in leaks:
            reached = max(low[other], above, floor[body])
            if reached < low[body]:
                low[body] = reached
                fell = True

"""Where pressure can come while every device that no lock holds is moved at will.

Why growing one set of lines searches everything. A state of the circuit is where each device stands and which
lines have come under pressure so far. In this reading a line that has come under pressure never gets rid of
it (someone may close it in), and each device can be brought to each position it is free to take at any time,
one device after another; so from any state every stand of the devices stays within reach, with at least the
lines hot that were. The hot lines of all states that can be reached are therefore the union over all
sequences, and a sequence needs one device in one position at a time: carry the pressure over one passage,
close it in, go for the next. A passage of any position that is ever free thus adds its far line as soon as
its near line is hot, a device that only a pilot moves is free as soon as that pilot is hot, and a source
works as soon as its drive is hot. All three only ever add, so the fixpoint is the whole of it, whatever the
order.

`flood_every_stand` shows the same without that argument, stand by stand, where there are few enough of them.
"""

from collections import deque
from collections.abc import Iterator, Mapping
from dataclasses import dataclass, field

from tests.properties.oracle_parts.circuit import Circuit
from tests.properties.oracle_parts.freedom import Freedom
from tests.properties.oracle_parts.walk import State


@dataclass(frozen=True, slots=True)
class Passing:
    """Pressure may cross between two lines while `tag` stands in `position`."""

    first: int
    second: int
    tag: str
    position: str


@dataclass(slots=True, kw_only=True)
class Reach:
    """Hot lines, each with the line that its pressure came from and the words for how."""

    circuit: Circuit
    came: dict[int, tuple[int | None, str]] = field(default_factory=dict)

    @property
    def hot(self) -> frozenset[int]:
        return frozenset(self.came)

    def path(self, line: int) -> str:
        """How pressure gets to a hot line, from where it begins."""
        words: list[str] = []
        at: int | None = line
        while at is not None:
            before, how = self.came[at]
            words.append(f"{how} {self.circuit.ids[at]}")
            at = before
        return " ".join(reversed(words))


def origins(circuit: Circuit, state: State) -> dict[int, str]:
    """Lines that pressure may start from: live sources at work, and whatever still holds pressure."""
    found: dict[int, str] = {}
    for line in range(len(circuit.ids)):
        held = state.pressures.high[line]
        if held > circuit.head_pag[line]:
            found[line] = f"(holds up to {held:.0f} Pa)"
    for source in circuit.sources:
        if not source.live and state.pressures.high[source.line] > 0:
            found[source.line] = f"(stored source {source.id})"
        if source.live and source.drive is None:
            found[source.line] = f"(live source {source.id})"
    return {line: how for line, how in found.items() if not circuit.vent[line]}


def passings(circuit: Circuit, tag: str, position: str) -> Iterator[Passing]:
    """Passages as hazards see them: both ways, whatever their kind; only a vent swallows what comes."""
    for way in circuit.devices[tag].positions[position]:
        if not circuit.vent[way.start] and not circuit.vent[way.end]:
            yield Passing(way.start, way.end, tag, position)


def reach(circuit: Circuit, begin: Mapping[int, str], free: Mapping[str, Freedom]) -> Reach:
    """All lines that pressure can come to from the lines `begin`."""
    search = _Search(circuit, free)
    for line, how in begin.items():
        search.heat(line, None, how)
    search.run()
    return search.found


class _Search:
    def __init__(self, circuit: Circuit, free: Mapping[str, Freedom]) -> None:
        self.circuit = circuit
        self.found = Reach(circuit=circuit)
        self.free = free
        self.queue: deque[int] = deque()
        self.near: list[list[Passing]] = [[] for _ in circuit.ids]
        self.moves: dict[int, list[str]] = {}
        self.drives: dict[int, list[tuple[int, str]]] = {}
        for tag, freedom in free.items():
            self._open(tag, freedom.always)
            for line in freedom.by:
                self.moves.setdefault(line, []).append(tag)
        for source in circuit.sources:
            if source.live and source.drive is not None and not circuit.vent[source.line]:
                entry = (source.line, f"-(drives {source.id})->")
                self.drives.setdefault(source.drive, []).append(entry)

    def heat(self, line: int, before: int | None, how: str) -> None:
        if line not in self.found.came:
            self.found.came[line] = (before, how)
            self.queue.append(line)

    def run(self) -> None:
        while self.queue:
            line = self.queue.popleft()
            for tag in self.moves.get(line, ()):
                self._open(tag, self.free[tag].moved)
            for driven, how in self.drives.get(line, ()):
                self.heat(driven, line, how)
            for passing in self.near[line]:
                self._cross(passing)

    def _open(self, tag: str, positions: frozenset[str]) -> None:
        for position in sorted(positions):
            for passing in passings(self.circuit, tag, position):
                self.near[passing.first].append(passing)
                self.near[passing.second].append(passing)
                self._cross(passing)

    def _cross(self, passing: Passing) -> None:
        how = f"-({passing.tag} in {passing.position})->"
        if passing.first in self.found.came:
            self.heat(passing.second, passing.first, how)
        elif passing.second in self.found.came:
            self.heat(passing.first, passing.second, how)

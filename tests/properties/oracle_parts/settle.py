"""From the positions that people set to the state the circuit comes to by itself.

Pressure decides which sources run (their drives) and where some devices stand (they fall into a position on
loss of pressure); these in turn decide the pressure. The circle is followed, each time from the pressures
before the action so that no passing guess leaves a trace, until it closes. Where it never comes to rest the
hull of the whole round is the answer.
"""

from collections.abc import Mapping
from dataclasses import dataclass

from tests.properties.oracle_parts.circuit import Circuit
from tests.properties.oracle_parts.spread import Pressures, Running, spread


@dataclass(frozen=True, slots=True, kw_only=True)
class Settled:
    """`standing`: where each device really stands; differs from what was set where pressure was lost."""

    pressures: Pressures
    standing: Mapping[str, str]
    running: Running


def settle(
    circuit: Circuit,
    positions: Mapping[str, str],
    start: Pressures,
    locked: frozenset[str],
    kept_still: frozenset[str] = frozenset(),
) -> Settled:
    """Where pressures end, from `start`, with the devices set to `positions`.

    `locked` devices don't fall on loss of a pressure that their lock withstands. The sources `kept_still` are
    taken as not running, whatever drives them.
    """
    seen: dict[object, Settled] = {}
    pressures = start
    while True:
        standing = _standing(circuit, positions, pressures, locked)
        running = _running(circuit, pressures, kept_still)
        guess = (tuple(standing.items()), running)
        if guess in seen:
            rounds = list(seen.values())
            round_ = rounds[list(seen).index(guess) :]
            return Settled(pressures=_hull([r.pressures for r in round_]), standing=standing, running=running)
        pressures = spread(circuit, standing, running, start)
        seen[guess] = Settled(pressures=pressures, standing=standing, running=running)


def _standing(
    circuit: Circuit, positions: Mapping[str, str], pressures: Pressures, locked: frozenset[str]
) -> dict[str, str]:
    standing = dict(positions)
    for tag, device in circuit.devices.items():
        line = device.lost_line
        if line is None or pressures.high[line] > 0:
            continue
        if tag not in locked or line not in device.withstands_lines:
            standing[tag] = device.lost_position
    return standing


def _running(circuit: Circuit, pressures: Pressures, kept_still: frozenset[str]) -> Running:
    may, surely = set(), set()
    for place, source in enumerate(circuit.sources):
        if not source.live or source.id in kept_still:
            continue
        if source.drive is None or pressures.high[source.drive] > 0:
            may.add(place)
        if source.drive is None or pressures.low[source.drive] > 0:
            surely.add(place)
    return Running(may=frozenset(may), surely=frozenset(surely))


def _hull(many: list[Pressures]) -> Pressures:
    return Pressures(
        low=tuple(min(column) for column in zip(*(p.low for p in many), strict=True)),
        high=tuple(max(column) for column in zip(*(p.high for p in many), strict=True)),
    )

"""One failure at a time: which lines of the zone a single leaking barrier would put under pressure."""

from collections.abc import Iterable, Mapping

from provenzero.network.model import DeviceKind, DeviceTag, LineId, SourceKind
from provenzero.state.held import held_open
from provenzero.state.may import reach
from provenzero.state.model import State, Wiring


def exposed(
    wiring: Wiring,
    state: State,
    zone: frozenset[LineId],
    locks: Mapping[DeviceTag, str],
    barriers: Iterable[DeviceTag],
) -> dict[DeviceTag, frozenset[LineId]]:
    """For each barrier that could pass: the zone lines it would reach. Lines held open to a vent take the leak.

    An electric isolator does not pass a little: it is left out.
    """
    held = frozenset(held_open(wiring, locks, state.pressures))
    found = {}
    for tag in barriers:
        if wiring.device(tag).kind is not DeviceKind.ISOLATOR:
            flood = reach(wiring, locks, state.pressures, leaking=frozenset({tag}), walls=held)
            found[tag] = flood.lines & zone
    return found


def bears(
    wiring: Wiring, state: State, zone: frozenset[LineId], locks: Mapping[DeviceTag, str], leaking: DeviceTag
) -> bool:
    """Whether the zone stays without pressure, and no stopped pump wakes, when one barrier passes."""
    held = frozenset(held_open(wiring, locks, state.pressures))
    flood = reach(wiring, locks, state.pressures, leaking=frozenset({leaking}), walls=held)
    woken = any(
        s.kind is SourceKind.LIVE and s.drive is not None and s.drive in flood.lines and s.id not in state.running
        for s in wiring.network.sources
    )
    return not woken and not flood.lines & zone

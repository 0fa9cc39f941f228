"""Which lines a set of locks holds open to a vent, leaving out locks that a live pilot could overcome."""

from collections.abc import Mapping

from provenzero.network.model import DeviceTag, LineId
from provenzero.state.may import reach
from provenzero.state.model import Interval, Wiring
from provenzero.state.must import vented


def held_open(
    wiring: Wiring, locks: Mapping[DeviceTag, str], pressures: Mapping[LineId, Interval]
) -> dict[LineId, DeviceTag | None]:
    """Lines surely joined to a vent, each with the next device outward, while these pressures stand elsewhere."""
    freed = reach(wiring, locks, pressures).freed
    return vented(wiring, {tag: position for tag, position in locks.items() if tag not in freed})

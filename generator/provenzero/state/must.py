"""Where pressure is sure to leave: open passages only, of devices that are held where they stand."""

from collections.abc import Mapping

from provenzero.network.model import DeviceTag, LineId, PassageKind
from provenzero.state.model import Wiring


def vented(wiring: Wiring, held: Mapping[DeviceTag, str]) -> dict[LineId, DeviceTag | None]:
    """Lines joined to a vent by sure passages of held (or immovable) devices, each with the next device outward."""
    found: dict[LineId, DeviceTag | None] = dict.fromkeys(wiring.vents)
    stack = list(found)
    while stack:
        here = stack.pop()
        for tag in wiring.touching[here]:
            device = wiring.device(tag)
            position = held.get(tag, device.normal if not device.movable else None)
            if position is None:
                continue
            for item in device.positions[position]:
                if item.kind is not PassageKind.OPEN or not item.certain or here not in (item.source, item.target):
                    continue
                there = item.target if item.source == here else item.source
                if there not in found:
                    found[there] = tag
                    stack.append(there)
    return found

"""The second way: every position of every free device tried, written apart from the planner and its solvers.

A state of the search is the set of lines that have ever been under pressure. Every movable device without a working
lock may stand in each of its positions at some time, and pressure once let into a line is kept there (the worst
case), so the set only grows, and trying all devices in all positions until nothing new is reached visits everything
that any order of movements could reach.
"""

from collections.abc import Iterable, Mapping

from provenzero.network.model import Device, DeviceTag, LineId, Network, SourceKind


def ever_pressurised(network: Network, locks: Mapping[DeviceTag, str], holding: Iterable[LineId]) -> frozenset[LineId]:
    """Lines that could come under pressure, given the locks and the lines that hold pressure now."""
    wet = {line for line in holding if not network.lines[line].vent}
    while True:
        grown = wet | _started(network, wet)
        for device in network.devices.values():
            for position in _positions(device, locks, grown):
                for item in device.positions[position]:
                    if item.source in grown or item.target in grown:
                        grown |= {x for x in (item.source, item.target) if not network.lines[x].vent}
        if grown == wet:
            return frozenset(wet)
        wet = grown


def _started(network: Network, wet: set[LineId]) -> set[LineId]:
    return {
        source.line
        for source in network.sources
        if source.kind is SourceKind.LIVE
        and (source.drive is None or source.drive in wet)
        and not network.lines[source.line].vent
    }


def _positions(device: Device, locks: Mapping[DeviceTag, str], wet: set[LineId]) -> Iterable[str]:
    if not device.movable:
        return (device.normal,)
    if device.tag not in locks:
        return device.positions
    forced = any(
        mover not in device.lock_holds_against and (mover == "hand" or mover in wet) for mover in device.moved_by
    )
    return device.positions if forced else (locks[device.tag],)

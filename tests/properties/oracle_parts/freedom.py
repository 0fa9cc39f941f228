"""Where each device may come to stand while the work goes on, whatever anybody or anything does to it."""

from collections.abc import Mapping
from dataclasses import dataclass

from tests.properties.oracle_parts.circuit import Circuit, Device
from tests.properties.oracle_parts.walk import State


@dataclass(frozen=True, slots=True, kw_only=True)
class Freedom:
    """`always`: positions nobody can rule out; `moved`: further ones, once a line of `by` has pressure."""

    always: frozenset[str]
    moved: frozenset[str]
    by: frozenset[int]

    def given(self, hot: frozenset[int]) -> frozenset[str]:
        """The positions it may take while pressure can come to the lines `hot`."""
        return self.always | self.moved if self.by & hot else self.always


def freedoms(circuit: Circuit, state: State, locked: frozenset[str]) -> Mapping[str, Freedom]:
    """The freedom of every device, with locks on the devices `locked` and on no other."""
    return {tag: _freedom(device, state, tag in locked) for tag, device in circuit.devices.items()}


def _freedom(device: Device, state: State, locked: bool) -> Freedom:
    everywhere = frozenset(device.positions)
    if device.movable and not locked:
        return Freedom(always=everywhere, moved=frozenset(), by=frozenset())
    here = {state.settled.standing[device.tag]}
    if not locked:
        here.add(state.positions[device.tag])
    if device.lost_line is not None and not (locked and device.lost_line in device.withstands_lines):
        here.add(device.lost_position)
    if not device.movable:
        return Freedom(always=frozenset(here), moved=frozenset(), by=frozenset())
    if device.by_hand and not device.withstands_hand:
        return Freedom(always=everywhere, moved=frozenset(), by=frozenset())
    return Freedom(
        always=frozenset(here),
        moved=everywhere - here,
        by=device.by_lines - device.withstands_lines,
    )

"""The list of locks of a plan, held against what the steps do with them."""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field
from typing import Any

from tests.properties.oracle_parts.circuit import Circuit

Step = Mapping[str, Any]


@dataclass(frozen=True, slots=True, kw_only=True)
class LockBook:
    """`listed`: number to device and position. `misuse` grows with every fault that is found."""

    circuit: Circuit
    listed: Mapping[int, tuple[str, str]]
    misuse: list[str] = field(default_factory=list)

    def take_off(self, step: Step, worn: dict[int, str]) -> None:
        """Let the step take off its lock, from those `worn` (number to device)."""
        number = step.get("unlock")
        if number is not None and worn.pop(number, None) is None:
            self.misuse.append(f"step {step['id']} takes off lock {number}, which isn't in place")

    def put_on(self, step: Step, worn: dict[int, str], positions: Mapping[str, str]) -> None:
        """Let the step put on its lock, with the devices standing in `positions`."""
        number = step.get("lock")
        if number is None:
            return
        if number not in self.listed:
            self.misuse.append(f"step {step['id']} puts on lock {number}, which isn't in the list of locks")
            return
        device, position = self.listed[number]
        if number in worn:
            self.misuse.append(f"step {step['id']} puts on lock {number}, which is in place already")
        if positions[device] != position:
            stands = positions[device]
            self.misuse.append(f"lock {number} holds {device} in {stands}, the list says {position}")
        action = step.get("action")
        if action is not None and action["device"] != device:
            self.misuse.append(f"step {step['id']} moves {action['device']} and locks {device}")
        worn[number] = device

    def watch_move(self, step: Step, worn: Mapping[int, str]) -> None:
        """See whether the device that the step moves can be moved."""
        tag = step["action"]["device"]
        if tag in worn.values():
            self.misuse.append(f"step {step['id']} moves {tag} while it is locked")
        if not self.circuit.devices[tag].movable:
            self.misuse.append(f"step {step['id']} moves {tag}, which can't be moved")

    def close(self, worn: Mapping[int, str]) -> tuple[str, ...]:
        """All faults, with the locks that are missing as the work begins."""
        missing = [n for n in self.listed if n not in worn]
        late = [f"lock {n} is in the list and not in place as the work begins" for n in missing]
        return tuple(self.misuse + late)


def open_book(circuit: Circuit, locks: Sequence[Mapping[str, Any]]) -> LockBook:
    """The book of a plan's list of locks."""
    book = LockBook(circuit=circuit, listed={e["number"]: (e["device"], e["position"]) for e in locks})
    for number, (device, position) in book.listed.items():
        circuit.check_position(device, position)
        if not circuit.devices[device].lockable:
            book.misuse.append(f"lock {number} is on {device}, which can't be locked")
    for key in ("number", "device"):
        values = [entry[key] for entry in locks]
        book.misuse.extend(f"two locks have the {key} {v}" for v in dict.fromkeys(values) if values.count(v) > 1)
    return book

"""The unit, its network and its marks, with the questions that a drawing asks of them."""

from collections.abc import Mapping
from dataclasses import dataclass

from provenzero.drawing.marks import Marks, Vent
from provenzero.drawing.model import Role
from provenzero.drawing.wording import Wording
from provenzero.network.devices.pumps import LIQUID
from provenzero.network.model import Device, DeviceTag, Line, LineId
from provenzero.unit.model import HEADER, RETURNS, CheckValve, Element, Reducer, Strainer, Unit, Valve

Inline = Valve | CheckValve | Strainer | Reducer
TOLD = frozenset({Role.ZONE, Role.TRAPPED, Role.UNKNOWN})
AIR = LineId("air")
_THROUGH = ("open", "on", "fitted")


@dataclass(frozen=True, slots=True, kw_only=True)
class Scene:
    """What is drawn. `letters`: the letter in the ring of each line that goes through many places."""

    unit: Unit
    devices: Mapping[DeviceTag, Device]
    lines: Mapping[LineId, Line]
    ports: Mapping[tuple[str, str], LineId]
    marks: Marks
    wording: Wording
    letters: Mapping[LineId, str]

    def position(self, tag: str) -> str:
        """Where a device stands."""
        key = DeviceTag(tag)
        return self.marks.positions.get(key, self.devices[key].normal)

    def lock(self, tag: str) -> int | None:
        """The number of the lock on a device."""
        return self.marks.locks.get(DeviceTag(tag))

    def vent(self, tag: str) -> Vent | None:
        """Where a device that is kept open lets out to."""
        return self.marks.open_vents.get(DeviceTag(tag))

    def ends(self, tag: str) -> tuple[LineId, LineId]:
        """The two lines that a device joins when it is open, in the order of flow."""
        positions = self.devices[DeviceTag(tag)].positions
        way = next(positions[name] for name in _THROUGH if name in positions)[0]
        return way.source, way.target

    def port(self, equipment: str, name: str) -> LineId | None:
        """The line at a port of a piece of equipment."""
        return self.ports.get((equipment, name))

    def told(self, line: LineId) -> str:
        """The word that must stand on a line, empty if none."""
        words = self.wording
        return {Role.ZONE: words.opened, Role.TRAPPED: words.trapped, Role.UNKNOWN: words.unknown}.get(
            self.marks.role(line), ""
        )

    def name(self, line: LineId) -> str:
        """The name of a bus as it stands on the drawing."""
        fixed = {
            LineId(HEADER): self.wording.header,
            LineId(RETURNS): self.wording.returns,
            LIQUID: self.wording.suction,
            AIR: self.wording.air,
        }
        words = fixed.get(line)
        if words is None:
            words = line if line.lower().endswith(self.wording.line) else self.wording.pressure_line.format(name=line)
        return words


def letters_of(unit: Unit) -> dict[LineId, str]:
    """A letter for every line that many things join: the first of its name that is free, else of the alphabet."""
    lines = [HEADER, *(item.serves for item in unit.regulators), RETURNS, "suction"]
    lines += [bank.attached_to for bank in unit.banks] + [pump.delivers_to for pump in unit.pumps]
    lines += [item.delivers_to for item in unit.nitrogen_backups]
    found: dict[str, str] = {}
    for line in dict.fromkeys(lines):
        choices = [c for c in line.upper() if c.isalpha()] + [chr(c) for c in range(ord("A"), ord("Z") + 1)]
        free = (c for c in choices if c not in found.values())
        found[line] = next(free, str(len(found)))
    return {LIQUID if line == "suction" else LineId(line): letter for line, letter in found.items()}


def is_inline(element: Element) -> bool:
    """Whether the fluid goes through the element (or past it)."""
    return isinstance(element, (Valve, CheckValve, Strainer, Reducer))

"""Everything the blocks of a permit are made from, with the look-ups they share."""

from collections.abc import Iterable, Mapping
from dataclasses import dataclass

from provenzero.document.context import PermitContext
from provenzero.document.figures import Band, PermitFigures
from provenzero.document.measure import Measure
from provenzero.document.wording import Wording
from provenzero.network.model import Device, DeviceTag, Gauge, LineId
from provenzero.plan.model import Expect, Lock, Plan, Verdict

_TRAPPED = "pressure trapped in "
_MOST_NAMES = 3


@dataclass(frozen=True, slots=True, kw_only=True)
class Brief:
    """One permit in the making."""

    plan: Plan
    figures: PermitFigures
    proof: Mapping[str, Verdict]
    context: PermitContext
    wording: Wording

    @property
    def measure(self) -> Measure:
        """Prints figures in the units of the site."""
        return Measure(units=self.context.units, wording=self.wording)

    def say(self, key: str, **facts: str) -> str:
        """A text of the wording file."""
        return self.wording.say(key, **facts)

    def device(self, tag: str) -> Device:
        """The device of a tag."""
        return self.plan.network.devices[DeviceTag(tag)]

    def position(self, word: str | None) -> str:
        """A position in the words a hand understands; one the wording does not know stays as it is."""
        if word is None:
            return ""
        return self.say(f"positions.{word}") if self.wording.has(f"positions.{word}") else word

    def function(self, name: str) -> str:
        """The label of a function."""
        return next((a.label for a in self.plan.network.actuators if a.name == name), name)

    def functions(self, names: str) -> str:
        """The labels of functions whose names stand in one text, joined by commas."""
        return ", ".join(self.function(name) for name in names.split(", "))

    def equipment(self, tag: str) -> str:
        """What a piece of equipment is called."""
        label = self.function(tag)
        device = self.plan.network.devices.get(DeviceTag(tag))
        if label != tag:
            return label
        if device is not None:
            return f"{tag}, {device.name}"
        bank, _, bottle = tag.partition("/")
        if bottle:
            return self.say("equipment.bottle", bank=bank, bottle=bottle)
        kinds = {**dict.fromkeys((p.tag for p in self.plan.unit.pumps), "pump"), "unit": "unit"}
        return self.say(f"equipment.{kinds[tag]}", tag=tag) if tag in kinds else tag

    def line(self, line: str) -> str:
        """The name of a line."""
        found = self.plan.network.lines.get(LineId(line))
        return line if found is None else found.name

    def lines(self, lines: Iterable[str], most: int = _MOST_NAMES) -> str:
        """Names of lines, the first ones if there are many."""
        return self.some((self.line(k) for k in lines), most)

    def some(self, names: Iterable[str], most: int = _MOST_NAMES) -> str:
        """Names, the first ones if there are many, parted so that a name may hold a comma."""
        found = list(dict.fromkeys(names))
        if not found:
            return self.say("none")
        if len(found) <= most + 1:
            return "; ".join(found)
        return "; ".join([*found[:most], self.say("more", count=str(len(found) - most))])

    def source(self, source: str) -> str:
        """The name of a source, or of the line in which pressure is trapped."""
        if source.startswith(_TRAPPED):
            return self.say("register.trapped", line=self.line(source.removeprefix(_TRAPPED)))
        return next((s.name for s in self.plan.network.sources if s.id == source), source)

    def gauge(self, tag: str) -> Gauge | None:
        """The gauge of a tag, if it is one of the unit's."""
        return next((g for g in self.plan.network.gauges if g.tag == tag), None)

    def lock_on(self, tag: str | None) -> Lock | None:
        """The lock on a device, if it has one."""
        return next((lock for lock in self.plan.locks if lock.device == tag), None)

    def lock_numbers(self, tags: Iterable[str]) -> list[int]:
        """The numbers of the locks on some devices, in order."""
        return sorted({lock.number for lock in map(self.lock_on, tags) if lock is not None})

    def held_back(self, lock: Lock) -> list[str]:
        """Names of the sources that would reach the zone without a lock."""
        return list(dict.fromkeys(self.source(way[0]) for way in lock.holds_back))

    def head_pag(self, line: str) -> float:
        """The fluid column that stands on a line [Pa]."""
        found = self.plan.network.lines.get(LineId(line))
        return 0.0 if found is None else found.static_head_pag

    def band(self, expect: Expect) -> Band:
        """What a gauge may show: the pressure, wider by the gauge's error unless it is zero [Pa gauge]."""
        gauge = self.gauge(expect.gauge)
        if expect.high_pag <= self.head_pag(expect.line) or gauge is None:
            return (expect.low_pag, expect.high_pag)
        error = (gauge.full_scale_pag or 0.0) * (gauge.accuracy_fraction or 0.0)
        return (max(expect.low_pag - error, 0.0), expect.high_pag + error)

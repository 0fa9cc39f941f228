"""The plan JSON, read into plain numbered lines and devices: the oracle knows nothing else of a unit."""

from collections.abc import Mapping
from dataclasses import dataclass
from math import inf
from typing import Any

HAND = "hand"
PASSAGES = ("open", "check", "regulator", "relief")


class CannotJudgeError(ValueError):
    """The plan contradicts itself or misses something, so that no verdict on it would mean anything."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Way:
    """One passage from line `start` to line `end`. An unknown set pressure lets anything through (inf)."""

    kind: str
    start: int
    end: int
    set_pag: float
    certain: bool


@dataclass(frozen=True, slots=True, kw_only=True)
class Device:
    tag: str
    positions: Mapping[str, tuple[Way, ...]]
    movable: bool
    lockable: bool
    by_hand: bool
    by_lines: frozenset[int]
    withstands_hand: bool
    withstands_lines: frozenset[int]
    lost_line: int | None
    lost_position: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Source:
    id: str
    line: int
    live: bool
    low_pag: float
    high_pag: float
    drive: int | None
    senses: int | None
    starts_below_pag: float
    gas: bool

    @property
    def automatic(self) -> bool:
        """It starts by itself, as the line that it senses falls."""
        return self.senses is not None


@dataclass(frozen=True, slots=True, kw_only=True)
class Piston:
    name: str
    open_line: int
    close_line: int


@dataclass(frozen=True, slots=True, kw_only=True)
class Circuit:
    ids: tuple[str, ...]
    number: Mapping[str, int]
    vent: tuple[bool, ...]
    medium: tuple[str, ...]
    head_pag: tuple[float, ...]
    devices: Mapping[str, Device]
    sources: tuple[Source, ...]
    pistons: tuple[Piston, ...]

    def electric(self, line: int) -> bool:
        return self.medium[line] == "electric"

    def line(self, name: str) -> int:
        """Number of a line.

        Raises:
            CannotJudgeError: the plan names a line that its network doesn't have.
        """
        if name not in self.number:
            raise CannotJudgeError(f"the plan speaks of line {name!r}, which its network doesn't have")
        return self.number[name]

    def device(self, tag: str) -> Device:
        if tag not in self.devices:
            raise CannotJudgeError(f"the plan speaks of device {tag!r}, which its network doesn't have")
        return self.devices[tag]

    def check_position(self, tag: str, position: object) -> None:
        """Stop where a device or its position isn't known."""
        if position not in self.device(tag).positions:
            raise CannotJudgeError(f"{tag} has no position {position!r}")

    def named(self, lines: frozenset[int]) -> str:
        return ", ".join(sorted(self.ids[k] for k in lines))


def read_circuit(network: Mapping[str, Any]) -> Circuit:
    """The network of a plan."""
    lines = network["lines"]
    bare = Circuit(
        ids=tuple(entry["id"] for entry in lines),
        number={entry["id"]: k for k, entry in enumerate(lines)},
        vent=tuple(bool(entry["vent"]) for entry in lines),
        medium=tuple(str(entry["medium"]) for entry in lines),
        head_pag=tuple(float(entry.get("static_head_pag") or 0.0) for entry in lines),
        devices={},
        sources=(),
        pistons=(),
    )
    if len(bare.number) != len(lines):
        raise CannotJudgeError("two lines of the network have the same id")
    return Circuit(
        ids=bare.ids,
        number=bare.number,
        vent=bare.vent,
        medium=bare.medium,
        head_pag=bare.head_pag,
        devices={entry["tag"]: _device(bare, entry) for entry in network["devices"]},
        sources=tuple(_source(bare, entry) for entry in network["sources"]),
        pistons=tuple(
            Piston(
                name=entry["name"],
                open_line=bare.line(entry["open_line"]),
                close_line=bare.line(entry["close_line"]),
            )
            for entry in network["functions"]
        ),
    )


def _device(circuit: Circuit, entry: Mapping[str, Any]) -> Device:
    movers, withstood = entry["moved_by"], entry["lock_holds_against"]
    loss = entry.get("on_loss")
    positions = {name: tuple(_way(circuit, w) for w in ways) for name, ways in entry["positions"].items()}
    if loss is not None and loss["position"] not in positions:
        raise CannotJudgeError(f"{entry['tag']} falls into {loss['position']!r}, which it doesn't have")
    return Device(
        tag=entry["tag"],
        positions=positions,
        movable=bool(entry["movable"]),
        lockable=bool(entry["lockable"]),
        by_hand=HAND in movers,
        by_lines=frozenset(circuit.line(m) for m in movers if m != HAND),
        withstands_hand=HAND in withstood,
        withstands_lines=frozenset(circuit.line(m) for m in withstood if m != HAND),
        lost_line=None if loss is None else circuit.line(loss["line"]),
        lost_position="" if loss is None else loss["position"],
    )


def _way(circuit: Circuit, entry: Mapping[str, Any]) -> Way:
    if entry["passage"] not in PASSAGES:
        raise CannotJudgeError(f"nobody knows how {entry['passage']!r} passes pressure")
    set_pag = entry.get("set_pag")
    return Way(
        kind=entry["passage"],
        start=circuit.line(entry["from"]),
        end=circuit.line(entry["to"]),
        set_pag=inf if set_pag is None else float(set_pag),
        certain=bool(entry.get("certain", True)),
    )


def _source(circuit: Circuit, entry: Mapping[str, Any]) -> Source:
    drive, senses, threshold = (entry.get(key) for key in ("drive", "senses", "starts_below_pag"))
    low = entry.get("low_pag")
    return Source(
        id=entry["id"],
        line=circuit.line(entry["line"]),
        live=entry["kind"] == "live",
        low_pag=float(entry["pressure_pag"] if low is None else low),
        high_pag=float(entry["pressure_pag"]),
        drive=None if drive is None else circuit.line(drive),
        senses=None if senses is None or threshold is None else circuit.line(senses),
        starts_below_pag=0.0 if threshold is None else float(threshold),
        gas=bool(entry.get("gas", False)),
    )

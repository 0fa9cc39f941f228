"""Jobs: what is opened on which kind of equipment, read from the catalogue or from a site's own file."""

from collections.abc import Mapping
from dataclasses import dataclass
from enum import StrEnum
from typing import Final


class Equipment(StrEnum):
    """The kind of equipment a job is done on."""

    FUNCTION = "function"
    FOUR_WAY_VALVE = "four_way_valve"
    PUMP = "pump"
    REGULATOR = "regulator"
    BYPASS = "bypass"
    BOTTLE = "bottle"
    UNIT = "unit"


CALLED: Final[Mapping[Equipment, str]] = {
    Equipment.FUNCTION: "function",
    Equipment.FOUR_WAY_VALVE: "four-way valve",
    Equipment.PUMP: "pump",
    Equipment.REGULATOR: "regulator",
    Equipment.BYPASS: "bypass valve",
    Equipment.BOTTLE: "bottle",
    Equipment.UNIT: "unit",
}
"""How people call a kind of equipment."""

_FUNCTION_PORTS: Final = ("open_line", "close_line", "supply", "return", "pilot")

PORTS: Final[Mapping[Equipment, tuple[str, ...]]] = {
    Equipment.FUNCTION: _FUNCTION_PORTS,
    Equipment.FOUR_WAY_VALVE: _FUNCTION_PORTS,
    Equipment.PUMP: ("suction", "discharge", "drive"),
    Equipment.REGULATOR: ("inlet", "outlet", "return", "pilot"),
    Equipment.BYPASS: ("inlet", "outlet"),
    Equipment.BOTTLE: ("fluid", "gas"),
    Equipment.UNIT: ("fluid", "air", "power"),
}
"""The ports that a kind of equipment can have; not every piece has all of them."""

ATTRIBUTES: Final[Mapping[Equipment, tuple[str, ...]]] = {
    Equipment.FUNCTION: ("kind",),
    Equipment.FOUR_WAY_VALVE: ("kind",),
    Equipment.PUMP: ("drive",),
    Equipment.REGULATOR: ("serves",),
    Equipment.BYPASS: (),
    Equipment.BOTTLE: ("separator",),
    Equipment.UNIT: (),
}
"""What a job may ask of a piece of equipment under `only`."""

WITH_PISTON: Final = frozenset({Equipment.FUNCTION, Equipment.FOUR_WAY_VALVE})
"""Equipment that has an end for the piston to be left at."""


class Leave(StrEnum):
    """The end at which the function's piston must stand before the job starts."""

    AS_FOUND = "as_found"
    OPEN = "open"
    CLOSE = "close"


class TestKind(StrEnum):
    """A test that proves the equipment again before it is handed back."""

    __test__ = False

    LEAK = "leak"
    FUNCTION = "function"
    PUMP = "pump"
    REGULATOR = "regulator"
    PRECHARGE = "precharge"
    DRAWDOWN = "drawdown"


@dataclass(frozen=True, slots=True, kw_only=True)
class Condition:
    """Narrows the equipment a job applies to: attribute name and the words allowed for it."""

    attribute: str
    allowed: tuple[str, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Job:
    """One kind of work on one kind of equipment.

    `opens` names the ports that will be open to the air; those in `optional` only where there are such ports.
    """

    id: str
    title: str
    equipment: Equipment
    conditions: tuple[Condition, ...]
    opens: tuple[str, ...]
    optional: tuple[str, ...] = ()
    leave: Leave
    limits: tuple[str, ...]
    hazards: tuple[str, ...]
    tools: tuple[str, ...]
    prepare: tuple[str, ...]
    work: tuple[str, ...]
    restore: tuple[str, ...]
    tests: tuple[TestKind, ...]

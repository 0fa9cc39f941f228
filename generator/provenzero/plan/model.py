"""A plan: what is locked, in which order, what each gauge must then show, and the way back; or why there is none."""

from collections.abc import Mapping
from dataclasses import dataclass, field
from enum import StrEnum

from provenzero.catalogue.job import Job
from provenzero.failure.grade import Grade
from provenzero.network.model import DeviceTag, LineId, Network
from provenzero.state.model import State
from provenzero.unit.model import Unit


class Section(StrEnum):
    """The parts of a job, in order."""

    PREPARE = "prepare"
    ISOLATE = "isolate"
    RELEASE = "release"
    VERIFY = "verify"
    WORK = "work"
    REINSTATE = "reinstate"
    TEST = "test"


class StepKind(StrEnum):
    """What kind of thing a step asks for; the words for it are in the wording file."""

    NOTIFY = "notify"
    IDENTIFY = "identify"
    WELL_STATE = "well_state"
    JOB_TEXT = "job_text"
    READ_BEFORE = "read_before"
    MOVE_FUNCTION = "move_function"
    SET_AND_LOCK = "set_and_lock"
    CHECK_AND_LOCK = "check_and_lock"
    SET = "set"
    TRY_START = "try_start"
    TRY_OPERATE = "try_operate"
    READ = "read"
    READ_ZERO = "read_zero"
    TEST_GAUGE = "test_gauge"
    WATCH = "watch"
    RELEASE_WORK = "release_work"
    CLEAR = "clear"
    UNLOCK_AND_SET = "unlock_and_set"
    UNLOCK = "unlock"
    RESTORE = "restore"
    RECHARGE = "recharge"
    READ_RESTORED = "read_restored"
    LEAK_TEST = "leak_test"
    FUNCTION_TEST = "function_test"
    PUMP_TEST = "pump_test"
    REGULATOR_TEST = "regulator_test"
    PRECHARGE_TEST = "precharge_test"
    DRAWDOWN_TEST = "drawdown_test"
    HAND_BACK = "hand_back"


class Purpose(StrEnum):
    """Why a device is locked."""

    BARRIER = "barrier"
    ENERGY = "energy"
    REMOTE = "remote"
    VENT = "vent"


@dataclass(frozen=True, slots=True, kw_only=True)
class Expect:
    """What an instrument must show after a step [Pa gauge]. `line` is where it stands."""

    gauge: str
    line: LineId
    low_pag: float
    high_pag: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Step:
    """One action or check. `facts` are the values that the wording needs; `lines` are the lines it speaks of.

    `moves_function` and `starts_pump` announce what the step sets going: names joined by ", ". `recharges`: a gas line
    that is given its charge again.
    """

    id: str
    section: Section
    kind: StepKind
    device: DeviceTag | None = None
    position: str | None = None
    was: str | None = None
    lock: int | None = None
    unlock: int | None = None
    moves_function: str | None = None
    starts_pump: str | None = None
    recharges: LineId | None = None
    expect: tuple[Expect, ...] = ()
    lines: tuple[LineId, ...] = ()
    facts: Mapping[str, str] = field(default_factory=dict)
    hold_point: bool = False
    reason: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Lock:
    """One lock. `holds_back`: source and way into the zone without it; `keeps_open`: lines it keeps vented."""

    number: int
    device: DeviceTag
    position: str
    purpose: Purpose
    holds_back: tuple[tuple[str, ...], ...]
    keeps_open: tuple[LineId, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Impairment:
    """What the unit cannot do while the job lasts. Names and tags, in the order of the description."""

    functions_lost: tuple[str, ...]
    remote_lost: tuple[str, ...]
    banks_lost: tuple[str, ...]
    pumps_lost: tuple[str, ...]
    panels_lost: tuple[str, ...]
    backups_lost: tuple[str, ...]
    power_sources_left: tuple[str, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Verdict:
    """Whether a property holds, and the evidence for it."""

    holds: bool
    evidence: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Plan:
    """The whole plan of a job on a unit, with the network it was made on.

    `states` holds the state before the first step and after each step, so `states[i + 1]` follows `steps[i]`.
    `dead`: all lines brought to zero (the zone among them). `unheld`: zone lines at zero whose vent no lock holds.
    """

    unit: Unit
    job: Job
    on: str
    network: Network
    zone: tuple[LineId, ...]
    dead: tuple[LineId, ...]
    steps: tuple[Step, ...]
    states: tuple[State, ...]
    locks: tuple[Lock, ...]
    open_to_vent: tuple[LineId, ...]
    unheld: tuple[LineId, ...]
    grades: tuple[Grade, ...]
    impairment: Impairment

    def start(self) -> State:
        """The state of the unit before the job."""
        return self.states[0]

    def isolated(self) -> State:
        """The state after the last step before the work."""
        last = max(i for i, s in enumerate(self.steps) if s.section in _BEFORE_WORK)
        return self.states[last + 1]

    def end(self) -> State:
        """The state after the last step."""
        return self.states[-1]


_BEFORE_WORK = frozenset({Section.PREPARE, Section.ISOLATE, Section.RELEASE, Section.VERIFY})


@dataclass(frozen=True, slots=True, kw_only=True)
class Obstacle:
    """One reason why no safe plan exists: which line, what is wrong with it, by which way pressure comes."""

    line: LineId
    words: str
    path: tuple[str, ...] = ()


@dataclass(frozen=True, slots=True, kw_only=True)
class Refusal:
    """No plan: the obstacles of the nearest attempt."""

    unit: Unit
    job: Job
    on: str
    zone: tuple[LineId, ...]
    obstacles: tuple[Obstacle, ...]

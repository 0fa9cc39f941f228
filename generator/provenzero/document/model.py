"""A document as words and figures in print units: what is on the paper, without markup and without physics."""

from collections.abc import Mapping
from dataclasses import dataclass, field
from enum import StrEnum
from typing import TypeAlias


class Paper(StrEnum):
    """The sheet it is printed on."""

    A4 = "a4"
    LETTER = "letter"


class Signal(StrEnum):
    """Signal words of ANSI Z535.4 and ISO 3864-2: what not heeding the panel will or could cause."""

    DANGER = "danger"
    WARNING = "warning"
    CAUTION = "caution"
    NOTICE = "notice"


@dataclass(frozen=True, slots=True, kw_only=True)
class Text:
    """Printed words in a cell; `strong` for what must be found at a glance."""

    words: str
    strong: bool = False


@dataclass(frozen=True, slots=True, kw_only=True)
class Blank:
    """Room for handwriting, with a small label of what goes there."""

    label: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Ticks:
    """Boxes to tick, each with its words."""

    words: tuple[str, ...]


Cell: TypeAlias = Text | Blank | Ticks


@dataclass(frozen=True, slots=True, kw_only=True)
class Fact:
    """One labelled fact of a head."""

    label: str
    value: Cell


@dataclass(frozen=True, slots=True, kw_only=True)
class Facts:
    """Labelled facts side by side."""

    items: tuple[Fact, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Words:
    """Running text, a paragraph each, under a small heading if it has one."""

    paragraphs: tuple[str, ...]
    title: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Bullets:
    """Short points under a small heading."""

    title: str
    points: tuple[str, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Notice:
    """A warning panel: the hazard, what it does, how to avoid it. It asks for no operation."""

    signal: Signal
    word: str
    title: str
    lines: tuple[str, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Column:
    """A column of a table and its share of the width in percent."""

    title: str
    percent: int


@dataclass(frozen=True, slots=True, kw_only=True)
class Table:
    """Rows under headed columns. The first cell of a row names the row."""

    title: str
    columns: tuple[Column, ...]
    rows: tuple[tuple[Cell, ...], ...]
    before: tuple[str, ...] = ()


@dataclass(frozen=True, slots=True, kw_only=True)
class SignOff:
    """A statement that somebody answers for, with the boxes to fill in."""

    statement: str
    boxes: tuple[str, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class SignOffs:
    """Statements to be signed, under a small heading."""

    title: str
    items: tuple[SignOff, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Reading:
    """An instrument, where it is, what it must show, and the label of the box for what it does show."""

    gauge: str
    place: str
    expected: str
    label: str


@dataclass(frozen=True, slots=True, kw_only=True)
class StepCard:
    """One step on paper: one action, how it must end, the boxes for the hand, what to do if it is not so.

    `device`: tag, plain name and location. `speaks_of`: the lines meant, where no device is. `unlock`, `lock`: the
    lock that comes off before the action or goes on with it. `outcomes`: what eye and ear must find. `asks`: labels
    of further boxes. `figures`: volumes and times to expect. `hold`: words of a hold point, empty if it is none.
    """

    number: str
    action: str
    warnings: tuple[Notice, ...] = ()
    device: tuple[str, ...] = ()
    speaks_of: str = ""
    unlock: str = ""
    lock: str = ""
    readings: tuple[Reading, ...] = ()
    outcomes: tuple[str, ...] = ()
    asks: tuple[str, ...] = ()
    figures: tuple[str, ...] = ()
    why: str = ""
    otherwise: str = ""
    hold: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Steps:
    """Steps in the order in which they are done."""

    cards: tuple[StepCard, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class DrawingSlot:
    """Where the schematic goes, with its caption and the words for somebody who cannot see it."""

    caption: str
    alternative: str


Block: TypeAlias = Facts | Words | Bullets | Notice | Table | SignOffs | Steps | DrawingSlot


@dataclass(frozen=True, slots=True, kw_only=True)
class Section:
    """A part of the document. `mark` stands at the page edge; `fresh` starts on a new page."""

    id: str
    mark: str
    title: str
    blocks: tuple[Block, ...]
    fresh: bool = False


@dataclass(frozen=True, slots=True, kw_only=True)
class Identity:
    """What stands on every page: (label, words) pairs, and marks that must be seen on each."""

    facts: tuple[tuple[str, str], ...]
    marks: tuple[str, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Document:
    """One paper. `words` are the small fixed words of the page (box labels, page x of y)."""

    language: str
    title: str
    subtitle: str
    subject: str
    issued: str
    paper: Paper
    identity: Identity
    words: Mapping[str, str] = field(default_factory=dict)
    sections: tuple[Section, ...] = ()

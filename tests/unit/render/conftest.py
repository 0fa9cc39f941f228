"""A document built by hand with every kind of block in it, long enough for several pages."""

import pytest

from provenzero.document.model import (
    Blank,
    Block,
    Bullets,
    Column,
    Document,
    DrawingSlot,
    Fact,
    Facts,
    Identity,
    Notice,
    Paper,
    Reading,
    Section,
    Signal,
    SignOff,
    SignOffs,
    StepCard,
    Steps,
    Table,
    Text,
    Ticks,
    Words,
)

SVG = (
    '<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 180 60"><title>Schematic of the unit</title>'
    '<rect x="5" y="5" width="170" height="50" fill="none" stroke="#000"/></svg>'
)
PAGE_WORDS = {
    "done": "done", "page": "Page", "of": "of", "contents": "Parts", "must_show": "Must show", "read": "Read",
    "initials": "Initials", "time": "Time", "otherwise": "If not:", "why": "Why:", "gauge": "Gauge", "place": "Where",
    "hold": "HOLD POINT", "hold_sign": "Signature", "symbol": "Safety alert symbol", "no_drawing": "No drawing.",
}  # fmt: skip


def panel(signal: Signal) -> Notice:
    return Notice(signal=signal, word=signal.value.upper(), title=f"Title of {signal.value}", lines=("What it does.",))


def reading(step: int, number: int) -> Reading:
    return Reading(gauge=f"PG-{number}", place=f"board{step}", expected="0\u00a0psi", label="psi")


def card(number: int) -> StepCard:
    return StepCard(
        number=f"B{number}",
        action=f"Close HV-{number}.",
        warnings=(panel(Signal.WARNING),) if number % 5 == 0 else (),
        device=(f"HV-{number}", "shut-off valve", "skid"),
        speaks_of="For: header",
        unlock="LOCK 9 OFF" if number % 4 == 0 else "",
        lock=f"LOCK {number} ON",
        readings=tuple(reading(number, n) for n in range(number % 5)),
        outcomes=("Nothing moves",),
        asks=("Start", "Due"),
        figures=("Comes out: 2 gal.",),
        why="keeps back the bank",
        otherwise=f"unlike{number}: STOP.",
        hold=f"second{number} checks." if number % 3 == 0 else "",
    )


def blocks() -> tuple[Block, ...]:
    facts = Facts(
        items=(
            Fact(label="Unit", value=Text(words="HCU-7 <script>alert(1)</script>", strong=True)),
            Fact(label="Valid until", value=Blank()),
            Fact(label="Copy at", value=Ticks(words=("job", "control point"))),
        )
    )
    table = Table(
        title="Locks",
        columns=(Column(title="Lock", percent=30), Column(title="By, time", percent=70)),
        rows=((Text(words="1\nsecond line", strong=True), Blank()), (Text(words="2"), Blank(label="name"))),
        before=("One row for each lock.",),
    )
    return (
        facts,
        Words(title="Rules", paragraphs=("One & two.",)),
        Words(paragraphs=("A lead.",)),
        Bullets(title="Limits", points=("First.", "Second.")),
        *(panel(signal) for signal in Signal),
        table,
        SignOffs(title="Start", items=(SignOff(statement="I have read it.", boxes=("Name", "Signature")),)),
        DrawingSlot(caption="The zone.", alternative="In words."),
    )


@pytest.fixture
def svg() -> str:
    return SVG


@pytest.fixture
def document() -> Document:
    return Document(
        language="en",
        title="Lock-out permit",
        subtitle='Change "hoses" - ram',
        subject="Isolation of ram",
        issued="2026-03-05 06:40",
        paper=Paper.A4,
        identity=Identity(
            facts=(("Document", 'LP "7" \\ 42'), ("Fingerprint", "9f3a 61c0 7be2 4d15")),
            marks=("NOT VERIFIED AGAINST THE STEEL",),
        ),
        words=PAGE_WORDS,
        sections=(
            Section(id="permit", mark="PERMIT", title="Permit", blocks=blocks()),
            Section(
                id="isolate",
                mark="B ISOLATE",
                title="B. Isolate",
                fresh=True,
                blocks=(Words(paragraphs=("Lead.",)), Steps(cards=tuple(card(n) for n in range(1, 15)))),
            ),
        ),
    )

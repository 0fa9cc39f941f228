"""A refusal on paper: unmistakable, with every obstacle and no invented way around it."""

import pytest

from provenzero.document.context import PermitContext
from provenzero.document.model import Bullets, Document, Notice, Signal, Table, Text
from provenzero.document.refusal import reasons, refusal
from provenzero.document.wording import Wording
from provenzero.network.model import LineId
from provenzero.plan.model import Obstacle, Plan, Refusal


@pytest.fixture
def refused(plan: Plan) -> Refusal:
    return Refusal(
        unit=plan.unit,
        job=plan.job,
        on=plan.on,
        zone=plan.zone,
        obstacles=(
            Obstacle(line=LineId("ram.close"), words="trapped"),
            Obstacle(line=LineId("header"), words="reached", path=("P-1", "header")),
            Obstacle(line=LineId("header"), words="something_new"),
        ),
    )


@pytest.fixture
def document(refused: Refusal, context: PermitContext, wording: Wording) -> Document:
    return refusal(refused, context, wording)


def test_every_page_says_that_it_is_no_permit(document: Document) -> None:
    assert document.identity.marks == ("REFUSED - NOT A PERMIT",)
    assert [b.signal for b in document.sections[0].blocks if isinstance(b, Notice)] == [Signal.DANGER]


def test_every_obstacle_is_listed_with_its_way(document: Document) -> None:
    table = next(b for b in document.sections[0].blocks if isinstance(b, Table))
    rows = [[cell.words for cell in cells if isinstance(cell, Text)] for cells in table.rows]
    assert [cells[0] for cells in rows] == ["ram.close", "header", "header"]
    assert rows[0][1].startswith("Pressure stays trapped here")
    assert rows[1][2] == "P-1 > header"
    assert rows[2][1] == "Not possible: something_new."


def test_nobody_is_sent_to_slacken_a_fitting(document: Document) -> None:
    advice = next(b for b in document.sections[0].blocks if isinstance(b, Bullets))
    assert [text for text in advice.points if "slacken" in text] == ["Never slacken a fitting to let pressure out."]


def test_a_terminal_gets_each_reason_in_one_line(refused: Refusal, wording: Wording) -> None:
    found = reasons(refused, wording)
    assert len(found) == len(refused.obstacles)
    assert found[0].startswith("ram.close: Pressure stays trapped")

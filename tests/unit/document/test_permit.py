"""The permit holds everything of its plan: each step, lock, source, gap and doubt, and no figure nobody computed."""

from collections.abc import Iterator
from dataclasses import replace

import pytest

from provenzero.document.brief import Brief
from provenzero.document.figures import PermitFigures
from provenzero.document.model import (
    Blank,
    Bullets,
    Document,
    Facts,
    Notice,
    Signal,
    SignOffs,
    StepCard,
    Steps,
    Table,
    Text,
    Words,
)
from provenzero.document.permit import permit
from provenzero.network.model import LineId
from provenzero.plan.model import Plan, Verdict
from provenzero.unit.model import Verification

NB = "\u00a0"


@pytest.fixture
def document(brief: Brief) -> Document:
    return made(brief)


def made(brief: Brief) -> Document:
    return permit(brief.plan, brief.figures, brief.proof, brief.context, brief.wording)


def cards(document: Document) -> dict[str, StepCard]:
    blocks = [block for section in document.sections for block in section.blocks if isinstance(block, Steps)]
    return {card.number: card for block in blocks for card in block.cards}


def table(document: Document, title: str) -> Table:
    return next(
        block
        for section in document.sections
        for block in section.blocks
        if isinstance(block, Table) and block.title == title
    )


def notices(document: Document) -> Iterator[Notice]:
    for section in document.sections:
        for block in section.blocks:
            if isinstance(block, Notice):
                yield block


def words(document: Document) -> Iterator[str]:
    for section in document.sections:
        for block in section.blocks:
            match block:
                case Table():
                    yield from block.before
                    yield from (c.words for row in block.rows for c in row if isinstance(c, Text))
                case Facts():
                    yield from (f.value.words for f in block.items if isinstance(f.value, Text))
                case Words():
                    yield from block.paragraphs
                case Bullets():
                    yield from block.points
                case Notice():
                    yield from block.lines
                case SignOffs():
                    yield from (item.statement for item in block.items)
                case _:
                    continue


def row(found: Table, first: str) -> list[str]:
    for cells in found.rows:
        texts = [cell.words if isinstance(cell, Text) else "" for cell in cells]
        if texts[0].startswith(first):
            return texts
    raise AssertionError(f"no row {first}")


def test_every_step_of_the_plan_is_on_the_paper_in_its_order(document: Document, plan: Plan) -> None:
    assert list(cards(document)) == [step.id for step in plan.steps]


def test_every_lock_is_in_the_register_with_its_position_and_room_for_three_signatures(
    document: Document, plan: Plan
) -> None:
    rows = table(document, "Locks").rows
    assert [cells[0] for cells in rows] == [Text(words=str(lock.number), strong=True) for lock in plan.locks]
    assert [cells[2].words for cells in rows if isinstance(cells[2], Text)] == [
        "OFF\n(ON)", "CLOSED\n(OPEN)", "OPEN\n(CLOSED)", "OPEN\n(OPEN)",
    ]  # fmt: skip
    assert all(cells[4:] == (Blank(), Blank(), Blank()) for cells in rows)


def test_a_lock_says_what_it_holds_back_and_keeps_open(document: Document) -> None:
    register = table(document, "Locks")
    assert "Holds back: bank B-1, fluid under gas pressure" in row(register, "2")[3]
    assert "Keeps open to vent: accumulator header" in row(register, "3")[3]


def test_the_lock_goes_on_in_the_step_that_sets_the_device(document: Document) -> None:
    assert cards(document)["B1"].lock == "LOCK 1 ON"
    assert cards(document)["B1"].action == "Switch Q-1 OFF."
    assert cards(document)["F5"].unlock.startswith("LOCK 1 OFF")


def test_a_step_names_tag_plain_name_and_place(document: Document) -> None:
    assert cards(document)["B3"].device == ("HV-31", "isolation valve of bank B-1", "place of HV-31")


def test_a_reading_is_a_band_wide_enough_for_the_error_of_its_gauge(document: Document) -> None:
    reading = cards(document)["A4"].readings[0]
    assert (reading.gauge, reading.expected, reading.label) == ("PG-1", f"2650 to 3050{NB}psi", "psi")


def test_zero_is_not_widened_by_the_error_of_its_gauge(document: Document) -> None:
    assert cards(document)["C1"].readings[0].expected == f"0{NB}psi"


def test_a_fluid_column_is_printed_apart_from_zero(document: Document) -> None:
    card = cards(document)["D2"]
    assert [r.expected for r in card.readings] == [f"0{NB}psi", f"0 to 5.0{NB}psi"]
    assert any("fluid column" in text for text in card.figures)


def test_what_comes_out_stands_in_the_step_that_lets_it_out(document: Document) -> None:
    text = " ".join(cards(document)["C1"].figures)
    assert f"2.6 to 3.2{NB}gal in 30 to 60{NB}s" in text
    assert f"1100 to 1300{NB}psi" in text


def test_the_warning_belongs_to_the_step_it_warns_of(document: Document) -> None:
    found = {number: [p.title for p in card.warnings] for number, card in cards(document).items() if card.warnings}
    assert found == {
        "C1": ["Fluid under pressure comes out"],
        "F4": ["Pipe ram moves", "Pressure comes back"],
        "F5": ["P-1 starts by itself"],
    }
    assert all(p.signal is Signal.WARNING for card in cards(document).values() for p in card.warnings)


def test_a_hold_point_asks_for_a_second_person(document: Document, plan: Plan) -> None:
    held = {number for number, card in cards(document).items() if card.hold}
    assert held == {step.id for step in plan.steps if step.hold_point}


def test_each_function_tried_from_a_panel_has_its_own_outcome(document: Document) -> None:
    assert cards(document)["D1"].outcomes[:2] == ("Pipe ram: nothing moves", "Gate valve: nothing moves")


def test_a_step_says_why(document: Document) -> None:
    assert cards(document)["B3"].why == "keeps back bank B-1, fluid under gas pressure"
    assert cards(document)["C1"].why == "keeps accumulator header open to the vent"


def test_watching_zero_takes_the_time_of_the_site(document: Document) -> None:
    assert cards(document)["D4"].action == f"Watch all these gauges for 15{NB}min."


def test_without_a_hold_time_the_site_is_asked_for_it(brief: Brief) -> None:
    document = made(replace(brief, context=replace(brief.context, hold_s=None)))
    assert cards(document)["D4"].action == "Watch all these gauges for the hold time of the site."
    assert "Hold time" in cards(document)["D4"].asks


def test_every_source_is_in_the_energy_table_with_gas_and_fluid_apart(document: Document) -> None:
    energy = table(document, "Energy")
    assert row(energy, "Bank B-1, fluid side")[4:] == ["Lock 2", f"up to 3000{NB}psi"]
    assert row(energy, "Nitrogen of bank B-1, 2 bottles")[4].startswith("STAYS CHARGED")
    assert row(energy, "supply board")[4:] == ["Lock 1", "stays live"]
    assert row(energy, "pump P-1")[4:] == ["Lock 1", "dead"]
    assert row(energy, "Trapped in: accumulator header")[4:] == ["Let out; lock 3 keeps it open", "zero"]


def test_a_source_that_nothing_is_shown_to_keep_away_is_said_to_be_so(brief: Brief) -> None:
    open_plan = replace(brief.plan, grades=(), locks=brief.plan.locks[2:])
    unproven = {**brief.proof, "locked": Verdict(holds=False, evidence="a way in")}
    document = made(replace(brief, plan=open_plan, proof=unproven))
    assert row(table(document, "Energy"), "Bank B-1, fluid side")[4].startswith("NOT SHOWN")


def test_drained_nitrogen_that_stays_is_at_its_precharge(brief: Brief) -> None:
    states = tuple(
        replace(s, pressures={**s.pressures, LineId("B-1.fluid"): (0.0, 0.0)}) if place else s
        for place, s in enumerate(brief.plan.states)
    )
    document = made(replace(brief, plan=replace(brief.plan, states=states)))
    found = row(table(document, "Energy"), "Nitrogen of bank B-1")
    assert found[5] == f"precharge, 900 to 1000{NB}psi"


def test_zero_is_shown_twice_for_each_group_of_lines(document: Document) -> None:
    found = table(document, "Zero, shown twice")
    first = row(found, "accumulator header")
    assert (first[1], first[3]) == (f"PG-1: 0{NB}psi (step D2)", f"PG-2: 0 to 5.0{NB}psi (step D2)")
    assert row(found, "Pipe ram, closing line")[1::2][:2] == ["test gauge (step D3)"] * 2
    power = row(found, "power to pump P-1")
    assert (power[1], power[3]) == ("try-start (step B2): no start", "voltage tester: 0 V")


def test_a_line_that_nothing_shows_is_said_to_be_unshown(brief: Brief) -> None:
    steps = tuple(s for s in brief.plan.steps if s.id not in ("D2", "D3", "B2"))
    states = brief.plan.states[: len(steps) + 1]
    document = made(replace(brief, plan=replace(brief.plan, steps=steps, states=states)))
    found = row(table(document, "Zero, shown twice"), "accumulator header")
    assert (found[1], found[3]) == ("NONE on this unit", "NONE on this unit")


def test_what_is_lost_is_named_as_people_name_it(document: Document) -> None:
    lost = table(document, "Out of service while the job lasts")
    assert row(lost, "Functions that do not work")[1] == "Pipe ram; Gate valve"
    assert row(lost, "Power sources left")[1].startswith("NONE")


def test_an_unverified_description_is_marked_and_warned_of(document: Document) -> None:
    assert document.identity.marks == ("NOT VERIFIED AGAINST THE STEEL",)
    assert any("nobody has checked" in n.title for n in notices(document))


def test_a_verified_description_is_not_marked(brief: Brief) -> None:
    seen = replace(brief.plan.unit.description, verification=Verification(by="A. Walker", on="2026-02-01"))
    checked = replace(brief.plan, unit=replace(brief.plan.unit, description=seen))
    document = made(replace(brief, plan=checked))
    assert document.identity.marks == ()
    assert "by A. Walker on 2026-02-01" in set(words(document))


@pytest.mark.parametrize("missing", ["locked", "honest"])
def test_a_property_that_was_not_shown_marks_every_page(missing: str, brief: Brief) -> None:
    partial = {k: v for k, v in brief.proof.items() if k != missing}
    document = made(replace(brief, proof=partial))
    assert f"NOT PROVEN: {missing.capitalize()}" in document.identity.marks
    assert any(n.signal is Signal.DANGER for n in notices(document))
    assert row(table(document, "Properties"), missing.capitalize())[2] == "NOT CHECKED"


def test_a_property_that_fails_is_printed_as_failing(brief: Brief) -> None:
    failing = {**brief.proof, "dead": Verdict(holds=False, evidence="header may hold 3 psi")}
    document = made(replace(brief, proof=failing))
    assert row(table(document, "Properties"), "Dead")[2:] == ["DOES NOT HOLD", "header may hold 3 psi"]


def test_a_proven_plan_has_no_danger_panel_for_its_proof(document: Document) -> None:
    assert not [n for n in notices(document) if n.signal is Signal.DANGER]


def test_a_single_leak_that_reaches_the_work_is_warned_of_at_the_start(document: Document) -> None:
    first = document.sections[0]
    assert any(isinstance(b, Notice) and "leaking barrier" in b.title and "Q-1" in b.lines[0] for b in first.blocks)


def test_an_unheld_vent_is_warned_of_and_listed(brief: Brief) -> None:
    document = made(replace(brief, plan=replace(brief.plan, unheld=(LineId("ram.close"),))))
    assert any("cannot be locked" in n.title for n in notices(document))
    assert any("Pipe ram, closing line: its vent cannot be locked" in text for text in words(document))


def test_figures_that_nobody_computed_are_not_known_and_never_zero(brief: Brief) -> None:
    document = made(replace(brief, figures=PermitFigures()))
    for what in ("Fluid that returns", "Room in the reservoir", "Charging time", "Temperature"):
        assert row(table(document, "Computed figures"), what)[1] == "not known"
    assert row(table(document, "Energy"), "Bank B-1, fluid side")[2].endswith("stored energy not known")
    assert cards(document)["C1"].figures == ()


def test_fluid_that_the_reservoir_cannot_take_is_warned_of(brief: Brief) -> None:
    document = made(replace(brief, figures=replace(brief.figures, reservoir_room_m3=0.011)))
    assert any("reservoir cannot take" in n.title for n in notices(document))


def test_every_gap_of_the_description_is_listed_with_what_was_assumed(document: Document) -> None:
    found = table(document, "Not known about this unit, and what was assumed")
    assert row(found, "functions.gate.valve.centre")[1:3] == ["212", "may block <or> vent"]


def test_a_rig_in_the_us_is_told_what_the_rule_leaves_out(document: Document) -> None:
    text = " ".join(words(document))
    assert "leaves out drilling and well servicing" in text
    assert "Benchmarked against 29 CFR 1910.147" in text
    assert "complies" not in text


def test_signatures_are_asked_for_issue_acceptance_hand_back_and_cancelling(document: Document) -> None:
    signed = [
        item.statement.split()[0].strip(":")
        for section in document.sections
        for block in section.blocks
        if isinstance(block, SignOffs)
        for item in block.items
    ]
    assert signed == ["I", "Issue", "Acceptance", "Work", "I", "Tests", "Inspector"]


def test_work_may_start_comes_after_verification_and_before_the_work(document: Document) -> None:
    ids = [section.id for section in document.sections]
    assert ids.index("release") < ids.index("verify") < ids.index("work") < ids.index("reinstate") < ids.index("test")
    assert any(isinstance(block, SignOffs) for block in document.sections[ids.index("verify")].blocks)


def test_columns_share_the_whole_width(document: Document) -> None:
    for section in document.sections:
        for block in section.blocks:
            if isinstance(block, Table):
                assert 96 <= sum(column.percent for column in block.columns) <= 100, block.title
                assert all(len(cells) == len(block.columns) for cells in block.rows), block.title


def test_the_same_input_gives_the_same_document(document: Document, brief: Brief) -> None:
    assert document == made(replace(brief, proof=dict(reversed(list(brief.proof.items())))))


def test_the_fingerprint_is_grouped_in_fours(document: Document) -> None:
    assert ("Fingerprint", "9f3a 61c0 7be2 4d15") in document.identity.facts

"""The words on paper: complete, short, and free of claims that nobody may make."""

import re

import pytest

from provenzero.document.wording import Wording, facts_of, load_wording, wording
from provenzero.failure.grade import IsolationGrade
from provenzero.network.model import DeviceKind
from provenzero.plan.model import Purpose, Section, StepKind
from provenzero.unit.model import Jurisdiction

WORDS = load_wording()
BY_ACT = {
    StepKind.SET_AND_LOCK,
    StepKind.SET,
    StepKind.UNLOCK_AND_SET,
    StepKind.RESTORE,
}
STEP_FACTS = {
    "unit", "on", "tag", "position", "was", "line", "gauges", "hold", "text", "function", "panel", "pump", "names",
}  # fmt: skip
VERBS = {
    "Back", "Charge", "Check", "Clear", "Close", "Compare", "Fill", "Fit", "Leave", "Let", "Look", "Open", "Operate",
    "Put", "Read", "Set", "Sign", "Switch", "Take", "Tell", "Try", "Watch", "Work",
}  # fmt: skip
CONDITION = re.compile(r"^When [^,]+, (\w)")
TEXTS = {k: v for k, v in WORDS.texts.items() if re.fullmatch(r"step\.\w+\.text|act\.\w+(\.\w+)?", k)} | {
    "clear": WORDS.texts["step.clear.text"]
}
POSITIONS = (
    "open", "closed", "on", "off", "close", "centre", "set", "backed_off", "full_open", "venting", "neutral", "sending",
)  # fmt: skip


@pytest.mark.parametrize("kind", list(StepKind))
def test_every_kind_of_step_says_what_to_do_and_what_to_do_otherwise(kind: StepKind) -> None:
    assert kind in BY_ACT or WORDS.has(f"step.{kind.value}.text")
    assert WORDS.has(f"step.{kind.value}.otherwise")


@pytest.mark.parametrize("position", POSITIONS)
def test_every_position_has_words_and_an_action(position: str) -> None:
    assert WORDS.has(f"positions.{position}")
    assert WORDS.has(f"act.{position}")


@pytest.mark.parametrize("key", sorted(TEXTS))
def test_a_step_asks_for_known_facts_only(key: str) -> None:
    assert facts_of(TEXTS[key]) <= STEP_FACTS


@pytest.mark.parametrize("key", sorted(set(TEXTS) - {"step.job_text.text"}))
def test_a_step_starts_with_a_verb_or_a_condition_and_stays_short(key: str) -> None:
    text = TEXTS[key]
    condition = CONDITION.match(text)
    action = text[condition.start(1) :].capitalize() if condition else text
    assert action.split()[0] in VERBS
    assert len(text.split()) <= 20
    assert text.endswith(".")


@pytest.mark.parametrize("key", sorted(TEXTS))
def test_a_step_asks_for_one_action(key: str) -> None:
    assert not re.search(r" then |;|\. \w", TEXTS[key])


def test_every_answer_to_a_failed_step_fits_one_line_and_says_stop_or_wait() -> None:
    found = {k: v for k, v in WORDS.texts.items() if re.fullmatch(r"step\.\w+\.otherwise", k)}
    assert found
    for key, text in found.items():
        assert len(text) <= 62, key
        assert re.search(r"STOP|wait|not start|not handed back", text), key


def test_every_member_of_a_closed_set_has_words() -> None:
    for section in Section:
        assert WORDS.has(f"titles.{section.value}")
        assert WORDS.has(f"marks.{section.value}")
        assert WORDS.has(f"sections.{section.value}")
    for purpose in Purpose:
        assert WORDS.has(f"register.{purpose.value}")
    for grade in IsolationGrade:
        assert WORDS.has(f"grades.names.{grade.value}")
    for where in Jurisdiction:
        assert WORDS.has(f"jurisdiction.{where.value}")
        assert f"basis.rows.{where.value}" in WORDS.rows
    for key in WORDS.branch("proof.names"):
        assert WORDS.has(f"proof.meanings.{key}")


def test_actions_by_kind_of_device_name_kinds_there_are() -> None:
    kinds = {key.split(".")[1] for key in WORDS.texts if re.fullmatch(r"act\.\w+\.\w+", key)}
    assert kinds <= {kind.value for kind in DeviceKind}


def test_no_text_claims_to_comply() -> None:
    every = [*WORDS.texts.values(), *(text for items in WORDS.lists.values() for text in items)]
    every += [cell for rows in WORDS.rows.values() for row in rows for cell in row]
    assert not [text for text in every if re.search(r"compl(y|ies|iant)", text, re.IGNORECASE)]


def test_each_jurisdiction_is_benchmarked_against_the_lock_out_rule() -> None:
    for where in Jurisdiction:
        assert "Benchmarked against 29 CFR 1910.147" in WORDS.texts[f"jurisdiction.{where.value}"]


def test_a_fact_is_filled_in() -> None:
    words = wording({"language": "en", "a": {"b": "Close {tag}."}})
    assert words.say("a.b", tag="HV-1") == "Close HV-1."


def test_a_missing_key_or_fact_is_a_fault() -> None:
    words = wording({"language": "en", "a": "Close {tag}."})
    with pytest.raises(KeyError):
        words.say("b")
    with pytest.raises(KeyError):
        words.say("a")


def test_braces_in_a_fact_stay_as_they_are() -> None:
    words = wording({"language": "en", "a": "{text}"})
    assert words.say("a", text="{tag} {0}") == "{tag} {0}"


def test_a_value_that_is_no_text_is_refused() -> None:
    with pytest.raises(ValueError, match="a is neither"):
        wording({"language": "en", "a": 3})


def test_a_branch_keeps_the_order_of_the_file() -> None:
    words = wording({"language": "en", "a": {"x": "1", "w": "2", "b": {"deep": "3"}}})
    assert list(words.branch("a")) == ["x", "w"]


def test_a_language_that_is_not_there_is_an_error() -> None:
    with pytest.raises(FileNotFoundError):
        load_wording("xx")


def test_names_of_nothing_are_none() -> None:
    assert isinstance(WORDS, Wording)
    assert WORDS.names(()) == "none"

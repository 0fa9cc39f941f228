"""Laws of reading: it never fails otherwise than with findings, and loses and invents nothing."""

import json

from hypothesis import given
from hypothesis import strategies as st

from provenzero.finding import Place
from provenzero.reading.lines import Document, Value, load_text
from provenzero.reading.text import decoded

# What a line of text may hold: no control characters, no line ends but those the strategies add.
WORDS = st.text(
    st.characters(exclude_categories=("Cc", "Cs", "Cn", "Zl", "Zp"), exclude_characters="\ufeff"), max_size=30
)
SCALARS = st.none() | st.booleans() | st.integers(-(10**15), 10**15) | WORDS
VALUES: st.SearchStrategy[Value] = st.recursive(
    SCALARS, lambda inner: st.lists(inner, max_size=4) | st.dictionaries(WORDS.filter(bool), inner, max_size=4)
)
# fmt: off
PIECES = st.sampled_from([
    "a", "b: ", ": ", "- ", "[", "]", "{", "}", ",", "'", '"', "#", "&x ", "*x", "!!t ", "? ", "|", "<<", "~", "@", "%",
    "\\", "\n", "\n  ", "\t", "|\n", "---\n", "\0", "1e9", ".nan", "é",
])
# fmt: on


def paths(value: Value, path: tuple[str | int, ...] = ()) -> list[tuple[str | int, ...]]:
    inner: list[tuple[str | int, Value]] = (
        list(value.items()) if isinstance(value, dict) else list(enumerate(value)) if isinstance(value, list) else []
    )
    return [path] + [found for key, item in inner for found in paths(item, (*path, key))]


@given(st.dictionaries(WORDS.filter(bool), VALUES, max_size=5), st.sampled_from([None, 1, 3]))
def test_json_is_read_as_what_it_says(data: dict[str, Value], indent: int | None) -> None:
    outcome = load_text(json.dumps(data, ensure_ascii=False, indent=indent), "a.json")
    assert isinstance(outcome, Document)
    assert outcome.data == data


@given(st.dictionaries(WORDS.filter(bool), VALUES, max_size=5))
def test_every_value_has_a_place_inside_the_text(data: dict[str, Value]) -> None:
    text = json.dumps(data, ensure_ascii=False, indent=2)
    outcome = load_text(text, "a.json")
    assert isinstance(outcome, Document)
    lines = text.splitlines()
    for path in paths(outcome.data):
        place: Place = outcome.place(path)
        assert place.line is not None
        assert place.column is not None
        assert 1 <= place.column <= len(lines[place.line - 1])


@given(st.lists(PIECES, max_size=40).map("".join) | st.text(max_size=60))
def test_any_text_gives_a_document_or_findings_with_a_line_in_it(text: str) -> None:
    outcome = load_text(text, "a.yaml")
    if isinstance(outcome, list):
        assert outcome
        for finding in outcome:
            assert finding.place.line is not None
            assert 1 <= finding.place.line <= text.count("\n") + 2
            assert "\n" not in str(finding)


@given(st.binary(max_size=200))
def test_any_bytes_give_text_or_one_finding(content: bytes) -> None:
    outcome = decoded(content, "a.yaml")
    assert isinstance(outcome, str) or len(outcome) == 1

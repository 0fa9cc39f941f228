"""YAML becomes plain data that knows its lines; what nobody can have meant is refused with the cure."""

from pathlib import Path

import pytest

from provenzero.finding import Finding
from provenzero.reading.lines import DEEPEST, MOST_VALUES, Document, load, load_text, written

TEXT = """\
# a unit
unit:
  tag: KU-1
pumps:
- tag: P-1
  flow: 12 L/min
- tag: P-2
  valves: [V-1, {tag: V-2}]
"upper rams": {}
"""


def document(text: str) -> Document:
    outcome = load_text(text, "rig.yaml")
    assert isinstance(outcome, Document), [str(finding) for finding in outcome]
    return outcome


def findings(text: str) -> list[Finding]:
    outcome = load_text(text, "rig.yaml")
    assert isinstance(outcome, list)
    return outcome


def only(text: str) -> Finding:
    outcome = findings(text)
    assert len(outcome) == 1
    return outcome[0]


def test_a_file_is_loaded_under_the_name_that_was_given(tmp_path: Path) -> None:
    (tmp_path / "rig.yaml").write_text(TEXT)
    outcome = load(tmp_path / "rig.yaml")
    assert isinstance(outcome, Document)
    assert outcome.file == str(tmp_path / "rig.yaml")
    assert outcome.data == document(TEXT).data


def test_a_file_that_is_not_there_is_a_finding(tmp_path: Path) -> None:
    outcome = load(tmp_path / "none.yaml")
    assert isinstance(outcome, list)


@pytest.mark.parametrize(
    ("path", "position"),
    [
        (("unit", "tag"), (3, 8)),
        (("pumps", 0, "flow"), (6, 9)),
        (("pumps", 1, "valves", 0), (8, 12)),
        (("pumps", 1, "valves", 1, "tag"), (8, 23)),
    ],
)
def test_a_value_knows_its_line_and_column(path: tuple[str | int, ...], position: tuple[int, int]) -> None:
    place = document(TEXT).place(path)
    assert (place.file, place.line, place.column) == ("rig.yaml", *position)


def test_a_mapping_or_list_is_placed_at_its_key_and_an_item_at_its_dash() -> None:
    loaded = document(TEXT)
    assert loaded.place(("unit",)).line == 2
    assert loaded.place(("pumps",)).line == 4
    assert loaded.place(("pumps", 1)).line == 7


def test_a_key_knows_its_line_and_column() -> None:
    place = document(TEXT).key_place(("pumps", 0, "flow"))
    assert (place.line, place.column, place.path) == (6, 3, "pumps[0].flow")


def test_what_is_missing_is_placed_at_the_nearest_part_around_it_and_keeps_its_path() -> None:
    loaded = document(TEXT)
    assert str(loaded.place(("pumps", 1, "flow", "unit"))) == "rig.yaml:7:3: pumps[1].flow.unit"
    assert loaded.place(("banks", 3)).line == 2
    assert loaded.key_place(("pumps", 0, "nothing")).line == 5


def test_a_path_is_written_as_people_write_it() -> None:
    assert written(("pumps", 0, "flow")) == "pumps[0].flow"
    assert written(("functions", "upper rams", "lines")) == "functions['upper rams'].lines"
    assert written(()) == ""


def test_the_value_at_a_path_is_found_and_a_wrong_path_is_a_fault_of_the_caller() -> None:
    loaded = document(TEXT)
    assert loaded.at(("pumps", 1, "valves", 1, "tag")) == "V-2"
    with pytest.raises(KeyError):
        loaded.at(("unit", "tag", "more"))


@pytest.mark.parametrize("word", ["no", "No", "off", "on", "yes", "y", "n", "NO", "2026-03-31", "12:30", "1_000", "<<"])
def test_words_dates_and_times_stay_text(word: str) -> None:
    assert document(f"answer: {word}").data == {"answer": word}


@pytest.mark.parametrize("word", ["no", "on", "1", "true", "null", "2026-03-31"])
def test_a_key_is_always_text(word: str) -> None:
    assert document(f"{word}: x").data == {word: "x"}


@pytest.mark.parametrize(
    ("text", "value"),
    [
        ("true", True),
        ("False", False),
        ("null", None),
        ("~", None),
        ("", None),
        ("12", 12),
        ("-3", -3),
        ("9" * 40, 10**40 - 1),
        ("007", 7),
        ("0x1F", 31),
        ("0o17", 15),
        ("1.50", 1.5),
        ("1e3", 1000.0),
        (".5", 0.5),
        ("'12'", "12"),
        ('"true"', "true"),
        ("3000 psi", "3000 psi"),
        ("1.5.2", "1.5.2"),
        ("|\n  two\n  lines", "two\nlines"),
        (">\n  two\n  words", "two words"),
    ],
)
def test_values_are_those_of_the_core_schema(text: str, value: object) -> None:
    data = document(f"value: {text}").data
    assert data == {"value": value}
    assert type(data["value"]) is type(value)


def test_a_repeated_key_is_refused_with_both_lines() -> None:
    finding = only("unit:\n  tag: A\n  name: B\n  tag: C\n")
    assert (finding.place.line, finding.place.column, finding.place.path) == (4, 3, "unit.tag")
    assert "first on line 2" in finding.found


def test_the_same_key_may_stand_in_two_mappings() -> None:
    assert document("a: {tag: 1}\nb: {tag: 2}").data == {"a": {"tag": 1}, "b": {"tag": 2}}


def test_all_that_is_wrong_is_told_at_once() -> None:
    text = "a: 1\na: 2\nb: *x\nc: !!python/object:os.system x\nd: .nan\ne: !t {f: -.inf}\n*y : 1\n? !!str z\n: 2\n"
    assert [(f.place.line, f.found) for f in findings(text)] == [
        (2, "the key 'a' a second time (first on line 1)"),
        (3, "the alias '*x'"),
        (4, "the tag '!!python/object:os.system'"),
        (5, "the number .nan"),
        (6, "the tag '!t'"),
        (6, "the number -.inf"),
        (7, "the alias '*y'"),
        (8, "the tag '!!str'"),
    ]


def test_a_tower_of_aliases_is_refused_without_building_it() -> None:
    lines = ["a0: &a0 [x, x, x, x, x, x, x, x, x, x]"]
    lines += [f"a{n}: &a{n} [{', '.join([f'*a{n - 1}'] * 10)}]" for n in range(1, 30)]
    assert {f.expected for f in findings("\n".join(lines))} == {"the value itself, written out"}


@pytest.mark.parametrize("text", ["1e999", "-1e999", "9" * 41, "0x" + "f" * 400])
def test_a_number_beyond_all_measure_is_refused(text: str) -> None:
    assert "number" in only(f"value: {text}").found


@pytest.mark.parametrize(
    ("text", "line", "found", "expected"),
    [
        ("a: 1\n\tb: 2", 2, "a tab in the indentation", "spaces"),
        ("a:\n  b: 1\n  \tc: 2", 3, "a tab in the indentation", "spaces"),
        ("a: b: c", 1, "a colon where no value may begin", "quotes around text that holds ': '"),
        ("a: 1\n  b: 2", 2, "a colon where no value may begin", "in one column"),
        ("a:1\nb: 2", 2, "a colon where no value may begin", "a space after the colon"),
        ("x: 1\na 2\nb: 3", 2, "a line without a colon", "'key: value'"),
        ("a:\n- b\n c: d", 3, "a colon where no value may begin", "in one column"),
        ("- a\nb: 1", 2, "does not go on with the list", "'- ' in the column"),
        ("a: 'x' y", 1, "does not go on with the keys", "nothing behind quoted text"),
        ("x: 1\na: 'b\nc: 2", 2, "quote is never closed", "a closing quote"),
        ("x: 1\na: [1, 2\nb: 3", 2, "list in brackets that is not finished", "closing ']'"),
        ("x: 1\na: {b: 1\n", 2, "mapping in braces that is not finished", "closing '}'"),
        ("a: @x", 1, "a character that cannot begin a value", "quotes around text"),
        ("a: %x", 1, "a character that cannot begin a value", "quotes around text"),
        ('a: "C:\\path"', 1, "a backslash that stands for nothing", "single quotes"),
        ("a: - b", 1, "a list item behind a key", "on a line of its own"),
        ("a: ]", 1, "a bracket or comma", "a value"),
        ("a: !e!x y", 1, "a tag", "quotes around text"),
        ("a: 1\n---\nb: 2", 2, "a second document", "one document"),
        ("? [a]\n: b", 1, "a list as a key", "a word before the colon"),
        ("a: {{ x }}", 1, "a mapping as a key", "a word before the colon"),
        ("a: 1\n'': 2", 2, "an empty key", "a word before the colon"),
        ("%YAML 3.0\n---\na: 1", 1, "text that is not YAML", "'key: value' lines"),
        ("", 1, "an empty file", "'key: value' lines"),
        ("# only a comment\n", 1, "an empty file", "'key: value' lines"),
        ("- a\n- b\n", 1, "a list at the top", "'key: value' lines"),
        ("hello", 1, "the single value 'hello' at the top", "'key: value' lines"),
    ],
)
def test_broken_text_is_told_by_its_line_with_the_cure(text: str, line: int, found: str, expected: str) -> None:
    finding = only(text)
    assert finding.place.line == line
    assert found in finding.found
    assert expected in finding.expected


def test_broken_text_is_told_by_its_column_too() -> None:
    place = only("a: 1\nbc: d: e").place
    assert (place.line, place.column) == (2, 6)


def test_a_tab_behind_the_indentation_is_not_blamed_for_another_fault() -> None:
    assert only("a:\t1\n  b: 2").found == "a colon where no value may begin"
    assert only("a: b:\tc").found == "a colon where no value may begin"


@pytest.mark.parametrize("opening", ["[", "{a: ", "- "])
@pytest.mark.parametrize("depth", [DEEPEST + 1, 100_000])
def test_nesting_without_end_is_refused(opening: str, depth: int) -> None:
    assert "deep" in findings(opening * depth)[-1].found


def test_nesting_up_to_the_bound_is_taken() -> None:
    depth = DEEPEST - 1
    assert isinstance(load_text("a: " + "[" * depth + "]" * depth, "rig.yaml"), Document)


def test_values_without_end_are_refused_and_as_many_as_may_be_are_taken() -> None:
    around = 2  # the mapping and the list
    assert str(MOST_VALUES) in only("a: [" + "1," * (MOST_VALUES - around + 1) + "]").found
    assert isinstance(load_text("a: [" + "1," * (MOST_VALUES - around) + "]", "rig.yaml"), Document)


def test_a_fault_after_the_point_where_the_file_is_too_much_is_not_looked_for() -> None:
    assert len(findings("a: [" + "1," * (MOST_VALUES + 1) + "]\nb: *x\n")) == 1

"""Faults against a schema come all at once, with the line and with what would be right."""

import json
from pathlib import Path
from typing import Any

import pytest

from provenzero.reading.lines import Document, load_text
from provenzero.reading.schema import check
from provenzero.resources import schemas

QUANTITIES: dict[str, Any] = {
    "$defs": {
        "pressure": {
            "type": "string",
            "pattern": r"^\d+(\.\d+)? ?(psi|bar)$",
            "examples": ["3000 psi", "210 bar"],
        },
        "volume": {"type": "string", "pattern": r"^\d+(\.\d+)? ?(gal|L)$", "examples": ["11 gal", "40 L"]},
    }
}
ELECTRIC: dict[str, Any] = {
    "type": "object",
    "required": ["kind", "tag", "breaker"],
    "additionalProperties": False,
    "properties": {
        "kind": {"const": "electric"},
        "tag": {"type": "string"},
        "breaker": {"type": "string", "description": "Tag of the breaker. It has a lock."},
        "start": {"$ref": "quantities.schema.json#/$defs/pressure"},
    },
}
AIR: dict[str, Any] = {
    "type": "object",
    "required": ["kind", "tag"],
    "additionalProperties": False,
    "properties": {"kind": {"enum": ["air", "hand"]}, "tag": {"type": "string"}, "valve": {"type": "string"}},
}
UNIT: dict[str, Any] = {
    "$schema": "https://json-schema.org/draft/2020-12/schema",
    "type": "object",
    "additionalProperties": False,
    "properties": {
        "name": {"type": "string", "minLength": 1, "maxLength": 10},
        "revision": {"type": "string"},
        "date": {"type": "string", "format": "date"},
        "pumps": {"type": "array", "minItems": 1, "uniqueItems": True, "items": {"oneOf": [ELECTRIC, AIR]}},
        "precharge": {"anyOf": [{"$ref": "quantities.schema.json#/$defs/pressure"}, {"const": "unknown"}]},
        "volume": {"$ref": "quantities.schema.json#/$defs/volume"},
        "centre": {"enum": ["vents", "blocks", "unknown"]},
        "lockable": {"type": "boolean"},
        "bottles": {"type": "integer", "minimum": 1, "maximum": 99},
        "code": {"type": "string", "pattern": "^[A-Z]+$"},
        "format": {"const": 1},
        "returned": {"const": "none"},
        "clock": {"enum": list(range(24))},
        "month": {"enum": list(range(1, 16))},
        "place": {"type": "string", "examples": ["left end of the skid"]},
        "site": {
            "type": "object",
            "required": ["lines"],
            "properties": {"lines": {"type": "object", "examples": [{"kind": "hose", "taps": [1, True]}]}},
        },
        "bleed": {"oneOf": [{"const": "none"}, {"type": "object", "required": ["tag"]}]},
        "lock": {"anyOf": [{"required": ["hand"]}, {"required": ["pilot"]}], "type": "object"},
        "functions": {
            "type": "object",
            "propertyNames": {"pattern": "^[a-z-]+$", "description": "Lower-case words with hyphens."},
        },
        "head": {
            "type": "object",
            "properties": {"tag": {"type": "string"}},
            "dependentRequired": {"by": ["on"]},
            "allOf": [{"properties": {"by": {"type": "string"}, "on": {"type": "string"}}}],
            "unevaluatedProperties": False,
        },
    },
}


@pytest.fixture
def folder(tmp_path: Path) -> Path:
    (tmp_path / "quantities.schema.json").write_text(json.dumps(QUANTITIES))
    (tmp_path / "unit.schema.json").write_text(json.dumps(UNIT))
    return tmp_path


def told(text: str, folder: Path) -> list[str]:
    document = load_text(text, "rig.yaml")
    assert isinstance(document, Document)
    return [str(finding).removeprefix("rig.yaml:") for finding in check(document, "unit", folder)]


def test_a_right_file_has_no_findings(folder: Path) -> None:
    text = """\
name: Unit 1
date: 2026-03-31
pumps:
- {kind: electric, tag: P-1, breaker: B-1, start: 2700 psi}
- {kind: air, tag: P-2}
precharge: unknown
volume: 11 gal
centre: vents
lockable: true
bottles: 12
bleed: {tag: V-1}
functions: {upper-rams: x}
head: {tag: A, by: B, on: C}
"""
    assert told(text, folder) == []


@pytest.mark.parametrize(
    ("text", "finding"),
    [
        ("name: ''", "1:7: name: found empty text; expected text that is not empty"),
        ("name: abcdefghijk", "1:7: name: found 'abcdefghijk'; expected text of at most 10 characters"),
        ("revision: 3", "1:11: revision: found the number 3; expected text, in quotes: '3'"),
        ("revision: true", "1:11: revision: found the word true; expected text, in quotes: 'true'"),
        ("revision:", "1:10: revision: found no value; expected text"),
        ("revision: [a]", "1:1: revision: found a list of 1; expected text"),
        ("date: 31.12.2026", "1:7: date: found '31.12.2026'; expected a date such as 2026-03-31"),
        ("pumps: []", "1:1: pumps: found an empty list; expected a list that is not empty"),
        ("pumps: {}", "1:1: pumps: found an empty mapping; expected a list"),
        ("pumps: none", "1:8: pumps: found 'none'; expected a list"),
        (
            "pumps: [{kind: air, tag: P}, {kind: air, tag: P}]",
            "1:1: pumps: found a list of 2; expected a list without repetitions",
        ),
        (
            "centre: vent",
            "1:9: centre: found 'vent'; expected one of vents, blocks, unknown: did you mean 'vents'?",
        ),
        ("centre: off", "1:9: centre: found 'off'; expected one of vents, blocks, unknown"),
        ("lockable: yes", "1:11: lockable: found 'yes'; expected true or false"),
        ("bottles: 0", "1:10: bottles: found the number 0; expected a number of at least 1"),
        ("bottles: 100", "1:10: bottles: found the number 100; expected a number of at most 99"),
        ("bottles: 1.5", "1:10: bottles: found the number 1.5; expected a whole number"),
        ("format: 2", "1:9: format: found the number 2; expected the number 1"),
        ("place: 7", "1:8: place: found the number 7; expected text, in quotes: '7'"),
        ("place:", "1:7: place: found no value; expected a value such as left end of the skid"),
        ("code: abc", "1:7: code: found 'abc'; expected text of the form ^[A-Z]+$"),
        (
            "functions: {Upper Rams: x}",
            "1:13: functions['Upper Rams']: found 'Upper Rams'; expected lower-case words with hyphens",
        ),
        ("head: {by: A}", "1:1: head: found no 'on'; expected the key on"),
        ("head: {tg: A}", "1:8: head.tg: found the unknown key 'tg'; expected a known key: did you mean 'tag'?"),
        ("volume: 3000", "1:9: volume: found the number 3000; expected a value such as 11 gal or 40 L"),
        ("volume:", "1:8: volume: found no value; expected a value such as 11 gal or 40 L"),
        (
            "precharge: 1000",
            "1:12: precharge: found the number 1000; expected a value such as 3000 psi or 210 bar, or 'unknown'",
        ),
        (
            "precharge: lots",
            "1:12: precharge: found 'lots'; expected one number and its unit, such as 3000 psi or 210 bar, "
            "or 'unknown'",
        ),
        (
            "site: {}",
            "1:1: site: found no 'lines'; expected the key lines (a value such as {kind: hose, taps: [1, true]})",
        ),
        ("bleed: maybe", "1:8: bleed: found 'maybe'; expected 'none', or a mapping of keys"),
        ("returned: non", "1:11: returned: found 'non'; expected 'none'"),
        (f"centre: {'v' * 41}", f"1:9: centre: found '{'v' * 40}…'; expected one of vents, blocks, unknown"),
        (f"centre: {'v' * 40}", f"1:9: centre: found '{'v' * 40}'; expected one of vents, blocks, unknown"),
        (
            "clock: 24",
            "1:8: clock: found the number 24; expected one of "
            "0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13, 14 and 9 more",
        ),
        ("month: 0", "1:8: month: found the number 0; expected one of " + ", ".join(str(n) for n in range(1, 16))),
        ("bleed: {}", "1:1: bleed: found no 'tag'; expected the key tag"),
        ("lock: {foot: x}", "1:1: lock: found no 'hand'; expected the key hand, or the key pilot"),
    ],
)
def test_each_fault_says_what_was_found_and_what_would_be_right(text: str, finding: str, folder: Path) -> None:
    assert told(text, folder) == [finding]


@pytest.mark.parametrize(
    ("text", "cure"),
    [
        ("volume: 1,500 gal", "1500 gal, or 1.5 gal"),
        ("volume: 11 imp gal", "a gal is a US gallon here"),
        ("volume: 11", "11 gal or 40 L"),
        ("volume: 11 psi", "a volume in gal (US)"),
        ("volume: '11'", "a volume in gal (US)"),
    ],
)
def test_a_quantity_that_is_not_as_the_examples_are_is_told_its_own_cure(text: str, cure: str, folder: Path) -> None:
    (finding,) = told(text, folder)
    assert cure in finding


def test_an_unknown_key_is_told_the_known_ones_or_the_one_that_was_meant(folder: Path) -> None:
    text = "pumps:\n- kind: air\n  tag: P-1\n  vlave: V-1\n  colour: red\n"
    assert told(text, folder) == [
        "4:3: pumps[0].vlave: found the unknown key 'vlave'; expected a known key: did you mean 'valve'?",
        "5:3: pumps[0].colour: found the unknown key 'colour'; expected a known key: kind, tag, valve",
    ]


def test_a_key_that_is_asked_for_and_misspelt_is_told_once(folder: Path) -> None:
    assert told("pumps:\n- kind: electric\n  tag: P-1\n  braker: B-1\n", folder) == [
        "4:3: pumps[0].braker: found the unknown key 'braker'; expected a known key: did you mean 'breaker'?"
    ]


def test_a_choice_is_judged_by_the_kind_that_was_written(folder: Path) -> None:
    text = "pumps:\n- kind: electric\n  tag: P-1\n  start: 2,700 psi\n"
    missing, comma = told(text, folder)
    assert missing == "2:3: pumps[0]: found no 'breaker'; expected the key breaker (tag of the breaker)"
    assert comma.startswith("4:10: pumps[0].start: found '2,700 psi', where the comma may mean")


def test_a_kind_that_no_choice_has_is_told_all_kinds(folder: Path) -> None:
    assert told("pumps:\n- kind: elektric\n  tag: P-1\n", folder) == [
        "2:9: pumps[0].kind: found 'elektric'; expected one of electric, air, hand: did you mean 'electric'?"
    ]


def test_a_kind_that_is_left_out_is_asked_for(folder: Path) -> None:
    assert any("no 'kind'" in line for line in told("pumps:\n- tag: P-1\n", folder))


def test_several_keys_that_are_missing_are_one_finding(folder: Path) -> None:
    assert told("pumps:\n- kind: electric\n", folder) == [
        "2:3: pumps[0]: found no 'tag' and no 'breaker'; expected the keys tag, breaker"
    ]


def test_all_faults_of_a_file_come_at_once_in_the_order_of_its_lines(folder: Path) -> None:
    text = "centre: x\nvolume: y\nbottles: z\nrevision: 1\n"
    assert [line.split(":")[0] for line in told(text, folder)] == ["1", "2", "3", "4"]


def test_a_fault_inside_a_part_is_not_echoed_as_an_unknown_key(folder: Path) -> None:
    assert told("head: {by: 1, on: x}", folder) == ["1:12: head.by: found the number 1; expected text, in quotes: '1'"]


def test_a_schema_may_be_named_by_an_id_on_a_host_that_nobody_asks(folder: Path) -> None:
    host = "https://schemas.invalid/"
    for name, schema in (("quantities", QUANTITIES), ("unit", UNIT)):
        hosted = {"$id": f"{host}{name}.schema.json", **schema}
        (folder / f"{name}.schema.json").write_text(json.dumps(hosted))
    assert told("volume: 11 gal", folder) == []
    assert len(told("volume: 11 l", folder)) == 1


@pytest.mark.parametrize("file", [f for f in schemas().iterdir() if f.name.endswith(".schema.json")], ids=str)
def test_every_schema_of_the_program_is_a_right_schema_and_all_its_references_lead_somewhere(file: Any) -> None:
    from jsonschema import Draft202012Validator

    schema = json.loads(file.read_text(encoding="utf-8"))
    Draft202012Validator.check_schema(schema)
    names = {f.name for f in schemas().iterdir()}
    pending: list[Any] = [schema]
    while pending:
        part = pending.pop()
        if isinstance(part, dict):
            reference = part.get("$ref")
            if isinstance(reference, str) and not reference.startswith("#"):
                assert reference.partition("#")[0].rsplit("/", 1)[-1] in names
            pending += part.values()
        elif isinstance(part, list):
            pending += part

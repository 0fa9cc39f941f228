"""A description becomes a unit, or a list of all that is wrong with it, each with its place."""

from collections.abc import Iterator
from dataclasses import replace
from pathlib import Path
from typing import Any

import pytest
from tests.properties.planning import EXAMPLES
from tests.unit.plan.changing import changed, data_of

from provenzero.finding import has_errors
from provenzero.reading.lines import Document, load_text, written
from provenzero.resources import schemas
from provenzero.unit.load import Loaded, load, load_data, load_document
from provenzero.unit.model import Unit, ValvePosition

PSI_PA = 6894.757293168
GALLON_M3 = 3.785411784e-3
NAMES = ["land-rig", "jack-up", "workover"]
STARTER = schemas().joinpath("starter", "unit.yaml").read_text(encoding="utf-8")


def text_of(name: str) -> str:
    return (EXAMPLES / f"{name}.yaml").read_text(encoding="utf-8")


def loaded_text(text: str) -> Loaded:
    document = load_text(text, "unit.yaml")
    assert isinstance(document, Document), document
    return load_document(document)


def unit_of(loaded: Loaded) -> Unit:
    assert loaded.unit is not None, [str(f) for f in loaded.findings]
    return loaded.unit


def said(loaded: Loaded) -> list[tuple[int | None, str, str, str]]:
    return [(f.place.line, f.place.path, f.found, f.expected) for f in loaded.findings]


def unknowns(value: Any, path: tuple[str | int, ...] = ()) -> Iterator[str]:
    if isinstance(value, dict):
        for key, item in value.items():
            yield from unknowns(item, (*path, key))
    elif isinstance(value, list):
        for i, item in enumerate(value):
            yield from unknowns(item, (*path, i))
    elif value == "unknown":
        yield written(path)


@pytest.mark.parametrize("name", NAMES)
def test_an_example_becomes_a_unit_without_a_finding(name: str) -> None:
    loaded = load(EXAMPLES / f"{name}.yaml")
    assert loaded.unit is not None
    assert loaded.findings == ()


def test_the_starter_becomes_a_unit_without_a_finding() -> None:
    loaded = loaded_text(STARTER)
    assert loaded.findings == ()
    assert unit_of(loaded).assumptions
    assert unit_of(loaded).description.verification is None


@pytest.mark.parametrize("name", NAMES)
def test_data_make_the_same_unit_as_the_file_they_were_read_from(name: str) -> None:
    from_file, from_data = unit_of(load(EXAMPLES / f"{name}.yaml")), unit_of(load_data(data_of(name)))
    assert replace(from_file, assumptions=()) == replace(from_data, assumptions=())
    assert [(a.path, a.taken) for a in from_file.assumptions] == [(a.path, a.taken) for a in from_data.assumptions]


@pytest.mark.parametrize("text", [*map(text_of, NAMES), STARTER], ids=[*NAMES, "starter"])
def test_every_unknown_is_noted_with_its_line_and_with_what_is_taken(text: str) -> None:
    document = load_text(text, "unit.yaml")
    assert isinstance(document, Document)
    notes = unit_of(load_document(document)).assumptions
    assert sorted(a.path for a in notes) == sorted(unknowns(document.data))
    for note in notes:
        assert note.line is not None
        assert "unknown" in text.splitlines()[note.line - 1], note.path
        assert note.taken, note.path


def test_all_faults_of_a_file_come_at_once_in_the_order_of_its_lines() -> None:
    lines = text_of("land-rig").splitlines()
    lines[lines.index("  rated_pressure: 3000 psi")] = "  rated_pressure: 3000"
    lines[lines.index("returns: individual")] = "returns: indivdual"
    lines[lines.index("    stop_pressure: 3000 psi")] = "    stop_presure: 3000 psi"
    text = "\n".join(lines)
    found = said(loaded_text(text))
    assert [(line, path, seen) for line, path, seen, _ in found] == [
        (lines.index("  rated_pressure: 3000") + 1, "unit.rated_pressure", "the number 3000"),
        (lines.index("returns: indivdual") + 1, "returns", "'indivdual'"),
        (lines.index("    stop_presure: 3000 psi") + 1, "pumps[0].stop_presure", "the unknown key 'stop_presure'"),
    ]
    assert "3000 psi" in found[0][3]
    assert "individual" in found[1][3]
    assert "stop_pressure" in found[2][3]


def test_quantities_that_the_form_lets_through_are_reported_at_once_too() -> None:
    def change(data: dict[str, Any]) -> None:
        data["unit"]["rated_pressure"] = "3000 furlong"
        data["pumps"][1]["flow"] = "4 gal"
        data["regulators"][0]["set_pressure"] = "-100 kg/m3"

    loaded = load_data(changed("land-rig", change))
    assert loaded.unit is None
    assert {f.place.path for f in loaded.findings} == {
        "unit.rated_pressure",
        "pumps[1].flow",
        "regulators[0].set_pressure",
    }
    assert all(f.place.line is not None for f in loaded.findings)


def test_a_number_without_its_unit_is_refused() -> None:
    loaded = load_data(changed("land-rig", lambda d: d["pumps"][0].update(stop_pressure=3000)))
    [finding] = loaded.findings
    assert finding.place.path == "pumps[0].stop_pressure"
    assert finding.found == "the number 3000"


def test_values_are_taken_in_their_units() -> None:
    unit = unit_of(load(EXAMPLES / "land-rig.yaml"))
    assert unit.identity.rated_pressure_pag == pytest.approx(3000 * PSI_PA)
    assert unit.banks[0].gas_volume_m3 == pytest.approx(10 * GALLON_M3)
    assert unit.banks[0].precharge_temperature_k == pytest.approx(293.15)
    assert unit.functions[0].bore_m == pytest.approx(13.625 * 0.0254)
    assert unit.pumps[0].flow_m3_s == pytest.approx(8 * GALLON_M3 / 60)
    assert unit.ambient_low_k == pytest.approx(263.15)


def test_the_same_pressure_in_another_unit_is_the_same_pressure() -> None:
    data = changed("land-rig", lambda d: d["unit"].update(rated_pressure="206.8427188 bar"))
    assert unit_of(load_data(data)).identity.rated_pressure_pag == pytest.approx(3000 * PSI_PA)


@pytest.mark.parametrize(("word", "meant"), [("yes", True), ("no", False), ("unknown", True)])
def test_yes_and_no_are_words_and_an_unknown_room_is_a_room(word: str, meant: bool) -> None:
    text = text_of("land-rig").replace("  indoors: no\n", f"  indoors: {word}\n")
    assert unit_of(loaded_text(text)).reservoir.indoors is meant


def test_a_lock_that_is_not_known_does_not_count() -> None:
    text = text_of("land-rig").replace(
        'tag: Q-1, location: "switch house, cubicle 7", lockable: yes',
        'tag: Q-1, location: "switch house, cubicle 7", lockable: unknown',
    )
    energy = unit_of(loaded_text(text)).pumps[0].energy
    assert energy is not None
    assert not energy.lockable


@pytest.mark.parametrize("word", ["true", "True", "on", "ja", "y", "1"])
def test_other_words_for_yes_are_refused(word: str) -> None:
    text = text_of("land-rig").replace("  indoors: no\n", f"  indoors: {word}\n")
    loaded = loaded_text(text)
    assert loaded.unit is None
    assert [f.place.path for f in loaded.findings] == ["reservoir.indoors"]
    assert "yes, no, unknown" in loaded.findings[0].expected


def test_what_is_left_out_gets_its_default() -> None:
    def change(data: dict[str, Any]) -> None:
        del data["ambient"], data["header"], data["bypasses"], data["reservoir"]["indoors"]

    unit = unit_of(load_data(changed("land-rig", change)))
    assert (unit.ambient_low_k, unit.ambient_high_k) == (273.15, 313.15)
    assert unit.header_fittings == ()
    assert unit.bypasses == ()
    assert unit.reservoir.indoors
    assert unit.reservoir.drain is not None
    assert unit.reservoir.drain.normal is ValvePosition.CLOSED


def test_a_warning_does_not_stop_the_work() -> None:
    loaded = load_data(changed("land-rig", lambda d: d["header"]["fittings"][1].update(set_pressure="4000 psi")))
    assert loaded.unit is not None
    assert loaded.findings
    assert not has_errors(loaded.findings)


def test_markup_in_a_label_stays_text() -> None:
    words = "<script>alert('x')</script> & {{ 7 * 7 }}"
    assert unit_of(load_data(changed("land-rig", lambda d: d["unit"].update(name=words)))).identity.name == words


HEAD = "format: 1\n"
HOSTILE = {
    "an alias": (HEAD + "unit: &u {tag: X}\nfluid: *u\n", "the alias '*u'"),
    "aliases that multiply": (HEAD + "a: &a [x, x]\nb: &b [*a, *a]\nc: [*b, *b]\n", "the alias '*a'"),
    "a tag that makes an object": (HEAD + "unit: !!python/object/apply:os.getcwd []\n", "the tag"),
    "a key twice": (HEAD + "returns: unknown\nreturns: individual\n", "the key 'returns' a second time"),
    "not a number": (HEAD + "banks: .nan\n", "the number .nan"),
    "no end": (HEAD + "banks: -.inf\n", "the number -.inf"),
    "a number beyond all": (HEAD + "banks: 1e999\n", "the number 1e999"),
    "a nest without end": (HEAD + "banks: " + "[" * 5000 + "]" * 5000 + "\n", "values nested"),
    "a long file": (HEAD + "banks: [" + "1," * 60_000 + "1]\n", "more than 50000 values"),
    "a huge file": (HEAD + "#" * (1 << 20) + "\n", "more than 1 MiB"),
    "a control character": (HEAD + "returns: \x1b[31mred\n", "the control character U+001B"),
    "two documents": (HEAD + "---\nformat: 1\n", "a second document"),
    "nothing": ("", "an empty file"),
    "a list": ("- format: 1\n", "a list at the top"),
}


@pytest.mark.parametrize(("text", "seen"), HOSTILE.values(), ids=HOSTILE.keys())
def test_hostile_text_is_refused_with_its_file(text: str, seen: str, tmp_path: Path) -> None:
    file = tmp_path / "hostile.yaml"
    file.write_text(text, encoding="utf-8")
    loaded = load(file)
    assert loaded.unit is None
    assert any(seen in finding.found for finding in loaded.findings), [str(f) for f in loaded.findings]
    assert {finding.place.file for finding in loaded.findings} == {str(file)}


def test_a_label_without_end_is_refused() -> None:
    loaded = load_data(changed("land-rig", lambda d: d["unit"].update(name="x" * 100_000)))
    assert [f.place.path for f in loaded.findings] == ["unit.name"]
    assert len(str(loaded.findings[0])) < 300


def test_a_file_that_is_not_there_is_a_finding(tmp_path: Path) -> None:
    [finding] = load(tmp_path / "none.yaml").findings
    assert finding.found == "no such file"

"""The schema of a description explains each of its keys, refuses keys it does not know, and its examples are right."""

import json
from collections.abc import Iterator, Mapping
from typing import Any

import pytest
from tests.unit.plan.changing import data_of

from provenzero.quantity import Dimension, parse
from provenzero.resources import schemas
from provenzero.unit.load import load_data

SCHEMA: dict[str, Any] = json.loads(schemas().joinpath("unit.schema.json").read_text(encoding="utf-8"))
QUANTITIES = {
    "pressure": Dimension.PRESSURE,
    "volume": Dimension.VOLUME,
    "temperature": Dimension.TEMPERATURE,
    "length": Dimension.LENGTH,
    "height": Dimension.HEIGHT,
    "flow": Dimension.FLOW,
    "density": Dimension.DENSITY,
}


def parts(part: Any, path: str = "") -> Iterator[tuple[str, Mapping[str, Any]]]:
    """Every mapping of the schema that is not an example, with its path."""
    if isinstance(part, list):
        for i, item in enumerate(part):
            yield from parts(item, f"{path}/{i}")
    if isinstance(part, dict):
        yield path, part
        for key, item in part.items():
            if key != "examples":
                yield from parts(item, f"{path}/{key}")


PROPERTIES = [
    (f"{path}/{name}", item)
    for path, part in parts(SCHEMA)
    if isinstance(part.get("properties"), dict) and not path.endswith("/properties")
    for name, item in part["properties"].items()
]
WITH_EXAMPLES = [(path, part) for path, part in parts(SCHEMA) if isinstance(part.get("examples"), list)]
OBJECTS = [(path, part) for path, part in parts(SCHEMA) if part.get("type") == "object"]


def test_there_is_much_to_look_at() -> None:
    assert len(PROPERTIES) > 150
    assert len(OBJECTS) > 20


@pytest.mark.parametrize("asked", ["title", "description", "examples"])
def test_each_key_of_a_description_is_explained(asked: str) -> None:
    assert not [path for path, item in PROPERTIES if not item.get(asked)]


def test_each_definition_is_explained() -> None:
    lacking = {name for name, item in SCHEMA["$defs"].items() if not {"title", "description", "examples"} <= set(item)}
    assert not lacking


def test_no_mapping_takes_a_key_it_does_not_know() -> None:
    assert not [path for path, part in OBJECTS if part.get("additionalProperties") is not False]


def test_each_mapping_asks_only_for_keys_it_has() -> None:
    assert not [path for path, part in OBJECTS if set(part["required"]) - set(part["properties"])]


@pytest.mark.parametrize(("path", "part"), WITH_EXAMPLES, ids=[path for path, _ in WITH_EXAMPLES])
def test_each_example_fits_the_part_that_it_is_an_example_of(path: str, part: Mapping[str, Any]) -> None:
    from jsonschema import Draft202012Validator

    own = {key: value for key, value in part.items() if key != "$id"}
    validator = Draft202012Validator({**own, "$defs": SCHEMA["$defs"]})
    assert part["examples"], path
    assert not [error.message for example in part["examples"] for error in validator.iter_errors(example)]


@pytest.mark.parametrize(("name", "dimension"), QUANTITIES.items())
def test_each_example_of_a_quantity_can_be_read(name: str, dimension: Dimension) -> None:
    read = [parse(example, dimension) for example in SCHEMA["$defs"][name]["examples"]]
    assert read
    assert all(abs(value) < 1e9 for value in read)


def test_each_definition_with_the_form_of_a_quantity_is_held_against_its_dimension() -> None:
    form = SCHEMA["$defs"]["pressure"]["pattern"]
    assert {name for name, item in SCHEMA["$defs"].items() if item.get("pattern") == form} == set(QUANTITIES)


@pytest.mark.parametrize("key", ["set_presure", "colour"])
def test_an_unknown_key_is_refused_with_its_line(key: str) -> None:
    data = data_of("land-rig")
    data["regulators"][1][key] = "900 psi"
    loaded = load_data(data)
    assert loaded.unit is None
    [finding] = loaded.findings
    assert finding.place.path == f"regulators[1].{key}"
    assert finding.place.line is not None
    assert finding.found == f"the unknown key '{key}'"


def test_a_near_miss_of_a_key_is_told_the_key_that_was_meant() -> None:
    data = data_of("land-rig")
    data["regulators"][0]["set_presure"] = data["regulators"][0].pop("set_pressure")
    [finding] = load_data(data).findings
    assert "set_pressure" in finding.expected

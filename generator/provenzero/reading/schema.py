"""Data against the schema of its kind of file, to findings: all at once, each with its line."""

import json
from collections.abc import Iterable
from importlib.resources.abc import Traversable
from typing import TYPE_CHECKING, Final, cast

from provenzero.finding import Finding, in_order
from provenzero.reading.fault import Fault
from provenzero.reading.lines import Document, Value
from provenzero.reading.wording import findings_of
from provenzero.resources import schemas

if TYPE_CHECKING:
    from jsonschema import Draft202012Validator
    from jsonschema.exceptions import ValidationError

ENDING: Final = ".schema.json"


def check(document: Document, schema_name: str, folder: Traversable | None = None) -> list[Finding]:
    """All faults of a document against `<schema_name>.schema.json`, in the order of their lines.

    `folder` is where the schema and its neighbours lie: that of the program, unless another is given.
    """
    validator = _validator(schema_name, folder or schemas())
    faults = [_fault(error) for error in validator.iter_errors(document.data)]
    return in_order(dict.fromkeys(findings_of(faults, document)))


def _validator(schema_name: str, folder: Traversable) -> "Draft202012Validator":
    from jsonschema import Draft202012Validator
    from referencing import Registry
    from referencing.jsonschema import DRAFT202012

    contents = {
        file.name: json.loads(file.read_text(encoding="utf-8"))
        for file in folder.iterdir()
        if file.name.endswith(ENDING)
    }
    # A reference leads to a neighbour of the schema, by its name or by its $id; the registry fetches nothing.
    resources = [
        (uri, DRAFT202012.create_resource(schema))
        for name, schema in contents.items()
        for uri in dict.fromkeys((name, schema.get("$id", name)))
    ]
    return Draft202012Validator(
        contents[schema_name + ENDING],
        registry=Registry().with_resources(resources),
        format_checker=Draft202012Validator.FORMAT_CHECKER,
    )


def _fault(error: "ValidationError") -> Fault:
    on_key = "propertyNames" in error.absolute_schema_path
    path = tuple(error.absolute_path)
    return Fault(
        keyword=str(error.validator),
        wanted=error.validator_value,
        value=cast("Value", error.instance),
        schema=error.schema if isinstance(error.schema, dict) else {},
        path=(*path, str(error.instance)) if on_key else path,
        on_key=on_key,
        message=error.message,
        branches=_branches(error.context or ()),
    )


def _branches(context: Iterable["ValidationError"]) -> tuple[tuple[Fault, ...], ...]:
    """The faults of each branch of an anyOf or oneOf, in the order of the branches."""
    branches: dict[int, list[Fault]] = {}
    for error in context:
        branches.setdefault(int(error.relative_schema_path[0]), []).append(_fault(error))
    return tuple(tuple(branches[index]) for index in sorted(branches))

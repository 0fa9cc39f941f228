"""Faults against a schema to findings: what stands in the file and what would be right, in plain words."""

from collections.abc import Iterable, Iterator, Mapping
from typing import Any, Final

from provenzero.finding import Finding
from provenzero.quantity import Dimension, QuantityError, parse
from provenzero.reading.fault import Fault, choice_of
from provenzero.reading.lines import Document, Value
from provenzero.reading.nearest import nearest

_SHOWN: Final = 40
_LISTED: Final = 15
_TYPES: Final = {
    "string": "text",
    "integer": "a whole number",
    "number": "a number",
    "boolean": "true or false",
    "object": "a mapping of keys",
    "array": "a list",
    "null": "nothing",
}
_BOUNDS: Final = {
    "minimum": "a number of at least {}",
    "maximum": "a number of at most {}",
    "exclusiveMinimum": "a number above {}",
    "exclusiveMaximum": "a number below {}",
    "multipleOf": "a multiple of {}",
    "minLength": "text of at least {} characters",
    "maxLength": "text of at most {} characters",
    "minItems": "a list of at least {}",
    "maxItems": "a list of at most {}",
    "minProperties": "at least {} keys",
    "maxProperties": "at most {} keys",
}
_FORMATS: Final = {"date": "a date such as 2026-03-31", "date-time": "a time such as 2026-03-31T14:05:00Z"}
_MISSING: Final = frozenset({"required", "dependentRequired"})
_UNKNOWN: Final = frozenset({"additionalProperties", "unevaluatedProperties"})


def findings_of(faults: Iterable[Fault], document: Document) -> Iterator[Finding]:
    """The findings that the faults come down to; the same one may come more than once."""
    faults = list(faults)
    for fault in faults:
        if fault.keyword == "unevaluatedProperties" and any(_inside(other, fault) for other in faults):
            continue  # an echo: the keys of a part that is wrong count as unevaluated
        if fault.branches:
            yield from _of_choice(fault, document)
        elif fault.keyword in _UNKNOWN:
            yield from _of_unknown(fault, document)
        elif fault.keyword in _MISSING and not _missing(fault):
            continue  # the key is there with a slip of the pen, and told as an unknown one
        else:
            place = document.key_place(fault.path) if fault.on_key else document.place(fault.path)
            found, expected = _words(fault)
            yield Finding(place=place, found=found, expected=expected)


def _inside(other: Fault, fault: Fault) -> bool:
    return other is not fault and other.path[: len(fault.path)] == fault.path


def _of_choice(fault: Fault, document: Document) -> Iterator[Finding]:
    choice = choice_of(fault)
    yield from findings_of(choice.faults, document)
    if choice.ways:
        words = [_words(way) for way in choice.ways]
        expected = ", or ".join(dict.fromkeys(expected for _, expected in words))
        yield Finding(place=document.place(fault.path), found=words[0][0], expected=expected)


def _of_unknown(fault: Fault, document: Document) -> Iterator[Finding]:
    known = list(fault.schema.get("properties", {}))
    for key, near in _strange_keys(fault).items():
        if repr(key) in fault.message:
            expected = f"a known key: did you mean '{near}'?" if near else f"a known key: {_list(known)}"
            place = document.key_place((*fault.path, key))
            yield Finding(place=place, found=f"the unknown key '{key}'", expected=expected)


def _words(fault: Fault) -> tuple[str, str]:
    """What was found and what was expected."""
    found = _shown(fault.value)
    if fault.keyword in _MISSING:
        missing = _missing(fault)
        noun = "key" if len(missing) == 1 else "keys"
        hints = [_hint(fault.schema.get("properties", {}).get(key, {})) for key in missing]
        hint = f" ({hints[0]})" if len(missing) == 1 and hints[0] else ""
        return "no " + " and no ".join(f"'{k}'" for k in missing), f"the {noun} {_list(missing)}{hint}"
    if fault.keyword == "pattern" and isinstance(fault.value, str):
        return _pattern_words(fault.value, fault.schema) or (found, _expected(fault))
    return found, _expected(fault)


def _strange_keys(fault: Fault) -> dict[str, str | None]:
    """The keys of a mapping that its schema does not name, each with the known key that was most likely meant."""
    known = fault.schema.get("properties", {})
    present = fault.value if isinstance(fault.value, dict) else {}
    return {key: nearest(key, [k for k in known if k not in present]) for key in present if key not in known}


def _missing(fault: Fault) -> list[str]:
    """The keys that are asked for and not there, not even with a slip of the pen that is told by itself."""
    present: Mapping[str, Value] = fault.value if isinstance(fault.value, dict) else {}
    if fault.keyword == "required":
        missing = [key for key in fault.wanted if key not in present]
    else:
        missing = [
            key for cause, keys in fault.wanted.items() if cause in present for key in keys if key not in present
        ]
    slips = _strange_keys(fault).values() if fault.schema.get("additionalProperties") is False else ()
    return [key for key in missing if key not in slips]


def _pattern_words(text: str, schema: Mapping[str, Any]) -> tuple[str, str] | None:
    """What is wrong with text that was meant to be a quantity, as the schema's examples are."""
    dimension = _dimension(schema)
    if dimension is not None:
        try:
            parse(text, dimension)
        except QuantityError as error:
            return error.found, error.expected
    return None


def _dimension(schema: Mapping[str, Any]) -> Dimension | None:
    """The dimension of the quantities that the examples of a schema are."""
    example = next((e for e in schema.get("examples", ()) if isinstance(e, str)), "")
    return next((d for d in Dimension if _is_quantity(example, d)), None)


def _is_quantity(text: str, dimension: Dimension) -> bool:
    try:
        parse(text, dimension)
    except QuantityError:
        return False
    return True


def _expected(fault: Fault) -> str:
    wanted, hint = fault.wanted, _hint(fault.schema)
    expected = _BOUNDS.get(fault.keyword, "").format(wanted)
    match fault.keyword:
        case "type":
            expected = _expected_type(fault)
        case "enum" | "const":
            expected = _expected_word(fault.value, wanted if fault.keyword == "enum" else [wanted])
        case "pattern":
            expected = hint or f"text of the form {wanted}"
        case "format":
            expected = _FORMATS.get(wanted, f"text in the format {wanted}")
        case "uniqueItems":
            expected = "a list without repetitions"
        case "minLength" if wanted == 1:
            expected = "text that is not empty"
        case "minItems" if wanted == 1:
            expected = "a list that is not empty"
    return expected or hint or f"a value that meets '{fault.keyword}' of the schema"


def _expected_word(value: Value, words: list[Value]) -> str:
    near = nearest(value, [w for w in words if isinstance(w, str)]) if isinstance(value, str) else None
    expected = f"one of {_list(words)}" if len(words) > 1 else _shown(words[0])
    return f"{expected}: did you mean '{near}'?" if near and len(words) > 1 else expected


def _expected_type(fault: Fault) -> str:
    types = fault.wanted if isinstance(fault.wanted, list) else [fault.wanted]
    if "string" in types and not isinstance(fault.value, dict | list):
        if types == ["string"] and fault.value is not None and _dimension(fault.schema) is None:
            return f"text, in quotes: '{_plain(fault.value)}'"
        if fault.schema.get("examples"):
            return _hint(fault.schema)
    return " or ".join(_TYPES[t] for t in types)


def _hint(schema: object) -> str:
    """What a right value looks like: the examples of the schema, or else its description."""
    if not isinstance(schema, Mapping):
        return ""
    if examples := schema.get("examples"):
        return "a value such as " + " or ".join(_plain(e) for e in examples[:3])
    description = str(schema.get("description", "")).partition(". ")[0].rstrip(".")
    return description[:1].lower() + description[1:]


def _shown(value: Value) -> str:
    match value:
        case None:
            return "no value"
        case bool():
            return f"the word {_plain(value)}"
        case int() | float():
            return f"the number {value}"
        case str():
            return "empty text" if value == "" else f"'{value}'" if len(value) <= _SHOWN else f"'{value[:_SHOWN]}…'"
        case dict():
            return "a mapping of keys" if value else "an empty mapping"
        case _:
            return f"a list of {len(value)}" if value else "an empty list"


def _plain(value: object) -> str:
    """A value as it would stand in a file."""
    match value:
        case dict():
            return "{" + ", ".join(f"{key}: {_plain(item)}" for key, item in value.items()) + "}"
        case list():
            return "[" + ", ".join(_plain(item) for item in value) + "]"
        case None:
            return "nothing"
        case bool():
            return str(value).lower()
        case _:
            return str(value)


def _list(words: Iterable[object]) -> str:
    shown = [_plain(word) for word in words]
    more = f" and {len(shown) - _LISTED} more" if len(shown) > _LISTED else ""
    return ", ".join(shown[:_LISTED]) + more

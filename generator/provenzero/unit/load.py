"""From a description file to a unit: schema first, then the model, then the circuit; all findings at once."""

from collections.abc import Mapping
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from provenzero.finding import Finding, Place, has_errors, in_order
from provenzero.quantity import QuantityError
from provenzero.reading.lines import Document, load_text
from provenzero.reading.lines import load as load_lines
from provenzero.reading.schema import check
from provenzero.unit.build import Reader, unit_of
from provenzero.unit.consistency import faults
from provenzero.unit.model import Unit


@dataclass(frozen=True, slots=True, kw_only=True)
class Loaded:
    """What came of a description: the unit if nothing in it stops the work, and the findings in any case."""

    unit: Unit | None
    findings: tuple[Finding, ...]
    document: Document | None = None


def load(path: Path) -> Loaded:
    """Read and check a description file."""
    document = load_lines(path)
    if not isinstance(document, Document):
        return Loaded(unit=None, findings=tuple(document))
    return load_document(document)


def load_data(data: Mapping[str, Any], file: str = "unit.yaml") -> Loaded:
    """Check plain data as if it had been read from a file: written as JSON, which is YAML too."""
    import json  # noqa: PLC0415 - not needed when a file is read

    document = load_text(json.dumps(data, indent=1), file)
    if not isinstance(document, Document):
        return Loaded(unit=None, findings=tuple(document))
    return load_document(document)


def load_document(document: Document) -> Loaded:
    """Check a description that has been read."""
    findings = check(document, "unit")
    if has_errors(findings):
        return Loaded(unit=None, findings=tuple(findings), document=document)
    reader = Reader(document)
    unit = unit_of(reader)
    findings += [_of_quantity(document, path, error) for path, error in reader.errors]
    if unit is not None and not has_errors(findings):
        findings += faults(unit, document)
    stopped = unit is None or has_errors(findings)
    return Loaded(unit=None if stopped else unit, findings=tuple(in_order(findings)), document=document)


def _of_quantity(document: Document, path: tuple[str | int, ...], error: QuantityError) -> Finding:
    place: Place = document.place(path)
    return Finding(place=place, found=error.found, expected=error.expected)

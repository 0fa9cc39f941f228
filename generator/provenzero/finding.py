"""What a check hands back: where something is wrong, what was found there, and what would be right.

Findings are returned, all at once, never raised: a person who corrects a file wants the whole list.
"""

from collections.abc import Iterable
from dataclasses import dataclass
from enum import StrEnum


class Severity(StrEnum):
    """Whether a finding stops the work or only wants to be read."""

    ERROR = "error"
    WARNING = "warning"


@dataclass(frozen=True, slots=True, kw_only=True)
class Place:
    """A place in a file. Lines and columns count from 1; `path` leads to the value, like `pumps[0].flow`."""

    file: str
    line: int | None = None
    column: int | None = None
    path: str = ""

    def __str__(self) -> str:
        """As editors and terminals write it: file, line and column with colons between, then the path."""
        position = ":".join(str(part) for part in (self.file, self.line, self.column) if part is not None)
        return f"{position}: {self.path}" if self.path else position


@dataclass(frozen=True, slots=True, kw_only=True)
class Finding:
    """One fault: its place, what stands there, and what would be right."""

    place: Place
    found: str
    expected: str
    severity: Severity = Severity.ERROR

    def __str__(self) -> str:
        """One line for a terminal; characters that could steer the terminal are shown, not sent."""
        mark = "warning: " if self.severity is Severity.WARNING else ""
        return _printable(f"{self.place}: {mark}found {self.found}; expected {self.expected}")


def in_order(findings: Iterable[Finding]) -> list[Finding]:
    """The findings in the order in which a person meets them: by file, line and column."""
    return sorted(findings, key=lambda f: (f.place.file, f.place.line or 0, f.place.column or 0, f.place.path))


def has_errors(findings: Iterable[Finding]) -> bool:
    """Whether any of the findings stops the work."""
    return any(finding.severity is Severity.ERROR for finding in findings)


def _printable(text: str) -> str:
    text = text.replace("\u00a0", " ").replace("\u202f", " ")
    return "".join(c if c.isprintable() else c.encode("unicode_escape").decode("ascii") for c in text)

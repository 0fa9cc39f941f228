"""What the YAML parser says of broken text, to what a person can do about it."""

from dataclasses import dataclass
from typing import Final


@dataclass(frozen=True, slots=True, kw_only=True)
class Fault:
    """A fault of syntax. `at_start`: the cure lies where the broken thing began, not where parsing ended."""

    found: str
    expected: str
    at_start: bool = False


# In the order of trial: pieces of the parser's context and problem, and what they mean to the file's writer.
_FAULTS: Final = (
    (
        ("while scanning a quoted scalar", "end of stream"),
        Fault(found="text whose quote is never closed", expected="a closing quote", at_start=True),
    ),
    (
        ("unknown escape character",),
        Fault(
            found="a backslash that stands for nothing",
            expected="single quotes around text with a backslash, or the backslash doubled",
        ),
    ),
    (
        ("nesting depth",),
        Fault(found="values nested very deep", expected="the few levels that the schema knows"),
    ),
    (
        ("while parsing a flow sequence",),
        Fault(
            found="a list in brackets that is not finished",
            expected="commas between its items and a closing ']'",
            at_start=True,
        ),
    ),
    (
        ("while parsing a flow mapping",),
        Fault(
            found="a mapping in braces that is not finished",
            expected="commas between its 'key: value' pairs and a closing '}'",
            at_start=True,
        ),
    ),
    (
        ("while scanning a simple key",),
        Fault(
            found="a line without a colon",
            expected="'key: value', with a space after the colon",
            at_start=True,
        ),
    ),
    (
        ("mapping values are not allowed",),
        Fault(
            found="a colon where no value may begin",
            expected="one 'key: value' a line with a space after the colon, the keys of one level in one "
            "column, and quotes around text that holds ': '",
        ),
    ),
    (
        ("block sequence entries are not allowed",),
        Fault(found="a list item behind a key", expected="the first '- ' on a line of its own below the key"),
    ),
    (
        ("sequence entries are not allowed",),
        Fault(found="a list item behind a key", expected="the first '- ' on a line of its own below the key"),
    ),
    (
        ("while parsing a block collection",),
        Fault(
            found="a line that does not go on with the list above it",
            expected="'- ' in the column of the items above, or the indentation of another level",
        ),
    ),
    (
        ("while parsing a block mapping",),
        Fault(
            found="a line or word that does not go on with the keys above it",
            expected="a key in the column of the keys above it, with nothing behind quoted text",
        ),
    ),
    (
        ("cannot start any token",),
        Fault(
            found="a character that cannot begin a value",
            expected="quotes around text that begins with one of @ ` % & * ! | > [ ] { } ,",
        ),
    ),
    (
        ("node content",),
        Fault(found="a bracket or comma where a value was due", expected="a value, in quotes if it is text"),
    ),
    (
        ("undefined tag handle",),
        Fault(found="a tag", expected="a plain value without '!', or quotes around text that begins with it"),
    ),
)
_TAB: Final = Fault(found="a tab in the indentation", expected="spaces: YAML takes no tabs there")


def explain(problem: str, context: str, line: str) -> Fault:
    """The fault behind the problem and the context that the parser names, on the line where it gave up."""
    if "\t" in line[: len(line) - len(line.lstrip())]:
        return _TAB
    said = f"{context} {problem}"
    for pieces, fault in _FAULTS:
        if all(piece in said for piece in pieces):
            return fault
    return Fault(found=f"text that is not YAML ({problem})", expected="'key: value' lines and '- ' lists")

"""YAML to plain data that knows the line and column of every key and value.

Only the JSON part of YAML 1.2 is taken: words such as `no` and `on` stay words, dates stay text, and aliases,
tags, repeated keys and numbers that are not finite are refused: each has made a file say what nobody meant.
"""

import math
import re
from collections.abc import Iterable, Mapping
from dataclasses import dataclass, field
from pathlib import Path
from typing import Final, TypeAlias

import yaml

from provenzero.finding import Finding, Place
from provenzero.reading.syntax import explain
from provenzero.reading.text import read_text

Value: TypeAlias = "dict[str, Value] | list[Value] | str | int | float | bool | None"
Steps: TypeAlias = tuple[str | int, ...]
Position: TypeAlias = tuple[int, int]

DEEPEST: Final = 40
MOST_VALUES: Final = 50_000
_LONGEST_NUMBER: Final = 40
_DECIMAL: Final = re.compile(r"[-+]?[0-9]+")
_OTHER_BASE: Final = re.compile(r"0o[0-7]+|0x[0-9a-fA-F]+")
_FLOAT: Final = re.compile(r"[-+]?(?:\.[0-9]+|[0-9]+(?:\.[0-9]*)?)(?:[eE][-+]?[0-9]+)?")
_NOT_FINITE: Final = re.compile(r"[-+]?\.(?:inf|Inf|INF)|\.(?:nan|NaN|NAN)")
_WORDS: Final[dict[str, bool | None]] = {
    **dict.fromkeys(("", "~", "null", "Null", "NULL")),
    **dict.fromkeys(("true", "True", "TRUE"), True),
    **dict.fromkeys(("false", "False", "FALSE"), False),
}
_BARE_NAME: Final = re.compile(r"[\w-]+")
_LOADER: Final = getattr(yaml, "CSafeLoader", yaml.SafeLoader)


@dataclass(frozen=True, slots=True, kw_only=True)
class Document:
    """The data of one file and where each part of it stands; lines and columns count from 1."""

    file: str
    data: dict[str, Value]
    values: Mapping[Steps, Position]
    keys: Mapping[Steps, Position]

    def place(self, path: Steps) -> Place:
        """Where the value at a path stands, or the nearest part around it that is there.

        The place of a mapping or a list under a key is that key: the line a person looks for.
        """
        known = path
        while known not in self.values:
            known = known[:-1]
        value = self.at(known)
        position = self.keys.get(known) if isinstance(value, dict | list) else None
        line, column = position or self.values[known]
        return Place(file=self.file, line=line, column=column, path=written(path))

    def key_place(self, path: Steps) -> Place:
        """Where the key at the end of a path stands; the place of the value where there is no such key."""
        if path not in self.keys:
            return self.place(path)
        line, column = self.keys[path]
        return Place(file=self.file, line=line, column=column, path=written(path))

    def at(self, path: Steps) -> Value:
        """The value at a path that is in the document; KeyError or IndexError if it is not."""
        value: Value = self.data
        for step in path:
            if isinstance(value, dict):
                value = value[str(step)]
            elif isinstance(value, list):
                value = value[int(step)]
            else:
                raise KeyError(step)
        return value


def written(path: Steps) -> str:
    """A path as people write it: `pumps[0].flow`."""
    text = ""
    for step in path:
        if isinstance(step, int):
            text += f"[{step}]"
        elif _BARE_NAME.fullmatch(step):
            text += f".{step}" if text else step
        else:
            text += f"[{step!r}]"
    return text


def load(path: Path) -> Document | list[Finding]:
    """The document in a YAML file, or all that is wrong with its text."""
    text = read_text(path)
    return load_text(text, str(path)) if isinstance(text, str) else text


def load_text(text: str, file: str) -> Document | list[Finding]:
    """The document in a YAML text, or all that is wrong with it. `file` is the name said in findings."""
    builder = _Builder(file=file)
    try:
        builder.take(yaml.parse(text, Loader=_LOADER))
    except yaml.MarkedYAMLError as error:
        builder.findings.append(_syntax_finding(error, text, file))
    except yaml.YAMLError:
        builder.report((1, 1), "text that is not YAML", "'key: value' lines and '- ' lists")
    if builder.findings:
        return builder.findings
    if not isinstance(builder.root, dict):
        found = "an empty file" if builder.root is None else f"{_kind(builder.root)} at the top"
        builder.report(builder.values.get((), (1, 1)), found, "'key: value' lines at the top")
        return builder.findings
    return Document(file=file, data=builder.root, values=builder.values, keys=builder.keys)


@dataclass(slots=True)
class _Open:
    """A mapping or a list whose end has not come yet. `key` is that of the value to come."""

    container: dict[str, Value] | list[Value]
    path: Steps
    key: str | None = None


@dataclass(slots=True, kw_only=True)
class _Builder:
    """Builds the data from the parser's events, without recursion, so that no nesting exhausts the stack.

    `over`: the file is bigger than any description, and the rest of it is not read.
    """

    file: str
    root: Value = None
    values: dict[Steps, Position] = field(default_factory=dict)
    keys: dict[Steps, Position] = field(default_factory=dict)
    findings: list[Finding] = field(default_factory=list)
    over: bool = False
    _stack: list[_Open] = field(default_factory=list)
    _documents: int = 0
    _count: int = 0

    def take(self, events: Iterable[yaml.Event]) -> None:
        """Take the events, up to the point where the file is too much."""
        for event in events:
            self._take_one(event)
            if self.over:
                return

    def report(self, position: Position, found: str, expected: str, path: Steps = ()) -> None:
        """Note a finding."""
        line, column = position
        place = Place(file=self.file, line=line, column=column, path=written(path))
        self.findings.append(Finding(place=place, found=found, expected=expected))

    def _take_one(self, event: yaml.Event) -> None:
        mark = event.start_mark
        position = (mark.line + 1, mark.column + 1) if mark is not None else (1, 1)
        match event:
            case yaml.DocumentStartEvent():
                self._documents += 1
                if self._documents > 1:
                    self.report(position, "a second document after '---'", "one document in a file")
                    self.over = True
            case yaml.AliasEvent():
                self._refuse(position, f"the alias '*{event.anchor}'", "the value itself, written out")
            case yaml.ScalarEvent():
                self._take_scalar(event, position)
            case yaml.MappingStartEvent():
                self._open({}, event, position)
            case yaml.SequenceStartEvent():
                self._open([], event, position)
            case yaml.MappingEndEvent() | yaml.SequenceEndEvent():
                self._stack.pop()

    def _take_scalar(self, event: yaml.ScalarEvent, position: Position) -> None:
        if event.tag is not None:
            self._refuse(position, f"the tag {_short(event.tag)}", "a plain value without a tag")
        elif self._awaits_key():
            self._take_key(event.value, position)
        else:
            self._add(event.value if event.style else self._resolved(event.value, position), position)

    def _take_key(self, key: str, position: Position) -> None:
        frame = self._stack[-1]
        path = (*frame.path, key)
        if key == "":
            self.report(position, "an empty key", "a word before the colon", frame.path)
        elif path in self.keys:
            found = f"the key '{key}' a second time (first on line {self.keys[path][0]})"
            self.report(position, found, "each key once", path)
        else:
            self.keys[path] = position
        frame.key = key

    def _open(self, container: dict[str, Value] | list[Value], event: yaml.Event, position: Position) -> None:
        tag = getattr(event, "tag", None)
        if tag is not None:
            self.report(position, f"the tag {_short(tag)}", "a plain value without a tag", self._here())
        if self._awaits_key():
            self.report(position, f"{_kind(container)} as a key", "a word before the colon", self._here())
            self.over = True
            return
        if len(self._stack) >= DEEPEST:
            found = f"values nested more than {DEEPEST} deep"
            self.report(position, found, "the few levels that the schema knows")
            self.over = True
            return
        path = self._here()
        self._add(container, position)
        self._stack.append(_Open(container, path))

    def _add(self, value: Value, position: Position) -> None:
        self._count += 1
        if self._count > MOST_VALUES:
            self.report(position, f"more than {MOST_VALUES} values", "one unit, job or record in a file")
            self.over = True
            return
        self.values[self._here()] = position
        if not self._stack:
            self.root = value
            return
        frame = self._stack[-1]
        if isinstance(frame.container, list):
            frame.container.append(value)
        elif frame.key is not None:
            frame.container[frame.key] = value
            frame.key = None

    def _refuse(self, position: Position, found: str, expected: str) -> None:
        """Note a finding about a key or a scalar and go on as if it were empty text."""
        self.report(position, found, expected, self._here())
        if self._awaits_key():
            self._stack[-1].key = ""
        else:
            self._add(None, position)

    def _awaits_key(self) -> bool:
        return bool(self._stack) and isinstance(self._stack[-1].container, dict) and self._stack[-1].key is None

    def _here(self) -> Steps:
        """The path of the value to come."""
        if not self._stack:
            return ()
        frame = self._stack[-1]
        if isinstance(frame.container, list):
            return (*frame.path, len(frame.container))
        return frame.path if frame.key is None else (*frame.path, frame.key)

    def _resolved(self, text: str, position: Position) -> Value:
        """The value of text without quotes, after the core schema of YAML 1.2 (chapter 10.3)."""
        if text in _WORDS:
            return _WORDS[text]
        number = bool(_DECIMAL.fullmatch(text) or _OTHER_BASE.fullmatch(text) or _FLOAT.fullmatch(text))
        if number and len(text) > _LONGEST_NUMBER:
            self.report(position, "a number of more than 40 digits", "a number of this world", self._here())
            return None
        if _DECIMAL.fullmatch(text):
            return int(text)
        if _OTHER_BASE.fullmatch(text):
            return int(text, 0)
        value = float(text) if number else math.nan if _NOT_FINITE.fullmatch(text) else text
        if isinstance(value, float) and not math.isfinite(value):
            self.report(position, f"the number {text}", "a finite number, or 'unknown'", self._here())
            return None
        return value


def _syntax_finding(error: yaml.MarkedYAMLError, text: str, file: str) -> Finding:
    mark = error.problem_mark or error.context_mark
    lines = text.splitlines()
    line = lines[mark.line] if mark is not None and mark.line < len(lines) else ""
    fault = explain(error.problem or "", error.context or "", line)
    if fault.at_start and error.context_mark is not None:
        mark = error.context_mark
    place = Place(file=file, line=mark.line + 1 if mark else 1, column=mark.column + 1 if mark else 1)
    return Finding(place=place, found=fault.found, expected=fault.expected)


def _short(tag: str) -> str:
    return f"'{tag.replace('tag:yaml.org,2002:', '!!')}'"


def _kind(value: Value) -> str:
    match value:
        case dict():
            return "a mapping"
        case list():
            return "a list"
        case _:
            return f"the single value '{value}'"

"""The words people read, from the wording file: templates by key, filled with named facts."""

from collections.abc import Mapping
from dataclasses import dataclass
from string import Formatter

from provenzero.reading.lines import Document, load_text
from provenzero.resources import checklists

_FORMATTER = Formatter()


@dataclass(frozen=True, slots=True, kw_only=True)
class Wording:
    """Templates, lists and rows of texts, by dotted key.

    A key or a fact that is missing is a fault of ours and raises KeyError.
    """

    language: str
    texts: Mapping[str, str]
    lists: Mapping[str, tuple[str, ...]]
    rows: Mapping[str, tuple[tuple[str, ...], ...]]

    def say(self, key: str, **facts: str) -> str:
        """The text of a key with its facts filled in."""
        return _FORMATTER.vformat(self.texts[key], (), facts)

    def has(self, key: str) -> bool:
        """Whether there is a text of that key."""
        return key in self.texts

    def first(self, *keys: str, **facts: str) -> str:
        """The text of the first of these keys that there is."""
        return self.say(next((k for k in keys if k in self.texts), keys[-1]), **facts)

    def points(self, key: str, **facts: str) -> tuple[str, ...]:
        """The texts of a list with their facts filled in."""
        return tuple(_FORMATTER.vformat(item, (), facts) for item in self.lists[key])

    def names(self, names: tuple[str, ...]) -> str:
        """Names in one line, or the word for none."""
        return self.say("list_join").join(names) if names else self.say("none")

    def branch(self, key: str) -> dict[str, str]:
        """All texts directly under a key, by their last word."""
        split = {k.rpartition("."): v for k, v in self.texts.items()}
        return {last: words for (start, _, last), words in split.items() if start == key}


def wording(data: Mapping[str, object]) -> Wording:
    """A wording from the data of its file; ValueError where a value is neither text, list nor mapping."""
    texts: dict[str, str] = {}
    lists: dict[str, tuple[str, ...]] = {}
    rows: dict[str, tuple[tuple[str, ...], ...]] = {}
    stack: list[tuple[str, object]] = [("", data)]
    while stack:
        key, value = stack.pop()
        match value:
            case str():
                texts[key] = value
            case Mapping():
                stack += [(f"{key}.{k}" if key else str(k), v) for k, v in reversed(list(value.items()))]
            case list() if value and all(isinstance(item, list) for item in value):
                rows[key] = tuple(tuple(str(cell) for cell in item) for item in value)
            case list() if all(isinstance(item, str) for item in value):
                lists[key] = tuple(value)
                if not value:
                    rows[key] = ()
            case _:
                raise ValueError(f"wording: {key} is neither text nor list")
    return Wording(language=texts["language"], texts=texts, lists=lists, rows=rows)


def load_wording(language: str = "en") -> Wording:
    """The wording of a language that ships with the program; ValueError if its file is not sound."""
    name = f"{language}.yaml"
    read = load_text(checklists().joinpath("wording", name).read_text(encoding="utf-8"), name)
    if not isinstance(read, Document):
        raise ValueError("; ".join(str(finding) for finding in read))
    return wording(read.data)


def facts_of(template: str) -> frozenset[str]:
    """The names of the facts a template asks for."""
    return frozenset(name for _, name, _, _ in _FORMATTER.parse(template) if name)

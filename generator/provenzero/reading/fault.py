"""A fault against a schema, free of the library that found it, and the branch of a choice that was meant."""

from collections.abc import Mapping
from dataclasses import dataclass, replace
from typing import Any, Final

from provenzero.reading.lines import Steps, Value

_SHAPE: Final = frozenset({"type", "enum", "const"})
_WORD: Final = frozenset({"enum", "const"})


@dataclass(frozen=True, slots=True, kw_only=True)
class Fault:
    """One keyword of a schema that a value does not meet.

    `wanted` is what the keyword asks for, `schema` the part of the schema it stands in. `on_key`: the fault is in the
    key at the end of the path. `branches` has the faults of each branch where the keyword offers a choice.
    """

    keyword: str
    wanted: Any
    value: Value
    schema: Mapping[str, Any]
    path: Steps
    on_key: bool
    message: str
    branches: tuple[tuple["Fault", ...], ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Choice:
    """What a failed choice comes down to: faults to tell each by itself, or ways to be right, any one of which does."""

    faults: tuple[Fault, ...] = ()
    ways: tuple[Fault, ...] = ()


def choice_of(fault: Fault) -> Choice:
    """The branch that was meant, judged by the shape of the value and by the words that tell the branches apart.

    A single value is told every way to be right. A mapping or a list belongs to the branch whose shape and whose
    constant words it has; where no branch has its words, the words are what is wrong.
    """
    branches = [_settled(branch) for branch in fault.branches]
    fitting = [branch for branch in branches if not any(f.path == fault.path and f.keyword in _SHAPE for f in branch)]
    if not isinstance(fault.value, dict | list) or not fitting:
        return Choice(ways=tuple(f for branch in branches for f in branch if f.path == fault.path))
    meant = [branch for branch in fitting if not any(_tells_apart(f, fault.path) for f in branch)]
    if not meant:
        return Choice(faults=(_wrong_word(fitting, fault.path),))
    if len(meant) > 1 and all(f.path == fault.path for branch in meant for f in branch):
        return Choice(ways=tuple(branch[0] for branch in meant))
    return Choice(faults=min(meant, key=len))


def _settled(branch: tuple[Fault, ...]) -> tuple[Fault, ...]:
    """The faults of a branch, with the choices inside it settled."""
    settled: list[Fault] = []
    for fault in branch:
        choice = choice_of(fault) if fault.branches else Choice(ways=(fault,))
        settled += choice.faults + choice.ways
    return tuple(settled)


def _tells_apart(fault: Fault, path: Steps) -> bool:
    return fault.keyword in _WORD and len(fault.path) == len(path) + 1


def _wrong_word(branches: list[tuple[Fault, ...]], path: Steps) -> Fault:
    """One fault for the word that fits no branch, wanting the words of all of them."""
    telling = [f for branch in branches for f in branch if _tells_apart(f, path)]
    same = [f for f in telling if f.path == telling[0].path]
    words = [word for f in same for word in (f.wanted if f.keyword == "enum" else [f.wanted])]
    return replace(same[0], keyword="enum", wanted=list(dict.fromkeys(words)))

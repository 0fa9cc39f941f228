"""Descriptions made from the example files by changing their data."""

from collections.abc import Callable
from copy import deepcopy
from typing import Any

from tests.properties.planning import EXAMPLES

from provenzero.reading.lines import Document, load


def data_of(name: str) -> dict[str, Any]:
    """The data of an example file."""
    document = load(EXAMPLES / f"{name}.yaml")
    assert isinstance(document, Document)
    data: Any = document.data
    return deepcopy(data)


def changed(name: str, change: Callable[[dict[str, Any]], object]) -> dict[str, Any]:
    """The data of an example file after a change."""
    data = data_of(name)
    change(data)
    return data

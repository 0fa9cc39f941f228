"""A word that is not known, to the known word that was most likely meant."""

from collections.abc import Sequence
from difflib import get_close_matches
from typing import Final

_ALIKE: Final = 0.6


def nearest(word: str, known: Sequence[str]) -> str | None:
    """The known word most like the given one; None if none is like it. Capitals and separators do not count."""
    plain = {_plain(candidate): candidate for candidate in reversed(known)}
    close = get_close_matches(_plain(word), list(plain), n=1, cutoff=_ALIKE)
    return plain[close[0]] if close else None


def _plain(word: str) -> str:
    return word.casefold().replace("-", "_").replace(" ", "_")

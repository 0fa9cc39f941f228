"""The word that was meant is found for a word that is not known."""

import pytest

from provenzero.reading.nearest import nearest

KNOWN = ("precharge", "precharge_temperature", "isolation", "bleed")


@pytest.mark.parametrize(
    ("word", "meant"),
    [
        ("prechrage", "precharge"),
        ("Precharge-Temperature", "precharge_temperature"),
        ("precharge temperature", "precharge_temperature"),
        ("BLEED", "bleed"),
        ("isolaton", "isolation"),
    ],
)
def test_a_slip_of_the_pen_finds_the_word_that_was_meant(word: str, meant: str) -> None:
    assert nearest(word, KNOWN) == meant


def test_a_word_like_none_finds_none() -> None:
    assert nearest("colour", KNOWN) is None
    assert nearest("bleed", ()) is None

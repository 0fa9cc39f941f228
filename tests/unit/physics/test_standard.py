"""Gauge and absolute pressure, and how a range is told."""

import math

import pytest

from provenzero.physics.standard import absolute_pa, check_range, gauge_pag


def test_a_gauge_that_reads_zero_stands_in_one_atmosphere() -> None:
    # Standard atmosphere, ISO 2533: 101 325 Pa.
    assert absolute_pa(0.0) == 101_325.0
    assert gauge_pag(101_325.0) == 0.0


def test_a_value_out_of_range_is_named_with_the_range() -> None:
    with pytest.raises(ValueError, match=r"^height_m is 12; the formula holds from 0 to 10$"):
        check_range("height_m", 12.0, 0.0, 10.0)
    with pytest.raises(ValueError, match="is nan"):
        check_range("height_m", math.nan, 0.0, 10.0)
    check_range("height_m", 10.0, 0.0, 10.0)
